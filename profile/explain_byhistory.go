package profile

import (
	"fmt"
	"math"

	"pastload/correlate"
)

// byHistory adds the strength and the horizontal stress that correlations give
// for the stress history at a point.
func (x *explainer) byHistory(p *Point) {
	if !p.UndrainedStrength.Known {
		return
	}
	x.group = "Strength and horizontal stress by stress history, " + p.Stratum
	ocr, effective := p.OCR.Best, p.Effective.Value
	c := mustCorrelation(StrengthByHistory)
	x.add(Step{
		Key: "correlated_undrained_strength_kPa", Name: "undrained strength su, correlated", Formula: "su = 0.23·σ′v0·OCR^0.8",
		Numbers: fmt.Sprintf("0.23 × %s × %s^0.8", plain(effective, 4), plain(ocr, 6)),
		Value:   Known(p.UndrainedStrength.Best), Decimals: stressDecimals, Unit: "kPa", Source: c.Source, Mark: c.Verified.String(),
	})
	x.across("correlated_undrained_strength", "_kPa", "su", "kPa", p.UndrainedStrength, stressDecimals)
	if !p.K0.Known {
		return
	}
	pi := indexOf(x.borehole, &x.borehole.Strata[p.stratum], x.result.Results)
	f := mustCorrelation(FrictionByIndex)
	e, err := f.Evaluate(correlate.Values{"PI": pi.Value})
	if err != nil {
		return
	}
	x.add(Step{Name: "effective friction angle φ′, correlated", Formula: f.Formula + ", PI the mean of the stratum", Words: "PI = " + plain(pi.Value, 2) + " %",
		Value: Known(e.Value), Decimals: 3, Unit: "°", Source: f.Source, Mark: f.Verified.String()})
	k := mustCorrelation(K0ByHistory)
	step := Step{
		Key: "correlated_k0", Name: "earth pressure coefficient at rest K0, correlated", Formula: k.Formula,
		Value: Known(p.K0.Best), Decimals: ratioDecimals, Source: k.Source, Mark: k.Verified.String(),
	}
	sine := math.Sin(e.Value * math.Pi / 180)
	if passive := (1 + sine) / (1 - sine); ocr >= 1 && p.K0.Best < passive {
		step.Numbers = fmt.Sprintf("(1 − %s) × %s^%s", plain(sine, 6), plain(ocr, 6), plain(sine, 6))
	}
	x.add(step)
	x.across("correlated_k0", "", "K0", "", p.K0, ratioDecimals)
}

// across adds the ends of a correlated range.
func (x *explainer) across(key, suffix, symbol, unit string, r Range, decimals int) {
	const how = "scatter of the correlation and band of OCR, joined as √(a² + b²) of their logarithms"
	x.add(Step{Key: key + "_low" + suffix, Name: symbol + ", 5 % point", Formula: how, Value: Known(r.Low), Decimals: decimals, Unit: unit, Mark: markComputed})
	x.add(Step{Key: key + "_high" + suffix, Name: symbol + ", 95 % point", Formula: how, Value: Known(r.High), Decimals: decimals, Unit: unit, Mark: markComputed})
}
