package review

import (
	"fmt"
	"math"
	"slices"

	"pastload/profile"
)

// stratumWeights compares the strata table with the densities measured.
func stratumWeights(c *context) []Finding {
	var out []Finding
	for i := range c.profile.Boreholes {
		b := c.site.Borehole(c.profile.Boreholes[i].Borehole)
		if b == nil {
			continue
		}
		for j := range b.Strata {
			s := &b.Strata[j]
			g := c.groupOf(b, s)
			if g == nil {
				continue
			}
			for _, w := range []struct {
				n    profile.Number
				name string
			}{{s.SaturatedUnitWeight, "saturated unit weight"}, {s.UnitWeight, "unit weight"}} {
				if f, ok := c.stratumWeight(b, s, g, w.n, w.name); ok {
					out = append(out, f)
					break
				}
			}
		}
	}
	return out
}

// stratumWeight compares one unit weight of a stratum.
func (c *context) stratumWeight(b *profile.Borehole, s *profile.Stratum, g *group, given profile.Number, name string) (Finding, bool) {
	if !given.Known {
		return Finding{}, false
	}
	want, n := g.weighed()
	if n < smallest {
		return Finding{}, false
	}
	z := ratioLimit * -1.0
	if given.Value > 0 {
		z = math.Log(given.Value/want) / square(0.025, 0.03/math.Sqrt(float64(n)))
	}
	if name == "unit weight" {
		z *= 0.6 // above the water table it may be drier
	}
	if math.Abs(z) < 3 {
		return Finding{}, false
	}
	rule := c.running
	f := Finding{
		Rule: rule.ID, Severity: Doubt, Borehole: b.Name, Quantity: "unit weight of the stratum", Depth: profile.Known(s.Top),
		Found: unitWeight.text(given.Value), Wanted: "about " + unitWeight.text(want), Causes: slices.Clone(rule.Causes), Action: rule.Action, Source: rule.Reference(),
	}
	if math.Abs(z) > 5 {
		f.Severity = Conflict
	}
	if given.Value < 8 || given.Value > 24.5 {
		f.Severity = Error
	}
	f.Message = fmt.Sprintf("%s: the strata table gives %s a %s of %s; %s there %s %s.", b.Name, orWord(s.Name, "the ground"), name, unitWeight.text(given.Value), plural(n, "measurement"), verb(n, "makes", "make"), unitWeight.text(want))
	for _, u := range unitSlips[density] {
		if math.Abs(math.Log(given.Value*u.factor/want)) < 0.12 {
			f.Message += fmt.Sprintf(" In %s it would be %s.", u.unit, unitWeight.text(given.Value*u.factor))
			f.Causes = putFirst(f.Causes, "the number is in "+u.unit)
			f.Suggested = &Suggestion{Quantity: f.Quantity, Value: profile.Known(given.Value * u.factor), How: "the number is in " + u.unit, Unit: u.unit, Makes: 1}
		}
	}
	f.Impact = math.Min(1, math.Abs(given.Value-want)/want)
	f.fix, f.gain = correctWeight(b, s, want), 20+math.Abs(z)
	if given.Source != nil {
		f.Cells = []string{given.Source.String()}
	}
	return f, true
}

// correctWeight puts measured weights in the place of those of a stratum.
func correctWeight(b *profile.Borehole, s *profile.Stratum, want float64) correction {
	name, index := b.Name, 0
	for i := range b.Strata {
		if &b.Strata[i] == s {
			index = i
		}
	}
	return func(site *profile.Site) {
		t := &site.Borehole(name).Strata[index]
		t.UnitWeight, t.SaturatedUnitWeight = profile.Known(want), profile.Known(want)
	}
}

func verb(n int, one, many string) string {
	if n == 1 {
		return one
	}
	return many
}

// weighed returns the median unit weight measured in a group, else the median
// that w and Gs give, and of how many.
func (g *group) weighed() (float64, int) {
	var measured, phase []float64
	for _, r := range g.rows {
		if r.known(unitWeight) {
			measured = append(measured, r.v[unitWeight])
		}
		if r.below && r.known(waterContent, specificGravity) && r.v[waterContent] > 0 && r.v[specificGravity] > 0 {
			phase = append(phase, profile.SaturatedUnitWeight(r.v[specificGravity], r.v[waterContent]*r.v[specificGravity]/100, r.water))
		}
	}
	if len(measured) < smallest {
		measured = phase
	}
	if len(measured) == 0 {
		return 0, 0
	}
	slices.Sort(measured)
	m := middle(measured)
	if !(m > 0) {
		return 0, 0
	}
	return m, len(measured)
}
