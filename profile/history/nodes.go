package history

import "math"

// The prior of a parameter is a sum of normal pieces side by side, so narrow
// that within one of them the response of ln σ′p is taken as a straight line.
// Their sum is close to the normal prior, and the average over the parameter
// becomes a sum over the pieces with all the rest in closed form.
const (
	cellReach = 2.0 // the pieces cover this many sd of the prior on either side
	cellWidth = 0.6 // sd of a piece over the distance between pieces: a smooth sum
	leastCell = 0.2 // sd of the distribution of the pieces over that of the prior, at the least
)

// A cell is one normal piece of the prior of a parameter.
type cell struct{ at, sd, weight float64 }

// split returns the cells of a parameter's prior.
func (p parameter) split() []cell {
	if p.cells == 1 {
		return []cell{{p.mean, p.sd, 1}}
	}
	step := 2 * cellReach * p.sd / float64(p.cells-1)
	sd := cellWidth * step
	between := math.Max(math.Sqrt(math.Max(0, p.sd*p.sd-sd*sd)), leastCell*p.sd)
	cells := make([]cell, p.cells)
	total := 0.0
	for i := range cells {
		at := p.mean + (float64(i)-0.5*float64(p.cells-1))*step
		u := (at - p.mean) / between
		cells[i] = cell{at, sd, math.Exp(-0.5 * u * u)}
		total += cells[i].weight
	}
	for i := range cells {
		cells[i].weight /= total
	}
	return cells
}

// A node is a mechanism with one cell for each of its parameters.
type node struct {
	mechanism int
	logPrior  float64
	cells     []cell
}

// A line is the response of a node with depth: ln σ′p at the middle of its
// cells, and how it changes with each parameter over one sd of its cell.
type line struct {
	mean  []float64
	slope [][]float64 // by parameter, then depth
}

// model is all that the posterior of a layer needs besides the rows.
type model struct {
	*constants
	mechanisms []mechanism
	nodes      []node
	lines      []line // at the depths of the rows and, after them, of the outputs
}

// newModel lays out the nodes and their lines at the given depths.
func newModel(k *constants, ms []mechanism, g *ground, depth, effective []float64) *model {
	m := &model{constants: k, mechanisms: ms}
	for i, mech := range ms {
		grown := []node{{mechanism: i, logPrior: math.Log(mech.prior)}}
		for _, p := range mech.parameters {
			var next []node
			for _, n := range grown {
				for _, c := range p.split() {
					next = append(next, node{i, n.logPrior + math.Log(c.weight), append(append([]cell(nil), n.cells...), c)})
				}
			}
			grown = next
		}
		m.nodes = append(m.nodes, grown...)
	}
	stress := make([]float64, len(effective))
	for i, s := range effective {
		stress[i] = math.Max(s, lowestStress)
	}
	m.lines = make([]line, len(m.nodes))
	sideBySide(len(m.nodes), func(i int) {
		m.lines[i] = m.nodes[i].line(&ms[m.nodes[i].mechanism], g, depth, stress)
	})
	return m
}

// line evaluates the node. The change over one sd is the secant from one sd
// below to one above.
func (n *node) line(m *mechanism, g *ground, depth, stress []float64) line {
	p := make([]float64, len(n.cells))
	for i, c := range n.cells {
		p[i] = c.at
	}
	evaluate := func() []float64 {
		v := make([]float64, len(depth))
		response := m.response(g, p)
		for i, z := range depth {
			v[i] = response(z, stress[i])
		}
		return v
	}
	out := line{mean: evaluate(), slope: make([][]float64, len(p))}
	for k, c := range n.cells {
		p[k] = c.at + c.sd
		up := evaluate()
		p[k] = c.at - c.sd
		for i, down := range evaluate() {
			up[i] = 0.5 * (up[i] - down)
		}
		p[k] = c.at
		out.slope[k] = up
	}
	return out
}
