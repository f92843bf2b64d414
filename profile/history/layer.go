package history

import (
	"fmt"
	"math"
	"sort"

	"gonum.org/v1/gonum/mat"
)

// minWeight is the share below which a combination is left out of the
// predictions.
const minWeight = 1e-7

// layer infers one layer and writes its part of the result.
func (in *Input) layer(l int, k *constants, out *Result) {
	var r rows
	var own []int
	add := func(t Test, extra float64) {
		sd := t.LnSD
		if sd == 0 {
			sd = LnSDForGrade("")
		}
		// The half-normal part that disturbance takes away, by its mean and variance.
		shift := math.Sqrt(2/math.Pi) * t.Disturbance
		sd = math.Sqrt(sd*sd + (1-2/math.Pi)*t.Disturbance*t.Disturbance)
		r.depth = append(r.depth, t.Depth)
		r.effective = append(r.effective, t.EffectiveStress)
		r.value = append(r.value, math.Log(t.Preconsolidation)+shift)
		r.sd = append(r.sd, sd)
	}
	for i, t := range in.Tests {
		if t.Layer != l {
			continue
		}
		out.Tests[i] = TestResult{ID: t.ID}
		if t.Kind != Exact {
			out.Tests[i].Why = "a bound (" + t.Kind.String() + ")"
			continue
		}
		out.Tests[i].Used = true
		own = append(own, i)
		add(t, 0)
	}
	r.tests = len(own)
	for _, t := range in.Neighbours {
		if t.Layer == l && t.Kind == Exact {
			add(t, in.NeighbourBetweenSD)
		}
	}

	in.mend(l, &r, out)
	in.addSources(l, k, &r)
	var at []int
	depth := append([]float64(nil), r.depth...)
	effective := append([]float64(nil), r.effective...)
	for i, s := range in.Stations {
		if s.Layer == l {
			at = append(at, i)
			depth = append(depth, s.Depth)
			effective = append(effective, s.EffectiveStress)
		}
	}
	g := ground{top: in.Layers[l].Top, base: in.Layers[l].Base, gamma: in.WaterUnitWeight}
	for _, z := range depth {
		g.base = math.Max(g.base, z)
	}
	g.base = math.Max(g.base, g.top+1)
	if in.HasWater {
		g.water = in.WaterTable
	}
	ns := nodes(mechanisms)
	lines := make([]line, len(ns))
	for i := range ns {
		lines[i] = ns[i].at(mechanisms, &g, depth, effective)
	}
	post := r.posterior(k, ns, lines)
	for j, i := range own {
		post.confront(j, &out.Tests[i], r.value[j])
	}
	m := post.predict(at, in.Stations, lines)
	for j, i := range at {
		out.Points[i] = in.point(i, &m[j])
	}
	out.Layers = append(out.Layers, in.explain(l, &r, post, ns))
	if r.tests == 0 {
		out.Notes = append(out.Notes, fmt.Sprintf("%s: no test of σ′p; the profile rests on what is usual", in.Layers[l].Name))
	}
}

// addSources appends the rows of the indirect evidence, and sets the errors
// that rows share.
func (in *Input) addSources(l int, k *constants, r *rows) {
	direct := len(r.value)
	if sources := in.sourcesOf(l); len(sources) > 0 {
		depths := readingDepths(sources)
		for _, t := range k.Trusts {
			if ind, ok := k.combineSources(sources, depths, t); ok {
				r.indirect = append(r.indirect, ind)
			}
		}
		for _, z := range depths {
			s := 0.0
			for _, x := range in.Readings {
				if x.Layer == l && x.Depth == z {
					s = x.EffectiveStress
				}
			}
			r.depth = append(r.depth, z)
			r.effective = append(r.effective, s)
			r.value = append(r.value, 0)
			r.sd = append(r.sd, 0)
		}
	}
	n := len(r.value)
	if n == 0 {
		return
	}
	r.fixed = mat.NewSymDense(n, nil)
	for i := r.tests; i < direct; i++ {
		for j := i; j < direct; j++ {
			r.fixed.SetSym(i, j, in.NeighbourBetweenSD*in.NeighbourBetweenSD)
		}
	}
}

