package sheet

import (
	"fmt"
	"io"
	"math"

	"pastload/profile"
	"pastload/render/axis"
	"pastload/render/draw"
)

// DepthInput is what a depth sheet is drawn from.
type DepthInput struct {
	Borehole  profile.Borehole
	Profile   profile.BoreholeProfile
	Settings  profile.Settings
	Page      Page         // A4 where zero
	Figure    string       // figure number, "" to be filled in by hand
	Sheet, Of int          // sheet n of m, 0 to be filled in by hand
	Flags     []Flag       // what the review found, by depth
	Design    []DesignLine // adopted σ′p lines
	Sources   string       // where the data came from, e.g. "results.csv"
	ID        string       // prefix of the ids in the drawing; the borehole's name where empty
}

// A Flag marks a depth with a short label, such as the number of a finding.
type Flag struct {
	Depth float64
	Label string
}

// A DesignLine is a σ′p profile that the engineer adopted.
type DesignLine struct {
	Label    string
	Depths   []float64 // m, ascending
	Stresses []float64 // kPa, as many
}

// Depth writes the depth profile sheet of a borehole: ground and water, index
// tests, unit weight, vertical stress with σ′p, OCR with the zones, and
// compression index, all on one depth axis. The error is the writer's, or says
// that the zone limits of the settings do not rise; then nothing is written.
func Depth(w io.Writer, in DepthInput) error {
	in = in.cleaned()
	if in.Page.Width == 0 {
		in.Page = A4
	}
	if err := rising(in.Settings.Limits); err != nil {
		return fmt.Errorf("depth sheet: %w", err)
	}
	id := in.ID
	if id == "" {
		id = "depth-" + in.Borehole.Name
	}
	name := in.name()
	d := &depthSheet{
		in: in,
		f:  in.Page.fonts(),
		c: draw.New(draw.Sheet{
			Width: in.Page.Width, Height: in.Page.Height, ID: id,
			Title: "Stress history with depth, borehole " + name, Description: in.describe(),
		}),
	}
	d.layOut()
	d.header()
	d.background()
	for i := range d.panels {
		d.panels[i].draw(&d.panels[i])
	}
	d.edges()
	d.notes()
	return d.c.Finish(w)
}

// name returns the name of the borehole.
func (in *DepthInput) name() string {
	if in.Borehole.Name != "" {
		return in.Borehole.Name
	}
	return in.Profile.Borehole
}

// describe states what the sheet shows in sentences, for readers who cannot see it.
func (in *DepthInput) describe() string {
	s := ""
	for _, z := range in.Profile.Zones {
		s += fmt.Sprintf("%s to %s m: %s%s. ", metres(z.Top), metres(z.Base), zoneWords(z), rangeWords(z.OCR))
	}
	conflicts := 0
	for _, t := range in.Profile.Tests {
		if t.Verdict == profile.Conflicts {
			conflicts++
		}
	}
	return s + fmt.Sprintf("%s, of which %s with the rest.", counted(len(in.Profile.Tests), "test", "tests"), counted(conflicts, "conflicts", "conflict"))
}

func counted(n int, one, many string) string {
	switch n {
	case 0:
		return "no " + many
	case 1:
		return "1 " + one
	}
	return fmt.Sprintf("%d %s", n, many)
}

func rangeWords(r profile.Range) string {
	if !known(r) {
		return ""
	}
	if r.High-r.Low < 1e-9 {
		return ", OCR " + ratio(r.Best)
	}
	return ", OCR " + ratio(r.Low) + " to " + ratio(r.High)
}

// ratio writes an overconsolidation ratio: two figures that mean something.
func ratio(v float64) string {
	if math.Abs(v) < 9.95 {
		return decimals(v, 1)
	}
	return decimals(v, 0)
}

func zoneWords(z profile.ZoneInterval) string {
	if z.OrZone == "" || z.OrZone == z.Zone {
		return string(z.Zone)
	}
	return string(z.Zone) + " or " + string(z.OrZone)
}

// depthSheet is a depth sheet being drawn.
type depthSheet struct {
	in      DepthInput
	c       *draw.Canvas
	frame   draw.Box
	y       axis.Linear // depth to paper
	top     float64     // depth at the top of the panels
	base    float64     // depth at their base
	step    axis.Step   // of the depth axis
	scale   float64     // 1:scale
	plot    draw.Box    // all panels
	f       fonts
	panels  []panel
	unnamed int // strata that had no room for their name

	caption    caption
	captionBox draw.Box
}

// A panel is a column of the sheet.
type panel struct {
	title, unit draw.Label
	least       float64 // mm, enough on A4
	share       float64 // of what is left over
	bare        bool    // without a frame of its own
	names       bool    // holds the names of the strata
	draw        func(*panel)
	box         draw.Box
}

// known reports whether a range can be drawn.
func known(r profile.Range) bool {
	return r.Known && finite(r.Low) && finite(r.Best) && finite(r.High)
}

// wide reports whether a range can be drawn as a bar or band.
func wide(r profile.Range) bool { return known(r) && r.High > r.Low }

// value returns a number that can be drawn.
func value(n profile.Number) (float64, bool) { return n.Value, n.Known && finite(n.Value) }

func finite(v float64) bool { return !math.IsNaN(v) && !math.IsInf(v, 0) && math.Abs(v) < 1e9 }

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

// The heights above the panels, in mm.
const (
	headerHeight = 10.0
	titleHeight  = 13.0
	limitHeight  = 4.0 // below the panels, for the limits of the zones

	manyStrata = 20 // from here on some names may not have room
)

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

// Labels of the quantities.
var (
	sigmaT = draw.Text("σ").Sub("v0")
	sigmaU = draw.Text("u").Sub("0")
	sigmaV = draw.Text("σ′").Sub("v0")
	sigmaP = draw.Text("σ′").Sub("p")
)
