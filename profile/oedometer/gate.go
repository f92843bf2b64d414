package oedometer

import (
	"fmt"
	"math"
)

// The gates that make a result a bound (a tool's choice; the end of the test and
// the steepening from methods in use and from generated curves).
const (
	leastMaxRatio   = 2.5  // highest stress over apparent σ′p
	largestQ        = 1.5  // slope of the last doubling over the one before
	doubtfulQ       = 1.2  // twice in a row, or with a doubtful end of the test
	doubtfulRatio   = 4.0  // highest stress over apparent σ′p below which doubtfulQ decides
	notReached      = 0.8  // of the last load: what a flat curve has surely not reached yield at
	leastBreak      = 2.0  // virgin slope over recompression slope
	leastStrain     = 0.02 // compression past the apparent σ′p
	virginRatio     = 0.12 // compression ratio from which a straight curve is virgin
	recompressRatio = 0.04 // compression ratio below which a straight curve is recompression
)

// gate decides between a value and a bound. No agreement between constructions
// can open it: on a test that stopped early they all read low together.
func (r *reading) gate() {
	in := r.in
	a := r.apparent
	q, before, _ := in.steepening()
	ratio := in.last() / a.Best
	first := in.s[in.first]
	switch {
	case !r.breaks():
		r.noBreak("no clear break in the curve", first)
	case a.Best < virginStart*first:
		r.noBreak("the constructions meet where fewer than two loads lie before", math.Max(first, a.High))
	case r.q.Known && q > largestQ:
		r.atLeast(fmt.Sprintf("the curve is still steepening at its end: slope of the last doubling of stress %.2f times that before (limit %.1f)", q, largestQ))
	case ratio < leastMaxRatio:
		r.atLeast(fmt.Sprintf("the test ended at %.4g kPa, %.1f times the apparent yield stress (limit %.1f)", in.last(), ratio, leastMaxRatio))
	case r.q.Known && q > doubtfulQ && ratio < doubtfulRatio:
		r.atLeast(fmt.Sprintf("the test ended at %.1f times the apparent yield stress and the curve was still steepening there (slope %.2f times that before; limits %.0f and %.1f)", ratio, q, doubtfulRatio, doubtfulQ))
	case r.q.Known && q > doubtfulQ && before > doubtfulQ:
		r.atLeast(fmt.Sprintf("the curve never becomes straight: the slope grew %.2f and %.2f times over the last doublings of stress (limit %.1f)", before, q, doubtfulQ))
	case r.strainPast(a.Best) < leastStrain:
		r.atLeast(fmt.Sprintf("only %.1f %% of compression past the apparent yield stress (limit %.0f %%)", 100*r.strainPast(a.Best), 100*leastStrain))
	default:
		r.bound, r.yield = Exact, a
	}
}

// breaks reports whether there is a yield to see: the virgin line is clearly
// steeper than the flattest part before it.
func (r *reading) breaks() bool {
	in := r.in
	flattest := math.Inf(1)
	for i := in.first; i <= in.virgin.first; i++ {
		if j := in.segmentEnd(i); j > 0 && i < in.virgin.first {
			if line, ok := fit(in.x, in.e, i, j); ok {
				flattest = math.Min(flattest, -line.slope)
			}
		}
	}
	return in.virgin.steepest > leastBreak*math.Max(flattest, 0) && !math.IsInf(flattest, 1)
}

// strainPast returns the strain from a stress to the end of the test.
func (r *reading) strainPast(stress float64) float64 {
	in := r.in
	e, ok := interpolate(in.s, in.e, stress)
	if !ok {
		e = in.e[in.first]
	}
	return (e - in.e[len(in.e)-1]) / (1 + in.e0)
}

// atLeast makes what the constructions say, less one standard deviation, a lower
// bound: on a test that stopped early they read low.
func (r *reading) atLeast(why string) {
	r.bound, r.why = AtLeast, why
	b := math.Min(r.apparent.Best*math.Exp(-r.parts.Total), r.in.last())
	r.yield = Yield{b, b, b, AtLeast}
}

// noBreak judges a curve without a visible yield from its slope: virgin
// compression and recompression differ by a factor of five and more in one soil,
// and in compression ratio even between soils.
// highest is the stress that yield surely lies below on a curve that is steep
// throughout.
func (r *reading) noBreak(what string, highest float64) {
	in := r.in
	last := in.last()
	line, ok := fit(in.x, in.e, in.first, len(in.x)-1)
	slope := 0.0
	if ok {
		slope = -line.slope / (1 + in.e0)
	}
	switch {
	case slope >= virginRatio:
		r.bound, r.yield = AtMost, Yield{highest, highest, highest, AtMost}
		r.why = fmt.Sprintf("%s, steep throughout (compression ratio %.2f): the yield stress lies below the tested stresses, or the specimen is disturbed", what, slope)
	case slope <= recompressRatio && slope >= 0:
		b := notReached * last
		r.bound, r.yield = AtLeast, Yield{b, b, b, AtLeast}
		r.why = fmt.Sprintf("%s, flat throughout (compression ratio %.3f): the yield stress was not reached", what, slope)
	default:
		r.bound = Undetermined
		r.why = fmt.Sprintf("%s, and its slope (compression ratio %.2f) does not tell virgin compression from recompression", what, slope)
	}
}
