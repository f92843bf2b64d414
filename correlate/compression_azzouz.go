package correlate

const (
	familyAzzouz = "Azzouz et al. data"
	azzouzSource = "Azzouz, Krizek & Corotis 1976, Soils and Foundations 16(2), 19–29"
	azzouzSoil   = "natural clay of all types, mainly Greece and parts of the USA, about 700 tests"
)

// The compression index rules of Azzouz et al., best first: void ratio and
// liquid limit together, then void ratio, then water content; liquid limit
// alone is the poorest of the set (from memory).
var compressionAzzouz = []Correlation{
	{
		ID: "azzouz-1976-e0-ll", Name: "Azzouz et al. (1976), void ratio and liquid limit", Quantity: CompressionIndex,
		Formula: "Cc = 0.37·(e0 + 0.003·LL − 0.34)",
		Inputs:  []Input{input("e0").within(0.5, 2.5, comparedRange), input("LL").within(20, 120, comparedRange)},
		Soil:    azzouzSoil, Family: familyAzzouz, Rank: 1, Scatter: assumedCompressionScatter,
		Source: azzouzSource, Verified: FromMemory,
		Cautions: []string{"ranked best overall on Missouri soils by Onyejekwe et al. (2015)"},
		eval:     func(v Values) float64 { return 0.37 * (v["e0"] + 0.003*v["LL"] - 0.34) },
	},
	{
		ID: "azzouz-1976-e0-ll-w", Name: "Azzouz et al. (1976), three variables", Quantity: CompressionIndex,
		Formula: "Cc = 0.37·(e0 + 0.003·LL + 0.0004·w − 0.34)",
		Inputs: []Input{input("e0").within(0.5, 2.5, comparedRange), input("LL").within(20, 120, comparedRange),
			input("w").within(15, 90, comparedRange)},
		Soil: azzouzSoil, Family: familyAzzouz, Rank: 2, Scatter: assumedCompressionScatter,
		Source: azzouzSource, Verified: FromMemory,
		Cautions: []string{"w and e0 of saturated soil are the same measurement: the third variable adds almost nothing"},
		eval:     func(v Values) float64 { return 0.37 * (v["e0"] + 0.003*v["LL"] + 0.0004*v["w"] - 0.34) },
	},
	{
		ID: "azzouz-1976-e0", Name: "Azzouz et al. (1976), void ratio", Quantity: CompressionIndex,
		Formula: "Cc = 0.40·(e0 − 0.25)",
		Inputs:  []Input{input("e0").within(0.5, 2.5, comparedRange).above(0.25)},
		Soil:    azzouzSoil, Family: familyAzzouz, Rank: 3, Scatter: assumedCompressionScatter,
		Source: azzouzSource, Verified: FromMemory,
		eval: func(v Values) float64 { return 0.40 * (v["e0"] - 0.25) },
	},
	{
		ID: "azzouz-1976-e0-w", Name: "Azzouz et al. (1976), void ratio and water content", Quantity: CompressionIndex,
		Formula: "Cc = 0.40·(e0 + 0.001·w − 0.25)",
		Inputs:  []Input{input("e0").within(0.5, 2.5, comparedRange), input("w").within(15, 90, comparedRange)},
		Soil:    azzouzSoil, Family: familyAzzouz, Rank: 4, Scatter: assumedCompressionScatter,
		Source: azzouzSource, Verified: FromMemory,
		eval: func(v Values) float64 { return 0.40 * (v["e0"] + 0.001*v["w"] - 0.25) },
	},
	{
		ID: "azzouz-1976-w-ll", Name: "Azzouz et al. (1976), water content and liquid limit", Quantity: CompressionIndex,
		Formula: "Cc = 0.009·w + 0.002·LL − 0.10",
		Inputs:  []Input{input("w").within(15, 90, comparedRange), input("LL").within(20, 120, comparedRange)},
		Soil:    azzouzSoil, Family: familyAzzouz, Rank: 5, Scatter: assumedCompressionScatter,
		Source: azzouzSource, Verified: FromMemory,
		eval: func(v Values) float64 { return 0.009*v["w"] + 0.002*v["LL"] - 0.10 },
	},
	{
		ID: "azzouz-1976-w", Name: "Azzouz et al. (1976), water content", Quantity: CompressionIndex,
		Formula: "Cc = 0.01·(w − 5)",
		Inputs:  []Input{input("w").within(15, 90, comparedRange).above(5)},
		Soil:    azzouzSoil, Family: familyAzzouz, Rank: 6, Scatter: assumedCompressionScatter,
		Source: azzouzSource, Verified: FromMemory,
		eval: func(v Values) float64 { return 0.01 * (v["w"] - 5) },
	},
	{
		ID: "azzouz-1976-ll", Name: "Azzouz et al. (1976), liquid limit", Quantity: CompressionIndex,
		Formula: "Cc = 0.006·(LL − 9)",
		Inputs:  []Input{input("LL").within(20, 120, comparedRange).above(9)},
		Soil:    azzouzSoil, Family: familyAzzouz, Rank: 7, Scatter: assumedLiquidLimitScatter,
		Source: azzouzSource, Verified: FromMemory,
		Cautions: []string{"the poorest fit of the set: prefer the rules with void ratio"},
		eval:     func(v Values) float64 { return 0.006 * (v["LL"] - 9) },
	},
}

