package sheet

import (
	"fmt"
	"math"
	"sort"

	"pastload/profile"
	"pastload/render/axis"
	"pastload/render/draw"
)

// rising checks that limits part the zones.
func rising(l profile.Limits) error {
	if l.NormallyConsolidated > 0 && l.NormallyConsolidated < l.LightlyOverconsolidated &&
		l.LightlyOverconsolidated < l.HeavilyOverconsolidated && finite(l.HeavilyOverconsolidated) {
		return nil
	}
	return fmt.Errorf("zone limits %g, %g and %g; want three rising ratios greater than zero",
		l.NormallyConsolidated, l.LightlyOverconsolidated, l.HeavilyOverconsolidated)
}

// zoneDefinition states the limits in words.
func zoneDefinition(l profile.Limits) string {
	return fmt.Sprintf("Zones by OCR (project definition): underconsolidated (suspected) < %g ≤ normally consolidated < %g ≤ lightly overconsolidated < %g ≤ heavily overconsolidated.",
		l.NormallyConsolidated, l.LightlyOverconsolidated, l.HeavilyOverconsolidated)
}

// zoneTints tints a panel with an OCR axis by zone, with a line at each limit and
// its value below, and a heavier line at 1.
func zoneTints(c *draw.Canvas, box draw.Box, s axis.Scale, l profile.Limits, f draw.Font) {
	zones := limits(l)
	low, _ := s.Ends()
	for i, z := range zones {
		from, _ := s.Clamp(math.Max(z.from, low))
		to := box.Right
		if i+1 < len(zones) {
			to, _ = s.Clamp(zones[i+1].from)
		}
		c.Rect(draw.Box{Left: from, Top: box.Top, Right: to, Bottom: box.Bottom}, draw.Pen{}, zoneTint(z.zone))
	}
	if x, way := s.Clamp(1); way == 0 {
		c.Line(x, box.Top, x, box.Bottom, draw.Pen{Width: draw.Thick})
	}
	for i, z := range zones[1:] {
		x, way := s.Clamp(z.from)
		if way != 0 {
			continue
		}
		c.Line(x, box.Top, x, box.Bottom+1, draw.Pen{Width: draw.Thin, Dash: draw.Dashed})
		// The lowest two limits are close: their values stand on either side.
		anchor := draw.Start
		if i == 0 {
			anchor = draw.End
		}
		c.Text(x, box.Bottom+3.6, draw.Text(fmt.Sprintf("%g", z.from)), anchored(f, anchor))
	}
}

// limits returns where each zone begins, from low to high, with its name.
func limits(l profile.Limits) []struct {
	zone profile.Zone
	from float64
} {
	return []struct {
		zone profile.Zone
		from float64
	}{
		{profile.Underconsolidated, 0},
		{profile.NormallyConsolidated, l.NormallyConsolidated},
		{profile.LightlyOverconsolidated, l.LightlyOverconsolidated},
		{profile.HeavilyOverconsolidated, l.HeavilyOverconsolidated},
	}
}

// ratioEnds returns the ends of the OCR axis: 0.5 to 10, and more where a test or
// most of the profile asks for it. Just below ground OCR grows without end as
// σ′v0 vanishes: that stretch does not set the axis, the line leaves it there.
func (d *depthSheet) ratioEnds() (float64, float64) {
	const lightest = 5.0 // kPa
	low, high := 0.53, 9.5
	see := func(v float64, ok bool) {
		if ok && finite(v) && v > 0 {
			low, high = math.Min(low, math.Max(v, 0.05)), math.Max(high, math.Min(v, 200))
		}
	}
	for i := range d.in.Profile.Tests {
		see(testRatio(&d.in.Profile.Tests[i]))
	}
	var line []float64
	for i := range d.in.Profile.Points {
		q := &d.in.Profile.Points[i]
		if e, ok := value(q.Effective); ok && e >= lightest && known(q.OCR) {
			line = append(line, q.OCR.Best)
		}
	}
	if sort.Float64s(line); len(line) > 0 {
		see(line[0], true)
		see(line[(len(line)-1)*19/20], true)
	}
	return axis.RoundLog(low*0.95, high*1.05)
}

// drawRatio draws OCR on a logarithmic axis over the tints of the zones.
func (d *depthSheet) drawRatio(p *panel) {
	low, high := d.ratioEnds()
	s := axis.NewLog(low, high, p.box.Left, p.box.Right)
	zoneTints(d.c, p.box, s, d.in.Settings.Limits, d.f.small)
	d.boundaries(p)
	d.horizontal(p, s, axis.Decades{Named: []int{1, 2, 5}}, axis.Decades{Named: []int{1, 3}}, axis.Decades{Named: []int{1}})
	room := &placer{area: p.box.Inset(0.3)}
	ocr := func(q *profile.Point) profile.Range {
		if e, ok := value(q.Effective); ok && e <= 0 || q.OCR.Low <= 0 && q.OCR.Best <= 0 {
			return profile.Range{}
		}
		return q.OCR
	}
	d.band(ocr, s, bandEdge, bandFill)
	best := d.course(func(q *profile.Point) (float64, bool) { r := ocr(q); return r.Best, known(r) }, s, historyLine.pen, false, room)
	if len(best) == 0 && len(d.in.Profile.Tests) == 0 {
		f := anchored(d.f.small, draw.Middle)
		d.c.Halo((p.box.Left+p.box.Right)/2, (p.box.Top+p.box.Bottom)/2, draw.Text("no ").Join(sigmaP).Add(" is known"), f)
	}
	d.undefined(p)
	d.tests(room, s, func(t *profile.Test) (profile.Range, profile.Range, bool) {
		e, ok1 := value(t.Effective)
		v, ok2 := testValue(t)
		if !ok1 || !ok2 || e <= 0 {
			return profile.Range{}, profile.Range{}, false
		}
		r := profile.Single(v / e)
		if known(t.Preconsolidation) && t.Bound == profile.Exact {
			r = t.Preconsolidation.Scale(1 / e)
		}
		return r, t.Expected.Scale(1 / e), true
	})
}

