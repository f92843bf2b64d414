package profile

import (
	"math"
	"testing"

	"gonum.org/v1/gonum/floats/scalar"
)

// TestStrengthAndK0ByHistory redoes one point by hand from the printed formulas:
// su = 0.23·σ′v0·OCR^0.8 (Jamiolkowski et al. 1985; exponent from memory),
// sin φ′ = 0.8 − 0.094 ln PI (Mitchell 1976; from memory), K0 = (1 − sin φ′)·OCR^sin φ′
// (Mayne & Kulhawy 1982; from memory).
func TestStrengthAndK0ByHistory(t *testing.T) {
	for _, p := range build(t, softSite()).Boreholes[0].Points {
		if p.Depth != 6 {
			continue
		}
		ocr := p.OCR.Best
		if want := 0.23 * p.Effective.Value * math.Pow(ocr, 0.8); !scalar.EqualWithinRel(p.UndrainedStrength.Best, want, closed) {
			t.Errorf("su = %g, want %g", p.UndrainedStrength.Best, want)
		}
		sine := 0.8 - 0.094*math.Log(60-28)
		if want := (1 - sine) * math.Pow(ocr, sine); !scalar.EqualWithinRel(p.K0.Best, want, 1e-9) {
			t.Errorf("K0 = %g, want %g", p.K0.Best, want)
		}
		if !(p.UndrainedStrength.Low < p.UndrainedStrength.Best && p.UndrainedStrength.Best < p.UndrainedStrength.High) {
			t.Errorf("su range %+v", p.UndrainedStrength)
		}
		return
	}
	t.Fatal("no point at 6 m")
}

func TestPeatHasNoStrengthByHistory(t *testing.T) {
	s := softSite()
	s.Boreholes[0].Strata[1].Soil = "peat"
	for _, p := range build(t, s).Boreholes[0].Points {
		if p.Stratum == "Soft clay" && (p.UndrainedStrength.Known || p.K0.Known) {
			t.Fatalf("peat at %g m has su %v and K0 %v by relations for clay", p.Depth, p.UndrainedStrength, p.K0)
		}
	}
}

// TestBandsBesideMeasurements: the correlated bands stand where index tests are.
func TestBandsBesideMeasurements(t *testing.T) {
	for _, d := range build(t, softSite()).Boreholes[0].Results {
		for name, r := range map[string]Range{"Cc": d.CorrelatedCc, "CR": d.CorrelatedCR, "Cr": d.CorrelatedCr} {
			if !r.Known || !(0 < r.Low && r.Low < r.Best && r.Best < r.High) {
				t.Errorf("%g m: correlated %s %+v", d.Depth, name, r)
			}
		}
		if want := 0.5 / 2.566; !scalar.EqualWithinRel(d.MeasuredCR.Value, want, closed) {
			t.Errorf("CR = %g, want %g", d.MeasuredCR.Value, want)
		}
	}
}
