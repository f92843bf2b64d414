package history

import (
	"math"

	"gonum.org/v1/gonum/mat"
)

// rows are the observations of ln σ′p in one layer, in this order: its own
// tests, which may be wild; tests of neighbours and bounds, which are not
// doubted; and the indirect evidence, whose values depend on the trust.
type rows struct {
	depth, effective []float64
	value            []float64 // ln σ′p; 0 for indirect rows
	scatter          []float64 // sd that the noise of a setting scales
	fixed            []float64 // variance of its own that nothing scales
	shared           []float64 // sd of an error that all rows with one share, neighbours
	tests            int       // that may be wild
	indirect         []indirect
}

// add appends a row.
func (r *rows) add(depth, effective, value, scatter, fixed, shared float64) {
	r.depth = append(r.depth, depth)
	r.effective = append(r.effective, effective)
	r.value = append(r.value, value)
	r.scatter = append(r.scatter, scatter)
	r.fixed = append(r.fixed, fixed)
	r.shared = append(r.shared, shared)
}

// jitter keeps the covariance of rows at one depth positive definite where
// tests are taken as all but exact.
const jitter = 1e-8

// solved is the covariance of the rows under one setting, inverted.
type solved struct {
	setting
	value     []float64 // of the rows
	precision []float64 // n×n
	logDet    float64
}

// solve inverts the covariance of the rows under a setting. It is false where
// the covariance is not positive definite, which rounding alone can cause.
func (r *rows) solve(k *constants, s setting) (solved, bool) {
	n := len(r.depth)
	out := solved{setting: s, value: r.value}
	if n == 0 {
		return out, true
	}
	c := mat.NewSymDense(n, nil)
	for i := range n {
		for j := i; j < n; j++ {
			v := s.amplitude*s.amplitude*matern(r.depth[i]-r.depth[j], s.length) + r.shared[i]*r.shared[j]
			if i == j {
				v += s.noise*s.noise*r.scatter[i]*r.scatter[i] + r.fixed[i] + jitter
			}
			c.SetSym(i, j, v)
		}
	}
	if len(r.indirect) > 0 {
		ind := &r.indirect[s.trust]
		first := n - len(ind.value)
		for i := first; i < n; i++ {
			for j := i; j < n; j++ {
				c.SetSym(i, j, c.At(i, j)+ind.covariance.At(i-first, j-first)+k.sharedDrift(r, s.trust, i, j))
			}
		}
		out.value = append(append([]float64(nil), r.value[:first]...), ind.value...)
		out.logPrior += ind.logConstant
	}
	var chol mat.Cholesky
	var inverse mat.SymDense
	if !chol.Factorize(c) || chol.InverseTo(&inverse) != nil {
		return solved{}, false
	}
	out.logDet = chol.LogDet()
	out.precision = make([]float64, n*n)
	for i := range n {
		for j := range n {
			out.precision[i*n+j] = inverse.At(i, j)
		}
	}
	return out, true
}

// sharedDrift is the covariance of the drift that all sources have in common:
// a slow change with depth, and a tilt with ln σ′v0, because relations err by
// a power of the overconsolidation ratio.
func (k *constants) sharedDrift(r *rows, t, i, j int) float64 {
	c := k.Trusts[t].common
	tilt := func(i int) float64 { return k.TiltSD * math.Log(math.Max(r.effective[i], lowestStress)/atmosphere) }
	return c*c*matern(r.depth[i]-r.depth[j], k.DriftLength) + tilt(i)*tilt(j)
}

// atmosphere is the usual reference stress, kPa.
const atmosphere = 100.0
