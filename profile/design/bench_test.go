package design

import (
	"fmt"
	"testing"

	"pastload/profile"
)

// thousand returns a site of 1,000 results in four boreholes and two strata.
func thousand() *profile.Profile {
	k := profile.Known
	p := &profile.Profile{Site: &profile.Site{Settings: profile.DefaultSettings()}}
	for b := range 4 {
		bh := profile.Borehole{Name: fmt.Sprintf("BH%d", b+1), Strata: []profile.Stratum{{Name: "Upper", Base: 20}, {Name: "Lower", Top: 20, Base: 50}}}
		for i := range 250 {
			s := float64(i*37%23) / 23
			bh.Results = append(bh.Results, profile.Result{
				Depth: k(0.2 * float64(i)), Specimen: fmt.Sprintf("S%d", i), UnitWeight: k(16 + s), WaterContent: k(40 + 20*s),
				LiquidLimit: k(60 + 10*s), PlasticLimit: k(25 + 4*s), SpecificGravity: k(2.7), VoidRatio: k(1.2 + s),
				CompressionIndex: k(0.4 + 0.2*s), RecompressionIndex: k(0.04 + 0.02*s), UndrainedStrength: k(20 + 10*s),
			})
		}
		p.Site.Boreholes = append(p.Site.Boreholes, bh)
	}
	for b := range p.Site.Boreholes {
		bp := profile.BoreholeProfile{Borehole: p.Site.Boreholes[b].Name}
		for i := range p.Site.Boreholes[b].Results {
			r := &p.Site.Boreholes[b].Results[i]
			name := "Upper"
			if r.Depth.Value >= 20 {
				name = "Lower"
			}
			e := 10 + 6*r.Depth.Value
			s := 1.2 + float64(i*41%29)/60
			bp.Tests = append(bp.Tests, profile.Test{Specimen: r.Specimen, Depth: r.Depth.Value, Stratum: name, Preconsolidation: profile.Single(e * s),
				OCR: k(s), POP: k(e * (s - 1)), Effective: k(e), Used: true, Result: r})
			bp.Results = append(bp.Results, profile.DerivedResult{Depth: r.Depth.Value, Stratum: name, Result: r})
		}
		p.Boreholes = append(p.Boreholes, bp)
	}
	return p
}

func BenchmarkValuesOfThousandResults(b *testing.B) {
	p := thousand()
	for b.Loop() {
		if _, err := Values(p); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkValuesPerBorehole(b *testing.B) {
	p := thousand()
	for b.Loop() {
		if _, err := (Options{PerBorehole: true}).Values(p); err != nil {
			b.Fatal(err)
		}
	}
}
