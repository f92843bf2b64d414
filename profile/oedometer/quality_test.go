package oedometer

import (
	"math"
	"strings"
	"testing"
)

// Classes by the published limits (Lunne et al. 1997; Terzaghi, Peck & Mesri 1996;
// from memory, unverified).
func TestClassify(t *testing.T) {
	for _, v := range []struct {
		value  float64
		limits []float64
		names  []string
		rank   int
		class  string
	}{
		{0.02, lunneLow, lunneClasses, 1, "1 (very good to excellent)"},
		{0.04, lunneLow, lunneClasses, 2, "1 (very good to excellent) or 2 (good to fair)"},
		{0.055, lunneLow, lunneClasses, 2, "2 (good to fair)"},
		{0.065, lunneLow, lunneClasses, 2, "2 (good to fair) or 3 (poor)"},
		{0.1, lunneLow, lunneClasses, 3, "3 (poor)"},
		{0.2, lunneLow, lunneClasses, 4, "4 (very poor)"},
		{0.02, lunneHigh, lunneClasses, 1, "1 (very good to excellent)"},
		{0.04, lunneHigh, lunneClasses, 2, "2 (good to fair)"},
		{0.2, lunneHigh, lunneClasses, 4, "4 (very poor)"},
		{0.5, sqdLimits, sqdClasses, 1, "A"},
		{1.5, sqdLimits, sqdClasses, 2, "B"},
		{3, sqdLimits, sqdClasses, 3, "C"},
		{5, sqdLimits, sqdClasses, 4, "D"},
		{20, sqdLimits, sqdClasses, 5, "E"},
	} {
		if rank, class := classify(v.value, v.limits, v.names); rank != v.rank || class != v.class {
			t.Errorf("%.3f: %d %q, want %d %q", v.value, rank, class, v.rank, v.class)
		}
	}
}

// softCurve is a noise-free soft clay of σ′p 100 kPa.
func softCurve(t *testing.T, e0 float64) Curve {
	t.Helper()
	clay := soil{yield: 100, cc: 0.5, cr: 0.05, e0: 1.4, width: 0.06}
	p := plan{first: 5, ratio: 1.5, last: 1400}
	rec := p.record(clay, nil)
	rec.InitialVoidRatio = Known(e0)
	c, err := Prepare(rec)
	if err != nil {
		t.Fatal(err)
	}
	return c
}

func TestQuality(t *testing.T) {
	c := softCurve(t, 1.45)
	got := interpret(t, c, Situation{EffectiveStress: Known(60)})
	clay := soil{yield: 100, cc: 0.5, cr: 0.05, e0: 1.4, width: 0.06}
	fall := 1.45 - clay.voidRatio(60)
	for _, q := range got.Quality {
		want, unit := fall/1.45, ""
		if q.Scheme == designationScheme {
			want, unit = 100*fall/2.45, "%"
		}
		// Straight between loads, so the curve between them lies a little off.
		if !q.Applies || math.Abs(q.Value/want-1) > 0.05 || q.Unit != unit {
			t.Errorf("%s: %+v, want %.4f %s", q.Scheme, q, want, unit)
		}
		if q.Mark != markMemory {
			t.Errorf("%s: mark %q", q.Scheme, q.Mark)
		}
	}
	// The conversion of the two schemes: Δe/e0 = εv0·(1+e0)/(100·e0).
	if a, b := got.Quality[0].Value, got.Quality[1].Value/100*2.45/1.45; math.Abs(a-b) > closedForm {
		t.Errorf("Δe/e0 %.5f, %.5f from the strain", a, b)
	}
}

func TestQualityDoesNotApply(t *testing.T) {
	c := softCurve(t, 1.45)
	for _, v := range []struct {
		name string
		s    Situation
		says string
	}{
		{"no σ′v0", Situation{}, "not known"},
		{"below the tests", Situation{EffectiveStress: Known(2)}, "outside the tested stresses"},
		{"above the tests", Situation{EffectiveStress: Known(5000)}, "outside the tested stresses"},
		{"not above zero", Situation{EffectiveStress: Known(-3)}, "not known"},
		{"heavily overconsolidated", Situation{EffectiveStress: Known(20)}, "above 4"},
		{"low plasticity", Situation{EffectiveStress: Known(60), PlasticityIndex: Known(5)}, "plasticity index 5"},
		{"organic", Situation{EffectiveStress: Known(60), Organic: true}, "organic"},
		{"reconstituted", Situation{EffectiveStress: Known(60), Reconstituted: true}, "reconstituted"},
	} {
		t.Run(v.name, func(t *testing.T) {
			got := interpret(t, c, v.s)
			for _, q := range got.Quality {
				if q.Applies || q.Rank != 0 || q.Class != "" || !strings.Contains(q.Reason, v.says) {
					t.Errorf("%+v, want a refusal that says %q", q, v.says)
				}
			}
			if got.Grade == GradeA {
				t.Error("grade A without a rated sample")
			}
		})
	}
}

func TestSampleLowersGrade(t *testing.T) {
	s := Situation{EffectiveStress: Known(60)}
	for _, v := range []struct {
		e0    float64
		grade string
	}{
		{1.42, GradeA}, // Δe/e0 about 0.05
		{1.48, GradeB}, // about 0.09: poor
		{1.66, GradeC}, // about 0.20: very poor, and the first load took more than 4 %
	} {
		got := interpret(t, softCurve(t, v.e0), s)
		if got.Grade != v.grade {
			t.Errorf("e0 %.2f: grade %s %v with %+v, want %s", v.e0, got.Grade, got.Reasons, got.Quality[0], v.grade)
		}
	}
}
