package report

import (
	"fmt"
	"strings"

	"pastload/profile"
	"pastload/profile/design"
	"pastload/profile/review"
)

// Findings returns findings, a row each.
func Findings(fs review.Findings) *Table {
	t := &Table{
		Name: "findings", Title: "Findings",
		Columns: []Column{
			{"no.", "number", Count, 0}, {"severity", "severity", Words, 0}, {"borehole", "borehole", Words, 0}, {"depth", "depth", Length, 2},
			{"specimen", "specimen", Words, 0}, {"quantity", "quantity", Words, 0}, {"finding", "message", Words, 0},
			{"likely causes, the likeliest first", "causes", Words, 0}, {"what to do next", "action", Words, 0}, {"answer", "answer", Words, 0},
			{"found", "found", Words, 0}, {"wanted", "wanted", Words, 0}, {"also broken", "evidence", Words, 0},
			{"rule", "rule", Words, 0}, {"source", "source", Words, 0}, {"cells", "cells", Words, 0}, {"id", "id", Words, 0},
		},
		Note: "error: cannot be right as it stands. conflict: two things that cannot both be right. doubt: unlikely, look again. note: worth knowing.",
	}
	for i := range fs {
		f := &fs[i]
		t.Add(N(float64(i+1)), T(string(f.Severity)), T(f.Borehole), number(f.Depth), T(f.Specimen), T(f.Quantity), T(f.Message),
			T(strings.Join(f.Causes, "; ")), T(f.Action), T(answer(f)), T(f.Found), T(f.Wanted), T(strings.Join(f.Evidence, "; ")),
			T(f.Rule), T(f.Source), T(strings.Join(f.Cells, " ")), T(f.ID))
	}
	return t
}

// answer tells what the engineer decided about a finding.
func answer(f *review.Finding) string {
	if f.Answered == nil {
		return "open"
	}
	d := f.Answered
	text := fmt.Sprintf("%s: %s (%s, %s)", d.Decision, d.Reason, d.By, d.Date)
	if f.Stale {
		text = "STALE, the value has changed since: " + text
	}
	return text
}

// Decisions returns what the engineer decided.
func Decisions(s *profile.Site) *Table {
	t := &Table{
		Name: "decisions", Title: "Decisions",
		Columns: []Column{
			{"borehole", "borehole", Words, 0}, {"depth", "depth", Length, 2}, {"specimen", "specimen", Words, 0}, {"quantity", "quantity", Words, 0},
			{"decision", "decision", Words, 0}, {"value", "value", Pure, 3}, {"value seen", "value_seen", Pure, 3}, {"reason", "reason", Words, 0},
			{"by", "by", Words, 0}, {"date", "date", Words, 0},
		},
	}
	for i := range s.Decisions {
		d := &s.Decisions[i]
		dim := Pure
		for _, q := range profile.Quantities {
			if q.Name == d.Quantity {
				dim = dimensionOf(q.Unit)
			}
		}
		cell := func(n profile.Number) Cell {
			if !n.Known {
				return Cell{}
			}
			return Q(n.Value, dim, decimalsOf(dim, n.Value))
		}
		t.Add(T(d.Borehole), number(d.Depth), T(d.Specimen), T(d.Quantity), T(d.Decision), cell(d.Value), cell(d.Seen), T(d.Reason), T(d.By), T(d.Date))
	}
	return t
}

// Remarks returns findings as a reader at a terminal wants them: a heading and a
// few lines each.
func Remarks(fs review.Findings) *Table {
	t := &Table{Name: "findings", Columns: []Column{{"", "severity", Words, 0}, {"", "finding", Words, 0}}}
	if len(fs) == 0 {
		t.Note = "Nothing to remark on."
	}
	for i := range fs {
		f := &fs[i]
		t.Add(T(strings.ToUpper(string(f.Severity))), T(place(f)))
		t.Add(T(""), T(f.Message))
		for _, e := range f.Evidence {
			t.Add(T(""), T("also: "+e))
		}
		if len(f.Causes) > 0 {
			t.Add(T(""), T("likely: "+strings.Join(f.Causes, "; ")))
		}
		t.Add(T(""), T("next: "+f.Action))
		if f.Answered != nil {
			t.Add(T(""), T("answer: "+answer(f)))
		}
		t.Add(T(""), T(strings.TrimSpace("rule "+f.Rule+" "+strings.Join(f.Cells, " "))))
		t.Add(T(""), T(""))
	}
	return t
}

// place names where a finding is.
func place(f *review.Finding) string {
	var parts []string
	if f.Borehole != "" {
		parts = append(parts, f.Borehole)
	}
	if f.Depth.Known {
		parts = append(parts, depth(f.Depth.Value)+" m")
	}
	if f.Specimen != "" {
		parts = append(parts, f.Specimen)
	}
	if f.Quantity != "" {
		parts = append(parts, f.Quantity)
	}
	return strings.Join(parts, ", ")
}

// Effects returns what each decision changes.
func Effects(es []design.Effect) *Table {
	t := &Table{
		Name: "effects", Title: "With and without each decision",
		Columns: []Column{
			{"decision", "decision", Words, 0}, {"stratum", "stratum", Words, 0}, {"value", "what", Words, 0}, {"unit", "unit", Words, 0},
			{"with it", "with", Pure, 3}, {"without it", "without", Pure, 3},
		},
	}
	for _, e := range es {
		d := dimensionOf(e.Unit)
		cell := func(n profile.Number) Cell {
			if !n.Known {
				return Cell{}
			}
			return Q(n.Value, d, decimalsOf(d, n.Value))
		}
		t.Add(T(e.Label), T(orUnnamed(e.Stratum)), T(e.What), U(d), cell(e.With), cell(e.Without))
	}
	return t
}
