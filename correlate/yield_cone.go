package correlate

import "math"

// The factors on the cone values that σ′p is commonly taken from.
const (
	NetConeFactor        = 0.33 // of qt − σv0; 0.305 and 0.29 are in print too
	ExcessPressureFactor = 0.53 // of u2 − u0
	EffectiveConeFactor  = 0.60 // of qt − u2
)

const (
	familyNetCone       = "net cone resistance"
	familyExcessCone    = "excess cone pore pressure"
	familyEffectiveCone = "effective cone resistance"
	shallowCone         = 10 // kPa of σ′v0, below which ratios of cone values to it mean nothing
	qtNotQc             = "qt corrected for pore pressure, not qc; σv0 total, σ′v0 effective"
	dilativeClay        = "not for fissured or dilative clay, where u2 is low or negative"
)

// NetConeScatter is the scatter of σ′p from the net cone resistance.
var NetConeScatter = Scatter{Between: 0.30, Within: 0.20, Known: true,
	Note: openSites("180 depths, 13 sites, median measured over predicted 0.94")}

// A rule with another factor has the same scatter and another median; one with
// another exponent was not tried on the data.
var (
	otherFactorScatter = Scatter{Between: 0.30, Within: 0.20, Known: true,
		Note: openSites("180 depths, 13 sites; as for 0.33·(qt − σv0), whatever the factor")}
	otherExponentScatter = Scatter{Between: 0.30, Within: 0.20, Note: "assumed as for 0.33·(qt − σv0)"}
)

