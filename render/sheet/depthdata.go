package sheet

import (
	"math"

	"pastload/profile"
	"pastload/render/axis"
	"pastload/render/draw"
)

// drawIndex draws liquid and plastic limit as a bar and the water content on it.
func (d *depthSheet) drawIndex(p *panel) {
	d.boundaries(p)
	least := 10.0
	var contents []float64
	for _, r := range d.in.Borehole.Results {
		for _, n := range []profile.Number{r.LiquidLimit, r.PlasticLimit} {
			if v, ok := value(n); ok {
				least = math.Max(least, v)
			}
		}
		if v, ok := value(r.WaterContent); ok {
			contents = append(contents, v)
		}
	}
	_, high, step := axis.Round(0, capped(contents, least), int(math.Max(2, p.box.Width()/9)))
	s := axis.NewLinear(0, high, p.box.Left, p.box.Right)
	d.horizontal(p, s, steps(step)...)
	pen := draw.Pen{Width: draw.Thin}
	room := &placer{area: p.box.Inset(0.3)}
	for i := range d.in.Borehole.Results {
		r := &d.in.Borehole.Results[i]
		y := d.y.At(r.Depth.Value)
		low, hasLow := value(r.PlasticLimit)
		liquid, hasLiquid := value(r.LiquidLimit)
		place := func(v float64) float64 { x, _ := s.Clamp(v); return x }
		cap := func(v float64) { d.c.Line(place(v), y-0.7, place(v), y+0.7, draw.Pen{Width: draw.Medium}) }
		if hasLow && hasLiquid {
			d.c.Line(place(low), y, place(liquid), y, pen)
		}
		if hasLow {
			cap(low)
		}
		if hasLiquid {
			cap(liquid)
		}
		dot := draw.Marker{Shape: draw.Circle, Solid: true, Size: 1.3}
		if w, ok := value(r.WaterContent); ok && w > high {
			d.beyond(room, p.box.Right, y, dot, draw.Text(decimals(w, 0)), plainMark)
		} else if ok {
			d.c.Marker(place(w), y, dot)
		}
		if r.NonPlastic {
			d.c.Text(p.box.Right-0.8, y+d.f.small.Height()/2, draw.Text("NP"), anchored(d.f.small, draw.End))
		}
	}
}

// drawWeight draws measured unit weights and the line that was used.
func (d *depthSheet) drawWeight(p *panel) {
	d.boundaries(p)
	low, high := math.Inf(1), math.Inf(-1)
	see := func(n profile.Number) {
		if v, ok := value(n); ok {
			low, high = math.Min(low, v), math.Max(high, v)
		}
	}
	for i := range d.in.Profile.Points {
		see(d.in.Profile.Points[i].UnitWeight)
	}
	for _, r := range d.in.Borehole.Results {
		see(r.UnitWeight)
	}
	low, high, step := axis.Round(low-0.8, high+0.8, int(math.Max(3, p.box.Width()/8)))
	s := axis.NewLinear(low, high, p.box.Left, p.box.Right)
	d.horizontal(p, s, steps(step)...)
	d.course(func(q *profile.Point) (float64, bool) { return value(q.UnitWeight) }, s, draw.Pen{Width: draw.Thick}, true, nil)
	for i := range d.in.Borehole.Results {
		r := &d.in.Borehole.Results[i]
		if weight, ok := value(r.UnitWeight); ok {
			d.c.Marker(s.At(weight), d.y.At(r.Depth.Value), draw.Marker{Shape: draw.Circle, Size: 1.4})
		}
	}
}

// drawCompression draws measured compression indices against what correlations
// give.
func (d *depthSheet) drawCompression(p *panel) {
	d.boundaries(p)
	var slopes []float64
	for i := range d.in.Profile.Results {
		r := &d.in.Profile.Results[i]
		if v, ok := value(r.MeasuredCc); ok {
			slopes = append(slopes, v)
		}
		if known(r.CorrelatedCc) {
			slopes = append(slopes, r.CorrelatedCc.Best)
		}
	}
	_, high, step := axis.Round(0, capped(slopes, 0.1), int(math.Max(2, p.box.Width()/8)))
	room := &placer{area: p.box.Inset(0.3)}
	s := axis.NewLinear(0, high, p.box.Left, p.box.Right)
	d.horizontal(p, s, steps(step)...)
	grey := draw.Pen{Colour: draw.Grey, Width: draw.Hair}
	d.band(func(q *profile.Point) profile.Range { return q.CompressionIndex }, s, grey, draw.Fill{Colour: draw.Grey, Opacity: 0.15})
	for i := range d.in.Profile.Results {
		r := &d.in.Profile.Results[i]
		y := d.y.At(r.Depth)
		if known(r.CorrelatedCc) {
			x1, _ := s.Clamp(r.CorrelatedCc.Low)
			x2, _ := s.Clamp(r.CorrelatedCc.High)
			best, way := s.Clamp(r.CorrelatedCc.Best)
			d.c.Line(x1, y, x2, y, draw.Pen{Colour: draw.Grey, Width: draw.Thick})
			if way == 0 {
				d.c.Marker(best, y, draw.Marker{Shape: draw.Tick, Colour: draw.Grey, Size: 1.5})
			}
		}
		if v, ok := value(r.MeasuredCc); ok {
			dot := draw.Marker{Shape: draw.Circle, Solid: true, Size: 1.5}
			if x, way := s.Clamp(v); way > 0 {
				d.beyond(room, p.box.Right, y, dot, draw.Text(decimals(v, 1)), plainMark)
			} else {
				d.c.Marker(x, y, dot)
			}
		}
	}
}
