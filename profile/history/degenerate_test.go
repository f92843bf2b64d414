package history

import (
	"encoding/json"
	"errors"
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

// fataler is a test that can stop.
type fataler interface {
	Helper()
	Fatalf(format string, args ...any)
}

// sound stops the test where a result is not finite, a band is out of order or
// probabilities do not add to one.
func sound(t fataler, res *Result) {
	t.Helper()
	if _, err := json.Marshal(res); err != nil {
		t.Fatalf("a number is not finite: %v", err)
	}
	ordered := func(what string, b Band) {
		t.Helper()
		if !(b.Low <= b.Best && b.Best <= b.High) {
			t.Fatalf("%s is out of order: %+v", what, b)
		}
	}
	one := func(what string, sum float64) {
		t.Helper()
		if math.Abs(sum-1) > 1e-9 {
			t.Fatalf("%s add to %g", what, sum)
		}
	}
	for _, p := range res.Points {
		ordered("σ′p", p.Preconsolidation)
		if p.Preconsolidation.Low <= 0 {
			t.Fatalf("σ′p is not above zero: %+v", p)
		}
		if p.HasOCR {
			ordered("OCR", p.OCR)
			ordered("POP", p.POP)
			sum := 0.0
			for _, q := range p.ZoneProbability {
				sum += q
			}
			one("zones", sum)
		}
	}
	for _, z := range res.Zones {
		ordered("top of a zone", z.Top)
		ordered("base of a zone", z.Base)
		ordered("OCR of a zone", z.OCR)
	}
	for _, l := range res.Layers {
		sum := 0.0
		for _, m := range l.Mechanisms {
			sum += m.Probability
			for _, p := range m.Parameters {
				ordered(m.Name+": "+p.Name, Band{p.Low, p.Best, p.High})
			}
		}
		one("mechanisms", sum)
		if l.Sentence == "" {
			t.Fatalf("layer %d has no sentence", l.Layer)
		}
	}
	for _, r := range res.Tests {
		ordered("expected σ′p", r.Expected)
	}
}

func width(b Band) float64 { return math.Log(b.High / b.Low) }

func TestDegenerateInput(t *testing.T) {
	at := func(z, s, p float64) Test { return Test{Depth: z, EffectiveStress: s, Preconsolidation: p} }
	stations := []Station{{Depth: 1, EffectiveStress: 10}, {Depth: 5, EffectiveStress: 50, LnSD: 0.05}, {Depth: 9, EffectiveStress: 90}}
	for _, c := range []struct {
		name     string
		change   func(in *Input)
		note     string  // that Notes hold
		narrow   float64 // the band at 5 m is at least this wide, ln
		verdicts string
	}{
		{name: "no tests", change: func(*Input) {}, note: "no evidence", narrow: 1.5},
		{name: "one test", change: func(in *Input) { in.Tests = []Test{at(5, 50, 100)} }, note: "one test", narrow: 0.2},
		{name: "all at one depth", change: func(in *Input) { in.Tests = []Test{at(5, 50, 100), at(5, 50, 110), at(5, 50, 95)} }, narrow: 0.05},
		{name: "identical tests", change: func(in *Input) { in.Tests = []Test{at(5, 50, 100), at(5, 50, 100), at(5, 50, 100), at(5, 50, 100)} }, narrow: 0.02},
		{name: "all conflicting", change: func(in *Input) {
			in.Tests = []Test{at(3, 30, 900), at(4, 40, 20), at(5, 50, 1200), at(6, 60, 15), at(7, 70, 2000)}
		}, note: "conflict with the rest", narrow: 0.3},
		{name: "correlations alone", change: func(in *Input) { *in = withReadings(*in, 6) }, note: "correlations alone", narrow: 0.3},
		{name: "no effective stress", change: func(in *Input) {
			in.Tests = []Test{at(1, 0, 40), at(5, -3, 60), at(9, 1e-9, 80)}
			for i := range in.Stations {
				in.Stations[i].EffectiveStress = 0
			}
		}, narrow: 0.05},
		{name: "bounds alone", change: func(in *Input) {
			in.Tests = []Test{at(4, 40, 200), at(6, 60, 300)}
			in.Tests[0].Kind, in.Tests[1].Kind = AtLeast, AtMost
		}, note: "bounds alone", narrow: 0.1},
		{name: "no stations", change: func(in *Input) { in.Stations = nil; in.Tests = []Test{at(5, 50, 100)} }},
		{name: "layer without thickness", change: func(in *Input) { in.Layers[0].Base = in.Layers[0].Top; in.Tests = []Test{at(0, 5, 100)} }, narrow: 0.1},
		{name: "extreme values", change: func(in *Input) { in.Tests = []Test{at(1, 1e-6, 1e-6), at(5, 1e8, 1e8), at(9, 90, 1e8)} }},
		{name: "exact tests", change: func(in *Input) {
			in.Tests = []Test{at(4, 40, 90), at(4, 40, 91), at(6, 60, 110)}
			for i := range in.Tests {
				in.Tests[i].LnSD = 1e-9
			}
		}},
	} {
		t.Run(c.name, func(t *testing.T) {
			in := Input{Layers: []Layer{{Name: "clay", Top: 0, Base: 10}}, Stations: append([]Station(nil), stations...)}
			c.change(&in)
			res, err := Infer(in)
			if err != nil {
				t.Fatal(err)
			}
			sound(t, res)
			if !strings.Contains(strings.Join(res.Notes, "\n"), c.note) {
				t.Errorf("notes %q do not say %q", res.Notes, c.note)
			}
			if len(res.Points) > 1 && width(res.Points[1].Preconsolidation) < c.narrow {
				t.Errorf("the band at 5 m is %.2f wide, want at least %.2f", width(res.Points[1].Preconsolidation), c.narrow)
			}
			for _, l := range res.Layers {
				if l.Distinguishable {
					t.Errorf("claims to tell the mechanisms apart: %s", l.Sentence)
				}
			}
		})
	}
}

func TestRefusedInput(t *testing.T) {
	good := func() Input { return madeUp(6, 5) }
	for _, c := range []struct {
		name   string
		change func(in *Input)
		says   string
	}{
		{"no layer", func(in *Input) { in.Layers = nil }, "no layer"},
		{"layer upside down", func(in *Input) { in.Layers[0].Base = -5 }, "layer 0"},
		{"σ′p of zero", func(in *Input) { in.Tests[2].Preconsolidation = 0 }, "test 2"},
		{"σ′p not a number", func(in *Input) { in.Tests[1].Preconsolidation = math.NaN() }, "test 1"},
		{"infinite σ′v0", func(in *Input) { in.Tests[1].EffectiveStress = math.Inf(1) }, "test 1"},
		{"layer out of the list", func(in *Input) { in.Tests[0].Layer = 3 }, "layer 3"},
		{"negative scatter", func(in *Input) { in.Tests[0].LnSD = -1 }, "test 0"},
		{"reading of zero", func(in *Input) { in.Readings = []Reading{{Source: "cone"}} }, "reading 0"},
		{"station not a number", func(in *Input) { in.Stations[0].Depth = math.NaN() }, "station 0"},
		{"unknown fact", func(in *Input) { in.Known = []Known{{Kind: "flood", Size: 3}} }, "flood"},
		{"limits that fall", func(in *Input) { in.Limits = [3]float64{2, 1, 4} }, "rise"},
		{"water without weight", func(in *Input) { in.WaterUnitWeight = -1 }, "unit weights"},
		{"neighbour of zero", func(in *Input) { in.Neighbours = []Test{{}} }, "neighbouring test 0"},
	} {
		t.Run(c.name, func(t *testing.T) {
			in := good()
			c.change(&in)
			_, err := Infer(in)
			if !errors.Is(err, ErrInput) || !strings.Contains(err.Error(), c.says) {
				t.Errorf("error %v, want one that says %q", err, c.says)
			}
		})
	}
}

// Whatever finite numbers come in, the answer is finite, in order, the same
// twice, and does not depend on the order of the tests.
func TestSoundForAnyInput(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		number := func(lo, hi float64, what string) float64 { return rapid.Float64Range(lo, hi).Draw(t, what) }
		in := Input{Layers: []Layer{{Top: 0, Base: 8}, {Top: 8, Base: 20}}, HasWater: rapid.Bool().Draw(t, "water"), WaterTable: number(-2, 10, "table")}
		test := func() Test {
			return Test{Depth: number(0, 20, "depth"), EffectiveStress: number(-5, 300, "σ′v0"), Preconsolidation: math.Exp(number(-3, 9, "ln σ′p")),
				LnSD: number(0, 0.5, "sd"), Kind: Kind(rapid.IntRange(0, 2).Draw(t, "kind")), Disturbance: number(0, 0.3, "disturbance"), Layer: rapid.IntRange(0, 1).Draw(t, "layer")}
		}
		for range rapid.IntRange(0, 6).Draw(t, "tests") {
			in.Tests = append(in.Tests, test())
		}
		for range rapid.IntRange(0, 2).Draw(t, "neighbours") {
			in.Neighbours = append(in.Neighbours, test())
		}
		for range rapid.IntRange(0, 4).Draw(t, "readings") {
			in.Readings = append(in.Readings, Reading{Source: rapid.SampledFrom([]string{"cone", "vane"}).Draw(t, "source"), Depth: number(0, 20, "depth"),
				EffectiveStress: number(-5, 300, "σ′v0"), Preconsolidation: math.Exp(number(-3, 9, "ln σ′p")), Layer: rapid.IntRange(0, 1).Draw(t, "layer")})
		}
		for range rapid.IntRange(0, 5).Draw(t, "stations") {
			in.Stations = append(in.Stations, Station{number(0, 20, "depth"), number(-5, 300, "σ′v0"), number(0, 0.5, "sd"), rapid.IntRange(0, 1).Draw(t, "layer")})
		}
		res, err := Infer(in)
		if err != nil {
			t.Fatalf("refused: %v", err)
		}
		sound(t, res)
		again, _ := Infer(in)
		a, _ := json.Marshal(res)
		b, _ := json.Marshal(again)
		if string(a) != string(b) {
			t.Fatalf("not the same twice")
		}
	})
}

