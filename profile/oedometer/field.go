package oedometer

import "math"

// fieldShare is the share of e0 at which laboratory and field virgin lines meet,
// a round empirical value (Schmertmann 1955; from memory, unverified).
const fieldShare = 0.42

// farthest is log10 of the largest stress in kPa to which the virgin line is
// produced.
const farthest = 8.0

// field returns the field compression curve of Schmertmann (1955): from (σ′v0,
// e0) with slope Cr to σ′p, and from there straight to where the produced
// laboratory virgin line reaches 0.42 e0. Where σ′p is below σ′v0 the ground is
// taken as normally consolidated and the curve starts at σ′v0.
func (c Curve) field(s Situation, yield Yield, cr Index, v VirginLine) Field {
	refuse := func(why string) Field { return Field{Reason: why} }
	switch {
	case !s.EffectiveStress.Known || s.EffectiveStress.Value <= 0:
		return refuse("needs the in-situ stress σ′v0")
	case yield.Bound != Exact:
		return refuse("needs a yield stress, not a bound")
	case !cr.Known || !v.Known:
		return refuse("needs a recompression slope and a virgin line")
	}
	e0, in := c.InitialVoidRatio, math.Log10(s.EffectiveStress.Value)
	sp := math.Max(s.EffectiveStress.Value, yield.Best)
	xp := math.Log10(sp)
	ep := e0 - cr.Value*(xp-in)
	e3 := fieldShare * e0
	x3 := (v.Intercept - e3) / v.Slope
	if x3 <= xp || ep <= e3 {
		return refuse("the laboratory virgin line reaches 0.42 e0 before the yield stress")
	}
	if x3 > farthest {
		return refuse("the virgin line reaches 0.42 e0 only far beyond any stress")
	}
	cc := (ep - e3) / (x3 - xp)
	return Field{
		Known:            true,
		Stress:           []float64{s.EffectiveStress.Value, sp, math.Pow(10, x3)},
		VoidRatio:        []float64{e0, ep, e3},
		CompressionIndex: cc,
		Ratio:            cc / v.Slope,
	}
}
