package insitu

import "fmt"

// Hydrostatic reports whether u0 is that of one water table at rest all the way
// down (with its capillary fringe, if any), or zero throughout. Measured points
// that lie on its line to within 1 mm of water do not disturb it.
func (s *Stress) Hydrostatic() bool {
	w := &s.water
	if !w.hasTable {
		return len(w.points) == 0
	}
	for _, p := range w.points {
		switch {
		case p.Depth < w.table && (p.Pressure != 0 || s.fringeTop < s.fringeBase && p.Depth > s.fringeTop+sameNumber):
			return false
		case p.Depth > w.table:
			if off := p.Pressure - w.unitWeight*(p.Depth-w.table); off > w.unitWeight*sameDepth || off < -w.unitWeight*sameDepth {
				return false
			}
		}
	}
	return true
}

// Buoyant returns σ′v0 at a depth in kPa by adding buoyant weights from ground
// level down, the other road to the same value:
//
//	σ′v0(z) = q + Σ γ·Δz above the wet ground + Σ (γsat − γw)·Δz in it + γw·h
//
// with h the height of the capillary fringe, whose suction presses the grains
// together from its top down. It shares no sums with At, so that one checks the
// other; water above ground, however deep, does not enter.
//
// The error wraps ErrNotHydrostatic where seepage or suction makes the identity
// false, or ErrOutOfRange as for At.
func (s *Stress) Buoyant(depth float64) (float64, error) {
	depth, err := s.within(depth)
	if err != nil {
		return 0, err
	}
	if !s.Hydrostatic() {
		return 0, fmt.Errorf("buoyant weights at %g m: %w", depth, ErrNotHydrostatic)
	}
	wet, table := s.base, s.base
	if s.water.hasTable {
		wet, table = s.fringeTop, s.fringeBase
	}
	sum := s.surcharge
	if depth >= wet {
		sum += s.water.unitWeight * (table - wet)
	}
	for _, l := range s.layers {
		if l.Top >= depth {
			break
		}
		bottom := min(l.Base, depth)
		above := max(0, min(bottom, wet)-l.Top)
		sum += l.UnitWeight*above + (l.SaturatedUnitWeight-s.water.unitWeight)*(bottom-l.Top-above)
	}
	return sum, nil
}