func FuzzInfer(f *testing.F) {
	f.Add(3.0, 30.0, 90.0, 0.1, 5.0, 50.0, 110.0, 0.0)
	f.Add(0.0, 0.0, 1e-9, 0.0, 0.0, -1.0, 1e9, 1e9)
	f.Add(math.NaN(), 1.0, 1.0, 1.0, math.Inf(1), 1.0, 1.0, 1.0)
	f.Fuzz(func(t *testing.T, z1, s1, p1, sd1, z2, s2, p2, sd2 float64) {
		in := Input{
			Layers:   []Layer{{Top: 0, Base: 10}},
			Tests:    []Test{{Depth: z1, EffectiveStress: s1, Preconsolidation: p1, LnSD: sd1}, {Depth: z2, EffectiveStress: s2, Preconsolidation: p2, LnSD: sd2, Kind: AtLeast}},
			Readings: []Reading{{Source: "cone", Depth: z2, EffectiveStress: s1, Preconsolidation: p2, BetweenSD: sd1, WithinSD: sd2}},
			Stations: []Station{{Depth: z1, EffectiveStress: s2, LnSD: sd2}},
		}
		res, err := Infer(in)
		if err != nil {
			if !errors.Is(err, ErrInput) {
				t.Fatalf("error does not wrap ErrInput: %v", err)
			}
			return
		}
		sound(t, res)
	})
}
