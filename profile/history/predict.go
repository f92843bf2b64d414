package history

import (
	"math"
	"sort"
)

// moments are those of ln σ′p at a depth in one mechanism under one setting.
type moments struct{ weight, mean, square float64 }

// predict returns the distribution of ln σ′p at depths whose lines follow
// those of the rows.
func (p *posterior) predict(depths []float64) []mixture {
	groups := make([][]moments, len(p.settings)*len(p.model.mechanisms)) // nil where empty
	sideBySide(len(p.settings), func(s int) {
		u := &p.settings[s]
		if len(u.nodes) == 0 {
			return
		}
		gain, left := p.gain(u, depths)
		for i := range u.nodes {
			g := &groups[s*len(p.model.mechanisms)+p.model.nodes[u.nodes[i].node].mechanism]
			if *g == nil {
				*g = make([]moments, len(depths))
			}
			p.spread(&u.nodes[i], gain, left, *g)
		}
	})
	out := make([]mixture, len(depths))
	for j := range depths {
		for _, g := range groups {
			if g != nil && g[j].weight > 0 {
				mean := g[j].mean / g[j].weight
				out[j].add(g[j].weight, mean, math.Sqrt(math.Max(g[j].square/g[j].weight-mean*mean, 1e-10)))
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

// spread adds a node's moments at each depth.
func (p *posterior) spread(f *fitted, gain [][]float64, left []float64, out []moments) {
	ln := &p.model.lines[f.node]
	n, t, d := len(p.rows.depth), p.rows.tests, len(f.step)
	rest := make([]float64, d) // how the parameters act where the rows do not follow
	turned := make([]float64, d)
	full := make([]float64, t)
	for j := range gain {
		g := gain[j]
		mean := ln.mean[n+j] + dot(g, f.residual)
		variance := left[j]
		for a := range d {
			rest[a] = ln.slope[a][n+j] - dot(g, ln.slope[a][:n])
			mean += rest[a] * f.step[a]
		}
		for a := range d {
			turned[a] = dot(f.inner[a*d:a*d+d], rest)
			variance += rest[a] * turned[a]
		}
		for i := range full {
			full[i] = g[i] + dot(turned, f.pj[i*d:i*d+d])
		}
		shift := dot(full, f.shift)
		out[j].weight += f.weight
		out[j].mean += f.weight * (mean - shift)
		out[j].square += f.weight * (variance + mean*mean - 2*mean*shift + quadratic(full, f.more))
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
