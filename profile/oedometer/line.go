package oedometer

import (
	"math"
	"sort"
)

// A straight is y = Intercept + Slope·x.
type straight struct{ intercept, slope float64 }

func (l straight) at(x float64) float64 { return l.intercept + l.slope*x }

// meet returns the abscissa where two lines cross; ok is false for lines as good
// as parallel.
func (l straight) meet(m straight) (x float64, ok bool) {
	d := l.slope - m.slope
	if math.Abs(d) <= 1e-12*math.Max(math.Abs(l.slope), math.Abs(m.slope)) || d == 0 {
		return 0, false
	}
	x = (m.intercept - l.intercept) / d
	return x, !math.IsNaN(x) && !math.IsInf(x, 0)
}

// fit returns the least-squares line through the points of x and y from first to
// last inclusive; ok is false for fewer than two points or one repeated x.
func fit(x, y []float64, first, last int) (l straight, ok bool) {
	if last-first < 1 {
		return straight{}, false
	}
	n := float64(last - first + 1)
	var mx, my float64
	for i := first; i <= last; i++ {
		mx += x[i]
		my += y[i]
	}
	mx, my = mx/n, my/n
	var sxx, sxy float64
	for i := first; i <= last; i++ {
		sxx += (x[i] - mx) * (x[i] - mx)
		sxy += (x[i] - mx) * (y[i] - my)
	}
	if sxx <= 0 {
		return straight{}, false
	}
	b := sxy / sxx
	return straight{my - b*mx, b}, true
}

// interpolate returns y at x between neighbouring points, straight; ok is false
// outside them. xs ascends.
func interpolate(xs, ys []float64, x float64) (y float64, ok bool) {
	n := len(xs)
	if n == 0 || x < xs[0] || x > xs[n-1] {
		return 0, false
	}
	i := sort.SearchFloat64s(xs, x)
	if i == 0 {
		return ys[0], true
	}
	t := (x - xs[i-1]) / (xs[i] - xs[i-1])
	return ys[i-1] + t*(ys[i]-ys[i-1]), true
}
