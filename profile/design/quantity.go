package design

import (
	"math"

	"pastload/profile"
)

// The sides on which a value is unfavourable.
const (
	Low  = "low"
	High = "high"
	Both = "both"
)

// A Governs says which side of a quantity is the cautious one for a check.
type Governs struct {
	Case string `json:"case"`
	Side string `json:"side"` // Low or High
}

// Where a value comes from.
const (
	Measured = "measured"
	Derived  = "derived"
)

// A quantity is a parameter that values are given for, with what is assumed of it.
type quantity struct {
	name, symbol, unit, key string
	origin                  string
	distribution            Distribution
	signed                  bool     // may be zero or less
	cov                     float64  // assumed COV; 0: none is assumed
	covSource               string   // who says so
	annexCOV                float64  // as the second-generation annex indicates it, from memory
	scale                   float64  // vertical scale of fluctuation, m
	parents                 []string // quantities it is derived from: to leave them out leaves it out
	governs                 []Governs
	graded                  bool   // whether a test with a grade gives it, whose weight it can take
	oedometer               bool   // whether EN 1997-2 Annex Q counts its tests
	unsafe                  string // what a low value would be unsafe for
	of                      func(*record) profile.Number
}

// side returns the unfavourable side: Low, High, or Both where checks differ or
// none is named.
func (q *quantity) side() string {
	if len(q.governs) == 0 {
		return Both
	}
	for _, g := range q.governs {
		if g.Side != q.governs[0].Side {
			return Both
		}
	}
	return q.governs[0].Side
}

// Assumed COV where fewer than ten values are there. They are choices of this
// program inside the ranges of Phoon & Kulhawy (1999) and Duncan (2000), both
// from memory, unverified. Scales of fluctuation are the means of Phoon &
// Kulhawy (1999), from memory, unverified: w 5.7 m, LL 5.2 m, unit weight
// 5.2 m, su 2.5 m; the others are taken as the nearest of these.
const (
	covChoice   = "chosen inside published ranges (Phoon & Kulhawy 1999; Duncan 2000), from memory"
	covGuess    = "chosen without a published range"
	scaleIndex  = 5.2
	scaleWater  = 5.7
	scaleStress = 2.5
)

var (
	governsHistory = []Governs{{"settlement", Low}, {"K0, wall pressure and swelling", High}}
	governsVirgin  = []Governs{{"settlement", High}}
	governsSwell   = []Governs{{"settlement on reloading", High}, {"heave", High}}
)

