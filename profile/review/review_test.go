package review

import (
	"encoding/json"
	"fmt"
	"math"
	"reflect"
	"slices"
	"strings"
	"testing"

	"pastload/profile"
	"pgregory.net/rapid"
)

func TestRulesAreComplete(t *testing.T) {
	seen := map[string]bool{}
	for _, r := range Rules() {
		if seen[r.ID] {
			t.Errorf("two rules %s", r.ID)
		}
		seen[r.ID] = true
		for name, text := range map[string]string{"name": r.Name, "formula": r.Formula, "tolerance": r.Tolerance, "source": r.Source, "mark": r.Mark, "action": r.Action} {
			if strings.TrimSpace(text) == "" {
				t.Errorf("%s has no %s", r.ID, name)
			}
		}
		if len(r.Causes) == 0 || r.Severity.Rank() == 0 {
			t.Errorf("%s has causes %v and severity %q", r.ID, r.Causes, r.Severity)
		}
		if r.ID != slug(r.ID) {
			t.Errorf("identifier %q is no slug", r.ID)
		}
		places := r.ID == "specimen-exchange" || r.ID == "specimen-place" // found by the diagnosis of places
		if r.relation == nil && r.check == nil && !places {
			t.Errorf("%s checks nothing", r.ID)
		}
		if x := r.relation; x != nil && severest(x) != r.Severity && !(r.ID == "recompression-ratio" || x.property > 0) {
			t.Errorf("%s says %s but reaches %s", r.ID, r.Severity, severest(x))
		}
	}
	if len(seen) < 36 {
		t.Errorf("%d rules, want at least 36", len(seen))
	}
}

func severest(x *relation) Severity {
	switch {
	case x.fault > 0:
		return Error
	case x.conflict > 0:
		return Conflict
	case x.doubt > 0:
		return Doubt
	}
	return Note
}

// Relations must hold for the numbers that satisfy them exactly, whatever these are.
func TestConsistentPhasesAreSound(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		gs := rapid.Float64Range(2.6, 2.8).Draw(t, "Gs")
		w := rapid.Float64Range(10, 120).Draw(t, "w")
		e := profile.VoidRatioFromWater(w, gs)
		r := profile.Result{
			WaterContent: profile.Known(w), SpecificGravity: profile.Known(gs), VoidRatio: profile.Known(e),
			UnitWeight: profile.Known(profile.SaturatedUnitWeight(gs, e, 9.81)),
		}
		found, err := Review(bare(lone(r)))
		if err != nil {
			t.Fatal(err)
		}
		for _, f := range found {
			if f.Severity != Note {
				t.Fatalf("w %v, Gs %v: %s %s", w, gs, f.ID, f.Message)
			}
		}
	})
}

// One wrong number is one finding, at that number.
func TestOneCauseOneFinding(t *testing.T) {
	r := profile.Result{
		WaterContent: profile.Known(75), SpecificGravity: profile.Known(2.7), VoidRatio: profile.Known(1.539),
		UnitWeight: profile.Known(16.37), LiquidLimit: profile.Known(62), PlasticLimit: profile.Known(27), PlasticityIndex: profile.Known(35),
	}
	found := mustReview(t, bare(lone(r))).AtLeast(Doubt)
	if len(found) != 1 || found[0].Quantity != "water content" || found[0].Severity != Error {
		t.Fatalf("found %v; want one error on the water content", ids(found))
	}
	f := found[0]
	if f.Suggested == nil || math.Abs(f.Suggested.Value.Value-57) > 0.1 || f.Suggested.Makes < 3 || len(f.Evidence) != f.Suggested.Makes-1 {
		t.Errorf("suggested %+v with evidence %q; want 57 and the other checks", f.Suggested, f.Evidence)
	}
	if !strings.HasPrefix(f.Causes[0], "two digits") {
		t.Errorf("causes %q; want the slip first", f.Causes)
	}
}

// bare wraps a site without computing a history, for checks of single results.
func bare(s *profile.Site) *profile.Profile {
	p := &profile.Profile{Site: s}
	for i := range s.Boreholes {
		b := &s.Boreholes[i]
		bp := profile.BoreholeProfile{Borehole: b.Name}
		for j := range b.Results {
			r := &b.Results[j]
			bp.Results = append(bp.Results, profile.DerivedResult{Depth: r.Depth.Value, Specimen: r.Specimen, Result: r, Effective: profile.Known(60)})
			if r.Preconsolidation.Known {
				bp.Tests = append(bp.Tests, profile.Test{Specimen: r.Specimen, Depth: r.Depth.Value, Result: r, Used: true,
					Laboratory: profile.Single(r.Preconsolidation.Value), Preconsolidation: profile.Single(r.Preconsolidation.Value), Effective: profile.Known(60),
					Expected: profile.Around(60, 80, 105)})
			}
		}
		p.Boreholes = append(p.Boreholes, bp)
	}
	return p
}

