package sheet

import (
	"math"

	"pastload/render/draw"
)

// drawStrata draws the log: a pattern, the name written beside it, and water.
func (d *depthSheet) drawStrata(p *panel) {
	log, names := strataColumns(p)
	for _, s := range d.in.Borehole.Strata {
		box := draw.Box{Left: log.Left, Top: d.y.At(s.Top), Right: log.Right, Bottom: d.y.At(s.Base)}
		soil := s.Soil
		if soil == "" {
			soil = s.Name + " " + s.Description
		}
		first, second := draw.PatternOf(soil)
		d.c.Hatch(box, first, second)
		d.c.Rect(box, draw.Pen{Width: draw.Thin}, draw.Fill{})
	}
	if v, ok := d.waterTable(); ok && v <= d.base {
		d.waterMark(log.Right-2.2, d.y.At(v))
	}
	placed, _ := d.named(p)
	d.rules(placed, log.Right, p.box.Right, d.strataTops(), draw.Pen{Colour: draw.Grey, Width: draw.Thin})
	drawNotes(d.c, placed, log.Right, names)
}

// strataColumns parts the panel into the log and where the names begin.
func strataColumns(p *panel) (log draw.Box, names float64) {
	column := math.Min(0.27*p.box.Width(), 12)
	log = draw.Box{Left: p.box.Left, Top: p.box.Top, Right: p.box.Left + column, Bottom: p.box.Bottom}
	return log, log.Right + 1.9
}

// named places the names of the strata and of the water table, and counts those
// without room.
func (d *depthSheet) named(p *panel) ([]note, int) {
	_, names := strataColumns(p)
	width := p.box.Right - names - 0.5
	water := d.waterNote(width)
	return fullest(p.box, func(most int) []note { return append(d.strataNotes(width, most), water...) })
}

// waterNote returns the label of the water table.
func (d *depthSheet) waterNote(width float64) []note {
	v, ok := d.waterTable()
	if !ok || v > d.base {
		return nil
	}
	y := d.y.At(v)
	text := "water " + metres(v) + "\u00a0m"
	if v < 0 {
		text = "water " + metres(-v) + "\u00a0m above ground"
	}
	return []note{{top: y - 0.1, base: y + 0.1, font: coloured(d.f.small, draw.Blue), rank: math.Inf(1),
		lines: stacked(d.f.small.Wrap(text, width, 2))}}
}

// fullest lays out notes as fully as the height of a box allows without moving
// any far from where it belongs: at first with many lines each, then with fewer.
func fullest(box draw.Box, with func(most int) []note) (placed []note, left int) {
	const far = 14 // mm
	for _, most := range []int{6, 4, 3, 2, 1} {
		placed, left = spread(with(most), box.Top, box.Bottom)
		if left == 0 && moved(placed) < far {
			break
		}
	}
	return placed, left
}

// rules draws boundaries beside a column, but for those that a label stands on.
func (d *depthSheet) rules(notes []note, from, to float64, depths []float64, pen draw.Pen) {
	for _, depth := range depths {
		y := d.y.At(depth)
		free := true
		for _, n := range notes {
			free = free && (y < n.y-n.height()/2 || y > n.y+n.height()/2)
		}
		if free {
			d.c.Line(from, y, to, y, pen)
		}
	}
}

// strataTops returns the depths of the boundaries between strata, as far as they
// can be drawn apart.
func (d *depthSheet) strataTops() []float64 {
	const apart = 1.0 // mm; nearer boundaries would grey the panels
	var tops []float64
	last := math.Inf(-1)
	for i, s := range d.in.Borehole.Strata {
		if y := d.y.At(s.Top); i > 0 && y-last >= apart {
			tops = append(tops, s.Top)
			last = y
		}
	}
	return tops
}

// strataNotes writes the names of the strata in at most so many lines, with
// their depths where there is room for them.
func (d *depthSheet) strataNotes(width float64, most int) []note {
	var notes []note
	for _, s := range d.in.Borehole.Strata {
		n := note{top: d.y.At(s.Top), base: d.y.At(s.Base), font: d.f.small, rank: s.Base - s.Top}
		name := s.Name
		if name == "" {
			name = s.Soil
		}
		lines := most
		if roomy := int((n.base - n.top) / d.f.small.Line()); roomy > lines {
			lines = min(roomy, 6)
		}
		n.lines = stacked(d.f.small.Wrap(name, width, lines))
		if most == 6 || n.base-n.top > n.height()+d.f.small.Line() {
			depths := draw.Text(metres(s.Top) + "–" + metres(s.Base) + " m")
			if n.font.Width(depths) > width {
				depths = draw.Text(metres(s.Top) + "–" + metres(s.Base))
			}
			n.lines = append(n.lines, depths)
		}
		if len(n.lines) > 0 {
			notes = append(notes, n)
		}
	}
	return notes
}

// waterMark draws the water table: a triangle standing on its tip.
func (d *depthSheet) waterMark(x, y float64) {
	d.c.Polygon([]draw.Point{{X: x, Y: y}, {X: x - 1.5, Y: y - 2.4}, {X: x + 1.5, Y: y - 2.4}}, draw.Pen{Colour: draw.Blue, Width: draw.Medium}, draw.Fill{Colour: draw.White})
	for i, w := range []float64{2, 1.3, 0.6} {
		dy := float64(i) * 0.6
		d.c.Line(x-w, y+dy, x+w, y+dy, draw.Pen{Colour: draw.Blue, Width: draw.Medium})
	}
}
