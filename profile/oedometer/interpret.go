package oedometer

import (
	"fmt"
	"math"
)

// Interpret reads a prepared curve.
//
// The error wraps ErrTooFewPoints where first loading has fewer than
// MinimumPoints distinct stresses; every other curve gives an Interpretation,
// which may be a bound or say that nothing can be told.
func Interpret(c Curve, s Situation) (Interpretation, error) {
	l := firstLoading(c)
	if n := len(l.s) - l.first; n < MinimumPoints || l.last() <= l.s[l.first] {
		return Interpretation{}, fmt.Errorf("%w: %d of at least %d", ErrTooFewPoints, n, MinimumPoints)
	}
	if s.EffectiveStress.Known && !(s.EffectiveStress.Value > 0 && !math.IsInf(s.EffectiveStress.Value, 0)) {
		s.EffectiveStress = Number{}
	}
	cr, beta, how, loop := c.loopSlope(c.InitialVoidRatio)
	around := surroundings{inSitu: s.EffectiveStress, rate: c.fine(l), swelled: c.Swelling > swellingLimit}
	if loop {
		around.cr, around.beta = cr, beta
	}
	read := readLoading(l, around)

	r := Interpretation{
		Methods:             read.methods,
		Preconsolidation:    read.yield,
		Apparent:            read.apparent,
		InitialVoidRatio:    c.InitialVoidRatio,
		InitialVoidRatioHow: c.InitialVoidRatioHow,
		Loading:             l.points(),
		Uncertainty:         read.parts,
		Stages:              c.stageResults(),
		MaxStress:           l.last(),
		StillSteepening:     read.q,
		Spread:              read.spread,
		Kind:                c.Kind,
		SwellingIndex:       c.swellingIndex(),
	}
	r.Preconsolidation.Bound = read.bound
	r.virginLines(read.in)
	if loop || read.breaks() {
		r.recompression(read.in, how, loop)
	}
	step := 0.0
	if read.apparent.Best > 0 {
		r.MaxStressRatio = r.MaxStress / read.apparent.Best
		if low, high, ok := l.bracket(read.apparent.Best); ok {
			r.BracketLow, r.BracketHigh, step = low, high, high/low
		}
		for _, box := range []float64{casagrandeBox / 2, casagrandeBox, casagrandeBox * 2} {
			if o := read.in.casagrandeIn(box); o.ok {
				r.CasagrandeScale = append(r.CasagrandeScale, ScaleValue{box, o.stress})
			}
		}
	}
	r.Quality = c.rate(l, s, r.Preconsolidation)
	r.Field = c.field(s, r.Preconsolidation, r.RecompressionIndex, r.VirginSteepest)
	if r.FirstLoadStrain = c.firstLoadStrain(l); r.FirstLoadStrain > largeFirstLoad {
		r.Notes = append(r.Notes, fmt.Sprintf("the first load alone compressed the specimen by %.1f %%: seating, gaps, or a disturbed specimen", r.FirstLoadStrain))
	}
	for _, lp := range c.loops() {
		if lp.reload > lp.bottom {
			r.Loops = append(r.Loops, c.checkLoop(lp, around))
		}
	}
	r.grade(read, step, c)
	r.remark(c, read)
	return r, nil
}

// largeFirstLoad is the strain in percent under the first load from which its
// seating is in doubt.
const largeFirstLoad = 4.0

// steepStart is the ratio of the slopes of first loading and loop from which the
// specimen counts as disturbed (a tool's choice).
const steepStart = 3.0

// firstLoadStrain returns the strain in percent from the initial void ratio to
// the first load; zero where the initial void ratio is that of the first load.
func (c Curve) firstLoadStrain(l *loading) float64 {
	return math.Max(0, 100*(c.InitialVoidRatio-l.e[l.first])/(1+c.InitialVoidRatio))
}

// points returns the loading for drawing.
func (l *loading) points() []LoadingPoint {
	out := make([]LoadingPoint, len(l.s))
	for i := range out {
		out[i] = LoadingPoint{l.s[i], l.e[i], 100 * (l.e0 - l.e[i]) / (1 + l.e0), l.work[i]}
	}
	return out
}

// fine reports whether the load steps are small enough for tangent moduli.
func (c Curve) fine(l *loading) bool {
	if c.Kind == ConstantRate || l.dense {
		return true
	}
	n := len(l.x) - l.first
	return n > 1 && (l.x[len(l.x)-1]-l.x[l.first])/float64(n-1) <= math.Log10(1+largestModulusStep)
}

// virginLines sets both virgin lines, Cc and CR.
func (r *Interpretation) virginLines(in *input) {
	if v := in.virgin; v.ok {
		r.VirginSteepest = VirginLine{
			Rule: "steepest: segments of at least 0.9 of the steepest slope", Slope: -v.line.slope, Intercept: v.line.intercept,
			From: in.s[v.first], To: in.s[v.last], Known: true,
		}
		for i := v.first; i <= v.last; i++ {
			r.VirginSteepest.Points = append(r.VirginSteepest.Points, in.origin[i])
		}
		r.CompressionIndex = Known(r.VirginSteepest.Slope)
		r.CompressionRatio = Known(r.VirginSteepest.Slope / (1 + in.e0))
	}
	if line, first, ok := in.lastLine(); ok {
		n := len(in.x)
		r.VirginLast = VirginLine{Rule: fmt.Sprintf("last %d points", n-first), Slope: -line.slope, Intercept: line.intercept,
			From: in.s[first], To: in.last(), Known: true}
		for i := first; i < n; i++ {
			r.VirginLast.Points = append(r.VirginLast.Points, in.origin[i])
		}
	}
}

// recompression sets Cr and RR.
func (r *Interpretation) recompression(in *input, how string, loop bool) {
	if in.cr <= 0 {
		return
	}
	if !loop {
		how = "first loading below 0.7 of the apparent σ′p: too high where the specimen is disturbed"
	}
	r.RecompressionIndex = Index{in.cr, true, how}
	r.RecompressionRatio = Known(in.cr / (1 + in.e0))
}

// remark adds what a checker should know beside the grade.
func (r *Interpretation) remark(c Curve, read reading) {
	for _, f := range c.Findings {
		r.Notes = append(r.Notes, f.Message)
	}
	if read.in.virgin.sShaped {
		r.Notes = append(r.Notes, "the curve flattens again past its steepest part: structured or sensitive clay; Cc depends on which points are taken")
	}
	if r.RecompressionIndex.Known && r.CompressionIndex.Known {
		if ratio := r.RecompressionIndex.Value / r.CompressionIndex.Value; ratio > 0.3 {
			r.Notes = append(r.Notes, fmt.Sprintf("Cr/Cc is %.2f; 0.05 to 0.20 is usual", ratio))
		}
	}
	if in := read.in; in.fromLoop && in.initial > steepStart*in.cr {
		r.Notes = append(r.Notes, fmt.Sprintf("first loading before σ′p is %.1f times as steep as the loop: the specimen is disturbed", in.initial/in.cr))
	}
	switch c.Kind {
	case ConstantRate:
		r.Notes = append(r.Notes, "constant rate of strain: commonly 10–30 % above the 24 h value (from memory, unverified); do not mix the two in one profile")
	case EndOfPrimary:
		r.Notes = append(r.Notes, "end of primary: commonly 10–20 % above the 24 h value (from memory, unverified); do not mix the two in one profile")
	}
}
