package sheet

import (
	"math"
	"testing"

	"pgregory.net/rapid"

	"pastload/render/draw"
)

// TestSpread holds spread to what it promises: inside the ends, in order of
// depth, no overlaps, and nobody moved who need not.
func TestSpread(t *testing.T) {
	const slack = 1e-9 // mm, rounding of sums
	rapid.Check(t, func(r *rapid.T) {
		const low, high = 10.0, 110.0
		var notes []note
		for i := range rapid.IntRange(0, 40).Draw(r, "n") {
			top := rapid.Float64Range(low, high).Draw(r, "top")
			notes = append(notes, note{top: top, base: math.Min(high, top+5), font: draw.Font{Size: 7}, rank: float64(i), lines: make([]draw.Label, rapid.IntRange(1, 3).Draw(r, "lines"))})
		}
		placed, left := spread(notes, low, high)
		if len(placed)+left != len(notes) {
			r.Fatalf("%d placed and %d left out of %d", len(placed), left, len(notes))
		}
		edge, want := low, math.Inf(-1)
		for _, n := range placed {
			if n.y-n.height()/2 < edge-slack {
				r.Fatalf("label at %v overlaps the one above, which ends at %v", n.y, edge)
			}
			if n.want() < want {
				r.Fatal("labels are out of order")
			}
			edge, want = n.y+n.height()/2, n.want()
		}
		if edge > high+slack {
			r.Fatalf("last label ends at %v, beyond %v", edge, high)
		}
		if left > 0 && moved(placed) > 4 {
			r.Fatalf("labels were left out and one still stands %v mm off", moved(placed))
		}
		if total(notes) <= high-low && left > 0 {
			r.Fatal("a label was left out although there is room")
		}
	})
}

func TestSpreadLeavesAloneWhatFits(t *testing.T) {
	f := draw.Font{Size: 7}
	notes := []note{{top: 20, base: 40, font: f, lines: make([]draw.Label, 2)}, {top: 40, base: 60, font: f, lines: make([]draw.Label, 2)}}
	placed, _ := spread(notes, 0, 100)
	for i, want := range []float64{30, 50} {
		if math.Abs(placed[i].y-want) > 1e-12 {
			t.Errorf("label %d stands at %v, want the middle of its stratum, %v", i, placed[i].y, want)
		}
	}
}
