package draw

import (
	"bytes"
	"fmt"
	"io"
	"math"
	"strings"

	svg "github.com/ajstarks/svgo/float"
)

// A Sheet says what a canvas is: its size in mm and what a reader who cannot
// see it is told.
type Sheet struct {
	Width, Height float64 // mm
	ID            string  // prefix of the ids inside, unique in a page that holds several drawings
	Title         string  // what it shows
	Description   string  // what it says: the finding in a sentence
}

// A Point is a place on paper, in mm.
type Point struct{ X, Y float64 }

// A Box is an upright rectangle on paper, in mm.
type Box struct{ Left, Top, Right, Bottom float64 }

// Width returns the width of the box.
func (b Box) Width() float64 { return b.Right - b.Left }

// Height returns the height of the box.
func (b Box) Height() float64 { return b.Bottom - b.Top }

// Inset returns the box made smaller by d on every side.
func (b Box) Inset(d float64) Box { return Box{b.Left + d, b.Top + d, b.Right - d, b.Bottom - d} }

// Overlap returns the area that two boxes share, in mm².
func (b Box) Overlap(o Box) float64 {
	w := math.Min(b.Right, o.Right) - math.Max(b.Left, o.Left)
	h := math.Min(b.Bottom, o.Bottom) - math.Max(b.Top, o.Top)
	if w <= 0 || h <= 0 {
		return 0
	}
	return w * h
}

// Cut returns the part of a line that lies in the box (Liang & Barsky 1984), and
// whether there is any.
func (b Box) Cut(from, to Point) (Point, Point, bool) {
	const shortest = 1e-9 // of the line
	t0, t1 := 0.0, 1.0
	dx, dy := to.X-from.X, to.Y-from.Y
	for _, edge := range [4][2]float64{
		{-dx, from.X - b.Left}, {dx, b.Right - from.X}, {-dy, from.Y - b.Top}, {dy, b.Bottom - from.Y},
	} {
		p, q := edge[0], edge[1]
		switch {
		case p == 0 && q < 0:
			return from, to, false
		case p < 0:
			t0 = math.Max(t0, q/p)
		case p > 0:
			t1 = math.Min(t1, q/p)
		}
	}
	if !(t1-t0 > shortest) {
		return from, to, false
	}
	return Point{from.X + t0*dx, from.Y + t0*dy}, Point{from.X + t1*dx, from.Y + t1*dy}, true
}

// A Canvas takes a drawing and writes it as SVG.
type Canvas struct {
	sheet Sheet
	buf   bytes.Buffer
	svg   *svg.SVG
	err   error
	path  []byte
}

// New returns an empty canvas. A sheet without a size that can be printed is an
// error that Finish returns.
func New(s Sheet) *Canvas {
	c := &Canvas{sheet: s}
	c.svg = svg.New(&trimmer{to: &c.buf})
	if !finite(s.Width, s.Height) || s.Width <= 0 || s.Height <= 0 {
		c.fail("sheet size", s.Width, s.Height)
		return c
	}
	id := identifier(s.ID)
	c.svg.Startraw(
		`width="`+format(s.Width)+`mm"`,
		`height="`+format(s.Height)+`mm"`,
		`viewBox="0 0 `+format(s.Width)+` `+format(s.Height)+`"`,
		`role="img"`,
		`aria-labelledby="`+id+`-title `+id+`-desc"`,
		`font-family="Arial, Helvetica, 'Liberation Sans', sans-serif"`,
		`stroke-linecap="butt"`,
		`stroke-linejoin="round"`,
	)
	fmt.Fprintf(&c.buf, "<title id=\"%s-title\">%s</title>\n", id, escape(clip(s.Title)))
	fmt.Fprintf(&c.buf, "<desc id=\"%s-desc\">%s</desc>\n", id, escape(clip(s.Description)))
	c.Rect(Box{0, 0, s.Width, s.Height}, Pen{}, Fill{Colour: White})
	return c
}

// Err returns the first error of the drawing so far.
func (c *Canvas) Err() error { return c.err }

