package design

import "fmt"

// Limits of the warnings. All are choices of this program.
const (
	muchScatter   = 1.5  // times the usual COV
	nearDuplicate = 0.7  // effective over counted values
	manyLeftOut   = 0.34 // of all results
	surelyWorse   = 0.05 // chance of a weak zone or borehole by luck, all places tried allowed for
)

// warn says what the numbers alone would hide.
func (p *Parameter) warn(o Options, e evaluation) {
	add := func(format string, args ...any) { p.Warnings = append(p.Warnings, fmt.Sprintf(format, args...)) }
	if e.q.oedometer && p.N > 0 {
		if text := annexQ(p, o.Experience); text != "" {
			p.Warnings = append(p.Warnings, text)
		}
	}
	if p.Bounds > 0 {
		add("%s recorded as a bound only and not counted.", sentence(values(p.Bounds, "is", "are")))
	}
	if p.Assumed > 0 {
		add("%s recorded as assumed, not measured, and not counted.", sentence(values(p.Assumed, "is", "are")))
	}
	if all := p.N + p.LeftOut; p.LeftOut > 0 && float64(p.LeftOut) > manyLeftOut*float64(all) {
		add("%d of %d results are left out: more than a third.", p.LeftOut, all)
	}
	if e.forced {
		add("A value of zero or less stands among the results, so logarithms cannot be used: the normal form is used instead.")
	}
	if p.N == 0 {
		return
	}
	p.warnScatter(add, e)
	p.warnTrend(add, e)
	if zone, ok := weakZone(e.sample, e.flat, p.Side, surelyWorse); ok {
		add("%s", zone.text(p.Unit))
	}
	p.warnBoreholes(add, e)
	if e.q.unsafe != "" && p.High.Known {
		add("For %s a low value is on the unsafe side: use the high one, %s.", e.q.unsafe, quantityText(p.High.Value, p.Unit))
	}
}

// warnScatter warns of scatter that is too great, too small, or not independent.
func (p *Parameter) warnScatter(add func(string, ...any), e evaluation) {
	if p.N >= fewValues && e.q.cov > 0 && p.COV.Known && p.COV.Value > muchScatter*e.q.cov && !e.trendReal() {
		add("The scatter (COV %.2f) is well above what is usual (%.2f): two kinds of ground, or two kinds of test, may be mixed.", p.COV.Value, e.q.cov)
	}
	if p.N > 1 && p.SD.Known && p.SD.Value == 0 {
		add("All %d values are equal: formulas from their scatter give no margin, which the ground does not promise.", p.N)
	}
	if p.N >= fewValues && e.count < nearDuplicate*float64(p.N) {
		assumed := ""
		if p.ScaleAssumed {
			assumed = " (assumed)"
		}
		add("The %d values lie close together and are worth about %.1f independent ones, with a vertical scale of fluctuation of %.1f m%s.", p.N, e.count, e.scale, assumed)
	}
}

func (e *evaluation) trendReal() bool { return e.line != nil && e.line.Real() }

// warnTrend warns that one value hides a change with depth.
func (p *Parameter) warnTrend(add func(string, ...any), e evaluation) {
	if !e.trendReal() {
		return
	}
	verb := "rises"
	slope := p.Trend.Slope
	if slope < 0 {
		verb, slope = "falls", -slope
	}
	add("%s %s by about %s per metre (p = %s): one value for the stratum hides it.", p.Symbol, verb, quantityText(slope, p.Unit), chance(p.Trend.P))
	if p.N < 6 {
		add("The trend rests on %d values only; six or more are to be preferred.", p.N)
	}
}

// warnBoreholes warns of a borehole whose values differ from those of the others,
// to the unfavourable side where there is one.
func (p *Parameter) warnBoreholes(add func(string, ...any), e evaluation) {
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
		direction := "lower"
		if a > b {
			direction = "higher"
		}
		add("The values of %s are %s than those of the other boreholes (p = %s): one value for the stratum hides it.", name, direction, chance(min(1, chanceOf*tried)))
		if len(names) == 2 {
			return // the same thing seen from the other borehole
		}
	}
}

// annexQ compares the number of oedometer tests with EN 1997-2:2007, Annex Q,
// Table Q.1 (read in a source). The table goes by the spread of Eoed, which a
// table of results does not hold: the spread of the parameter itself stands in.
func annexQ(p *Parameter, experience string) string {
	column, words := 0, "no comparable experience"
	switch experience {
	case "medium":
		column, words = 1, "medium comparable experience"
	case "extensive":
		column, words = 2, "extensive comparable experience"
	}
	table := []struct {
		spread float64
		text   string
		tests  [3]int
	}{{0.2, "less than 20 %", [3]int{2, 2, 1}}, {0.5, "20 to 50 %", [3]int{3, 2, 2}}}
	row := struct {
		spread float64
		text   string
		tests  [3]int
	}{0, "more than 50 %", [3]int{4, 3, 2}}
	if p.N == 1 {
		row.text = "an unknown amount"
	}
	if p.N > 1 && p.Mean.Value > 0 {
		spread := (p.Max.Value - p.Min.Value) / p.Mean.Value
		for i := len(table) - 1; i >= 0; i-- {
			if spread <= table[i].spread {
				row = table[i]
			}
		}
	}
	if p.N >= row.tests[column] {
		return ""
	}
	tests := "one oedometer test"
	if p.N > 1 {
		tests = fmt.Sprintf("%d oedometer tests", p.N)
	}
	return fmt.Sprintf("%s: EN 1997-2, Table Q.1, asks for %d per stratum where values spread by %s and there is %s (judged from the spread of %s, not of Eoed).",
		sentence(tests), row.tests[column], row.text, words, p.Symbol)
}
