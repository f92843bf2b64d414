package review

import (
	"math"
	"strings"
)

// typedDepth returns the depth as it stands in the table.
func (r *row) typedDepth() string {
	if s := r.depth.Source; s != nil {
		if x, ok := plainNumber(strings.TrimSpace(s.Text)); ok && x == r.depth.Value {
			return strings.TrimSpace(s.Text)
		}
	}
	return fixed(r.depth.Value, 2)
}

// depthSlips lists depths that may have been meant.
func depthSlips(text string) []slip {
	x, ok := plainNumber(text)
	if !ok {
		return nil
	}
	var out []slip
	for _, y := range swaps(text) {
		out = append(out, slip{value: y, how: "two digits exchanged", cost: costDepthSlip})
	}
	for _, d := range []float64{10, 20, 30} {
		out = append(out, slip{value: x + d, how: "the first digit was lost", cost: costDepthSlip})
	}
	if x >= 10 {
		out = append(out, slip{value: math.Mod(x, 10), how: "a digit too many", cost: costDepthSlip})
	}
	return append(out, slip{value: x * 10, how: "decimal point one place out", cost: costDepthSlip}, slip{value: x / 10, how: "decimal point one place out", cost: costDepthSlip})
}

// inOrder tells whether a depth lies between those of the rows before and after
// it in the table, where that is known.
func (r *row) inOrder(depth float64) bool {
	if r.result == nil || r.result.Source == nil {
		return false
	}
	low, high := math.Inf(-1), math.Inf(1)
	before, after := -1, math.MaxInt
	for i := range r.borehole.Results {
		o := &r.borehole.Results[i]
		if o == r.result || o.Source == nil || o.Source.File != r.result.Source.File {
			continue
		}
		switch line := o.Source.Line; {
		case line < r.result.Source.Line && line > before:
			before, low = line, o.Depth.Value
		case line > r.result.Source.Line && line < after:
			after, high = line, o.Depth.Value
		}
	}
	return depth >= low && depth <= high
}
