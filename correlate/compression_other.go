package correlate

import "math"

const (
	familyNagaraj      = "generalised void ratio of Nagaraj and co-workers"
	familyBurland      = "intrinsic compression of Burland"
	familySkempton     = "Skempton reconstituted clay"
	familyJSIDRE       = "water content over plastic limit, Japanese clays"
	familyNakase       = "Nakase et al. reconstituted clays"
	familySridharan    = "Sridharan & Nagaraj ten soils"
	familyElnaggar     = "Elnaggar & Krizek data"
	familyPeckReed     = "Chicago clay"
	familyOrganicSoils = "water content of organic soil and peat"
)

// compressionReconstituted is for clay prepared as a slurry,
// whose compression is a lower bound for natural structured clay past yield.
var compressionReconstituted = []Correlation{
	{
		ID: "skempton-1944", Name: "Skempton (1944)", Quantity: CompressionIndex,
		Formula: "Cc = 0.007·(LL − 10)",
		Inputs:  []Input{input("LL").within(20, 120, usualRange).above(10)},
		Soil:    "remoulded clay from about its liquid limit", Ground: Reconstituted,
		Family: familySkempton, Rank: 1, Scatter: assumedLiquidLimitScatter,
		Source:   "Skempton 1944, Q. J. Geol. Soc. London 100, 119–135",
		Verified: FromMemory,
		Cautions: []string{
			"the constant is printed as 10 in some texts and as 7 in others, a difference of 0.021 in Cc; unresolved",
			"not for natural structured clay",
		},
		eval: func(v Values) float64 { return 0.007 * (v["LL"] - 10) },
	},
	{
		ID: "nagaraj-murthy-1985-cc", Name: "Nagaraj & Srinivasa Murthy (1985), compression", Quantity: CompressionIndex,
		Formula: "Cc = 0.2343·eL, eL = Gs·LL/100",
		Inputs:  []Input{input("eL").within(0.6, 4.5, usualRange)},
		Soil:    "reconstituted or non-sensitive, saturated clay, σ′v about 25 to 800 kPa", Ground: Reconstituted,
		Family: familyNagaraj, Rank: 1, Scatter: assumedCompressionScatter,
		Source:   "Nagaraj & Srinivasa Murthy 1985, Geotech. Test. J. 8(4), 199–202; 1986, Géotechnique 36(1), 27–32",
		Verified: Consistent,
		Cautions: []string{"a later set of the same authors, 1.23 − 0.276·log σ′v, is not to be mixed with this one"},
		eval:     func(v Values) float64 { return nagarajCompression * v["eL"] },
	},
	{
		ID: "burland-1990-cc", Name: "Burland (1990), intrinsic compression", Quantity: CompressionIndex,
		Formula: "Cc* = 0.256·eL − 0.04",
		// The fit holds for eL 0.6 to 4.5, above the A-line.
		Inputs: []Input{input("eL").from(0.6).upTo(4.5)},
		Soil:   "reconstituted clay, above the A-line", Ground: Reconstituted,
		Family: familyBurland, Rank: 1, Scatter: assumedCompressionScatter,
		Source:   "Burland 1990, Géotechnique 40(3), 329–378",
		Verified: AbstractOnly,
		Cautions: []string{"natural clay past yield is usually much more compressible: a lower bound there"},
		eval:     func(v Values) float64 { return 0.256*v["eL"] - 0.04 },
	},
	{
		ID: "jsidre-193-1998-w", Name: "Trans. JSIDRE 193 (1998), water content", Quantity: CompressionIndex,
		Formula: "Cc' = 0.007·(w0 − PL) + 0.099",
		Inputs:  []Input{input("w"), input("PL")},
		Soil:    "remoulded clay", Ground: Reconstituted,
		Family: familyJSIDRE, Rank: 1,
		Scatter: assumedCompressionScatter,
		Source:  "Trans. Jpn Soc. Irrig. Drain. Reclam. Eng. 1998, No. 193, p. 81 (r = 0.981)", Verified: FormulaRead,
		eval: func(v Values) float64 { return 0.007*(v["w"]-v["PL"]) + 0.099 },
	},
	{
		ID: "jsidre-193-1998-e", Name: "Trans. JSIDRE 193 (1998), void ratio", Quantity: CompressionIndex,
		Formula: "Cc' = 0.302·(e0 − eP) + 0.064, eP = Gs·PL/100",
		Inputs:  []Input{input("e0"), input("eP")},
		Soil:    "remoulded clay", Ground: Reconstituted,
		Family: familyJSIDRE, Rank: 3,
		Scatter: assumedCompressionScatter,
		Source:  "Trans. Jpn Soc. Irrig. Drain. Reclam. Eng. 1998, No. 193, p. 81 (r = 0.976)", Verified: FormulaRead,
		eval: func(v Values) float64 { return 0.302*(v["e0"]-v["eP"]) + 0.064 },
	},
	{
		ID: "jsidre-194-1998", Name: "Trans. JSIDRE 194 (1998)", Quantity: CompressionIndex,
		Formula: "Cc = St^0.22·[0.009·(w0 − PL) + 0.101]",
		Inputs:  []Input{input("St").within(1, 100, usualRange), input("w"), input("PL")},
		Soil:    "undisturbed clay",
		Family:  familyJSIDRE, Rank: 2, Scatter: assumedCompressionScatter,
		Source:   "Trans. Jpn Soc. Irrig. Drain. Reclam. Eng. 1998, No. 194, p. 255 (r = 0.911)",
		Verified: FormulaRead,
		Cautions: []string{"needs a measured sensitivity; the only simple rule here that carries structure"},
		eval: func(v Values) float64 {
			return math.Pow(v["St"], 0.22) * (0.009*(v["w"]-v["PL"]) + 0.101)
		},
	},
	{
		ID: "nakase-1988-cc", Name: "Nakase et al. (1988), compression", Quantity: CompressionIndex,
		Formula: "Cc = 2.303·λ, λ = 0.02 + 0.0045·PI",
		Inputs:  []Input{input("PI").within(5, 55, publishedRange)},
		Soil:    "reconstituted Japanese clay and clay–sand mixes", Ground: Reconstituted,
		Family: familyNakase, Rank: 1, Scatter: assumedCompressionScatter,
		Source:   "Nakase, Kamei & Kusakabe 1988, J. Geotech. Eng. ASCE 114(7), 844–858",
		Verified: FromMemory,
		Cautions: []string{"λ is per natural log cycle, Cc per log10 cycle"},
		eval:     func(v Values) float64 { return math.Ln10 * (0.02 + 0.0045*v["PI"]) },
	},
	{
		ID: "sridharan-nagaraj-2000-pi", Name: "Sridharan & Nagaraj (2000), plasticity index", Quantity: CompressionIndex,
		Formula: "Cc = 0.014·(PI + 3.6)",
		Inputs:  []Input{input("PI").within(5, 60, usualRange)},
		Soil:    "remoulded soil, ten soils", Ground: Reconstituted,
		Family: familySridharan, Rank: 1, Scatter: assumedCompressionScatter,
		Source:   "Sridharan & Nagaraj 2000, Can. Geotech. J. 37, 712–722",
		Verified: AbstractOnly,
		Cautions: []string{"ten soils; pairs with the same liquid limit behaved very differently"},
		eval:     func(v Values) float64 { return 0.014 * (v["PI"] + 3.6) },
	},
	{
		ID: "sridharan-nagaraj-2000-si", Name: "Sridharan & Nagaraj (2000), shrinkage index", Quantity: CompressionIndex,
		Formula: "Cc = 0.007·(LL − SL + 18)",
		Inputs:  []Input{input("LL"), input("SL")},
		Soil:    "remoulded soil, ten soils", Ground: Reconstituted,
		Family: familySridharan, Rank: 2, Scatter: assumedCompressionScatter,
		Source:   "Sridharan & Nagaraj 2000, Can. Geotech. J. 37, 712–722",
		Verified: AbstractOnly,
		Cautions: []string{"ten soils"},
		eval:     func(v Values) float64 { return 0.007 * (v["LL"] - v["SL"] + 18) },
	},
}

