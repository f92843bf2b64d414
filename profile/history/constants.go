package history

import "math"

// constants are what the model takes as given at every site. They were chosen
// once on natural clays as a whole, none for a site, and results change little
// with them: see doc.go.
type constants struct {
	Amplitudes, Lengths, Noises choices // of the departure (ln σ′p, m); of the scatter of tests
	Wild                        float64 // prior probability that a test is wild
	WildSD                      float64 // sd of the extra error of a wild test, ln σ′p
	Trusts                      []trust
	DriftLength                 float64 // over which sources drift, m
	TiltSD                      float64 // sd of the drift of all sources for a unit of ln σ′v0
	LayerSD                     float64 // how far a source differs from layer to layer, ln σ′p
}

// choices are values with their prior weights.
type choices []struct{ value, prior float64 }

// trust is one degree to which sources may stray from σ′p with depth.
type trust struct {
	within float64 // scale on the error of each reading
	drift  float64 // sd of a slow change with depth of one source, ln σ′p
	common float64 // the same, shared by all sources
	prior  float64
}

var standard = constants{
	Amplitudes:  choices{{0.05, 0.67}, {0.20, 0.33}},
	Lengths:     choices{{2, 0.5}, {8, 0.5}},
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
	for _, a := range k.Amplitudes {
		for _, l := range k.Lengths {
			for _, s := range k.Noises {
				p := math.Log(a.prior * l.prior * s.prior)
				if trusts == 0 {
					out = append(out, setting{a.value, l.value, s.value, 0, p})
				}
				for t := range trusts {
					out = append(out, setting{a.value, l.value, s.value, t, p + math.Log(k.Trusts[t].prior)})
				}
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
