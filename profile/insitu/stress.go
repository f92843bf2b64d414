package insitu

import (
	"errors"
	"fmt"
	"math"
	"slices"
	"sort"
)

// A State is the stress at a depth, kPa, and the unit weight of the ground
// there as it lies, kN/m³.
type State struct {
	Total      float64 // σv0
	Pore       float64 // u0
	Effective  float64 // σ′v0 = σv0 − u0; may be zero or negative
	UnitWeight float64
}

// A Stress answers for the stresses in one column. It does not change and may be
// used from several goroutines.
type Stress struct {
	layers    []Layer
	surcharge float64
	water     water
	base      float64

	fringeTop, fringeBase float64 // equal without a capillary fringe

	// Between two tops everything is linear: the sums down to each top are kept,
	// so that a depth costs one search and one product.
	tops   []float64
	pieces []piece
}

// A piece is a stretch of constant unit weight and constant pore pressure
// gradient; total and pore hold at its top.
type piece struct {
	total, weight  float64
	pore, gradient float64
}

// New returns the stresses in a column.
//
// The error joins every problem of the column, each with the number of the
// layer or measured point (from 1, in the order given) and wrapping one of the
// package's errors. No part of a wrong column is used.
func New(c Column) (*Stress, error) {
	layers, problems := arrange(c.Layers)
	switch {
	case !finite(c.Surcharge):
		problems = append(problems, fmt.Errorf("surcharge: %g: %w", c.Surcharge, ErrNotFinite))
	case c.Surcharge < 0:
		problems = append(problems, fmt.Errorf("surcharge %g kPa: %w; want removed ground taken out of the layers", c.Surcharge, ErrSurcharge))
	}
	w, more := c.observe()
	if problems = append(problems, more...); len(problems) > 0 {
		return nil, errors.Join(problems...)
	}
	return assemble(layers, c.Surcharge, w)
}

// assemble cuts the column wherever weight or gradient change and sums it up.
func assemble(layers []Layer, surcharge float64, w water) (*Stress, error) {
	s := &Stress{layers: layers, surcharge: surcharge, water: w, base: layers[len(layers)-1].Base}
	line := w.line()
	s.fringeTop, s.fringeBase = w.fringe()
	s.align(line)
	s.tops = s.cuts(line)
	s.pieces = make([]piece, len(s.tops))

	total := surcharge + s.waterAbove()
	layer, seg := 0, 0
	for i, top := range s.tops {
		bottom := s.base
		if i+1 < len(s.tops) {
			bottom = s.tops[i+1]
		}
		for layers[layer].Base <= top {
			layer++
		}
		for seg+1 < len(line) && line[seg+1].top <= top {
			seg++
		}
		pore := line[seg].pressure + line[seg].gradient*(top-line[seg].top)
		// The line does not change sign within a piece, but may be zero at one of
		// its ends: the middle tells whether the piece is under water.
		middle := pore + line[seg].gradient*(bottom-top)/2
		weight := layers[layer].UnitWeight
		if middle > 0 || (top >= s.fringeTop && bottom <= s.fringeBase) {
			weight = layers[layer].SaturatedUnitWeight
		}
		s.pieces[i] = piece{total, weight, pore, line[seg].gradient}
		total += weight * (bottom - top)
		if end := pore + line[seg].gradient*(bottom-top); !finite(total) || !finite(pore) || !finite(end) || !finite(total-end) {
			return nil, fmt.Errorf("between %g m and %g m: %w", top, bottom, errTooLargeToCount)
		}
	}
	return s, nil
}

// sameNumber is the difference up to which two depths in m are one number that
// was reached by two roads, such as a boundary and a water table in feet.
const sameNumber = 1e-11

