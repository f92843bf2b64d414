package report

import (
	"math"
	"strconv"
	"strings"
)

// A Dimension says what kind of quantity a column holds, and so how it converts
// from one unit system to another.
type Dimension int

// The dimensions of columns.
const (
	Words         Dimension = iota // text
	Pure                           // a pure number
	Percent                        // %
	Length                         // m or ft
	Stress                         // kPa or psf
	WeightDensity                  // kN/m³ or pcf
	Speed                          // m/s or ft/s
	Count                          // a whole number
)

// A Units system is SI or US.
type Units int

// The unit systems.
const (
	SI Units = iota
	US
)

// unit is how a dimension is written and converted in a unit system.
type unit struct {
	name, suffix string
	factor       float64
	decimals     int // added to the column's own
}

// of returns the unit of a dimension. Factors: 1 ft = 0.3048 m exactly;
// 1 psf = 0.04788026 kPa; 1 pcf = 0.1570875 kN/m³.
func (u Units) of(d Dimension) unit {
	if u == US {
		switch d {
		case Length:
			return unit{"ft", "ft", 1 / 0.3048, 0}
		case Stress:
			return unit{"psf", "psf", 1 / 0.04788025898, -1}
		case WeightDensity:
			return unit{"pcf", "pcf", 1 / 0.15708746, 0}
		case Speed:
			return unit{"ft/s", "ft_s", 1 / 0.3048, 0}
		}
	}
	switch d {
	case Length:
		return unit{"m", "m", 1, 0}
	case Stress:
		return unit{"kPa", "kPa", 1, 0}
	case WeightDensity:
		return unit{"kN/m³", "kN_m3", 1, 0}
	case Speed:
		return unit{"m/s", "m_s", 1, 0}
	case Percent:
		return unit{"%", "pct", 1, 0}
	}
	return unit{"", "", 1, 0}
}

// A Column is a heading with what its cells hold.
type Column struct {
	Name      string // as printed, without its unit
	Key       string // for CSV and the workbook, without its unit
	Dimension Dimension
	Decimals  int
}

// Heading returns the printed heading with its unit.
func (c Column) Heading(u Units) string {
	if n := u.of(c.Dimension).name; n != "" {
		return c.Name + " (" + n + ")"
	}
	return c.Name
}

// Header returns the machine's heading, which ends in the unit.
func (c Column) Header(u Units) string {
	if s := u.of(c.Dimension).suffix; s != "" {
		return c.Key + "_" + s
	}
	return c.Key
}

// numeric tells whether the column's cells are numbers.
func (c Column) numeric() bool { return c.Dimension != Words }

// A Cell is a number, a text, or nothing. In a column whose rows are of different
// quantities a number carries its own dimension and decimals.
type Cell struct {
	Text  string
	Value float64
	Known bool // Value is the content

	own      bool // the cell has a dimension and decimals of its own
	unit     bool // the content is the name of the unit of that dimension
	as       Dimension
	decimals int
}

// Q returns a number cell with a dimension and decimals of its own.
func Q(v float64, d Dimension, decimals int) Cell {
	c := N(v)
	c.own, c.as, c.decimals = true, d, decimals
	return c
}

// U returns a text cell that names the unit of a dimension.
func U(d Dimension) Cell { return Cell{unit: true, as: d} }

// in returns the dimension and decimals of a cell in a column.
func (c Cell) in(col Column) (Dimension, int) {
	if c.own {
		return c.as, c.decimals
	}
	return col.Dimension, col.Decimals
}

// T returns a text cell.
func T(s string) Cell { return Cell{Text: s} }

// N returns a number cell; a value that is not finite is an empty cell.
func N(v float64) Cell {
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return Cell{}
	}
	return Cell{Value: v, Known: true}
}

// A Table is a titled set of rows under columns.
type Table struct {
	Name    string // for file and sheet names, e.g. "profile"
	Title   string // the caption
	Note    string // printed below it
	Columns []Column
	Rows    [][]Cell
}

// Add appends a row, which has one cell for each column.
func (t *Table) Add(cells ...Cell) { t.Rows = append(t.Rows, cells) }

// Format writes a cell of a column in a unit system. Minus is the ASCII sign,
// so that the text can be read back as a number.
func (c Column) Format(cell Cell, u Units) string {
	if cell.unit {
		return u.of(cell.as).name
	}
	if !cell.Known {
		return cell.Text
	}
	dimension, decimals := cell.in(c)
	un := u.of(dimension)
	return fixed(cell.Value*un.factor, max(0, decimals+un.decimals))
}

// fixed writes a number with decimals and no negative zero.
func fixed(v float64, decimals int) string {
	s := strconv.FormatFloat(v, 'f', decimals, 64)
	if strings.HasPrefix(s, "-") && strings.Trim(s, "-0.") == "" {
		s = s[1:]
	}
	return s
}
