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

// implausible marks the effective stresses that cannot stand beside the others
// because the ground between would have to weigh more than ground can, or less
// than nothing. The value that clashes with most others is taken out first,
// until none clash; so one wrong value does not condemn its neighbours. Where
// two clash with each other alone nothing tells which is wrong, and both stay.
func implausible(depth, effective []float64) []bool {
	n := len(depth)
	bad := make([]bool, n)
	clash := func(i, j int) bool {
		return math.Abs(effective[i]-effective[j]) > steepestStress*math.Abs(depth[i]-depth[j])+looseStress
	}
	for range n {
		worst, most := -1, 1
		for i := range n {
			if bad[i] {
				continue
			}
			count := 0
			for j := range n {
				if j != i && !bad[j] && clash(i, j) {
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
