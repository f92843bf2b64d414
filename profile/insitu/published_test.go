package insitu_test

import (
	"math"
	"testing"

	"pastload/profile/insitu"
)

func TestPublished(t *testing.T) {
	cases := insitu.Published()
	if len(cases) < 18 {
		t.Fatalf("%d published cases; want at least 18", len(cases))
	}
	names := map[string]bool{}
	for _, c := range cases {
		t.Run(c.Name, func(t *testing.T) {
			if c.Source == "" || c.Tolerance <= 0 || !c.Want.Any() || names[c.Name] {
				t.Errorf("source %q, tolerance %g, any value %v, name repeated %v", c.Source, c.Tolerance, c.Want.Any(), names[c.Name])
			}
			if c.Mark != insitu.Read && c.Mark != insitu.DataRead && c.Mark != insitu.FromMemory {
				t.Errorf("mark %q", c.Mark)
			}
			names[c.Name] = true
			got, err := c.Obtained()
			if err != nil {
				t.Fatal(err)
			}
			if !c.Want.Agrees(got, c.Tolerance) {
				t.Errorf("σ %.3f, u %.3f, σ′ %.3f %s; want %+v (%s)", got.Total, got.Pore, got.Effective, c.Unit, c.Want, c.Source)
			}
		})
	}
}

// Sources that are wrong must be told apart by far more than a rounding.
func TestPublishedWrongAnswersAreRejected(t *testing.T) {
	wrong := 0
	for _, c := range insitu.Published() {
		if !c.Printed.Any() {
			continue
		}
		wrong++
		got, err := c.Obtained()
		if err != nil {
			t.Fatal(err)
		}
		if c.Printed.Agrees(got, 100*c.Tolerance) {
			t.Errorf("%s: σ′ %.2f agrees with the wrong %.2f", c.Name, got.Effective, c.Printed.Effective.Value)
		}
		if math.Abs(got.Effective-c.Printed.Effective.Value) < 5 {
			t.Errorf("%s: σ′ %.2f is not told apart from %.2f", c.Name, got.Effective, c.Printed.Effective.Value)
		}
	}
	if wrong != 2 {
		t.Errorf("%d wrong answers; want 2", wrong)
	}
}

// cancellation is what a difference of two stresses near 2,000 kPa may lose.
const cancellation = 1e-9

func TestDeepSeaKeepsEffectiveStress(t *testing.T) {
	for _, sea := range []float64{0, 2, 200, 11000} {
		s, err := insitu.New(insitu.Column{
			Layers:   []insitu.Layer{{Top: 0, Base: 10, UnitWeight: 20, SaturatedUnitWeight: 20}},
			HasWater: true, WaterTable: -sea, WaterUnitWeight: 9.8,
		})
		if err != nil {
			t.Fatal(err)
		}
		got, err := s.At(5)
		if err != nil {
			t.Fatal(err)
		}
		buoyant, err := s.Buoyant(5)
		if err != nil {
			t.Fatal(err)
		}
		if math.Abs(got.Effective-51) > cancellation || math.Abs(buoyant-51) > cancellation {
			t.Errorf("under %g m of sea: σ − u = %.12f, buoyant %.12f kPa; want 51", sea, got.Effective, buoyant)
		}
	}
}

func TestChangesThatSourcesState(t *testing.T) {
	found := map[string]insitu.State{}
	for _, c := range insitu.Published() {
		s, err := c.Obtained()
		if err != nil {
			t.Fatal(err)
		}
		found[c.Name] = s
	}
	for _, c := range []struct {
		before, after string
		want          float64 // change of σ′v0, kPa
		source        string
	}{
		{"Water table before lowering, z = 10 m", "Water table lowered by 2 m, z = 10 m", 13.62, "Das, Foundation Engineering, problem 2.9 (data read, answer ours)"},
		{"Half-saturated sand, z = 10 m", "Half-saturated sand, water risen 1 m, z = 10 m", 2.02, "Indian exam solution page (read)"},
		{"Lake of 6 m, z = 15 m", "Lake fallen to 4 m, z = 15 m", 0, "The Groundwater Project, exercise 1 (data read, answer ours)"},
		{"Aquifer before pumping, z = 50 m", "Aquifer pumped down by 10 m, z = 50 m", 98.1, "confined-aquifer exercise (data read, answer ours)"},
		{"Sand over clay, z = 5 m", "Sand over clay, 1 m of capillary water, z = 5 m", 3.0, "Craig, example 3.1 (answers from memory)"},
	} {
		before, ok := found[c.before]
		after, ok2 := found[c.after]
		if !ok || !ok2 {
			t.Fatalf("no case %q or %q", c.before, c.after)
		}
		if got := after.Effective - before.Effective; math.Abs(got-c.want) > 0.005 {
			t.Errorf("%s → %s: σ′ changes by %.3f; want %.2f (%s)", c.before, c.after, got, c.want, c.source)
		}
	}
}
