package review

import (
	"fmt"
	"math"
	"math/rand"

	"pastload/profile"
)

// The errors with which the generated laboratory measures, as standard
// deviations; from published coefficients of variation of measurement (Phoon &
// Kulhawy 1999, from memory), on their low side as one laboratory has them.
const (
	measureWater     = 0.02  // relative
	measureLimit     = 0.03  // relative, LL
	measurePlastic   = 0.04  // relative
	measureGravity   = 0.015 // absolute
	measureVolume    = 0.008 // relative
	measureYield     = 0.11  // of ln σ′p
	measureStrength  = 0.12  // of ln su
	measureVoidRatio = 0.0015
)

// A maker makes sites that are physically consistent, so that whatever is planted
// in one is all that is wrong with it.
type maker struct {
	*rand.Rand
	site  *profile.Site
	line  int
	truth []layerTruth
	noise float64 // times the errors of measurement
}

// A layerTruth is a stratum as it was made.
type layerTruth struct {
	name, soil, words  string
	thickness          float64
	ll, pi, li         float64
	gs, gamma          float64
	peat, till, crust  bool
	compression, slope float64 // factors of the site on Cc, and Cr/Cc
	vane               float64
}

func (m *maker) normal(mean, sd float64) float64 { return mean + sd*m.NormFloat64() }
func (m *maker) between(low, high float64) float64 {
	return low + (high-low)*m.Float64()
}

// makeSite makes a sound site of two to four boreholes.
func makeSite(seed int64) *profile.Site { return makeNoisySite(seed, 1) }

// makeNoisySite makes one whose laboratory errs more.
func makeNoisySite(seed int64, noise float64) *profile.Site {
	m := &maker{noise: noise, Rand: rand.New(rand.NewSource(seed)), site: &profile.Site{Name: fmt.Sprintf("site %d", seed), Settings: profile.DefaultSettings()}}
	m.layers()
	level := m.between(-2, 4)
	pop := m.between(10, 60)
	water := m.between(0.7, 2.2)
	for b := range 2 + m.Intn(3) {
		m.borehole(fmt.Sprintf("BH%d", b+1), level, water, pop)
	}
	return m.site
}

func (m *maker) layers() {
	gs := m.between(2.67, 2.74)
	factor := math.Exp(m.normal(0, 0.12))
	clay := func(name, words string, thickness, ll, li float64) layerTruth {
		pi := 0.73*(ll-20) + m.between(0, 5)
		return layerTruth{name: name, soil: "clay", words: words, thickness: thickness, ll: ll, pi: pi, li: li, gs: m.normal(gs, 0.01),
			compression: factor, slope: m.between(0.09, 0.15), vane: m.between(0.2, 0.28)}
	}
	ll := m.between(48, 78)
	crust := clay("Crust", "Firm fissured brown CLAY", m.between(1.5, 3), ll-m.between(0, 6), m.between(0.15, 0.4))
	crust.crust = true
	upper := clay("Upper clay", "Soft grey CLAY", m.between(4, 8), ll, m.between(0.7, 1.0))
	m.truth = []layerTruth{crust, upper}
	if m.Intn(3) == 0 {
		m.truth = append(m.truth, layerTruth{name: "Peat", soil: "peat", words: "Brown fibrous PEAT", thickness: m.between(0.8, 1.5), gs: 1.68, peat: true, compression: 1, slope: 0.11, vane: 0.25})
	}
	lower := clay("Lower clay", "Soft to firm grey CLAY", m.between(3, 6), math.Max(38, ll-m.between(12, 20)), m.between(0.5, 0.7))
	till := clay("Till", "Stiff grey sandy CLAY", m.between(3, 5), m.between(26, 33), m.between(0.05, 0.2))
	till.till, till.vane = true, 0.28
	m.truth = append(m.truth, lower, till)
	for i := range m.truth {
		t := &m.truth[i]
		w := t.ll - t.pi + t.li*t.pi
		if t.peat {
			w = m.between(220, 380)
			t.ll = w
		}
		t.gamma = profile.SaturatedUnitWeight(t.gs, w*t.gs/100, 9.81)
	}
}

