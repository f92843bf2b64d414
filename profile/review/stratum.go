package review

import (
	"fmt"
	"math"
	"strings"
)

// properties are what the results of one stratum are compared by. The priors are
// what a stratum usually scatters, near the lower published coefficients of
// variation (Phoon & Kulhawy 1999, from memory); the scatter found in the
// stratum itself widens them.
var properties = []property{
	{name: "unit weight", vars: []variable{unitWeight}, prior: 0.03, log: true, of: of(unitWeight)},
	{name: "water content", vars: []variable{waterContent}, prior: 0.14, log: true, of: of(waterContent)},
	{name: "liquid limit", vars: []variable{liquidLimit}, prior: 0.14, log: true, of: of(liquidLimit)},
	{name: "plastic limit", vars: []variable{plasticLimit}, prior: 0.14, log: true, of: of(plasticLimit)},
	{name: "plasticity index", vars: []variable{plasticityIndex}, prior: 0.22, log: true, of: of(plasticityIndex)},
	{name: "void ratio", vars: []variable{voidRatio}, prior: 0.14, log: true, of: of(voidRatio)},
	{name: "specific gravity", vars: []variable{specificGravity}, prior: 0.03, of: of(specificGravity)},
	{name: "liquidity index", vars: []variable{waterContent, liquidLimit, plasticLimit}, prior: 0.2, of: func(r *row) (float64, bool) {
		li, _, ok := liquidity(r)
		return li, ok
	}},
	{name: "height above the A-line", vars: []variable{plasticityIndex, liquidLimit}, prior: 4, of: func(r *row) (float64, bool) {
		return overALine(r.v[liquidLimit], r.v[plasticityIndex]), true
	}},
	{name: "height above the A-line by the limits", vars: []variable{liquidLimit, plasticLimit}, prior: 4, of: func(r *row) (float64, bool) {
		return overALine(r.v[liquidLimit], r.v[liquidLimit]-r.v[plasticLimit]), true
	}},
	{name: "compression index", vars: []variable{compressionIndex}, prior: 0.25, log: true, of: of(compressionIndex)},
	{name: "compression index over its correlation", vars: []variable{compressionIndex}, prior: 0.18, log: true, of: func(r *row) (float64, bool) {
		cc, ok := correlatedCompression(r)
		return r.v[compressionIndex] / cc, ok
	}},
	{name: "recompression over compression index", vars: []variable{recompressionIndex, compressionIndex}, prior: 0.35, log: true, of: func(r *row) (float64, bool) {
		if r.v[compressionIndex] <= 0 {
			return 0, false
		}
		return r.v[recompressionIndex] / r.v[compressionIndex], true
	}},
	{name: "vane strength over preconsolidation stress", vars: []variable{undrainedStrength}, prior: 0.25, log: true, of: strengthRatioOf(true)},
	{name: "laboratory strength over preconsolidation stress", vars: []variable{undrainedStrength}, prior: 0.3, log: true, of: strengthRatioOf(false)},
}

func init() {
	for i := range properties {
		properties[i].mask = maskOf(properties[i].vars)
	}
}

func of(v variable) func(*row) (float64, bool) {
	return func(r *row) (float64, bool) { return r.v[v], true }
}

// strengthRatioOf compares strengths with the line of σ′p, which is smoother than
// any one test.
func strengthRatioOf(vane bool) func(*row) (float64, bool) {
	return func(r *row) (float64, bool) {
		if strings.Contains(r.strength, "vane") != vane || !r.line.known {
			return 0, false
		}
		return r.v[undrainedStrength] / r.line.best, true
	}
}

var stratumRules = stratumChecks()

// stratumChecks makes one rule for each property.
func stratumChecks() []Rule {
	out := make([]Rule, len(properties))
	for p := range properties {
		out[p] = stratumRule(p)
	}
	return out
}

func stratumRule(p int) Rule {
	q := &properties[p]
	x := relation{vars: q.vars, doubt: 3.3, conflict: 5.5, property: p + 1}
	if strings.Contains(q.name, "correlation") {
		x.also = []variable{voidRatio, liquidLimit, waterContent, curveVoidRatio, specificGravity}
	}
	x.when = func(r *row) bool { return r.group != nil }
	x.compare = func(r *row) (comparison, bool) { return r.group.confront(p, r) }
	x.say = func(r *row, c comparison) string {
		text := func(v float64) string { return fixed(v, 2) }
		unit := ""
		if q.name == traits[q.vars[0]].quantity {
			text, unit = q.vars[0].plain, traits[q.vars[0]].unit
		}
		return fmt.Sprintf("%s %s%s where the other %s of %s have about %s%s (%s to %s)", q.name, text(c.found), unit, plural(c.n, "result"), r.stratumName(), text(c.want), unit, text(c.low), text(c.high))
	}
	x.wanted = func(r *row, c comparison) string {
		v := q.vars[0]
		if q.name == traits[v].quantity {
			return fmt.Sprintf("%s to %s", v.plain(c.low), v.text(c.high))
		}
		return fmt.Sprintf("%s from %s to %s", q.name, fixed(c.low, 2), fixed(c.high, 2))
	}
	return Rule{
		ID: "stratum-" + slug(q.name), Name: q.name + " against its stratum", Formula: "value against the median of the others in the stratum, in all boreholes",
		Tolerance: "3.3 standard deviations are doubted, 5.5 a conflict; the deviation found in the stratum, weighed with a usual one of " + fixed(q.prior, 2) + " as six values",
		Source:    "robust comparison (median and median deviation); usual scatter after Phoon & Kulhawy 1999", Mark: memory, Severity: Conflict,
		Causes:   []string{"digits exchanged or another unit", "the specimen belongs to another stratum or depth", "a boundary or a lens that the log does not show"},
		Action:   "Look at the description of the specimen and at the laboratory sheet.",
		relation: relate(x),
	}
}

// confront compares a row with the others of the group.
func (g *group) confront(p int, r *row) (comparison, bool) {
	q := &properties[p]
	x, ok := q.at(r)
	if !ok {
		if v, applies := q.of(r); applies && q.log && v <= 0 {
			x = math.Inf(-1) // zero or less of what must be positive
		} else {
			return comparison{}, false
		}
	}
	without, count := r.own(g, p)
	centre, sd, n := g.usual(p, without, count)
	if n < smallest {
		return comparison{}, false
	}
	c := comparison{found: x, want: centre, low: centre - 2*sd, high: centre + 2*sd, z: (x - centre) / sd, n: n}
	if math.IsInf(x, -1) {
		c.z, c.found = -ratioLimit, 0
		if v, ok := q.of(r); ok {
			c.found = v
		}
	} else if q.log {
		c.found = math.Exp(x)
	}
	if q.log {
		c.want, c.low, c.high = math.Exp(c.want), math.Exp(c.low), math.Exp(c.high)
	}
	return c, true
}

func (r *row) stratumName() string {
	if r.stratum == nil || r.stratum.Name == "" {
		return "the ground"
	}
	return r.stratum.Name
}

func plural(n int, noun string) string {
	if n == 1 {
		return "1 " + noun
	}
	return whole(n) + " " + noun + "s"
}
