package sheet

import (
	"fmt"
	"math"

	"pastload/profile"
	"pastload/render/axis"
	"pastload/render/draw"
)

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

// ratioEnds returns the ends of the OCR axis: 0.5 to 10, and more where a best
// value asks for it.
func (d *depthSheet) ratioEnds() (float64, float64) {
	low, high := 0.5, 10.0
	see := func(v float64, ok bool) {
		if ok && finite(v) && v > 0 {
			low, high = math.Min(low, math.Max(v, 0.05)), math.Max(high, math.Min(v, 200))
		}
	}
	for i := range d.in.Profile.Points {
		r := d.in.Profile.Points[i].OCR
		see(r.Best, known(r))
	}
	for i := range d.in.Profile.Tests {
		see(value(d.in.Profile.Tests[i].OCR))
	}
	return axis.RoundLog(low, high)
}

// drawRatio draws OCR on a logarithmic axis over the tints of the zones.
func (d *depthSheet) drawRatio(p *panel) {
	low, high := d.ratioEnds()
	s := axis.NewLog(low, high, p.box.Left, p.box.Right)
	zones := limits(d.in.Settings.Limits)
	for i, z := range zones {
		from, _ := s.Clamp(math.Max(z.from, low))
		to := p.box.Right
		if i+1 < len(zones) {
			to, _ = s.Clamp(zones[i+1].from)
		}
		d.c.Rect(draw.Box{Left: from, Top: p.box.Top, Right: to, Bottom: p.box.Bottom}, draw.Pen{}, zoneTint(z.zone))
	}
	d.boundaries(p)
	d.horizontal(p, s, axis.Decades{Named: []int{1, 2, 5}})
	d.c.Line(s.At(1), p.box.Top, s.At(1), p.box.Bottom, draw.Pen{Width: draw.Thick})
	for i, z := range zones[1:] {
		x, beyond := s.Clamp(z.from)
		if beyond != 0 || !finite(z.from) || z.from <= 0 {
			continue
		}
		d.c.Line(x, p.box.Top, x, p.box.Bottom+1, draw.Pen{Width: draw.Thin, Dash: draw.Dashed})
		anchor := draw.Start
		if i == 0 {
			anchor = draw.End
		}
		d.c.Text(x, p.box.Bottom+3.6, draw.Text(fmt.Sprintf("%g", z.from)), anchored(small, anchor))
	}
	room := &placer{area: p.box.Inset(0.3)}
	ocr := func(q *profile.Point) profile.Range {
		if e, ok := value(q.Effective); ok && e <= 0 || q.OCR.Low <= 0 && q.OCR.Best <= 0 {
			return profile.Range{}
		}
		return q.OCR
	}
	d.band(ocr, s, bandEdge, bandFill)
	d.course(func(q *profile.Point) (float64, bool) { r := ocr(q); return r.Best, known(r) }, s, historyLine.pen, room)
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

// undefined marks the depths where σ′v0 is not greater than zero, so that there
// is no ratio to draw.
func (d *depthSheet) undefined(p *panel) {
	points := d.in.Profile.Points
	for i := 1; i < len(points); i++ {
		a, ok1 := value(points[i-1].Effective)
		b, ok2 := value(points[i].Effective)
		if !ok1 || !ok2 || a > 0 && b > 0 || a > 0 && points[i-1].Depth == 0 || b > 0 && points[i-1].Depth <= 0 || points[i].Depth <= points[i-1].Depth {
			continue
		}
		// The first stretch below ground begins at zero by nature, and says nothing.
		if a == 0 && b > 0 {
			continue
		}
		box := draw.Box{Left: p.box.Left, Top: d.y.At(points[i-1].Depth), Right: p.box.Right, Bottom: d.y.At(points[i].Depth)}
		d.c.Hatch(box, draw.Rock, draw.Blank)
	}
}

// drawZones writes the zones in words beside their tint, with their probability.
func (d *depthSheet) drawZones(p *panel) {
	d.boundaries(p)
	const bar = 2.2
	x := p.box.Left + bar
	width := p.box.Right - x - 1.6
	var notes []note
	for _, most := range []int{8, 4, 2, 1} {
		notes = notes[:0]
		for _, z := range d.in.Profile.Zones {
			if !finite(z.Top) || !finite(z.Base) || z.Base <= z.Top {
				continue
			}
			n := note{top: d.y.At(z.Top), base: d.y.At(z.Base), font: small, rank: z.Base - z.Top}
			n.lines = stacked(small.Wrap(zoneWords(z), width, most))
			if v, ok := value(z.Probability); ok && most > 1 {
				n.lines = append(n.lines, draw.Text("P = "+percent(v)))
			}
			if known(z.OCR) && n.base-n.top > n.height()+small.Line() {
				n.lines = append(n.lines, draw.Text(rangeWords(z.OCR)[2:]))
			}
			notes = append(notes, n)
		}
		if total(notes) <= p.box.Height() {
			break
		}
	}
	for _, z := range d.in.Profile.Zones {
		if finite(z.Top) && finite(z.Base) && z.Base > z.Top {
			box := draw.Box{Left: p.box.Left, Top: d.y.At(z.Top), Right: x, Bottom: d.y.At(z.Base)}
			d.c.Rect(box, draw.Pen{Width: draw.Thin}, zoneTint(z.Zone))
			d.c.Line(p.box.Left, box.Bottom, p.box.Right, box.Bottom, draw.Pen{Width: draw.Thick})
		}
	}
	placed, _ := spread(notes, p.box.Top, p.box.Bottom)
	drawNotes(d.c, placed, x, x+1.2)
}

// percent writes a probability without claiming certainty.
func percent(v float64) string {
	switch p := 100 * v; {
	case p > 99:
		return "> 99 %"
	case p < 1:
		return "< 1 %"
	default:
		return fmt.Sprintf("%.0f %%", p)
	}
}
