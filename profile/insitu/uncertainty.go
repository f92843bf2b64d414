package insitu

import (
	"fmt"
	"math"
	"slices"
)

// Raised returns the stresses in the same column with the water higher by rise
// metres (lower if negative): the table moves, and every pressure above zero
// changes by γw·rise but not below zero. Measured zeros and suctions stay: they
// say that the ground is not under water there. A table that would pass a
// measured point still under pressure or suction stops half way to it.
func (s *Stress) Raised(rise float64) (*Stress, error) {
	if !finite(rise) {
		return nil, fmt.Errorf("rise of the water: %g: %w", rise, ErrNotFinite)
	}
	w := s.water
	w.points = slices.Clone(w.points)
	for i, p := range w.points {
		if p.Pressure > 0 {
			w.points[i].Pressure = max(0, p.Pressure+w.unitWeight*rise)
		}
	}
	if w.hasTable {
		w.table = w.moveTable(rise)
		if w.table <= 0 {
			w.points = slices.DeleteFunc(w.points, func(p PorePressure) bool { return p.Depth == 0 })
		}
	}
	return assemble(s.layers, s.surcharge, w)
}

// moveTable returns the depth of a table raised by rise.
func (w *water) moveTable(rise float64) float64 {
	moved := w.table - rise
	from, to := min(w.table, moved)-sameDepth, max(w.table, moved)+sameDepth
	nearest := math.Inf(1)
	for _, p := range w.points {
		if p.Pressure != 0 && p.Depth >= from && p.Depth <= to && (p.Depth < w.table) == (rise > 0) {
			if math.Abs(p.Depth-w.table) < math.Abs(nearest-w.table) {
				nearest = p.Depth
			}
		}
	}
	if finite(nearest) {
		return w.table + (nearest-w.table)/2
	}
	return moved
}

// A Spread answers for the standard deviation of σ′v0 in one column.
type Spread struct {
	stress         *Stress
	higher, lower  *Stress
	unitWeightCOV  float64
	loadBesideSoil float64
}

// Spread returns the standard deviation of σ′v0 that follows from two errors,
// each shared by the whole column and independent of the other:
//
//	SD² = (V·Σ γ·Δz)² + ((σ′v0(higher) − σ′v0(lower)) / 2)²
//
// with V = unitWeightCOV, the coefficient of variation of the unit weight (the
// same relative error in every layer, as one laboratory or one correlation gives
// it; a pure number), and higher and lower the columns with the water up and
// down by waterLevelSD in m (see Raised). The two-point difference keeps what a
// derivative loses close to the table: that a rising level reaches ground that
// is dry now, and that saturating it makes it heavier. The surcharge and the
// water above ground are taken as exact. Both inputs must be finite and not
// negative; the error wraps ErrOutOfRange otherwise.
func (s *Stress) Spread(unitWeightCOV, waterLevelSD float64) (*Spread, error) {
	if !(unitWeightCOV >= 0) || !finite(unitWeightCOV) {
		return nil, fmt.Errorf("coefficient of variation of unit weight %g: %w; want 0 or more", unitWeightCOV, ErrOutOfRange)
	}
	if !(waterLevelSD >= 0) || !finite(waterLevelSD) {
		return nil, fmt.Errorf("standard deviation of the water level %g m: %w; want 0 or more", waterLevelSD, ErrOutOfRange)
	}
	higher, err := s.Raised(waterLevelSD)
	if err != nil {
		return nil, fmt.Errorf("water higher by %g m: %w", waterLevelSD, err)
	}
	lower, err := s.Raised(-waterLevelSD)
	if err != nil {
		return nil, fmt.Errorf("water lower by %g m: %w", waterLevelSD, err)
	}
	return &Spread{s, higher, lower, unitWeightCOV, s.surcharge + s.waterAbove()}, nil
}

// At returns the standard deviation of σ′v0 at a depth, kPa. Errors are those of
// Stress.At, and ErrNotFinite where inputs beyond reason overflow.
func (p *Spread) At(depth float64) (sd float64, err error) {
	here, err := p.stress.At(depth)
	if err != nil {
		return 0, err
	}
	higher, err := p.higher.At(depth)
	if err != nil {
		return 0, err
	}
	lower, err := p.lower.At(depth)
	if err != nil {
		return 0, err
	}
	weight := p.unitWeightCOV * (here.Total - p.loadBesideSoil)
	level := (higher.Effective - lower.Effective) / 2
	if sd = math.Hypot(weight, level); !finite(sd) {
		return 0, fmt.Errorf("standard deviation at %g m: %w", depth, errTooLargeToCount)
	}
	return sd, nil
}

// Uncertainty returns the standard deviation of σ′v0 at one depth, kPa. For
// many depths of one column ask Spread once. Inputs and errors are those of
// Spread and its At.
func (s *Stress) Uncertainty(depth, unitWeightCOV, waterLevelSD float64) (sd float64, err error) {
	spread, err := s.Spread(unitWeightCOV, waterLevelSD)
	if err != nil {
		return 0, err
	}
	return spread.At(depth)
}
