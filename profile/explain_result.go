package profile

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"pastload/correlate"
)

// results adds what was measured at the depth and what follows from it.
func (x *explainer) results() {
	for _, d := range nearest(x.result.Results, x.depth, func(d *DerivedResult) float64 { return d.Depth }) {
		at := at(d.Depth, d.Specimen)
		x.group = "Measured at " + at
		x.measured(d.Result)
		x.group = "Index properties at " + at
		x.index(d)
		x.group = "Correlations at " + at
		x.correlations(d)
	}
}

// nearest returns the entries at the depth or, where there is none, those of the
// nearest depth within sameDepth.
func nearest[T any](all []T, depth float64, of func(*T) float64) []*T {
	least := sameDepth + closeDepth
	for i := range all {
		least = math.Min(least, math.Abs(of(&all[i])-depth))
	}
	var out []*T
	for i := range all {
		if d := math.Abs(of(&all[i]) - depth); d <= least+closeDepth && d <= sameDepth+closeDepth {
			out = append(out, &all[i])
		}
	}
	return out
}

// at names a depth with its specimen.
func at(depth float64, specimen string) string {
	text := digits(depth, 2) + " m"
	if specimen != "" {
		text += ", " + specimen
	}
	return text
}

// measured adds every cell of a row.
func (x *explainer) measured(r *Result) {
	for _, q := range Quantities {
		n := *q.Of(r)
		if n.Known {
			x.add(Step{Key: q.Key, Name: q.Name + " " + q.Symbol, Numbers: converted(n), Value: n, Decimals: decimalsOf(n), Unit: q.Unit, Source: cited(n), Mark: assumedMark(n)})
		}
	}
	row := r.Source.String()
	if r.NonPlastic {
		x.say("plastic limit", "non-plastic", row)
	}
	x.say("how the laboratory read σ′p", r.Method, row)
	x.say("test", r.Test, row)
	x.say("strength test", r.StrengthTest, row)
	x.say("laboratory", r.Laboratory, row)
	x.say("sampler", r.Sampler, row)
	x.say("remark", r.Remark, row)
}

// decimalsOf returns as many decimals as were typed, or what seven significant
// digits need where the number was converted.
func decimalsOf(n Number) int {
	if n.Source != nil && converted(n) == "" {
		if _, after, ok := strings.Cut(strings.ReplaceAll(n.Source.Text, ",", "."), "."); ok {
			return min(len(strings.TrimRight(after, " %")), 6)
		}
		return 0
	}
	_, after, _ := strings.Cut(significant(n.Value, 7), ".")
	return min(len(strings.TrimRight(after, ")")), 6)
}

// index adds PI, LI, the void ratio and the degree of saturation with their
// arithmetic.
func (x *explainer) index(d *DerivedResult) {
	r := d.Result
	value := func(n Number) string { return significant(n.Value, 7) }
	pi, pl := d.PlasticityIndex, r.PlasticLimit
	if pi.Known && !r.PlasticityIndex.Known {
		x.add(Step{Key: "plasticity_index_pct", Name: "plasticity index PI", Formula: "LL − PL", Numbers: value(r.LiquidLimit) + " − " + value(pl), Value: pi, Decimals: 2, Unit: "%", Mark: markDefinition})
	}
	if li := d.LiquidityIndex; li.Known && r.WaterContent.Known && pi.Known && pi.Value > 0 && (pl.Known || r.LiquidLimit.Known) {
		if !pl.Known {
			pl = Known(r.LiquidLimit.Value - pi.Value)
			x.add(Step{Name: "plastic limit for LI", Formula: "LL − PI", Numbers: value(r.LiquidLimit) + " − " + value(pi), Value: pl, Decimals: 2, Unit: "%", Mark: markDefinition})
		}
		x.add(Step{Key: "liquidity_index", Name: "liquidity index LI", Formula: "(w − PL)/PI", Numbers: fmt.Sprintf("(%s − %s) / %s", value(r.WaterContent), value(pl), value(pi)), Value: li, Decimals: ratioDecimals, Mark: markDefinition})
	}
	if e := r.VoidRatioOf(); d.MeasuredCR.Known && e.Known {
		x.add(Step{Key: "measured_compression_ratio", Name: "compression ratio CR", Formula: "Cc/(1 + e0)", Numbers: fmt.Sprintf("%s / (1 + %s)", value(d.MeasuredCc), value(e)), Value: d.MeasuredCR, Decimals: ratioDecimals, Mark: markDefinition})
	}
	w, gs := r.WaterContent, r.SpecificGravity
	if !w.Known || !gs.Known {
		return
	}
	if e := d.Result.VoidRatioOf(); !r.VoidRatio.Known {
		x.add(Step{Key: "void_ratio", Name: "void ratio e0", Formula: "w·Gs/100, as for saturated soil", Numbers: value(w) + " × " + value(gs) + " / 100", Value: e, Decimals: ratioDecimals})
		return
	}
	if d.DegreeSaturation.Known {
		x.add(Step{Key: "degree_of_saturation", Name: "degree of saturation Sr", Formula: "w·Gs/(100·e0)", Numbers: fmt.Sprintf("%s × %s / (100 × %s)", value(w), value(gs), value(r.VoidRatio)), Value: d.DegreeSaturation, Decimals: ratioDecimals, Mark: markDefinition})
	}
}

