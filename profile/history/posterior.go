package history

import (
	"math"
	"runtime"
	"sync"
	"sync/atomic"
)

// A tally sums weighted moments. Weights are factor·e^log; the largest log so
// far is taken out of them.
type tally struct {
	started                   bool
	top, weight, mean, square float64
}

func (t *tally) add(log, factor, mean, variance float64) {
	switch d := log - t.top; {
	case !t.started || d > 0:
		if t.started {
			scale := math.Exp(-d)
			t.weight *= scale
			t.mean *= scale
			t.square *= scale
		}
		t.started, t.top = true, log
	case d > negligible:
		factor *= math.Exp(d)
	default:
		return
	}
	t.weight += factor
	t.mean += factor * mean
	t.square += factor * (variance + mean*mean)
}

// fitted is a node under one setting after the wild sets are summed.
type fitted struct {
	node   int
	weight float64 // share of the posterior
	combination
	wildSum
}

// underSetting is everything under one setting.
type underSetting struct {
	solved
	nodes    []fitted
	expected [][]tally // by test, then mechanism: what the others say of it
}

// posterior is what the rows of a layer say.
type posterior struct {
	rows      *rows
	model     *model
	settings  []underSetting
	mechanism []float64   // probability of each
	wild      []float64   // of each test
	expected  []mixture   // of each test from the others, the scatter of a good one included
	size      [][]mixture // of each mechanism's parameters
}

// smallestGroup is the weight below which a mechanism under a setting is left
// out of a mixture; the others then add to one.
const smallestGroup = 5e-4

// smallestPair is the share of a node's wild sets from which a pair is thought
// of when a third test is left out. Without one, of the many pairs that mean
// little, the leave-one-out values take no notice.
const smallestPair = 0.01

// hopeless is the log ratio to the best node so far under a setting below which
// a node is not worked out.
const hopeless = -22.0

// smallestNode is the weight below which a node under a setting is left out.
const smallestNode = 1e-5

// infer averages over all nodes, settings and wild sets. Settings are worked
// side by side and summed in their order, so that the bytes do not change. It
// returns nil where no setting could be solved.
func (m *model) infer(r *rows) *posterior {
	p := &posterior{rows: r, model: m}
	settings := m.settings(len(r.indirect))
	p.settings = make([]underSetting, len(settings))
	sideBySide(len(settings), func(i int) {
		if sv, ok := r.solve(m.constants, settings[i]); ok {
			p.settings[i] = m.fit(r, sv)
		}
	})
	if !p.weigh() {
		return nil
	}
	p.sizes()
	p.expect()
	return p
}

// sideBySide calls work for every index below n on as many goroutines as there
// are processors. Each call writes to places of its own.
func sideBySide(n int, work func(i int)) {
	var next atomic.Int64
	var wait sync.WaitGroup
	for range min(n, runtime.GOMAXPROCS(0)) {
		wait.Go(func() {
			for i := int(next.Add(1)) - 1; i < n; i = int(next.Add(1)) - 1 {
				work(i)
			}
		})
	}
	wait.Wait()
}

// fit works all nodes under one setting.
func (m *model) fit(r *rows, sv solved) underSetting {
	u := underSetting{solved: sv, expected: make([][]tally, r.tests)}
	for i := range u.expected {
		u.expected[i] = make([]tally, len(m.mechanisms))
	}
	var sets []wildSet
	best := math.Inf(-1)
	for n := range m.lines {
		c := r.combine(&sv, &m.lines[n])
		sets = c.wildSets(r.tests, m.constants, sets)
		prior := sv.logPrior + m.nodes[n].logPrior
		// A node that no set of wild tests saves is hopeless without any one test
		// as well: leaving it out is no more than taking it as wild.
		log := highest(sets) + prior
		if best = math.Max(best, log); log < best+hopeless {
			continue
		}
		for i := range r.tests {
			t := &u.expected[i][m.nodes[n].mechanism]
			for x := range r.tests + 1 {
				if s := &sets[x]; s.first != i {
					mean, variance, log, factor := c.without(r.tests, s, i, r.value[i])
					t.add(log+prior, factor, mean, variance)
				}
			}
		}
		sum := sumWild(sets, r.tests)
		least := sum.logAll + math.Log(smallestPair)
		for x := r.tests + 1; x < len(sets); x++ {
			// The factor of a pair is below one: its logarithm is taken of few.
			if s := &sets[x]; s.log > least && s.log+math.Log(s.factor) > least {
				for i := range r.tests {
					if s.first != i && s.second != i {
						mean, variance, log, factor := c.without(r.tests, s, i, r.value[i])
						u.expected[i][m.nodes[n].mechanism].add(log+prior, factor, mean, variance)
					}
				}
			}
		}
		sum.logAll += prior
		u.nodes = append(u.nodes, fitted{node: n, combination: c, wildSum: sum})
	}
	return u
}

