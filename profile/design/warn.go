package design

import (
	"fmt"
	"math"
)

// Limits of the warnings. All are choices of this program.
const (
	muchScatter = 1.5  // times the usual COV
	dependence  = 0.05 // change of a cautious value, over the mean, that correlated values make
	manyLeftOut = 0.34 // of all results
	surelyWorse = 0.05 // chance of a weak zone or borehole by luck, all places tried allowed for
	noticeable  = 0.1  // difference of a zone or borehole, or change with depth, over the mean
)

// fact warns of something in what was measured.
func (p *Parameter) fact(format string, args ...any) {
	text := fmt.Sprintf(format, args...)
	p.Warnings = append(p.Warnings, text)
	p.facts = append(p.facts, text)
}

// caution warns of something in a value for design.
func (p *Parameter) caution(format string, args ...any) {
	p.Warnings = append(p.Warnings, fmt.Sprintf(format, args...))
}

// warn says what the numbers alone would hide.
func (p *Parameter) warn(o Options, e evaluation) {
	if e.q.oedometer && p.N > 0 {
		if text := annexQ(p, o.Experience); text != "" {
			p.fact("%s", text)
		}
	}
	if p.Bounds > 0 {
		p.fact("%s recorded as a bound only and not counted.", sentence(values(p.Bounds, "is", "are")))
	}
	if p.Assumed > 0 {
		p.fact("%s recorded as assumed, not measured, and not counted.", sentence(values(p.Assumed, "is", "are")))
	}
	if all := p.N + p.LeftOut; p.LeftOut > 0 && float64(p.LeftOut) > manyLeftOut*float64(all) {
		p.fact("%d of %d results are left out: more than a third.", p.LeftOut, all)
	}
	if e.forced {
		p.fact("A value of zero or less stands among the results, so logarithms cannot be used: the normal form is used instead.")
	}
	if p.N == 0 {
		return
	}
	p.warnScatter(e)
	p.warnTrend(e)
	if zone, ok := weakZone(e.sample, e.flat, p.Side, surelyWorse); ok && e.relative(zone.difference) >= noticeable {
		p.fact("The %d values between %.2f and %.2f m lie about %s the rest%s (%s): one value for the stratum hides a zone.",
			zone.n, zone.from, zone.to, e.apart(zone.difference), e.afterTrend(), chance(zone.p))
	}
	p.warnBoreholes(e)
	p.warnDependence(o, e)
	p.warnUnsafe(e)
}

// warnUnsafe warns where a low value would be on the unsafe side of some check,
// and gives the high one.
func (p *Parameter) warnUnsafe(e evaluation) {
	switch {
	case e.q.unsafe == "":
	case p.N < fewValues:
		p.caution("For %s a low value is on the unsafe side: the greatest result is %s.", e.q.unsafe, quantityText(p.Max.Value, p.Unit))
	case e.followed && p.High.Known:
		p.caution("For %s a low value is on the unsafe side: use the high line, %s at %s.", e.q.unsafe, quantityText(p.High.Value, p.Unit), metres(p.middle()))
	case p.High.Known:
		p.caution("For %s a low value is on the unsafe side: use the high one, %s.", e.q.unsafe, quantityText(p.High.Value, p.Unit))
	}
}

// warnScatter warns of scatter that is too great, too small, or not independent.
func (p *Parameter) warnScatter(e evaluation) {
	if p.N >= fewValues && e.q.cov > 0 && p.COV.Known && p.COV.Value > muchScatter*e.q.cov && !e.followed {
		p.fact("The scatter (COV %s) is well above what is usual (%s): two kinds of ground, or two kinds of test, may be mixed.", rough(p.COV.Value), rough(e.q.cov))
	}
	if p.N >= fewValues && p.SD.Known && p.SD.Value == 0 {
		p.fact("All %d values are equal: formulas from their scatter give no margin, which the ground does not promise.", p.N)
	}
}

