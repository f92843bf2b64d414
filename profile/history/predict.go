package history

import "math"

// posterior is what the rows of a layer say of nodes, settings and tests.
type posterior struct {
	rows      *rows
	constants *constants
	nodes     []node
	solved    []solved
	kept      []keptCombination
	mechanism []float64   // probability of each
	size      [][]mixture // of each mechanism's parameters
	expected  []mixture   // of each test from the others, its own good error included
	wild      []float64   // probability that a test is wild
}

type keptCombination struct {
	setting, node int
	weight        float64
	changes       []change // log holds the weight
}

// posterior averages over all combinations.
func (r *rows) posterior(k *constants, ns []node, lines []line) *posterior {
	post := &posterior{rows: r, constants: k, nodes: ns}
	for _, s := range k.settings(max(1, len(r.indirect))) {
		if sv, ok := r.solve(k, s); ok {
			post.solved = append(post.solved, sv)
		}
	}
	groups := len(mechanisms) * len(post.solved)
	logs := make([]float64, 0, len(ns)*len(post.solved))
	type sum struct{ w, m, v float64 } // relative to a common scale
	top := math.Inf(-1)
	var buffer []change
	// First the scale, so that sums do not overflow.
	combos := make([]combination, 0, cap(logs))
	for si := range post.solved {
		for ni := range ns {
			c := r.combine(&post.solved[si], &lines[ni])
			buffer = c.changes(r.tests, k, buffer)
			best := math.Inf(-1)
			for _, ch := range buffer {
				best = math.Max(best, ch.log)
			}
			best += post.solved[si].logPrior + ns[ni].logPrior
			logs = append(logs, best)
			top = math.Max(top, best)
			combos = append(combos, c)
		}
	}
	loo := make([][]sum, r.tests)
	scale := make([]float64, r.tests)
	for i := range loo {
		loo[i] = make([]sum, groups)
		scale[i] = math.Inf(-1)
	}
	for i := range r.tests {
		for ci := range combos {
			_, _, log := combos[ci].without(&change{pair: pair{-1, -1}, log: combos[ci].log}, i, r.value[i])
			scale[i] = math.Max(scale[i], log)
		}
	}
	post.mechanism = make([]float64, len(mechanisms))
	post.size = make([][]mixture, len(mechanisms))
	for i, m := range mechanisms {
		post.size[i] = make([]mixture, len(m.parameters))
	}
	post.wild = make([]float64, r.tests)
	total := 0.0
	for ci := range combos {
		si, ni := ci/len(ns), ci%len(ns)
		prior := post.solved[si].logPrior + ns[ni].logPrior
		c := &combos[ci]
		buffer = c.changes(r.tests, k, buffer)
		group := ns[ni].mechanism*len(post.solved) + si
		for i := range r.tests {
			for x := range r.tests + 1 {
				ch := &buffer[x]
				if ch.first == i {
					continue
				}
				mean, variance, log := c.without(ch, i, r.value[i])
				w := math.Exp(log + prior - scale[i])
				s := &loo[i][group]
				s.w += w
				s.m += w * mean
				s.v += w * (variance + mean*mean)
			}
		}
		if logs[ci]-top < math.Log(minWeight)-5 {
			continue
		}
		kept := keptCombination{setting: si, node: ni}
		for _, ch := range buffer {
			w := math.Exp(ch.log + prior - top)
			kept.weight += w
			if ch.first >= 0 {
				post.wild[ch.first] += w
			}
			if ch.second >= 0 {
				post.wild[ch.second] += w
			}
			if w > 1e-9 {
				ch.log = w
				kept.changes = append(kept.changes, ch)
			}
		}
		total += kept.weight
		post.mechanism[ns[ni].mechanism] += kept.weight
		for p, cell := range ns[ni].cells {
			sd := cell.sd * math.Sqrt(c.inner[p*c.p+p])
			post.size[ns[ni].mechanism][p].add(kept.weight, cell.at+cell.sd*c.step[p], math.Max(sd, 1e-9))
		}
		post.kept = append(post.kept, kept)
	}
	for i := range post.kept {
		post.kept[i].weight /= total
		for j := range post.kept[i].changes {
			post.kept[i].changes[j].log /= total
		}
	}
	for i := range post.mechanism {
		for p := range post.size[i] {
			for j := range post.size[i][p].weight {
				post.size[i][p].weight[j] /= post.mechanism[i]
			}
		}
		post.mechanism[i] /= total
	}
	for i := range post.wild {
		post.wild[i] /= total
	}
	for i := range r.tests {
		var m mixture
		sw := 0.0
		for _, s := range loo[i] {
			sw += s.w
		}
		for _, s := range loo[i] {
			if s.w > 1e-7*sw {
				mean := s.m / s.w
				m.add(s.w/sw, mean, math.Sqrt(math.Max(s.v/s.w-mean*mean, 1e-10)))
			}
		}
		post.expected = append(post.expected, m)
	}
	return post
}

