package review

import (
	"fmt"
	"testing"

	"pastload/profile"
)

// soundRow is a clay specimen whose numbers agree, below the water table at
// σ′v0 = 60 kPa in the made-up profile of bare.
func soundRow() profile.Result {
	k := profile.Known
	return profile.Result{
		WaterContent: k(57), SpecificGravity: k(2.7), VoidRatio: k(1.539), UnitWeight: k(16.4), LiquidLimit: k(62), PlasticLimit: k(27), PlasticityIndex: k(35), ClayFraction: k(40),
		Preconsolidation: k(80), CompressionIndex: k(0.49), RecompressionIndex: k(0.055),
	}
}

// Each rule of a single specimen speaks of its own contradiction and is silent
// on a sound specimen.
func TestRulesOfOneSpecimen(t *testing.T) {
	k := profile.Known
	if found := mustReview(t, bare(lone(soundRow()))); len(found.AtLeast(Doubt)) > 0 {
		t.Fatalf("the sound specimen has %v", ids(found))
	}
	for _, tt := range []struct {
		rule     string
		quantity string
		severity Severity
		change   func(*profile.Result)
	}{
		{"limits-order", "liquid limit", Error, func(r *profile.Result) { *r = profile.Result{PlasticLimit: k(40), LiquidLimit: k(35)} }},
		{"plasticity-arithmetic", "plasticity index", Error, func(r *profile.Result) { r.PlasticityIndex = k(45) }},
		{"liquidity-arithmetic", "liquidity index", Conflict, func(r *profile.Result) { r.LiquidityIndex = k(0.3) }},
		{"u-line", "plasticity index", Error, func(r *profile.Result) { *r = profile.Result{LiquidLimit: k(40), PlasticityIndex: k(36)} }},
		{"activity", "clay fraction", Note, func(r *profile.Result) { r.ClayFraction = k(12) }},
		{"liquidity-range", "water content", Doubt, func(r *profile.Result) {
			*r = profile.Result{WaterContent: k(10), LiquidLimit: k(62), PlasticLimit: k(30)}
		}},
		{"swelling-ratio", "swelling index", Error, func(r *profile.Result) { r.SwellingIndex = k(0.6) }},
		{"secondary-ratio", "secondary compression index", Doubt, func(r *profile.Result) { r.SecondaryCompression = k(0.2) }},
		{"recompression-ratio", "recompression index", Conflict, func(r *profile.Result) { r.RecompressionIndex = k(0.25) }},
		{"compression-correlation", "compression index", Conflict, func(r *profile.Result) { r.CompressionIndex, r.RecompressionIndex = k(0.15), profile.Number{} }},
		{"range-order", "preconsolidation stress", Error, func(r *profile.Result) { r.PreconsolidationLow, r.PreconsolidationHigh = k(85), k(95) }},
		{"given-effective-stress", "effective stress", Conflict, func(r *profile.Result) { r.EffectiveStress = k(110) }},
		{"strength-ratio", "undrained strength", Conflict, func(r *profile.Result) { r.UndrainedStrength, r.StrengthTest = k(90), "field vane" }},
		{"ocr-below-one", "preconsolidation stress", Note, func(r *profile.Result) { r.Preconsolidation = k(55) }},
		{"liquidity-history", "preconsolidation stress", Note, func(r *profile.Result) {
			*r = profile.Result{WaterContent: k(30), LiquidLimit: k(62), PlasticLimit: k(27), Preconsolidation: k(70)}
		}},
		{"void-index", "void ratio", Note, func(r *profile.Result) {
			*r = profile.Result{VoidRatio: k(2.6), LiquidLimit: k(62), PlasticLimit: k(27), SpecificGravity: k(2.7)}
		}},
		{"dry-side", "unit weight", Error, func(r *profile.Result) {
			*r = profile.Result{UnitWeight: k(19), SpecificGravity: k(2.7), VoidRatio: k(1.539)}
		}},
		{"strength-range", "undrained strength", Error, func(r *profile.Result) { *r = profile.Result{UndrainedStrength: k(0.02)} }},
	} {
		t.Run(tt.rule, func(t *testing.T) {
			r := soundRow()
			tt.change(&r)
			found := mustReview(t, bare(lone(r)))
			for _, f := range found {
				if f.Rule == tt.rule && f.Quantity == tt.quantity && f.Severity == tt.severity {
					return
				}
			}
			for _, f := range found {
				t.Log(f.Severity, f.ID, f.Message)
			}
			t.Errorf("no %s of %s at %s", tt.rule, tt.quantity, tt.severity)
		})
	}
}

