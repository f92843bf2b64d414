package design

import (
	"fmt"
	"math"
	"slices"
	"sort"
)

// madFactors corrects 1.4826·MAD to be unbiased for normal samples of n, by
// simulation (near those of Croux & Rousseeuw 1992).
var madFactors = []struct{ n, factor float64 }{
	{3, 1.47}, {4, 1.37}, {5, 1.21}, {6, 1.19}, {7, 1.13}, {8, 1.13}, {9, 1.11}, {10, 1.10}, {12, 1.07}, {15, 1.06},
}

// madFactor returns the small-sample factor for n ≥ 3: from the table, linear
// between its rows, and 1 + 0.9/n beyond it, which joins the last row.
func madFactor(n float64) float64 {
	for i, row := range madFactors {
		if n <= row.n {
			if i == 0 || n == row.n {
				return row.factor
			}
			before := madFactors[i-1]
			return before.factor + (row.factor-before.factor)*(n-before.n)/(row.n-before.n)
		}
	}
	return 1 + 0.9/n
}

// RobustSD returns the standard deviation that the median of the absolute
// deviations from the median stands for:
//
//	1.4826 · MAD · factor(n)
//
// with a factor for small samples from simulation. A single wild value cannot
// change it much. The error wraps ErrTooFew below three values.
func RobustSD(s Sample) (float64, error) {
	if err := s.check(); err != nil {
		return 0, err
	}
	if len(s) < 3 {
		return 0, fmt.Errorf("%w: %d for a robust scatter; want 3", ErrTooFew, len(s))
	}
	v := s.values()
	middle := median(v)
	for i := range v {
		v[i] = math.Abs(v[i] - middle)
	}
	sort.Float64s(v)
	return 1.4826 * median(v) * madFactor(float64(len(v))), nil
}

// TheilSen returns the line whose slope is the median of the slopes between all
// pairs of values at different depths, and whose intercept at ground level is
// the median of y − slope·z (Theil 1950; Sen 1968). Up to 29 % of the values may
// be wild. The error wraps ErrTooFew where fewer than two depths differ.
func TheilSen(s Sample) (slope, intercept float64, err error) {
	if err := s.check(); err != nil {
		return 0, 0, err
	}
	s = s.ordered()
	slopes := make([]float64, 0, len(s)*(len(s)-1)/2)
	for i, a := range s {
		for _, b := range s[i+1:] {
			if a.Depth != b.Depth {
				slopes = append(slopes, (b.Value-a.Value)/(b.Depth-a.Depth))
			}
		}
	}
	if len(slopes) == 0 {
		return 0, 0, fmt.Errorf("%w: no two depths for a slope", ErrTooFew)
	}
	slope = middleOf(slopes)
	rest := make([]float64, len(s))
	for i, o := range s {
		rest[i] = o.Value - slope*o.Depth
	}
	return slope, middleOf(rest), nil
}

// middleOf returns the median of values that it may reorder. A thousand results
// have half a million slopes, which take far longer to sort than to halve.
func middleOf(v []float64) float64 {
	k := len(v) / 2
	upper := nth(v, k)
	if len(v)%2 == 1 {
		return upper
	}
	lower := slices.Max(v[:k])
	return lower + (upper-lower)/2
}

// nth puts the k-th smallest value in its place, nothing greater before it and
// nothing smaller after, and returns it (Hoare's selection; the pivot is the
// middle of three, so that sorted input is no bad case).
func nth(v []float64, k int) float64 {
	low, high := 0, len(v)-1
	for low < high {
		a, b, c := v[low], v[low+(high-low)/2], v[high]
		pivot := math.Max(math.Min(a, b), math.Min(math.Max(a, b), c))
		i, j := low, high
		for i <= j {
			for v[i] < pivot {
				i++
			}
			for v[j] > pivot {
				j--
			}
			if i <= j {
				v[i], v[j] = v[j], v[i]
				i++
				j--
			}
		}
		switch {
		case k <= j:
			high = j
		case k >= i:
			low = i
		default:
			return v[k]
		}
	}
	return v[k]
}

