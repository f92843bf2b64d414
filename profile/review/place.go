package review

import (
	"cmp"
	"fmt"
	"math"
	"slices"
	"strings"

	"pastload/profile"
)

// The costs of a specimen that is not where the tables say, as minus logarithms
// of odds (ours).
const (
	costExchange  = 5.0 // two specimens exchanged
	costDepthSlip = 4.0 // a depth mistyped in a way that has a name
	costElsewhere = 7.0 // any other depth
	orderBonus    = 1.5 // the table runs down the borehole only with the other depth
)

// enoughPlaceGain is how much better a specimen must fit another place.
const enoughPlaceGain = 4.0

var placeRules = []Rule{
	{
		ID: "specimen-exchange", Name: "two specimens exchanged", Formula: "misfit of two specimens at their own places against that at each other's",
		Tolerance: "the exchange must gain 4 (as minus ln of odds) and more than any change of single values", Source: "comparison with both strata and with the stress history there", Mark: project, Severity: Conflict,
		Causes: []string{"labels exchanged in the laboratory or at the core box", "two rows of the table exchanged", "two lenses that happen to look alike"},
		Action: "Open the retained halves of both and compare them with the descriptions; ask for the laboratory's sample register.",
	},
	{
		ID: "specimen-place", Name: "specimen against its stratum", Formula: "misfit of the specimen at its depth against that at another",
		Tolerance: "the other place must gain 4 (as minus ln of odds) and more than any change of single values", Source: "comparison with the strata and with the stress history", Mark: project, Severity: Conflict,
		Causes: []string{"the depth is mistyped", "the specimen carries the label of another", "a lens or boundary that the log does not show"},
		Action: "Compare with the sample register and with the description of the specimen.",
	},
	{
		ID: "repeated-values", Name: "two specimens with the same numbers", Formula: "four or more measured numbers equal, and none different", Tolerance: "equal as typed",
		Source: "two specimens never give all the same numbers", Mark: practice, Severity: Conflict,
		Causes: []string{"a row copied and not overwritten", "one specimen entered twice under two names"},
		Action: "Take the second from the laboratory sheet again.",
		check:  repeated,
	},
	{
		ID: "duplicates", Name: "two results at one depth", Formula: "within 0.3 m in one stratum: σ′p, w, γ and e0 of two specimens",
		Tolerance: "σ′p a factor of 1.5, e0 12 %, w 12 %, γ 0.6 kN/m³ (three standard deviations of the difference)", Source: "scatter of duplicate tests", Mark: practice, Severity: Doubt,
		Causes: []string{"layering within the tube", "one of the two disturbed or mislabelled", "another laboratory"},
		Action: "Compare grade, sampler and description of the two.",
		check:  duplicates,
	},
}

// A move is a hypothesis that specimens belong elsewhere.
type move struct {
	r, q  *row // q is nil where r alone is at another depth
	depth float64
	how   string // of the depth, "" where only the stratum is known
	to    *profile.Stratum
	gain  float64
	after int // how many broken checks agree then
}

// misplaced finds specimens that belong elsewhere. It returns which rows are
// explained by that.
func (c *context) misplaced(found *Findings) map[int]bool {
	var suspects []*row
	readings := map[int]*reading{}
	for _, r := range c.rows {
		rd := c.read(r)
		if r.group != nil && c.strange(r, &rd) {
			suspects = append(suspects, r)
			readings[r.index] = &rd
		}
	}
	var moves []move
	for i, r := range suspects {
		rd := readings[r.index]
		single := c.bestSingle(r, rd)
		for _, q := range suspects[i+1:] {
			if q.group == r.group && q.borehole == r.borehole {
				continue // at other depths of one stratum they cannot be told apart
			}
			if m, ok := c.exchange(r, q, rd, readings[q.index], single+c.bestSingle(q, readings[q.index])); ok {
				moves = append(moves, m)
			}
		}
		if m, ok := c.elsewhere(r, rd, single); ok {
			moves = append(moves, m)
		}
	}
	slices.SortStableFunc(moves, func(a, b move) int { return cmp.Compare(b.gain, a.gain) })
	done := map[int]bool{}
	for _, m := range moves {
		if done[m.r.index] || m.q != nil && done[m.q.index] {
			continue
		}
		done[m.r.index] = true
		if m.q != nil {
			done[m.q.index] = true
			*found = append(*found, c.describeExchange(&m, readings))
		} else {
			*found = append(*found, c.describeElsewhere(&m, readings[m.r.index]))
		}
	}
	return done
}

// strange tells whether a row disagrees with its place in two different ways.
func (c *context) strange(r *row, rd *reading) bool {
	var vars uint64
	n := 0
	for i, x := range c.relations {
		if !rd.ok[i] || !x.ofPlace(c.ruleOf[i]) || math.Abs(rd.c[i].z) < 2 {
			continue
		}
		if x.needs&^vars != 0 {
			n++
		}
		vars |= x.needs
	}
	return n >= 2
}

