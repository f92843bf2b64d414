package sheet

import (
	"errors"
	"fmt"
	"io"
	"math"
	"sort"
	"strings"

	"pastload/profile"
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
	text  []draw.Label  // its name and its OCR in words
	named int           // how many of these are the name
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