// correlations adds every correlation that was used at a result, and the bands
// that those for Cc, CR and Cr make.
func (x *explainer) correlations(d *DerivedResult) {
	told := map[string]bool{} // derived inputs that have their step
	for _, c := range d.Correlations {
		entry, ok := correlate.ByID(c.ID)
		if !ok {
			continue
		}
		v := x.inputs(d, entry.Quantity)
		e, err := entry.Evaluate(v)
		if err != nil {
			continue
		}
		for _, u := range e.Used {
			x.derived(u.Symbol, v, told)
		}
		args := correlate.Values{}
		for _, u := range e.Used {
			args[u.Symbol] = u.Value
		}
		numbers := filled(entry.Formula, args, e.Value)
		words := ""
		if numbers == "" {
			words = "with " + inputList(e.Used)
		}
		if len(e.Warnings) > 0 {
			words = strings.Join(append([]string{words}, e.Warnings...), "; ")
		}
		x.add(Step{Name: entry.Quantity.Symbol() + " by " + entry.Name, Formula: entry.Formula, Numbers: numbers, Value: Known(e.Value), Words: strings.TrimPrefix(words, "; "),
			Decimals: quantityDecimals(entry.Quantity), Unit: entry.Quantity.Unit(), Source: entry.Source, Mark: entry.Verified.String()})
		if entry.Quantity == correlate.OverconsolidationRatio && d.Effective.Known {
			x.add(Step{Name: "σ′p from it", Formula: "OCR·σ′v0", Numbers: term(e.Value, ratioDecimals) + " × " + term(d.Effective.Value, stressDecimals), Value: Known(e.Value * d.Effective.Value), Decimals: 1, Unit: "kPa", Mark: markDefinition})
		}
	}
	for _, b := range bands {
		x.band(d, b)
	}
}

// derived adds how an input follows from what was measured, once, after what it
// follows from itself.
func (x *explainer) derived(symbol string, v correlate.Values, told map[string]bool) {
	value, how, ok := v.Resolve(symbol)
	if !ok || how == "" || told[symbol] {
		return
	}
	told[symbol] = true
	args := correlate.Values{}
	var self correlate.Variable
	for _, o := range correlate.Variables() {
		if o.Symbol == symbol {
			self = o
			continue
		}
		if substitute(how, correlate.Values{o.Symbol: 1}) == how {
			continue // not in the formula
		}
		x.derived(o.Symbol, v, told)
		if from, _, ok := v.Resolve(o.Symbol); ok {
			args[o.Symbol] = from
		}
	}
	x.add(Step{Name: self.Name + " " + self.Written + " for the correlations", Formula: how, Numbers: filled(how, args, value), Value: Known(value), Decimals: ratioDecimals, Unit: self.Unit})
}