// align puts the pore pressure line and the fringe exactly on a boundary that
// they miss by rounding alone, so that no stretch of no thickness is cut between.
func (s *Stress) align(line []segment) {
	onBoundary := func(depth float64) float64 {
		if math.Abs(depth) <= sameNumber {
			return 0
		}
		i := sort.Search(len(s.layers), func(i int) bool { return s.layers[i].Base >= depth-sameNumber })
		if i < len(s.layers) && math.Abs(s.layers[i].Base-depth) <= sameNumber {
			return s.layers[i].Base
		}
		return depth
	}
	s.fringeTop, s.fringeBase = onBoundary(s.fringeTop), onBoundary(s.fringeBase)
	for i := range line {
		top := onBoundary(line[i].top)
		for _, other := range []float64{s.fringeTop, s.fringeBase} {
			if math.Abs(other-top) <= sameNumber {
				top = other
			}
		}
		if i > 0 && top-line[i-1].top <= sameNumber {
			top = line[i-1].top
		}
		line[i].top = top
	}
}

// cuts returns the depths within the column, 0 first, at which a piece starts.
func (s *Stress) cuts(line []segment) []float64 {
	depths := make([]float64, 0, len(s.layers)+len(line)+2)
	for _, l := range s.layers {
		depths = append(depths, l.Top)
	}
	for _, g := range line {
		depths = append(depths, g.top)
	}
	depths = append(depths, s.fringeTop, s.fringeBase)
	depths = slices.DeleteFunc(depths, func(d float64) bool { return d < 0 || d >= s.base })
	slices.Sort(depths)
	return slices.Compact(depths)
}

// waterAbove returns what the water above ground weighs, kPa.
func (s *Stress) waterAbove() float64 {
	if s.water.hasTable && s.water.table < 0 {
		return -s.water.table * s.water.unitWeight
	}
	return 0
}

// At returns the stresses at a depth in m. On a boundary and on the step at the
// top of a capillary fringe it answers for what lies below; at the deepest base,
// for what lies above. It does not allocate.
//
// The error wraps ErrOutOfRange for a depth above ground or below the deepest
// base by more than 1 mm; within it, the state is that of the end.
func (s *Stress) At(depth float64) (State, error) {
	depth, err := s.within(depth)
	if err != nil {
		return State{}, err
	}
	return s.state(s.find(depth), depth), nil
}

// JustAbove returns the limit of the stresses when a depth is approached from
// above. It differs from At on the step at the top of a capillary fringe and, in
// UnitWeight alone, on boundaries. At ground level it is the state at ground
// level. Errors are those of At.
func (s *Stress) JustAbove(depth float64) (State, error) {
	depth, err := s.within(depth)
	if err != nil {
		return State{}, err
	}
	i := s.find(depth)
	if i > 0 && s.tops[i] == depth {
		i--
	}
	return s.state(i, depth), nil
}

func (s *Stress) within(depth float64) (float64, error) {
	// Written so that NaN is out of range too.
	if !(depth >= -sameDepth && depth <= s.base+sameDepth) {
		return 0, fmt.Errorf("depth %g m: %w; want 0 to %g m", depth, ErrOutOfRange, s.base)
	}
	return min(max(depth, 0), s.base), nil
}

// find returns the piece that a depth within the column lies in.
func (s *Stress) find(depth float64) int {
	low, high := 0, len(s.tops)
	for high-low > 1 {
		if middle := int(uint(low+high) >> 1); s.tops[middle] <= depth {
			low = middle
		} else {
			high = middle
		}
	}
	return low
}

func (s *Stress) state(i int, depth float64) State {
	p, below := &s.pieces[i], depth-s.tops[i]
	total, pore := p.total+p.weight*below, p.pore+p.gradient*below
	return State{Total: total, Pore: pore, Effective: total - pore, UnitWeight: p.weight}
}

// Depth returns the depth of the deepest base, m: At answers down to there.
func (s *Stress) Depth() float64 { return s.base }

// WaterTable returns the depth of the water table in m, negative above ground:
// the one given, or the one that the measured points imply.
func (s *Stress) WaterTable() (depth float64, ok bool) { return s.water.table, s.water.hasTable }

// Breaks returns, in order, the depths at which a stress line kinks or steps:
// ground level, boundaries, water table, top of the capillary fringe, measured
// points, depths where u0 passes zero, and the deepest base. Between two of them
// every stress is linear.
func (s *Stress) Breaks() []float64 {
	return append(slices.Clone(s.tops), s.base)
}
