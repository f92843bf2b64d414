package intake

import (
	"encoding/csv"
	"errors"
	"fmt"
	"io"
	"strings"
	"unicode/utf8"

	"golang.org/x/text/encoding/charmap"
	"golang.org/x/text/encoding/unicode"
)

// How much of a table is read. A site investigation stays far below.
const (
	maxFileSize = 64 << 20 // bytes
	maxRows     = 200_000
	maxFields   = 500
	maxProblems = 20_000 // per file: beyond that nobody is helped
)

// A grid is a table before anything is known of its columns.
type grid struct {
	file     string
	table    Table
	header   gridRow
	rows     []gridRow
	point    bool // numbers are written with a decimal point whatever they look like
	sheet    bool // rows come from a workbook, dates may be serial numbers
	date1904 bool
}

// A gridRow is one row with the physical line of each field.
type gridRow struct {
	line   int
	lines  []int // of each field, only where the row spans several lines
	fields []string
}

// lineOf returns the line on which a field begins; 0 is the first field.
func (r gridRow) lineOf(i int) int {
	if i >= 0 && i < len(r.lines) {
		return r.lines[i]
	}
	return r.line
}

// field returns a field, or "" beyond the end of the row.
func (r gridRow) field(i int) string {
	if i < len(r.fields) {
		return r.fields[i]
	}
	return ""
}

// blank tells whether no field holds anything.
func (r gridRow) blank() bool {
	for _, f := range r.fields {
		if clean(f) != "" {
			return false
		}
	}
	return true
}

// decode turns the bytes of a file into text: by its byte-order mark, else as
// UTF-8 if it is valid, else as the Windows code page of western Europe.
func decode(data []byte) (text, encoding string, notes []string, err error) {
	switch {
	case len(data) >= 3 && data[0] == 0xef && data[1] == 0xbb && data[2] == 0xbf:
		data, encoding = data[3:], "UTF-8 with byte-order mark"
	case len(data) >= 2 && (data[0] == 0xff && data[1] == 0xfe || data[0] == 0xfe && data[1] == 0xff):
		out, err := unicode.UTF16(unicode.LittleEndian, unicode.ExpectBOM).NewDecoder().Bytes(data)
		if err != nil {
			return "", "", nil, errors.New("is not valid UTF-16")
		}
		data, encoding = out, "UTF-16"
	default:
		encoding = "UTF-8"
	}
	if !utf8.Valid(data) {
		out, err := charmap.Windows1252.NewDecoder().Bytes(data)
		if err != nil {
			return "", "", nil, errors.New("is neither UTF-8 nor Windows-1252 text")
		}
		data, encoding = out, "Windows-1252"
		notes = append(notes, "not valid UTF-8: read as Windows-1252; check letters with accents")
	}
	text = string(data)
	if strings.ContainsRune(text, 0) {
		return "", "", nil, errors.New("holds null characters, it is no text")
	}
	// Very old spreadsheets end lines with a carriage return alone.
	if !strings.Contains(text, "\n") {
		text = strings.ReplaceAll(text, "\r", "\n")
	}
	return text, encoding, notes, nil
}

// separator finds the delimiter: stated in a first line "sep=;", else the one
// whose count is most consistent over the first records, outside of quotes.
// skip is the number of characters of the first line when it is a "sep=" line.
func separator(text string) (comma rune, skip int) {
	first, _, _ := strings.Cut(text, "\n")
	line := strings.Trim(strings.TrimRight(first, "\r"), `"`)
	if after, ok := strings.CutPrefix(strings.ToLower(line), "sep="); ok {
		if r := []rune(after); len(r) == 1 && strings.ContainsRune(",;\t|", r[0]) {
			return r[0], min(len(first)+1, len(text))
		}
	}
	best, bestSame, bestCount := ',', 0, 0
	for _, c := range []rune{',', ';', '\t'} {
		counts := countOutsideQuotes(text, c, 50)
		if len(counts) == 0 || counts[0] == 0 {
			continue
		}
		same := 0
		for _, n := range counts {
			if n == counts[0] {
				same++
			}
		}
		if same > bestSame || same == bestSame && counts[0] > bestCount {
			best, bestSame, bestCount = c, same, counts[0]
		}
	}
	return best, 0
}

