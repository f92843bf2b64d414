package sheet

import (
	"fmt"
	"math"

	"pastload/render/axis"
	"pastload/render/draw"
)

// header writes what the sheet is and where the borehole stands.
func (d *depthSheet) header() {
	b := &d.in.Borehole
	x, y := d.frame.Left, d.frame.Top
	what := draw.Text("Stress history with depth")
	room := d.frame.Width() - body.Width(what) - 6
	d.c.Text(x, y+4.5, draw.Text(title.Fit("Borehole "+d.in.name(), room)), title)
	d.c.Text(d.frame.Right, y+4.5, what, anchored(bold(body), draw.End))
	var parts []string
	if v, ok := d.groundLevel(); ok {
		s := "ground level " + metres(v) + " m"
		if datum := d.in.Settings.Title.Datum; datum != "" {
			s += " " + datum
		}
		parts = append(parts, s)
	}
	east, ok1 := value(b.Easting)
	north, ok2 := value(b.Northing)
	if ok1 && ok2 {
		parts = append(parts, fmt.Sprintf("E %.1f, N %.1f", east, north))
	}
	if b.Drilled != "" {
		parts = append(parts, "drilled "+b.Drilled)
	}
	if b.Remark != "" {
		parts = append(parts, b.Remark)
	}
	line := ""
	for i, p := range parts {
		if i > 0 {
			line += " · "
		}
		line += p
	}
	scale := fmt.Sprintf("depth scale 1:%.0f at %s", d.scale, d.in.Page.Name)
	d.c.Text(d.frame.Right, y+8.5, draw.Text(scale), anchored(small, draw.End))
	d.c.Text(x, y+8.5, draw.Text(small.Fit(line, d.frame.Width()-small.Width(draw.Text(scale))-4)), small)
}

// background draws what runs through all panels: the depth grid and the
// boundaries of the strata.
func (d *depthSheet) background() {
	left, right := d.panels[0].box.Right, d.plot.Right
	if last := d.panels[len(d.panels)-1]; last.bare {
		right = last.box.Left
	}
	for _, t := range d.step.Ticks(d.top, d.base) {
		if t.Label != "" {
			d.c.Line(left, d.y.At(t.Value), right, d.y.At(t.Value), draw.Pen{Colour: draw.Pale, Width: draw.Hair})
		}
	}
}

// boundaries draws the boundaries of the strata through a panel.
func (d *depthSheet) boundaries(p *panel) {
	for i, s := range d.in.Borehole.Strata {
		if i > 0 && finite(s.Top) {
			y := d.y.At(s.Top)
			d.c.Line(p.box.Left, y, p.box.Right, y, draw.Pen{Colour: draw.Grey, Width: draw.Thin})
		}
	}
}

// edges draws the frames of the panels and their titles, over everything else.
func (d *depthSheet) edges() {
	top := d.frame.Top + headerHeight
	for _, p := range d.panels {
		if !p.bare {
			d.c.Rect(p.box, draw.Pen{Width: draw.Medium}, draw.Fill{})
			d.c.Rect(draw.Box{Left: p.box.Left, Top: top, Right: p.box.Right, Bottom: p.box.Top}, draw.Pen{Width: draw.Medium}, draw.Fill{})
		}
		x := (p.box.Left + p.box.Right) / 2
		d.c.Text(x, top+3.5, p.title, anchored(heading, draw.Middle))
		d.c.Text(x, top+7, p.unit, anchored(small, draw.Middle))
	}
	// Ground level: the heaviest horizontal.
	left, right := d.panels[0].box.Right, d.plot.Right
	if last := d.panels[len(d.panels)-1]; last.bare {
		right = last.box.Left
	}
	d.c.Line(left, d.y.At(0), right, d.y.At(0), draw.Pen{Width: draw.Thick})
}

// drawDepths draws the depth axis.
func (d *depthSheet) drawDepths(p *panel) {
	x := p.box.Right
	for _, t := range d.step.Ticks(d.top, d.base) {
		y := d.y.At(t.Value)
		if t.Label == "" {
			d.c.Line(x-0.9, y, x, y, draw.Pen{Width: draw.Hair})
			continue
		}
		d.c.Line(x-1.6, y, x, y, draw.Pen{Width: draw.Medium})
		d.c.Text(x-2.1, y+body.Height()/2, draw.Text(t.Label), anchored(body, draw.End))
	}
	d.c.Line(x, d.plot.Top, x, d.plot.Bottom, draw.Pen{Width: draw.Medium})
}

// drawLevels draws the level axis: round levels, not the depths turned over.
func (d *depthSheet) drawLevels(p *panel) {
	ground, _ := d.groundLevel()
	x := p.box.Left
	for _, t := range d.step.Ticks(ground-d.base, ground-d.top) {
		y := d.y.At(ground - t.Value)
		if t.Label == "" {
			d.c.Line(x, y, x+0.9, y, draw.Pen{Width: draw.Hair})
			continue
		}
		d.c.Line(x, y, x+1.6, y, draw.Pen{Width: draw.Medium})
		d.c.Text(p.box.Right, y+body.Height()/2, draw.Text(t.Label), anchored(body, draw.End))
	}
}

