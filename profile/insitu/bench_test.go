package insitu_test

import (
	"testing"

	"pastload/profile/insitu"
)

// hundred is 100 layers of 0.4 m under 20 piezometers.
func hundred() insitu.Column {
	c := insitu.Column{HasWater: true, WaterTable: 1.3, CapillaryRise: 0.5, WaterUnitWeight: water}
	for i := range 100 {
		c.Layers = append(c.Layers, layer(float64(i)*0.4, float64(i+1)*0.4, 16+float64(i%5), 18+float64(i%4)))
	}
	for i := range 20 {
		depth := 2.1 + 1.7*float64(i)
		c.Measured = append(c.Measured, insitu.PorePressure{Depth: depth, Pressure: (depth - 1.3) * water * 1.1})
	}
	return c
}

func BenchmarkThousandDepths(b *testing.B) {
	s := mustNew(b, hundred())
	b.ReportAllocs()
	for b.Loop() {
		for i := range 1000 {
			if _, err := s.At(float64(i) * 0.04); err != nil {
				b.Fatal(err)
			}
		}
	}
}

func BenchmarkNew(b *testing.B) {
	c := hundred()
	b.ReportAllocs()
	for b.Loop() {
		if _, err := insitu.New(c); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkSpreadThousandDepths(b *testing.B) {
	s := mustNew(b, hundred())
	b.ReportAllocs()
	for b.Loop() {
		spread, err := s.Spread(0.05, 0.3)
		if err != nil {
			b.Fatal(err)
		}
		for i := range 1000 {
			if _, err := spread.At(float64(i) * 0.04); err != nil {
				b.Fatal(err)
			}
		}
	}
}

func TestAtDoesNotAllocate(t *testing.T) {
	s := mustNew(t, hundred())
	if n := testing.AllocsPerRun(100, func() {
		if _, err := s.At(17.3); err != nil {
			t.Fatal(err)
		}
	}); n != 0 {
		t.Errorf("%g allocations; want none", n)
	}
}
