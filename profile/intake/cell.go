package intake

import (
	"fmt"
	"strings"

	"pastload/profile"
)

// readNumber reads a number cell in the unit of its header. message tells what
// is wrong with it.
func readNumber(s spec, f field, mark byte, cell *profile.Cell) (n, base profile.Number, np bool, message string) {
	fault := func(why string) string { return fmt.Sprintf("%q %s", clean(cell.Text), why) }
	tok := scan(cell.Text)
	if s.ranges && tok.kind == notANumber {
		if top, end, ok := depthRange(cell.Text); ok {
			a, okA := top.value(mark)
			b, okB := end.value(mark)
			if !okA || !okB {
				return n, base, false, fault("is not a range of numbers")
			}
			if b <= a {
				return n, base, false, fault("is a range whose end does not lie below its beginning")
			}
			return s.inside(a, f, cell), s.inside(b, f, cell), false, ""
		}
	}
	switch {
	case tok.kind == notMeasured:
		return n, base, false, ""
	case tok.kind == nonPlastic && s.plastic:
		return n, base, true, ""
	case tok.kind == nonPlastic:
		return n, base, false, fault("is not a number")
	case tok.kind == notANumber:
		return n, base, false, fault(tok.why)
	case tok.bound != profile.Exact && !s.bounds:
		return n, base, false, fault("is a bound, not a value")
	case tok.percent && s.dim != percent:
		return n, base, false, fault("carries a percent sign in a column that is not in percent")
	}
	v, ok := tok.value(mark)
	if !ok {
		return n, base, false, fault("is not a number")
	}
	if tok.percent {
		f.unit = percent.named("%") // the cell says so itself, whatever its header
	}
	n = s.inside(v, f, cell)
	n.Bound, n.Assumed = tok.bound, tok.assumed
	return n, base, false, ""
}

// inside converts a typed value to the unit inside.
func (s spec) inside(v float64, f field, cell *profile.Cell) profile.Number {
	return profile.Number{Value: convert(v, f.unit, s.unit), Known: true, Source: cell}
}

// wanted says what a cell of the column should hold.
func (s spec) wanted(f field) string {
	u := f.unit
	if u.name == "" {
		u = s.unit
	}
	switch {
	case s.ranges:
		return fmt.Sprintf("%s, e.g. %s or a range 4.00–4.45", u.words, u.example)
	case s.dim == ratio:
		return u.words
	}
	return fmt.Sprintf("%s, e.g. %s", u.words, u.example)
}

// outside tells why a value cannot be right as entered, and which other unit
// would make it fit.
func (s spec) outside(n profile.Number, f field) (message, wanted string) {
	if !n.Known || s.limit.has(n.Value) {
		return "", ""
	}
	u := s.unit.name
	if u == "-" {
		u = ""
	}
	amount := func(v float64) string { return strings.TrimSpace(number(v) + " " + u) }
	message = fmt.Sprintf("%q", clean(n.Source.Text))
	if f.unit.name != s.unit.name {
		message += " " + f.unit.name + " is " + amount(n.Value) + " and"
	}
	typed := convert(n.Value, s.unit, f.unit)
	message += fmt.Sprintf(" lies outside %s to %s", number(s.limit.low), amount(s.limit.high))
	if s.limit.open && n.Value <= s.limit.low {
		message = fmt.Sprintf("%q is not greater than %s", clean(n.Source.Text), number(s.limit.low))
		return message, fmt.Sprintf("%s greater than %s, or blank where it was not measured", f.unit.words, number(s.limit.low))
	}
	for _, other := range s.dim.units {
		if other.name == f.unit.name || n.Value <= 0 {
			continue
		}
		v := convert(typed, other, s.unit)
		switch {
		case !s.limit.has(v):
		case other.name == s.unit.name:
			return message, fmt.Sprintf("%s, or the unit that fits: %s", f.unit.words, amount(typed))
		default:
			return message, fmt.Sprintf("%s, or the unit that fits: %s %s is %s", f.unit.words, number(typed), other.name, amount(v))
		}
	}
	if u == "" {
		return message, fmt.Sprintf("a number from %s to %s", number(s.limit.low), number(s.limit.high))
	}
	return message, s.wanted(f)
}