// drawStrata draws the log: a pattern, the name written beside it, and water.
func (d *depthSheet) drawStrata(p *panel) {
	column := math.Min(0.28*p.box.Width(), 12)
	log := draw.Box{Left: p.box.Left, Top: p.box.Top, Right: p.box.Left + column, Bottom: p.box.Bottom}
	names := log.Right + 2.2
	for _, s := range d.in.Borehole.Strata {
		if !finite(s.Top) || !finite(s.Base) || s.Base <= s.Top {
			continue
		}
		box := draw.Box{Left: log.Left, Top: d.y.At(s.Top), Right: log.Right, Bottom: d.y.At(s.Base)}
		soil := s.Soil
		if soil == "" {
			soil = s.Name + " " + s.Description
		}
		first, second := draw.PatternOf(soil)
		d.c.Hatch(box, first, second)
		d.c.Rect(box, draw.Pen{Width: draw.Thin}, draw.Fill{})
	}
	d.boundaries(&panel{box: draw.Box{Left: log.Right, Right: p.box.Right}})
	notes := d.strataNotes(p.box.Right-names-0.5, p.box.Height())
	if v, ok := d.waterTable(); ok && v <= d.base {
		y := d.y.At(v)
		d.waterMark(log.Right-2.2, y)
		notes = append(notes, note{top: y - 0.1, base: y + 0.1, font: coloured(small, draw.Blue), rank: math.Inf(1),
			lines: []draw.Label{draw.Text("water " + metres(v) + " m")}})
	}
	placed, left := spread(notes, p.box.Top, p.box.Bottom)
	d.unnamed = left
	drawNotes(d.c, placed, log.Right, names)
}

// strataNotes writes the names as fully as their height on paper allows: first
// with their depths, then fewer lines.
func (d *depthSheet) strataNotes(width, height float64) []note {
	var notes []note
	for _, most := range []int{5, 4, 3, 2, 1} {
		notes = notes[:0]
		for _, s := range d.in.Borehole.Strata {
			if !finite(s.Top) || !finite(s.Base) || s.Base <= s.Top {
				continue
			}
			n := note{top: d.y.At(s.Top), base: d.y.At(s.Base), font: small, rank: s.Base - s.Top}
			name := s.Name
			if name == "" {
				name = s.Soil
			}
			lines := most
			if most > 3 {
				lines = 4
			}
			n.lines = stacked(small.Wrap(name, width, lines))
			depths := draw.Text(metres(s.Top) + "–" + metres(s.Base) + " m")
			if roomy := n.base - n.top - n.height() - small.Line(); roomy > 0 || most == 5 {
				n.lines = append(n.lines, depths)
			}
			if len(n.lines) > 0 {
				notes = append(notes, n)
			}
		}
		if total(notes)+small.Line()+1 <= height {
			break
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

// drawFlags writes the labels of the flags beside their depths.
func (d *depthSheet) drawFlags(p *panel) {
	d.boundaries(p)
	var notes []note
	for _, f := range d.in.Flags {
		if !finite(f.Depth) || f.Depth < d.top || f.Depth > d.base {
			continue
		}
		y := d.y.At(f.Depth)
		notes = append(notes, note{top: y - 0.1, base: y + 0.1, font: bold(small),
			lines: []draw.Label{draw.Text(bold(small).Fit(f.Label, p.box.Width()-2))}})
	}
	placed, _ := spread(notes, p.box.Top, p.box.Bottom)
	drawNotes(d.c, placed, p.box.Left, p.box.Left+1.6)
}

// horizontal draws the axis of a panel at its top, with its grid, and returns
// the ticks that carry labels.
func (d *depthSheet) horizontal(p *panel, s axis.Scale, ticker axis.Ticker) {
	low, high := s.Ends()
	ticks := ticker.Ticks(low, high)
	edge := math.Inf(-1)
	for _, t := range ticks {
		x := s.At(t.Value)
		if t.Label == "" {
			d.c.Line(x, p.box.Top-0.8, x, p.box.Top, draw.Pen{Width: draw.Hair})
			continue
		}
		d.c.Line(x, p.box.Top-1.4, x, p.box.Top, draw.Pen{Width: draw.Thin})
		if x > p.box.Left+0.3 && x < p.box.Right-0.3 {
			d.c.Line(x, p.box.Top, x, p.box.Bottom, draw.Pen{Colour: draw.Pale, Width: draw.Hair})
		}
		// Labels stay inside their panel, and are left out where they would touch.
		l := draw.Text(t.Label)
		half := small.Width(l) / 2
		at := math.Max(p.box.Left+half+0.3, math.Min(p.box.Right-half-0.3, x))
		if at-half < edge+0.6 {
			continue
		}
		edge = at + half
		d.c.Text(at, p.box.Top-2, l, anchored(small, draw.Middle))
	}
}
