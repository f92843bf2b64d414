package cone

import (
	"errors"
	"fmt"
	"math"
	"slices"
)

// ErrUnit says that the size of the readings fits no unit, or more than one.
var ErrUnit = errors.New("unit of the cone resistance is not clear")

// unitCase is a unit in which readings named MPa may really be.
type unitCase struct {
	name   string
	factor float64 // to MPa
}

var unitCases = []unitCase{
	{"MPa", 1},
	{"kPa", 0.001},
	{"bar or kgf/cm²", 0.1},
	{"a unit 1000 times larger", 1000},
}

// Limits of size. None is published: they are wide enough that ground in the
// right unit passes and a slip of 10 or 1000 in most ground does not.
const (
	mostResistance     = 100    // MPa; the capacity of common cones
	leastFrictionRatio = 0.0015 // median fs/qt; below it in no common soil
	mostFrictionRatio  = 0.20   // median fs/qt
	fewAbove           = 0.02   // share of readings that may be above the capacity
	weakAsGiven        = 0.5    // share that may be below the weight of the ground, in the unit as given
	weakOtherwise      = 0.2    // and in another unit: voids and air explain no more
)

// sizes are what the unit is judged by: one entry for each cell.
type sizes struct {
	resistance []float64 // as given
	total      []float64 // σv0, kPa
	friction   []float64 // fs/resistance as given, kPa over the unit, where fs > 0
	pore       []float64 // u2, kPa
	poreOver   []float64 // the resistance as given beside it
}

// newSizes has room for n cells.
func newSizes(n int) sizes {
	room := func() []float64 { return make([]float64, 0, n) }
	return sizes{room(), room(), room(), room(), room()}
}

// resistanceUnit returns the factor to MPa, with a note where it is not 1 or is
// in doubt. Readings that make sense as given stay as given.
func (s sizes) resistanceUnit() (factor float64, note string, err error) {
	if len(s.resistance) == 0 {
		return 1, "", nil
	}
	if s.makesSense(1, weakAsGiven) {
		return 1, s.doubt(), nil
	}
	var fits []unitCase
	for _, u := range unitCases[1:] {
		if s.makesSense(u.factor, weakOtherwise) && s.frictionFits(u.factor) {
			fits = append(fits, u)
		}
	}
	typical := median(slices.Clone(s.resistance))
	switch len(fits) {
	case 0:
		return 1, "", fmt.Errorf("%w: the median is %.4g MPa, which fits neither MPa, kPa nor bar", ErrUnit, typical)
	case 1:
		return fits[0].factor, fmt.Sprintf("cone resistance: the median as given is %.4g MPa, which no ground has: taken as %s (factor %g); correct the table",
			typical, fits[0].name, fits[0].factor), nil
	}
	return 1, "", fmt.Errorf("%w: the median is %.4g MPa, which no ground has; it could be %s or %s", ErrUnit, typical, fits[0].name, fits[1].name)
}

// makesSense asks whether, in this unit, the resistance stays within what a
// cone can take, above the weight of the ground, and above the pore pressure.
// weak is the share of readings that may lie below the weight of the ground.
func (s sizes) makesSense(factor, weak float64) bool {
	above, below, wet := 0, 0, 0
	for i, q := range s.resistance {
		switch q *= factor; {
		case q > mostResistance:
			above++
		case 1000*q < 0.8*s.total[i]:
			below++
		}
	}
	for i, u := range s.pore {
		if u > 1.2*1000*factor*s.poreOver[i] {
			wet++
		}
	}
	n := float64(len(s.resistance))
	return float64(above) <= fewAbove*n && float64(below) <= weak*n && float64(wet) <= weak*float64(len(s.pore))
}

func (s sizes) frictionFits(factor float64) bool {
	if len(s.friction) == 0 {
		return true
	}
	ratio := median(slices.Clone(s.friction)) / (1000 * factor)
	return ratio >= leastFrictionRatio && ratio <= mostFrictionRatio
}

// doubt words what is possible but unlikely in the unit as given.
func (s sizes) doubt() string {
	if s.frictionFits(1) {
		return ""
	}
	ratio := median(slices.Clone(s.friction)) / 1000
	switch {
	case ratio < leastFrictionRatio && s.makesSense(0.1, weakOtherwise) && s.frictionFits(0.1):
		return fmt.Sprintf("cone resistance: the median friction ratio is %.2g %%, which no common soil has: it may be in bar or kgf/cm², not MPa; used as given", 100*ratio)
	case ratio < leastFrictionRatio:
		return fmt.Sprintf("sleeve friction: the median friction ratio is %.2g %%, which no common soil has: it may be in MPa, not kPa; used as given", 100*ratio)
	}
	return fmt.Sprintf("sleeve friction: the median friction ratio is %.2g %%, which no common soil has; check its unit and that of the cone resistance; used as given", 100*ratio)
}

// poreUnit returns 1000 where u2 is far below the pore pressure in the ground as
// given and near it as MPa.
func poreUnit(u2, u0 []float64) (factor float64, note string) {
	if len(u2) < 10 {
		return 1, ""
	}
	most, ground := 0.0, median(slices.Clone(u0))
	for _, u := range u2 {
		most = math.Max(most, math.Abs(u))
	}
	if ground > 10 && most < 0.05*ground && 1000*most > 0.3*ground {
		return 1000, fmt.Sprintf("pore pressure u2: at most %.3g kPa as given where the ground has %.3g kPa: taken as MPa (factor 1000); correct the table", most, ground)
	}
	return 1, ""
}
