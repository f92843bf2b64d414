package oedometer

import "math"

// largestPachecoRatio is Cr/Cc above which Pacheco Silva reads far too low: on a
// bilinear curve the value is (σ′p/σ′0)^(−r²) of the true one with r = Cr/Cc, so
// −2 % at r = 0.1 but −13 % at 0.25 over one log cycle.
const largestPachecoRatio = 0.2

// pacheco is the construction of Pacheco Silva (1970): from where the virgin line
// reaches the initial void ratio drop to the curve, and from there go across to
// the virgin line. It has no curvature and no scale.
func pacheco(in *input) outcome {
	if in.slopeRatio() > largestPachecoRatio {
		return refused("Cr/Cc is above 0.2: it would read too low")
	}
	if in.swelled {
		return refused("the specimen swelled before loading")
	}
	v := in.virgin.line
	xa := (in.e0 - v.intercept) / v.slope
	eb, ok := hermite(in.x, in.e, xa)
	if !ok {
		return refused("the virgin line meets e0 outside the tested stresses")
	}
	at := (eb - v.intercept) / v.slope
	out := outcome{stress: math.Pow(10, at), ok: true}
	if in.detail {
		out.lines = []DrawnLine{
			{"horizontal at e0", SemiLogPlane, in.x[0], in.e0, xa, in.e0},
			{"drop to the curve", SemiLogPlane, xa, in.e0, xa, eb},
			{"across to the virgin line", SemiLogPlane, xa, eb, at, eb},
			in.virginDrawn(xa),
		}
		out.points = in.virginPoints()
	}
	return out
}

// hermite interpolates with the monotone cubic of Fritsch & Carlson (1980), which
// never swings between points as a spline may; ok is false outside them.
func hermite(xs, ys []float64, x float64) (y float64, ok bool) {
	n := len(xs)
	if n < 2 || !(x >= xs[0] && x <= xs[n-1]) {
		return 0, false
	}
	i := 0
	for i+2 < n && x > xs[i+1] {
		i++
	}
	secant := func(k int) float64 { return (ys[k+1] - ys[k]) / (xs[k+1] - xs[k]) }
	slope := func(k int) float64 {
		switch {
		case k == 0:
			return secant(0)
		case k == n-1:
			return secant(n - 2)
		}
		a, b := secant(k-1), secant(k)
		if a*b <= 0 {
			return 0
		}
		wa, wb := 2*(xs[k+1]-xs[k])+xs[k]-xs[k-1], xs[k+1]-xs[k]+2*(xs[k]-xs[k-1])
		return (wa + wb) / (wa/a + wb/b)
	}
	h := xs[i+1] - xs[i]
	t := (x - xs[i]) / h
	m0, m1 := slope(i), slope(i+1)
	t2, t3 := t*t, t*t*t
	return (2*t3-3*t2+1)*ys[i] + (t3-2*t2+t)*h*m0 + (3*t2-2*t3)*ys[i+1] + (t3-t2)*h*m1, true
}
