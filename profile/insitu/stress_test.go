package insitu_test

import (
	"errors"
	"math"
	"slices"
	"strings"
	"testing"

	"pastload/profile/insitu"
)

// exact is for sums of a few products near 100 kPa: some tens of ulps.
const exact = 1e-11

const water = 9.81

func layer(top, base, above, below float64) insitu.Layer {
	return insitu.Layer{Top: top, Base: base, UnitWeight: above, SaturatedUnitWeight: below}
}

func mustNew(t testing.TB, c insitu.Column) *insitu.Stress {
	t.Helper()
	s, err := insitu.New(c)
	if err != nil {
		t.Fatal(err)
	}
	return s
}

func mustAt(t testing.TB, s *insitu.Stress, depth float64) insitu.State {
	t.Helper()
	got, err := s.At(depth)
	if err != nil {
		t.Fatal(err)
	}
	return got
}

func near(a, b, tolerance float64) bool { return math.Abs(a-b) <= tolerance }

// Each row is a rule of the package documentation about pore pressure and about
// which of its two weights the ground has.
func TestPorePressureRules(t *testing.T) {
	type point = insitu.PorePressure
	ground := []insitu.Layer{layer(0, 20, 16, 20)}
	for _, c := range []struct {
		name         string
		column       insitu.Column
		depth        float64
		pore, weight float64
		total        float64
	}{
		{"dry: never any pressure", insitu.Column{}, 12, 0, 16, 192},
		{"above the table", insitu.Column{HasWater: true, WaterTable: 4}, 3, 0, 16, 48},
		{"at the table the ground below begins", insitu.Column{HasWater: true, WaterTable: 4}, 4, 0, 20, 64},
		{"below the table", insitu.Column{HasWater: true, WaterTable: 4}, 6, 2 * water, 20, 104},
		{"table at ground level", insitu.Column{HasWater: true}, 2, 2 * water, 20, 40},
		{"water above ground loads the bed", insitu.Column{HasWater: true, WaterTable: -3}, 0, 3 * water, 20, 3 * water},
		{"table below the column leaves it dry", insitu.Column{HasWater: true, WaterTable: 30}, 20, 0, 16, 320},
		{"a depth of a dry column ignores WaterTable", insitu.Column{WaterTable: 3}, 10, 0, 16, 160},

		{"just above the fringe", insitu.Column{HasWater: true, WaterTable: 4, CapillaryRise: 1.5}, 2.4999999999999996, 0, 16, 40},
		{"top of the fringe belongs to it", insitu.Column{HasWater: true, WaterTable: 4, CapillaryRise: 1.5}, 2.5, -1.5 * water, 20, 40},
		{"in the fringe", insitu.Column{HasWater: true, WaterTable: 4, CapillaryRise: 1.5}, 3.5, -0.5 * water, 20, 60},
		{"fringe cut off by ground level", insitu.Column{HasWater: true, WaterTable: 1, CapillaryRise: 3}, 0, -1 * water, 20, 0},
		{"no room for a fringe under water", insitu.Column{HasWater: true, WaterTable: -1, CapillaryRise: 3}, 1, 2 * water, 20, water + 20},
		{"measured suction in the fringe rules", insitu.Column{HasWater: true, WaterTable: 4, CapillaryRise: 2, Measured: []point{{3, -5}}}, 3.5, -2.5, 20, 32 + 30},
		{"a zero in the fringe denies its suction, not its weight", insitu.Column{HasWater: true, WaterTable: 4, CapillaryRise: 2, Measured: []point{{3, 0}}}, 3.5, 0, 20, 32 + 30},

		{"straight between table and point (under-drained)", insitu.Column{HasWater: true, WaterTable: 2, Measured: []point{{12, 50}}}, 7, 25, 20, 132},
		{"hydrostatic below the last point", insitu.Column{HasWater: true, WaterTable: 2, Measured: []point{{12, 50}}}, 14, 50 + 2*water, 20, 272},
		{"artesian", insitu.Column{HasWater: true, WaterTable: 0, Measured: []point{{10, 150}}}, 5, 75, 20, 100},
		{"a point below the column still gives the slope in it", insitu.Column{HasWater: true, WaterTable: 0, Measured: []point{{40, 200}}}, 20, 100, 20, 400},

		{"no table: first point lifts water to its level", insitu.Column{Measured: []point{{8, 3 * water}, {12, 50}}}, 6, water, 20, 80 + 20},
		{"no table: dry above that level", insitu.Column{Measured: []point{{8, 3 * water}}}, 5, 0, 20, 80},
		{"no table: above that level", insitu.Column{Measured: []point{{8, 3 * water}}}, 4, 0, 16, 64},
		{"no table: level above ground is drawn to 0 at ground", insitu.Column{Measured: []point{{2, 40}}}, 1, 20, 20, 20},
		{"a lone zero is a water level", insitu.Column{Measured: []point{{5, 0}}}, 7, 2 * water, 20, 120},
		{"zeros before a pressure: the last is the level", insitu.Column{Measured: []point{{3, 0}, {5, 0}, {7, 10}}}, 6, 5, 20, 100},

		{"perched: in it", insitu.Column{HasWater: true, WaterTable: 10, Measured: []point{{1, 0}, {2, 8}, {3, 0}}}, 2.5, 4, 20, 16 + 30},
		{"perched: dry again below, wet weight", insitu.Column{HasWater: true, WaterTable: 10, Measured: []point{{1, 0}, {2, 8}, {3, 0}}}, 5, 0, 16, 16 + 40 + 32},
		{"perched: below the deep table", insitu.Column{HasWater: true, WaterTable: 10, Measured: []point{{1, 0}, {2, 8}, {3, 0}}}, 11, water, 20, 16 + 40 + 7*16 + 20},
		{"perched: fringe of the deep table", insitu.Column{HasWater: true, WaterTable: 10, CapillaryRise: 1, Measured: []point{{1, 0}, {2, 8}, {3, 0}}}, 9, -water, 20, 16 + 40 + 6*16},
		{"perched without a deep table: two zeros keep it dry", insitu.Column{Measured: []point{{1, 0}, {2, 8}, {3, 0}, {20, 0}}}, 15, 0, 16, 16 + 40 + 12*16},

		{"suction only where measured: straight to 0 at ground", insitu.Column{HasWater: true, WaterTable: 6, Measured: []point{{2, -20}}}, 1, -10, 16, 16},
		{"suction straight to the table", insitu.Column{HasWater: true, WaterTable: 6, Measured: []point{{2, -20}}}, 4, -10, 16, 64},
		{"suction at ground level", insitu.Column{HasWater: true, WaterTable: 4, Measured: []point{{0, -20}}}, 0, -20, 16, 0},
		{"suction turns to pressure: split where u passes 0", insitu.Column{Measured: []point{{2, -10}, {6, 10}}}, 5, 5, 20, 4*16 + 20},
		{"pressure turns to suction", insitu.Column{HasWater: true, WaterTable: 0, Measured: []point{{2, 10}, {6, -10}}}, 5, -5, 16, 4*20 + 16},
		{"below a last suction u grows to pressure", insitu.Column{Measured: []point{{2, -water}}}, 5, 2 * water, 20, 48 + 40},
	} {
		t.Run(c.name, func(t *testing.T) {
			c.column.Layers, c.column.WaterUnitWeight = ground, water
			got := mustAt(t, mustNew(t, c.column), c.depth)
			if !near(got.Pore, c.pore, exact) || got.UnitWeight != c.weight || !near(got.Total, c.total, exact) {
				t.Errorf("u %g, γ %g, σ %g; want %g, %g, %g", got.Pore, got.UnitWeight, got.Total, c.pore, c.weight, c.total)
			}
			if got.Effective != got.Total-got.Pore {
				t.Errorf("σ′ %g is not σ − u", got.Effective)
			}
		})
	}
}

