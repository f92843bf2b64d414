package intake

import (
	"fmt"
	"math"
	"slices"

	"pastload/profile"
)

// A waterRow is a row of the water table.
type waterRow struct {
	Borehole string
	profile.PorePressure
}

var waterColumns = []column[waterRow]{
	must(textOf("borehole", boreholeNames, "", func(r *waterRow) *string { return &r.Borehole })),
	must(numberOf("depth", length, "m", depthLimit, depthNames+"; tip depth; instrument depth", "of the instrument's tip", func(r *waterRow) *profile.Number { return &r.Depth })),
	numberOf("pore pressure", stress, "kPa", within(-2000, 20_000), "u; u0; porewater pressure; pore water pressure; water pressure", "this or a head level", func(r *waterRow) *profile.Number { return &r.Pressure }),
	numberOf("head level", level, "m", within(-2000, 9000), "head; piezometric level; piezometric head; water level; piezometric elevation", "level to which water rises, above the site's datum; this or a pore pressure", func(r *waterRow) *profile.Number { return &r.Head }),
	dated(textOf("date", "date read; reading date", "kept as typed", func(r *waterRow) *string { return &r.Date })),
	textOf("kind", "type; instrument; instrument type", "e.g. standpipe, vibrating wire", func(r *waterRow) *string { return &r.Kind }),
	textOf("remark", remarkNames, "", func(r *waterRow) *string { return &r.Remark }),
}

// samePressure is how far, in kPa, a pressure and a head that state the same
// observation may differ: a head is read to a decimetre.
const samePressure = 1.0

// water reads the water table into the boreholes.
func (s *site) water(g *grid) {
	t := load(s.rd, g, waterColumns)
	if t == nil {
		return
	}
	if !t.has("pore pressure") && !t.has("head level") {
		s.rd.add(Problem{File: g.file, Line: g.header.line, Name: "pore pressure", Message: "no such column, and no head level", Wanted: `a column "pore pressure (kPa)" or "head level (m)"`})
		return
	}
	type spot struct {
		borehole   int
		depth      float64
		date, kind string
	}
	seen := map[spot]row[waterRow]{}
	for _, r := range t.rows {
		i, ok := borehole(s, t, r, r.Value.Borehole)
		if !ok || !r.Value.Depth.Known {
			continue
		}
		w := r.Value.PorePressure
		if !s.pressure(t, r, &w, s.out.Boreholes[i]) {
			continue
		}
		at := spot{i, w.Depth.Value, w.Date, w.Kind}
		if earlier, ok := seen[at]; ok {
			t.problem(r, "depth", fmt.Sprintf("%s m of %s is observed already in line %d", metres(w.Depth), r.Value.Borehole, earlier.at.line), "one observation at a depth, or dates that tell them apart")
			continue
		}
		seen[at] = r
		s.out.Boreholes[i].Water = append(s.out.Boreholes[i].Water, w)
	}
	for i := range s.out.Boreholes {
		slices.SortStableFunc(s.out.Boreholes[i].Water, func(a, b profile.PorePressure) int { return compare(a.Depth.Value, b.Depth.Value) })
	}
}

// pressure sees to it that an observation has a pressure, from its head where
// that was given:
//
//	u = γw·(head − (ground level − depth))
func (s *site) pressure(t *table[waterRow], r row[waterRow], w *profile.PorePressure, b profile.Borehole) bool {
	if !w.Head.Known {
		if !w.Pressure.Known && t.sound {
			// A cell that could not be read has been reported in its own right.
			if !missing(clean(r.at.field(t.indexOf("pore pressure")))) || !missing(clean(r.at.field(t.indexOf("head level")))) {
				return false
			}
			t.problem(r, "pore pressure", "neither a pore pressure nor a head level", "one of them in every row")
		}
		return w.Pressure.Known
	}
	if !b.GroundLevel.Known {
		if w.Pressure.Known {
			return true
		}
		t.problem(r, "head level", "a level, but the ground level of "+b.Name+" is not known", "its ground level in the boreholes table, or the pore pressure")
		return false
	}
	tip := b.GroundLevel.Value - w.Depth.Value
	u := s.out.Settings.WaterUnitWeight * (w.Head.Value - tip)
	if w.Pressure.Known {
		if math.Abs(u-w.Pressure.Value) > samePressure {
			t.note(r, "pore pressure", fmt.Sprintf("%s kPa is used; the head level gives %.1f kPa", number(w.Pressure.Value), u))
		}
		return true
	}
	if u < 0 {
		t.problem(r, "head level", fmt.Sprintf("%s m lies below the instrument itself, at %s m", number(w.Head.Value), number(tip)), "a head at or above the tip, or the pore pressure")
		return false
	}
	w.Pressure = profile.Number{Value: u, Known: true, Assumed: w.Head.Assumed, Source: w.Head.Source}
	return true
}
