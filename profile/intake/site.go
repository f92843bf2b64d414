package intake

import (
	"fmt"
	"slices"
	"strings"

	"pastload/profile"
)

// A site is a profile.Site in the making.
type site struct {
	rd          *reader
	out         profile.Site
	single      bool           // one results file is all there is
	declared    bool           // a boreholes table says which boreholes exist
	index       map[string]int // folded name → place in out.Boreholes
	strataTable string         // its file, "" where there is none
	layered     map[int]bool   // the strata table has rows for the borehole
	torn        map[int]bool   // some of those rows could not be used
}

// build turns grids into the site, table by table: what others refer to comes
// first.
func (s *site) build(grids map[Table]*grid) {
	s.settings(grids[Settings])
	s.boreholes(grids[Boreholes])
	s.strata(grids[Strata])
	s.water(grids[Water])
	s.results(grids[Results])
	s.curves(grids[Oedometer])
	s.soundings(grids[Cone])
	s.layers()
	s.matchSpecimens()
	// These may name strata, which are known only now.
	s.past(grids[History])
	s.decisions(grids[Decisions])
}

// sameDepth is how far, in m, a specimen may lie outside the sample that it was
// cut from and still be taken for it: half of a usual tube.
const sameDepth = 0.3

// matchSpecimens notes oedometer specimens that the results place elsewhere: one
// of the two tables has a wrong name, or a wrong depth.
func (s *site) matchSpecimens() {
	type home struct {
		borehole string
		result   *profile.Result
	}
	homes := map[string][]home{}
	for i := range s.out.Boreholes {
		b := &s.out.Boreholes[i]
		for j := range b.Results {
			if name := strings.ToLower(b.Results[j].Specimen); name != "" {
				homes[name] = append(homes[name], home{b.Name, &b.Results[j]})
			}
		}
	}
	for _, c := range s.out.Curves {
		found := homes[strings.ToLower(c.Specimen)]
		agrees := func(h home) bool {
			r := h.result
			return (c.Borehole == "" || h.borehole == c.Borehole) &&
				(!c.Depth.Known || c.Depth.Value >= r.Depth.Value-sameDepth && c.Depth.Value <= r.DepthBase.Or(r.Depth.Value)+sameDepth)
		}
		if len(found) == 0 || slices.ContainsFunc(found, agrees) {
			continue
		}
		r := found[0].result
		var here []string
		if c.Depth.Known {
			here = append(here, "at "+metres(c.Depth)+" m")
		}
		if c.Borehole != "" {
			here = append(here, "in "+c.Borehole)
		}
		s.rd.note(c.Source.String(), fmt.Sprintf("specimen %s is placed %s, the results (%s) place it at %s m in %s", c.Specimen, strings.Join(here, " "), r.Source, metres(r.Depth), found[0].borehole))
	}
}

// indexOf returns the field of a column, or one beyond every row.
func (t *table[T]) indexOf(name string) int {
	if i, ok := t.index[name]; ok {
		return i
	}
	return maxFields
}

// openNumber reads a number whose dimension the row decides: s says what it
// must be, unitText is what the row's own unit cell says, and bare allows no
// unit at all, which then means the unit inside.
func openNumber[T any](t *table[T], r row[T], name string, s spec, unitText string, bare bool) (profile.Number, bool) {
	cell := t.cell(r, name)
	f := t.fields[t.index[name]]
	report := func(message, wanted string) {
		t.rd.add(Problem{File: cell.File, Line: cell.Line, Column: cell.Column, Name: s.name, Message: message, Wanted: wanted})
	}
	if unitText == "" {
		unitText = f.unitText
	} else if f.unitText != "" && unitKey(f.unitText) != unitKey(unitText) {
		report(fmt.Sprintf("unit %q in the row and %q in the header", unitText, f.unitText), "one unit")
		return profile.Number{}, false
	}
	cell.Unit = unitText
	switch u, ok := s.dim.find(unitText); {
	case ok:
		f.unit = u
	case unitText == "" && (bare || !s.dim.needsUnit()):
		f.unit = s.unit
	case unitText == "":
		report("no unit", fmt.Sprintf("a unit of %s in the header or in a unit column: %s", s.dim.name, s.dim.list()))
		return profile.Number{}, false
	default:
		report(fmt.Sprintf("%q is not a unit of %s", unitText, s.dim.name), "one of "+s.dim.list())
		return profile.Number{}, false
	}
	n, _, _, message := readNumber(s, f, t.mark, cell)
	wanted := s.wanted(f)
	if message == "" && !n.Known {
		message = "blank"
	}
	if message == "" {
		if m, w := s.outside(n, f); m != "" {
			message, wanted = m, w
		}
	}
	if message != "" {
		report(strings.TrimSpace(message), wanted)
		return profile.Number{}, false
	}
	return n, true
}