func TestAtBoundaries(t *testing.T) {
	s := mustNew(t, insitu.Column{
		Layers: []insitu.Layer{layer(2, 2.001, 15, 18), layer(0, 2, 16, 19), layer(2.001, 6, 17, 20)}, Surcharge: 10,
		HasWater: true, WaterTable: 2, WaterUnitWeight: water,
	})
	for _, c := range []struct{ depth, total, weight float64 }{
		{0, 10, 16}, {2, 42, 18}, {2.0005, 42.009, 18}, {2.001, 42.018, 20}, {6, 42.018 + 3.999*20, 20},
	} {
		got := mustAt(t, s, c.depth)
		if !near(got.Total, c.total, exact) || got.UnitWeight != c.weight {
			t.Errorf("at %g: σ %.12g, γ %g; want %g, %g", c.depth, got.Total, got.UnitWeight, c.total, c.weight)
		}
	}
	if got, want := s.Breaks(), []float64{0, 2, 2.001, 6}; !slices.Equal(got, want) {
		t.Errorf("breaks %v; want %v", got, want)
	}
	above, err := s.JustAbove(2)
	if err != nil || above.UnitWeight != 16 || !near(above.Total, 42, exact) {
		t.Errorf("just above 2 m: %+v, %v; want the upper weight", above, err)
	}
	if s.Depth() != 6 {
		t.Errorf("depth %g; want 6", s.Depth())
	}
	// The ends forgive a rounding of 1 mm and nothing more.
	if got := mustAt(t, s, 6.001); got != mustAt(t, s, 6) {
		t.Errorf("1 mm below the base: %+v", got)
	}
	for _, depth := range []float64{-0.002, 6.002, math.NaN(), math.Inf(1), math.Inf(-1)} {
		if _, err := s.At(depth); !errors.Is(err, insitu.ErrOutOfRange) {
			t.Errorf("at %g: %v; want ErrOutOfRange", depth, err)
		}
		if _, err := s.JustAbove(depth); !errors.Is(err, insitu.ErrOutOfRange) {
			t.Errorf("just above %g: %v; want ErrOutOfRange", depth, err)
		}
		if _, err := s.Buoyant(depth); !errors.Is(err, insitu.ErrOutOfRange) {
			t.Errorf("buoyant at %g: %v; want ErrOutOfRange", depth, err)
		}
	}
}

