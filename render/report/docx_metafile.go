package report

import (
	"bytes"
	"encoding/binary"
	"encoding/xml"
	"errors"
	"fmt"
	"io"
	"math"
	"strconv"
	"strings"
	"unicode/utf16"

	"pastload/render/draw"
)

// errNotOurs says that a drawing has something that the drawing packages do not
// write, so that a copy of it would be wrong.
var errNotOurs = errors.New("not of the narrow profile of SVG")

// metafileOf returns a drawing of the drawing packages as an enhanced metafile:
// the vector format that word processors older than SVG show. It holds what the
// profile of package draw has: lines, rectangles, circles, paths of straight
// strokes and plain text. A fill that lets what is below shine through becomes the
// colour that it has over white.
//
// The error wraps errNotOurs for anything else: no picture is better than one
// with parts missing.
func metafileOf(svg []byte) ([]byte, error) {
	wide, high, _ := svgSize(svg)
	m := &metafile{handles: map[string]uint32{}}
	m.begin(wide, high)
	d := xml.NewDecoder(bytes.NewReader(svg))
	var open *element
	for {
		token, err := d.Token()
		if errors.Is(err, io.EOF) {
			break
		}
		if err != nil {
			return nil, fmt.Errorf("%w: %w", errNotOurs, err)
		}
		switch token := token.(type) {
		case xml.StartElement:
			if open = newElement(token); open.name == "svg" {
				if err := m.viewBox(open.attr["viewBox"], wide, high); err != nil {
					return nil, err
				}
			}
		case xml.CharData:
			if open != nil {
				open.text += string(token)
			}
		case xml.EndElement:
			if open != nil && open.name == token.Name.Local {
				if err := m.draw(open); err != nil {
					return nil, err
				}
			}
			open = nil
		}
	}
	return m.end(), nil
}

// An element is one shape of a drawing.
type element struct {
	name, text string
	attr       map[string]string
	err        error
}

func newElement(s xml.StartElement) *element {
	e := &element{name: s.Name.Local, attr: map[string]string{}}
	for _, a := range s.Attr {
		e.attr[a.Name.Local] = a.Value
	}
	return e
}

// number reads an attribute; one that is absent is zero.
func (e *element) number(name string) float64 {
	text, ok := e.attr[name]
	if !ok {
		return 0
	}
	v, err := strconv.ParseFloat(text, 64)
	if err != nil || math.Abs(v) > 1e4 || math.IsNaN(v) {
		e.err = fmt.Errorf("%w: %s=%q of a %s", errNotOurs, name, text, e.name)
		return 0
	}
	return v
}

// A metafile gathers records. Lengths are hundredths of a mm.
type metafile struct {
	b       bytes.Buffer
	records uint32
	handles map[string]uint32 // of pens, brushes and fonts by what they are
	chosen  [3]uint32         // pen, brush and font in use
	align   uint32
	colour  uint32
	scale   float64 // units of a length of the drawing
}

// The records that are used, by their number in the format.
const (
	emrHeader, emrPolyPolyline, emrPolyPolygon          = 1, 7, 8
	emrWindowExtent, emrWindowOrigin                    = 9, 10
	emrViewportExtent, emrViewportOrigin, emrEnd        = 11, 12, 14
	emrMapMode, emrBackgroundMode, emrTextAlign         = 17, 18, 22
	emrTextColour, emrSelect, emrBrush                  = 24, 37, 39
	emrEllipse, emrFont, emrText, emrPen                = 42, 82, 84, 95
	stockNoBrush, stockNoPen                     uint32 = 0x80000005, 0x80000008
)

const metafileUnits = 100 // in a mm

// record writes a record of 32-bit values and raw bytes, padded to 4.
func (m *metafile) record(kind uint32, values []int32, raw ...byte) {
	for len(raw)%4 != 0 {
		raw = append(raw, 0)
	}
	m.records++
	m.b.Grow(8 + 4*len(values) + len(raw))
	out := binary.LittleEndian.AppendUint32(m.b.AvailableBuffer(), kind)
	out = binary.LittleEndian.AppendUint32(out, uint32(8+4*len(values)+len(raw)))
	for _, v := range values {
		out = binary.LittleEndian.AppendUint32(out, uint32(v))
	}
	m.b.Write(append(out, raw...))
}

// begin writes the header, whose counts end fills in, and the mapping.
func (m *metafile) begin(wide, high float64) {
	w, h := int32(math.Round(wide*metafileUnits)), int32(math.Round(high*metafileUnits))
	m.record(emrHeader, []int32{
		0, 0, w, h, 0, 0, w, h, // bounds in units of the device, frame in hundredths of a mm
		0x464D4520, 0x10000, 0, 0, 0, 0, 0, 0, // signature, version, and what end fills in
		w, h, int32(math.Round(wide)), int32(math.Round(high)), // a device of 100 units to the mm
		0, 0, 0, int32(math.Round(wide * 1000)), int32(math.Round(high * 1000)),
	})
	m.record(emrMapMode, []int32{8})
	m.record(emrWindowOrigin, []int32{0, 0})
	m.record(emrWindowExtent, []int32{w, h})
	m.record(emrViewportOrigin, []int32{0, 0})
	m.record(emrViewportExtent, []int32{w, h})
	m.record(emrBackgroundMode, []int32{1})
	m.scale = metafileUnits
}

