package cone

import (
	"errors"
	"fmt"
	"math"
)

// ErrNoReadings says that no reading is left to evaluate.
var ErrNoReadings = errors.New("no reading to evaluate")

const (
	perMetre = 100 // cells of 10 mm: as fine as soundings are read
	largest  = 1e6 // beyond any reading in any unit; keeps sums finite
)

// A cell gathers the readings of 10 mm of depth.
type cell struct {
	depth, qc, qt, fs, u2           float64 // sums
	n, qcN, qtN, fsN, u2N           int32
	first                           float64 // depth of the first reading
	leastResistance, mostResistance float64
}

// A Reducer condenses a sounding reading by reading. Its memory is bounded by
// the depth: readings of the same 10 mm are averaged, which also sorts them and
// merges repeated ones. The zero Reducer is not ready: use NewReducer.
type Reducer struct {
	options Options
	pages   []*page // by metre; nil where there is no reading
	filled  int     // cells with readings
	count   tally
	last    float64
}

// A page is a metre of cells.
type page [perMetre]cell

// tally counts what is to be said of the readings.
type tally struct {
	read, unusable, aboveGround, tooDeep, backwards, repeated int
	repeatedApart                                             float64 // largest ratio between repeated resistances
}

// NewReducer returns a Reducer for one sounding.
func NewReducer(o Options) *Reducer {
	return &Reducer{options: o.withDefaults(), last: math.Inf(-1)}
}

// Add takes one reading, in any order. What cannot be used is counted, and said
// in the notes of the result.
func (r *Reducer) Add(x Reading) {
	r.count.read++
	switch {
	case !finite(x.Depth) || !x.anyResistance() || !x.sound():
		r.count.unusable++
		return
	case x.Depth < 0:
		r.count.aboveGround++
		return
	case x.Depth > r.options.MaxDepth:
		r.count.tooDeep++
		return
	}
	if x.Depth < r.last {
		r.count.backwards++
	}
	r.last = x.Depth
	c := r.cell(int(math.Round(x.Depth * perMetre)))
	if c.n == 0 {
		r.filled++
	}
	c.add(x, &r.count)
}

// cell returns a cell by its number from ground level down.
func (r *Reducer) cell(i int) *cell {
	metre := i / perMetre
	for len(r.pages) <= metre {
		r.pages = append(r.pages, nil)
	}
	if r.pages[metre] == nil {
		r.pages[metre] = new(page)
	}
	return &r.pages[metre][i%perMetre]
}

func (c *cell) add(x Reading, count *tally) {
	resistance := x.ConeResistance.Value
	if x.CorrectedResistance.Known {
		resistance = x.CorrectedResistance.Value
	}
	if c.n == 0 {
		c.first, c.leastResistance, c.mostResistance = x.Depth, resistance, resistance
	} else if x.Depth == c.first {
		count.repeated++
		c.leastResistance = math.Min(c.leastResistance, resistance)
		c.mostResistance = math.Max(c.mostResistance, resistance)
		if c.leastResistance > 0 {
			count.repeatedApart = math.Max(count.repeatedApart, c.mostResistance/c.leastResistance)
		}
	}
	c.n++
	c.depth += x.Depth
	sum(&c.qc, &c.qcN, x.ConeResistance)
	sum(&c.qt, &c.qtN, x.CorrectedResistance)
	sum(&c.fs, &c.fsN, x.SleeveFriction)
	sum(&c.u2, &c.u2N, x.PorePressure)
}

func sum(total *float64, n *int32, m Measure) {
	if m.Known {
		*total += m.Value
		*n++
	}
}

// mean returns the mean of a sum, not known where nothing was added.
func mean(total float64, n int32) Measure {
	if n == 0 {
		return Measure{}
	}
	return Of(total / float64(n))
}

func finite(x float64) bool { return !math.IsNaN(x) && !math.IsInf(x, 0) }

func (x Reading) anyResistance() bool {
	return x.ConeResistance.Known || x.CorrectedResistance.Known
}

// sound reports whether every value that is known is a number of any sense.
func (x Reading) sound() bool {
	for _, m := range [...]Measure{x.ConeResistance, x.CorrectedResistance, x.SleeveFriction, x.PorePressure} {
		if m.Known && !(math.Abs(m.Value) <= largest) {
			return false
		}
	}
	return true
}

// notes says what was met while reading.
func (t tally) notes(o Options) []string {
	var out []string
	say := func(n int, format string, args ...any) {
		if n > 0 {
			out = append(out, fmt.Sprintf("%d of %d readings ", n, t.read)+fmt.Sprintf(format, args...))
		}
	}
	say(t.unusable, "left out: no depth or no cone resistance, or not a number")
	say(t.aboveGround, "left out: depth below zero, above the ground")
	say(t.tooDeep, "left out: deeper than %g m", o.MaxDepth)
	say(t.backwards, "lie above the one before: sorted by depth")
	say(t.repeated, "repeat a depth: averaged")
	if t.repeatedApart > 1.2 {
		out = append(out, fmt.Sprintf("repeated readings of one depth differ up to %.1f times: two soundings under one name?", t.repeatedApart))
	}
	return out
}
