package sheet

import (
	"fmt"

	"pastload/profile"
	"pastload/render/draw"
)

// notes writes the key, the definitions and the title block.
func (d *depthSheet) notes() {
	y := d.key(d.caption.Top + 3)
	for _, p := range d.paragraphs() {
		for _, line := range small.Wrap(p, d.caption.Width(), 4) {
			if y > d.caption.Bottom {
				break
			}
			d.c.Text(d.caption.Left, y, draw.Text(line), small)
			y += small.Line()
		}
	}
	titleBlock(d.c, d.frame, d.in.Settings.Title, Figure{
		Number: d.in.Figure, Sheet: d.in.Sheet, Of: d.in.Of,
		Title: "Stress history with depth, borehole " + d.in.name(),
		Scale: fmt.Sprintf("1:%.0f", d.scale), Paper: d.in.Page.Name,
	})
}

// key explains the symbols that this sheet uses, and no others.
func (d *depthSheet) key(y float64) float64 {
	x, left := d.caption.Left, d.caption.Left
	item := func(symbol func(x, y float64), width float64, l draw.Label) {
		w := width + 1.2 + small.Width(l) + 4
		if x+w-4 > d.caption.Right && x > left {
			x, y = left, y+4.2
		}
		symbol(x+width/2, y-small.Height()/2)
		d.c.Text(x+width+1.2, y, l, small)
		x += w
	}
	mark := func(m draw.Marker) func(x, y float64) {
		return func(x, y float64) { d.c.Marker(x, y, m) }
	}
	seen := map[string]bool{}
	for i := range d.in.Profile.Tests {
		t := &d.in.Profile.Tests[i]
		if _, ok := testValue(t); !ok {
			continue
		}
		if t.Bound != profile.Exact {
			seen["bound"] = true
		} else {
			seen[gradeSeries(t.Grade).name] = true
		}
		seen["out"] = seen["out"] || !t.Used
		seen["conflict"] = seen["conflict"] || t.Verdict == profile.Conflicts
		seen["expected"] = seen["expected"] || known(t.Expected)
		seen["range"] = seen["range"] || known(t.Preconsolidation) && t.Preconsolidation.High > t.Preconsolidation.Low
	}
	for _, g := range grades {
		if seen[g.name] {
			l := sigmaP.Add(" test, grade " + g.name)
			if g.name == "not graded" {
				l = sigmaP.Add(" test, not graded")
			}
			item(mark(g.marker), 2.4, l)
		}
	}
	if seen["bound"] {
		item(func(x, y float64) { d.c.Marker(x-1.5, y, draw.Marker{Shape: draw.ArrowRight}) }, 4, draw.Text("bound only: at least (at most: arrow to the left)"))
	}
	if seen["range"] {
		item(func(x, y float64) {
			d.c.Line(x-2, y, x+2, y, draw.Pen{Width: draw.Thin})
			d.c.Line(x-2, y-0.7, x-2, y+0.7, draw.Pen{Width: draw.Thin})
			d.c.Line(x+2, y-0.7, x+2, y+0.7, draw.Pen{Width: draw.Thin})
		}, 4, draw.Text("range of the test"))
	}
	if seen["out"] {
		item(func(x, y float64) {
			d.c.Marker(x, y, draw.Marker{Shape: draw.Circle})
			d.c.Marker(x, y, draw.Marker{Shape: draw.Cross, Size: 3.2})
		}, 3, draw.Text("left out (hollow, crossed)"))
	}
	if seen["conflict"] {
		item(func(x, y float64) {
			d.c.Circle(x, y, 1.8, draw.Pen{Colour: draw.Red, Width: draw.Thick}, draw.Fill{})
		}, 4, draw.Text("conflicts with the rest"))
	}
	if seen["expected"] {
		item(func(x, y float64) { d.c.Line(x, y-1.1, x, y+1.1, draw.Pen{Colour: draw.Grey, Width: draw.Thick}) }, 1, draw.Text("expected there from the rest"))
	}
	d.lineKey(item)
	return y + 4.2
}

