package history

import (
	"fmt"
	"math"
	"testing"
)

// madeUp returns a borehole of one layer with n tests and q stations.
func madeUp(n, q int) Input {
	in := Input{Layers: []Layer{{Name: "clay", Top: 1, Base: 21}}, WaterTable: 1, HasWater: true}
	stress := func(z float64) float64 { return 17 + 8*(z-1) }
	for i := range n {
		z := 2 + 18*float64(i)/float64(max(1, n-1))
		// A scatter that repeats and is no random number.
		e := 0.12 * math.Sin(3.7*float64(i)+1)
		in.Tests = append(in.Tests, Test{ID: i, Depth: z, EffectiveStress: stress(z), Preconsolidation: (stress(z) + 60) * math.Exp(e), LnSD: 0.12})
	}
	for i := range q {
		z := 1 + 20*float64(i)/float64(max(1, q-1))
		in.Stations = append(in.Stations, Station{Depth: z, EffectiveStress: stress(z), LnSD: 0.04})
	}
	return in
}

func BenchmarkInfer(b *testing.B) {
	for _, n := range []int{5, 10, 15, 20, 30, 40} {
		b.Run(fmt.Sprintf("tests=%d", n), func(b *testing.B) {
			in := madeUp(n, 200)
			for b.Loop() {
				if _, err := Infer(in); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
	b.Run("sources=3x30", func(b *testing.B) {
		in := withReadings(madeUp(15, 200), 30)
		for b.Loop() {
			if _, err := Infer(in); err != nil {
				b.Fatal(err)
			}
		}
	})
}

// withReadings adds three sources that follow the tests' line, each off by its own factor.
func withReadings(in Input, q int) Input {
	for s, name := range []string{"cone (qt − σv0)", "cone (u2 − u0)", "vane"} {
		for i := range q {
			z := 1.5 + 19*float64(i)/float64(max(1, q-1))
			effective := 17 + 8*(z-1)
			e := 0.2*float64(s) - 0.1 + 0.1*math.Sin(5.1*float64(i)+float64(s))
			in.Readings = append(in.Readings, Reading{Source: name, Depth: z, EffectiveStress: effective,
				Preconsolidation: (effective + 60) * math.Exp(e), BetweenSD: 0.3, WithinSD: 0.2})
		}
	}
	return in
}