// quantities lists what values are given for, in the order of the output.
// To add one, add a line.
var quantities = []quantity{
	{name: "unit weight", symbol: "γ", unit: "kN/m3", key: "unit_weight_kN_m3", cov: 0.05, covSource: covChoice, annexCOV: 0.075, scale: scaleIndex,
		governs: []Governs{{"load", High}, {"resistance to uplift", Low}},
		of:      func(r *record) profile.Number { return r.result.UnitWeight }},
	{name: "water content", symbol: "w", unit: "%", key: "water_content_pct", cov: 0.15, covSource: covChoice, scale: scaleWater,
		of: func(r *record) profile.Number { return r.orCurve(r.result.WaterContent, curveWater) }},
	{name: "liquid limit", symbol: "LL", unit: "%", key: "liquid_limit_pct", cov: 0.18, covSource: covChoice, scale: scaleIndex,
		of: func(r *record) profile.Number { return r.result.LiquidLimit }},
	{name: "plastic limit", symbol: "PL", unit: "%", key: "plastic_limit_pct", cov: 0.16, covSource: covChoice, scale: scaleIndex,
		of: func(r *record) profile.Number { return r.result.PlasticLimit }},
	{name: "plasticity index", symbol: "PI", unit: "%", key: "plasticity_index_pct", cov: 0.25, covSource: covChoice, scale: scaleIndex,
		parents: []string{"liquid limit", "plastic limit"}, of: plasticity},
	{name: "specific gravity", symbol: "Gs", key: "specific_gravity", cov: 0.02, covSource: covGuess, scale: scaleIndex,
		of: func(r *record) profile.Number { return r.orCurve(r.result.SpecificGravity, curveGravity) }},
	{name: "void ratio", symbol: "e0", key: "void_ratio", cov: 0.12, covSource: covChoice, scale: scaleWater,
		of: voidRatio},

	{name: "preconsolidation stress", symbol: "σ′p", unit: "kPa", key: "preconsolidation_stress_kPa", distribution: LogNormal, cov: 0.25, covSource: covChoice, scale: scaleStress,
		governs: governsHistory, oedometer: true, unsafe: "K0, wall pressure and swelling", graded: true, of: preconsolidation},
	{name: "OCR", symbol: "OCR", key: "ocr", origin: Derived, distribution: LogNormal, cov: 0.25, covSource: covChoice + "; as σ′p", scale: scaleStress,
		parents: []string{"preconsolidation stress"}, governs: governsHistory, unsafe: "K0, wall pressure and swelling", graded: true, of: ratio},
	{name: "POP", symbol: "POP", unit: "kPa", key: "pop_kPa", origin: Derived, signed: true, scale: scaleStress,
		parents: []string{"preconsolidation stress"}, governs: governsHistory, unsafe: "K0, wall pressure and swelling", graded: true, of: difference},

	{name: "compression index", symbol: "Cc", key: "compression_index", distribution: LogNormal, cov: 0.25, covSource: covChoice, annexCOV: 0.45, scale: scaleStress,
		governs: governsVirgin, oedometer: true, of: compression},
	{name: "recompression index", symbol: "Cr", key: "recompression_index", distribution: LogNormal, cov: 0.35, covSource: covGuess, annexCOV: 0.45, scale: scaleStress,
		governs: governsVirgin, of: recompression},
	{name: "swelling index", symbol: "Cs", key: "swelling_index", distribution: LogNormal, cov: 0.35, covSource: covGuess, annexCOV: 0.45, scale: scaleStress,
		governs: governsSwell, unsafe: "heave", of: swelling},
	{name: "compression ratio", symbol: "CR", key: "compression_ratio", origin: Derived, distribution: LogNormal, cov: 0.25, covSource: covChoice + "; as Cc", annexCOV: 0.45, scale: scaleStress,
		parents: []string{"compression index", "void ratio"}, governs: governsVirgin, of: perVolume("compression index", compression)},
	{name: "recompression ratio", symbol: "RR", key: "recompression_ratio", origin: Derived, distribution: LogNormal, cov: 0.35, covSource: covGuess, annexCOV: 0.45, scale: scaleStress,
		parents: []string{"recompression index", "void ratio"}, governs: governsVirgin, of: perVolume("recompression index", recompression)},
	{name: "secondary compression index", symbol: "Cα", key: "secondary_compression_index", distribution: LogNormal, cov: 0.35, covSource: covGuess, annexCOV: 0.45, scale: scaleStress,
		governs: governsVirgin, of: func(r *record) profile.Number { return r.result.SecondaryCompression }},

	{name: "undrained strength", symbol: "su", unit: "kPa", key: "undrained_strength_kPa", cov: 0.25, covSource: covChoice, annexCOV: 0.40, scale: scaleStress,
		governs: []Governs{{"stability and bearing", Low}, {"downdrag and drivability", High}}, unsafe: "downdrag and drivability",
		of: func(r *record) profile.Number { return r.result.UndrainedStrength }},
	{name: "strength ratio", symbol: "su/σ′p", key: "strength_ratio", origin: Derived, distribution: LogNormal, cov: 0.25, covSource: covGuess, scale: scaleStress,
		parents: []string{"undrained strength", "preconsolidation stress"},
		governs: []Governs{{"stability and bearing", Low}, {"downdrag and drivability", High}}, unsafe: "downdrag and drivability", of: strengthRatio},
}

