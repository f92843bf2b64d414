package cone

import (
	"math"
	"slices"
)

// median reorders its argument. It is zero where there is nothing.
func median(x []float64) float64 {
	n := len(x)
	if n == 0 {
		return 0
	}
	upper := nth(x, n/2)
	if n%2 == 1 {
		return upper
	}
	// nth leaves nothing greater than its answer before it.
	return (slices.Max(x[:n/2]) + upper) / 2
}

// few is a length that is sorted faster than it is searched.
const few = 10

// nth reorders x so that x[k] is what it would be if sorted, with nothing greater
// before it and nothing less after it, and returns it. Each step keeps the side of
// a middle pivot that holds k: linear on the whole, where sorting a sounding is not.
func nth(x []float64, k int) float64 {
	low, high := 0, len(x)-1
	for high-low > few {
		pivot := x[low+(high-low)/2]
		i, j := low, high
		for i <= j {
			for x[i] < pivot {
				i++
			}
			for x[j] > pivot {
				j--
			}
			if i <= j {
				x[i], x[j] = x[j], x[i]
				i, j = i+1, j-1
			}
		}
		switch {
		case k <= j:
			high = j
		case k >= i:
			low = i
		default:
			return x[k]
		}
	}
	for i := low + 1; i <= high; i++ {
		for j := i; j > low && x[j] < x[j-1]; j-- {
			x[j], x[j-1] = x[j-1], x[j]
		}
	}
	return x[k]
}

// madToSD turns the median absolute deviation of normal values into their
// standard deviation.
const madToSD = 1.4826

// robustSD is the standard deviation by the median absolute deviation. It
// destroys its argument.
func robustSD(x []float64) float64 {
	m := median(x)
	for i := range x {
		x[i] = math.Abs(x[i] - m)
	}
	return madToSD * median(x)
}
