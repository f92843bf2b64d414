package design

import (
	"pastload/profile"
)

// WithoutDesign returns the strata with what was measured and derived only, for a
// ground investigation report that leaves cautious and design values to another
// document.
func WithoutDesign(strata []Stratum) []Stratum {
	out := append([]Stratum(nil), strata...)
	for i := range out {
		out[i].Edition = Edition{}
		out[i].Parameters = append([]Parameter(nil), out[i].Parameters...)
		for j := range out[i].Parameters {
			p := &out[i].Parameters[j]
			p.Low, p.High, p.Adopted, p.AssumedCOV = profile.Number{}, profile.Number{}, profile.Number{}, profile.Number{}
			p.Way, p.Method, p.MethodReason, p.Reason, p.Term, p.COVSource = "", "", "", "", "", ""
			p.Alternatives, p.Adoptions, p.Warnings = []Alternative{}, nil, append([]string{}, p.facts...)
			if p.Trend != nil {
				t := *p.Trend
				t.Points = nil
				p.Trend = &t
			}
		}
	}
	return out
}
