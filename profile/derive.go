package profile

import (
	"pastload/correlate"
)

// values gathers what a result and the stresses there give to a correlation.
// Only what was measured goes in: the correlations derive PI, LI or e0 from it
// themselves and say so.
func (r *Result) values(effective Number) correlate.Values {
	v := correlate.Values{}
	put := func(symbol string, n Number) {
		if n.Known && n.Bound == Exact {
			v[symbol] = n.Value
		}
	}
	put("LL", r.LiquidLimit)
	put("PL", r.PlasticLimit)
	put("PI", r.PlasticityIndex)
	put("LI", r.LiquidityIndex)
	put("w", r.WaterContent)
	put("Gs", r.SpecificGravity)
	put("e0", r.VoidRatio)
	put("organic", r.OrganicContent)
	put("St", r.Sensitivity)
	put("Cc", r.CompressionIndex)
	if isVane(r) {
		put("suFV", r.UndrainedStrength)
	} else {
		put("su", r.UndrainedStrength)
	}
	put("N60", r.N60)
	put("KD", r.HorizontalStressIndex)
	put("ID", r.MaterialIndex)
	put("Vs", r.ShearWaveVelocity)
	put("qnet", r.NetConeResistance)
	put("du2", r.ExcessConePressure)
	put("qeff", r.EffectiveCone)
	if effective.Known && effective.Value > 0 {
		v["effective"] = effective.Value
	}
	return v
}

// peatOrganic is the organic content in percent that a stratum called peat or
// organic is taken to have at least where none was measured, so that the
// correlations for such ground speak and those for clay do not.
const peatOrganic = 25.0

// derive sets what was measured at every result beside what follows from it.
func (g *ground) derive(site *Site) []DerivedResult {
	b := g.borehole
	out := make([]DerivedResult, 0, len(b.Results))
	for i := range b.Results {
		r := &b.Results[i]
		d := DerivedResult{
			Depth: r.Depth.Value, Specimen: r.Specimen, Stratum: r.Stratum,
			MeasuredCc: r.CompressionIndex, PlasticityIndex: r.PlasticityIndexOf(), LiquidityIndex: r.LiquidityIndexOf(),
			Result: r,
		}
		s := b.StratumAt(r.Depth.Value, r.Stratum)
		if s != nil {
			d.Stratum = s.Name
		}
		here := g.at(r.Depth.Value, false)
		d.Total, d.Pore, d.Effective = here.total, here.pore, here.effective
		if r.WaterContent.Known && r.SpecificGravity.Known && r.VoidRatio.Known {
			d.DegreeSaturation = DegreeOfSaturation(r.WaterContent.Value, r.SpecificGravity.Value, r.VoidRatio.Value)
		}
		d.correlate(site, r.values(d.Effective), s != nil && isOrganic(s))
		out = append(out, d)
	}
	return out
}

// correlate adds the bands that correlations give for compression index,
// compression ratio and recompression index. Rules for one kind of ground do not
// speak about another.
func (d *DerivedResult) correlate(site *Site, v correlate.Values, organic bool) {
	if organic {
		v["organic"] = max(v["organic"], peatOrganic)
	}
	d.MeasuredCr = d.Result.RecompressionIndex
	if e := d.Result.VoidRatioOf(); d.MeasuredCc.Known && e.Known {
		d.MeasuredCR = Known(d.MeasuredCc.Value / (1 + e.Value))
	}
	delete(v, "Cc") // a measured Cc is what the bands are compared with
	d.CorrelatedCc = d.band(site, correlate.CompressionIndex, v)
	d.CorrelatedCR = d.band(site, correlate.CompressionRatio, v)
	d.CorrelatedCr = d.band(site, correlate.RecompressionIndex, v)
}

// band returns what the independent families of correlations give for a
// quantity, and keeps each of them for the reader. It is not known where nothing
// was measured that one of them could use.
func (d *DerivedResult) band(site *Site, q correlate.Quantity, v correlate.Values) Range {
	band, err := correlate.BandOf(q, v, site.Settings.correlationsFor(q))
	if err != nil {
		return Range{}
	}
	for _, m := range band.Members {
		d.Correlations = append(d.Correlations, Correlated{
			ID: m.Correlation.ID, Quantity: string(m.Correlation.Quantity), Family: m.Correlation.Family,
			Value: m.Estimate.Value, Unit: m.Correlation.Quantity.Unit(),
			Verified: m.Correlation.Verified.String(), Warnings: m.Estimate.Warnings, Counts: m.Speaks,
		})
	}
	return Around(band.Low, band.Best, band.High)
}

// compressionIndex gives the points of a borehole a compression index. Within
// a stratum the best value runs straight between the depths where Cc was
// measured, or where none was, between those where correlations give it; low
// and high are the lowest and highest of the stratum.
func compressionIndex(b *Borehole, points []Point, results []DerivedResult) {
	for i := range b.Strata {
		s := &b.Strata[i]
		var depths []float64
		var values []Range
		for _, measured := range []bool{true, false} {
			for j := range results {
				r := &results[j]
				if b.StratumAt(r.Depth, r.Result.Stratum) != s {
					continue
				}
				v := r.CorrelatedCc
				if measured {
					v = Range{}
					if r.MeasuredCc.Known && r.MeasuredCc.Value > 0 {
						v = Single(r.MeasuredCc.Value)
					}
				}
				if v.Known {
					depths, values = append(depths, r.Depth), append(values, v)
				}
			}
			if len(depths) > 0 {
				break
			}
		}
		if len(depths) == 0 {
			continue
		}
		low, high := values[0].Low, values[0].High
		for _, v := range values {
			low, high = min(low, v.Low), max(high, v.High)
		}
		for k := range points {
			p := &points[k]
			if p.Depth >= s.Top && p.Depth <= s.Base && p.stratum == i {
				p.CompressionIndex = Around(low, between(depths, values, p.Depth), high)
			}
		}
	}
}

// between interpolates best values by depth and keeps the end values beyond
// them. Several values at one depth count as their first.
func between(depths []float64, values []Range, depth float64) float64 {
	if depth <= depths[0] {
		return values[0].Best
	}
	for i := 1; i < len(depths); i++ {
		if depth > depths[i] {
			continue
		}
		run := depths[i] - depths[i-1]
		if run == 0 {
			return values[i].Best
		}
		return values[i-1].Best + (values[i].Best-values[i-1].Best)*(depth-depths[i-1])/run
	}
	return values[len(values)-1].Best
}
