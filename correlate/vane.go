package correlate

import "math"

const familyVaneFailures = "failures of embankments on soft clay"

var vaneScatter = Scatter{Between: 0.20, Within: 0.10, Note: "assumed; the fits differ by a quarter at PI 40"}

// vaneCorrection holds the factor from the vane as measured to the strength
// mobilised in failures. All rest on much the same failures.
var vaneCorrection = []Correlation{
	{
		ID: "bjerrum-1972", Name: "Bjerrum (1972), fitted", Quantity: VaneCorrection,
		Formula: "μ = 1.7 − 0.54·log PI",
		Inputs:  []Input{input("PI").within(20, 100, usualRange)},
		Soil:    "soft clay, OCR to about 1.5", Family: familyVaneFailures, Rank: 1, Scatter: vaneScatter,
		Source: "Bjerrum 1972, 1973, a common fit to the chart", Verified: FromMemory,
		Cautions: []string{fissuredVane, "base 10"},
		eval:     func(v Values) float64 { return 1.7 - 0.54*math.Log10(v["PI"]) }, guard: vaneLimit,
	},
	{
		ID: "chandler-1988-mu", Name: "Chandler (1988), correction", Quantity: VaneCorrection,
		Formula: "μ = 1.05 − b·√PI, b = 0.015 + 0.0075·log tf, tf in minutes",
		Inputs:  []Input{input("PI").within(5, 120, usualRange), input("tf").within(10, 10000, usualRange)},
		Soil:    "soft clay", Family: familyVaneFailures, Rank: 2, Scatter: vaneScatter,
		Source: "Chandler 1988, ASTM STP 1014, 13–44", Verified: FromMemory,
		Cautions: []string{fissuredVane, "a copy without the root, 1.05 − 0.015·PI, is garbled: negative above PI 70"},
		eval: func(v Values) float64 {
			return 1.05 - (0.015+0.0075*math.Log10(v["tf"]))*math.Sqrt(v["PI"])
		},
		guard: vaneLimit,
	},
	{
		ID: "morris-williams-1994", Name: "Morris & Williams (1994)", Quantity: VaneCorrection,
		Formula: "μ = 1.18·exp(−0.08·PI) + 0.57, PI > 5",
		Inputs:  []Input{input("PI").within(6, 120, usualRange).above(5)},
		Soil:    "soft clay", Family: familyVaneFailures, Rank: 3, Scatter: vaneScatter,
		Source: "Morris & Williams 1994", Verified: FromMemory, Cautions: []string{fissuredVane},
		eval: func(v Values) float64 { return 1.18*math.Exp(-0.08*v["PI"]) + 0.57 }, guard: vaneLimit,
	},
	{
		ID: "larsson-1984", Name: "Larsson et al. (1984)", Quantity: VaneCorrection,
		Formula: "μ = [0.43/(LL/100)]^0.45",
		Inputs:  []Input{input("LL").within(30, 200, usualRange)},
		Soil:    "Swedish clay", Ground: Regional, Family: familyVaneFailures, Rank: 4, Scatter: vaneScatter,
		Source: "Larsson et al. 1984", Verified: FromMemory, Cautions: []string{"regional; LL as a decimal in the original", fissuredVane},
		eval: func(v Values) float64 { return math.Pow(0.43/(v["LL"]/100), 0.45) }, guard: vaneLimit,
	},
}

const (
	fissuredVane = "fissured clay may need 0.3 (EN 1997-2, annex I)"
	vaneMost     = 1.2
)

// vaneLimit warns where EN 1997-2 asks for more evidence.
func vaneLimit(_ Values, value float64) judged {
	j := judged{value: value}
	if value > vaneMost {
		j.warnings = append(j.warnings, "a correction above 1.2 is not to be used without more evidence (EN 1997-2, annex I)")
	}
	return j
}

// sensitivity holds rules from the liquidity index.
var sensitivity = []Correlation{
	{
		ID: "ching-phoon-2012-st", Name: "Ching & Phoon (2012), sensitivity", Quantity: Sensitivity,
		Formula: "St = 20.73·LI^1.910",
		Inputs:  []Input{input("LI").within(0.2, 2, usualRange).above(0).upTo(2)},
		Soil:    "structured clay", Family: familyLiquidityIndex, Rank: 1, Plausibility: true,
		Scatter: Scatter{Between: 0.80, Within: 0.53, Note: "COV 1.28 and bias 0.88 of Ching & Phoon 2014 (from memory), split by assumption"},
		Source:  "Ching & Phoon 2012, Can. Geotech. J. 49(5), 522–545", Verified: FromMemory,
		eval: func(v Values) float64 { return 20.73 * math.Pow(v["LI"], 1.910) },
	},
	{
		ID: "wroth-1979", Name: "Wroth (1979)", Quantity: RemouldedStrength,
		Formula: "su = 170·exp(−4.6·LI), kPa",
		Inputs:  []Input{input("LI").within(0, 1, publishedRange).above(-0.5).upTo(2)},
		Soil:    "remoulded clay", Ground: Reconstituted, Family: familyCriticalState, Rank: 1,
		Scatter: Scatter{Between: 0.5, Within: 0.3, Note: "assumed"},
		Source:  "Wroth 1979; Wroth & Wood 1978, Can. Geotech. J. 15(2), 137–145", Verified: FormulaRead,
		Cautions: []string{"rests on a strength ratio of 100 between the limits, as Cc = 0.5·Gs·PI/100 does; fall cone tests support about 35"},
		eval:     func(v Values) float64 { return 170 * math.Exp(-4.6*v["LI"]) },
	},
}
