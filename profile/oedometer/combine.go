package oedometer

import (
	"math"
)

// A calibration is how one construction errs on generated curves of known yield
// stress (this package's tests): ln(estimate/truth) is about
//
//	bias + slope·flattening ± scatter
//
// where flattening says by how much the end of the curve is flatter than its
// virgin part. Every construction reads an S-shaped curve low, because the
// straightest part past yield already lies below the steepest.
type calibration struct {
	bias, slope, scatter float64
}

// at returns the expected error of ln σ′p.
func (c calibration) at(flattening float64) float64 { return c.bias + c.slope*flattening }

// calibrations, by construction. They are measured here, not published; a
// construction without one is reported beside the others and not combined.
var calibrations = map[string]calibration{
	"two-line":          {0.00, -1.00, 0.05},
	"casagrande":        {0.075, -1.10, 0.07},
	"slope":             {0.00, -0.95, 0.045},
	"work":              {0.10, -1.70, 0.075},
	"bilogarithmic":     {0.07, -1.20, 0.06},
	"pacheco-silva":     {-0.04, -0.50, 0.05},
	"dissipated-energy": {0.117, -1.60, 0.055},
}

// ninety is the factor from a standard deviation to the 5 and 95 % points.
const ninety = 1.645

// values runs every construction; a refused one has ok false.
func (in *input) values() []outcome {
	out := make([]outcome, len(constructions))
	for i, c := range constructions {
		out[i] = c.run(in)
		if s := out[i].stress; out[i].ok && !(s > 0 && !math.IsInf(s, 0)) {
			out[i] = refused("no stress on a logarithmic scale")
		}
	}
	return out
}

// combine returns the weighted mean of ln σ′p after each construction's known
// bias, and how far they differ beyond it; ok is false where none gave a value.
func combine(outcomes []outcome, flattening float64) (mean, disagreement float64, ok bool) {
	var sum, squares, weights float64
	for i, o := range outcomes {
		c, calibrated := calibrations[constructions[i].id]
		if !o.ok || !calibrated {
			continue
		}
		w, y := weight(c, o), math.Log(o.stress)-c.at(flattening)
		sum += w * y
		squares += w * y * y
		weights += w
	}
	if weights == 0 {
		return 0, 0, false
	}
	mean = sum / weights
	return mean, math.Sqrt(math.Max(0, squares/weights-mean*mean)), true
}

// weight is the inverse variance of a construction, a quarter of it where its
// lines rest on too few points.
func weight(c calibration, o outcome) float64 {
	w := 1 / (c.scatter * c.scatter)
	if o.weak {
		w /= 4
	}
	return w
}
