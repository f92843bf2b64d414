package design

import (
	"fmt"
	"math"

	"pastload/profile"
)

// A Basis is what a way works from, on the working scale of the quantity.
type Basis struct {
	Moments
	Assumed   float64 // assumed standard deviation; 0 where none is assumed
	Indicated float64 // the same from the second-generation annex; 0 where it has none
}

// A Way is a published way from a sample to a cautious value: mean ∓ a margin.
type Way struct {
	ID       string
	Name     string
	Estimate Estimate
	Source   string
	Mark     string // how far the formula was checked
	Natural  bool   // always worked on the values, never on their logarithms
	Least    int    // values that it wants
	Margin   func(Basis) (margin float64, ok bool)
}

// The marks of how far something was checked against its source.
const (
	MarkRead     = "read in a source"
	MarkMemory   = "from memory, unverified"
	MarkDerived  = "derived here"
	MarkMeasured = "from simulation"
	MarkChoice   = "choice of this program"
)

// known and unknown are the margins k_n·s of Factor.
func unknown(e Estimate) func(Basis) (float64, bool) {
	return func(b Basis) (float64, bool) {
		k, err := Factor(b.Count, e, false)
		return k * b.SD, err == nil
	}
}

func known(e Estimate) func(Basis) (float64, bool) {
	return func(b Basis) (float64, bool) {
		k, err := Factor(b.Count, e, true)
		return k * b.Assumed, err == nil && b.Assumed > 0
	}
}

// second is the margin of the second-generation annex: the sample's own variation
// from ten values on, an indicated one below.
func second(e Estimate) func(Basis) (float64, bool) {
	return func(b Basis) (float64, bool) {
		if b.Count >= manyValues {
			return unknown(e)(b)
		}
		k, err := Factor(b.Count, e, true)
		return k * b.Indicated, err == nil && b.Indicated > 0
	}
}

func times(k float64) func(Basis) (float64, bool) {
	return func(b Basis) (float64, bool) { return k * b.SD, true }
}

// The sizes of sample at which other ways are advised. Choice of this program
// after the practice that a fractile of three values is a guess.
const (
	fewValues  = 4  // below: range and median only
	manyValues = 10 // from here on the sample's own variance is trusted
)

const (
	sourceFrank = "Frank et al. 2004; Bond & Harris 2008"
	sourceAnnex = "EN 1997-1:2024, Annex A, form X_mean(1 ∓ k_n·V_X)"
)

// The identifiers of the ways that a recommendation can name.
const (
	WayMeanUnknown     = "mean-unknown"
	WayMeanKnown       = "mean-known"
	WayFractileUnknown = "fractile-unknown"
	WayFractileKnown   = "fractile-known"
	WayMeanLessSD      = "mean-one-sd"
)

// Ways lists the ways in the order in which they are shown. To add one, add a line.
var Ways = []Way{
	{WayMeanUnknown, "95 % mean, variance from the sample", Mean, sourceFrank, MarkRead, false, fewValues, unknown(Mean)},
	{WayMeanKnown, "95 % mean, assumed COV", Mean, sourceFrank, MarkRead, false, fewValues, known(Mean)},
	{WayFractileUnknown, "5 % fractile, variance from the sample", Fractile, sourceFrank, MarkRead, false, fewValues, unknown(Fractile)},
	{WayFractileKnown, "5 % fractile, assumed COV", Fractile, sourceFrank, MarkRead, false, fewValues, known(Fractile)},
	{"percentile", "plain 5 % percentile, m ∓ 1.645 s", Fractile, "another reading of the same clause", MarkRead, false, fewValues, times(Normal95)},
	{"schneider", "mean ∓ half a standard deviation", Mean, "Schneider 1997", MarkMemory, true, fewValues, times(0.5)},
	{"annex-mean", "second-generation mean", Mean, sourceAnnex, MarkMemory, false, fewValues, second(Mean)},
	{"annex-fractile", "second-generation fractile", Fractile, sourceAnnex, MarkMemory, false, fewValues, second(Fractile)},
	{"us-mean", "mean, its scatter stated apart", Mean, "AASHTO-style practice with factors calibrated to means", MarkRead, true, fewValues, times(0)},
	{WayMeanLessSD, "mean ∓ one standard deviation", Fractile, "AASHTO-style practice for few or scattered data", MarkMemory, true, fewValues, times(1)},
	{"two-thirds", "33 % fractile, m ∓ 0.43 s", Fractile, "US Army Corps of Engineers practice: two thirds of the results are better", MarkMemory, true, fewValues, times(0.43)},
}

// WayByID returns the way of that identifier, or nil.
func WayByID(id string) *Way {
	for i := range Ways {
		if Ways[i].ID == id {
			return &Ways[i]
		}
	}
	return nil
}

// An Interval is a cautious low and a cautious high value.
type Interval struct {
	Low, High float64
}

// Assumptions are what a way may use beside the sample.
type Assumptions struct {
	Distribution Distribution
	COV          float64 // assumed standard deviation over mean; 0 where none is assumed
	IndicatedCOV float64 // the same as the second-generation annex indicates it
	Count        float64 // number of independent values; 0 takes the sample's own
}

// Of returns the cautious low and high of a sample by the way w.
//
// The errors wrap ErrTooFew, or ErrOutOfRange where a log-normal quantity is not
// greater than zero or where the way needs an assumed COV and a mean above zero
// that are not there.
func (w Way) Of(s Sample, a Assumptions) (Interval, error) {
	d := a.Distribution
	if w.Natural {
		d = Normal
	}
	scaled, err := s.onScale(d)
	if err != nil {
		return Interval{}, err
	}
	if len(s) < w.Least || len(s) == 0 {
		return Interval{}, fmt.Errorf("%w: %d; %s wants %d", ErrTooFew, len(s), w.Name, w.Least)
	}
	b := Basis{Moments: moments(scaled)}
	if a.Count > 0 {
		b.Count = math.Min(b.Count, a.Count)
	}
	if d == LogNormal || b.Mean > 0 {
		b.Assumed, b.Indicated = d.spread(b.Mean, a.COV), d.spread(b.Mean, a.IndicatedCOV)
	}
	margin, ok := w.Margin(b)
	if !ok {
		return Interval{}, fmt.Errorf("%w: %s wants a COV, a mean above zero and more than one independent value", ErrOutOfRange, w.Name)
	}
	return d.interval(b.Mean, margin)
}

// An Alternative is what one way gives for a parameter.
type Alternative struct {
	ID       string         `json:"id"`
	Method   string         `json:"method"`
	Estimate string         `json:"estimate"` // "mean" or "fractile"
	Low      profile.Number `json:"low"`
	High     profile.Number `json:"high"`
	Source   string         `json:"source"`
	Mark     string         `json:"mark"`
	Note     string         `json:"note,omitempty"`
}
