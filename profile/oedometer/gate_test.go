package oedometer

import (
	"math"
	"reflect"
	"strings"
	"testing"
)

// smooth interprets a noise-free test on a clay of σ′p 100 kPa.
func smooth(t *testing.T, clay soil, p plan) Interpretation {
	t.Helper()
	c, err := Prepare(p.record(clay, nil))
	if err != nil {
		t.Fatal(err)
	}
	return interpret(t, c, Situation{EffectiveStress: Known(50)})
}

func TestGates(t *testing.T) {
	clay := soil{yield: 100, cc: 0.5, cr: 0.05, e0: 1.4, width: 0.08}
	rounded := clay
	rounded.width = 0.2
	flat, steep, between := clay, clay, clay
	flat.yield, flat.cr = 1e5, 0.04
	steep.cc, steep.cr = 0.5, 0.45
	between.cc, between.cr = 0.2, 0.15
	for _, v := range []struct {
		name  string
		clay  soil
		plan  plan
		bound Bound
		says  string
	}{
		{"taken far enough", clay, plan{first: 12.5, ratio: 2, last: 1600}, Exact, "load step"},
		{"stopped at 2 σ′p", clay, plan{first: 12.5, ratio: 2, last: 200}, AtLeast, "still steepening at its end"},
		{"stopped at 3.6 σ′p in small steps", clay, plan{first: 12.5, ratio: 1.25, last: 360}, AtLeast, "the test ended at"},
		{"steepens to the end", rounded, plan{first: 12.5, ratio: 2, last: 400}, AtLeast, "never becomes straight"},
		{"never reached yield", flat, plan{first: 12.5, ratio: 2, last: 800}, AtLeast, "flat throughout"},
		{"steep from the start", steep, plan{first: 12.5, ratio: 2, last: 1600}, AtMost, "steep throughout"},
		{"straight and neither", between, plan{first: 12.5, ratio: 2, last: 1600}, Undetermined, "does not tell"},
	} {
		t.Run(v.name, func(t *testing.T) {
			got := smooth(t, v.clay, v.plan)
			y := got.Preconsolidation
			if y.Bound != v.bound {
				t.Errorf("%s %.1f kPa %v, want %q", y.Bound, y.Best, got.Reasons, v.bound)
			}
			if (got.Grade == BoundOnly) != (v.bound != Exact) {
				t.Errorf("grade %s for %q", got.Grade, y.Bound)
			}
			if !strings.Contains(strings.Join(got.Reasons, "\n"), v.says) {
				t.Errorf("reasons %v, want %q", got.Reasons, v.says)
			}
			switch v.bound {
			case AtLeast:
				if y.Best > 1.05*v.clay.yield || y.Low != y.Best || y.High != y.Best {
					t.Errorf("at least %+v, truth %.0f", y, v.clay.yield)
				}
				if got.Field.Known {
					t.Error("a field curve from a bound")
				}
			case Undetermined:
				if y.Best != 0 {
					t.Errorf("%+v where nothing can be told", y)
				}
			}
		})
	}
}

// The constructions agree on a test that stopped early, and the gate shuts all
// the same.
func TestAgreementOpensNoGate(t *testing.T) {
	got := smooth(t, soil{yield: 100, cc: 0.5, cr: 0.05, e0: 1.4, width: 0.12}, plan{first: 6.25, ratio: 2, last: 200})
	if got.Spread == 0 || got.Spread > 1.3 {
		t.Errorf("spread %.2f, want the methods to agree here", got.Spread)
	}
	if got.Grade != BoundOnly {
		t.Errorf("grade %s, want a bound only", got.Grade)
	}
}

