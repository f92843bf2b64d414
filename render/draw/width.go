package draw

import (
	"strings"
	"unicode"
)

// A widthRange holds the advance widths of consecutive characters.
type widthRange struct {
	first         rune
	regular, bold []uint16
}

// unitsPerEm is what the widths of the table are parts of.
const unitsPerEm = 2048

// advance returns the width of a text set at size 1.
func advance(s string, bold bool) float64 {
	sum := 0
	for _, r := range s {
		sum += runeWidth(r, bold)
	}
	return float64(sum) / unitsPerEm
}

// runeWidth returns the advance width of a character. One that the table does
// not have is set by another font: the full square for the wide scripts, and
// a wide letter for the rest, so that a box is rather too large than too small.
func runeWidth(r rune, bold bool) int {
	for i := range widthRanges {
		t := &widthRanges[i]
		if k := int(r - t.first); r >= t.first && k < len(t.regular) {
			w := t.regular[k]
			if bold {
				w = t.bold[k]
			}
			if w > 0 {
				return int(w)
			}
		}
	}
	switch {
	case unicode.Is(unicode.Mn, r):
		return 0
	case r >= 0x1100:
		return unitsPerEm
	}
	return unitsPerEm * 7 / 10
}

// Fit returns the text cut to a width in mm, with an ellipsis where it was cut.
func (f Font) Fit(s string, width float64) string {
	s = Clean(s)
	size := f.Size * PointMM
	if len(s) < 400 && size*advance(s, f.Bold) <= width {
		return s
	}
	room := width - size*advance("…", f.Bold)
	used := 0.0
	for i, r := range s {
		used += size * float64(runeWidth(r, f.Bold)) / unitsPerEm
		if used > room {
			return strings.TrimRight(s[:i], " ,;:") + "…"
		}
	}
	return s
}

// Wrap breaks a text into at most so many lines of a width in mm. It breaks at
// blanks and after hyphens and slashes; a word that is wider than the line is
// cut; the last line ends in an ellipsis where the text goes on.
func (f Font) Wrap(s string, width float64, most int) []string {
	s = Clean(s)
	size := f.Size * PointMM
	var lines []string
	for s != "" && len(lines) < most {
		if len(lines) == most-1 {
			return append(lines, f.Fit(s, width))
		}
		used, cut, whole := 0.0, 0, true
		for i, r := range s {
			used += size * float64(runeWidth(r, f.Bold)) / unitsPerEm
			if used > width && i > 0 && r != ' ' {
				if cut == 0 {
					cut = i
				}
				whole = false
				break
			}
			switch r {
			case ' ':
				cut = i
			case '-', '/', '–', ',':
				if used <= width {
					cut = i + len(string(r))
				}
			}
		}
		if whole {
			return append(lines, s)
		}
		lines = append(lines, strings.TrimRight(s[:cut], " "))
		s = strings.TrimLeft(s[cut:], " ")
	}
	return lines
}
