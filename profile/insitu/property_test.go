package insitu_test

import (
	"math"
	"slices"
	"testing"

	"pgregory.net/rapid"

	"pastload/profile/insitu"
)

// rounding is what sums of a hundred products near 1,000 kPa may differ by when
// they are taken in another order, kPa.
const rounding = 1e-9

// millimetres draws a depth on a whole millimetre times 2, so that points are
// either the same or further apart than the tolerance of the package.
func millimetres(from, to float64) *rapid.Generator[float64] {
	return rapid.Map(rapid.IntRange(int(from*500), int(to*500)), func(n int) float64 { return float64(n) / 500 })
}

func drawLayers(t *rapid.T) []insitu.Layer {
	var layers []insitu.Layer
	top := 0.0
	for range rapid.IntRange(1, 12).Draw(t, "layers") {
		base := top + millimetres(0.002, 6).Draw(t, "thickness")
		weight := rapid.Float64Range(8, 24).Draw(t, "γ")
		layers = append(layers, layer(top, base, weight, weight+rapid.Float64Range(-1, 4).Draw(t, "γsat−γ")))
		top = base
	}
	return layers
}

// drawStill draws ground with one water table or none.
func drawStill(t *rapid.T) insitu.Column {
	c := insitu.Column{
		Layers: drawLayers(t), WaterUnitWeight: rapid.SampledFrom([]float64{9.8, 9.81, 10, 10.05}).Draw(t, "γw"),
		Surcharge: rapid.SampledFrom([]float64{0, 12.5, 80}).Draw(t, "q"),
	}
	if rapid.Bool().Draw(t, "water") {
		c.HasWater, c.WaterTable = true, millimetres(-10, 40).Draw(t, "table")
		c.CapillaryRise = rapid.SampledFrom([]float64{0, 0, 0.5, 3}).Draw(t, "rise")
	}
	return c
}

// drawAny draws ground with measured points too; they never contradict the table.
func drawAny(t *rapid.T) insitu.Column {
	c := drawStill(t)
	taken := map[float64]bool{0: true, c.WaterTable: c.HasWater}
	for range rapid.IntRange(0, 6).Draw(t, "points") {
		p := insitu.PorePressure{Depth: millimetres(0.002, 50).Draw(t, "z"), Pressure: rapid.SampledFrom([]float64{-40, -3, 0, 0, 5, 60, 200, 400}).Draw(t, "u")}
		if !taken[p.Depth] {
			taken[p.Depth] = true
			c.Measured = append(c.Measured, p)
		}
	}
	if !c.HasWater {
		c.CapillaryRise = 0
	}
	return c
}

func deepest(c insitu.Column) float64 { return c.Layers[len(c.Layers)-1].Base }

func drawDepth(t *rapid.T, c insitu.Column) float64 {
	return rapid.Float64Range(0, deepest(c)).Draw(t, "depth")
}

func same(t *rapid.T, what string, a, b insitu.State) {
	t.Helper()
	if !near(a.Total, b.Total, rounding) || !near(a.Pore, b.Pore, rounding) || !near(a.Effective, b.Effective, rounding) {
		t.Fatalf("%s: %+v and %+v", what, a, b)
	}
}

func TestSplittingALayerChangesNothing(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		c := drawAny(t)
		depth := drawDepth(t, c)
		before := mustAt2(t, c, depth)
		i := rapid.IntRange(0, len(c.Layers)-1).Draw(t, "split")
		l := c.Layers[i]
		middle := l.Top + (l.Base-l.Top)*rapid.Float64Range(0.1, 0.9).Draw(t, "where")
		split := slices.Clone(c.Layers)
		split[i].Base = middle
		l.Top = middle
		c.Layers = slices.Insert(split, i+1, l)
		if l.Base-middle <= 0.0011 || middle-split[i].Top <= 0.0011 {
			t.Skip("thinner than the tolerance where layers meet")
		}
		same(t, "split", before, mustAt2(t, c, depth))
	})
}

func mustAt2(t *rapid.T, c insitu.Column, depth float64) insitu.State {
	t.Helper()
	s, err := insitu.New(c)
	if err != nil {
		t.Fatal(err)
	}
	got, err := s.At(depth)
	if err != nil {
		t.Fatal(err)
	}
	return got
}

func TestOrderChangesNothing(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		c := drawAny(t)
		depth := drawDepth(t, c)
		before := mustAt2(t, c, depth)
		c.Measured = rapid.Permutation(append(slices.Clone(c.Measured), c.Measured...)).Draw(t, "points")
		c.Layers = rapid.Permutation(c.Layers).Draw(t, "layers")
		if after := mustAt2(t, c, depth); after != before {
			t.Fatalf("%+v became %+v", before, after)
		}
	})
}

// The tolerance of 1 mm is a length, so feet are compared on ground whose points
// lie well apart.
func TestUnitsChangeNothing(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		c := drawAny(t)
		depth := drawDepth(t, c)
		metric := mustAt2(t, c, depth)

		const foot, psf = 0.3048, 0.04788025898
		const pcf = psf / foot
		us := insitu.Column{
			Surcharge: c.Surcharge / psf, HasWater: c.HasWater, WaterTable: c.WaterTable / foot,
			CapillaryRise: c.CapillaryRise / foot, WaterUnitWeight: c.WaterUnitWeight / pcf,
		}
		for _, l := range c.Layers {
			us.Layers = append(us.Layers, layer(l.Top/foot, l.Base/foot, l.UnitWeight/pcf, l.SaturatedUnitWeight/pcf))
		}
		for _, p := range c.Measured {
			us.Measured = append(us.Measured, insitu.PorePressure{Depth: p.Depth / foot, Pressure: p.Pressure / psf})
		}
		for _, b := range mustBreaks(t, c) {
			if math.Abs(depth-b) < 1e-9 {
				t.Skip("on a step")
			}
		}
		got := mustAt2(t, us, depth/foot)
		same(t, "feet", metric, insitu.State{Total: got.Total * psf, Pore: got.Pore * psf, Effective: got.Effective * psf})
	})
}