// warnDependence warns where values that lie close together in depth are worth so
// few independent ones that the unfavourable value would move.
func (p *Parameter) warnDependence(o Options, e evaluation) {
	w := WayByID(p.Way)
	if w == nil || o.EffectiveCount || len(p.Governs) == 0 || !(p.Mean.Value > 0) {
		return
	}
	assumed := ""
	if p.ScaleAssumed {
		assumed = ", assumed"
	}
	text := fmt.Sprintf("The %d values lie close together in depth and are worth about %.1f independent ones (vertical scale of fluctuation %.1f m%s)", p.N, e.count, e.scale, assumed)
	a := e.Assumptions
	a.Count = e.count
	i, err := w.Of(e.sample, a)
	switch {
	case err != nil:
		p.caution("%s: too few for the formula to hold.", text)
	case math.Max(p.Low.Value-i.Low, i.High-p.High.Value) > dependence*p.Mean.Value && p.Low.Known && p.High.Known:
		low := "none above zero"
		if n := e.number(i.Low); n.Known {
			low = quantityText(n.Value, p.Unit)
		}
		p.caution("%s: counted so, the low value would be %s and the high one %s.", text, low, quantityText(i.High, p.Unit))
	}
}

// relative returns the size of a difference on the scale of flat over the mean.
func (e *evaluation) relative(d float64) float64 {
	if e.flatScale == LogNormal {
		return math.Abs(math.Expm1(d))
	}
	m := moments(e.sample).Mean
	if m == 0 {
		return math.Inf(1)
	}
	return math.Abs(d / m)
}

// apart words a difference on the scale of e.flat: "12 % below".
func (e *evaluation) apart(d float64) string {
	direction := "below"
	if d > 0 {
		direction = "above"
	}
	if e.flatScale == LogNormal {
		return rough(100*math.Abs(math.Expm1(d))) + " % " + direction
	}
	return withUnit(rough(math.Abs(d)), e.q.unit) + " " + direction
}

// afterTrend says that differences are taken from the line.
func (e *evaluation) afterTrend() string {
	if e.followed {
		return ", the trend with depth taken off"
	}
	return ""
}

// warnTrend warns that one value hides a change with depth.
func (p *Parameter) warnTrend(e evaluation) {
	if !e.followed {
		return
	}
	verb := "rises"
	slope := p.Trend.Slope
	if slope < 0 {
		verb, slope = "falls", -slope
	}
	p.fact("%s %s by about %s per metre (%s): one value for the stratum hides it.", p.Symbol, verb, withUnit(rough(slope), p.Unit), chance(p.Trend.P))
	if e.line.SD <= 1e-6*math.Abs(e.line.Mean) {
		p.fact("The values lie on a line to the last digit: they look drawn and not measured, and their margin means nothing.")
	}
	if o, slope, ok := carrier(e.sample, e.line.Distribution); ok {
		p.fact("The trend rests on one value, %s of %s at %.2f m: without it the slope is %s of what it is with it.",
			quantityText(o.Value, p.Unit), o.Label, o.Depth, percent(slope/e.line.Slope))
	}
	if p.N < 6 {
		p.fact("The trend rests on %d values only; six or more are to be preferred.", p.N)
	}
}

// warnBoreholes warns of a borehole whose values differ from those of the others,
// to the unfavourable side where there is one.
func (p *Parameter) warnBoreholes(e evaluation) {
	var names []string
	seen := map[string]bool{}
	for _, o := range p.Observations {
		if !seen[o.Borehole] {
			seen[o.Borehole] = true
			names = append(names, o.Borehole)
		}
	}
	if len(names) < 2 {
		return
	}
	tried := float64(len(names))
	if tried == 2 {
		tried = 1 // the second comparison is the first the other way round
	}
	for _, name := range names {
		var here, there []float64
		for _, o := range e.flat.ordered() {
			if o.Borehole == name {
				here = append(here, o.Value)
			} else {
				there = append(there, o.Value)
			}
		}
		if len(here) < 2 {
			continue
		}
		chanceOf, ok := chanceOfDifference(here, there)
		a, _ := meanAndSquares(here)
		b, _ := meanAndSquares(there)
		if !ok || chanceOf*tried >= surelyWorse || p.Side == Low && a > b || p.Side == High && a < b {
			continue
		}
		if e.relative(a-b) < noticeable {
			continue
		}
		p.fact("The values of %s lie about %s those of the other boreholes%s (%s): one value for the stratum hides it.", name, e.apart(a-b), e.afterTrend(), chance(min(1, chanceOf*tried)))
		if len(names) == 2 {
			return // the same thing seen from the other borehole
		}
	}
}
