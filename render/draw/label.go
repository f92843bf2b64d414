package draw

import (
	"math"
	"strings"
)

// A run is a stretch of text at one height: on the line, below or above it.
type run struct {
	text  string
	shift int // -1 subscript, +1 superscript
}

// A Label is a line of text that may hold subscripts and superscripts.
type Label []run

// Text begins a label.
func Text(s string) Label { return Label{}.Add(s) }

// Add returns the label with more plain text at its end.
func (l Label) Add(s string) Label { return l.with(run{clip(s), 0}, s) }

// Sub returns the label with a subscript at its end.
func (l Label) Sub(s string) Label { return l.with(run{clip(s), -1}, s) }

// Sup returns the label with a superscript at its end.
func (l Label) Sup(s string) Label { return l.with(run{clip(s), 1}, s) }

// with keeps the blanks at the ends of a run: they are what parts it from its
// neighbours.
func (l Label) with(r run, raw string) Label {
	if strings.HasPrefix(raw, " ") {
		r.text = " " + r.text
	}
	if len(raw) > 1 && strings.HasSuffix(raw, " ") {
		r.text += " "
	}
	return append(l[:len(l):len(l)], r)
}

// Join returns the label followed by another.
func (l Label) Join(o Label) Label { return append(l[:len(l):len(l)], o...) }

// String returns the text without its heights.
func (l Label) String() string {
	var b strings.Builder
	for _, r := range l {
		b.WriteString(r.text)
	}
	return b.String()
}

// An Anchor says which point of a text its x is.
type Anchor int

// The anchors.
const (
	Start Anchor = iota
	Middle
	End
)

// A Font says how text is set.
type Font struct {
	Size   float64 // points
	Bold   bool
	Colour string // black where empty
	Anchor Anchor
}

// PointMM is the printer's point in mm.
const PointMM = 25.4 / 72

// SmallestPoints is the smallest text that a printed sheet may hold.
const SmallestPoints = 7

// The size and place of subscripts and superscripts, as parts of the size of
// their line: about what typesetting programs use.
const (
	smallSize = 0.72
	subDrop   = 0.18
	supRise   = 0.33
)

// Height returns the height of capitals and figures in mm. Arial's is 0.716 of
// its size.
func (f Font) Height() float64 { return 0.716 * f.Size * PointMM }

// Line returns the distance of lines in mm.
func (f Font) Line() float64 { return 1.18 * f.Size * PointMM }

// Width returns the width of the label in mm.
func (f Font) Width(l Label) float64 {
	w := 0.0
	for _, r := range l {
		w += f.runWidth(r)
	}
	return w
}

func (f Font) runWidth(r run) float64 {
	size := f.Size
	if r.shift != 0 {
		size = f.small()
	}
	return size * PointMM * advance(r.text, f.Bold)
}

// small returns the size of subscripts and superscripts: never below what can
// still be read in print, unless the line itself is.
func (f Font) small() float64 {
	return math.Max(smallSize*f.Size, math.Min(f.Size, SmallestPoints))
}

// Text draws a label with its baseline at y.
func (c *Canvas) Text(x, y float64, l Label, f Font) {
	if !c.ok("text", x, y, f.Size) || f.Size <= 0 {
		return
	}
	if len(l) == 1 && l[0].shift == 0 {
		if text := strings.Trim(l[0].text, " "); text != "" {
			c.run(x, y, text, f.Size, f, f.Anchor)
		}
		return
	}
	// Importers lay out anchored text of several parts each in its own way: the
	// parts are placed here.
	switch f.Anchor {
	case Middle:
		x -= f.Width(l) / 2
	case End:
		x -= f.Width(l)
	}
	blank := advance(" ", f.Bold)
	for _, r := range l {
		size, base := f.Size, y
		switch r.shift {
		case -1:
			size, base = f.small(), y+subDrop*f.Size*PointMM
		case 1:
			size, base = f.small(), y-supRise*f.Size*PointMM
		}
		text := strings.TrimLeft(r.text, " ")
		lead := float64(len(r.text)-len(text)) * blank * size * PointMM
		if text = strings.TrimRight(text, " "); text != "" {
			c.run(x+lead, base, text, size, f, Start)
		}
		x += f.runWidth(r)
	}
}

func (c *Canvas) run(x, y float64, text string, size float64, f Font, a Anchor) {
	attrs := []string{`font-size="` + format(size*PointMM) + `"`, `fill="` + colour(f.Colour) + `"`}
	if f.Bold {
		attrs = append(attrs, `font-weight="bold"`)
	}
	switch a {
	case Middle:
		attrs = append(attrs, `text-anchor="middle"`)
	case End:
		attrs = append(attrs, `text-anchor="end"`)
	}
	c.svg.Text(round(x), round(y), text, attrs...)
}

// Bounds returns the box that a label takes, drawn at x, y.
func (f Font) Bounds(x, y float64, l Label) Box {
	w := f.Width(l)
	switch f.Anchor {
	case Middle:
		x -= w / 2
	case End:
		x -= w
	}
	return Box{x, y - f.Height(), x + w, y + subDrop*f.Size*PointMM}
}

// Halo draws a label on a white rectangle, for text across lines.
func (c *Canvas) Halo(x, y float64, l Label, f Font) {
	if len(l) == 0 || !c.ok("text", x, y) {
		return
	}
	c.Rect(f.Bounds(x, y, l).Inset(-0.25), Pen{}, Fill{Colour: White})
	c.Text(x, y, l, f)
}
