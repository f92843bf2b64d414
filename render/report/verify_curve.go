package report

import (
	"fmt"
	"math"

	"pastload/profile/oedometer"
)

// Tolerances for printed readings of oedometer curves.
const (
	voidRatioDigit = 0.0006 // half the last digit of three decimals, and what its sheet rounded before
	slopeReading   = 0.01   // of Cc beyond our two virgin lines: readers draw theirs through other points
	graphReading   = 0.15   // of σ′p, relative: scatter of readers of one graph (common practice, 10 to 15 %)
)

// coarseDigits are sheets that rounded the height of solids first, with what
// that does to their void ratios.
var coarseDigits = map[string]float64{"DAS-0748": 0.0015, "DAS-128G": 0.0045, "VENK-7.3": 0.001, "ID-UP": 0.001, "FR-TD3": 0.001}

// unreliable are printed readings that their own data contradict, by case and
// quantity: shown, as a reader should see them, and not judged.
var unreliable = map[string]string{
	"FR-ARGILE-5M preconsolidation stress": "a loose reading, above every construction on its curve",
	"FR-ARGILE-5M swelling index":          "the table has no unloading",
	"DAS-PFE swelling index":               "the unloading points of the table give twice that",
}

// curveExample judges one printed number of a curve.
func curveExample(e Example, id string, p oedometer.PublishedValue, curve oedometer.Curve, in oedometer.Interpretation) Example {
	e.Quantity, e.Unit, e.Note = p.Quantity, p.Unit, join("; ", p.Note)
	reason, doubtful := unreliable[id+" "+p.Quantity]
	switch p.Quantity {
	case "void ratio":
		e.Quantity = fmt.Sprintf("void ratio at %.4g kPa", p.At)
		tolerance := voidRatioDigit
		if d, ok := coarseDigits[id]; ok {
			tolerance = d
		}
		e = e.compare(p.Value, voidRatioAt(curve, p.At), tolerance)
	case "initial void ratio":
		e = e.compare(p.Value, in.InitialVoidRatio, voidRatioDigit)
	case "compression index":
		low, high := in.VirginLast.Slope, in.VirginSteepest.Slope
		nearest := math.Min(math.Max(p.Value, math.Min(low, high)), math.Max(low, high))
		e = e.compare(p.Value, nearest, slopeReading)
		e.Note = join("; ", e.Note, fmt.Sprintf("ours %.3f by the last points, %.3f by the steepest: the nearer of the range is set beside it", low, high))
	case "swelling index":
		got := math.NaN()
		if in.SwellingIndex.Known {
			got = in.SwellingIndex.Value
		}
		e = e.compare(p.Value, got, slopeReading)
	case "preconsolidation stress":
		got := math.NaN()
		if in.Preconsolidation.Bound == oedometer.Exact {
			got = in.Preconsolidation.Best
			e.Note = join("; ", e.Note, fmt.Sprintf("ours %.0f to %.0f kPa", in.Preconsolidation.Low, in.Preconsolidation.High))
		}
		e = e.compare(p.Value, got, graphReading*p.Value)
	default:
		return e.failed(fmt.Errorf("no way to compare a %s", p.Quantity))
	}
	if doubtful {
		e.Outcome, e.Tolerance = shown, 0
		if e.Note != reason {
			e.Note = join("; ", reason, e.Note)
		}
	}
	return e
}

// voidRatioAt returns the void ratio of a curve at an applied stress, on its way
// up; not a number where the stress was not applied.
func voidRatioAt(c oedometer.Curve, stress float64) float64 {
	for _, p := range c.Points {
		if p.Branch != oedometer.Unloading && math.Abs(p.EffectiveStress/stress-1) < 1e-6 {
			return p.VoidRatio
		}
	}
	return math.NaN()
}
