package review

import (
	"pastload/profile"
)

// Review checks a profile with every rule and returns what does not agree, the
// heaviest first. Decisions of the site answer the findings they are about.
//
// The error is of type DecisionProblems: decisions that match nothing. The
// findings are complete all the same.
func Review(p *profile.Profile) (Findings, error) {
	c := newContext(p)
	found := c.reviewed()
	problems := c.answer(found)
	found = append(found, c.staleDecisions(found)...)
	found.sort(c.order)
	found.identify()
	if len(problems) > 0 {
		return found, problems
	}
	return found, nil
}

// findings checks a profile with every rule.
func (c *context) findings() Findings {
	var found Findings
	moved := c.misplaced(&found)
	for _, r := range c.rows {
		r.blamed = moved[r.index]
		if r.blamed {
			continue
		}
		for _, f := range c.rowFindings(r) {
			r.blamed = r.blamed || f.Severity != Note
			found = append(found, f)
		}
	}
	for i := range rules {
		if rules[i].check != nil {
			c.running = &rules[i]
			found = append(found, rules[i].check(c)...)
		}
	}
	return c.merge(found)
}
