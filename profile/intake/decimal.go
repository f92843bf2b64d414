package intake

import "fmt"

// A numeral is a number cell before its decimal mark is known.
type numeral struct {
	line, column int
	name, text   string
	digits       string
}

// A census counts what the number cells of one file say of its decimal mark.
type census struct {
	points, commas []numeral // can only be read with that mark
	dotted         []numeral // "1.234": a decimal point, unless the file uses commas
	grouped        []numeral // "1,234": could be either
}

func (c *census) add(n numeral) {
	point, asPoint := under(n.digits, '.')
	comma, asComma := under(n.digits, ',')
	switch {
	case asPoint && asComma && point == comma:
	case asPoint && !asComma:
		c.points = append(c.points, n)
	case asComma && !asPoint:
		c.commas = append(c.commas, n)
	case asPoint && asComma:
		// Both readings differ, so exactly one mark stands before three digits.
		for i := range n.digits {
			if n.digits[i] == '.' {
				c.dotted = append(c.dotted, n)
				return
			}
			if n.digits[i] == ',' {
				c.grouped = append(c.grouped, n)
				return
			}
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
	case len(c.commas) > 0 && len(c.points) > 0:
		few, other, mark, word, otherWord := c.commas, c.points[0], byte('.'), "comma", "point"
		if len(c.points) < len(c.commas) {
			few, other, mark, word, otherWord = c.points, c.commas[0], ',', "point", "comma"
		}
		for _, n := range few {
			wrong = append(wrong, Problem{Line: n.line, Column: n.column, Name: n.name,
				Message: fmt.Sprintf("%q has a decimal %s, but %q of line %d has a decimal %s", n.text, word, other.text, other.line, otherWord),
				Wanted:  "one decimal mark in the whole file"})
		}
		return mark, wrong, ""
	case len(c.commas) > 0:
		return ',', c.ask(c.dotted), "decimal comma"
	case len(c.points) > 0:
		if len(c.grouped) > 0 {
			note = fmt.Sprintf("decimal point; %q of line %d is read with a comma between thousands", c.grouped[0].text, c.grouped[0].line)
		}
		return '.', nil, note
	default:
		return '.', c.ask(c.grouped), ""
	}
}

// ask reports the cells that nothing in the file decides.
func (c *census) ask(cells []numeral) (wrong []Problem) {
	for _, n := range cells {
		point, _ := under(n.digits, '.')
		comma, _ := under(n.digits, ',')
		wrong = append(wrong, Problem{Line: n.line, Column: n.column, Name: n.name,
			Message: fmt.Sprintf("%q can be %s or %s", n.text, point, comma),
			Wanted:  `numbers without a mark between thousands, or the decimal mark stated with --decimal "." or --decimal ","`})
	}
	return wrong
}
