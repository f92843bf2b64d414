package intake

import (
	"fmt"
	"slices"
	"strconv"
	"strings"
)

// bind matches the header of a grid with the columns of its table and reports
// what is missing, repeated, unknown or without a unit. A row of units beneath
// the header is taken off the grid.
func (rd *reader) bind(g *grid, specs []spec) (fields []field, index map[string]int, sound bool) {
	v := newVocabulary(specs)
	index = map[string]int{}
	rd.findHeader(g, specs, v)
	header := g.header
	report := func(i int, name, message, wanted string) {
		rd.add(Problem{File: g.file, Line: header.lineOf(i), Column: i + 1, Name: name, Message: message, Wanted: wanted})
	}
	for i, h := range trimRight(header.fields) {
		f := v.bindField(h, i+1)
		if f.header == "CR" {
			report(i, "CR", "can be the recompression index Cr or the compression ratio Cc/(1 + e0)", `"recompression index", or the compression index "Cc"`)
			f.spec = -1
		} else if f.spec < 0 {
			rd.unknownColumn(g, i, f, specs)
		}
		if f.spec >= 0 {
			name := specs[f.spec].name
			if j, ok := index[name]; ok {
				report(i, name, fmt.Sprintf("column %q is given again, field %d holds it as %q", f.header, j+1, fields[j].header), "one column for each quantity")
				f.spec = -1
			} else {
				index[name] = i
			}
		}
		fields = append(fields, f)
	}
	units := takeUnitRow(g, specs, fields)
	for i := range fields {
		rd.bindUnit(g, specs, &fields[i], units)
	}
	sound = true
	for _, s := range specs {
		if _, ok := index[s.name]; s.required && !ok {
			sound = false
			message := "no such column"
			for _, f := range fields {
				if f.spec < 0 && f.header != "" && slices.Contains(nearSpecs(bare(f.header), specs), s.name) {
					message += fmt.Sprintf("; %q of field %d is near it", f.header, f.place)
				}
			}
			rd.add(Problem{File: g.file, Line: max(header.line, 1), Name: s.name, Message: message, Wanted: fmt.Sprintf("a column %q", s.title())})
		}
	}
	return fields, index, sound
}

// trimRight drops the empty fields that spreadsheets leave at the end.
func trimRight(fields []string) []string {
	n := len(fields)
	for n > 0 && clean(fields[n-1]) == "" {
		n--
	}
	return fields[:n]
}

// unknownColumn notes a column that no quantity is known for.
func (rd *reader) unknownColumn(g *grid, i int, f field, specs []spec) {
	if f.header == "" {
		for _, r := range g.rows {
			if clean(r.field(i)) != "" {
				rd.add(Problem{File: g.file, Line: g.header.lineOf(i), Column: i + 1, Name: string(g.table),
					Message: "a column with values has no header", Wanted: "a header for each column"})
				return
			}
		}
		return
	}
	message := fmt.Sprintf("column %q is not known and was not used", f.header)
	if g.table == Results {
		message = fmt.Sprintf("column %q is not known: its cells are kept as typed and not used", f.header)
	}
	if strings.ContainsAny(f.header, "?\ufffd") {
		message += "; a letter was lost when the file was saved: write the name in words"
	} else if names := nearSpecs(bare(f.header), specs); len(names) > 0 {
		message += "; near it: " + quoted(names)
	}
	rd.note(fmt.Sprintf("%s:%d:%d", g.file, g.header.lineOf(i), i+1), message)
}

// bare returns a header without the unit in brackets.
func bare(header string) string {
	if s := splits(header); len(s) > 0 && s[0].sure {
		return s[0].name
	}
	return header
}

