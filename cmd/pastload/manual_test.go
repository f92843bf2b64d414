package main

import (
	"bytes"
	"fmt"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"pastload/correlate"
	"pastload/profile/intake"
)

const readme = "../../README.md"

// update tells that golden files are to be rewritten, which their reader must
// look at before they are committed.
var update = os.Getenv("UPDATE_GOLDEN") != ""

// TestManualListsEveryTableAndColumn holds the generated parts of the README
// against the program: tables, columns, settings, and the relations left out.
func TestManualListsEveryTableAndColumn(t *testing.T) {
	text, err := os.ReadFile(readme)
	if err != nil {
		t.Fatal(err)
	}
	got := string(text)
	for _, part := range []struct{ name, want string }{
		{"tables", manualTables()},
		{"settings", manualSettings()},
		{"left out", manualLeftOut()},
	} {
		begin, end := "<!-- "+part.name+" -->\n", "<!-- end of "+part.name+" -->"
		i, j := strings.Index(got, begin), strings.Index(got, end)
		if i < 0 || j < i {
			t.Fatalf("README.md has no part between %q and %q", strings.TrimSpace(begin), end)
		}
		if have := got[i+len(begin) : j]; have != part.want {
			if !update {
				t.Errorf("README.md, %s: not what the program says; run UPDATE_GOLDEN=1 go test ./cmd/pastload and read it", part.name)
			}
			got = got[:i+len(begin)] + part.want + got[j:]
		}
	}
	if update {
		if err := os.WriteFile(readme, []byte(got), 0o644); err != nil {
			t.Fatal(err)
		}
	}
}

// shownSynonyms is how many other names of a column the manual lists.
const shownSynonyms = 5

func manualTables() string {
	var b strings.Builder
	for _, d := range intake.Tables() {
		fmt.Fprintf(&b, "\n**`%s`**: a row is %s.\n\n| column | units | meaning | also read as |\n|---|---|---|---|\n", d.Table, d.Row)
		for _, c := range d.Columns {
			name := c.Name
			if c.Required {
				name += " *"
			}
			synonyms := c.Synonyms[:min(len(c.Synonyms), shownSynonyms)]
			fmt.Fprintf(&b, "| %s | %s | %s | %s |\n", name, c.Units, bar(c.Meaning), bar(strings.Join(synonyms, ", ")))
		}
	}
	b.WriteByte('\n')
	return b.String()
}

func manualSettings() string {
	var b strings.Builder
	b.WriteString("| setting | unit | default | meaning |\n|---|---|---|---|\n")
	for _, s := range intake.KnownSettings() {
		fmt.Fprintf(&b, "| %s | %s | %s | %s |\n", s.Name, s.Unit, s.Default, bar(s.Meaning))
	}
	return b.String()
}

func manualLeftOut() string {
	var b strings.Builder
	b.WriteString("| relation | why it is left out |\n|---|---|\n")
	for _, o := range correlate.LeftOut() {
		fmt.Fprintf(&b, "| %s | %s |\n", bar(o.Name), bar(o.Reason))
	}
	return b.String()
}

// bar keeps a text inside its cell of a Markdown table.
func bar(s string) string { return strings.ReplaceAll(s, "|", `\|`) }

// TestManualCommands runs every command line of the README that starts with
// "pastload", in order and in one folder, as its reader would.
func TestManualCommands(t *testing.T) {
	text, err := os.ReadFile(readme)
	if err != nil {
		t.Fatal(err)
	}
	t.Chdir(t.TempDir())
	n := 0
	for _, line := range strings.Split(string(text), "\n") {
		command, found := strings.CutPrefix(line, "    pastload ")
		if !found {
			continue
		}
		command, _, _ = strings.Cut(command, "  #")
		var out, errw bytes.Buffer
		if status := run(words(command), strings.NewReader(""), &out, &errw); status != exitDone && status != exitFindings {
			t.Errorf("pastload %s: status %d\n%s", command, status, errw.String())
		}
		n++
	}
	if n < 8 {
		t.Errorf("only %d commands found in README.md", n)
	}
}

// words splits a command line at blanks outside double quotes.
func words(line string) []string {
	var out []string
	quoted := false
	for _, part := range strings.FieldsFunc(line, func(r rune) bool {
		if r == '"' {
			quoted = !quoted
		}
		return r == ' ' && !quoted
	}) {
		out = append(out, strings.ReplaceAll(part, `"`, ""))
	}
	return out
}

// TestManualPicture holds the picture of the README against what draw makes of
// the worked scenario.
func TestManualPicture(t *testing.T) {
	const picture = "../../testdata/demo-depth.svg"
	golden, err := filepath.Abs(picture)
	if err != nil {
		t.Fatal(err)
	}
	t.Chdir(t.TempDir())
	var out, errw bytes.Buffer
	for _, args := range [][]string{{"init", "demo", "--demo"}, {"draw", "demo", "-o", "drawings", "--paper", "A3"}} {
		if status := run(args, strings.NewReader(""), &out, &errw); status != exitDone {
			t.Fatalf("%v: status %d\n%s", args, status, errw.String())
		}
	}
	got, err := os.ReadFile("drawings/depth-BH1.svg")
	if err != nil {
		t.Fatal(err)
	}
	if update {
		if err := os.WriteFile(golden, got, 0o644); err != nil {
			t.Fatal(err)
		}
	}
	want, err := os.ReadFile(golden)
	if err != nil {
		t.Fatal(err)
	}
	if !bytes.Equal(got, want) {
		t.Error("testdata/demo-depth.svg is not what draw makes; run UPDATE_GOLDEN=1 go test ./cmd/pastload and look at it")
	}
}