// yieldFromCone holds σ′p from the piezocone.
var yieldFromCone = []Correlation{
	{
		ID: "mayne-1995-qnet", Name: "Mayne (1995), net resistance", Quantity: PreconsolidationStress,
		Formula: "σ′p = 0.33·(qt − σv0)",
		Inputs:  []Input{input("qnet").within(50, 10000, usualRange)},
		Soil:    "intact clay of low to medium sensitivity", Family: familyNetCone, Rank: 1, Scatter: NetConeScatter,
		Source: "Mayne 1995; Mayne 2007, NCHRP Synthesis 368", Verified: FromMemory,
		Cautions: []string{qtNotQc, "0.33, 0.305 and 0.29 are all in print: calibrate on the site's own oedometers"},
		eval:     func(v Values) float64 { return NetConeFactor * v["qnet"] },
	},
	{
		ID: "chen-mayne-1996-qnet", Name: "Chen & Mayne (1996), net resistance", Quantity: PreconsolidationStress,
		Formula: "σ′p = 0.305·(qt − σv0)",
		Inputs:  []Input{input("qnet").within(50, 10000, usualRange)},
		Soil:    "clay, 205 sites", Family: familyNetCone, Rank: 2, Scatter: otherFactorScatter,
		Source: "Chen & Mayne 1996, Can. Geotech. J. 33(3), 488–498", Verified: FromMemory, Cautions: []string{qtNotQc},
		eval: func(v Values) float64 { return 0.305 * v["qnet"] },
	},
	{
		ID: "demers-leroueil-2002", Name: "Demers & Leroueil (2002)", Quantity: PreconsolidationStress,
		Formula: "σ′p = (qt − σv0)/3.4",
		Inputs:  []Input{input("qnet").within(50, 10000, usualRange)},
		Soil:    "Québec clay", Ground: Regional, Family: familyNetCone, Rank: 4, Scatter: otherFactorScatter,
		Source: "Demers & Leroueil 2002", Verified: FromMemory, Cautions: []string{"regional", qtNotQc},
		eval: func(v Values) float64 { return v["qnet"] / 3.4 },
	},
	{
		ID: "mayne-2009", Name: "Mayne et al. (2009)", Quantity: PreconsolidationStress,
		Formula: "σ′p = 0.33·(qt − σv0)^m′·(pa/100)^(1 − m′), kPa; m′ = 1 − 0.28/[1 + (Ic/2.65)^25]",
		Inputs:  []Input{input("qnet").within(50, 50000, usualRange), input("Ic").within(1, 4, usualRange)},
		Soil:    "all soils, first order", Family: familyNetCone, Rank: 3,
		Scatter: Scatter{Between: 0.40, Within: 0.25, Note: "assumed, wider than for clay alone"},
		Source:  "Mayne, Coop, Springman, Huang & Zornberg 2009; exponent by Agaiby & Mayne 2019", Verified: FromMemory,
		Cautions: []string{"in kPa throughout: MPa with an exponent of 0.72 is wrong 7 times", qtNotQc},
		eval: func(v Values) float64 {
			m := 1 - 0.28/(1+math.Pow(v["Ic"]/2.65, 25))
			return 0.33 * math.Pow(v["qnet"], m) * math.Pow(Atmospheric/100, 1-m)
		},
	},
	{
		ID: "larsson-mulabdic-1991", Name: "Larsson & Mulabdić (1991)", Quantity: PreconsolidationStress,
		Formula: "σ′p = (qt − σv0)/(1.21 + 4.4·LL/100)",
		Inputs:  []Input{input("qnet").within(50, 10000, usualRange), input("LL").within(30, 200, usualRange)},
		Soil:    "Swedish clay and gyttja", Ground: Regional, Family: familyNetCone, Rank: 5,
		Scatter: Scatter{Between: 0.25, Within: 0.20, Note: "assumed"},
		Source:  "Larsson & Mulabdić 1991; Larsson & Åhnberg 2005", Verified: FromMemory,
		Cautions: []string{"regional; LL as a decimal in the original", qtNotQc},
		eval:     func(v Values) float64 { return v["qnet"] / (1.21 + 4.4*v["LL"]/100) },
	},
	{
		ID: "chen-mayne-1996-du2", Name: "Chen & Mayne (1996), excess pore pressure", Quantity: PreconsolidationStress,
		Formula: "σ′p = 0.53·(u2 − u0)",
		Inputs:  []Input{input("du2").within(20, 5000, usualRange).above(0)},
		Soil:    "intact clay, u2 positive", Family: familyExcessCone, Rank: 1,
		Scatter: Scatter{Between: 0.34, Within: 0.33, Known: true, Note: openSites("180 depths, 13 sites, median measured over predicted 0.97")},
		Source:  "Chen & Mayne 1996, Can. Geotech. J. 33(3), 488–498; Mayne 2007", Verified: FromMemory, Cautions: []string{dilativeClay},
		eval: func(v Values) float64 { return ExcessPressureFactor * v["du2"] },
	},
	{
		ID: "mayne-2005-qeff", Name: "Mayne (2005), effective resistance", Quantity: PreconsolidationStress,
		Formula: "σ′p = 0.60·(qt − u2)",
		Inputs:  []Input{input("qeff").within(30, 10000, usualRange).above(0)},
		Soil:    "intact clay", Family: familyEffectiveCone, Rank: 1,
		Scatter: Scatter{Between: 0.38, Within: 0.23, Known: true, Note: openSites("197 depths, 14 sites, median measured over predicted 0.81")},
		Source:  "Mayne 2005, 2007", Verified: FromMemory,
		Cautions: []string{"0.50 to 0.53 in some papers for the ratio form", dilativeClay},
		eval:     func(v Values) float64 { return EffectiveConeFactor * v["qeff"] },
	},
}

