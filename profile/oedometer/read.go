package oedometer

import (
	"math"
)

// A reading is what the constructions together make of one loading.
type reading struct {
	in       *input
	methods  []Method
	apparent Yield
	yield    Yield
	bound    Bound
	why      string // why it is a bound
	spread   float64
	parts    Uncertainty
	q        Number
}

// readLoading runs all constructions on a loading, combines them, and shuts the
// gates where the test cannot tell.
func readLoading(l *loading, around surroundings) reading {
	around.detail = true
	in, ok := newInput(l, around, virginShare)
	r := reading{in: in}
	if q, _, known := l.steepening(); known {
		r.q = Known(q)
	}
	if !ok {
		r.methods = blankMethods("no two lines can be told apart")
		r.noBreak("no clear break in the curve", l.s[l.first])
		return r
	}
	outcomes := in.values()
	mean, disagreement, ok := combine(outcomes, in.virgin.flattening)
	if !ok {
		r.methods = blankMethods("no construction gave a value")
		r.noBreak("no clear break in the curve", l.s[l.first])
		return r
	}
	best := math.Exp(mean)
	r.parts = in.uncertainty(around, mean, disagreement)
	sd := r.parts.Total
	r.apparent = Yield{Low: math.Exp(mean - ninety*sd), Best: best, High: math.Exp(mean + ninety*sd)}
	r.report(outcomes)
	r.gate()
	return r
}

// besideOnly is said of a construction without a calibration. On generated curves
// that are straight in e–log σ′ the two of them read 0.65 to 0.85 of where the
// asymptotes meet; on soils with a constant modulus before yield they read more.
const besideOnly = "reported beside the others and not combined: its bias depends on how the modulus runs before yield, which e–log σ′ does not show"

// report turns outcomes into methods and sets their spread.
func (r *reading) report(outcomes []outcome) {
	low, high, n, weights := math.Inf(1), 0.0, 0, 0.0
	for i, o := range outcomes {
		c := constructions[i]
		known, calibrated := calibrations[c.id]
		m := Method{ID: c.id, Name: c.name, Mark: c.mark, Note: o.note, Known: o.ok, Used: o.ok && calibrated, Lines: o.lines}
		if o.ok {
			m.Stress, m.Low, m.High = o.stress, o.stress, o.stress
			if !calibrated {
				m.Note = besideOnly
			}
		}
		if m.Used {
			bias := known.at(r.in.virgin.flattening)
			m.Low = o.stress * math.Exp(-bias-ninety*known.scatter)
			m.High = o.stress * math.Exp(-bias+ninety*known.scatter)
			m.Corrected = o.stress * math.Exp(-bias)
			m.Weight = weight(known, o)
			weights += m.Weight
			low, high, n = math.Min(low, o.stress), math.Max(high, o.stress), n+1
		}
		for _, k := range o.points {
			m.Points = append(m.Points, r.in.origin[k])
		}
		r.methods = append(r.methods, m)
	}
	for i := range r.methods {
		if r.methods[i].Used {
			r.methods[i].Weight /= weights
		}
	}
	if n > 1 {
		r.spread = high / low
	}
}

// blankMethods returns every construction refused for one reason.
func blankMethods(why string) []Method {
	var methods []Method
	for _, c := range constructions {
		methods = append(methods, Method{ID: c.id, Name: c.name, Mark: c.mark, Note: why})
	}
	return methods
}
