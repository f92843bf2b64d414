package profile

import (
	"cmp"
	"fmt"
	"math"
	"slices"
)

// A node is a depth at which the pore pressure is known.
type node struct {
	depth, pressure float64
	name, source    string
	numbers         string // how its pressure comes about, where it was not read as one
}

// samePressure is the relative difference up to which two ways to one pressure
// are taken to agree.
const samePressure = 1e-9

// pore adds the pore pressure at a depth: from the water table or between the
// nearest measured points, whichever gives the value that the stress has, else
// between the two nearest kinks of its line.
func (x *explainer) pore(depth float64, above bool, want float64) {
	s := Step{Key: "pore_pressure_kPa", Name: "pore pressure u0", Value: Known(want), Decimals: stressDecimals, Unit: "kPa"}
	nodes := x.nodes()
	gamma := x.site.Settings.WaterUnitWeight
	agrees := func(v float64) bool { return math.Abs(v-want) <= samePressure*math.Max(1, math.Abs(want)) }
	at := slices.IndexFunc(nodes, func(n node) bool { return n.depth >= depth })
	switch {
	case len(nodes) == 0:
		s.Formula, s.Mark = "no water is given: dry ground", markAssumed
	case at < 0 && agrees(nodes[len(nodes)-1].pressure+gamma*(depth-nodes[len(nodes)-1].depth)):
		x.hydrostatic(&s, nodes[len(nodes)-1], depth)
	case at > 0 && agrees(between2(nodes[at-1], nodes[at], depth)):
		a, b := nodes[at-1], nodes[at]
		x.show(a)
		x.show(b)
		s.Formula = "straight line from " + a.name + " to " + b.name
		s.Numbers = line(a.depth, a.pressure, b.depth, b.pressure, depth)
	case at >= 0 && nodes[at].depth == depth && agrees(nodes[at].pressure):
		x.show(nodes[at])
		s.Formula, s.Numbers = "at "+nodes[at].name, term(nodes[at].pressure, stressDecimals)
	case want == 0:
		x.show(nodes[0])
		s.Formula = "0 above the water"
	case want < 0 && at >= 0 && agrees(-gamma*(nodes[at].depth-depth)):
		x.show(nodes[at])
		s.Formula = "−γw·(zw − z), in the capillary fringe"
		s.Numbers = fmt.Sprintf("(−%s) × (%s)", significant(gamma, 7), sum(term(nodes[at].depth, depthDecimals), minus(depth, depthDecimals)))
		s.Source = cited(x.borehole.CapillaryRise)
	default:
		x.betweenKinks(&s, depth, above)
	}
	x.add(s)
}

// hydrostatic completes a pore pressure that grows with depth by γw from a node.
func (x *explainer) hydrostatic(s *Step, n node, depth float64) {
	x.show(n)
	gamma := x.site.Settings.WaterUnitWeight
	s.Source = "γw: " + x.site.Settings.settingSource("unit weight of water", "water unit weight", "γw")
	s.Formula = "u0(" + n.name + ") + γw·Δz"
	s.Numbers = fmt.Sprintf("%s + %s × (%s)", term(n.pressure, stressDecimals), significant(gamma, 7), sum(term(depth, depthDecimals), minus(n.depth, depthDecimals)))
}

// show adds the pressure of a node.
func (x *explainer) show(n node) {
	x.add(Step{Name: fmt.Sprintf("u0 at %s, %s m", n.name, plain(n.depth, depthDecimals)), Numbers: n.numbers, Value: Known(n.pressure), Decimals: stressDecimals, Unit: "kPa", Source: n.source})
}

// nodes returns the water table, the bed under water and the measured points,
// from the top.
func (x *explainer) nodes() []node {
	b, gamma := x.borehole, x.site.Settings.WaterUnitWeight
	var nodes []node
	if w := b.WaterTableDepth; w.Known && w.Value > 0 {
		nodes = append(nodes, node{depth: w.Value, name: "the water table", source: cited(w)})
	} else if w.Known {
		nodes = append(nodes, node{pressure: -gamma * w.Value, name: "ground level", source: cited(w), numbers: significant(gamma, 7) + " × " + plain(-w.Value, depthDecimals)})
	} else if table, ok := x.ground.stress.WaterTable(); ok && table > 0 {
		nodes = append(nodes, node{depth: table, name: "the water table that the measured points imply"})
	}
	for _, w := range b.Water {
		if !w.Pressure.Known {
			continue
		}
		n := node{depth: w.Depth.Value, pressure: w.Pressure.Value, name: "the measured point", source: cited(w.Pressure), numbers: converted(w.Pressure)}
		if w.Head.Known && w.Pressure.Source == w.Head.Source {
			n.numbers = ""
			if b.GroundLevel.Known {
				n.numbers = fmt.Sprintf("%s × (%s − (%s))", significant(gamma, 7), term(w.Head.Value, depthDecimals), sum(term(b.GroundLevel.Value, depthDecimals), minus(w.Depth.Value, depthDecimals)))
			}
		}
		if slices.ContainsFunc(nodes, func(o node) bool { return math.Abs(o.depth-n.depth) < 0.001 }) {
			continue // repeats the table or an earlier reading
		}
		nodes = append(nodes, n)
	}
	slices.SortStableFunc(nodes, func(a, b node) int { return cmp.Compare(a.depth, b.depth) })
	return nodes
}

// between2 returns the pressure at a depth on the straight line between nodes.
func between2(a, b node, depth float64) float64 {
	return a.pressure + (b.pressure-a.pressure)*(depth-a.depth)/(b.depth-a.depth)
}

// betweenKinks completes a pore pressure by the two kinks of its line around a
// depth.
func (x *explainer) betweenKinks(s *Step, depth float64, above bool) {
	stress := x.ground.stress
	breaks := stress.Breaks()
	i, found := slices.BinarySearch(breaks, depth)
	if i == 0 || i == len(breaks) || found && above {
		return
	}
	if found {
		i++
		if i == len(breaks) {
			return
		}
	}
	za, zb := breaks[i-1], breaks[i]
	a, err := stress.At(za)
	if err != nil {
		return
	}
	b, err := stress.JustAbove(zb)
	if err != nil {
		return
	}
	x.add(Step{Name: fmt.Sprintf("u0 at %s m", plain(za, depthDecimals)), Formula: "by the rules for the line of pore pressure", Value: Known(a.Pore), Decimals: stressDecimals, Unit: "kPa"})
	x.add(Step{Name: fmt.Sprintf("u0 at %s m", plain(zb, depthDecimals)), Formula: "by the rules for the line of pore pressure", Value: Known(b.Pore), Decimals: stressDecimals, Unit: "kPa"})
	s.Formula = "straight line between the two"
	s.Numbers = line(za, a.Pore, zb, b.Pore, depth)
}
