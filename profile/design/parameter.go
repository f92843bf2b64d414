package design

import (
	"math"

	"pastload/profile"
)

// parameter computes everything of a parameter but what the engineer adopted.
func (o Options) parameter(q *quantity, edition Edition, boreholes []string, readings []reading) (Parameter, error) {
	p := Parameter{
		Parameter: q.name, Symbol: q.symbol, Unit: q.unit, Key: q.key, Origin: q.origin,
		Side: q.side(), Governs: q.governs, Alternatives: []Alternative{}, Warnings: []string{},
	}
	if p.Origin == "" {
		p.Origin = Measured
	}
	var used, all Sample
	for _, r := range readings {
		switch {
		case r.assumed:
			p.Assumed++
			continue
		case r.leftOut && r.bound != profile.Exact:
			p.LeftOut++
			continue
		case r.bound != profile.Exact:
			p.Bounds++
			continue
		}
		all = append(all, r.Observation)
		if r.leftOut {
			p.LeftOut++
			continue
		}
		used = append(used, r.Observation)
	}
	var err error
	if p.Summary, err = Summarize(used); err != nil {
		return p, err
	}
	if p.LeftOut > 0 {
		with, err := Summarize(all)
		if err != nil {
			return p, err
		}
		p.WithLeftOut = &with
	}
	p.Observations = append([]Observation{}, byBorehole(used, boreholes)...)
	e := o.evaluate(q, used)
	p.Distribution = e.Distribution.String()
	p.fill(e)
	p.advise(o, edition, e)
	p.Reason = p.MethodReason
	p.warn(o, e)
	return p, nil
}

// An evaluation is a sample with what the formulas need of it.
type evaluation struct {
	Assumptions
	q      *quantity
	sample Sample
	scaled Sample // on the working scale
	flat   Sample // residuals where the trend is followed, else scaled
	// flatScale is the scale of flat: that of the line where it is followed.
	flatScale Distribution
	line      *DepthLine
	scale     float64 // of fluctuation, m
	count     float64 // effective
	average   float64 // m
	followed  bool    // the trend is real and great enough to use its line
	forced    bool    // a log-normal quantity with a value of zero or less
}

func (o Options) evaluate(q *quantity, s Sample) evaluation {
	e := evaluation{q: q, sample: s, scale: o.ScaleOfFluctuation, average: o.AverageOver}
	e.Distribution, e.COV, e.IndicatedCOV = q.distribution, q.cov, q.annexCOV
	var err error
	if e.scaled, err = s.onScale(e.Distribution); err != nil {
		e.Distribution, e.scaled, e.forced = Normal, s, true
	}
	if !(e.scale > 0) {
		e.scale = q.scale
	}
	if n, err := EffectiveCount(s, e.scale); err == nil {
		e.count = n
		if o.EffectiveCount {
			e.Count = n
		}
	}
	e.flat = e.scaled
	e.flatScale = e.Distribution
	if line, err := FitTrend(s, e.Distribution); err == nil {
		e.line = &line
		if e.followed = line.Real() && line.change() >= noticeable; e.followed {
			e.flatScale = line.Distribution
			if e.flatScale == Normal {
				e.flat = s
			}
			e.flat = line.residuals(e.flat)
		}
	}
	return e
}

// number returns v as known where it is finite and possible for the quantity.
func (e *evaluation) number(v float64) profile.Number {
	if math.IsNaN(v) || math.IsInf(v, 0) || v <= 0 && !e.q.signed {
		return profile.Number{}
	}
	return profile.Known(v)
}

// fill puts the ways, the trend and the correlation of the sample in p.
func (p *Parameter) fill(e evaluation) {
	if p.N == 0 {
		return
	}
	if e.q.cov > 0 {
		p.AssumedCOV, p.COVSource = profile.Known(e.q.cov), e.q.covSource
	}
	p.EffectiveN, p.Scale = profile.Known(e.count), profile.Known(e.scale)
	p.ScaleAssumed = e.scale == e.q.scale
	if sd, err := RobustSD(e.sample); err == nil {
		p.RobustSD = profile.Known(sd)
	}
	for _, w := range Ways {
		i, err := w.Of(e.sample, e.Assumptions)
		if err != nil {
			continue
		}
		p.Alternatives = append(p.Alternatives, e.alternative(w.ID, w.Name, w.Estimate, i, w.Source, w.Mark))
	}
	if e.average > 0 {
		if i, err := AverageOver(e.sample, e.Distribution, e.average, e.scale); err == nil {
			name := "average over " + metres(e.average)
			p.Alternatives = append(p.Alternatives, e.alternative("spatial-average", name, Mean, i, "after Vanmarcke 1977", MarkDerived))
		}
	}
	p.Looks = looksOf(e)
	if e.line == nil {
		return
	}
	p.Trend = e.trend()
	if e.line.N >= fewValues {
		p.Alternatives = append(p.Alternatives, e.lines()...)
	}
}

// alternative makes a row of what a way gives, with impossible values not known.
func (e *evaluation) alternative(id, name string, estimate Estimate, i Interval, source, mark string) Alternative {
	a := Alternative{ID: id, Method: name, Estimate: estimate.String(), Low: e.number(i.Low), High: e.number(i.High), Source: source, Mark: mark}
	if !a.Low.Known && i.Low <= 0 {
		a.Note = "the low value comes out at zero or less, which cannot be: the scatter is too great for this form"
	}
	return a
}

// looksOf returns the values to look at again, with their own values and not the
// residuals that the rules worked on.
func looksOf(e evaluation) []Look {
	looks := Looks(e.flat)
	for i := range looks {
		for k, o := range e.flat {
			if o == looks[i].Observation {
				looks[i].Observation = e.sample[k]
				break
			}
		}
	}
	return looks
}