// ratioFromCone holds OCR from the normalised cone resistance
// Q = (qt − σv0)/σ′v0.
var ratioFromCone = []Correlation{
	{
		ID: "kulhawy-mayne-1990-q", Name: "Kulhawy & Mayne (1990), cone", Quantity: OverconsolidationRatio,
		Formula: "OCR = 0.33·Q, Q = (qt − σv0)/σ′v0",
		Inputs:  []Input{input("Q").within(1, 50, usualRange), nearSurface},
		Soil:    "intact clay; the factor spans 0.2 to 0.5, higher in aged and heavily overconsolidated clay",
		Family:  familyNetCone, Rank: 1, Scatter: otherFactorScatter,
		Source: "Kulhawy & Mayne 1990, EPRI EL-6800; Lunne, Robertson & Powell 1997; Powell et al. 1988", Verified: FromMemory,
		Cautions: []string{qtNotQc, "the span 0.2 to 0.5 with a mean near 0.3 was read in a secondary source: calibrate on the site's own oedometers"},
		eval:     func(v Values) float64 { return NetConeFactor * v["Q"] },
	},
	{
		ID: "chen-mayne-1996-q", Name: "Chen & Mayne (1996), normalised resistance", Quantity: OverconsolidationRatio,
		Formula: "OCR = 0.259·Q^1.107",
		Inputs:  []Input{input("Q").within(1, 50, usualRange), nearSurface},
		Soil:    "clay, 205 sites", Family: familyNetCone, Rank: 2, Scatter: otherExponentScatter,
		Source: "Chen & Mayne 1996, Can. Geotech. J. 33(3), 488–498", Verified: FromMemory, Cautions: []string{qtNotQc},
		eval: func(v Values) float64 { return 0.259 * math.Pow(v["Q"], 1.107) },
	},
	{
		ID: "robertson-2009", Name: "Robertson (2009)", Quantity: OverconsolidationRatio,
		Formula: "OCR = 0.25·Q^1.25",
		Inputs:  []Input{input("Q").within(1, 50, usualRange), nearSurface},
		Soil:    "clay", Family: familyNetCone, Rank: 3, Scatter: otherExponentScatter,
		Source: "Robertson 2009, 2012", Verified: FromMemory,
		Cautions: []string{qtNotQc, "equals 0.33·Q at Q 3 and is 35 % higher at Q 10"},
		eval:     func(v Values) float64 { return 0.25 * math.Pow(v["Q"], 1.25) },
	},
	{
		ID: "karlsrud-2005-low", Name: "Karlsrud et al. (2005), St below 15", Quantity: OverconsolidationRatio,
		Formula: "OCR = (Q/3)^1.20, St < 15",
		Inputs:  []Input{input("Q").within(2, 20, usualRange), input("St").below(15), nearSurface},
		Soil:    "soft to medium Norwegian-type clay, PI 10 to 50 %, 17 sites, block samples", Ground: Regional,
		Family: familyNetCone, Rank: 4, Scatter: Scatter{Between: 0.25, Within: 0.20, Note: "assumed"},
		Source: "Karlsrud, Lunne, Kort & Strandvik 2005, 16th Int. Conf. Soil Mech. Geotech. Eng.", Verified: AbstractOnly,
		Cautions: []string{blockSamples, qtNotQc},
		eval:     func(v Values) float64 { return math.Pow(v["Q"]/3, 1.20) },
	},
	{
		ID: "karlsrud-2005-high", Name: "Karlsrud et al. (2005), St above 15", Quantity: OverconsolidationRatio,
		Formula: "OCR = (Q/2)^1.11, St > 15",
		Inputs:  []Input{input("Q").within(2, 20, usualRange), input("St").above(15), nearSurface},
		Soil:    "soft to medium sensitive Norwegian-type clay, PI 10 to 50 %, 17 sites, block samples", Ground: Regional,
		Family: familyNetCone, Rank: 5, Scatter: Scatter{Between: 0.25, Within: 0.20, Note: "assumed"},
		Source: "Karlsrud, Lunne, Kort & Strandvik 2005, 16th Int. Conf. Soil Mech. Geotech. Eng.", Verified: AbstractOnly,
		Cautions: []string{blockSamples, qtNotQc},
		eval:     func(v Values) float64 { return math.Pow(v["Q"]/2, 1.11) },
	},
}

// nearSurface refuses ratios to σ′v0 where it is almost nothing.
var nearSurface = input("effective").above(shallowCone).ifKnown()

const blockSamples = "the reference σ′p is from block samples: it looks high beside tube samples"
