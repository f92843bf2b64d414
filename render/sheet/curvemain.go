package sheet

import (
	"fmt"
	"math"
	"strings"

	"pastload/profile/oedometer"
	"pastload/render/axis"
	"pastload/render/draw"
)

// The branches of a curve, each in its own shape and dash.
var branches = [...]series{
	oedometer.FirstLoading:   {point: true, name: "first loading", marker: draw.Marker{Shape: draw.Circle, Solid: true}, pen: draw.Pen{Width: draw.Thick}},
	oedometer.Unloading:      {point: true, name: "unloading", marker: draw.Marker{Shape: draw.TriangleDown}, pen: draw.Pen{Width: draw.Medium, Dash: draw.Dashed}},
	oedometer.Reloading:      {point: true, name: "reloading", marker: draw.Marker{Shape: draw.Triangle}, pen: draw.Pen{Width: draw.Medium, Dash: draw.DashDot}},
	oedometer.FurtherLoading: {point: true, name: "further loading", marker: draw.Marker{Shape: draw.Square, Solid: true}, pen: draw.Pen{Width: draw.Thick, Dash: draw.LongDash}},
}

// The lines drawn over the points.
var (
	virginPen = draw.Pen{Colour: draw.Red, Width: draw.Thick, Dash: draw.LongDash}
	lastPen   = draw.Pen{Colour: draw.Red, Width: draw.Medium, Dash: draw.Dotted}
	fieldPen  = draw.Pen{Colour: draw.Blue, Width: draw.Thick, Dash: draw.Dashed}
	inSituPen = draw.Pen{Colour: draw.Blue, Width: draw.Medium, Dash: draw.DashDot}
	yieldPen  = draw.Pen{Width: 0.5}
)

// constructionPens tell the constructions on the curve apart by their dash.
var constructionPens = map[string]draw.Pen{
	"two-line":      {Colour: "#444444", Width: draw.Thin},
	"casagrande":    {Colour: "#444444", Width: draw.Thin, Dash: draw.DashDot},
	"slope":         {Colour: "#444444", Width: draw.Thin, Dash: draw.LongDash},
	"pacheco-silva": {Colour: "#444444", Width: draw.Thin, Dash: draw.Dotted},
}

// mostMarked is the number of points up to which each is marked; more are drawn
// as a line.
const mostMarked, mostNumbered = 80, 30

func branchSeries(b oedometer.Branch) series {
	if b < 0 || int(b) >= len(branches) {
		b = oedometer.FirstLoading
	}
	return branches[b]
}

// drawMain draws void ratio against log σ′ with everything read from it.
func (s *curveSheet) drawMain() {
	m := &s.main
	m.across(axis.Decades{Named: []int{1, 2, 5}}, draw.Text("effective vertical stress σ′ (kPa, log scale)"))
	least, most := m.y.Ends()
	m.upright(axis.Step{Size: axis.NiceStep(most-least, 10), Parts: 2}, draw.Text("void ratio e (–)"))
	if e0 := s.in.Specimen.Prepared.InitialVoidRatio; e0 > 0 && finite(e0) {
		strain := func(e float64) float64 { return 100 * (e0 - e) / (1 + e0) }
		low, high := strain(most), strain(least)
		m.opposite(axis.NewLinear(low, high, m.box.Top, m.box.Bottom), axis.Step{Size: axis.NiceStep(high-low, 10), Parts: 2}, draw.Text("strain (%)"))
	}
	room := &placer{area: m.box.Inset(0.3)}
	if s.in.Specimen.Interpreted {
		s.drawYieldBand()
		s.drawConstructions(room)
		s.drawVirgin(room)
		s.drawField(room)
	}
	s.drawBranches(room)
	s.drawStresses(room)
	s.nameSlopes(room)
	for _, label := range s.later {
		label()
	}
	s.number(room)
	m.frame()
}

// drawBranches draws the record: each branch in its shape and dash. A point
// closes the stretch that led to it.
func (s *curveSheet) drawBranches(room *placer) {
	const apart = 0.3 // mm; nearer points of a dense record are left out
	for i := 0; i < len(s.points); {
		b := s.points[i].Branch
		var line []draw.Point
		if i > 0 {
			line = append(line, s.place(i-1))
		}
		for ; i < len(s.points) && s.points[i].Branch == b; i++ {
			p := s.place(i)
			if n := len(line); len(s.points) <= mostMarked || n == 0 || math.Hypot(p.X-line[n-1].X, p.Y-line[n-1].Y) >= apart {
				line = append(line, p)
			}
		}
		room.line(s.main.polyline(line, branchSeries(b).pen))
	}
	if len(s.points) > mostMarked {
		return
	}
	for i, p := range s.points {
		at := s.place(i)
		if !s.main.holds(at) {
			continue
		}
		k := branchSeries(p.Branch).marker
		k.Size = 1.8
		if p.Seating {
			k.Solid, k.Size = false, 1.2
		}
		s.c.Marker(at.X, at.Y, k)
		room.point(at.X, at.Y, 1)
	}
}

func (s *curveSheet) place(i int) draw.Point {
	return s.main.at(s.points[i].EffectiveStress, s.points[i].VoidRatio)
}

// number writes the number of each point, by which the constructions name them.
func (s *curveSheet) number(room *placer) {
	if len(s.points) > mostNumbered {
		return
	}
	const together = 1.2 // mm; nearer points share a label
	done := make([]bool, len(s.points))
	for i, p := range s.points {
		at := s.place(i)
		if done[i] || !s.main.holds(at) {
			continue
		}
		text := fmt.Sprint(p.number)
		for j := i + 1; j < len(s.points); j++ {
			if q := s.place(j); math.Hypot(q.X-at.X, q.Y-at.Y) < together {
				text += ", " + fmt.Sprint(s.points[j].number)
				done[j] = true
			}
		}
		room.around(s.c, at.X, at.Y, 1.6, draw.Text(text), coloured(s.f.small, "#444444"))
	}
}

// drawYieldBand tints the range of σ′p.
func (s *curveSheet) drawYieldBand() {
	y := s.r.Preconsolidation
	if y.Bound != oedometer.Exact || !finite(y.Low) || !finite(y.High) || y.Low <= 0 || y.High <= y.Low {
		return
	}
	x1, _ := s.main.x.Clamp(y.Low)
	x2, _ := s.main.x.Clamp(y.High)
	s.c.Rect(draw.Box{Left: x1, Top: s.main.box.Top, Right: x2, Bottom: s.main.box.Bottom}, draw.Pen{}, draw.Fill{Colour: "#EEEEEE"})
}

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
