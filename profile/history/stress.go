package history

import (
	"math"
	"sort"
)

// No ground adds more than this to the effective stress in a metre, kPa/m: its
// whole unit weight, with downward seepage taking the water's share.
const steepestStress = 25.0

// looseStress is the difference of effective stress that rounding and the
// correction of depths may leave between neighbours, kPa.
const looseStress = 10.0

// clash tells whether two effective stresses are further apart than ground can
// make them.
func clash(z1, s1, z2, s2 float64) bool {
	return math.Abs(s1-s2) > steepestStress*math.Abs(z1-z2)+looseStress
}

// implausible marks the effective stresses that cannot stand beside the others
// because the ground between would have to weigh more than ground can, or less
// than nothing. The value that clashes with most others is taken out first,
// until none clash; so one wrong value does not condemn its neighbours. Where
// two clash with each other alone nothing tells which is wrong, and both stay.
func implausible(depth, effective []float64) []bool {
	n := len(depth)
	bad := make([]bool, n)
	for range n {
		worst, most := -1, 1
		for i := range n {
			if bad[i] {
				continue
			}
			count := 0
			for j := range n {
				if j != i && !bad[j] && clash(depth[i], effective[i], depth[j], effective[j]) {
					count++
				}
			}
			if count > most {
				worst, most = i, count
			}
		}
		if worst < 0 {
			break
		}
		bad[worst] = true
	}
	return bad
}

// continued returns the effective stress that the good values give at a depth:
// on the line between neighbours, and beyond the ends at the median slope.
func continued(depth, effective []float64, z float64) float64 {
	order := make([]int, len(depth))
	for i := range order {
		order[i] = i
	}
	sort.SliceStable(order, func(a, b int) bool { return depth[order[a]] < depth[order[b]] })
	first, last := order[0], order[len(order)-1]
	switch {
	case z <= depth[first]:
		return effective[first] - medianSlope(depth, effective)*(depth[first]-z)
	case z >= depth[last]:
		return effective[last] + medianSlope(depth, effective)*(z-depth[last])
	}
	k := sort.Search(len(order), func(k int) bool { return depth[order[k]] >= z })
	a, b := order[k-1], order[k]
	return effective[a] + (effective[b]-effective[a])*(z-depth[a])/(depth[b]-depth[a])
}

// medianSlope returns the median slope of all pairs at different depths, kPa/m.
func medianSlope(depth, effective []float64) float64 {
	var slopes []float64
	for i := range depth {
		for j := range i {
			if d := depth[i] - depth[j]; d != 0 {
				slopes = append(slopes, (effective[i]-effective[j])/d)
			}
		}
	}
	if len(slopes) == 0 {
		return 0
	}
	sort.Float64s(slopes)
	n := len(slopes)
	return 0.5 * (slopes[(n-1)/2] + slopes[n/2])
}

// mendedStress is an effective stress that was replaced.
type mendedStress struct{ depth, given, used float64 }

// mend finds the effective stress that the history is inferred with at every
// depth of a test or reading: as given, unless it cannot stand beside the
// others.
func (l *layer) mend() {
	l.stress = map[float64]float64{}
	var depth []float64
	keep := func(z, s float64) {
		if _, ok := l.stress[z]; !ok {
			l.stress[z] = s
			depth = append(depth, z)
		}
	}
	for _, t := range l.in.Tests {
		if t.Layer == l.index {
			keep(t.Depth, t.EffectiveStress)
		}
	}
	for _, r := range l.in.Readings {
		if r.Layer == l.index {
			keep(r.Depth, r.EffectiveStress)
		}
	}
	sort.Float64s(depth)
	given := make([]float64, len(depth))
	for i, z := range depth {
		given[i] = l.stress[z]
	}
	bad := implausible(depth, given)
	for i := range depth {
		if !bad[i] {
			l.goodDepth = append(l.goodDepth, depth[i])
			l.goodStress = append(l.goodStress, given[i])
		}
	}
	for i, z := range depth {
		if bad[i] {
			used := math.Max(0, continued(l.goodDepth, l.goodStress, z))
			l.stress[z] = used
			l.mended = append(l.mended, mendedStress{z, given[i], used})
		}
	}
}

// mendedAt returns the effective stress that the line is drawn with at a
// station: as given, unless depths were mended and this one clashes with those
// that were not.
func (l *layer) mendedAt(z, given float64) float64 {
	if len(l.mended) == 0 {
		return given
	}
	for i := range l.goodDepth {
		if clash(z, given, l.goodDepth[i], l.goodStress[i]) {
			return math.Max(0, continued(l.goodDepth, l.goodStress, z))
		}
	}
	return given
}
