package review

import (
	"errors"
	"strings"
	"testing"

	"pastload/profile"
)

// decided reviews the worked scenario with other decisions.
func decided(t *testing.T, ds ...profile.Decision) (Findings, error) {
	t.Helper()
	s := demoSite(t)
	s.Decisions = ds
	return Review(build(t, s))
}

func onWater() profile.Decision {
	return profile.Decision{Borehole: "BH1", Depth: profile.Known(5.6), Specimen: "BH1-P5", Quantity: "water content", Decision: profile.AdoptValue,
		Value: profile.Known(57.1), Seen: profile.Known(75.1), Reason: "confirmed by the laboratory", By: "E.V.", Date: "2021-12-02"}
}

const waterFinding = "saturation/bh1/5.60/bh1-p5/water-content"

func TestDecisionAnswersItsFinding(t *testing.T) {
	found, err := decided(t, onWater())
	if err != nil {
		t.Fatal(err)
	}
	f := byID(found, waterFinding)
	if f == nil || f.IsOpen() || f.Answered == nil || f.Answered.Reason != "confirmed by the laboratory" {
		t.Fatalf("finding %+v; want it answered and still there", f)
	}
	if n := len(found.Answered()); n != 1 || len(found.Open())+n != len(found) {
		t.Errorf("%d answered, %d open of %d; want one answered and nothing lost", n, len(found.Open()), len(found))
	}
	if w := found.Worst(); w != Error {
		t.Errorf("worst open %q; the slip in PI is still an error", w)
	}
}

func TestDecisionWhoseValueChanged(t *testing.T) {
	for _, tt := range []struct {
		name  string
		seen  profile.Number
		stale bool
	}{
		{"as seen", profile.Known(75.1), false},
		{"other digit", profile.Known(75.6), true},
		{"seen with fewer digits", profile.Number{Value: 75, Known: true, Source: &profile.Cell{Text: "75"}}, false},
		{"seen with as many digits", profile.Number{Value: 75.2, Known: true, Source: &profile.Cell{Text: "75.2"}}, true},
		{"nothing seen", profile.Number{}, false},
	} {
		t.Run(tt.name, func(t *testing.T) {
			d := onWater()
			d.Seen = tt.seen
			found, err := decided(t, d)
			if err != nil {
				t.Fatal(err)
			}
			f := byID(found, waterFinding)
			if f == nil || f.Stale != tt.stale || f.IsOpen() != tt.stale {
				t.Fatalf("finding %+v; want stale %v", f, tt.stale)
			}
			if tt.stale && !strings.Contains(f.Message, "no longer holds") {
				t.Errorf("message %q does not say that the decision is stale", f.Message)
			}
		})
	}
}

// A stale decision on a value that nothing speaks against is a finding itself.
func TestStaleDecisionOnASoundValue(t *testing.T) {
	d := onWater()
	d.Depth, d.Specimen, d.Seen = profile.Known(3.6), "BH1-P3", profile.Known(40)
	found, err := decided(t, d)
	if err != nil {
		t.Fatal(err)
	}
	f := byID(found, "stale-decision/bh1/3.60/bh1-p3/water-content")
	if f == nil || f.Severity != Doubt || !f.IsOpen() || !strings.Contains(f.Message, "59.8") {
		t.Errorf("finding %+v; want a doubt that names today's 59.8", f)
	}
}

func TestDecisionsThatMatchNothing(t *testing.T) {
	for _, tt := range []struct {
		name   string
		change func(*profile.Decision)
		says   string
	}{
		{"depth", func(d *profile.Decision) { d.Depth = profile.Known(5.7) }, "no result or test"},
		{"specimen", func(d *profile.Decision) { d.Specimen = "BH1-P6" }, "no result or test"},
		{"borehole", func(d *profile.Decision) { d.Borehole = "BH9" }, "no result or test"},
		{"quantity not measured", func(d *profile.Decision) { d.Quantity = "undrained strength" }, "has no undrained strength"},
		{"no such quantity", func(d *profile.Decision) { d.Quantity = "colour" }, "not a quantity"},
		{"no such borehole", func(d *profile.Decision) {
			d.Borehole, d.Depth, d.Specimen, d.Quantity = "BH9", profile.Number{}, "", "water table depth"
		}, "no borehole"},
	} {
		t.Run(tt.name, func(t *testing.T) {
			d := onWater()
			d.Source = &profile.Cell{File: "decisions.csv", Line: 7, Column: 5}
			tt.change(&d)
			found, err := decided(t, d)
			var problems DecisionProblems
			if !errors.As(err, &problems) || len(problems) != 1 || !strings.HasPrefix(err.Error(), "decisions.csv:7:5: "+d.Quantity) || !strings.Contains(err.Error(), tt.says) {
				t.Errorf("error %v; want decisions.csv:7:5 and %q", err, tt.says)
			}
			if f := byID(found, waterFinding); f == nil || !f.IsOpen() {
				t.Error("the findings are not complete beside the error")
			}
		})
	}
}

func TestDecisionsOnPlacesAndStrata(t *testing.T) {
	exchange := onWater()
	exchange.Depth, exchange.Specimen, exchange.Quantity, exchange.Decision, exchange.Borehole = profile.Known(4.4), "BH3-P3", "specimen", profile.LeaveOut, "BH3"
	exchange.Value, exchange.Seen = profile.Number{}, profile.Number{}
	stratum := onWater()
	stratum.Borehole, stratum.Depth, stratum.Specimen, stratum.Quantity = "Upper clay", profile.Number{}, "", "OCR"
	level := exchange
	level.Depth, level.Specimen, level.Quantity = profile.Number{}, "", "water table depth"
	found, err := decided(t, exchange, stratum, level)
	if err != nil {
		t.Fatal(err)
	}
	// The finding stands at BH1-P10; the decision names its other place.
	if f := byID(found, "specimen-exchange/bh1/11.00/bh1-p10/specimen"); f == nil || f.IsOpen() {
		t.Errorf("finding %+v; want it answered from its other place", f)
	}
	for _, name := range FurtherQuantities() {
		if isQuantity(name) {
			t.Errorf("%q is a quantity of a result already", name)
		}
	}
}
