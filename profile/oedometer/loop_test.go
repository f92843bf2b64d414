package oedometer

import (
	"math"
	"math/rand"
	"strings"
	"testing"
)

// A test with a loop knows its own past maximum; the reload branch of generated
// curves bends sharply at it.
func TestLoopRecoversPastMaximum(t *testing.T) {
	r := rand.New(rand.NewSource(11))
	var ratios []float64
	for range 100 {
		clay := soft(r, 0.06, 0.12)
		p := ends(clay, 1.5, 12, 16, 0.001)
		p.loopAt, p.loopTo = 2*clay.yield, clay.yield/4
		c, err := Prepare(p.record(clay, r))
		if err != nil {
			t.Fatal(err)
		}
		got := interpret(t, c, Situation{EffectiveStress: Known(clay.yield / 2)})
		if len(got.Loops) != 1 {
			t.Fatalf("%d loops, want 1", len(got.Loops))
		}
		lp := got.Loops[0]
		if lp.Reason != "" {
			continue
		}
		if lp.PastMaximum < 2*clay.yield || math.Abs(lp.Ratio-lp.Recovered.Best/lp.PastMaximum) > closedForm {
			t.Errorf("%+v", lp)
		}
		ratios = append(ratios, lp.Ratio)
	}
	if len(ratios) < 80 {
		t.Errorf("only %d of 100 loops could be read", len(ratios))
	}
	median, low, high := quantile(ratios, 0.5), quantile(ratios, 0.05), quantile(ratios, 0.95)
	t.Logf("recovered over past maximum: median %.3f, 5–95 %% %.3f–%.3f of %d", median, low, high, len(ratios))
	// The reload limb is straight on three loads and bends at the next.
	if math.Abs(median-1) > 0.10 {
		t.Errorf("median %.3f, want 1 within 10 %%", median)
	}
}

func TestLoopNotPassed(t *testing.T) {
	c, err := Prepare(change(func(r *Record) {
		r.Stages = append(r.Stages, voidRatios("", []float64{100, 25, 100, 400}, []float64{0.89, 0.91, 0.90, 0.875})...)
	}))
	if err != nil {
		t.Fatal(err)
	}
	lp := interpret(t, c, Situation{}).Loops
	if len(lp) != 1 || lp[0].Ratio != 0 || lp[0].Reason == "" || lp[0].PastMaximum != 400 {
		t.Errorf("%+v, want one loop with a reason why it tells nothing", lp)
	}
}

func TestRecompressionFromLoop(t *testing.T) {
	c, err := Prepare(Record{InitialVoidRatio: Known(1), Stages: voidRatios("",
		[]float64{10, 30, 100, 10, 100, 300, 1000, 3000, 300}, []float64{0.97, 0.94, 0.90, 0.96, 0.895, 0.70, 0.46, 0.25, 0.30})})
	if err != nil {
		t.Fatal(err)
	}
	got := interpret(t, c, Situation{})
	// Unloading 0.06 and reloading 0.065 over one log cycle.
	if want := 0.0625; math.Abs(got.RecompressionIndex.Value-want) > closedForm {
		t.Errorf("Cr %.5f %q, want %.5f from the loop", got.RecompressionIndex.Value, got.RecompressionIndex.How, want)
	}
	// Both unloadings span one log cycle; the first of the widest.
	if want := 0.06; math.Abs(got.SwellingIndex.Value-want) > 1e-6 {
		t.Errorf("Cs %.5f %q, want %.5f", got.SwellingIndex.Value, got.SwellingIndex.How, want)
	}
	// First loading falls 0.07 over the log cycle: no steeper than the loop.
	for _, n := range got.Notes {
		if strings.Contains(n, "times as steep as the loop") {
			t.Errorf("note %q", n)
		}
	}
	if !got.method(t, "dissipated-energy").Known {
		t.Error("no dissipated energy though there is a loop")
	}
	if math.Abs(got.RecompressionRatio.Value-0.0625/2) > closedForm {
		t.Errorf("RR %.5f", got.RecompressionRatio.Value)
	}
}

func TestDisturbedStart(t *testing.T) {
	clay := soil{yield: 150, cc: 0.5, cr: 0.15, e0: 1.4, width: 0.1}
	stiffLoop := clay
	stiffLoop.cr = 0.03 // the loop is of the undisturbed structure
	p := plan{first: 12.5, ratio: 2, last: 1600}
	stages := p.stages(clay, nil)
	p.loopAt, p.loopTo = 400, 50
	loop := p.stages(stiffLoop, nil)
	// The loop follows its stress of 400 kPa; move it onto the disturbed curve.
	at := 6
	shift := stages[at-1].VoidRatio.Value - loop[at-1].VoidRatio.Value
	var all []Stage
	all = append(all, stages[:at]...)
	for _, s := range loop[at : len(loop)-(len(stages)-at)] {
		s.VoidRatio.Value += shift
		all = append(all, s)
	}
	all = append(all, stages[at:]...)
	c, err := Prepare(Record{InitialVoidRatio: Known(1.4), Stages: all})
	if err != nil {
		t.Fatal(err)
	}
	got := interpret(t, c, Situation{})
	if !strings.Contains(strings.Join(got.Notes, "\n"), "times as steep as the loop") {
		t.Errorf("notes %q with Cr %.3f from %s", got.Notes, got.RecompressionIndex.Value, got.RecompressionIndex.How)
	}
}
