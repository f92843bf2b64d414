package oedometer

import "math"

// The windows of the iterated two-line selection, as multiples of the estimate:
// points between 0.7 and 1.5 σ′p are the rounded transition and belong to
// neither line; beyond 6.5 σ′p structured clay flattens.
const (
	recompressionEnd = 0.7
	virginStart      = 1.5
	virginEnd        = 6.5
)

// A pair is two lines in one plane with the points that made them.
type pair struct {
	one, two          straight
	oneFirst, oneLast int
	twoFirst, twoLast int
	stress            float64
	weak, ok          bool
}

// twoLines selects two straight lines in the plane (u, y) by iteration from the
// estimate start: line one through the points up to 0.7 σ′p, line two through
// those from 1.5 to 6.5 σ′p, or through the virgin points of a curve that
// flattens again; σ′p is where they meet. stress turns the abscissa of the
// meeting point into kPa.
func (l *loading) twoLines(u, y []float64, start float64, v virgin, stress func(float64) float64) pair {
	p := pair{stress: start}
	previous := start
	for range 8 {
		next, ok := l.split(u, y, p.stress, v, stress)
		if !ok {
			return pair{}
		}
		previous, p = p.stress, next
		if math.Abs(p.stress/previous-1) < 1e-4 {
			return p
		}
	}
	// The selection flips between two sets of points: take the middle.
	p.stress = math.Sqrt(p.stress * previous)
	p.weak = true
	return p
}

// split fits the two lines for one estimate of σ′p.
func (l *loading) split(u, y []float64, estimate float64, v virgin, stress func(float64) float64) (pair, bool) {
	n := len(l.s)
	p := pair{oneFirst: l.first, oneLast: l.first - 1, twoFirst: n, twoLast: n - 1}
	for i := l.first; i < n; i++ {
		if l.s[i] <= recompressionEnd*estimate {
			p.oneLast = i
		}
		if l.s[i] >= virginStart*estimate && p.twoFirst == n {
			p.twoFirst = i
		}
	}
	if p.oneLast < p.oneFirst+1 {
		p.oneLast, p.weak = p.oneFirst+1, true
	}
	if p.twoFirst > n-2 {
		p.twoFirst, p.weak = n-2, true
	}
	for p.twoLast > p.twoFirst+1 && l.s[p.twoLast] > virginEnd*estimate {
		p.twoLast--
	}
	if v.ok && v.sShaped {
		p.twoFirst, p.twoLast = v.first, v.last
	}
	if p.oneLast >= p.twoLast {
		return pair{}, false
	}
	var ok1, ok2 bool
	p.one, ok1 = fit(u, y, p.oneFirst, p.oneLast)
	p.two, ok2 = fit(u, y, p.twoFirst, p.twoLast)
	if !ok1 || !ok2 {
		return pair{}, false
	}
	at, ok := p.one.meet(p.two)
	if !ok {
		return pair{}, false
	}
	p.stress = stress(at)
	if !(p.stress > l.s[0]/10 && p.stress < l.last()*10) {
		return pair{}, false
	}
	p.ok = math.Abs(p.two.slope) > math.Abs(p.one.slope)
	return p, p.ok
}

// bestSplit returns the stress at which two lines with the least squared error
// meet in the semi-logarithmic plane: the start of every iteration.
func (l *loading) bestSplit() (stress float64, ok bool) {
	n := len(l.x)
	best := math.Inf(1)
	for k := l.first + 1; k+2 < n; k++ {
		one, ok1 := fit(l.x, l.e, l.first, k)
		two, ok2 := fit(l.x, l.e, k+1, n-1)
		if !ok1 || !ok2 || two.slope >= one.slope {
			continue
		}
		sum := squares(l.x, l.e, l.first, k, one) + squares(l.x, l.e, k+1, n-1, two)
		if at, meets := one.meet(two); meets && sum < best && at > l.x[l.first]-0.5 && at < l.x[n-1]+0.5 {
			best, stress, ok = sum, math.Pow(10, at), true
		}
	}
	return stress, ok
}

// squares returns the sum of squared residuals of a line.
func squares(x, y []float64, first, last int, line straight) float64 {
	sum := 0.0
	for i := first; i <= last; i++ {
		d := y[i] - line.at(x[i])
		sum += d * d
	}
	return sum
}

func powerOfTen(x float64) float64 { return math.Pow(10, x) }

// semiLog is the two-line construction in e against log σ′. It is unbiased by
// construction where both asymptotes are straight.
func semiLog(in *input) outcome {
	p := in.twoLines(in.x, in.e, in.start, in.virgin, powerOfTen)
	return in.fromPair(p, SemiLogPlane)
}
