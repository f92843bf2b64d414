package review

import (
	"fmt"
	"strings"

	"pastload/profile"
)

// The limits of a test that was not carried far enough are those at which the
// reading of the curve itself gives no more than a bound.
const shortRatio = 2.5

var curveRules = []Rule{
	{
		ID: "carried-far-enough", Name: "test carried far enough beyond yield", Formula: "largest stress/σ′p, and slope of the last doubling of stress over the one before",
		Tolerance: "at least 2.5 times, and the curve no longer steepening (1.5); 4 times is acceptable, 8 good", Source: "geometry of the virgin line: three points beyond 1.5 σ′p", Mark: practice, Severity: Conflict,
		Causes: []string{"the test stopped before its virgin line, so that σ′p and Cc both read low", "the apparatus has no heavier weights", "yield stress far above what was expected"},
		Action: "Use the value as a lower bound; load the next specimen to at least 8 times the expected yield stress.",
		check:  tests(farEnough),
	},
	{
		ID: "disturbance", Name: "sample quality", Formula: "Δe/e0 on loading back to σ′v0", Tolerance: "class 3 is noted, and doubted with OCR below 1.3; class 4 is doubted",
		Source: "Lunne, Berre & Strandvik 1997", Mark: memory, Severity: Doubt,
		Causes: []string{"disturbed in sampling, transport or trimming", "swelling before loading", "σ′v0 too high"},
		Action: "Do not call the ground underconsolidated on it; rely on better specimens beside it.",
		check:  tests(disturbance),
	},
	{
		ID: "stress-range", Name: "present stress within the test", Formula: "first stress ≤ σ′v0/2, and two stresses below σ′v0", Tolerance: "as given; above σ′v0 is doubted",
		Source: "the recompression line needs points of its own", Mark: practice, Severity: Doubt,
		Causes: []string{"the loading programme starts too high", "the depth or the water level is wrong"},
		Action: "Do not rate the sample by its strain to σ′v0, and doubt Cr from first loading.",
		check:  tests(stressRange),
	},
	{
		ID: "load-step", Name: "load step across yield", Formula: "ratio of the stresses on either side of σ′p", Tolerance: "2.1",
		Source: "half the step is the doubt in σ′p", Mark: practice, Severity: Note,
		Causes: []string{"a coarse loading programme", "a missing step"},
		Action: "Halve the step near yield in the next test.",
		check:  tests(loadStep),
	},
	{
		ID: "reload-loop", Name: "recompression index from a loop", Formula: "an unload–reload loop that starts beyond 1.5 σ′p", Tolerance: "present or not",
		Source: "first loading of a disturbed specimen is too steep", Mark: practice, Severity: Note,
		Causes: []string{"no loop in the programme", "the loop starts before yield"},
		Action: "Take Cr as an upper limit.",
		check:  tests(reloadLoop),
	},
	{
		ID: "loop-recovery", Name: "reading of a known past maximum", Formula: "σ′p read from the reload branch over the stress it was unloaded from", Tolerance: "0.75 to 1.35",
		Source: "the past maximum of a loop is known", Mark: project, Severity: Note,
		Causes: []string{"rounded reloading of a disturbed or structured specimen", "too few points on the loop"},
		Action: "Widen the range of σ′p accordingly.",
		check:  tests(loopRecovery),
	},
	{
		ID: "swelling-on-wetting", Name: "swelling when water was added", Formula: "rise in percent of the height", Tolerance: "0.3 % is noted, 1 % doubted",
		Source: "flooded below the swelling pressure", Mark: practice, Severity: Doubt,
		Causes: []string{"water added below the swelling pressure", "suction of a dried specimen", "a dial reset"},
		Action: "Treat σ′p as low and the first slope as high; flood the next specimen at a higher stress.",
		check:  tests(swellingOnWetting),
	},
	{
		ID: "method-spread", Name: "agreement of the constructions", Formula: "largest/smallest σ′p of the constructions used", Tolerance: "1.3 is noted, 1.5 doubted",
		Source: "spread between constructions on published curves", Mark: practice, Severity: Doubt,
		Causes: []string{"rounded curve of a disturbed specimen", "too few points near yield", "two yields, as in structured clay"},
		Action: "Give σ′p as a range.",
		check:  tests(methodSpread),
	},
	{
		ID: "test-record", Name: "record of the test", Formula: "void ratio falls under load and rises on unloading; reloading ends below first loading", Tolerance: "0.003 in void ratio",
		Source: "behaviour of soil in one-dimensional compression", Mark: practice, Severity: Doubt,
		Causes: []string{"reading error", "a dial reset", "stages in another order"},
		Action: "Check the readings of these stages.",
		check:  tests(testRecord),
	},
	{
		ID: "test-kind", Name: "kind of test stated", Formula: "24 h steps, end of primary or constant rate", Tolerance: "stated or not",
		Source: "end of primary gives 1.1 to 1.2, constant rate 1.1 to 1.3 times the σ′p of 24 h steps", Mark: memory, Severity: Note,
		Causes: []string{"left out of the report"},
		Action: "Ask the laboratory; do not compare tests of different kinds.",
		check:  tests(testKind),
	},
	{
		ID: "consolidation-range", Name: "coefficient of consolidation", Formula: "0.05 ≤ cv ≤ 200 m²/year in clay", Tolerance: "as given",
		Source: "usual range in clay and silt", Mark: practice, Severity: Note,
		Causes: []string{"cv in m²/s, cm²/s or mm²/min", "t50 read from the wrong part of the curve"},
		Action: "Recompute it from t50 or t90 and the drainage path.",
		check:  tests(consolidationRange),
	},
}

