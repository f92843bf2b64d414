package sheet

import (
	"fmt"
	"math"

	"pastload/profile"
)

// site makes the summary of so many boreholes with the strata of the ordinary
// case.
func site(boreholes int) SummaryInput {
	in := SummaryInput{Settings: settings(), Page: A4, Figure: "5", Sheet: 1, Of: 1, Sources: "results.csv, oedometer.csv"}
	for k := range boreholes {
		one := estuary()
		p := one.Profile
		p.Borehole = fmt.Sprintf("BH%d", k+1)
		p.Tests = append([]profile.Test(nil), p.Tests...)
		for i := range p.Tests {
			f := 1 + 0.15*math.Sin(float64(3*i+5*k))
			p.Tests[i].Preconsolidation = p.Tests[i].Preconsolidation.Scale(f)
		}
		p.Results = append([]profile.DerivedResult(nil), p.Results...)
		for i := range p.Results {
			r := one.Borehole.Results[i]
			r.WaterContent.Value += 3 * math.Cos(float64(i+2*k))
			p.Results[i].Result = &r
			for _, s := range one.Borehole.Strata {
				if p.Results[i].Depth >= s.Top && p.Results[i].Depth < s.Base {
					p.Results[i].Stratum = s.Name
				}
			}
		}
		in.Profiles = append(in.Profiles, p)
	}
	return in
}
