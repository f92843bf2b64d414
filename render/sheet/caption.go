package sheet

import "pastload/render/draw"

// A keyItem explains one symbol.
type keyItem struct {
	width  float64 // mm that the symbol takes
	symbol func(c *draw.Canvas, x, y float64)
	label  draw.Label
}

// keyMarker explains a data point.
func keyMarker(m draw.Marker, l draw.Label) keyItem {
	return keyItem{2.6, func(c *draw.Canvas, x, y float64) { c.Marker(x, y, m) }, l}
}

// keyLine explains a line.
func keyLine(p draw.Pen, l draw.Label) keyItem {
	return keyItem{9, func(c *draw.Canvas, x, y float64) { c.Line(x-4.5, y, x+4.5, y, p) }, l}
}

// keyBand explains a tint.
func keyBand(edge draw.Pen, fill draw.Fill, l draw.Label) keyItem {
	return keyItem{6, func(c *draw.Canvas, x, y float64) {
		c.Rect(draw.Box{Left: x - 3, Top: y - 1, Right: x + 3, Bottom: y + 1}, edge, fill)
	}, l}
}

// keyRange explains a bar with caps.
func keyRange(p draw.Pen, l draw.Label) keyItem {
	return keyItem{4, func(c *draw.Canvas, x, y float64) {
		c.Line(x-2, y, x+2, y, p)
		c.Line(x-2, y-0.7, x-2, y+0.7, p)
		c.Line(x+2, y-0.7, x+2, y+0.7, p)
	}, l}
}

// A caption is the key and the definitions of a sheet, laid out for a width
// before anything is drawn, so that the drawing gets the room that is left.
type caption struct {
	rows  [][]keyItem
	lines []string
	font  draw.Font
}

const keyGap = 4.0 // mm between items

// newCaption lays out a key and paragraphs of at most so many lines each.
func newCaption(f draw.Font, width float64, items []keyItem, paragraphs []string, most int) caption {
	c := caption{font: f}
	x := 0.0
	for _, item := range items {
		w := item.width + 1.2 + f.Width(item.label)
		if len(c.rows) == 0 || x+w > width {
			c.rows = append(c.rows, nil)
			x = 0
		}
		c.rows[len(c.rows)-1] = append(c.rows[len(c.rows)-1], item)
		x += w + keyGap
	}
	for _, p := range paragraphs {
		c.lines = append(c.lines, f.Wrap(p, width, most)...)
	}
	return c
}

func (c caption) rowHeight() float64 { return 1.4 * c.font.Line() }

// height returns the room that the caption takes, in mm.
func (c caption) height() float64 {
	return float64(len(c.rows))*c.rowHeight() + float64(len(c.lines))*c.font.Line() + 1
}

// draw writes the caption from a corner downwards and returns where it ends.
func (c caption) draw(canvas *draw.Canvas, left, top float64) float64 {
	y := top
	for _, row := range c.rows {
		y += c.rowHeight()
		x := left
		for _, item := range row {
			item.symbol(canvas, x+item.width/2, y-0.8-c.font.Height()/2)
			canvas.Text(x+item.width+1.2, y-0.8, item.label, c.font)
			x += item.width + 1.2 + c.font.Width(item.label) + keyGap
		}
	}
	for _, line := range c.lines {
		y += c.font.Line()
		canvas.Text(left, y, draw.Text(line), c.font)
	}
	return y
}
