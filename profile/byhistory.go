package profile

import (
	"math"

	"pastload/correlate"
)

// The correlations that turn a stress history into strength and horizontal
// stress. They are estimates beside measurements, and marked so wherever they
// are printed.
const (
	StrengthByHistory = "jamiolkowski-1985"  // su = 0.23·σ′v0·OCR^0.8
	K0ByHistory       = "mayne-kulhawy-1982" // K0 = (1 − sin φ′)·OCR^sin φ′
	FrictionByIndex   = "mitchell-1976"      // φ′ from PI
)

// byHistory gives the points of clay strata an undrained strength and, where a
// plasticity index was measured in the stratum, an earth pressure coefficient at
// rest, both by the stress history. Organic and granular strata have none: the
// relations are for inorganic clay.
func byHistory(b *Borehole, points []Point, results []DerivedResult) {
	strength, friction, rest := mustCorrelation(StrengthByHistory), mustCorrelation(FrictionByIndex), mustCorrelation(K0ByHistory)
	for i := range b.Strata {
		s := &b.Strata[i]
		if isOrganic(s) || isGranular(s) {
			continue
		}
		phi := Number{}
		if pi := indexOf(b, s, results); pi.Known {
			if e, err := friction.Evaluate(correlate.Values{"PI": pi.Value}); err == nil {
				phi = Known(e.Value)
			}
		}
		for k := range points {
			p := &points[k]
			if p.stratum != i || !p.OCR.Known || p.Effective.Value <= 0 {
				continue
			}
			v := correlate.Values{"effective": p.Effective.Value}
			p.UndrainedStrength = acrossOCR(strength, v, p.OCR)
			if phi.Known {
				v["phi"] = phi.Value
				p.K0 = acrossOCR(rest, v, p.OCR)
			}
		}
	}
}

// acrossOCR evaluates a correlation at the best OCR. Its range joins, in
// logarithms, the scatter of the correlation and the band of OCR.
func acrossOCR(c correlate.Correlation, v correlate.Values, ocr Range) Range {
	at := func(x float64) (correlate.Estimate, bool) {
		v["OCR"] = x
		e, err := c.Evaluate(v)
		return e, err == nil
	}
	best, ok := at(ocr.Best)
	low, okLow := at(ocr.Low)
	high, okHigh := at(ocr.High)
	if !ok || !okLow || !okHigh || best.Value <= 0 || low.Value <= 0 || best.Low <= 0 {
		return Range{}
	}
	down := math.Hypot(math.Log(best.Value/best.Low), math.Log(best.Value/low.Value))
	up := math.Hypot(math.Log(best.High/best.Value), math.Log(high.Value/best.Value))
	return Around(best.Value*math.Exp(-down), best.Value, best.Value*math.Exp(up))
}

// indexOf returns the mean plasticity index measured in a stratum.
func indexOf(b *Borehole, s *Stratum, results []DerivedResult) Number {
	var pi []float64
	for i := range results {
		if r := &results[i]; r.PlasticityIndex.Known && b.StratumAt(r.Depth, r.Result.Stratum) == s {
			pi = append(pi, r.PlasticityIndex.Value)
		}
	}
	if len(pi) == 0 {
		return Number{}
	}
	return Known(mean(pi))
}

func mustCorrelation(id string) correlate.Correlation {
	c, ok := correlate.ByID(id)
	if !ok {
		panic("profile: no correlation " + id)
	}
	return c
}