func mustBreaks(t *rapid.T, c insitu.Column) []float64 {
	t.Helper()
	s, err := insitu.New(c)
	if err != nil {
		t.Fatal(err)
	}
	return s.Breaks()
}

func TestBuoyantWeightsGiveTheSameStress(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		c := drawStill(t)
		s, err := insitu.New(c)
		if err != nil {
			t.Fatal(err)
		}
		if !s.Hydrostatic() {
			t.Fatal("one water table is not hydrostatic")
		}
		for _, depth := range append(s.Breaks(), drawDepth(t, c)) {
			got, err := s.At(depth)
			if err != nil {
				t.Fatal(err)
			}
			buoyant, err := s.Buoyant(depth)
			if err != nil {
				t.Fatal(err)
			}
			if !near(got.Effective, buoyant, rounding) {
				t.Fatalf("at %g m: σ − u = %.12g, buoyant %.12g", depth, got.Effective, buoyant)
			}
		}
	})
}

func TestLakeLevelLeavesEffectiveStress(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		c := drawStill(t)
		depth := drawDepth(t, c)
		c.HasWater, c.WaterTable = true, -millimetres(0, 300).Draw(t, "lake")
		before := mustAt2(t, c, depth)
		change := millimetres(0, 300).Draw(t, "rise")
		c.WaterTable -= change
		after := mustAt2(t, c, depth)
		if !near(after.Effective, before.Effective, rounding) || !near(after.Total-before.Total, change*c.WaterUnitWeight, rounding) {
			t.Fatalf("%+v became %+v", before, after)
		}
	})
}

// Total stress never steps, pore pressure only at the top of a fringe; between
// breaks everything is straight.
func TestStressesAreContinuousAndStraight(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		c := drawAny(t)
		s, err := insitu.New(c)
		if err != nil {
			t.Fatal(err)
		}
		breaks := s.Breaks()
		table, _ := s.WaterTable()
		fringe := max(0, table-c.CapillaryRise)
		for i, b := range breaks {
			above, _ := s.JustAbove(b)
			at, _ := s.At(b)
			if !near(above.Total, at.Total, rounding) {
				t.Fatalf("σ steps at %g m: %+v, %+v", b, above, at)
			}
			if !near(b, fringe, rounding) && !near(above.Pore, at.Pore, rounding) {
				t.Fatalf("u steps at %g m: %+v, %+v", b, above, at)
			}
			if i == 0 {
				continue
			}
			top, _ := s.At(breaks[i-1])
			middle, err := s.At((breaks[i-1] + b) / 2)
			if err != nil {
				t.Fatal(err)
			}
			if !near(middle.Total, (top.Total+above.Total)/2, rounding) || !near(middle.Pore, (top.Pore+above.Pore)/2, rounding) {
				t.Fatalf("not straight between %g and %g m", breaks[i-1], b)
			}
			if middle.Total <= top.Total {
				t.Fatalf("σ does not grow between %g and %g m", breaks[i-1], b)
			}
		}
	})
}

// Total stress against a plain sum over slices that knows nothing of pieces:
// each slice between breaks weighs what the rule says at its middle.
func TestTotalStressAgainstPlainSum(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		c := drawAny(t)
		s, err := insitu.New(c)
		if err != nil {
			t.Fatal(err)
		}
		table, ok := s.WaterTable()
		sum := c.Surcharge
		if ok && table < 0 {
			sum -= table * c.WaterUnitWeight
		}
		breaks := s.Breaks()
		for i := 1; i < len(breaks); i++ {
			middle := (breaks[i-1] + breaks[i]) / 2
			at, _ := s.At(middle)
			for _, l := range c.Layers {
				if middle < l.Top || middle >= l.Base {
					continue
				}
				wet := at.Pore > 0 || ok && middle < table && middle > table-c.CapillaryRise
				if wet {
					sum += l.SaturatedUnitWeight * (breaks[i] - breaks[i-1])
				} else {
					sum += l.UnitWeight * (breaks[i] - breaks[i-1])
				}
			}
			got, _ := s.At(breaks[i])
			if !near(got.Total, sum, rounding) {
				t.Fatalf("at %g m: σ %.12g, plain sum %.12g", breaks[i], got.Total, sum)
			}
		}
	})
}

// Every measured point within the column is met.
func TestLineMeetsMeasuredPoints(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		c := drawAny(t)
		s, err := insitu.New(c)
		if err != nil {
			t.Fatal(err)
		}
		table, _ := s.WaterTable()
		for _, p := range c.Measured {
			got, err := s.At(p.Depth)
			if p.Depth > deepest(c) || near(p.Depth, table-c.CapillaryRise, rounding) {
				continue // below the column, or on the step of the fringe
			}
			if err != nil || !near(got.Pore, p.Pressure, rounding) {
				t.Fatalf("%+v: u %g, %v", p, got.Pore, err)
			}
		}
	})
}