var assumedOrganicScatter = Scatter{Between: 0.45, Within: 0.30,
	Note: "assumed; simple measured properties are poor indicators of the compressibility of peat (Price et al. 2005)"}

var compressionOrganic = []Correlation{
	{
		ID: "mesri-ajlouni-2007", Name: "Mesri & Ajlouni (2007)", Quantity: CompressionIndex,
		Formula: "Cc = 0.01·w",
		Inputs:  []Input{input("w").within(100, 1500, usualRange)},
		Soil:    "fibrous peat; published span 0.0065·w to 0.0115·w", Ground: Organic,
		Family: familyOrganicSoils, Rank: 1, Scatter: assumedOrganicScatter,
		Source:   "Mesri & Ajlouni 2007, J. Geotech. Geoenviron. Eng. ASCE 133(7), 851–866",
		Verified: FromMemory,
		Cautions: []string{"at w 500 to 1500 % the scatter of Cc is ±2 or more"},
		eval:     func(v Values) float64 { return 0.01 * v["w"] },
	},
	{
		ID: "moran-1958", Name: "Moran, Proctor, Mueser & Rutledge (1958)", Quantity: CompressionIndex,
		Formula: "Cc = 0.0115·w",
		Inputs:  []Input{input("w").within(50, 1500, usualRange)},
		Soil:    "organic silt and clay, peat", Ground: Organic,
		Family: familyOrganicSoils, Rank: 2, Scatter: assumedOrganicScatter,
		Source:   "Moran, Proctor, Mueser & Rutledge 1958, report to the US Navy",
		Verified: FromMemory,
		eval:     func(v Values) float64 { return 0.0115 * v["w"] },
	},
	{
		ID: "hobbs-1986-bog", Name: "Hobbs (1986), bog peat", Quantity: CompressionIndex,
		Formula: "Cc = 0.0065·w",
		Inputs:  []Input{input("w").within(200, 2000, usualRange)},
		Soil:    "bog peat, British mires", Ground: Organic,
		Family: familyOrganicSoils, Rank: 4, Scatter: assumedOrganicScatter,
		Source:   "Hobbs 1986, Q. J. Eng. Geol. 19, 7–80",
		Verified: FromMemory,
		eval:     func(v Values) float64 { return 0.0065 * v["w"] },
	},
	{
		ID: "hobbs-1986-fen", Name: "Hobbs (1986), fen peat", Quantity: CompressionIndex,
		Formula: "Cc = 0.008·w",
		Inputs:  []Input{input("w").within(200, 2000, usualRange)},
		Soil:    "fen peat, British mires", Ground: Organic,
		Family: familyOrganicSoils, Rank: 3, Scatter: assumedOrganicScatter,
		Source:   "Hobbs 1986, Q. J. Eng. Geol. 19, 7–80",
		Verified: FromMemory,
		eval:     func(v Values) float64 { return 0.008 * v["w"] },
	},
}
