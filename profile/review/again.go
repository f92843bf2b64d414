package review

import (
	"cmp"
	"slices"

	"pastload/profile"
)

// Findings that rest on the stress history or the stresses of today may only
// echo a wrong number elsewhere: a unit slip in one σ′p bends the line for its
// neighbours. So where such a cause has a name the profile is built once more
// with the causes corrected, and what no longer disagrees is left out.

// A correction changes a copy of the site as a finding suggests.
type correction func(*profile.Site)

// echoes tells whether a finding may be an echo of a wrong number elsewhere.
func (f *Finding) echoes() bool {
	if f.Severity == Note {
		return false
	}
	switch f.Quantity {
	case traits[preconsolidation].quantity, traits[undrainedStrength].quantity, traits[givenStress].quantity, "pore pressure", "water table depth":
		return true
	}
	return false
}

// looks is how often the profile may be built again.
const looks = 4

// reviewed returns the findings of a profile, those of further looks included.
// Causes are corrected one after the other, the surest first, so that an echo is
// never corrected in place of its cause.
func (c *context) reviewed() Findings {
	found := c.findings()
	var causes Findings
	site := c.site
	for range looks {
		i := surest(found)
		if i < 0 || !echoing(found, i) {
			break
		}
		site = copySite(site)
		found[i].fix(site)
		p, err := profile.Build(c.around(site, found), profile.Options{})
		if err != nil {
			break // what was seen so far stands
		}
		causes = append(causes, found[i])
		found = stillFound(found, i, newContext(p).findings())
	}
	return append(causes, found...)
}

// neighbours is how many boreholes besides those in question are built again, so
// that a look at a large site costs what one at a small site does.
const neighbours = 6

// around returns the part of a site that the findings in question hang on, with
// its results by depth; the site itself keeps their order, by which corrections
// find them.
func (c *context) around(s *profile.Site, found Findings) *profile.Site {
	asked, strata := map[string]bool{}, map[string]bool{}
	for i := range found {
		f := &found[i]
		if f.echoes() || f.fix != nil {
			for _, p := range f.places() {
				asked[p.Borehole] = true
			}
		}
	}
	for i := range s.Boreholes {
		if b := &s.Boreholes[i]; asked[b.Name] {
			for j := range b.Strata {
				strata[b.Strata[j].Name] = true
			}
		}
	}
	out := copySite(s)
	out.Boreholes, out.Curves = nil, nil
	more := neighbours
	for _, b := range copySite(s).Boreholes {
		shares := slices.ContainsFunc(b.Strata, func(x profile.Stratum) bool { return x.Name != "" && strata[x.Name] })
		if !asked[b.Name] {
			if !shares || more == 0 {
				continue
			}
			more--
		}
		slices.SortStableFunc(b.Results, func(a, b profile.Result) int { return cmp.Compare(a.Depth.Value, b.Depth.Value) })
		out.Boreholes = append(out.Boreholes, b)
		asked[b.Name] = true
	}
	for _, k := range s.Curves {
		if asked[k.Borehole] {
			out.Curves = append(out.Curves, k)
		}
	}
	return out
}

// surest returns the index of the cause to correct first, -1 for none: the one
// that most checks speak for, then the one with the largest gain.
func surest(found Findings) int {
	best := -1
	for i := range found {
		f := &found[i]
		if f.fix == nil || f.Severity.Rank() < Conflict.Rank() {
			continue
		}
		if best < 0 || f.gain > found[best].gain {
			best = i
		}
	}
	return best
}

// echoing tells whether any finding but one may be an echo.
func echoing(found Findings, but int) bool {
	for i := range found {
		if i != but && found[i].echoes() {
			return true
		}
	}
	return false
}

// stillFound returns the findings without the one corrected, those that may echo
// it as the next look sees them.
func stillFound(found Findings, corrected int, again Findings) Findings {
	now := map[string]*Finding{}
	for i := range again {
		now[again[i].about()] = &again[i]
	}
	var out Findings
	for i := range found {
		f := &found[i]
		switch {
		case i == corrected:
		case !f.echoes():
			out = append(out, *f)
		case now[f.about()] != nil:
			g := *now[f.about()]
			g.fix = f.fix // by its place in this site
			out = append(out, g)
		}
	}
	return out
}

// about names the place and quantity of a finding.
func (f *Finding) about() string {
	return placeName(Place{f.Borehole, f.Depth, f.Specimen}) + "; " + f.Quantity
}

// copySite copies what corrections may change.
func copySite(s *profile.Site) *profile.Site {
	out := *s
	out.Boreholes = slices.Clone(s.Boreholes)
	for i := range out.Boreholes {
		b := &out.Boreholes[i]
		b.Results, b.Strata = slices.Clone(b.Results), slices.Clone(b.Strata)
	}
	out.Curves = slices.Clone(s.Curves)
	return &out
}

// An address finds the copy of a row's result.
type address struct {
	borehole string
	index    int // in Borehole.Results, -1 where there is none
	curve    int // in Site.Curves, -1 where there is none
}

func (c *context) address(r *row) address {
	a := address{r.borehole.Name, -1, -1}
	for i := range r.borehole.Results {
		if &r.borehole.Results[i] == r.result {
			a.index = i
		}
	}
	for i := range c.site.Curves {
		if &c.site.Curves[i] == r.curve {
			a.curve = i
		}
	}
	return a
}

func (a address) result(s *profile.Site) *profile.Result {
	b := s.Borehole(a.borehole)
	if b == nil || a.index < 0 {
		return &profile.Result{} // nothing to correct
	}
	return &b.Results[a.index]
}

// correctValues returns the correction of a change of single values, where it
// bears on the stress history.
func (c *context) correctValues(r *row, h *change) correction {
	if h.mask()&(1<<preconsolidation) == 0 || r.result == nil {
		return nil
	}
	at := c.address(r)
	vars, to := slices.Clone(h.vars), slices.Clone(h.to)
	return func(s *profile.Site) {
		result := at.result(s)
		for i, v := range vars {
			if v <= sensitivity {
				*traits[v].of(result) = profile.Known(to[i])
			}
		}
	}
}

// correctPlace returns the correction of a move.
func (c *context) correctPlace(m *move) correction {
	from := c.address(m.r)
	depth := profile.Known(m.depth)
	if m.q == nil {
		if m.how == "" {
			depth = profile.Known((m.to.Top + m.to.Base) / 2)
		}
		return func(s *profile.Site) {
			from.result(s).Depth = depth
			from.result(s).Stratum = ""
			if from.curve >= 0 {
				s.Curves[from.curve].Depth = depth
			}
		}
	}
	to := c.address(m.q)
	return func(s *profile.Site) {
		a, b := from.result(s), to.result(s)
		x, y := *a, *b
		*a, *b = y, x
		a.Depth, a.Specimen, a.Stratum, b.Depth, b.Specimen, b.Stratum = x.Depth, x.Specimen, x.Stratum, y.Depth, y.Specimen, y.Stratum
		if from.curve >= 0 {
			k := &s.Curves[from.curve]
			k.Borehole, k.Depth, k.Specimen = to.borehole, y.Depth, y.Specimen
		}
		if to.curve >= 0 {
			k := &s.Curves[to.curve]
			k.Borehole, k.Depth, k.Specimen = from.borehole, x.Depth, x.Specimen
		}
	}
}
