package profile

import (
	"errors"
	"fmt"
	"math"
	"strings"
	"testing"

	"pastload/correlate"
)

// lastDigits is how far the arithmetic of a step may be from its value, in
// units of the last printed digit: every term is rounded as it is printed.
const lastDigits = 2.5

// redo holds every step with numbers to its value.
func redo(t *testing.T, e Explanation) {
	t.Helper()
	for _, s := range e.Steps {
		if s.Numbers == "" {
			continue
		}
		got, err := Arithmetic(s.Numbers)
		if err != nil {
			t.Errorf("%s, %s: %v", s.Group, s.Name, err)
			continue
		}
		// A term of six significant digits moves a large result by a few 1e-6 of it.
		tolerance := math.Max(lastDigits*math.Pow(10, -float64(s.Decimals)), 1e-5*math.Abs(s.Value.Value))
		if math.Abs(got-s.Value.Value) > tolerance {
			t.Errorf("%s, %s: %s gives %g, printed %s", s.Group, s.Name, s.Numbers, got, s.Printed())
		}
	}
}

// value returns the value of a step by the start of its group and its key.
func value(t *testing.T, e Explanation, group, key string) float64 {
	t.Helper()
	for _, s := range e.Steps {
		if strings.HasPrefix(s.Group, group) && s.Key == key {
			return s.Value.Value
		}
	}
	t.Fatalf("no step %s in %s", key, group)
	return 0
}

func TestExplainCanBeRedoneByHand(t *testing.T) {
	cases := []struct {
		name   string
		change func(*Borehole)
		depth  float64
		pore   float64 // kPa, by hand
		says   string  // in a formula or name
	}{
		{"below a water table", func(*Borehole) {}, 6, 5 * 9.81, "u0(the water table) + γw·Δz"},
		{"above the water table", func(*Borehole) {}, 0.5, 0, "0 above the water"},
		{"at the water table", func(*Borehole) {}, 1, 0, "at the water table"},
		{"between stations", func(*Borehole) {}, 6.123, 5.123 * 9.81, "γw·Δz"},
		{"water above ground", func(b *Borehole) { b.WaterTableDepth = Known(-2) }, 3, 5 * 9.81, "γw·hw"},
		{"dry ground", func(b *Borehole) { b.WaterTableDepth = Number{} }, 3, 0, "dry ground"},
		{"surcharge", func(b *Borehole) { b.Surcharge = Known(15) }, 3, 2 * 9.81, "q + Σ γ·Δz"},
		{"capillary fringe", func(b *Borehole) { b.CapillaryRise = Known(0.6) }, 0.8, -0.2 * 9.81, "in the capillary fringe"},
		{"between measured points", func(b *Borehole) {
			b.Water = []PorePressure{{Depth: Known(4), Pressure: Known(20)}, {Depth: Known(8), Pressure: Known(80)}}
		}, 5, 35, "straight line from the measured point"},
		{"table to measured point", func(b *Borehole) {
			b.Water = []PorePressure{{Depth: Known(5), Pressure: Known(50)}}
		}, 3, 25, "straight line from the water table"},
		{"below the last measured point", func(b *Borehole) {
			b.Water = []PorePressure{{Depth: Known(5), Pressure: Known(50)}}
		}, 7, 50 + 2*9.81, "u0(the measured point) + γw·Δz"},
		{"points alone, above the first", func(b *Borehole) {
			b.WaterTableDepth = Number{}
			b.Water = []PorePressure{{Depth: Known(5), Pressure: Known(80)}}
		}, 3, 48, "straight line between the two"},
		{"suction above", func(b *Borehole) {
			b.WaterTableDepth = Number{}
			b.Water = []PorePressure{{Depth: Known(2), Pressure: Known(-10)}, {Depth: Known(6), Pressure: Known(30)}}
		}, 1, -5, "straight line between the two"},
		{"on a boundary", func(*Borehole) {}, 2, 9.81, "γw·Δz"},
		{"at ground level", func(*Borehole) {}, 0, 0, "0 above the water"},
		{"unit weight from measured ones", func(b *Borehole) {
			b.Strata[1].SaturatedUnitWeight = Number{}
			b.Results[0].UnitWeight, b.Results[1].UnitWeight = Known(15.8), Known(16.3)
		}, 6, 5 * 9.81, "mean of the measured unit weights"},
		{"unit weight from w and Gs", func(b *Borehole) { b.Strata[1].SaturatedUnitWeight = Number{} }, 6, 5 * 9.81, "(Gs + e)·γw/(1 + e)"},
		{"unit weight from w, Gs assumed", func(b *Borehole) {
			b.Strata[1].SaturatedUnitWeight = Number{}
			for i := range b.Results {
				b.Results[i].SpecificGravity = Number{}
			}
		}, 6, 5 * 9.81, "specific gravity for it"},
		{"peat", func(b *Borehole) { b.Strata[1].Soil = "peat" }, 6, 5 * 9.81, "Cc"},
	}
	for _, c := range cases {
		t.Run(c.name, func(t *testing.T) {
			site := softSite()
			c.change(&site.Boreholes[0])
			p, err := Build(site, Options{})
			if err != nil {
				t.Fatal(err)
			}
			e, err := Explain(p, "BH1", c.depth)
			if err != nil {
				t.Fatal(err)
			}
			redo(t, e)
			if got := value(t, e, "Pore pressure", "pore_pressure_kPa"); math.Abs(got-c.pore) > 1e-9 {
				t.Errorf("u0 %g kPa, want %g", got, c.pore)
			}
			var text strings.Builder
			for _, s := range e.Steps {
				fmt.Fprintln(&text, s.Name, s.Formula)
			}
			if !strings.Contains(text.String(), c.says) {
				t.Errorf("no %q in:\n%s", c.says, text.String())
			}
			total, pore := value(t, e, "Total", "total_stress_kPa"), value(t, e, "Pore", "pore_pressure_kPa")
			if got := value(t, e, "Effective", "effective_stress_kPa"); math.Abs(got-(total-pore)) > 1e-9 {
				t.Errorf("σ′v0 %g kPa is not σv0 − u0 = %g", got, total-pore)
			}
		})
	}
}