// withoutStress returns the stretches of depth in which σ′v0 is not greater than
// zero, so that there is no ratio to draw. The ground surface itself, where
// σ′v0 is zero by nature, is none.
func (d *depthSheet) withoutStress() [][2]float64 {
	var out [][2]float64
	points := d.in.Profile.Points
	for i := 1; i < len(points); i++ {
		from, to := points[i-1].Depth, points[i].Depth
		a, ok1 := value(points[i-1].Effective)
		b, ok2 := value(points[i].Effective)
		if !ok1 || !ok2 || !(to > from) || a > 0 && b > 0 || a == 0 && b > 0 {
			continue
		}
		// The stress is a straight line between two points.
		if a > 0 {
			from += (to - from) * a / (a - b)
		} else if b > 0 {
			to -= (to - from) * b / (b - a)
		}
		if n := len(out); n > 0 && out[n-1][1] >= from-1e-9 {
			out[n-1][1] = to
		} else {
			out = append(out, [2]float64{from, to})
		}
	}
	return out
}

// withoutRatio says in words where there is no ratio.
func (d *depthSheet) withoutRatio() string {
	s := ""
	for _, r := range d.withoutStress() {
		if s != "" {
			s += ", "
		}
		s += metres(r[0]) + " to " + metres(r[1]) + " m"
	}
	if s == "" {
		return ""
	}
	return "Hatched in the OCR panel: σ′v0 is zero or less (" + s + "), no OCR exists there; look at the water levels and unit weights."
}

// undefined hatches the depths without a ratio.
func (d *depthSheet) undefined(p *panel) {
	l := sigmaV.Add(" ≤ 0: no OCR")
	f := anchored(d.f.small, draw.Middle)
	for _, r := range d.withoutStress() {
		box := draw.Box{Left: p.box.Left, Top: d.y.At(r[0]), Right: p.box.Right, Bottom: d.y.At(r[1])}
		d.c.Hatch(box, draw.Rock, draw.Blank)
		if box.Height() > 2*f.Line() {
			d.c.Halo((box.Left+box.Right)/2, (box.Top+box.Bottom)/2+f.Height()/2, l, f)
		}
	}
}

// drawZones writes the zones in words beside their tint, with their probability.
func (d *depthSheet) drawZones(p *panel) {
	const bar = 2.4
	x := p.box.Left + bar
	width := p.box.Right - x - 1.5
	var ends []float64
	for _, z := range d.in.Profile.Zones {
		box := draw.Box{Left: p.box.Left, Top: d.y.At(z.Top), Right: x, Bottom: d.y.At(z.Base)}
		d.c.Rect(box, draw.Pen{Width: draw.Thin}, zoneTint(z.Zone))
		if z.Base < d.base-1e-9 {
			ends = append(ends, z.Base)
		}
	}
	placed, _ := fullest(p.box, func(most int) []note { return d.zoneNotes(width, most) })
	d.rules(placed, p.box.Left, p.box.Right, d.strataTops(), draw.Pen{Colour: draw.Grey, Width: draw.Thin})
	d.rules(placed, p.box.Left, p.box.Right, ends, draw.Pen{Width: draw.Thick})
	drawNotes(d.c, placed, x, x+1.2)
}

// zoneNotes writes the zones in at most so many lines, with probability and OCR
// where there is room.
func (d *depthSheet) zoneNotes(width float64, most int) []note {
	var notes []note
	for _, z := range d.in.Profile.Zones {
		n := note{top: d.y.At(z.Top), base: d.y.At(z.Base), font: d.f.small, rank: z.Base - z.Top}
		n.lines = stacked(n.font.Wrap(zoneWords(z), width, most))
		if v, ok := value(z.Probability); ok && most > 1 {
			n.lines = append(n.lines, draw.Text("P "+percent(v)))
		}
		if s := rangeWords(z.OCR); s != "" && n.base-n.top > n.height()+n.font.Line() {
			n.lines = append(n.lines, draw.Text(s[2:]))
		}
		notes = append(notes, n)
	}
	return notes
}

// percent writes a probability without claiming certainty.
func percent(v float64) string {
	switch p := 100 * v; {
	case p > 99:
		return "> 99 %"
	case p < 1:
		return "< 1 %"
	default:
		return fmt.Sprintf("= %.0f %%", p)
	}
}
