package history

import "math"

// constants are what the model takes as given at every site. They were chosen
// once on natural clays as a whole, none for a site, and results change little
// with them: see doc.go.
type constants struct {
	Departures  []wave
	Noises      choices // scale on the LnSD of tests
	Wild        float64 // prior probability that a test is wild
	WildSD      float64 // sd of the extra error of a wild test, ln σ′p
	Trusts      []trust
	DriftLength float64 // over which sources drift, m
	TiltSD      float64 // sd of the drift of all sources for a unit of ln σ′v0
	LayerSD     float64 // how far a source differs from layer to layer, ln σ′p
}

// choices are values with their prior weights.
type choices []struct{ value, prior float64 }

// wave is one kind of departure from the mechanism.
type wave struct {
	amplitude float64 // sd, ln σ′p
	length    float64 // over which it changes, m
	prior     float64
}

// trust is one degree to which sources may stray from σ′p with depth.
type trust struct {
	within float64 // scale on the error of each reading
	drift  float64 // sd of a slow change with depth of one source, ln σ′p
	common float64 // the same, shared by all sources
	prior  float64
}

var standard = constants{
	Departures:  []wave{{0.05, 4, 0.67}, {0.20, 2, 0.165}, {0.20, 8, 0.165}},
	Noises:      choices{{0.2, 0.35}, {0.6, 0.40}, {1.3, 0.25}},
	Wild:        0.06,
	WildSD:      0.7,
	Trusts:      []trust{{0.7, 0.3, 0.5, 0.5}, {2, 0.6, 0.9, 0.5}},
	DriftLength: 4,
	TiltSD:      0.6,
	LayerSD:     0.15,
}

// A setting is one point of the grid over which departure, scatter and trust
// are averaged.
type setting struct {
	amplitude, length, noise float64
	trust                    int
	logPrior                 float64
}

// settings returns the grid, for a number of trusts.
func (k *constants) settings(trusts int) []setting {
	var out []setting
	for _, w := range k.Departures {
		for _, s := range k.Noises {
			p := math.Log(w.prior * s.prior)
			if trusts == 0 {
				out = append(out, setting{w.amplitude, w.length, s.value, 0, p})
			}
			for t := range trusts {
				out = append(out, setting{w.amplitude, w.length, s.value, t, p + math.Log(k.Trusts[t].prior)})
			}
		}
	}
	return out
}

// matern returns the Matérn 3/2 correlation at a distance: of a process that
// has a slope but no curvature, as a soil profile drawn by hand.
func matern(distance, length float64) float64 {
	x := math.Sqrt(3) * math.Abs(distance) / length
	return (1 + x) * math.Exp(-x)
}
