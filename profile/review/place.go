package review

import (
	"cmp"
	"math"
	"slices"

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
			if m, ok := c.exchange(r, q, rd, readings[q.index], single+c.bestSingle(q, readings[q.index]), len(suspects)); ok {
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

// indexVariables are those that belong to the soil whatever was done to the
// sample: only they can show that a specimen is of another stratum.
const indexVariables = 1<<unitWeight | 1<<waterContent | 1<<liquidLimit | 1<<plasticLimit | 1<<plasticityIndex | 1<<voidRatio

// strange tells whether a row disagrees with its place in two different ways, one
// of them by what the soil is.
func (c *context) strange(r *row, rd *reading) bool {
	var vars uint64
	n, index := 0, false
	for i, x := range c.relations {
		if !rd.ok[i] || !x.ofPlace(c.ruleOf[i]) || math.Abs(rd.c[i].z) < 2 {
			continue
		}
		if x.needs&^vars != 0 {
			n++
		}
		vars |= x.needs
		index = index || x.property > 0 && x.needs&indexVariables != 0
	}
	return n >= 2 && index
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
func (c *context) exchange(r, q *row, rd, qd *reading, single float64, suspects int) (move, bool) {
	x := r.at(q.borehole, q.ground, q.depth.Value, q.stratum, q.group)
	y := q.at(r.borehole, r.ground, r.depth.Value, r.stratum, r.group)
	x.partner, x.line, x.effective = q, q.line, q.effective
	y.partner, y.line, y.effective = r, r.line, r.effective
	gx, gy := rd.cost-c.after(rd, x, math.MaxUint64), qd.cost-c.after(qd, y, math.MaxUint64)
	// Among many that stand out two will fit each other by chance.
	m := move{r: r, q: q, gain: gx + gy - costExchange - math.Log(float64(suspects)/2)}
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
