package intake

import (
	"crypto/sha256"
	"encoding/hex"
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path"
	"path/filepath"
	"slices"
	"sort"
	"strings"

	"pastload/profile"
)

// open finds the tables at a place. single tells that one file is all there is.
func (rd *reader) open(place string) (grids map[Table]*grid, single bool) {
	info, err := os.Stat(place)
	if err != nil {
		rd.add(Problem{File: place, Message: reason(err), Wanted: "a folder of CSV tables, a CSV file or an .xlsx workbook"})
		return nil, false
	}
	grids = map[Table]*grid{}
	folder, name := filepath.Split(place)
	if folder == "" {
		folder = "."
	}
	fsys := os.DirFS(folder)
	switch {
	case info.IsDir():
		rd.openFolder(os.DirFS(place), base(place), grids)
	case isTableFile(name):
		t, ok := tableOf(strings.TrimSuffix(name, filepath.Ext(name)))
		if !ok {
			t = Results
			if len(rd.opt.Need) > 0 {
				t = rd.opt.Need[0] // what the caller cannot do without is what the file must be
			}
		}
		if g := rd.openFile(fsys, name, t); g != nil {
			grids[t] = g
		}
		return grids, t == Results
	case isWorkbook(name):
		rd.openWorkbook(fsys, name, grids)
	case strings.EqualFold(filepath.Ext(place), ".xls"), strings.EqualFold(filepath.Ext(place), ".ods"):
		rd.add(Problem{File: name, Message: "a workbook of another kind", Wanted: "the workbook saved as .xlsx"})
	default:
		rd.add(Problem{File: name, Message: "is no table", Wanted: "a folder of CSV tables, a CSV file (.csv, .tsv, .txt) or an .xlsx workbook"})
	}
	return grids, false
}

// isTableFile tells whether a file name is that of a text table.
func isTableFile(name string) bool { return hasExt(name, ".csv", ".tsv", ".txt") }

// isWorkbook tells whether a file name is that of a workbook we can read.
func isWorkbook(name string) bool { return hasExt(name, ".xlsx", ".xlsm") }

func hasExt(name string, exts ...string) bool {
	return slices.Contains(exts, strings.ToLower(filepath.Ext(name)))
}

// openFolder reads the tables of a folder, in the order of their names.
func (rd *reader) openFolder(fsys fs.FS, folder string, grids map[Table]*grid) {
	entries, err := fs.ReadDir(fsys, ".")
	if err != nil {
		rd.add(Problem{File: folder, Message: reason(err), Wanted: "a folder that can be read"})
		return
	}
	sort.Slice(entries, func(i, j int) bool { return entries[i].Name() < entries[j].Name() })
	from := map[Table]string{}
	book := ""
	for _, e := range entries {
		name := e.Name()
		t, ok := tableOf(strings.TrimSuffix(name, filepath.Ext(name)))
		if e.IsDir() || strings.HasPrefix(name, ".") || strings.HasSuffix(name, ".lock") {
			continue
		}
		if isWorkbook(name) && !strings.HasPrefix(name, "~") {
			book = name
		}
		if !ok || !isTableFile(name) {
			rd.note(name, "is not one of the tables and was not read")
			continue
		}
		if other, twice := from[t]; twice {
			rd.add(Problem{File: name, Name: string(t), Message: "the table is there already as " + other, Wanted: "one file for each table"})
			continue
		}
		from[t] = name
		if g := rd.openFile(fsys, name, t); g != nil {
			grids[t] = g
		}
	}
	switch {
	case len(from) == 0 && book != "":
		rd.add(Problem{File: folder, Message: "no tables in the folder, but a workbook, " + book, Wanted: "the workbook itself to be named: " + path.Join(folder, book)})
	case len(from) == 0:
		rd.add(Problem{File: folder, Message: "no tables in the folder", Wanted: "files named boreholes.csv, strata.csv, water.csv, results.csv, oedometer.csv, cone.csv, history.csv, decisions.csv or settings.csv"})
	}
}

// openFile reads one CSV file into a grid.
func (rd *reader) openFile(fsys fs.FS, name string, t Table) *grid {
	data, ok := rd.bytes(fsys, name, string(t))
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
	if g.header.fields == nil {
		if len(rd.problems) == before {
			rd.add(Problem{File: name, Name: string(t), Message: "the file is empty", Wanted: "a header line with the columns " + requiredColumns(t)})
		}
		return nil
	}
	return g
}

// bytes returns the content of a file of a bearable size.
func (rd *reader) bytes(fsys fs.FS, name, table string) ([]byte, bool) {
	info, err := fs.Stat(fsys, name)
	if err == nil && info.Size() > maxFileSize {
		rd.add(Problem{File: name, Name: table, Message: fmt.Sprintf("%.1f MB", float64(info.Size())/(1<<20)), Wanted: fmt.Sprintf("at most %d MB", maxFileSize>>20)})
		return nil, false
	}
	data, err := fs.ReadFile(fsys, name)
	if err != nil {
		rd.add(Problem{File: name, Name: table, Message: reason(err), Wanted: "a file that can be read"})
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
	var fault *fs.PathError
	switch {
	case errors.Is(err, fs.ErrNotExist):
		return "there is no such file or folder"
	case errors.Is(err, fs.ErrPermission):
		return "may not be read"
	case errors.As(err, &fault):
		return fault.Err.Error()
	}
	return err.Error()
}
