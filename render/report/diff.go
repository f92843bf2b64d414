package report

import (
	"bytes"
	"encoding/csv"
	"errors"
	"fmt"
	"io/fs"
	"slices"
	"strconv"
	"strings"
)

// ErrOtherUnits says that two sets of tables were printed in different units.
var ErrOtherUnits = errors.New("the tables are in different units")

// A Printed is a table as it was printed: what two issues of a report are
// compared by, so that a change is one that a reader can see.
type Printed struct {
	Name   string // as the file, without its ending
	Header []string
	Rows   [][]string
}

// A Change is a difference between two issues of a report.
type Change struct {
	Table    string `json:"table"`
	Kind     string `json:"change"` // added, removed or changed
	Borehole string `json:"borehole,omitempty"`
	Depth    string `json:"depth,omitempty"` // as printed
	Specimen string `json:"specimen,omitempty"`
	Item     string `json:"item,omitempty"` // what else tells the row from others
	Quantity string `json:"quantity,omitempty"`
	Old      string `json:"old,omitempty"`
	New      string `json:"new,omitempty"`
}

// A watch is a table whose changes matter to the reader of the next issue.
// Names are those of the columns without their units.
type watch struct {
	table  string
	key    []string // tells rows apart
	shown  []string // compared; empty for every other column
	hidden []string // not compared
	// both is for tables that an issue may lack for other reasons than being
	// empty: they are compared only where both have them.
	both bool
	// special compares a table whose rows have nothing to be matched by.
	special func(old, updated Printed, names map[string]string) ([]Change, error)
}

// watched lists the tables from cause to effect.
var watched = []watch{
	{table: "sources", key: []string{"file"}, shown: []string{"rows", "sha256"}},
	{table: "settings", key: []string{"setting"}, both: true},
	{table: "strata", key: []string{"borehole", "stratum"}},
	{table: "water", key: []string{"borehole", "depth", "kind", "date"}},
	{table: "results", key: []string{"borehole", "depth", "specimen"}, hidden: []string{"source"}},
	{table: "decisions", key: []string{"borehole", "depth", "specimen", "quantity"}},
	{table: "yield", key: []string{"borehole", "depth", "specimen"}, shown: []string{"bound", "preconsolidation_stress", "grade", "initial_void_ratio", "compression_index", "recompression_index", "swelling_index"}},
	{table: "tests", key: []string{"borehole", "depth", "specimen"}, shown: []string{"bound", "preconsolidation_stress", "ocr", "grade", "verdict", "used", "why"}},
	{table: "zones", key: []string{"borehole", "top", "base", "zone", "or_zone"}, special: zoneChanges},
	{table: "findings", key: []string{"id"}, shown: []string{"severity", "message", "answer"}, both: true},
	{table: "design", key: []string{"stratum", "borehole", "parameter"}, shown: []string{"n", "left_out", "low", "high", "method", "adopted"}, both: true},
}

// Print returns tables as they are printed in a unit system.
func Print(tables []*Table, u Units) ([]Printed, error) {
	var out []Printed
	for _, t := range tables {
		var b bytes.Buffer
		if err := t.WriteCSV(&b, u); err != nil {
			return nil, err
		}
		p, err := readPrinted(t.Name, b.Bytes())
		if err != nil {
			return nil, err
		}
		out = append(out, p)
	}
	return out, nil
}

// ReadPrinted reads the tables of an earlier report from its folder of CSV
// files. Tables that are not compared are not read.
func ReadPrinted(dir fs.FS) ([]Printed, error) {
	var out []Printed
	for _, w := range watched {
		data, err := fs.ReadFile(dir, w.table+".csv")
		if errors.Is(err, fs.ErrNotExist) {
			continue
		}
		if err != nil {
			return nil, err
		}
		p, err := readPrinted(w.table, data)
		if err != nil {
			return nil, err
		}
		out = append(out, p)
	}
	return out, nil
}

func readPrinted(name string, data []byte) (Printed, error) {
	rows, err := csv.NewReader(bytes.NewReader(data)).ReadAll()
	if err != nil {
		return Printed{}, fmt.Errorf("%s.csv: %w", name, err)
	}
	if len(rows) == 0 {
		return Printed{}, fmt.Errorf("%s.csv: no header", name)
	}
	return Printed{Name: name, Header: rows[0], Rows: rows[1:]}, nil
}

