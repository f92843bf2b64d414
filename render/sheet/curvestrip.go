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
	rows := s.stripRows()
	// The names stand on the left where all of them have room before the bars,
	// else behind the figures.
	widest, first := 0.0, s.strip.Right
	for _, r := range rows {
		widest = math.Max(widest, r.font.Width(draw.Text(r.name)))
		first = math.Min(first, math.Min(s.main.x.At(r.low), s.main.x.At(r.value)))
	}
	behind := s.strip.Left+widest+4 > first
	for _, r := range rows {
		y += s.stripRow()
		s.drawStripRow(r, y, behind)
	}
	if len(rows) == len(s.methods()) {
		s.c.Text(s.strip.Left+1, y+s.stripRow(), draw.Text(s.yieldWords()), bold(s.f.small))
	}
	s.c.Rect(s.strip, draw.Pen{Width: draw.Thin}, draw.Fill{})
}

// A stripRow is what one construction gives.
type stripRow struct {
	name, points     string
	value, low, high float64
	marker           draw.Marker
	bar              float64 // width of the range's line, 0 for none
	font             draw.Font
}

// stripRows lists the constructions that gave a value and, where there is one,
// the result.
func (s *curveSheet) stripRows() []stripRow {
	var rows []stripRow
	for _, m := range s.methods() {
		r := stripRow{
			name: s.letter(m) + "  " + m.Name, value: m.Stress, low: m.Stress, high: m.Stress,
			marker: draw.Marker{Shape: draw.Circle, Solid: m.Used, Size: 1.8}, font: s.f.small,
		}
		if finite(m.Low) && finite(m.High) && m.Low > 0 && m.High > m.Low {
			r.low, r.high, r.bar = m.Low, m.High, draw.Thin
		}
		if !m.Used {
			r.name += " (not used)"
		}
		if n := numbers(m.Points); n != "" && len(s.points) <= mostNumbered {
			r.points = ", points " + n
		}
		rows = append(rows, r)
	}
	y := s.r.Preconsolidation
	if y.Bound == oedometer.Undetermined || !finite(y.Best) || y.Best <= 0 {
		return rows
	}
	r := stripRow{name: "combined, 5 to 95 %", value: y.Best, low: y.Best, high: y.Best, marker: draw.Marker{Shape: draw.Square, Solid: true, Size: 2}, font: bold(s.f.small)}
	switch y.Bound {
	case oedometer.AtLeast:
		r.name, r.marker.Shape = "bound: at least", draw.ArrowRight
	case oedometer.AtMost:
		r.name, r.marker.Shape = "bound: at most", draw.ArrowLeft
	default:
		if finite(y.Low) && finite(y.High) && y.Low > 0 && y.High > y.Low {
			r.low, r.high, r.bar = y.Low, y.High, draw.Thick
		}
	}
	return append(rows, r)
}

// drawStripRow draws one row of the strip: name, marker, bar, figures, and the
// points that made it where there is room for them.
func (s *curveSheet) drawStripRow(r stripRow, y float64, behind bool) {
	x, _ := s.main.x.Clamp(r.value)
	left, _ := s.main.x.Clamp(r.low)
	right, _ := s.main.x.Clamp(r.high)
	mid := y - r.font.Height()/2
	if r.bar > 0 {
		pen := draw.Pen{Width: r.bar}
		s.c.Line(left, mid, right, mid, pen)
		s.c.Line(left, mid-0.7, left, mid+0.7, pen)
		s.c.Line(right, mid-0.7, right, mid+0.7, pen)
	}
	s.c.Marker(x, mid, r.marker)
	reach := 1.2
	if r.marker.Shape == draw.ArrowRight {
		reach = 4
	}
	left, right = math.Min(left, x-1.2), math.Max(right, x+reach)
	figures := significant(r.value)
	if r.bar > 0 {
		figures += " (" + significant(r.low) + " to " + significant(r.high) + ")"
	}
	name := r.name
	if behind {
		figures, name = figures+" · "+r.name, ""
	}
	room := s.strip.Right - right - 2.5
	if full := figures + r.points; r.font.Width(draw.Text(full)) <= room {
		figures = full
	}
	if width := r.font.Width(draw.Text(figures)); width > room && left-s.strip.Left > room {
		s.c.Text(left-1.5, y, draw.Text(r.font.Fit(figures, left-s.strip.Left-3)), anchored(r.font, draw.End))
	} else {
		s.c.Text(right+1.5, y, draw.Text(r.font.Fit(figures, room)), r.font)
	}
	s.c.Text(s.strip.Left+1, y, draw.Text(name), r.font)
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
