package profile

import (
	"encoding/json"
	"errors"
	"fmt"
	"math"
	"strings"
	"testing"

	"gonum.org/v1/gonum/floats/scalar"
	"pgregory.net/rapid"
)

// closed is the relative tolerance of closed forms: rounding alone.
const closed = 1e-12

// softSite is 2 m of crust over 10 m of soft clay, water at 1 m, with three
// tests in the clay.
func softSite() *Site {
	s := &Site{Name: "test", Settings: DefaultSettings()}
	b := Borehole{
		Name: "BH1", GroundLevel: Known(3), WaterTableDepth: Known(1),
		Strata: []Stratum{
			{Name: "Crust", Soil: "clay", Top: 0, Base: 2, UnitWeight: Known(18)},
			{Name: "Soft clay", Soil: "clay", Top: 2, Base: 12, SaturatedUnitWeight: Known(16)},
		},
	}
	for _, d := range []struct{ z, p float64 }{{3, 55}, {6, 70}, {9, 92}} {
		b.Results = append(b.Results, Result{
			Depth: Known(d.z), Specimen: fmt.Sprintf("U%g", d.z), Preconsolidation: Known(d.p),
			LiquidLimit: Known(60), PlasticLimit: Known(28), WaterContent: Known(58), SpecificGravity: Known(2.7),
			VoidRatio: Known(1.566), CompressionIndex: Known(0.5),
		})
	}
	s.Boreholes = []Borehole{b}
	return s
}

func build(t *testing.T, s *Site) *Profile {
	t.Helper()
	p, err := Build(s, Options{At: []float64{3.2}})
	if err != nil {
		t.Fatal(err)
	}
	return p
}

func TestBuildGivesTheProfileAtItsDepths(t *testing.T) {
	p := build(t, softSite()).Boreholes[0]
	want := map[float64]int{0: 1, 0.5: 1, 1: 1, 2: 2, 3: 1, 3.2: 1, 12: 1} // a boundary has a point for each side
	got := map[float64]int{}
	for i, pt := range p.Points {
		got[pt.Depth]++
		if i > 0 && pt.Depth < p.Points[i-1].Depth {
			t.Errorf("point %d at %g m comes after %g m", i, pt.Depth, p.Points[i-1].Depth)
		}
		if !pt.Effective.Known {
			t.Errorf("no effective stress at %g m", pt.Depth)
		}
	}
	for d, n := range want {
		if got[d] != n {
			t.Errorf("%d points at %g m, want %d", got[d], d, n)
		}
	}
}

// TestStressesByHand redoes one depth: 2 m of 18 kN/m³, 4 m of 16 kN/m³, water
// from 1 m: σv0 = 36 + 64 = 100 kPa, u0 = 5·9.81 = 49.05 kPa, σ′v0 = 50.95 kPa.
func TestStressesByHand(t *testing.T) {
	for _, test := range build(t, softSite()).Boreholes[0].Tests {
		if test.Depth != 6 {
			continue
		}
		if got := test.Effective.Value; !scalar.EqualWithinAbsOrRel(got, 50.95, closed, closed) {
			t.Errorf("σ′v0 at 6 m = %g, want 50.95", got)
		}
		if got := test.OCR.Value; !scalar.EqualWithinAbsOrRel(got, 70/50.95, closed, closed) {
			t.Errorf("OCR at 6 m = %g, want %g", got, 70/50.95)
		}
		if got := test.POP.Value; !scalar.EqualWithinAbsOrRel(got, 70-50.95, closed, closed) {
			t.Errorf("POP at 6 m = %g, want %g", got, 70-50.95)
		}
		return
	}
	t.Fatal("no test at 6 m")
}

// TestRatiosAgree holds the three forms of one fact together at every point:
// OCR·σ′v0 = σ′p = σ′v0 + POP.
func TestRatiosAgree(t *testing.T) {
	// The history carries the uncertainty of σ′v0 into OCR and POP, so medians
	// agree to what that spread can shift them and no closer.
	const medians = 0.03
	for _, pt := range build(t, softSite()).Boreholes[0].Points {
		if !pt.OCR.Known || pt.Effective.Value < 10 {
			continue
		}
		s := pt.Preconsolidation.Best
		if got := pt.OCR.Best * pt.Effective.Value; !scalar.EqualWithinRel(got, s, medians) {
			t.Errorf("at %g m OCR·σ′v0 = %g, σ′p = %g", pt.Depth, got, s)
		}
		if got := pt.POP.Best + pt.Effective.Value; !scalar.EqualWithinRel(got, s, medians) {
			t.Errorf("at %g m POP + σ′v0 = %g, σ′p = %g", pt.Depth, got, s)
		}
	}
}

