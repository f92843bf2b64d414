package draw

import (
	"bytes"
	"encoding/xml"
	"errors"
	"io"
	"math"
	"strings"
	"testing"
)

func page() Sheet { return Sheet{Width: 100, Height: 50, ID: "t", Title: "test"} }

// drawn returns what a canvas writes.
func drawn(t testing.TB, f func(*Canvas)) string {
	t.Helper()
	c := New(page())
	f(c)
	var b bytes.Buffer
	if err := c.Finish(&b); err != nil {
		t.Fatal(err)
	}
	return b.String()
}

func TestNumbers(t *testing.T) {
	for _, c := range []struct {
		v    float64
		want string
	}{
		{0, "0"}, {math.Copysign(0, -1), "0"}, {-0.004, "0"}, {-0.006, "-0.01"}, {1, "1"}, {1.5, "1.5"}, {1.25, "1.25"},
		{12.345, "12.35"}, {0.1 + 0.2, "0.3"}, {-3.10, "-3.1"}, {999999.999, "1000000"}, {0.05, "0.05"}, {-12.05, "-12.05"},
	} {
		if got := format(c.v); got != c.want {
			t.Errorf("format(%v) = %q, want %q", c.v, got, c.want)
		}
	}
}

func TestTrimZeros(t *testing.T) {
	for in, want := range map[string]string{
		"12.50": "12.5", "3.00": "3", "-0.10": "-0.1", "100.00": "100", "#000000": "#000000", "a.00": "a.00", "1.0": "1.0", "0.5 0.70": "0.5 0.70", "": "",
	} {
		if got := string(trimZeros([]byte(in))); got != want {
			t.Errorf("trimZeros(%q) = %q, want %q", in, got, want)
		}
	}
}

func TestShapes(t *testing.T) {
	for _, c := range []struct {
		name string
		draw func(*Canvas)
		want string
	}{
		{"line", func(c *Canvas) { c.Line(1, 2, 3.456, 4.5, Pen{Width: 0.25}) }, `<line x1="1" y1="2" x2="3.46" y2="4.5" stroke="#000000" stroke-width="0.25" />`},
		{"dashed line", func(c *Canvas) { c.Line(0, 0, 1, 1, Pen{Colour: Blue, Width: 0.18, Dash: Dotted}) }, `stroke="#004488" stroke-width="0.18" stroke-dasharray="0.5 0.7"`},
		{"rectangle", func(c *Canvas) { c.Rect(Box{1, 2, 4, 6}, Pen{}, Fill{Colour: Amber, Opacity: 0.5}) }, `<rect x="1" y="2" width="3" height="4" fill="#DDAA33" fill-opacity="0.5" stroke="none" />`},
		{"circle", func(c *Canvas) { c.Circle(1, 2, 0.5, Pen{Width: 0.13}, Fill{}) }, `<circle cx="1" cy="2" r="0.5" fill="none" stroke="#000000" stroke-width="0.13" />`},
		{"polyline", func(c *Canvas) { c.Polyline([]Point{{0, 0}, {1, 1}, {1.001, 1.001}, {2, 0}}, Pen{Width: 0.35}) }, `<path d="M0 0L1 1L2 0" fill="none"`},
		{"polygon", func(c *Canvas) { c.Polygon([]Point{{0, 0}, {1, 1}, {2, 0}}, Pen{}, Fill{Colour: Black}) }, `<path d="M0 0L1 1L2 0Z" fill="#000000" stroke="none" />`},
		{"colour that is none", func(c *Canvas) { c.Line(0, 0, 1, 1, Pen{Width: 1, Colour: `red" onload="x`}) }, `stroke="#000000"`},
		{"anchored text", func(c *Canvas) { c.Text(5, 6, Text("a < b & \"c\""), Font{Size: 8, Anchor: Middle, Bold: true}) }, `<text x="5" y="6" font-size="2.82" fill="#000000" font-weight="bold" text-anchor="middle" >a &lt; b &amp; &#34;c&#34;</text>`},
	} {
		if got := drawn(t, c.draw); !strings.Contains(got, c.want) {
			t.Errorf("%s: got\n%s\nwant %s", c.name, got, c.want)
		}
	}
}

