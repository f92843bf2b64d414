package profile

import (
	"cmp"
	"math"
	"slices"
)

// step is the regular spacing of the output depths in m.
const step = 0.5

// A station is a depth at which the profile is given, with the stratum that it
// belongs to: at a boundary there is one for each side.
type station struct {
	depth   float64
	stratum int // index into the borehole's strata
}

// stations returns the output depths of a borehole: every half metre, at
// boundaries, the water table, the tests, and the depths asked for.
func (g *ground) stations(tests []Test, at []float64) []station {
	b := g.borehole
	if len(b.Strata) == 0 {
		return nil
	}
	top, base := b.Strata[0].Top, b.Strata[len(b.Strata)-1].Base
	if g.stress == nil {
		top, base = g.given[0].depth, g.given[len(g.given)-1].depth
	}
	depths := []float64{top, base}
	for i := math.Ceil(top / step); float64(i)*step < base; i++ {
		depths = append(depths, i*step)
	}
	if g.stress != nil {
		depths = append(depths, g.stress.Breaks()...)
	}
	for _, t := range tests {
		depths = append(depths, t.Depth)
	}
	for i := range b.Results {
		depths = append(depths, b.Results[i].Depth.Value)
	}
	depths = append(depths, at...)
	slices.Sort(depths)
	depths = slices.Compact(depths)
	var out []station
	for _, d := range depths {
		if d < top || d > base {
			continue
		}
		for i := range b.Strata {
			s := &b.Strata[i]
			if d >= s.Top && d <= s.Base {
				out = append(out, station{d, i})
			}
		}
	}
	slices.SortStableFunc(out, func(x, y station) int {
		return cmp.Or(cmp.Compare(x.depth, y.depth), cmp.Compare(x.stratum, y.stratum))
	})
	return out
}

// points computes the vertical stresses at the stations.
func (g *ground) points(stations []station) []Point {
	points := make([]Point, len(stations))
	for i, st := range stations {
		stratum := &g.borehole.Strata[st.stratum]
		s := g.at(st.depth, st.depth == stratum.Base && st.depth > stratum.Top)
		points[i] = Point{
			Depth: st.depth, Stratum: stratum.Name, stratum: st.stratum,
			Total: s.total, Pore: s.pore, Effective: s.effective, EffectiveUncertainty: s.sd, UnitWeight: s.unitWeight,
		}
	}
	return points
}
