package intake

import (
	"strings"

	"pastload/profile"
)

// What kind of cells a column holds.
type columnKind int

const (
	textColumn columnKind = iota
	numberColumn
	dateColumn
	openColumn // a number whose dimension the rest of the row decides
)

// A spec is what the reader must know of a column.
type spec struct {
	name     string
	kind     columnKind
	dim      *dimension
	unit     unit   // the unit inside, for numbers
	required bool   // the table must have it, and every row must fill it
	bounds   bool   // "<0.01" and ">400" are allowed
	plastic  bool   // "NP" is allowed
	ranges   bool   // "4.00–4.45" is allowed
	synonyms string // other names, separated by semicolons
	meaning  string
	limit    limit
}

// A limit is what no sound entry passes. It catches slips of the unit and
// impossible values, not doubtful ones: those are for the review to weigh.
// The bounds follow the "cannot be right as entered" column of our own proposal,
// widened so that peat, rock and instruments above the water stay legal.
type limit struct {
	low, high float64
	set       bool
	open      bool // low itself is outside
}

func within(low, high float64) limit { return limit{low, high, true, false} }
func above(low, high float64) limit  { return limit{low, high, true, true} }

// has tells whether the value lies inside.
func (l limit) has(v float64) bool {
	return !l.set || v <= l.high && (v > l.low || v == l.low && !l.open)
}

// names returns every name of the column, the canonical one first.
func (s spec) names() []string {
	names := []string{s.name}
	for n := range strings.SplitSeq(s.synonyms, ";") {
		if n = strings.TrimSpace(n); n != "" {
			names = append(names, n)
		}
	}
	return names
}

// title returns the canonical header: name and unit.
func (s spec) title() string {
	if s.kind == numberColumn && s.dim.needsUnit() {
		return s.name + " (" + s.unit.name + ")"
	}
	return s.name
}

// A column is a spec and where its cells go in a row of type T.
type column[T any] struct {
	spec
	text   func(*T) *string
	number func(*T) *profile.Number
	base   func(*T) *profile.Number // the lower end of a range
	flag   func(*T) *bool           // set by "NP"
}

// textOf and numberOf make the two usual columns.
func textOf[T any](name, synonyms, meaning string, to func(*T) *string) column[T] {
	return column[T]{spec: spec{name: name, kind: textColumn, synonyms: synonyms, meaning: meaning}, text: to}
}

func numberOf[T any](name string, d *dimension, u string, l limit, synonyms, meaning string, to func(*T) *profile.Number) column[T] {
	return column[T]{spec: spec{name: name, kind: numberColumn, dim: d, unit: d.named(u), limit: l, synonyms: synonyms, meaning: meaning}, number: to}
}

// must marks a column as required.
func must[T any](c column[T]) column[T] {
	c.required = true
	return c
}

// dated marks a text column as holding dates.
func dated[T any](c column[T]) column[T] {
	c.kind = dateColumn
	return c
}

// open marks a text column as holding numbers whose dimension the row decides.
func open[T any](c column[T]) column[T] {
	c.kind = openColumn
	return c
}

// specs returns the specs of the columns.
func specs[T any](columns []column[T]) []spec {
	out := make([]spec, len(columns))
	for i, c := range columns {
		out[i] = c.spec
	}
	return out
}
