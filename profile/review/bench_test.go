package review

import (
	"fmt"
	"testing"

	"pastload/profile"
)

// thousand makes a profile of at least a thousand results from generated sites,
// side by side as one site.
func thousand(b *testing.B, faults bool) *profile.Profile {
	b.Helper()
	out := &profile.Profile{Site: &profile.Site{Settings: profile.DefaultSettings()}}
	n := 0
	for seed := int64(1); n < 1000; seed++ {
		s := makeSite(seed)
		if faults {
			s.Boreholes[0].Results[4].WaterContent.Value *= 1.4
		}
		for i := range s.Boreholes {
			x := &s.Boreholes[i]
			// One level of ground water, as under one site.
			x.GroundLevel = profile.Known(x.WaterTableDepth.Value)
			x.Name = fmt.Sprintf("%s of %d", x.Name, seed)
			for j := range x.Strata {
				x.Strata[j].Name += fmt.Sprint(" ", seed)
			}
			n += len(x.Results)
		}
		for i := range s.Curves {
			s.Curves[i].Borehole = fmt.Sprintf("%s of %d", s.Curves[i].Borehole, seed)
		}
		sortResults(s)
		p := build(b, s)
		out.Boreholes = append(out.Boreholes, p.Boreholes...)
		out.Specimens = append(out.Specimens, p.Specimens...)
		out.Site.Boreholes = append(out.Site.Boreholes, s.Boreholes...)
		out.Site.Curves = append(out.Site.Curves, s.Curves...)
	}
	return out
}

func benchmark(b *testing.B, faults bool) {
	p := thousand(b, faults)
	for b.Loop() {
		mustReview(b, p)
	}
}

// BenchmarkReview reviews about a thousand sound results.
func BenchmarkReview(b *testing.B) { benchmark(b, false) }

// BenchmarkReviewWithFaults reviews as many with a wrong water content in each
// hundred.
func BenchmarkReviewWithFaults(b *testing.B) { benchmark(b, true) }
