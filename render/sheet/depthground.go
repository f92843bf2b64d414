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
	room := d.frame.Width() - d.f.body.Width(what) - 6
	d.c.Text(x, y+4.6, draw.Text(d.f.title.Fit("Borehole "+d.in.name(), room)), d.f.title)
	d.c.Text(d.frame.Right, y+4.6, what, anchored(bold(d.f.body), draw.End))
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
	d.c.Text(d.frame.Right, y+8.5, draw.Text(scale), anchored(d.f.small, draw.End))
	d.c.Text(x, y+8.5, draw.Text(d.f.small.Fit(line, d.frame.Width()-d.f.small.Width(draw.Text(scale))-4)), d.f.small)
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
	for _, top := range d.strataTops() {
		y := d.y.At(top)
		d.c.Line(p.box.Left, y, p.box.Right, y, draw.Pen{Colour: draw.Grey, Width: draw.Thin})
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
		d.c.Text(x, top+3.5, p.title, anchored(d.f.heading, draw.Middle))
		d.c.Text(x, top+6.9, p.unit, anchored(d.f.small, draw.Middle))
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
		d.c.Text(x-2.1, y+d.f.body.Height()/2, draw.Text(t.Label), anchored(d.f.body, draw.End))
	}
	d.c.Line(x, d.plot.Top, x, d.plot.Bottom, draw.Pen{Width: draw.Medium})
}

// drawLevels draws the level axis: round levels, not the depths turned over.
func (d *depthSheet) drawLevels(p *panel) {
	ground, _ := d.groundLevel()
	x := p.box.Left
	ticks := d.step.Ticks(ground-d.base, ground-d.top)
	widest := 0.0
	for _, t := range ticks {
		widest = math.Max(widest, d.f.body.Width(draw.Text(t.Label)))
	}
	for _, t := range ticks {
		y := d.y.At(ground - t.Value)
		if t.Label == "" {
			d.c.Line(x, y, x+0.9, y, draw.Pen{Width: draw.Hair})
			continue
		}
		d.c.Line(x, y, x+1.6, y, draw.Pen{Width: draw.Medium})
		d.c.Text(x+2.1+widest, y+d.f.body.Height()/2, draw.Text(t.Label), anchored(d.f.body, draw.End))
	}
}

// drawFlags writes the labels of the flags beside their depths.
func (d *depthSheet) drawFlags(p *panel) {
	d.boundaries(p)
	var notes []note
	for _, f := range d.in.Flags {
		if f.Depth < d.top || f.Depth > d.base {
			continue
		}
		y := d.y.At(f.Depth)
		notes = append(notes, note{top: y - 0.1, base: y + 0.1, font: bold(d.f.small),
			lines: []draw.Label{draw.Text(bold(d.f.small).Fit(f.Label, p.box.Width()-2))}})
	}
	placed, _ := spread(notes, p.box.Top, p.box.Bottom)
	drawNotes(d.c, placed, p.box.Left, p.box.Left+1.6)
}

// steps returns tickers of a step and of coarser ones, to choose from.
func steps(size float64) []axis.Ticker {
	return []axis.Ticker{axis.Step{Size: size, Parts: 2}, axis.Step{Size: 2 * size, Parts: 2}, axis.Step{Size: 5 * size, Parts: 5}}
}

// horizontal draws the axis of a panel at its top, with its grid, by the first
// of some tickers whose labels have room.
func (d *depthSheet) horizontal(p *panel, s axis.Scale, tickers ...axis.Ticker) {
	low, high := s.Ends()
	var ticks []axis.Tick
	var labels []tickLabel
	for _, t := range tickers {
		var room bool
		ticks = t.Ticks(low, high)
		if labels, room = d.tickLabels(p, s, ticks); room {
			break
		}
	}
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
	}
	for _, l := range labels {
		d.c.Text(l.at, p.box.Top-2, draw.Text(l.text), anchored(d.f.small, draw.Middle))
	}
}

// A tickLabel is the text of a tick with its middle and half its width, in mm.
type tickLabel struct {
	text     string
	at, half float64
	shifted  bool // off its tick, to stay inside the panel
}

// tickLabels places the labels of ticks inside their panel, and reports whether
// they stand clear of each other. A label at an end that would touch its
// neighbour is given up before the rest.
func (d *depthSheet) tickLabels(p *panel, s axis.Scale, ticks []axis.Tick) ([]tickLabel, bool) {
	const gap, edge = 0.7, 0.8 // mm, between labels and to the frame
	var all []tickLabel
	for _, t := range ticks {
		if t.Label == "" {
			continue
		}
		l := tickLabel{text: t.Label, half: d.f.small.Width(draw.Text(t.Label)) / 2}
		x := s.At(t.Value)
		l.at = math.Max(p.box.Left+l.half+edge, math.Min(p.box.Right-l.half-edge, x))
		l.shifted = math.Abs(l.at-x) > 1e-9
		all = append(all, l)
	}
	touch := func(a, b tickLabel) bool { return a.at+a.half+gap > b.at-b.half }
	if n := len(all); n > 2 && all[0].shifted && touch(all[0], all[1]) {
		all = all[1:]
	}
	if n := len(all); n > 2 && all[n-1].shifted && touch(all[n-2], all[n-1]) {
		all = all[:n-1]
	}
	for i := 1; i < len(all); i++ {
		if touch(all[i-1], all[i]) {
			return all, false
		}
	}
	return all, true
}