func quantityDecimals(q correlate.Quantity) int {
	if q.Unit() == "kPa" {
		return stressDecimals
	}
	return ratioDecimals
}

// inputs gathers what a correlation was given, as the profile gave it.
func (x *explainer) inputs(d *DerivedResult, q correlate.Quantity) correlate.Values {
	v := d.Result.values(d.Effective)
	if !slices.ContainsFunc(bands, func(b bandOf) bool { return b.quantity == q }) {
		return v
	}
	if s := x.borehole.StratumAt(d.Depth, d.Result.Stratum); s != nil && isOrganic(s) {
		v["organic"] = max(v["organic"], peatOrganic)
	}
	delete(v, "Cc")
	return v
}

func inputList(used []correlate.Used) string {
	terms := make([]string, len(used))
	for i, u := range used {
		terms[i] = strings.TrimSpace(u.Written + " = " + significant(u.Value, 6) + " " + u.Unit)
	}
	return strings.Join(terms, ", ")
}

// A bandOf is a quantity that correlations give as a band.
type bandOf struct {
	quantity correlate.Quantity
	key      string
	of       func(*DerivedResult) Range
}

var bands = []bandOf{
	{correlate.CompressionIndex, "correlated_compression_index", func(d *DerivedResult) Range { return d.CorrelatedCc }},
	{correlate.CompressionRatio, "correlated_compression_ratio", func(d *DerivedResult) Range { return d.CorrelatedCR }},
	{correlate.RecompressionIndex, "correlated_recompression_index", func(d *DerivedResult) Range { return d.CorrelatedCr }},
}

// band adds how the correlations for a quantity are put together.
func (x *explainer) band(d *DerivedResult, b bandOf) {
	if !b.of(d).Known {
		return
	}
	band, err := correlate.BandOf(b.quantity, x.inputs(d, b.quantity), x.site.Settings.correlationsFor(b.quantity))
	if err != nil {
		return
	}
	symbol := b.quantity.Symbol()
	var logs, scatters, spreads []string
	mean := math.Log(band.Best)
	for _, m := range band.Members {
		if !m.Speaks {
			x.say(m.Correlation.Name+" is not counted", m.Why, "")
			continue
		}
		logs = append(logs, "ln("+plain(m.Estimate.Value, 6)+")")
		scatters = append(scatters, plain(m.Correlation.Scatter.Total(), 4)+"^2")
		spreads = append(spreads, "("+sum("ln("+plain(m.Estimate.Value, 6)+")", minus(mean, 6))+")^2")
	}
	n := len(logs)
	x.add(Step{Key: b.key, Name: symbol + ", best of the correlations", Formula: "mean of ln " + symbol + " over the families", Numbers: fmt.Sprintf("exp((%s) / %d)", sum(logs...), n), Value: Known(band.Best), Decimals: ratioDecimals})
	x.add(Step{Name: "standard deviation of ln " + symbol, Formula: "√(mean scatter² + variance of ln " + symbol + ")", Numbers: fmt.Sprintf("√((%s) / %d + (%s) / %d)", sum(scatters...), n, sum(spreads...), n), Value: Known(band.LnSD), Decimals: ratioDecimals})
	low := fmt.Sprintf("%s × exp(−1.644854 × %s)", plain(band.Best, 6), plain(band.LnSD, 6))
	x.add(Step{Key: b.key + "_low", Name: symbol + " low of the correlations, 5 % point", Numbers: low, Value: Known(band.Low), Decimals: ratioDecimals})
	x.add(Step{Key: b.key + "_high", Name: symbol + " high of the correlations, 95 % point", Numbers: strings.Replace(low, "−1.644854", "1.644854", 1), Value: Known(band.High), Decimals: ratioDecimals})
}

// listed joins places, cutting long lists.
func listed(places []string) string {
	const most = 8
	if len(places) > most {
		return strings.Join(places[:most], ", ") + fmt.Sprintf(" and %d more", len(places)-most)
	}
	return strings.Join(places, ", ")
}
