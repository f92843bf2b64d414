package oedometer

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

// proportional is the tolerance of results that should not change at all: the
// selections are the same and only rounding differs.
const proportional = 1e-7

// anyCurve draws a smooth or noisy curve carried past yield, with stresses far
// above seating so that scaling moves none below it.
func anyCurve(t *rapid.T) (stress, e []float64) {
	clay := soil{
		yield: rapid.Float64Range(60, 250).Draw(t, "yield"),
		cc:    rapid.Float64Range(0.15, 0.9).Draw(t, "cc"),
		e0:    2, width: rapid.Float64Range(0.02, 0.2).Draw(t, "width"),
	}
	clay.cr = clay.cc * rapid.Float64Range(0.03, 0.3).Draw(t, "ratio")
	ratio := rapid.Float64Range(1.41, 2.1).Draw(t, "step") // clear of the limits of the grades
	for s := rapid.Float64Range(6, 30).Draw(t, "first"); s < 10*clay.yield; s *= ratio {
		stress = append(stress, s)
		e = append(e, clay.voidRatio(s)+rapid.Float64Range(-0.002, 0.002).Draw(t, "noise"))
	}
	return stress, e
}

func curveOf(t *rapid.T, stress, e []float64, e0 float64) Curve {
	c, err := Prepare(Record{InitialVoidRatio: Known(e0), Stages: voidRatios("", stress, e)})
	if err != nil {
		t.Skip("noise lifted a point")
	}
	return c
}

func read(t *rapid.T, c Curve, s Situation) Interpretation {
	got, err := Interpret(c, s)
	if err != nil {
		t.Fatal(err)
	}
	return got
}

// Scaling every stress scales every construction, except the two that have a
// prescribed stress scale; so the unit system does not matter.
func TestScalingStress(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		stress, e := anyCurve(t)
		k := rapid.SampledFrom([]float64{1, 1.7, 20.885, 95.76, 98.07, 47.88}).Draw(t, "factor")
		inSitu := stress[1]
		a := read(t, curveOf(t, stress, e, 2.05), Situation{EffectiveStress: Known(inSitu)})
		b := read(t, curveOf(t, times(k, stress...), e, 2.05), Situation{EffectiveStress: Known(k * inSitu)})
		for i, m := range a.Methods {
			if m.ID == "sallfors" {
				continue // 10 kPa is drawn as 1 %
			}
			if n := b.Methods[i]; m.Known != n.Known || math.Abs(n.Stress-k*m.Stress) > proportional*k*m.Stress {
				t.Errorf("%s: %.6f and %.6f kPa, want factor %.4g", m.ID, m.Stress, n.Stress, k)
			}
		}
		p, q := a.Preconsolidation, b.Preconsolidation
		if p.Bound != q.Bound || math.Abs(q.Best-k*p.Best) > proportional*k*p.Best || math.Abs(q.Low-k*p.Low) > proportional*k*p.Low {
			t.Errorf("%+v and %+v, want factor %.4g", p, q, k)
		}
		if a.Grade != b.Grade {
			t.Errorf("grade %s and %s", a.Grade, b.Grade)
		}
	})
}

// Shifting every void ratio, the initial one too, moves no construction but the
// bilogarithmic, in which 1+e stands in a logarithm.
func TestShiftingVoidRatio(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		stress, e := anyCurve(t)
		shift := rapid.Float64Range(-0.05, 1).Draw(t, "shift")
		moved := make([]float64, len(e))
		for i := range e {
			moved[i] = e[i] + shift
		}
		s := Situation{EffectiveStress: Known(stress[1])}
		a := read(t, curveOf(t, stress, e, 2.05), s)
		b := read(t, curveOf(t, stress, moved, 2.05+shift), s)
		for i, m := range a.Methods {
			if m.ID == "bilogarithmic" || m.ID == "sallfors" {
				continue
			}
			if n := b.Methods[i]; m.Known != n.Known || math.Abs(n.Stress-m.Stress) > proportional*m.Stress {
				t.Errorf("%s: %.6f and %.6f kPa after a shift of %.3f", m.ID, m.Stress, n.Stress, shift)
			}
		}
		if math.Abs(a.CompressionIndex.Value-b.CompressionIndex.Value) > proportional {
			t.Errorf("Cc %.6f and %.6f", a.CompressionIndex.Value, b.CompressionIndex.Value)
		}
	})
}

// A point added on a straight part of the virgin line says nothing new.
func TestAddingPointOnStraightPart(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		yield := rapid.Float64Range(60, 250).Draw(t, "yield")
		cc := rapid.Float64Range(0.2, 0.8).Draw(t, "cc")
		cr := cc * rapid.Float64Range(0.05, 0.15).Draw(t, "ratio")
		sharp := func(s float64) float64 {
			return 2 - cr*math.Log10(s/8) - (cc-cr)*math.Max(0, math.Log10(s/yield))
		}
		var stress, e []float64
		for s := 8.0; s < 12*yield; s *= 2 {
			stress, e = append(stress, s), append(e, sharp(s))
		}
		n := len(stress)
		at := stress[n-2] * rapid.Float64Range(1.1, 1.8).Draw(t, "between the last loads")
		more := append(append([]float64{}, stress[:n-1]...), at, stress[n-1])
		eMore := append(append([]float64{}, e[:n-1]...), sharp(at), e[n-1])
		s := Situation{EffectiveStress: Known(16)}
		a := read(t, curveOf(t, stress, e, 2), s)
		b := read(t, curveOf(t, more, eMore, 2), s)
		tolerance := map[string]float64{
			"two-line": proportional,
			// The virgin line may hold a segment up to a tenth flatter, which
			// a further point outweighs a little.
			"slope": 0.02, "pacheco-silva": 0.02,
			"work":          0.08, // the trapezium over a shorter step over-counts less
			"bilogarithmic": 0.10, // slightly bent in this plane, and the window of its line moves
			"casagrande":    0.05, // the spline bends otherwise, at the corner too
		}
		for i, m := range a.Methods {
			if tol, ok := tolerance[m.ID]; ok && m.Known {
				if n := b.Methods[i]; !n.Known || math.Abs(n.Stress/m.Stress-1) > tol {
					t.Errorf("%s: %.4f kPa, %.4f with a point at %.1f", m.ID, m.Stress, n.Stress, at)
				}
			}
		}
		if math.Abs(b.Apparent.Best/a.Apparent.Best-1) > 0.03 {
			t.Errorf("combined %.4f kPa, %.4f with a point at %.1f", a.Apparent.Best, b.Apparent.Best, at)
		}
	})
}

// Low ≤ best ≤ high, and nothing depends on how often it is asked.
func TestRangesAreOrdered(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		stress, e := anyCurve(t)
		c := curveOf(t, stress, e, 2.05)
		s := Situation{EffectiveStress: Known(stress[1])}
		a, b := read(t, c, s), read(t, c, s)
		y := a.Preconsolidation
		if !(y.Low <= y.Best && y.Best <= y.High) {
			t.Errorf("%+v is not ordered", y)
		}
		if y != b.Preconsolidation || a.Uncertainty != b.Uncertainty {
			t.Error("two readings of one curve differ")
		}
		sum := 0.0
		for _, m := range a.Methods {
			sum += m.Weight
		}
		if a.Apparent.Best > 0 && math.Abs(sum-1) > closedForm {
			t.Errorf("weights add to %.6f", sum)
		}
	})
}
