package sheet

import (
	"pastload/profile"
	"pastload/render/draw"
)

// A series is how one kind of data is drawn and what the key calls it.
type series struct {
	name   string
	marker draw.Marker
	point  bool // drawn as points, else as a line
	pen    draw.Pen
}

// ungraded is the grade of a test that nobody graded.
const ungraded = "not graded"

// The series of tests by grade. Shape and fill tell them apart without colour.
var grades = []series{
	{name: "A", point: true, marker: draw.Marker{Shape: draw.Circle, Solid: true}},
	{name: "B", point: true, marker: draw.Marker{Shape: draw.Square, Solid: true}},
	{name: "C", point: true, marker: draw.Marker{Shape: draw.Triangle}},
	{name: ungraded, point: true, marker: draw.Marker{Shape: draw.Diamond}},
}

// gradeSeries returns how a test of a grade is drawn.
func gradeSeries(grade string) series {
	for _, s := range grades {
		if s.name == grade {
			return s
		}
	}
	return grades[len(grades)-1]
}

// The lines of the depth sheet: each its own dash.
var (
	totalLine     = series{name: "total stress", pen: draw.Pen{Width: draw.Medium, Dash: draw.LongDash}}
	poreLine      = series{name: "pore pressure", pen: draw.Pen{Colour: draw.Blue, Width: draw.Medium, Dash: draw.Dotted}}
	effectiveLine = series{name: "effective stress", pen: draw.Pen{Width: 0.45}}
	historyLine   = series{name: "preconsolidation stress", pen: draw.Pen{Colour: draw.Blue, Width: draw.Thick, Dash: draw.DashDot}}
	designLine    = series{name: "adopted", pen: draw.Pen{Colour: draw.Red, Width: draw.Heavy, Dash: draw.Dashed}}
)

// bandFill is the tint of the 5–95 % band; its edges are drawn too, so that it
// survives a copier.
var (
	bandFill = draw.Fill{Colour: draw.Blue, Opacity: 0.14}
	bandEdge = draw.Pen{Colour: draw.Blue, Width: draw.Hair}
)

// zoneTint returns the tint of a zone: light enough to read on, and apart from
// its neighbours in grey.
func zoneTint(z profile.Zone) draw.Fill {
	switch z {
	case profile.Underconsolidated:
		return draw.Fill{Colour: "#EBCFD3"}
	case profile.NormallyConsolidated:
		return draw.Fill{Colour: "#FBF6EA"}
	case profile.LightlyOverconsolidated:
		return draw.Fill{Colour: "#E4EAF1"}
	case profile.HeavilyOverconsolidated:
		return draw.Fill{Colour: "#C6D3E1"}
	}
	return draw.Fill{}
}
