package design

import (
	"fmt"
	"math"
)

// A DepthLine is a least-squares line of a quantity with depth, on its working scale:
//
//	x(z) = Mean + Slope·(z − MeanDepth)
//
// Weights enter as weights of the squared residuals, scaled to a mean of one.
type DepthLine struct {
	N            int
	Distribution Distribution
	Mean         float64 // of the values, on the working scale
	MeanDepth    float64 // m
	Slope        float64 // working scale per m
	SD           float64 // √(Σr²/(n − 2)), working scale
	Spread       float64 // Szz = Σ(z − MeanDepth)², m²
	From, To     float64 // tested depths, m
	P            float64 // two-sided chance of so steep a slope where there is none
}

// RealSlope is the chance below which a slope is taken as real. Choice of this
// program: with a handful of tests a 5 % test would hide most trends.
const RealSlope = 0.1

// FitLine returns the least-squares line through a sample. The errors wrap
// ErrTooFew for fewer than three values or depths that do not differ, and
// ErrOutOfRange where a log-normal quantity is not greater than zero.
func FitLine(s Sample, d Distribution) (DepthLine, error) {
	scaled, err := s.onScale(d)
	if err != nil {
		return DepthLine{}, err
	}
	if len(s) < 3 {
		return DepthLine{}, fmt.Errorf("%w: %d for a line with depth; want 3", ErrTooFew, len(s))
	}
	scaled = scaled.ordered()
	l := DepthLine{N: len(s), Distribution: d, From: math.Inf(1), To: math.Inf(-1)}
	var w float64
	for _, o := range scaled {
		w += o.weight()
		l.Mean += o.weight() * o.Value
		l.MeanDepth += o.weight() * o.Depth
		l.From, l.To = math.Min(l.From, o.Depth), math.Max(l.To, o.Depth)
	}
	l.Mean, l.MeanDepth = l.Mean/w, l.MeanDepth/w
	if l.To-l.From <= 1e-9*math.Max(1, math.Abs(l.To)) {
		return DepthLine{}, fmt.Errorf("%w: all %d values are at one depth", ErrTooFew, len(s))
	}
	scale := float64(len(s)) / w
	var cross, total float64
	for _, o := range scaled {
		dz, dx := o.Depth-l.MeanDepth, o.Value-l.Mean
		l.Spread += scale * o.weight() * dz * dz
		cross += scale * o.weight() * dz * dx
		total += scale * o.weight() * dx * dx
	}
	l.Slope = cross / l.Spread
	var squares float64
	for _, o := range scaled {
		r := o.Value - l.Mean - l.Slope*(o.Depth-l.MeanDepth)
		squares += scale * o.weight() * r * r
	}
	df := float64(len(s) - 2)
	l.SD = math.Sqrt(squares / df)
	l.P = slopeChance(l, total, df)
	if !finite(l.Slope) || !finite(l.SD) || !finite(l.SlopeAt(l.From)) || !finite(l.SlopeAt(l.To)) || !finite(l.P) {
		return DepthLine{}, fmt.Errorf("%w: the slope is too steep for a number", ErrOutOfRange)
	}
	return l, nil
}

// straighter is how much better, as a difference of −2 ln likelihood, a line through
// the values themselves must fit before it replaces one through their logarithms.
// The rule of Burnham & Anderson for a supported model (from memory, unverified).
const straighter = 4

// FitTrend returns the line of a quantity with depth. A log-normal quantity gets a
// line through its logarithms, unless a line through the values is clearly better,
// as it is where σ′p grows straight with σ′v0 over a great depth:
//
//	n·ln(Σr²/n)  against  n·ln(Σr_ln²/n) + 2Σ ln x
//
// The errors are those of FitLine.
func FitTrend(s Sample, d Distribution) (DepthLine, error) {
	l, err := FitLine(s, d)
	if err != nil || d == Normal {
		return l, err
	}
	straight, err := FitLine(s, Normal)
	switch {
	case err != nil:
		return l, err
	case straight.SD == 0:
		return straight, nil
	case l.SD == 0:
		return l, nil
	}
	n := float64(l.N)
	gain := 2 * n * math.Log(l.SD/straight.SD)
	for _, o := range s.ordered() {
		gain += 2 * math.Log(o.Value)
	}
	if gain > straighter {
		return straight, nil
	}
	return l, nil
}

