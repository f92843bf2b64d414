package draw

import "math"

// A Shape is the outline of a data point.
type Shape int

// The shapes. Arrows point to where the true value lies.
const (
	Circle Shape = iota
	Square
	Triangle
	Diamond
	TriangleDown
	Hexagon
	Cross
	Plus
	ArrowRight
	ArrowLeft
	Tick // a short upright stroke
)

// A Marker is a data point: shape and fill say what it is without colour.
type Marker struct {
	Shape  Shape
	Solid  bool    // filled with its colour, else with white
	Colour string  // black where empty
	Size   float64 // mm across; 2 where zero
}

// Marker draws a data point.
func (c *Canvas) Marker(x, y float64, m Marker) {
	if !c.ok("data point", x, y, m.Size) {
		return
	}
	size := m.Size
	if size <= 0 {
		size = 2
	}
	r := size / 2
	pen := Pen{Colour: colour(m.Colour), Width: Medium}
	fill := Fill{Colour: White}
	if m.Solid {
		fill.Colour = colour(m.Colour)
	}
	switch m.Shape {
	case Circle:
		c.Circle(x, y, r, pen, fill)
	case Square:
		s := r * 0.89 // the area of the circle
		c.Rect(Box{x - s, y - s, x + s, y + s}, pen, fill)
	case Triangle:
		c.Polygon(around(x, y, r*1.25, 3, -90), pen, fill)
	case TriangleDown:
		c.Polygon(around(x, y, r*1.25, 3, 90), pen, fill)
	case Diamond:
		c.Polygon(around(x, y, r*1.2, 4, 0), pen, fill)
	case Hexagon:
		c.Polygon(around(x, y, r*1.1, 6, 0), pen, fill)
	case Cross:
		s := r * 0.8
		c.strokes([][2]Point{{{x - s, y - s}, {x + s, y + s}}, {{x - s, y + s}, {x + s, y - s}}}, pen)
	case Plus:
		c.strokes([][2]Point{{{x - r, y}, {x + r, y}}, {{x, y - r}, {x, y + r}}}, pen)
	case Tick:
		c.Line(x, y-r, x, y+r, Pen{Colour: pen.Colour, Width: Thick})
	case ArrowRight:
		c.arrow(x, y, size, 1, pen)
	case ArrowLeft:
		c.arrow(x, y, size, -1, pen)
	}
}

// arrow draws a bar at the value and an arrow from it to where the value lies.
func (c *Canvas) arrow(x, y, size, way float64, p Pen) {
	p.Width = Thick
	tip := x + way*size*1.7
	c.strokes([][2]Point{
		{{x, y - size*0.55}, {x, y + size*0.55}},
		{{x, y}, {tip, y}},
		{{tip - way*size*0.5, y - size*0.35}, {tip, y}},
		{{tip - way*size*0.5, y + size*0.35}, {tip, y}},
	}, p)
}

// around returns n points on a circle, the first at the angle in degrees.
func around(x, y, r float64, n int, first float64) []Point {
	points := make([]Point, n)
	for i := range points {
		a := (first + 360*float64(i)/float64(n)) * math.Pi / 180
		points[i] = Point{x + r*math.Cos(a), y + r*math.Sin(a)}
	}
	return points
}
