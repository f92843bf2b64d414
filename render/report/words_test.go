package report

import (
	"strings"
	"testing"

	"pastload/profile"
)

// told is a borehole with a stratum as the history leaves it.
func told() *profile.BoreholeProfile {
	return &profile.BoreholeProfile{
		Borehole: "BH1",
		Points: []profile.Point{
			{Depth: 3.1, Stratum: "Soft clay", OCR: profile.Around(1.7, 2.1, 2.6)},
			{Depth: 11.4, Stratum: "Soft clay", OCR: profile.Around(1.1, 1.3, 1.5)},
		},
		Zones:  []profile.ZoneInterval{{Top: 3.1, Base: 11.4, Zone: profile.LightlyOverconsolidated, Probability: profile.Known(0.94)}},
		Strata: []profile.StratumProfile{{Stratum: "Soft clay", Top: 3.1, Base: 11.4, Sentence: "Best explained by 2 to 4 m of removed ground"}},
		Tests: []profile.Test{
			{Specimen: "U1", Depth: 4, Stratum: "Soft clay", Used: true, Verdict: profile.Agrees},
			{Specimen: "U2", Depth: 6, Stratum: "Soft clay", Used: false, Why: "left out: disturbed (A.B., 2021-05-06)"},
			{Specimen: "U3", Depth: 8, Stratum: "Soft clay", Used: true, Bound: profile.AtLeast, Verdict: profile.Conflicts},
		},
	}
}

func TestSummarySentence(t *testing.T) {
	got := strings.Join(Summary(told()), "\n")
	want := "Soft clay, 3.1 to 11.4 m: lightly overconsolidated (94 %), OCR falling from 2.1 to 1.3. " +
		"Best explained by 2 to 4 m of removed ground. It rests on 2 tests, 1 of them only a bound. " +
		"Not used: U2 at 6.0 m (left out: disturbed (A.B., 2021-05-06)). In conflict with the rest: U3 at 8.0 m."
	if got != want {
		t.Errorf("got  %s\nwant %s", got, want)
	}
}

func TestSummaryClaimsNothingWithoutEvidence(t *testing.T) {
	b := told()
	for i := range b.Points {
		b.Points[i].OCR = profile.Range{}
	}
	if got := Summary(b); len(got) != 0 {
		t.Errorf("%q of a stratum without a stress history", got)
	}
}

func TestSummaryNamesBothZonesAndTheWidth(t *testing.T) {
	b := told()
	b.Tests = nil
	b.Zones = []profile.ZoneInterval{
		{Top: 3.1, Base: 6, Zone: profile.LightlyOverconsolidated, Probability: profile.Known(0.997)},
		{Top: 6, Base: 11.4, Zone: profile.NormallyConsolidated, OrZone: profile.LightlyOverconsolidated, Probability: profile.Known(0.55)},
	}
	b.Points[1].OCR = profile.Around(0.5, 1.3, 2.6)
	got := strings.Join(Summary(b), "\n")
	for _, want := range []string{
		"lightly overconsolidated (over 99 %) from 3.1 to 6.0 m; normally consolidated or lightly overconsolidated (55 %) from 6.0 to 11.4 m",
		"poorly known (the 5 and 95 % points are up to a factor of 5 apart)",
		"No preconsolidation stress was measured in it.",
	} {
		if !strings.Contains(got, want) {
			t.Errorf("%q lacks %q", got, want)
		}
	}
}

func TestPercentage(t *testing.T) {
	for p, want := range map[float64]string{0: "under 1 %", 0.004: "under 1 %", 0.01: "1 %", 0.5: "50 %", 0.99: "99 %", 0.999: "over 99 %"} {
		if got := Percentage(p); got != want {
			t.Errorf("%g is %q, want %q", p, got, want)
		}
	}
}