// TestExplainGivesTheTest redoes one test: σ′p 70 kPa over σ′v0 50.95 kPa.
func TestExplainGivesTheTest(t *testing.T) {
	e, err := Explain(build(t, softSite()), "BH1", 6.04)
	if err != nil {
		t.Fatal(err)
	}
	redo(t, e)
	if got := value(t, e, "Preconsolidation test", "ocr"); math.Abs(got-70/50.95) > 1e-9 {
		t.Errorf("OCR %g, want %g", got, 70/50.95)
	}
	if got := value(t, e, "Preconsolidation test", "pop_kPa"); math.Abs(got-19.05) > 1e-9 {
		t.Errorf("POP %g kPa, want 19.05", got)
	}
	if got := value(t, e, "Effective stress, at the test", "effective_stress_kPa"); math.Abs(got-50.95) > 1e-9 {
		t.Errorf("σ′v0 at the test %g kPa, want 50.95", got)
	}
	if got := value(t, e, "Index properties", "plasticity_index_pct"); got != 32 {
		t.Errorf("PI %g %%, want 32", got)
	}
}

func TestExplainBeyondReach(t *testing.T) {
	e, err := Explain(build(t, softSite()), "BH1", 6.06)
	if err != nil {
		t.Fatal(err)
	}
	for _, s := range e.Steps {
		if strings.HasPrefix(s.Group, "Measured") || strings.HasPrefix(s.Group, "Preconsolidation test") {
			t.Errorf("a result 6 cm away is shown: %s, %s", s.Group, s.Name)
		}
	}
}

func TestExplainUsesGivenStress(t *testing.T) {
	site := &Site{Settings: DefaultSettings(), Boreholes: []Borehole{{Name: "S1", Strata: []Stratum{{Top: 1, Base: 5}}, Results: []Result{
		{Depth: Known(1), EffectiveStress: Number{Value: 10, Known: true, Source: &Cell{File: "r.csv", Line: 2, Column: 3, Text: "10", Unit: "kPa"}}, Preconsolidation: Known(60)},
		{Depth: Known(5), EffectiveStress: Number{Value: 47.88, Known: true, Source: &Cell{File: "r.csv", Line: 3, Column: 3, Text: "1000", Unit: "psf"}}, Preconsolidation: Known(66)},
	}}}}
	p, err := Build(site, Options{})
	if err != nil {
		t.Fatal(err)
	}
	for _, depth := range []float64{1, 2, 5} {
		e, err := Explain(p, "S1", depth)
		if err != nil {
			t.Fatal(err)
		}
		redo(t, e)
		if got, want := value(t, e, "Effective stress, as given", "effective_stress_kPa"), 10+37.88*(depth-1)/4; math.Abs(got-want) > 1e-9 {
			t.Errorf("σ′v0 at %g m: %g kPa, want %g", depth, got, want)
		}
	}
	e, _ := Explain(p, "S1", 5)
	for _, s := range e.Steps {
		if s.Name == "effective stress given at 5.00 m" {
			if s.Numbers != "1000 × 0.04788" || s.Source != "r.csv:3:3 “1000” psf" {
				t.Errorf("conversion %q from %q", s.Numbers, s.Source)
			}
		}
	}
}

func TestExplainRefuses(t *testing.T) {
	p := build(t, softSite())
	for _, c := range []struct {
		name, borehole string
		depth          float64
		want           error
	}{
		{"no such borehole", "BH9", 3, ErrNoBorehole},
		{"empty name", "", 3, ErrNoBorehole},
		{"below the ground", "BH1", 12.5, ErrDepth},
		{"above the ground", "BH1", -1, ErrDepth},
		{"no number", "BH1", math.NaN(), ErrDepth},
		{"infinite", "BH1", math.Inf(1), ErrDepth},
	} {
		t.Run(c.name, func(t *testing.T) {
			if _, err := Explain(p, c.borehole, c.depth); !errors.Is(err, c.want) {
				t.Errorf("error %v, want %v", err, c.want)
			}
		})
	}
}

