package intake

import (
	"fmt"
	"strings"
)

// A numeral is a number cell before its decimal mark is known.
type numeral struct {
	line, column int
	name, text   string
	digits       string
}

// A census counts what the number cells of one file say of its decimal mark.
type census struct {
	points, commas tally // can only be read with that mark
	dotted         tally // "1.234": a decimal point, unless the file uses commas
	grouped        tally // "1,234": could be either
}

// A tally is how many cells say something, and which: enough of them to report.
type tally struct {
	n     int
	cells []numeral
}

// maxTold is how many cells of one kind are worth reporting one by one.
const maxTold = 1000

func (t *tally) add(n numeral) {
	t.n++
	if len(t.cells) < maxTold {
		t.cells = append(t.cells, n)
	}
}

func (c *census) add(n numeral) {
	// Nearly every number has one point and not three digits after it.
	if i := strings.IndexByte(n.digits, '.'); i >= 0 && len(n.digits)-i != 4 && !strings.ContainsAny(n.digits[i+1:], "., '") && !strings.ContainsAny(n.digits[:i], ", '") {
		c.points.add(n)
		return
	}
	point, asPoint := under(n.digits, '.')
	comma, asComma := under(n.digits, ',')
	switch {
	case asPoint && asComma && point == comma:
	case asPoint && !asComma:
		c.points.add(n)
	case asComma && !asPoint:
		c.commas.add(n)
	case asPoint && asComma:
		// Both readings differ, so exactly one mark stands before three digits.
		if i := strings.IndexAny(n.digits, ".,"); n.digits[i] == '.' {
			c.dotted.add(n)
		} else {
			c.grouped.add(n)
		}
	}
}

// decide returns the decimal mark of the file, the cells that contradict it and
// a remark. Nothing is decided cell by cell: a file has one mark.
func (c *census) decide(given string) (mark byte, wrong []Problem, note string) {
	switch {
	case given == ".":
		return '.', nil, ""
	case given == ",":
		return ',', nil, "decimal comma, as asked"
	case c.commas.n > 0 && c.points.n > 0:
		few, other, mark, word, otherWord := c.commas.cells, c.points.cells[0], byte('.'), "comma", "point"
		if c.points.n < c.commas.n {
			few, other, mark, word, otherWord = c.points.cells, c.commas.cells[0], ',', "point", "comma"
		}
		for _, n := range few {
			wrong = append(wrong, Problem{Line: n.line, Column: n.column, Name: n.name,
				Message: fmt.Sprintf("%q has a decimal %s, but %q of line %d has a decimal %s", n.text, word, other.text, other.line, otherWord),
				Wanted:  "one decimal mark in the whole file"})
		}
		return mark, wrong, ""
	case c.commas.n > 0:
		return ',', ask(c.dotted), "decimal comma"
	case c.points.n > 0:
		if c.grouped.n > 0 {
			note = fmt.Sprintf("decimal point; %q of line %d is read with a comma between thousands", c.grouped.cells[0].text, c.grouped.cells[0].line)
		}
		return '.', nil, note
	default:
		return '.', ask(c.grouped), ""
	}
}

// ask reports the cells that nothing in the file decides.
func ask(t tally) (wrong []Problem) {
	for _, n := range t.cells {
		point, _ := under(n.digits, '.')
		comma, _ := under(n.digits, ',')
		wrong = append(wrong, Problem{Line: n.line, Column: n.column, Name: n.name,
			Message: fmt.Sprintf("%q can be %s or %s", n.text, point, comma),
			Wanted:  `numbers without a mark between thousands, or the decimal mark stated with --decimal "." or --decimal ","`})
	}
	return wrong
}

// A place is a cell of a file: line and field.
type place struct{ line, column int }

// decimalMark decides the decimal mark of a file from all its number cells, and
// returns the cells that have been reported because they contradict it.
func (rd *reader) decimalMark(g *grid, specs []spec, fields []field, rows []gridRow) (byte, map[place]bool) {
	var c census
	for _, r := range rows {
		if g.table == Settings && !numericSetting(specs, fields, r) {
			continue // "1,200" may be the number of a drawing
		}
		for i, f := range fields {
			if f.spec < 0 || specs[f.spec].kind == textColumn || specs[f.spec].kind == dateColumn {
				continue
			}
			text := r.field(i)
			if !strings.ContainsAny(text, ".,'") {
				continue
			}
			add := func(t token) {
				if t.kind == aNumber {
					c.add(numeral{line: r.lineOf(i), column: i + 1, name: specs[f.spec].name, text: clean(text), digits: t.digits})
				}
			}
			if top, base, ok := depthRange(text); ok && specs[f.spec].ranges {
				add(top)
				add(base)
				continue
			}
			add(scan(text))
		}
	}
	mark, wrong, note := c.decide(rd.opt.Decimal)
	if g.point {
		// Number cells of a workbook have a point; a comma means text.
		mark, wrong, note = '.', ask(c.grouped), ""
	}
	told := map[place]bool{}
	for _, p := range wrong {
		p.File = g.file
		told[place{p.Line, p.Column}] = true
		rd.add(p)
	}
	if note != "" {
		rd.noteFile(g.file, note)
	}
	return mark, told
}
