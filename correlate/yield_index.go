package correlate

import "math"

// Atmospheric is the pressure that normalises stresses, in kPa. Some texts take
// 100 kPa; the difference is 1.3 %.
const Atmospheric = 101.3

const (
	familyLiquidityIndex = "liquidity index"
	familyIndexStress    = "index properties with the stress today"
	weakYield            = "an order of magnitude at best: never a design value"
)

// yieldFromIndex holds σ′p from index properties: a plausibility check, no more.
var yieldFromIndex = []Correlation{
	{
		ID: "stas-kulhawy-1984", Name: "Stas & Kulhawy (1984)", Quantity: PreconsolidationStress,
		Formula: "σ′p = pa·10^(1.11 − 1.62·LI)",
		Inputs:  []Input{input("LI").within(0.05, 1.2, usualRange).above(0).upTo(2), input("effective").ifKnown()},
		Soil:    "clay of sensitivity 1 to 10", Family: familyLiquidityIndex, Rank: 2, Plausibility: true,
		Scatter: Scatter{Between: 1.27, Within: 0.71, Known: true, Note: openSites("177 depths with LI to 2, 15 sites, median measured over predicted 2.00; 1.81 and 0.96 on all 199 depths")},
		Source:  "Stas & Kulhawy 1984, EPRI EL-3771", Verified: FromMemory,
		Cautions: []string{weakYield, "0.1 in LI changes σ′p by 45 %", "the exponent is of base 10"},
		eval:     func(v Values) float64 { return Atmospheric * math.Pow(10, 1.11-1.62*v["LI"]) },
		guard:    notBelowToday,
	},
	{
		ID: "degroot-1999", Name: "DeGroot, Knudsen & Lunne (1999)", Quantity: PreconsolidationStress,
		Formula: "σ′p = 10^(2.90 − 0.96·LI), kPa",
		Inputs:  []Input{input("LI").within(0.3, 1.5, publishedRange).above(0).upTo(2), input("effective").ifKnown()},
		Soil:    "offshore clay", Family: familyLiquidityIndex, Rank: 3, Plausibility: true,
		Scatter: Scatter{Between: 1.0, Within: 0.6, Note: "assumed, from the scatter of other rules with LI"},
		Source:  "DeGroot, Knudsen & Lunne 1999", Verified: FromMemory,
		Cautions: []string{weakYield, "about 2.8 times Stas & Kulhawy at LI 1"},
		eval:     func(v Values) float64 { return math.Pow(10, 2.90-0.96*v["LI"]) },
		guard:    notBelowToday,
	},
	{
		ID: "ching-phoon-2012-yield", Name: "Ching & Phoon (2012), σ′p", Quantity: PreconsolidationStress,
		Formula: "σ′p = 0.235·pa·LI^−1.319·St^0.536",
		Inputs: []Input{input("LI").within(0.2, 2, usualRange).above(0).upTo(2),
			input("St").within(1, 100, usualRange), input("effective").ifKnown()},
		Soil: "structured clay, OCR mostly below 4 (345 points, 37 sites)", Family: familyLiquidityIndex, Rank: 1, Plausibility: true,
		Scatter: Scatter{Between: 0.55, Within: 0.42, Note: "COV 0.78 and bias 1.32 of Ching & Phoon 2014 (from memory), split by assumption"},
		Source:  "Ching & Phoon 2012, Can. Geotech. J. 49(5), 522–545", Verified: AbstractOnly,
		Cautions: []string{weakYield},
		eval: func(v Values) float64 {
			return 0.235 * Atmospheric * math.Pow(v["LI"], -1.319) * math.Pow(v["St"], 0.536)
		},
		guard: notBelowToday,
	},
	{
		ID: "nagaraj-murthy-1986", Name: "Nagaraj & Srinivasa Murthy (1986)", Quantity: PreconsolidationStress,
		Formula: "log σ′p = (1.122 − e0/eL − 0.0463·log σ′v0)/0.188, kPa",
		Inputs:  []Input{input("e0eL").within(0.3, 0.9, usualRange).below(1), input("effective").within(25, 800, usualRange)},
		Soil:    "saturated, uncemented, non-sensitive clay", Family: familyNagaraj, Rank: 1, Plausibility: true,
		Scatter: Scatter{Between: 0.8, Within: 0.5, Note: "assumed; 0.05 in w/LL changes σ′p 1.85 times"},
		Source:  "Nagaraj & Srinivasa Murthy 1985, Geotech. Test. J. 8(4); 1986, Géotechnique 36(1), 27–32", Verified: Consistent,
		Cautions: []string{weakYield, "kPa only"},
		eval: func(v Values) float64 {
			return math.Pow(10, (nagarajIntercept-v["e0eL"]-nagarajSwelling*math.Log10(v["effective"]))/nagarajYield)
		},
		guard: notBelowToday,
	},
	{
		ID: "kootahi-mayne-2016", Name: "Kootahi & Mayne (2016)", Quantity: PreconsolidationStress,
		Formula: "DS = 5.152·log(σ′v0/pa) − 0.061·LL − 0.093·PL + 6.219·e0; DS > 1.123: σ′p = 1.62·pa^0.11·σ′v0^0.89·LL^0.12·w^−0.14; else σ′p = 7.94·pa^0.29·σ′v0^0.71·LL^0.53·w^−0.71",
		Inputs: []Input{input("effective").within(10, 2000, usualRange), input("LL").within(20, 150, usualRange),
			input("PL").within(10, 60, usualRange), input("w").within(15, 150, usualRange), input("e0")},
		Soil: "clay, worldwide, in two groups", Family: familyIndexStress, Rank: 1, Plausibility: true,
		Scatter: Scatter{Between: 0.35, Within: 0.25, Note: "assumed"},
		Source:  "Kootahi & Mayne 2016, J. Geotech. Geoenviron. Eng. ASCE 142(10)", Verified: FromMemory,
		Cautions: []string{weakYield, "σ′v0 is on both sides: a good fit partly says that σ′p follows depth"},
		eval:     kootahiMayne,
		guard:    notBelowToday,
	},
}

func kootahiMayne(v Values) float64 {
	s := v["effective"]
	if 5.152*math.Log10(s/Atmospheric)-0.061*v["LL"]-0.093*v["PL"]+6.219*v["e0"] > 1.123 {
		return 1.62 * math.Pow(Atmospheric, 0.11) * math.Pow(s, 0.89) * math.Pow(v["LL"], 0.12) * math.Pow(v["w"], -0.14)
	}
	return 7.94 * math.Pow(Atmospheric, 0.29) * math.Pow(s, 0.71) * math.Pow(v["LL"], 0.53) * math.Pow(v["w"], -0.71)
}

// notBelowToday refuses a σ′p from index properties below the stress today: it
// says that the rule does not apply, not that the ground is underconsolidated.
func notBelowToday(v Values, value float64) judged {
	if s := v["effective"]; value < s {
		return judged{refused: "gives σ′p " + amount(value, "kPa") + " below today's σ′v0 " + amount(s, "kPa") +
			": a sign that the rule does not apply here, not that the ground is underconsolidated"}
	}
	return judged{value: value}
}

// openSites words the source of the scatter figures that were computed from
// open data.
func openSites(what string) string {
	return "computed on open data of natural clay sites (subset of CLAY/10/7490, Ching & Phoon 2014): " + what
}
