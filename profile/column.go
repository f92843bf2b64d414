package profile

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"pastload/profile/insitu"
)

// assumedSpecificGravity stands in for Gs of mineral soil where none was
// measured in the stratum (common practice for clay and silt). It is always
// listed as an assumption.
const assumedSpecificGravity = 2.70

// A ground is a borehole with every unit weight settled, ready for stresses.
type ground struct {
	borehole    *Borehole
	stress      *insitu.Stress // nil where effective stress is used as given
	spread      *insitu.Spread // the uncertainty of stress
	given       []given        // the given effective stresses, by depth, where stress is nil
	givenCOV    float64        // coefficient of variation of the given stresses
	assumptions []Assumption
}

// given is an effective stress that the tables give.
type given struct{ depth, effective float64 }

// newGround settles the unit weights of a borehole and builds its stresses.
// What cannot be settled comes back as problems, all of them.
func newGround(site *Site, b *Borehole) (*ground, Problems) {
	g := &ground{borehole: b}
	var problems Problems
	layers := make([]insitu.Layer, 0, len(b.Strata))
	for i := range b.Strata {
		layer, p := g.layer(site, &b.Strata[i])
		layers = append(layers, layer)
		problems = append(problems, p...)
	}
	if len(problems) > 0 {
		if g.useGiven() {
			g.givenCOV = site.Settings.UnitWeightUncertainty
			return g, nil
		}
		return nil, problems
	}
	stress, err := insitu.New(g.columnOf(site, layers))
	if err == nil {
		g.spread, err = stress.Spread(site.Settings.UnitWeightUncertainty, site.Settings.WaterLevelUncertainty)
	}
	if err != nil {
		return nil, Problems{{Source: b.Source, Place: "borehole " + b.Name, Quantity: "vertical stress", Found: err.Error()}}
	}
	g.stress = stress
	if !b.WaterTableDepth.Known && len(b.Water) == 0 {
		g.assume(b.Strata, "No water table and no pore pressure is given: the ground is taken as dry, u0 = 0.")
	}
	return g, nil
}

// columnOf gathers what insitu needs.
func (g *ground) columnOf(site *Site, layers []insitu.Layer) insitu.Column {
	b := g.borehole
	c := insitu.Column{
		Layers:          layers,
		Surcharge:       b.Surcharge.Or(0),
		HasWater:        b.WaterTableDepth.Known,
		WaterTable:      b.WaterTableDepth.Or(0),
		CapillaryRise:   b.CapillaryRise.Or(0),
		WaterUnitWeight: site.Settings.WaterUnitWeight,
	}
	for _, w := range b.Water {
		if w.Pressure.Known {
			c.Measured = append(c.Measured, insitu.PorePressure{Depth: w.Depth.Value, Pressure: w.Pressure.Value})
		}
	}
	return c
}

// assume lists an assumption that holds from the top to the base of the strata.
func (g *ground) assume(strata []Stratum, message string) {
	if len(strata) == 0 {
		return
	}
	g.assumptions = append(g.assumptions, Assumption{Top: strata[0].Top, Base: strata[len(strata)-1].Base, Message: message})
}

// layer settles the unit weights of one stratum. The water table splits a layer
// into a part that needs the wet unit weight and one that needs the saturated.
func (g *ground) layer(site *Site, s *Stratum) (insitu.Layer, Problems) {
	b := g.borehole
	layer := insitu.Layer{Top: s.Top, Base: s.Base, UnitWeight: s.UnitWeight.Value, SaturatedUnitWeight: s.SaturatedUnitWeight.Value}
	one := []Stratum{*s}
	name := stratumName(s.Name)
	switch {
	case s.UnitWeight.Known && s.SaturatedUnitWeight.Known:
		return layer, nil
	case s.UnitWeight.Known:
		layer.SaturatedUnitWeight = s.UnitWeight.Value
		if wet, sat := g.needs(s); wet && sat {
			g.assume(one, fmt.Sprintf("%s: the unit weight of %.2f kN/m³ is used above and below the water table, as no saturated unit weight is given.", name, s.UnitWeight.Value))
		}
		return layer, nil
	case s.SaturatedUnitWeight.Known:
		layer.UnitWeight = s.SaturatedUnitWeight.Value
		if wet, _ := g.needs(s); wet {
			g.assume(one, fmt.Sprintf("%s: the saturated unit weight of %.2f kN/m³ is used above the water table too, as no other is given.", name, s.SaturatedUnitWeight.Value))
		}
		return layer, nil
	}
	gamma, message, ok := g.substitute(site, s)
	if !ok {
		source := s.Source
		if source == nil && len(b.Results) > 0 {
			source = b.Results[0].Source // no strata table: the first result is the place to start
		}
		return layer, Problems{{
			Source: source, Place: "borehole " + b.Name, Quantity: "unit weight",
			Found:  fmt.Sprintf("%s (%.2f to %.2f m in %s) has none, and no result in it has a unit weight or a water content that could stand in", name, s.Top, s.Base, b.Name),
			Wanted: "a unit weight in the strata table, or unit weights (or w and Gs) in the results table",
		}}
	}
	layer.UnitWeight, layer.SaturatedUnitWeight = gamma, gamma
	g.assume(one, name+": "+message)
	return layer, nil
}

