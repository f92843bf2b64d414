package correlate

import (
	"errors"
	"fmt"
	"math"
	"slices"
	"strings"
)

// ErrUnknownSymbol says that a value was given under a symbol that no
// correlation knows.
var ErrUnknownSymbol = errors.New("unknown symbol")

// A Variable is something that correlations take as input.
type Variable struct {
	Symbol  string // the key in Values, easy to type: "LL", "effective"
	Written string // as the trade writes it: "σ′v0"
	Name    string // in words: "effective stress"
	Unit    string // "%", "kPa", "m/s", "°", "min", or "" for a pure number

	// Possible is the open interval outside which a value cannot be one of a
	// soil, whatever the correlation.
	Possible Interval
}

// An Interval is a range of values. The zero Interval is not stated.
type Interval struct {
	Low, High float64
	Stated    bool
}

// between returns a stated interval.
func between(low, high float64) Interval { return Interval{low, high, true} }

// holds reports whether x lies strictly inside the interval.
func (i Interval) holds(x float64) bool { return x > i.Low && x < i.High }

// covers reports whether x lies in the interval, ends included.
func (i Interval) covers(x float64) bool { return x >= i.Low && x <= i.High }

// variables is the list that every input and every value is checked against.
// The intervals are wide: they catch a wrong unit or a slipped digit.
var variables = []Variable{
	{"LL", "LL", "liquid limit", "%", between(0, 1000)},
	{"PL", "PL", "plastic limit", "%", between(0, 700)},
	{"PI", "PI", "plasticity index", "%", between(0, 800)},
	{"LI", "LI", "liquidity index", "", between(-5, 10)},
	{"SL", "SL", "shrinkage limit", "%", between(0, 100)},
	{"w", "w", "water content", "%", between(0, 3000)},
	{"e0", "e0", "void ratio", "", between(0, 40)},
	{"n0", "n0", "porosity", "%", between(0, 100)},
	{"Gs", "Gs", "specific gravity", "", between(1, 5)},
	{"eL", "eL", "void ratio at the liquid limit", "", between(0, 30)},
	{"eP", "eP", "void ratio at the plastic limit", "", between(0, 20)},
	{"e0eL", "e0/eL", "void ratio over that at the liquid limit", "", between(0, 20)},
	{"organic", "organic", "organic content", "%", between(-1e-9, 100.001)},
	{"St", "St", "sensitivity", "", between(0.9, 5000)},
	{"Cc", "Cc", "compression index", "", between(0, 40)},
	{"Cr", "Cr", "recompression index", "", between(0, 10)},
	{"Cs", "Cs", "swelling index", "", between(0, 10)},
	{"CaCc", "Cα/Cc", "secondary compression over compression index", "", between(0, 0.3)},
	{"ageing", "t/tp", "time over time to the end of primary consolidation", "", between(0.99, 1e9)},
	{"effective", "σ′v0", "effective stress", "kPa", between(0, 1e5)},
	{"preconsolidation", "σ′p", "preconsolidation stress", "kPa", between(0, 1e5)},
	{"OCR", "OCR", "overconsolidation ratio", "", between(0, 1000)},
	{"qnet", "qt − σv0", "net cone resistance", "kPa", between(0, 2e5)},
	{"du2", "u2 − u0", "excess cone pore pressure", "kPa", between(-1e4, 2e4)},
	{"qeff", "qt − u2", "effective cone resistance", "kPa", between(-1e4, 2e5)},
	{"Q", "Q", "normalised cone resistance", "", between(0, 5000)},
	{"Ic", "Ic", "soil behaviour type index", "", between(0, 6)},
	{"su", "su", "undrained strength", "kPa", between(0, 5000)},
	{"suFV", "su(FV)", "undrained strength by field vane, uncorrected", "kPa", between(0, 5000)},
	{"S", "S", "undrained strength ratio, normally consolidated", "", between(0, 2)},
	{"m", "m", "exponent of the overconsolidation ratio", "", between(0, 1.5)},
	{"S1", "S1", "strength ratio of young clay, from the chart of Bjerrum (1973)", "", between(0, 2)},
	{"tf", "tf", "time to failure", "min", between(0, 1e7)},
	{"N60", "N60", "N60", "", between(0, 300)},
	{"KD", "KD", "horizontal stress index", "", between(0, 200)},
	{"ID", "ID", "material index", "", between(0, 20)},
	{"p0net", "p0 − u0", "net lift-off pressure of the dilatometer", "kPa", between(0, 2e4)},
	{"Vs", "Vs", "shear wave velocity", "m/s", between(10, 3000)},
	{"phi", "φ′", "effective friction angle", "°", between(0, 60)},
	{"beta", "β", "slope of the ground", "°", between(-45, 45)},
}

// Variables returns every variable, in a fixed order.
func Variables() []Variable { return slices.Clone(variables) }

// LookUp returns the variable that a text names: by its symbol, as the trade
// writes it, or in words. Case counts only where the trade's symbols need it.
func LookUp(text string) (Variable, bool) {
	text = strings.TrimSpace(text)
	for _, v := range variables {
		if text == v.Symbol || text == v.Written || text == v.Name {
			return v, true
		}
	}
	for _, v := range variables {
		if strings.EqualFold(text, v.Symbol) || strings.EqualFold(text, v.Name) {
			return v, true
		}
	}
	return Variable{}, false
}

func variable(symbol string) Variable {
	for _, v := range variables {
		if v.Symbol == symbol {
			return v
		}
	}
	panic("correlate: no variable " + symbol)
}

// Values are what is known of the soil at one place, by Variable.Symbol, each
// in the unit of its Variable. What is not known is left out.
type Values map[string]float64

// Check returns an error that names every value under an unknown symbol (it
// wraps ErrUnknownSymbol) and every value that is not finite or not possible
// (ErrNotApplicable), in a fixed order; nil where all can be used.
func (v Values) Check() error {
	var all []error
	for _, s := range v.symbols() {
		if known := slices.ContainsFunc(variables, func(x Variable) bool { return x.Symbol == s }); !known {
			all = append(all, fmt.Errorf("%w %q", ErrUnknownSymbol, s))
			continue
		}
		if err := variable(s).check(v[s]); err != nil {
			all = append(all, err)
		}
	}
	return errors.Join(all...)
}

// symbols returns the keys in order.
func (v Values) symbols() []string {
	out := make([]string, 0, len(v))
	for s := range v {
		out = append(out, s)
	}
	slices.Sort(out)
	return out
}

func (x Variable) check(value float64) error {
	if math.IsNaN(value) || math.IsInf(value, 0) {
		return fmt.Errorf("%w: %s is not a number", ErrNotApplicable, x.Name)
	}
	if !x.Possible.holds(value) {
		return fmt.Errorf("%w: %s %s is not possible; want a value between %s and %s",
			ErrNotApplicable, x.Name, amount(value, x.Unit), number(x.Possible.Low), amount(x.Possible.High, x.Unit))
	}
	return nil
}