func TestFringeSteps(t *testing.T) {
	s := mustNew(t, insitu.Column{
		Layers: []insitu.Layer{layer(0, 10, 16, 20)}, HasWater: true, WaterTable: 4, CapillaryRise: 1, WaterUnitWeight: 10,
	})
	above, err := s.JustAbove(3)
	if err != nil {
		t.Fatal(err)
	}
	at := mustAt(t, s, 3)
	if above.Effective != 48 || at.Effective != 58 || above.Total != at.Total {
		t.Errorf("σ′ steps from %g to %g, σ from %g to %g; want 48 to 58 and no step", above.Effective, at.Effective, above.Total, at.Total)
	}
	if got, want := s.Breaks(), []float64{0, 3, 4, 10}; !slices.Equal(got, want) {
		t.Errorf("breaks %v; want %v", got, want)
	}
}

func TestBreaksNameMeasuredPoints(t *testing.T) {
	s := mustNew(t, insitu.Column{
		Layers: []insitu.Layer{layer(0, 10, 16, 20)}, HasWater: true, WaterTable: 1, WaterUnitWeight: 10,
		Measured: []insitu.PorePressure{{Depth: 12, Pressure: 110}, {Depth: 4, Pressure: 30}, {Depth: 4, Pressure: 30}, {Depth: 1, Pressure: 0}},
	})
	if got, want := s.Breaks(), []float64{0, 1, 4, 10}; !slices.Equal(got, want) {
		t.Errorf("breaks %v; want %v", got, want)
	}
	if !s.Hydrostatic() {
		t.Error("points on the line of the table are not hydrostatic")
	}
	if depth, ok := s.WaterTable(); depth != 1 || !ok {
		t.Errorf("water table %g, %v; want 1", depth, ok)
	}
}

func TestHydrostatic(t *testing.T) {
	type points = []insitu.PorePressure
	for _, c := range []struct {
		name   string
		column insitu.Column
		want   bool
	}{
		{"dry", insitu.Column{}, true},
		{"one table", insitu.Column{HasWater: true, WaterTable: 3}, true},
		{"with a fringe", insitu.Column{HasWater: true, WaterTable: 3, CapillaryRise: 1}, true},
		{"lake", insitu.Column{HasWater: true, WaterTable: -3}, true},
		{"implied by a point", insitu.Column{Measured: points{{5, 2 * water}}}, true},
		{"a zero above the table", insitu.Column{HasWater: true, WaterTable: 3, Measured: points{{1, 0}}}, true},
		{"a zero in the fringe", insitu.Column{HasWater: true, WaterTable: 3, CapillaryRise: 1, Measured: points{{2.5, 0}}}, false},
		{"artesian", insitu.Column{HasWater: true, WaterTable: 3, Measured: points{{5, 30}}}, false},
		{"under-drained", insitu.Column{HasWater: true, WaterTable: 3, Measured: points{{5, 10}}}, false},
		{"suction", insitu.Column{Measured: points{{2, -5}}}, false},
		{"perched", insitu.Column{HasWater: true, WaterTable: 8, Measured: points{{1, 0}, {2, 9}, {3, 0}}}, false},
		{"held to 0 at ground", insitu.Column{Measured: points{{2, 40}}}, false},
	} {
		c.column.Layers, c.column.WaterUnitWeight = []insitu.Layer{layer(0, 10, 16, 20)}, water
		s := mustNew(t, c.column)
		if got := s.Hydrostatic(); got != c.want {
			t.Errorf("%s: hydrostatic %v; want %v", c.name, got, c.want)
		}
		if _, err := s.Buoyant(5); errors.Is(err, insitu.ErrNotHydrostatic) == c.want {
			t.Errorf("%s: buoyant: %v", c.name, err)
		}
	}
}

