package oedometer

import (
	"math"
	"slices"
)

// Dense records are averaged in bins of equal log-stress before any slope is
// taken: 20–30 points per log cycle are enough for every construction and keep
// transducer noise out of derivatives (methods in use for constant-rate tests).
const (
	denseCount   = 80
	binsPerCycle = 30
)

// MinimumPoints is the least number of distinct stresses on first loading that
// Interpret works with.
const MinimumPoints = 4

// A loading is a stretch of first loading as the constructions see it: stresses
// ascending, without gaps or repeats.
type loading struct {
	x, s, e []float64 // log10 σ′, σ′ in kPa, void ratio
	origin  []int     // index of each in the curve's points
	work    []float64 // cumulative work per unit volume, kJ/m³
	first   int       // index of the first point that fits may use
	e0      float64   // void ratio that strains refer to
	start   float64   // void ratio from which loading starts
	dense   bool      // averaged from a dense record
}

// firstLoading returns the first and further loading of a curve.
func firstLoading(c Curve) *loading {
	var points []int
	highest := 0.0
	for i, p := range c.Points {
		if p.Branch != FirstLoading && p.Branch != FurtherLoading {
			continue
		}
		switch n := len(points); {
		case p.EffectiveStress > highest:
			points = append(points, i)
			highest = p.EffectiveStress
		case p.EffectiveStress == highest && i == points[n-1]+1:
			points[n-1] = i // the same stress again: where the specimen came to rest
		}
	}
	return newLoading(c.Points, points, c.InitialVoidRatio)
}

// newLoading returns the points of the given indices as a loading.
func newLoading(all []Point, points []int, e0 float64) *loading {
	l := &loading{e0: e0}
	n := len(points)
	l.x, l.s, l.e = make([]float64, n), make([]float64, n), make([]float64, n)
	l.origin = slices.Clone(points)
	for i, k := range points {
		l.s[i], l.e[i] = all[k].EffectiveStress, all[k].VoidRatio
		l.x[i] = math.Log10(l.s[i])
	}
	l.start = e0
	if n > 0 {
		l.start = math.Max(e0, slices.Max(l.e[:min(n, 3)])) // swelling comes first
	}
	l.addWork()
	if n > denseCount {
		l.average()
	}
	if n <= denseCount {
		l.merge()
	}
	for l.first < len(l.s)-MinimumPoints && l.s[l.first] < SeatingStress {
		l.first++
	}
	return l
}

// addWork computes the work per unit volume (Becker et al. 1987),
//
//	W_i = W_{i−1} + ½(σ′_{i−1}+σ′_i)(ε_i−ε_{i−1})
//
// from zero stress at the void ratio where loading starts.
func (l *loading) addWork() {
	l.work = make([]float64, len(l.s))
	w, s, e := 0.0, 0.0, l.start
	for i := range l.s {
		w += 0.5 * (s + l.s[i]) * (e - l.e[i]) / (1 + l.e0)
		s, e = l.s[i], l.e[i]
		l.work[i] = w
	}
}

// average replaces the points by their means in bins of log-stress. Work was
// summed over all points before, so that binning does not coarsen it.
func (l *loading) average() {
	out := &loading{e0: l.e0, start: l.start, dense: true}
	// Bins count from the first stress, so that units of stress do not matter.
	bin := func(i int) float64 { return math.Floor((l.x[i] - l.x[0]) * binsPerCycle) }
	for i := 0; i < len(l.x); {
		var x, e, w float64
		j := i
		for ; j < len(l.x) && bin(j) == bin(i); j++ {
			x, e, w = x+l.x[j], e+l.e[j], w+l.work[j]
		}
		n := float64(j - i)
		out.x = append(out.x, x/n)
		out.s = append(out.s, math.Pow(10, x/n))
		out.e = append(out.e, e/n)
		out.work = append(out.work, w/n)
		out.origin = append(out.origin, l.origin[(i+j)/2])
		i = j
	}
	*l = *out
}

// merge drops a point that is followed by another at nearly the same stress: the
// later one is where the specimen came to rest, and a slope between the two would
// be one of noise.
func (l *loading) merge() {
	k := 0
	for i := range l.s {
		if i+1 < len(l.s) && l.s[i+1] < l.s[i]*(1+reversal) {
			continue
		}
		l.x[k], l.s[k], l.e[k], l.origin[k], l.work[k] = l.x[i], l.s[i], l.e[i], l.origin[i], l.work[i]
		k++
	}
	l.x, l.s, l.e, l.origin, l.work = l.x[:k], l.s[:k], l.e[:k], l.origin[:k], l.work[:k]
}

// without returns the loading with the points from first to last left out.
func (l *loading) without(first, last int) *loading {
	cut := func(v []float64) []float64 {
		return append(append(make([]float64, 0, len(v)), v[:first]...), v[last+1:]...)
	}
	out := &loading{e0: l.e0, start: l.start, dense: l.dense, first: l.first}
	out.x, out.s, out.e = cut(l.x), cut(l.s), cut(l.e)
	out.first = max(0, l.first-max(0, min(l.first, last+1)-first))
	out.origin = append(append([]int{}, l.origin[:first]...), l.origin[last+1:]...)
	out.addWork()
	return out
}

// disturbed returns the loading with each void ratio changed by change·sign(i).
func (l *loading) disturbed(change float64, sign func(i int) float64) *loading {
	out := *l
	out.e = make([]float64, len(l.e))
	for i, e := range l.e {
		out.e[i] = e + change*sign(i)
	}
	out.addWork()
	return &out
}

// last returns the highest stress of the loading.
func (l *loading) last() float64 { return l.s[len(l.s)-1] }

// bracket returns the applied stresses before and after stress s.
func (l *loading) bracket(s float64) (low, high float64, ok bool) {
	for i := 1; i < len(l.s); i++ {
		if l.s[i-1] <= s && s <= l.s[i] {
			return l.s[i-1], l.s[i], true
		}
	}
	return 0, 0, false
}
