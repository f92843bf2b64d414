package oedometer

import (
	"fmt"
	"math"
)

// waterDensity is ρw in g/cm³ at room temperature, as laboratories take it.
const waterDensity = 1.0

// HeightOfSolids returns Hs in mm of a specimen of dry mass g, specific gravity
// and area in cm², all greater than zero:
//
//	Hs = Md/(Gs·ρw·A)
func HeightOfSolids(dryMass, specificGravity, area float64) float64 {
	return 10 * dryMass / (specificGravity * waterDensity * area)
}

// initialState sets the initial void ratio of the curve and returns the height
// of solids in mm, 0 where it is not known. Two ways to one void ratio are
// compared: 0.03 or 3 %, whichever is larger, is common practice.
func initialState(r Record, curve *Curve, problems *Problems) (solids float64) {
	type way struct {
		how string
		e   float64
	}
	var ways []way
	if r.InitialVoidRatio.Known {
		ways = append(ways, way{"given", r.InitialVoidRatio.Value})
	}
	height := initialHeight(r)
	if r.DryMass.Known && r.SpecificGravity.Known && r.Area.Known {
		solids = HeightOfSolids(r.DryMass.Value, r.SpecificGravity.Value, r.Area.Value)
		if height > 0 {
			ways = append(ways, way{"from dimensions and solids", height/solids - 1})
		}
	}
	if w := waterContent(r); w.Known && r.SpecificGravity.Known {
		ways = append(ways, way{"from w and Gs, taken as saturated", w.Value / 100 * r.SpecificGravity.Value})
	}
	if len(ways) == 0 {
		if e, how, ok := firstVoidRatio(r); ok {
			ways = append(ways, way{how, e})
		}
	}
	if len(ways) == 0 {
		*problems = append(*problems, Problem{-1, 0, "initial void ratio", "not given and nothing to compute it from",
			"it, or w and Gs, or dry mass, Gs, area and initial height"})
		return 0
	}
	best := ways[0]
	if best.e <= 0 || best.e > largestVoidRatio {
		*problems = append(*problems, Problem{-1, 0, "initial void ratio", fmt.Sprintf("%.3f (%s)", best.e, best.how),
			fmt.Sprintf("a void ratio above 0 and up to %.0f: check masses, dimensions and Gs", largestVoidRatio)})
		return 0
	}
	for _, other := range ways[1:] {
		if d := math.Abs(other.e - best.e); d > math.Max(0.03, 0.03*best.e) {
			curve.add(-1, "initial void ratio", fmt.Sprintf("%.3f %s but %.3f %s: they differ by %.3f; check Gs, ring size, trimming and saturation",
				best.e, best.how, other.e, other.how, d))
		}
	}
	curve.InitialVoidRatio, curve.InitialVoidRatioHow = best.e, best.how
	if solids == 0 && height > 0 {
		solids = height / (1 + best.e)
	}
	return solids
}

// initialHeight returns the initial height in mm: as given, or the height at
// zero stress that begins the record; 0 where neither is known.
func initialHeight(r Record) float64 {
	if r.InitialHeight.Known {
		return r.InitialHeight.Value
	}
	if len(r.Stages) > 0 && r.Stages[0].EffectiveStress == 0 {
		return r.Stages[0].Height.Or(0)
	}
	return 0
}

// waterContent returns the initial water content in percent, from the masses
// where it is not given.
func waterContent(r Record) Number {
	if !r.WaterContent.Known && r.WetMass.Known && r.DryMass.Known {
		return Known(100 * (r.WetMass.Value - r.DryMass.Value) / r.DryMass.Value)
	}
	return r.WaterContent
}

// firstVoidRatio returns the void ratio with which the stages begin.
func firstVoidRatio(r Record) (e float64, how string, ok bool) {
	for _, s := range r.Stages {
		if !s.VoidRatio.Known {
			continue
		}
		if s.EffectiveStress == 0 {
			return s.VoidRatio.Value, "void ratio at the start of the test", true
		}
		return s.VoidRatio.Value, "not given: void ratio of the first stage, a little low", true
	}
	return 0, "", false
}
