package intake

import (
	"bytes"
	"errors"
	"fmt"
	"io/fs"
	"math"
	"os"
	"path/filepath"
	"reflect"
	"testing"
	"testing/fstest"

	"pastload/profile"
)

// closeEnough is the relative difference that converting a unit there and back
// can leave: a few units in the last of 53 bits.
const closeEnough = 1e-12

// differ returns where two sites tell a different ground, "" where they agree.
// What they were read from is left aside: cells, files and notes.
func differ(a, b *profile.Site) string {
	return differAt("site", reflect.ValueOf(*a), reflect.ValueOf(*b))
}

func differAt(where string, a, b reflect.Value) string {
	switch a.Kind() {
	case reflect.Struct:
		for i := range a.NumField() {
			name := a.Type().Field(i).Name
			if name == "Source" || name == "Files" || name == "Notes" || name == "Given" || name == "Line" {
				continue
			}
			if d := differAt(where+"."+name, a.Field(i), b.Field(i)); d != "" {
				return d
			}
		}
	case reflect.Slice:
		if a.Len() != b.Len() {
			return fmt.Sprintf("%s: %d and %d long", where, a.Len(), b.Len())
		}
		for i := range a.Len() {
			if d := differAt(fmt.Sprintf("%s[%d]", where, i), a.Index(i), b.Index(i)); d != "" {
				return d
			}
		}
	case reflect.Float64:
		x, y := a.Float(), b.Float()
		if math.Abs(x-y) > closeEnough*math.Max(math.Abs(x), math.Abs(y)) {
			return fmt.Sprintf("%s: %v and %v", where, x, y)
		}
	default:
		if !reflect.DeepEqual(a.Interface(), b.Interface()) {
			return fmt.Sprintf("%s: %v and %v", where, a.Interface(), b.Interface())
		}
	}
	return ""
}

// files are the tables of a site by file name.
type files map[string]string

// write puts the files into a folder named "site" and returns its path.
func (f files) write(t *testing.T) string {
	t.Helper()
	dir := filepath.Join(t.TempDir(), "site")
	if err := os.Mkdir(dir, 0o755); err != nil {
		t.Fatal(err)
	}
	for name, data := range f {
		if err := os.WriteFile(filepath.Join(dir, name), []byte(data), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	return dir
}

// fs returns the files as a file system.
func (f files) fs() fs.FS {
	m := fstest.MapFS{}
	for name, data := range f {
		m[name] = &fstest.MapFile{Data: []byte(data)}
	}
	return m
}

// mustRead reads the files and fails the test where they have problems.
func mustRead(t *testing.T, f files) *profile.Site {
	t.Helper()
	site, err := Read(f.write(t), Options{})
	if err != nil {
		t.Fatal(err)
	}
	return site
}

// problemsOf reads the files and returns the text of their problems.
func problemsOf(t *testing.T, f files, opt Options) string {
	t.Helper()
	_, err := Read(f.write(t), opt)
	if err == nil {
		return ""
	}
	var ps Problems
	if !errors.As(err, &ps) {
		t.Fatalf("error is a %T, want Problems", err)
	}
	return ps.Error()
}

// utf16 encodes a text with a byte-order mark.
func utf16(text string, bigEndian bool) string {
	var b bytes.Buffer
	put := func(r rune) {
		if bigEndian {
			b.WriteByte(byte(r >> 8))
			b.WriteByte(byte(r))
			return
		}
		b.WriteByte(byte(r))
		b.WriteByte(byte(r >> 8))
	}
	put(0xfeff)
	for _, r := range text {
		put(r) // the texts of the tests stay within the basic plane
	}
	return b.String()
}
