package sheet

import (
	"math"

	"pastload/render/axis"
	"pastload/render/draw"
)

// layOut shares the page out.
func (s *summarySheet) layOut() {
	page := s.in.Page
	frame := page.frame()
	block := draw.Box{Left: frame.Right - blockWidth, Top: frame.Bottom - blockHeight, Right: frame.Right, Bottom: frame.Bottom}
	s.captionBox = draw.Box{Left: frame.Left, Right: frame.Right, Bottom: block.Top - 1}
	if page.wide {
		s.captionBox.Right, s.captionBox.Bottom = block.Left-4, frame.Bottom
	}
	s.plot = draw.Box{Left: frame.Left, Top: frame.Top + headerHeight + titleHeight, Right: frame.Right}
	// What has no room is known only when the caption is laid out, which wants one
	// line for saying so.
	s.caption = newCaption(s.f.small, s.captionBox.Width(), s.key(), s.paragraphs(), 3)
	bottom := s.captionBox.Bottom - s.caption.height() - s.f.small.Line()
	if page.wide {
		bottom = math.Min(bottom, block.Top-1)
	}
	s.shareRows(bottom - limitHeight - s.plot.Top)
	s.caption = newCaption(s.f.small, s.captionBox.Width(), s.key(), s.paragraphs(), 3)
	s.captionBox.Top = s.plot.Bottom + limitHeight
	x := s.plot.Left
	part := func(share float64) draw.Box {
		b := draw.Box{Left: x, Top: s.plot.Top, Right: x + share*s.plot.Width(), Bottom: s.plot.Bottom}
		x = b.Right
		return b
	}
	s.names, s.index, s.stress, s.ratio, s.slope = part(0.27), part(0.2), part(0.2), part(0.2), part(0.13)
}

// shareRows gives each stratum its row, the pitch of lines as wide as the room
// allows up to what is pleasant. Strata that do not fit are left out, the last
// first, and counted.
func (s *summarySheet) shareRows(room float64) {
	const least, most = 3.4, 24.0 // mm
	for i := range s.strata {
		s.name(&s.strata[i])
	}
	rows := func(pitch float64) float64 {
		sum := 0.0
		for i := range s.strata {
			sum += s.rowHeight(&s.strata[i], pitch)
		}
		return sum
	}
	s.pitch = most
	for s.pitch > least && rows(s.pitch) > room {
		s.pitch -= 0.1
	}
	for len(s.strata) > 1 && rows(s.pitch) > room {
		s.strata = s.strata[:len(s.strata)-1]
		s.without++
	}
	y := s.plot.Top
	for i := range s.strata {
		st := &s.strata[i]
		h := s.rowHeight(st, s.pitch)
		st.box = draw.Box{Left: s.plot.Left, Top: y, Right: s.plot.Right, Bottom: y + h}
		gap := (h - st.height(s.pitch)) / 2
		for j := range st.lines {
			l := &st.lines[j]
			l.top, l.pitch = y+gap, l.height(s.pitch)
			gap += l.pitch
		}
		y += h
	}
	s.plot.Bottom = y
}

// height is what a line takes, at most the pitch: a line with few things needs
// less.
func (l *summaryLine) height(pitch float64) float64 {
	const one, more = 7.4, 2.8 // mm for the first thing and for each further one
	n := max(len(l.tests), len(l.results), 1)
	return math.Min(pitch, one+more*float64(n-1))
}

// height is what the lines of a stratum take.
func (st *summaryStratum) height(pitch float64) float64 {
	sum := 0.0
	for i := range st.lines {
		sum += st.lines[i].height(pitch)
	}
	return sum
}

// rowHeight is what a stratum needs for its lines and for its name.
func (s *summarySheet) rowHeight(st *summaryStratum, pitch float64) float64 {
	return math.Max(st.height(pitch), float64(len(st.text))*s.f.small.Line()+2)
}

// name lays out the name of a stratum and its OCR in words.
func (s *summarySheet) name(st *summaryStratum) {
	width := 0.27*s.plot.Width() - s.boreholeWidth() - 3
	st.text = stacked(bold(s.f.small).Wrap(st.title(), width, 3))
	st.named = len(st.text)
	st.text = append(st.text, stacked(s.f.small.Wrap(st.ratioWords(), width, 3))...)
}

// boreholeWidth is the room for the names of boreholes.
func (s *summarySheet) boreholeWidth() float64 {
	widest := s.f.small.Width(draw.Text("00.0–00.0 m"))
	for i := range s.in.Profiles {
		widest = math.Max(widest, s.f.small.Width(draw.Text(s.in.Profiles[i].Borehole)))
	}
	return math.Min(widest, 0.11*s.plot.Width())
}

// panel puts a box into the form that axes of the depth sheet take.
func (s *summarySheet) axisAt(box draw.Box, scale axis.Scale, tickers ...axis.Ticker) {
	d := depthSheet{c: s.c, f: s.f}
	d.horizontal(&panel{box: box}, scale, tickers...)
}
