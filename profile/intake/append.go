package intake

import (
	"bytes"
	"encoding/csv"
	"fmt"
	"slices"
	"strconv"
	"strings"

	"pastload/profile"
)

// AppendDecision returns the text of a decisions table with one row more. What
// the table holds is left as it is, byte for byte: its encoding, delimiter,
// decimal mark, column order and columns of its own. data may be a header alone.
//
// The error tells what keeps a row from being added: text that is not UTF-8, or
// no column for something that the decision says.
func AppendDecision(data []byte, d profile.Decision) ([]byte, error) {
	text, encoding, _, err := decode(data)
	switch {
	case err != nil:
		return nil, fmt.Errorf("the decisions table %w", err)
	case !strings.HasPrefix(encoding, "UTF-8"):
		return nil, fmt.Errorf("the decisions table is %s; save it as UTF-8 and record the decision again", encoding)
	}
	rd := &reader{}
	g := rd.parse("decisions.csv", Decisions, text)
	if len(rd.problems) > 0 {
		return nil, rd.problems.sorted()
	}
	comma, _ := separator(text)
	row, err := decisionFields(g, d, decimalMark(g, comma))
	if err != nil {
		return nil, err
	}
	var out bytes.Buffer
	out.Write(data)
	end := "\n"
	if bytes.Contains(data, []byte("\r\n")) {
		end = "\r\n"
	}
	if len(data) > 0 && !bytes.HasSuffix(data, []byte("\n")) {
		out.WriteString(end)
	}
	w := csv.NewWriter(&out)
	w.Comma, w.UseCRLF = comma, end == "\r\n"
	if err := w.Write(row); err != nil {
		return nil, err
	}
	w.Flush()
	return out.Bytes(), w.Error()
}

// decimalMark tells how numbers are to be written in a table: with a comma where
// fields are parted by something else and its numbers have one.
func decimalMark(g *grid, comma rune) string {
	if comma == ',' {
		return "."
	}
	for _, r := range g.rows {
		for _, f := range r.fields {
			whole, fraction, found := strings.Cut(strings.TrimSpace(f), ",")
			if _, err := strconv.Atoi(whole); found && err == nil {
				if _, err := strconv.Atoi(fraction); err == nil {
					return ","
				}
			}
		}
	}
	return "."
}

// decisionFields lays a decision out under the header of a table.
func decisionFields(g *grid, d profile.Decision, mark string) ([]string, error) {
	number := func(n profile.Number) string {
		if !n.Known {
			return ""
		}
		return strings.Replace(strconv.FormatFloat(n.Value, 'f', -1, 64), ".", mark, 1)
	}
	say := map[string]string{
		"borehole": d.Borehole, "depth": number(d.Depth), "specimen": d.Specimen, "quantity": d.Quantity, "decision": d.Decision,
		"value": number(d.Value), "value seen": number(d.Seen), "reason": d.Reason, "by": d.By, "date": d.Date,
	}
	row := make([]string, len(g.header.fields))
	for i, h := range g.header.fields {
		if name := decisionColumn(h); name != "" {
			row[i] = say[name]
			delete(say, name)
		}
	}
	var without []string
	for name, v := range say {
		if v != "" {
			without = append(without, name)
		}
	}
	if len(without) > 0 {
		slices.Sort(without)
		return nil, fmt.Errorf("the decisions table has no column for %s", strings.Join(without, ", "))
	}
	return row, nil
}

// decisionColumn returns the canonical name of a header cell, or "".
func decisionColumn(header string) string {
	names := []string{header}
	for _, s := range splits(header) {
		names = append(names, s.name)
	}
	for _, n := range names {
		for i := range decisionColumns {
			spec := &decisionColumns[i].spec
			for _, known := range spec.names() {
				if key(known) == key(n) {
					return spec.name
				}
			}
		}
	}
	return ""
}
