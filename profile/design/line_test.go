package design

import (
	"math"
	"strings"
	"testing"

	"pastload/profile"
)

func TestLineHasEveryPoint(t *testing.T) {
	p := clay()
	b := p.Boreholes[0]
	b.Points = append([]profile.Point{{Depth: 0.5, Stratum: "Fill", Effective: profile.Known(9)}}, b.Points...)
	line := Line(b, values4(t, Options{PerBorehole: true}, p))
	if len(line) != len(b.Points) {
		t.Fatalf("%d rows for %d points", len(line), len(b.Points))
	}
	if fill := line[0]; fill.Tested || fill.PreconsolidationBest.Known || fill.CompressionIndex.Mean.Known || !fill.Effective.Known {
		t.Errorf("in the fill nothing was tested, but %+v", fill)
	}
	for i, l := range line[1:] {
		q := b.Points[i+1]
		if l.Borehole != "BH1" || l.Depth != q.Depth || l.PreconsolidationLow.Value != q.Preconsolidation.Low || l.PreconsolidationHigh.Value != q.Preconsolidation.High || !l.Tested {
			t.Errorf("row %+v of point %+v", l, q)
		}
		if !(l.CompressionIndex.Cautious.Value > l.CompressionIndex.Mean.Value) {
			t.Errorf("cautious Cc %v is not above the mean %v", l.CompressionIndex.Cautious, l.CompressionIndex.Mean)
		}
		if l.VoidRatio.Cautious.Known || !l.VoidRatio.Mean.Known {
			t.Errorf("e0 has no cautious side: %+v", l.VoidRatio)
		}
		if l.Adopted.Known {
			t.Errorf("nothing is adopted, but %v", l.Adopted)
		}
	}
	if bare := Line(b, nil); len(bare) != len(line) || bare[1].CompressionIndex.Mean.Known {
		t.Errorf("without strata: %d rows", len(bare))
	}
}

// TestLineBounds: where the profile only bounds σ′p, the line has that side alone.
func TestLineBounds(t *testing.T) {
	b := profile.BoreholeProfile{Borehole: "BH1", Points: []profile.Point{
		{Depth: 1, Preconsolidation: profile.BoundAt(300, profile.AtLeast)},
		{Depth: 2, Preconsolidation: profile.BoundAt(200, profile.AtMost)},
	}}
	line := Line(b, nil)
	if l := line[0]; l.PreconsolidationLow.Value != 300 || l.PreconsolidationBest.Known || l.PreconsolidationHigh.Known {
		t.Errorf("at least 300 kPa gives %+v", l)
	}
	if l := line[1]; l.PreconsolidationHigh.Value != 200 || l.PreconsolidationBest.Known || l.PreconsolidationLow.Known {
		t.Errorf("at most 200 kPa gives %+v", l)
	}
}

func TestLineAdopts(t *testing.T) {
	for _, c := range []struct {
		quantity, borehole string
		value              float64
		want               func(effective float64) float64
		basis              string
	}{
		{"preconsolidation stress", "", 75, func(float64) float64 { return 75 }, "adopted σ′p"},
		{"OCR", "", 1.3, func(e float64) float64 { return 1.3 * e }, "adopted OCR 1.30 × σ′v0"},
		{"POP", "", 20, func(e float64) float64 { return 20 + e }, "σ′v0 + adopted POP 20.0 kPa"},
		{"OCR", "BH1", 1.2, func(e float64) float64 { return 1.2 * e }, "adopted OCR 1.20"},
		{"OCR", "BH2", 1.2, nil, ""}, // not for this borehole
	} {
		p := clay()
		p.Site.Decisions = []profile.Decision{{Borehole: c.borehole, Specimen: "Soft clay", Quantity: c.quantity, Decision: profile.AdoptValue, Value: profile.Known(c.value), Reason: "r"}}
		for _, l := range Line(p.Boreholes[0], values4(t, Options{PerBorehole: true}, p)) {
			if c.want == nil {
				if l.Adopted.Known {
					t.Errorf("%s of %s: %v in BH1", c.quantity, c.borehole, l.Adopted)
				}
				continue
			}
			if math.Abs(l.Adopted.Value-c.want(l.Effective.Value)) > 1e-9 || !strings.Contains(l.AdoptedBasis, c.basis) {
				t.Errorf("%s: %v (%s) at σ′v0 %g", c.quantity, l.Adopted, l.AdoptedBasis, l.Effective.Value)
			}
		}
	}
}

// TestLineOutsideTests: between tests is tested, beyond them is not.
func TestLineOutsideTests(t *testing.T) {
	k := profile.Known
	b := profile.BoreholeProfile{Borehole: "B", Tests: []profile.Test{
		{Depth: 3, Stratum: "A", Used: true}, {Depth: 6, Stratum: "A", Used: true},
		{Depth: 8, Stratum: "A", Used: false}, {Depth: 9, Stratum: "A", Used: true, Bound: profile.AtLeast},
	}}
	want := map[float64]bool{2: false, 3: true, 4.5: true, 6: true, 7: false, 9: false}
	for z := range want {
		b.Points = append(b.Points, profile.Point{Depth: z, Stratum: "A", Effective: k(10)})
	}
	for _, l := range Line(b, nil) {
		if l.Tested != want[l.Depth] {
			t.Errorf("tested at %g m: %v", l.Depth, l.Tested)
		}
	}
}