// confront fills the result of test i from what the others say.
func (p *posterior) confront(i int, out *TestResult, value float64) {
	m := &p.expected[i]
	b := m.band()
	out.Expected = Band{math.Exp(b.Low), math.Exp(b.Best), math.Exp(b.High)}
	below := math.Min(math.Max(m.below(value), 1e-15), 1-1e-15)
	out.Z = quantile(below)
	out.Wild = p.wild[i]
	switch {
	case out.Wild > 0.5:
		out.Verdict = Conflicts
	case math.Abs(out.Z) > 1.96:
		out.Verdict = Doubtful
	default:
		out.Verdict = Agrees
	}
}

// predict returns the distribution of ln σ′p at the stations of the layer,
// whose lines follow those of the rows.
func (p *posterior) predict(at []int, stations []Station, lines []line) []mixture {
	n := len(p.rows.value)
	q := len(at)
	type sum struct{ w, m, v float64 }
	groups := make([][]sum, len(mechanisms)*len(p.solved))
	// K*·P of every setting.
	gain := make([][]float64, len(p.solved))
	cross := make([][]float64, len(p.solved))
	for s := range p.solved {
		gain[s] = make([]float64, q*n)
		cross[s] = make([]float64, q*n)
		sv := &p.solved[s]
		for j, i := range at {
			for a := range n {
				cross[s][j*n+a] = sv.amplitude * sv.amplitude * p.constants.correlation(stations[i].Depth-p.rows.depth[a], sv.length)
			}
			for a := range n {
				v := 0.0
				for b := range n {
					v += cross[s][j*n+b] * sv.precision[b*n+a]
				}
				gain[s][j*n+a] = v
			}
		}
	}
	for _, kc := range p.kept {
		if kc.weight < minWeight {
			continue
		}
		sv, ln := &p.solved[kc.setting], &lines[kc.node]
		c := p.rows.combine(sv, ln)
		g := p.nodes[kc.node].mechanism*len(p.solved) + kc.setting
		if groups[g] == nil {
			groups[g] = make([]sum, q)
		}
		for j := range at {
			k := cross[kc.setting][j*n : j*n+n]
			kp := gain[kc.setting][j*n : j*n+n]
			mean := ln.mean[n+j]
			variance := sv.amplitude * sv.amplitude
			var rest [4]float64
			for a := range n {
				variance -= kp[a] * k[a]
				mean += kp[a] * c.residual[a]
			}
			for x := range c.p {
				rest[x] = ln.slope[x][n+j]
				for a := range n {
					rest[x] -= kp[a] * ln.slope[x][a]
				}
			}
			for x := range c.p {
				mean += rest[x] * c.step[x]
				for y := range c.p {
					variance += rest[x] * c.inner[x*c.p+y] * rest[y]
				}
			}
			// gain on test a, slopes included
			full := func(a int) float64 {
				v := kp[a]
				for x := range c.p {
					for y := range c.p {
						v += rest[x] * c.inner[x*c.p+y] * c.pj[a*c.p+y]
					}
				}
				return v
			}
			s := &groups[g][j]
			for _, ch := range kc.changes {
				m, v := mean, variance
				if ch.first >= 0 {
					g1 := full(ch.first)
					m -= g1 * ch.g1
					v += g1 * g1 * ch.m11
					if ch.second >= 0 {
						g2 := full(ch.second)
						m -= g2 * ch.g2
						v += 2*g1*g2*ch.m12 + g2*g2*ch.m22
					}
				}
				s.w += ch.log
				s.m += ch.log * m
				s.v += ch.log * (v + m*m)
			}
		}
	}
	out := make([]mixture, q)
	for j := range at {
		total := 0.0
		for _, g := range groups {
			if g != nil {
				total += g[j].w
			}
		}
		for _, g := range groups {
			if g != nil && g[j].w > 1e-5*total {
				mean := g[j].m / g[j].w
				out[j].add(g[j].w/total, mean, math.Sqrt(math.Max(g[j].v/g[j].w-mean*mean, 1e-10)))
			}
		}
	}
	return out
}
