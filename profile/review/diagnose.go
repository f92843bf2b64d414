package review

import (
	"cmp"
	"math"
	"slices"
)

// A reading is every relation evaluated on a row.
type reading struct {
	c    []comparison
	ok   []bool
	cost float64
}

// read evaluates all relations on a row.
func (c *context) read(r *row) reading {
	n := len(c.relations)
	out := reading{c: make([]comparison, n), ok: make([]bool, n)}
	for i, x := range c.relations {
		if out.c[i], out.ok[i] = x.on(r); out.ok[i] {
			out.cost += x.misfit(out.c[i].z)
		}
	}
	return out
}

// misfit is what a deviation costs; a check that only ever notes costs nothing.
func (x *relation) misfit(z float64) float64 {
	if x.doubt == 0 && x.conflict == 0 && x.fault == 0 {
		return 0
	}
	if x.doubt == 0 && x.conflict == 0 {
		// A hard limit is not a measurement with scatter: inside it costs nothing,
		// outside it costs more than any usual deviation.
		if math.Abs(z) <= x.fault {
			return 0
		}
		return 6 + misfit(z/x.fault)
	}
	return misfit(z)
}

// after returns the cost of a row of which only some variables changed.
// What no longer speaks keeps its cost: a change must not win by silencing.
func (c *context) after(before *reading, r *row, changed uint64) float64 {
	cost := before.cost
	for i, x := range c.relations {
		if x.mask&changed == 0 {
			continue
		}
		now, ok := x.on(r)
		if !ok {
			continue
		}
		if before.ok[i] {
			cost -= x.misfit(before.c[i].z)
		}
		cost += x.misfit(now.z)
	}
	return cost
}

// A change is a hypothesis on a row: variables with other values.
type change struct {
	v     variable // the one it is about
	slip  slip
	vars  []variable
	to    []float64
	pair  bool // two columns exchanged
	gain  float64
	other variable // of a pair
	like  []string // other slips that come to nearly the same value
}

func (h *change) mask() uint64 { return maskOf(h.vars) }

// apply returns a changed copy.
func (h *change) apply(r *row) *row {
	x := *r
	for i, v := range h.vars {
		x.set(v, h.to[i])
	}
	return &x
}

// broken returns the relations that a row breaks at least at doubt.
func (c *context) broken(rd *reading) []int {
	var out []int
	for i, x := range c.relations {
		if rd.ok[i] && x.severity(rd.c[i].z).Rank() >= Doubt.Rank() {
			out = append(out, i)
		}
	}
	return out
}

// hypotheses lists the changes that bring a row nearer to agreement, the best
// first. At most one for each variable or pair.
func (c *context) hypotheses(r *row, rd *reading, broken []int) []change {
	var suspects uint64
	for _, i := range broken {
		suspects |= c.relations[i].mask
	}
	suspects &= r.has
	var out []change
	keep := func(h change) {
		if h.gain <= 0 {
			return
		}
		out = append(out, h)
	}
	for v := range variable(nVariables) {
		if suspects&(1<<v) == 0 {
			continue
		}
		var best change
		var tried []change
		try := func(s slip) {
			h := change{v: v, slip: s, vars: []variable{v}, to: []float64{s.value}}
			if s.joint {
				h.vars, h.to = nil, nil
				for _, m := range family(r, v) {
					h.vars, h.to = append(h.vars, m), append(h.to, r.v[m]*s.value/r.v[v])
				}
			}
			h.gain = rd.cost - c.after(rd, h.apply(r), h.mask()) - s.cost - traits[v].cost
			if h.gain > best.gain {
				best = h
			}
			if s.how != "" && h.gain > 0 {
				tried = append(tried, h)
			}
		}
		for _, s := range slips(r, v) {
			try(s)
		}
		for _, x := range c.roots(r, v, broken) {
			try(slip{value: x, cost: costFree})
		}
		for i := range tried {
			if t := &tried[i]; t.slip.how != best.slip.how && best.slip.how != "" && t.gain > best.gain-0.8 && math.Abs(math.Log(t.slip.value/best.slip.value)) < sameSlip {
				best.like = append(best.like, t.slip.how)
			}
		}
		keep(best)
	}
	for _, p := range exchanges {
		if suspects&(1<<p[0]) == 0 && suspects&(1<<p[1]) == 0 || !r.known(p[0], p[1]) {
			continue
		}
		h := change{v: p[0], other: p[1], pair: true, vars: []variable{p[0], p[1]}, to: []float64{r.v[p[1]], r.v[p[0]]},
			slip: slip{value: r.v[p[1]], how: traits[p[0]].symbol + " and " + traits[p[1]].symbol + " are exchanged", cost: costPair}}
		h.gain = rd.cost - c.after(rd, h.apply(r), h.mask()) - costPair
		keep(h)
	}
	slices.SortStableFunc(out, func(a, b change) int { return cmp.Compare(b.gain, a.gain) })
	return out
}

// sameSlip is how near, as a logarithm, two slips come to the same value: kgf/cm²
// and bar, or t/m² and a decimal point.
const sameSlip = 0.06

// roots returns the values of a variable at which the broken relations, one by
// one, agree, and means of them.
func (c *context) roots(r *row, v variable, broken []int) []float64 {
	var out []float64
	for _, i := range broken {
		if x := c.relations[i]; x.involves(v) {
			if y, ok := root(x, r, v); ok {
				out = append(out, y)
			}
		}
	}
	slices.Sort(out)
	if n := len(out); n > 1 {
		out = append(out, math.Sqrt(out[0]*out[n-1]), out[n/2], math.Sqrt(out[(n-1)/2]*out[n/2]))
		for i := 1; i < n; i++ {
			out = append(out, math.Sqrt(out[i-1]*out[i]))
		}
	}
	return out
}

// root finds where a relation agrees by secants in the logarithm of a variable.
func root(x *relation, r *row, v variable) (float64, bool) {
	if !(r.v[v] > 0) {
		return 0, false
	}
	copy := *r
	at := func(u float64) (float64, bool) {
		copy.v[v] = math.Exp(u)
		now, ok := x.on(&copy)
		return now.z, ok
	}
	u0 := math.Log(r.v[v])
	z0, ok := at(u0)
	if !ok {
		return 0, false
	}
	u1 := u0 + 0.02
	z1, ok := at(u1)
	for step := 0; ok && step < 12; step++ {
		if math.Abs(z1) < 0.05 {
			return copy.v[v], true
		}
		if z1 == z0 {
			return 0, false // at the end of its scale, or not moved by v
		}
		next := u1 - z1*(u1-u0)/(z1-z0)
		next = math.Max(u1-1.5, math.Min(u1+1.5, next))
		if math.IsNaN(next) || math.Abs(next-u0) > 40 {
			return 0, false
		}
		u0, z0, u1 = u1, z1, next
		z1, ok = at(u1)
	}
	return 0, false
}
