package review

import (
	"bytes"
	"encoding/csv"
	"errors"
	"fmt"
	"strconv"
	"strings"

	"pastload/profile"
)

var (
	// ErrDecided says that the same value has been decided on before.
	ErrDecided = errors.New("already decided")

	// ErrIncomplete says that a decision lacks what makes it one.
	ErrIncomplete = errors.New("incomplete decision")
)

// decisionHeader is the header of a new table of decisions.
var decisionHeader = []string{"borehole", "depth (m)", "specimen", "quantity", "decision", "value", "value seen", "reason", "by", "date"}

// Record returns the text of a decisions table with one decision more. All that
// stands in the table already is kept byte for byte: order of columns, separator,
// decimal mark, line ends, byte-order mark, and columns that are not ours. An
// empty table gets its header.
//
// A decision needs a quantity, a decision, a reason, initials and a date, a place,
// and a value where one is adopted; else the error wraps ErrIncomplete. Where the
// same borehole, depth, specimen and quantity have been decided on, the error
// wraps ErrDecided and names the line: it is for the engineer to change it there.
// A table whose header lacks a column that the decision needs is an error too.
//
// The caller locks the file and puts the result in its place at once.
func Record(decisions []byte, d profile.Decision) ([]byte, error) {
	if err := complete(&d); err != nil {
		return nil, err
	}
	bom, text := []byte(nil), decisions
	if bytes.HasPrefix(text, []byte("\ufeff")) {
		bom, text = text[:3], text[3:]
	}
	if len(bytes.TrimSpace(text)) == 0 {
		return append(append(bom, strings.Join(decisionHeader, ",")+"\n"...), line(decisionHeader, &d, style{comma: ',', end: "\n"})...), nil
	}
	look := styleOf(text)
	rows, err := look.parse(text)
	if err != nil {
		return nil, fmt.Errorf("decisions: %w", err)
	}
	header := rows[0].fields
	if missing := lacking(header, &d); missing != "" {
		return nil, fmt.Errorf("decisions:1: no column %q; want it in the header to record this decision", missing)
	}
	for _, r := range rows[1:] {
		if r.about(header, &d) {
			return nil, fmt.Errorf("%w: decisions:%d is about the same %s; change it there", ErrDecided, r.line, d.Quantity)
		}
	}
	out := bytes.Clone(decisions)
	if !bytes.HasSuffix(out, []byte("\n")) {
		out = append(out, look.end...)
	}
	return append(out, line(header, &d, look)...), nil
}

// complete reports what a decision lacks.
func complete(d *profile.Decision) error {
	var lacks []string
	for _, x := range []struct{ value, name string }{{d.Quantity, "quantity"}, {d.Decision, "decision"}, {d.Reason, "reason"}, {d.By, "initials (by)"}, {d.Date, "date"}} {
		if strings.TrimSpace(x.value) == "" {
			lacks = append(lacks, x.name)
		}
	}
	if d.Borehole == "" && d.Specimen == "" {
		lacks = append(lacks, "borehole or specimen")
	}
	if d.Decision == profile.AdoptValue && !d.Value.Known {
		lacks = append(lacks, "value to adopt")
	}
	if len(lacks) > 0 {
		return fmt.Errorf("%w: no %s", ErrIncomplete, strings.Join(lacks, ", "))
	}
	switch d.Decision {
	case profile.LeaveOut, profile.Keep, profile.AdoptValue:
		return nil
	}
	return fmt.Errorf("%w: %q is not a decision; want %s, %s or %s", ErrIncomplete, d.Decision, profile.LeaveOut, profile.Keep, profile.AdoptValue)
}

// A style is how a table is written.
type style struct {
	comma        rune
	end          string
	decimalComma bool
}

// styleOf reads the style of a table from its header line and its numbers.
func styleOf(text []byte) style {
	s := style{comma: ',', end: "\n"}
	first, _, _ := bytes.Cut(text, []byte("\n"))
	if bytes.HasSuffix(first, []byte("\r")) {
		s.end = "\r\n"
	}
	for _, c := range []rune{';', '\t'} {
		if bytes.Count(first, []byte(string(c))) > bytes.Count(first, []byte(string(s.comma))) {
			s.comma = c
		}
	}
	if s.comma == ',' {
		return s
	}
	rows, err := s.parse(text)
	if err != nil || len(rows) == 0 {
		return s
	}
	for _, r := range rows[1:] {
		for i, f := range r.fields {
			if i < len(rows[0].fields) && isNumeric(rows[0].fields[i]) && strings.Contains(f, ",") {
				s.decimalComma = true
			}
		}
	}
	return s
}