// Finish closes the drawing and writes it, all or nothing.
func (c *Canvas) Finish(w io.Writer) error {
	if c.err != nil {
		return c.err
	}
	c.svg.End()
	_, err := w.Write(c.buf.Bytes())
	return err
}

// ok keeps the first error where a value cannot be drawn.
func (c *Canvas) ok(what string, values ...float64) bool {
	if c.err != nil {
		return false
	}
	if !finite(values...) {
		c.fail(what, values...)
		return false
	}
	return true
}

func (c *Canvas) fail(what string, values ...float64) {
	if c.err == nil {
		c.err = fmt.Errorf("drawing: %s at %v is not a place on paper", what, values)
	}
}

// Line draws a straight line.
func (c *Canvas) Line(x1, y1, x2, y2 float64, p Pen) {
	if p.Width > 0 && c.ok("line", x1, y1, x2, y2) {
		c.svg.Line(round(x1), round(y1), round(x2), round(y2), attributes(p, Fill{})[1:]...)
	}
}

// Rect draws a rectangle; one without size draws nothing.
func (c *Canvas) Rect(b Box, p Pen, f Fill) {
	if !c.ok("rectangle", b.Left, b.Top, b.Right, b.Bottom) || b.Width() < 0 || b.Height() < 0 {
		return
	}
	// Rounding the corners and not the size makes neighbours meet.
	left, top := round(b.Left), round(b.Top)
	w, h := round(b.Right)-left, round(b.Bottom)-top
	c.svg.Rect(left, top, w, h, attributes(p, f)...)
}

// Circle draws a circle.
func (c *Canvas) Circle(x, y, r float64, p Pen, f Fill) {
	if c.ok("circle", x, y, r) && r > 0 {
		c.svg.Circle(round(x), round(y), round(r), attributes(p, f)...)
	}
}

// Polyline draws a line through points; fewer than two draw nothing.
func (c *Canvas) Polyline(points []Point, p Pen) {
	if p.Width > 0 && c.beginPath(points, 2) {
		c.svg.Path(string(c.path), attributes(p, Fill{})...)
	}
}

// Polygon draws a closed shape; fewer than three points draw nothing.
func (c *Canvas) Polygon(points []Point, p Pen, f Fill) {
	if c.beginPath(points, 3) {
		c.path = append(c.path, 'Z')
		c.svg.Path(string(c.path), attributes(p, f)...)
	}
}

// strokes draws many short lines as one path.
func (c *Canvas) strokes(lines [][2]Point, p Pen) {
	c.path = c.path[:0]
	for _, l := range lines {
		if !c.ok("stroke", l[0].X, l[0].Y, l[1].X, l[1].Y) {
			return
		}
		c.move('M', l[0])
		c.move('L', l[1])
	}
	if len(c.path) > 0 {
		c.svg.Path(string(c.path), attributes(p, Fill{})...)
	}
}

func (c *Canvas) beginPath(points []Point, least int) bool {
	c.path = c.path[:0]
	if len(points) < least {
		return false
	}
	var last Point
	for i, q := range points {
		if !c.ok("path", q.X, q.Y) {
			return false
		}
		q = Point{round(q.X), round(q.Y)}
		switch {
		case i == 0:
			c.move('M', q)
		case q != last:
			c.move('L', q)
		}
		last = q
	}
	return true
}

func (c *Canvas) move(command byte, q Point) {
	c.path = append(c.path, command)
	c.path = appendNumber(c.path, q.X)
	c.path = append(c.path, ' ')
	c.path = appendNumber(c.path, q.Y)
}

// identifier turns any text into a name that may stand in an id.
func identifier(s string) string {
	var b strings.Builder
	for _, r := range s {
		switch {
		case r >= 'a' && r <= 'z', r >= 'A' && r <= 'Z', r >= '0' && r <= '9', r == '-', r == '_':
			b.WriteRune(r)
		default:
			b.WriteByte('-')
		}
		if b.Len() >= 60 {
			break
		}
	}
	if b.Len() == 0 || !isLetter(b.String()[0]) {
		return "figure-" + b.String()
	}
	return b.String()
}

func isLetter(b byte) bool { return b >= 'a' && b <= 'z' || b >= 'A' && b <= 'Z' }
