package profile

import "math"

// VoidRatioFromWater returns the void ratio of saturated soil:
//
//	e = w·Gs/100
//
// w is the water content in percent, gs the specific gravity of the solids.
func VoidRatioFromWater(w, gs float64) float64 { return w * gs / 100 }

// SaturatedUnitWeight returns the unit weight of saturated soil in kN/m³:
//
//	γ = (Gs + e)·γw/(1 + e)
//
// e is the void ratio and gammaW the unit weight of water in kN/m³.
func SaturatedUnitWeight(gs, e, gammaW float64) float64 { return (gs + e) * gammaW / (1 + e) }

// DegreeOfSaturation returns Sr = w·Gs/(100·e) as a pure number.
// It is not known where the void ratio is zero or less.
func DegreeOfSaturation(w, gs, e float64) Number {
	if e <= 0 {
		return Number{}
	}
	return Known(w * gs / (100 * e))
}

// VoidRatioFromUnitWeight returns e = Gs·γw·(1+w/100)/γ − 1 for a bulk unit
// weight γ in kN/m³ and a water content w in percent.
func VoidRatioFromUnitWeight(gamma, w, gs, gammaW float64) float64 {
	return gs*gammaW*(1+w/100)/gamma - 1
}

// PlasticityIndexOf returns the plasticity index in percent: as given, else
// LL − PL, else not known.
func (r *Result) PlasticityIndexOf() Number {
	if r.PlasticityIndex.Known {
		return r.PlasticityIndex
	}
	if r.LiquidLimit.Known && r.PlasticLimit.Known {
		return Known(r.LiquidLimit.Value - r.PlasticLimit.Value)
	}
	return Number{}
}

// LiquidityIndexOf returns the liquidity index: (w − PL)/PI from what was
// measured, else as given, else not known. PI of zero or less gives none.
func (r *Result) LiquidityIndexOf() Number {
	pi := r.PlasticityIndexOf()
	pl := r.PlasticLimit
	if !pl.Known && r.LiquidLimit.Known && pi.Known {
		pl = Known(r.LiquidLimit.Value - pi.Value)
	}
	if r.WaterContent.Known && pl.Known && pi.Known && pi.Value > 0 {
		return Known((r.WaterContent.Value - pl.Value) / pi.Value)
	}
	return r.LiquidityIndex
}

// VoidRatioOf returns the void ratio: as given, else from w and Gs of the same
// row, which holds below the water table only.
func (r *Result) VoidRatioOf() Number {
	if r.VoidRatio.Known {
		return r.VoidRatio
	}
	if r.WaterContent.Known && r.SpecificGravity.Known {
		return Known(VoidRatioFromWater(r.WaterContent.Value, r.SpecificGravity.Value))
	}
	return Number{}
}

// finite tells whether every value is a number.
func finite(vs ...float64) bool {
	for _, v := range vs {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			return false
		}
	}
	return true
}
