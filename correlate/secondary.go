package correlate

import "math"

const (
	secondarySource  = "Mesri & Godlewski 1977, J. Geotech. Eng. Div. ASCE 103(5); Terzaghi, Peck & Mesri 1996, table 16.1"
	secondaryCaution = "Cc is the tangent slope at the stress in question, small below σ′p and largest just past it: the virgin Cc below σ′p overstates creep 5 to 10 times"
)

// secondaryEntry makes the entry of one soil class of the Cα/Cc concept. The
// spread is the published ± taken as one standard deviation.
func secondaryEntry(id, soil string, ground Ground, ratio float64, formula string) Correlation {
	return Correlation{
		ID: "mesri-godlewski-1977-" + id, Name: "Mesri & Godlewski (1977), " + soil, Quantity: SecondaryIndex,
		Formula: formula, Inputs: []Input{input("Cc")}, Soil: soil, Ground: ground,
		Family: "Cα/Cc of Mesri and co-workers", Rank: 1,
		Scatter: Scatter{Between: 0.01 / ratio, Within: 0.1, Note: "published ±0.01 of the ratio (from memory) between soils; 0.1 within a site assumed"},
		Source:  secondarySource, Verified: AbstractOnly, Cautions: []string{secondaryCaution},
		eval: func(v Values) float64 { return ratio * v["Cc"] },
	}
}

// secondary holds rules for secondary compression, per log10 cycle of time.
var secondary = []Correlation{
	secondaryEntry("clay", "inorganic clay and silt", NaturalClay, 0.04, "Cα = (0.04 ± 0.01)·Cc"),
	secondaryEntry("organic", "organic clay and silt", Regional, 0.05, "Cα = (0.05 ± 0.01)·Cc"),
	secondaryEntry("peat", "peat and muskeg", Organic, 0.06, "Cα = (0.06 ± 0.01)·Cc"),
	secondaryEntry("granular", "granular soil with rockfill", Regional, 0.02, "Cα = (0.02 ± 0.01)·Cc"),
	secondaryEntry("shale", "shale and mudstone", Regional, 0.03, "Cα = (0.03 ± 0.01)·Cc"),
	{
		ID: "mesri-1973", Name: "Mesri (1973)", Quantity: SecondaryStrain,
		Formula: "Cαε = 0.0001·w, w in percent",
		Inputs:  []Input{input("w").within(10, 1000, usualRange)},
		Soil:    "normally consolidated soil over a wide range of water content",
		Family:  "water content chart of Mesri", Rank: 1,
		Scatter: Scatter{Between: 0.50, Within: 0.25, Note: "a chart on log axes with a scatter of 2 to 3 times either way (from memory)"},
		Source:  "Mesri 1973, J. Soil Mech. Found. Div. ASCE 99(SM1); NAVFAC DM 7.1", Verified: FromMemory,
		Cautions: []string{"strain per log cycle of time, on the height at the start of it: pairs with no Cα/Cc"},
		eval:     func(v Values) float64 { return 0.0001 * v["w"] },
	},
	{
		ID: "mesri-choi-1979", Name: "Mesri & Choi (1979)", Quantity: AgeingRatio,
		Formula: "σ′p/σ′v0 = (t/tp)^[(Cα/Cc)/(1 − Cr/Cc)]",
		Inputs:  []Input{input("ageing").within(1, 1e5, usualRange), input("CaCc").within(0.02, 0.08, usualRange), input("Cr"), input("Cc")},
		Soil:    "normally consolidated clay aged at constant stress",
		Family:  "ageing by secondary compression", Rank: 1,
		Scatter: Scatter{Between: 0.10, Within: 0.05, Note: "assumed"},
		Source:  "Mesri & Choi 1979", Verified: FromMemory,
		Cautions: []string{"explains a ratio of 1.2 to 1.6 without any removed load"},
		eval: func(v Values) float64 {
			return math.Pow(v["ageing"], v["CaCc"]/(1-v["Cr"]/v["Cc"]))
		},
		guard: func(v Values, value float64) judged {
			if v["Cr"] >= v["Cc"] {
				return judged{refused: "Cr is not below Cc"}
			}
			return judged{value: value}
		},
	},
}

// intrinsic holds what Burland's intrinsic compression gives beside Cc*.
var intrinsic = []Correlation{
	{
		ID: "burland-1990-e100", Name: "Burland (1990), intrinsic void ratio", Quantity: IntrinsicVoidRatio,
		Formula: "e*100 = 0.109 + 0.679·eL − 0.089·eL² + 0.016·eL³",
		Inputs:  []Input{input("eL").from(0.6).upTo(4.5)},
		Soil:    "reconstituted clay, above the A-line", Ground: Reconstituted, Family: familyBurland, Rank: 1,
		Scatter: Scatter{Between: 0.05, Within: 0.05, Note: "assumed"},
		Source:  "Burland 1990, Géotechnique 40(3), 329–378", Verified: AbstractOnly,
		eval: func(v Values) float64 {
			e := v["eL"]
			return 0.109 + e*(0.679+e*(-0.089+e*0.016))
		},
	},
	{
		ID: "burland-1990-icl", Name: "Burland (1990), intrinsic compression line", Quantity: VoidIndex,
		Formula: "Iv = 2.45 − 1.285·x + 0.015·x³, x = log σ′v (kPa); Iv = (e − e*100)/Cc*",
		Inputs:  []Input{input("effective").within(10, 10000, publishedRange).above(1)},
		Soil:    "reconstituted clay", Ground: Reconstituted, Family: familyBurland, Rank: 1,
		Scatter: Scatter{Between: 0.05, Within: 0.05, Note: "assumed; not drawn, as the index passes through zero"},
		Source:  "Burland 1990, Géotechnique 40(3), 329–378; definition in Chandler 2000", Verified: Consistent,
		Cautions: []string{"natural clay lies well above this line"},
		eval: func(v Values) float64 {
			x := math.Log10(v["effective"])
			return 2.45 - 1.285*x + 0.015*x*x*x
		},
	},
}
