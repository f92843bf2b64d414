package correlate

import "slices"

// compressionRatio holds rules for CR = Cc/(1 + e0).
var compressionRatio = slices.Concat(compressionRatioAzzouz, []Correlation{
	{
		ID: "elnaggar-krizek-1970", Name: "Elnaggar & Krizek (1970)", Quantity: CompressionRatio,
		Formula: "CR = Cc/(1 + e0) = 0.156·e0 + 0.0107",
		Inputs:  []Input{input("e0").within(0.5, 2.5, comparedRange)},
		Soil:    "clay of all types", Family: familyElnaggar, Rank: 1, Scatter: assumedCompressionScatter,
		Source: "Elnaggar & Krizek 1970", Verified: FromMemory,
		Cautions: []string{"a compression ratio, not Cc"},
		eval:     func(v Values) float64 { return 0.156*v["e0"] + 0.0107 },
	},
	{
		ID: "peck-reed-1954", Name: "Peck & Reed (1954)", Quantity: CompressionRatio,
		Formula: "CR = Cc/(1 + e0) = 0.208·e0 + 0.0083",
		Inputs:  []Input{input("e0").within(0.5, 1.5, usualRange)},
		Soil:    "Chicago clay", Ground: Regional, Family: familyPeckReed, Rank: 1, Scatter: assumedCompressionScatter,
		Source: "Peck & Reed 1954, as tabulated", Verified: FromMemory,
		Cautions: []string{"regional; a compression ratio, not Cc"},
		eval:     func(v Values) float64 { return 0.208*v["e0"] + 0.0083 },
	},
	{
		ID: "nagaraj-1988", Name: "Nagaraj, Joshi & Srinivasa Murthy (1988)", Quantity: CompressionRatio,
		Formula: "CR = Cc/(1 + e) = 0.003·LL",
		Inputs:  []Input{input("LL").within(40, 200, usualRange)},
		Soil:    "normally consolidated, saturated, highly compressible soil", Family: familyNagaraj, Rank: 1,
		Scatter: assumedLiquidLimitScatter,
		Source:  "Nagaraj, Joshi & Srinivasa Murthy 1988, J. Test. Eval. 16(1)", Verified: FormulaRead,
		Cautions: []string{"a compression ratio, not Cc"},
		eval:     func(v Values) float64 { return 0.003 * v["LL"] },
	},
})
