package history

import (
	"math"
	"sort"

	"gonum.org/v1/gonum/mat"
)

// A source is the readings of one correlation in a layer.
type source struct {
	name    string
	depth   []float64
	value   []float64 // ln σ′p that the relation predicts
	between float64   // sd of the error that all share
	offset  float64   // its mean, from other layers
	within  []float64 // sd of the error of each
}

// The errors of a source whose scatter the caller does not know, ln σ′p: about
// those of cone and strength relations at natural clay sites.
const (
	usualBetween = 0.35
	usualWithin  = 0.25
)

// sourcesOf gathers the readings of a layer by source, in order of name.
func (in *Input) sourcesOf(l int) []source {
	var out []source
	index := map[string]int{}
	for _, r := range in.Readings {
		if r.Layer != l {
			continue
		}
		i, ok := index[r.Source]
		if !ok {
			i = len(out)
			index[r.Source] = i
			s := source{name: r.Source, between: r.BetweenSD}
			if s.between == 0 {
				s.between = usualBetween
			}
			s.between = math.Max(s.between, leastSD)
			out = append(out, s)
		}
		w := r.WithinSD
		if w == 0 {
			w = usualWithin
		}
		out[i].depth = append(out[i].depth, r.Depth)
		out[i].value = append(out[i].value, math.Log(r.Preconsolidation))
		out[i].within = append(out[i].within, math.Max(w, leastSD))
	}
	sort.SliceStable(out, func(i, j int) bool { return out[i].name < out[j].name })
	return out
}

// readingDepths returns the different depths of all readings, sorted.
func readingDepths(sources []source) []float64 {
	var all, out []float64
	for _, s := range sources {
		all = append(all, s.depth...)
	}
	sort.Float64s(all)
	for i, z := range all {
		if i == 0 || z != all[i-1] {
			out = append(out, z)
		}
	}
	return out
}

// indirect is what all sources of a layer say together of ln σ′p at the depths
// where there are readings: one normal observation, and the log of the
// constant that takes its density back to that of the readings.
type indirect struct {
	value       []float64
	covariance  *mat.SymDense
	logConstant float64
}

// combineSources returns the joint observation at the depths under one trust.
// With R_s the covariance of the errors of source s, the observation has the
// precision Λ = Σ R_s⁻¹, put at the depths of its readings, and the mean
// Λ⁻¹ Σ R_s⁻¹x_s. So any number of sources costs one row for each depth.
func (k *constants) combineSources(sources []source, depths []float64, t trust) (indirect, bool) {
	q := len(depths)
	precision := mat.NewSymDense(q, nil)
	weighted := mat.NewVecDense(q, nil)
	log := 0.5 * float64(q) * math.Log(2*math.Pi)
	for i := range sources {
		s := &sources[i]
		inverse, logDet, ok := k.sourcePrecision(s, t)
		if !ok {
			return indirect{}, false
		}
		log -= 0.5 * (logDet + float64(len(s.depth))*math.Log(2*math.Pi))
		for a, za := range s.depth {
			at := sort.SearchFloat64s(depths, za)
			sum := 0.0
			for b, zb := range s.depth {
				v := inverse.At(a, b)
				sum += v * (s.value[b] - s.offset)
				if to := sort.SearchFloat64s(depths, zb); at <= to {
					precision.SetSym(at, to, precision.At(at, to)+v)
				}
			}
			weighted.SetVec(at, weighted.AtVec(at)+sum)
			log -= 0.5 * (s.value[a] - s.offset) * sum
		}
	}
	var chol mat.Cholesky
	var covariance mat.SymDense
	if !chol.Factorize(precision) || chol.InverseTo(&covariance) != nil {
		return indirect{}, false
	}
	var mean mat.VecDense
	mean.MulVec(&covariance, weighted)
	log += 0.5*mat.Dot(&mean, weighted) - 0.5*chol.LogDet()
	return indirect{mean.RawVector().Data, &covariance, log}, true
}

// sourcePrecision inverts the covariance of the errors of a source: one that
// all readings share, a slow drift with depth, and one of each reading.
func (k *constants) sourcePrecision(s *source, t trust) (*mat.SymDense, float64, bool) {
	n := len(s.depth)
	r := mat.NewSymDense(n, nil)
	for a := range n {
		for b := a; b < n; b++ {
			v := s.between*s.between + t.drift*t.drift*matern(s.depth[a]-s.depth[b], k.DriftLength)
			if a == b {
				v += t.within * t.within * s.within[a] * s.within[a]
			}
			r.SetSym(a, b, v)
		}
	}
	var chol mat.Cholesky
	var inverse mat.SymDense
	if !chol.Factorize(r) || chol.InverseTo(&inverse) != nil {
		return nil, 0, false
	}
	return &inverse, chol.LogDet(), true
}
