package oedometer

import (
	"fmt"
	"math"
)

// Limits of the sample quality schemes. Lunne, Berre & Strandvik (1997), on
// Δe/e0 when reloaded to σ′v0, and the specimen quality designation of Terzaghi,
// Peck & Mesri (1996), on the strain there in percent; from memory, unverified.
var (
	lunneLow  = []float64{0.04, 0.07, 0.14} // OCR 1 to 2
	lunneHigh = []float64{0.03, 0.05, 0.10} // OCR 2 to 4
	sqdLimits = []float64{1, 2, 4, 8}

	lunneClasses = []string{"1 (very good to excellent)", "2 (good to fair)", "3 (poor)", "4 (very poor)"}
	sqdClasses   = []string{"A", "B", "C", "D", "E"}
)

// Where the schemes do not apply.
const (
	largestRatedOCR   = 4.0
	leastRatedPI      = 8.0  // percent: silts densify when disturbed and look good
	swellingLimit     = 0.3  // percent
	nearLimit         = 0.15 // share of a limit within which both classes are named
	lunneScheme       = "Δe/e0 (Lunne et al. 1997)"
	designationScheme = "specimen quality designation (Terzaghi, Peck & Mesri 1996)"
)

// rate returns the sample quality by both schemes.
func (c Curve) rate(l *loading, s Situation, yield Yield) []Quality {
	lunne := Quality{Scheme: lunneScheme, Mark: markMemory}
	sqd := Quality{Scheme: designationScheme, Unit: "%", Mark: markMemory}
	e, why := c.voidRatioInSitu(l, s)
	if why == "" {
		why = doesNotApply(c, s)
	}
	ocr := 0.0
	if why == "" {
		// Of a bound the ratio is what the bound gives; of none the first row.
		ocr = yield.Best / s.EffectiveStress.Value
		if ocr > largestRatedOCR {
			why = fmt.Sprintf("σ′p/σ′v0 is %.1f: above %.0f the strain to σ′v0 says little about disturbance", ocr, largestRatedOCR)
		}
	}
	if why != "" {
		lunne.Reason, sqd.Reason = why, why
		return []Quality{lunne, sqd}
	}
	limits, row := lunneLow, "1 to 2"
	if ocr > 2 {
		limits, row = lunneHigh, "2 to 4"
	}
	lunne.Applies, sqd.Applies = true, true
	lunne.Value = (c.InitialVoidRatio - e) / c.InitialVoidRatio
	lunne.Rank, lunne.Class = classify(lunne.Value, limits, lunneClasses)
	lunne.Reason = fmt.Sprintf("e falls from %.3f to %.3f at σ′v0 = %.4g kPa; limits for OCR %s", c.InitialVoidRatio, e, s.EffectiveStress.Value, row)
	sqd.Value = 100 * (c.InitialVoidRatio - e) / (1 + c.InitialVoidRatio)
	sqd.Rank, sqd.Class = classify(sqd.Value, sqdLimits, sqdClasses)
	sqd.Reason = fmt.Sprintf("strain at σ′v0 = %.4g kPa; no account of OCR", s.EffectiveStress.Value)
	return []Quality{lunne, sqd}
}

// voidRatioInSitu returns the void ratio on first loading at σ′v0, or why not.
func (c Curve) voidRatioInSitu(l *loading, s Situation) (e float64, why string) {
	if !s.EffectiveStress.Known {
		return 0, "the in-situ stress σ′v0 is not known"
	}
	if s.EffectiveStress.Value <= 0 {
		return 0, "the in-situ stress σ′v0 is not above zero"
	}
	e, ok := interpolate(l.x, l.e, math.Log10(s.EffectiveStress.Value))
	if !ok {
		return 0, fmt.Sprintf("σ′v0 = %.4g kPa lies outside the tested stresses", s.EffectiveStress.Value)
	}
	return e, ""
}

// doesNotApply returns why strain criteria do not rate this specimen, or "".
func doesNotApply(c Curve, s Situation) string {
	switch {
	case s.Reconstituted:
		return "a reconstituted specimen was never sampled"
	case s.Organic:
		return "organic soil: the schemes rest on inorganic marine clay"
	case s.PlasticityIndex.Known && s.PlasticityIndex.Value < leastRatedPI:
		return fmt.Sprintf("plasticity index %.0f %%: soil of low plasticity densifies when disturbed, and the strain then looks good", s.PlasticityIndex.Value)
	case c.Swelling > swellingLimit:
		return fmt.Sprintf("the specimen swelled by %.2f %% before loading", c.Swelling)
	}
	return ""
}

// classify returns the rank from 1 and the name of the class; near a limit both
// names, the rank being the one it falls in.
func classify(v float64, limits []float64, names []string) (int, string) {
	i := 0
	for i < len(limits) && v >= limits[i] {
		i++
	}
	name := names[i]
	if i < len(limits) && v > limits[i]*(1-nearLimit) {
		name += " or " + names[i+1]
	} else if i > 0 && v < limits[i-1]*(1+nearLimit) {
		name = names[i-1] + " or " + name
	}
	return i + 1, name
}
