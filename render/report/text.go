package report

import (
	"bufio"
	"encoding/csv"
	"io"
	"strings"
	"unicode"
	"unicode/utf8"
)

// WriteText writes the table for a terminal: aligned columns, numbers to the
// right, at least two spaces between them.
func (t *Table) WriteText(w io.Writer, u Units) error {
	b := bufio.NewWriter(w)
	if t.Title != "" {
		b.WriteString(t.Title + "\n")
	}
	rows := make([][]string, 0, len(t.Rows)+1)
	head := make([]string, len(t.Columns))
	for i, c := range t.Columns {
		head[i] = c.Heading(u)
	}
	rows = append(rows, head)
	for _, r := range t.Rows {
		line := make([]string, len(t.Columns))
		for i, c := range t.Columns {
			line[i] = printable(c.Format(r[i], u))
		}
		rows = append(rows, line)
	}
	width := make([]int, len(t.Columns))
	for _, r := range rows {
		for i, s := range r {
			width[i] = max(width[i], utf8.RuneCountInString(s))
		}
	}
	if strings.Join(head, "") == "" {
		rows = rows[1:] // a table of properties has no headings
	}
	for n, r := range rows {
		var line strings.Builder
		for i, s := range r {
			if i > 0 {
				line.WriteString("  ")
			}
			pad := strings.Repeat(" ", width[i]-utf8.RuneCountInString(s))
			if t.Columns[i].numeric() {
				line.WriteString(pad + s)
			} else {
				line.WriteString(s + pad)
			}
		}
		b.WriteString(strings.TrimRight(line.String(), " ") + "\n")
		if n == 0 && len(rows) > len(t.Rows) {
			total := 0
			for _, w := range width {
				total += w + 2
			}
			b.WriteString(strings.Repeat("-", max(0, total-2)) + "\n")
		}
	}
	if t.Note != "" {
		b.WriteString(t.Note + "\n")
	}
	return b.Flush()
}

// printable replaces control characters, which a terminal would obey, and the
// marks that change the direction of a line.
func printable(s string) string {
	return strings.Map(func(r rune) rune {
		if unicode.IsControl(r) || unicode.Is(unicode.Bidi_Control, r) {
			return '\uFFFD'
		}
		return r
	}, s)
}

// WriteCSV writes the table as CSV with LF line ends: machine headings that end
// in the unit, numbers to the column's decimals, and text that a spreadsheet
// would take for a formula set off by an apostrophe.
func (t *Table) WriteCSV(w io.Writer, u Units) error {
	c := csv.NewWriter(w)
	line := make([]string, len(t.Columns))
	for i, col := range t.Columns {
		line[i] = col.Header(u)
	}
	if err := c.Write(line); err != nil {
		return err
	}
	for _, r := range t.Rows {
		for i, col := range t.Columns {
			line[i] = col.Format(r[i], u)
			if !r[i].Known {
				line[i] = harmless(line[i])
			}
		}
		if err := c.Write(line); err != nil {
			return err
		}
	}
	c.Flush()
	return c.Error()
}

// harmless keeps a text cell from being read as a formula by a spreadsheet.
func harmless(s string) string {
	if s != "" && strings.ContainsRune("=+-@\t\r", rune(s[0])) {
		return "'" + s
	}
	return s
}
