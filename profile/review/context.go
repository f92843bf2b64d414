package review

import (
	"math"
	"strings"

	"pastload/profile"
)

// A context is everything the checks look at.
type context struct {
	profile *profile.Profile
	site    *profile.Site
	rows    []*row
	groups  []*group // in the order in which the site names them
	order   map[string]int

	relations []*relation // of the rules, in their order
	ruleOf    []*Rule     // of each relation

	running *Rule    // whose check is at work
	answers []answer // one for each decision
}

// newContext gathers the rows and groups of a profile.
func newContext(p *profile.Profile) *context {
	c := &context{profile: p, site: p.Site, order: map[string]int{}}
	for i := range rules {
		if x := rules[i].relation; x != nil {
			c.relations = append(c.relations, x)
			c.ruleOf = append(c.ruleOf, &rules[i])
		}
	}
	specimens := map[*profile.Curve]*profile.Specimen{}
	for i := range p.Specimens {
		specimens[p.Specimens[i].Curve] = &p.Specimens[i]
	}
	for i := range p.Boreholes {
		c.order[p.Boreholes[i].Borehole] = i
		c.gather(&p.Boreholes[i], specimens)
	}
	groups := map[string]*group{}
	for i, r := range c.rows {
		r.index = i
		r.origin = r
		c.join(groups, r)
	}
	for _, g := range c.groups {
		g.summarize()
	}
	return c
}

// gather makes the rows of a borehole.
func (c *context) gather(b *profile.BoreholeProfile, specimens map[*profile.Curve]*profile.Specimen) {
	site := c.site.Borehole(b.Borehole)
	if site == nil {
		return
	}
	tests := map[*profile.Result]*profile.Test{}
	for i := range b.Tests {
		t := &b.Tests[i]
		if t.Result != nil {
			tests[t.Result] = t
			continue
		}
		r := c.newRow(site, b, profile.Known(t.Depth), t.Specimen, t.Stratum)
		r.addTest(t, specimens)
		r.addLine(t)
		r.ownCurve()
		c.rows = append(c.rows, r)
	}
	for i := range b.Results {
		d := &b.Results[i]
		if d.Result == nil {
			continue
		}
		r := c.newRow(site, b, d.Result.Depth, d.Specimen, d.Stratum)
		r.effective = d.Effective
		r.result = d.Result
		for v := unitWeight; v <= sensitivity; v++ {
			r.put(v, *traits[v].of(d.Result))
		}
		r.strength = strings.ToLower(d.Result.StrengthTest)
		r.organic = r.organic || r.known(organicContent) && r.v[organicContent] > organicFrom
		t := tests[d.Result]
		if t != nil {
			r.addTest(t, specimens)
		}
		r.addLine(t)
		c.rows = append(c.rows, r)
	}
}

// organicFrom is the organic content in percent above which mineral ranges no
// longer hold (high-organic by EN ISO 14688-2; from memory, unverified).
const organicFrom = 20

func (c *context) newRow(site *profile.Borehole, b *profile.BoreholeProfile, depth profile.Number, specimen, stratum string) *row {
	r := &row{borehole: site, ground: b, depth: depth, specimen: specimen, water: c.site.Settings.WaterUnitWeight}
	if !(r.water > 0) {
		r.water = 9.81
	}
	if depth.Known {
		r.stratum = site.StratumAt(depth.Value, stratum)
	}
	r.organic = isOrganic(r.stratum)
	r.below = isBelow(site, depth)
	return r
}

// isBelow tells whether a depth lies below the water table, where the ground is
// taken as saturated. Without a water table nothing is.
func isBelow(b *profile.Borehole, depth profile.Number) bool {
	return depth.Known && b.WaterTableDepth.Known && depth.Value > b.WaterTableDepth.Value
}

func isOrganic(s *profile.Stratum) bool {
	if s == nil {
		return false
	}
	text := strings.ToLower(s.Soil + " " + s.Name)
	return strings.Contains(text, "peat") || strings.Contains(text, "organic") || strings.Contains(text, "gyttja")
}

