package insitu_test

import (
	"encoding/binary"
	"math"
	"testing"

	"pastload/profile/insitu"
)

// FuzzColumn reads any numbers as ground: New refuses, or every answer is finite
// and σ′ = σ − u.
func FuzzColumn(f *testing.F) {
	seed := func(numbers ...float64) {
		var b []byte
		for _, n := range numbers {
			b = binary.LittleEndian.AppendUint64(b, math.Float64bits(n))
		}
		f.Add(b, uint8(2), true)
	}
	seed(10, 3, 0.5, 9.81, 0, 4, 17, 19, 4, 9, 18, 18, 4, 30, 8, 90)
	seed(0, -3, 0, 10, 0, 5, 9, 9, 5, 5.001, 20, 21, 2, -5)
	seed(0, 2, 0, 9.8, 0, 1e300, 1e300, 1e10, 1e300, math.Inf(1), 1, 1)
	seed(0, 4, 2, 9.81, 0, 5, 16, 20, 5, 12, 15, 15, 3, -5, 6, 0)
	f.Fuzz(func(t *testing.T, data []byte, layers uint8, wet bool) {
		next := func() float64 {
			if len(data) < 8 {
				return 0
			}
			v := math.Float64frombits(binary.LittleEndian.Uint64(data))
			data = data[8:]
			return v
		}
		c := insitu.Column{Surcharge: next(), HasWater: wet, WaterTable: next(), CapillaryRise: next(), WaterUnitWeight: next()}
		for range layers % 8 {
			c.Layers = append(c.Layers, insitu.Layer{Top: next(), Base: next(), UnitWeight: next(), SaturatedUnitWeight: next()})
		}
		for len(data) >= 16 {
			c.Measured = append(c.Measured, insitu.PorePressure{Depth: next(), Pressure: next()})
		}
		s, err := insitu.New(c)
		if err != nil {
			return
		}
		breaks := s.Breaks()
		for i, depth := range breaks {
			if i > 0 {
				if depth <= breaks[i-1] {
					t.Fatalf("breaks out of order: %v", breaks)
				}
				checkState(t, s, breaks[i-1]+(depth-breaks[i-1])/2)
			}
			checkState(t, s, depth)
		}
	})
}

func checkState(t *testing.T, s *insitu.Stress, depth float64) {
	for _, ask := range []func(float64) (insitu.State, error){s.At, s.JustAbove} {
		got, err := ask(depth)
		if err != nil {
			t.Fatal(err)
		}
		for _, v := range []float64{got.Total, got.Pore, got.Effective, got.UnitWeight} {
			if math.IsNaN(v) || math.IsInf(v, 0) {
				t.Fatalf("at %g m: %+v", depth, got)
			}
		}
		if got.Effective != got.Total-got.Pore {
			t.Fatalf("at %g m: %+v is not σ − u", depth, got)
		}
	}
	if s.Hydrostatic() {
		if v, err := s.Buoyant(depth); err != nil || math.IsNaN(v) {
			t.Fatalf("buoyant at %g m: %g, %v", depth, v, err)
		}
	}
	if sd, err := s.Uncertainty(depth, 0.05, 0.3); err == nil && (!(sd >= 0) || math.IsInf(sd, 0)) {
		t.Fatalf("SD at %g m: %g", depth, sd)
	}
}
