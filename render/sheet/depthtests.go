package sheet

import (
	"math"

	"pastload/profile"
	"pastload/render/axis"
	"pastload/render/draw"
)

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

// leftOut reports whether a test has no part in the profile.
func leftOut(t *profile.Test) bool { return t.LeftOut || !t.Used }

// tests draws the tests of a panel: range, point in the shape of its grade, what
// the rest of the ground expects there, and what is the matter with it.
func (d *depthSheet) tests(room *placer, s axis.Scale, of func(*profile.Test) (test, expected profile.Range, ok bool)) {
	low, high := s.Ends()
	for i := range d.in.Profile.Tests {
		t := &d.in.Profile.Tests[i]
		if _, e, ok := of(t); ok && known(e) && e.Best >= low && e.Best <= high {
			x, y := s.At(e.Best), d.y.At(t.Depth)
			d.c.Line(x, y-1.1, x, y+1.1, draw.Pen{Colour: draw.Grey, Width: draw.Thick})
			room.point(x, y, 1)
		}
	}
	type tag struct {
		x, y float64
		l    string
		font draw.Font
	}
	var tags []tag
	for i := range d.in.Profile.Tests {
		t := &d.in.Profile.Tests[i]
		r, _, ok := of(t)
		if !ok {
			continue
		}
		x, way := s.Clamp(r.Best)
		y := d.y.At(t.Depth)
		if way > 0 {
			distance := plainMark
			if t.Verdict == profile.Conflicts {
				distance = ringedMark
			}
			d.beyond(room, s.At(high), y, d.mark(t), draw.Text(boundSign(t)+significant(r.Best)), distance)
			x -= beyondRoom
		} else {
			if wide(r) {
				d.bar(s, r, y)
			}
			d.c.Marker(x, y, d.mark(t))
			room.point(x, y, 1.2)
		}
		g := tag{x, y, t.Specimen, bold(d.f.small)}
		if leftOut(t) {
			d.c.Marker(x, y, draw.Marker{Shape: draw.Cross, Size: 3.2})
		}
		switch {
		case t.Verdict == profile.Conflicts:
			d.c.Circle(x, y, 2.1, draw.Pen{Colour: draw.Red, Width: draw.Thick}, draw.Fill{})
			room.point(x, y, 2.2)
			g.font.Colour = draw.Red
		case t.Verdict == profile.Doubtful:
			g.l += "?"
			g.font.Colour = draw.Red
		case !leftOut(t):
			continue
		}
		if g.l != "" {
			tags = append(tags, g)
		}
	}
	for _, g := range tags {
		room.around(d.c, g.x, g.y, ringedMark, draw.Text(d.f.small.Fit(g.l, 14)), g.font)
	}
}

// significant writes a stress or ratio with as many figures as it is worth.
func significant(v float64) string {
	if math.Abs(v) < 10 {
		return ratio(v)
	}
	if math.Abs(v) >= 1000 {
		v = math.Round(v/10) * 10
	}
	return decimals(v, 0)
}

// boundSign is what stands before a value that is only a bound.
func boundSign(t *profile.Test) string {
	switch t.Bound {
	case profile.AtLeast:
		return "≥ "
	case profile.AtMost:
		return "≤ "
	}
	return ""
}

// mark returns the marker of a test: its grade's shape, hollow where it is left
// out, an arrow where it only bounds the value.
func (d *depthSheet) mark(t *profile.Test) draw.Marker {
	m := gradeSeries(t.Grade).marker
	m.Size = 2
	switch t.Bound {
	case profile.AtLeast:
		return draw.Marker{Shape: draw.ArrowRight, Size: 2}
	case profile.AtMost:
		return draw.Marker{Shape: draw.ArrowLeft, Size: 2}
	}
	if leftOut(t) {
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
