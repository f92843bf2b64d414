package report

import (
	"encoding/binary"
	"fmt"
	"math"
	"strconv"
	"strings"
	"unicode/utf16"
)

// What is in use of a metafile's pens, brushes and fonts.
const (
	choosePen = iota
	chooseBrush
	chooseFont
)

// choose selects an object, which make creates where it is not there yet.
func (m *metafile) choose(what int, key string, make func(handle uint32)) {
	h, ok := m.handles[key]
	if !ok {
		h = uint32(len(m.handles) + 1)
		m.handles[key] = h
		make(h)
	}
	m.selectObject(what, h)
}

func (m *metafile) selectObject(what int, handle uint32) {
	if m.chosen[what] != handle {
		m.chosen[what] = handle
		m.record(emrSelect, []int32{int32(handle)})
	}
}

// paint reads a colour attribute; ok is false where nothing is painted. A colour
// that lets the paper shine through becomes the one that it has on white.
func (e *element) paint(name string) (colour uint32, ok bool) {
	text := e.attr[name]
	if text == "none" || text == "" && name == "stroke" {
		return 0, false
	}
	if text == "" {
		return 0, true // a shape is black where nothing is said
	}
	v, err := strconv.ParseUint(strings.TrimPrefix(text, "#"), 16, 24)
	if err != nil || len(text) != 7 || text[0] != '#' {
		e.err = fmt.Errorf("%w: %s=%q of a %s", errNotOurs, name, text, e.name)
		return 0, false
	}
	opacity := 1.0
	if _, has := e.attr[name+"-opacity"]; has {
		opacity = e.number(name + "-opacity")
	}
	on := func(channel uint64) uint32 { return uint32(math.Round(255 - (255-float64(channel))*opacity)) }
	return on(v>>16) | on(v>>8&255)<<8 | on(v&255)<<16, true
}

// pen selects the pen of a shape, or none.
func (m *metafile) pen(e *element) bool {
	colour, ok := e.paint("stroke")
	width := m.unit(e.number("stroke-width"))
	if _, has := e.attr["stroke-width"]; !has {
		width = m.unit(1)
	}
	if !ok || width <= 0 {
		return false
	}
	m.choose(choosePen, fmt.Sprintf("pen %06x %d", colour, width), func(h uint32) {
		// Geometric, flat ends, mitred joins, solid: dashes are cut beforehand.
		m.record(emrPen, []int32{int32(h), 0, 0, 0, 0, 0x10000 | 0x200 | 0x2000, width, 0, int32(colour), 0, 0})
	})
	return true
}

// brush selects the brush of a shape, or none.
func (m *metafile) brush(e *element) bool {
	colour, ok := e.paint("fill")
	if !ok {
		return false
	}
	m.choose(chooseBrush, fmt.Sprintf("brush %06x", colour), func(h uint32) {
		m.record(emrBrush, []int32{int32(h), 0, int32(colour), 0})
	})
	return true
}

// fill writes the inside of lines; lines of two points have none.
func (m *metafile) fill(e *element, lines [][]point) {
	var closed [][]point
	for _, l := range lines {
		if len(l) > 2 {
			closed = append(closed, l)
		}
	}
	if len(closed) > 0 && m.brush(e) {
		m.selectObject(choosePen, stockNoPen)
		m.poly(emrPolyPolygon, closed)
	}
}

// strokes writes lines with the pen of the shape, dashes as so many strokes.
func (m *metafile) strokes(e *element, lines [][]point) {
	dashes, ok := e.dashes()
	if !ok || !m.pen(e) {
		return
	}
	if len(dashes) > 0 {
		var cut [][]point
		for _, l := range lines {
			cut = append(cut, dashed(l, dashes)...)
		}
		lines = cut
	}
	m.poly(emrPolyPolyline, lines)
}

// dashes reads the pattern of a line.
func (e *element) dashes() ([]float64, bool) {
	text := e.attr["stroke-dasharray"]
	if text == "" || text == "none" {
		return nil, true
	}
	var out []float64
	for _, f := range strings.Fields(strings.ReplaceAll(text, ",", " ")) {
		v, err := strconv.ParseFloat(f, 64)
		if err != nil || !(v >= 0.1 && v < 1e4) {
			e.err = fmt.Errorf("%w: stroke-dasharray=%q", errNotOurs, text)
			return nil, false
		}
		out = append(out, v)
	}
	if len(out)%2 == 1 {
		out = append(out, out...)
	}
	return out, true
}

