package correlate

import "math"

// MobilisedRatio is the strength mobilised in failures over σ′p, of soft
// inorganic clay (Mesri 1975).
const MobilisedRatio = 0.22

const (
	familyNormalised = "strength normalised by stress history"
	familySkempton57 = "vane strength of normally consolidated clay by plasticity"
	simpleShear      = "of simple shear; the mode of shear matters"
)

// overconsolidation is OCR as the strength relations take it.
var overconsolidation = input("OCR").within(1, 20, usualRange).above(0.5)

// strengthByHistory makes su = S·σ′v0·OCR^m with published S and m.
func strengthByHistory(c Correlation, s, m float64) Correlation {
	c.Quantity, c.Family = UndrainedStrength, familyNormalised
	c.Inputs = []Input{input("effective").within(5, 2000, usualRange), overconsolidation}
	c.eval = func(v Values) float64 { return s * v["effective"] * math.Pow(v["OCR"], m) }
	return c
}

// strength holds undrained strength by stress history, and its ratios.
var strength = []Correlation{
	{
		ID: "mesri-1975", Name: "Mesri (1975)", Quantity: UndrainedStrength,
		Formula: "su(mob) = 0.22·σ′p",
		Inputs:  []Input{input("preconsolidation").within(10, 1000, usualRange)},
		Soil:    "soft inorganic clay, failures of embankments", Family: familyMobilised, Rank: 1,
		Scatter: Scatter{Between: 0.31, Within: 0.23, Known: true, Note: openSites("184 depths, 14 sites, strength tests of mixed kind")},
		Source:  "Mesri 1975; Mesri 1989, Can. Geotech. J.", Verified: FormulaRead,
		Cautions: []string{mobilisedCaution, "about 0.26 in organic soil (from memory)"},
		eval:     func(v Values) float64 { return MobilisedRatio * v["preconsolidation"] },
	},
	strengthByHistory(Correlation{
		ID: "jamiolkowski-1985", Name: "Jamiolkowski et al. (1985)",
		Formula: "su = (0.23 ± 0.04)·σ′v0·OCR^0.8", Rank: 1,
		Soil:    "clay of low OCR, PI below 60 %",
		Scatter: Scatter{Between: 0.18, Within: 0.15, Note: "0.23 ± 0.04 as read, between sites; within a site assumed"},
		Source:  "Jamiolkowski, Ladd, Germaine & Lancellotta 1985", Verified: FromMemory,
		Cautions: []string{simpleShear, "0.23 ± 0.04 was read; the exponent is from memory, unverified"},
	}, 0.23, 0.8),
	strengthByHistory(Correlation{
		ID: "ladd-1991-clay", Name: "Ladd (1991), sedimentary clay",
		Formula: "su = (0.22 ± 0.03)·σ′v0·OCR^0.8", Rank: 2,
		Soil:    "sedimentary clay, PI 20 to 80 %",
		Scatter: Scatter{Between: 0.14, Within: 0.15, Note: "±0.03 (from memory) between sites; within a site assumed"},
		Source:  "Ladd 1991, J. Geotech. Eng. ASCE 117(4), table 5", Verified: FromMemory, Cautions: []string{simpleShear},
	}, 0.22, 0.8),
	strengthByHistory(Correlation{
		ID: "ladd-1991-sensitive", Name: "Ladd (1991), sensitive clay",
		Formula: "su = 0.20·σ′v0·OCR^1.0", Rank: 3, Ground: Regional,
		Soil:    "sensitive clay, PI below 30 %, LI above 1.5",
		Scatter: Scatter{Between: 0.15, Within: 0.15, Note: "assumed"},
		Source:  "Ladd 1991, J. Geotech. Eng. ASCE 117(4), table 5", Verified: FromMemory, Cautions: []string{simpleShear},
	}, 0.20, 1.0),
	strengthByHistory(Correlation{
		ID: "ladd-1991-silt", Name: "Ladd (1991), silt and organic soil",
		Formula: "su = (0.25 ± 0.05)·σ′v0·OCR^0.8", Rank: 4, Ground: Organic,
		Soil:    "silt and organic soil, not peat",
		Scatter: Scatter{Between: 0.20, Within: 0.15, Note: "±0.05 (from memory) between sites; within a site assumed"},
		Source:  "Ladd 1991, J. Geotech. Eng. ASCE 117(4), table 5", Verified: FromMemory,
		Cautions: []string{simpleShear, "the exponent 0.8 is taken as for clay"},
	}, 0.25, 0.8),
	{
		ID: "ladd-1991-exponent", Name: "Ladd (1991), exponent from compressibility", Quantity: UndrainedStrength,
		Formula: "su = 0.22·σ′v0·OCR^m, m = 0.88·(1 − Cs/Cc)",
		Inputs:  []Input{input("effective").within(5, 2000, usualRange), overconsolidation, input("Cs"), input("Cc")},
		Soil:    "sedimentary clay, PI 20 to 80 %", Family: familyNormalised, Rank: 5,
		Scatter: Scatter{Between: 0.15, Within: 0.15, Note: "assumed; the exponent is ±0.06 (from memory)"},
		Source:  "Ladd 1991, J. Geotech. Eng. ASCE 117(4), table 5", Verified: FromMemory, Cautions: []string{simpleShear},
		eval: func(v Values) float64 {
			return 0.22 * v["effective"] * math.Pow(v["OCR"], 0.88*(1-v["Cs"]/v["Cc"]))
		},
		guard: func(v Values, value float64) judged {
			if v["Cs"] >= v["Cc"] {
				return judged{refused: "Cs is not below Cc"}
			}
			return judged{value: value}
		},
	},
	{
		ID: "shansep", Name: "Ladd & Foott (1974)", Quantity: UndrainedStrength,
		Formula: "su = S·σ′v0·OCR^m",
		Inputs: []Input{input("S").within(0.1, 0.4, usualRange), input("effective").within(5, 2000, usualRange),
			overconsolidation, input("m").within(0.6, 1.1, usualRange)},
		Soil: "clay with normalised behaviour; S and m from the site's own tests", Family: familyNormalised, Rank: 6,
		Scatter: Scatter{Between: 0.10, Within: 0.15, Note: "assumed, with S and m of the site"},
		Source:  "Ladd & Foott 1974; Ladd 1991; Ladd & DeGroot 2003", Verified: FromMemory,
		Cautions: []string{"S and m are of one kind of test: keep to it"},
		eval: func(v Values) float64 {
			return v["S"] * v["effective"] * math.Pow(v["OCR"], v["m"])
		},
	},
	{
		ID: "dignazio-2016", Name: "D'Ignazio et al. (2016)", Quantity: UndrainedStrength,
		Formula: "su(FV) = 0.296·σ′v0·OCR^0.788·(w/100)^0.337",
		Inputs:  []Input{input("effective").within(5, 500, usualRange), overconsolidation, input("w").within(25, 180, usualRange)},
		Soil:    "soft sensitive Finnish clay, 24 sites", Ground: Regional, Family: familyNormalised, Rank: 7,
		Scatter: Scatter{Between: 0.20, Within: 0.15, Note: "assumed"},
		Source:  "D'Ignazio, Phoon, Tan & Länsivaara 2016, Can. Geotech. J. 53", Verified: AbstractOnly,
		Cautions: []string{"regional; w as a decimal in the original"},
		eval: func(v Values) float64 {
			return 0.296 * v["effective"] * math.Pow(v["OCR"], 0.788) * math.Pow(v["w"]/100, 0.337)
		},
	},
	{
		ID: "skempton-1957", Name: "Skempton (1957)", Quantity: StrengthRatio,
		Formula: "su(FV)/σ′v0 = 0.11 + 0.0037·PI",
		Inputs:  []Input{input("PI").within(5, 100, usualRange)},
		Soil:    "normally consolidated clay", Family: familySkempton57, Rank: 1,
		Scatter: Scatter{Between: 0.25, Within: 0.15, Note: "assumed"},
		Source:  "Skempton 1957", Verified: FromMemory,
		Cautions: []string{
			"levels off near 0.3 above PI 40 by Bjerrum (1973); Hanzawa & Tanaka (1992) found no dependence on PI: the trend is contested",
			"PI in percent: PI 40 gives 0.258",
		},
		eval: func(v Values) float64 { return 0.11 + 0.0037*v["PI"] },
	},
	{
		ID: "larsson-1980", Name: "Larsson (1980)", Quantity: StrengthRatio,
		Formula: "su(FV)/σ′p = 0.08 + 0.0055·PI",
		Inputs:  []Input{input("PI").within(10, 100, usualRange)},
		Soil:    "inorganic Scandinavian clay", Ground: Regional, Family: familySkempton57, Rank: 2,
		Scatter: Scatter{Between: 0.25, Within: 0.15, Note: "assumed"},
		Source:  "Larsson 1980", Verified: FromMemory,
		Cautions: []string{"over σ′p, which is σ′v0 where normally consolidated", "its inverse is sometimes listed as the factor of OCR"},
		eval:     func(v Values) float64 { return 0.08 + 0.0055*v["PI"] },
	},
}
