package oedometer

import (
	"math/rand"
	"testing"
)

func BenchmarkInterpretIncremental(b *testing.B) {
	r := rand.New(rand.NewSource(1))
	clay := soil{yield: 120, cc: 0.5, cr: 0.06, e0: 1.4, width: 0.08}
	p := plan{first: 6.25, ratio: 2, last: 1600, noise: 0.002, loopAt: 240, loopTo: 30}
	benchmark(b, p.record(clay, r))
}

func BenchmarkInterpretConstantRate(b *testing.B) {
	r := rand.New(rand.NewSource(1))
	clay := soil{yield: 120, cc: 0.5, cr: 0.06, e0: 1.4, width: 0.08}
	p := plan{first: 5, last: 1600, noise: 0.001, readings: 5000}
	benchmark(b, p.record(clay, r))
}

func benchmark(b *testing.B, record Record) {
	for b.Loop() {
		c, err := Prepare(record)
		if err != nil {
			b.Fatal(err)
		}
		if _, err := Interpret(c, Situation{EffectiveStress: Known(60)}); err != nil {
			b.Fatal(err)
		}
	}
}
