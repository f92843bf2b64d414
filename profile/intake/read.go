package intake

import (
	"fmt"
	"io/fs"
	"path/filepath"
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
// its name, else the first that Options.Need names, else a results table that is a
// whole site: it may carry a water
// table depth, and its borehole column may be absent.
//
// The error, if any, is Problems: every problem of every file, in order.
func Read(path string, opt Options) (*profile.Site, error) {
	rd := &reader{opt: opt}
	return rd.read(base(path), func() (map[Table]*grid, bool) { return rd.open(path) })
}

// ReadFS reads the tables at the root of a file system, as Read does those of a
// folder of that name.
func ReadFS(fsys fs.FS, name string, opt Options) (*profile.Site, error) {
	rd := &reader{opt: opt}
	return rd.read(name, func() (map[Table]*grid, bool) {
		grids := map[Table]*grid{}
		rd.openFolder(fsys, name, grids)
		return grids, false
	})
}

// read opens the tables and makes a site of them. name is what the user calls
// the place where they are.
func (rd *reader) read(name string, open func() (map[Table]*grid, bool)) (*profile.Site, error) {
	if d := rd.opt.Decimal; d != "" && d != "." && d != "," {
		rd.add(Problem{File: name, Name: "decimal", Message: fmt.Sprintf("%q is not a decimal mark", d), Wanted: `"." or ","`})
		return nil, rd.problems
	}
	grids, single := open()
	rd.needed(name, grids)
	s := &site{rd: rd, single: single, index: map[string]int{}, layered: map[int]bool{}, torn: map[int]bool{}}
	s.out.Name = name
	if isTableFile(name) || isWorkbook(name) {
		s.out.Name = strings.TrimSuffix(name, filepath.Ext(name))
	}
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

// countRows records how many rows a table has beneath its header and units.
func (rd *reader) countRows(g *grid) {
	for i := range rd.files {
		if rd.files[i].Name == g.file {
			rd.files[i].Rows = len(g.rows)
		}
	}
}

// needed reports tables that the caller needs and that hold nothing.
func (rd *reader) needed(name string, grids map[Table]*grid) {
	if len(rd.problems) > 0 && len(grids) == 0 {
		return
	}
	for _, t := range rd.opt.Need {
		g := grids[t]
		switch {
		case g == nil && rd.failed(t):
		case g == nil:
			rd.add(Problem{File: name, Name: string(t), Message: "no such table", Wanted: fmt.Sprintf("a table %s with the columns %s", t, requiredColumns(t))})
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