// Differences returns what changed from one set of tables to another, in the
// order from cause to effect, and remarks on what could not be compared.
//
// Rows are matched by what they are about (borehole, depth, specimen …), never
// by their place. Numbers are the same where they print the same value.
// The error wraps ErrOtherUnits, or says which table lacks a column that tells
// its rows apart.
func Differences(old, updated []Printed) (changes []Change, remarks []string, err error) {
	for _, w := range watched {
		a, hasOld := find(old, w.table)
		b, hasNew := find(updated, w.table)
		if !hasOld && !hasNew {
			continue
		}
		if w.both && hasOld != hasNew {
			remarks = append(remarks, "The table "+w.table+" is in one of the two only: it is not compared.")
			continue
		}
		c, err := w.compare(a, b)
		if err != nil {
			return nil, nil, err
		}
		changes = append(changes, c...)
	}
	return changes, remarks, nil
}

func find(tables []Printed, name string) (Printed, bool) {
	i := slices.IndexFunc(tables, func(p Printed) bool { return p.Name == name })
	if i < 0 {
		return Printed{Name: name}, false
	}
	return tables[i], true
}

// bare returns a column's name without its unit.
func bare(header string) string {
	for _, u := range []Units{SI, US} {
		for _, d := range []Dimension{Speed, WeightDensity, Length, Stress, Percent} {
			if s := u.of(d).suffix; strings.HasSuffix(header, "_"+s) {
				return strings.TrimSuffix(header, "_"+s)
			}
		}
	}
	return header
}

// compare returns the changes of one table.
func (w watch) compare(old, updated Printed) ([]Change, error) {
	names := map[string]string{} // bare name → header
	for _, h := range old.Header {
		names[bare(h)] = h
	}
	for _, h := range updated.Header {
		if other, ok := names[bare(h)]; ok && other != h {
			return nil, fmt.Errorf("table %s: %s in one, %s in the other: %w", w.table, other, h, ErrOtherUnits)
		}
		names[bare(h)] = h
	}
	if w.special != nil {
		return w.special(old, updated, names)
	}
	before, order, err := w.rows(old)
	if err != nil {
		return nil, err
	}
	after, added, err := w.rows(updated)
	if err != nil {
		return nil, err
	}
	for _, k := range added {
		if before[k] == nil {
			order = append(order, k)
		}
	}
	columns := w.columns(old, updated)
	var out []Change
	for _, k := range order {
		a, b := before[k], after[k]
		c := w.place(a, b)
		switch {
		case b == nil:
			c.Kind, c.Old = "removed", inWords(a, columns, names)
			out = append(out, c)
		case a == nil:
			c.Kind, c.New = "added", inWords(b, columns, names)
			out = append(out, c)
		default:
			for _, name := range columns {
				if samePrinted(a[name], b[name]) {
					continue
				}
				c.Kind, c.Quantity, c.Old, c.New = "changed", wordsOf(names[name]), shortened(name, a[name]), shortened(name, b[name])
				out = append(out, c)
			}
		}
	}
	return out, nil
}

// rows returns the rows of a table by key, each by bare column name, and the
// keys in order. Rows of one key are told apart by their order.
func (w watch) rows(p Printed) (map[string]map[string]string, []string, error) {
	for _, k := range w.key {
		if len(p.Header) > 0 && !slices.ContainsFunc(p.Header, func(h string) bool { return bare(h) == k }) {
			return nil, nil, fmt.Errorf("table %s: no column %s, which tells its rows apart", w.table, k)
		}
	}
	out := map[string]map[string]string{}
	var order []string
	for _, r := range p.Rows {
		row := map[string]string{}
		for i, h := range p.Header {
			row[bare(h)] = r[i]
		}
		var parts []string
		for _, k := range w.key {
			parts = append(parts, row[k])
		}
		key := strings.Join(parts, "\x00")
		unique := key
		for n := 2; out[unique] != nil; n++ {
			unique = key + "\x00" + strconv.Itoa(n)
		}
		out[unique] = row
		order = append(order, unique)
	}
	return out, order, nil
}

// columns returns the bare names of what is compared, in table order.
func (w watch) columns(old, updated Printed) []string {
	if len(w.shown) > 0 {
		return w.shown
	}
	var out []string
	for _, p := range []Printed{updated, old} {
		for _, h := range p.Header {
			if n := bare(h); !slices.Contains(out, n) && !slices.Contains(w.key, n) && !slices.Contains(w.hidden, n) {
				out = append(out, n)
			}
		}
	}
	return out
}

// place tells where a row belongs.
func (w watch) place(a, b map[string]string) Change {
	row := b
	if row == nil {
		row = a
	}
	c := Change{Table: w.table}
	var rest []string
	for _, k := range w.key {
		switch k {
		case "borehole":
			c.Borehole = row[k]
		case "depth":
			c.Depth = row[k]
		case "specimen":
			c.Specimen = row[k]
		default:
			rest = append(rest, row[k])
		}
	}
	c.Item = strings.Join(nonEmpty(rest...), ", ")
	return c
}
