package design

import (
	"strings"
	"testing"

	"pastload/profile"
)

// decidedSite is a clay with four tests of which one is far too low and left out.
func decidedSite() *profile.Site {
	s := &profile.Site{Settings: profile.DefaultSettings()}
	b := profile.Borehole{Name: "BH1", WaterTableDepth: profile.Known(0), Strata: []profile.Stratum{{Name: "Clay", Soil: "clay", Top: 0, Base: 12, SaturatedUnitWeight: profile.Known(16.81)}}}
	for _, t := range []struct{ z, p float64 }{{3, 41}, {5, 55}, {7, 30}, {9, 83}} {
		b.Results = append(b.Results, profile.Result{Depth: profile.Known(t.z), Preconsolidation: profile.Known(t.p)})
	}
	s.Boreholes = []profile.Borehole{b}
	s.Decisions = []profile.Decision{{
		Borehole: "BH1", Depth: profile.Known(7), Quantity: "preconsolidation stress", Decision: profile.LeaveOut, Reason: "disturbed", By: "A.B.", Date: "2021-05-06",
	}, {
		Borehole: "BH1", Depth: profile.Known(3), Quantity: "preconsolidation stress", Decision: profile.Keep, Reason: "sound", By: "A.B.", Date: "2021-05-06",
	}}
	return s
}

// TestEffects redoes the means by hand: σ′v0 = 7z, so with the decision σ′p is 41,
// 55, 83 (mean 59.667) and without it 41, 55, 30, 83 (mean 52.25).
func TestEffects(t *testing.T) {
	p, err := profile.Build(decidedSite(), profile.Options{})
	if err != nil {
		t.Fatal(err)
	}
	effects, err := Effects(p)
	if err != nil {
		t.Fatal(err)
	}
	var mean, line bool
	for _, e := range effects {
		if strings.HasPrefix(e.Label, profile.Keep) {
			t.Errorf("a decision to keep has an effect: %+v", e)
		}
		switch {
		case e.What == "mean of preconsolidation stress":
			mean = true
			const half = 0.005 // half the last digit given above
			if e.With.Value-59.667 > half || 59.667-e.With.Value > half || e.Without.Value != 52.25 {
				t.Errorf("mean %g with and %g without, want 59.667 and 52.25", e.With.Value, e.Without.Value)
			}
		case strings.HasPrefix(e.What, "σ′p line of BH1"):
			line = true
			if !(e.Without.Value < e.With.Value) {
				t.Errorf("the low test raises the line: %g with, %g without the decision", e.With.Value, e.Without.Value)
			}
		}
	}
	if !mean || !line {
		t.Errorf("effects %+v tell neither of the mean nor of the line", effects)
	}
	if len(p.Site.Decisions) != 2 {
		t.Error("the site was changed")
	}
}
