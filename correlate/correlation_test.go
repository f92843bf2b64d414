package correlate

import (
	"errors"
	"math"
	"testing"
)

func must(t *testing.T, id string, v Values) Estimate {
	t.Helper()
	c, ok := ByID(id)
	if !ok {
		t.Fatalf("no correlation %q", id)
	}
	e, err := c.Evaluate(v)
	if err != nil {
		t.Fatalf("%s%v: %v", id, v, err)
	}
	return e
}

func TestCatalogueIsSound(t *testing.T) {
	seen := map[string]bool{}
	for _, c := range All() {
		if c.ID == "" || seen[c.ID] {
			t.Errorf("identifier %q is empty or repeated", c.ID)
		}
		seen[c.ID] = true
		for field, text := range map[string]string{"name": c.Name, "formula": c.Formula, "soil": c.Soil,
			"family": c.Family, "source": c.Source, "scatter note": c.Scatter.Note, "symbol": c.Quantity.Symbol()} {
			if text == "" {
				t.Errorf("%s: no %s", c.ID, field)
			}
		}
		if c.Scatter.Total() <= 0 || c.Scatter.Total() > 3 {
			t.Errorf("%s: scatter %v", c.ID, c.Scatter)
		}
		if c.Rank < 1 || len(c.Inputs) == 0 {
			t.Errorf("%s: rank %d, %d inputs", c.ID, c.Rank, len(c.Inputs))
		}
		for _, in := range c.Inputs {
			m, r := in.Meaningful, in.Range
			if m.Low >= m.High || m.Low < in.Possible.Low || m.High > in.Possible.High {
				t.Errorf("%s: %s: meaningful in %v, possible in %v", c.ID, in.Symbol, m, in.Possible)
			}
			if r.Stated && (r.Low >= r.High || !m.holds(r.Low) || !m.holds(r.High) || in.Basis == "") {
				t.Errorf("%s: %s: range %v (%q) is not inside %v", c.ID, in.Symbol, r, in.Basis, m)
			}
		}
	}
}

func TestMissingInputIsNamed(t *testing.T) {
	c, _ := ByID("terzaghi-peck-1967")
	_, err := c.Evaluate(Values{"w": 40})
	if !errors.Is(err, ErrMissingInput) || err.Error() != "missing input: terzaghi-peck-1967 needs liquid limit (LL)" {
		t.Errorf("err = %v", err)
	}
}

func TestBandCountsAFamilyOnce(t *testing.T) {
	v := Values{"e0": 1.2, "LL": 55, "PI": 28, "w": 44, "Gs": 2.7}
	b, err := BandOf(CompressionIndex, v, nil)
	if err != nil {
		t.Fatal(err)
	}
	voices := map[string]int{}
	for _, m := range b.Members {
		if m.Speaks {
			voices[m.Correlation.Family]++
		}
	}
	for f, n := range voices {
		if n != 1 {
			t.Errorf("family %q has %d voices", f, n)
		}
	}
	if len(voices) != 6 || !(b.Low < b.Best && b.Best < b.High) || math.Abs(b.Best-0.4) > 0.1 {
		t.Errorf("%d voices, band %.3f %.3f %.3f", len(voices), b.Low, b.Best, b.High)
	}
}