func TestFindingsAreOrderedAndStable(t *testing.T) {
	p := build(t, demoSite(t))
	first := mustReview(t, p)
	if again := mustReview(t, p); !reflect.DeepEqual(keys(first), keys(again)) {
		t.Error("two runs differ")
	}
	if !slices.IsSortedFunc(first, func(a, b Finding) int { return b.Severity.Rank() - a.Severity.Rank() }) {
		t.Error("not ordered by severity")
	}
	seen := map[string]bool{}
	for _, f := range first {
		if seen[f.ID] {
			t.Errorf("identifier %s twice", f.ID)
		}
		seen[f.ID] = true
	}
	// The order of boreholes and rows in the tables does not matter.
	s := demoSite(t)
	slices.Reverse(s.Boreholes)
	slices.Reverse(s.Curves)
	turned := mustReview(t, build(t, s))
	a, b := keys(first), keys(turned)
	slices.Sort(a)
	slices.Sort(b)
	if !reflect.DeepEqual(a, b) {
		t.Errorf("other order of boreholes, other findings:\n%v\n%v", a, b)
	}
}

// keys are findings without what depends on the order of boreholes.
func keys(found Findings) []string {
	var out []string
	for _, f := range found {
		if f.Rule != "specimen-exchange" {
			out = append(out, fmt.Sprint(f.ID, f.Severity, f.Found, f.Wanted))
		}
	}
	return out
}

func TestFindingAsJSON(t *testing.T) {
	found := mustReview(t, build(t, demoSite(t)))
	data, err := json.Marshal(found[0])
	if err != nil {
		t.Fatal(err)
	}
	var got map[string]any
	if err := json.Unmarshal(data, &got); err != nil {
		t.Fatal(err)
	}
	for _, key := range []string{"id", "rule", "severity", "borehole", "depth_m", "specimen", "quantity", "found", "wanted", "message", "causes", "action", "source"} {
		if _, ok := got[key]; !ok {
			t.Errorf("no key %q in %s", key, data)
		}
	}
}

// FuzzReview throws any numbers at every check: nothing panics, and no message
// holds what is no number.
func FuzzReview(f *testing.F) {
	f.Add(57.1, 16.2, 2.68, 1.545, 62.0, 27.0, 71.0, 0.5, 0.058, 17.0)
	f.Add(0.0, -1.0, 1e308, 1e-308, -62.0, 0.0, 0.0, -0.5, 1e9, 0.0)
	f.Add(math.NaN(), math.Inf(1), math.Inf(-1), 0.0, 1e-9, 1e300, -1e300, math.NaN(), 0.0, 1.0)
	f.Fuzz(func(t *testing.T, w, gamma, gs, e, ll, pl, yield, cc, cr, su float64) {
		k := profile.Known
		r := profile.Result{WaterContent: k(w), UnitWeight: k(gamma), SpecificGravity: k(gs), VoidRatio: k(e), LiquidLimit: k(ll), PlasticLimit: k(pl), PlasticityIndex: k(ll - pl),
			Preconsolidation: k(yield), CompressionIndex: k(cc), RecompressionIndex: k(cr), UndrainedStrength: k(su), StrengthTest: "field vane", PreconsolidationLow: k(su), LiquidityIndex: k(cc), EffectiveStress: k(gamma)}
		s := lone(r)
		b := &s.Boreholes[0]
		b.WaterTableDepth = k(su)
		b.Water = []profile.PorePressure{{Depth: k(w), Pressure: k(yield)}}
		b.Strata[0].SaturatedUnitWeight = k(gamma)
		for i := range 4 {
			o := r
			o.Depth, o.Specimen = k(float64(i)), fmt.Sprint("S", i+2)
			o.WaterContent, o.LiquidLimit, o.VoidRatio = k(50+w/1e3), k(60+float64(i)), k(e+float64(i)/100)
			b.Results = append(b.Results, o)
		}
		for _, f := range mustReview(t, bare(s)) {
			text := fmt.Sprint(f.Found, f.Wanted, f.Message, f.Evidence, f.Causes, f.Action, f.ID)
			if strings.Contains(text, "NaN") || strings.Contains(text, "Inf") {
				t.Errorf("%s: %s", f.ID, text)
			}
			if math.IsNaN(f.Impact) || math.IsInf(f.Impact, 0) {
				t.Errorf("%s: impact %v", f.ID, f.Impact)
			}
			if _, err := json.Marshal(f); err != nil {
				t.Errorf("%s: %v", f.ID, err)
			}
		}
	})
}
