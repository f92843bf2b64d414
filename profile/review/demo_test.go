package review

import (
	"strings"
	"testing"

	"pastload/profile"
	"pastload/profile/intake"
)

// demoSite reads the worked scenario.
func demoSite(t testing.TB) *profile.Site {
	t.Helper()
	site, err := intake.Read("../../testdata/demo", intake.Options{})
	if err != nil {
		t.Fatal(err)
	}
	return site
}

func mustReview(t testing.TB, p *profile.Profile) Findings {
	t.Helper()
	found, err := Review(p)
	if err != nil {
		t.Fatal(err)
	}
	return found
}

// byID returns the finding of an identifier, nil for none.
func byID(found Findings, id string) *Finding {
	for i := range found {
		if found[i].ID == id {
			return &found[i]
		}
	}
	return nil
}

// The faults that were planted in the worked scenario, with the words that they
// have to be found in.
func TestDemoFaults(t *testing.T) {
	found := mustReview(t, build(t, demoSite(t)))
	faults := []struct {
		name, id string
		severity Severity
		wanted   string
		says     []string
	}{
		{"digits of w swapped", "saturation/bh1/5.60/bh1-p5/water-content", Error, "57.1 %", []string{"130 %", "w = 57.1 % in place of 75.1 (two digits exchanged)", "all 5 checks"}},
		{"slip in PI", "plasticity-arithmetic/bh2/4.80/bh2-p4/plasticity-index", Error, "36 %", []string{"64 − 28 = 36 %, not 46"}},
		{"Cr from first loading", "recompression-of-curve/bh1/7.40/bh1-p7/recompression-index", Conflict, "0.06", []string{"Cr = 0.250 where the loop has 0.06"}},
		{"Cc per natural logarithm", "compression-of-curve/bh2/3.20/bh2-p2/compression-index", Conflict, "0.553", []string{"natural", "2.303"}},
		{"specimens exchanged", "specimen-exchange/bh1/11.00/bh1-p10/specimen", Conflict, "BH3-P3", []string{"BH1-P10", "BH3-P3", "look exchanged"}},
		{"depth without its first digit", "specimen-place/bh3/4.60/bh3-c2/depth", Conflict, "14.60 m", []string{"Till", "14.60 m", "order of the table"}},
		{"test stopped early", "carried-far-enough/bh2/10.20/bh2-p8/preconsolidation-stress", Conflict, "≥ 78 kPa", []string{"160 kPa", "lower bound"}},
		{"disturbed specimen", "stress-history/bh3/7.20/bh3-u5/preconsolidation-stress", Conflict, "", []string{"48 kPa", "not ground still consolidating"}},
	}
	for _, f := range faults {
		t.Run(f.name, func(t *testing.T) {
			got := byID(found, f.id)
			if got == nil {
				t.Fatalf("no finding %s among %v", f.id, ids(found.AtLeast(Doubt)))
			}
			if got.Severity != f.severity {
				t.Errorf("severity %s, want %s", got.Severity, f.severity)
			}
			if !strings.Contains(got.Wanted, f.wanted) {
				t.Errorf("wanted %q, want it to hold %q", got.Wanted, f.wanted)
			}
			for _, s := range f.says {
				if !strings.Contains(got.Message, s) {
					t.Errorf("message %q does not hold %q", got.Message, s)
				}
			}
			if len(got.Cells) == 0 || !strings.HasPrefix(got.Cells[0], "results.csv:") && !strings.HasPrefix(got.Cells[0], "oedometer.csv:") {
				t.Errorf("cells %v do not lead back to the tables", got.Cells)
			}
		})
	}
	if worse := found.AtLeast(Conflict); len(worse) != len(faults) {
		t.Errorf("%d findings at conflict or error, want one for each of %d faults: %v", len(worse), len(faults), ids(worse))
	}
	// The laboratory read the till of BH3-C3 as a bound: right to doubt, and kept.
	if f := byID(found, "carried-far-enough/bh3/15.40/bh3-c3/preconsolidation-stress"); f == nil || f.Severity != Doubt || f.IsOpen() {
		t.Errorf("the short test in till is %+v; want a doubt that the decision to keep it answers", f)
	}
	if doubts := len(found.AtLeast(Doubt)) - len(found.AtLeast(Conflict)); doubts != 1 {
		t.Errorf("%d doubts, want the one in till: %v", doubts, ids(found.AtLeast(Doubt)))
	}
	disturbed := byID(found, "stress-history/bh3/7.20/bh3-u5/preconsolidation-stress")
	if disturbed == nil || disturbed.IsOpen() || !strings.Contains(disturbed.Causes[0], "disturbed") {
		t.Errorf("the disturbed specimen is %+v; want it answered, and disturbance first", disturbed)
	}
}

// The scenario without its faults has nothing to say at error or conflict.
func TestDemoWithoutFaultsIsSound(t *testing.T) {
	s := demoSite(t)
	row := func(specimen string) *profile.Result {
		for i := range s.Boreholes {
			for j := range s.Boreholes[i].Results {
				if r := &s.Boreholes[i].Results[j]; r.Specimen == specimen {
					return r
				}
			}
		}
		t.Fatal("no specimen " + specimen)
		return nil
	}
	row("BH1-P5").WaterContent.Value = 57.1
	row("BH2-P4").PlasticityIndex.Value = 36
	row("BH1-P7").RecompressionIndex.Value = 0.057
	row("BH2-P2").CompressionIndex.Value, row("BH2-P2").RecompressionIndex.Value = 0.55, 0.060
	a, b := row("BH1-P10"), row("BH3-P3")
	x, y := *a, *b
	*a, *b = y, x
	a.Depth, a.Specimen, b.Depth, b.Specimen = x.Depth, x.Specimen, y.Depth, y.Specimen
	c, d := curveOf(s, "BH1-P10"), curveOf(s, "BH3-P3")
	c.Borehole, d.Borehole, c.Specimen, d.Specimen, c.Depth, d.Depth = d.Borehole, c.Borehole, d.Specimen, c.Specimen, d.Depth, c.Depth
	row("BH3-C2").Depth.Value = 14.60
	sortResults(s)
	var left []profile.Curve
	for _, c := range s.Curves {
		if c.Specimen != "BH2-P8" && c.Specimen != "BH3-U5" {
			left = append(left, c)
		}
	}
	s.Curves = left
	row("BH2-P8").Preconsolidation.Value, row("BH2-P8").PreconsolidationHigh.Value, row("BH2-P8").CompressionIndex.Value = 95, 104, 0.39
	u := row("BH3-U5")
	u.Preconsolidation.Value, u.PreconsolidationLow.Value, u.PreconsolidationHigh.Value, u.CompressionIndex.Value = 83, 76, 90, 0.5
	s.Decisions = nil
	if got := mustReview(t, build(t, s)).AtLeast(Conflict); len(got) > 0 {
		t.Errorf("a sound site has %d findings at conflict or error: %v %s", len(got), ids(got), got[0].Message)
	}
}
