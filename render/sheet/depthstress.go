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
	low, high := 0.0, 10.0
	see := func(v float64, ok bool) {
		if ok && finite(v) {
			low, high = math.Min(low, v), math.Max(high, v)
		}
	}
	for i := range d.in.Profile.Points {
		q := &d.in.Profile.Points[i]
		see(value(q.Total))
		see(value(q.Pore))
		see(value(q.Effective))
		see(q.Preconsolidation.Best, known(q.Preconsolidation))
	}
	for i := range d.in.Profile.Tests {
		see(testValue(&d.in.Profile.Tests[i]))
	}
	for _, w := range d.in.Borehole.Water {
		see(value(w.Pressure))
	}
	for _, l := range d.in.Design {
		for _, v := range l.Stresses {
			see(v, true)
		}
	}
	low, high, step := axis.Round(low, high*1.02, int(math.Max(3, p.box.Width()/10)))
	s := axis.NewLinear(low, high, p.box.Left, p.box.Right)
	d.horizontal(p, s, axis.Step{Size: step, Parts: 2})
	if low < 0 {
		d.c.Line(s.At(0), p.box.Top, s.At(0), p.box.Bottom, draw.Pen{Width: draw.Medium})
	}
	room := &placer{area: p.box.Inset(0.3)}
	history := func(q *profile.Point) profile.Range { return q.Preconsolidation }
	d.band(history, s, bandEdge, bandFill)
	total := d.course(func(q *profile.Point) (float64, bool) { return value(q.Total) }, s, totalLine.pen, room)
	pore := d.course(func(q *profile.Point) (float64, bool) { return value(q.Pore) }, s, poreLine.pen, room)
	effective := d.course(func(q *profile.Point) (float64, bool) { return value(q.Effective) }, s, effectiveLine.pen, room)
	best := d.course(func(q *profile.Point) (float64, bool) { r := history(q); return r.Best, known(r) }, s, historyLine.pen, room)
	for _, w := range d.in.Borehole.Water {
		depth, ok1 := value(w.Depth)
		pressure, ok2 := value(w.Pressure)
		if ok1 && ok2 {
			d.c.Marker(s.At(pressure), d.y.At(depth), draw.Marker{Shape: draw.TriangleDown, Colour: draw.Blue, Size: 1.6})
			room.point(s.At(pressure), d.y.At(depth), 1)
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
	room.beside(d.c, total, sigmaT, body)
	room.beside(d.c, effective, sigmaV, bold(body))
	room.beside(d.c, pore, sigmaU, coloured(body, draw.Blue))
	room.beside(d.c, best, sigmaP, coloured(bold(body), draw.Blue))
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
		room.beside(d.c, line, draw.Text(l.Label), coloured(bold(small), draw.Red))
	}
}

// testValue returns the preconsolidation stress of a test: its best value, or
// the bound that it gives.
func testValue(t *profile.Test) (float64, bool) {
	r := t.Preconsolidation
	if !r.Known {
		return 0, false
	}
	for _, v := range []float64{r.Best, r.Low, r.High} {
		if finite(v) && v > 0 {
			return v, true
		}
	}
	return 0, false
}

// tests draws the tests of a panel: range, point in the shape of its grade, what
// the rest of the ground expects there, and what is the matter with it.
func (d *depthSheet) tests(room *placer, s axis.Scale, of func(*profile.Test) (test, expected profile.Range, ok bool)) {
	for i := range d.in.Profile.Tests {
		t := &d.in.Profile.Tests[i]
		_, e, ok := of(t)
		if ok && known(e) && e.Best > 0 && finite(t.Depth) {
			x, _ := s.Clamp(e.Best)
			d.c.Line(x, d.y.At(t.Depth)-1.1, x, d.y.At(t.Depth)+1.1, draw.Pen{Colour: draw.Grey, Width: draw.Thick})
		}
	}
	type tag struct {
		x, y float64
		text string
	}
	var tags []tag
	for i := range d.in.Profile.Tests {
		t := &d.in.Profile.Tests[i]
		r, _, ok := of(t)
		if !ok || !finite(t.Depth) {
			continue
		}
		x, beyond := s.Clamp(r.Best)
		y := d.y.At(t.Depth)
		if r.High > r.Low {
			d.bar(s, r, y)
		}
		m := d.mark(t)
		if beyond != 0 {
			m.Shape = map[int]draw.Shape{1: draw.ArrowRight, -1: draw.ArrowLeft}[beyond]
		}
		d.c.Marker(x, y, m)
		if !t.Used {
			d.c.Marker(x, y, draw.Marker{Shape: draw.Cross, Size: 3.2})
		}
		room.point(x, y, 1.2)
		if t.Verdict == profile.Conflicts {
			d.c.Circle(x, y, 2.1, draw.Pen{Colour: draw.Red, Width: draw.Thick}, draw.Fill{})
			room.point(x, y, 2.2)
			tags = append(tags, tag{x, y, t.Specimen})
		}
	}
	for _, g := range tags {
		if g.text != "" {
			room.around(d.c, g.x, g.y, 2.7, draw.Text(small.Fit(g.text, 14)), coloured(bold(small), draw.Red))
		}
	}
}

// mark returns the marker of a test: its grade's shape, hollow where it is left
// out, an arrow where it only bounds the value.
func (d *depthSheet) mark(t *profile.Test) draw.Marker {
	m := gradeSeries(t.Grade).marker
	m.Size = 2
	if t.Bound == profile.AtLeast {
		return draw.Marker{Shape: draw.ArrowRight, Size: 2}
	}
	if t.Bound == profile.AtMost {
		return draw.Marker{Shape: draw.ArrowLeft, Size: 2}
	}
	if !t.Used {
		m.Solid = false
	}
	return m
}

// bar draws the range of a test, with caps where it ends on the sheet.
func (d *depthSheet) bar(s axis.Scale, r profile.Range, y float64) {
	x1, under := s.Clamp(r.Low)
	x2, over := s.Clamp(r.High)
	pen := draw.Pen{Width: draw.Thin}
	d.c.Line(x1, y, x2, y, pen)
	if under == 0 {
		d.c.Line(x1, y-0.7, x1, y+0.7, pen)
	}
	if over == 0 {
		d.c.Line(x2, y-0.7, x2, y+0.7, pen)
	}
}
