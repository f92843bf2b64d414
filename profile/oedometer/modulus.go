package oedometer

import "math"

// largestModulusStep is the load increment ratio above which tangent moduli say
// nothing about σ′p: on doubling loads the middle of the drop was 0.6–0.9 of it.
const largestModulusStep = 0.3

// tangentModuli returns the moduli M = Δσ′/Δε (strains of the initial height)
// and the mean stresses, over windows wide enough for the reading noise.
func (in *input) tangentModuli() (mean, m []float64) {
	for i := in.first; i < len(in.s); i++ {
		j := i
		for j < len(in.s) && in.x[j]-in.x[i] < 0.08 {
			j++
		}
		if j == len(in.s) {
			break
		}
		if line, ok := fit(in.s, in.e, i, j); ok && line.slope < 0 {
			mean = append(mean, (in.s[i]+in.s[j])/2)
			m = append(m, -(1+in.e0)/line.slope)
		}
	}
	return mean, m
}

// modulus is the reading of Janbu (1969) of constant-rate tests: the tangent
// modulus falls about σ′p, and the middle of the drop is taken, halfway from the
// highest value before it to the lowest after.
func modulus(in *input) outcome {
	if !in.rate {
		return refused("load steps too wide for tangent moduli")
	}
	s, m := in.tangentModuli()
	// The deepest drop: the pair of a maximum and a later minimum with the
	// largest ratio, within the window in which yield is possible.
	top, low, drop := -1, -1, 1.0
	peak := -1
	for i := range m {
		if s[i] < in.estimate/2.5 || s[i] > in.estimate*2.5 {
			continue
		}
		if peak < 0 || m[i] > m[peak] {
			peak = i
		}
		if r := m[peak] / m[i]; r > drop {
			drop, top, low = r, peak, i
		}
	}
	if drop < 1.15 {
		return refused("the modulus does not drop: disturbed, or stiff overconsolidated clay")
	}
	half := (m[top] + m[low]) / 2
	at := s[low]
	for i := top; i < low; i++ {
		if m[i] >= half && m[i+1] < half {
			at = s[i] + (m[i]-half)/(m[i]-m[i+1])*(s[i+1]-s[i])
			break
		}
	}
	out := outcome{stress: at, ok: true}
	if in.detail {
		out.lines = []DrawnLine{
			{"highest modulus", ModulusPlane, 0, m[top], s[low], m[top]},
			{"lowest modulus", ModulusPlane, s[top], m[low], math.Max(s[low], at), m[low]},
		}
	}
	return out
}