func TestTestsRoundTrip(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := softSite()
		b := &s.Boreholes[0]
		for i := range b.Results {
			b.Results[i].Preconsolidation.Value = rapid.Float64Range(1, 2000).Draw(t, "σ′p")
			b.Results[i].Depth.Value = rapid.Float64Range(0.1, 11.9).Draw(t, "depth")
		}
		p, err := Build(s, Options{})
		if err != nil {
			t.Fatal(err)
		}
		for _, test := range p.Boreholes[0].Tests {
			e, best := test.Effective.Value, test.Preconsolidation.Best
			if e <= 0 {
				continue
			}
			if !scalar.EqualWithinRel(test.OCR.Value*e, best, closed) || !scalar.EqualWithinAbsOrRel(test.POP.Value+e, best, 1e-9, closed) {
				t.Fatalf("OCR %g, POP %g, σ′v0 %g do not give σ′p %g", test.OCR.Value, test.POP.Value, e, best)
			}
		}
	})
}

// TestSplittingALayerChangesNothing cuts the soft clay at any depth.
func TestSplittingALayerChangesNothing(t *testing.T) {
	whole := build(t, softSite()).Boreholes[0]
	rapid.Check(t, func(t *rapid.T) {
		cut := rapid.Float64Range(2.01, 11.99).Draw(t, "cut")
		s := softSite()
		b := &s.Boreholes[0]
		lower := b.Strata[1]
		b.Strata[1].Base, lower.Top = cut, cut
		b.Strata = append(b.Strata, lower)
		p, err := Build(s, Options{At: []float64{3.2}})
		if err != nil {
			t.Fatal(err)
		}
		i := 0
		for _, pt := range p.Boreholes[0].Points {
			if pt.Depth == cut && whole.Points[i].Depth != cut {
				continue
			}
			for pt.Depth > whole.Points[i].Depth {
				i++
			}
			if w := whole.Points[i]; pt.Depth == w.Depth && !scalar.EqualWithinAbsOrRel(pt.Effective.Value, w.Effective.Value, 1e-9, closed) {
				t.Fatalf("at %g m σ′v0 = %g, whole layer %g", pt.Depth, pt.Effective.Value, w.Effective.Value)
			}
		}
	})
}

func TestOrderOfBoreholesAndResultsChangesNothing(t *testing.T) {
	a := softSite()
	b := softSite()
	r := b.Boreholes[0].Results
	r[0], r[2] = r[2], r[0]
	x, y := build(t, a).Boreholes[0], build(t, b).Boreholes[0]
	for i := range x.Points {
		if got, want := mustJSON(t, y.Points[i]), mustJSON(t, x.Points[i]); got != want {
			t.Fatalf("point %d:\n got %s\nwant %s", i, got, want)
		}
	}
}

func mustJSON(t *testing.T, v any) string {
	t.Helper()
	b, err := json.Marshal(v)
	if err != nil {
		t.Fatal(err)
	}
	return string(b)
}

// TestSameBytes builds twice: maps and pointers must not show.
func TestSameBytes(t *testing.T) {
	if a, b := mustJSON(t, build(t, softSite())), mustJSON(t, build(t, softSite())); a != b {
		t.Error("two runs differ")
	}
}

func TestMissingUnitWeight(t *testing.T) {
	cases := []struct {
		name   string
		change func(*Site)
		want   string // in an assumption, or in the error
		fails  bool
	}{
		{"from densities measured in the stratum", func(s *Site) {
			s.Boreholes[0].Strata[1].SaturatedUnitWeight = Number{}
			s.Boreholes[0].Results[0].UnitWeight = Known(16.2)
			s.Boreholes[0].Results[1].UnitWeight = Known(16.4)
		}, "16.30 kN/m³ is the mean of 2 measured unit weights in BH1", false},
		{"from w and Gs", func(s *Site) { s.Boreholes[0].Strata[1].SaturatedUnitWeight = Number{} }, "follows from w = 58.0 %", false},
		{"from w and an assumed Gs", func(s *Site) {
			s.Boreholes[0].Strata[1].SaturatedUnitWeight = Number{}
			for i := range s.Boreholes[0].Results {
				s.Boreholes[0].Results[i].SpecificGravity = Number{}
			}
		}, "Gs taken as 2.70 (assumed", false},
		{"nothing to go by", func(s *Site) {
			s.Boreholes[0].Strata[0].UnitWeight = Number{}
		}, "Crust (0.00 to 2.00 m in BH1) has none", true},
		{"peat without Gs is not guessed", func(s *Site) {
			s.Boreholes[0].Strata[1].SaturatedUnitWeight = Number{}
			s.Boreholes[0].Strata[1].Soil = "peat"
			for i := range s.Boreholes[0].Results {
				s.Boreholes[0].Results[i].SpecificGravity = Number{}
			}
		}, "Soft clay (2.00 to 12.00 m in BH1) has none", true},
	}
	for _, c := range cases {
		t.Run(c.name, func(t *testing.T) {
			s := softSite()
			c.change(s)
			p, err := Build(s, Options{})
			if c.fails {
				if !errors.Is(err, ErrNoStress) || !strings.Contains(err.Error(), c.want) {
					t.Fatalf("error %v, want one with %q", err, c.want)
				}
				return
			}
			if err != nil {
				t.Fatal(err)
			}
			for _, a := range p.Boreholes[0].Assumptions {
				if strings.Contains(a.Message, c.want) && a.Top == 2 && a.Base == 12 {
					return
				}
			}
			t.Errorf("assumptions %v, want one with %q", p.Boreholes[0].Assumptions, c.want)
		})
	}
}

