package sheet

import (
	"errors"
	"fmt"
	"io"
	"math"
	"sort"
	"strings"

	"pastload/profile"
	"pastload/render/axis"
	"pastload/render/draw"
)

// ErrNoStrata is returned where no borehole has a test or a result to summarise.
var ErrNoStrata = errors.New("no stratum has a test or a result")

// SummaryInput is what a stratum summary is drawn from.
type SummaryInput struct {
	Profiles  []profile.BoreholeProfile
	Settings  profile.Settings
	Page      Page   // A4 where zero
	Figure    string // figure number, "" to be filled in by hand
	Sheet, Of int    // sheet n of m, 0 to be filled in by hand
	Sources   string // where the data came from
	ID        string // prefix of the ids in the drawing
}

// Summary writes the stratum summary: for each stratum, by its name, what all
// boreholes have in it of index tests, σ′p, OCR and compression index, one line
// per borehole and one shape for each of the first six. The error wraps
// ErrNoStrata where there is nothing to draw, or is the writer's or about the zone
// limits; then nothing is written.
func Summary(w io.Writer, in SummaryInput) error {
	if in.Page.Width == 0 {
		in.Page = A4
	}
	if in.ID == "" {
		in.ID = "summary"
	}
	if err := rising(in.Settings.Limits); err != nil {
		return fmt.Errorf("stratum summary: %w", err)
	}
	s := &summarySheet{in: in, f: in.Page.fonts()}
	s.gather()
	if len(s.strata) == 0 {
		return fmt.Errorf("stratum summary: %w", ErrNoStrata)
	}
	s.c = draw.New(draw.Sheet{
		Width: in.Page.Width, Height: in.Page.Height, ID: in.ID,
		Title: "Summary by stratum", Description: s.describe(),
	})
	s.layOut()
	s.drawHeader()
	s.drawRows()
	s.drawPanels()
	s.caption.draw(s.c, s.captionBox.Left, s.captionBox.Top)
	titleBlock(s.c, in.Page.frame(), in.Settings.Title, Figure{
		Number: in.Figure, Sheet: in.Sheet, Of: in.Of, Title: "summary by stratum", Scale: "–", Paper: in.Page.Name,
	})
	return s.c.Finish(w)
}

// boreholeMarks are the shapes of the first six boreholes; all others share the
// last one.
var boreholeMarks = []series{
	{name: "1", point: true, marker: draw.Marker{Shape: draw.Circle, Solid: true}},
	{name: "2", point: true, marker: draw.Marker{Shape: draw.Square, Colour: draw.Blue}},
	{name: "3", point: true, marker: draw.Marker{Shape: draw.Triangle, Solid: true, Colour: draw.Red}},
	{name: "4", point: true, marker: draw.Marker{Shape: draw.Diamond}},
	{name: "5", point: true, marker: draw.Marker{Shape: draw.Hexagon, Solid: true, Colour: draw.Blue}},
	{name: "6", point: true, marker: draw.Marker{Shape: draw.TriangleDown, Colour: draw.Red}},
	{name: "others", point: true, marker: draw.Marker{Shape: draw.Plus}},
}

func boreholeMark(i int) draw.Marker {
	m := boreholeMarks[min(i, len(boreholeMarks)-1)].marker
	m.Size = 1.7
	return m
}

// A summaryStratum is what all boreholes have in the strata of one name.
type summaryStratum struct {
	name  string
	lines []summaryLine // one for each borehole that has something
	box   draw.Box      // its row on the sheet
}

// A summaryLine is what one borehole has in a stratum.
type summaryLine struct {
	borehole         int
	tests            []profile.Test
	results          []profile.DerivedResult
	top, pitch       float64 // on the sheet, mm
	shallow, deepest float64 // depths of what it has, m
}

// at returns the height on the sheet of a depth: the lines are drawn from the
// shallowest to the deepest thing that a borehole has in the stratum.
func (l *summaryLine) at(depth float64) float64 {
	const margin = 1.5 // mm
	if l.deepest-l.shallow < 1e-9 {
		return l.top + l.pitch/2
	}
	return l.top + margin + (depth-l.shallow)/(l.deepest-l.shallow)*(l.pitch-2*margin)
}

// summarySheet is a stratum summary being drawn.
type summarySheet struct {
	in      SummaryInput
	c       *draw.Canvas
	f       fonts
	strata  []summaryStratum
	without int     // strata that had no room
	pitch   float64 // mm between the lines of boreholes

	plot       draw.Box
	names      draw.Box
	index      draw.Box
	stress     draw.Box
	ratio      draw.Box
	slope      draw.Box
	caption    caption
	captionBox draw.Box
}

