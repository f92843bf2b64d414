package report

import (
	"bufio"
	"fmt"
	"io"
	"strings"
	"unicode/utf8"

	"pastload/profile"
)

// Explanation returns the steps to the numbers at one depth as one table, in SI
// units: a step prints its own unit, as no column has one.
func Explanation(e profile.Explanation) *Table {
	t := &Table{
		Name: "explain", Title: fmt.Sprintf("%s, %s m: every number step by step", e.Borehole, depth(e.Depth)),
		Columns: []Column{
			{"part", "group", Words, 0}, {"step", "step", Words, 0}, {"formula", "formula", Words, 0}, {"with numbers", "numbers", Words, 0},
			{"value", "value", Words, 0}, {"unit", "unit", Words, 0}, {"remark", "words", Words, 0}, {"source", "source", Words, 0}, {"mark", "mark", Words, 0},
		},
		Note: explainNote,
	}
	for _, s := range e.Steps {
		t.Add(T(s.Group), T(s.Name), T(s.Formula), T(s.Numbers), T(s.Printed()), T(s.Unit), T(s.Words), T(s.Source), T(s.Mark))
	}
	return t
}

const explainNote = "Terms are rounded as printed, so that the last digit of a result may differ by one or two. Units are m, kPa and kN/m³."

// WriteExplanation writes the steps for a terminal or for paper: a heading for
// each part, and below it each step with its formula, the formula with its
// numbers, and where they come from.
func WriteExplanation(w io.Writer, e profile.Explanation) error {
	b := bufio.NewWriter(w)
	fmt.Fprintf(b, "%s, %s m\n%s\n", printable(e.Borehole), depth(e.Depth), explainNote)
	group := ""
	for _, s := range e.Steps {
		if s.Group != group {
			group = s.Group
			fmt.Fprintf(b, "\n%s\n%s\n", printable(group), strings.Repeat("-", utf8.RuneCountInString(group)))
		}
		writeStep(b, s)
	}
	return b.Flush()
}

// writeStep writes a step on a line where it fits, else with its arithmetic and
// its source on lines of their own.
func writeStep(b *bufio.Writer, s profile.Step) {
	result := printable(join(" ", s.Printed(), s.Unit))
	line := "  " + printable(s.Name)
	if s.Value.Known {
		line += " = " + result
	} else if s.Words != "" {
		line += ": " + printable(s.Words)
	}
	b.WriteString(line + "\n")
	more := func(head, text string) {
		if text != "" {
			b.WriteString("      " + head + printable(text) + "\n")
		}
	}
	if s.Numbers != "" {
		more("", join(" = ", formulaOf(s), s.Numbers))
	} else {
		more("", formulaOf(s))
	}
	if s.Value.Known {
		more("", s.Words)
	}
	more("", join("; ", s.Source, bracket(s.Mark)))
}

// formulaOf returns the right side of a formula: the name says what it gives.
func formulaOf(s profile.Step) string {
	if _, right, ok := strings.Cut(s.Formula, " = "); ok && s.Numbers != "" && !strings.ContainsAny(s.Formula, ",;") {
		return right
	}
	return s.Formula
}

// join joins what is not empty.
func join(by string, parts ...string) string { return strings.Join(nonEmpty(parts...), by) }

func bracket(s string) string {
	if s == "" {
		return ""
	}
	return "[" + s + "]"
}