// A record is a row of a table with its line.
type record struct {
	line   int
	fields []string
}

func (s style) parse(text []byte) ([]record, error) {
	r := csv.NewReader(bytes.NewReader(text))
	r.Comma, r.FieldsPerRecord, r.LazyQuotes = s.comma, -1, false
	var out []record
	for {
		fields, err := r.Read()
		if len(fields) > 0 {
			at, _ := r.FieldPos(0)
			out = append(out, record{at, fields})
		}
		if err != nil {
			if len(out) == 0 {
				return nil, errors.New("no header")
			}
			if err.Error() == "EOF" {
				return out, nil
			}
			return nil, err
		}
	}
}

// column folds a header to the name of our column, "" for others.
func column(header string) string {
	name, _, _ := strings.Cut(strings.ToLower(header), "(")
	name, _, _ = strings.Cut(name, "[")
	name = strings.Join(strings.Fields(strings.ReplaceAll(name, "_", " ")), " ")
	switch name {
	case "depth m", "depth":
		return "depth"
	case "parameter":
		return "quantity"
	case "action":
		return "decision"
	case "adopted value", "adopt":
		return "value"
	case "seen", "seen value", "value when decided":
		return "value seen"
	case "why", "because":
		return "reason"
	case "decided by", "engineer":
		return "by"
	case "decided on", "day":
		return "date"
	case "hole", "bore", "borehole id", "location":
		return "borehole"
	case "sample", "specimen id":
		return "specimen"
	}
	return name
}

func isNumeric(header string) bool {
	c := column(header)
	return c == "depth" || c == "value" || c == "value seen"
}

// cells returns what a decision writes into each column.
func decisionCells(d *profile.Decision, decimalComma bool) map[string]string {
	num := func(n profile.Number) string {
		if !n.Known {
			return ""
		}
		s := strconv.FormatFloat(n.Value, 'f', -1, 64)
		if decimalComma {
			s = strings.Replace(s, ".", ",", 1)
		}
		return s
	}
	return map[string]string{
		"borehole": d.Borehole, "depth": num(d.Depth), "specimen": d.Specimen, "quantity": d.Quantity, "decision": d.Decision,
		"value": num(d.Value), "value seen": num(d.Seen), "reason": d.Reason, "by": d.By, "date": d.Date,
	}
}

// lacking returns the first column that a decision needs and the header has not.
func lacking(header []string, d *profile.Decision) string {
	has := map[string]bool{}
	for _, h := range header {
		has[column(h)] = true
	}
	cells := decisionCells(d, false)
	for _, h := range decisionHeader {
		if name := column(h); cells[name] != "" && !has[name] {
			return h
		}
	}
	return ""
}

// about tells whether a row is about the same value.
func (r record) about(header []string, d *profile.Decision) bool {
	have := map[string]string{}
	for i, h := range header {
		if i < len(r.fields) {
			have[column(h)] = strings.TrimSpace(r.fields[i])
		}
	}
	depth, known := plainNumber(have["depth"])
	sameDepth := known == d.Depth.Known && (!known || depth-d.Depth.Value < 0.005 && d.Depth.Value-depth < 0.005)
	return sameDepth && strings.EqualFold(have["borehole"], d.Borehole) && strings.EqualFold(have["specimen"], d.Specimen) && strings.EqualFold(have["quantity"], d.Quantity)
}

// line writes a decision in the columns of a header.
func line(header []string, d *profile.Decision, s style) []byte {
	cells := decisionCells(d, s.decimalComma)
	fields := make([]string, len(header))
	for i, h := range header {
		// A line break in a reason would look like a row of its own.
		fields[i] = strings.Join(strings.Fields(cells[column(h)]), " ")
	}
	var b bytes.Buffer
	w := csv.NewWriter(&b)
	w.Comma, w.UseCRLF = s.comma, s.end == "\r\n"
	if err := w.Write(fields); err != nil {
		panic("review: " + err.Error()) // a buffer does not fail and the separator is ours
	}
	w.Flush()
	return b.Bytes()
}
