package review

import (
	"fmt"
	"math"
	"slices"
	"sort"
	"strings"

	"pastload/profile"
)

// A DecisionProblem is a decision that cannot be applied.
// It prints as file:line:column: quantity: what was found; what is wanted.
type DecisionProblem struct {
	Decision *profile.Decision
	Found    string
	Wanted   string
}

func (p DecisionProblem) Error() string {
	place := "decisions"
	if s := p.Decision.Source; s != nil {
		place = s.String()
	}
	return place + ": " + orWord(p.Decision.Quantity, "quantity") + ": " + p.Found + "; want " + p.Wanted
}

// DecisionProblems are all decisions that match nothing, in table order.
type DecisionProblems []DecisionProblem

func (ps DecisionProblems) Error() string {
	lines := make([]string, len(ps))
	for i, p := range ps {
		lines[i] = p.Error()
	}
	return strings.Join(lines, "\n")
}

func orWord(s, other string) string {
	if s == "" {
		return other
	}
	return s
}

// An answer is a decision with what it is about.
type answer struct {
	decision *profile.Decision
	row      *row // nil where it is about a borehole
	stratum  bool // it is about a stratum
	stale    bool
	now      string // the value as it is today, where stale
}

// Further quantities that a finding, and so a decision, can be about besides
// those of a result: of a specimen, and of a borehole.
var specimenQuantities = []string{"specimen", "depth", "oedometer test", "water content (oedometer)", "specific gravity (oedometer)", "initial void ratio (oedometer)"}

var boreholeQuantities = []string{"water table depth", "pore pressure", "unit weight of the stratum", "description", "number of tests"}

// FurtherQuantities lists what findings can be about besides the quantities of a
// result, so that decisions on them can be read and completed.
func FurtherQuantities() []string { return slices.Concat(specimenQuantities, boreholeQuantities) }

// ratios are quantities that a value can be adopted for and that follow from
// those of a result.
var ratios = []string{"OCR", "POP", "compression ratio", "recompression ratio", "strength ratio"}

// answer matches every decision with the tables and with the findings.
func (c *context) answer(found Findings) DecisionProblems {
	var problems DecisionProblems
	for i := range c.site.Decisions {
		d := &c.site.Decisions[i]
		a, problem := c.match(d)
		if problem != nil {
			problems = append(problems, *problem)
			continue
		}
		c.answers = append(c.answers, a)
		for j := range found {
			f := &found[j]
			if a.about(f) {
				f.Answered, f.Stale = d, a.stale
			}
		}
	}
	return problems
}

// about tells whether a decision answers a finding.
func (a *answer) about(f *Finding) bool {
	d := a.decision
	if a.stratum || !strings.EqualFold(d.Quantity, f.Quantity) {
		return false
	}
	for _, p := range f.places() {
		if a.row == nil {
			if strings.EqualFold(d.Borehole, p.Borehole) && !d.Depth.Known && d.Specimen == "" {
				return true
			}
			continue
		}
		if p.Depth.Known && d.Concerns(p.Borehole, p.Depth.Value, p.Specimen) {
			return true
		}
	}
	return false
}

// match finds what a decision is about.
func (c *context) match(d *profile.Decision) (answer, *DecisionProblem) {
	a := answer{decision: d}
	fail := func(found, wanted string) (answer, *DecisionProblem) {
		return a, &DecisionProblem{Decision: d, Found: found, Wanted: wanted}
	}
	if contains(boreholeQuantities, d.Quantity) && !d.Depth.Known && d.Specimen == "" {
		if d.Borehole != "" && c.site.Borehole(d.Borehole) == nil {
			return fail(fmt.Sprintf("there is no borehole %q", d.Borehole), "one of "+strings.Join(c.boreholeNames(), ", "))
		}
		return a, nil
	}
	if c.ofStratum(d) {
		a.stratum = true // a design value, which the review does not judge
		return a, nil
	}
	v, known := variableOf(d.Quantity)
	if !known && !contains(specimenQuantities, d.Quantity) && !isQuantity(d.Quantity) && !contains(boreholeQuantities, d.Quantity) && !contains(ratios, d.Quantity) {
		return fail(fmt.Sprintf("%q is not a quantity that is reviewed", d.Quantity), "the quantity as a finding or the results table names it, e.g. preconsolidation stress")
	}
	var here *row
	for _, r := range c.rows {
		if !r.depth.Known || !d.Concerns(r.borehole.Name, r.depth.Value, r.specimen) {
			continue
		}
		if here == nil || known && !here.measured(v) && r.measured(v) {
			here = r
		}
	}
	switch {
	case here == nil:
		return fail("no result or test is at "+orWord(placeName(Place{d.Borehole, d.Depth, d.Specimen}), "this place"), "borehole, depth and specimen as the results or oedometer table gives them")
	case known && !here.measured(v):
		return fail(fmt.Sprintf("%s has no %s", here.name(), d.Quantity), "a quantity that was measured there")
	}
	a.row = here
	if known && d.Seen.Known {
		if now := here.today(v); math.Abs(now-d.Seen.Value) > seenTolerance(d.Seen) {
			a.stale, a.now = true, v.text(now)
		}
	}
	return a, nil
}

