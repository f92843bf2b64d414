package design

import (
	"fmt"

	"pastload/profile"
)

// A Chosen is a parameter of a stratum as a calculation wants it: the mean of
// what was measured, the cautious value, and the engineer's, which are never
// one another.
type Chosen struct {
	Mean     profile.Number `json:"mean"`
	Cautious profile.Number `json:"cautious"` // on the side that is unfavourable for settlement
	Adopted  profile.Number `json:"adopted"`
}

// A LinePoint is one row of a design line: what a settlement calculation needs
// at a depth.
type LinePoint struct {
	Borehole             string         `json:"borehole"`
	Depth                float64        `json:"depth_m"`
	Stratum              string         `json:"stratum"`
	UnitWeight           profile.Number `json:"unit_weight_kN_m3"`
	Total                profile.Number `json:"total_stress_kPa"`
	Pore                 profile.Number `json:"pore_pressure_kPa"`
	Effective            profile.Number `json:"effective_stress_kPa"`
	PreconsolidationLow  profile.Number `json:"preconsolidation_stress_low_kPa"` // 5 % point of the profile
	PreconsolidationBest profile.Number `json:"preconsolidation_stress_best_kPa"`
	PreconsolidationHigh profile.Number `json:"preconsolidation_stress_high_kPa"` // 95 % point
	Adopted              profile.Number `json:"preconsolidation_stress_adopted_kPa"`
	AdoptedBasis         string         `json:"adopted_basis,omitempty"`
	Tested               bool           `json:"tested"` // lies within the depths of the used tests of its stratum here
	VoidRatio            Chosen         `json:"void_ratio"`
	CompressionIndex     Chosen         `json:"compression_index"`
	RecompressionIndex   Chosen         `json:"recompression_index"`
	CompressionRatio     Chosen         `json:"compression_ratio"`
	RecompressionRatio   Chosen         `json:"recompression_ratio"`
}

// Line returns the design line of a borehole: σ′v0 and σ′p with depth at every
// point of its profile, a boundary twice, with the compressibility of each
// stratum beside them. strata are the values of Options.Values, from which
// those of the borehole are preferred to those across boreholes; nil gives the
// stresses alone.
//
// An adopted σ′p is taken as it is, an adopted OCR times σ′v0, an adopted POP
// plus σ′v0; where several are adopted the first of this list counts. Points
// without a known effective stress stay in the table, with what is not known
// left so.
func Line(b profile.BoreholeProfile, strata []Stratum) []LinePoint {
	line := make([]LinePoint, 0, len(b.Points))
	for _, p := range b.Points {
		l := LinePoint{
			Borehole: b.Borehole, Depth: p.Depth, Stratum: p.Stratum,
			UnitWeight: p.UnitWeight, Total: p.Total, Pore: p.Pore, Effective: p.Effective,
			Tested: tested(b.Tests, p.Stratum, p.Depth),
		}
		r := p.Preconsolidation
		if r.Known && r.Bound != profile.AtMost {
			l.PreconsolidationLow = profile.Known(r.Low)
		}
		if r.Known && r.Bound == profile.Exact {
			l.PreconsolidationBest = profile.Known(r.Best)
		}
		if r.Known && r.Bound != profile.AtLeast {
			l.PreconsolidationHigh = profile.Known(r.High)
		}
		l.choose(b.Borehole, strata)
		line = append(line, l)
	}
	return line
}

// tested reports whether a depth lies between used tests of its stratum.
func tested(tests []profile.Test, stratum string, depth float64) bool {
	above, below := false, false
	for i := range tests {
		t := &tests[i]
		if t.Used && t.Bound == profile.Exact && t.Stratum == stratum {
			above = above || t.Depth <= depth
			below = below || t.Depth >= depth
		}
	}
	return above && below
}

// choose fills what the strata give at the point.
func (l *LinePoint) choose(borehole string, strata []Stratum) {
	find := func(name string) *Parameter {
		var found *Parameter
		for i := range strata {
			s := &strata[i]
			if s.Stratum != l.Stratum || s.Borehole != "" && s.Borehole != borehole {
				continue
			}
			for j := range s.Parameters {
				if s.Parameters[j].Parameter == name && (found == nil || s.Borehole == borehole) {
					found = &s.Parameters[j]
				}
			}
		}
		return found
	}
	l.VoidRatio = chosen(find("void ratio"))
	l.CompressionIndex = chosen(find("compression index"))
	l.RecompressionIndex = chosen(find("recompression index"))
	l.CompressionRatio = chosen(find("compression ratio"))
	l.RecompressionRatio = chosen(find("recompression ratio"))
	l.adopt(find("preconsolidation stress"), find("OCR"), find("POP"))
}

// chosen returns the three faces of a parameter. A low void ratio is cautious in
// none and a high one neither: only quantities with a side have a cautious value.
func chosen(p *Parameter) Chosen {
	if p == nil {
		return Chosen{}
	}
	c := Chosen{Mean: p.Mean, Adopted: p.Adopted}
	switch p.Side {
	case Low:
		c.Cautious = p.Low
	case High:
		c.Cautious = p.High
	}
	return c
}

// adopt sets the adopted σ′p of the point.
func (l *LinePoint) adopt(stress, ratio, difference *Parameter) {
	switch {
	case stress != nil && stress.Adopted.Known:
		l.Adopted, l.AdoptedBasis = profile.Known(stress.Adopted.Value), "adopted σ′p"
	case ratio != nil && ratio.Adopted.Known && l.Effective.Known:
		l.Adopted = profile.Known(ratio.Adopted.Value * l.Effective.Value)
		l.AdoptedBasis = fmt.Sprintf("adopted OCR %s × σ′v0", number(ratio.Adopted.Value))
	case difference != nil && difference.Adopted.Known && l.Effective.Known:
		l.Adopted = profile.Known(l.Effective.Value + difference.Adopted.Value)
		l.AdoptedBasis = fmt.Sprintf("σ′v0 + adopted POP %s", quantityText(difference.Adopted.Value, "kPa"))
	}
}