func TestMethodGates(t *testing.T) {
	clay := soil{yield: 100, cc: 0.5, cr: 0.05, e0: 1.4, width: 0.06}
	stiff := clay
	stiff.cr = 0.15
	steps := plan{first: 12.5, ratio: 2, last: 1600}
	rate := plan{first: 8, last: 1600, readings: 1500}
	loop := steps
	loop.loopAt, loop.loopTo = 200, 50
	for _, v := range []struct {
		id    string
		clay  soil
		plan  plan
		known bool
		used  bool
		says  string
	}{
		{"pacheco-silva", clay, steps, true, true, ""},
		{"pacheco-silva", stiff, steps, false, false, "Cr/Cc is above 0.2"},
		{"dissipated-energy", clay, steps, false, false, "needs an unload–reload loop"},
		{"dissipated-energy", clay, loop, true, true, ""},
		{"slope", clay, steps, true, true, "no loop"},
		{"slope", clay, loop, true, true, ""},
		{"sallfors", clay, steps, false, false, "constant-rate"},
		{"sallfors", clay, rate, true, false, "not combined"},
		{"modulus", clay, steps, false, false, "load steps too wide"},
		{"modulus", clay, rate, true, false, "not combined"},
	} {
		m := smooth(t, v.clay, v.plan).method(t, v.id)
		if m.Known != v.known || m.Used != v.used || !strings.Contains(m.Note, v.says) {
			t.Errorf("%s: known %v used %v %q, want %v %v %q", v.id, m.Known, m.Used, m.Note, v.known, v.used, v.says)
		}
		if m.Mark == "" {
			t.Errorf("%s: no verification mark", v.id)
		}
	}
}

// Every known construction draws itself: lines of some length that end at the
// stress it gives, in its own plane.
func TestDrawnLines(t *testing.T) {
	clay := soil{yield: 100, cc: 0.5, cr: 0.05, e0: 1.4, width: 0.06}
	loop := plan{first: 12.5, ratio: 2, last: 1600, loopAt: 200, loopTo: 50}
	rate := plan{first: 8, last: 1600, readings: 1500}
	drawn := map[string]bool{}
	for _, p := range []plan{loop, rate} {
		for _, m := range smooth(t, clay, p).Methods {
			if !m.Known {
				continue
			}
			drawn[m.ID] = true
			finite(t, m.ID, reflect.ValueOf(m))
			if len(m.Lines) == 0 {
				t.Errorf("%s draws nothing", m.ID)
			}
			touches := m.ID == "modulus" // its stress lies between two levels
			for _, l := range m.Lines {
				if l.Name == "" || l.X1 == l.X2 && l.Y1 == l.Y2 {
					t.Errorf("%s: %+v is no line", m.ID, l)
				}
				at := m.Stress
				if l.Plane == SemiLogPlane || l.Plane == LogLogPlane {
					at = math.Log10(at)
				}
				for _, x := range []float64{l.X1, l.X2} {
					touches = touches || math.Abs(x-at) < 1e-6*math.Abs(at)
				}
			}
			if !touches {
				t.Errorf("%s: no line ends at %.2f kPa: %+v", m.ID, m.Stress, m.Lines)
			}
		}
	}
	if len(drawn) != len(constructions) {
		t.Errorf("%d of %d constructions drawn", len(drawn), len(constructions))
	}
}

// The rows of the sign design are balanced and its columns uncorrelated.
func TestSignDesign(t *testing.T) {
	for i := range noiseRuns - 1 {
		sum := 0.0
		for row := range noiseRuns {
			sum += sign(row, i)
		}
		if sum != 0 {
			t.Errorf("column %d sums to %.0f", i, sum)
		}
		for j := range i {
			dot := 0.0
			for row := range noiseRuns {
				dot += sign(row, i) * sign(row, j)
			}
			if dot != 0 {
				t.Errorf("columns %d and %d are correlated", j, i)
			}
		}
	}
}

// A sharper eye on parts: the total is made of what is stated.
func TestUncertaintyParts(t *testing.T) {
	u := smooth(t, soil{yield: 100, cc: 0.5, cr: 0.05, e0: 1.4, width: 0.08}, plan{first: 12.5, ratio: 2, last: 1600}).Uncertainty
	moved := max(u.LeaveOneOut, u.ReadingNoise, u.VirginRule)
	want := math.Sqrt(u.Model*u.Model + u.Shape*u.Shape + u.LoadStep*u.LoadStep + moved*moved + u.Disagreement*u.Disagreement)
	if math.Abs(u.Total-want) > closedForm || u.LoadStep == 0 || u.ReadingNoise == 0 || u.LeaveOneOut == 0 {
		t.Errorf("%+v, want total %.4f and no part missing", u, want)
	}
	// Half the steps, less of the load step.
	fine := smooth(t, soil{yield: 100, cc: 0.5, cr: 0.05, e0: 1.4, width: 0.08}, plan{first: 12.5, ratio: math.Sqrt2, last: 1600}).Uncertainty
	if math.Abs(fine.LoadStep/u.LoadStep-0.5) > 1e-6 {
		t.Errorf("load step %.4f and %.4f, want half", u.LoadStep, fine.LoadStep)
	}
}
