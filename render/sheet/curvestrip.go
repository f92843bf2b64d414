package sheet

import (
	"fmt"
	"math"

	"pastload/profile/oedometer"
	"pastload/render/axis"
	"pastload/render/draw"
)

// drawStrip draws what each construction gives on the stress axis of the curve:
// as constructed, and its range after the known bias.
func (s *curveSheet) drawStrip() {
	if !s.in.Specimen.Interpreted {
		return
	}
	y := s.strip.Top + 1
	yield := s.r.Preconsolidation
	s.c.Rect(s.strip, draw.Pen{}, draw.Fill{Colour: "#FAFAFA"})
	if yield.Bound == oedometer.Exact && yield.Best > 0 && finite(yield.Best) {
		if x, way := s.main.x.Clamp(yield.Best); way == 0 {
			s.c.Line(x, s.strip.Top, x, s.strip.Bottom, draw.Pen{Width: draw.Hair})
		}
	}
	for _, m := range s.methods() {
		y += s.stripRow()
		name, points := s.letter(m)+"  "+m.Name, ""
		if n := numbers(m.Points); n != "" && len(s.points) <= mostNumbered {
			points = ", points " + n
		}
		marker := draw.Marker{Shape: draw.Circle, Solid: m.Used, Size: 1.8}
		if !m.Used {
			name += " (not used)"
		}
		s.stripLine(y, name, points, s.f.small, m.Stress, m.Low, m.High, marker, draw.Thin)
	}
	y += s.stripRow()
	switch {
	case yield.Bound == oedometer.Exact && yield.Best > 0:
		s.stripLine(y, "combined, 5 to 95 %", "", bold(s.f.small), yield.Best, yield.Low, yield.High, draw.Marker{Shape: draw.Square, Solid: true, Size: 2}, draw.Thick)
	case yield.Best > 0 && yield.Bound != oedometer.Undetermined:
		shape := draw.ArrowRight
		if yield.Bound == oedometer.AtMost {
			shape = draw.ArrowLeft
		}
		s.stripLine(y, s.yieldWords(), "", bold(s.f.small), yield.Best, yield.Best, yield.Best, draw.Marker{Shape: shape, Size: 2}, 0)
	default:
		s.c.Text(s.strip.Left+1, y, draw.Text(s.yieldWords()), bold(s.f.small))
	}
	s.c.Rect(s.strip, draw.Pen{Width: draw.Thin}, draw.Fill{})
}

// stripLine draws one row of the strip: the name where there is room, the marker,
// its bar, the figures, and the points that made it where there is room for them.
func (s *curveSheet) stripLine(y float64, name, points string, f draw.Font, v, low, high float64, m draw.Marker, bar float64) {
	if !finite(v) || !finite(low) || !finite(high) {
		return
	}
	x, _ := s.main.x.Clamp(v)
	left, right := x, x
	mid := y - f.Height()/2
	if bar > 0 && high > low && low > 0 {
		left, _ = s.main.x.Clamp(low)
		right, _ = s.main.x.Clamp(high)
		pen := draw.Pen{Width: bar}
		s.c.Line(left, mid, right, mid, pen)
		s.c.Line(left, mid-0.7, left, mid+0.7, pen)
		s.c.Line(right, mid-0.7, right, mid+0.7, pen)
	}
	s.c.Marker(x, mid, m)
	left, right = math.Min(left, x-1.2), math.Max(right, x+1.2)
	figures := significant(v)
	if bar > 0 && high > low {
		figures += " (" + significant(low) + " to " + significant(high) + ")"
	}
	l := draw.Text(figures + points)
	if s.strip.Right-right-3 < f.Width(l) {
		l = draw.Text(figures)
	}
	width := f.Width(l)
	// Name on the left and figures on the right of the bar, or both on the side
	// that has the room.
	switch rest := s.strip.Right - right - 2; {
	case m.Shape == draw.ArrowRight || m.Shape == draw.ArrowLeft:
		s.c.Text(s.strip.Left+1, y, draw.Text(f.Fit(name, left-s.strip.Left-3)), f)
	case rest >= width+1 && left-s.strip.Left > 40:
		s.c.Text(s.strip.Left+1, y, draw.Text(f.Fit(name, left-s.strip.Left-3)), f)
		s.c.Text(right+1.5, y, l, f)
	case rest >= width+40:
		s.c.Text(right+1.5, y, l, f)
		s.c.Text(right+3.5+width, y, draw.Text(f.Fit(name, s.strip.Right-right-4.5-width)), f)
	default:
		s.c.Text(left-1.5, y, l, anchored(f, draw.End))
		s.c.Text(s.strip.Left+1, y, draw.Text(f.Fit(name, left-s.strip.Left-4-width)), f)
	}
}

