package insitu

import (
	"cmp"
	"errors"
	"fmt"
	"math"
	"slices"
)

// Errors that New wraps; each comes with the layer or point and its numbers.
var (
	ErrNoLayers        = errors.New("no layers")
	ErrNotFinite       = errors.New("not a finite number")
	ErrInverted        = errors.New("base not below top")
	ErrGap             = errors.New("gap between layers")
	ErrOverlap         = errors.New("layers overlap")
	ErrUnitWeight      = errors.New("unit weight not above zero")
	ErrSurcharge       = errors.New("surcharge below zero")
	ErrCapillaryRise   = errors.New("capillary rise cannot be used")
	ErrMeasuredDepth   = errors.New("measured point above ground")
	ErrContradiction   = errors.New("pore pressures contradict each other")
	ErrOutOfRange      = errors.New("out of range")
	ErrNotHydrostatic  = errors.New("pore pressure is not hydrostatic")
	errTooLargeToCount = fmt.Errorf("stress too large to compute: %w", ErrNotFinite)
)

// sameDepth is the difference up to which two depths are one, in m: logs are
// rounded to a centimetre at best, and feet turned into metres to a millimetre.
// The extra nanometre keeps 2.001 − 2.000 inside it in binary arithmetic.
const sameDepth = 0.001 + 1e-9

// A Layer is a stretch of ground of one weight, depths in m, weights in kN/m³.
type Layer struct {
	Top, Base           float64
	UnitWeight          float64 // as it lies above the water
	SaturatedUnitWeight float64 // below the water and in the capillary fringe
}

// A PorePressure is a measured one: depth in m, pressure in kPa, negative where
// it is a suction.
type PorePressure struct {
	Depth, Pressure float64
}

// A Column is the ground under one place as New wants it. The package
// documentation says how its parts act together.
type Column struct {
	Layers          []Layer // in any order; they must meet, and start at 0
	Surcharge       float64 // wide and lasting, kPa
	HasWater        bool    // whether WaterTable is known
	WaterTable      float64 // m; negative where water stands above ground
	CapillaryRise   float64 // saturated ground above the table, m
	Measured        []PorePressure
	WaterUnitWeight float64 // γw, kN/m³
}

// arrange returns the layers from the top down with their boundaries made to
// meet exactly, or everything that is wrong with them. Layers are named by their
// place in the input, counted from 1.
func arrange(input []Layer) (layers []Layer, problems []error) {
	if len(input) == 0 {
		return nil, []error{fmt.Errorf("layers: %w; want at least one, starting at 0 m", ErrNoLayers)}
	}
	order := make([]int, len(input))
	spans := slices.Clone(input)
	for i, l := range input {
		order[i] = i
		problems = append(problems, l.problems(i+1)...)
		// An inverted layer is put upright for the comparison with its
		// neighbours, so that one slip is reported once.
		spans[i].Top, spans[i].Base = min(l.Top, l.Base), max(l.Top, l.Base)
	}
	for _, l := range input {
		if !finite(l.Top) || !finite(l.Base) {
			return nil, problems // what cannot be compared cannot meet
		}
	}
	slices.SortStableFunc(order, func(a, b int) int { return cmp.Compare(spans[a].Top, spans[b].Top) })

	above, upper := 0.0, 0 // the depth that the next layer must meet, and whose base it is
	layers = make([]Layer, 0, len(input))
	for _, i := range order {
		l := spans[i]
		switch {
		case l.Top > above+sameDepth:
			problems = append(problems, misfit(i+1, l.Top, "below", upper, above, ErrGap))
		case l.Top < above-sameDepth:
			problems = append(problems, misfit(i+1, l.Top, "above", upper, above, ErrOverlap))
		case l.Base > l.Top && l.Base <= above:
			problems = append(problems, misfit(i+1, l.Base, "not below", upper, above, ErrOverlap))
		default:
			l.Top = above
		}
		layers = append(layers, l)
		if l.Base > above {
			above, upper = l.Base, i+1
		}
	}
	return layers, problems
}

// misfit says how the edge of a layer lies to the base of the one above it.
func misfit(number int, edge float64, lies string, upper int, base float64, err error) error {
	name := "ground level"
	if upper > 0 {
		name = fmt.Sprintf("the base of layer %d", upper)
	}
	return fmt.Errorf("layer %d: %g m lies %s %s at %g m: %w; want layers that meet", number, edge, lies, name, base, err)
}

// problems returns what is wrong with a layer on its own.
func (l Layer) problems(number int) (problems []error) {
	for _, v := range []struct {
		name  string
		value float64
	}{{"top", l.Top}, {"base", l.Base}, {"unit weight", l.UnitWeight}, {"saturated unit weight", l.SaturatedUnitWeight}} {
		if !finite(v.value) {
			problems = append(problems, fmt.Errorf("layer %d: %s: %g: %w", number, v.name, v.value, ErrNotFinite))
		}
	}
	if len(problems) > 0 {
		return problems // signs and order of such numbers mean nothing
	}
	if l.Base <= l.Top {
		problems = append(problems, fmt.Errorf("layer %d: top %g m, base %g m: %w", number, l.Top, l.Base, ErrInverted))
	}
	// A weight of zero is a missing value that was read as a number.
	if l.UnitWeight <= 0 {
		problems = append(problems, fmt.Errorf("layer %d: unit weight %g kN/m³: %w", number, l.UnitWeight, ErrUnitWeight))
	}
	if l.SaturatedUnitWeight <= 0 {
		problems = append(problems, fmt.Errorf("layer %d: saturated unit weight %g kN/m³: %w", number, l.SaturatedUnitWeight, ErrUnitWeight))
	}
	return problems
}

func finite(v float64) bool { return !math.IsNaN(v) && !math.IsInf(v, 0) }
