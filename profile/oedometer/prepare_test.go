package oedometer

import (
	"errors"
	"math"
	"strings"
	"testing"
)

// A textbook solved sheet (SHW12, 2012): e0 = 0.694 from H0, Gs, mass and area.
func TestHeightOfSolids(t *testing.T) {
	area := 4.91 * inch * inch / 100
	hs := HeightOfSolids(95.2, 2.68, area)
	// The sheet prints 0.441 in; unrounded it is 0.4415.
	if math.Abs(hs/inch-0.4415) > 0.0001 {
		t.Errorf("Hs %.4f in, want 0.4415", hs/inch)
	}
}

func TestVoidRatios(t *testing.T) {
	for _, v := range []struct {
		name   string
		record Record
		e0     float64
		how    string
		e      []float64
	}{
		{"given", Record{Stages: voidRatios("", []float64{0, 25, 50}, []float64{1.1, 1.05, 1.02})},
			1.1, "void ratio at the start of the test", []float64{1.05, 1.02}},
		{"strain in percent", Record{InitialVoidRatio: Known(1), Stages: []Stage{
			{EffectiveStress: 25, Strain: Known(1)}, {EffectiveStress: 50, Strain: Known(2.5)}}},
			1, "given", []float64{0.98, 0.95}},
		{"height with e0", Record{InitialVoidRatio: Known(1), InitialHeight: Known(20), Stages: heights("", []float64{25, 50}, []float64{19.8, 19.5}, 1)},
			1, "given", []float64{0.98, 0.95}},
		{"w and Gs", Record{WaterContent: Known(40), SpecificGravity: Known(2.7), InitialHeight: Known(20), Stages: heights("", []float64{25}, []float64{20 * 2 / 2.08}, 1)},
			1.08, "from w and Gs, taken as saturated", []float64{1.0}},
		{"masses and dimensions", Record{DryMass: Known(135), SpecificGravity: Known(2.7), Area: Known(50), Stages: heights("", []float64{0, 25}, []float64{20, 19}, 1)},
			1, "from dimensions and solids", []float64{0.9}},
		{"height at zero stress is the initial one", Record{InitialVoidRatio: Known(1), Stages: heights("", []float64{0, 25}, []float64{20, 19}, 1)},
			1, "given", []float64{0.9}},
	} {
		t.Run(v.name, func(t *testing.T) {
			c, err := Prepare(v.record)
			if err != nil {
				t.Fatal(err)
			}
			if math.Abs(c.InitialVoidRatio-v.e0) > closedForm || c.InitialVoidRatioHow != v.how {
				t.Errorf("e0 %.4f %q, want %.4f %q", c.InitialVoidRatio, c.InitialVoidRatioHow, v.e0, v.how)
			}
			if len(c.Points) != len(v.e) {
				t.Fatalf("%d points, want %d", len(c.Points), len(v.e))
			}
			for i, p := range c.Points {
				if math.Abs(p.VoidRatio-v.e[i]) > closedForm {
					t.Errorf("point %d: e %.5f, want %.5f", i, p.VoidRatio, v.e[i])
				}
			}
		})
	}
}

// change returns a sound record with one thing spoilt.
func change(f func(*Record)) Record {
	r := Record{InitialVoidRatio: Known(1.2), InitialHeight: Known(20), Stages: voidRatios("",
		[]float64{12.5, 25, 50, 100, 200, 400}, []float64{1.18, 1.17, 1.15, 1.10, 1.00, 0.88})}
	f(&r)
	return r
}

