package review

import (
	"math"
	"strconv"
	"strings"

	"pastload/profile"
)

// A variable is a number that the checks of one row weigh against each other:
// the quantities of a result, and what an oedometer curve says of the specimen.
type variable int

const (
	unitWeight variable = iota
	waterContent
	liquidLimit
	plasticLimit
	plasticityIndex
	liquidityIndex
	specificGravity
	voidRatio
	clayFraction
	organicContent
	givenStress
	preconsolidation
	preconsolidationLow
	preconsolidationHigh
	compressionIndex
	recompressionIndex
	swellingIndex
	secondaryIndex
	undrainedStrength
	sensitivity
	curveVoidRatio
	curveWater
	curveGravity
	curveYield
	curveCompression
	curveRecompression
	nVariables
)

// A trait is what the checks need to know of a variable.
type trait struct {
	quantity string // its name; of the result where it is one
	symbol   string
	unit     string // as it is written behind a value
	decimals int
	weight   float64 // in settlement, for Impact
	cost     float64 // how unlikely it is to be the one that is wrong, −ln of odds
	kind     kind
	of       func(*profile.Result) *profile.Number
}

// A kind groups variables that share units and slips.
type kind int

const (
	percentage kind = iota
	density
	gravity
	ratio
	pressure
	slope
	number
)

var traits = [nVariables]trait{
	unitWeight:           {"unit weight", "γ", " kN/m³", 1, 0.5, 0.2, density, nil},
	waterContent:         {"water content", "w", " %", 1, 0.3, 0, percentage, nil},
	liquidLimit:          {"liquid limit", "LL", " %", 0, 0.2, 0.8, percentage, nil},
	plasticLimit:         {"plastic limit", "PL", " %", 0, 0.1, 0.8, percentage, nil},
	plasticityIndex:      {"plasticity index", "PI", " %", 0, 0.2, 0, percentage, nil},
	liquidityIndex:       {"liquidity index", "LI", "", 2, 0.1, 0, number, nil},
	specificGravity:      {"specific gravity", "Gs", "", 2, 0.2, 0.3, gravity, nil},
	voidRatio:            {"void ratio", "e0", "", 3, 0.4, 0.2, ratio, nil},
	clayFraction:         {"clay fraction", "clay", " %", 0, 0.05, 0.3, percentage, nil},
	organicContent:       {"organic content", "organic", " %", 0, 0.05, 0.3, percentage, nil},
	givenStress:          {"effective stress", "σ′v0", " kPa", 1, 1, 0.2, pressure, nil},
	preconsolidation:     {"preconsolidation stress", "σ′p", " kPa", 0, 1, 0, pressure, nil},
	preconsolidationLow:  {"preconsolidation stress low", "σ′p low", " kPa", 0, 0.1, 0.3, pressure, nil},
	preconsolidationHigh: {"preconsolidation stress high", "σ′p high", " kPa", 0, 0.1, 0.3, pressure, nil},
	compressionIndex:     {"compression index", "Cc", "", 3, 1, 0, slope, nil},
	recompressionIndex:   {"recompression index", "Cr", "", 3, 0.5, 0, slope, nil},
	swellingIndex:        {"swelling index", "Cs", "", 3, 0.2, 0.2, slope, nil},
	secondaryIndex:       {"secondary compression index", "Cα", "", 4, 0.4, 0.2, slope, nil},
	undrainedStrength:    {"undrained strength", "su", " kPa", 1, 0.6, 0, pressure, nil},
	sensitivity:          {"sensitivity", "St", "", 1, 0.1, 0.3, number, nil},
	curveVoidRatio:       {"initial void ratio", "e0 of the oedometer test", "", 3, 0.4, 0.4, ratio, nil},
	curveWater:           {"water content of the oedometer test", "w of the oedometer test", " %", 1, 0.2, 0.3, percentage, nil},
	curveGravity:         {"specific gravity of the oedometer test", "Gs of the oedometer test", "", 2, 0.2, 0.5, gravity, nil},
	curveYield:           {"preconsolidation stress of the curve", "σ′p of the curve", " kPa", 0, 1, 1.5, pressure, nil},
	curveCompression:     {"compression index of the curve", "Cc of the curve", "", 3, 1, 1.5, slope, nil},
	curveRecompression:   {"recompression index of the curve", "Cr of the loop", "", 3, 0.5, 1.5, slope, nil},
}

func init() {
	for v := unitWeight; v <= sensitivity; v++ {
		for i := range profile.Quantities {
			if profile.Quantities[i].Name == traits[v].quantity {
				traits[v].of = profile.Quantities[i].Of
			}
		}
		if traits[v].of == nil {
			panic("review: no quantity " + traits[v].quantity)
		}
	}
}

// text writes a value with its unit.
func (v variable) text(x float64) string { return v.plain(x) + traits[v].unit }

// plain writes a value as the trade prints it: enough digits to tell it apart.
func (v variable) plain(x float64) string {
	d := traits[v].decimals
	if traits[v].kind == pressure || traits[v].kind == percentage {
		switch a := math.Abs(x); {
		case a > 0 && a < 10:
			d = max(d, 1)
		case a >= 100:
			d = 0
		}
	}
	if traits[v].kind == slope && math.Abs(x) >= 1 {
		d = 2
	}
	return fixed(x, d)
}

// fixed writes a number with a fixed count of decimals and without a minus zero.
func fixed(x float64, decimals int) string {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return "no number"
	}
	if a := math.Abs(x); a >= 1e7 || a > 0 && a < 1e-5 {
		return strconv.FormatFloat(x, 'g', 3, 64)
	}
	s := strconv.FormatFloat(x, 'f', decimals, 64)
	if strings.Trim(s, "-0.") == "" {
		s = strings.TrimPrefix(s, "-")
		if x != 0 {
			s = strconv.FormatFloat(x, 'g', 2, 64)
		}
	}
	return s
}

func whole(n int) string { return strconv.Itoa(n) }

// depthText writes a depth for an identifier.
func depthText(d profile.Number) string {
	if !d.Known {
		return ""
	}
	return fixed(d.Value, 2)
}