// A base that is about to heave, and worse, is a result and not an error.
func TestEffectiveStressMayVanish(t *testing.T) {
	c := insitu.Column{Layers: []insitu.Layer{layer(0, 3, 20, 20)}, WaterUnitWeight: 10}
	for _, pressure := range []float64{60, 75} {
		c.Measured = []insitu.PorePressure{{Depth: 3, Pressure: pressure}}
		if got := mustAt(t, mustNew(t, c), 3); got.Effective != 60-pressure {
			t.Errorf("u = %g: σ′ %g; want %g", pressure, got.Effective, 60-pressure)
		}
	}
	floating := insitu.Column{Layers: []insitu.Layer{layer(0, 3, 9, 9)}, HasWater: true, WaterUnitWeight: 10}
	if got := mustAt(t, mustNew(t, floating), 3); !near(got.Effective, -3, exact) {
		t.Errorf("peat lighter than water: σ′ %g; want -3", got.Effective)
	}
}

func TestNewDoesNotKeepTheCallersSlices(t *testing.T) {
	c := insitu.Column{
		Layers: []insitu.Layer{layer(0, 3, 20, 20)}, HasWater: true, WaterUnitWeight: 10,
		Measured: []insitu.PorePressure{{Depth: 3, Pressure: 40}, {Depth: 2, Pressure: 25}},
	}
	s := mustNew(t, c)
	before := mustAt(t, s, 3)
	c.Layers[0].UnitWeight, c.Measured[0].Pressure = 1, 1
	s.Breaks()[0] = 99
	if got := mustAt(t, s, 3); got != before {
		t.Errorf("%+v changed to %+v", before, got)
	}
	if c.Measured[0].Depth != 3 {
		t.Error("New sorted the caller's points")
	}
}