// weigh turns log weights into shares, drops what has none, and sums the
// probabilities of mechanisms and wild tests. It is false where no setting
// could be solved.
func (p *posterior) weigh() bool {
	top := math.Inf(-1)
	for _, u := range p.settings {
		for i := range u.nodes {
			top = math.Max(top, u.nodes[i].logAll)
		}
	}
	if math.IsInf(top, -1) || math.IsNaN(top) {
		return false
	}
	total := 0.0
	for _, u := range p.settings {
		for i := range u.nodes {
			total += math.Exp(u.nodes[i].logAll - top)
		}
	}
	p.mechanism = make([]float64, len(p.model.mechanisms))
	p.wild = make([]float64, p.rows.tests)
	for s := range p.settings {
		u := &p.settings[s]
		kept := u.nodes[:0]
		for _, f := range u.nodes {
			f.weight = math.Exp(f.logAll-top) / total
			p.mechanism[p.model.nodes[f.node].mechanism] += f.weight
			for i, w := range f.share {
				p.wild[i] += f.weight * w
			}
			if f.weight > smallestNode {
				kept = append(kept, f)
			}
		}
		u.nodes = kept
	}
	return true
}

// sizes gathers the parameters of the mechanisms, every test good.
func (p *posterior) sizes() {
	m := p.model
	p.size = make([][]mixture, len(m.mechanisms))
	for k := range m.mechanisms {
		p.size[k] = make([]mixture, len(m.mechanisms[k].parameters))
	}
	for s := range p.settings {
		for i := range p.settings[s].nodes {
			f := &p.settings[s].nodes[i]
			n := &m.nodes[f.node]
			d := len(n.cells)
			for a, cell := range n.cells {
				mean, variance := f.step[a], f.inner[a*d+a]
				// Wild tests act through the slopes of the parameter: the same
				// algebra as for a depth, with no departure of its own.
				gain := make([]float64, p.rows.tests)
				for t := range gain {
					gain[t] = dot(f.inner[a*d:a*d+d], f.pj[t*d:t*d+d])
				}
				shift := dot(gain, f.shift)
				more := quadratic(gain, f.more)
				variance += more - shift*shift
				p.size[n.mechanism][a].add(f.weight, cell.at+cell.sd*(mean-shift), cell.sd*math.Sqrt(math.Max(variance, 1e-12)))
			}
		}
	}
	for k := range p.size {
		for a := range p.size[k] {
			p.size[k][a].trim(smallestGroup)
		}
	}
}

// quadratic returns gᵀ·Q·g for a symmetric matrix.
func quadratic(g, q []float64) float64 {
	n := len(g)
	sum := 0.0
	for i, v := range g {
		sum += v * (0.5*q[i*n+i]*v + dot(g[:i], q[i*n:i*n+i]))
	}
	return 2 * sum
}

// expect forms the leave-one-out mixture of every test, one normal for each
// mechanism under each setting.
func (p *posterior) expect() {
	p.expected = make([]mixture, p.rows.tests)
	for i := range p.expected {
		top := math.Inf(-1)
		for s := range p.settings {
			if p.settings[s].expected == nil {
				continue
			}
			for _, t := range p.settings[s].expected[i] {
				if t.weight > 0 {
					top = math.Max(top, t.top)
				}
			}
		}
		for s := range p.settings {
			if p.settings[s].expected == nil {
				continue
			}
			for _, t := range p.settings[s].expected[i] {
				if t.weight > 0 && t.top-top > negligible {
					mean := t.mean / t.weight
					p.expected[i].add(t.weight*math.Exp(t.top-top), mean, math.Sqrt(math.Max(t.square/t.weight-mean*mean, 1e-10)))
				}
			}
		}
		p.expected[i].trim(smallestGroup)
	}
}
