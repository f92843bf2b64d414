package oedometer

import (
	"math"
	"testing"
)

// closedForm is the tolerance for results that are exact but for rounding.
const closedForm = 1e-9

// bilinear is a sharp curve: e0 = 1.0 at 10 kPa, Cr = 0.05 up to 100 kPa, Cc = 0.5
// beyond, with so many points per log cycle up to 3,160 kPa.
func bilinear(t testing.TB, perCycle int) Curve {
	t.Helper()
	r := Record{InitialVoidRatio: Known(1), Kind: Incremental24h}
	for i := range 5*perCycle/2 + 1 {
		x := 1 + float64(i)/float64(perCycle)
		e := 1 - 0.05*(x-1)
		if x > 2 {
			e = 0.95 - 0.5*(x-2)
		}
		r.Stages = append(r.Stages, Stage{EffectiveStress: math.Pow(10, x), VoidRatio: Known(e)})
	}
	c, err := Prepare(r)
	if err != nil {
		t.Fatal(err)
	}
	return c
}

func interpret(t testing.TB, c Curve, s Situation) Interpretation {
	t.Helper()
	got, err := Interpret(c, s)
	if err != nil {
		t.Fatal(err)
	}
	return got
}

func (r Interpretation) method(t testing.TB, id string) Method {
	t.Helper()
	for _, m := range r.Methods {
		if m.ID == id {
			return m
		}
	}
	t.Fatalf("no method %q", id)
	return Method{}
}

// The vectors follow from the algebra of each construction on straight lines.
func TestBilinearCurve(t *testing.T) {
	got := interpret(t, bilinear(t, 20), Situation{EffectiveStress: Known(40)})
	const (
		exact = closedForm
		// 1+e enters through its logarithm, which bends both lines a little.
		close = 0.10
	)
	for _, v := range []struct {
		id        string
		want, tol float64
		why       string
	}{
		{"two-line", 100, exact, "both asymptotes are straight"},
		{"slope", 100, exact, "the line of slope Cr through σ′v0 is the curve itself"},
		{"work", 100, exact, "W is linear in σ′ on both parts; the trapezium adds the same share to both"},
		{"pacheco-silva", math.Pow(10, 1.99), exact, "(σ′p/σ′0)^(−r²) with r = 0.1 over one log cycle"},
		{"bilogarithmic", 100, close, "close"},
	} {
		m := got.method(t, v.id)
		if !m.Known || math.Abs(m.Stress/v.want-1) > v.tol {
			t.Errorf("%s: %.6f kPa, want %.6f: %s", v.id, m.Stress, v.want, v.why)
		}
	}
	if cc := got.CompressionIndex.Value; math.Abs(cc-0.5) > closedForm {
		t.Errorf("Cc %.6f, want 0.5", cc)
	}
	if cr := got.RecompressionIndex.Value; math.Abs(cr-0.05) > closedForm {
		t.Errorf("Cr %.6f, want 0.05", cr)
	}
	if q := got.StillSteepening.Value; math.Abs(q-1) > 1e-6 {
		t.Errorf("q %.6f, want 1 on a straight virgin line", q)
	}
	if w := got.Loading; math.Abs(w[len(w)-1].Work-workOfBilinear) > workOfBilinear*0.01 {
		t.Errorf("work %.3f kJ/m³, want %.3f within the trapezium's 1 %%", w[len(w)-1].Work, workOfBilinear)
	}
}

// workOfBilinear is ∫σ′dε of the bilinear curve from 10 to 10^3.5 kPa.
var workOfBilinear = (0.05*90 + 0.5*(math.Pow(10, 3.5)-100)) / math.Ln10 / 2

// Casagrande's spline bends most at a point, so it finds the corner only as the
// points get denser.
func TestCasagrandeSharpens(t *testing.T) {
	for _, v := range []struct {
		perCycle int
		off      float64
	}{{4, 0.15}, {8, 0.05}, {16, 0.02}, {32, 0.015}} {
		got := interpret(t, bilinear(t, v.perCycle), Situation{}).method(t, "casagrande")
		if off := math.Abs(math.Log(got.Stress / 100)); off > v.off {
			t.Errorf("%d points per cycle: %.2f kPa, want 100 within %.1f %%", v.perCycle, got.Stress, 100*v.off)
		}
	}
}

// A dense record is averaged before anything is read from it.
func TestDenseBilinearCurve(t *testing.T) {
	const averaged = 0.005 // the bin that holds the corner rounds it
	got := interpret(t, bilinear(t, 1000), Situation{EffectiveStress: Known(40)})
	for _, id := range []string{"two-line", "slope", "work"} {
		if m := got.method(t, id); math.Abs(m.Stress/100-1) > averaged {
			t.Errorf("%s: %.3f kPa, want 100 within %.1f %%", id, m.Stress, 100*averaged)
		}
	}
	if n := len(got.Loading); n > 90 {
		t.Errorf("%d points kept of 2,501", n)
	}
}

// Casagrande by hand: the smooth ramp e = −(Cr·u + (Cc−Cr)·w·ln(1+exp(u/w))) has
// its scale-free point of largest curvature (k → 0) at u = 0, slope the mean of
// Cr and Cc there, and the bisector half that slope.
func TestCasagrandeFlatBox(t *testing.T) {
	clay := soil{yield: 100, cc: 0.5, cr: 0.05, e0: 1.2, width: 0.08}
	r := Record{InitialVoidRatio: Known(1.2)}
	for i := range 76 {
		s := math.Pow(10, 0.8+float64(i)*0.036)
		r.Stages = append(r.Stages, Stage{EffectiveStress: s, VoidRatio: Known(clay.voidRatio(s))})
	}
	c, err := Prepare(r)
	if err != nil {
		t.Fatal(err)
	}
	in, ok := newInput(firstLoading(c), surroundings{}, virginShare)
	if !ok {
		t.Fatal("no two lines")
	}
	o := in.casagrandeIn(1e-4)
	eo := clay.voidRatio(100)
	m := -(0.5 + 0.05) / 4
	v := in.virgin.line
	want := math.Pow(10, (eo-m*2-v.intercept)/(v.slope-m))
	if math.Abs(o.stress/want-1) > 0.02 { // the curvature is flat about its maximum
		t.Errorf("%.2f kPa, want %.2f", o.stress, want)
	}
	// Taller boxes move the value down.
	if tall := in.casagrandeIn(2.8); tall.stress >= in.casagrandeIn(0.35).stress {
		t.Error("stretching the void-ratio axis did not lower the value")
	}
}
