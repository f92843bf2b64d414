package design

import (
	"math"
	"testing"

	"pastload/profile"
)

// TestWeightByGrade: σ′p, OCR and POP take the weight of their test, nothing else
// does.
func TestWeightByGrade(t *testing.T) {
	p := clay()
	p.Boreholes[0].Tests[0].Grade = "A"
	p.Boreholes[0].Tests[1].Grade = "C"
	plain, graded := values4(t, Options{}, p), values4(t, Options{WeightByGrade: true}, p)
	for name, same := range map[string]bool{"preconsolidation stress": false, "OCR": false, "POP": false, "compression index": true, "strength ratio": true} {
		a, b := find(t, plain, "Soft clay", "", name), find(t, graded, "Soft clay", "", name)
		if (a.Mean.Value == b.Mean.Value) != same || a.N != b.N {
			t.Errorf("%s: mean %v and by grade %v of %d and %d", name, a.Mean, b.Mean, a.N, b.N)
		}
	}
	weights := map[float64]int{}
	for _, o := range find(t, graded, "Soft clay", "", "OCR").Observations {
		weights[o.Weight]++
	}
	if weights[1] != 1 || weights[0.3] != 1 || weights[0.6] != 8 {
		t.Errorf("weights %v; want one A, one C and eight B", weights)
	}
}

// TestFractileWhereFailureIsLocal: the estimate asked for is the one advised.
func TestFractileWhereFailureIsLocal(t *testing.T) {
	mean, local := values4(t, Options{}, clay()), values4(t, Options{Estimate: Fractile}, clay())
	for name, way := range map[string]string{"compression index": WayFractileUnknown, "undrained strength": "line-fractile"} {
		a, b := find(t, mean, "Soft clay", "", name), find(t, local, "Soft clay", "", name)
		if b.Way != way || !(b.Low.Value < a.Low.Value && b.High.Value > a.High.Value) {
			t.Errorf("%s: way %s, %v to %v; want %s, wider than %v to %v", name, b.Way, b.Low, b.High, way, a.Low, a.High)
		}
	}
}

// TestSmallChangeIsNoTrend: a slope that is real but changes next to nothing
// leaves a constant.
func TestSmallChangeIsNoTrend(t *testing.T) {
	p := clay()
	for i := range p.Site.Boreholes {
		for j := range p.Site.Boreholes[i].Results {
			r := &p.Site.Boreholes[i].Results[j]
			r.UnitWeight = profile.Known(16 + 0.02*r.Depth.Value + 0.005*float64(j%2))
		}
	}
	g := find(t, values4(t, Options{}, p), "Soft clay", "", "unit weight")
	if !g.Trend.Real || g.Trend.Used || g.Way != WayMeanUnknown || len(g.Trend.Points) > 0 || warned(g, "hides it") {
		t.Errorf("real %v, used %v, way %s, change %v, warnings %q; want real, not used", g.Trend.Real, g.Trend.Used, g.Way, g.Trend.Change, g.Warnings)
	}
	near(t, "change", g.Trend.Change.Value, 0.15/16.1, 0.002)
}

// TestCurvesGiveWhatRowsDoNot: a site of curves alone has its indices from their
// reading, and a curve that stopped short only bounds Cc.
func TestCurvesGiveWhatRowsDoNot(t *testing.T) {
	k := profile.Known
	site := &profile.Site{
		Settings:  profile.DefaultSettings(),
		Boreholes: []profile.Borehole{{Name: "BH1", Strata: []profile.Stratum{{Name: "Clay", Base: 20}}}},
		Curves:    []profile.Curve{{Specimen: "S1", Borehole: "BH1", Depth: k(4)}, {Specimen: "S2", Borehole: "BH1", Depth: k(6)}, {Specimen: "S3", Borehole: "BH1"}},
	}
	p := &profile.Profile{Site: site, Specimens: []profile.Specimen{
		{Curve: &site.Curves[0], Interpreted: true, CompressionIndex: k(0.5), Recompression: k(0.05), Swelling: k(0.06), InitialVoidRatio: k(1.5)},
		{Curve: &site.Curves[1], Interpreted: true, CompressionIndex: k(0.3), InitialVoidRatio: k(1.4), Bound: profile.AtLeast},
		{Curve: &site.Curves[2], Interpreted: true, CompressionIndex: k(0.4)}, // no depth: it has no stratum
	}}
	strata := values4(t, Options{}, p)
	cc := find(t, strata, "Clay", "", "compression index")
	if cc.N != 1 || cc.Bounds != 1 || cc.Mean.Value != 0.5 {
		t.Errorf("Cc: %d values, %d bounds, mean %v; want one, one, 0.5", cc.N, cc.Bounds, cc.Mean)
	}
	if cr := find(t, strata, "Clay", "", "compression ratio"); cr.N != 1 || cr.Bounds != 1 || math.Abs(cr.Mean.Value-0.2) > 1e-12 {
		t.Errorf("CR: %d values, %d bounds, mean %v; want one, one, 0.2", cr.N, cr.Bounds, cr.Mean)
	}
	for name, want := range map[string]float64{"recompression index": 0.05, "swelling index": 0.06} {
		if q := find(t, strata, "Clay", "", name); q.Mean.Value != want {
			t.Errorf("%s: %v; want %g", name, q.Mean, want)
		}
	}
	site.Decisions = []profile.Decision{{Specimen: "S2", Quantity: "compression index", Decision: profile.Keep, Reason: "virgin line reached"}}
	if cc := find(t, values4(t, Options{}, p), "Clay", "", "compression index"); cc.N != 2 || cc.Bounds != 0 {
		t.Errorf("kept: %d values, %d bounds; want two values", cc.N, cc.Bounds)
	}
}

// TestStrengthRatioNeedsATestNear: su is divided by σ′p of a test within half a
// metre of the same stratum, and by no other.
func TestStrengthRatioNeedsATestNear(t *testing.T) {
	k := profile.Known
	for _, c := range []struct {
		name string
		test profile.Test
		want float64
	}{
		{"beside it", profile.Test{Depth: 5.4, Stratum: "Clay", Used: true, Preconsolidation: profile.Single(100)}, 0.3},
		{"too far", profile.Test{Depth: 5.6, Stratum: "Clay", Used: true, Preconsolidation: profile.Single(100)}, 0},
		{"another stratum", profile.Test{Depth: 5.1, Stratum: "Silt", Used: true, Preconsolidation: profile.Single(100)}, 0},
		{"left out", profile.Test{Depth: 5.1, Stratum: "Clay", Preconsolidation: profile.Single(100)}, 0},
		{"a bound", profile.Test{Depth: 5.1, Stratum: "Clay", Used: true, Bound: profile.AtLeast, Preconsolidation: profile.BoundAt(100, profile.AtLeast)}, 0},
	} {
		site := &profile.Site{Boreholes: []profile.Borehole{{Name: "B", Strata: []profile.Stratum{{Name: "Clay", Base: 9}},
			Results: []profile.Result{{Depth: k(5), UndrainedStrength: k(30)}}}}}
		p := &profile.Profile{Site: site, Boreholes: []profile.BoreholeProfile{{Borehole: "B", Tests: []profile.Test{c.test}}}}
		got := 0.0
		strata := values4(t, Options{}, p)
		for i := range strata {
			if q := strata[i].parameter("strength ratio"); q != nil {
				got = q.Mean.Value
			}
		}
		if got != c.want {
			t.Errorf("%s: su/σ′p %g; want %g", c.name, got, c.want)
		}
	}
}
