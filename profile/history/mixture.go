package history

import (
	"math"

	"gonum.org/v1/gonum/mat"
)

// rows are the observations of ln σ′p in one layer. The first tests of them
// may be wild; the others are indirect.
type rows struct {
	depth, effective []float64
	value            []float64     // ln σ′p
	sd               []float64     // that the noise of the tests scales; 0 for indirect rows
	fixed            *mat.SymDense // covariance of the errors that the noise does not scale
	tests            int
	indirect         []indirect // by trust; the last rows
}

// solved is the covariance of the rows under one setting.
type solved struct {
	setting
	value     []float64 // of the rows; those of the sources depend on the trust
	precision []float64 // n×n
	logDet    float64
}

// solve inverts the covariance of the rows under a setting.
func (r *rows) solve(c *constants, s setting) (solved, bool) {
	n := len(r.depth)
	first := n
	value := r.value
	var ind *indirect
	if len(r.indirect) > 0 {
		ind = &r.indirect[s.trust]
		first = n - len(ind.value)
		value = append(append([]float64(nil), r.value[:first]...), ind.value...)
		s.logPrior += ind.logNorm
	}
	sym := mat.NewSymDense(n, nil)
	for i := range n {
		for j := i; j < n; j++ {
			v := s.amplitude * s.amplitude * c.correlation(r.depth[i]-r.depth[j], s.length)
			if r.fixed != nil {
				v += r.fixed.At(i, j)
			}
			if i >= first {
				t := c.Trusts[s.trust].common
				v += ind.cov.At(i-first, j-first)
				v += t * t * c.smooth(r.depth[i]-r.depth[j], c.CommonLength)
				b := c.CommonSlope
				v += b * b * math.Log(math.Max(r.effective[i], 1)/100) * math.Log(math.Max(r.effective[j], 1)/100)
			}
			if i == j {
				v += s.noise*s.noise*r.sd[i]*r.sd[i] + 1e-8
			}
			sym.SetSym(i, j, v)
		}
	}
	var chol mat.Cholesky
	if n == 0 {
		return solved{setting: s, value: value}, true
	}
	if !chol.Factorize(sym) {
		return solved{}, false
	}
	var inverse mat.SymDense
	if chol.InverseTo(&inverse) != nil {
		return solved{}, false
	}
	p := make([]float64, n*n)
	for i := range n {
		for j := range n {
			p[i*n+j] = inverse.At(i, j)
		}
	}
	return solved{setting: s, value: value, precision: p, logDet: chol.LogDet()}, true
}

// combination is one node under one setting, with what the rows say of it.
type combination struct {
	n, p     int
	residual []float64
	alpha    []float64 // precision times residual
	u        []float64 // n×p: precision times slopes, whitened by the inner matrix
	inner    []float64 // p×p: (I + JᵀPJ)⁻¹
	pj       []float64 // n×p: P·J
	step     []float64 // p: mean of the parameters, in sd of their cells
	log      float64   // log likelihood with every test good
	base     []float64 // precision without slopes
}

// combine computes a combination.
func (r *rows) combine(sv *solved, ln *line) combination {
	n, p := len(r.value), len(ln.slope)
	c := combination{n: n, p: p, base: sv.precision,
		residual: make([]float64, n), alpha: make([]float64, n),
		u: make([]float64, n*p), pj: make([]float64, n*p), inner: make([]float64, p*p), step: make([]float64, p)}
	for i := range n {
		c.residual[i] = sv.value[i] - ln.mean[i]
	}
	for i := range n {
		row := sv.precision[i*n : i*n+n]
		sum := 0.0
		for j, v := range row {
			sum += v * c.residual[j]
		}
		c.alpha[i] = sum
		for k := range p {
			sum = 0
			for j, v := range row {
				sum += v * ln.slope[k][j]
			}
			c.pj[i*p+k] = sum
		}
	}
	// The inner matrix has one row for each parameter: its inverse by the
	// Cholesky factor, written out because p is at most three.
	a := make([]float64, p*p)
	for k := range p {
		for l := range p {
			sum := 0.0
			for i := range n {
				sum += ln.slope[k][i] * c.pj[i*p+l]
			}
			if k == l {
				sum++
			}
			a[k*p+l] = sum
		}
	}
	logDet := invertSmall(a, c.inner, p)
	lower := choleskySmall(c.inner, p)
	beta := make([]float64, p)
	for k := range p {
		for i := range n {
			beta[k] += c.pj[i*p+k] * c.residual[i]
		}
	}
	for k := range p {
		for l := range p {
			c.step[k] += c.inner[k*p+l] * beta[l]
		}
	}
	quad := 0.0
	for i := range n {
		for k := range p {
			c.alpha[i] -= c.pj[i*p+k] * c.step[k]
			sum := 0.0
			for l := range p {
				sum += c.pj[i*p+l] * lower[l*p+k]
			}
			c.u[i*p+k] = sum
		}
		quad += c.residual[i] * c.alpha[i]
	}
	c.log = -0.5*quad - 0.5*(sv.logDet+logDet) - 0.5*float64(n)*math.Log(2*math.Pi)
	return c
}

