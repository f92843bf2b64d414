package draw

// The colours: black first, then three that stay apart when printed grey, and
// greys. They are the "high-contrast" set of Tol (2021), as published. Amber is too pale for lines and text.
const (
	Black = "#000000"
	White = "#FFFFFF"
	Blue  = "#004488"
	Red   = "#BB5566"
	Amber = "#DDAA33" // fills only
	Grey  = "#777777"
	Pale  = "#CCCCCC" // grids only
)

// The line widths in mm: grid, axis, data and heaviest.
const (
	Hair   = 0.13
	Thin   = 0.18
	Medium = 0.25
	Thick  = 0.35
	Heavy  = 0.6
)

// A Dash is a pattern of a line, sized in mm on paper.
type Dash int

// The dashes that stay apart in black and white.
const (
	Solid Dash = iota
	Dashed
	Dotted
	DashDot
	LongDash
)

// array is the stroke-dasharray, or "" for a solid line.
func (d Dash) array() string {
	switch d {
	case Dashed:
		return "2.4 1"
	case Dotted:
		return "0.5 0.7"
	case DashDot:
		return "3 0.8 0.6 0.8"
	case LongDash:
		return "5 1.4"
	}
	return ""
}

// A Pen draws lines. The zero colour is black; a pen without width draws
// nothing.
type Pen struct {
	Colour string
	Width  float64 // mm
	Dash   Dash
}

// A Fill fills shapes. The zero Fill fills nothing; zero opacity is opaque.
type Fill struct {
	Colour  string
	Opacity float64 // 0 < opacity < 1 for see-through fills
}

// attributes of a shape that is drawn by a pen and filled.
func attributes(p Pen, f Fill) []string {
	a := make([]string, 0, 5)
	if f.Colour == "" {
		a = append(a, `fill="none"`)
	} else {
		a = append(a, `fill="`+colour(f.Colour)+`"`)
		if f.Opacity > 0 && f.Opacity < 1 {
			a = append(a, `fill-opacity="`+format(f.Opacity)+`"`)
		}
	}
	if p.Width <= 0 {
		return append(a, `stroke="none"`)
	}
	a = append(a, `stroke="`+colour(p.Colour)+`"`, `stroke-width="`+format(p.Width)+`"`)
	if d := p.Dash.array(); d != "" {
		a = append(a, `stroke-dasharray="`+d+`"`)
	}
	return a
}

// colour returns c when it is #RRGGBB, else black: nothing else may enter an
// attribute.
func colour(c string) string {
	if len(c) != 7 || c[0] != '#' {
		return Black
	}
	for _, r := range c[1:] {
		if (r < '0' || r > '9') && (r < 'A' || r > 'F') && (r < 'a' || r > 'f') {
			return Black
		}
	}
	return c
}