// gather collects tests and results by the name of their stratum, in order of the
// depth at which a name first stands in any borehole.
func (s *summarySheet) gather() {
	tops := map[string]float64{}
	rows := map[string]*summaryStratum{}
	row := func(name string) *summaryStratum {
		key := strings.ToLower(strings.TrimSpace(name))
		if rows[key] == nil {
			rows[key] = &summaryStratum{name: strings.TrimSpace(name)}
		}
		return rows[key]
	}
	for i := range s.in.Profiles {
		p := &s.in.Profiles[i]
		line := func(name string, depth float64) *summaryLine {
			r := row(name)
			key := strings.ToLower(r.name)
			if top, ok := tops[key]; !ok || depth < top {
				tops[key] = depth
			}
			if n := len(r.lines); n == 0 || r.lines[n-1].borehole != i {
				r.lines = append(r.lines, summaryLine{borehole: i, shallow: depth, deepest: depth})
			}
			l := &r.lines[len(r.lines)-1]
			l.shallow, l.deepest = math.Min(l.shallow, depth), math.Max(l.deepest, depth)
			return l
		}
		for _, t := range p.Tests {
			if _, ok := testValue(&t); ok && shown(t.Depth) {
				l := line(t.Stratum, t.Depth)
				l.tests = append(l.tests, t)
			}
		}
		for _, r := range p.Results {
			if shown(r.Depth) && hasIndex(&r) {
				l := line(r.Stratum, r.Depth)
				l.results = append(l.results, r)
			}
		}
	}
	for key := range rows {
		s.strata = append(s.strata, *rows[key])
	}
	sort.Slice(s.strata, func(a, b int) bool {
		ka, kb := strings.ToLower(s.strata[a].name), strings.ToLower(s.strata[b].name)
		if tops[ka] != tops[kb] {
			return tops[ka] < tops[kb]
		}
		return ka < kb
	})
}

// hasIndex reports whether a result has anything that the summary shows.
func hasIndex(r *profile.DerivedResult) bool {
	if _, ok := value(r.MeasuredCc); ok || known(r.CorrelatedCc) {
		return true
	}
	if r.Result == nil {
		return false
	}
	for _, n := range []profile.Number{r.Result.WaterContent, r.Result.LiquidLimit, r.Result.PlasticLimit} {
		if _, ok := value(n); ok {
			return true
		}
	}
	return false
}

// describe states the result in words.
func (s *summarySheet) describe() string {
	out := counted(len(s.strata), "stratum", "strata") + " in " + counted(len(s.in.Profiles), "borehole", "boreholes") + "."
	for i := range s.strata {
		if words := s.strata[i].ratioWords(); words != "" {
			out += " " + s.strata[i].title() + ": " + words + "."
		}
	}
	return out
}

// title is the name of the stratum, or what to call it.
func (st *summaryStratum) title() string {
	if st.name == "" {
		return "unnamed"
	}
	return st.name
}

// ratioWords gives the OCR of the tests that count: their range and median.
func (st *summaryStratum) ratioWords() string {
	var all []float64
	for _, l := range st.lines {
		for i := range l.tests {
			t := &l.tests[i]
			if v, ok := testRatio(t); ok && !leftOut(t) && t.Bound == profile.Exact {
				all = append(all, v)
			}
		}
	}
	switch len(all) {
	case 0:
		return ""
	case 1:
		return "OCR " + ratio(all[0])
	}
	sort.Float64s(all)
	median := all[len(all)/2]
	if len(all)%2 == 0 {
		median = (all[len(all)/2-1] + all[len(all)/2]) / 2
	}
	return fmt.Sprintf("OCR %s to %s, median %s", ratio(all[0]), ratio(all[len(all)-1]), ratio(median))
}

// testRatio returns σ′p/σ′v0 of a test.
func testRatio(t *profile.Test) (float64, bool) {
	e, ok1 := value(t.Effective)
	v, ok2 := testValue(t)
	if !ok1 || !ok2 || e <= 0 {
		return 0, false
	}
	r := v / e
	return r, finite(r) && r > 0
}

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
	return math.Max(st.height(pitch), float64(len(s.nameLines(st)))*s.f.small.Line()+2)
}

// nameLines are the name of a stratum and its OCR in words.
func (s *summarySheet) nameLines(st *summaryStratum) []draw.Label {
	width := 0.27*s.plot.Width() - s.boreholeWidth() - 3
	lines := stacked(bold(s.f.small).Wrap(st.title(), width, 3))
	return append(lines, stacked(s.f.small.Wrap(st.ratioWords(), width, 3))...)
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
