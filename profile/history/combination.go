package history

import (
	"math"

	"gonum.org/v1/gonum/floats"
)

// combination is one node under one setting with every test taken as good: a
// normal model whose mean is the node's line and whose parameters vary within
// their cells. C = K + J·Jᵀ has the departure and the errors in K and the
// slopes in J; its inverse is P − (PJ)(I + JᵀPJ)⁻¹(PJ)ᵀ with P = K⁻¹.
type combination struct {
	residual  []float64   // value less line
	alpha     []float64   // C⁻¹·residual
	pj        []float64   // n×p: P·J
	inner     []float64   // p×p: (I + JᵀPJ)⁻¹, the covariance of the parameters in sd of their cells
	step      []float64   // p: their mean
	slope     [][]float64 // J by parameter, then row
	precision []float64   // t×t: C⁻¹ among the tests
	log       float64     // log likelihood
}

// combine computes a combination.
func (r *rows) combine(sv *solved, ln *line) combination {
	n, p := len(r.depth), len(ln.slope)
	store := make([]float64, 2*n+n*p+r.tests*r.tests+p)
	cut := func(n int) []float64 {
		part := store[:n:n]
		store = store[n:]
		return part
	}
	c := combination{residual: cut(n), alpha: cut(n), pj: cut(n * p), precision: cut(r.tests * r.tests), step: cut(p), slope: ln.slope}
	for i := range n {
		c.residual[i] = sv.value[i] - ln.mean[i]
	}
	for i := range n {
		row := sv.precision[i*n : i*n+n]
		c.alpha[i] = dot(row, c.residual)
		for k := range p {
			c.pj[i*p+k] = dot(row, ln.slope[k][:n])
		}
	}
	logDet := c.parameters(n, p)
	quad := 0.0
	for i := range n {
		c.alpha[i] -= dot(c.pj[i*p:i*p+p], c.step)
		quad += c.residual[i] * c.alpha[i]
	}
	for i := range r.tests {
		for j := range i + 1 {
			v := sv.precision[i*n+j]
			for k := range p {
				v -= c.pj[i*p+k] * dot(c.inner[k*p:k*p+p], c.pj[j*p:j*p+p])
			}
			c.precision[i*r.tests+j], c.precision[j*r.tests+i] = v, v
		}
	}
	c.log = -0.5*quad - 0.5*(sv.logDet+logDet) - 0.5*float64(n)*math.Log(2*math.Pi)
	return c
}

// parameters computes the posterior of the parameters within their cells, and
// returns ln det(I + JᵀPJ).
func (c *combination) parameters(n, p int) float64 {
	m := make([]float64, p*p)
	b := make([]float64, p)
	for i := range n {
		row := c.pj[i*p : i*p+p]
		for k := range p {
			b[k] += row[k] * c.residual[i]
			for l := range k + 1 {
				m[k*p+l] += c.slope[k][i] * row[l]
			}
		}
	}
	for k := range p {
		m[k*p+k]++
	}
	c.inner = make([]float64, p*p)
	logDet := invert(m, c.inner, p)
	for k := range p {
		c.step[k] = dot(c.inner[k*p:k*p+p], b)
	}
	return logDet
}

// invert inverts a positive definite matrix of the few parameters of a
// mechanism, given by its lower triangle, and returns ln det. gonum's factor
// would be mostly overhead at this size.
func invert(m, out []float64, p int) float64 {
	det := 1.0
	for k := range p { // Cholesky factor, in place
		for l := range k + 1 {
			sum := m[k*p+l]
			for j := range l {
				sum -= m[k*p+j] * m[l*p+j]
			}
			if k == l {
				m[k*p+k] = math.Sqrt(sum)
				det *= sum
			} else {
				m[k*p+l] = sum / m[l*p+l]
			}
		}
	}
	var x [3]float64
	for col := range p {
		for k := range p {
			sum := 0.0
			if k == col {
				sum = 1
			}
			for j := range k {
				sum -= m[k*p+j] * x[j]
			}
			x[k] = sum / m[k*p+k]
		}
		for k := p - 1; k >= 0; k-- {
			for j := k + 1; j < p; j++ {
				x[k] -= m[j*p+k] * x[j]
			}
			x[k] /= m[k*p+k]
			out[k*p+col] = x[k]
		}
	}
	return math.Log(det)
}

// dot returns the inner product of a with the head of b.
func dot(a, b []float64) float64 {
	b = b[:len(a)]
	if len(a) > 8 {
		return floats.Dot(a, b)
	}
	sum := 0.0
	for i, v := range a {
		sum += v * b[i]
	}
	return sum
}
