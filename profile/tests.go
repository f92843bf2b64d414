package profile

import (
	"cmp"
	"fmt"
	"math"
	"slices"
	"strings"
)

// gradeNone is the grade of a laboratory value whose curve is not in the tables.
const gradeNone = "not graded"

// gradeBound is the grade of a test that only bounds the preconsolidation stress.
const gradeBound = "bound only"

// sameDepth is how far apart in m a result and a curve may be given and still
// be the same specimen where no specimen name tells.
const sameDepth = 0.05

// tests gathers the preconsolidation stresses of a borehole: what the results
// table reports and what the curves show, one Test for each specimen.
func (g *ground) tests(site *Site, specimens []Specimen) []Test {
	b := g.borehole
	tests := []Test{}
	for i := range b.Results {
		r := &b.Results[i]
		if !r.Preconsolidation.Known {
			continue
		}
		lab := Single(r.Preconsolidation.Value)
		if r.PreconsolidationLow.Known && r.PreconsolidationHigh.Known {
			lab.Low, lab.High = r.PreconsolidationLow.Value, r.PreconsolidationHigh.Value
		}
		tests = append(tests, Test{
			Specimen: r.Specimen, Depth: r.Depth.Value, Laboratory: lab,
			Bound: r.Preconsolidation.Bound, Result: r,
		})
	}
	for i := range specimens {
		sp := &specimens[i]
		if sp.Curve.Borehole != b.Name || !sp.Curve.Depth.Known {
			continue
		}
		t := matching(tests, sp.Curve)
		if t == nil {
			tests = append(tests, Test{Specimen: sp.Curve.Specimen, Depth: sp.Curve.Depth.Value, Result: g.resultOf(sp.Curve)})
			t = &tests[len(tests)-1]
		}
		t.Curve = sp.Curve
		t.specimen = sp
	}
	for i := range tests {
		g.settle(site, &tests[i])
	}
	slices.SortStableFunc(tests, func(a, b Test) int {
		return cmp.Or(cmp.Compare(a.Depth, b.Depth), strings.Compare(a.Specimen, b.Specimen))
	})
	return tests
}

// matching returns the test that a curve belongs to: by specimen, else by depth
// where one of the two has no specimen name.
func matching(tests []Test, c *Curve) *Test {
	for i := range tests {
		if t := &tests[i]; t.Curve == nil && t.Specimen != "" && strings.EqualFold(t.Specimen, c.Specimen) {
			return t
		}
	}
	for i := range tests {
		if t := &tests[i]; t.Curve == nil && t.Specimen == "" && math.Abs(t.Depth-c.Depth.Value) <= sameDepth {
			return t
		}
	}
	return nil
}

// resultOf returns the results row of a curve's specimen, or nil.
func (g *ground) resultOf(c *Curve) *Result {
	for i := range g.borehole.Results {
		if r := &g.borehole.Results[i]; r.Specimen != "" && strings.EqualFold(r.Specimen, c.Specimen) {
			return r
		}
	}
	return nil
}

// settle decides which value of a test is used and why, and sets it beside the
// stress of today.
func (g *ground) settle(site *Site, t *Test) {
	b := g.borehole
	if s := b.StratumAt(t.Depth, stratumOf(t.Result)); s != nil {
		t.Stratum = s.Name
	}
	t.Effective = g.at(t.Depth, false).effective
	t.Grade = gradeNone
	t.Used = true
	if t.specimen != nil {
		t.useCurve()
	} else {
		t.Preconsolidation = t.Laboratory
		t.Why = "laboratory value; its curve is not in the tables"
		if t.Bound != Exact {
			t.Grade = gradeBound
			t.Preconsolidation.Bound = t.Bound
			t.Why = "reported as a bound by the laboratory"
		}
	}
	t.decide(site, b.Name)
	if !t.Preconsolidation.Known {
		t.Used = false
		return
	}
	if !(t.Preconsolidation.Best > 0) {
		t.Used = false
		t.Why = "a preconsolidation stress of zero or less cannot be right"
		return
	}
	if !t.Effective.Known {
		t.Used = false
		t.Why += "; no effective stress is known at its depth"
		return
	}
	t.POP = Known(t.Preconsolidation.Best - t.Effective.Value)
	if t.Effective.Value > 0 {
		t.OCR = Known(t.Preconsolidation.Best / t.Effective.Value)
	} else {
		t.Used = false
		t.Why += "; the effective stress of today is zero or less, so there is no overconsolidation ratio"
	}
}

func stratumOf(r *Result) string {
	if r == nil {
		return ""
	}
	return r.Stratum
}

// useCurve takes the interpreted value where the curve gives one. A curve that
// stopped before its virgin line overrules a laboratory that printed a value
// all the same.
func (t *Test) useCurve() {
	sp := t.specimen
	t.Interpreted = sp.Preconsolidation
	t.Grade = sp.Grade
	switch {
	case sp.Preconsolidation.Known && sp.Bound != Exact:
		t.Preconsolidation = sp.Preconsolidation
		t.Bound = sp.Bound
		t.Why = "the curve only bounds it"
		if t.Laboratory.Known {
			t.Why += fmt.Sprintf("; the laboratory printed %s kPa", sigFigs(t.Laboratory.Best))
		}
	case sp.Preconsolidation.Known:
		t.Preconsolidation = sp.Preconsolidation
		t.Bound = Exact
		t.Why = "read from the curve"
		if t.Laboratory.Known {
			t.Why += fmt.Sprintf("; the laboratory printed %s kPa", sigFigs(t.Laboratory.Best))
		}
	default:
		t.Preconsolidation = t.Laboratory
		t.Grade = gradeNone
		t.Why = "laboratory value; the curve could not be interpreted: " + strings.Join(sp.Notes, "; ")
	}
}

// decide applies the engineer's decisions on a test's preconsolidation stress.
func (t *Test) decide(site *Site, borehole string) {
	for i := range site.Decisions {
		d := &site.Decisions[i]
		if d.Quantity != "preconsolidation stress" || !d.Concerns(borehole, t.Depth, t.Specimen) {
			continue
		}
		reason := fmt.Sprintf("%s (%s, %s)", d.Reason, d.By, d.Date)
		switch d.Decision {
		case LeaveOut:
			t.Used = false
			t.LeftOut = true
			t.Why = "left out: " + reason
		case AdoptValue:
			if d.Value.Known {
				t.Preconsolidation = Single(d.Value.Value)
				t.Bound = Exact
				t.Why = "adopted value: " + reason
			}
		case Keep:
			t.Why += "; kept: " + reason
		}
	}
}

// What an engineer can decide about a value.
const (
	LeaveOut   = "leave out"
	Keep       = "keep"
	AdoptValue = "adopt value"
)

// Concerns tells whether a decision is about the specimen at a depth of a
// borehole: by specimen where the decision names one, else by depth to the
// nearest centimetre.
func (d *Decision) Concerns(borehole string, depth float64, specimen string) bool {
	if d.Borehole != "" && d.Borehole != borehole {
		return false
	}
	if d.Specimen != "" && !strings.EqualFold(d.Specimen, specimen) {
		return false
	}
	if d.Depth.Known && math.Abs(d.Depth.Value-depth) > 0.005 {
		return false
	}
	return d.Specimen != "" || d.Depth.Known
}

// sigFigs writes a stress with three significant figures and no exponent.
func sigFigs(v float64) string {
	if v == 0 {
		return "0"
	}
	digits := 2 - int(math.Floor(math.Log10(math.Abs(v))))
	digits = max(0, min(digits, 6))
	return fmt.Sprintf("%.*f", digits, v)
}
