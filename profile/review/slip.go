package review

import (
	"fmt"
	"math"
	"strconv"
	"strings"
)

// A slip is one way in which a value may have become what it is.
type slip struct {
	value float64
	how   string
	unit  string // the unit that would make it fit
	cost  float64
	joint bool // its family of variables shares the slip
}

// The costs of slips: minus the logarithm of how often each is the cause,
// against a value that is simply another (ours).
const (
	costSwap    = 2.0 // two digits exchanged
	costDecimal = 2.0
	costUnit    = 2.0
	costDry     = 2.5
	costRare    = 3.0
	costFree    = 4.5 // any other value
	costPair    = 2.0 // two columns exchanged
)

// A unitSlip is a unit that numbers are entered in by mistake.
type unitSlip struct {
	factor float64 // from a number in that unit to our own
	unit   string
}

var unitSlips = map[kind][]unitSlip{
	density: {{9.80665, "Mg/m³"}, {0.157087, "lb/ft³"}, {0.00980665, "kg/m³"}},
	pressure: {
		{0.0478803, "lb/ft²"}, {47.8803, "kip/ft²"}, {95.7605, "US ton/ft²"}, {98.0665, "kgf/cm²"}, {9.80665, "t/m²"},
		{6.89476, "lb/in²"}, {1000, "MPa"}, {0.001, "Pa"}, {100, "bar"},
	},
	slope: {{math.Ln10, naturalLog}, {1 / math.Ln10, "ln-to-log10 conversion made twice"}},
}

const naturalLog = "slope per natural in place of log10 cycle, a factor of 2.303"

// slips lists the changes worth trying on a variable.
func slips(r *row, v variable) []slip {
	x := r.v[v]
	text := r.typed(v)
	var out []slip
	for _, y := range swaps(text) {
		out = append(out, slip{value: y, how: "two digits exchanged", cost: costSwap})
	}
	if x == 0 {
		return out
	}
	for _, f := range []float64{10, 0.1} {
		out = append(out, slip{value: x * f, how: "decimal point one place out", cost: costDecimal})
	}
	for _, f := range []float64{100, 0.01} {
		how := "decimal point two places out"
		if traits[v].kind == percentage || traits[v].kind == ratio {
			how = "fraction and percent confused"
		}
		out = append(out, slip{value: x * f, how: how, cost: costDecimal + 0.5})
	}
	for _, u := range unitSlips[traits[v].kind] {
		how := "the number is in " + u.unit
		if traits[v].kind == slope {
			how = u.unit
		}
		out = append(out, slip{value: x * u.factor, how: how, unit: u.unit, cost: costUnit, joint: traits[v].kind == slope || v == preconsolidation})
	}
	switch {
	case v == unitWeight && r.known(waterContent) && r.v[waterContent] > 0:
		out = append(out, slip{value: x * (1 + r.v[waterContent]/100), how: "the dry unit weight was entered", cost: costDry})
	case v == voidRatio && x > 0 && x < 1:
		out = append(out, slip{value: x / (1 - x), how: "porosity was entered for void ratio", cost: costRare})
	case v == compressionIndex:
		if e, ok := r.void(); ok && e > 0 {
			out = append(out, slip{value: x * (1 + e), how: "the compression ratio Cc/(1 + e0) was entered", cost: costRare})
		}
	}
	return out
}

// swaps returns the numbers that come of exchanging two neighbouring digits,
// skipping a decimal point between them.
func swaps(text string) []float64 {
	var digits []int
	for i := range len(text) {
		if text[i] >= '0' && text[i] <= '9' {
			digits = append(digits, i)
		}
	}
	var out []float64
	for k := 1; k < len(digits) && k < 8; k++ {
		i, j := digits[k-1], digits[k]
		if text[i] == text[j] {
			continue
		}
		b := []byte(text)
		b[i], b[j] = b[j], b[i]
		if y, ok := plainNumber(string(b)); ok && y != 0 {
			out = append(out, y)
		}
	}
	return out
}

// plainNumber reads a number as it is typed without a qualifier; a comma is a
// decimal comma.
func plainNumber(text string) (float64, bool) {
	if text == "" || len(text) > 24 || strings.Trim(text, "0123456789.,-+") != "" {
		return 0, false
	}
	y, err := strconv.ParseFloat(strings.Replace(text, ",", ".", 1), 64)
	return y, err == nil && !math.IsInf(y, 0)
}

// families are variables that are entered in one unit: a slip of unit in one is
// a slip in all.
var families = [][]variable{
	{preconsolidation, preconsolidationLow, preconsolidationHigh},
	{compressionIndex, recompressionIndex, swellingIndex},
}

// family returns the variables that share the unit of v in a row, v among them.
func family(r *row, v variable) []variable {
	for _, f := range families {
		for _, m := range f {
			if m != v {
				continue
			}
			var known []variable
			for _, k := range f {
				if r.known(k) {
					known = append(known, k)
				}
			}
			return known
		}
	}
	return []variable{v}
}

// exchanges are columns that stand side by side or look alike.
var exchanges = [][2]variable{
	{liquidLimit, plasticLimit}, {waterContent, liquidLimit}, {waterContent, plasticLimit}, {plasticLimit, plasticityIndex}, {liquidLimit, plasticityIndex},
	{waterContent, plasticityIndex}, {specificGravity, voidRatio}, {unitWeight, waterContent}, {compressionIndex, recompressionIndex}, {undrainedStrength, preconsolidation},
	{undrainedStrength, sensitivity}, {compressionIndex, voidRatio}, {givenStress, preconsolidation},
}

// inWords says what a change would make of a value.
func (s *slip) inWords(r *row, v variable) string {
	return fmt.Sprintf("%s = %s in place of %s", traits[v].symbol, v.text(s.value), r.typed(v))
}
