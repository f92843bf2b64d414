package sheet

import (
	"fmt"
	"strconv"
	"strings"

	"pastload/profile"
	"pastload/render/draw"
)

// A Page is a paper size with the margins of its frame, in mm.
type Page struct {
	Name                     string
	Width, Height            float64
	Left, Top, Right, Bottom float64
	wide                     bool // the notes stand beside the title block
}

// The pages: A4 upright with a binding margin, A3 lying.
var (
	A4 = Page{Name: "A4", Width: 210, Height: 297, Left: 18, Top: 8, Right: 8, Bottom: 8}
	A3 = Page{Name: "A3", Width: 420, Height: 297, Left: 20, Top: 10, Right: 10, Bottom: 10, wide: true}
)

// PageNamed returns the page of that name.
func PageNamed(name string) (Page, error) {
	for _, p := range []Page{A4, A3} {
		if p.Name == name {
			return p, nil
		}
	}
	return Page{}, fmt.Errorf("page %q is not known; want A4 or A3", name)
}

// frame returns the box inside the margins.
func (p Page) frame() draw.Box {
	return draw.Box{Left: p.Left, Top: p.Top, Right: p.Width - p.Right, Bottom: p.Height - p.Bottom}
}

// fonts are the sizes of text on a page. None is smaller than 7 points.
type fonts struct {
	small, body, heading, title draw.Font
}

// fonts returns larger text for the larger page, which is often looked at from
// further away or printed reduced.
func (p Page) fonts() fonts {
	scale := 1.0
	if p.wide {
		scale = 8.0 / 7
	}
	return fonts{
		small:   draw.Font{Size: 7 * scale},
		body:    draw.Font{Size: 8 * scale},
		heading: draw.Font{Size: 8 * scale, Bold: true},
		title:   draw.Font{Size: 12 * scale, Bold: true},
	}
}

func anchored(f draw.Font, a draw.Anchor) draw.Font {
	f.Anchor = a
	return f
}

func bold(f draw.Font) draw.Font {
	f.Bold = true
	return f
}

func coloured(f draw.Font, c string) draw.Font {
	f.Colour = c
	return f
}

// A Figure is where a sheet stands in a set, for its title block.
type Figure struct {
	Number    string // figure number
	Sheet, Of int    // sheet n of m; blank where 0
	Title     string // what this sheet shows, after the title that the settings give
	Scale     string // drawing scale
	Paper     string
}

// A row of the title block is a small name over a value.
const (
	blockRow    = 6.5
	blockRows   = 4
	blockHeight = blockRow * blockRows
	blockWidth  = 184.0
)

// titleBlock draws the block in the lower right corner of the frame. What is not
// known is left blank, to be filled in by hand.
func titleBlock(c *draw.Canvas, frame draw.Box, t profile.TitleBlock, f Figure) draw.Box {
	box := draw.Box{Left: frame.Right - blockWidth, Top: frame.Bottom - blockHeight, Right: frame.Right, Bottom: frame.Bottom}
	name := t.Title
	if name == "" {
		name = strings.ToUpper(f.Title[:1]) + f.Title[1:]
	} else {
		name += ": " + f.Title
	}
	number := ""
	switch {
	case f.Sheet > 0 && f.Of > 0:
		number = fmt.Sprintf("%d of %d", f.Sheet, f.Of)
	case f.Sheet > 0:
		number = fmt.Sprint(f.Sheet)
	}
	type cell struct {
		name, value string
		width       float64
	}
	rows := [blockRows][]cell{
		{{"Organisation", t.Organisation, 56}, {"Project", t.Project, 84}, {"Project number", t.Number, 44}},
		{{"Client", t.Client, 56}, {"Location", t.Location, 84}, {"Datum, coordinates", joined(t.Datum, t.Coordinates), 44}},
		{{"Title", name, 108}, {"Figure", f.Number, 32}, {"Sheet", number, 22}, {"Paper", f.Paper, 22}},
		{{"Prepared", t.PreparedBy, 26}, {"Checked", t.CheckedBy, 26}, {"Approved", t.ApprovedBy, 26}, {"Date", t.Date, 20}, {"Status", t.Status, 46}, {"Revision", t.Revision, 18}, {"Scale", f.Scale, 22}},
	}
	pen := draw.Pen{Width: draw.Medium}
	label, entry := draw.Font{Size: 7, Colour: "#444444"}, draw.Font{Size: 8, Bold: true}
	y := box.Top
	for _, row := range rows {
		x := box.Left
		for _, cell := range row {
			c.Rect(draw.Box{Left: x, Top: y, Right: x + cell.width, Bottom: y + blockRow}, pen, draw.Fill{})
			c.Text(x+0.8, y+2.6, draw.Text(cell.name), label)
			font := entry
			if font.Width(draw.Text(cell.value)) > cell.width-1.6 {
				font = draw.Font{Size: draw.SmallestPoints}
			}
			c.Text(x+0.8, y+5.7, draw.Text(font.Fit(cell.value, cell.width-1.6)), font)
			x += cell.width
		}
		y += blockRow
	}
	c.Rect(box, draw.Pen{Width: draw.Thick}, draw.Fill{})
	return box
}

func joined(a, b string) string {
	if a == "" || b == "" {
		return a + b
	}
	return a + "; " + b
}

// metres writes a depth or level to the centimetre, as logs do.
func metres(v float64) string { return decimals(v, 2) }

// decimals writes a number with so many decimals.
func decimals(v float64, n int) string {
	if !finite(v) {
		return "?"
	}
	return minus(strconv.FormatFloat(v, 'f', n, 64))
}

// minus gives figures the sign that belongs to them, and zero none.
func minus(s string) string {
	if len(s) == 0 || s[0] != '-' {
		return s
	}
	for _, r := range s[1:] {
		if r != '0' && r != '.' {
			return "−" + s[1:]
		}
	}
	return s[1:]
}
