package intake

import "fmt"

// searched is how many lines a title above the table may take.
const searched = 20

// findHeader looks for the header further down where the first line is none. A
// title above a table is reported once, and the table beneath it is read, so that
// its own problems are told in the same run.
func (rd *reader) findHeader(g *grid, specs []spec, v vocabulary) {
	complete := func(r gridRow) bool {
		have := map[int]bool{}
		for i, h := range trimRight(r.fields) {
			have[v.bindField(h, i+1).spec] = true
		}
		for i, s := range specs {
			if s.required && !have[i] {
				return false
			}
		}
		return true
	}
	if complete(g.header) {
		return
	}
	for i, r := range g.rows[:min(len(g.rows), searched)] {
		if complete(r) {
			rd.add(Problem{File: g.file, Line: g.header.line, Name: string(g.table),
				Message: fmt.Sprintf("the header stands in line %d, beneath %d others", r.line, i+1), Wanted: "the header first, and nothing above it"})
			g.header, g.rows = r, g.rows[i+1:]
			return
		}
	}
}

// takeUnitRow takes a row of units off the top of the grid and returns it.
func takeUnitRow(g *grid, specs []spec, fields []field) *gridRow {
	if len(g.rows) == 0 {
		return nil
	}
	first := g.rows[0]
	found := false
	for i, f := range fields {
		text := clean(first.field(i))
		isUnit := false
		if text != "" {
			_, isUnit = unitElsewhere(text)
		}
		if f.spec >= 0 && specs[f.spec].kind == numberColumn {
			if scan(text).kind == aNumber {
				return nil
			}
			found = found || isUnit && text != "-"
			continue
		}
		if text != "" && text != "-" && !isUnit && key(text) != "unit" && key(text) != "units" {
			return nil
		}
	}
	if !found {
		return nil
	}
	g.rows = g.rows[1:]
	return &first
}
