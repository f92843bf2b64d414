package review

import (
	"cmp"
	"fmt"
	"math"
	"slices"
	"strings"
)

var siteRules = []Rule{
	{
		ID: "number-of-tests", Name: "number of tests for the stratum", Formula: "oedometer tests in a stratum against the number recommended", Tolerance: "2 where the values scatter by less than 20 %, 3 up to 50 %, 4 beyond",
		Source: "EN 1997-2, Annex Q", Mark: memory, Severity: Note,
		Causes: []string{"few samples fit to be tested", "a stratum met late in the investigation"},
		Action: "State the number beside the design value, and lean on correlations and in-situ tests with their own scatter.",
		check:  fewTests,
	},
	{
		ID: "laboratory", Name: "laboratory against laboratory", Formula: "mean of one laboratory in a stratum against that of the other", Tolerance: "3.5 standard errors, each laboratory with at least 3 results",
		Source: "comparison of means", Mark: practice, Severity: Doubt,
		Causes: []string{"liquid limit by cone and by cup", "another drying temperature or another Gs method", "the laboratories tested different boreholes"},
		Action: "Ask both for their method; test a shared specimen.",
		check:  laboratories,
	},
}

// fewTests counts the tests of every stratum that has any.
func fewTests(c *context) []Finding {
	var out []Finding
	rule := c.running
	for _, g := range c.groups {
		var ratios []float64
		name := ""
		for _, r := range g.rows {
			name = r.stratumName()
			if r.test != nil && r.test.Used && !r.blamed && r.known(preconsolidation) && r.line.known && r.v[preconsolidation] > 0 {
				ratios = append(ratios, math.Log(r.v[preconsolidation]/r.line.best))
			}
		}
		n := len(ratios)
		if n == 0 {
			continue
		}
		slices.Sort(ratios)
		scatter, need := spread(ratios), 2
		switch {
		case scatter > 0.5:
			need = 4
		case scatter > 0.2:
			need = 3
		}
		if n >= need {
			continue
		}
		out = append(out, Finding{
			Rule: rule.ID, Severity: Note, Stratum: name, Quantity: "number of tests",
			Found: plural(n, "test") + " in " + name, Wanted: "at least " + whole(need),
			Message: fmt.Sprintf("%s has %s of its preconsolidation stress that nothing speaks against, fewer than the %d that are recommended.", capital(name), plural(n, "test"), need),
			Causes:  slices.Clone(rule.Causes), Action: rule.Action, Source: rule.Reference(),
		})
	}
	return out
}

// laboratories compares the laboratories of a stratum by every property.
func laboratories(c *context) []Finding {
	const least, limit = 3, 3.5
	var out []Finding
	rule := c.running
	for _, g := range c.groups {
		byName := map[string][]*row{}
		for _, r := range g.rows {
			if r.result != nil && r.result.Laboratory != "" && !r.blamed {
				key := strings.ToLower(strings.TrimSpace(r.result.Laboratory))
				byName[key] = append(byName[key], r)
			}
		}
		var names []string
		for name, rows := range byName {
			if len(rows) >= least {
				names = append(names, name)
			}
		}
		slices.SortFunc(names, cmp.Compare[string])
		for i, a := range names {
			for _, b := range names[i+1:] {
				out = append(out, compareLaboratories(rule, g, byName[a], byName[b], least, limit)...)
			}
		}
	}
	return out
}

func compareLaboratories(rule *Rule, g *group, a, b []*row, least int, limit float64) []Finding {
	var out []Finding
	for p := range properties {
		q := &properties[p]
		if len(q.vars) != 1 || q.name != traits[q.vars[0]].quantity {
			continue // ratios follow from these
		}
		x, y := propertyOf(a, p), propertyOf(b, p)
		if len(x) < least || len(y) < least {
			continue
		}
		sd := g.deviation(p, 1000)
		mx, my := middle(x), middle(y)
		// A median of n values is known to 1.25 s/√n.
		z := (mx - my) / (1.25 * sd * math.Sqrt(1/float64(len(x))+1/float64(len(y))))
		if math.Abs(z) < limit {
			continue
		}
		if q.log {
			mx, my = math.Exp(mx), math.Exp(my)
		}
		v := q.vars[0]
		out = append(out, Finding{
			Rule: rule.ID, Severity: Doubt, Stratum: a[0].stratumName(), Quantity: traits[v].quantity, Found: v.text(mx), Wanted: "about " + v.text(my),
			Message: fmt.Sprintf("%s: %s finds a %s of %s where %s finds %s (medians of %d and %d).", capital(a[0].stratumName()), a[0].result.Laboratory, traits[v].quantity, v.text(mx), b[0].result.Laboratory, v.text(my), len(x), len(y)),
			Causes:  slices.Clone(rule.Causes), Action: rule.Action, Source: rule.Reference(), Impact: traits[v].weight * 0.1,
		})
	}
	return out
}

func propertyOf(rows []*row, p int) []float64 {
	var out []float64
	for _, r := range rows {
		if r.properties&(1<<p) != 0 {
			out = append(out, r.property[p])
		}
	}
	slices.Sort(out)
	return out
}
