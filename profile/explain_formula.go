package profile

import (
	"math"
	"slices"
	"strings"

	"pastload/correlate"
)

// filled returns the right side of a formula with its numbers, but only where
// the arithmetic so printed gives the value; "" where it does not, as of a
// formula in words or with conditions.
func filled(formula string, args correlate.Values, value float64) string {
	_, right, ok := strings.Cut(formula, " = ")
	if !ok {
		right = formula
	}
	if i := strings.LastIndex(right, " = "); i >= 0 && !strings.ContainsAny(right[:i], ",;") {
		right = right[i+3:] // CR = Cc/(1 + e0) = 0.126·…
	}
	if i := strings.IndexAny(right, ",;"); i >= 0 {
		right = right[:i]
	}
	text := substitute(right, args)
	got, err := Arithmetic(text)
	if err != nil || math.Abs(got-value) > 1e-4*math.Abs(value) {
		return ""
	}
	return text
}

// substitute puts numbers in the place of symbols, the longest names first.
func substitute(formula string, args correlate.Values) string {
	type name struct{ text, number string }
	names := []name{{"pa", significant(correlate.Atmospheric, 7)}}
	for _, v := range correlate.Variables() {
		value, ok := args[v.Symbol]
		if !ok {
			continue
		}
		number := significant(value, 6)
		for _, text := range append([]string{v.Written, v.Symbol}, otherNames[v.Symbol]...) {
			names = append(names, name{text, number})
		}
	}
	slices.SortStableFunc(names, func(a, b name) int { return len(b.text) - len(a.text) })
	var out strings.Builder
	for rest := formula; rest != ""; {
		hit := slices.IndexFunc(names, func(n name) bool {
			return strings.HasPrefix(rest, n.text) && !continues(out.String(), rest[len(n.text):])
		})
		if hit >= 0 {
			out.WriteString(names[hit].number)
			rest = rest[len(names[hit].text):]
			continue
		}
		size := 1
		for size < len(rest) && rest[size]&0xC0 == 0x80 {
			size++
		}
		out.WriteString(rest[:size])
		rest = rest[size:]
	}
	return out.String()
}

// otherNames are what formulas call a variable beside its symbol.
var otherNames = map[string][]string{"w": {"w0"}, "N60": {"N"}, "su": {"su(mob)"}}

// continues tells whether a name only looks like one, as part of a longer word.
func continues(before, after string) bool {
	letter := func(c byte) bool {
		return c >= 'a' && c <= 'z' || c >= 'A' && c <= 'Z' || c >= '0' && c <= '9' || c >= 0x80
	}
	// The middle dot and the minus sign are letters of no word.
	if strings.HasPrefix(after, "·") || strings.HasPrefix(after, "−") || strings.HasPrefix(after, "²") || strings.HasPrefix(after, "³") {
		after = ""
	}
	if strings.HasSuffix(before, "·") || strings.HasSuffix(before, "−") || strings.HasSuffix(before, "√") {
		before = ""
	}
	return after != "" && letter(after[0]) || before != "" && letter(before[len(before)-1])
}
