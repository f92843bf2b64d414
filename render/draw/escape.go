package draw

import (
	"strings"
	"unicode"
	"unicode/utf8"
)

// Clean makes any text fit to be drawn on one line: line breaks and tabs become
// blanks, runs of blanks become one, and characters that XML forbids or that
// steer the direction of the text around them are dropped or shown as U+FFFD.
func Clean(s string) string {
	plain := true
	for i := 0; i < len(s) && plain; i++ {
		plain = s[i] > ' ' && s[i] < 0x7f || s[i] == ' ' && i > 0 && i+1 < len(s) && s[i+1] != ' '
	}
	if plain {
		return s
	}
	var b strings.Builder
	blank := false
	for _, r := range s {
		switch {
		case unicode.IsSpace(r) && r != noBreakSpace:
			blank = b.Len() > 0
			continue
		case steersText(r):
			continue
		case r == utf8.RuneError, !allowedInXML(r):
			r = utf8.RuneError
		}
		if blank {
			b.WriteByte(' ')
			blank = false
		}
		b.WriteRune(r)
	}
	return b.String()
}

const noBreakSpace = 0xa0

// steersText reports whether r is a mark that has no width but turns or hides
// what follows it.
func steersText(r rune) bool {
	return r >= 0x200b && r <= 0x200f || r >= 0x202a && r <= 0x202e ||
		r >= 0x2060 && r <= 0x206f || r == 0xfeff || r == 0x061c || r == 0xad
}

// allowedInXML is the Char production of XML 1.0, less the control characters
// that are allowed but not wanted.
func allowedInXML(r rune) bool {
	return r >= 0x20 && r < 0x7f || r >= 0xa0 && r <= 0xd7ff ||
		r >= 0xe000 && r <= 0xfffd || r >= 0x10000 && r <= 0x10ffff
}

var escaper = strings.NewReplacer("&", "&amp;", "<", "&lt;", ">", "&gt;", `"`, "&#34;", "'", "&#39;")

// escape makes text safe between tags.
func escape(s string) string { return escaper.Replace(s) }

// clip cleans a text and cuts it to a length that a reader of titles can bear.
func clip(s string) string {
	const most = 600
	s = Clean(s)
	if utf8.RuneCountInString(s) <= most {
		return s
	}
	return string([]rune(s)[:most-1]) + "…"
}
