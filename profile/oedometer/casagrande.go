package oedometer

import (
	"math"
	"slices"
)

// Casagrande's construction depends on the scales of the drawing: stretching the
// void-ratio axis moves the point of largest curvature to lower stress and
// flattens the bisector. The box is fixed, and the value at half and double its
// height is reported beside.
const (
	casagrandeBox   = 0.7 // height over width of the box around first loading
	stepsPerSegment = 8   // where the curvature is looked at between two points
)

// casagrande is the construction of Casagrande (1936) in closed form, on the
// natural cubic spline through the points. With the vertical exaggeration k,
//
//	κ = k|e″|/(1+k²e′²)^(3/2)            curvature as drawn
//	m = −tan(½·atan(−k·e′_O))/k          slope of the bisector at O
//	log10 σ′p = (e_O − m·x_O − A)/(B − m)
//
// O is the point of largest curvature, between the second point and the last but
// two, where the curve is convex upwards. The spline bends most at a point, so O
// tends to sit on an applied stress.
func casagrande(in *input) outcome { return in.casagrandeIn(casagrandeBox) }

// casagrandeIn is the construction in a box of another shape.
func (in *input) casagrandeIn(box float64) outcome {
	x, e := in.curvaturePoints()
	n := len(x)
	if n < 5 {
		return refused("fewer than five points to draw a curve through")
	}
	height := slices.Max(e) - slices.Min(e)
	if height <= 0 {
		return refused("no compression")
	}
	k := box * (x[n-1] - x[0]) / height
	s := newSpline(x, e)
	best, xo, eo, slope := 0.0, 0.0, 0.0, 0.0
	for i := 1; i < n-2; i++ {
		// The last step of a segment is the first of the next.
		for step := 0; step < stepsPerSegment; step++ {
			if i == n-3 && step > 0 {
				break
			}
			t := float64(step) / stepsPerSegment
			y, d1, d2 := s.at(i, t)
			if d2 >= 0 || d1 >= 0 {
				continue
			}
			if curvature := k * -d2 / math.Pow(1+k*k*d1*d1, 1.5); curvature > best {
				best, xo, eo, slope = curvature, x[i]+t*(x[i+1]-x[i]), y, d1
			}
		}
	}
	if best == 0 {
		return refused("no point of largest curvature")
	}
	m := -math.Tan(math.Atan(-k*slope)/2) / k
	bisector := straight{eo - m*xo, m}
	at, ok := bisector.meet(in.virgin.line)
	if !ok || m <= in.virgin.line.slope {
		return refused("the bisector does not meet the virgin line")
	}
	if at < x[0]-0.5 || at > x[n-1]+0.5 {
		return refused("bisector and virgin line meet far outside the tested stresses")
	}
	out := outcome{stress: math.Pow(10, at), ok: true}
	if in.detail {
		reach := (x[n-1] - x[0]) / 4
		tangent := straight{eo - slope*xo, slope}
		out.lines = []DrawnLine{
			{"horizontal", SemiLogPlane, xo, eo, xo + 2*reach, eo},
			{"tangent", SemiLogPlane, xo - reach, tangent.at(xo - reach), xo + reach, tangent.at(xo + reach)},
			{"bisector", SemiLogPlane, xo, eo, math.Max(at, xo+reach), bisector.at(math.Max(at, xo+reach))},
			in.virginDrawn(at),
		}
		out.points = in.virginPoints()
	}
	return out
}

// curvaturePoints returns the points that the spline is drawn through: all of
// them where they are far apart or smooth, and averages of neighbours where
// reading noise would bend the curve between close points more than the soil does.
func (in *input) curvaturePoints() (x, e []float64) {
	x, e = in.x[in.first:], in.e[in.first:]
	n := len(x)
	if n < 12 {
		return x, e
	}
	// Noise from how far points lie off the line between their neighbours.
	off := make([]float64, 0, n)
	for i := 1; i+1 < n; i++ {
		t := (x[i] - x[i-1]) / (x[i+1] - x[i-1])
		off = append(off, math.Abs(e[i]-e[i-1]-t*(e[i+1]-e[i-1])))
	}
	slices.Sort(off)
	noise := 1.48 * off[len(off)/2] / math.Sqrt(1.5)
	// Second differences over a spacing h carry noise·√6/h². It is kept to a
	// tenth of the bend of the whole curve over a third of a log cycle.
	bend := 3 * in.virgin.steepest
	spacing := math.Sqrt(2.45 * noise / (0.1 * bend))
	spacing = math.Min(spacing, 0.2)
	if spacing <= 1.5*(x[n-1]-x[0])/float64(n-1) {
		return x, e
	}
	var mx, me []float64
	for i := 0; i < n; {
		j, sx, se := i, 0.0, 0.0
		for ; j < n && x[j]-x[i] < spacing*0.999; j++ {
			sx, se = sx+x[j], se+e[j]
		}
		mx, me = append(mx, sx/float64(j-i)), append(me, se/float64(j-i))
		i = j
	}
	return mx, me
}