// needs tells which unit weights a stratum needs for its place at the water table.
func (g *ground) needs(s *Stratum) (wet, saturated bool) {
	b := g.borehole
	if !b.WaterTableDepth.Known {
		return true, len(b.Water) > 0
	}
	line := b.WaterTableDepth.Value - b.CapillaryRise.Or(0)
	return s.Top < line, s.Base > line
}

// substitute finds a unit weight for a stratum that has none: the mean of the
// densities measured in it, here or in other boreholes, else from w and Gs as
// for saturated soil.
func (g *ground) substitute(site *Site, s *Stratum) (gamma float64, message string, ok bool) {
	here := resultsIn(g.borehole, s)
	everywhere := here
	if s.Name != "" {
		everywhere = nil
		for i := range site.Boreholes {
			o := &site.Boreholes[i]
			for j := range o.Strata {
				if o.Strata[j].Name == s.Name {
					everywhere = append(everywhere, resultsIn(o, &o.Strata[j])...)
				}
			}
		}
	}
	for _, set := range []struct {
		results []*Result
		where   string
	}{{here, "in " + g.borehole.Name}, {everywhere, "in this stratum in all boreholes"}} {
		if v := known(set.results, func(r *Result) Number { return r.UnitWeight }); len(v) > 0 {
			m := mean(v)
			return m, fmt.Sprintf("no unit weight is given; %.2f kN/m³ is the mean of %s %s (%.1f to %.1f kN/m³).", m, count(len(v), "measured unit weight"), set.where, slices.Min(v), slices.Max(v)), true
		}
	}
	return g.fromPhase(site, s, here, everywhere)
}

// fromPhase finds a unit weight from water contents and specific gravities.
func (g *ground) fromPhase(site *Site, s *Stratum, here, everywhere []*Result) (float64, string, bool) {
	water := func(r *Result) Number { return r.WaterContent }
	gravity := func(r *Result) Number { return r.SpecificGravity }
	w, where := known(here, water), "in "+g.borehole.Name
	if len(w) == 0 {
		w, where = known(everywhere, water), "in this stratum in all boreholes"
	}
	if len(w) == 0 {
		return 0, "", false
	}
	gs, how := assumedSpecificGravity, fmt.Sprintf("Gs taken as %.2f (assumed, none measured)", assumedSpecificGravity)
	if v := known(everywhere, gravity); len(v) > 0 {
		gs, how = mean(v), fmt.Sprintf("Gs = %.2f measured", mean(v))
	} else if isOrganic(s) {
		// Peat solids weigh half of mineral solids: guessing here would be wrong by
		// more than the submerged weight itself.
		return 0, "", false
	}
	wm := mean(w)
	e := VoidRatioFromWater(wm, gs)
	gamma := SaturatedUnitWeight(gs, e, site.Settings.WaterUnitWeight)
	message := fmt.Sprintf("no unit weight is given; %.2f kN/m³ follows from w = %.1f %% (mean of %s %s) and %s as for saturated ground.", gamma, wm, count(len(w), "value"), where, how)
	if wet, _ := g.needs(s); wet {
		message += " Part of it lies above the water table and may be lighter."
	}
	return gamma, message, true
}

