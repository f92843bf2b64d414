package oedometer

import (
	"math"
	"testing"
)

// Schmertmann's construction by hand on straight lines: e0 1.0, σ′v0 50 kPa, Cr
// 0.05, σ′p 100 kPa, virgin line e = 0.95 − 0.4(x−2).
func TestFieldCurve(t *testing.T) {
	c := Curve{InitialVoidRatio: 1}
	v := VirginLine{Slope: 0.4, Intercept: 0.95 + 0.8, Known: true}
	s := Situation{EffectiveStress: Known(50)}
	f := c.field(s, Yield{90, 100, 110, Exact}, Index{Value: 0.05, Known: true}, v)
	if !f.Known {
		t.Fatal(f.Reason)
	}
	ep := 1 - 0.05*math.Log10(2)
	x3 := (1.75 - 0.42) / 0.4
	want := (ep - 0.42) / (x3 - 2)
	if math.Abs(f.CompressionIndex-want) > closedForm || math.Abs(f.Ratio-want/0.4) > closedForm {
		t.Errorf("field Cc %.5f ratio %.4f, want %.5f", f.CompressionIndex, f.Ratio, want)
	}
	for i, p := range [][2]float64{{50, 1}, {100, ep}, {math.Pow(10, x3), 0.42}} {
		if math.Abs(f.Stress[i]/p[0]-1) > closedForm || math.Abs(f.VoidRatio[i]-p[1]) > closedForm {
			t.Errorf("point %d (%.3f, %.4f), want (%.3f, %.4f)", i, f.Stress[i], f.VoidRatio[i], p[0], p[1])
		}
	}
	// Normally consolidated ground starts at σ′v0.
	if nc := c.field(Situation{EffectiveStress: Known(120)}, Yield{90, 100, 110, Exact}, Index{Value: 0.05, Known: true}, v); nc.Stress[1] != nc.Stress[0] || nc.VoidRatio[1] != 1 {
		t.Errorf("below σ′v0: %+v", nc)
	}
}

func TestFieldCurveRefused(t *testing.T) {
	c := Curve{InitialVoidRatio: 1}
	v := VirginLine{Slope: 0.4, Intercept: 1.75, Known: true}
	cr := Index{Value: 0.05, Known: true}
	yield := Yield{90, 100, 110, Exact}
	s := Situation{EffectiveStress: Known(50)}
	for name, f := range map[string]Field{
		"no σ′v0":     c.field(Situation{}, yield, cr, v),
		"a bound":     c.field(s, Yield{100, 100, 100, AtLeast}, cr, v),
		"no Cr":       c.field(s, yield, Index{}, v),
		"no virgin":   c.field(s, yield, cr, VirginLine{}),
		"meets early": c.field(s, yield, cr, VirginLine{Slope: 0.4, Intercept: 0.9, Known: true}),
		"meets never": c.field(s, yield, cr, VirginLine{Slope: 0.05, Intercept: 1.75, Known: true}),
	} {
		if f.Known || f.Reason == "" {
			t.Errorf("%s: %+v, want a refusal with its reason", name, f)
		}
	}
}

// Disturbance lowers Cc of the laboratory curve: the field curve is steeper.
func TestFieldCurveIsSteeper(t *testing.T) {
	got := interpret(t, softCurve(t, 1.45), Situation{EffectiveStress: Known(60)})
	if !got.Field.Known || got.Field.Ratio <= 1 {
		t.Errorf("%+v, want a field curve steeper than the laboratory's", got.Field)
	}
}
