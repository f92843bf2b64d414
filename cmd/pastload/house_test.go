package main

import (
	"go/parser"
	"go/token"
	"io/fs"
	"path/filepath"
	"strconv"
	"strings"
	"testing"
)

// TestImportArrows holds the code against the house: correlate ← profile ←
// render ← cmd, leaf packages of profile that know nothing of the site, and one
// importer each for the table reader and the drawing library.
func TestImportArrows(t *testing.T) {
	rank := map[string]int{"correlate": 0, "profile": 1, "render": 2, "testdata": 0, "cmd": 3}
	leaves := map[string]bool{"profile/insitu": true, "profile/oedometer": true, "profile/history": true, "profile/cone": true}
	owners := map[string]string{
		"github.com/gocarina/gocsv":   "profile/intake",
		"github.com/ajstarks/svgo":    "render/draw",
		"github.com/spf13/cobra":      "cmd/pastload",
		"golang.org/x/text/encoding/": "profile/intake",
	}
	root := filepath.Join("..", "..")
	seen := 0
	err := filepath.WalkDir(root, func(path string, d fs.DirEntry, err error) error {
		if err != nil || d.IsDir() || !strings.HasSuffix(path, ".go") || strings.HasSuffix(path, "_test.go") {
			return err
		}
		rel, _ := filepath.Rel(root, path)
		dir := filepath.ToSlash(filepath.Dir(rel))
		mine, known := rank[strings.Split(dir, "/")[0]]
		if !known {
			t.Errorf("%s: a package outside the house", dir)
			return nil
		}
		file, err := parser.ParseFile(token.NewFileSet(), path, nil, parser.ImportsOnly)
		if err != nil {
			return err
		}
		seen++
		for _, spec := range file.Imports {
			name, _ := strconv.Unquote(spec.Path.Value)
			for lib, owner := range owners {
				if strings.HasPrefix(name, lib) && dir != owner {
					t.Errorf("%s imports %s; only %s may", rel, name, owner)
				}
			}
			inner, ours := strings.CutPrefix(name, "pastload/")
			if !ours {
				continue
			}
			if rank[strings.Split(inner, "/")[0]] > mine {
				t.Errorf("%s imports %s: against the arrows", rel, name)
			}
			if leaves[dir] && strings.HasPrefix(inner, "profile") && inner != dir && !(dir == "profile/cone" && leaves[inner]) {
				t.Errorf("%s imports %s: a leaf package knows nothing of the site", rel, name)
			}
		}
		return nil
	})
	if err != nil {
		t.Fatal(err)
	}
	if seen < 20 {
		t.Fatalf("only %d files were looked at: the walk missed the code", seen)
	}
}