// useGiven falls back on effective stresses that the results give.
func (g *ground) useGiven() bool {
	for i := range g.borehole.Results {
		r := &g.borehole.Results[i]
		if !r.EffectiveStress.Known {
			continue
		}
		n := len(g.given)
		if n > 0 && g.given[n-1].depth == r.Depth.Value {
			continue // the first of several at one depth stands
		}
		g.given = append(g.given, given{r.Depth.Value, r.EffectiveStress.Value})
	}
	if len(g.given) == 0 {
		return false
	}
	g.assumptions = append(g.assumptions, Assumption{
		Top: g.given[0].depth, Base: g.given[len(g.given)-1].depth,
		Message: "The effective stress is used as the results table gives it, straight lines between its depths: no unit weights are given from which it could be computed.",
	})
	return true
}

// A state is the vertical stress at a depth, each part known or not.
type state struct {
	total, pore, effective, sd, unitWeight Number
}

// at returns the stresses at a depth; above tells that the depth ends the
// stratum above it. Nothing is known where the ground does not reach.
func (g *ground) at(depth float64, above bool) state {
	if g.stress == nil {
		e := g.interpolate(depth)
		if !e.Known {
			return state{}
		}
		return state{effective: e, sd: Known(g.givenCOV * math.Abs(e.Value))}
	}
	find := g.stress.At
	if above {
		find = g.stress.JustAbove
	}
	s, err := find(depth)
	if err != nil {
		return state{}
	}
	out := state{total: Known(s.Total), pore: Known(s.Pore), effective: Known(s.Effective), unitWeight: Known(s.UnitWeight)}
	if sd, err := g.spread.At(depth); err == nil {
		out.sd = Known(sd)
	}
	return out
}

// interpolate returns the given effective stress at a depth, between the first
// and the last depth that give one.
func (g *ground) interpolate(depth float64) Number {
	i, found := slices.BinarySearchFunc(g.given, depth, func(v given, d float64) int {
		switch {
		case v.depth < d:
			return -1
		case v.depth > d:
			return 1
		}
		return 0
	})
	if found {
		return Known(g.given[i].effective)
	}
	if i == 0 || i == len(g.given) {
		return Number{}
	}
	a, b := g.given[i-1], g.given[i]
	return Known(a.effective + (b.effective-a.effective)*(depth-a.depth)/(b.depth-a.depth))
}

// isOrganic tells whether a stratum's words say peat or organic soil.
func isOrganic(s *Stratum) bool {
	text := strings.ToLower(s.Soil + " " + s.Name)
	return strings.Contains(text, "peat") || strings.Contains(text, "organic")
}

// resultsIn returns the results of a borehole that lie in a stratum. A result
// on a boundary belongs to the lower stratum, unless it names the upper.
func resultsIn(b *Borehole, s *Stratum) []*Result {
	var rs []*Result
	for i := range b.Results {
		if b.StratumAt(b.Results[i].Depth.Value, b.Results[i].Stratum) == s {
			rs = append(rs, &b.Results[i])
		}
	}
	return rs
}

// StratumAt returns the stratum at a depth, nil below the deepest. A depth on a
// boundary belongs to the lower stratum, unless the name is that of the upper;
// the base of the deepest stratum belongs to it.
func (b *Borehole) StratumAt(depth float64, name string) *Stratum {
	var found *Stratum
	for i := range b.Strata {
		s := &b.Strata[i]
		if depth < s.Top || depth > s.Base {
			continue
		}
		if found == nil || name == "" || found.Name != name {
			found = s
		}
	}
	return found
}

func stratumName(name string) string {
	if name == "" {
		return "The ground"
	}
	return name
}

// known gathers the known values of a quantity.
func known(rs []*Result, of func(*Result) Number) []float64 {
	var v []float64
	for _, r := range rs {
		if n := of(r); n.Known {
			v = append(v, n.Value)
		}
	}
	return v
}

func mean(v []float64) float64 {
	sum := 0.0
	for _, x := range v {
		sum += x
	}
	return sum / float64(len(v))
}

// count writes a number with its noun, "1 value" or "3 values".
func count(n int, noun string) string {
	if n == 1 {
		return "1 " + noun
	}
	return fmt.Sprintf("%d %ss", n, noun)
}
