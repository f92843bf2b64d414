package history

import (
	"math"

	"gonum.org/v1/gonum/stat/distuv"
)

// cdf returns the standard normal distribution function.
func cdf(x float64) float64 { return 0.5 * math.Erfc(-x/math.Sqrt2) }

// quantile returns the inverse of cdf.
func quantile(p float64) float64 { return distuv.UnitNormal.Quantile(p) }

// A mixture is a weighted sum of normal distributions, weights adding to one.
type mixture struct{ weight, mean, sd []float64 }

func (m *mixture) add(w, mean, sd float64) {
	m.weight = append(m.weight, w)
	m.mean = append(m.mean, mean)
	m.sd = append(m.sd, sd)
}

// shifted returns the mixture of the value plus d with an independent normal
// error.
func (m *mixture) shifted(d, sd float64) mixture {
	out := mixture{weight: m.weight, mean: make([]float64, len(m.mean)), sd: make([]float64, len(m.sd))}
	for i := range m.mean {
		out.mean[i] = m.mean[i] + d
		out.sd[i] = math.Hypot(m.sd[i], sd)
	}
	return out
}

// trim drops what weighs less than a share of the whole and makes the rest add
// to one.
func (m *mixture) trim(share float64) {
	total := 0.0
	for _, w := range m.weight {
		total += w
	}
	kept, n := 0.0, 0
	for i, w := range m.weight {
		if w >= share*total && w > 0 {
			m.weight[n], m.mean[n], m.sd[n] = w, m.mean[i], m.sd[i]
			kept += w
			n++
		}
	}
	m.weight, m.mean, m.sd = m.weight[:n], m.mean[:n], m.sd[:n]
	for i := range m.weight {
		m.weight[i] /= kept
	}
}

// below returns the probability of a value below x.
func (m *mixture) below(x float64) float64 {
	p := 0.0
	for i, w := range m.weight {
		p += w * cdf((x-m.mean[i])/m.sd[i])
	}
	return p
}

// moments returns mean and standard deviation.
func (m *mixture) moments() (mean, sd float64) {
	second := 0.0
	for i, w := range m.weight {
		mean += w * m.mean[i]
	}
	for i, w := range m.weight {
		d := m.mean[i] - mean
		second += w * (m.sd[i]*m.sd[i] + d*d)
	}
	return mean, math.Sqrt(second)
}

// heavy is the weight from which a part of a mixture counts in the first guess
// of a quantile.
const heavy = 0.02

// at returns the value that a share p lies below.
func (m *mixture) at(p float64) float64 {
	mean, sd := m.moments()
	start := mean + sd*quantile(p)
	if len(m.weight) > 10 {
		// The few heavy parts alone bring the search close, at little cost.
		rough := mixture{make([]float64, 0, 50), make([]float64, 0, 50), make([]float64, 0, 50)}
		for i, w := range m.weight {
			if w >= heavy {
				rough.add(w, m.mean[i], m.sd[i])
			}
		}
		if len(rough.weight) > 0 {
			rough.trim(0)
			start = rough.search(p, start, mean, sd, 1e-2)
		}
	}
	return m.search(p, start, mean, sd, 1e-5)
}

// search takes Newton steps from a start, kept inside a shrinking bracket, until
// they are less than a share of sd: the error is then about its square.
func (m *mixture) search(p, x, mean, sd, share float64) float64 {
	// By Chebyshev's inequality no more than 1/144 lies outside.
	low, high := mean-12*sd, mean+12*sd
	for range 60 {
		f, slope := -p, 0.0
		for i, w := range m.weight {
			u := (x - m.mean[i]) / m.sd[i]
			f += w * cdf(u)
			slope += w * math.Exp(-0.5*u*u) / (m.sd[i] * math.Sqrt(2*math.Pi))
		}
		if f > 0 {
			high = x
		} else {
			low = x
		}
		next := x - f/slope
		if !(next > low && next < high) {
			next = 0.5 * (low + high)
		}
		if math.Abs(next-x) < share*sd {
			return next
		}
		x = next
	}
	return x
}

// band returns the 5, 50 and 95 % points.
func (m *mixture) band() Band { return Band{m.at(0.05), m.at(0.50), m.at(0.95)} }