// exact reports whether n is known and is the value itself, not a bound on it.
func exact(n profile.Number) bool { return n.Known && n.Bound == profile.Exact }

func curveWater(c *profile.Curve) profile.Number   { return c.WaterContent }
func curveGravity(c *profile.Curve) profile.Number { return c.SpecificGravity }

func plasticity(r *record) profile.Number {
	if r.result.PlasticityIndex.Known {
		return r.result.PlasticityIndex
	}
	ll, pl := r.decided("liquid limit", r.result.LiquidLimit), r.decided("plastic limit", r.result.PlasticLimit)
	if !exact(ll) || !exact(pl) {
		return profile.Number{}
	}
	return profile.Number{Value: ll.Value - pl.Value, Known: true, Assumed: ll.Assumed || pl.Assumed, Source: ll.Source}
}

func voidRatio(r *record) profile.Number {
	n := r.orCurve(r.result.VoidRatio, func(c *profile.Curve) profile.Number { return c.InitialVoidRatio })
	return r.orSpecimen(n, func(s *profile.Specimen) profile.Number { return s.InitialVoidRatio })
}

func preconsolidation(r *record) profile.Number {
	if r.test == nil || !r.test.Preconsolidation.Known {
		return profile.Number{}
	}
	n := profile.Known(r.test.Preconsolidation.Best)
	n.Bound, n.Source = r.test.Bound, r.result.Preconsolidation.Source
	return n
}

func ratio(r *record) profile.Number {
	if r.test == nil {
		return profile.Number{}
	}
	return bounded(r.test.OCR, r.test.Bound)
}

func difference(r *record) profile.Number {
	if r.test == nil {
		return profile.Number{}
	}
	return bounded(r.test.POP, r.test.Bound)
}

// bounded returns n with the bound of the test that it is derived from.
func bounded(n profile.Number, b profile.Bound) profile.Number {
	n.Bound = b
	return n
}

// compression returns Cc as the laboratory reports it, else as the curve was read.
// Where the curve stopped before its virgin line either is a lower bound, unless
// the engineer keeps it.
func compression(r *record) profile.Number {
	n := r.orSpecimen(r.result.CompressionIndex, func(s *profile.Specimen) profile.Number { return s.CompressionIndex })
	if n.Known && r.read != nil && r.read.Bound == profile.AtLeast && r.decision("compression index", profile.Keep, profile.LeaveOut) == nil {
		n.Bound = profile.AtLeast
	}
	return n
}

func recompression(r *record) profile.Number {
	return r.orSpecimen(r.result.RecompressionIndex, func(s *profile.Specimen) profile.Number { return s.Recompression })
}

func swelling(r *record) profile.Number {
	return r.orSpecimen(r.result.SwellingIndex, func(s *profile.Specimen) profile.Number { return s.Swelling })
}

// perVolume returns an index as a ratio, index/(1 + e0), from one specimen.
func perVolume(name string, index func(*record) profile.Number) func(*record) profile.Number {
	return func(r *record) profile.Number {
		c := r.decided(name, index(r))
		e := r.decided("void ratio", voidRatio(r))
		if !c.Known || !exact(e) || e.Value <= -1 {
			return profile.Number{}
		}
		c.Value, c.Assumed = c.Value/(1+e.Value), c.Assumed || e.Assumed
		return c
	}
}

// strengthRatio divides su by σ′p of the same specimen, or of the nearest test
// of the borehole and stratum within nearTest.
func strengthRatio(r *record) profile.Number {
	su := r.decided("undrained strength", r.result.UndrainedStrength)
	t := r.test
	if t == nil {
		t = r.near
	}
	if !su.Known || t == nil || !t.Preconsolidation.Known || t.Bound != profile.Exact || t.Preconsolidation.Best <= 0 {
		return profile.Number{}
	}
	su.Value /= t.Preconsolidation.Best
	if math.IsInf(su.Value, 0) {
		return profile.Number{}
	}
	return su
}
