package design

import (
	"errors"
	"fmt"
	"math"
	"testing"

	"pgregory.net/rapid"
)

// rounding is the relative tolerance of a result that two orders of the same
// arithmetic give: a few hundred roundings of double precision.
const rounding = 1e-9

func alike(a, b float64) bool {
	return a == b || math.Abs(a-b) <= rounding*math.Max(math.Abs(a), math.Abs(b))
}

// samples draws positive samples with weights, in up to three boreholes.
func samples(least, most int) *rapid.Generator[Sample] {
	return rapid.Custom(func(t *rapid.T) Sample {
		n := rapid.IntRange(least, most).Draw(t, "n")
		s := make(Sample, n)
		for i := range s {
			s[i] = Observation{
				Borehole: fmt.Sprintf("BH%d", rapid.IntRange(1, 3).Draw(t, "borehole")),
				Depth:    float64(rapid.IntRange(0, 400).Draw(t, "depth")) / 10,
				Value:    rapid.Float64Range(1, 500).Draw(t, "value"),
				Weight:   rapid.SampledFrom([]float64{0, 1, 0.6, 0.3}).Draw(t, "weight"),
				Label:    fmt.Sprintf("S%d", i),
			}
		}
		return s
	})
}

func mapped(s Sample, f func(float64) float64) Sample {
	c := append(Sample(nil), s...)
	for i := range c {
		c[i].Value = f(c[i].Value)
	}
	return c
}

// TestScaling: a change of unit changes every cautious value by the same factor.
func TestScaling(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := samples(4, 20).Draw(t, "sample")
		k := rapid.SampledFrom([]float64{0.001, 0.0209, 2, 47.88}).Draw(t, "factor")
		d := rapid.SampledFrom([]Distribution{Normal, LogNormal}).Draw(t, "distribution")
		bigger := mapped(s, func(v float64) float64 { return k * v })
		a := Assumptions{Distribution: d, COV: 0.25, IndicatedCOV: 0.4}
		for _, w := range Ways {
			x, errX := w.Of(s, a)
			y, errY := w.Of(bigger, a)
			if errX != nil || errY != nil {
				t.Fatalf("%s: %v, %v", w.ID, errX, errY)
			}
			// A low value near zero is a difference of large ones.
			size := rounding * math.Max(math.Abs(x.High), math.Abs(x.Low)) * k
			if math.Abs(x.Low*k-y.Low) > size || math.Abs(x.High*k-y.High) > size {
				t.Errorf("%s, %s: %v times %g is not %v", w.ID, d, x, k, y)
			}
		}
	})
}

// TestShifting: a normal quantity measured from another zero has its cautious
// values, found from the sample, shifted with it; a line keeps its slope.
func TestShifting(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := samples(4, 20).Draw(t, "sample")
		by := rapid.Float64Range(-300, 300).Draw(t, "shift")
		moved := mapped(s, func(v float64) float64 { return v + by })
		const absolute = 1e-9 * 1000 // values of up to 800
		for _, id := range []string{WayMeanUnknown, WayFractileUnknown, "percentile", "schneider", WayMeanLessSD} {
			x, _ := WayByID(id).Of(s, Assumptions{})
			y, err := WayByID(id).Of(moved, Assumptions{})
			if err != nil || math.Abs(x.Low+by-y.Low) > absolute || math.Abs(x.High+by-y.High) > absolute {
				t.Errorf("%s: %v shifted by %g is not %v (%v)", id, x, by, y, err)
			}
		}
		a, errA := FitLine(s, Normal)
		b, errB := FitLine(moved, Normal)
		if (errA == nil) != (errB == nil) || errA == nil && math.Abs(a.Slope-b.Slope) > absolute {
			t.Errorf("slopes %g and %g (%v, %v)", a.Slope, b.Slope, errA, errB)
		}
	})
}

// TestOrderOfRows: it does not matter, to the last bit.
func TestOrderOfRows(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := samples(4, 15).Draw(t, "sample")
		other := rapid.Permutation(s).Draw(t, "permutation")
		a, b := describe(s), describe(Sample(other))
		if a != b {
			t.Errorf("two orders of the same rows give\n%s\n%s", a, b)
		}
	})
}

// describe prints everything that the numeric core makes of a sample.
func describe(s Sample) string {
	text := ""
	add := func(v ...any) { text += fmt.Sprintln(v...) }
	sum, err := Summarize(s)
	add(sum, err)
	for _, w := range Ways {
		i, err := w.Of(s, Assumptions{Distribution: LogNormal, COV: 0.2, IndicatedCOV: 0.3})
		add(w.ID, i, err)
	}
	l, err := FitTrend(s, LogNormal)
	add(l, err)
	rs, err := RobustSD(s)
	add(rs, err)
	a, b, err := TheilSen(s)
	add(a, b, err)
	n, err := EffectiveCount(s, 2.5)
	add(n, err)
	add(Looks(s))
	add(weakZone(s, s, Both, 1.1))
	return text
}