// viewBox finds how long a unit of the drawing is; it must begin at 0 0 and be as
// wide for its width as it is high for its height.
func (m *metafile) viewBox(text string, wide, high float64) error {
	if text == "" {
		return nil
	}
	var x, y, w, h float64
	if n, err := fmt.Sscan(text, &x, &y, &w, &h); err != nil || n != 4 || x != 0 || y != 0 || w <= 0 || math.Abs(h*wide-w*high) > 1e-3*w*high {
		return fmt.Errorf("%w: viewBox=%q", errNotOurs, text)
	}
	m.scale = metafileUnits * wide / w
	return nil
}

// end returns the file with its length, records and handles in the header.
func (m *metafile) end() []byte {
	m.record(emrEnd, []int32{0, 16, 20})
	data := m.b.Bytes()
	binary.LittleEndian.PutUint32(data[48:], uint32(len(data)))
	binary.LittleEndian.PutUint32(data[52:], m.records)
	binary.LittleEndian.PutUint16(data[56:], uint16(len(m.handles)+1))
	return data
}

func (m *metafile) unit(v float64) int32 { return int32(math.Round(v * m.scale)) }

// draw writes one shape.
func (m *metafile) draw(e *element) error {
	switch e.name {
	case "svg", "title", "desc":
		return nil
	case "line":
		m.strokes(e, [][]point{{{e.number("x1"), e.number("y1")}, {e.number("x2"), e.number("y2")}}})
	case "rect":
		x, y, w, h := e.number("x"), e.number("y"), e.number("width"), e.number("height")
		box := [][]point{{{x, y}, {x + w, y}, {x + w, y + h}, {x, y + h}, {x, y}}}
		m.fill(e, box)
		m.strokes(e, box)
	case "circle":
		m.circle(e)
	case "path":
		lines, err := pathOf(e.attr["d"])
		if err != nil {
			return err
		}
		m.fill(e, lines)
		m.strokes(e, lines)
	case "text":
		m.text(e)
	default:
		return fmt.Errorf("%w: a %s", errNotOurs, e.name)
	}
	for _, name := range []string{"transform", "style", "class", "clip-path"} {
		if _, has := e.attr[name]; has {
			return fmt.Errorf("%w: a %s with %s", errNotOurs, e.name, name)
		}
	}
	return e.err
}

// A point is a place on the drawing, in its units.
type point struct{ x, y float64 }

// pathOf reads a path of straight strokes: M, L and Z.
func pathOf(d string) ([][]point, error) {
	var lines [][]point
	rest := d
	for rest = strings.TrimSpace(rest); rest != ""; rest = strings.TrimSpace(rest) {
		command := rest[0]
		end := strings.IndexAny(rest[1:], "MLZ") + 1
		if end == 0 {
			end = len(rest)
		}
		numbers := strings.Fields(strings.ReplaceAll(rest[1:end], ",", " "))
		rest = rest[end:]
		if command == 'Z' && len(numbers) == 0 && len(lines) > 0 {
			last := &lines[len(lines)-1]
			*last = append(*last, (*last)[0])
			continue
		}
		if command != 'M' && (command != 'L' || len(lines) == 0) || len(numbers) != 2 {
			return nil, fmt.Errorf("%w: a path with %q", errNotOurs, string(command))
		}
		x, err1 := strconv.ParseFloat(numbers[0], 64)
		y, err2 := strconv.ParseFloat(numbers[1], 64)
		if err1 != nil || err2 != nil || !(math.Abs(x) < 1e4 && math.Abs(y) < 1e4) {
			return nil, fmt.Errorf("%w: a path at %q", errNotOurs, numbers)
		}
		if command == 'M' {
			lines = append(lines, nil)
		}
		lines[len(lines)-1] = append(lines[len(lines)-1], point{x, y})
	}
	return lines, nil
}

// widthOf returns the advance of a text in mm for a font size in mm.
func widthOf(text string, size float64, bold bool) float64 {
	return draw.Font{Size: size * 72 / 25.4, Bold: bold}.Width(draw.Text(text))
}

// utf16Of returns a text in the encoding of the format.
func utf16Of(text string) []byte {
	var out []byte
	for _, u := range utf16.Encode([]rune(text)) {
		out = binary.LittleEndian.AppendUint16(out, u)
	}
	return out
}