func (m *maker) borehole(name string, level, water, pop float64) {
	ground := level + m.normal(0, 0.3)
	b := profile.Borehole{Name: name, GroundLevel: known2(ground, 2), Easting: profile.Known(m.between(0, 150)), Northing: profile.Known(m.between(0, 150))}
	table := math.Max(0.3, water+(ground-level)+m.normal(0, 0.15))
	b.WaterTableDepth = m.cell(table, 2, "boreholes.csv")
	top := 0.0
	for i := range m.truth {
		t := &m.truth[i]
		base := round(top+t.thickness*m.between(0.85, 1.15), 1)
		s := profile.Stratum{Name: t.name, Soil: t.soil, Description: t.words, Top: top, Base: base}
		s.SaturatedUnitWeight = m.cell(t.gamma, 1, "strata.csv")
		if i == 0 {
			s.UnitWeight = m.cell(t.gamma-m.between(0, 0.5), 1, "strata.csv")
		}
		b.Strata = append(b.Strata, s)
		top = base
	}
	if m.Intn(2) == 0 {
		z := round(m.between(4, 8), 1)
		u := 9.81 * (z - table + m.normal(0, 0.1))
		b.Water = append(b.Water, profile.PorePressure{Depth: known2(z, 2), Pressure: m.cell(u, 1, "water.csv")})
	}
	m.sample(&b, table, pop)
	m.site.Boreholes = append(m.site.Boreholes, b)
}

// stress returns σ′v0 of the made ground.
func (m *maker) stress(b *profile.Borehole, table, z float64) float64 {
	total := 0.0
	for i := range b.Strata {
		s := &b.Strata[i]
		total += m.truth[i].gamma * math.Max(0, math.Min(z, s.Base)-s.Top)
	}
	return total - 9.81*math.Max(0, z-table)
}

// sample takes specimens down a borehole.
func (m *maker) sample(b *profile.Borehole, table, pop float64) {
	n := 0
	for i := range b.Strata {
		t, s := &m.truth[i], &b.Strata[i]
		for z := s.Top + m.between(0.3, 0.6); z < s.Base-0.2; z += m.between(0.9, 1.4) {
			n++
			depth := round(z, 1)
			sv := m.stress(b, table, depth)
			yield := sv + pop + 90*math.Exp(-(depth-0.5)/0.9)
			if t.till {
				yield = sv + pop*8
			}
			m.specimen(b, t, depth, fmt.Sprintf("%s-%d", b.Name, n), yield, depth > table)
			if !t.till && !t.crust && !t.peat && m.Intn(2) == 0 {
				v := round(depth+0.4, 1)
				if v < s.Base-0.1 {
					su := t.vane * (yield + 3) * math.Exp(m.normal(0, m.noise*measureStrength))
					b.Results = append(b.Results, profile.Result{Depth: m.cell(v, 2, "results.csv"), UndrainedStrength: m.cell(su, 1, "results.csv"), StrengthTest: "field vane"})
				}
			}
		}
	}
}

// specimen measures one specimen.
func (m *maker) specimen(b *profile.Borehole, t *layerTruth, depth float64, name string, yield float64, below bool) {
	const file = "results.csv"
	m.line++
	r := profile.Result{Depth: m.cell(depth, 2, file), Specimen: name, Laboratory: "A laboratory", Sampler: "thin-walled piston"}
	r.Source = r.Depth.Source
	var ll, pi, w float64
	gs := m.normal(t.gs, 0.01)
	if t.peat {
		w = t.ll * math.Exp(m.normal(0, 0.12))
		r.OrganicContent = m.cell(m.between(55, 75), 0, file)
	} else {
		ll = t.ll * (1 + m.normal(0, 0.06))
		pi = t.pi * (ll - 18) / (t.ll - 18) * (1 + m.normal(0, 0.03))
		w = ll - pi + (t.li+m.normal(0, 0.06))*pi
		r.LiquidLimit = m.cell(ll*(1+m.normal(0, m.noise*measureLimit)), 0, file)
		r.PlasticLimit = m.cell((ll-pi)*(1+m.normal(0, m.noise*measurePlastic)), 0, file)
		r.PlasticityIndex = m.cell(r.LiquidLimit.Value-r.PlasticLimit.Value, 0, file)
		r.ClayFraction = m.cell(pi*m.between(0.9, 1.3), 0, file)
	}
	e := w * gs / 100
	if !below {
		e *= m.between(1, 1.06)
	}
	gamma := gs * 9.81 * (1 + w/100) / (1 + e)
	volume := 1 + m.normal(0, m.noise*measureVolume)
	r.WaterContent = m.cell(w*(1+m.normal(0, m.noise*measureWater)), 1, file)
	r.SpecificGravity = m.cell(gs+m.normal(0, m.noise*measureGravity), 2, file)
	r.VoidRatio = m.cell((1+e)*volume-1, 3, file)
	r.UnitWeight = m.cell(gamma/(1+m.normal(0, m.noise*measureVolume)), 1, file)
	if m.Float64() < 0.6 {
		m.oedometer(b, t, &r, e, ll, w, yield)
	} else if t.till {
		r.UndrainedStrength = m.cell(t.vane*yield*math.Exp(m.normal(0, 0.15)), 0, file)
		r.StrengthTest = "UU triaxial"
	}
	b.Results = append(b.Results, r)
}

