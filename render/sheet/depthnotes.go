package sheet

import (
	"fmt"

	"pastload/profile"
	"pastload/render/draw"
)

// notes writes the caption, what else there is room to say, and the title block.
func (d *depthSheet) notes() {
	y := d.caption.draw(d.c, d.captionBox.Left, d.captionBox.Top)
	left := 0
	said := d.remarks()
	for i, p := range said {
		lines := d.f.small.Wrap(p, d.captionBox.Width(), 4)
		// One line stays free to say that there is more.
		if y+float64(len(lines)+1)*d.f.small.Line()+1 > d.captionBox.Bottom {
			left = len(said) - i
			break
		}
		if i == 0 {
			y += 1
		}
		for _, line := range lines {
			y += d.f.small.Line()
			d.c.Text(d.captionBox.Left, y, draw.Text(line), d.f.small)
		}
	}
	if left > 0 && y+d.f.small.Line() <= d.captionBox.Bottom {
		d.c.Text(d.captionBox.Left, y+d.f.small.Line(), draw.Text(fmt.Sprintf("Further remarks: %d, see the report.", left)), d.f.small)
	}
	titleBlock(d.c, d.frame, d.in.Settings.Title, Figure{
		Number: d.in.Figure, Sheet: d.in.Sheet, Of: d.in.Of,
		Title: "depth profile, borehole " + d.in.name(),
		Scale: fmt.Sprintf("1:%.0f", d.scale), Paper: d.in.Page.Name,
	})
}

// remarks are what is worth reading on the sheet where there is room: what made
// the ground so, and what had to be assumed.
func (d *depthSheet) remarks() []string {
	var out []string
	for _, s := range d.in.Profile.Strata {
		if s.Sentence == "" {
			continue
		}
		name := s.Stratum
		if name == "" {
			name = "Ground"
		}
		out = append(out, name+": "+s.Sentence)
	}
	for _, a := range d.in.Profile.Assumptions {
		out = append(out, fmt.Sprintf("Assumed, %s to %s m: %s", metres(a.Top), metres(a.Base), a.Message))
	}
	return out
}

// key explains the symbols that this sheet uses, and no others.
func (d *depthSheet) key() []keyItem {
	seen := map[string]bool{}
	for i := range d.in.Profile.Tests {
		t := &d.in.Profile.Tests[i]
		if _, ok := testValue(t); !ok {
			continue
		}
		if t.Bound == profile.Exact {
			seen[gradeSeries(t.Grade).name] = true
		} else {
			seen[t.Bound.String()] = true
		}
		seen["out"] = seen["out"] || leftOut(t)
		seen["conflict"] = seen["conflict"] || t.Verdict == profile.Conflicts
		seen["doubt"] = seen["doubt"] || t.Verdict == profile.Doubtful
		seen["expected"] = seen["expected"] || known(t.Expected)
		seen["range"] = seen["range"] || wide(t.Preconsolidation) && t.Bound == profile.Exact
	}
	var items []keyItem
	add := func(when bool, item keyItem) {
		if when {
			items = append(items, item)
		}
	}
	for _, g := range grades {
		l := sigmaP.Add(" test, grade " + g.name)
		if g.name == ungraded {
			l = sigmaP.Add(" test, not graded")
		}
		add(seen[g.name], keyMarker(g.marker, l))
	}
	arrow := func(shape draw.Shape, way float64, l string) keyItem {
		return keyItem{4, func(c *draw.Canvas, x, y float64) { c.Marker(x-1.7*way, y, draw.Marker{Shape: shape}) }, draw.Text(l)}
	}
	add(seen[profile.AtLeast.String()], arrow(draw.ArrowRight, 1, "at least (a bound only)"))
	add(seen[profile.AtMost.String()], arrow(draw.ArrowLeft, -1, "at most (a bound only)"))
	add(seen["range"], keyRange(draw.Pen{Width: draw.Thin}, draw.Text("range of a test")))
	add(seen["out"], keyItem{3, func(c *draw.Canvas, x, y float64) {
		c.Marker(x, y, draw.Marker{Shape: draw.Circle})
		c.Marker(x, y, draw.Marker{Shape: draw.Cross, Size: 3.2})
	}, draw.Text("left out or not used")})
	add(seen["conflict"], keyItem{4, func(c *draw.Canvas, x, y float64) {
		c.Circle(x, y, 1.8, draw.Pen{Colour: draw.Red, Width: draw.Thick}, draw.Fill{})
	}, draw.Text("conflicts with the rest")})
	add(seen["doubt"], keyItem{2, func(c *draw.Canvas, x, y float64) {
		f := anchored(coloured(bold(d.f.small), draw.Red), draw.Middle)
		c.Text(x, y+f.Height()/2, draw.Text("?"), f)
	}, draw.Text("doubtful")})
	add(seen["expected"], keyItem{1, func(c *draw.Canvas, x, y float64) {
		c.Line(x, y-1.1, x, y+1.1, draw.Pen{Colour: draw.Grey, Width: draw.Thick})
	}, draw.Text("expected from the rest")})
	return append(items, d.lineKey()...)
}

