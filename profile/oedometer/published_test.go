package oedometer

import (
	"errors"
	"math"
	"strings"
	"testing"
)

// TestPublished sets what was printed beside what is read here.
func TestPublished(t *testing.T) {
	type want struct {
		low, high float64 // of the value or the bound, kPa
		bound     Bound
		grade     string
		says      string // in reasons, notes or the error
	}
	wants := map[string]want{
		// The spread of simple constructions: bilinear 108, Casagrande 124, work
		// 119; published 115, one reader's graph.
		"DAS-PSF16K": {108, 124, Exact, GradeB, "load step of factor 2.00"},
		// 57, 62 and 58 by construction; the published 80 is a loose solution.
		"FR-ARGILE-5M": {54, 66, Exact, GradeB, "flattens"},
		// No straight virgin line, the first load alone takes 0.12 of e.
		"DAS-0748": {0, 0, Undetermined, BoundOnly, "first load alone"},
		// Log-slopes 0.432, 0.432, 0.454, 0.480: no yield in the tested range.
		"CN-NC5M": {50, 50, AtMost, BoundOnly, "no clear break"},
		// Casagrande 199–200, work 203, bilinear 150.
		"VENK-7.3": {170, 215, Exact, GradeB, "methods differ"},
		// Bilinear 1035, work 1155, Casagrande 1271; one virgin segment.
		"IT-LIMO-10M": {600, 1035, AtLeast, BoundOnly, "still steepening"},
		// Casagrande about 70, work 79.
		"ID-UP":     {60, 85, Exact, GradeC, "1 load clear of the bend"},
		"FR-TD3":    {63, 146, Exact, GradeC, "104 kPa"},
		"MOD-140G":  {300, 700, AtLeast, BoundOnly, "never becomes straight"},
		"DAS-128G":  {490, 890, Exact, GradeC, "methods differ"}, // bilinear to Casagrande
		"DAS-PFE":   {100, 180, Exact, GradeC, "flattens"},
		"CRAIG-P73": {45, 60, Exact, GradeC, "1 load clear of the bend"}, // break at about 49–52
		// Bilinear 227, work 274, Casagrande 333–352.
		"HK-UNDIST-A":     {227, 352, Exact, GradeB, "2 points clear of the bend"},
		"N-MURTHY-MARINE": {says: "bulk density: 7.30 Mg/m³"},
		"N-MURTHY-RADIUS": {60, 100, Exact, GradeB, "1.019 from dimensions and solids but 0.963"},
		"N-FR-TYPO-1":     {says: "stage 6: void ratio: rises"},
		"N-FR-TYPO-2":     {says: "stage 5: void ratio: rises"},
	}
	for _, c := range Published() {
		t.Run(c.ID, func(t *testing.T) {
			w, ok := wants[c.ID]
			if !ok {
				t.Fatal("nothing is expected of this case")
			}
			if c.Source == "" || c.Mark == "" || c.Expect == "" {
				t.Error("a case needs its source, mark and expectation")
			}
			if (c.Grade == SourceM) != (c.Mark == markMemory) {
				t.Errorf("grade %s with mark %q", c.Grade, c.Mark)
			}
			curve, err := Prepare(c.Record)
			if c.Refused {
				var problems Problems
				if !errors.As(err, &problems) || !strings.Contains(err.Error(), w.says) {
					t.Errorf("error %v, want %q in it", err, w.says)
				}
				return
			}
			if err != nil {
				t.Fatal(err)
			}
			got := interpret(t, curve, c.Situation)
			y := got.Preconsolidation
			t.Logf("source %s: %s %.0f kPa (%.0f–%.0f), grade %s, Cc %.3f; printed %v; %v", c.Grade, y.Bound, y.Best, y.Low, y.High, got.Grade, got.CompressionIndex.Value, c.Published, got.Reasons)
			if y.Bound != w.bound || y.Best < w.low || y.Best > w.high {
				t.Errorf("%s %.1f kPa, want %s %.0f to %.0f", y.Bound, y.Best, w.bound, w.low, w.high)
			}
			if got.Grade != w.grade {
				t.Errorf("grade %s %v, want %s", got.Grade, got.Reasons, w.grade)
			}
			if all := strings.Join(append(got.Reasons, got.Notes...), "\n"); !strings.Contains(all, w.says) {
				t.Errorf("reasons and notes do not say %q:\n%s", w.says, all)
			}
			comparePublished(t, c, curve, got)
			factsOfTheTrade(t, curve, got, 0)
		})
	}
	if len(wants) != len(Published()) {
		t.Errorf("%d expectations for %d cases", len(wants), len(Published()))
	}
}