// GrubbsCritical returns the two-sided 5 % critical value of Grubbs' test:
//
//	G = (n − 1)/√n · √(t²/(n − 2 + t²)),  t the upper 0.05/(2n) point of Student's t with n − 2
//
// (Grubbs 1969). n must be three or more; else the error wraps ErrTooFew.
func GrubbsCritical(n int) (float64, error) {
	if n < 3 {
		return 0, fmt.Errorf("%w: %d for Grubbs' test; want 3", ErrTooFew, n)
	}
	m := float64(n)
	t := studentQuantile(1-0.05/(2*m), m-2)
	return (m - 1) / math.Sqrt(m) * math.Sqrt(t*t/(m-2+t*t)), nil
}

// A Look is a value that deserves a second look because it lies far from the
// others. It is never a reason to leave a value out: that wants a physical one.
type Look struct {
	Observation
	Rule      string  `json:"rule"`
	Statistic float64 `json:"statistic"`
	Critical  float64 `json:"critical"`
}

// The rules below fire too often on clean small samples: Grubbs is not for six
// values or fewer, and the modified z, even with the corrected scatter, not for
// fewer than six.
const (
	grubbsLeast    = 7
	modifiedZLeast = 6
	modifiedZLimit = 3.5 // Iglewicz & Hoaglin 1993
)

// Looks returns the values of a sample that lie far from the others by Grubbs'
// test (one value at most) or else by the modified z-score |x − median|/RobustSD.
// Give it residuals where the quantity changes with depth.
func Looks(s Sample) []Look {
	if s.check() != nil {
		return nil
	}
	s = s.ordered()
	var looks []Look
	if m := momentsOrZero(s); len(s) >= grubbsLeast && m.SD > 0 {
		far := 0
		for i := range s {
			if math.Abs(s[i].Value-m.Mean) > math.Abs(s[far].Value-m.Mean) {
				far = i
			}
		}
		g := math.Abs(s[far].Value-m.Mean) / m.SD
		if critical, err := GrubbsCritical(len(s)); err == nil && g > critical && finite(g) {
			looks = append(looks, Look{s[far], "Grubbs 5 %", g, critical})
		}
	}
	if sd, err := RobustSD(s); err == nil && len(s) >= modifiedZLeast && sd > 0 {
		middle := median(s.values())
		for _, o := range s {
			if z := math.Abs(o.Value-middle) / sd; z > modifiedZLimit && finite(z) && (len(looks) == 0 || looks[0].Observation != o) {
				looks = append(looks, Look{o, "modified z", z, modifiedZLimit})
			}
		}
	}
	return looks
}

// momentsOrZero returns the moments of a sample that may be empty.
func momentsOrZero(s Sample) Moments {
	if len(s) == 0 {
		return Moments{}
	}
	return moments(s)
}

// chanceOfDifference returns the two-sided chance that two groups of normal
// values with one variance differ so much in their means (Student 1908). ok is
// false where there is nothing to compare.
func chanceOfDifference(a, b []float64) (p float64, ok bool) {
	if len(a) == 0 || len(b) == 0 || len(a)+len(b) < 4 {
		return 0, false
	}
	ma, sa := meanAndSquares(a)
	mb, sb := meanAndSquares(b)
	df := float64(len(a) + len(b) - 2)
	s := math.Sqrt((sa + sb) / df)
	if s == 0 {
		return 0, ma != mb
	}
	t := math.Abs(ma-mb) / (s * math.Sqrt(1/float64(len(a))+1/float64(len(b))))
	return 2 * studentTail(t, df), true
}

func meanAndSquares(v []float64) (mean, squares float64) {
	for _, x := range v {
		mean += x
	}
	mean /= float64(len(v))
	for _, x := range v {
		squares += (x - mean) * (x - mean)
	}
	return mean, squares
}
