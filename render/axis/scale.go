package axis

import "math"

// A Scale places values between two points on paper.
type Scale interface {
	// At returns the place of a value in mm. Values beyond the ends go beyond
	// the ends; one that is not finite, or has no logarithm, goes to the lower
	// end.
	At(v float64) float64
	// Clamp returns the place of a value, kept between the ends, and which end
	// it was beyond: -1 the lower, +1 the upper, 0 neither.
	Clamp(v float64) (float64, int)
	// Ends returns the values at the ends.
	Ends() (low, high float64)
}

// Linear is a scale of equal steps.
type Linear struct {
	low, high float64 // values
	from, to  float64 // mm
}

// NewLinear returns the scale with low at from and high at to, in mm. Ends that
// meet or are not finite are widened to one unit.
func NewLinear(low, high, from, to float64) Linear {
	if !isFinite(low) {
		low = 0
	}
	if !isFinite(high) || high <= low {
		high = low + math.Max(1, math.Abs(low)*1e-6)
	}
	return Linear{low, high, from, to}
}

// At implements Scale.
func (s Linear) At(v float64) float64 {
	if !isFinite(v) {
		v = s.low
	}
	return s.from + (v-s.low)/(s.high-s.low)*(s.to-s.from)
}

// Clamp implements Scale.
func (s Linear) Clamp(v float64) (float64, int) { return clamp(s, v) }

// Ends implements Scale.
func (s Linear) Ends() (float64, float64) { return s.low, s.high }

// Log is a scale of equal ratios.
type Log struct {
	low, high float64 // values, greater than zero
	from, to  float64 // mm
}

// NewLog returns the scale with low at from and high at to, in mm. Ends that
// have no logarithm are set to 0.1 and to ten times the lower.
func NewLog(low, high, from, to float64) Log {
	const (
		closest = 1 + 1e-9 // ends whose logarithms can be told apart
		least   = 1e-300   // below, numbers lose their digits
	)
	if !isFinite(low) || low < least {
		low = 0.1
	}
	if !isFinite(high) || high <= low*closest {
		high = low * 10
	}
	return Log{low, high, from, to}
}

// At implements Scale.
func (s Log) At(v float64) float64 {
	if !isFinite(v) || v <= 0 {
		v = s.low
	}
	return s.from + (math.Log(v)-math.Log(s.low))/(math.Log(s.high)-math.Log(s.low))*(s.to-s.from)
}

// Clamp implements Scale.
func (s Log) Clamp(v float64) (float64, int) { return clamp(s, v) }

// Ends implements Scale.
func (s Log) Ends() (float64, float64) { return s.low, s.high }

func clamp(s Scale, v float64) (float64, int) {
	low, high := s.Ends()
	switch {
	case v < low || math.IsNaN(v):
		return s.At(low), -1
	case v > high:
		return s.At(high), 1
	}
	return s.At(v), 0
}

// isFinite reports whether v, and differences of such values, are numbers.
func isFinite(v float64) bool { return math.Abs(v) <= 1e300 }
