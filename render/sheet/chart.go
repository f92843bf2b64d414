package sheet

import (
	"math"

	"pastload/render/axis"
	"pastload/render/draw"
)

// A chart is a frame with a scale across and one upright, in which places are
// given in the values of the scales. What lies outside is cut off.
type chart struct {
	c    *draw.Canvas
	f    fonts
	box  draw.Box
	x, y axis.Scale
}

// at returns the place of a value, inside the frame or not.
func (ch *chart) at(x, y float64) draw.Point { return draw.Point{X: ch.x.At(x), Y: ch.y.At(y)} }

// holds reports whether a place is inside the frame.
func (ch *chart) holds(p draw.Point) bool {
	const slack = 1e-6
	return p.X >= ch.box.Left-slack && p.X <= ch.box.Right+slack && p.Y >= ch.box.Top-slack && p.Y <= ch.box.Bottom+slack
}

// polyline draws a line through places, cut to the frame, and returns what is
// left of it.
func (ch *chart) polyline(points []draw.Point, pen draw.Pen) []draw.Point {
	var line, all []draw.Point
	flush := func() {
		ch.c.Polyline(line, pen)
		all = append(all, line...)
		line = nil
	}
	for i := 1; i < len(points); i++ {
		a, b, ok := ch.box.Cut(points[i-1], points[i])
		if !ok {
			flush()
			continue
		}
		if len(line) == 0 || line[len(line)-1] != a {
			flush()
			line = append(line, a)
		}
		line = append(line, b)
	}
	flush()
	return all
}

// across draws the axis at the foot of the frame, with its grid and name.
func (ch *chart) across(t axis.Ticker, name draw.Label) {
	low, high := ch.x.Ends()
	for _, tick := range t.Ticks(low, high) {
		x := ch.x.At(tick.Value)
		inside := x > ch.box.Left+0.2 && x < ch.box.Right-0.2
		if inside {
			ch.c.Line(x, ch.box.Top, x, ch.box.Bottom, draw.Pen{Colour: draw.Pale, Width: draw.Hair})
		}
		if tick.Label == "" {
			ch.c.Line(x, ch.box.Bottom, x, ch.box.Bottom+0.8, draw.Pen{Width: draw.Hair})
			continue
		}
		ch.c.Line(x, ch.box.Bottom, x, ch.box.Bottom+1.4, draw.Pen{Width: draw.Thin})
		ch.c.Text(x, ch.box.Bottom+2+ch.f.small.Height(), draw.Text(tick.Label), anchored(ch.f.small, draw.Middle))
	}
	ch.c.Text((ch.box.Left+ch.box.Right)/2, ch.box.Bottom+3.2+ch.f.small.Height()+ch.f.body.Height(), name, anchored(ch.f.body, draw.Middle))
}

// upright draws the axis at the left of the frame, with its grid; its name
// stands above, so that nobody has to turn the paper.
func (ch *chart) upright(t axis.Ticker, name draw.Label) {
	low, high := ch.y.Ends()
	for _, tick := range t.Ticks(math.Min(low, high), math.Max(low, high)) {
		y := ch.y.At(tick.Value)
		if tick.Label == "" {
			ch.c.Line(ch.box.Left-0.8, y, ch.box.Left, y, draw.Pen{Width: draw.Hair})
			continue
		}
		if y > ch.box.Top+0.2 && y < ch.box.Bottom-0.2 {
			ch.c.Line(ch.box.Left, y, ch.box.Right, y, draw.Pen{Colour: draw.Pale, Width: draw.Hair})
		}
		ch.c.Line(ch.box.Left-1.4, y, ch.box.Left, y, draw.Pen{Width: draw.Thin})
		ch.c.Text(ch.box.Left-2, y+ch.f.small.Height()/2, draw.Text(tick.Label), anchored(ch.f.small, draw.End))
	}
	ch.c.Text(ch.box.Left-6, ch.box.Top-2, name, ch.f.body)
}

// opposite draws an axis at the right of the frame for another scale.
func (ch *chart) opposite(s axis.Scale, t axis.Ticker, name draw.Label) {
	low, high := s.Ends()
	for _, tick := range t.Ticks(math.Min(low, high), math.Max(low, high)) {
		y := s.At(tick.Value)
		if y < ch.box.Top-1e-6 || y > ch.box.Bottom+1e-6 {
			continue
		}
		if tick.Label == "" {
			ch.c.Line(ch.box.Right, y, ch.box.Right+0.8, y, draw.Pen{Width: draw.Hair})
			continue
		}
		ch.c.Line(ch.box.Right, y, ch.box.Right+1.4, y, draw.Pen{Width: draw.Thin})
		ch.c.Text(ch.box.Right+2, y+ch.f.small.Height()/2, draw.Text(tick.Label), ch.f.small)
	}
	ch.c.Text(ch.box.Right+8, ch.box.Top-2, name, anchored(ch.f.body, draw.End))
}

// frame draws the frame over what is in it.
func (ch *chart) frame() { ch.c.Rect(ch.box, draw.Pen{Width: draw.Medium}, draw.Fill{}) }
