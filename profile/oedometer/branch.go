package oedometer

import "math"

// reversal is the fall (or rise) of stress, relative to the last extreme, from
// which the load counts as turned round. Load frames and pressure transducers
// wander by less; the smallest unloading anyone plans is a halving.
const reversal = 0.02

// findBranches sets the branch and the seating flag of every point from the
// stresses alone.
func findBranches(points []Point) {
	turns := turningPoints(points)
	highest := 0.0  // largest stress before the present limb
	looped := false // whether the specimen was ever unloaded
	for limb := 0; limb+1 < len(turns); limb++ {
		from, to := turns[limb], turns[limb+1]
		if limb == 0 {
			from-- // the first point belongs to the first limb
		}
		up := points[to].EffectiveStress >= points[turns[limb]].EffectiveStress
		peak := highest
		for i := from + 1; i <= to; i++ {
			s := points[i].EffectiveStress
			switch {
			case !up && i > 0:
				points[i].Branch = Unloading
			case s <= highest*(1+reversal/4):
				// Back at the former maximum is still reloading: the curve
				// joins first loading only beyond it.
				points[i].Branch = Reloading
			case looped:
				points[i].Branch = FurtherLoading
			default:
				points[i].Branch = FirstLoading
			}
			peak = math.Max(peak, s)
		}
		highest = peak
		if !up {
			looped = true
		}
	}
	for i := range points {
		points[i].Seating = points[i].EffectiveStress < SeatingStress
	}
}

// turningPoints returns the indices of the first point, of every point where the
// stress turns round by more than reversal, and of the last point.
func turningPoints(points []Point) []int {
	if len(points) == 0 {
		return nil
	}
	turns := []int{0}
	extreme, rising := 0, true
	for i := 1; i < len(points); i++ {
		s, top := points[i].EffectiveStress, points[extreme].EffectiveStress
		switch {
		case rising && s >= top, !rising && s <= top:
			extreme = i
		case rising && s < top*(1-reversal), !rising && s > top*(1+reversal):
			if extreme > 0 {
				turns = append(turns, extreme)
			}
			extreme, rising = i, !rising
		}
	}
	if last := turns[len(turns)-1]; extreme > last {
		turns = append(turns, extreme)
	}
	// What follows the last extreme wanders within the reversal: same limb.
	last := len(points) - 1
	if len(turns) == 1 {
		return append(turns, last)
	}
	turns[len(turns)-1] = last
	return turns
}
