package profile

import (
	"fmt"
	"math"
	"strings"

	"pastload/correlate"
	"pastload/profile/cone"
	"pastload/profile/history"
)

// A source turns what was measured in place into a preconsolidation stress by
// one correlation of the catalogue.
type source struct {
	name        string // as it is called in the output
	correlation string // identifier in the catalogue
	applies     func(*Result) bool
}

// sources lists the in-situ evidence in the results table.
var sources = []source{
	{coneSources[cone.NetResistance], "mayne-1995-qnet", func(r *Result) bool { return r.NetConeResistance.Known }},
	{coneSources[cone.ExcessPressure], "chen-mayne-1996-du2", func(r *Result) bool { return r.ExcessConePressure.Known }},
	{coneSources[cone.EffectiveResistance], "mayne-2005-qeff", func(r *Result) bool { return r.EffectiveCone.Known }},
	{"field vane", "mayne-mitchell-1988-yield", func(r *Result) bool { return r.UndrainedStrength.Known && isVane(r) }},
	{"undrained strength", "mesri-1975-yield", func(r *Result) bool { return r.UndrainedStrength.Known && !isVane(r) }},
	{"standard penetration test", "mayne-kemper-1988-yield", func(r *Result) bool { return r.N60.Known }},
	{"dilatometer", "marchetti-1980-ocr", func(r *Result) bool { return r.HorizontalStressIndex.Known }},
	{"shear wave velocity", "mayne-1998-vs", func(r *Result) bool { return r.ShearWaveVelocity.Known }},
}

// isVane tells whether an undrained strength was measured with a vane in the
// ground.
func isVane(r *Result) bool { return strings.Contains(strings.ToLower(r.StrengthTest), "vane") }

// told is what Infer is told about a borehole, and how its answer finds its way
// back: Infer hears only of the strata that some evidence speaks about.
type told struct {
	history.Input
	stratum []int // of the borehole, for each layer
	point   []int // of the profile, for each station
}

// evidence gathers what Infer is told about a borehole.
func (g *ground) evidence(site *Site, p *Profile, b *BoreholeProfile, stations []station) told {
	in := told{Input: history.Input{
		Limits:          [3]float64{site.Settings.Limits.NormallyConsolidated, site.Settings.Limits.LightlyOverconsolidated, site.Settings.Limits.HeavilyOverconsolidated},
		WaterTable:      g.borehole.WaterTableDepth.Value,
		HasWater:        g.borehole.WaterTableDepth.Known,
		WaterUnitWeight: site.Settings.WaterUnitWeight,
	}}
	for i := range b.Tests {
		if t, ok := asEvidence(&b.Tests[i], i); ok {
			t.Layer = g.layerOf(b.Tests[i].Depth, b.Tests[i].Stratum)
			in.Tests = append(in.Tests, t)
		}
	}
	in.Neighbours = g.neighbours(p)
	in.Readings = append(g.readings(b), b.Cone.readings(g)...)
	in.Known = g.known(site)
	for i, st := range stations {
		pt := &b.Points[i]
		s := history.Station{Depth: st.depth, EffectiveStress: pt.Effective.Value, Layer: st.stratum}
		if pt.Effective.Value > 0 {
			s.LnSD = pt.EffectiveUncertainty.Value / pt.Effective.Value
		}
		in.Stations = append(in.Stations, s)
	}
	in.keepHeard(g, b)
	return in
}

// keepHeard drops the strata that no evidence speaks about, with a note: nothing
// is said of their stress history, however wide a band could be drawn.
func (in *told) keepHeard(g *ground, b *BoreholeProfile) {
	heard := make([]bool, len(g.borehole.Strata))
	for _, t := range in.Tests {
		heard[t.Layer] = true
	}
	for _, t := range in.Neighbours {
		heard[t.Layer] = true
	}
	for _, r := range in.Readings {
		heard[r.Layer] = true
	}
	layer := make([]int, len(heard)) // of Infer, for each stratum
	for i, h := range heard {
		s := &g.borehole.Strata[i]
		layer[i] = -1
		if !h {
			b.Notes = append(b.Notes, fmt.Sprintf("%s, %.2f to %.2f m: no test, sounding or neighbouring borehole speaks of its stress history, so none is given.", stratumName(s.Name), s.Top, s.Base))
			continue
		}
		layer[i] = len(in.Layers)
		in.Layers = append(in.Layers, history.Layer{Name: s.Name, Top: s.Top, Base: s.Base})
		in.stratum = append(in.stratum, i)
	}
	for i := range in.Tests {
		in.Tests[i].Layer = layer[in.Tests[i].Layer]
	}
	for i := range in.Neighbours {
		in.Neighbours[i].Layer = layer[in.Neighbours[i].Layer]
	}
	for i := range in.Readings {
		in.Readings[i].Layer = layer[in.Readings[i].Layer]
	}
	known := in.Known[:0]
	for _, k := range in.Known {
		if k.Layer >= 0 {
			if k.Layer = layer[k.Layer]; k.Layer < 0 {
				continue // about a stratum that is not heard
			}
		}
		known = append(known, k)
	}
	in.Known = known
	stations := in.Stations[:0]
	for i, s := range in.Stations {
		if s.Layer = layer[s.Layer]; s.Layer >= 0 {
			stations = append(stations, s)
			in.point = append(in.point, i)
		}
	}
	in.Stations = stations
}

