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
}

var standard = constants{
	Amplitudes: []float64{0.05, 0.15, 0.35},
	AmpW:       []float64{1, 1, 1},
	Lengths:    []float64{1.5, 5, 15},
	LenW:       []float64{1, 1, 1},
	Noises:     []float64{0.2, 0.5, 1, 2},
	NoiseW:     []float64{1, 1, 1, 0.5},
	Nu:         1,
	Wild:       0.03,
	WildSD:     0.7,
}

// A setting is one point of the grid over which the departure and the scatter
// of the tests are averaged.
type setting struct {
	amplitude, length, noise float64
	logPrior                 float64
}

func (c *constants) settings() []setting {
	var out []setting
	for i, a := range c.Amplitudes {
		for j, l := range c.Lengths {
			for k, s := range c.Noises {
				out = append(out, setting{a, l, s, math.Log(c.AmpW[i] * c.LenW[j] * c.NoiseW[k])})
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
