package oedometer

// A spline is the interpolating natural cubic spline: second derivative zero at
// both ends and straight between points.
type spline struct {
	x, y, second []float64
}

// newSpline returns the spline through at least three points, x ascending.
func newSpline(x, y []float64) spline {
	n := len(x)
	second := make([]float64, n)
	upper := make([]float64, n) // forward sweep of the tridiagonal system
	for i := 1; i < n-1; i++ {
		h0, h1 := x[i]-x[i-1], x[i+1]-x[i]
		right := 6 * ((y[i+1]-y[i])/h1 - (y[i]-y[i-1])/h0)
		pivot := 2*(h0+h1) - h0*upper[i-1]
		upper[i] = h1 / pivot
		second[i] = (right - h0*second[i-1]) / pivot
	}
	for i := n - 2; i > 0; i-- {
		second[i] -= upper[i] * second[i+1]
	}
	return spline{x, y, second}
}

// at returns value, slope and second derivative at share t of interval i.
func (s spline) at(i int, t float64) (y, slope, second float64) {
	h := s.x[i+1] - s.x[i]
	u := 1 - t
	a, b := s.second[i], s.second[i+1]
	y = u*s.y[i] + t*s.y[i+1] + h*h/6*((u*u*u-u)*a+(t*t*t-t)*b)
	slope = (s.y[i+1]-s.y[i])/h + h/6*((1-3*u*u)*a+(3*t*t-1)*b)
	return y, slope, u*a + t*b
}
