package profile

import (
	"fmt"
)

// tests adds the preconsolidation tests at the depth: which value is used and
// why, what it means beside the stress of today, and what the rest of the ground
// says of it.
func (x *explainer) tests() {
	for _, t := range nearest(x.result.Tests, x.depth, func(t *Test) float64 { return t.Depth }) {
		if t.Depth != x.depth {
			x.vertical(t.Depth, false, ", at the test: "+at(t.Depth, t.Specimen))
		}
		if t.specimen != nil {
			x.group = "Oedometer curve of " + at(t.Depth, t.Specimen)
			x.curve(t.specimen)
		}
		x.group = "Preconsolidation test, " + at(t.Depth, t.Specimen)
		x.used(t)
		x.group = "The test beside the rest of the ground, " + at(t.Depth, t.Specimen)
		x.expected(t)
	}
}

// used adds the value of a test, OCR and POP.
func (x *explainer) used(t *Test) {
	if r := t.Result; r != nil && t.Laboratory.Known {
		n := r.Preconsolidation
		x.add(Step{Key: "laboratory_kPa", Name: "laboratory value", Numbers: converted(n), Value: Number{Value: t.Laboratory.Best, Known: true, Bound: n.Bound}, Decimals: decimalsOf(n), Unit: "kPa", Source: cited(n), Words: r.Method, Mark: assumedMark(n)})
	}
	for i := range x.site.Decisions {
		if d := &x.site.Decisions[i]; d.Quantity == "preconsolidation stress" && d.Concerns(x.borehole.Name, t.Depth, t.Specimen) {
			x.say("decision: "+d.Decision, fmt.Sprintf("%s (%s, %s)", d.Reason, d.By, d.Date), d.Source.String())
		}
	}
	use := "no: " + t.Why
	if t.Used {
		use = "yes: " + t.Why
	}
	x.say("used", use, "")
	x.say("grade", t.Grade, "")
	p := t.Preconsolidation
	if !p.Known {
		return
	}
	best := Number{Value: p.Best, Known: true, Bound: p.Bound}
	x.add(Step{Key: "preconsolidation_stress_kPa", Name: "σ′p of the test", Value: best, Decimals: stressDecimals, Unit: "kPa"})
	if p.Bound == Exact && p.Low < p.High {
		x.add(Step{Key: "preconsolidation_stress_low_kPa", Name: "σ′p of the test, low", Value: Known(p.Low), Decimals: stressDecimals, Unit: "kPa"})
		x.add(Step{Key: "preconsolidation_stress_high_kPa", Name: "σ′p of the test, high", Value: Known(p.High), Decimals: stressDecimals, Unit: "kPa"})
	}
	if !t.Effective.Known {
		return
	}
	x.add(Step{Key: "effective_stress_kPa", Name: "σ′v0 at the test", Value: t.Effective, Decimals: stressDecimals, Unit: "kPa"})
	top, bottom := term(p.Best, stressDecimals), term(t.Effective.Value, stressDecimals)
	if t.OCR.Known {
		x.add(Step{Key: "ocr", Name: "overconsolidation ratio OCR", Formula: "σ′p/σ′v0", Numbers: top + " / " + bottom, Value: bounded(t.OCR, p.Bound), Decimals: ratioDecimals, Mark: markDefinition})
	}
	if t.POP.Known {
		x.add(Step{Key: "pop_kPa", Name: "pre-overburden pressure POP", Formula: "σ′p − σ′v0", Numbers: top + " − " + bottom, Value: bounded(t.POP, p.Bound), Decimals: stressDecimals, Unit: "kPa", Mark: markDefinition})
	}
}

func bounded(n Number, b Bound) Number {
	n.Bound = b
	return n
}

// expected adds what all other evidence says of a test.
func (x *explainer) expected(t *Test) {
	if !t.Expected.Known {
		why := "no other evidence speaks of this depth"
		switch {
		case !t.Used:
			why = "the test is not used"
		case t.Bound != Exact:
			why = "the test is a bound, which a value cannot be held against"
		}
		x.say("expected", "nothing: "+why, "")
		return
	}
	e := t.Expected
	for _, v := range []struct {
		key, name string
		value     float64
	}{{"expected_low_kPa", "σ′p expected here, 5 % point", e.Low}, {"expected_kPa", "σ′p expected here, 50 % point", e.Best}, {"expected_high_kPa", "σ′p expected here, 95 % point", e.High}} {
		x.add(Step{Key: v.key, Name: v.name, Formula: "of another good test at this depth, this one left out", Value: Known(v.value), Decimals: stressDecimals, Unit: "kPa", Mark: markComputed})
	}
	if t.Z.Known {
		x.add(Step{Key: "z", Name: "z", Formula: "standard normal score of the test in that distribution", Value: t.Z, Decimals: 2, Mark: markComputed})
	}
	x.say("verdict", t.Verdict, "")
}
