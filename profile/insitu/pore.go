package insitu

import "sort"

// A segment of the pore pressure line starts at a depth with a pressure and goes
// on with a gradient until the next one starts.
type segment struct {
	top, pressure, gradient float64
}

// line returns the pore pressure line from ground level down. Two of its
// segments never differ in sign within: it is cut where u0 passes 0.
func (w *water) line() []segment {
	nodes := w.nodes()
	if len(nodes) == 0 {
		return []segment{{}}
	}
	line := make([]segment, 0, 2*len(nodes)+2)
	line = w.lead(line, nodes[0])
	for i := 1; i < len(nodes); i++ {
		line = w.join(line, nodes[i-1], nodes[i])
	}
	last := nodes[len(nodes)-1]
	line = append(line, segment{last.Depth, last.Pressure, w.unitWeight})
	if last.Pressure < 0 {
		line = append(line, segment{last.Depth - last.Pressure/w.unitWeight, 0, w.unitWeight})
	}
	return line
}

// nodes returns the points of the line, the table (or the bed under water) among them.
func (w *water) nodes() []PorePressure {
	if !w.hasTable {
		return w.points
	}
	own := PorePressure{Depth: w.table}
	if w.table <= 0 {
		own = PorePressure{Pressure: w.unitWeight * (0 - w.table)}
	}
	at := sort.Search(len(w.points), func(i int) bool { return w.points[i].Depth >= own.Depth })
	nodes := make([]PorePressure, 0, len(w.points)+1)
	nodes = append(nodes, w.points[:at]...)
	nodes = append(nodes, own)
	return append(nodes, w.points[at:]...)
}

// lead appends the line from ground level to the first node.
func (w *water) lead(line []segment, first PorePressure) []segment {
	if first.Depth <= 0 {
		return line
	}
	if first.Pressure < 0 {
		return append(line, segment{0, 0, first.Pressure / first.Depth})
	}
	if first.Pressure > 0 {
		level := max(0, first.Depth-first.Pressure/w.unitWeight)
		if level > 0 {
			line = append(line, segment{})
		}
		return append(line, segment{level, 0, first.Pressure / (first.Depth - level)})
	}
	return w.join(line, PorePressure{}, first)
}

// join appends the line from a to b: straight, or dry ground and then the
// capillary fringe when b is the table and nothing measured speaks against it.
func (w *water) join(line []segment, a, b PorePressure) []segment {
	if b.Depth <= a.Depth {
		return line // the table has moved onto a point, both at 0
	}
	top, base := w.fringe()
	if top < base && b.Depth == base && a.Pressure == 0 && a.Depth <= top+sameNumber {
		if a.Depth < top {
			line = append(line, segment{a.Depth, 0, 0})
		}
		return append(line, segment{top, -w.unitWeight * (base - top), w.unitWeight})
	}
	gradient := (b.Pressure - a.Pressure) / (b.Depth - a.Depth)
	line = append(line, segment{a.Depth, a.Pressure, gradient})
	if (a.Pressure < 0) != (b.Pressure < 0) && a.Pressure != 0 && b.Pressure != 0 {
		if zero := a.Depth - a.Pressure/gradient; zero > a.Depth && zero < b.Depth {
			line = append(line, segment{zero, 0, gradient})
		}
	}
	return line
}
