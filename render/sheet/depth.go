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

// The heights above the panels, in mm.
const (
	headerHeight = 10.0
	titleHeight  = 13.0
	limitHeight  = 4.0 // below the panels, for the limits of the zones

	manyStrata = 20 // from here on some names may not have room
)

// Labels of the quantities.
var (
	sigmaT = draw.Text("σ").Sub("v0")
	sigmaU = draw.Text("u").Sub("0")
	sigmaV = draw.Text("σ′").Sub("v0")
	sigmaP = draw.Text("σ′").Sub("p")
)
