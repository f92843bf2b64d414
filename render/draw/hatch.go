package draw

import (
	"math"
	"strings"
	"unicode"
)

// A Pattern is a line pattern for a soil or rock. It is illustrative: the name
// of the ground stands beside it.
type Pattern int

// The patterns.
const (
	Blank    Pattern = iota
	Clay             // broken horizontal lines
	Silt             // short upright strokes
	Sand             // dots
	Gravel           // small rings
	Cobbles          // large rings
	Peat             // tufts
	Made             // crossed diagonals
	Chalk            // bricks
	Mudstone         // close horizontal lines
	Topsoil          // upright broken lines
	Rock             // diagonals
)

// soilWords are looked for in what the ground is called; a noun that stands
// last says what it is, an adjective what it is mixed with.
var soilWords = []struct {
	word    string
	pattern Pattern
	second  Pattern
}{
	{"topsoil", Topsoil, Blank}, {"made", Made, Blank}, {"fill", Made, Blank}, {"embankment", Made, Blank}, {"bank", Made, Blank},
	{"clay", Clay, Blank}, {"crust", Clay, Blank}, {"till", Clay, Gravel}, {"gyttja", Clay, Peat}, {"alluvium", Clay, Silt}, {"mud", Clay, Blank},
	{"silt", Silt, Blank}, {"loess", Silt, Blank}, {"sand", Sand, Blank}, {"gravel", Gravel, Blank},
	{"cobbles", Cobbles, Blank}, {"boulders", Cobbles, Blank}, {"peat", Peat, Blank},
	{"chalk", Chalk, Blank}, {"limestone", Chalk, Blank}, {"marl", Chalk, Clay},
	{"mudstone", Mudstone, Blank}, {"shale", Mudstone, Blank}, {"claystone", Mudstone, Blank}, {"siltstone", Mudstone, Silt},
	{"sandstone", Mudstone, Sand}, {"rock", Rock, Blank}, {"granite", Rock, Blank}, {"gneiss", Rock, Blank},
}

var mixedWords = map[string]Pattern{
	"clayey": Clay, "silty": Silt, "sandy": Sand, "gravelly": Gravel, "peaty": Peat, "organic": Peat, "cobbly": Cobbles,
}

// PatternOf finds the pattern of a soil by its words: the main soil, and what it
// is mixed with. Words that say nothing of the soil leave it Blank.
func PatternOf(soil string) (first, second Pattern) {
	words := strings.FieldsFunc(strings.ToLower(soil), func(r rune) bool { return !unicode.IsLetter(r) })
	for _, w := range words {
		if p, ok := mixedWords[w]; ok {
			if second == Blank {
				second = p
			}
			continue
		}
		for _, s := range soilWords {
			if w != s.word && strings.TrimSuffix(w, "s") != s.word {
				continue
			}
			// The first noun is the soil: what follows it is a remark.
			if first == Blank {
				first = s.pattern
				if second == Blank {
					second = s.second
				}
			} else if second == Blank && first != s.pattern {
				second = s.pattern
			}
		}
	}
	if first == Blank {
		return second, Blank
	}
	if second == first {
		second = Blank
	}
	return first, second
}

// spacing of the symbols of a pattern in mm: across, down.
func (p Pattern) spacing() (float64, float64) {
	switch p {
	case Clay:
		return 3.2, 1.5
	case Silt:
		return 2, 1.8
	case Sand:
		return 1.7, 1.3
	case Gravel:
		return 2.6, 2
	case Cobbles:
		return 4, 3.4
	case Peat:
		return 3.4, 2.4
	case Chalk:
		return 4.4, 2
	case Mudstone:
		return 4, 0.9
	case Topsoil:
		return 1.4, 2.6
	}
	return 2.6, 2.6
}

// Hatch fills a box with a pattern and with a few symbols of a second one.
func (c *Canvas) Hatch(b Box, first, second Pattern) {
	if !c.ok("hatch", b.Left, b.Top, b.Right, b.Bottom) {
		return
	}
	h := hatch{box: b.Inset(0.12)}
	h.fill(first, 1)
	if second != Blank {
		h.fill(second, 2.2)
	}
	c.strokes(h.lines, Pen{Colour: Black, Width: Hair})
}

// A hatch gathers the strokes of a pattern in a box.
type hatch struct {
	box   Box
	lines [][2]Point
}

// fill lays the symbols of a pattern on a grid that is the same for the whole
// sheet, every second row set off by half; sparse spreads them out.
func (h *hatch) fill(p Pattern, sparse float64) {
	if p == Blank || h.box.Width() <= 0 || h.box.Height() <= 0 {
		return
	}
	dx, dy := p.spacing()
	dx, dy = dx*sparse, dy*sparse
	for row := math.Floor(h.box.Top/dy) - 1; row*dy <= h.box.Bottom+dy; row++ {
		offset := 0.0
		if math.Mod(math.Abs(row), 2) == 1 {
			offset = dx / 2
		}
		// The columns start at the box, so that strata of one column line up.
		for x := h.box.Left - dx + offset; x <= h.box.Right+dx; x += dx {
			h.symbol(p, x+dx*0.3, (row+0.5)*dy, dx, dy)
		}
	}
}

// symbol adds the strokes of one symbol of a pattern at a place.
func (h *hatch) symbol(p Pattern, x, y, dx, dy float64) {
	switch p {
	case Clay:
		h.stroke(x-0.9, y, x+0.9, y)
	case Silt:
		h.stroke(x, y-0.45, x, y+0.45)
	case Sand:
		h.ring(x, y, 0.1, 4)
	case Gravel:
		h.ring(x, y, 0.5, 8)
	case Cobbles:
		h.ring(x, y, 1.1, 10)
	case Peat:
		h.stroke(x, y+0.5, x, y-0.6)
		h.stroke(x, y+0.5, x-0.7, y-0.3)
		h.stroke(x, y+0.5, x+0.7, y-0.3)
	case Made:
		h.stroke(x-dx/2, y-dy/2, x+dx/2, y+dy/2)
		h.stroke(x-dx/2, y+dy/2, x+dx/2, y-dy/2)
	case Chalk:
		h.stroke(x-dx/2, y-dy/2, x+dx/2, y-dy/2)
		h.stroke(x, y-dy/2, x, y+dy/2)
	case Mudstone:
		h.stroke(x-dx/2, y, x+dx/2, y)
	case Topsoil:
		h.stroke(x, y-0.8, x, y+0.8)
	case Rock:
		h.stroke(x-dx/2, y+dy/2, x+dx/2, y-dy/2)
	}
}

// ring adds a small closed figure, left out where it would be cut: half a
// pebble reads as something else.
func (h *hatch) ring(x, y, r float64, n int) {
	if x-r < h.box.Left || x+r > h.box.Right || y-r < h.box.Top || y+r > h.box.Bottom {
		return
	}
	p := around(x, y, r, n, 0)
	for i := range p {
		h.lines = append(h.lines, [2]Point{p[i], p[(i+1)%n]})
	}
}

// stroke adds the part of a line that lies in the box.
func (h *hatch) stroke(x1, y1, x2, y2 float64) {
	if a, b, ok := h.box.Cut(Point{x1, y1}, Point{x2, y2}); ok {
		h.lines = append(h.lines, [2]Point{a, b})
	}
}