func TestBadRecords(t *testing.T) {
	for _, v := range []struct {
		name   string
		record Record
		wants  []string // all at once
		stages []int
	}{
		{"no stages", Record{InitialVoidRatio: Known(1)}, []string{"stages: none"}, []int{-1}},
		{"NaN stress", change(func(r *Record) { r.Stages[2].EffectiveStress = math.NaN() }), []string{"stage 3: effective stress: NaN"}, []int{2}},
		{"infinite stress", change(func(r *Record) { r.Stages[2].EffectiveStress = math.Inf(1) }), []string{"stage 3: effective stress: +Inf"}, []int{2}},
		{"negative stress", change(func(r *Record) { r.Stages[0].EffectiveStress = -5 }), []string{"stage 1: effective stress: -5"}, []int{0}},
		{"NaN void ratio", change(func(r *Record) { r.Stages[1].VoidRatio = Known(math.NaN()) }), []string{"stage 2: void ratio: NaN"}, []int{1}},
		{"zero void ratio", change(func(r *Record) { r.Stages[1].VoidRatio = Known(0) }), []string{"stage 2: void ratio: 0"}, []int{1}},
		{"zero height", change(func(r *Record) { r.Stages[1] = Stage{EffectiveStress: 25, Height: Known(0)} }), []string{"stage 2: height: 0"}, []int{1}},
		{"zero initial height", change(func(r *Record) { r.InitialHeight = Known(0) }), []string{"initial height: 0"}, []int{-1}},
		{"several at once", change(func(r *Record) {
			r.SpecificGravity = Known(27)
			r.Stages[1].VoidRatio = Known(-1)
			r.Stages[4].EffectiveStress = math.NaN()
		}), []string{"specific gravity: 27", "stage 2: void ratio: -1", "stage 5: effective stress: NaN"}, []int{-1, 1, 4}},
		{"height below the solids", change(func(r *Record) { r.Stages[5] = Stage{EffectiveStress: 400, Height: Known(9)} }),
			[]string{"stage 6: height: gives void ratio -0.010"}, []int{5}},
		{"rises under load", change(func(r *Record) { r.Stages[3].VoidRatio = Known(1.19) }), []string{"stage 4: void ratio: rises from 1.150 to 1.190"}, []int{3}},
		{"sinks on unloading", change(func(r *Record) {
			r.Stages = append(r.Stages, voidRatios("", []float64{200, 100}, []float64{0.885, 0.85})...)
		}), []string{"stage 8: void ratio: falls from 0.885 to 0.850"}, []int{7}},
		{"readings disagree", change(func(r *Record) { r.Stages[2].Strain = Known(10) }), []string{"stage 3: strain: gives void ratio 0.980 where void ratio gives 1.150"}, []int{2}},
		{"height without a reference", Record{InitialVoidRatio: Known(1), Stages: heights("", []float64{10, 20}, []float64{19, 18}, 1)},
			[]string{"stage 1: height: no initial height", "stage 2: height: no initial height"}, []int{0, 1}},
		{"strain without e0", Record{Stages: []Stage{{EffectiveStress: 25, Strain: Known(1)}}}, []string{"initial void ratio: not given"}, []int{-1}},
		{"wet mass below dry", change(func(r *Record) { r.WetMass, r.DryMass = Known(100), Known(120) }), []string{"wet mass: less than the dry mass"}, []int{-1}},
		{"no readings", Record{InitialVoidRatio: Known(1), Stages: []Stage{{EffectiveStress: 10}, {EffectiveStress: 20}}}, []string{"stages: none has both"}, []int{-1}},
	} {
		t.Run(v.name, func(t *testing.T) {
			_, err := Prepare(v.record)
			var problems Problems
			if !errors.As(err, &problems) {
				t.Fatalf("error %v, want Problems", err)
			}
			if len(problems) != len(v.wants) {
				t.Fatalf("%d problems, want %d:\n%v", len(problems), len(v.wants), err)
			}
			for i, w := range v.wants {
				if !strings.Contains(problems[i].String(), w) {
					t.Errorf("%q, want %q in it", problems[i], w)
				}
				if problems[i].Stage != v.stages[i] {
					t.Errorf("%q is at stage index %d, want %d", w, problems[i].Stage, v.stages[i])
				}
				if problems[i].Wanted == "" {
					t.Errorf("%q does not say what is wanted", w)
				}
			}
		})
	}
}

func TestTooFewPoints(t *testing.T) {
	equal := Record{InitialVoidRatio: Known(1)}
	for range 1000 {
		equal.Stages = append(equal.Stages, Stage{EffectiveStress: 100, VoidRatio: Known(0.9)})
	}
	for name, r := range map[string]Record{
		"one point":               {InitialVoidRatio: Known(1), Stages: voidRatios("", []float64{50}, []float64{0.9})},
		"three points":            {InitialVoidRatio: Known(1), Stages: voidRatios("", []float64{50, 100, 200}, []float64{0.9, 0.85, 0.8})},
		"a thousand equal points": equal,
		"falling stresses":        {InitialVoidRatio: Known(1), Stages: voidRatios("", []float64{800, 400, 200, 100, 50}, []float64{0.5, 0.51, 0.52, 0.53, 0.54})},
	} {
		c, err := Prepare(r)
		if err != nil {
			t.Errorf("%s: %v", name, err)
			continue
		}
		if _, err := Interpret(c, Situation{}); !errors.Is(err, ErrTooFewPoints) {
			t.Errorf("%s: error %v, want ErrTooFewPoints", name, err)
		}
	}
}

