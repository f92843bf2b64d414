package intake

import (
	"fmt"
	"strings"

	"pastload/profile"
)

// An eventRow is a row of the history table.
type eventRow struct {
	Borehole, Stratum, Kind, Size, Unit, Reported string
}

var eventColumns = []column[eventRow]{
	textOf("borehole", boreholeNames, "blank where it holds for a stratum or the whole site", func(r *eventRow) *string { return &r.Borehole }),
	textOf("stratum", stratumNames, "blank where it holds for all strata", func(r *eventRow) *string { return &r.Stratum }),
	must(textOf("kind", "type; event; what", "removed ground, former water level, or former load", func(r *eventRow) *string { return &r.Kind })),
	must(open(textOf("size", "amount; value; magnitude", "removed ground in m, former water level as a depth in m, former load in kPa; the unit stands in the header or in the unit column", func(r *eventRow) *string { return &r.Size }))),
	textOf("unit", "units", "of the size, where the header names none", func(r *eventRow) *string { return &r.Unit }),
	textOf("source", "reported by; reported; reference; evidence", "who says so", func(r *eventRow) *string { return &r.Reported }),
}

// eventSizes says what the size of each kind of event is.
var eventSizes = map[string]spec{
	"removed ground":     {name: "size", kind: numberColumn, dim: length, unit: length.named("m"), limit: above(0, 3000)},
	"former water level": {name: "size", kind: numberColumn, dim: length, unit: length.named("m"), limit: within(-100, 1000)},
	"former load":        {name: "size", kind: numberColumn, dim: stress, unit: stress.named("kPa"), limit: above(0, 50_000)},
}

// eventKinds are the kinds in the words of the trade.
var eventKinds = map[string]string{
	"removed ground": "removed ground", "erosion": "removed ground", "excavation": "removed ground",
	"former water level": "former water level", "drawdown": "former water level", "past water level": "former water level",
	"former load": "former load", "past load": "former load", "preload": "former load",
}

// past reads the history table.
func (s *site) past(g *grid) {
	t := load(s.rd, g, eventColumns)
	if t == nil {
		return
	}
	for _, r := range t.rows {
		v := r.Value
		if v.Borehole != "" {
			if _, ok := borehole(s, t, r, v.Borehole); !ok {
				continue
			}
		}
		if v.Stratum != "" && !s.knownStratum(t.rd, r.at, t.cell(r, "stratum"), v.Stratum) {
			continue
		}
		if v.Kind == "" || v.Size == "" {
			continue
		}
		kind, ok := eventKinds[strings.ToLower(v.Kind)]
		if !ok {
			t.problem(r, "kind", fmt.Sprintf("%q is not a kind of event", v.Kind), "removed ground, former water level or former load")
			continue
		}
		size := eventSizes[kind]
		size.name = kind
		n, ok := openNumber(t, r, "size", size, v.Unit, false)
		if !ok {
			continue
		}
		s.out.Past = append(s.out.Past, profile.PastEvent{Borehole: v.Borehole, Stratum: v.Stratum, Kind: kind, Size: n, Reported: v.Reported, Source: t.cell(r, "size")})
	}
}

// knownStratum reports a stratum that no borehole has.
func (s *site) knownStratum(rd *reader, at gridRow, cell *profile.Cell, name string) bool {
	names := s.stratumNames()
	if len(names) == 0 {
		return true // nothing to compare with
	}
	for _, n := range names {
		if strings.EqualFold(n, name) {
			return true
		}
	}
	wanted := "one of " + shorten(names, 12)
	if likely := near(name, names); len(likely) > 0 {
		wanted = quoted(likely)
	}
	rd.add(Problem{File: cell.File, Line: cell.Line, Column: cell.Column, Name: "stratum", Message: fmt.Sprintf("no borehole has a stratum %q", name), Wanted: wanted})
	return false
}

// stratumNames returns the names of all strata in order of appearance.
func (s *site) stratumNames() []string {
	var out []string
	seen := map[string]bool{}
	for _, b := range s.out.Boreholes {
		for _, st := range b.Strata {
			if k := strings.ToLower(st.Name); st.Name != "" && !seen[k] {
				seen[k] = true
				out = append(out, st.Name)
			}
		}
	}
	return out
}
