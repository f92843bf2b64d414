package sheet

import (
	"math"

	"pastload/render/draw"
)

// A placer finds room for labels among what is already drawn in a panel.
type placer struct {
	area  draw.Box
	taken []obstacle
}

// An obstacle is a box that labels should keep clear of, the more so the heavier
// it is: a line can be crossed, another label cannot.
type obstacle struct {
	draw.Box
	weight float64
}

// The weights of obstacles.
const (
	lineWeight  = 1
	pointWeight = 2
	labelWeight = 8
)

// line marks the course of a line as taken.
func (p *placer) line(points []draw.Point) {
	const every = 1.5 // mm
	for i := 1; i < len(points); i++ {
		a, b := points[i-1], points[i]
		n := int(math.Min(400, math.Ceil(math.Hypot(b.X-a.X, b.Y-a.Y)/every)))
		for k := 0; k < n; k++ {
			t := float64(k) / float64(n)
			p.add(a.X+t*(b.X-a.X), a.Y+t*(b.Y-a.Y), 0.35, lineWeight)
		}
	}
}

// point marks a data point as taken.
func (p *placer) point(x, y, r float64) { p.add(x, y, r, pointWeight) }

func (p *placer) add(x, y, r, weight float64) {
	p.taken = append(p.taken, obstacle{draw.Box{Left: x - r, Top: y - r, Right: x + r, Bottom: y + r}, weight})
}

// cost is what a label in a box would cover, in weighted mm², and what of it would
// stand outside the panel.
func (p *placer) cost(b draw.Box) float64 {
	inside := b.Overlap(p.area)
	cost := 50 * (b.Width()*b.Height() - inside)
	for _, t := range p.taken {
		if t.Left < b.Right && t.Right > b.Left && t.Top < b.Bottom && t.Bottom > b.Top {
			cost += t.weight * b.Overlap(t.Box)
		}
	}
	return cost
}

// at draws a label at the cheapest of the candidate places, and takes it. The
// order of candidates is the order of preference.
func (p *placer) at(c *draw.Canvas, candidates []draw.Point, anchors []draw.Anchor, l draw.Label, f draw.Font) draw.Box {
	best, lowest := -1, math.Inf(1)
	for i, q := range candidates {
		cost := p.cost(anchored(f, anchors[i]).Bounds(q.X, q.Y, l).Inset(-0.2)) + 0.02*float64(i)
		if cost < lowest {
			best, lowest = i, cost
		}
	}
	if best < 0 {
		return draw.Box{}
	}
	f.Anchor = anchors[best]
	b := f.Bounds(candidates[best].X, candidates[best].Y, l)
	c.Halo(candidates[best].X, candidates[best].Y, l, f)
	p.taken = append(p.taken, obstacle{b, labelWeight})
	return b
}

// beside labels a line somewhere along its course, from its lower end upwards.
func (p *placer) beside(c *draw.Canvas, line []draw.Point, l draw.Label, f draw.Font) {
	if len(line) == 0 {
		return
	}
	var at []draw.Point
	var anchors []draw.Anchor
	for k := 0; k < 24; k++ {
		q := line[len(line)-1-k*(len(line)-1)/24]
		at = append(at, draw.Point{X: q.X + 0.8, Y: q.Y - 0.6}, draw.Point{X: q.X - 0.8, Y: q.Y - 0.6})
		anchors = append(anchors, draw.Start, draw.End)
	}
	p.at(c, at, anchors, l, f)
}

// around labels a data point.
func (p *placer) around(c *draw.Canvas, x, y, r float64, l draw.Label, f draw.Font) {
	h := f.Height()
	at := []draw.Point{
		{X: x + r, Y: y + h/2}, {X: x - r, Y: y + h/2}, {X: x + r*0.7, Y: y - r*0.7}, {X: x + r*0.7, Y: y + r*0.7 + h},
		{X: x - r*0.7, Y: y - r*0.7}, {X: x - r*0.7, Y: y + r*0.7 + h}, {X: x, Y: y - r - 0.3}, {X: x, Y: y + r + h + 0.3},
	}
	p.at(c, at, []draw.Anchor{draw.Start, draw.End, draw.Start, draw.Start, draw.End, draw.End, draw.Middle, draw.Middle}, l, f)
}
