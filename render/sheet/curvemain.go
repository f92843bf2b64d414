package sheet

import (
	"fmt"
	"math"

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
