package design

import (
	"errors"
	"fmt"
	"math"
	"sort"

	"pastload/profile"
)

// Errors of the numeric core.
var (
	// ErrTooFew says that the sample has too few values for the formula.
	ErrTooFew = errors.New("too few values")
	// ErrOutOfRange says that a value or an argument lies outside the domain.
	ErrOutOfRange = errors.New("out of range")
)

// An Observation is one value of a quantity at a depth.
type Observation struct {
	Borehole string  `json:"borehole"` // values of one borehole are correlated by their depths
	Depth    float64 `json:"depth_m"`
	Value    float64 `json:"value"`
	Weight   float64 `json:"weight,omitempty"` // relative; 0 counts as 1
	Label    string  `json:"label,omitempty"`  // specimen, or where it was read
}

func (o Observation) weight() float64 {
	if o.Weight == 0 {
		return 1
	}
	return o.Weight
}

// A Sample is the observations of one quantity in one stratum. The order of its
// rows never matters.
type Sample []Observation

// largest bounds what is computed with, so that no sum of squares overflows. No
// quantity of the ground comes near it.
const largest = 1e100

// finite reports whether v is a number that can be written.
func finite(v float64) bool { return math.Abs(v) <= math.MaxFloat64 }

// check returns an error where a value, depth or weight cannot be computed with.
func (s Sample) check() error {
	for _, o := range s {
		if !(math.Abs(o.Value) <= largest) || !(math.Abs(o.Depth) <= largest) {
			return fmt.Errorf("%w: %s at %g m is %g; want finite numbers", ErrOutOfRange, o.Label, o.Depth, o.Value)
		}
		if o.Weight != 0 && !(o.Weight >= 1/largest && o.Weight <= largest) {
			return fmt.Errorf("%w: weight of %s at %g m is %g; want more than zero, or zero for one", ErrOutOfRange, o.Label, o.Depth, o.Weight)
		}
	}
	return nil
}

// ordered returns a copy in the total order borehole, depth, value, weight,
// label, so that sums do not depend on the order of the rows.
func (s Sample) ordered() Sample {
	c := append(Sample(nil), s...)
	sort.Slice(c, func(i, j int) bool {
		a, b := c[i], c[j]
		switch {
		case a.Borehole != b.Borehole:
			return a.Borehole < b.Borehole
		case a.Depth != b.Depth:
			return a.Depth < b.Depth
		case a.Value != b.Value:
			return a.Value < b.Value
		case a.Weight != b.Weight:
			return a.Weight < b.Weight
		}
		return a.Label < b.Label
	})
	return c
}

// values returns the values from least to greatest.
func (s Sample) values() []float64 {
	v := make([]float64, len(s))
	for i, o := range s {
		v[i] = o.Value
	}
	sort.Float64s(v)
	return v
}

// A Summary describes a sample. Numbers that the sample is too small for, or
// that have no meaning for it, are not known.
type Summary struct {
	N      int            `json:"n"`
	Min    profile.Number `json:"min"`
	Max    profile.Number `json:"max"`
	Mean   profile.Number `json:"mean"`
	Median profile.Number `json:"median"`
	SD     profile.Number `json:"sd"`  // from two values on
	COV    profile.Number `json:"cov"` // where the mean is greater than zero
}

// Summarize returns the summary of a sample. SD divides by n − 1; with unequal
// weights mean and SD are the weighted ones (see Moments), while median, least
// and greatest ignore weights. An empty sample gives a Summary of nothing known.
// The error wraps ErrOutOfRange where a value is not finite.
func Summarize(s Sample) (Summary, error) {
	if err := s.check(); err != nil {
		return Summary{}, err
	}
	sum := Summary{N: len(s)}
	if len(s) == 0 {
		return sum, nil
	}
	v := s.values()
	m := moments(s)
	sum.Min, sum.Max = profile.Known(v[0]), profile.Known(v[len(v)-1])
	sum.Mean, sum.Median = profile.Known(m.Mean), profile.Known(median(v))
	if len(s) > 1 {
		sum.SD = profile.Known(m.SD)
		if m.Mean > 0 {
			sum.COV = profile.Known(m.SD / m.Mean)
		}
	}
	return sum, nil
}

