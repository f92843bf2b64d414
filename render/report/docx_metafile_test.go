package report

import (
	"bytes"
	"encoding/binary"
	"errors"
	"math"
	"strings"
	"testing"
	"unicode/utf16"

	"pastload/render/draw"
)

// A metaRecord is one record read back.
type metaRecord struct {
	kind uint32
	data []byte // after type and size
}

// recordsOf reads a metafile back and holds its header to what it has.
func recordsOf(t testing.TB, data []byte) []metaRecord {
	t.Helper()
	var out []metaRecord
	for rest := data; len(rest) > 0; {
		if len(rest) < 8 {
			t.Fatal("a record is cut short")
		}
		kind, size := binary.LittleEndian.Uint32(rest), binary.LittleEndian.Uint32(rest[4:])
		if size < 8 || size%4 != 0 || int(size) > len(rest) {
			t.Fatalf("record %d of %d bytes", kind, size)
		}
		out = append(out, metaRecord{kind, rest[8:size]})
		rest = rest[size:]
	}
	if len(out) < 2 || out[0].kind != emrHeader || out[len(out)-1].kind != emrEnd {
		t.Fatal("no header or no end")
	}
	if n := binary.LittleEndian.Uint32(data[48:]); int(n) != len(data) {
		t.Errorf("header says %d bytes of %d", n, len(data))
	}
	if n := binary.LittleEndian.Uint32(data[52:]); int(n) != len(out) {
		t.Errorf("header says %d records of %d", n, len(out))
	}
	if string(data[40:44]) != " EMF" || len(out[0].data) != 100 {
		t.Errorf("signature %q, header of %d bytes", data[40:44], len(out[0].data)+8)
	}
	return out
}

func kinds(records []metaRecord) map[uint32]int {
	n := map[uint32]int{}
	for _, r := range records {
		n[r.kind]++
	}
	return n
}

// drawing makes a drawing with everything that a canvas draws.
func drawing(t testing.TB) []byte {
	t.Helper()
	c := draw.New(draw.Sheet{Width: 100, Height: 50, ID: "d", Title: "t"})
	c.Line(10, 10, 20, 10, draw.Pen{Width: 0.25, Dash: draw.Dashed})
	c.Rect(draw.Box{Left: 1, Top: 2, Right: 3, Bottom: 4}, draw.Pen{}, draw.Fill{Colour: draw.Red})
	c.Circle(50, 25, 5, draw.Pen{Width: 0.25}, draw.Fill{})
	c.Polyline([]draw.Point{{X: 1, Y: 1}, {X: 2, Y: 2}, {X: 3, Y: 1}}, draw.Pen{Width: 0.5})
	c.Text(30, 40, draw.Text("σ′").Sub("v0").Add(" = 𝔘"), draw.Font{Size: 9, Bold: true})
	var b bytes.Buffer
	if err := c.Finish(&b); err != nil {
		t.Fatal(err)
	}
	return b.Bytes()
}

func TestMetafileHoldsTheDrawing(t *testing.T) {
	data, err := metafileOf(drawing(t))
	if err != nil {
		t.Fatal(err)
	}
	records := recordsOf(t, data)
	n := kinds(records)
	if n[emrEllipse] != 1 || n[emrText] != 3 || n[emrPolyPolyline] < 2 || n[emrPolyPolygon] < 1 {
		t.Errorf("records %v", n)
	}
	var words string
	for _, r := range records {
		switch r.kind {
		case emrText:
			chars := int(binary.LittleEndian.Uint32(r.data[36:]))
			at := int(binary.LittleEndian.Uint32(r.data[40:])) - 8
			var u []uint16
			for i := range chars {
				u = append(u, binary.LittleEndian.Uint16(r.data[at+2*i:]))
			}
			words += string(utf16.Decode(u))
			if advances := int(binary.LittleEndian.Uint32(r.data[64:])) - 8; advances+4*chars != len(r.data) {
				t.Errorf("%d advances from %d do not end the record of %d bytes", chars, advances, len(r.data))
			}
		case emrEllipse:
			if x := int32(binary.LittleEndian.Uint32(r.data)); x != 4500 {
				t.Errorf("the circle begins at %d, want 4500 hundredths of a mm", x)
			}
		}
	}
	if words != "σ′v0= 𝔘" { // the blank between runs is in the place of the next
		t.Errorf("text %q", words)
	}
	again, err := metafileOf(drawing(t))
	if err != nil || !bytes.Equal(data, again) {
		t.Error("two copies of one drawing differ")
	}
}