// asEvidence turns a used test into evidence; the index comes back with the
// result.
func asEvidence(t *Test, index int) (history.Test, bool) {
	if !t.Used || !t.Preconsolidation.Known || !t.Effective.Known || t.Effective.Value <= 0 {
		return history.Test{}, false
	}
	e := history.Test{
		ID: index, Depth: t.Depth, EffectiveStress: t.Effective.Value,
		Preconsolidation: t.Preconsolidation.Best, LnSD: history.LnSDForGrade(t.Grade), Disturbance: disturbance(t.Grade),
	}
	switch t.Bound {
	case AtLeast:
		e.Kind = history.AtLeast
	case AtMost:
		e.Kind = history.AtMost
	}
	// A range that the reading of the curve states wider than its grade counts.
	if r := t.Preconsolidation; r.Low > 0 && r.High > r.Low {
		e.LnSD = max(e.LnSD, math.Log(r.High/r.Low)/(2*1.645))
	}
	return e, true
}

// disturbance is the one-sided doubt of a grade: how much of ln σ′p sampling
// may have taken away (project definition).
func disturbance(grade string) float64 {
	if grade == "C" {
		return 0.10
	}
	return 0
}

// layerOf returns the index of the stratum at a depth.
func (g *ground) layerOf(depth float64, name string) int {
	s := g.borehole.StratumAt(depth, name)
	for i := range g.borehole.Strata {
		if &g.borehole.Strata[i] == s {
			return i
		}
	}
	return 0
}

// neighbours gathers the tests of the same named strata in other boreholes.
func (g *ground) neighbours(p *Profile) []history.Test {
	var out []history.Test
	for i := range p.Boreholes {
		o := &p.Boreholes[i]
		if o.Borehole == g.borehole.Name {
			continue
		}
		for j := range o.Tests {
			for k := range g.borehole.Strata {
				if name := g.borehole.Strata[k].Name; name == "" || name != o.Tests[j].Stratum {
					continue
				}
				if t, ok := asEvidence(&o.Tests[j], -1); ok {
					t.Layer = k
					out = append(out, t)
				}
				break
			}
		}
	}
	return out
}

// readings evaluates the in-situ evidence of the results table.
func (g *ground) readings(b *BoreholeProfile) []history.Reading {
	var out []history.Reading
	for i := range b.Results {
		d := &b.Results[i]
		if !d.Effective.Known || d.Effective.Value <= 0 {
			continue
		}
		if s := g.borehole.StratumAt(d.Depth, d.Stratum); s != nil && isOrganic(s) {
			continue // the relations are for inorganic clay
		}
		v := d.Result.values(d.Effective)
		for _, s := range sources {
			if !s.applies(d.Result) {
				continue
			}
			if r, ok := s.reading(v, d); ok {
				r.Layer = g.layerOf(d.Depth, d.Stratum)
				out = append(out, r)
			}
		}
	}
	return out
}

// reading evaluates a source's correlation at a result.
func (s source) reading(v correlate.Values, d *DerivedResult) (history.Reading, bool) {
	c, ok := correlate.ByID(s.correlation)
	if !ok {
		panic("profile: no correlation " + s.correlation)
	}
	e, err := c.Evaluate(v)
	if err != nil {
		return history.Reading{}, false // outside what the correlation is for: no evidence
	}
	stress := e.Value
	if c.Quantity == correlate.OverconsolidationRatio {
		stress *= d.Effective.Value
	}
	d.Correlations = append(d.Correlations, Correlated{
		ID: c.ID, Quantity: string(correlate.PreconsolidationStress), Family: c.Family, Value: stress, Unit: "kPa",
		Verified: c.Verified.String(), Warnings: e.Warnings, Counts: true,
	})
	return history.Reading{
		Source: s.name, Depth: d.Depth, EffectiveStress: d.Effective.Value, Preconsolidation: stress,
		BetweenSD: c.Scatter.Between, WithinSD: c.Scatter.Within,
	}, true
}

// known turns the history table into facts for the layers they concern.
func (g *ground) known(site *Site) []history.Known {
	var out []history.Known
	for i := range site.Past {
		e := &site.Past[i]
		if e.Borehole != "" && e.Borehole != g.borehole.Name || !e.Size.Known {
			continue
		}
		k := history.Known{Kind: history.RemovedGround, Size: e.Size.Value, Layer: -1}
		switch e.Kind {
		case "removed ground":
			gamma := g.borehole.Strata[0].UnitWeight.Or(g.borehole.Strata[0].SaturatedUnitWeight.Or(removedUnitWeight))
			k.Size *= gamma
			g.assume(g.borehole.Strata, fmt.Sprintf("Removed ground of %.1f m (%s) is taken to have weighed %.1f kN/m³, above water: %.0f kPa.", e.Size.Value, e.Reported, gamma, k.Size))
		case "former water level":
			k.Kind = history.FormerWaterLevel
		}
		for j := range g.borehole.Strata {
			if e.Stratum != "" && g.borehole.Strata[j].Name == e.Stratum {
				k.Layer = j
			}
		}
		if e.Stratum != "" && k.Layer < 0 {
			continue // about a stratum that this borehole did not meet
		}
		out = append(out, k)
	}
	return out
}

// removedUnitWeight stands in for the unit weight of ground that is gone, in
// kN/m³ (common practice for fill and dried clay); listed where it is used.
const removedUnitWeight = 18.0