// TestAllProblemsAtOnce leaves out two unit weights in two boreholes.
func TestAllProblemsAtOnce(t *testing.T) {
	s := softSite()
	other := softSite().Boreholes[0]
	other.Name = "BH2"
	s.Boreholes = append(s.Boreholes, other)
	for i := range s.Boreholes {
		s.Boreholes[i].Strata[0].UnitWeight = Number{}
		s.Boreholes[i].Strata[0].Name = fmt.Sprint("Fill ", i) // or one would lend the other its results
	}
	_, err := Build(s, Options{})
	var ps Problems
	if !errors.As(err, &ps) || len(ps) != 2 {
		t.Fatalf("error %v, want two problems", err)
	}
}

func TestGivenEffectiveStressIsUsedAndSaid(t *testing.T) {
	s := &Site{Settings: DefaultSettings()}
	b := Borehole{Name: "S01", Strata: []Stratum{{Top: 0, Base: 10}}}
	for _, d := range []struct{ z, e, p float64 }{{1, 6, 85}, {5, 32, 45}, {10, 60, 84}} {
		b.Results = append(b.Results, Result{Depth: Known(d.z), EffectiveStress: Known(d.e), Preconsolidation: Known(d.p)})
	}
	s.Boreholes = []Borehole{b}
	p := build(t, s).Boreholes[0]
	if len(p.Assumptions) != 1 || !strings.Contains(p.Assumptions[0].Message, "used as the results table gives it") {
		t.Errorf("assumptions %v", p.Assumptions)
	}
	for _, pt := range p.Points {
		if pt.Depth == 3 && !scalar.EqualWithinAbsOrRel(pt.Effective.Value, 19, closed, closed) { // half way from 6 to 32
			t.Errorf("σ′v0 at 3 m = %g, want 19", pt.Effective.Value)
		}
		if pt.Total.Known {
			t.Errorf("a total stress at %g m from nothing", pt.Depth)
		}
	}
}

func TestDecisions(t *testing.T) {
	cases := []struct {
		name string
		d    Decision
		used bool
		best float64
		why  string
	}{
		{"left out", Decision{Borehole: "BH1", Specimen: "U6", Quantity: "preconsolidation stress", Decision: LeaveOut, Reason: "disturbed", By: "K.L.", Date: "2021-03-04"}, false, 70, "left out: disturbed (K.L., 2021-03-04)"},
		{"adopted", Decision{Borehole: "BH1", Depth: Known(6), Quantity: "preconsolidation stress", Decision: AdoptValue, Value: Known(78), Reason: "re-read", By: "K.L.", Date: "2021-03-04"}, true, 78, "adopted value: re-read"},
		{"another borehole", Decision{Borehole: "BH9", Depth: Known(6), Quantity: "preconsolidation stress", Decision: LeaveOut}, true, 70, ""},
		{"another quantity", Decision{Borehole: "BH1", Depth: Known(6), Quantity: "water content", Decision: LeaveOut}, true, 70, ""},
	}
	for _, c := range cases {
		t.Run(c.name, func(t *testing.T) {
			s := softSite()
			s.Decisions = []Decision{c.d}
			for _, test := range build(t, s).Boreholes[0].Tests {
				if test.Depth != 6 {
					continue
				}
				if test.Used != c.used || test.Preconsolidation.Best != c.best || !strings.Contains(test.Why, c.why) {
					t.Errorf("used %v, σ′p %g, why %q", test.Used, test.Preconsolidation.Best, test.Why)
				}
			}
		})
	}
}

