package correlate

import (
	"errors"
	"fmt"
	"math"
	"strconv"
)

var (
	// ErrNotApplicable says that a correlation has no meaning for the values.
	ErrNotApplicable = errors.New("not applicable")

	// ErrMissingInput says that an input is not among the values and does not
	// follow from them.
	ErrMissingInput = errors.New("missing input")
)

// z95 is the standard normal variate of the 95 % point.
const z95 = 1.6448536269514722

// An Estimate is what a correlation gives for some values.
type Estimate struct {
	Value     float64 // in the unit of the quantity
	Low, High float64 // the 5 and 95 % points by the scatter of the entry
	Used      []Used  // the inputs with their values
	Warnings  []string
}

// Used is one input of an estimate.
type Used struct {
	Input
	Value   float64
	Derived string // how it follows from what was given; "" where it was given
}

// Evaluate returns what the correlation gives for the values, with the 5 and
// 95 % points that its scatter between and within sites implies for a lognormal
// error.
//
// An input that is not given is taken from others where it follows from them
// (PI = LL − PL, LI = (w − PL)/PI, e0 = w·Gs/100 of saturated soil, …), which is
// said in Used. A value outside the published range, or one that contradicts
// another given value, leaves the estimate and adds a warning.
//
// The error wraps ErrMissingInput and names what is missing, or ErrNotApplicable
// with the reason: a value that is not possible, or that is outside the limits of
// the correlation. No estimate is then returned.
func (c Correlation) Evaluate(given Values) (Estimate, error) {
	used, err := c.collect(given)
	if err != nil {
		return Estimate{}, err
	}
	args := make(Values, len(used))
	var warnings []string
	for _, u := range used {
		args[u.Symbol] = u.Value
		if !u.Meaningful.holds(u.Value) {
			return Estimate{}, fmt.Errorf("%w: %s: %s %s; the relation has a meaning only between %s and %s",
				ErrNotApplicable, c.ID, u.Written, amount(u.Value, u.Unit), number(u.Meaningful.Low), amount(u.Meaningful.High, u.Unit))
		}
		warnings = append(warnings, u.rangeWarnings()...)
	}
	value, most := c.eval(args), 0.0
	if c.guard != nil {
		j := c.guard(withContext(args, given), value)
		if j.refused != "" {
			return Estimate{}, fmt.Errorf("%w: %s: %s", ErrNotApplicable, c.ID, j.refused)
		}
		value, most, warnings = j.value, j.most, append(warnings, j.warnings...)
	}
	if !c.sensible(value) {
		return Estimate{}, fmt.Errorf("%w: %s: the values give %s %s, which has no meaning",
			ErrNotApplicable, c.ID, c.Quantity.Symbol(), amount(value, c.Quantity.Unit()))
	}
	e := Estimate{Value: value, Used: used, Warnings: append(warnings, contradictions(given, args)...)}
	e.Low, e.High = c.Scatter.band(value)
	if most > 0 {
		e.High = math.Min(e.High, most)
	}
	return e, nil
}

// collect finds every input among the values or derives it from them.
func (c Correlation) collect(given Values) ([]Used, error) {
	used := make([]Used, 0, len(c.Inputs))
	var missing []error
	for _, in := range c.Inputs {
		value, derived, ok := resolve(in.Symbol, given)
		if !ok && in.Optional {
			continue
		}
		if !ok {
			missing = append(missing, fmt.Errorf("%w: %s needs %s (%s)", ErrMissingInput, c.ID, in.Name, in.Symbol))
			continue
		}
		if err := in.check(value); err != nil {
			return nil, fmt.Errorf("%s: %w", c.ID, err)
		}
		used = append(used, Used{in, value, derived})
	}
	if missing != nil {
		return nil, errors.Join(missing...)
	}
	return used, nil
}

// rangeWarnings says where a value lies outside the data of the relation.
func (u Used) rangeWarnings() []string {
	var out []string
	if u.Unit == "%" && u.Value <= 1.5 && u.Symbol != "organic" {
		out = append(out, fmt.Sprintf("%s %s %% looks like a fraction; want percent, e.g. 45", u.Name, number(u.Value)))
	}
	if p := u.Range; p.Stated && !p.covers(u.Value) {
		out = append(out, fmt.Sprintf("%s %s is outside %s to %s (%s)", u.Written, amount(u.Value, u.Unit), number(p.Low), amount(p.High, u.Unit), u.Basis))
	}
	return out
}

// sensible reports whether a value can be one of the quantity. All of them are
// greater than zero but the void index, and stay within sizes met in soil.
func (c Correlation) sensible(value float64) bool {
	if math.IsNaN(value) || math.IsInf(value, 0) || math.Abs(value) > 1e6 {
		return false
	}
	return c.Quantity == VoidIndex || value > 1e-9
}

// Total returns the standard deviation between a reading at an unknown site
// and the relation.
func (s Scatter) Total() float64 { return math.Hypot(s.Between, s.Within) }

// band returns the 5 and 95 % points around a value. The void index, which may
// be zero or negative, is left without width.
func (s Scatter) band(value float64) (low, high float64) {
	if value <= 0 {
		return value, value
	}
	f := math.Exp(z95 * s.Total())
	return value / f, value * f
}

// withContext adds to the arguments what else is known, so that a guard can
// compare a result with, say, the stress today.
func withContext(args, given Values) Values {
	all := make(Values, len(args)+len(given))
	for s, v := range given {
		if !math.IsNaN(v) && !math.IsInf(v, 0) {
			all[s] = v
		}
	}
	for s, v := range args {
		all[s] = v
	}
	return all
}

// number formats with four significant digits, as a reader wants to see it.
func number(x float64) string {
	rounded, err := strconv.ParseFloat(strconv.FormatFloat(x, 'g', 4, 64), 64)
	if err != nil || math.Abs(x) >= 1e7 || x != 0 && math.Abs(x) < 1e-3 {
		return strconv.FormatFloat(x, 'g', 4, 64)
	}
	return strconv.FormatFloat(rounded, 'f', -1, 64)
}

func amount(x float64, unit string) string {
	if unit == "" || unit == "°" {
		return number(x) + unit
	}
	return number(x) + " " + unit
}
