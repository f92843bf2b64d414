package intake

import (
	"bytes"
	"errors"
	"math"
	"os"
	"path/filepath"
	"reflect"
	"testing"
	"testing/fstest"
	"unicode/utf8"

	"pastload/profile"
)

// checkFuzzed checks what must hold whatever was read: no value that is not
// finite, and no problem without a file and, within a file, a line.
func checkFuzzed(t *testing.T, site *profile.Site, err error) {
	t.Helper()
	if err == nil {
		if where := notFinite("site", reflect.ValueOf(*site)); where != "" {
			t.Fatalf("%s is not finite", where)
		}
		return
	}
	var ps Problems
	if !errors.As(err, &ps) || len(ps) == 0 {
		t.Fatalf("error is %#v", err)
	}
	for _, p := range ps {
		if p.File == "" || p.Message == "" || p.Line < 0 || p.Column < 0 || p.Line == 0 && p.Column > 0 {
			t.Fatalf("a problem without a place: %#v", p)
		}
		if !utf8.ValidString(p.String()) {
			t.Fatalf("not printable: %q", p.String())
		}
	}
}

func notFinite(where string, v reflect.Value) string {
	switch v.Kind() {
	case reflect.Struct:
		for i := range v.NumField() {
			if w := notFinite(where+"."+v.Type().Field(i).Name, v.Field(i)); w != "" {
				return w
			}
		}
	case reflect.Slice:
		for i := range v.Len() {
			if w := notFinite(where, v.Index(i)); w != "" {
				return w
			}
		}
	case reflect.Float64:
		if math.IsNaN(v.Float()) || math.IsInf(v.Float(), 0) {
			return where
		}
	}
	return ""
}

// FuzzTables reads arbitrary text as each table.
func FuzzTables(f *testing.F) {
	archives, err := filepath.Glob("testdata/broken/*.txtar")
	if err != nil {
		f.Fatal(err)
	}
	for _, name := range archives {
		a, err := readArchive(name)
		if err != nil {
			f.Fatal(err)
		}
		for _, file := range a.files {
			for i, doc := range Tables() {
				if file.name == string(doc.Table)+".csv" {
					f.Add(uint8(i), []byte(file.data))
				}
			}
		}
	}
	f.Add(uint8(3), []byte(utf16("borehole;depth (m)\nBH1;4,00–4,45\n", false)))
	f.Add(uint8(3), []byte("sep=;\nborehole;depth (m)\n\"BH\n1\";2"))
	f.Add(uint8(3), []byte("\xff\xfe\x00"))
	f.Fuzz(func(t *testing.T, which uint8, data []byte) {
		tables := Tables()
		table := tables[int(which)%len(tables)].Table
		// A borehole and a stratum for the other tables to refer to.
		fsys := fstest.MapFS{
			"strata.csv": {Data: []byte("borehole,top (m),base (m),stratum\nBH1,0,5,Clay\n")},
		}
		fsys[string(table)+".csv"] = &fstest.MapFile{Data: data}
		site, err := ReadFS(fsys, "site", Options{})
		checkFuzzed(t, site, err)
		again, err2 := ReadFS(fsys, "site", Options{})
		if (err == nil) != (err2 == nil) || err != nil && err.Error() != err2.Error() {
			t.Fatal("read twice, told twice differently")
		}
		if err == nil && !reflect.DeepEqual(site, again) {
			t.Fatal("read twice, two sites")
		}
	})
}

// FuzzWorkbook reads damaged workbooks.
func FuzzWorkbook(f *testing.F) {
	data, err := os.ReadFile(book(f, plainBook(), nil))
	if err != nil {
		f.Fatal(err)
	}
	f.Add(data, uint16(0), byte(0))
	f.Add(data[:len(data)/2], uint16(20), byte(7))
	f.Fuzz(func(t *testing.T, data []byte, at uint16, with byte) {
		data = bytes.Clone(data)
		if int(at) < len(data) {
			data[at] ^= with
		}
		rd := &reader{}
		site, err := rd.read("site.xlsx", func() (map[Table]*grid, bool) {
			grids := map[Table]*grid{}
			rd.openWorkbook(fstest.MapFS{"site.xlsx": {Data: data}}, "site.xlsx", grids)
			return grids, false
		})
		checkFuzzed(t, site, err)
	})
}
