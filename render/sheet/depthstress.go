package sheet

import (
	"math"

	"pastload/profile"
	"pastload/render/axis"
	"pastload/render/draw"
)

// drawStress draws the vertical stresses and σ′p on one linear axis that holds
// zero.
func (d *depthSheet) drawStress(p *panel) {
	d.boundaries(p)
	low, high := d.stressEnds()
	low, high, step := axis.Round(low, high*1.02, int(math.Max(3, p.box.Width()/10)))
	s := axis.NewLinear(low, high, p.box.Left, p.box.Right)
	d.horizontal(p, s, steps(step)...)
	if low < 0 {
		d.c.Line(s.At(0), p.box.Top, s.At(0), p.box.Bottom, draw.Pen{Width: draw.Medium})
	}
	room := &placer{area: p.box.Inset(0.3)}
	history := func(q *profile.Point) profile.Range { return q.Preconsolidation }
	d.band(history, s, bandEdge, bandFill)
	total := d.course(func(q *profile.Point) (float64, bool) { return value(q.Total) }, s, totalLine.pen, false, room)
	pore := d.course(func(q *profile.Point) (float64, bool) { return value(q.Pore) }, s, poreLine.pen, false, room)
	effective := d.course(func(q *profile.Point) (float64, bool) { return value(q.Effective) }, s, effectiveLine.pen, false, room)
	best := d.course(func(q *profile.Point) (float64, bool) { r := history(q); return r.Best, known(r) }, s, historyLine.pen, false, room)
	for _, w := range d.in.Borehole.Water {
		if pressure, ok := value(w.Pressure); ok {
			x, y := s.At(pressure), d.y.At(w.Depth.Value)
			d.c.Marker(x, y, draw.Marker{Shape: draw.TriangleDown, Colour: draw.Blue, Size: 1.6})
			room.point(x, y, 1)
		}
	}
	d.drawDesign(s, room)
	d.tests(room, s, func(t *profile.Test) (profile.Range, profile.Range, bool) {
		v, ok := testValue(t)
		r := profile.Range{Best: v, Low: v, High: v, Known: ok}
		if known(t.Preconsolidation) && t.Bound == profile.Exact {
			r = t.Preconsolidation
		}
		return r, t.Expected, ok
	})
	if dry(d.in.Profile.Points) {
		room.beside(d.c, effective, sigmaV.Add(" = ").Join(sigmaT).Add(", ").Join(sigmaU).Add(" = 0"), bold(d.f.body))
	} else {
		room.beside(d.c, total, sigmaT, d.f.body)
		room.beside(d.c, effective, sigmaV, bold(d.f.body))
		room.beside(d.c, pore, sigmaU, coloured(d.f.body, draw.Blue))
	}
	d.beyondCourse(room, s)
	room.beside(d.c, best, sigmaP, coloured(bold(d.f.body), draw.Blue))
}

// beyondCourse says how large σ′p is over the stretches in which its line is
// beyond the axis.
func (d *depthSheet) beyondCourse(room *placer, s axis.Scale) {
	_, end := s.Ends()
	points := d.in.Profile.Points
	for i := 0; i < len(points); i++ {
		first, low, high := i, math.Inf(1), math.Inf(-1)
		for ; i < len(points) && known(points[i].Preconsolidation) && points[i].Preconsolidation.Best > end; i++ {
			low, high = math.Min(low, points[i].Preconsolidation.Best), math.Max(high, points[i].Preconsolidation.Best)
		}
		if i == first {
			continue
		}
		top, base := d.y.At(points[first].Depth), d.y.At(points[i-1].Depth)
		if base-top < 2*d.f.small.Line() {
			continue
		}
		text := " " + significant(low)
		if significant(high) != significant(low) {
			text += " to " + significant(high)
		}
		var at []draw.Point
		var anchors []draw.Anchor
		for _, part := range []float64{0.5, 0.35, 0.65, 0.2, 0.8} {
			at = append(at, draw.Point{X: s.At(end) - 0.8, Y: top + part*(base-top)})
			anchors = append(anchors, draw.End)
		}
		room.at(d.c, at, anchors, sigmaP.Add(text+" →"), coloured(d.f.small, draw.Blue))
	}
}

// dry reports whether there is no pore pressure anywhere: then total and
// effective stress are one line.
func dry(points []profile.Point) bool {
	for i := range points {
		if v, ok := value(points[i].Pore); !ok || v != 0 {
			return false
		}
	}
	return true
}

// stressEnds returns the stresses that the axis must hold: those of today and
// those adopted in full, and most of the past.
func (d *depthSheet) stressEnds() (low, high float64) {
	high = 10
	see := func(v float64, ok bool) {
		if ok && finite(v) {
			low, high = math.Min(low, v), math.Max(high, v)
		}
	}
	var past []float64
	for i := range d.in.Profile.Points {
		q := &d.in.Profile.Points[i]
		see(value(q.Total))
		see(value(q.Pore))
		see(value(q.Effective))
	}
	for i := range d.in.Profile.Tests {
		if v, ok := testValue(&d.in.Profile.Tests[i]); ok {
			past = append(past, v)
		}
	}
	if len(past) == 0 {
		for i := range d.in.Profile.Points {
			if r := d.in.Profile.Points[i].Preconsolidation; known(r) {
				past = append(past, r.Best)
			}
		}
	}
	for _, w := range d.in.Borehole.Water {
		see(value(w.Pressure))
	}
	for _, l := range d.in.Design {
		for _, v := range l.Stresses {
			see(v, true)
		}
	}
	return low, capped(past, high)
}

// drawDesign draws the adopted lines, heaviest of all.
func (d *depthSheet) drawDesign(s axis.Scale, room *placer) {
	for _, l := range d.in.Design {
		var line []draw.Point
		for i := range min(len(l.Depths), len(l.Stresses)) {
			if finite(l.Depths[i]) && finite(l.Stresses[i]) && l.Depths[i] >= d.top && l.Depths[i] <= d.base {
				x, _ := s.Clamp(l.Stresses[i])
				line = append(line, draw.Point{X: x, Y: d.y.At(l.Depths[i])})
			}
		}
		d.c.Polyline(line, designLine.pen)
		room.line(line)
		room.beside(d.c, line, draw.Text(l.Label), coloured(bold(d.f.small), draw.Red))
	}
}