// tests makes a check of every interpreted curve.
func tests(one func(*row, *Rule) (Finding, bool)) func(*context) []Finding {
	return func(c *context) []Finding {
		rule := c.running
		var out []Finding
		for _, r := range c.rows {
			if r.spec == nil {
				continue
			}
			if f, ok := one(r, rule); ok {
				out = append(out, f)
			}
		}
		return out
	}
}

// ofTest starts a finding on σ′p of a test.
func ofTest(r *row, rule *Rule, s Severity, found, wanted, message string) (Finding, bool) {
	f := r.finding(rule, preconsolidation)
	f.Severity, f.Found, f.Wanted, f.Message = s, found, wanted, message
	if r.curve.Source != nil {
		f.Cells = append(f.Cells, r.curve.Source.String())
	}
	f.Impact = 0
	if s != Note && r.known(preconsolidation) && r.line.known {
		f.Impact = r.impact(preconsolidation, r.line.best)
	}
	return f, true
}

func farEnough(r *row, rule *Rule) (Finding, bool) {
	s := r.spec
	if s.Bound != profile.AtLeast {
		return Finding{}, false
	}
	severity := Note
	found := "at least " + preconsolidation.text(s.Preconsolidation.Low)
	if r.known(preconsolidation) {
		// A value was printed where the curve only bounds one.
		severity, found = Doubt, r.shown(preconsolidation)
		if s.Interpretation.MaxStress < shortRatio*r.v[preconsolidation] {
			severity = Conflict
		}
	}
	message := fmt.Sprintf("The test ended at %s kPa", fixed(s.Interpretation.MaxStress, 0))
	if r.known(preconsolidation) && r.v[preconsolidation] > 0 {
		message += fmt.Sprintf(", %s times the σ′p = %s that was read", fixed(s.Interpretation.MaxStress/r.v[preconsolidation], 1), r.shown(preconsolidation))
	}
	if q := s.Interpretation.StillSteepening; q.Known && q.Value > 1.5 {
		message += fmt.Sprintf("; its last doubling of stress is %s times as steep as the one before, so the virgin line was not reached", fixed(q.Value, 1))
	}
	message += ". σ′p and Cc read low on such a test: use it as a lower bound."
	wanted := "σ′p ≥ " + preconsolidation.text(s.Preconsolidation.Low)
	if r.known(preconsolidation) {
		wanted = "σ′p ≥ " + r.shown(preconsolidation) + ", as a bound"
	}
	return ofTest(r, rule, severity, found, wanted, message)
}

func disturbance(r *row, rule *Rule) (Finding, bool) {
	q := r.spec.Quality
	if q == nil {
		return Finding{}, false
	}
	rank := 0
	for i := range r.spec.Interpretation.Quality {
		if x := &r.spec.Interpretation.Quality[i]; x.Scheme == q.Scheme {
			rank = x.Rank
		}
	}
	ocr := 0.0
	if r.known(preconsolidation) && r.effective.Value > 0 {
		ocr = r.v[preconsolidation] / r.effective.Value
	}
	severity := Note
	switch {
	case rank < 3:
		return Finding{}, false
	case rank >= 4, ocr > 0 && ocr < 1:
		severity = Doubt
	}
	message := fmt.Sprintf("%s = %s: sample quality %s. σ′p reads low on such a specimen.", q.Scheme, fixed(q.Value.Value, 3), q.Class)
	return ofTest(r, rule, severity, q.Class, "class 1 or 2", message)
}

// leastFirst is a first load in kPa that no programme can be blamed for: near the
// surface σ′v0 itself is that small.
const leastFirst = 25.0

func stressRange(r *row, rule *Rule) (Finding, bool) {
	first, ok := firstStress(r.curve)
	if !ok || !r.effective.Known || r.effective.Value <= 5 {
		return Finding{}, false
	}
	sv := r.effective.Value
	switch {
	case first > sv && first > leastFirst:
		return ofTest(r, rule, Doubt, fixed(first, 0)+" kPa", "at most "+fixed(sv/2, 0)+" kPa",
			fmt.Sprintf("The first load is %s kPa, above the present stress of %s kPa: the recompression line and the sample quality cannot be told.", fixed(first, 0), fixed(sv, 0)))
	case first > 0.5*sv && first > leastFirst:
		return ofTest(r, rule, Note, fixed(first, 0)+" kPa", "at most "+fixed(sv/2, 0)+" kPa",
			fmt.Sprintf("The first load is %s kPa at a present stress of %s kPa: fewer than two loads lie clear below it.", fixed(first, 0), fixed(sv, 0)))
	}
	return Finding{}, false
}