func TestMetafileRefusesWhatItCannotShow(t *testing.T) {
	for _, inside := range []string{
		`<g/>`, `<path d="M0 0C1 1 2 2 3 3"/>`, `<path d="L1 1"/>`, `<path d="M1"/>`, `<path d="M0 0 1 1"/>`, `<rect style="fill:red"/>`, `<rect transform="scale(2)"/>`,
		`<rect fill="red" width="1" height="1"/>`, `<circle r="x"/>`, `<line stroke="#000000" stroke-dasharray="0"/>`, `<image/>`, `<line`, `<line x1="NaN"/>`, `<line x1="1e9"/>`,
	} {
		svg := `<svg xmlns="http://www.w3.org/2000/svg" width="10mm" height="10mm">` + inside + `</svg>`
		if _, err := metafileOf([]byte(svg)); !errors.Is(err, errNotOurs) {
			t.Errorf("%s: error %v", inside, err)
		}
	}
	if _, err := metafileOf([]byte(`<svg width="10mm" height="10mm" viewBox="0 0 10 20"></svg>`)); !errors.Is(err, errNotOurs) {
		t.Errorf("a distorted drawing: error %v", err)
	}
}

func TestDashesHaveTheirLengths(t *testing.T) {
	line := []point{{0, 0}, {6, 0}, {6, 4}}
	var total float64
	strokes := dashed(line, []float64{2, 1})
	for _, s := range strokes {
		for i := 1; i < len(s); i++ {
			total += math.Hypot(s[i].x-s[i-1].x, s[i].y-s[i-1].y)
		}
	}
	// 10 long: 2 on, 1 off, 2 on, 1 off, 2 on, 1 off, and 1 on at the end.
	if len(strokes) != 4 || math.Abs(total-7) > 1e-9 {
		t.Errorf("%d strokes of %g in all, want 4 of 7", len(strokes), total)
	}
}

func TestOpacityIsTheColourOverWhite(t *testing.T) {
	e := &element{name: "rect", attr: map[string]string{"fill": "#000000", "fill-opacity": "0.2"}}
	if colour, ok := e.paint("fill"); !ok || colour != 0xCCCCCC {
		t.Errorf("%06x %v, want CCCCCC", colour, ok)
	}
	e.attr = map[string]string{"fill": "#102030"}
	if colour, _ := e.paint("fill"); colour != 0x302010 {
		t.Errorf("%06x, want blue first: 302010", colour)
	}
}

func FuzzMetafile(f *testing.F) {
	f.Add(string(drawing(f)))
	f.Add(tinySVG)
	f.Add(`<svg viewBox="0 0 1 1"><path d="M0 0L1 1Z" stroke="#123456" stroke-dasharray="1 2 3"/></svg>`)
	f.Fuzz(func(t *testing.T, svg string) {
		if strings.Count(svg, "dasharray") > 3 {
			return // a thousand long dashed lines only cost time
		}
		data, err := metafileOf([]byte(svg))
		if err == nil {
			recordsOf(t, data)
		}
	})
}

func BenchmarkMetafile(b *testing.B) {
	svg := drawing(b)
	for b.Loop() {
		if _, err := metafileOf(svg); err != nil {
			b.Fatal(err)
		}
	}
}