// point writes the distribution of ln σ′p at a station as a Point.
func (in *Input) point(i int, m *mixture) Point {
	s := in.Stations[i]
	b := m.band()
	p := Point{Depth: s.Depth, Layer: s.Layer, Preconsolidation: Band{math.Exp(b.Low), math.Exp(b.Best), math.Exp(b.High)}}
	_, p.LnSD = m.moments()
	if s.EffectiveStress <= 0 {
		return p
	}
	p.HasOCR = true
	ratio := mixture{weight: m.weight}
	for k := range m.weight {
		ratio.mean = append(ratio.mean, m.mean[k]-math.Log(s.EffectiveStress))
		ratio.sd = append(ratio.sd, math.Hypot(m.sd[k], s.LnSD))
	}
	b = ratio.band()
	p.OCR = Band{math.Exp(b.Low), math.Exp(b.Best), math.Exp(b.High)}
	spread := 1.645 * s.EffectiveStress * s.LnSD
	p.POP.Best = p.Preconsolidation.Best - s.EffectiveStress
	p.POP.Low = p.POP.Best - math.Hypot(p.Preconsolidation.Best-p.Preconsolidation.Low, spread)
	p.POP.High = p.POP.Best + math.Hypot(p.Preconsolidation.High-p.Preconsolidation.Best, spread)
	last := 0.0
	for z, limit := range in.Limits {
		q := ratio.below(math.Log(limit))
		p.ZoneProbability[z] = math.Max(0, q-last)
		last = q
	}
	p.ZoneProbability[3] = math.Max(0, 1-last)
	for z, q := range p.ZoneProbability {
		if q > p.ZoneProbability[p.Zone] {
			p.Zone = Zone(z)
		}
	}
	return p
}

// explain writes the mechanisms of a layer.
func (in *Input) explain(l int, r *rows, post *posterior, ns []node) LayerResult {
	out := LayerResult{Layer: l, Tests: r.tests}
	low, high := math.Inf(1), 0.0
	for i := range r.tests {
		if s := r.effective[i]; s > 0 {
			low, high = math.Min(low, s), math.Max(high, s)
		}
	}
	out.Distinguishable = r.tests >= 5 && high/low >= 1.5
	for k, m := range mechanisms {
		me := Mechanism{Name: m.name, Probability: post.mechanism[k]}
		for p := range m.parameters {
			b := post.size[k][p].band()
			f := m.parameters[p].size
			me.Parameters = append(me.Parameters, Parameter{m.parameters[p].name, f(b.Low), f(b.Best), f(b.High), m.parameters[p].unit})
		}
		me.Parameter = me.Parameters[0]
		out.Mechanisms = append(out.Mechanisms, me)
	}
	sort.SliceStable(out.Mechanisms, func(i, j int) bool { return out.Mechanisms[i].Probability > out.Mechanisms[j].Probability })
	return out
}

// mend puts a plausible effective stress in the place of one that is not, and
// says so.
func (in *Input) mend(l int, r *rows, out *Result) {
	bad := implausible(r.depth, r.effective)
	var z, e []float64
	for j := range bad {
		if !bad[j] {
			z, e = append(z, r.depth[j]), append(e, r.effective[j])
		}
	}
	for i := range bad {
		if !bad[i] {
			continue
		}
		given := r.effective[i]
		r.effective[i] = math.Max(continued(z, e, r.depth[i]), 0)
		out.Notes = append(out.Notes, fmt.Sprintf(
			"%s, %.2f m: σ′v0 of %.0f kPa cannot stand beside that of the other tests (%.0f kPa on their line); the history there is inferred with the latter",
			in.Layers[l].Name, r.depth[i], given, r.effective[i]))
	}
}