// firstStress returns the first stress above zero.
func firstStress(c *profile.Curve) (float64, bool) {
	for i := range c.Stages {
		if s := c.Stages[i].EffectiveStress; s.Known && s.Value > 0 {
			return s.Value, true
		}
	}
	return 0, false
}

func loadStep(r *row, rule *Rule) (Finding, bool) {
	low, high := r.spec.Interpretation.BracketLow, r.spec.Interpretation.BracketHigh
	if low <= 0 || high/low <= 2.1 {
		return Finding{}, false
	}
	return ofTest(r, rule, Note, fixed(high/low, 1), "at most 2",
		fmt.Sprintf("The load steps from %s to %s kPa across σ′p, a factor of %s: σ′p is no better known than that.", fixed(low, 0), fixed(high, 0), fixed(high/low, 1)))
}

func reloadLoop(r *row, rule *Rule) (Finding, bool) {
	if !r.known(recompressionIndex) || r.known(curveRecompression) {
		return Finding{}, false
	}
	f := r.finding(rule, recompressionIndex)
	f.Severity, f.Found, f.Wanted = Note, r.shown(recompressionIndex), "Cr from an unload–reload loop"
	f.Message = fmt.Sprintf("Cr = %s is given, but the test has no unload–reload loop to read it from.", r.shown(recompressionIndex))
	return f, true
}

func loopRecovery(r *row, rule *Rule) (Finding, bool) {
	x := r.spec.LoopRatio
	if !x.Known || x.Value <= 0 || x.Value >= 0.75 && x.Value <= 1.35 {
		return Finding{}, false
	}
	return ofTest(r, rule, Note, fixed(x.Value, 2), "0.75 to 1.35",
		fmt.Sprintf("The same constructions on the reload branch give %s of the stress that the specimen is known to have carried.", fixed(x.Value, 2)))
}

func swellingOnWetting(r *row, rule *Rule) (Finding, bool) {
	x := r.spec.Prepared.Swelling
	if !(x > 0.3) {
		return Finding{}, false
	}
	severity := Note
	if x > 1 {
		severity = Doubt
	}
	return ofTest(r, rule, severity, fixed(x, 1)+" %", "at most 0.3 %", fmt.Sprintf("The specimen swelled by %s %% before it was loaded: σ′p may read low and the first slope high.", fixed(x, 1)))
}

func methodSpread(r *row, rule *Rule) (Finding, bool) {
	x := r.spec.Interpretation.Spread
	if !(x > 1.3) || r.spec.Bound != profile.Exact {
		return Finding{}, false
	}
	severity := Note
	if x > 1.5 {
		severity = Doubt
	}
	return ofTest(r, rule, severity, fixed(x, 2), "at most 1.3", fmt.Sprintf("The constructions on this curve differ by a factor of %s.", fixed(x, 2)))
}

func testRecord(r *row, rule *Rule) (Finding, bool) {
	var said []string
	severity := Note
	for _, f := range r.spec.Prepared.Findings {
		switch f.Rule {
		case "initial void ratio", "swelling":
			continue // the phase relations and the swelling check speak of these
		case "reload above first loading":
			severity = Doubt
		}
		said = append(said, capital(f.Message)+".")
	}
	if len(said) == 0 {
		return Finding{}, false
	}
	f, ok := ofTest(r, rule, severity, plural(len(said), "reading"), "readings in order", said[0])
	f.Quantity, f.Evidence = "oedometer test", said[1:]
	return f, ok
}

func testKind(r *row, rule *Rule) (Finding, bool) {
	if strings.TrimSpace(r.curve.TestKind) != "" {
		return Finding{}, false
	}
	f, ok := ofTest(r, rule, Note, "not stated", "24 h steps, end of primary or constant rate", "The kind of oedometer test is not stated; the kinds differ in σ′p by 10 to 30 %.")
	f.Quantity = "oedometer test"
	return f, ok
}

func consolidationRange(r *row, rule *Rule) (Finding, bool) {
	for _, s := range r.spec.Interpretation.Stages {
		if x := s.Consolidation; x.Known && (x.Value < 0.05 || x.Value > 200) {
			f, ok := ofTest(r, rule, Note, fixed(x.Value, 3)+" m²/year", "0.05 to 200 m²/year",
				fmt.Sprintf("cv = %s m²/year from %s to %s kPa is outside what clay and silt have.", fixed(x.Value, 3), fixed(s.From, 0), fixed(s.To, 0)))
			f.Quantity = "oedometer test"
			return f, ok
		}
	}
	return Finding{}, false
}
