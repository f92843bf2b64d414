package report

import (
	"bytes"
	"crypto/sha256"
	"encoding/base64"
	"fmt"
	"math"
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

// TestContrast measures the colours of the style sheet on white: 4.5:1 for text and
// 3:1 for rules and the focus ring (WCAG 2 contrast minimum and non-text
// contrast; thresholds common practice).
func TestContrast(t *testing.T) {
	checked := 0
	for _, m := range regexp.MustCompile(`(color|border|border-bottom|outline):([^;}]*)`).FindAllStringSubmatch(styleSheet, -1) {
		hex := regexp.MustCompile(`#[0-9a-f]{3,6}`).FindString(m[2])
		if hex == "" || hex == "#ccc" { // the frame round a drawing on the screen carries no meaning
			continue
		}
		want := 3.0
		if m[1] == "color" {
			want = 4.5
		}
		if got := contrastOnWhite(t, hex); got < want {
			t.Errorf("%s:%s has a contrast of %.1f, want %.1f", m[1], m[2], got, want)
		}
		checked++
	}
	if checked < 5 {
		t.Errorf("only %d colours found", checked)
	}
}

func contrastOnWhite(t *testing.T, hex string) float64 {
	t.Helper()
	if len(hex) == 4 {
		hex = "#" + string([]byte{hex[1], hex[1], hex[2], hex[2], hex[3], hex[3]})
	}
	var r, g, b int
	if _, err := fmt.Sscanf(hex, "#%02x%02x%02x", &r, &g, &b); err != nil {
		t.Fatal(hex, err)
	}
	linear := func(v int) float64 {
		c := float64(v) / 255
		if c <= 0.03928 {
			return c / 12.92
		}
		return math.Pow((c+0.055)/1.055, 2.4)
	}
	return 1.05 / (0.2126*linear(r) + 0.7152*linear(g) + 0.0722*linear(b) + 0.05)
}
