package oedometer

import "math"

// sallforsScale is the prescribed scale: 10 kPa drawn as long as 1 % strain.
// "Isosceles" depends on it.
const sallforsScale = 10.0

// sallfors is the construction of Sällfors (1975) for constant-rate tests, on
// plain axes: the two straight parts before and after yield are produced to meet
// at C; an isosceles triangle with apex C is laid against the curve, and σ′p is
// where its base cuts the upper line.
//
// With unit vectors u along the upper line towards lower stress and v along the
// lower line, every point of the curve is C + a·u + b·v; the base that touches
// the curve is a + b = min, in closed form.
func sallfors(in *input) outcome {
	if !in.rate {
		return refused("for constant-rate tests")
	}
	upper, lower, ok := in.straightParts()
	if !ok {
		return refused("no two straight parts on plain axes")
	}
	sc, ok := upper.meet(lower)
	if !ok || sc <= in.s[0] || sc >= in.last() {
		return refused("the straight parts do not meet within the tested stresses")
	}
	ec := upper.at(sc)
	unit := func(slope, sign float64) (float64, float64) {
		h := math.Hypot(1, slope)
		return sign / h, sign * slope / h
	}
	ux, uy := unit(upper.slope, -1)
	vx, vy := unit(lower.slope, 1)
	det := ux*vy - uy*vx
	reach := math.Inf(1)
	for i := in.first; i < len(in.s); i++ {
		dx, dy := in.s[i]-sc, in.sallforsStrain(i)-ec
		a, b := (dx*vy-dy*vx)/det, (ux*dy-uy*dx)/det
		if a >= 0 && b >= 0 {
			reach = math.Min(reach, a+b)
		}
	}
	if math.IsInf(reach, 1) {
		return refused("the curve does not pass inside the triangle")
	}
	at := sc + reach*ux
	if at <= 0 {
		return refused("the triangle reaches below zero stress")
	}
	out := outcome{stress: at, ok: true}
	if in.detail {
		x1, x2 := in.s[in.first], math.Min(in.last(), 2*sc)
		percent := 1 / sallforsScale
		bx, by := sc+reach*vx, ec+reach*vy
		out.lines = []DrawnLine{
			{"upper line", StrainPlane, x1, upper.at(x1) * percent, sc, ec * percent},
			{"lower line", StrainPlane, sc, ec * percent, x2, lower.at(x2) * percent},
			{"base of the triangle", StrainPlane, at, upper.at(at) * percent, bx, by * percent},
		}
	}
	return out
}

// sallforsStrain returns the strain of a point in the prescribed scale.
func (in *input) sallforsStrain(i int) float64 {
	return sallforsScale * 100 * (in.e0 - in.e[i]) / (1 + in.e0)
}

// straightParts returns the straight part before yield, where the curve is
// flattest below σ′p, and the steepest part after it, on plain axes.
func (in *input) straightParts() (upper, lower straight, ok bool) {
	const width = 0.15 // log cycles
	strain := make([]float64, len(in.s))
	for i := range strain {
		strain[i] = in.sallforsStrain(i)
	}
	haveUpper, haveLower := false, false
	for i := in.first; i < len(in.s); i++ {
		j := i
		for j < len(in.s) && in.x[j]-in.x[i] < width {
			j++
		}
		if j == len(in.s) {
			break
		}
		line, fits := fit(in.s, strain, i, j)
		if !fits {
			continue
		}
		switch {
		case in.s[j] <= 0.9*in.estimate && in.s[i] >= 0.2*in.estimate:
			if !haveUpper || line.slope < upper.slope {
				upper, haveUpper = line, true
			}
		case in.s[i] >= in.estimate && in.s[j] <= 3*in.estimate:
			if !haveLower || line.slope > lower.slope {
				lower, haveLower = line, true
			}
		}
	}
	return upper, lower, haveUpper && haveLower && lower.slope > upper.slope
}