// TestOrderOfCaution: within one way of finding the variance, a fractile is never
// less cautious than a mean, low is never above high, and fewer independent
// values never make a narrower margin.
func TestOrderOfCaution(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := samples(4, 20).Draw(t, "sample")
		a := Assumptions{Distribution: rapid.SampledFrom([]Distribution{Normal, LogNormal}).Draw(t, "distribution"), COV: 0.3}
		fewer := a
		fewer.Count = rapid.Float64Range(1.5, 20).Draw(t, "count")
		for _, pair := range [][2]string{{WayMeanUnknown, WayFractileUnknown}, {WayMeanKnown, WayFractileKnown}} {
			m, _ := WayByID(pair[0]).Of(s, a)
			f, _ := WayByID(pair[1]).Of(s, a)
			c, _ := WayByID(pair[0]).Of(s, fewer)
			slack := rounding * f.High
			if m.Low > m.High || f.Low > m.Low+slack || f.High < m.High-slack {
				t.Errorf("%s %v and %s %v", pair[0], m, pair[1], f)
			}
			if c.Low > m.Low+slack || c.High < m.High-slack {
				t.Errorf("%s: %v counted as %g is narrower: %v", pair[0], m, fewer.Count, c)
			}
		}
	})
}

// TestDuplicate: a value measured twice is worth less than another one, and the
// correlation with depth must see it: at the same depth of the same borehole it
// is worth nothing.
func TestDuplicate(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := samples(2, 12).Draw(t, "sample")
		twice := append(append(Sample(nil), s...), s...)
		a, errA := EffectiveCount(s, 2)
		b, errB := EffectiveCount(twice, 2)
		if errA != nil || errB != nil || !alike(a, b) {
			t.Errorf("every row twice is worth %g and not %g (%v, %v)", b, a, errA, errB)
		}
		if a < 1-rounding || a > float64(len(s))+rounding {
			t.Errorf("%d values are worth %g", len(s), a)
		}
		// A value at the mean narrows the margin and leaves the mean.
		m := moments(s)
		more := append(append(Sample(nil), s...), Observation{Borehole: "BH9", Value: m.Mean})
		if n := moments(more); !alike(n.Mean, m.Mean) || n.SD > m.SD*(1+rounding) {
			t.Errorf("a value at the mean of %v makes it %v", m, n)
		}
	})
}

// TestWeights: weights are relative, and equal ones are as none.
func TestWeights(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := samples(3, 12).Draw(t, "sample")
		k := rapid.SampledFrom([]float64{0.5, 3, 100}).Draw(t, "factor")
		scaled, plain, equal := append(Sample(nil), s...), append(Sample(nil), s...), append(Sample(nil), s...)
		for i := range s {
			scaled[i].Weight = k * s[i].weight()
			plain[i].Weight = 0
			equal[i].Weight = k
		}
		for _, pair := range [][2]Sample{{s, scaled}, {plain, equal}} {
			a, b := moments(pair[0]), moments(pair[1])
			if !alike(a.Mean, b.Mean) || math.Abs(a.SD-b.SD) > rounding*a.Mean || !alike(a.Count, b.Count) {
				t.Errorf("%v and %v", a, b)
			}
		}
		if c := moments(plain).Count; c != float64(len(s)) {
			t.Errorf("%d values without weights count as %v", len(s), c)
		}
	})
}

// TestExactLine: values on a line give that line, whatever the depths.
func TestExactLine(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := samples(4, 15).Draw(t, "sample")
		a, b := rapid.Float64Range(10, 100).Draw(t, "a"), rapid.Float64Range(0.5, 9).Draw(t, "b")
		for i := range s {
			s[i].Value = a + b*s[i].Depth
		}
		l, err := FitLine(s, Normal)
		if errors.Is(err, ErrTooFew) {
			return // all at one depth
		}
		if err != nil || math.Abs(l.Slope-b) > 1e-7 || math.Abs(l.at(0)-a) > 1e-6 || !l.Real() {
			t.Errorf("%+v, %v; want %g + %g z", l, err, a, b)
		}
		if slope, at0, err := TheilSen(s); err != nil || math.Abs(slope-b) > 1e-7 || math.Abs(at0-a) > 1e-6 {
			t.Errorf("Theil–Sen: %g + %g z, %v", at0, slope, err)
		}
		if _, err := l.Band(l.To+0.1, Mean); !errors.Is(err, ErrOutOfRange) {
			t.Errorf("below the tests: %v; want ErrOutOfRange", err)
		}
	})
}

// TestReductionFalls: the longer the average, the less it scatters.
func TestReductionFalls(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		length, scale := rapid.Float64Range(0, 100).Draw(t, "length"), rapid.Float64Range(0.05, 20).Draw(t, "scale")
		a, _ := VarianceReduction(length, scale)
		b, err := VarianceReduction(length*1.1+0.01, scale)
		if err != nil || !(a > 0 && a <= 1 && b < a+rounding) {
			t.Errorf("Γ² is %g over %g m and %g over a tenth more (%v)", a, length, b, err)
		}
	})
}
