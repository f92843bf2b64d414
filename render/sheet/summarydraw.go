package sheet

import (
	"math"

	"pastload/profile"
	"pastload/render/axis"
	"pastload/render/draw"
)

// each visits every line of every stratum.
func (s *summarySheet) each(visit func(*summaryLine)) {
	for i := range s.strata {
		for j := range s.strata[i].lines {
			visit(&s.strata[i].lines[j])
		}
	}
}

// drawPanels draws the data of the four panels over their axes.
func (s *summarySheet) drawPanels() {
	s.drawIndex()
	s.drawStress()
	s.drawRatio()
	s.drawSlope()
	for _, b := range []draw.Box{s.names, s.index, s.stress, s.ratio, s.slope} {
		s.c.Rect(b, draw.Pen{Width: draw.Medium}, draw.Fill{})
	}
}

func (s *summarySheet) drawIndex() {
	least := 10.0
	var contents []float64
	s.each(func(l *summaryLine) {
		for _, r := range l.results {
			if r.Result == nil {
				continue
			}
			for _, n := range []profile.Number{r.Result.LiquidLimit, r.Result.PlasticLimit} {
				if v, ok := value(n); ok {
					least = math.Max(least, v)
				}
			}
			if v, ok := value(r.Result.WaterContent); ok {
				contents = append(contents, v)
			}
		}
	})
	_, high, step := axis.Round(0, capped(contents, least), int(math.Max(3, s.index.Width()/9)))
	room := &placer{area: s.index.Inset(0.3)}
	scale := axis.NewLinear(0, high, s.index.Left, s.index.Right)
	s.axisAt(s.index, scale, steps(step)...)
	s.each(func(l *summaryLine) {
		for _, r := range l.results {
			if r.Result == nil {
				continue
			}
			y := l.at(r.Depth)
			var ends []float64
			for _, n := range []profile.Number{r.Result.PlasticLimit, r.Result.LiquidLimit} {
				if v, ok := value(n); ok {
					x, _ := scale.Clamp(v)
					s.c.Line(x, y-0.6, x, y+0.6, draw.Pen{Width: draw.Thin})
					ends = append(ends, x)
				}
			}
			if len(ends) == 2 {
				s.c.Line(ends[0], y, ends[1], y, draw.Pen{Width: draw.Hair})
			}
			if v, ok := value(r.Result.WaterContent); ok {
				s.mark(room, s.index, scale, v, y, l, decimals(v, 0))
			}
		}
	})
}

// mark draws a value in the shape of its borehole, at the edge with an arrow and
// in figures where the axis does not reach it.
func (s *summarySheet) mark(room *placer, box draw.Box, scale axis.Scale, v, y float64, l *summaryLine, figures string) {
	x, way := scale.Clamp(v)
	if way > 0 {
		d := depthSheet{c: s.c, f: s.f}
		d.beyond(room, box.Right, y, boreholeMark(l.borehole), draw.Text(figures), plainMark)
		return
	}
	s.c.Marker(x, y, boreholeMark(l.borehole))
}

func (s *summarySheet) drawStress() {
	low, high := math.Inf(1), 0.0
	s.each(func(l *summaryLine) {
		for i := range l.tests {
			v, _ := testValue(&l.tests[i])
			low, high = math.Min(low, v), math.Max(high, v)
		}
	})
	if high == 0 {
		low, high = 10, 1000
	}
	low, high = axis.RoundLog(low*0.9, high*1.1)
	scale := axis.NewLog(low, high, s.stress.Left, s.stress.Right)
	s.axisAt(s.stress, scale, axis.Decades{Named: []int{1, 2, 5}}, axis.Decades{Named: []int{1, 3}}, axis.Decades{Named: []int{1}})
	s.each(func(l *summaryLine) {
		for i := range l.tests {
			t := &l.tests[i]
			v, _ := testValue(t)
			r := profile.Single(v)
			if known(t.Preconsolidation) && t.Bound == profile.Exact {
				r = t.Preconsolidation
			}
			s.test(l, t, scale, r)
		}
	})
}

// test draws one test: a thin range, the shape of its borehole, and what is the
// matter with it.
func (s *summarySheet) test(l *summaryLine, t *profile.Test, scale axis.Scale, r profile.Range) {
	x, _ := scale.Clamp(r.Best)
	y := l.at(t.Depth)
	if wide(r) {
		x1, _ := scale.Clamp(r.Low)
		x2, _ := scale.Clamp(r.High)
		s.c.Line(x1, y, x2, y, draw.Pen{Colour: draw.Grey, Width: draw.Thin})
	}
	m := boreholeMark(l.borehole)
	switch t.Bound {
	case profile.AtLeast:
		m.Shape = draw.ArrowRight
	case profile.AtMost:
		m.Shape = draw.ArrowLeft
	}
	s.c.Marker(x, y, m)
	if leftOut(t) {
		s.c.Marker(x, y, draw.Marker{Shape: draw.Cross, Size: 2.8})
	}
	if t.Verdict == profile.Conflicts {
		s.c.Circle(x, y, 1.6, draw.Pen{Colour: draw.Red, Width: draw.Medium}, draw.Fill{})
	}
}

// ratioEnds returns the ends of the OCR axis.
func (s *summarySheet) ratioEnds() (float64, float64) {
	low, high := 0.53, 9.5
	s.each(func(l *summaryLine) {
		for i := range l.tests {
			if v, ok := testRatio(&l.tests[i]); ok {
				low, high = math.Min(low, math.Max(v, 0.05)), math.Max(high, math.Min(v, 200))
			}
		}
	})
	return axis.RoundLog(low*0.95, high*1.05)
}

func (s *summarySheet) drawRatio() {
	low, high := s.ratioEnds()
	scale := axis.NewLog(low, high, s.ratio.Left, s.ratio.Right)
	s.axisAt(s.ratio, scale, axis.Decades{Named: []int{1, 2, 5}}, axis.Decades{Named: []int{1, 3}}, axis.Decades{Named: []int{1}})
	s.each(func(l *summaryLine) {
		for i := range l.tests {
			t := &l.tests[i]
			v, ok := testRatio(t)
			if !ok {
				continue
			}
			r := profile.Single(v)
			if known(t.Preconsolidation) && t.Bound == profile.Exact {
				r = t.Preconsolidation.Scale(1 / t.Effective.Value)
			}
			s.test(l, t, scale, r)
		}
	})
}

func (s *summarySheet) drawSlope() {
	least := 0.1
	var slopes []float64
	s.each(func(l *summaryLine) {
		for _, r := range l.results {
			if v, ok := value(r.MeasuredCc); ok {
				slopes = append(slopes, v)
			}
			if known(r.CorrelatedCc) {
				slopes = append(slopes, r.CorrelatedCc.Best)
			}
		}
	})
	_, high, step := axis.Round(0, capped(slopes, least), int(math.Max(2, s.slope.Width()/8)))
	room := &placer{area: s.slope.Inset(0.3)}
	scale := axis.NewLinear(0, high, s.slope.Left, s.slope.Right)
	s.axisAt(s.slope, scale, steps(step)...)
	s.each(func(l *summaryLine) {
		for _, r := range l.results {
			if x, way := scale.Clamp(r.CorrelatedCc.Best); known(r.CorrelatedCc) && way == 0 {
				s.c.Marker(x, l.at(r.Depth), draw.Marker{Shape: draw.Tick, Colour: draw.Grey, Size: 1.8})
			}
			if v, ok := value(r.MeasuredCc); ok {
				s.mark(room, s.slope, scale, v, l.at(r.Depth), l, decimals(v, 1))
			}
		}
	})
}
