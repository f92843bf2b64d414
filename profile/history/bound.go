package history

import "math"

// site is the normal observation of ln σ′p that has the effect of a bound.
// Variance 0: it has none.
type site struct{ mean, variance float64 }

// updateBounds replaces each bound by the normal observation that changes the
// first two moments of ln σ′p at its depth as the bound does (expectation
// propagation). A bound may be wrong, as a test may: then it says nothing.
func (l *layer) updateBounds(k *constants) {
	first := len(l.stations) + len(l.tests)
	next := make([]site, len(l.sites))
	for b, i := range l.bounds {
		t := &l.in.Tests[i]
		mean, sd := l.lines[first+b].moments()
		variance := sd * sd
		if s := l.sites[b]; s.variance > 0 {
			// The bound's own part is taken out first.
			precision := 1/variance - 1/s.variance
			if precision <= 0 {
				next[b] = s
				continue
			}
			mean = (mean/variance - s.mean/s.variance) / precision
			variance = 1 / precision
		}
		next[b] = boundSite(t, mean, variance, k.Wild)
	}
	l.sites = next
}

// boundSite returns the site of a bound where the rest gives a normal
// distribution: with u = ±(mean − bound)/√(variance + sd²), the bound is kept
// with probability Φ(u).
func boundSite(t *Test, mean, variance, wild float64) site {
	value, sd := t.observation()
	sign := 1.0
	if t.Kind == AtMost {
		sign = -1
	}
	whole := math.Sqrt(variance + sd*sd)
	u := sign * (mean - value) / whole
	kept := (1-wild)*cdf(u) + wild*0.5
	ratio := (1 - wild) * math.Exp(-0.5*u*u) / math.Sqrt(2*math.Pi) / kept
	newMean := mean + sign*variance/whole*ratio
	newVariance := variance - variance*variance/(whole*whole)*ratio*(u+ratio)
	// Where the bound adds nothing to speak of, or only doubt, it has no site.
	if newVariance <= 0 || newVariance > 0.999*variance {
		return site{}
	}
	precision := 1/newVariance - 1/variance
	return site{(newMean/newVariance - mean/variance) / precision, 1 / precision}
}

// tellBound says how a bound stands to the rest of the evidence. It conflicts
// when the ground is on its wrong side, by the measure of an exact test.
func (l *layer) tellBound(t *Test, m *mixture, out *TestResult) {
	b := m.band()
	out.Expected = exponential(b)
	value, sd := t.observation()
	mean, own := m.moments()
	sign := 1.0
	if t.Kind == AtMost {
		sign = -1
	}
	whole := math.Hypot(own, sd)
	out.Z = (value - mean) / whole
	out.Judged = math.Max(0, sign*(value-mean)) / judgingSD(whole, sd)
	// No set of wild tests holds a bound; its distance alone decides.
	out.Verdict = verdict(out.Z, out.Judged, math.Inf(1))
	out.Why = "a bound: " + t.Kind.String()
}