// lineKey explains the lines and what is measured beside σ′p.
func (d *depthSheet) lineKey(item func(func(x, y float64), float64, draw.Label)) {
	line := func(p draw.Pen) func(x, y float64) {
		return func(x, y float64) { d.c.Line(x-4.5, y, x+4.5, y, p) }
	}
	item(line(effectiveLine.pen), 9, sigmaV.Add(" effective"))
	item(line(totalLine.pen), 9, sigmaT.Add(" total"))
	item(line(poreLine.pen), 9, sigmaU.Add(" pore pressure"))
	history, wide := false, false
	for i := range d.in.Profile.Points {
		r := d.in.Profile.Points[i].Preconsolidation
		history = history || known(r)
		wide = wide || known(r) && r.High > r.Low
	}
	if history {
		item(line(historyLine.pen), 9, sigmaP.Add(" from all evidence"))
	}
	if wide {
		item(func(x, y float64) {
			d.c.Rect(draw.Box{Left: x - 3, Top: y - 1, Right: x + 3, Bottom: y + 1}, bandEdge, bandFill)
		}, 6, draw.Text("its 5–95 % band"))
	}
	if len(d.in.Design) > 0 {
		item(line(designLine.pen), 9, sigmaP.Add(" adopted for design"))
	}
	for _, w := range d.in.Borehole.Water {
		if _, ok := value(w.Pressure); ok {
			item(func(x, y float64) {
				d.c.Marker(x, y, draw.Marker{Shape: draw.TriangleDown, Colour: draw.Blue, Size: 1.6})
			}, 2, draw.Text("pore pressure measured"))
			break
		}
	}
}

// paragraphs are the definitions that a checker needs on the sheet itself.
func (d *depthSheet) paragraphs() []string {
	l := d.in.Settings.Limits
	out := []string{
		fmt.Sprintf("Zones (project definition): underconsolidated (suspected) OCR < %g; normally consolidated %g to %g; lightly overconsolidated %g to %g; heavily overconsolidated from %g.",
			l.NormallyConsolidated, l.NormallyConsolidated, l.LightlyOverconsolidated, l.LightlyOverconsolidated, l.HeavilyOverconsolidated, l.HeavilyOverconsolidated),
		"σ′p: preconsolidation (yield) stress. OCR: overconsolidation ratio σ′p/σ′v0 (vertical line at 1: pressed today as never before). P: probability. γ: line as used, circles measured. Cc: filled circles measured, grey bars from correlations. Index tests: bar from plastic limit PL to liquid limit LL, filled circle water content w.",
		"Water: " + d.waterCase(),
	}
	last := "Patterns are illustrative; see strata table."
	if d.unnamed > 0 {
		last += fmt.Sprintf(" Names of %d thin strata have no room here.", d.unnamed)
	}
	if d.in.Sources != "" {
		last += " Data: " + d.in.Sources + "."
	}
	return append(out, last)
}

// waterCase says in words which water the stresses rest on.
func (d *depthSheet) waterCase() string {
	s := "no water table is given"
	if v, ok := d.waterTable(); ok {
		if v < 0 {
			s = fmt.Sprintf("water stands %s m above ground", metres(-v))
		} else {
			s = fmt.Sprintf("water table at %s m", metres(v))
		}
	}
	measured := 0
	for _, w := range d.in.Borehole.Water {
		if _, ok := value(w.Pressure); ok {
			measured++
		}
	}
	if measured > 0 {
		s += fmt.Sprintf("; pore pressure through %s", counted(measured, "measured point", "measured points"))
	} else if _, ok := d.waterTable(); ok {
		s += "; hydrostatic below it"
	}
	if v, ok := value(d.in.Borehole.CapillaryRise); ok && v > 0 {
		s += fmt.Sprintf("; capillary rise %s m", metres(v))
	}
	if v, ok := value(d.in.Borehole.Surcharge); ok && v != 0 {
		s += fmt.Sprintf("; surcharge %.1f kPa at ground level", v)
	}
	return s + fmt.Sprintf("; unit weight of water %g kN/m³.", d.in.Settings.WaterUnitWeight)
}
