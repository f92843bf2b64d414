package design

import (
	"fmt"
	"math"

	"gonum.org/v1/gonum/mathext"
	"gonum.org/v1/gonum/stat/distuv"
)

// Normal95 is the 95 % point of the standard normal distribution.
const Normal95 = 1.6448536269514722

// Student95 returns the one-sided 95 % point of Student's t with df > 0 degrees
// of freedom, which need not be whole.
func Student95(df float64) float64 { return studentQuantile(0.95, df) }

// studentQuantile returns t with P(T ≤ t) = p for 0 < p < 1.
func studentQuantile(p, df float64) float64 {
	return distuv.StudentsT{Mu: 0, Sigma: 1, Nu: df}.Quantile(p)
}

// studentTail returns P(T > t) for t ≥ 0, by the incomplete beta function so that
// small tails keep their digits.
func studentTail(t, df float64) float64 {
	return mathext.RegIncBeta(df/2, 0.5, df/(df+t*t)) / 2
}

// An Estimate is what a cautious value is an estimate of.
type Estimate int

const (
	Mean     Estimate = iota // of the mean over a large zone, wrong on the unsafe side with 5 %
	Fractile                 // of a single small zone: 5 % (95 %) of the ground is worse
)

// String returns "mean" or "fractile".
func (e Estimate) String() string { return [...]string{"mean", "fractile"}[e] }

// Factor returns k_n of X_k = m ∓ k_n·s at 95 % for n values (n need not be
// whole: see EffectiveCount), with the variance known or found from the sample:
//
//	mean      unknown  t95(n−1)·√(1/n)       known  1.645·√(1/n)
//	fractile  unknown  t95(n−1)·√(1 + 1/n)   known  1.645·√(1 + 1/n)
//
// (Frank et al. 2004; Bond & Harris 2008: prediction form of the fractile).
// The error wraps ErrTooFew: the sample form wants more than one value, the
// known form at least one.
func Factor(n float64, e Estimate, varianceKnown bool) (float64, error) {
	least := math.Sqrt(1 / n)
	if e == Fractile {
		least = math.Sqrt(1 + 1/n)
	}
	switch {
	case varianceKnown && n >= 1:
		return Normal95 * least, nil
	case !varianceKnown && n > 1:
		return Student95(n-1) * least, nil
	}
	return 0, fmt.Errorf("%w: %.3g for a cautious %s", ErrTooFew, n, e)
}
