package intake

import "strings"

// clean trims a cell and folds the blanks and signs that spreadsheets and word
// processors leave behind.
func clean(s string) string {
	if isPlain(s) {
		return s
	}
	s = strings.Map(func(r rune) rune {
		switch r {
		case '\u00a0', '\u202f', '\u2009', '\u2007', '\t', '\n', '\r':
			return ' '
		case '\u200b', '\ufeff', '\u200c', '\u200d':
			return -1
		}
		return r
	}, s)
	return strings.Join(strings.Fields(s), " ")
}

// isPlain spares the common case: printable ASCII without blanks.
func isPlain(s string) bool {
	for i := 0; i < len(s); i++ {
		if s[i] <= ' ' || s[i] >= 0x7f {
			return false
		}
	}
	return true
}

// missing tells whether the text is one of the ways to write "not measured".
func missing(s string) bool {
	switch s {
	case "", "-", "–", "—", "−", "--":
		return true
	}
	if len(s) > 12 {
		return false
	}
	switch strings.ToLower(s) {
	case "n/a", "na", "n.a.", "n/m", "n.m.", "nm", "not measured":
		return true
	}
	return false
}

// blankText tells whether a cell of words holds none. Here "NM" can be somebody's
// initials.
func blankText(s string) bool {
	switch s {
	case "", "-", "–", "—", "n/a", "N/A":
		return true
	}
	return false
}

// isErrorCell tells whether the text is what a spreadsheet shows for an error.
func isErrorCell(s string) bool {
	switch strings.ToUpper(s) {
	case "#N/A", "#DIV/0!", "#VALUE!", "#REF!", "#NAME?", "#NUM!", "#NULL!":
		return true
	}
	return false
}
