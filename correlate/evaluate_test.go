package correlate

import (
	"errors"
	"math"
	"slices"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

func TestEvaluateGuards(t *testing.T) {
	cases := []struct {
		name, id string
		given    Values
		err      error  // nil where a value comes back
		says     string // in the error or in a warning
	}{
		{"inside the range", "terzaghi-peck-1967", Values{"LL": 50}, nil, ""},
		{"beyond the range", "terzaghi-peck-1967", Values{"LL": 130}, nil, "LL 130 % is outside 20 to 100 %"},
		{"LL of 10 gives nothing", "terzaghi-peck-1967", Values{"LL": 10}, ErrNotApplicable, "only between 10 and 1000 %"},
		{"a fraction for a percentage", "nagaraj-1988", Values{"LL": 0.45}, nil, "looks like a fraction"},
		{"missing", "azzouz-1976-e0", Values{"LL": 50}, ErrMissingInput, "void ratio (e0)"},
		{"two missing are both named", "azzouz-1976-e0-ll", Values{"PI": 20}, ErrMissingInput, "liquid limit (LL)"},
		{"not a number", "azzouz-1976-e0", Values{"e0": math.NaN()}, ErrNotApplicable, "is not a number"},
		{"infinite", "azzouz-1976-e0", Values{"e0": math.Inf(1)}, ErrNotApplicable, "is not a number"},
		{"impossible", "azzouz-1976-e0", Values{"e0": -0.5}, ErrNotApplicable, "is not possible"},
		{"LL below PL", "kulhawy-mayne-1990-cc", Values{"LL": 20, "PL": 25}, ErrNotApplicable, "plasticity index -5 % is not possible"},
		{"limits apart from PI", "kulhawy-mayne-1990-cc", Values{"LL": 60, "PL": 25, "PI": 25}, nil, "PI given as 25 %, but LL − PL is 35 %"},
		{"LI apart from w", "stas-kulhawy-1984", Values{"LI": 0.5, "w": 50, "PL": 20, "PI": 30}, nil, "LI given as 0.5, but (w − PL)/PI is 1"},
		{"void ratio apart from w", "azzouz-1976-e0", Values{"e0": 1.5, "w": 40, "Gs": 2.7}, nil, "not saturated"},
		{"what is not used is not judged", "azzouz-1976-e0", Values{"e0": 1.1, "LL": 60, "PL": 25, "PI": 10}, nil, ""},
		{"LI of zero", "stas-kulhawy-1984", Values{"LI": 0}, ErrNotApplicable, "only between 0 and 2"},
		{"LI above two", "degroot-1999", Values{"LI": 2.5}, ErrNotApplicable, "only between 0 and 2"},
		{"index below today's stress", "stas-kulhawy-1984", Values{"LI": 1, "effective": 200}, ErrNotApplicable, "not that the ground is underconsolidated"},
		{"w above LL", "nagaraj-murthy-1986", Values{"w": 70, "LL": 60, "effective": 50}, ErrNotApplicable, "only between"},
		{"porosity near the pole", "park-koumoto-2004", Values{"n0": 80}, ErrNotApplicable, "only between 0 and 75 %"},
		{"eL outside Burland's clays", "burland-1990-cc", Values{"eL": 5}, ErrNotApplicable, "only between 0.6 and 4.5"},
		{"cone ratio near the surface", "kulhawy-mayne-1990-q", Values{"qnet": 200, "effective": 6}, ErrNotApplicable, "only between 10"},
		{"negative excess pressure", "chen-mayne-1996-du2", Values{"du2": -20}, ErrNotApplicable, "only between 0"},
		{"sand by the dilatometer", "marchetti-1980-ocr", Values{"KD": 4, "ID": 1.8}, ErrNotApplicable, "only between 0 and 1.2"},
		{"material index not known", "marchetti-1980-ocr", Values{"KD": 4}, nil, "ID is not given"},
		{"K0 at its cap", "mayne-kulhawy-1982", Values{"phi": 20, "OCR": 100}, nil, "capped at 2.04"},
		{"K0 of first loading where unloaded", "jaky-1948", Values{"phi": 25, "OCR": 4}, ErrNotApplicable, "only between 0 and 2"},
		{"K0 below OCR one", "mayne-kulhawy-1982", Values{"phi": 25, "OCR": 0.9}, nil, "taken as 1"},
		{"sensitive clay", "terzaghi-peck-1967", Values{"LL": 50, "St": 12}, nil, "steeper"},
		{"vane correction above 1.2", "larsson-1984", Values{"LL": 28}, nil, "more evidence"},
		{"sensitivity of the other branch", "karlsrud-2005-low", Values{"Q": 6, "St": 40}, ErrNotApplicable, "only between 0.9 and 15"},
	}
	for _, c := range cases {
		t.Run(c.name, func(t *testing.T) {
			entry, ok := ByID(c.id)
			if !ok {
				t.Fatalf("no %q", c.id)
			}
			e, err := entry.Evaluate(c.given)
			if !errors.Is(err, c.err) {
				t.Fatalf("err = %v, want %v", err, c.err)
			}
			text := strings.Join(e.Warnings, "; ")
			if err != nil {
				text = err.Error()
			}
			if !strings.Contains(text, c.says) || c.says == "" && text != "" {
				t.Errorf("says %q, want %q", text, c.says)
			}
		})
	}
}

// TestCoefficientAtRestNeverExceedsPassive holds the upper point of the band to
// the cap too.
func TestCoefficientAtRestNeverExceedsPassive(t *testing.T) {
	const rounding = 1e-12
	for _, ocr := range []float64{1, 4, 12, 20, 100} {
		e := must(t, "mayne-kulhawy-1982", Values{"phi": 25, "OCR": ocr})
		s := math.Sin(25 * math.Pi / 180)
		if passive := (1 + s) / (1 - s); e.High > passive+rounding || e.Value > e.High {
			t.Errorf("OCR %v: %v to %v above %v", ocr, e.Value, e.High, passive)
		}
	}
}

func TestDerivedInputsAreSaid(t *testing.T) {
	e := must(t, "ching-phoon-2012-yield", Values{"w": 45, "LL": 60, "PL": 25, "St": 5})
	if len(e.Used) != 2 || e.Used[0].Derived != "(w − PL)/PI" || math.Abs(e.Used[0].Value-20.0/35) > 1e-12 {
		t.Errorf("used %+v", e.Used)
	}
}

func TestLookUp(t *testing.T) {
	for text, want := range map[string]string{"LL": "LL", "liquid limit": "LL", "σ′v0": "effective",
		"qt − σv0": "qnet", "net cone resistance": "qnet", "water content": "w", "W": "w", "n60": "N60", "GS": "Gs"} {
		if v, ok := LookUp(text); !ok || v.Symbol != want {
			t.Errorf("LookUp(%q) = %q, %v", text, v.Symbol, ok)
		}
	}
	if v, ok := LookUp("moisture"); ok {
		t.Errorf("found %v", v)
	}
}

func TestValuesCheckNamesAll(t *testing.T) {
	err := Values{"LL": 50, "ll": 50, "e0": -1}.Check()
	if !errors.Is(err, ErrUnknownSymbol) || !errors.Is(err, ErrNotApplicable) || !strings.Contains(err.Error(), `"ll"`) {
		t.Errorf("err = %v", err)
	}
	if err := (Values{"LL": 50}).Check(); err != nil {
		t.Error(err)
	}
}

func TestBand(t *testing.T) {
	v := Values{"e0": 1.2, "LL": 55, "PI": 28, "w": 44}
	t.Run("a near copy changes nothing", func(t *testing.T) {
		one, err := BandOf(CompressionIndex, v, []string{"terzaghi-peck-1967", "azzouz-1976-e0"})
		if err != nil {
			t.Fatal(err)
		}
		two, err := BandOf(CompressionIndex, v, []string{"terzaghi-peck-1967", "azzouz-1976-e0", "mayne-1980", "azzouz-1976-ll"})
		if err != nil {
			t.Fatal(err)
		}
		if one.Best != two.Best || one.Low != two.Low || len(two.Members) != 4 {
			t.Errorf("%v and %v", one.Best, two.Best)
		}
	})
	t.Run("never sharper than the sharpest voice", func(t *testing.T) {
		b, err := BandOf(CompressionIndex, v, nil)
		if err != nil || b.LnSD < assumedCompressionScatter.Total() {
			t.Errorf("sd %v, %v", b.LnSD, err)
		}
	})
	t.Run("index rules stay out of σ′p", func(t *testing.T) {
		b, err := BandOf(PreconsolidationStress, Values{"LI": 0.6, "St": 4, "qnet": 400, "effective": 50}, nil)
		if err != nil {
			t.Fatal(err)
		}
		for _, m := range b.Members {
			if m.Correlation.Plausibility {
				t.Errorf("%s is in", m.Correlation.ID)
			}
		}
		if !slices.Contains(b.Warnings, "rests on one family of correlations alone") {
			t.Errorf("warnings %v", b.Warnings)
		}
	})
	t.Run("organic soil takes organic rules", func(t *testing.T) {
		b, err := BandOf(CompressionIndex, Values{"w": 300, "organic": 45}, nil)
		if err != nil || b.Members[0].Correlation.Ground != Organic {
			t.Errorf("%+v, %v", b, err)
		}
	})
	t.Run("nothing known", func(t *testing.T) {
		if _, err := BandOf(CompressionIndex, Values{}, nil); !errors.Is(err, ErrMissingInput) {
			t.Errorf("err = %v", err)
		}
	})
	t.Run("refused", func(t *testing.T) {
		if _, err := BandOf(PreconsolidationStress, Values{"du2": -5}, nil); !errors.Is(err, ErrNotApplicable) {
			t.Errorf("err = %v", err)
		}
	})
	t.Run("wrong names", func(t *testing.T) {
		if _, err := BandOf(CompressionIndex, v, []string{"nobody-1900"}); err == nil {
			t.Error("no error for an unknown identifier")
		}
		if _, err := BandOf(CompressionIndex, v, []string{"jaky-1948"}); err == nil {
			t.Error("no error for another quantity")
		}
	})
}

// TestPropertyNoEscape evaluates entries on arbitrary values.
func TestPropertyNoEscape(t *testing.T) {
	all := All()
	rapid.Check(t, func(t *rapid.T) {
		c := rapid.SampledFrom(all).Draw(t, "entry")
		v := Values{}
		for _, in := range c.Inputs {
			v[in.Symbol] = rapid.Float64Range(-10, 1e5).Draw(t, in.Symbol)
		}
		e, err := c.Evaluate(v)
		if err == nil && (bad(e.Value) || bad(e.Low) || bad(e.High) || e.Low > e.High) {
			t.Fatalf("%s%v = %+v", c.ID, v, e)
		}
	})
}

// TestPropertyStressScales holds stress units out of the relations that are
// free of them: twice the stress is twice the strength.
func TestPropertyStressScales(t *testing.T) {
	const rounding = 1e-12
	rapid.Check(t, func(t *rapid.T) {
		s := rapid.Float64Range(10, 500).Draw(t, "σ′v0")
		ocr := rapid.Float64Range(1, 10).Draw(t, "OCR")
		c, _ := ByID("ladd-1991-clay")
		one, err1 := c.Evaluate(Values{"effective": s, "OCR": ocr})
		two, err2 := c.Evaluate(Values{"effective": 2 * s, "preconsolidation": 2 * s * ocr})
		if err1 != nil || err2 != nil || math.Abs(two.Value/one.Value-2) > rounding {
			t.Fatalf("%v %v, %v %v", one.Value, err1, two.Value, err2)
		}
	})
}

func FuzzEvaluate(f *testing.F) {
	f.Add(uint16(0), 50.0, 1.0, 30.0)
	f.Add(uint16(40), math.MaxFloat64, -1.0, 0.0)
	all := All()
	f.Fuzz(func(t *testing.T, i uint16, a, b, c float64) {
		entry := all[int(i)%len(all)]
		v, x := Values{}, []float64{a, b, c}
		for k, in := range entry.Inputs {
			v[in.Symbol] = x[k%3]
		}
		e, err := entry.Evaluate(v)
		switch {
		case err == nil && (bad(e.Value) || bad(e.Low) || bad(e.High)):
			t.Fatalf("%s%v = %+v", entry.ID, v, e)
		case err != nil && !errors.Is(err, ErrNotApplicable) && !errors.Is(err, ErrMissingInput):
			t.Fatalf("%s%v: %v", entry.ID, v, err)
		}
	})
}

func BenchmarkEvaluate(b *testing.B) {
	c, _ := ByID("azzouz-1976-e0-ll")
	v := Values{"e0": 1.2, "LL": 55}
	for b.Loop() {
		if _, err := c.Evaluate(v); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkBand(b *testing.B) {
	v := Values{"e0": 1.2, "LL": 55, "PI": 28, "w": 44, "Gs": 2.7}
	for b.Loop() {
		if _, err := BandOf(CompressionIndex, v, nil); err != nil {
			b.Fatal(err)
		}
	}
}
