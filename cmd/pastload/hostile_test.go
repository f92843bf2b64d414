package main

import (
	"archive/zip"
	"bytes"
	"encoding/csv"
	"encoding/xml"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"testing"

	"github.com/xuri/excelize/v2"

	"pastload/testdata"
)

// textColumns are the columns of the worked scenario that hold free text or
// names. Words with a meaning of their own (stage, kind, decision) stay.
var textColumns = map[string]bool{
	"borehole": true, "stratum": true, "description": true, "remark": true, "drilled": true, "specimen": true, "method": true,
	"laboratory": true, "sampler": true, "source": true, "reason": true, "by": true, "note": true, "strength test": true, "test": true,
}

// hostileSite writes the worked scenario with a text behind every text of it.
func hostileSite(t *testing.T, dir, text string) {
	t.Helper()
	err := fs.WalkDir(testdata.Demo(), ".", func(path string, d fs.DirEntry, err error) error {
		if err != nil || d.IsDir() {
			return err
		}
		f, err := testdata.Demo().Open(path)
		if err != nil {
			return err
		}
		defer f.Close()
		rows, err := csv.NewReader(f).ReadAll()
		if err != nil {
			return err
		}
		for i, r := range rows {
			for j := range r {
				title := i > 0 && path == "settings.csv" && rows[0][j] == "value" && slices.Contains([]string{"project", "location", "client", "title", "organisation", "datum", "status"}, r[0])
				if i > 0 && r[j] != "" && (textColumns[rows[0][j]] || title) {
					r[j] = text + r[j]
				}
			}
		}
		var b bytes.Buffer
		if err := csv.NewWriter(&b).WriteAll(rows); err != nil {
			return err
		}
		return os.WriteFile(filepath.Join(dir, path), b.Bytes(), 0o644)
	})
	if err != nil {
		t.Fatal(err)
	}
}

// TestHostileTextEverywhere puts markup, formulas, quotes, marks that turn a line
// round and a very long name into every text of a site. In every output they must
// be text.
func TestHostileTextEverywhere(t *testing.T) {
	tags := func(page []byte) string {
		names := map[string]bool{}
		for _, m := range regexp.MustCompile(`<[a-zA-Z][a-zA-Z0-9]*`).FindAllString(string(page), -1) {
			names[m] = true
		}
		var out []string
		for n := range names {
			out = append(out, n)
		}
		slices.Sort(out)
		return fmt.Sprint(out)
	}
	plain := tags(hostileReport(t, "plain ")["report.html"])
	for _, text := range []string{`<script>alert(1)</script>`, `=HYPERLINK("x")&`, `"><img src=x onerror=alert(1)>'`, "\u202ereverse ", strings.Repeat("very long ", 1000)} {
		name := text[:min(len(text), 12)]
		t.Run(strconv.Quote(name), func(t *testing.T) {
			files := hostileReport(t, text)
			if got := tags(files["report.html"]); got != plain {
				t.Errorf("the elements of the page are %s, want %s", got, plain)
			}
			for name, data := range files {
				switch filepath.Ext(name) {
				case ".svg":
					wellFormed(t, name, data)
				case ".csv":
					harmlessCSV(t, name, data)
				case ".xlsx":
					noFormulas(t, data)
				case ".docx":
					for part, xml := range parts(t, data) {
						wellFormed(t, part, xml)
					}
				}
				if name != "tables.xlsx" && name != "report.docx" && filepath.Ext(name) != ".csv" && bytes.ContainsRune(data, '\u202e') {
					t.Errorf("%s holds a mark that turns the line round", name)
				}
			}
		})
	}
}

// hostileReport runs a report on a hostile site and returns its files.
func hostileReport(t *testing.T, text string) map[string][]byte {
	t.Helper()
	site, out := t.TempDir(), filepath.Join(t.TempDir(), "out")
	hostileSite(t, site, text)
	var stdout, stderr bytes.Buffer
	if status := run([]string{"report", site, "-o", out}, strings.NewReader(""), &stdout, &stderr); status != exitDone {
		t.Fatalf("status %d\n%.3000s", status, stderr.String())
	}
	files := map[string][]byte{}
	err := filepath.WalkDir(out, func(path string, d fs.DirEntry, err error) error {
		if err != nil || d.IsDir() {
			return err
		}
		rel, _ := filepath.Rel(out, path)
		if len(filepath.Base(rel)) > 120 {
			t.Errorf("a file name of %d characters", len(filepath.Base(rel)))
		}
		files[filepath.ToSlash(rel)], err = os.ReadFile(path)
		return err
	})
	if err != nil {
		t.Fatal(err)
	}
	if len(files) < 30 {
		t.Fatalf("only %d files", len(files))
	}
	return files
}

func wellFormed(t *testing.T, name string, data []byte) {
	t.Helper()
	if strings.HasSuffix(name, ".svg") || strings.HasSuffix(name, ".xml") || strings.HasSuffix(name, ".rels") {
		d := xml.NewDecoder(bytes.NewReader(data))
		for {
			tok, err := d.Token()
			if err == io.EOF {
				return
			}
			if err != nil {
				t.Errorf("%s: %v", name, err)
				return
			}
			if s, ok := tok.(xml.StartElement); ok && (s.Name.Local == "script" || s.Name.Local == "img") {
				t.Errorf("%s has an element %s", name, s.Name.Local)
			}
		}
	}
}

// harmlessCSV looks for cells that a spreadsheet would run.
func harmlessCSV(t *testing.T, name string, data []byte) {
	t.Helper()
	rows, err := csv.NewReader(bytes.NewReader(data)).ReadAll()
	if err != nil {
		t.Errorf("%s: %v", name, err)
	}
	for _, r := range rows {
		for _, c := range r {
			if c == "" || !strings.ContainsRune("=+-@\t\r", rune(c[0])) {
				continue
			}
			if _, err := strconv.ParseFloat(c, 64); err != nil {
				t.Errorf("%s: the cell %.30q would be run", name, c)
			}
		}
	}
}

func noFormulas(t *testing.T, data []byte) {
	t.Helper()
	f, err := excelize.OpenReader(bytes.NewReader(data))
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	for _, sheet := range f.GetSheetList() {
		rows, err := f.GetRows(sheet)
		if err != nil {
			t.Fatal(err)
		}
		for i, r := range rows {
			for j := range r {
				at, _ := excelize.CoordinatesToCellName(j+1, i+1)
				if formula, _ := f.GetCellFormula(sheet, at); formula != "" {
					t.Errorf("%s!%s holds the formula %.30q", sheet, at, formula)
				}
			}
		}
	}
}

// parts returns the files of a zipped document.
func parts(t *testing.T, data []byte) map[string][]byte {
	t.Helper()
	z, err := zip.NewReader(bytes.NewReader(data), int64(len(data)))
	if err != nil {
		t.Fatal(err)
	}
	out := map[string][]byte{}
	for _, f := range z.File {
		r, err := f.Open()
		if err != nil {
			t.Fatal(err)
		}
		out[f.Name], err = io.ReadAll(r)
		r.Close()
		if err != nil {
			t.Fatal(err)
		}
	}
	return out
}