// lineKey explains the lines and what is measured beside σ′p.
func (d *depthSheet) lineKey() []keyItem {
	items := []keyItem{
		keyLine(effectiveLine.pen, sigmaV.Add(" effective")),
		keyLine(totalLine.pen, sigmaT.Add(" total")),
		keyLine(poreLine.pen, sigmaU.Add(" pore pressure")),
	}
	history, band := false, false
	for i := range d.in.Profile.Points {
		r := d.in.Profile.Points[i].Preconsolidation
		history = history || known(r)
		band = band || wide(r)
	}
	if history {
		items = append(items, keyLine(historyLine.pen, sigmaP.Add(" from the evidence")))
	}
	if band {
		items = append(items, keyBand(bandEdge, bandFill, draw.Text("its 5–95 % band")))
	}
	if len(d.in.Design) > 0 {
		items = append(items, keyLine(designLine.pen, sigmaP.Add(" adopted")))
	}
	if d.measuredWater() > 0 {
		items = append(items, keyMarker(draw.Marker{Shape: draw.TriangleDown, Colour: draw.Blue, Size: 1.6}, draw.Text("pore pressure measured")))
	}
	return items
}

// measuredWater counts the pore pressures that were measured.
func (d *depthSheet) measuredWater() int {
	n := 0
	for _, w := range d.in.Borehole.Water {
		if _, ok := value(w.Pressure); ok {
			n++
		}
	}
	return n
}

// paragraphs are the definitions that a checker needs on the sheet itself, and
// which tests to doubt.
func (d *depthSheet) paragraphs() []string {
	var out []string
	if s := d.doubts(); s != "" {
		out = append(out, s)
	}
	symbols := "Depth in m below ground. σ′p: preconsolidation (yield) stress. OCR: overconsolidation ratio σ′p/σ′v0, heavier line at 1."
	if len(d.in.Profile.Zones) > 0 {
		symbols += " P: probability."
	}
	if _, weight, compression := d.measured(); true {
		if weight {
			symbols += " γ: line as used, circles measured."
		}
		if compression {
			symbols += " Cc: filled circles measured, grey bars from correlations."
		}
	}
	out = append(out,
		zoneDefinition(d.in.Settings.Limits),
		symbols, "Water: "+d.waterCase())
	if s := d.withoutRatio(); s != "" {
		out = append(out, s)
	}
	last := "Patterns are illustrative; see strata table."
	if d.unnamed > 0 {
		last += fmt.Sprintf(" Thin strata without room for their name: %d.", d.unnamed)
	}
	if d.in.Sources != "" {
		last += " Data: " + d.in.Sources + "."
	}
	return append(out, last)
}

// doubts names the tests that conflict with the rest, with the numbers.
func (d *depthSheet) doubts() string {
	s := ""
	for i := range d.in.Profile.Tests {
		t := &d.in.Profile.Tests[i]
		v, ok := testValue(t)
		if t.Verdict != profile.Conflicts || !ok {
			continue
		}
		if s != "" {
			s += "; "
		}
		name := t.Specimen
		if name == "" {
			name = "test"
		}
		s += fmt.Sprintf("%s at %s m: %.0f kPa", name, metres(t.Depth), v)
		if known(t.Expected) {
			s += fmt.Sprintf(" where the rest expects %.0f to %.0f", t.Expected.Low, t.Expected.High)
		}
	}
	if s == "" {
		return ""
	}
	return "Conflicting σ′p: " + s + "."
}

// waterCase says in words which water the stresses rest on.
func (d *depthSheet) waterCase() string {
	v, ok := d.waterTable()
	s := "no water table is given"
	switch {
	case ok && v < 0:
		s = fmt.Sprintf("water stands %s m above ground", metres(-v))
	case ok:
		s = fmt.Sprintf("water table at %s m", metres(v))
	}
	if n := d.measuredWater(); n > 0 {
		s += "; pore pressure measured at " + counted(n, "depth", "depths")
	} else if ok {
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