const copiedAsRecompression = "printed in many lists as recompression index Cr; the numbers are those of Cc/(1 + e0), and as Cr they overstate recompression 2 to 5 times"

// The compression ratio rules of the same data.
var compressionRatioAzzouz = []Correlation{
	{
		ID: "azzouz-1976-cr-e0-ll", Name: "Azzouz et al. (1976), ratio from void ratio and liquid limit", Quantity: CompressionRatio,
		Formula: "CR = Cc/(1 + e0) = 0.126·(e0 + 0.003·LL − 0.06)",
		Inputs:  []Input{input("e0").within(0.5, 2.5, comparedRange), input("LL").within(20, 120, comparedRange)},
		Soil:    azzouzSoil, Family: familyAzzouz, Rank: 1, Scatter: assumedCompressionScatter,
		Source: azzouzSource, Verified: FromMemory, Cautions: []string{copiedAsRecompression},
		eval: func(v Values) float64 { return 0.126 * (v["e0"] + 0.003*v["LL"] - 0.06) },
	},
	{
		ID: "azzouz-1976-cr-e0", Name: "Azzouz et al. (1976), ratio from void ratio", Quantity: CompressionRatio,
		Formula: "CR = Cc/(1 + e0) = 0.14·(e0 + 0.007)",
		Inputs:  []Input{input("e0").within(0.5, 2.5, comparedRange)},
		Soil:    azzouzSoil, Family: familyAzzouz, Rank: 2, Scatter: assumedCompressionScatter,
		Source: azzouzSource, Verified: FromMemory, Cautions: []string{copiedAsRecompression},
		eval: func(v Values) float64 { return 0.14 * (v["e0"] + 0.007) },
	},
	{
		ID: "azzouz-1976-cr-w-ll", Name: "Azzouz et al. (1976), ratio from water content and liquid limit", Quantity: CompressionRatio,
		Formula: "CR = Cc/(1 + e0) = 0.003·w + 0.0006·LL + 0.004",
		Inputs:  []Input{input("w").within(15, 90, comparedRange), input("LL").within(20, 120, comparedRange)},
		Soil:    azzouzSoil, Family: familyAzzouz, Rank: 3, Scatter: assumedCompressionScatter,
		Source: azzouzSource, Verified: FromMemory, Cautions: []string{copiedAsRecompression},
		eval: func(v Values) float64 { return 0.003*v["w"] + 0.0006*v["LL"] + 0.004 },
	},
	{
		ID: "azzouz-1976-cr-w", Name: "Azzouz et al. (1976), ratio from water content", Quantity: CompressionRatio,
		Formula: "CR = Cc/(1 + e0) = 0.003·(w + 7)",
		Inputs:  []Input{input("w").within(15, 90, comparedRange)},
		Soil:    azzouzSoil, Family: familyAzzouz, Rank: 4, Scatter: assumedCompressionScatter,
		Source: azzouzSource, Verified: FromMemory, Cautions: []string{copiedAsRecompression},
		eval: func(v Values) float64 { return 0.003 * (v["w"] + 7) },
	},
	{
		ID: "azzouz-1976-cr-ll", Name: "Azzouz et al. (1976), ratio from liquid limit", Quantity: CompressionRatio,
		Formula: "CR = Cc/(1 + e0) = 0.002·(LL + 9)",
		Inputs:  []Input{input("LL").within(20, 120, comparedRange)},
		Soil:    azzouzSoil, Family: familyAzzouz, Rank: 5, Scatter: assumedLiquidLimitScatter,
		Source: azzouzSource, Verified: FromMemory, Cautions: []string{copiedAsRecompression},
		eval: func(v Values) float64 { return 0.002 * (v["LL"] + 9) },
	},
}
