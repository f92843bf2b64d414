package profile

import "strconv"

// A Cell says where a number was read, so that it can be found again in the
// table it came from.
type Cell struct {
	File   string // as it was named to the program, without its folder
	Line   int    // 1 is the first line; the sheet row in a workbook
	Column int    // 1 is the first column
	Text   string // as typed
	Unit   string // the unit its header gave, as typed
}

// String returns file:line:column, or "" for a nil cell.
func (c *Cell) String() string {
	if c == nil {
		return ""
	}
	return c.File + ":" + strconv.Itoa(c.Line) + ":" + strconv.Itoa(c.Column)
}

// A Bound says how a recorded value limits the true one.
type Bound int

const (
	Exact   Bound = iota // the value itself
	AtLeast              // recorded as ">400": the true value is that or more
	AtMost               // recorded as "<0.01": the true value is that or less
)

// A Number is a quantity that may not have been measured. The zero Number is
// not known. Values are in the units of the package documentation.
type Number struct {
	Value   float64
	Known   bool
	Bound   Bound
	Assumed bool  // recorded as assumed, not measured ("#2.65")
	Source  *Cell // nil where the number was not read from a table
}

// Known returns a known Number without a source.
func Known(v float64) Number { return Number{Value: v, Known: true} }

// Or returns the value, or other where it is not known.
func (n Number) Or(other float64) float64 {
	if n.Known {
		return n.Value
	}
	return other
}
