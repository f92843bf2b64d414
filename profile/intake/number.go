package intake

import (
	"math"
	"strconv"
	"strings"

	"pastload/profile"
)

// What a cell of a number column can hold.
type cellKind int

const (
	notMeasured cellKind = iota
	aNumber
	nonPlastic
	notANumber
)

// A token is a cell taken apart: bound, mark of assumption and digits. What the
// digits are worth depends on the decimal mark of the file.
type token struct {
	kind    cellKind
	bound   profile.Bound
	assumed bool
	sign    string
	digits  string // mantissa with its marks, as typed
	power   string // "e-5" or ""
	percent bool   // a percent sign followed the number
	why     string // for notANumber: what is wrong, after the quoted text
}

// scan takes the text of a cell apart.
func scan(text string) token {
	s := clean(text)
	if missing(s) {
		return token{kind: notMeasured}
	}
	if strings.EqualFold(s, "NP") {
		return token{kind: nonPlastic}
	}
	if isErrorCell(s) {
		return token{kind: notANumber, why: "is an error value of a spreadsheet"}
	}
	t := token{kind: aNumber}
	rest := s
	if after, ok := strings.CutPrefix(rest, "#"); ok {
		t.assumed, rest = true, strings.TrimSpace(after)
	}
	for _, p := range []struct {
		prefix string
		bound  profile.Bound
	}{{"<=", profile.AtMost}, {">=", profile.AtLeast}, {"≤", profile.AtMost}, {"≥", profile.AtLeast}, {"<", profile.AtMost}, {">", profile.AtLeast}} {
		if after, ok := strings.CutPrefix(rest, p.prefix); ok {
			t.bound, rest = p.bound, strings.TrimSpace(after)
			break
		}
	}
	switch {
	case strings.HasPrefix(rest, "-"):
		t.sign, rest = "-", rest[1:]
	case strings.HasPrefix(rest, "−"):
		t.sign, rest = "-", rest[len("−"):]
	case strings.HasPrefix(rest, "+"):
		rest = rest[1:]
	case strings.HasPrefix(rest, "–") || strings.HasPrefix(rest, "—"):
		return token{kind: notANumber, why: "begins with a dash that is not a minus sign"}
	}
	if after, ok := strings.CutSuffix(rest, "%"); ok {
		t.percent, rest = true, strings.TrimSpace(after)
	}
	t.digits, t.power, rest = mantissa(rest)
	if t.digits == "" {
		return token{kind: notANumber, why: "is not a number"}
	}
	if rest != "" {
		return token{kind: notANumber, why: tail(rest)}
	}
	return t
}

// tail names what follows a number that should have stood alone.
func tail(rest string) string {
	first := []rune(strings.TrimSpace(rest))[0]
	switch {
	case strings.ContainsRune("*†‡§¹²³?!()[]", first) && len([]rune(rest)) < 40:
		return "carries a note mark"
	case strings.ContainsRune("-–—−", first) || strings.HasPrefix(strings.TrimSpace(rest), "to "):
		return "is a range"
	case strings.ContainsRune("0123456789.,", first):
		return "is not a number"
	}
	return "has text after the number"
}

// mantissa splits off the leading digits with their marks, an exponent, and
// what is left over.
func mantissa(s string) (digits, power, rest string) {
	i := 0
	for i < len(s) {
		c := s[i]
		if c >= '0' && c <= '9' || c == '.' || c == ',' {
			i++
			continue
		}
		// A blank or an apostrophe belongs to the number only between digits.
		if (c == ' ' || c == '\'') && i > 0 && i+1 < len(s) && isDigit(s[i-1]) && isDigit(s[i+1]) {
			i++
			continue
		}
		break
	}
	digits, rest = s[:i], s[i:]
	if !strings.ContainsAny(digits, "0123456789") {
		return "", "", s
	}
	if len(rest) > 1 && (rest[0] == 'e' || rest[0] == 'E') {
		j := 1
		if rest[j] == '+' || rest[j] == '-' {
			j++
		}
		k := j
		for k < len(rest) && isDigit(rest[k]) {
			k++
		}
		if k > j {
			return digits, "e" + rest[1:k], rest[k:]
		}
	}
	return digits, "", rest
}

func isDigit(c byte) bool { return c >= '0' && c <= '9' }

// under reads the digits with a decimal mark, '.' or ','. The other mark, a
// blank or an apostrophe may part groups of three before it.
func under(digits string, decimal byte) (string, bool) {
	whole, fraction, hasMark := strings.Cut(digits, string(decimal))
	for i := 0; i < len(fraction); i++ {
		if !isDigit(fraction[i]) {
			return "", false
		}
	}
	i := strings.IndexAny(whole, "., '")
	if i < 0 {
		if whole == "" && fraction == "" {
			return "", false
		}
		if hasMark {
			return whole + "." + fraction, true
		}
		return whole, true
	}
	groups := strings.Split(whole, string(whole[i]))
	if first := groups[0]; first == "" || len(first) > 3 || first[0] == '0' {
		return "", false
	}
	for _, g := range groups[1:] {
		if len(g) != 3 || strings.ContainsAny(g, "., '") {
			return "", false
		}
	}
	joined := strings.Join(groups, "")
	if hasMark {
		joined += "." + fraction
	}
	return joined, true
}

// value reads the token with a decimal mark. It refuses what no finite float64
// holds.
func (t token) value(decimal byte) (float64, bool) {
	s, ok := under(t.digits, decimal)
	if !ok {
		return 0, false
	}
	v, err := strconv.ParseFloat(t.sign+s+t.power, 64)
	if err != nil || math.IsInf(v, 0) || math.IsNaN(v) {
		return 0, false
	}
	return v + 0, true
}

// depthRange takes "4.00–4.45" or "4.00 to 4.45" apart.
func depthRange(text string) (top, base token, ok bool) {
	s := clean(text)
	if len(s) < 3 {
		return token{}, token{}, false
	}
	for _, mark := range []string{"–", "—", " to ", "−", "-"} {
		// The first character cannot part two numbers: it may be a sign.
		i := strings.Index(s[1:], mark)
		if i < 0 {
			continue
		}
		top, base = scan(s[:1+i]), scan(s[1+i+len(mark):])
		if top.kind == aNumber && base.kind == aNumber && top.bound == profile.Exact && base.bound == profile.Exact {
			return top, base, true
		}
	}
	return token{}, token{}, false
}
