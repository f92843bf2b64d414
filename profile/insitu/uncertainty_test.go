package insitu_test

import (
	"errors"
	"math"
	"testing"

	"pgregory.net/rapid"

	"pastload/profile/insitu"
)

func TestUncertainty(t *testing.T) {
	type points = []insitu.PorePressure
	for _, c := range []struct {
		name          string
		column        insitu.Column
		depth         float64
		cov, sd, want float64
	}{
		{"no error", insitu.Column{HasWater: true, WaterTable: 2}, 10, 0, 0, 0},
		{"weight of all soil, not of the surcharge", insitu.Column{Surcharge: 50}, 10, 0.05, 0, 0.05 * 160},
		{"weight of all soil, not of the lake", insitu.Column{HasWater: true, WaterTable: -10}, 10, 0.05, 0, 0.05 * 200},
		// Raising the table by 1 m adds γsat − γ to σ and γw to u.
		{"level", insitu.Column{HasWater: true, WaterTable: 2}, 10, 0, 0.5, 0.5 * (10 - (20 - 16))},
		{"both, independent", insitu.Column{HasWater: true, WaterTable: 2}, 10, 0.05, 0.5, math.Hypot(0.05*(32+160), 3)},
		{"level far below matters not", insitu.Column{HasWater: true, WaterTable: 8}, 5, 0, 0.5, 0},
		{"level just below matters", insitu.Column{HasWater: true, WaterTable: 5.2}, 5, 0, 0.5, (0.3*10 - 0.3*4) / 2},
		{"lake level matters not", insitu.Column{HasWater: true, WaterTable: -2}, 5, 0, 1, 0},
		{"lake that may fall into the ground does", insitu.Column{HasWater: true, WaterTable: -0.5}, 5, 0, 1, 0.5 * (10 - 4) / 2},
		{"heads of measured points share the error", insitu.Column{Measured: points{{10, 60}}}, 10, 0, 0.5, 0.5 * (10 - 4)},
		{"dry ground below perched water stays dry", insitu.Column{Measured: points{{1, 0}, {2, 9}, {3, 0}, {20, 0}}}, 10, 0, 0, 0},
		{"suction stays as measured", insitu.Column{Measured: points{{2, -10}, {18, -2}}}, 2, 0, 0.5, 0},
		// Raised: 5 + 2·20 − 55; lowered, with the table half way at 1.5 m: 1.5·16 + 0.5·20 − 25.
		{"a table stops before artesian pressure", insitu.Column{HasWater: true, WaterTable: 1, Measured: points{{2, 40}}}, 2, 0, 1.5, ((34.0 - 25) - (45 - 55)) / 2},
	} {
		c.column.Layers, c.column.WaterUnitWeight = []insitu.Layer{layer(0, 20, 16, 20)}, 10
		got, err := mustNew(t, c.column).Uncertainty(c.depth, c.cov, c.sd)
		if err != nil || !near(got, c.want, exact) {
			t.Errorf("%s: SD %g, %v; want %g", c.name, got, err, c.want)
		}
	}
}

func TestUncertaintyErrors(t *testing.T) {
	s := mustNew(t, insitu.Column{Layers: []insitu.Layer{layer(0, 20, 16, 20)}, HasWater: true, WaterUnitWeight: 10})
	for _, c := range []struct {
		name           string
		depth, cov, sd float64
		want           error
	}{
		{"depth", 21, 0.05, 0.3, insitu.ErrOutOfRange},
		{"negative variation", 5, -0.1, 0.3, insitu.ErrOutOfRange},
		{"variation not a number", 5, math.NaN(), 0.3, insitu.ErrOutOfRange},
		{"infinite variation", 5, math.Inf(1), 0.3, insitu.ErrOutOfRange},
		{"negative level", 5, 0.1, -1, insitu.ErrOutOfRange},
		{"level not a number", 5, 0.1, math.NaN(), insitu.ErrOutOfRange},
		{"beyond counting", 5, 1e308, 0, insitu.ErrNotFinite},
		{"flood beyond counting", 5, 0, 1.7e308, insitu.ErrNotFinite},
	} {
		if sd, err := s.Uncertainty(c.depth, c.cov, c.sd); !errors.Is(err, c.want) || sd != 0 {
			t.Errorf("%s: %g, %v; want %v", c.name, sd, err, c.want)
		}
	}
	if _, err := s.Raised(math.NaN()); !errors.Is(err, insitu.ErrNotFinite) {
		t.Errorf("raised by NaN: %v", err)
	}
}

// A raised column is the column with the higher table.
func TestRaisedIsNewWithHigherWater(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		c := drawStill(t)
		depth := drawDepth(t, c)
		s, err := insitu.New(c)
		if err != nil {
			t.Fatal(err)
		}
		rise := rapid.Float64Range(-5, 5).Draw(t, "rise")
		raised, err := s.Raised(rise)
		if err != nil {
			t.Fatal(err)
		}
		got, err := raised.At(depth)
		if err != nil {
			t.Fatal(err)
		}
		c.WaterTable -= rise
		same(t, "raised", got, mustAt2(t, c, depth))
	})
}

func TestSpreadIsFiniteAndNotNegative(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		c := drawAny(t)
		s, err := insitu.New(c)
		if err != nil {
			t.Fatal(err)
		}
		spread, err := s.Spread(rapid.Float64Range(0, 0.3).Draw(t, "V"), rapid.Float64Range(0, 8).Draw(t, "SD"))
		if err != nil {
			t.Fatal(err)
		}
		for _, depth := range s.Breaks() {
			if sd, err := spread.At(depth); err != nil || !(sd >= 0) || math.IsInf(sd, 0) {
				t.Fatalf("at %g m: SD %g, %v", depth, sd, err)
			}
		}
	})
}