// slopeChance returns the two-sided chance of the slope. Values that are equal
// but for rounding have no slope, and a line through every value has no chance.
func slopeChance(l DepthLine, total, df float64) float64 {
	const rounding = 1e-24 // (1e-12)²: twelve digits of the values
	size := float64(l.N) * l.Mean * l.Mean
	switch {
	case total <= rounding*size || l.Slope == 0:
		return 1
	case l.SD == 0:
		return 0
	}
	return 2 * studentTail(math.Abs(l.Slope)*math.Sqrt(l.Spread)/l.SD, df)
}

// Real reports whether the slope is taken as real: at least four values and P
// below RealSlope.
func (l DepthLine) Real() bool { return l.N >= fewValues && l.P < RealSlope }

// at returns the line on the working scale.
func (l DepthLine) at(depth float64) float64 { return l.Mean + l.Slope*(depth-l.MeanDepth) }

// At returns the line at a depth, as the quantity.
func (l DepthLine) At(depth float64) float64 { return l.Distribution.back(l.at(depth)) }

// SlopeAt returns the change of the quantity per metre at a depth.
func (l DepthLine) SlopeAt(depth float64) float64 {
	if l.Distribution == LogNormal {
		return l.Slope * l.At(depth)
	}
	return l.Slope
}

// carrier returns the value that a line rests on: the one without which the slope is
// least of what it is with it, if that is less than half. ok is false where no value
// carries so much, or where there are too many for one to do so. slope is that
// without the value, on the working scale.
func carrier(s Sample, d Distribution) (o Observation, slope float64, ok bool) {
	const most = 50
	whole, err := FitLine(s, d)
	if err != nil || len(s) < fewValues || len(s) > most {
		return Observation{}, 0, false
	}
	s = s.ordered()
	least := 0.5
	for i := range s {
		l, err := FitLine(append(append(Sample(nil), s[:i]...), s[i+1:]...), d)
		if err == nil && l.Slope/whole.Slope < least {
			o, slope, ok, least = s[i], l.Slope, true, l.Slope/whole.Slope
		}
	}
	return o, slope, ok
}

// change returns how much the line changes over the tested depths, as a share of
// its value at their middle; infinite where that is zero.
func (l DepthLine) change() float64 {
	middle := l.From + (l.To-l.From)/2
	return math.Abs((l.At(l.To) - l.At(l.From)) / l.At(middle))
}

// Band returns the cautious low and high line at a depth (Frank et al. 2004,
// formula from memory, unverified; standard regression theory):
//
//	mean      x(z) ∓ t95(n−2)·s·√(1/n + (z − z̄)²/Szz)        confidence band
//	fractile  x(z) ∓ t95(n−2)·s·√(1 + 1/n + (z − z̄)²/Szz)    prediction band
//
// The error wraps ErrOutOfRange beyond the tested depths, where the line knows
// nothing.
func (l DepthLine) Band(depth float64, e Estimate) (Interval, error) {
	dz := depth - l.MeanDepth
	inside := 1/float64(l.N) + dz*dz/l.Spread
	if e == Fractile {
		inside++
	}
	return l.around(depth, math.Sqrt(inside))
}

// Shifted returns the line moved parallel to itself by k_n·s (Bond 2011), with
// k_n = t95(n−2)·√(1/n), or √(1 + 1/n) for a fractile. The degrees of freedom
// are those of the residuals of a line. The error is as for Band.
func (l DepthLine) Shifted(depth float64, e Estimate) (Interval, error) {
	inside := 1 / float64(l.N)
	if e == Fractile {
		inside++
	}
	return l.around(depth, math.Sqrt(inside))
}

// around returns the interval of half-width k·t95·s about the line.
func (l DepthLine) around(depth, k float64) (Interval, error) {
	if !(depth >= l.From && depth <= l.To) {
		return Interval{}, fmt.Errorf("%w: %.2f m lies beyond the tests at %.2f to %.2f m", ErrOutOfRange, depth, l.From, l.To)
	}
	half := k * Student95(float64(l.N-2)) * l.SD
	return l.Distribution.interval(l.at(depth), half)
}

// residuals returns what is left of a sample on the working scale without the
// line.
func (l DepthLine) residuals(scaled Sample) Sample {
	r := append(Sample(nil), scaled...)
	for i := range r {
		r[i].Value -= l.at(r[i].Depth)
	}
	return r
}
