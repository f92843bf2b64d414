package oedometer

import (
	"math"
)

// A calibration is how one construction errs on generated curves of known yield
// stress (this package's tests): the median of ln(estimate/truth) and a standard
// deviation about it.
type calibration struct {
	bias, scatter float64
}

// calibrations, by construction. They are measured here, not published.
var calibrations = map[string]calibration{
	"two-line":          {0.00, 0.05},
	"casagrande":        {0.08, 0.07},
	"slope":             {-0.01, 0.05},
	"work":              {0.09, 0.06},
	"bilogarithmic":     {0.08, 0.06},
	"pacheco-silva":     {-0.02, 0.05},
	"dissipated-energy": {0.09, 0.08},
	"sallfors":          {0.00, 0.08},
	"modulus":           {0.00, 0.08},
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
func combine(outcomes []outcome) (mean, disagreement float64, ok bool) {
	var sum, weights float64
	for i, o := range outcomes {
		if !o.ok {
			continue
		}
		c := calibrations[constructions[i].id]
		w := weight(c, o)
		sum += w * (math.Log(o.stress) - c.bias)
		weights += w
	}
	if weights == 0 {
		return 0, 0, false
	}
	mean = sum / weights
	var squares float64
	for i, o := range outcomes {
		if o.ok {
			c := calibrations[constructions[i].id]
			d := math.Log(o.stress) - c.bias - mean
			squares += weight(c, o) * d * d
		}
	}
	return mean, math.Sqrt(squares / weights), true
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
