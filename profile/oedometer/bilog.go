package oedometer

import "math"

// bilogarithmic is the two-line construction in log(1+e) against log σ′
// (Butterfield 1979, Oikawa 1987, Sridharan et al. 1991, Onitsuka et al. 1995: all
// are linear transforms of each other and give the same σ′p). It straightens the
// hollow virgin part of clays with a high void ratio.
//
// It is the one construction that shifting every void ratio does change, since
// 1+e enters through its logarithm.
func bilogarithmic(in *input) outcome {
	y := make([]float64, len(in.e))
	for i, e := range in.e {
		y[i] = math.Log10(1 + e)
	}
	p := in.twoLines(in.x, y, in.estimate, in.virgin, powerOfTen)
	return in.fromPair(p, LogLogPlane)
}
