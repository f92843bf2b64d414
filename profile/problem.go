package profile

import (
	"errors"
	"sort"
	"strings"
)

// ErrNoStress is wrapped by every problem that keeps the vertical stress of a
// borehole from being computed.
var ErrNoStress = errors.New("the vertical stress cannot be computed")

// A Problem is something in the tables that keeps the profile from being built.
// It prints like the problems of reading a table:
// file:line:column: quantity: what was found; what is wanted.
type Problem struct {
	Source   *Cell
	Place    string // named where there is no cell: "borehole BH1"
	Quantity string
	Found    string
	Wanted   string
}

func (p Problem) Error() string {
	var b strings.Builder
	switch {
	case p.Source != nil:
		b.WriteString(p.Source.String())
		b.WriteString(": ")
	case p.Place != "":
		b.WriteString(p.Place)
		b.WriteString(": ")
	}
	b.WriteString(p.Quantity)
	b.WriteString(": ")
	b.WriteString(p.Found)
	if p.Wanted != "" {
		b.WriteString("; want ")
		b.WriteString(p.Wanted)
	}
	return b.String()
}

// Unwrap returns ErrNoStress.
func (p Problem) Unwrap() error { return ErrNoStress }

// Problems are all that keep a site's profile from being built.
type Problems []Problem

func (ps Problems) Error() string {
	lines := make([]string, len(ps))
	for i, p := range ps {
		lines[i] = p.Error()
	}
	return strings.Join(lines, "\n")
}

// Unwrap returns the problems one by one.
func (ps Problems) Unwrap() []error {
	errs := make([]error, len(ps))
	for i, p := range ps {
		errs[i] = p
	}
	return errs
}

// asError returns the problems in the order of their place, or nil for none.
func (ps Problems) asError() error {
	if len(ps) == 0 {
		return nil
	}
	sort.SliceStable(ps, func(i, j int) bool {
		a, b := ps[i].Source, ps[j].Source
		if a == nil || b == nil {
			return b != nil
		}
		if a.File != b.File {
			return a.File < b.File
		}
		return a.Line < b.Line
	})
	return ps
}
