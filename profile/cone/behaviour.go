package cone

import (
	"math"

	"pastload/correlate"
)

// BehaviourIndex returns the soil behaviour type index Ic of Robertson & Wride
// (1998), coefficients from memory, unverified:
//
//	Ic = √[(3.47 − log Qn)² + (1.22 + log F)²]
//	Qn = [(qt − σv0)/pa]·(pa/σ′v0)^n
//
// with n = 1 where that gives Ic above 2.6, else n = 0.5, or 0.75 where n = 0.5
// gives above 2.6. net is qt − σv0 and effective is σ′v0, both in kPa and greater
// than zero; frictionRatio is F in percent, taken as 0.1 where it is less, as a
// sleeve reads nothing in soft clay. Sand is below about 2, clay above about 3.
// The index is not known where net or effective is not greater than zero.
func BehaviourIndex(net, effective, frictionRatio float64) Measure {
	if !(net > 0) || !(effective > 0) || !finite(net) || !finite(effective) || !finite(frictionRatio) {
		return Measure{}
	}
	friction := 1.22 + math.Log10(math.Max(frictionRatio, leastFriction))
	ic := index(math.Log10(net/effective), friction)
	if ic > clayInMethod {
		return Of(ic)
	}
	over := math.Log10(net / correlate.Atmospheric)
	under := math.Log10(correlate.Atmospheric / effective)
	if ic = index(over+0.5*under, friction); ic > clayInMethod {
		ic = index(over+0.75*under, friction)
	}
	return Of(ic)
}

// index is the distance of log Qn and 1.22 + log F from the corner of the chart.
func index(logQ, friction float64) float64 {
	return math.Sqrt((3.47-logQ)*(3.47-logQ) + friction*friction)
}

const (
	leastFriction = 0.1 // percent
	clayInMethod  = 2.6 // where the method changes its stress exponent
)
