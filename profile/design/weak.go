package design

import (
	"math"
	"sort"
)

// A weakRun is a run of values, next to each other in depth, that differ from the
// rest.
type weakRun struct {
	from, to   float64 // m
	n          int
	difference float64 // of its mean from that of the rest, on the scale compared
	p          float64
}

// weakZone looks for a run of two or more values, at most half of them, whose mean
// differs from the others to the unfavourable side. Every run is compared by
// Student's t, and its chance is multiplied by the number of runs tried
// (Bonferroni), so that a run found by searching is not taken for one foreseen.
// flat holds the same observations as sample on the scale of the comparison.
func weakZone(sample, flat Sample, side string, limit float64) (weakRun, bool) {
	n := len(sample)
	if n < 6 {
		return weakRun{}, false
	}
	order := make([]int, n)
	for i := range order {
		order[i] = i
	}
	sort.SliceStable(order, func(a, b int) bool {
		x, y := sample[order[a]], sample[order[b]]
		if x.Depth != y.Depth {
			return x.Depth < y.Depth
		}
		if x.Borehole != y.Borehole {
			return x.Borehole < y.Borehole
		}
		return x.Value < y.Value
	})
	// Sums from the first value on give any run in one step: searching all runs
	// of a thousand values must not take a million sums of a thousand.
	sum, squares := make([]float64, n+1), make([]float64, n+1)
	centre := moments(flat).Mean
	for i, k := range order {
		v := flat[k].Value - centre
		sum[i+1], squares[i+1] = sum[i]+v, squares[i]+v*v
	}
	best, length, strongest := 0, 0, 0.0
	tried := 0
	for k := 2; k <= n/2; k++ {
		for i := 0; i+k <= n; i++ {
			tried++
			t := runDifference(sum[i+k]-sum[i], squares[i+k]-squares[i], k, sum[n], squares[n], n)
			if side == Low && t > 0 || side == High && t < 0 {
				continue
			}
			if math.Abs(t) > strongest*(1+1e-12) {
				best, length, strongest = i, k, math.Abs(t)
			}
		}
	}
	if length == 0 {
		return weakRun{}, false
	}
	p := math.Min(1, 2*studentTail(strongest, float64(n-2))*float64(tried))
	if side != Both {
		p /= 2
	}
	if p >= limit {
		return weakRun{}, false
	}
	here := sum[best+length] - sum[best]
	return weakRun{
		from: sample[order[best]].Depth, to: sample[order[best+length-1]].Depth, n: length, p: p,
		difference: here/float64(length) - (sum[n]-here)/float64(n-length),
	}, true
}

// runDifference returns Student's t of the mean of k values against the mean of
// the other n − k, from sums and sums of squares.
func runDifference(sum, squares float64, k int, allSum, allSquares float64, n int) float64 {
	a, b := float64(k), float64(n-k)
	here, rest := sum/a, (allSum-sum)/b
	within := squares - a*here*here + (allSquares - squares) - b*rest*rest
	variance := within / float64(n-2)
	if !(variance > 1e-24*math.Max(allSquares, 1e-300)) {
		return 0
	}
	return (here - rest) / math.Sqrt(variance*(1/a+1/b))
}
