package sheet

import (
	"math"
	"strings"

	"pastload/profile/oedometer"
	"pastload/render/draw"
)

// drawConstructions draws the lines of the constructions on the curve itself.
// The virgin line that they share is drawn once, by drawVirgin.
func (s *curveSheet) drawConstructions(room *placer) {
	for _, m := range s.methods() {
		pen, ok := constructionPens[m.ID]
		if !ok {
			continue
		}
		named := false
		for _, l := range m.Lines {
			if l.Plane != oedometer.SemiLogPlane || l.Name == "virgin line" && m.ID != "two-line" {
				continue
			}
			line := s.logLine(l.X1, l.Y1, l.X2, l.Y2, pen)
			room.line(line)
			if !named && len(line) > 1 {
				named = true
				s.later = append(s.later, func() { room.beside(s.c, finely(line), draw.Text(s.letter(m)), bold(s.f.small)) })
			}
		}
	}
}

// logLine draws a line given in log10 σ′ and e.
func (s *curveSheet) logLine(x1, y1, x2, y2 float64, pen draw.Pen) []draw.Point {
	const largest = 15 // decades that a stress can be from 1 kPa
	for _, v := range []float64{x1, y1, x2, y2} {
		if !(math.Abs(v) <= largest) {
			return nil
		}
	}
	return s.main.polyline([]draw.Point{s.main.at(math.Pow(10, x1), y1), s.main.at(math.Pow(10, x2), y2)}, pen)
}

// drawVirgin draws the virgin lines through the window, with their slopes.
func (s *curveSheet) drawVirgin(room *placer) {
	low, high := s.main.x.Ends()
	through := func(v oedometer.VirginLine, pen draw.Pen, name string) {
		if !v.Known || !finite(v.Slope) || !finite(v.Intercept) {
			return
		}
		x1, x2 := math.Log10(low), math.Log10(high)
		line := s.logLine(x1, v.Intercept-v.Slope*x1, x2, v.Intercept-v.Slope*x2, pen)
		room.line(line)
		if len(line) > 0 {
			short, _, _ := strings.Cut(name, ":")
			l := draw.Text("C").Sub("c").Add(" = " + decimals(v.Slope, 3) + ", " + short)
			s.later = append(s.later, func() { room.beside(s.c, finely(line), l, coloured(s.f.small, draw.Red)) })
		}
	}
	through(s.r.VirginSteepest, virginPen, s.r.VirginSteepest.Rule)
	if l := s.r.VirginLast; l.Known && math.Abs(l.Slope-s.r.VirginSteepest.Slope) > 0.005*math.Abs(l.Slope) {
		through(l, lastPen, l.Rule)
	}
}

// finely puts points along a straight line, for a label to choose from.
func finely(line []draw.Point) []draw.Point {
	const parts = 24
	a, b := line[0], line[len(line)-1]
	out := make([]draw.Point, parts+1)
	for i := range out {
		t := float64(i) / parts
		out[i] = draw.Point{X: a.X + t*(b.X-a.X), Y: a.Y + t*(b.Y-a.Y)}
	}
	return out
}

// drawField draws the curve in the ground (Schmertmann).
func (s *curveSheet) drawField(room *placer) {
	f := s.r.Field
	if !f.Known || len(f.Stress) != len(f.VoidRatio) {
		return
	}
	var points []draw.Point
	for i := range f.Stress {
		if finite(f.Stress[i]) && f.Stress[i] > 0 && finite(f.VoidRatio[i]) {
			points = append(points, s.main.at(f.Stress[i], f.VoidRatio[i]))
		}
	}
	line := s.main.polyline(points, fieldPen)
	room.line(line)
	if len(line) > 1 {
		l := draw.Text("field curve, C").Sub("c").Add(" = " + decimals(f.CompressionIndex, 3))
		s.later = append(s.later, func() { room.beside(s.c, finely(line[len(line)-2:]), l, coloured(s.f.small, draw.Blue)) })
	}
}

// drawStresses draws the stress in the ground and the preconsolidation stress as
// uprights with their values.
func (s *curveSheet) drawStresses(room *placer) {
	upright := func(v float64, pen draw.Pen, l draw.Label, f draw.Font) {
		x, way := s.main.x.Clamp(v)
		if way != 0 {
			return
		}
		// The line goes on through the strip, to be read against the methods.
		s.c.Line(x, s.main.box.Top, x, s.main.box.Bottom, pen)
		room.line([]draw.Point{{X: x, Y: s.main.box.Top}, {X: x, Y: s.main.box.Bottom}})
		var at []draw.Point
		var anchors []draw.Anchor
		for k := range 10 {
			for _, y := range []float64{s.main.box.Bottom - 2 - 5*float64(k), s.main.box.Top + 4 + 5*float64(k)} {
				at = append(at, draw.Point{X: x + 1, Y: y}, draw.Point{X: x - 1, Y: y})
				anchors = append(anchors, draw.Start, draw.End)
			}
		}
		s.later = append(s.later, func() { room.at(s.c, at, anchors, l, f) })
	}
	if v, ok := value(s.in.Specimen.Effective); ok && v > 0 {
		upright(v, inSituPen, sigmaV.Add(" = "+significant(v)+" kPa"), coloured(s.f.body, draw.Blue))
	}
	y := s.r.Preconsolidation
	if !s.in.Specimen.Interpreted || y.Bound == oedometer.Undetermined || !finite(y.Best) || y.Best <= 0 {
		return
	}
	text := map[oedometer.Bound]string{oedometer.Exact: " = ", oedometer.AtLeast: " ≥ ", oedometer.AtMost: " ≤ "}[y.Bound] + significant(y.Best) + " kPa"
	if y.Bound == oedometer.Exact {
		text += " (" + significant(y.Low) + " to " + significant(y.High) + ")"
	} else if x, way := s.main.x.Clamp(y.Best); way == 0 {
		shape := draw.ArrowRight
		if y.Bound == oedometer.AtMost {
			shape = draw.ArrowLeft
		}
		s.c.Marker(x, s.main.box.Top+9, draw.Marker{Shape: shape, Size: 3})
		room.point(x, s.main.box.Top+9, 4)
	}
	upright(y.Best, yieldPen, sigmaP.Add(text), bold(s.f.body))
}

// nameSlopes writes Cr and Cs beside the branch that each comes from.
func (s *curveSheet) nameSlopes(room *placer) {
	if !s.in.Specimen.Interpreted {
		return
	}
	beside := func(b oedometer.Branch, l draw.Label) bool {
		for i := range s.points {
			if s.points[i].Branch == b && i > 0 {
				line := finely([]draw.Point{s.place(i - 1), s.place(i)})
				s.later = append(s.later, func() { room.beside(s.c, line, l, s.f.small) })
				return true
			}
		}
		return false
	}
	if cs := s.r.SwellingIndex; cs.Known && finite(cs.Value) {
		beside(oedometer.Unloading, draw.Text("C").Sub("s").Add(" = "+decimals(cs.Value, 3)))
	}
	if cr := s.r.RecompressionIndex; cr.Known && finite(cr.Value) {
		l := draw.Text("C").Sub("r").Add(" = " + decimals(cr.Value, 3))
		if !beside(oedometer.Reloading, l) {
			beside(oedometer.FirstLoading, l)
		}
	}
}
