package draw

import (
	"math"
	"reflect"
	"strings"
	"testing"
)

func TestClean(t *testing.T) {
	for _, c := range []struct{ name, in, want string }{
		{"plain", "Soft clay", "Soft clay"},
		{"breaks", " a\r\n\tb  c ", "a b c"},
		{"direction", "a\u202eb\u2066c\u200f", "abc"},
		{"controls", "a\x00b\x7f", "a\uFFFDb\uFFFD"},
		{"not utf-8", "caf\xe9", "caf\uFFFD"},
		{"not a character", "a\ufffe", "a\uFFFD"},
		{"greek", "σ′p = 120 kPa", "σ′p = 120 kPa"},
		{"empty", "", ""},
	} {
		if got := Clean(c.in); got != c.want {
			t.Errorf("%s: Clean(%q) = %q, want %q", c.name, c.in, got, c.want)
		}
	}
}

// The advance widths of Arial in thousandths of its size (from memory).
func TestWidths(t *testing.T) {
	const tolerance = 0.0005 // half the last digit of widths in thousandths
	for _, c := range []struct {
		text string
		bold bool
		want float64
	}{
		{"0", false, 0.556}, {"a", false, 0.556}, {"W", false, 0.944}, {" ", false, 0.278}, {"i", false, 0.222}, {"M", false, 0.833}, {"0", true, 0.556}, {"a", true, 0.556}, {"i", true, 0.278},
	} {
		if got := advance(c.text, c.bold); math.Abs(got-c.want) > tolerance {
			t.Errorf("advance(%q, bold %v) = %.4f, want %.3f", c.text, c.bold, got, c.want)
		}
	}
	for _, r := range "σ′γαε≤≥−×°²³–…½µé" {
		if k := runeWidth(r, false); k == unitsPerEm*7/10 || k == 0 {
			t.Errorf("%q is not in the table", r)
		}
	}
	if runeWidth('日', false) != unitsPerEm || runeWidth('\u0301', false) != 0 {
		t.Error("a full-width character takes an em and a combining mark nothing")
	}
}

func TestLabelRuns(t *testing.T) {
	f := Font{Size: 10}
	l := Text("σ′").Sub("v0").Add(" (kPa)")
	if l.String() != "σ′v0 (kPa)" {
		t.Errorf("the label reads %q", l)
	}
	sum := f.Width(Text("σ′")) + (Font{Size: f.small()}).Width(Text("v0")) + f.Width(Text(" (kPa)"))
	const tolerance = 1e-12 // sums of the same products
	if got := f.Width(l); math.Abs(got-sum) > tolerance {
		t.Errorf("width %v, want the sum of the runs, %v", got, sum)
	}
	out := drawn(t, func(c *Canvas) { c.Text(50, 20, l, Font{Size: 10, Anchor: End}) })
	if strings.Contains(out, "text-anchor") || strings.Contains(out, "tspan") || strings.Count(out, "<text ") != 3 {
		t.Errorf("runs are to be start-anchored texts of their own:\n%s", out)
	}
	if strings.Contains(out, "> (kPa)<") {
		t.Error("a blank at the start of a run is a place, not a character")
	}
	if small := (Font{Size: 7}).small(); small != SmallestPoints {
		t.Errorf("subscripts of 7 point text are set at %v", small)
	}
}

func TestWrap(t *testing.T) {
	f := Font{Size: 7}
	for _, c := range []struct {
		name, in string
		width    float64
		most     int
		want     []string
	}{
		{"fits", "Soft clay", 50, 3, []string{"Soft clay"}},
		{"two lines", "Soft grey clay", 12, 3, []string{"Soft grey", "clay"}},
		{"ellipsis", "Soft grey silty clay with shells", 12, 2, []string{"Soft grey", "silty clay…"}},
		{"one long word", "overconsolidated", 10, 5, []string{"overcon", "solidated"}},
		{"slash", "clay/peat/silt", 11, 5, []string{"clay/peat/", "silt"}},
		{"empty", "", 10, 3, nil},
		{"no room", "ab", 0, 4, []string{"a", "b"}},
	} {
		got := f.Wrap(c.in, c.width, c.most)
		if !reflect.DeepEqual(got, c.want) {
			t.Errorf("%s: Wrap = %q, want %q", c.name, got, c.want)
		}
		for _, line := range got {
			if c.width > 3 && f.Width(Text(line)) > c.width {
				t.Errorf("%s: %q is wider than %v mm", c.name, line, c.width)
			}
		}
	}
}

func TestFit(t *testing.T) {
	f := Font{Size: 8}
	for _, s := range []string{"short", strings.Repeat("long ", 100), strings.Repeat("W", 9999)} {
		if got := f.Fit(s, 40); f.Width(Text(got)) > 40 {
			t.Errorf("Fit gives %v mm", f.Width(Text(got)))
		}
	}
	if got := f.Fit("short", 40); got != "short" {
		t.Errorf("Fit cut %q", got)
	}
}

func TestPatternOf(t *testing.T) {
	for _, c := range []struct {
		soil          string
		first, second Pattern
	}{
		{"silty CLAY", Clay, Silt}, {"Soft clay", Clay, Blank}, {"sandy gravel", Gravel, Sand}, {"sand and gravel", Sand, Gravel}, {"Peat", Peat, Blank},
		{"made ground: gravelly clay", Made, Gravel}, {"Stiff till", Clay, Gravel}, {"clayey silt with shells", Silt, Clay}, {"organic clay", Clay, Peat},
		{"weathered mudstone", Mudstone, Blank}, {"chalk", Chalk, Blank}, {"", Blank, Blank}, {"unit 3", Blank, Blank}, {"sandy", Sand, Blank}, {"clays", Clay, Blank}, {"clayey clay", Clay, Blank},
	} {
		if first, second := PatternOf(c.soil); first != c.first || second != c.second {
			t.Errorf("%q: patterns %d and %d, want %d and %d", c.soil, first, second, c.first, c.second)
		}
	}
}

// TestHatchStaysInside holds every stroke of every pattern inside its box.
func TestHatchStaysInside(t *testing.T) {
	const slack = 1e-9 // mm, the rounding of a cut
	for p := Clay; p <= Rock; p++ {
		for _, b := range []Box{{1, 1, 9, 30}, {3.3, 7.7, 5, 8.1}, {0, 0, 100, 100}, {2, 2, 2.3, 9}} {
			h := hatch{box: b.Inset(0.12)}
			h.fill(p, 1)
			for _, l := range h.lines {
				for _, q := range l {
					if q.X < h.box.Left-slack || q.X > h.box.Right+slack || q.Y < h.box.Top-slack || q.Y > h.box.Bottom+slack {
						t.Fatalf("pattern %d: %v is outside %v", p, q, h.box)
					}
				}
			}
			if b.Width() > 50 && len(h.lines) == 0 {
				t.Errorf("pattern %d draws nothing", p)
			}
		}
	}
}

func TestMarkersDiffer(t *testing.T) {
	seen := map[string]Marker{}
	for s := Circle; s <= ArrowLeft; s++ {
		for _, solid := range []bool{true, false} {
			if !solid && s >= Cross {
				continue // strokes have no fill
			}
			m := Marker{Shape: s, Solid: solid}
			out := drawn(t, func(c *Canvas) { c.Marker(10, 10, m) })
			if other, ok := seen[out]; ok {
				t.Errorf("%v and %v are drawn alike", m, other)
			}
			seen[out] = m
		}
	}
}
