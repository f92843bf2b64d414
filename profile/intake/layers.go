package intake

import (
	"fmt"
	"strings"

	"pastload/profile"
)

// layers gives every borehole without a strata table its layers: from the
// strata that its results name, else one without a name.
func (s *site) layers() {
	for i := range s.out.Boreholes {
		b := &s.out.Boreholes[i]
		if s.layered[i] {
			s.place(b, s.torn[i])
			continue
		}
		deepest := s.deepest(b)
		if deepest <= 0 {
			continue
		}
		if s.strataTable != "" {
			s.rd.note(s.strataTable, b.Name+" has no layer in the strata table")
		}
		b.Strata = named(b.Results, deepest)
		if len(b.Strata) == 0 {
			b.Strata = []profile.Stratum{{Base: deepest}}
			continue
		}
		if len(b.Strata) > 1 {
			s.rd.note(b.Name, "layers are taken from the strata that the results name, with boundaries half-way between their depths")
		} else {
			s.rd.note(b.Name, "the one stratum that the results name is taken from ground level to the deepest observation")
		}
	}
}

// named returns the layers that the results name: a boundary lies half-way
// between the last depth of one stratum and the first of the next. A row
// without a name belongs to the stratum above it.
func named(results []profile.Result, deepest float64) []profile.Stratum {
	var out []profile.Stratum
	last := 0.0
	for _, r := range results {
		if r.Stratum != "" && (len(out) == 0 || !strings.EqualFold(out[len(out)-1].Name, r.Stratum)) {
			top := 0.0
			if len(out) > 0 {
				top = (last + r.Depth.Value) / 2
				out[len(out)-1].Base = top
			}
			out = append(out, profile.Stratum{Name: r.Stratum, Top: top, Source: r.Source})
		}
		last = max(r.Depth.Value, r.DepthBase.Or(0))
	}
	if len(out) > 0 {
		out[len(out)-1].Base = deepest
	}
	return out
}

// deepest returns the depth of the deepest thing that is known of a borehole.
func (s *site) deepest(b *profile.Borehole) float64 {
	d := 0.0
	for _, r := range b.Results {
		d = max(d, r.Depth.Value, r.DepthBase.Or(0))
	}
	for _, w := range b.Water {
		d = max(d, w.Depth.Value)
	}
	for _, c := range s.out.Curves {
		if c.Borehole == b.Name {
			d = max(d, c.Depth.Or(0))
		}
	}
	for _, c := range s.out.Soundings {
		if c.Borehole == b.Name {
			for _, r := range c.Readings {
				d = max(d, r.Depth)
			}
		}
	}
	return d
}

// place checks that the results of a borehole lie in its strata and notes where
// they name another one. Where the strata table itself is broken there is
// nothing to compare with.
func (s *site) place(b *profile.Borehole, torn bool) {
	if torn || len(b.Strata) == 0 {
		return
	}
	s.placeOthers(b)
	for _, r := range b.Results {
		if s.tooDeep(b, r.Depth) {
			continue
		}
		if r.Stratum == "" {
			continue
		}
		var here []string
		agrees := false
		for _, st := range b.Strata {
			if r.Depth.Value >= st.Top-touching && r.Depth.Value <= st.Base+touching {
				here = append(here, st.Name)
				agrees = agrees || strings.EqualFold(st.Name, r.Stratum)
			}
		}
		if !agrees {
			s.rd.note(r.Source.String(), fmt.Sprintf("the results place %s m of %s in %q, the strata table in %s", metres(r.Depth), b.Name, r.Stratum, quoted(here)))
		}
	}
}

// tooDeep reports a depth below the last layer.
func (s *site) tooDeep(b *profile.Borehole, depth profile.Number) bool {
	floor := b.Strata[len(b.Strata)-1].Base
	if depth.Value <= floor+touching {
		return false
	}
	at := depth.Source
	s.rd.add(Problem{File: at.File, Line: at.Line, Column: at.Column, Name: "depth",
		Message: fmt.Sprintf("%s m lies below the last layer of %s, which ends at %s m", metres(depth), b.Name, number(floor)),
		Wanted:  "a depth inside the strata, or a layer that reaches it"})
	return true
}

// placeOthers does the same for oedometer specimens. A sounding or an instrument
// may well reach deeper than the borehole: that is noted.
func (s *site) placeOthers(b *profile.Borehole) {
	floor := b.Strata[len(b.Strata)-1].Base
	for _, c := range s.out.Curves {
		if c.Borehole == b.Name && c.Depth.Known {
			s.tooDeep(b, c.Depth)
		}
	}
	for _, w := range b.Water {
		if w.Depth.Value > floor+touching {
			s.rd.note(w.Depth.Source.String(), fmt.Sprintf("the observation at %s m lies below the last layer of %s, which ends at %s m", metres(w.Depth), b.Name, number(floor)))
		}
	}
	for _, snd := range s.out.Soundings {
		if n := len(snd.Readings); snd.Borehole == b.Name && n > 0 && snd.Readings[n-1].Depth > floor+touching {
			s.rd.note(b.Name, fmt.Sprintf("the sounding reaches %s m, the last layer ends at %s m", number(snd.Readings[n-1].Depth), number(floor)))
		}
	}
}