// TestHeave lets artesian water carry the whole weight: no OCR, and said.
func TestHeave(t *testing.T) {
	s := softSite()
	s.Boreholes[0].Water = []PorePressure{{Depth: Known(12), Pressure: Known(250)}}
	p := build(t, s).Boreholes[0]
	for _, pt := range p.Points {
		if pt.Effective.Value <= 0 && pt.Depth > 0 && (pt.OCR.Known || pt.Zone != "") {
			t.Errorf("an OCR at %g m with σ′v0 = %g", pt.Depth, pt.Effective.Value)
		}
	}
	if !strings.Contains(strings.Join(p.Notes, "\n"), "zero or less") {
		t.Errorf("notes %v do not tell of it", p.Notes)
	}
}

func TestNothingButStresses(t *testing.T) {
	s := softSite()
	s.Boreholes[0].Results = nil
	p := build(t, s).Boreholes[0]
	if len(p.Points) == 0 || len(p.Zones) != 0 {
		t.Errorf("%d points and %d zones, want points without zones", len(p.Points), len(p.Zones))
	}
	if !strings.Contains(strings.Join(p.Notes, " "), "No preconsolidation stress") {
		t.Errorf("notes %v", p.Notes)
	}
}

func TestBoundsInJSON(t *testing.T) {
	for _, c := range []struct {
		r    Range
		want string
	}{
		{Range{}, "null"},
		{Around(1, 2, 3), `{"low":1,"best":2,"high":3}`},
		{BoundAt(90, AtLeast), `{"low":90,"best":null,"high":null}`},
		{BoundAt(90, AtMost), `{"low":null,"best":null,"high":90}`},
	} {
		if got := mustJSON(t, c.r); got != c.want {
			t.Errorf("%+v gives %s, want %s", c.r, got, c.want)
		}
	}
}

func TestZoneLimitsBelongToTheZoneAbove(t *testing.T) {
	l := DefaultSettings().Limits
	for ocr, want := range map[float64]Zone{
		0.84: Underconsolidated, 0.85: NormallyConsolidated, 1.19: NormallyConsolidated,
		1.2: LightlyOverconsolidated, 3.99: LightlyOverconsolidated, 4: HeavilyOverconsolidated, math.Inf(1): HeavilyOverconsolidated,
	} {
		if got := l.Zone(ocr); got != want {
			t.Errorf("OCR %g is %q, want %q", ocr, got, want)
		}
	}
}

func BenchmarkBuild(b *testing.B) {
	s := softSite()
	for b.Loop() {
		if _, err := Build(s, Options{}); err != nil {
			b.Fatal(err)
		}
	}
}

// TestConeSpeaksBesideTheTests puts a sounding of constant net resistance beside
// the clay: 0.33·qnet lies near the tests, so the factor stays near the
// published one and the sounding narrows the band where no test is.
func TestConeSpeaksBesideTheTests(t *testing.T) {
	s := softSite()
	sounding := Sounding{Borehole: "BH1", AreaRatio: Known(0.8)}
	for i := range 100 {
		z := 2 + float64(i)*0.1
		sounding.Readings = append(sounding.Readings, ConeReading{Depth: z, CorrectedResistance: Known((16*z + 4 + 210) / 1000)})
	}
	s.Soundings = []Sounding{sounding}
	with, without := build(t, s).Boreholes[0], build(t, softSite()).Boreholes[0]
	if with.Cone == nil || len(with.Cone.Layers) < 10 {
		t.Fatalf("cone %+v", with.Cone)
	}
	if f := with.Cone.Factors[0]; f.Tests != 3 || f.Factor.Best < 0.25 || f.Factor.Best > 0.45 {
		t.Errorf("factor %+v, want one near 0.33 from three tests", f)
	}
	width := func(p BoreholeProfile) float64 {
		for _, pt := range p.Points {
			if pt.Depth == 12 {
				return math.Log(pt.Preconsolidation.High / pt.Preconsolidation.Low)
			}
		}
		return 0
	}
	if a, b := width(with), width(without); !(a < b) {
		t.Errorf("the band at 12 m is %g with the cone and %g without", a, b)
	}
}

// TestConeInTheWrongUnitStopsTheRun gives resistances in kPa as if they were MPa.
func TestConeInTheWrongUnitStopsTheRun(t *testing.T) {
	s := softSite()
	sounding := Sounding{Borehole: "BH1", AreaRatio: Known(0.8)}
	for i := range 100 {
		z := 2 + float64(i)*0.1
		sounding.Readings = append(sounding.Readings, ConeReading{Depth: z, CorrectedResistance: Known(16*z + 200)})
	}
	s.Soundings = []Sounding{sounding}
	p, err := Build(s, Options{})
	said := err != nil && strings.Contains(err.Error(), "cone")
	if err == nil {
		said = strings.Contains(strings.Join(p.Boreholes[0].Cone.Notes, " "), "kPa")
	}
	if !said {
		t.Errorf("a resistance of 400 MPa in soft clay went unsaid: %v", err)
	}
}
