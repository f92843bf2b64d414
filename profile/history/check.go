package history

import (
	"errors"
	"fmt"
	"math"
)

// ErrInput is wrapped by the errors that Infer returns.
var ErrInput = errors.New("stress history: unusable input")

// defaults fills what the caller left out.
func (in *Input) defaults() {
	if in.Limits == [3]float64{} {
		in.Limits = [3]float64{0.85, 1.2, 4}
	}
	if in.WaterUnitWeight == 0 {
		in.WaterUnitWeight = 9.81
	}
	if in.BuoyantUnitWeight == 0 {
		in.BuoyantUnitWeight = 8
	}
	if in.NeighbourBetweenSD == 0 {
		in.NeighbourBetweenSD = 0.2
	}
}

// finite tells whether all values are numbers within reason.
func finite(values ...float64) bool {
	for _, v := range values {
		if math.IsNaN(v) || math.Abs(v) > 1e9 {
			return false
		}
	}
	return true
}

// mostSD is the largest standard deviation of a logarithm that makes sense: a
// factor of e⁵ either way.
const mostSD = 5.0

// spread tells whether all values are standard deviations of logarithms.
func spread(values ...float64) bool {
	for _, v := range values {
		if !(v >= 0 && v <= mostSD) {
			return false
		}
	}
	return true
}

// check returns an error for input that no answer can rest on.
func (in *Input) check() error {
	bad := func(format string, args ...any) error {
		return fmt.Errorf("%w: %s", ErrInput, fmt.Sprintf(format, args...))
	}
	if len(in.Layers) == 0 {
		return bad("no layer; want at least one")
	}
	for i, l := range in.Layers {
		if !finite(l.Top, l.Base) || l.Base < l.Top {
			return bad("layer %d: top %g, base %g m; want a base below the top", i, l.Top, l.Base)
		}
	}
	tests := func(what string, ts []Test) error {
		for i, t := range ts {
			if !finite(t.Depth, t.EffectiveStress, t.Preconsolidation) || !spread(t.LnSD, t.Disturbance) ||
				t.Preconsolidation <= 0 || t.Kind < Exact || t.Kind > AtMost || t.Layer < 0 || t.Layer >= len(in.Layers) {
				return bad("%s %d at %g m: σ′p %g kPa, sd %g, layer %d; want finite numbers, σ′p above zero, an sd of at most 5 and a layer of the list",
					what, i, t.Depth, t.Preconsolidation, t.LnSD, t.Layer)
			}
		}
		return nil
	}
	if err := tests("test", in.Tests); err != nil {
		return err
	}
	if err := tests("neighbouring test", in.Neighbours); err != nil {
		return err
	}
	for i, r := range in.Readings {
		if !finite(r.Depth, r.EffectiveStress, r.Preconsolidation) || !spread(r.BetweenSD, r.WithinSD) || r.Preconsolidation <= 0 ||
			r.Layer < 0 || r.Layer >= len(in.Layers) {
			return bad("reading %d (%s) at %g m: σ′p %g kPa, layer %d; want finite numbers, σ′p above zero and a layer of the list",
				i, r.Source, r.Depth, r.Preconsolidation, r.Layer)
		}
	}
	for i, s := range in.Stations {
		if !finite(s.Depth, s.EffectiveStress) || !spread(s.LnSD) || s.Layer < 0 || s.Layer >= len(in.Layers) {
			return bad("station %d at %g m: σ′v0 %g kPa, sd %g, layer %d; want finite numbers and a layer of the list",
				i, s.Depth, s.EffectiveStress, s.LnSD, s.Layer)
		}
	}
	for i, k := range in.Known {
		if !finite(k.Size, k.SD) || k.SD < 0 || k.Layer < -1 || k.Layer >= len(in.Layers) {
			return bad("known fact %d (%s): size %g, sd %g, layer %d; want finite numbers and a layer of the list", i, k.Kind, k.Size, k.SD, k.Layer)
		}
		if k.Kind != RemovedGround && k.Kind != FormerWaterLevel {
			return bad("known fact %d: kind %q; want %q or %q", i, k.Kind, RemovedGround, FormerWaterLevel)
		}
	}
	for _, v := range in.Limits {
		if !finite(v) || v <= 0 {
			return bad("limits of OCR %v; want three numbers above zero", in.Limits)
		}
	}
	if in.Limits[0] >= in.Limits[1] || in.Limits[1] >= in.Limits[2] {
		return bad("limits of OCR %v; want them to rise", in.Limits)
	}
	if !finite(in.WaterTable, in.WaterUnitWeight, in.BuoyantUnitWeight) || !spread(in.NeighbourBetweenSD) ||
		in.WaterUnitWeight <= 0 || in.BuoyantUnitWeight <= 0 {
		return bad("water table %g m, unit weights %g and %g kN/m³; want finite numbers, weights above zero",
			in.WaterTable, in.WaterUnitWeight, in.BuoyantUnitWeight)
	}
	return nil
}
