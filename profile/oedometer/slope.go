package oedometer

import "math"

// boone is the slope construction of Boone (2010): a line of slope Cr through the
// laboratory curve at σ′v0 meets the virgin line at
//
//	log10 σ′p = (e_v0 + Cr·log10 σ′v0 − A)/(B + Cr)
//
// with the virgin line e = A + B·x. Van Zelst (1948) drew the same idea.
//
// It needs σ′v0 inside the tested stresses and clear of the transition: a point
// on the bend puts the line too low and the value too high.
func boone(in *input) outcome {
	if !in.inSitu.Known {
		return refused("needs the in-situ stress σ′v0")
	}
	s := in.inSitu.Value
	if s > 0.8*in.estimate {
		return refused("σ′v0 lies on the bend of the curve or beyond it")
	}
	x := math.Log10(s)
	e, ok := interpolate(in.x, in.e, x)
	if !ok {
		return refused("σ′v0 lies below the tested stresses")
	}
	if in.cr <= 0 {
		return refused("needs a recompression slope")
	}
	line := straight{e + in.cr*x, -in.cr}
	at, ok := line.meet(in.virgin.line)
	if !ok || in.slopeRatio() >= 1 {
		return refused("recompression and virgin line do not meet")
	}
	out := outcome{stress: math.Pow(10, at), ok: true, weak: !in.fromLoop}
	if in.detail {
		if !in.fromLoop {
			out.note = "Cr from first loading, as there is no loop"
		}
		out.lines = []DrawnLine{
			{"Cr through σ′v0", SemiLogPlane, x, e, at, line.at(at)},
			in.virginDrawn(at),
		}
		out.points = in.virginPoints()
	}
	return out
}
