package history

import "math"

// constants are what the model takes as given for every site.
type constants struct {
	Amplitudes []float64 // of the departure, ln σ′p
	Lengths    []float64 // over which the departure changes, m
	Noises     []float64 // scale on the LnSD of good tests
	AmpW       []float64 // prior weights
	LenW       []float64
	NoiseW     []float64
	Nu         int     // smoothness: 1 for Matérn 1/2, 3 for Matérn 3/2
	Wild       float64 // prior probability that a test is wild
	WildSD     float64 // sd of the extra error of a wild test, ln σ′p

	Trusts       []trust // how well the sources follow σ′p with depth
	DriftLength  float64 // m
	CommonLength float64 // m
	CommonSlope  float64
}

// trust is how far sources may stray with depth.
type trust struct {
	within float64 // scale on the error of each reading
	drift  float64 // sd of a slow change with depth, ln σ′p
	common float64 // sd of a slow change with depth that all sources share, ln σ′p
	prior  float64
}

var standard = constants{
	Amplitudes:   []float64{0.05, 0.20},
	AmpW:         []float64{2. / 3, 1. / 3},
	Lengths:      []float64{2, 8},
	LenW:         []float64{0.5, 0.5},
	Noises:       []float64{0.2, 0.6, 1.3},
	NoiseW:       []float64{0.35, 0.40, 0.25},
	Nu:           3,
	Wild:         0.06,
	WildSD:       0.7,
	Trusts:       []trust{{0.7, 0.3, 0.5, 0.5}, {2, 0.6, 0.9, 0.5}},
	DriftLength:  4,
	CommonLength: 4,
	CommonSlope:  0.6,
}

// A setting is one point of the grid over which the departure and the scatter
// of the tests are averaged.
type setting struct {
	amplitude, length, noise float64
	trust                    int
	logPrior                 float64
}

func (c *constants) settings(trusts int) []setting {
	var out []setting
	for i, a := range c.Amplitudes {
		for j, l := range c.Lengths {
			for k, s := range c.Noises {
				for t := range trusts {
					out = append(out, setting{a, l, s, t, math.Log(c.AmpW[i] * c.LenW[j] * c.NoiseW[k] * c.Trusts[t].prior)})
				}
			}
		}
	}
	return out
}

// correlation returns that of the departure at two depths a distance apart.
func (c *constants) correlation(distance, length float64) float64 {
	x := math.Abs(distance) / length
	if c.Nu == 1 {
		return math.Exp(-x)
	}
	x *= math.Sqrt(3)
	return (1 + x) * math.Exp(-x)
}

var smoothNu = 3

func (c *constants) smooth(distance, length float64) float64 {
	x := math.Abs(distance) / length
	switch smoothNu {
	case 1:
		return math.Exp(-x)
	case 3:
		x *= math.Sqrt(3)
		return (1 + x) * math.Exp(-x)
	case 5:
		x *= math.Sqrt(5)
		return (1 + x + x*x/3) * math.Exp(-x)
	}
	return math.Exp(-x * x)
}
