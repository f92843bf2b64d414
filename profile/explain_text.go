package profile

import (
	"math"
	"strconv"
	"strings"
)

// digits writes a number with decimals, without a negative zero and with the
// minus sign of the trade.
func digits(v float64, decimals int) string {
	s := strconv.FormatFloat(v, 'f', decimals, 64)
	if strings.HasPrefix(s, "-") {
		s = s[1:]
		if strings.Trim(s, "0.") != "" {
			s = "−" + s
		}
	}
	return s
}

// plain is digits without trailing zeros.
func plain(v float64, decimals int) string {
	s := digits(v, decimals)
	if strings.Contains(s, ".") {
		s = strings.TrimRight(strings.TrimRight(s, "0"), ".")
	}
	return s
}

// term writes a number as part of arithmetic: a negative one in brackets.
func term(v float64, decimals int) string {
	s := plain(v, decimals)
	if strings.HasPrefix(s, "−") {
		return "(" + s + ")"
	}
	return s
}

// significant writes a number with at most so many significant digits.
func significant(v float64, n int) string {
	if v == 0 || math.IsInf(v, 0) || math.IsNaN(v) {
		return term(v, 0)
	}
	return term(v, max(0, n-1-int(math.Floor(math.Log10(math.Abs(v))))))
}

// minus is a term that sum takes away.
func minus(v float64, decimals int) string { return "− " + term(v, decimals) }

// sum joins terms with plus, but for those of minus.
func sum(terms ...string) string {
	var b strings.Builder
	for i, t := range terms {
		switch {
		case i == 0:
		case strings.HasPrefix(t, "− "):
			b.WriteByte(' ')
		default:
			b.WriteString(" + ")
		}
		b.WriteString(t)
	}
	return b.String()
}

// typedLimit is how much of a typed cell is quoted, in characters.
const typedLimit = 60

// cited says where a number was read and what was typed there.
func cited(n Number) string {
	c := n.Source
	if c == nil {
		return ""
	}
	out := c.String()
	if c.Text == "" {
		return out
	}
	text := []rune(c.Text)
	if len(text) > typedLimit {
		text = append(text[:typedLimit-1], '…')
	}
	out += " “" + string(text) + "”"
	if c.Unit != "" {
		out += " " + c.Unit
	}
	return out
}

// converted returns the arithmetic from what was typed to the unit inside, or ""
// where they are the same number.
func converted(n Number) string {
	if n.Source == nil {
		return ""
	}
	text := strings.ReplaceAll(strings.Trim(n.Source.Text, " <>≤≥#~≈%="), ",", ".")
	typed, err := strconv.ParseFloat(text, 64)
	if err != nil || typed == 0 || math.Abs(n.Value/typed-1) < 1e-9 || math.IsInf(typed, 0) {
		return ""
	}
	return significant(typed, 7) + " × " + significant(n.Value/typed, 7)
}

// assumedMark marks a number that its table calls assumed.
func assumedMark(n Number) string {
	if n.Assumed {
		return "recorded as assumed"
	}
	return ""
}

// settingSource says where a setting was given.
func (s *Settings) settingSource(names ...string) string {
	for i := range s.Given {
		for _, name := range names {
			if g := &s.Given[i]; strings.EqualFold(g.Name, name) {
				return strings.TrimSpace(g.Source.String() + " “" + g.Value + "” " + g.Unit)
			}
		}
	}
	return "default of the program"
}