// precision returns an entry of the precision matrix of the rows.
func (c *combination) precision(i, j int) float64 {
	v := c.base[i*c.n+j]
	for k := range c.p {
		v -= c.u[i*c.p+k] * c.u[j*c.p+k]
	}
	return v
}

// invertSmall inverts a positive definite matrix and returns ln det.
func invertSmall(a, out []float64, p int) float64 {
	l := choleskySmall(a, p)
	logDet := 0.0
	for k := range p {
		logDet += 2 * math.Log(l[k*p+k])
	}
	for col := range p {
		x := make([]float64, p)
		for i := range p {
			sum := 0.0
			if i == col {
				sum = 1
			}
			for j := range i {
				sum -= l[i*p+j] * x[j]
			}
			x[i] = sum / l[i*p+i]
		}
		for i := p - 1; i >= 0; i-- {
			sum := x[i]
			for j := i + 1; j < p; j++ {
				sum -= l[j*p+i] * x[j]
			}
			x[i] = sum / l[i*p+i]
		}
		for i := range p {
			out[i*p+col] = x[i]
		}
	}
	return logDet
}

// choleskySmall returns the lower factor of a positive definite matrix.
func choleskySmall(a []float64, p int) []float64 {
	l := make([]float64, p*p)
	for i := range p {
		for j := range i + 1 {
			sum := a[i*p+j]
			for k := range j {
				sum -= l[i*p+k] * l[j*p+k]
			}
			if i == j {
				l[i*p+i] = math.Sqrt(math.Max(sum, 1e-300))
			} else {
				l[i*p+j] = sum / l[j*p+j]
			}
		}
	}
	return l
}

// A pair is a set of wild tests: none, one (second is -1) or two.
type pair struct{ first, second int }

// change is what taking a pair as wild does to a combination.
type change struct {
	pair
	log      float64 // log likelihood and prior of the pair
	g1, g2   float64 // weights on the precision columns: α falls by P₁g1 + P₂g2
	m11, m12 float64 // inner matrix of the change
	m22      float64
}

// changes returns the likelihood of every set of at most two wild tests.
func (c *combination) changes(tests int, k *constants, out []change) []change {
	v := k.WildSD * k.WildSD
	odds := math.Log(k.Wild / (1 - k.Wild))
	out = append(out[:0], change{pair: pair{-1, -1}, log: c.log})
	for i := range tests {
		pii := c.precision(i, i)
		d := pii + 1/v
		out = append(out, change{pair: pair{i, -1},
			log: c.log + odds + 0.5*c.alpha[i]*c.alpha[i]/d - 0.5*math.Log(v*d),
			g1:  c.alpha[i] / d, m11: 1 / d})
	}
	for i := range tests {
		a := c.precision(i, i) + 1/v
		for j := range i {
			b := c.precision(i, j)
			d := c.precision(j, j) + 1/v
			det := a*d - b*b
			g1 := (d*c.alpha[i] - b*c.alpha[j]) / det
			g2 := (a*c.alpha[j] - b*c.alpha[i]) / det
			out = append(out, change{pair: pair{i, j},
				log: c.log + 2*odds + 0.5*(c.alpha[i]*g1+c.alpha[j]*g2) - 0.5*math.Log(v*v*det),
				g1:  g1, g2: g2, m11: d / det, m12: -b / det, m22: a / det})
		}
	}
	return out
}

// without returns what the rows other than test i say of it under a change
// that leaves it good: the mean and variance of its value, and the log
// likelihood of the others.
func (c *combination) without(ch *change, i int, value float64) (mean, variance, log float64) {
	p := c.precision(i, i)
	a := c.alpha[i]
	if ch.first >= 0 {
		p1 := c.precision(i, ch.first)
		a -= p1 * ch.g1
		if ch.second < 0 {
			p -= p1 * p1 * ch.m11
		} else {
			p2 := c.precision(i, ch.second)
			a -= p2 * ch.g2
			p -= p1*p1*ch.m11 + 2*p1*p2*ch.m12 + p2*p2*ch.m22
		}
	}
	variance = 1 / p
	d := a * variance
	return value - d, variance, ch.log - logNormal(d, variance)
}
