package history

import (
	"math"
	"sort"
)

// moments are those of ln σ′p at a depth.
type moments struct{ weight, mean, square float64 }

// A group is a mechanism under a setting: the moments at each depth, and the
// weighted sum of what the wild sets add around the mean of the tests.
type group struct {
	at     []moments
	around []float64
}

// predict returns the distribution of ln σ′p at depths whose lines follow
// those of the rows.
func (p *posterior) predict(depths []float64) []mixture {
	groups := make([]group, len(p.settings)*len(p.model.mechanisms)) // at is nil where empty
	sideBySide(len(p.settings), func(s int) {
		u := &p.settings[s]
		if len(u.nodes) == 0 {
			return
		}
		gain, left := p.gain(u, depths)
		for i := range u.nodes {
			g := &groups[s*len(p.model.mechanisms)+p.model.nodes[u.nodes[i].node].mechanism]
			if g.at == nil {
				*g = group{make([]moments, len(depths)), make([]float64, p.rows.tests*p.rows.tests)}
			}
			p.spread(&u.nodes[i], gain, left, g)
		}
		for k := range p.model.mechanisms {
			g := &groups[s*len(p.model.mechanisms)+k]
			for j := range g.at {
				g.at[j].square += quadratic(gain[j][:p.rows.tests], g.around)
			}
		}
	})
	filled := 0
	for _, g := range groups {
		if g.at != nil {
			filled++
		}
	}
	out := make([]mixture, len(depths))
	store := make([]float64, 3*filled*len(depths))
	for j := range depths {
		part := func(i int) []float64 { at := (3*j + i) * filled; return store[at : at : at+filled] }
		out[j] = mixture{part(0), part(1), part(2)}
		for _, g := range groups {
			if g.at != nil && g.at[j].weight > 0 {
				m := g.at[j]
				mean := m.mean / m.weight
				out[j].add(m.weight, mean, math.Sqrt(math.Max(m.square/m.weight-mean*mean, 1e-10)))
			}
		}
		out[j].trim(smallestGroup)
	}
	return out
}

// gain returns what a residual of each row adds to the departure at each
// depth, k*ᵀP, and the variance that is left of it.
func (p *posterior) gain(u *underSetting, depths []float64) (gain [][]float64, left []float64) {
	n := len(p.rows.depth)
	variance := u.amplitude * u.amplitude
	cross := make([]float64, n)
	store := make([]float64, len(depths)*n)
	for j, z := range depths {
		for i := range n {
			cross[i] = variance * matern(z-p.rows.depth[i], u.length)
		}
		g := store[j*n : j*n+n]
		for i := range n {
			g[i] = dot(u.precision[i*n:i*n+n], cross)
		}
		gain = append(gain, g)
		left = append(left, variance-dot(g, cross))
	}
	return gain, left
}

// spread adds a node's moments at each depth. With g the gain of the rows on
// the departure and rest the slopes that they do not follow, a test acts by
// full = g + (PJ)·inner·rest. The wild sets take full·shift from the mean and
// add fullᵀ·Q·full to the variance, Q = more − shift·shiftᵀ. Of that, gᵀQg is
// the same form for all nodes of a group and is summed once: see around.
func (p *posterior) spread(f *fitted, gain [][]float64, left []float64, out *group) {
	ln := &p.model.lines[f.node]
	n, t, d := len(p.rows.depth), p.rows.tests, len(f.step)
	residual := append([]float64(nil), f.residual...)
	q := make([]float64, t*t)
	for i := range t {
		residual[i] -= f.shift[i]
		for j := range t {
			q[i*t+j] = f.more[i*t+j] - f.shift[i]*f.shift[j]
			out.around[i*t+j] += f.weight * q[i*t+j]
		}
	}
	// The same by parameter: slopes of a test's action, what Q makes of them,
	// and the step less what the wild sets take.
	act := make([][]float64, d)
	turned := make([][]float64, d)
	step := append([]float64(nil), f.step...)
	for a := range d {
		act[a], turned[a] = make([]float64, t), make([]float64, t)
		for i := range t {
			act[a][i] = dot(f.inner[a*d:a*d+d], f.pj[i*d:i*d+d])
		}
		for i := range t {
			turned[a][i] = 2 * dot(q[i*t:i*t+t], act[a])
		}
		step[a] -= dot(act[a], f.shift)
	}
	inner := append([]float64(nil), f.inner...)
	for a := range d {
		for b := range d {
			inner[a*d+b] += 0.5 * dot(act[a], turned[b])
		}
	}
	rest := make([]float64, d)
	for j, g := range gain {
		mean := ln.mean[n+j] + dot(residual, g)
		variance := left[j]
		for a := range d {
			rest[a] = ln.slope[a][n+j] - dot(g, ln.slope[a])
			mean += rest[a] * step[a]
			variance += rest[a] * dot(turned[a], g)
		}
		for a := range d {
			variance += rest[a] * dot(inner[a*d:a*d+d], rest)
		}
		m := &out.at[j]
		m.weight += f.weight
		m.mean += f.weight * mean
		m.square += f.weight * (variance + mean*mean)
	}
}

// departure returns the covariance that the rows leave of the departure.
func (p *posterior) departure(u *underSetting, depths []float64) [][]float64 {
	n := len(p.rows.depth)
	variance := u.amplitude * u.amplitude
	gain, _ := p.gain(u, depths)
	cross := make([]float64, n)
	out := make([][]float64, len(depths))
	for a, z := range depths {
		for i := range n {
			cross[i] = variance * matern(z-p.rows.depth[i], u.length)
		}
		out[a] = make([]float64, len(depths))
		for b := range a + 1 {
			out[a][b] = variance*matern(z-depths[b], u.length) - dot(gain[b], cross)
		}
	}
	return out
}

// nodeLine returns the mean of ln σ′p at outputs in a node, and how its
// parameters act there beside the rows.
func (p *posterior) nodeLine(f *fitted, gain [][]float64, at []int) (mean []float64, rest [][]float64) {
	ln := &p.model.lines[f.node]
	n, t, d := len(p.rows.depth), p.rows.tests, len(f.step)
	for j, i := range at {
		g := gain[j]
		m := ln.mean[n+i] + dot(g, f.residual)
		r := make([]float64, d)
		for a := range d {
			r[a] = ln.slope[a][n+i] - dot(g, ln.slope[a][:n])
			m += r[a] * f.step[a]
		}
		for x := range t {
			full := g[x]
			for a := range d {
				full += r[a] * dot(f.inner[a*d:a*d+d], f.pj[x*d:x*d+d])
			}
			m -= full * f.shift[x]
		}
		mean = append(mean, m)
		rest = append(rest, r)
	}
	return mean, rest
}

// leastWeight returns the weight of the lightest node among the heaviest that
// hold a share of the posterior.
func (p *posterior) leastWeight(share float64) float64 {
	var weights []float64
	for s := range p.settings {
		for i := range p.settings[s].nodes {
			weights = append(weights, p.settings[s].nodes[i].weight)
		}
	}
	sort.Sort(sort.Reverse(sort.Float64Slice(weights)))
	sum := 0.0
	for _, w := range weights {
		sum += w
		if sum >= share {
			return w
		}
	}
	return 0
}