// nearSpecs returns the columns that a name may have meant.
func nearSpecs(typed string, specs []spec) []string {
	var all, out []string
	owner := map[string]string{}
	for _, s := range specs {
		for _, n := range s.names() {
			all = append(all, n)
			owner[n] = s.name
		}
	}
	seen := map[string]bool{}
	for _, n := range near(typed, all) {
		if name := owner[n]; !seen[name] {
			seen[name] = true
			out = append(out, name)
		}
	}
	return out
}

// bindUnit settles the unit of one field, from its header or the unit row.
func (rd *reader) bindUnit(g *grid, specs []spec, f *field, units *gridRow) {
	line, at := g.header.lineOf(f.place-1), "in the header"
	if units != nil {
		if text := clean(units.field(f.place - 1)); text != "" && key(text) != "unit" && key(text) != "units" {
			if f.unitText == "" {
				f.unitText, line, at = text, units.lineOf(f.place-1), "in the row of units"
			} else if unitKey(text) != unitKey(f.unitText) && f.spec >= 0 {
				rd.add(Problem{File: g.file, Line: units.lineOf(f.place - 1), Column: f.place, Name: specs[f.spec].name,
					Message: fmt.Sprintf("unit %q beneath a header that says %q", text, f.unitText), Wanted: "one unit"})
			}
		}
	}
	if f.spec < 0 {
		return
	}
	s := specs[f.spec]
	report := func(message, wanted string) {
		rd.add(Problem{File: g.file, Line: line, Column: f.place, Name: s.name, Message: message, Wanted: wanted})
	}
	switch {
	case s.kind != numberColumn:
		f.known = true
	case f.unitText == "" && !s.dim.needsUnit():
		f.unit, f.known = s.unit, true
	case f.unitText == "":
		report("no unit in the header", fmt.Sprintf("%q or another unit of %s: %s", s.title(), s.dim.name, s.dim.list()))
	default:
		u, ok := s.dim.find(f.unitText)
		if ok {
			f.unit, f.known = u, true
			rd.noteConversion(g, s, *f)
			return
		}
		if other, ok := unitElsewhere(f.unitText); ok {
			report(fmt.Sprintf("%q %s is a unit of %s", f.unitText, at, other), fmt.Sprintf("a unit of %s: %s", s.dim.name, s.dim.list()))
			return
		}
		report(fmt.Sprintf("%q %s is not a known unit", f.unitText, at), fmt.Sprintf("a unit of %s: %s", s.dim.name, s.dim.list()))
	}
}

// noteConversion records a factor that was applied to a whole column.
func (rd *reader) noteConversion(g *grid, s spec, f field) {
	if f.unit.factor == s.unit.factor {
		return
	}
	note := fmt.Sprintf("%s: %s × %s = %s", s.name, f.unit.name, strconv.FormatFloat(f.unit.factor/s.unit.factor, 'g', 10, 64), s.unit.name)
	if s.unit.name == "-" {
		note = strings.TrimSuffix(note, " = -")
	}
	if f.unit.note != "" {
		note += " (" + f.unit.note + ")"
	}
	rd.noteFile(g.file, note)
}

// checkWidths reports rows that are wider or narrower than the header: a row
// with too few fields has lost one, and nobody knows which.
func (rd *reader) checkWidths(g *grid, fields []field) []gridRow {
	width := len(fields)
	kept := g.rows[:0:0]
	for _, r := range g.rows {
		n := len(trimRight(r.fields))
		switch {
		case n > width:
			rd.add(Problem{File: g.file, Line: r.lineOf(width), Column: width + 1, Name: string(g.table),
				Message: fmt.Sprintf("%d fields under a header of %d", n, width),
				Wanted:  "one field for each column; a decimal comma between commas needs quotes"})
		case len(r.fields) < width && !g.sheet:
			rd.add(Problem{File: g.file, Line: r.line, Column: len(r.fields), Name: string(g.table),
				Message: fmt.Sprintf("%d fields under a header of %d", len(r.fields), width), Wanted: "one field for each column, blank where nothing was measured"})
		default:
			kept = append(kept, r)
		}
	}
	return kept
}
