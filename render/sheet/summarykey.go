package sheet

import (
	"fmt"

	"pastload/profile"
	"pastload/render/axis"
	"pastload/render/draw"
)

// drawHeader writes the title of the sheet and of its panels.
func (s *summarySheet) drawHeader() {
	frame := s.in.Page.frame()
	s.c.Text(frame.Left, frame.Top+4.6, draw.Text("Summary by stratum"), s.f.title)
	s.c.Text(frame.Left, frame.Top+8.5, draw.Text(s.f.small.Fit(counted(len(s.in.Profiles), "borehole", "boreholes")+", tests and results by the name of their stratum", frame.Width())), s.f.small)
	top := frame.Top + headerHeight
	for _, p := range []struct {
		box         draw.Box
		title, unit draw.Label
	}{
		{s.names, draw.Text("Stratum"), draw.Text("and boreholes")},
		{s.index, draw.Text("Index tests"), draw.Text("PL, LL, w (%)")},
		{s.stress, draw.Text("Preconsolidation stress ").Join(sigmaP), draw.Text("(kPa, log scale)")},
		{s.ratio, draw.Text("OCR = ").Join(sigmaP).Add(" / ").Join(sigmaV), draw.Text("(log scale)")},
		{s.slope, draw.Text("C").Sub("c"), draw.Text("(–)")},
	} {
		title := p.title
		if s.f.heading.Width(title) > p.box.Width()-2 {
			title = sigmaP
		}
		s.c.Rect(draw.Box{Left: p.box.Left, Top: top, Right: p.box.Right, Bottom: p.box.Top}, draw.Pen{Width: draw.Medium}, draw.Fill{})
		x := (p.box.Left + p.box.Right) / 2
		s.c.Text(x, top+3.5, title, anchored(s.f.heading, draw.Middle))
		s.c.Text(x, top+6.9, p.unit, anchored(s.f.small, draw.Middle))
	}
}

// drawRows names strata and boreholes, and draws the lines between them.
func (s *summarySheet) drawRows() {
	low, high := s.ratioEnds()
	zoneTints(s.c, s.ratio, axis.NewLog(low, high, s.ratio.Left, s.ratio.Right), s.in.Settings.Limits, s.f.small)
	for i := range s.strata {
		st := &s.strata[i]
		y := (st.box.Top+st.box.Bottom)/2 - float64(len(st.text))*s.f.small.Line()/2
		for k, l := range st.text {
			f := s.f.small
			if k < st.named {
				f = bold(f)
			}
			y += s.f.small.Line()
			s.c.Text(s.names.Left+1, y-0.22*s.f.small.Line(), l, f)
		}
		for j, l := range st.lines {
			s.nameLine(&l)
			if j > 0 {
				s.c.Line(s.names.Right-s.boreholeWidth()-1, l.top, s.plot.Right, l.top, draw.Pen{Colour: draw.Pale, Width: draw.Hair})
			}
		}
		if i > 0 {
			s.c.Line(s.plot.Left, st.box.Top, s.plot.Right, st.box.Top, draw.Pen{Width: draw.Medium})
		}
	}
}

// nameLine names the borehole of a line, with the depths it is drawn between
// where there is room.
func (s *summarySheet) nameLine(l *summaryLine) {
	f := anchored(s.f.small, draw.End)
	name := draw.Text(f.Fit(s.in.Profiles[l.borehole].Borehole, s.boreholeWidth()))
	mid := l.top + l.pitch/2 + f.Height()/2
	if l.pitch < 2.4*f.Line() {
		s.c.Text(s.names.Right-1, mid, name, f)
		return
	}
	depths := decimals(l.shallow, 1)
	if l.deepest > l.shallow {
		depths += "–" + decimals(l.deepest, 1)
	}
	s.c.Text(s.names.Right-1, mid-f.Line()/2, name, f)
	s.c.Text(s.names.Right-1, mid+f.Line()/2, draw.Text(depths+" m"), coloured(f, "#444444"))
}

// key explains the shapes of the boreholes and the marks on tests.
func (s *summarySheet) key() []keyItem {
	var items []keyItem
	for i := range s.in.Profiles {
		if i == len(boreholeMarks)-1 && len(s.in.Profiles) > len(boreholeMarks) {
			items = append(items, keyMarker(boreholeMark(i), draw.Text(fmt.Sprintf("%d further boreholes", len(s.in.Profiles)-i))))
			break
		}
		items = append(items, keyMarker(boreholeMark(i), draw.Text(s.f.small.Fit(s.in.Profiles[i].Borehole, 40))))
	}
	seen := map[string]bool{}
	s.each(func(l *summaryLine) {
		for i := range l.tests {
			t := &l.tests[i]
			seen["out"] = seen["out"] || leftOut(t)
			seen["conflict"] = seen["conflict"] || t.Verdict == profile.Conflicts
			seen["bound"] = seen["bound"] || t.Bound != profile.Exact
			seen["range"] = seen["range"] || wide(t.Preconsolidation)
		}
	})
	if seen["range"] {
		items = append(items, keyItem{5, func(c *draw.Canvas, x, y float64) {
			c.Line(x-2.5, y, x+2.5, y, draw.Pen{Colour: draw.Grey, Width: draw.Thin})
		}, draw.Text("range of a test")})
	}
	if seen["bound"] {
		items = append(items, keyItem{4, func(c *draw.Canvas, x, y float64) { c.Marker(x-1.5, y, draw.Marker{Shape: draw.ArrowRight}) }, draw.Text("bound only")})
	}
	if seen["out"] {
		items = append(items, keyMarker(draw.Marker{Shape: draw.Cross, Size: 2.8}, draw.Text("left out")))
	}
	if seen["conflict"] {
		items = append(items, keyItem{4, func(c *draw.Canvas, x, y float64) {
			c.Circle(x, y, 1.6, draw.Pen{Colour: draw.Red, Width: draw.Medium}, draw.Fill{})
		}, draw.Text("conflicts with the rest")})
	}
	return items
}

// paragraphs define what the sheet shows.
func (s *summarySheet) paragraphs() []string {
	out := []string{
		zoneDefinition(s.in.Settings.Limits),
		"One line for each borehole in a stratum, with depth downwards between the depths given. Index tests: bar from plastic to liquid limit, shape water content. Cc: shapes measured, grey ticks from correlations. OCR in words: tests that are not left out and not bounds only.",
	}
	if s.without > 0 {
		out = append(out, fmt.Sprintf("Strata without room on this sheet: %d.", s.without))
	}
	if s.in.Sources != "" {
		out = append(out, "Data: "+s.in.Sources+".")
	}
	return out
}
