// Package draw is a canvas in millimetres that writes a narrow profile of SVG:
// the part that browsers, word processors and printers read alike.
//
// The profile: presentation attributes only, no style sheet, class, pattern,
// clip path, marker, gradient, use or transform; colours as #RRGGBB with
// fill-opacity; every run of text one plain <text>; text with subscripts as
// separate start-anchored runs whose places come from an embedded width table.
// Hatching is drawn as strokes that are cut to their box here.
//
// Lengths are mm on paper, x to the right and y downwards from the upper left
// corner; text sizes are printer's points. Coordinates are rounded once, to
// 0.01 mm, so that the same drawing is the same bytes on every machine. A value
// that is not finite is never written: the canvas keeps its first error and
// Finish returns it, having written nothing.
//
//	c := draw.New(draw.Sheet{Width: 210, Height: 297, ID: "figure1", Title: "BH1"})
//	c.Line(20, 20, 190, 20, draw.Pen{Width: 0.25})
//	c.Text(20, 18, draw.Text("σ′").Sub("v0").Add(" (kPa)"), draw.Font{Size: 8})
//	err := c.Finish(w)
//
// The advance widths are those of Arial, shared by Helvetica and Liberation Sans,
// so that a drawing is laid out alike on machines that have any one of them.
package draw
