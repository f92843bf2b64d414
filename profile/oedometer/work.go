package oedometer

// work is the construction of Becker, Crooks, Been & Jefferies (1987): cumulative
// work per unit volume against σ′ on plain axes, a line through the points before
// yield and one through those past it.
//
// A straight line in e–log σ′ with slope C has W linear in σ′ with slope
// C/((1+e0)·ln 10), so the lines meet at σ′p itself on a sharp bilinear curve.
func work(in *input) outcome {
	p := in.twoLines(in.s, in.work, in.estimate, in.virgin, func(s float64) float64 { return s })
	return in.fromPair(p, WorkPlane)
}
