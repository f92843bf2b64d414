package intake

import (
	"errors"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

// TestBroken reads every site of testdata/broken and compares the problems line
// by line. An archive holds the tables of a site and, last, the problems that
// are expected; its comment says what is wrong with the site, "single: FILE"
// that one file is read by itself, and "need: TABLE" which table is needed.
func TestBroken(t *testing.T) {
	archives, err := filepath.Glob("testdata/broken/*.txtar")
	if err != nil || len(archives) < 45 {
		t.Fatalf("%d archives, %v; want at least 45", len(archives), err)
	}
	for _, name := range archives {
		t.Run(strings.TrimSuffix(filepath.Base(name), ".txtar"), func(t *testing.T) {
			a, err := readArchive(name)
			if err != nil {
				t.Fatal(err)
			}
			dir := filepath.Join(t.TempDir(), "site")
			if err := os.Mkdir(dir, 0o755); err != nil {
				t.Fatal(err)
			}
			want := ""
			for _, f := range a.files {
				if f.name == "problems" {
					want = f.data
					continue
				}
				if err := os.WriteFile(filepath.Join(dir, f.name), []byte(f.data), 0o644); err != nil {
					t.Fatal(err)
				}
			}
			path, opt := dir, Options{}
			for line := range strings.Lines(a.comment) {
				if file, ok := strings.CutPrefix(line, "single: "); ok {
					path = filepath.Join(dir, strings.TrimSpace(file))
				}
				if table, ok := strings.CutPrefix(line, "need: "); ok {
					opt.Need = append(opt.Need, Table(strings.TrimSpace(table)))
				}
			}
			site, err := Read(path, opt)
			if err == nil {
				t.Fatal("read without a problem")
			}
			if site != nil {
				t.Error("a site beside an error")
			}
			var ps Problems
			if !errors.As(err, &ps) {
				t.Fatalf("error is a %T, want Problems", err)
			}
			got := err.Error() + "\n"
			if os.Getenv("UPDATE_GOLDEN") != "" {
				update(t, name, a, got)
			} else if got != want {
				t.Errorf("got\n%swant\n%s", got, want)
			}
		})
	}
}

// update rewrites the problems of an archive.
func update(t *testing.T, name string, a *archive, got string) {
	t.Helper()
	kept := a.files[:0]
	for _, f := range a.files {
		if f.name != "problems" {
			kept = append(kept, f)
		}
	}
	a.files = append(kept, archived{"problems", got})
	if err := os.WriteFile(name, []byte(a.String()), 0o644); err != nil {
		t.Fatal(err)
	}
}

// An archive holds files in one text: a comment, then each file beneath a line
// "-- name --".
type archive struct {
	comment string
	files   []archived
}

type archived struct{ name, data string }

func readArchive(name string) (*archive, error) {
	text, err := os.ReadFile(name)
	if err != nil {
		return nil, err
	}
	a := &archive{}
	to := &a.comment
	for line := range strings.Lines(string(text)) {
		if after, ok := strings.CutPrefix(line, "-- "); ok && strings.HasSuffix(line, " --\n") {
			a.files = append(a.files, archived{name: strings.TrimSuffix(after, " --\n")})
			to = &a.files[len(a.files)-1].data
			continue
		}
		*to += line
	}
	return a, nil
}

// String is the inverse of readArchive.
func (a *archive) String() string {
	var b strings.Builder
	b.WriteString(a.comment)
	for _, f := range a.files {
		b.WriteString("-- " + f.name + " --\n" + f.data)
	}
	return b.String()
}