func (m *maker) oedometer(b *profile.Borehole, t *layerTruth, r *profile.Result, e, ll, w, yield float64) {
	const file = "results.csv"
	cc := 0.01 * w
	if !t.peat {
		cc = math.Sqrt(0.40*(e-0.25)*0.009*(ll-10)) * t.compression
	}
	cc *= math.Exp(m.normal(0, 0.08))
	cr := cc * t.slope * math.Exp(m.normal(0, 0.12))
	read := yield * math.Exp(m.normal(0, m.noise*measureYield))
	r.Preconsolidation = m.cell(roundTo(read, 2), 0, file)
	r.PreconsolidationLow = m.cell(roundTo(read*0.92, 2), 0, file)
	r.PreconsolidationHigh = m.cell(roundTo(read*1.09, 2), 0, file)
	r.CompressionIndex = m.cell(cc*math.Exp(m.normal(0, 0.03)), 3, file)
	r.RecompressionIndex = m.cell(cr*math.Exp(m.normal(0, 0.05)), 3, file)
	if m.Float64() < 0.5 {
		m.site.Curves = append(m.site.Curves, m.curve(b.Name, r, cc, cr, read))
	}
}

// curve makes the oedometer curve of a specimen.
func (m *maker) curve(borehole string, r *profile.Result, cc, cr, yield float64) profile.Curve {
	c := profile.Curve{Specimen: r.Specimen, Borehole: borehole, Depth: r.Depth, TestKind: "incremental 24 h",
		InitialVoidRatio: r.VoidRatio, SpecificGravity: r.SpecificGravity, WaterContent: r.WaterContent, Source: r.Source}
	e0 := r.VoidRatio.Value - 0.4*cr
	at := func(s float64) float64 {
		x := math.Log10(s / yield)
		// Two straight lines with a knee rounded over a sixth of a cycle.
		const k = 0.06
		bend := k * math.Log1p(math.Exp(x/k))
		return e0 - cr*math.Log10(s/12.5) - (cc-cr)*bend
	}
	stage := func(kind string, s, e float64) {
		c.Stages = append(c.Stages, profile.Stage{Kind: kind, EffectiveStress: profile.Known(s), VoidRatio: known2(e+m.normal(0, m.noise*measureVoidRatio/3), 3)})
	}
	last := 12.5
	for last < 10*yield || last < 800 {
		last *= 2
	}
	loop := 0.0
	if m.Intn(2) == 0 {
		loop = 12.5
		for loop < 2*yield {
			loop *= 2
		}
	}
	for s := 12.5; s <= last && at(s) > 0.1; s *= 2 {
		stage("load", s, at(s))
		if s == loop {
			for d := s / 2; d >= s/8; d /= 2 {
				stage("unload", d, at(s)+cr*math.Log10(s/d))
			}
			for d := s / 4; d <= s; d *= 2 {
				stage("reload", d, at(s)+cr*math.Log10(s/d)-0.004*d/s)
			}
			e0 -= 0.004
		}
	}
	return c
}

// cell returns a number as it would be typed, with its source.
func (m *maker) cell(v float64, decimals int, file string) profile.Number {
	return typed(v, decimals, file, m.line+2)
}

func typed(v float64, decimals int, file string, line int) profile.Number {
	n := known2(v, decimals)
	n.Source = &profile.Cell{File: file, Line: line, Column: 1, Text: fmt.Sprintf("%.*f", decimals, n.Value)}
	return n
}

func known2(v float64, decimals int) profile.Number { return profile.Known(round(v, decimals)) }

func round(v float64, decimals int) float64 {
	f := math.Pow(10, float64(decimals))
	return math.Round(v*f) / f
}

// roundTo rounds to significant figures.
func roundTo(v float64, figures int) float64 {
	f := math.Pow(10, float64(figures)-1-math.Floor(math.Log10(math.Abs(v))))
	return math.Round(v*f) / f
}
