package report

import (
	"cmp"
	"fmt"
	"slices"
	"strconv"

	"pastload/profile"
)

// A zoneSpan is a row of the zones table.
type zoneSpan struct {
	borehole, name string
	top, base      float64
}

// sliver is a stretch of depth too thin to be told as a change, in m or ft: the
// limit of a zone moves that much with any digit of a test.
const sliver = 0.1

// zoneChanges tells between which depths a zone has another name now.
func zoneChanges(old, updated Printed, names map[string]string) ([]Change, error) {
	before, err := zoneSpans(old)
	if err != nil {
		return nil, err
	}
	after, err := zoneSpans(updated)
	if err != nil {
		return nil, err
	}
	var boreholes []string
	for _, s := range slices.Concat(before, after) {
		if !slices.Contains(boreholes, s.borehole) {
			boreholes = append(boreholes, s.borehole)
		}
	}
	var out []Change
	for _, b := range boreholes {
		for _, c := range zoneStretches(b, before, after) {
			c.Quantity = "zone"
			c.Item = fmt.Sprintf("%s %s", c.Item, zoneUnit(names))
			out = append(out, c)
		}
	}
	return out, nil
}

// zoneUnit is the unit of the depths.
func zoneUnit(names map[string]string) string {
	if names["top"] == "top_ft" {
		return "ft"
	}
	return "m"
}

// zoneStretches cuts a borehole at every limit of both issues and joins
// neighbouring stretches with the same change.
func zoneStretches(borehole string, before, after []zoneSpan) []Change {
	var cuts []float64
	for _, s := range slices.Concat(before, after) {
		if s.borehole == borehole {
			cuts = append(cuts, s.top, s.base)
		}
	}
	slices.SortFunc(cuts, cmp.Compare)
	cuts = slices.Compact(cuts)
	type stretch struct {
		top, base float64
		old, now  string
	}
	var all []stretch
	for i := 0; i+1 < len(cuts); i++ {
		middle := (cuts[i] + cuts[i+1]) / 2
		s := stretch{cuts[i], cuts[i+1], zoneAt(before, borehole, middle), zoneAt(after, borehole, middle)}
		if n := len(all); n > 0 && all[n-1].old == s.old && all[n-1].now == s.now {
			all[n-1].base = s.base
			continue
		}
		all = append(all, s)
	}
	var out []Change
	for _, s := range all {
		if s.old == s.now || s.base-s.top < sliver {
			continue
		}
		kind := "changed"
		switch {
		case s.old == "":
			kind = "added"
		case s.now == "":
			kind = "removed"
		}
		out = append(out, Change{Table: "zones", Kind: kind, Borehole: borehole, Item: fixed(s.top, 2) + " to " + fixed(s.base, 2), Old: s.old, New: s.now})
	}
	return out
}

func zoneAt(spans []zoneSpan, borehole string, depth float64) string {
	for _, s := range spans {
		if s.borehole == borehole && depth > s.top && depth < s.base {
			return s.name
		}
	}
	return ""
}

func zoneSpans(p Printed) ([]zoneSpan, error) {
	w := watch{table: p.Name, key: []string{"borehole", "top", "base", "zone", "or_zone"}}
	rows, order, err := w.rows(p)
	if err != nil {
		return nil, err
	}
	var out []zoneSpan
	for _, k := range order {
		r := rows[k]
		top, err1 := strconv.ParseFloat(r["top"], 64)
		base, err2 := strconv.ParseFloat(r["base"], 64)
		if err1 != nil || err2 != nil || !(top <= base) {
			return nil, fmt.Errorf("table zones: %q to %q is no stretch of depth", r["top"], r["base"])
		}
		out = append(out, zoneSpan{r["borehole"], join(" or ", r["zone"], r["or_zone"]), top, base})
	}
	return out, nil
}

// SettingsTable returns the settings as given.
func SettingsTable(s *profile.Site) *Table {
	t := &Table{Name: "settings", Title: "Settings as given", Columns: []Column{
		{"setting", "setting", Words, 0}, {"value", "value", Words, 0}, {"unit", "unit", Words, 0}, {"note", "note", Words, 0},
	}}
	for _, g := range s.Settings.Given {
		t.Add(T(g.Name), T(g.Value), T(g.Unit), T(g.Note))
	}
	return t
}