func TestBadColumns(t *testing.T) {
	type points = []insitu.PorePressure
	nan, inf := math.NaN(), math.Inf(1)
	one := []insitu.Layer{layer(0, 5, 18, 20)}
	for _, c := range []struct {
		name   string
		column insitu.Column
		want   []error
		say    []string // what the message must name
	}{
		{"no layers", insitu.Column{}, []error{insitu.ErrNoLayers}, nil},
		{"starts below ground", insitu.Column{Layers: []insitu.Layer{layer(0.5, 5, 18, 20)}}, []error{insitu.ErrGap}, []string{"layer 1", "0.5 m", "ground level"}},
		{"starts above ground", insitu.Column{Layers: []insitu.Layer{layer(-1, 5, 18, 20)}}, []error{insitu.ErrOverlap}, []string{"layer 1", "-1 m"}},
		{"gap", insitu.Column{Layers: []insitu.Layer{layer(0, 2, 18, 20), layer(2.002, 5, 18, 20)}}, []error{insitu.ErrGap}, []string{"layer 2", "2.002", "layer 1"}},
		{"overlap", insitu.Column{Layers: []insitu.Layer{layer(2, 5, 18, 20), layer(0, 2.5, 18, 20)}}, []error{insitu.ErrOverlap}, []string{"layer 1", "base of layer 2", "2.5"}},
		{"the same layer twice", insitu.Column{Layers: []insitu.Layer{layer(0, 2, 18, 20), layer(0, 2, 18, 20)}}, []error{insitu.ErrOverlap}, []string{"layer 2"}},
		{"inverted", insitu.Column{Layers: []insitu.Layer{layer(0, 3, 18, 20), layer(5, 3, 18, 20)}}, []error{insitu.ErrInverted}, []string{"layer 2", "top 5 m"}},
		{"of no thickness", insitu.Column{Layers: []insitu.Layer{layer(0, 3, 18, 20), layer(3, 3, 18, 20)}}, []error{insitu.ErrInverted}, []string{"layer 2"}},
		{"swallowed by the tolerance", insitu.Column{Layers: []insitu.Layer{layer(0, 3, 18, 20), layer(2.9995, 2.9999, 18, 20), layer(3, 4, 18, 20)}}, []error{insitu.ErrOverlap}, []string{"layer 2"}},
		{"not a number", insitu.Column{Layers: []insitu.Layer{layer(0, nan, 18, 20)}}, []error{insitu.ErrNotFinite}, []string{"layer 1", "base"}},
		{"missing weight as NaN", insitu.Column{Layers: []insitu.Layer{layer(0, 5, nan, 20)}}, []error{insitu.ErrNotFinite}, []string{"unit weight"}},
		{"infinite weight", insitu.Column{Layers: []insitu.Layer{layer(0, 5, 18, inf)}}, []error{insitu.ErrNotFinite}, []string{"saturated unit weight"}},
		{"negative weight", insitu.Column{Layers: []insitu.Layer{layer(0, 5, -18, 20)}}, []error{insitu.ErrUnitWeight}, []string{"-18"}},
		{"zero saturated weight", insitu.Column{Layers: []insitu.Layer{layer(0, 5, 18, 0)}}, []error{insitu.ErrUnitWeight}, []string{"saturated"}},
		{"negative surcharge", insitu.Column{Layers: one, Surcharge: -5}, []error{insitu.ErrSurcharge}, []string{"-5"}},
		{"surcharge not a number", insitu.Column{Layers: one, Surcharge: nan}, []error{insitu.ErrNotFinite}, []string{"surcharge"}},
		{"weightless water", insitu.Column{Layers: one, WaterUnitWeight: -1}, []error{insitu.ErrUnitWeight}, []string{"water"}},
		{"water not a number", insitu.Column{Layers: one, WaterUnitWeight: nan}, []error{insitu.ErrNotFinite}, []string{"water"}},
		{"table not a number", insitu.Column{Layers: one, HasWater: true, WaterTable: nan}, []error{insitu.ErrNotFinite}, []string{"water table"}},
		{"negative capillary rise", insitu.Column{Layers: one, HasWater: true, CapillaryRise: -1}, []error{insitu.ErrCapillaryRise}, []string{"-1"}},
		{"capillary rise not a number", insitu.Column{Layers: one, HasWater: true, CapillaryRise: nan}, []error{insitu.ErrNotFinite}, []string{"capillary"}},
		{"capillary rise from nowhere", insitu.Column{Layers: one, CapillaryRise: 1}, []error{insitu.ErrCapillaryRise}, []string{"water table"}},
		{"two pressures at a depth", insitu.Column{Layers: one, Measured: points{{3, 20}, {2, 10}, {3, 21}}}, []error{insitu.ErrContradiction}, []string{"points 1 and 3", "20", "21"}},
		{"pressure at the table", insitu.Column{Layers: one, HasWater: true, WaterTable: 2, Measured: points{{2, 7}}}, []error{insitu.ErrContradiction}, []string{"point 1", "7 kPa"}},
		{"bed against lake", insitu.Column{Layers: one, HasWater: true, WaterTable: -2, Measured: points{{0, 10}}}, []error{insitu.ErrContradiction}, []string{"19.62"}},
		{"pressure at ground level without water", insitu.Column{Layers: one, Measured: points{{0, 10}}}, []error{insitu.ErrContradiction}, []string{"ground level"}},
		{"measured in the air", insitu.Column{Layers: one, Measured: points{{-1, 10}}}, []error{insitu.ErrMeasuredDepth}, []string{"point 1"}},
		{"measured not a number", insitu.Column{Layers: one, Measured: points{{1, inf}}}, []error{insitu.ErrNotFinite}, []string{"point 1"}},
		{"beyond counting", insitu.Column{Layers: []insitu.Layer{layer(0, 1e300, 1e300, 1)}}, []error{insitu.ErrNotFinite}, []string{"too large"}},
		{"everything at once", insitu.Column{
			Layers: []insitu.Layer{layer(0, 2, -1, 20), layer(3, 2.5, 18, 20)}, Surcharge: -1, HasWater: true, WaterTable: nan,
			CapillaryRise: -1, Measured: points{{-1, 0}},
		}, []error{insitu.ErrUnitWeight, insitu.ErrInverted, insitu.ErrGap, insitu.ErrSurcharge, insitu.ErrNotFinite, insitu.ErrCapillaryRise, insitu.ErrMeasuredDepth},
			[]string{"layer 1", "layer 2", "measured point 1"}},
	} {
		t.Run(c.name, func(t *testing.T) {
			if c.column.WaterUnitWeight == 0 {
				c.column.WaterUnitWeight = water
			}
			s, err := insitu.New(c.column)
			if err == nil || s != nil {
				t.Fatalf("%v, %v; want an error and nothing else", s, err)
			}
			for _, want := range c.want {
				if !errors.Is(err, want) {
					t.Errorf("%v; want %v", err, want)
				}
			}
			for _, say := range c.say {
				if !strings.Contains(err.Error(), say) {
					t.Errorf("%v; does not name %q", err, say)
				}
			}
			if lines := strings.Count(err.Error(), "\n") + 1; lines != max(1, len(c.want)) {
				t.Errorf("%d problems; want %d:\n%v", lines, len(c.want), err)
			}
		})
	}
}

