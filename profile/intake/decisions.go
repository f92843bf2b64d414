package intake

import (
	"fmt"
	"slices"
	"strings"
	"time"

	"pastload/profile"
)

// A decisionRow is a row of the decisions table.
type decisionRow struct {
	Borehole, Specimen, Quantity, Decision string
	Depth, DepthBase                       profile.Number
	Value, Seen, Unit                      string
	Reason, By, Date                       string
}

var decisionColumns = makeDecisionColumns()

func makeDecisionColumns() []column[decisionRow] {
	depth := numberOf("depth", length, "m", depthLimit, depthNames, "of the result", func(r *decisionRow) *profile.Number { return &r.Depth })
	depth.ranges, depth.base = true, func(r *decisionRow) *profile.Number { return &r.DepthBase }
	return []column[decisionRow]{
		textOf("borehole", boreholeNames, "of the result, or the stratum that an adopted value is for", func(r *decisionRow) *string { return &r.Borehole }),
		depth,
		textOf("specimen", specimenNames, "of the result, or the stratum that an adopted value is for", func(r *decisionRow) *string { return &r.Specimen }),
		must(textOf("quantity", "parameter", "the name or a synonym of a column of the results table, or OCR, POP, compression ratio, recompression ratio, strength ratio", func(r *decisionRow) *string { return &r.Quantity })),
		must(textOf("decision", "action", "leave out, keep, or adopt value", func(r *decisionRow) *string { return &r.Decision })),
		open(textOf("value", "adopted value; adopt", "what is adopted, in the quantity's own unit (kPa, %) unless the header or the unit column names another", func(r *decisionRow) *string { return &r.Value })),
		open(textOf("value seen", "seen; seen value; value when decided", "the value in the table when it was decided, so that a later change is noticed", func(r *decisionRow) *string { return &r.Seen })),
		textOf("unit", "units", "of the value and the value seen", func(r *decisionRow) *string { return &r.Unit }),
		must(textOf("reason", "why; because", "why", func(r *decisionRow) *string { return &r.Reason })),
		must(textOf("by", "decided by; engineer", "who decided", func(r *decisionRow) *string { return &r.By })),
		must(dated(textOf("date", "decided on; day", "ISO date, e.g. 2024-05-31", func(r *decisionRow) *string { return &r.Date }))),
	}
}

var decisionWords = map[string]string{
	"leave out": "leave out", "left out": "leave out", "exclude": "leave out", "excluded": "leave out",
	"keep": "keep", "kept": "keep",
	"adopt value": "adopt value", "adopt": "adopt value", "adopted": "adopt value", "adopted value": "adopt value",
}

// derived are the quantities that no column of the results table holds and that
// a value can be adopted for all the same.
var derived = []spec{
	{name: "OCR", dim: ratio, synonyms: "overconsolidation ratio; over-consolidation ratio"},
	{name: "POP", dim: stress, synonyms: "pre-overburden pressure; preoverburden pressure"},
	{name: "compression ratio", dim: ratio},
	{name: "recompression ratio", dim: ratio, synonyms: "RR"},
	{name: "strength ratio", dim: ratio, synonyms: "su/σ'p; su/σp'; su ratio"},
}

// quantities returns every quantity that a decision can be about.
func quantities() []spec {
	var out []spec
	for _, q := range profile.Quantities {
		s := quantityColumn(q).spec
		s.limit, s.bounds = limit{}, false
		out = append(out, s)
	}
	for _, s := range derived {
		s.kind, s.unit = numberColumn, s.dim.units[0]
		out = append(out, s)
	}
	return out
}

// decisions reads the decisions table.
func (s *site) decisions(g *grid) {
	t := load(s.rd, g, decisionColumns)
	if t == nil {
		return
	}
	known := quantities()
	find := newVocabulary(known)
	for _, r := range t.rows {
		v := r.Value
		ok := s.decisionPlace(t, r)
		q, okQuantity := decisionQuantity(t, r, find, known)
		word := decisionWords[strings.ToLower(v.Decision)]
		if word == "" && v.Decision != "" {
			t.problem(r, "decision", fmt.Sprintf("%q is not a decision", v.Decision), "leave out, keep or adopt value")
		}
		if v.Date != "" {
			if _, err := time.Parse(time.DateOnly, v.Date); err != nil {
				t.problem(r, "date", fmt.Sprintf("%q is not an ISO date", v.Date), "year-month-day, e.g. 2024-05-31")
				ok = false
			}
		}
		d := profile.Decision{Borehole: v.Borehole, Depth: v.Depth, Specimen: v.Specimen, Decision: word, Reason: v.Reason, By: v.By, Date: v.Date, Source: t.cell(r, "decision")}
		if okQuantity {
			d.Quantity = q.name
			ok = decisionValues(t, r, q, word, &d) && ok
		}
		if ok && okQuantity && word != "" {
			s.out.Decisions = append(s.out.Decisions, d)
		}
	}
}

// decisionPlace checks what a decision is about: a borehole that exists, or a
// stratum in its stead.
func (s *site) decisionPlace(t *table[decisionRow], r row[decisionRow]) bool {
	v := r.Value
	if v.Borehole == "" && v.Specimen == "" {
		t.problem(r, "borehole", "neither a borehole nor a specimen", "what the decision is about")
		return false
	}
	if v.Borehole == "" || slices.ContainsFunc(s.stratumNames(), func(n string) bool { return strings.EqualFold(n, v.Borehole) }) {
		return true
	}
	_, ok := borehole(s, t, r, v.Borehole)
	return ok
}

// decisionQuantity finds the quantity by any of its names.
func decisionQuantity(t *table[decisionRow], r row[decisionRow], find vocabulary, known []spec) (spec, bool) {
	name := r.Value.Quantity
	if name == "" {
		return spec{}, false
	}
	if name == "CR" {
		t.problem(r, "quantity", `"CR" can be the recompression index Cr or the compression ratio`, `"recompression index" or "compression ratio"`)
		return spec{}, false
	}
	if i, ok := find[key(name)]; ok {
		return known[i], true
	}
	for i, q := range profile.Quantities {
		if strings.EqualFold(name, q.Key) {
			return known[i], true
		}
	}
	wanted := "the name of a column of the results table"
	if likely := nearSpecs(name, known); len(likely) > 0 {
		wanted = quoted(likely)
	}
	t.problem(r, "quantity", fmt.Sprintf("%q is not a quantity", name), wanted)
	return spec{}, false
}

// decisionValues reads the adopted value and the value seen.
func decisionValues(t *table[decisionRow], r row[decisionRow], q spec, word string, d *profile.Decision) bool {
	v := r.Value
	ok := true
	if v.Value == "" && word == "adopt value" {
		t.problem(r, "value", "blank", "the value that is adopted")
		ok = false
	}
	if v.Value != "" {
		n, good := openNumber(t, r, "value", q, v.Unit, true)
		d.Value, ok = n, ok && good
	}
	if v.Seen != "" {
		q.bounds = true // a bound can be what was seen
		n, good := openNumber(t, r, "value seen", q, v.Unit, true)
		d.Seen, ok = n, ok && good
	}
	return ok
}
