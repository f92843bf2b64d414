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
	top, base  float64 // m; the base is below the top
	water      float64 // depth of the present water level, m; ground level where it is not known
	waterKnown bool
	gamma      float64 // unit weight of water, kN/m³
	buoyant    float64 // buoyant unit weight of ground that is gone, kN/m³
}

// inside returns how deep a depth lies in the layer, from 0 to 1.
func (g *ground) inside(z float64) float64 {
	return math.Max(0, math.Min(1, (z-g.top)/(g.base-g.top)))
}

// lowestStress keeps logarithms finite where σ′v0 is nothing, kPa.
const lowestStress = 1.0

// A parameter of a mechanism is a normal variable, most often the logarithm of
// a size. Its prior is cut into cells: see nodes.go.
type parameter struct {
	mean, sd float64 // of the prior
	cells    int
}

// A reported is a size that is told of a mechanism.
type reported struct {
	parameter  int
	name, unit string
	size       func(g *ground, p float64) float64 // rising or falling with p
}

// A mechanism gives ln σ′p with depth from its parameters.
type mechanism struct {
	name       string
	prior      float64
	parameters []parameter
	response   func(g *ground, p []float64) func(depth, effective float64) float64
	reports    []reported // the first is the one to quote
}

// logOf is a parameter that is the logarithm of a size: its prior has the
// given median and, as sd, roughly a coefficient of variation.
func logOf(median, sd float64, cells int) parameter { return parameter{math.Log(median), sd, cells} }

func exponentOf(_ *ground, p float64) float64 { return math.Exp(p) }

// newMechanisms returns the shapes of Jamiolkowski et al. (1985) and Ladd &
// DeGroot (2003) (from memory, unverified). Priors and the medians and spreads
// of the parameters are the project's. The last one has no equation in the
// literature: it stands for ground that stress alone does not explain.
func newMechanisms() []mechanism {
	removed := []reported{
		{0, "ground removed, water then as now at ground level", "m", func(g *ground, p float64) float64 { return math.Exp(p) / g.buoyant }},
		{0, "POP", "kPa", exponentOf},
	}
	pop := logOf(50, 1.2, 9)
	constantRatio := func(_ *ground, p []float64) func(z, s float64) float64 {
		return func(_, s float64) float64 { return math.Log(s) + p[0] }
	}
	return []mechanism{
		{NormallyConsolidated, 0.10, []parameter{{0.05, 0.08, 1}}, constantRatio, []reported{{0, "OCR", "", exponentOf}}},
		{RemovedOverburden, 0.18, []parameter{pop},
			func(_ *ground, p []float64) func(z, s float64) float64 {
				pop := math.Exp(p[0])
				return func(_, s float64) float64 { return math.Log(s + pop) }
			}, removed},
		{Ageing, 0.18, []parameter{{0.40, 0.25, 1}}, constantRatio, []reported{{0, "OCR", "", exponentOf}}},
		{RemovedAndAged, 0.13, []parameter{pop, {0.25, 0.12, 1}},
			func(_ *ground, p []float64) func(z, s float64) float64 {
				pop, aged := math.Exp(p[0]), p[1]
				return func(_, s float64) float64 { return math.Log(s+pop) + aged }
			}, append(append([]reported(nil), removed...), reported{1, "OCR of ageing", "", exponentOf})},
		{DriedCrust, 0.14, []parameter{logOf(80, 0.9, 4), logOf(1.5, 0.5, 3), {0.30, 0.25, 1}},
			func(g *ground, p []float64) func(z, s float64) float64 {
				added, length, below := math.Exp(p[0]), math.Exp(p[1]), math.Exp(p[2])
				return func(z, s float64) float64 { return math.Log(s*below + added*math.Exp(-(z-g.top)/length)) }
			}, []reported{{0, "added stress at the top", "kPa", exponentOf},
				{1, "depth in which it falls to 37 %", "m", exponentOf},
				{2, "OCR below", "", exponentOf}}},
		{FormerLowerWater, 0.09, []parameter{logOf(4, 0.7, 5)},
			func(g *ground, p []float64) func(z, s float64) float64 {
				drawdown := math.Exp(p[0])
				return func(z, s float64) float64 {
					return math.Log(s + g.gamma*math.Max(0, math.Min(z-g.water, drawdown)))
				}
			}, []reported{{0, "drawdown", "m", exponentOf}}},
		{UnderDrainage, 0.05, []parameter{logOf(50, 0.8, 5)},
			func(g *ground, p []float64) func(z, s float64) float64 {
				pop := math.Exp(p[0])
				return func(z, s float64) float64 { return math.Log(s + pop*g.inside(z)) }
			}, []reported{{0, "drawdown of the head at the base", "m", func(g *ground, p float64) float64 { return math.Exp(p) / g.gamma }},
				{0, "POP at the base", "kPa", exponentOf}}},
		{StillConsolidating, 0.04, []parameter{logOf(0.3, 0.4, 3)},
			func(g *ground, p []float64) func(z, s float64) float64 {
				excess := math.Min(mostExcess, math.Exp(p[0]))
				return func(z, s float64) float64 {
					x := g.inside(z)
					return math.Log(s * (1 - 4*x*(1-x)*excess))
				}
			}, []reported{{0, "excess pore pressure at mid-height over σ′v0", "", func(_ *ground, p float64) float64 { return math.Min(mostExcess, math.Exp(p)) }}}},
		{Irregular, 0.09, []parameter{{0.45, 0.6, 1}, {0.5, 0.35, 1}},
			func(_ *ground, p []float64) func(z, s float64) float64 {
				at, power := math.Log(atmosphere)+p[0], p[1]
				return func(_, s float64) float64 { return at + power*math.Log(s/atmosphere) }
			}, []reported{{0, "OCR where σ′v0 is 100 kPa", "", exponentOf},
				{1, "power of σ′v0 that σ′p follows", "", func(_ *ground, p float64) float64 { return p }}}},
	}
}

// mostExcess is the largest excess pore pressure over σ′v0: some of the load
// is always carried.
const mostExcess = 0.8

// knownOdds is how much more probable a mechanism is once something is known
// of its cause.
const knownOdds = 4.0

// mechanismsFor returns the mechanisms with what is known of a layer's past.
func (in *Input) mechanismsFor(l *layer) []mechanism {
	ms := newMechanisms()
	sharpen := func(name string, size, sd float64) {
		if size <= 0 {
			return
		}
		if sd == 0 {
			sd = 0.2 * size
		}
		for i := range ms {
			if ms[i].name == name {
				p := append([]parameter(nil), ms[i].parameters...)
				p[0] = logOf(size, math.Min(p[0].sd, sd/size), p[0].cells)
				ms[i].parameters = p
				ms[i].prior *= knownOdds
			}
		}
	}
	for _, k := range in.Known {
		if k.Layer >= 0 && k.Layer != l.index {
			continue
		}
		switch k.Kind {
		case RemovedGround:
			sharpen(RemovedOverburden, k.Size, k.SD)
			sharpen(RemovedAndAged, k.Size, k.SD)
		case FormerWaterLevel:
			if in.HasWater {
				sharpen(FormerLowerWater, k.Size-in.WaterTable, k.SD)
			}
		}
	}
	total := 0.0
	for _, m := range ms {
		total += m.prior
	}
	for i := range ms {
		ms[i].prior /= total
	}
	return ms
}