func TestFindings(t *testing.T) {
	for _, v := range []struct {
		name   string
		record Record
		rule   string
		stage  int
	}{
		{"missing step", change(func(r *Record) { r.Stages[3].VoidRatio = Number{} }), "missing step", 3},
		{"kind contradicts the stresses", change(func(r *Record) { r.Stages[3].Kind = "unload" }), "stage kind", 3},
		{"two ways to e0", change(func(r *Record) { r.WaterContent, r.SpecificGravity = Known(50), Known(2.7) }), "initial void ratio", -1},
		{"swelling when flooded", change(func(r *Record) {
			r.Stages = append([]Stage{{EffectiveStress: 12.5, VoidRatio: Known(1.19)}, {EffectiveStress: 12.5, VoidRatio: Known(1.23), Inundated: true}}, r.Stages[1:]...)
		}), "swelling", 1},
		{"starts above e0", change(func(r *Record) { r.Stages[0].VoidRatio = Known(1.22) }), "swelling", 0},
		{"reload above first loading", change(func(r *Record) {
			r.Stages = append(r.Stages, voidRatios("", []float64{100, 200, 400}, []float64{0.888, 0.887, 0.884})...)
		}), "reload above first loading", 8},
	} {
		t.Run(v.name, func(t *testing.T) {
			c, err := Prepare(v.record)
			if err != nil {
				t.Fatal(err)
			}
			for _, f := range c.Findings {
				if f.Rule == v.rule && f.Stage == v.stage {
					return
				}
			}
			t.Errorf("findings %v, want %q at %d", c.Findings, v.rule, v.stage)
		})
	}
}

// A gauge that is reset, or that drifts, in the middle of a constant-rate record.
func TestDenseRecordRises(t *testing.T) {
	for name, rise := range map[string]func(i int) float64{
		"reset":  func(i int) float64 { return 0.05 * math.Min(1, math.Max(0, float64(i-1000))) },
		"drifts": func(i int) float64 { return 0.002 * math.Max(0, float64(i-1000)) },
	} {
		r := Record{InitialVoidRatio: Known(1.2), Kind: ConstantRate}
		for i := range 1200 {
			s := 10 * math.Pow(10, float64(i)/700)
			r.Stages = append(r.Stages, Stage{EffectiveStress: s, VoidRatio: Known(1.2 - 0.1*math.Log10(s/10) + rise(i))})
		}
		_, err := Prepare(r)
		var problems Problems
		if !errors.As(err, &problems) || problems[0].Stage < 1000 || problems[0].Stage > 1020 || problems[0].Quantity != "void ratio" {
			t.Errorf("%s: %v, want a rise under load near stage 1,001", name, err)
		}
	}
}

// What holds for a run of stages is said once: a dense record has thousands.
func TestFindingsAreNotRepeated(t *testing.T) {
	r := Record{InitialVoidRatio: Known(1)}
	for i := range 1000 {
		s := Stage{EffectiveStress: 10 + float64(i), Kind: "unload"}
		if i < 300 || i > 600 {
			s.VoidRatio = Known(0.95 - 0.0001*float64(i))
		}
		r.Stages = append(r.Stages, s)
	}
	c, err := Prepare(r)
	if err != nil {
		t.Fatal(err)
	}
	if len(c.Findings) != 2 {
		t.Errorf("%d findings, want one missing run and one wrong kind: %v", len(c.Findings), c.Findings)
	}
}

func TestSwellingStrain(t *testing.T) {
	c, err := Prepare(change(func(r *Record) {
		r.Stages = append([]Stage{{EffectiveStress: 12.5, VoidRatio: Known(1.19)}, {EffectiveStress: 12.5, VoidRatio: Known(1.234)}}, r.Stages[1:]...)
	}))
	if err != nil {
		t.Fatal(err)
	}
	if want := 2.0; math.Abs(c.Swelling-want) > closedForm { // 0.044/2.2
		t.Errorf("swelling %.3f %%, want %.1f", c.Swelling, want)
	}
	got := interpret(t, c, Situation{EffectiveStress: Known(50)})
	if got.method(t, "pacheco-silva").Known {
		t.Error("Pacheco Silva was used after swelling")
	}
	for _, q := range got.Quality {
		if q.Applies {
			t.Errorf("%s rates a specimen that swelled", q.Scheme)
		}
	}
}
