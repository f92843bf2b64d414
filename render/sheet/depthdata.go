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
	top := 10.0
	see := func(n profile.Number) {
		if v, ok := value(n); ok {
			top = math.Max(top, v)
		}
	}
	for _, r := range d.in.Borehole.Results {
		see(r.WaterContent)
		see(r.LiquidLimit)
		see(r.PlasticLimit)
	}
	_, high, step := axis.Round(0, top, int(math.Max(2, p.box.Width()/9)))
	s := axis.NewLinear(0, high, p.box.Left, p.box.Right)
	d.horizontal(p, s, axis.Step{Size: step, Parts: 2})
	pen := draw.Pen{Width: draw.Thin}
	for i := range d.in.Borehole.Results {
		r := &d.in.Borehole.Results[i]
		depth, ok := value(r.Depth)
		if !ok {
			continue
		}
		y := d.y.At(depth)
		low, hasLow := value(r.PlasticLimit)
		liquid, hasLiquid := value(r.LiquidLimit)
		cap := func(v float64) { d.c.Line(s.At(v), y-0.7, s.At(v), y+0.7, draw.Pen{Width: draw.Medium}) }
		if hasLow && hasLiquid {
			d.c.Line(s.At(low), y, s.At(liquid), y, pen)
		}
		if hasLow {
			cap(low)
		}
		if hasLiquid {
			cap(liquid)
		}
		if w, ok := value(r.WaterContent); ok {
			d.c.Marker(s.At(w), y, draw.Marker{Shape: draw.Circle, Solid: true, Size: 1.3})
		}
		if r.NonPlastic {
			d.c.Text(p.box.Right-0.8, y+small.Height()/2, draw.Text("NP"), anchored(small, draw.End))
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
	low, high, step := axis.Round(low-0.3, high+0.3, int(math.Max(2, p.box.Width()/8)))
	s := axis.NewLinear(low, high, p.box.Left, p.box.Right)
	d.horizontal(p, s, axis.Step{Size: step, Parts: 2})
	d.course(func(q *profile.Point) (float64, bool) { return value(q.UnitWeight) }, s, draw.Pen{Width: draw.Thick}, nil)
	for i := range d.in.Borehole.Results {
		r := &d.in.Borehole.Results[i]
		depth, ok1 := value(r.Depth)
		weight, ok2 := value(r.UnitWeight)
		if ok1 && ok2 {
			d.c.Marker(s.At(weight), d.y.At(depth), draw.Marker{Shape: draw.Circle, Size: 1.4})
		}
	}
}

// course draws a quantity of the points as a line, broken where it is not known,
// and returns the last stretch on paper. Lines are kept inside the panel.
func (d *depthSheet) course(of func(*profile.Point) (float64, bool), s axis.Scale, pen draw.Pen, taken *placer) []draw.Point {
	var line, all []draw.Point
	flush := func() {
		d.c.Polyline(line, pen)
		if taken != nil {
			taken.line(line)
		}
		all = append(all, line...)
		line = line[:0:0]
	}
	for i := range d.in.Profile.Points {
		q := &d.in.Profile.Points[i]
		v, ok := of(q)
		if !ok || !finite(q.Depth) {
			flush()
			continue
		}
		x, _ := s.Clamp(v)
		line = append(line, draw.Point{X: x, Y: d.y.At(q.Depth)})
	}
	flush()
	return all
}

// band draws a range of the points as a tint with edges; one without width is
// not drawn.
func (d *depthSheet) band(of func(*profile.Point) profile.Range, s axis.Scale, edge draw.Pen, fill draw.Fill) bool {
	var low, high []draw.Point
	wide, drawn := false, false
	flush := func() {
		if wide && len(low) > 1 {
			shape := append([]draw.Point(nil), low...)
			for i := len(high) - 1; i >= 0; i-- {
				shape = append(shape, high[i])
			}
			d.c.Polygon(shape, draw.Pen{}, fill)
			d.c.Polyline(low, edge)
			d.c.Polyline(high, edge)
			drawn = true
		}
		low, high, wide = nil, nil, false
	}
	for i := range d.in.Profile.Points {
		q := &d.in.Profile.Points[i]
		r := of(q)
		if !known(r) || !finite(q.Depth) {
			flush()
			continue
		}
		wide = wide || r.High > r.Low
		y := d.y.At(q.Depth)
		x1, _ := s.Clamp(r.Low)
		x2, _ := s.Clamp(r.High)
		low = append(low, draw.Point{X: x1, Y: y})
		high = append(high, draw.Point{X: x2, Y: y})
	}
	flush()
	return drawn
}

// drawCompression draws measured compression indices against what correlations
// give.
func (d *depthSheet) drawCompression(p *panel) {
	d.boundaries(p)
	top := 0.1
	for i := range d.in.Profile.Results {
		r := &d.in.Profile.Results[i]
		if v, ok := value(r.MeasuredCc); ok {
			top = math.Max(top, v)
		}
		if known(r.CorrelatedCc) {
			top = math.Max(top, r.CorrelatedCc.High)
		}
	}
	for i := range d.in.Profile.Points {
		if r := d.in.Profile.Points[i].CompressionIndex; known(r) {
			top = math.Max(top, r.Best)
		}
	}
	_, high, step := axis.Round(0, top, int(math.Max(2, p.box.Width()/8)))
	s := axis.NewLinear(0, high, p.box.Left, p.box.Right)
	d.horizontal(p, s, axis.Step{Size: step, Parts: 2})
	grey := draw.Pen{Colour: draw.Grey, Width: draw.Hair}
	d.band(func(q *profile.Point) profile.Range { return q.CompressionIndex }, s, grey, draw.Fill{Colour: draw.Grey, Opacity: 0.15})
	for i := range d.in.Profile.Results {
		r := &d.in.Profile.Results[i]
		if !finite(r.Depth) {
			continue
		}
		y := d.y.At(r.Depth)
		if known(r.CorrelatedCc) {
			d.c.Line(s.At(r.CorrelatedCc.Low), y, s.At(r.CorrelatedCc.High), y, draw.Pen{Colour: draw.Grey, Width: draw.Thick})
			d.c.Marker(s.At(r.CorrelatedCc.Best), y, draw.Marker{Shape: draw.Tick, Colour: draw.Grey, Size: 1.5})
		}
		if v, ok := value(r.MeasuredCc); ok {
			d.c.Marker(s.At(v), y, draw.Marker{Shape: draw.Circle, Solid: true, Size: 1.5})
		}
	}
}
