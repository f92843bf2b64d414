package intake

import (
	"crypto/sha256"
	"encoding/hex"
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"sort"
	"strconv"
	"strings"

	"pastload/profile"
)

// Options change how tables are read. The zero Options are the usual ones.
type Options struct {
	// Need lists the tables that the caller cannot do without: one that is
	// absent or has no row is a problem.
	Need []Table
	// Decimal is "." or "," where the user states the decimal mark, "" where
	// each file is to tell it by itself.
	Decimal string
}

// A reader gathers what one Read finds.
type reader struct {
	opt      Options
	problems Problems
	count    map[string]int
	notes    []profile.Note
	files    []profile.SourceFile
}

// add collects a problem, up to a number of them per file.
func (rd *reader) add(p Problem) {
	if rd.count == nil {
		rd.count = map[string]int{}
	}
	rd.count[p.File]++
	switch n := rd.count[p.File]; {
	case n < maxProblems:
		rd.problems = append(rd.problems, p)
	case n == maxProblems:
		rd.problems = append(rd.problems, Problem{File: p.File, Line: 1, Message: fmt.Sprintf("more than %d problems; the rest is not listed", maxProblems)})
	}
}

func (rd *reader) note(where, message string) {
	rd.notes = append(rd.notes, profile.Note{Where: where, Message: message})
}

// noteFile remarks on a file as a whole.
func (rd *reader) noteFile(file, message string) {
	for i := range rd.files {
		if rd.files[i].Name == file {
			rd.files[i].Notes = append(rd.files[i].Notes, message)
		}
	}
	rd.note(file, message)
}

// Read reads the site at path: a folder of CSV tables, one CSV file, or an .xlsx
// workbook.
//
// A file in a folder, or a sheet of a workbook, is the table whose name it has;
// others are noted in Site.Notes and not read. A single CSV file is the table of
// its name, else a results table that is a whole site: it may carry a water
// table depth, and its borehole column may be absent.
//
// The error, if any, is Problems: every problem of every file, in order.
func Read(path string, opt Options) (*profile.Site, error) {
	rd := &reader{opt: opt}
	if opt.Decimal != "" && opt.Decimal != "." && opt.Decimal != "," {
		rd.add(Problem{File: filepath.Base(path), Name: "decimal", Message: fmt.Sprintf("%q is not a decimal mark", opt.Decimal), Wanted: `"." or ","`})
		return nil, rd.problems
	}
	grids, single := rd.open(path)
	rd.needed(path, grids)
	s := &site{rd: rd, single: single, index: map[string]int{}, layered: map[int]bool{}, torn: map[int]bool{}}
	s.out.Name = strings.TrimSuffix(base(path), filepath.Ext(base(path)))
	s.build(grids)
	if len(rd.problems) > 0 {
		return nil, rd.problems.sorted()
	}
	s.out.Files, s.out.Notes = rd.files, rd.notes
	return &s.out, nil
}

// base returns the last element of a path, of the working folder too.
func base(path string) string {
	if abs, err := filepath.Abs(path); err == nil {
		path = abs
	}
	return filepath.Base(path)
}

// needed reports tables that the caller needs and that hold nothing.
func (rd *reader) needed(path string, grids map[Table]*grid) {
	if len(rd.problems) > 0 && len(grids) == 0 {
		return
	}
	for _, t := range rd.opt.Need {
		g := grids[t]
		switch {
		case g == nil && rd.failed(t):
		case g == nil:
			rd.add(Problem{File: base(path), Name: string(t), Message: "no such table", Wanted: fmt.Sprintf("a file %s.csv with the columns %s", t, requiredColumns(t))})
		case len(g.rows) == 0:
			rd.add(Problem{File: g.file, Name: string(t), Message: "no rows", Wanted: "at least one row beneath the header"})
		}
	}
}

// failed tells whether the table was there but could not be read.
func (rd *reader) failed(t Table) bool {
	for _, p := range rd.problems {
		if p.Name == string(t) {
			return true
		}
	}
	return false
}

// requiredColumns lists the columns that a table must have.
func requiredColumns(t Table) string {
	var out []string
	for _, doc := range Tables() {
		for _, c := range doc.Columns {
			if doc.Table == t && c.Required {
				name := c.Name
				if c.Unit != "" {
					name += " (" + c.Unit + ")"
				}
				out = append(out, name)
			}
		}
	}
	return strings.Join(out, ", ")
}

