package correlate

import "math"

const (
	familyVane       = "field vane"
	uncorrectedVane  = "the vane strength as measured: corrected first, OCR comes out too low at high PI"
	familyMobilised  = "mobilised strength over preconsolidation stress"
	mobilisedCaution = "the mobilised (corrected) strength: not triaxial compression, not the vane as measured"
)

var assumedVaneScatter = Scatter{Between: 0.30, Within: 0.20, Note: "assumed"}

// yieldFromVane holds σ′p and OCR from undrained strength.
var yieldFromVane = []Correlation{
	{
		ID: "mayne-mitchell-1988-yield", Name: "Mayne & Mitchell (1988), σ′p", Quantity: PreconsolidationStress,
		Formula: "σ′p = 7.04·su(FV)^0.83, kPa",
		Inputs:  []Input{input("suFV").within(5, 200, usualRange)},
		Soil:    "soft to stiff clay, 96 clays", Family: familyVane, Rank: 1, Scatter: assumedVaneScatter,
		Source: "Mayne & Mitchell 1988, Can. Geotech. J. 25(1), 150–157", Verified: AbstractOnly,
		Cautions: []string{uncorrectedVane, "kPa only"},
		eval:     func(v Values) float64 { return 7.04 * math.Pow(v["suFV"], 0.83) },
	},
	{
		ID: "hansbo-1957", Name: "Hansbo (1957)", Quantity: PreconsolidationStress,
		Formula: "σ′p = su(FV)/(0.45·LL/100)",
		Inputs:  []Input{input("suFV").within(5, 100, usualRange), input("LL").within(30, 200, usualRange)},
		Soil:    "Scandinavian clay", Ground: Regional, Family: familyVane, Rank: 3, Scatter: assumedVaneScatter,
		Source: "Hansbo 1957; Larsson & Åhnberg 2003, 2005", Verified: FromMemory,
		Cautions: []string{"regional; LL as a decimal in the original", uncorrectedVane},
		eval:     func(v Values) float64 { return v["suFV"] / (0.45 * v["LL"] / 100) },
	},
	{
		ID: "larsson-1980-yield", Name: "Larsson (1980), σ′p", Quantity: PreconsolidationStress,
		Formula: "σ′p = su(FV)/(0.08 + 0.0055·PI)",
		Inputs:  []Input{input("suFV").within(5, 100, usualRange), input("PI").within(10, 100, usualRange)},
		Soil:    "inorganic Scandinavian clay", Ground: Regional, Family: familyVane, Rank: 4, Scatter: assumedVaneScatter,
		Source: "Larsson 1980", Verified: FromMemory, Cautions: []string{"regional", uncorrectedVane},
		eval: func(v Values) float64 { return v["suFV"] / (0.08 + 0.0055*v["PI"]) },
	},
	{
		ID: "mesri-1975-yield", Name: "Mesri (1975), σ′p", Quantity: PreconsolidationStress,
		Formula: "σ′p = su(mob)/0.22",
		Inputs:  []Input{input("su").within(5, 200, usualRange)},
		Soil:    "soft inorganic clay", Family: familyMobilised, Rank: 1,
		Scatter: Scatter{Between: 0.31, Within: 0.23, Known: true, Note: openSites("184 depths, 14 sites, strength tests of mixed kind, median measured over predicted 1.22")},
		Source:  "Mesri 1975; Mesri 1989, Can. Geotech. J.; solved for σ′p", Verified: FormulaRead,
		Cautions: []string{mobilisedCaution},
		eval:     func(v Values) float64 { return v["su"] / MobilisedRatio },
	},
	{
		ID: "mayne-mitchell-1988", Name: "Mayne & Mitchell (1988)", Quantity: OverconsolidationRatio,
		Formula: "OCR = 22·PI^−0.48·su(FV)/σ′v0",
		Inputs:  []Input{input("PI").within(5, 100, usualRange), input("suFV").within(5, 200, usualRange), input("effective").above(5)},
		Soil:    "soft to stiff clay, 96 clays", Family: familyVane, Rank: 1, Scatter: assumedVaneScatter,
		Source: "Mayne & Mitchell 1988, Can. Geotech. J. 25(1), 150–157", Verified: AbstractOnly,
		Cautions: []string{uncorrectedVane, "PI in percent, not the liquidity index"},
		eval: func(v Values) float64 {
			return 22 * math.Pow(v["PI"], -0.48) * v["suFV"] / v["effective"]
		},
	},
	{
		ID: "chandler-1988", Name: "Chandler (1988)", Quantity: OverconsolidationRatio,
		Formula: "OCR = [(su(FV)/σ′v0)/S1]^(1/0.95), S1 from Bjerrum's young clay curve",
		Inputs: []Input{input("suFV").within(5, 200, usualRange), input("effective").above(5),
			input("S1").within(0.1, 0.5, usualRange)},
		Soil: "clay of ordinary sensitivity", Family: familyVane, Rank: 2, Scatter: assumedVaneScatter,
		Source: "Chandler 1988, ASTM STP 1014, 13–44", Verified: FormulaRead,
		Cautions: []string{"S1 is read off the chart at the PI of the clay", "the exponent 0.95 is often dropped", uncorrectedVane},
		eval: func(v Values) float64 {
			return math.Pow(v["suFV"]/v["effective"]/v["S1"], 1/0.95)
		},
	},
	{
		ID: "shansep-ocr", Name: "Ladd & Foott (1974), solved for OCR", Quantity: OverconsolidationRatio,
		Formula: "OCR = [su/(S·σ′v0)]^(1/m)",
		Inputs: []Input{input("su"), input("effective").above(5), input("S").within(0.1, 0.4, usualRange),
			input("m").within(0.6, 1.1, usualRange).above(0.3)},
		Soil: "clay with normalised behaviour", Family: familyMobilised, Rank: 1,
		Scatter: Scatter{Between: 0.25, Within: 0.20, Note: "assumed"},
		Source:  "Ladd & Foott 1974; Ladd 1991", Verified: FromMemory,
		Cautions: []string{"S and m must be of the kind of test that measured su"},
		eval: func(v Values) float64 {
			return math.Pow(v["su"]/(v["S"]*v["effective"]), 1/v["m"])
		},
	},
}