// A water table, a boundary and a point that are one depth but for the last
// binary digit must not cut a stretch of no thickness.
func TestDepthsReachedByTwoRoads(t *testing.T) {
	boundary := 0.1 + 0.2 // 0.30000000000000004
	s := mustNew(t, insitu.Column{
		Layers: []insitu.Layer{layer(0, boundary, 16, 20), layer(boundary, 2, 17, 21)}, HasWater: true, WaterTable: 1.3, CapillaryRise: 1,
		WaterUnitWeight: water, Measured: []insitu.PorePressure{{Depth: 2, Pressure: 0.7 * water}},
	})
	if got, want := s.Breaks(), []float64{0, boundary, 1.3, 2}; !slices.Equal(got, want) {
		t.Errorf("breaks %v; want %v", got, want)
	}
	if got := mustAt(t, s, boundary); !near(got.Pore, -water, exact) || got.UnitWeight != 21 {
		t.Errorf("at the boundary: %+v; want the saturated lower layer", got)
	}
	// The top of a fringe (0.4 − 0.1) and points at 0.3: a suction rules the line, a
	// zero leaves the fringe its step.
	for _, pressure := range []float64{-3, 0} {
		for _, depth := range []float64{0.3, 0.30000000000000004, 0.30000000000000010} {
			s = mustNew(t, insitu.Column{
				Layers: []insitu.Layer{layer(0, 2, 16, 20)}, HasWater: true, WaterTable: 0.4, CapillaryRise: 0.1,
				WaterUnitWeight: water, Measured: []insitu.PorePressure{{Depth: depth, Pressure: pressure}},
			})
			if got := s.Breaks(); len(got) != 4 || s.Hydrostatic() != (pressure == 0) {
				t.Errorf("%g kPa at %.17g m: breaks %v, hydrostatic %v", pressure, depth, got, s.Hydrostatic())
			}
		}
	}
	s = mustNew(t, insitu.Column{Layers: []insitu.Layer{layer(0, 2, 16, 20)}, HasWater: true, WaterTable: 1e-13, WaterUnitWeight: water})
	if got, want := s.Breaks(), []float64{0, 2}; !slices.Equal(got, want) {
		t.Errorf("breaks %v; want %v", got, want)
	}
	s = mustNew(t, insitu.Column{Layers: []insitu.Layer{layer(0, 2, 16, 20)}, HasWater: true, WaterUnitWeight: water})
	if got := mustAt(t, s, 0); math.Signbit(got.Pore) || math.Signbit(got.Total) {
		t.Errorf("at ground level: %+v prints as -0", got)
	}
}

// A gap or overlap of up to 1 mm is the rounding of a log.
func TestBoundariesMeetWithinAMillimetre(t *testing.T) {
	for _, top := range []float64{2.999, 3, 3.001} {
		s := mustNew(t, insitu.Column{Layers: []insitu.Layer{layer(0.001, 3, 18, 20), layer(top, 5, 16, 20)}, WaterUnitWeight: water})
		if got := mustAt(t, s, 5); !near(got.Total, 3*18+2*16, exact) {
			t.Errorf("top %g: σ %g; want 86", top, got.Total)
		}
	}
}
