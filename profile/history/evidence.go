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
	between float64
	within  []float64
}

// indirect is what all sources together say of ln σ′p at the depths where
// there are readings, as one normal observation.
type indirect struct {
	value   []float64
	cov     *mat.SymDense
	logNorm float64 // log of the constant that the observation leaves out
}

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
				s.between = 0.35
			}
			out = append(out, s)
		}
		w := r.WithinSD
		if w == 0 {
			w = 0.25
		}
		out[i].depth = append(out[i].depth, r.Depth)
		out[i].value = append(out[i].value, math.Log(r.Preconsolidation))
		out[i].within = append(out[i].within, w)
	}
	sort.SliceStable(out, func(i, j int) bool { return out[i].name < out[j].name })
	return out
}

// readingDepths returns the different depths of all readings, sorted.
func readingDepths(sources []source) []float64 {
	var out []float64
	for _, s := range sources {
		out = append(out, s.depth...)
	}
	sort.Float64s(out)
	k := 0
	for i, z := range out {
		if i == 0 || z != out[k-1] {
			out[k] = z
			k++
		}
	}
	return out[:k]
}

// combineSources returns the joint observation under one trust.
func (k *constants) combineSources(sources []source, depths []float64, trust trust) (indirect, bool) {
	q := len(depths)
	lambda := mat.NewSymDense(q, nil)
	h := mat.NewVecDense(q, nil)
	log := 0.0
	for i := range sources {
		s := &sources[i]
		n := len(s.depth)
		r := mat.NewSymDense(n, nil)
		for a := range n {
			for b := a; b < n; b++ {
				v := s.between*s.between + trust.drift*trust.drift*k.smooth(s.depth[a]-s.depth[b], k.DriftLength)
				if a == b {
					v += trust.within * trust.within * s.within[a] * s.within[a]
				}
				r.SetSym(a, b, v)
			}
		}
		var chol mat.Cholesky
		var inv mat.SymDense
		if !chol.Factorize(r) || chol.InverseTo(&inv) != nil {
			return indirect{}, false
		}
		at := make([]int, n)
		for a, z := range s.depth {
			at[a] = sort.SearchFloat64s(depths, z)
		}
		log -= 0.5 * (chol.LogDet() + float64(n)*math.Log(2*math.Pi))
		for a := range n {
			sum := 0.0
			for b := range n {
				sum += inv.At(a, b) * s.value[b]
				if at[a] <= at[b] {
					v := inv.At(a, b)
					if a != b && at[a] == at[b] {
						// both orders of a pair at one depth fall on the diagonal
						lambda.SetSym(at[a], at[b], lambda.At(at[a], at[b])+v)
						continue
					}
					lambda.SetSym(at[a], at[b], lambda.At(at[a], at[b])+v)
				}
			}
			h.SetVec(at[a], h.AtVec(at[a])+sum)
			log -= 0.5 * s.value[a] * sum
		}
	}
	var chol mat.Cholesky
	var cov mat.SymDense
	if !chol.Factorize(lambda) || chol.InverseTo(&cov) != nil {
		return indirect{}, false
	}
	var mean mat.VecDense
	mean.MulVec(&cov, h)
	log += 0.5*mat.Dot(&mean, h) - 0.5*chol.LogDet() + 0.5*float64(q)*math.Log(2*math.Pi)
	return indirect{value: mean.RawVector().Data, cov: &cov, logNorm: log}, true
}
