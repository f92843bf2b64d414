package report

import (
	"bytes"
	"crypto/sha256"
	"encoding/base64"
	"fmt"
	"regexp"
	"strings"
	"testing"
)

// hostile is text that would take over a page, a style sheet or a line.
var hostile = []string{
	`<script>alert(1)</script>`, `"><img src=x onerror=alert(1)>`, `</style><b>`, `{{.}}`, "\u202eevil", "a\x00b", strings.Repeat("long ", 2000), `a" } body{display:none} /*`,
}

func document(text string) *Document {
	tab := &Table{Name: "t", Title: text, Note: text, Columns: []Column{{text, "remark", Words, 0}, {"value", "value", Stress, 1}}}
	tab.Add(T(text), N(12.34))
	d := &Document{Title: text, Subtitle: text, Running: text, Fields: []Field{{"Project", text}}}
	d.add("one", text, Paragraph(text), List{text}, tab, Figure{ID: "f", Caption: text, SVG: []byte(`<?xml version="1.0"?><svg xmlns="http://www.w3.org/2000/svg"/>`)})
	return d
}

func page1(t *testing.T, text string) string {
	t.Helper()
	var b bytes.Buffer
	if err := document(text).WriteHTML(&b, SI); err != nil {
		t.Fatal(err)
	}
	return b.String()
}

// TestHostileTextIsText: whatever a table holds, the page has the elements of a
// page with plain text and none besides.
func TestHostileTextIsText(t *testing.T) {
	tags := regexp.MustCompile(`<[a-zA-Z/!][^\s>]*`)
	want := fmt.Sprint(tags.FindAllString(page1(t, "plain"), -1))
	for _, h := range hostile {
		got := page1(t, h)
		if have := fmt.Sprint(tags.FindAllString(got, -1)); have != want {
			t.Errorf("%.30q changes the elements of the page", h)
		}
		if strings.ContainsAny(got, "\x00\u202e") {
			t.Errorf("%.30q: a control or direction mark is on the page", h)
		}
	}
}

// TestPolicyAllowsTheStyleAndNothingElse recomputes the hash of the one style
// sheet and looks for anything that would need more.
func TestPolicyAllowsTheStyleAndNothingElse(t *testing.T) {
	for _, text := range append([]string{"plain"}, hostile...) {
		got := page1(t, text)
		_, rest, ok := strings.Cut(got, "<style>")
		style, _, end := strings.Cut(rest, "</style>")
		if !ok || !end {
			t.Fatal("no style sheet")
		}
		sum := sha256.Sum256([]byte(style))
		want := "style-src &#39;sha256-" + base64.StdEncoding.EncodeToString(sum[:]) + "&#39;"
		if alt := strings.ReplaceAll(want, "+", "&#43;"); !strings.Contains(got, want) && !strings.Contains(got, alt) {
			t.Errorf("the policy does not name the hash of the style sheet for %.20q", text)
		}
		for _, never := range []string{"<script", " style=\"", "<link", "@import", "url("} {
			if strings.Contains(strings.ReplaceAll(got, "&lt;script", ""), never) {
				t.Errorf("the page of %.20q has %q", text, never)
			}
		}
	}
}

func TestHTMLTables(t *testing.T) {
	got := page1(t, "plain")
	for _, want := range []string{`<html lang="en">`, `<caption>plain</caption>`, `<th scope="col" class="n">value (kPa)</th>`, `<td class="n">12.3</td>`, `<figcaption>plain</figcaption>`, `<svg xmlns`} {
		if !strings.Contains(got, want) {
			t.Errorf("no %s", want)
		}
	}
	if strings.Contains(got, "<?xml") {
		t.Error("an XML declaration inside the page")
	}
	if strings.Count(got, "<h1") != 1 {
		t.Error("a page has one first heading")
	}
}

func FuzzHostileText(f *testing.F) {
	for _, h := range hostile {
		f.Add(h)
	}
	tags := regexp.MustCompile(`<[a-zA-Z/!][^\s>]*`)
	var plain bytes.Buffer
	if err := document("plain").WriteHTML(&plain, SI); err != nil {
		f.Fatal(err)
	}
	want := len(tags.FindAllString(plain.String(), -1))
	f.Fuzz(func(t *testing.T, text string) {
		if text == "" {
			return // an empty subtitle or note has no element of its own
		}
		var b bytes.Buffer
		if err := document(text).WriteHTML(&b, SI); err != nil {
			t.Fatal(err)
		}
		if got := len(tags.FindAllString(b.String(), -1)); got != want {
			t.Errorf("%d elements, want %d", got, want)
		}
	})
}
