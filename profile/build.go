package profile

import (
	"fmt"
	"slices"
	"strings"

	"pastload/correlate"
)

// Options change what Build gives.
type Options struct {
	At []float64 // further output depths, m

	// CurvesOnly leaves boreholes out whose vertical stress cannot be computed, in
	// place of reporting them: reading a curve does not need it.
	CurvesOnly bool
}

// Build computes the profile of every borehole of a site. The error is
// Problems: every place where the tables do not say enough to compute the
// vertical stress. Doubts about results are no errors and are not judged here.
func Build(site *Site, opt Options) (*Profile, error) {
	grounds, err := newGrounds(site, opt)
	if err != nil {
		return nil, err
	}
	p := &Profile{Site: site, Boreholes: []BoreholeProfile{}}
	var problems Problems
	if p.Specimens, problems = specimens(site, grounds); len(problems) > 0 {
		return nil, problems.asError()
	}
	for _, g := range grounds {
		b := g.profile(site, p.Specimens)
		var found Problems
		b.Cone, found = g.cone(site, b.Tests)
		problems = append(problems, found...)
		p.Boreholes = append(p.Boreholes, b)
	}
	if len(problems) > 0 {
		return nil, problems.asError()
	}
	for i, g := range grounds {
		b := &p.Boreholes[i]
		stations := g.stations(b.Tests, opt.At)
		b.Points = g.points(stations)
		g.tellHistory(site, p, b, stations)
		compressionIndex(g.borehole, b.Points, b.Results)
		byHistory(g.borehole, b.Points, b.Results)
		g.remark(b)
		b.Assumptions = append(b.Assumptions, g.assumptions...)
	}
	return p, nil
}

// newGrounds settles the unit weights of all boreholes and reports every
// problem of all of them.
func newGrounds(site *Site, opt Options) ([]*ground, error) {
	problems := checkCorrelations(site)
	var grounds []*ground
	for i := range site.Boreholes {
		b := &site.Boreholes[i]
		if len(b.Strata) == 0 {
			continue // a borehole that is only listed: nothing was found in it
		}
		g, p := newGround(site, b)
		if len(p) > 0 && opt.CurvesOnly {
			continue
		}
		problems = append(problems, p...)
		grounds = append(grounds, g)
	}
	return grounds, problems.asError()
}

// checkCorrelations reports identifiers in the settings that the catalogue
// does not have.
func checkCorrelations(site *Site) Problems {
	var problems Problems
	for _, id := range site.Settings.Correlations {
		if _, ok := correlate.ByID(id); ok {
			continue
		}
		p := Problem{Place: "settings", Quantity: "correlations", Found: fmt.Sprintf("%q is not in the catalogue", id), Wanted: "identifiers that 'pastload correlate' lists"}
		for j := range site.Settings.Given {
			if strings.EqualFold(site.Settings.Given[j].Name, "correlations") {
				p.Source = site.Settings.Given[j].Source
			}
		}
		problems = append(problems, p)
	}
	return problems
}

// correlationsFor returns the identifiers in use for a quantity; none means the
// default choice.
func (s *Settings) correlationsFor(q correlate.Quantity) []string {
	var ids []string
	for _, id := range s.Correlations {
		if c, ok := correlate.ByID(id); ok && c.Quantity == q {
			ids = append(ids, id)
		}
	}
	return ids
}

// profile starts a borehole's profile with what needs no other borehole.
func (g *ground) profile(site *Site, specimens []Specimen) BoreholeProfile {
	b := g.borehole
	p := BoreholeProfile{
		Borehole: b.Name, GroundLevel: b.GroundLevel, WaterTable: b.WaterTableDepth,
		Points: []Point{}, Zones: []ZoneInterval{}, Strata: []StratumProfile{}, Assumptions: []Assumption{}, Notes: []string{},
		Tests: g.tests(site, specimens), Results: g.derive(site),
	}
	for i := range b.Strata {
		s := &b.Strata[i]
		p.Strata = append(p.Strata, StratumProfile{Stratum: s.Name, Top: s.Top, Base: s.Base, Mechanisms: []Mechanism{}})
	}
	return p
}

// remark notes where the ground carries no effective stress.
func (g *ground) remark(b *BoreholeProfile) {
	var depths []float64
	for i := range b.Points {
		p := &b.Points[i]
		// At ground level the stress is zero by itself and means nothing.
		if p.Effective.Known && p.Effective.Value <= 0 && p.Depth > 0 {
			depths = append(depths, p.Depth)
		}
	}
	if len(depths) > 0 {
		b.Notes = append(b.Notes, fmt.Sprintf("The effective stress is zero or less between %.2f and %.2f m: the pore pressure carries the whole weight (heave, or a wrong level, gauge or unit weight). No overconsolidation ratio is given there.", slices.Min(depths), slices.Max(depths)))
	}
}
