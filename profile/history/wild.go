package history

import "math"

// A wildSet is a set of at most two tests taken as wild, with what that does to
// a combination. A wild test has the variance v = WildSD² more, so that C
// becomes C + v·E·Eᵀ with E the columns of the set, and
//
//	log likelihood: + ½ gᵀ(C⁻¹residual)_E − ½ ln det(v·M), M = (C⁻¹)_EE + I/v
//	C⁻¹residual:    − (C⁻¹)_E·g,                           g = M⁻¹(C⁻¹residual)_E
//
// It is exact; nothing is refitted.
type wildSet struct {
	first, second int     // rows; -1 where there is none
	log, factor   float64 // likelihood, prior of the set included: factor·e^log
	g1, g2        float64
	m11, m12, m22 float64 // M⁻¹
}

// wildSets returns all sets of at most two wild tests: none, one by one in
// order of the tests, then the pairs. That no third is thought of keeps the
// sum exact and short; three wild tests in one layer leave the scatter wide.
func (c *combination) wildSets(tests int, k *constants, out []wildSet) []wildSet {
	v := k.WildSD * k.WildSD
	odds := k.Wild / (1 - k.Wild)
	out = append(out[:0], wildSet{first: -1, second: -1, log: c.log, factor: 1})
	for i := range tests {
		m := c.precision[i*tests+i] + 1/v
		g := c.alpha[i] / m
		out = append(out, wildSet{first: i, second: -1, g1: g, m11: 1 / m,
			log: c.log + 0.5*c.alpha[i]*g, factor: odds / math.Sqrt(v*m)})
	}
	for i := range tests {
		mi := c.precision[i*tests+i] + 1/v
		for j := range i {
			mj := c.precision[j*tests+j] + 1/v
			mij := c.precision[i*tests+j]
			det := mi*mj - mij*mij
			g1 := (mj*c.alpha[i] - mij*c.alpha[j]) / det
			g2 := (mi*c.alpha[j] - mij*c.alpha[i]) / det
			out = append(out, wildSet{first: i, second: j, g1: g1, g2: g2,
				m11: mj / det, m12: -mij / det, m22: mi / det,
				log: c.log + 0.5*(c.alpha[i]*g1+c.alpha[j]*g2), factor: odds * odds / (v * math.Sqrt(det))})
		}
	}
	return out
}

// without returns what the other rows say of a good test i when the set, which
// does not hold it, is wild: mean and variance of its value, and
// the likelihood of the others as factor·e^log. It follows from C⁻¹ alone: the
// mean is the value less (C⁻¹residual)_i/(C⁻¹)_ii, the variance 1/(C⁻¹)_ii.
func (c *combination) without(tests int, w *wildSet, i int, value float64) (mean, variance, log, factor float64) {
	p, a := c.precision[i*tests+i], c.alpha[i]
	if w.first >= 0 {
		pij := c.precision[i*tests+w.first]
		a -= pij * w.g1
		p -= pij * pij * w.m11
		if w.second >= 0 {
			pik := c.precision[i*tests+w.second]
			a -= pik * w.g2
			p -= 2*pij*pik*w.m12 + pik*pik*w.m22
		}
	}
	variance = 1 / p
	d := a * variance
	return value - d, variance, w.log + 0.5*d*a, w.factor * math.Sqrt(2*math.Pi*variance)
}

// wildSum is the average over the wild sets of a combination.
type wildSum struct {
	logAll float64   // log likelihood of all sets together
	share  []float64 // probability that a test is wild
	shift  []float64 // mean of g
	more   []float64 // t×t: mean of M⁻¹ + g·gᵀ
}

// negligible is the log ratio below which a term is not added to a sum.
const negligible = -23.0

// highest returns the largest log of the sets.
func highest(sets []wildSet) float64 {
	top := math.Inf(-1)
	for i := range sets {
		if sets[i].log > top {
			top = sets[i].log
		}
	}
	return top
}

// sumWild averages over the sets.
func sumWild(sets []wildSet, tests int) wildSum {
	top := highest(sets)
	out := wildSum{share: make([]float64, tests), shift: make([]float64, tests), more: make([]float64, tests*tests)}
	total := 0.0
	for x := range sets {
		s := &sets[x]
		if s.log-top < negligible {
			continue
		}
		w := s.factor * math.Exp(s.log-top)
		total += w
		if s.first < 0 {
			continue
		}
		i := s.first
		out.share[i] += w
		out.shift[i] += w * s.g1
		out.more[i*tests+i] += w * (s.m11 + s.g1*s.g1)
		if s.second < 0 {
			continue
		}
		j := s.second
		out.share[j] += w
		out.shift[j] += w * s.g2
		out.more[j*tests+j] += w * (s.m22 + s.g2*s.g2)
		out.more[i*tests+j] += w * (s.m12 + s.g1*s.g2)
		out.more[j*tests+i] = out.more[i*tests+j]
	}
	for i := range tests {
		out.share[i] /= total
		out.shift[i] /= total
		for j := range tests {
			out.more[i*tests+j] /= total
		}
	}
	out.logAll = top + math.Log(total)
	return out
}