// Rules of a borehole and of the site, on a generated site.
func TestRulesOfTheSite(t *testing.T) {
	has := func(found Findings, rule string, s Severity) *Finding {
		for i := range found {
			if found[i].Rule == rule && found[i].Severity == s {
				return &found[i]
			}
		}
		return nil
	}
	for _, tt := range []struct {
		rule     string
		severity Severity
		change   func(*profile.Site)
	}{
		{"effective-stress", Error, func(s *profile.Site) {
			s.Boreholes[0].Water = []profile.PorePressure{{Depth: profile.Known(4), Pressure: profile.Known(300)}}
		}},
		{"pore-pressure", Conflict, func(s *profile.Site) {
			s.Boreholes[0].Water = []profile.PorePressure{{Depth: profile.Known(4), Pressure: profile.Known(300)}}
		}},
		{"pore-pressure", Note, func(s *profile.Site) {
			s.Boreholes[0].Water = []profile.PorePressure{{Depth: profile.Known(6), Pressure: profile.Known(9.81 * (6 - s.Boreholes[0].WaterTableDepth.Value + 2))}}
		}},
		{"stratum-description", Doubt, func(s *profile.Site) { s.Boreholes[0].Strata[1].Description = "Soft grey CLAY of low plasticity" }},
		{"layer-unit-weight", Error, func(s *profile.Site) { s.Boreholes[1].Strata[1].SaturatedUnitWeight = profile.Known(1.62) }},
		{"water-level", Conflict, func(s *profile.Site) { s.Boreholes[0].WaterTableDepth = profile.Known(9) }},
		{"laboratory", Doubt, func(s *profile.Site) {
			for i := range s.Boreholes[0].Results {
				r := &s.Boreholes[0].Results[i]
				r.Laboratory = "Another laboratory"
				if r.LiquidLimit.Known {
					r.LiquidLimit.Value = round(r.LiquidLimit.Value*1.25, 0)
					r.PlasticityIndex.Value = r.LiquidLimit.Value - r.PlasticLimit.Value
				}
			}
		}},
		{"repeated-values", Conflict, func(s *profile.Site) {
			b := &s.Boreholes[0]
			r := b.Results[3]
			r.Specimen, r.Depth = "copy", profile.Known(r.Depth.Value+0.5)
			b.Results = append(b.Results, r)
		}},
		{"duplicates", Doubt, func(s *profile.Site) {
			b := &s.Boreholes[0]
			for _, r := range b.Results {
				if r.UnitWeight.Known && r.Depth.Value > 4 {
					o := profile.Result{Depth: profile.Known(r.Depth.Value + 0.1), Specimen: "twin", UnitWeight: profile.Known(r.UnitWeight.Value * 1.05)}
					b.Results = append(b.Results, o)
					return
				}
			}
		}},
	} {
		t.Run(fmt.Sprint(tt.rule, " ", tt.severity), func(t *testing.T) {
			s := makeSite(3)
			tt.change(s)
			sortResults(s)
			found := mustReview(t, build(t, s))
			if has(found, tt.rule, tt.severity) == nil {
				t.Errorf("no %s at %s among %v", tt.rule, tt.severity, ids(found))
			}
		})
	}
}