// ofStratum tells whether a decision is for a whole stratum, which its borehole
// or specimen column then names.
func (c *context) ofStratum(d *profile.Decision) bool {
	for i := range c.site.Boreholes {
		for j := range c.site.Boreholes[i].Strata {
			if name := c.site.Boreholes[i].Strata[j].Name; name != "" && (strings.EqualFold(name, d.Borehole) || strings.EqualFold(name, d.Specimen)) {
				return true
			}
		}
	}
	return false
}

// measured tells whether the tables give a variable at all, as a bound or not.
func (r *row) measured(v variable) bool {
	if n := r.number(v); n != nil && n.Known {
		return true
	}
	return r.known(v) || v == preconsolidation && r.test != nil
}

// today returns the value that a decision would be about.
func (r *row) today(v variable) float64 {
	if n := r.number(v); n != nil && n.Known {
		return n.Value
	}
	if v == preconsolidation && !r.known(v) && r.test != nil {
		return r.test.Preconsolidation.Best
	}
	return r.v[v]
}

// seenTolerance is half the last printed digit of the value seen, or 0.5 % of it
// where it was not typed.
func seenTolerance(seen profile.Number) float64 {
	if seen.Source != nil {
		text := strings.TrimSpace(seen.Source.Text)
		if x, ok := plainNumber(text); ok && x == seen.Value {
			decimals := 0
			if i := strings.LastIndexAny(text, ".,"); i >= 0 {
				decimals = len(text) - i - 1
			}
			return 0.5*math.Pow(10, -float64(decimals)) + 1e-9
		}
	}
	return 0.005*math.Abs(seen.Value) + 1e-9
}

func variableOf(quantity string) (variable, bool) {
	for v := range variable(nVariables) {
		if strings.EqualFold(traits[v].quantity, quantity) {
			return v, v <= sensitivity
		}
	}
	return 0, false
}

func isQuantity(name string) bool {
	for i := range profile.Quantities {
		if strings.EqualFold(profile.Quantities[i].Name, name) {
			return true
		}
	}
	return false
}

func contains(list []string, s string) bool {
	for _, x := range list {
		if strings.EqualFold(x, s) {
			return true
		}
	}
	return false
}

func (c *context) boreholeNames() []string {
	var out []string
	for i := range c.site.Boreholes {
		out = append(out, c.site.Boreholes[i].Name)
	}
	sort.Strings(out)
	return out
}

// staleDecisions reports decisions whose value has changed and that answer no
// finding, so that they are not lost from sight.
func (c *context) staleDecisions(found Findings) Findings {
	var out Findings
	for i := range c.answers {
		a := &c.answers[i]
		if !a.stale {
			continue
		}
		said := false
		for j := range found {
			if found[j].Answered == a.decision {
				said = true
				found[j].Message += fmt.Sprintf(" The decision of %s (%s) saw %s and no longer holds.", a.decision.Date, a.decision.By, seenText(a.decision))
			}
		}
		if said {
			continue
		}
		v, _ := variableOf(a.decision.Quantity)
		f := a.row.finding(&decisionRule, v)
		f.Severity, f.Found, f.Wanted = Doubt, a.now, seenText(a.decision)+", or a new decision"
		f.Message = fmt.Sprintf("The decision to %s (%s, %s) was made when the value was %s; it is %s now.", a.decision.Decision, a.decision.By, a.decision.Date, seenText(a.decision), a.now)
		f.Answered, f.Stale = a.decision, true
		if a.decision.Source != nil {
			f.Cells = append(f.Cells, a.decision.Source.String())
		}
		out = append(out, f)
	}
	return out
}

func seenText(d *profile.Decision) string {
	if v, ok := variableOf(d.Quantity); ok {
		if s := d.Seen.Source; s != nil {
			if x, plain := plainNumber(strings.TrimSpace(s.Text)); plain && x == d.Seen.Value {
				return strings.TrimSpace(s.Text) + traits[v].unit
			}
		}
		return v.text(d.Seen.Value)
	}
	return fixed(d.Seen.Value, 2)
}

// decisionRule is about the decisions themselves.
var decisionRule = Rule{
	ID: "stale-decision", Name: "decision on a value that has changed", Formula: "value now = value seen", Tolerance: "half the last printed digit of the value seen",
	Source: "a decision holds for the value it was made on", Mark: project, Severity: Doubt,
	Causes: []string{"the laboratory corrected the result", "the decision was recorded at another specimen"},
	Action: "Decide again on the value as it is now.",
}