// ofPlace tells whether a check compares a row with the ground around it.
func (x *relation) ofPlace(r *Rule) bool {
	return x.property > 0 || r.ID == "stress-history" || r.ID == "strength-ratio" || r.ID == "unit-weight-range" || r.ID == "ocr-below-one"
}

func (c *context) bestSingle(r *row, rd *reading) float64 {
	hs := c.hypotheses(r, rd, c.broken(rd))
	if len(hs) == 0 {
		return 0
	}
	return hs[0].gain
}

// at returns a copy of the row as if it had been sampled elsewhere.
func (r *row) at(b *profile.Borehole, ground *profile.BoreholeProfile, depth float64, s *profile.Stratum, g *group) *row {
	x := *r
	x.borehole, x.ground, x.depth, x.stratum, x.group = b, ground, profile.Known(depth), s, g
	x.organic = isOrganic(s) || r.known(organicContent) && r.v[organicContent] > organicFrom
	x.below = isBelow(b, x.depth)
	x.line = lineAt(ground, depth, s)
	x.effective = profile.Number{}
	if p := nearest(ground.Points, depth); p != nil {
		x.effective = p.Effective
	}
	return &x
}

// exchange tries two specimens at each other's places.
func (c *context) exchange(r, q *row, rd, qd *reading, single float64) (move, bool) {
	x := r.at(q.borehole, q.ground, q.depth.Value, q.stratum, q.group)
	y := q.at(r.borehole, r.ground, r.depth.Value, r.stratum, r.group)
	x.partner, x.line, x.effective = q, q.line, q.effective
	y.partner, y.line, y.effective = r, r.line, r.effective
	gx, gy := rd.cost-c.after(rd, x, math.MaxUint64), qd.cost-c.after(qd, y, math.MaxUint64)
	m := move{r: r, q: q, gain: gx + gy - costExchange}
	return m, gx > 1 && gy > 1 && m.gain > math.Max(enoughPlaceGain, single)
}

// elsewhere tries a specimen at other depths of its borehole.
func (c *context) elsewhere(r *row, rd *reading, single float64) (move, bool) {
	best := move{r: r}
	limit := math.Max(enoughPlaceGain, single)
	try := func(depth, cost float64, how string) {
		s := r.borehole.StratumAt(depth, "")
		if s == nil || s == r.stratum {
			return
		}
		g := c.groupOf(r.borehole, s)
		if g == nil || g == r.group {
			return
		}
		x := r.at(r.borehole, r.ground, depth, s, g)
		gain := rd.cost - c.after(rd, x, math.MaxUint64) - cost
		if how != "" && r.inOrder(depth) && !r.inOrder(r.depth.Value) {
			gain += orderBonus
		}
		if gain > best.gain && gain > limit {
			best.gain, best.depth, best.how, best.to = gain, depth, how, s
		}
	}
	for _, d := range depthSlips(r.typedDepth()) {
		try(d.value, d.cost, d.how)
	}
	for i := range r.borehole.Strata {
		s := &r.borehole.Strata[i]
		try((s.Top+s.Base)/2, costElsewhere, "")
	}
	return best, best.to != nil
}

func (r *row) typedDepth() string {
	if s := r.depth.Source; s != nil {
		if x, ok := plainNumber(strings.TrimSpace(s.Text)); ok && x == r.depth.Value {
			return strings.TrimSpace(s.Text)
		}
	}
	return fixed(r.depth.Value, 2)
}

// depthSlips lists depths that may have been meant.
func depthSlips(text string) []slip {
	x, ok := plainNumber(text)
	if !ok {
		return nil
	}
	var out []slip
	for _, y := range swaps(text) {
		out = append(out, slip{value: y, how: "two digits exchanged", cost: costDepthSlip})
	}
	for _, d := range []float64{10, 20, 30} {
		out = append(out, slip{value: x + d, how: "the first digit was lost", cost: costDepthSlip})
	}
	if x >= 10 {
		out = append(out, slip{value: math.Mod(x, 10), how: "a digit too many", cost: costDepthSlip})
	}
	return append(out, slip{value: x * 10, how: "decimal point one place out", cost: costDepthSlip}, slip{value: x / 10, how: "decimal point one place out", cost: costDepthSlip})
}

// inOrder tells whether a depth lies between those of the rows before and after
// it in the table, where that is known.
func (r *row) inOrder(depth float64) bool {
	if r.result == nil || r.result.Source == nil {
		return false
	}
	low, high := math.Inf(-1), math.Inf(1)
	before, after := -1, math.MaxInt
	for i := range r.borehole.Results {
		o := &r.borehole.Results[i]
		if o == r.result || o.Source == nil || o.Source.File != r.result.Source.File {
			continue
		}
		switch line := o.Source.Line; {
		case line < r.result.Source.Line && line > before:
			before, low = line, o.Depth.Value
		case line > r.result.Source.Line && line < after:
			after, high = line, o.Depth.Value
		}
	}
	return depth >= low && depth <= high
}

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
