package insitu

import (
	"cmp"
	"fmt"
	"slices"
)

// water is what is known of the pore pressure, without contradictions: points
// from the top down, more than sameDepth apart from each other and from the
// table. Every point that only repeats the table is gone.
type water struct {
	unitWeight float64
	hasTable   bool
	table      float64 // negative above ground
	capillary  float64
	points     []PorePressure
}

// observe returns the water of the column, or everything that is wrong with it.
func (c Column) observe() (w water, problems []error) {
	w = water{unitWeight: c.WaterUnitWeight, hasTable: c.HasWater, table: c.WaterTable, capillary: c.CapillaryRise}
	if !c.HasWater {
		w.table = 0
	}
	switch {
	case !finite(c.WaterUnitWeight):
		problems = append(problems, fmt.Errorf("unit weight of water: %g: %w", c.WaterUnitWeight, ErrNotFinite))
	case c.WaterUnitWeight <= 0:
		problems = append(problems, fmt.Errorf("unit weight of water %g kN/m³: %w", c.WaterUnitWeight, ErrUnitWeight))
	}
	if c.HasWater && !finite(c.WaterTable) {
		problems = append(problems, fmt.Errorf("water table: %g: %w", c.WaterTable, ErrNotFinite))
	}
	if !finite(c.CapillaryRise) {
		problems = append(problems, fmt.Errorf("capillary rise: %g: %w", c.CapillaryRise, ErrNotFinite))
	}
	for i, p := range c.Measured {
		switch {
		case !finite(p.Depth) || !finite(p.Pressure):
			problems = append(problems, fmt.Errorf("measured point %d: %g m, %g kPa: %w", i+1, p.Depth, p.Pressure, ErrNotFinite))
		case p.Depth < -sameDepth:
			problems = append(problems, fmt.Errorf("measured point %d: depth %g m: %w", i+1, p.Depth, ErrMeasuredDepth))
		}
	}
	if c.CapillaryRise < 0 {
		problems = append(problems, fmt.Errorf("capillary rise %g m is below zero: %w", c.CapillaryRise, ErrCapillaryRise))
	}
	if len(problems) > 0 {
		return w, problems // the rest compares these numbers
	}

	problems = w.add(c.Measured)
	if !w.hasTable {
		w.implyTable()
	}
	if !w.hasTable && c.CapillaryRise > 0 {
		problems = append(problems, fmt.Errorf("capillary rise %g m without a water table: %w; want the depth of the table", c.CapillaryRise, ErrCapillaryRise))
	}
	return w, problems
}

// add sorts the measured points in, drops repetitions and names contradictions.
// Pressures over one depth may differ by what water weighs over sameDepth.
func (w *water) add(measured []PorePressure) (problems []error) {
	type numbered struct {
		PorePressure
		number int
	}
	points := make([]numbered, len(measured))
	for i, p := range measured {
		if p.Depth <= sameDepth {
			p.Depth = 0
		}
		points[i] = numbered{p, i + 1}
	}
	slices.SortFunc(points, func(a, b numbered) int {
		return cmp.Or(cmp.Compare(a.Depth, b.Depth), cmp.Compare(a.Pressure, b.Pressure), cmp.Compare(a.number, b.number))
	})
	same := w.unitWeight * sameDepth
	var kept *numbered
	for i := range points {
		p := &points[i]
		if kept != nil && p.Depth-kept.Depth <= sameDepth {
			if p.Pressure-kept.Pressure > same || kept.Pressure-p.Pressure > same {
				problems = append(problems, fmt.Errorf("measured points %d and %d: %g kPa and %g kPa at %g m: %w; want one pressure at a depth",
					kept.number, p.number, kept.Pressure, p.Pressure, p.Depth, ErrContradiction))
			}
			continue
		}
		kept = p
		if want, fixed := w.fixed(p.Depth); fixed {
			if p.Pressure-want > same || want-p.Pressure > same {
				problems = append(problems, fmt.Errorf("measured point %d: %g kPa at %g m, where the water table gives %g kPa: %w",
					p.number, p.Pressure, p.Depth, want, ErrContradiction))
			}
			continue
		}
		if p.Depth == 0 && p.Pressure > 0 {
			problems = append(problems, fmt.Errorf("measured point %d: %g kPa at ground level: %w; want a water table above ground",
				p.number, p.Pressure, ErrContradiction))
		}
		w.points = append(w.points, p.PorePressure)
	}
	return problems
}

// fixed returns the pressure that the water table itself gives at a depth: at
// the table, and at ground level under water.
func (w *water) fixed(depth float64) (pressure float64, ok bool) {
	switch {
	case !w.hasTable:
		return 0, false
	case w.table <= 0:
		return w.unitWeight * (0 - w.table), depth <= sameDepth // 0 − 0 prints as 0, −0 would not
	}
	return 0, depth >= w.table-sameDepth && depth <= w.table+sameDepth
}

// implyTable reads a water table out of measured points, where they have one:
// the last zero above the first positive pressure (or the last of all zeros), or
// the height to which a first positive pressure lifts water.
func (w *water) implyTable() {
	first := slices.IndexFunc(w.points, func(p PorePressure) bool { return p.Pressure != 0 })
	if first < 0 {
		first = len(w.points)
	}
	switch {
	case first < len(w.points) && w.points[first].Pressure < 0:
		return
	case first > 0:
		w.hasTable, w.table = true, w.points[first-1].Depth
		w.points = slices.Delete(w.points, first-1, first)
	case len(w.points) > 0:
		p := w.points[0]
		if level := p.Depth - p.Pressure/w.unitWeight; level >= 0 {
			w.hasTable, w.table = true, level
		}
	}
}

// fringe returns the two ends of the capillary fringe; they are equal without one.
func (w *water) fringe() (top, base float64) {
	if !w.hasTable || w.table <= 0 {
		return 0, 0
	}
	return max(0, w.table-w.capillary), w.table
}
