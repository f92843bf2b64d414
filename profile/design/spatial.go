package design

import (
	"fmt"
	"math"
)

// VarianceReduction returns Γ², the variance of the average of a quantity over a
// length relative to its variance at a point, for an exponential correlation
// ρ(τ) = exp(−2τ/δ) (Vanmarcke 1977; formula from memory, unverified):
//
//	Γ² = 2(a − 1 + e^−a)/a²,   a = 2·length/δ
//
// length ≥ 0 and scale δ > 0 in m. A length of zero is a point: Γ² = 1.
// The error wraps ErrOutOfRange.
func VarianceReduction(length, scale float64) (float64, error) {
	if !(length >= 0) || !(scale > 0) || math.IsInf(length, 0) || math.IsInf(scale, 0) {
		return 0, fmt.Errorf("%w: length %g m, scale of fluctuation %g m; want zero or more and above zero", ErrOutOfRange, length, scale)
	}
	a := 2 * length / scale
	if a < 1e-3 {
		// The closed form loses its digits here; its series is 1 − a/3 + a²/12.
		return 1 - a/3 + a*a/12, nil
	}
	return 2 * (a + math.Expm1(-a)) / (a * a), nil
}

// SimpleVarianceReduction returns Γ² = δ/length for a length greater than the
// scale of fluctuation δ, else 1 (Vanmarcke 1977; from memory, unverified). The
// error wraps ErrOutOfRange.
func SimpleVarianceReduction(length, scale float64) (float64, error) {
	if _, err := VarianceReduction(length, scale); err != nil {
		return 0, err
	}
	return math.Min(1, scale/length), nil
}

// negligible is the exponent below which a correlation is lost beside one in double
// precision.
const negligible = 40

// EffectiveCount returns how many independent values a sample is worth to its
// mean when values of one borehole are correlated with depth:
//
//	n_eff = n² / ΣΣ exp(−2|zi − zj|/δ)
//
// Boreholes are taken as independent of each other: the horizontal scale of
// fluctuation (about 3 to 80 m) is seldom longer than their spacing. scale δ is
// in m. The errors wrap ErrTooFew for an empty sample and ErrOutOfRange.
func EffectiveCount(s Sample, scale float64) (float64, error) {
	if err := s.check(); err != nil {
		return 0, err
	}
	if len(s) == 0 {
		return 0, fmt.Errorf("%w: none", ErrTooFew)
	}
	if !(scale > 0) || math.IsInf(scale, 0) {
		return 0, fmt.Errorf("%w: scale of fluctuation %g m; want above zero", ErrOutOfRange, scale)
	}
	s = s.ordered()
	var sum float64
	for i, a := range s {
		sum++
		for _, b := range s[i+1:] {
			apart := 2 * (b.Depth - a.Depth) / scale
			if a.Borehole != b.Borehole || apart > negligible {
				break // ordered by borehole and depth: all further ones lie further
			}
			sum += 2 * math.Exp(-apart)
		}
	}
	n := float64(len(s))
	return n * n / sum, nil
}

// AverageOver returns the cautious low and high of the average of a quantity
// over a length of ground, between a fractile (length 0) and a mean (a long
// length):
//
//	X_k = m ∓ t95(n_eff − 1)·s·√(Γ² + 1/n_eff)
//
// which follows from the variance of the local average about the mean, s²·Γ²,
// and that of the mean itself, s²/n_eff. Lengths in m. The errors are those of
// VarianceReduction, EffectiveCount and Factor.
func AverageOver(s Sample, d Distribution, length, scale float64) (Interval, error) {
	scaled, err := s.onScale(d)
	if err != nil {
		return Interval{}, err
	}
	reduction, err := VarianceReduction(length, scale)
	if err != nil {
		return Interval{}, err
	}
	n, err := EffectiveCount(s, scale)
	if err != nil {
		return Interval{}, err
	}
	if n <= 1 || len(s) < fewValues {
		return Interval{}, fmt.Errorf("%w: %d, worth %.2g independent ones", ErrTooFew, len(s), n)
	}
	m := moments(scaled)
	margin := Student95(n-1) * m.SD * math.Sqrt(reduction+1/n)
	return d.interval(m.Mean, margin)
}

// CombinedCOV returns the coefficient of variation of a value that is averaged
// over a zone, measured n times and transformed by a correlation (Phoon &
// Kulhawy 1999; form from memory, unverified):
//
//	V² = inherent²·reduction + measurement²/n + transformation²
//
// reduction is Γ² of VarianceReduction. The error wraps ErrOutOfRange where an
// argument is negative or n is below one.
func CombinedCOV(inherent, reduction, measurement, n, transformation float64) (float64, error) {
	for _, v := range []float64{inherent, reduction, measurement, transformation} {
		if !(v >= 0) || math.IsInf(v, 0) {
			return 0, fmt.Errorf("%w: %g; want zero or more", ErrOutOfRange, v)
		}
	}
	if !(n >= 1) {
		return 0, fmt.Errorf("%w: n = %g; want one or more", ErrOutOfRange, n)
	}
	return math.Sqrt(inherent*inherent*reduction + measurement*measurement/n + transformation*transformation), nil
}
