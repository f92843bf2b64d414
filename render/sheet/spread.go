package sheet

import (
	"math"
	"sort"

	"pastload/render/draw"
)

// A note is a label beside a stretch of depth: it wants to stand at the middle
// of the stretch and moves where others need the room.
type note struct {
	top, base float64 // the stretch on paper, mm
	lines     []draw.Label
	font      draw.Font
	rank      float64 // what is left out first when there is no room: the lowest
	y         float64 // the middle of the label, once spread
}

func (n note) want() float64   { return (n.top + n.base) / 2 }
func (n note) height() float64 { return float64(len(n.lines))*n.font.Line() + 0.5 }

// spread gives each note a place between two heights: in order of depth, without
// overlaps, as near to where they want to stand as least squares allows (pool
// adjacent violators). Where they do not all fit, those of the highest rank are
// kept that can stand near their stretch; how many are left out is returned.
func spread(notes []note, low, high float64) ([]note, int) {
	if total(notes) <= high-low {
		return arrange(notes, low, high), 0
	}
	const near = 4 // mm
	order := make([]int, len(notes))
	for i := range order {
		order[i] = i
	}
	sort.SliceStable(order, func(a, b int) bool { return notes[order[a]].rank > notes[order[b]].rank })
	var kept []note
	for _, i := range order {
		more := append(kept[:len(kept):len(kept)], notes[i])
		if total(more) > high-low {
			continue
		}
		if placed := arrange(more, low, high); moved(placed) <= near {
			kept = placed
		}
	}
	return kept, len(notes) - len(kept)
}

// moved returns the farthest that a note stands off its stretch, in mm.
func moved(notes []note) float64 {
	far := 0.0
	for _, n := range notes {
		far = math.Max(far, math.Max(n.top-n.y, n.y-n.base))
	}
	return far
}

// arrange places notes that fit between two heights.
func arrange(notes []note, low, high float64) []note {
	kept := append([]note(nil), notes...)
	sort.SliceStable(kept, func(i, j int) bool { return kept[i].want() < kept[j].want() })
	// A block of notes that touch moves as one; its place is the mean of what its
	// members want, kept inside the ends.
	type block struct {
		first, n    int
		sum, height float64
	}
	place := func(b block) float64 {
		y := b.sum / float64(b.n)
		return math.Max(low, math.Min(high-b.height, y))
	}
	var blocks []block
	for i := range kept {
		b := block{i, 1, kept[i].want() - kept[i].height()/2, kept[i].height()}
		for len(blocks) > 0 {
			p := blocks[len(blocks)-1]
			if place(p)+p.height <= place(b) {
				break
			}
			// In the merged block the later members start lower by the height of
			// the earlier ones.
			b = block{p.first, p.n + b.n, p.sum + b.sum - float64(b.n)*p.height, p.height + b.height}
			blocks = blocks[:len(blocks)-1]
		}
		blocks = append(blocks, b)
	}
	for _, b := range blocks {
		y := place(b)
		for i := b.first; i < b.first+b.n; i++ {
			kept[i].y = y + kept[i].height()/2
			y += kept[i].height()
		}
	}
	return kept
}

func total(notes []note) float64 {
	sum := 0.0
	for _, n := range notes {
		sum += n.height()
	}
	return sum
}

// drawNotes writes notes that have been spread, with their left edge at x, and a
// leader from each stretch at from to its label where that has moved.
func drawNotes(c *draw.Canvas, notes []note, from, x float64) {
	for _, n := range notes {
		if n.y-n.height()/2 < n.top-0.3 || n.y+n.height()/2 > n.base+0.3 {
			c.Polyline([]draw.Point{{X: from, Y: n.want()}, {X: from + (x-from)*0.3, Y: n.want()}, {X: x - 0.3, Y: n.y}}, draw.Pen{Width: draw.Hair})
		}
		y := n.y - n.height()/2 + 0.25
		for _, l := range n.lines {
			y += n.font.Line()
			c.Halo(x, y-0.22*n.font.Line(), l, n.font)
		}
	}
}

// stacked turns lines of text into labels.
func stacked(lines []string) []draw.Label {
	labels := make([]draw.Label, len(lines))
	for i, l := range lines {
		labels[i] = draw.Text(l)
	}
	return labels
}