// countOutsideQuotes counts a delimiter in each of the first records that are
// not blank.
func countOutsideQuotes(text string, c rune, records int) []int {
	var counts []int
	inQuotes, n, any := false, 0, false
	for _, r := range text {
		switch {
		case r == '"':
			inQuotes, any = !inQuotes, true
		case r == '\n' && !inQuotes:
			if any {
				counts = append(counts, n)
			}
			if len(counts) == records {
				return counts
			}
			n, any = 0, false
		case r == c && !inQuotes:
			n, any = n+1, true
		case r != '\r' && r != ' ':
			any = true
		}
	}
	if any {
		counts = append(counts, n)
	}
	return counts
}

// parse reads the text of a CSV file into a grid. Faults of quoting are
// reported and the rest of the file is read on.
func (rd *reader) parse(file string, table Table, text string) *grid {
	g := &grid{file: file, table: table}
	comma, skip := separator(text)
	offset := 0
	if skip > 0 {
		text, offset = text[skip:], 1
	}
	r := csv.NewReader(strings.NewReader(text))
	r.Comma, r.FieldsPerRecord = comma, -1
	for {
		fields, err := r.Read()
		if err == io.EOF {
			return g
		}
		if err != nil {
			rd.add(quoteProblem(file, text, comma, err, offset))
			continue
		}
		if len(fields) > maxFields {
			line, _ := r.FieldPos(0)
			rd.add(Problem{File: file, Line: line + offset, Name: string(table),
				Message: fmt.Sprintf("a row of %d fields", len(fields)), Wanted: fmt.Sprintf("at most %d", maxFields)})
			return g
		}
		row := gridRow{fields: fields}
		start, _ := r.FieldPos(0)
		end, _ := r.FieldPos(len(fields) - 1)
		row.line = start + offset
		if end != start {
			row.lines = make([]int, len(fields))
			for i := range fields {
				line, _ := r.FieldPos(i)
				row.lines[i] = line + offset
			}
		}
		if !rd.take(g, row) {
			return g
		}
	}
}

// take adds a row to the grid: the first that is not blank is the header.
func (rd *reader) take(g *grid, row gridRow) bool {
	if row.blank() {
		return true
	}
	if g.header.fields == nil {
		g.header = row
		return true
	}
	if len(g.rows) == maxRows {
		rd.add(Problem{File: g.file, Line: row.line, Name: string(g.table),
			Message: fmt.Sprintf("more than %d rows", maxRows), Wanted: "a table of that many rows at most"})
		return false
	}
	g.rows = append(g.rows, row)
	return true
}

// nthLine returns a line of the text; 1 is the first.
func nthLine(text string, n int) string {
	for ; n > 1; n-- {
		_, text, _ = strings.Cut(text, "\n")
	}
	line, _, _ := strings.Cut(text, "\n")
	return line
}

// quoteProblem turns an error of the CSV reader into a problem.
func quoteProblem(file, text string, comma rune, err error, offset int) Problem {
	p := Problem{File: file, Name: "quotes", Message: err.Error(), Wanted: "a readable table"}
	var parse *csv.ParseError
	if !errors.As(err, &parse) {
		return p
	}
	p.Line, p.Column = parse.StartLine+offset, 1
	if parse.StartLine == parse.Line {
		// The library counts bytes; we count fields.
		line := nthLine(text, parse.Line)
		p.Column += strings.Count(line[:min(max(parse.Column-1, 0), len(line))], string(comma))
	}
	switch {
	case errors.Is(parse.Err, csv.ErrBareQuote):
		p.Message, p.Wanted = "a quotation mark inside a cell that is not quoted", `the cell in quotes and the mark doubled: "5"" pipe"`
	case errors.Is(parse.Err, csv.ErrQuote):
		p.Message, p.Wanted = "a quoted cell that is not closed, or text after its closing mark", "the cell in quotes and every mark in it doubled"
	}
	return p
}