// comparePublished compares printed void ratios and indices.
func comparePublished(t *testing.T, c Case, curve Curve, got Interpretation) {
	t.Helper()
	// Half the last printed digit, and for two sheets that rounded the height of
	// solids first (0.441 in of 0.4415; 1.52 cm of 1.517) what that does to e.
	digit := map[string]float64{"DAS-0748": 0.0015, "DAS-128G": 0.0045, "VENK-7.3": 0.001, "ID-UP": 0.001, "FR-TD3": 0.001}
	for _, p := range c.Published {
		switch p.Quantity {
		case publishedVoid:
			tolerance := 0.0006
			if d, ok := digit[c.ID]; ok {
				tolerance = d
			}
			found := false
			for _, q := range curve.Points {
				if q.Branch != Unloading && math.Abs(q.EffectiveStress/p.At-1) < 1e-6 {
					found = true
					if math.Abs(q.VoidRatio-p.Value) > tolerance {
						t.Errorf("e %.4f at %.4g kPa, printed %.3f", q.VoidRatio, p.At, p.Value)
					}
				}
			}
			if !found {
				t.Errorf("no point at %.4g kPa", p.At)
			}
		case publishedInitial:
			if math.Abs(curve.InitialVoidRatio-p.Value) > 0.0006 {
				t.Errorf("e0 %.4f, printed %.3f", curve.InitialVoidRatio, p.Value)
			}
		case publishedCc:
			// Readers draw their line through different points; 0.33 of DAS-PFE
			// is of a smoothed curve, and lies between ours of the steepest
			// and of the last points.
			low, high := got.VirginLast.Slope, got.VirginSteepest.Slope
			if p.Value < low-0.01 || p.Value > high+0.01 {
				t.Errorf("Cc %.3f steepest and %.3f last points, printed %.3f", high, low, p.Value)
			}
		}
	}
}

// factsOfTheTrade holds what every sound curve shows (common practice). noise is
// the standard deviation of its void ratios.
func factsOfTheTrade(t testing.TB, c Curve, got Interpretation, noise float64) {
	t.Helper()
	cc := got.CompressionIndex
	if cs := got.SwellingIndex; cs.Known && cc.Known && cs.Value > 0.5*cc.Value {
		t.Errorf("Cs %.3f is not well below Cc %.3f", cs.Value, cc.Value)
	}
	if cr := got.RecompressionIndex; cr.Known && got.Preconsolidation.Bound == Exact && cr.Value > 0.5*cc.Value {
		t.Errorf("Cr %.3f is not well below Cc %.3f", cr.Value, cc.Value)
	}
	if got.Preconsolidation.Bound == Exact {
		first := got.Loading[0]
		for _, p := range got.Loading {
			if p.EffectiveStress < SeatingStress {
				first = p
			}
		}
		next := got.Loading[1]
		start := (first.VoidRatio - next.VoidRatio) / math.Log10(next.EffectiveStress/first.EffectiveStress)
		if start > 0.8*cc.Value {
			t.Errorf("the curve starts at slope %.3f, not flatter than its virgin line %.3f", start, cc.Value)
		}
	}
	for _, lp := range c.loops() {
		if !lp.beyond {
			continue
		}
		peak, back := c.Points[lp.peak], c.Points[lp.reload]
		if math.Abs(back.EffectiveStress/peak.EffectiveStress-1) < reversal && back.VoidRatio > peak.VoidRatio+max(0.001, 5*noise) {
			t.Errorf("back at %.4g kPa e is %.3f, above %.3f of first loading", peak.EffectiveStress, back.VoidRatio, peak.VoidRatio)
		}
	}
}