// dashed cuts a line into its dashes.
func dashed(l []point, pattern []float64) [][]point {
	var out [][]point
	k, left := 0, pattern[0]
	var stroke []point
	if len(l) > 0 {
		stroke = []point{l[0]}
	}
	for i := 1; i < len(l); i++ {
		a, b := l[i-1], l[i]
		length := math.Hypot(b.x-a.x, b.y-a.y)
		at := 0.0
		for length-at > left {
			at += left
			p := point{a.x + (b.x-a.x)*at/length, a.y + (b.y-a.y)*at/length}
			if k%2 == 0 {
				out = append(out, append(stroke, p))
			}
			k = (k + 1) % len(pattern)
			left, stroke = pattern[k], []point{p}
		}
		left -= length - at
		stroke = append(stroke, b)
	}
	if k%2 == 0 && len(stroke) > 1 {
		out = append(out, stroke)
	}
	return out
}

// poly writes lines or polygons in one record.
func (m *metafile) poly(kind uint32, lines [][]point) {
	var counts, points []int32
	for _, l := range lines {
		if len(l) < 2 {
			continue
		}
		counts = append(counts, int32(len(l)))
		for _, p := range l {
			points = append(points, m.unit(p.x), m.unit(p.y))
		}
	}
	if len(counts) == 0 {
		return
	}
	values := append([]int32{0, 0, 0, 0, int32(len(counts)), int32(len(points) / 2)}, counts...)
	m.record(kind, append(values, points...))
}

func (m *metafile) circle(e *element) {
	x, y, r := e.number("cx"), e.number("cy"), e.number("r")
	brush, pen := m.brush(e), m.pen(e)
	if !brush {
		m.selectObject(chooseBrush, stockNoBrush)
	}
	if !pen {
		m.selectObject(choosePen, stockNoPen)
	}
	if brush || pen {
		m.record(emrEllipse, []int32{m.unit(x - r), m.unit(y - r), m.unit(x + r), m.unit(y + r)})
	}
}

// text writes a text on its base line, from its anchor.
func (m *metafile) text(e *element) {
	size, bold := e.number("font-size"), e.attr["font-weight"] == "bold"
	colour, ok := e.paint("fill")
	if !ok || size <= 0 || e.text == "" {
		return
	}
	height := m.unit(size)
	m.choose(chooseFont, fmt.Sprintf("font %d %v", height, bold), func(h uint32) { m.font(h, height, bold) })
	if colour != m.colour {
		m.colour = colour
		m.record(emrTextColour, []int32{int32(colour)})
	}
	align := uint32(24) // base line, from the left
	switch e.attr["text-anchor"] {
	case "end":
		align = 24 | 2
	case "middle":
		align = 24 | 6
	}
	if align != m.align {
		m.align = align
		m.record(emrTextAlign, []int32{int32(align)})
	}
	m.words(e, size, bold)
}

// words writes the record of a text with the advance of every character, so that
// it is as wide as it was laid out.
func (m *metafile) words(e *element, size float64, bold bool) {
	text := visible(e.text)
	raw := utf16Of(text)
	n := len(raw) / 2
	for len(raw)%4 != 0 {
		raw = append(raw, 0)
	}
	const fixedPart = 76 // bytes of the record before the text
	values := []int32{0, 0, 0, 0, 1, int32(math.Float32bits(1)), int32(math.Float32bits(1)),
		m.unit(e.number("x")), m.unit(e.number("y")), int32(n), fixedPart, 0, 0, 0, 0, 0, int32(fixedPart + len(raw))}
	done := 0.0
	for _, r := range text {
		from := m.unit(done)
		done += widthOf(string(r), size, bold)
		advance := uint32(m.unit(done) - from)
		raw = binary.LittleEndian.AppendUint32(raw, advance)
		if utf16.RuneLen(r) == 2 {
			raw = binary.LittleEndian.AppendUint32(raw, 0) // the second half of a pair
		}
	}
	m.record(emrText, values, raw...)
}

// font creates a font of the family that the drawings are laid out for.
func (m *metafile) font(handle uint32, height int32, bold bool) {
	const size = 320 // bytes of the description
	raw := make([]byte, size)
	binary.LittleEndian.PutUint32(raw, uint32(-height))
	weight := uint32(400)
	if bold {
		weight = 700
	}
	binary.LittleEndian.PutUint32(raw[16:], weight)
	raw[23] = 1 // the default set of characters
	copy(raw[28:], utf16Of("Arial"))
	m.record(emrFont, []int32{int32(handle)}, raw...)
}
