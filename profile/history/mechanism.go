package history

import "math"

// The names of the mechanisms.
const (
	NormallyConsolidated = "normally consolidated"
	RemovedOverburden    = "removed overburden"
	Ageing               = "ageing"
	RemovedAndAged       = "removed overburden and ageing"
	DriedCrust           = "dried crust"
	FormerLowerWater     = "former lower water level"
	UnderDrainage        = "under-drainage"
	StillConsolidating   = "still consolidating"
	Irregular            = "cementation, leaching or mixed causes"
)

// ground is what a mechanism needs to know of the layer it acts in.
type ground struct {
	top, base float64 // m
	water     float64 // present water level, m
	gamma     float64 // kN/m³, of water
}

// lowestStress keeps logarithms finite where σ′v0 is nothing, kPa.
const lowestStress = 1.0

// A parameter of a mechanism is a normal variable: the logarithm of a size, or
// of a ratio. Its prior is represented by cells side by side, each a normal
// piece within which the response of ln σ′p is taken as linear.
type parameter struct {
	name     string
	unit     string
	mean, sd float64 // of the prior
	cells    int
	size     func(float64) float64 // what is reported
}

// A mechanism gives ln σ′p with depth from its parameters.
type mechanism struct {
	name       string
	prior      float64
	parameters []parameter
	response   func(g *ground, p []float64, depth, effective float64) float64
}

// mechanisms are those of Jamiolkowski et al. (1985) and Ladd & DeGroot (2003)
// (from memory, unverified), with priors of the project.
var mechanisms = []mechanism{
	{NormallyConsolidated, 0.10,
		[]parameter{{"OCR", "", 0.05, 0.08, 1, math.Exp}},
		func(_ *ground, p []float64, _, s float64) float64 { return math.Log(s) + p[0] }},
	{RemovedOverburden, 0.20,
		[]parameter{{"POP", "kPa", math.Log(50), 1.2, 9, math.Exp}},
		func(_ *ground, p []float64, _, s float64) float64 { return math.Log(s + math.Exp(p[0])) }},
	{Ageing, 0.20,
		[]parameter{{"OCR", "", 0.40, 0.25, 1, math.Exp}},
		func(_ *ground, p []float64, _, s float64) float64 { return math.Log(s) + p[0] }},
	{RemovedAndAged, 0.15,
		[]parameter{{"POP", "kPa", math.Log(50), 1.2, 9, math.Exp}, {"OCR of ageing", "", 0.25, 0.12, 1, math.Exp}},
		func(_ *ground, p []float64, _, s float64) float64 { return math.Log(s+math.Exp(p[0])) + p[1] }},
	{DriedCrust, 0.15,
		[]parameter{
			{"extra stress at the top", "kPa", math.Log(80), 0.9, 4, math.Exp},
			{"depth in which it falls to a third", "m", math.Log(1.5), 0.5, 3, math.Exp},
			{"OCR below", "", 0.30, 0.25, 1, math.Exp}},
		func(g *ground, p []float64, z, s float64) float64 {
			return math.Log(s*math.Exp(p[2]) + math.Exp(p[0]-(z-g.top)/math.Exp(p[1])))
		}},
	{FormerLowerWater, 0.10,
		[]parameter{{"drawdown", "m", math.Log(4), 0.7, 5, math.Exp}},
		func(g *ground, p []float64, z, s float64) float64 {
			return math.Log(s + g.gamma*math.Max(0, math.Min(z-g.water, math.Exp(p[0]))))
		}},
	{UnderDrainage, 0.05,
		[]parameter{{"POP at the base", "kPa", math.Log(50), 0.8, 5, math.Exp}},
		func(g *ground, p []float64, z, s float64) float64 {
			return math.Log(s + math.Exp(p[0])*math.Max(0, z-g.top)/(g.base-g.top))
		}},
	{StillConsolidating, 0.05,
		[]parameter{{"excess pore pressure at mid-height over σ′v0", "", math.Log(0.3), 0.4, 3, math.Exp}},
		func(g *ground, p []float64, z, s float64) float64 {
			x := math.Max(0, math.Min(1, (z-g.top)/(g.base-g.top)))
			return math.Log(s) + math.Log(1-4*x*(1-x)*math.Min(0.8, math.Exp(p[0])))
		}},
	{Irregular, 0.10,
		[]parameter{{"OCR at 100 kPa", "", 0.45, 0.6, 1, math.Exp}, {"exponent of σ′v0", "", 0.5, 0.35, 1, func(m float64) float64 { return m }}},
		func(_ *ground, p []float64, _, s float64) float64 {
			return math.Log(100) + p[0] + p[1]*math.Log(s/100)
		}},
}

// cellWidth is the standard deviation of a cell over the distance between
// cells: wide enough that their sum is smooth.
const cellWidth = 0.6

// cellReach is how many standard deviations of the prior the cells cover on
// either side.
const cellReach = 2.0

// A cell is one normal piece of the prior of a parameter.
type cell struct{ at, sd, weight float64 }

// split returns the cells of a parameter's prior.
func (p parameter) split() []cell {
	if p.cells == 1 {
		return []cell{{p.mean, p.sd, 1}}
	}
	step := 2 * cellReach * p.sd / float64(p.cells-1)
	sd := cellWidth * step
	between := math.Sqrt(math.Max(p.sd*p.sd-sd*sd, 0.04*p.sd*p.sd))
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

// A node is a mechanism with one cell for each parameter.
type node struct {
	mechanism int
	logPrior  float64
	cells     []cell
}

// nodes returns all nodes of the mechanisms, with their priors.
func nodes(ms []mechanism) []node {
	var out []node
	for k, m := range ms {
		grow := []node{{mechanism: k, logPrior: math.Log(m.prior)}}
		for _, p := range m.parameters {
			var next []node
			for _, n := range grow {
				for _, c := range p.split() {
					cells := append(append([]cell(nil), n.cells...), c)
					next = append(next, node{k, n.logPrior + math.Log(c.weight), cells})
				}
			}
			grow = next
		}
		out = append(out, grow...)
	}
	return out
}

// line is the response of a node at a set of depths: ln σ′p at the middle of
// its cells, and how it changes with each parameter over one sd of its cell.
type line struct {
	mean  []float64
	slope [][]float64 // by parameter, then depth
}

// at returns the node's line at the given depths.
func (n *node) at(ms []mechanism, g *ground, depth, effective []float64) line {
	m := &ms[n.mechanism]
	p := make([]float64, len(n.cells))
	for i, c := range n.cells {
		p[i] = c.at
	}
	eval := func() []float64 {
		v := make([]float64, len(depth))
		for i, z := range depth {
			v[i] = m.response(g, p, z, math.Max(effective[i], lowestStress))
		}
		return v
	}
	out := line{mean: eval(), slope: make([][]float64, len(p))}
	for k, c := range n.cells {
		p[k] = c.at + c.sd
		up := eval()
		p[k] = c.at - c.sd
		down := eval()
		p[k] = c.at
		for i := range up {
			up[i] = 0.5 * (up[i] - down[i])
		}
		out.slope[k] = up
	}
	return out
}