// Moments are what the formulas of cautious estimates need of a sample, on the
// scale on which they work (values, or their natural logarithms).
type Moments struct {
	Count float64 // number of independent values of equal weight that the sample is worth
	Mean  float64
	SD    float64 // zero for a single value
}

// moments returns the weighted mean and standard deviation
//
//	m = Σwx/Σw,   s² = Σw(x−m)² / (Σw − Σw²/Σw),   count = (Σw)²/Σw²
//
// (reliability weights; Kish's effective size). Equal weights give the plain
// mean, the n − 1 standard deviation and n.
func moments(s Sample) Moments {
	s = s.ordered()
	var w, ww, wx float64
	for _, o := range s {
		w += o.weight()
		ww += o.weight() * o.weight()
		wx += o.weight() * o.Value
	}
	m := Moments{Count: w * w / ww, Mean: wx / w}
	// The mean of equal values must be that value to the last bit: a scatter
	// made of rounding would pass for measured.
	if v := s.values(); v[0] == v[len(v)-1] {
		m.Mean = v[0]
	}
	if len(s) < 2 {
		return m
	}
	var squares float64
	for _, o := range s {
		d := o.Value - m.Mean
		squares += o.weight() * d * d
	}
	m.SD = math.Sqrt(squares / (w - ww/w))
	return m
}

// median returns the middle of sorted values.
func median(sorted []float64) float64 {
	n := len(sorted)
	if n%2 == 1 {
		return sorted[n/2]
	}
	return sorted[n/2-1] + (sorted[n/2]-sorted[n/2-1])/2
}

// A Distribution is the scale on which a quantity is taken to be normal.
type Distribution int

const (
	Normal    Distribution = iota // the value itself
	LogNormal                     // its natural logarithm
)

// String returns "normal" or "log-normal".
func (d Distribution) String() string { return [...]string{"normal", "log-normal"}[d] }

// onScale returns the sample on the working scale of d. The error wraps
// ErrOutOfRange where a log-normal quantity is not greater than zero.
func (s Sample) onScale(d Distribution) (Sample, error) {
	if err := s.check(); err != nil {
		return nil, err
	}
	if d == Normal {
		return s, nil
	}
	c := append(Sample(nil), s...)
	for i := range c {
		if c[i].Value <= 0 {
			return nil, fmt.Errorf("%w: %s at %g m is %g; a log-normal quantity is greater than zero", ErrOutOfRange, c[i].Label, c[i].Depth, c[i].Value)
		}
		c[i].Value = math.Log(c[i].Value)
	}
	return c, nil
}

// back returns a value of the working scale as the quantity.
func (d Distribution) back(v float64) float64 {
	if d == LogNormal {
		return math.Exp(v)
	}
	return v
}

// interval returns centre ∓ margin of the working scale as the quantity. The error
// wraps ErrOutOfRange where that is too large for a number.
func (d Distribution) interval(centre, margin float64) (Interval, error) {
	i := Interval{d.back(centre - margin), d.back(centre + margin)}
	if !(math.Abs(i.Low) <= math.MaxFloat64) || !(math.Abs(i.High) <= math.MaxFloat64) {
		return Interval{}, fmt.Errorf("%w: the margin is too wide for a number", ErrOutOfRange)
	}
	return i, nil
}

// spread returns the standard deviation on the working scale of a quantity with
// mean m (on that scale) and coefficient of variation cov:
//
//	normal V·|m|;   log-normal √ln(1 + V²)
func (d Distribution) spread(m, cov float64) float64 {
	if d == LogNormal {
		return math.Sqrt(math.Log1p(cov * cov))
	}
	return cov * math.Abs(m)
}
