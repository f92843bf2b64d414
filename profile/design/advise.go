package design

import (
	"fmt"

	"pastload/profile"
)

// advise chooses a way and says why.
func (p *Parameter) advise(o Options, edition Edition, e evaluation) {
	p.Term = edition.Term
	if edition.second {
		p.Term += " (characteristic)"
	}
	switch {
	case p.N == 0:
		p.Method, p.Term = "none", ""
		p.MethodReason = "No value is left to compute from."
	case p.N < fewValues:
		p.Method, p.Term = "range and median only", ""
		if edition.second {
			p.Term = edition.Term + " (nominal, by judgement)"
		}
		p.MethodReason = fmt.Sprintf("%s too few for a formula: the range and the median are given, and a value is a matter of judgement and comparable experience.", sentence(values(p.N, "is", "are")))
	case e.followed:
		p.adviseLine(o, e)
	case edition.means:
		p.take(WayMeanLessSD, "Mean values go into design where the factors were calibrated to means; one standard deviation either side is for few or scattered data. The COV stands beside it.")
	default:
		p.adviseConstant(o, e)
	}
}

// adviseLine takes the regression line: one value would hide the trend.
func (p *Parameter) adviseLine(o Options, e evaluation) {
	id := "line-mean"
	if o.Estimate == Fractile {
		id = "line-fractile"
	}
	p.take(id, fmt.Sprintf("The values change with depth by about %s per metre (%s), so a line is used and not one value; it holds from %.2f to %.2f m only.",
		withUnit(rough(e.line.SlopeAt(p.middle())), p.Unit), chance(e.line.P), e.line.From, e.line.To))
}

// middle is the middle of the tested depths.
func (p *Parameter) middle() float64 { return p.Trend.From + (p.Trend.To-p.Trend.From)/2 }

// adviseConstant takes a constant: the sample's own variance where there are
// enough values to know it or where it is larger than assumed, else the assumed.
func (p *Parameter) adviseConstant(o Options, e evaluation) {
	n, counted := float64(p.N), values(p.N, "is", "are")
	if o.EffectiveCount {
		n = e.count
		counted = fmt.Sprintf("%d values worth %.1f independent ones are", p.N, n)
	}
	id, why := e.constantWay(o.Estimate, n, p.COV)
	what := "The mean over a large zone is taken to govern"
	if o.Estimate == Fractile {
		what = "The worst 5 % of the ground is taken to govern"
	}
	switch why {
	case enough:
		why = fmt.Sprintf("%s enough to know the scatter from the sample.", counted)
	case unusual:
		why = "no usual scatter is known for this quantity, so that of the sample is used."
	case scattered:
		why = fmt.Sprintf("the sample scatters more (COV %s) than is usual (%s), so its own scatter is used.", rough(p.COV.Value), rough(e.q.cov))
	case assumedScatter:
		why = fmt.Sprintf("%s too few to know the scatter, and the sample scatters no more (COV %s) than is usual, so a COV of %s is assumed.", counted, rough(p.COV.Value), rough(e.q.cov))
	}
	p.take(id, what+"; "+why)
	if p.Way == "" {
		p.Method = "range and median only"
		p.MethodReason = "The values lie so close together in depth that they are worth too few independent ones for a formula."
	}
}

// Why a constant is found in one way and not another.
const (
	enough         = "enough"
	unusual        = "no usual scatter"
	scattered      = "scattered"
	assumedScatter = "assumed"
)

// constantWay chooses the way for a constant from n independent values.
func (e *evaluation) constantWay(estimate Estimate, n float64, scatter profile.Number) (id, why string) {
	own, assumed := WayMeanUnknown, WayMeanKnown
	if estimate == Fractile {
		own, assumed = WayFractileUnknown, WayFractileKnown
	}
	switch {
	case n >= manyValues:
		return own, enough
	case e.q.cov == 0 || !scatter.Known:
		return own, unusual
	case scatter.Value > e.q.cov:
		return own, scattered
	}
	return assumed, assumedScatter
}

// take makes the alternative of that identifier the advised one.
func (p *Parameter) take(id, reason string) {
	for _, a := range p.Alternatives {
		if a.ID == id {
			p.Way, p.Method, p.MethodReason = id, a.Method, reason
			p.Low, p.High = a.Low, a.High
			return
		}
	}
}
