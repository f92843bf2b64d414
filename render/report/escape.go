package report

import (
	"bytes"
	"strings"
	"unicode"
)

// visible replaces marks that change the direction of a line or that XML does
// not allow, so that text from a table cannot rearrange what stands beside it.
func visible(s string) string {
	return strings.Map(func(r rune) rune {
		switch {
		case unicode.Is(unicode.Bidi_Control, r), r == 0xFFFE, r == 0xFFFF:
			return '\uFFFD'
		case unicode.IsControl(r) && r != '\n' && r != '\t':
			return '\uFFFD'
		}
		return r
	}, s)
}

// inline returns a drawing without its XML declaration and comments before the
// root element, as a page wants it.
func inline(svg []byte) []byte {
	if i := bytes.Index(svg, []byte("<svg")); i >= 0 {
		return svg[i:]
	}
	return svg
}

// runningFoot returns the rule that prints the document number, revision and
// page number at the foot of every page.
func runningFoot(running string) string {
	return "@page{@bottom-left{content:" + cssString(running) + "}}\n"
}

// cssString quotes text for a style sheet: everything but letters, digits and
// spaces is written by its code.
func cssString(s string) string {
	var b strings.Builder
	b.WriteByte('"')
	for _, r := range visible(s) {
		switch {
		case r >= 'a' && r <= 'z', r >= 'A' && r <= 'Z', r >= '0' && r <= '9', r == ' ', r == '-', r == '.':
			b.WriteRune(r)
		default:
			b.WriteString(`\` + strings.ToUpper(hex(r)) + " ")
		}
	}
	b.WriteByte('"')
	return b.String()
}

func hex(r rune) string {
	const digits = "0123456789abcdef"
	if r < 16 {
		return string(digits[r])
	}
	return hex(r/16) + string(digits[r%16])
}
