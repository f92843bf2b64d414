package sheet

import (
	"math"

	"pastload/profile"
	"pastload/render/axis"
	"pastload/render/draw"
)

// extent returns the shallowest and deepest depth that the sheet must show.
func (d *depthSheet) extent() (top, base float64) {
	b, p := &d.in.Borehole, &d.in.Profile
	see := func(v float64) {
		top, base = math.Min(top, v), math.Max(base, v)
	}
	for _, s := range b.Strata {
		see(s.Top)
		see(s.Base)
	}
	for _, q := range p.Points {
		see(q.Depth)
	}
	for _, t := range p.Tests {
		see(t.Depth)
	}
	for i := range p.Results {
		see(p.Results[i].Depth)
	}
	for _, q := range b.Water {
		see(q.Depth.Value)
	}
	if v, ok := d.waterTable(); ok && v < 0 {
		see(v)
	}
	if base <= 0 {
		base = 1
	}
	return top, base
}

func (d *depthSheet) waterTable() (float64, bool) {
	if v, ok := value(d.in.Profile.WaterTable); ok {
		return v, true
	}
	return value(d.in.Borehole.WaterTableDepth)
}

func (d *depthSheet) groundLevel() (float64, bool) {
	if v, ok := value(d.in.Profile.GroundLevel); ok {
		return v, true
	}
	return value(d.in.Borehole.GroundLevel)
}

// layOut shares the page out: header, panels, notes, title block.
func (d *depthSheet) layOut() {
	page := d.in.Page
	d.frame = page.frame()
	block := draw.Box{Left: d.frame.Right - blockWidth, Top: d.frame.Bottom - blockHeight, Right: d.frame.Right, Bottom: d.frame.Bottom}
	d.captionBox = draw.Box{Left: d.frame.Left, Right: d.frame.Right, Bottom: block.Top - 1}
	if page.wide {
		d.captionBox.Right, d.captionBox.Bottom = block.Left-4, d.frame.Bottom
	}
	d.caption = newCaption(d.f.small, d.captionBox.Width(), d.key(), d.paragraphs(), 3)
	bottom := d.captionBox.Bottom - d.caption.height()
	if len(d.in.Borehole.Strata) > manyStrata {
		bottom -= d.f.small.Line() // to say that some have no room for their name
	}
	if page.wide {
		bottom = math.Min(bottom, block.Top-1)
	}
	plotTop := d.frame.Top + headerHeight + titleHeight
	room := bottom - limitHeight - plotTop
	top, base := d.extent()
	d.scale = axis.DrawingScale(base-top, room)
	// The axis ends on a small step at or below the deepest thing on the sheet.
	perMetre := 1000 / d.scale
	d.step = axis.Step{Size: axis.NiceStep(12/perMetre, 1)}
	d.step.Parts = 5
	if lead := math.Round(d.step.Size / math.Pow(10, math.Floor(math.Log10(d.step.Size)))); lead == 2 {
		d.step.Parts = 4
	}
	fine := d.step.Size / float64(d.step.Parts)
	d.top = math.Floor(top/fine+1e-9) * fine
	d.base = d.top + math.Min(math.Ceil((base-d.top)/fine-1e-9)*fine, room/perMetre)
	d.base = math.Max(d.base, base)
	height := (d.base - d.top) * perMetre
	d.plot = draw.Box{Left: d.frame.Left, Top: plotTop, Right: d.frame.Right, Bottom: plotTop + height}
	d.y = axis.NewLinear(d.top, d.base, d.plot.Top, d.plot.Bottom)
	d.captionBox.Top = d.plot.Bottom + limitHeight
	d.choosePanels()
	least, share := 0.0, 0.0
	for _, p := range d.panels {
		least += p.least
		share += p.share
	}
	spare := math.Max(0, d.plot.Width()-least)
	x := d.plot.Left
	for i := range d.panels {
		p := &d.panels[i]
		width := p.least
		if share > 0 {
			width += spare * p.share / share
		}
		p.box = draw.Box{Left: x, Top: d.plot.Top, Right: x + width, Bottom: d.plot.Bottom}
		x += width
		if len(d.in.Borehole.Strata) > manyStrata && p.names {
			if _, left := d.named(p); left > 0 {
				d.unnamed = left
				d.caption = newCaption(d.f.small, d.captionBox.Width(), d.key(), d.paragraphs(), 3)
			}
		}
	}
}

// choosePanels lists the panels that have something to show, in the order in
// which a reader asks: where am I, how loaded today, how loaded in the past, what
// does that mean.
func (d *depthSheet) choosePanels() {
	index, weight, compression := d.measured()
	add := func(when bool, p panel) {
		if when {
			d.panels = append(d.panels, p)
		}
	}
	flags := len(d.in.Flags) > 0
	// The flags take their room from panels that can spare it.
	tight := func(alone, beside float64) float64 {
		if flags {
			return beside
		}
		return alone
	}
	add(true, panel{title: draw.Text("Depth"), unit: draw.Text("(m)"), least: 9.6, share: 0.2, bare: true, draw: d.drawDepths})
	add(true, panel{title: draw.Text("Strata"), unit: draw.Text("and water"), least: 27, share: 2, names: true, draw: d.drawStrata})
	add(index, panel{title: draw.Text("Index tests"), unit: draw.Text("PL, LL, w (%)"), least: tight(23, 21), share: 1.6, draw: d.drawIndex})
	add(weight, panel{title: draw.Text("γ"), unit: draw.Text("(kN/m³)"), least: tight(13, 12), share: 1.1, draw: d.drawWeight})
	add(true, panel{title: draw.Text("Vertical stress"), unit: draw.Text("(kPa)"), least: tight(35, 33), share: 4.5, draw: d.drawStress})
	add(true, panel{title: draw.Text("OCR = ").Join(sigmaP).Add(" / ").Join(sigmaV), unit: draw.Text("(log scale)"), least: tight(29, 28), share: 2.4, draw: d.drawRatio})
	add(len(d.in.Profile.Zones) > 0, panel{title: draw.Text("Zone"), unit: draw.Text("in words"), least: 25, share: 1.2, draw: d.drawZones})
	add(compression, panel{title: draw.Text("C").Sub("c"), unit: draw.Text("(–)"), least: tight(14, 12.6), share: 1.4, draw: d.drawCompression})
	add(flags, panel{title: draw.Text("Flag"), least: 6.4, share: 0.3, draw: d.drawFlags})
	_, level := d.groundLevel()
	add(level, panel{title: draw.Text("Level"), unit: draw.Text("(m)"), least: 9.4, share: 0.2, bare: true, draw: d.drawLevels})
}

// measured reports which panels have data.
func (d *depthSheet) measured() (index, weight, compression bool) {
	has := func(n profile.Number) bool { _, ok := value(n); return ok }
	for _, r := range d.in.Borehole.Results {
		index = index || has(r.WaterContent) || has(r.LiquidLimit) || has(r.PlasticLimit)
		weight = weight || has(r.UnitWeight)
	}
	for i := range d.in.Profile.Results {
		r := &d.in.Profile.Results[i]
		compression = compression || has(r.MeasuredCc) || known(r.CorrelatedCc)
	}
	for i := range d.in.Profile.Points {
		p := &d.in.Profile.Points[i]
		weight = weight || has(p.UnitWeight)
		compression = compression || known(p.CompressionIndex)
	}
	return index, weight, compression
}