// TestEveryCorrelationOfTheProfileIsFilledIn holds the substitution of numbers
// into formulas to the catalogue: of the entries that a profile uses all but
// those with conditions in words print arithmetic.
func TestEveryCorrelationOfTheProfileIsFilledIn(t *testing.T) {
	v := correlate.Values{"LL": 60, "PL": 25, "PI": 35, "w": 55, "Gs": 2.7, "e0": 1.485, "St": 5, "suFV": 25, "su": 20, "N60": 3, "KD": 3, "ID": 0.4, "Vs": 110, "qnet": 400, "du2": 250, "qeff": 200, "effective": 60}
	ids := []string{}
	for _, c := range correlate.For(correlate.CompressionIndex) {
		if c.Ground == correlate.NaturalClay && !c.Plausibility {
			ids = append(ids, c.ID)
		}
	}
	for _, s := range sources {
		ids = append(ids, s.correlation)
	}
	for _, id := range ids {
		c, _ := correlate.ByID(id)
		e, err := c.Evaluate(v)
		if err != nil {
			t.Errorf("%s: %v", id, err)
			continue
		}
		args := correlate.Values{}
		for _, u := range e.Used {
			args[u.Symbol] = u.Value
		}
		if text := filled(c.Formula, args, e.Value); text == "" {
			t.Errorf("%s: %s is not filled in", id, c.Formula)
		}
	}
}

// TestDerivedInputsAreExplainedInTurn: w from LI and PL, and PL from LL and PI.
func TestDerivedInputsAreExplainedInTurn(t *testing.T) {
	x := &explainer{}
	x.derived("w", correlate.Values{"LL": 50, "PI": 20, "LI": 1.2}, map[string]bool{})
	var got []string
	for _, s := range x.steps {
		got = append(got, s.Formula+" = "+s.Numbers)
	}
	if want := []string{"LL − PI = 50 − 20", "PL + LI·PI = 30 + 1.2·20"}; fmt.Sprint(got) != fmt.Sprint(want) {
		t.Errorf("got %q, want %q", got, want)
	}
}

func TestFilledNeverPrintsWrongArithmetic(t *testing.T) {
	args := correlate.Values{"PI": 30}
	if got := filled("Cc = 2.303·λ, λ = 0.02 + 0.0045·PI", args, 0.357); got != "" {
		t.Errorf("a formula with a symbol left in it: %q", got)
	}
	if got := filled("Cc = PI/74", args, 0.9); got != "" {
		t.Errorf("arithmetic that does not give the value: %q", got)
	}
	if got := filled("Cc = PI/74", args, 30.0/74); got != "30/74" {
		t.Errorf("got %q, want 30/74", got)
	}
}

func TestArithmetic(t *testing.T) {
	for text, want := range map[string]float64{
		"2 + 3 × 4": 14, "(2 + 3)·4": 20, "−2^2": -4, "2^−1": 0.5, "[1 + 1]^3": 8, "√(9)": 3, "√((3)^2 + (4)^2)": 5,
		"ln(1)": 0, "log(100)": 2, "exp(0)": 1, "5²": 25, "10 − 2 − 3": 5, "12 / 2 / 3": 2, "(−3) × 2": -6, "2 - 5": -3, "2³": 8,
	} {
		got, err := Arithmetic(text)
		if err != nil || math.Abs(got-want) > 1e-12 {
			t.Errorf("%s = %g, %v; want %g", text, got, err, want)
		}
	}
	for _, text := range []string{"", "2 +", "(2", "2)", "λ", "1 / 0", "ln(0)", "√(−1)", "2 3", "1..2", strings.Repeat("(", 1000)} {
		if v, err := Arithmetic(text); err == nil {
			t.Errorf("%q gives %g, want an error", text, v)
		}
	}
}

func FuzzArithmetic(f *testing.F) {
	for _, s := range []string{"2 + 3", "−(4)^2", "√ln exp", "((((", "1e5", "²", "\xff"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, text string) {
		if v, err := Arithmetic(text); err == nil && (math.IsNaN(v) || math.IsInf(v, 0)) {
			t.Errorf("%q gives %g without an error", text, v)
		}
	})
}

func ExampleExplain() {
	site := &Site{Settings: DefaultSettings(), Boreholes: []Borehole{{
		Name: "BH1", WaterTableDepth: Known(1),
		Strata: []Stratum{{Name: "Clay", Top: 0, Base: 6, UnitWeight: Known(18)}},
	}}}
	p, err := Build(site, Options{})
	if err != nil {
		fmt.Println(err)
		return
	}
	e, err := Explain(p, "BH1", 4)
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, s := range e.Steps {
		if s.Key == "total_stress_kPa" || s.Key == "pore_pressure_kPa" || s.Key == "effective_stress_kPa" {
			fmt.Printf("%s = %s = %s %s\n", s.Name, s.Numbers, s.Printed(), s.Unit)
		}
	}
	// Output:
	// total vertical stress σv0 = 18 + 54 = 72.000 kPa
	// pore pressure u0 = 0 + 9.81 × (4 − 1) = 29.430 kPa
	// effective vertical stress σ′v0 = 72 − 29.43 = 42.570 kPa
}
