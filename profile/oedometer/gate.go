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
	doubtfulQ       = 1.2  // twice in a row
	leastBreak      = 2.0  // virgin slope over recompression slope
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
		r.noBreak()
	case r.q.Known && q > largestQ:
		r.atLeast(fmt.Sprintf("the curve is still steepening at its end: slope of the last doubling of stress %.2f times that before (limit %.1f)", q, largestQ))
	case ratio < leastMaxRatio:
		r.atLeast(fmt.Sprintf("the test ended at %.4g kPa, %.1f times the apparent yield stress (limit %.1f)", in.last(), ratio, leastMaxRatio))
	case r.q.Known && q > doubtfulQ && before > doubtfulQ:
		r.atLeast(fmt.Sprintf("the curve never becomes straight: the slope grew %.2f and %.2f times over the last doublings of stress (limit %.1f)", before, q, doubtfulQ))
	case a.Best < first:
		r.bound, r.why = AtMost, fmt.Sprintf("the constructions meet below the first usable stress of %.4g kPa", first)
		r.yield = Yield{first, first, first, AtMost}
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

// atLeast makes the low side of what the constructions say a lower bound.
func (r *reading) atLeast(why string) {
	r.bound, r.why = AtLeast, why
	b := math.Min(r.apparent.Low, r.in.last())
	r.yield = Yield{b, b, b, AtLeast}
}

// noBreak judges a curve without a yield from its slope.
func (r *reading) noBreak() {
	in := r.in
	first, last := in.s[in.first], in.last()
	line, ok := fit(in.x, in.e, in.first, len(in.x)-1)
	slope := 0.0
	if ok {
		slope = -line.slope / (1 + in.e0)
	}
	switch {
	case slope >= virginRatio:
		r.bound = AtMost
		r.why = fmt.Sprintf("no break in the curve, steep throughout (compression ratio %.2f): the yield stress lies below the first load of %.4g kPa, or the specimen is disturbed", slope, first)
		r.yield = Yield{first, first, first, AtMost}
	case slope <= recompressRatio && slope >= 0:
		r.bound = AtLeast
		r.why = fmt.Sprintf("no break in the curve, flat throughout (compression ratio %.3f): the yield stress was not reached", slope)
		r.yield = Yield{last, last, last, AtLeast}
	default:
		r.bound = Undetermined
		r.why = fmt.Sprintf("no break in the curve, and its slope (compression ratio %.2f) does not tell virgin compression from recompression", slope)
	}
}