// addTest adds what an oedometer test says of the specimen.
func (r *row) addTest(t *profile.Test, specimens map[*profile.Curve]*profile.Specimen) {
	r.test = t
	r.effective = t.Effective
	if t.Curve == nil {
		return
	}
	r.curve = t.Curve
	r.put(curveVoidRatio, t.Curve.InitialVoidRatio)
	r.put(curveWater, t.Curve.WaterContent)
	r.put(curveGravity, t.Curve.SpecificGravity)
	s := specimens[t.Curve]
	if s == nil || !s.Interpreted {
		return
	}
	r.spec = s
	if s.Preconsolidation.Known && s.Bound == profile.Exact {
		r.set(curveYield, s.Preconsolidation.Best)
		if !r.known(preconsolidation) && !t.Laboratory.Known {
			r.set(preconsolidation, s.Preconsolidation.Best)
		}
	}
	if s.CompressionIndex.Known && s.Bound == profile.Exact {
		r.set(curveCompression, s.CompressionIndex.Value)
	}
	if s.Recompression.Known && strings.Contains(s.RecompressionHow, "loop") {
		r.set(curveRecompression, s.Recompression.Value)
	}
}

// ownCurve takes w, Gs and e0 of a specimen that has no row of results from its
// curve.
func (r *row) ownCurve() {
	if r.curve == nil {
		return
	}
	r.put(waterContent, r.curve.WaterContent)
	r.put(specificGravity, r.curve.SpecificGravity)
	r.put(voidRatio, r.curve.InitialVoidRatio)
	r.has &^= 1<<curveWater | 1<<curveGravity | 1<<curveVoidRatio
}

// leastLineSD is how far a good test may scatter about a line that is known
// exactly, as a standard deviation of ln σ′p (common practice, 0.10 to 0.15).
const leastLineSD = 0.13

// addLine takes over what the rest of the ground says of σ′p at the row: leaving
// the row's own test out where it was used, else the line itself.
func (r *row) addLine(t *profile.Test) {
	if t != nil && t.Expected.Known && t.Expected.Low > 0 {
		r.line = expectation{t.Expected.Best, math.Max(leastLineSD, math.Log(t.Expected.High/t.Expected.Low)/3.29), true}
		return
	}
	if r.depth.Known {
		r.line = lineAt(r.ground, r.depth.Value, r.stratum)
	}
}

// lineAt returns the line of σ′p at a depth with the scatter of a test about it.
func lineAt(b *profile.BoreholeProfile, depth float64, s *profile.Stratum) expectation {
	p := nearest(b.Points, depth)
	if p != nil && s != nil && p.Stratum != s.Name {
		for i := range b.Points {
			if q := &b.Points[i]; q.Depth == p.Depth && q.Stratum == s.Name {
				p = q
			}
		}
	}
	if p == nil || !p.Preconsolidation.Known || p.Preconsolidation.Low <= 0 {
		return expectation{}
	}
	return expectation{p.Preconsolidation.Best, square(leastLineSD, math.Log(p.Preconsolidation.High/p.Preconsolidation.Low)/3.29), true}
}

// join puts a row into the group of its stratum. Ground without a name is a
// group of its own in each borehole.
func (c *context) join(groups map[string]*group, r *row) {
	if r.stratum == nil {
		return
	}
	key := "name " + r.stratum.Name
	if r.stratum.Name == "" {
		key = "borehole " + r.borehole.Name
	}
	g := groups[key]
	if g == nil {
		g = &group{key: key, organic: r.organic}
		groups[key] = g
		c.groups = append(c.groups, g)
	}
	r.group = g
	g.rows = append(g.rows, r)
}

// groupOf returns the group of a stratum in a borehole, nil where nothing was
// measured in it.
func (c *context) groupOf(b *profile.Borehole, s *profile.Stratum) *group {
	key := "name " + s.Name
	if s.Name == "" {
		key = "borehole " + b.Name
	}
	for _, g := range c.groups {
		if g.key == key {
			return g
		}
	}
	return nil
}
