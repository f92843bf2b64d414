package review

import (
	"fmt"
	"math"
	"strings"

	"pastload/profile"
)

// brokenPlace lists what a row breaks at its place, in words.
func (c *context) brokenPlace(r *row, rd *reading) []string {
	var out []string
	for i, x := range c.relations {
		if rd.ok[i] && math.Abs(rd.c[i].z) >= 2 {
			out = append(out, placeName(r.place())+": "+x.say(r, rd.c[i])+".")
		}
	}
	return out
}

// describeExchange makes the finding of two specimens exchanged.
func (c *context) describeExchange(m *move, readings map[int]*reading) Finding {
	rule := ruleByID("specimen-exchange")
	f := m.r.finding(rule, waterContent)
	f.Quantity, f.Severity = "specimen", Conflict
	f.fix, f.gain = c.correctPlace(m), m.gain
	f.Found = m.r.name()
	f.Wanted = m.q.name()
	f.Message = fmt.Sprintf("%s and %s look exchanged: neither goes with the ground around it, and each goes with the ground around the other.", m.r.name(), m.q.name())
	f.Evidence = append(c.brokenPlace(m.r, readings[m.r.index]), c.brokenPlace(m.q, readings[m.q.index])...)
	f.Also = []Place{m.q.place()}
	f.Cells = cells(m.r, m.q)
	f.Impact = math.Max(m.r.worstImpact(), m.q.worstImpact())
	f.Suggested = &Suggestion{Quantity: "specimen", How: "exchange " + m.r.name() + " with " + m.q.name(), Makes: len(f.Evidence)}
	return f
}

// describeElsewhere makes the finding of a specimen of another depth.
func (c *context) describeElsewhere(m *move, rd *reading) Finding {
	r := m.r
	f := r.finding(ruleByID("specimen-place"), waterContent)
	f.Quantity, f.Severity = "depth", Conflict
	f.fix, f.gain = c.correctPlace(m), m.gain
	f.Found = r.typedDepth() + " m"
	f.Evidence = c.brokenPlace(r, rd)
	f.Cells = cells(r)
	f.Impact = r.worstImpact()
	name := m.to.Name
	if name == "" {
		name = "the stratum"
	}
	f.Message = fmt.Sprintf("%s does not look like %s: %s. It looks like %s.", r.name(), r.stratumName(), firstClause(f.Evidence, r), name)
	if m.how == "" {
		f.Wanted = fmt.Sprintf("a depth in %s (%s to %s m)", name, fixed(m.to.Top, 2), fixed(m.to.Base, 2))
		return f
	}
	f.Wanted = fixed(m.depth, 2) + " m"
	f.Message += fmt.Sprintf(" At %s m (%s) it would fit.", fixed(m.depth, 2), m.how)
	if r.inOrder(m.depth) && !r.inOrder(r.depth.Value) {
		f.Message += " The order of the table says so too."
	}
	f.Causes = putFirst(f.Causes, m.how)
	f.Suggested = &Suggestion{Quantity: "depth", Value: profile.Known(m.depth), How: m.how, Makes: len(f.Evidence)}
	return f
}

// firstClause returns the first piece of evidence without its place.
func firstClause(evidence []string, r *row) string {
	if len(evidence) == 0 {
		return "its numbers differ"
	}
	return strings.TrimSuffix(strings.TrimPrefix(evidence[0], r.name()+": "), ".")
}

// cells returns where rows were read.
func cells(rows ...*row) []string {
	var out []string
	for _, r := range rows {
		switch {
		case r.depth.Source != nil:
			out = append(out, r.depth.Source.String())
		case r.result != nil && r.result.Source != nil:
			out = append(out, r.result.Source.String())
		case r.curve != nil && r.curve.Source != nil:
			out = append(out, r.curve.Source.String())
		}
	}
	return out
}

// worstImpact is the impact of leaving a row's numbers where they are.
func (r *row) worstImpact() float64 {
	worst := 0.1
	if r.known(preconsolidation) && r.line.known {
		worst = math.Max(worst, r.impact(preconsolidation, r.line.best))
	}
	return worst
}
