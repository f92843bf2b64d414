package sheet

import (
	"math"
	"sort"

	"pastload/profile"
	"pastload/render/axis"
	"pastload/render/draw"
)

// drawIndex draws liquid and plastic limit as a bar and the water content on it.
func (d *depthSheet) drawIndex(p *panel) {
	d.boundaries(p)
	least := 10.0
	var contents []float64
	for _, r := range d.in.Borehole.Results {
		for _, n := range []profile.Number{r.LiquidLimit, r.PlasticLimit} {
			if v, ok := value(n); ok {
				least = math.Max(least, v)
			}
		}
		if v, ok := value(r.WaterContent); ok {
			contents = append(contents, v)
		}
	}
	_, high, step := axis.Round(0, capped(contents, least), int(math.Max(2, p.box.Width()/9)))
	s := axis.NewLinear(0, high, p.box.Left, p.box.Right)
	d.horizontal(p, s, steps(step)...)
	pen := draw.Pen{Width: draw.Thin}
	room := &placer{area: p.box.Inset(0.3)}
	for i := range d.in.Borehole.Results {
		r := &d.in.Borehole.Results[i]
		y := d.y.At(r.Depth.Value)
		low, hasLow := value(r.PlasticLimit)
		liquid, hasLiquid := value(r.LiquidLimit)
		place := func(v float64) float64 { x, _ := s.Clamp(v); return x }
		cap := func(v float64) { d.c.Line(place(v), y-0.7, place(v), y+0.7, draw.Pen{Width: draw.Medium}) }
		if hasLow && hasLiquid {
			d.c.Line(place(low), y, place(liquid), y, pen)
		}
		if hasLow {
			cap(low)
		}
		if hasLiquid {
			cap(liquid)
		}
		dot := draw.Marker{Shape: draw.Circle, Solid: true, Size: 1.3}
		if w, ok := value(r.WaterContent); ok && w > high {
			d.beyond(room, p.box.Right, y, dot, draw.Text(decimals(w, 0)), plainMark)
		} else if ok {
			d.c.Marker(place(w), y, dot)
		}
		if r.NonPlastic {
			d.c.Text(p.box.Right-0.8, y+d.f.small.Height()/2, draw.Text("NP"), anchored(d.f.small, draw.End))
		}
	}
}

// drawWeight draws measured unit weights and the line that was used.
func (d *depthSheet) drawWeight(p *panel) {
	d.boundaries(p)
	low, high := math.Inf(1), math.Inf(-1)
	see := func(n profile.Number) {
		if v, ok := value(n); ok {
			low, high = math.Min(low, v), math.Max(high, v)
		}
	}
	for i := range d.in.Profile.Points {
		see(d.in.Profile.Points[i].UnitWeight)
	}
	for _, r := range d.in.Borehole.Results {
		see(r.UnitWeight)
	}
	low, high, step := axis.Round(low-0.8, high+0.8, int(math.Max(3, p.box.Width()/8)))
	s := axis.NewLinear(low, high, p.box.Left, p.box.Right)
	d.horizontal(p, s, steps(step)...)
	d.course(func(q *profile.Point) (float64, bool) { return value(q.UnitWeight) }, s, draw.Pen{Width: draw.Thick}, true, nil)
	for i := range d.in.Borehole.Results {
		r := &d.in.Borehole.Results[i]
		if weight, ok := value(r.UnitWeight); ok {
			d.c.Marker(s.At(weight), d.y.At(r.Depth.Value), draw.Marker{Shape: draw.Circle, Size: 1.4})
		}
	}
}

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

// drawCompression draws measured compression indices against what correlations
// give.
func (d *depthSheet) drawCompression(p *panel) {
	d.boundaries(p)
	var slopes []float64
	for i := range d.in.Profile.Results {
		r := &d.in.Profile.Results[i]
		if v, ok := value(r.MeasuredCc); ok {
			slopes = append(slopes, v)
		}
		if known(r.CorrelatedCc) {
			slopes = append(slopes, r.CorrelatedCc.Best)
		}
	}
	_, high, step := axis.Round(0, capped(slopes, 0.1), int(math.Max(2, p.box.Width()/8)))
	room := &placer{area: p.box.Inset(0.3)}
	s := axis.NewLinear(0, high, p.box.Left, p.box.Right)
	d.horizontal(p, s, steps(step)...)
	grey := draw.Pen{Colour: draw.Grey, Width: draw.Hair}
	d.band(func(q *profile.Point) profile.Range { return q.CompressionIndex }, s, grey, draw.Fill{Colour: draw.Grey, Opacity: 0.15})
	for i := range d.in.Profile.Results {
		r := &d.in.Profile.Results[i]
		y := d.y.At(r.Depth)
		if known(r.CorrelatedCc) {
			x1, _ := s.Clamp(r.CorrelatedCc.Low)
			x2, _ := s.Clamp(r.CorrelatedCc.High)
			best, way := s.Clamp(r.CorrelatedCc.Best)
			d.c.Line(x1, y, x2, y, draw.Pen{Colour: draw.Grey, Width: draw.Thick})
			if way == 0 {
				d.c.Marker(best, y, draw.Marker{Shape: draw.Tick, Colour: draw.Grey, Size: 1.5})
			}
		}
		if v, ok := value(r.MeasuredCc); ok {
			dot := draw.Marker{Shape: draw.Circle, Solid: true, Size: 1.5}
			if x, way := s.Clamp(v); way > 0 {
				d.beyond(room, p.box.Right, y, dot, draw.Text(decimals(v, 1)), plainMark)
			} else {
				d.c.Marker(x, y, dot)
			}
		}
	}
}
