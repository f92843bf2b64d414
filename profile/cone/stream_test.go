package cone

import (
	"math"
	"slices"
	"testing"

	"pgregory.net/rapid"
)

// TestMillionReadingsInBoundedMemory feeds a million readings of 40 m of clay,
// 25 microns apart: the cells of 10 mm are all that is kept, and a reading more
// costs no memory at all.
func TestMillionReadingsInBoundedMemory(t *testing.T) {
	const n, depth = 1_000_000, 40.0
	r := NewReducer(known)
	pattern := clay(4000, 0.01)
	for i := range n {
		x := pattern[i*len(pattern)/n]
		x.Depth = depth * float64(i+1) / n
		r.Add(x)
	}
	if len(r.pages) > depth+1 || r.filled > depth*perMetre+1 {
		t.Errorf("%d pages, %d cells", len(r.pages), r.filled)
	}
	x := pattern[100]
	if allocations := testing.AllocsPerRun(1000, func() { r.Add(x) }); allocations != 0 {
		t.Errorf("%v allocations for a reading", allocations)
	}
	s, err := r.Result(ground)
	if err != nil {
		t.Fatal(err)
	}
	if len(s.Layers) < 79 || len(s.Points) > depth*perMetre+1 {
		t.Errorf("%d layers, %d points", len(s.Layers), len(s.Points))
	}
	checkFinite(t, s)
}

// TestMedian holds the selection to sorting.
func TestMedian(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := rapid.SliceOfN(rapid.Float64Range(-5, 5), 1, 300).Draw(t, "x")
		if rapid.Bool().Draw(t, "with ties") {
			for i := range x {
				x[i] = math.Round(x[i])
			}
		}
		sorted := slices.Sorted(slices.Values(x))
		want := (sorted[(len(x)-1)/2] + sorted[len(x)/2]) / 2
		if got := median(x); got != want {
			t.Fatalf("%v, want %v", got, want)
		}
	})
	if median(nil) != 0 || robustSD(nil) != 0 {
		t.Error("something from nothing")
	}
}

// TestResultLeavesTheReducer takes the result twice.
func TestResultLeavesTheReducer(t *testing.T) {
	r := NewReducer(known)
	for _, x := range clay(500, 0.02) {
		r.Add(x)
	}
	one, err1 := r.Result(ground)
	two, err2 := r.Result(ground)
	if err1 != nil || err2 != nil {
		t.Fatal(err1, err2)
	}
	same(t, two, one)
}

// TestProperties: twice the net resistance is twice σ′p; a stratum split in two
// at a window's end gives the same layers; any readings give finite layers.
func TestProperties(t *testing.T) {
	const rounding = 1e-9
	rapid.Check(t, func(t *rapid.T) {
		readings := clay(rapid.IntRange(100, 400).Draw(t, "readings"), rapid.SampledFrom([]float64{0.01, 0.02, 0.05}).Draw(t, "spacing"))
		factor := rapid.Float64Range(0.5, 3).Draw(t, "factor")
		scaled := make([]Reading, len(readings))
		for i, x := range readings {
			s, _ := ground(x.Depth)
			x.CorrectedResistance = Of(x.ConeResistance.Value + 0.2*x.PorePressure.Value/1000)
			readings[i] = x
			x.CorrectedResistance = Of((factor*(1000*x.CorrectedResistance.Value-s.Total) + s.Total) / 1000)
			x.SleeveFriction.Value *= factor
			scaled[i] = x
		}
		one, err1 := Evaluate(readings, ground, known)
		two, err2 := Evaluate(scaled, ground, known)
		if err1 != nil || err2 != nil || len(one.Layers) != len(two.Layers) {
			t.Fatalf("%d layers and %d: %v %v", len(one.Layers), len(two.Layers), err1, err2)
		}
		for i := range one.Layers {
			if math.Abs(two.Layers[i].Yield[0].Value/one.Layers[i].Yield[0].Value/factor-1) > rounding {
				t.Fatalf("layer %d: %v and %v", i, one.Layers[i].Yield[0], two.Layers[i].Yield[0])
			}
		}
	})
}

func BenchmarkEvaluate2000(b *testing.B) {
	readings := clay(2000, 0.02)
	b.ReportAllocs()
	for b.Loop() {
		if _, err := Evaluate(readings, ground, known); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkMillionReadings(b *testing.B) {
	pattern := clay(4000, 0.01)
	b.ReportAllocs()
	for b.Loop() {
		r := NewReducer(known)
		for i := range 1_000_000 {
			x := pattern[i/250]
			x.Depth = 40 * float64(i+1) / 1_000_000
			r.Add(x)
		}
		if _, err := r.Result(ground); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkCalibrate(b *testing.B) {
	pairs := []Pair{{Cone: 500, Preconsolidation: 200}, {Cone: 600, Preconsolidation: 240}, {Cone: 700, Preconsolidation: 280}}
	for b.Loop() {
		if _, err := Calibrate(pairs, prior); err != nil {
			b.Fatal(err)
		}
	}
}
