package sheet

import (
	"math"

	"pastload/profile"
)

// deepest is the greatest depth in m that a sheet shows. What lies deeper, or is
// not a number, cannot come from a borehole.
const deepest = 10000.0

func shown(depth float64) bool { return finite(depth) && math.Abs(depth) <= deepest }

// cleaned returns the input without what has no place on a sheet: things at
// depths that are none. The drawing code needs no checks of depths after this.
func (in DepthInput) cleaned() DepthInput {
	b, p := &in.Borehole, &in.Profile
	b.Strata = kept(b.Strata, func(s *profile.Stratum) bool { return shown(s.Top) && shown(s.Base) && s.Base > s.Top })
	b.Water = kept(b.Water, func(w *profile.PorePressure) bool { return w.Depth.Known && shown(w.Depth.Value) })
	b.Results = kept(b.Results, func(r *profile.Result) bool { return r.Depth.Known && shown(r.Depth.Value) })
	p.Points = kept(p.Points, func(q *profile.Point) bool { return shown(q.Depth) })
	p.Tests = kept(p.Tests, func(t *profile.Test) bool { return shown(t.Depth) })
	p.Zones = kept(p.Zones, func(z *profile.ZoneInterval) bool { return shown(z.Top) && shown(z.Base) && z.Base > z.Top })
	p.Results = kept(p.Results, func(r *profile.DerivedResult) bool { return shown(r.Depth) })
	in.Flags = kept(in.Flags, func(f *Flag) bool { return shown(f.Depth) })
	for _, n := range []*profile.Number{&p.WaterTable, &b.WaterTableDepth, &p.GroundLevel, &b.GroundLevel} {
		n.Known = n.Known && shown(n.Value)
	}
	return in
}

// kept returns the elements that pass, in a new slice.
func kept[T any](all []T, pass func(*T) bool) []T {
	out := make([]T, 0, len(all))
	for i := range all {
		if pass(&all[i]) {
			out = append(out, all[i])
		}
	}
	return out
}