func TestNothingToDraw(t *testing.T) {
	empty := drawn(t, func(*Canvas) {})
	for name, f := range map[string]func(*Canvas){
		"no pen": func(c *Canvas) { c.Line(0, 0, 1, 1, Pen{}) }, "one point": func(c *Canvas) { c.Polyline([]Point{{1, 1}}, Pen{Width: 1}) },
		"no points": func(c *Canvas) { c.Polygon(nil, Pen{Width: 1}, Fill{}) }, "no text": func(c *Canvas) { c.Text(1, 1, nil, Font{Size: 8}) },
		"blank text": func(c *Canvas) { c.Text(1, 1, Text("  "), Font{Size: 8}) }, "turned box": func(c *Canvas) { c.Rect(Box{5, 5, 1, 1}, Pen{Width: 1}, Fill{}) },
		"flat hatch": func(c *Canvas) { c.Hatch(Box{1, 1, 9, 1}, Clay, Blank) },
	} {
		if got := drawn(t, f); got != empty {
			t.Errorf("%s: drew something", name)
		}
	}
}

func TestNotFinite(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	for name, f := range map[string]func(*Canvas){
		"line":     func(c *Canvas) { c.Line(0, nan, 1, 1, Pen{Width: 1}) },
		"rect":     func(c *Canvas) { c.Rect(Box{0, 0, inf, 1}, Pen{Width: 1}, Fill{}) },
		"circle":   func(c *Canvas) { c.Circle(1, 1, nan, Pen{Width: 1}, Fill{}) },
		"polyline": func(c *Canvas) { c.Polyline([]Point{{0, 0}, {inf, 1}}, Pen{Width: 1}) },
		"text":     func(c *Canvas) { c.Text(nan, 1, Text("x"), Font{Size: 8}) },
		"halo":     func(c *Canvas) { c.Halo(nan, 1, Text("x"), Font{Size: 8}) },
		"marker":   func(c *Canvas) { c.Marker(1, nan, Marker{}) },
		"hatch":    func(c *Canvas) { c.Hatch(Box{0, 0, inf, 1}, Clay, Blank) },
		"far away": func(c *Canvas) { c.Line(0, 1e9, 1, 1, Pen{Width: 1}) },
	} {
		c := New(page())
		f(c)
		c.Line(0, 0, 1, 1, Pen{Width: 1})
		var b bytes.Buffer
		if err := c.Finish(&b); err == nil || b.Len() > 0 {
			t.Errorf("%s: error %v with %d bytes written; want an error and nothing written", name, err, b.Len())
		}
	}
	for _, s := range []Sheet{{}, {Width: nan, Height: 1}, {Width: 10, Height: -1}} {
		if err := New(s).Finish(io.Discard); err == nil {
			t.Errorf("a sheet of %v by %v is drawn", s.Width, s.Height)
		}
	}
}

func TestWriteError(t *testing.T) {
	want := errors.New("disk full")
	if err := New(page()).Finish(failing{want}); err != want {
		t.Errorf("got %v, want the writer's error", err)
	}
}

type failing struct{ err error }

func (f failing) Write([]byte) (int, error) { return 0, f.err }

func TestRoot(t *testing.T) {
	c := New(Sheet{Width: 210, Height: 297, ID: "bh 1\" onload=\"x", Title: "<b>", Description: "a & b"})
	var b bytes.Buffer
	if err := c.Finish(&b); err != nil {
		t.Fatal(err)
	}
	for _, want := range []string{`width="210mm"`, `viewBox="0 0 210 297"`, `role="img"`, `aria-labelledby="bh-1--onload--x-title bh-1--onload--x-desc"`, "&lt;b&gt;</title>", "a &amp; b</desc>"} {
		if !strings.Contains(b.String(), want) {
			t.Errorf("%s is missing in\n%s", want, b.String())
		}
	}
}

// FuzzText writes any text as a label, a title and an id, and reads back what
// Clean promises.
func FuzzText(f *testing.F) {
	for _, s := range []string{"", "σ′v0", "<script>", `"'&]]>`, "a\x00b", "\u202eabc", "\xff", "  two  blanks ", strings.Repeat("x", 2000), "日本語", "e\u0301"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		c := New(Sheet{Width: 10, Height: 10, ID: s, Title: s, Description: s})
		c.Text(1, 1, Text(s), Font{Size: 8})
		c.Text(1, 1, Text("a").Sub(s).Sup(s), Font{Size: 8, Anchor: End})
		var b bytes.Buffer
		if err := c.Finish(&b); err != nil {
			t.Fatal(err)
		}
		var doc struct {
			Title string   `xml:"title"`
			Texts []string `xml:"text"`
		}
		if err := xml.Unmarshal(b.Bytes(), &doc); err != nil {
			t.Fatal(err)
		}
		want := clip(s)
		if doc.Title != want {
			t.Fatalf("title reads back as %q, want %q", doc.Title, want)
		}
		if strings.Trim(want, " ") != "" && doc.Texts[0] != strings.Trim(want, " ") {
			t.Fatalf("text reads back as %q, want %q", doc.Texts[0], want)
		}
	})
}
