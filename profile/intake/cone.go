package intake

import (
	"fmt"

	"pastload/profile"
)

// A coneRow is a row of the cone table.
type coneRow struct {
	Borehole                string
	Depth, AreaRatio        profile.Number
	Resistance, Corrected   profile.Number
	Friction, PorePressure2 profile.Number
}

// A cone can read slightly less than nothing: its zero drifts.
var (
	coneLimit     = within(-5, 200)       // MPa
	frictionLimit = within(-1000, 10_000) // kPa
	poreLimit     = within(-1000, 20_000) // kPa
)

var coneColumns = []column[coneRow]{
	must(textOf("borehole", boreholeNames+"; sounding; cpt; cpt id; cone", "the borehole beside which the sounding stands", func(r *coneRow) *string { return &r.Borehole })),
	must(numberOf("depth", length, "m", depthLimit, depthNames+"; penetration; penetration depth", "of the cone's tip", func(r *coneRow) *profile.Number { return &r.Depth })),
	numberOf("qc", stress, "MPa", coneLimit, "cone resistance; tip resistance; measured cone resistance", "not corrected for pore pressure; this or qt", func(r *coneRow) *profile.Number { return &r.Resistance }),
	numberOf("qt", stress, "MPa", coneLimit, "corrected cone resistance; total cone resistance; corrected tip resistance", "corrected for pore pressure", func(r *coneRow) *profile.Number { return &r.Corrected }),
	numberOf("fs", stress, "kPa", frictionLimit, "sleeve friction; friction; ft", "", func(r *coneRow) *profile.Number { return &r.Friction }),
	numberOf("u2", stress, "kPa", poreLimit, "pore pressure; pore pressure u2; penetration pore pressure", "behind the tip", func(r *coneRow) *profile.Number { return &r.PorePressure2 }),
	numberOf("area ratio", ratio, "-", above(0, 1), "net area ratio; a; alpha; cone area ratio", "net over gross area of the cone, once per sounding", func(r *coneRow) *profile.Number { return &r.AreaRatio }),
}

// soundings reads the cone table: one sounding for each borehole, its readings
// in the order of the table.
func (s *site) soundings(g *grid) {
	t := load(s.rd, g, coneColumns)
	if t == nil {
		return
	}
	if !t.has("qc") && !t.has("qt") {
		s.rd.add(Problem{File: g.file, Line: g.header.line, Name: "qc", Message: "no such column, and no qt", Wanted: `a column "qc (MPa)" or "qt (MPa)"`})
		return
	}
	of := map[string]int{}
	unknown := map[string]bool{}
	for _, r := range t.rows {
		v := r.Value
		if v.Borehole == "" || unknown[v.Borehole] {
			continue // a sounding has thousands of rows: its name is reported once
		}
		k, ok := of[v.Borehole]
		if !ok {
			if _, ok := borehole(s, t, r, v.Borehole); !ok {
				unknown[v.Borehole] = true
				continue
			}
			k = len(s.out.Soundings)
			of[v.Borehole] = k
			s.out.Soundings = append(s.out.Soundings, profile.Sounding{Borehole: v.Borehole})
		}
		snd := &s.out.Soundings[k]
		if v.AreaRatio.Known {
			if snd.AreaRatio.Known && snd.AreaRatio.Value != v.AreaRatio.Value {
				t.problem(r, "area ratio", fmt.Sprintf("%q, but line %d of the same sounding says %q", clean(v.AreaRatio.Source.Text), snd.AreaRatio.Source.Line, clean(snd.AreaRatio.Source.Text)), "one area ratio for each sounding")
				continue
			}
			if !snd.AreaRatio.Known {
				snd.AreaRatio = v.AreaRatio
			}
		}
		if !v.Depth.Known {
			continue
		}
		snd.Readings = append(snd.Readings, profile.ConeReading{
			Depth: v.Depth.Value, ConeResistance: v.Resistance, CorrectedResistance: v.Corrected,
			SleeveFriction: v.Friction, PorePressure: v.PorePressure2, Line: r.at.line,
		})
	}
}
