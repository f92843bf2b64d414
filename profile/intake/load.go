package intake

import (
	"github.com/gocarina/gocsv"

	"pastload/profile"
)

// A record is a row as it comes out of the CSV layer: the text of every field
// beside the column it belongs to. Nothing is converted there, so nothing can be
// guessed there.
type record struct {
	Cells []string
}

// UnmarshalCSVWithFields keeps the text of one field. It never fails: cells are
// checked afterwards, all of them, where their positions are known.
func (r *record) UnmarshalCSVWithFields(_, text string) error {
	r.Cells = append(r.Cells, text)
	return nil
}

// tableReader hands a grid to gocsv under canonical column names, every row cut
// to the width of the header.
type tableReader struct {
	titles []string
	rows   []gridRow
}

// GetCSVRows returns the titles and all rows. Wider rows would make gocsv read
// beyond its header.
func (t tableReader) GetCSVRows() ([][]string, error) {
	out := make([][]string, 0, len(t.rows)+1)
	out = append(out, t.titles)
	for _, r := range t.rows {
		out = append(out, r.fields[:min(len(r.fields), len(t.titles))])
	}
	return out, nil
}

// A table is a grid whose columns are known and whose cells are read.
type table[T any] struct {
	rd     *reader
	grid   *grid
	specs  []spec
	fields []field
	index  map[string]int // canonical name → field, 0 is the first
	rows   []row[T]
	sound  bool // no required column is missing
	mark   byte // the decimal mark of the file
}

// A row is a value and where it stands.
type row[T any] struct {
	Value T
	at    gridRow
}

// has tells whether the table has the column.
func (t *table[T]) has(name string) bool {
	if t == nil {
		return false
	}
	_, ok := t.index[name]
	return ok
}

// problem reports what is wrong in a cell of a row, or in the row where the
// table has no such column.
func (t *table[T]) problem(r row[T], name, message, wanted string) {
	p := Problem{File: t.grid.file, Line: r.at.line, Name: name, Message: message, Wanted: wanted}
	if i, ok := t.index[name]; ok {
		p.Line, p.Column = r.at.lineOf(i), i+1
	}
	t.rd.add(p)
}

// cell returns the position of a cell, or of the row's beginning.
func (t *table[T]) cell(r row[T], name string) *profile.Cell {
	c := &profile.Cell{File: t.grid.file, Line: r.at.line, Column: 1}
	if i, ok := t.index[name]; ok {
		c.Line, c.Column, c.Text, c.Unit = r.at.lineOf(i), i+1, r.at.field(i), t.fields[i].unitText
	}
	return c
}

// note remarks on a cell without making it a problem.
func (t *table[T]) note(r row[T], name, message string) {
	t.rd.note(t.cell(r, name).String(), message)
}

// load reads a grid into rows of T. It returns nil where there is no such table.
func load[T any](rd *reader, g *grid, columns []column[T]) *table[T] {
	if g == nil {
		return nil
	}
	t := &table[T]{rd: rd, grid: g, specs: specs(columns)}
	t.fields, t.index, t.sound = rd.bind(g, t.specs)
	titles := make([]string, len(t.fields))
	for i, f := range t.fields {
		titles[i] = f.header
		if f.spec >= 0 {
			titles[i] = t.specs[f.spec].name
		}
	}
	rd.countRows(g)
	rows := rd.checkWidths(g, t.fields)
	var records []record
	if err := gocsv.UnmarshalDecoder(tableReader{titles, rows}, &records); err != nil {
		rd.add(Problem{File: g.file, Name: string(g.table), Message: err.Error(), Wanted: "a readable table"})
		return t
	}
	mark, told := rd.decimalMark(g, t.specs, t.fields, rows)
	t.mark = mark
	t.rows = make([]row[T], len(records))
	cells := make([]profile.Cell, 0, len(records)*len(t.fields))
	for i, rec := range records {
		t.rows[i].at = rows[i]
		for j, f := range t.fields {
			if f.spec < 0 || !f.known {
				continue // reported with the header
			}
			text := ""
			if j < len(rec.Cells) {
				text = rec.Cells[j]
			}
			cells = append(cells, profile.Cell{File: g.file, Line: rows[i].lineOf(j), Column: j + 1, Text: text, Unit: f.unitText})
			if told[place{cells[len(cells)-1].Line, j + 1}] {
				continue
			}
			fill(rd, g, columns[f.spec], f, t.mark, &cells[len(cells)-1], &t.rows[i].Value)
		}
	}
	return t
}

// fill puts one cell into the row.
func fill[T any](rd *reader, g *grid, c column[T], f field, mark byte, cell *profile.Cell, to *T) {
	report := func(message, wanted string) {
		rd.add(Problem{File: cell.File, Line: cell.Line, Column: cell.Column, Name: c.name, Message: message, Wanted: wanted})
	}
	if c.kind != numberColumn {
		text := clean(cell.Text)
		if blankText(text) {
			text = ""
		}
		if c.kind == dateColumn && g.sheet {
			text = serialDate(text, g.date1904)
		}
		if c.required && text == "" {
			report("blank", "a value in every row")
		}
		*c.text(to) = text
		return
	}
	n, base, np, message := readNumber(c.spec, f, mark, cell)
	if message != "" {
		report(message, c.wanted(f))
		return
	}
	if np {
		*c.flag(to) = true
		return
	}
	if c.required && !n.Known {
		report("blank", c.wanted(f))
		return
	}
	for _, v := range []profile.Number{n, base} {
		if message, hint := c.outside(v, f); message != "" {
			report(message, hint)
			return
		}
	}
	*c.number(to) = n
	if base.Known {
		*c.base(to) = base
	}
}
