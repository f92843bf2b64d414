package report

import (
	"fmt"
	"math"
	"slices"
	"strconv"
	"strings"
)

// samePrinted tells whether two cells say the same: 2.70 and 2.700 do.
func samePrinted(a, b string) bool {
	if a == b {
		return true
	}
	x, err1 := strconv.ParseFloat(a, 64)
	y, err2 := strconv.ParseFloat(b, 64)
	return err1 == nil && err2 == nil && math.Abs(x-y) < 1e-9
}

// inWords tells what a row says.
func inWords(row map[string]string, columns []string, names map[string]string) string {
	var out []string
	for _, n := range columns {
		if row[n] != "" {
			out = append(out, wordsOf(names[n])+" "+shortened(n, row[n]))
		}
	}
	return strings.Join(out, "; ")
}

// wordsOf makes words of a column's header.
func wordsOf(header string) string {
	name := bare(header)
	unit := strings.TrimPrefix(strings.TrimPrefix(header, name), "_")
	words := strings.ReplaceAll(name, "_", " ")
	switch unit {
	case "":
		return words
	case "pct":
		unit = "%"
	case "kN_m3":
		unit = "kN/m³"
	case "m_s", "ft_s":
		unit = strings.Replace(unit, "_", "/", 1)
	}
	return words + " (" + unit + ")"
}

// shortened keeps the beginning of a checksum, which is enough to tell two apart.
func shortened(column, text string) string {
	if column == "sha256" && len(text) > 12 {
		return text[:12] + "…"
	}
	return text
}

// ChangesTable returns changes as a table.
func ChangesTable(changes []Change) *Table {
	t := &Table{Name: "changes", Title: "What changed", Columns: []Column{
		{"table", "table", Words, 0}, {"change", "change", Words, 0}, {"borehole", "borehole", Words, 0}, {"depth", "depth", Words, 0}, {"specimen", "specimen", Words, 0},
		{"item", "item", Words, 0}, {"what", "quantity", Words, 0}, {"before", "old", Words, 0}, {"now", "new", Words, 0},
	}}
	for _, c := range changes {
		t.Add(T(c.Table), T(c.Kind), T(c.Borehole), T(c.Depth), T(c.Specimen), T(c.Item), T(c.Quantity), T(c.Old), T(c.New))
	}
	return t
}

// ChangesSummary says in a line what changed.
func ChangesSummary(changes []Change) string {
	if len(changes) == 0 {
		return "Nothing has changed."
	}
	var parts []string
	for _, w := range watched {
		n := 0
		for _, c := range changes {
			if c.Table == w.table {
				n++
			}
		}
		if n > 0 {
			parts = append(parts, fmt.Sprintf("%s %d", w.table, n))
		}
	}
	return counted(len(changes), "change") + ": " + strings.Join(parts, ", ") + "."
}

// Brief returns changes with long texts cut, for a terminal.
func Brief(changes []Change) []Change {
	const most = 48
	cut := func(s string) string {
		if r := []rune(s); len(r) > most {
			return string(r[:most-1]) + "…"
		}
		return s
	}
	out := slices.Clone(changes)
	for i := range out {
		out[i].Old, out[i].New, out[i].Item = cut(out[i].Old), cut(out[i].New), cut(out[i].Item)
	}
	return out
}
