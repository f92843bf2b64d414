package sheet

import (
	"math"
	"sort"

	"pastload/profile"
	"pastload/render/axis"
	"pastload/render/draw"
)

// course draws a quantity of the points as a line, broken where it is not known,
// beyond the panel or, unless it is drawn in steps, where it jumps at a boundary.
// It returns the line's places on paper.
func (d *depthSheet) course(of func(*profile.Point) (float64, bool), s axis.Scale, pen draw.Pen, steps bool, taken *placer) []draw.Point {
	var line, all []draw.Point
	flush := func() {
		d.c.Polyline(line, pen)
		if taken != nil {
			taken.line(line)
		}
		all = append(all, line...)
		line = nil
	}
	low, high := s.Ends()
	left, right := s.At(low), s.At(high)
	var last draw.Point
	open := false
	for i := range d.in.Profile.Points {
		q := &d.in.Profile.Points[i]
		v, ok := of(q)
		if !ok {
			flush()
			open = false
			continue
		}
		here := draw.Point{X: s.At(v), Y: d.y.At(q.Depth)}
		const jump = 0.4 // mm
		if open && !steps && here.Y == last.Y && math.Abs(here.X-last.X) > jump {
			flush()
			open = false
		}
		if open {
			// The line goes to the edge of the panel and comes back from it.
			from, to, ok := cut(last, here, left, right)
			switch {
			case !ok:
				flush()
			case len(line) == 0:
				line = append(line, from, to)
			default:
				line = append(line, to)
			}
			if ok && to != here {
				flush()
			}
		}
		last, open = here, true
	}
	flush()
	return all
}

// cut returns the part of a line between two uprights.
func cut(a, b draw.Point, left, right float64) (from, to draw.Point, ok bool) {
	const slack = 1e-6
	inside := func(p draw.Point) bool { return p.X >= left-slack && p.X <= right+slack }
	if inside(a) && inside(b) {
		return a, b, true
	}
	if a.X < left && b.X < left || a.X > right && b.X > right || a.X == b.X {
		return a, b, false
	}
	at := func(p, other draw.Point) draw.Point {
		if inside(p) {
			return p
		}
		x := left
		if p.X > right {
			x = right
		}
		return draw.Point{X: x, Y: p.Y + (other.Y-p.Y)*(x-p.X)/(other.X-p.X)}
	}
	return at(a, b), at(b, a), true
}

// capped returns the end of an axis that lets most values be read: where a few
// lie far above the others, they are marked at its edge and do not set it. The
// axis is never shorter than what must be seen in full.
func capped(values []float64, least float64) float64 {
	const far, few = 1.8, 0.25
	sorted := append([]float64(nil), values...)
	sort.Float64s(sorted)
	if len(sorted) == 0 {
		return least
	}
	top := sorted[len(sorted)-1]
	limit := math.Max(least, far*sorted[int(float64(len(sorted)-1)*(1-few))])
	if top <= far*limit/1.2 {
		return math.Max(top, least)
	}
	end := least
	for _, v := range sorted {
		if v <= limit {
			end = math.Max(end, v)
		}
	}
	return end
}

// beyondRoom is how far from the edge of a panel a value beyond it is marked, mm.
const beyondRoom = 5.2

// The distance of a label from a mark, and from one with a ring, in mm.
const plainMark, ringedMark = 1.7, 2.7

// beyond marks a value that the axis does not reach: its own shape at the edge,
// an arrow, and the value in figures.
// The label keeps a distance from the mark.
func (d *depthSheet) beyond(room *placer, edge, y float64, m draw.Marker, l draw.Label, distance float64) {
	x := edge - beyondRoom
	d.c.Marker(edge-3.5, y, draw.Marker{Shape: draw.ArrowRight, Size: 1.8})
	if m.Shape != draw.ArrowRight {
		d.c.Marker(x, y, m)
	}
	room.taken = append(room.taken, obstacle{draw.Box{Left: x - 1.2, Top: y - 1.2, Right: edge, Bottom: y + 1.2}, pointWeight})
	room.around(d.c, x, y, distance, l, d.f.small)
}

// band draws a range of the points as a tint with edges; one without width is
// not drawn.
func (d *depthSheet) band(of func(*profile.Point) profile.Range, s axis.Scale, edge draw.Pen, fill draw.Fill) bool {
	var low, high []draw.Point
	wide, drawn := false, false
	flush := func() {
		if wide && len(low) > 1 {
			shape := append([]draw.Point(nil), low...)
			for i := len(high) - 1; i >= 0; i-- {
				shape = append(shape, high[i])
			}
			d.c.Polygon(shape, draw.Pen{}, fill)
			d.c.Polyline(low, edge)
			d.c.Polyline(high, edge)
			drawn = true
		}
		low, high, wide = nil, nil, false
	}
	for i := range d.in.Profile.Points {
		q := &d.in.Profile.Points[i]
		r := of(q)
		if !known(r) {
			flush()
			continue
		}
		y := d.y.At(q.Depth)
		if n := len(low); n > 0 && low[n-1].Y == y {
			flush() // a boundary, where the band may jump
		}
		wide = wide || r.High > r.Low
		x1, _ := s.Clamp(r.Low)
		x2, _ := s.Clamp(r.High)
		low = append(low, draw.Point{X: x1, Y: y})
		high = append(high, draw.Point{X: x2, Y: y})
	}
	flush()
	return drawn
}