// open finds the tables at a path. single tells that one file is all there is.
func (rd *reader) open(path string) (grids map[Table]*grid, single bool) {
	info, err := os.Stat(path)
	if err != nil {
		rd.add(Problem{File: path, Message: reason(err), Wanted: "a folder of CSV tables, a CSV file or an .xlsx workbook"})
		return nil, false
	}
	grids = map[Table]*grid{}
	switch {
	case info.IsDir():
		rd.openFolder(path, grids)
	case strings.EqualFold(filepath.Ext(path), ".csv"), strings.EqualFold(filepath.Ext(path), ".tsv"), strings.EqualFold(filepath.Ext(path), ".txt"):
		name := filepath.Base(path)
		t, ok := tableOf(strings.TrimSuffix(name, filepath.Ext(name)))
		if !ok {
			t = Results
		}
		if g := rd.openFile(path, t); g != nil {
			grids[t] = g
		}
		return grids, t == Results
	case strings.EqualFold(filepath.Ext(path), ".xlsx"), strings.EqualFold(filepath.Ext(path), ".xlsm"):
		rd.openWorkbook(path, grids)
	case strings.EqualFold(filepath.Ext(path), ".xls"), strings.EqualFold(filepath.Ext(path), ".ods"):
		rd.add(Problem{File: filepath.Base(path), Message: "a workbook of another kind", Wanted: "the workbook saved as .xlsx"})
	default:
		rd.add(Problem{File: filepath.Base(path), Message: "is no table", Wanted: "a folder of CSV tables, a CSV file (.csv, .tsv, .txt) or an .xlsx workbook"})
	}
	return grids, false
}

// openFolder reads the tables of a folder, in the order of their names.
func (rd *reader) openFolder(path string, grids map[Table]*grid) {
	entries, err := os.ReadDir(path)
	if err != nil {
		rd.add(Problem{File: filepath.Base(path), Message: reason(err), Wanted: "a folder that can be read"})
		return
	}
	sort.Slice(entries, func(i, j int) bool { return entries[i].Name() < entries[j].Name() })
	from := map[Table]string{}
	for _, e := range entries {
		name := e.Name()
		ext := strings.ToLower(filepath.Ext(name))
		t, ok := tableOf(strings.TrimSuffix(name, filepath.Ext(name)))
		if e.IsDir() || strings.HasPrefix(name, ".") {
			continue
		}
		if !ok || ext != ".csv" && ext != ".tsv" && ext != ".txt" {
			rd.note(name, "is not one of the tables and was not read")
			continue
		}
		if other, twice := from[t]; twice {
			rd.add(Problem{File: name, Name: string(t), Message: "the table is there already as " + other, Wanted: "one file for each table"})
			continue
		}
		from[t] = name
		if g := rd.openFile(filepath.Join(path, name), t); g != nil {
			grids[t] = g
		}
	}
	if len(from) == 0 {
		rd.add(Problem{File: base(path), Message: "no tables in the folder", Wanted: "files named boreholes.csv, strata.csv, water.csv, results.csv, oedometer.csv, cone.csv, history.csv, decisions.csv or settings.csv"})
	}
}

// openFile reads one CSV file into a grid.
func (rd *reader) openFile(path string, t Table) *grid {
	name := filepath.Base(path)
	data, ok := rd.bytes(path, string(t))
	if !ok {
		return nil
	}
	text, encoding, notes, err := decode(data)
	if err != nil {
		rd.add(Problem{File: name, Name: string(t), Message: err.Error(), Wanted: "a text file, e.g. saved as CSV UTF-8"})
		return nil
	}
	rd.source(name, t, data, encoding)
	for _, n := range notes {
		rd.noteFile(name, n)
	}
	before := len(rd.problems)
	g := rd.parse(name, t, text)
	rd.files[len(rd.files)-1].Rows = len(g.rows)
	if g.header.fields == nil {
		if len(rd.problems) == before {
			rd.add(Problem{File: name, Name: string(t), Message: "the file is empty", Wanted: "a header line: " + strings.TrimSpace(Template(string(t)))})
		}
		return nil
	}
	return g
}

// bytes returns the content of a file of a bearable size.
func (rd *reader) bytes(path, name string) ([]byte, bool) {
	info, err := os.Stat(path)
	if err == nil && info.Size() > maxFileSize {
		rd.add(Problem{File: filepath.Base(path), Name: name, Message: fmt.Sprintf("%.1f MB", float64(info.Size())/(1<<20)), Wanted: fmt.Sprintf("at most %d MB", maxFileSize>>20)})
		return nil, false
	}
	data, err := os.ReadFile(path)
	if err != nil {
		rd.add(Problem{File: filepath.Base(path), Name: name, Message: reason(err), Wanted: "a file that can be read"})
		return nil, false
	}
	return data, true
}

// source records a file that was read.
func (rd *reader) source(name string, t Table, data []byte, encoding string) {
	sum := sha256.Sum256(data)
	rd.files = append(rd.files, profile.SourceFile{Name: name, Table: string(t), Size: int64(len(data)), SHA256: hex.EncodeToString(sum[:]), Encoding: encoding})
}

// reason says in words why the file system refused.
func reason(err error) string {
	var path *fs.PathError
	switch {
	case errors.Is(err, fs.ErrNotExist):
		return "there is no such file or folder"
	case errors.Is(err, fs.ErrPermission):
		return "may not be read"
	case errors.As(err, &path):
		return path.Err.Error()
	}
	return err.Error()
}

// number formats a value for a message: as few digits as tell it, at most six.
func number(v float64) string {
	return strconv.FormatFloat(v, 'g', 6, 64)
}

// metres shows a depth as it was typed where it was typed in metres.
func metres(n profile.Number) string {
	if n.Source != nil {
		if u, ok := length.find(n.Source.Unit); ok && u.name == "m" && scan(n.Source.Text).kind == aNumber {
			return clean(n.Source.Text)
		}
	}
	return strconv.FormatFloat(n.Value, 'f', 2, 64)
}
