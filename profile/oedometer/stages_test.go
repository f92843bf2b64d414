package oedometer

import (
	"math"
	"testing"
)

func TestStageResults(t *testing.T) {
	r := Record{InitialVoidRatio: Known(1), InitialHeight: Known(20), Stages: voidRatios("",
		[]float64{50, 100, 200, 400, 100}, []float64{0.98, 0.95, 0.88, 0.74, 0.76})}
	r.Stages[1].T50 = Known(10)
	r.Stages[2].T90 = Known(20)
	r.Stages[3].Consolidation = Known(1.5)
	r.Stages[3].T50 = Known(10) // given cv goes first
	r.Stages[3].Secondary = Known(0.01)
	for i := range r.Stages {
		r.Stages[i].Line = 10 + i
	}
	c, err := Prepare(r)
	if err != nil {
		t.Fatal(err)
	}
	got := interpret(t, c, Situation{}).Stages
	if len(got) != 4 {
		t.Fatalf("%d stages, want 4", len(got))
	}
	// 50 to 100 kPa by hand: mv = 0.03/1.98/50.
	mv := 0.03 / 1.98 / 50
	first := got[0]
	if math.Abs(first.Compressibility-1000*mv) > closedForm || math.Abs(first.Modulus.Value-1/mv) > 1e-6 || first.Line != 11 {
		t.Errorf("%+v, want mv %.5f m²/MN", first, 1000*mv)
	}
	// BS 1377-5 writes cv = 0.026·H²/t50 with the mean height in mm, 0.111·H²/t90
	// (from memory, unverified; agrees with 0.197/4 and 0.848/4 of 525,960 min).
	const rounded = 0.02 // of the printed factors
	h1 := 20 * (1 + 0.965) / 2
	if want := 0.026 * h1 * h1 / 10; math.Abs(first.Consolidation.Value/want-1) > rounded {
		t.Errorf("cv %.3f m²/year from t50, want %.3f", first.Consolidation.Value, want)
	}
	h2 := 20 * (1 + 0.915) / 2
	if want := 0.111 * h2 * h2 / 20; math.Abs(got[1].Consolidation.Value/want-1) > rounded {
		t.Errorf("cv %.3f m²/year from t90, want %.3f", got[1].Consolidation.Value, want)
	}
	if got[2].Consolidation.Value != 1.5 || got[2].ConsolidationHow != "as given" || got[2].Secondary.Value != 0.01 {
		t.Errorf("%+v, want cv and Cα as given", got[2])
	}
	// k = cv·mv·γw.
	if want := first.Consolidation.Value / (525960 * 60) * mv * 9.81; math.Abs(first.Permeability.Value/want-1) > closedForm {
		t.Errorf("k %.3g m/s, want %.3g", first.Permeability.Value, want)
	}
	if last := got[3]; last.Branch != Unloading || last.Compressibility <= 0 || last.Consolidation.Known {
		t.Errorf("unloading %+v: mv is positive and there is no cv", last)
	}
}