// numbers writes point numbers as short as they can be: 1–3, 5.
func numbers(indices []int) string {
	s := ""
	for i := 0; i < len(indices); {
		j := i
		for j+1 < len(indices) && indices[j+1] == indices[j]+1 {
			j++
		}
		if s != "" {
			s += ", "
		}
		s += fmt.Sprint(indices[i] + 1)
		if j > i {
			s += "–" + fmt.Sprint(indices[j]+1)
		}
		i = j + 1
	}
	return s
}

// drawWork draws the work per unit volume against stress on plain axes, with the
// lines of that construction.
func (s *curveSheet) drawWork() {
	loading := s.r.Loading
	if !s.in.Specimen.Interpreted || len(loading) == 0 {
		return
	}
	stress, work := 1.0, 0.1
	for _, p := range loading {
		if finite(p.EffectiveStress) && finite(p.Work) {
			stress, work = math.Max(stress, p.EffectiveStress), math.Max(work, p.Work)
		}
	}
	// The break is what is to be seen: some way beyond it is enough.
	if a := s.r.Apparent.Best; a > 0 && finite(a) && stress > 5*a {
		stress = 5 * a
		for _, p := range loading {
			if p.EffectiveStress >= stress && finite(p.Work) {
				work = p.Work
				break
			}
		}
	}
	_, xEnd, xStep := axis.Round(0, stress, 4)
	_, yEnd, yStep := axis.Round(0, work, 5)
	ch := chart{c: s.c, f: s.f, box: s.work, x: axis.NewLinear(0, xEnd, s.work.Left, s.work.Right), y: axis.NewLinear(0, yEnd, s.work.Bottom, s.work.Top)}
	ch.across(axis.Step{Size: xStep, Parts: 2}, draw.Text("σ′ (kPa)"))
	ch.upright(axis.Step{Size: yStep, Parts: 2}, draw.Text("work per volume (kJ/m³), first loading"))
	room := &placer{area: s.work.Inset(0.3)}
	for i := range s.r.Methods {
		m := &s.r.Methods[i]
		for _, l := range m.Lines {
			if l.Plane == oedometer.WorkPlane && finite(l.X1) && finite(l.X2) && finite(l.Y1) && finite(l.Y2) {
				line := ch.polyline([]draw.Point{ch.at(l.X1, l.Y1), ch.at(l.X2, l.Y2)}, draw.Pen{Colour: "#444444", Width: draw.Thin})
				room.line(line)
			}
		}
	}
	for _, p := range loading {
		if at := ch.at(p.EffectiveStress, p.Work); finite(p.EffectiveStress) && finite(p.Work) && ch.holds(at) {
			s.c.Marker(at.X, at.Y, draw.Marker{Shape: draw.Circle, Solid: true, Size: 1.3})
			room.point(at.X, at.Y, 0.8)
		}
	}
	for _, m := range s.methods() {
		if m.ID == "work" {
			if x, way := ch.x.Clamp(m.Stress); way == 0 {
				s.c.Line(x, s.work.Top, x, s.work.Bottom, draw.Pen{Width: draw.Hair, Dash: draw.Dashed})
				room.around(s.c, x, s.work.Top+4, 1, draw.Text(s.letter(m)+"  "+significant(m.Stress)+" kPa"), bold(s.f.small))
			}
		}
	}
	ch.frame()
}
