package correlate

import "math"

// nagarajCompression and nagarajSwelling are the slopes of the generalised void
// ratio line e/eL = 1.122 − 0.188·log σ′p − 0.0463·log σ′v (stresses in kPa):
// the first is the sum of both slopes, on which the entries below rest.
const (
	nagarajYield       = 0.188
	nagarajSwelling    = 0.0463
	nagarajCompression = nagarajYield + nagarajSwelling
	nagarajIntercept   = 1.122
)

var assumedRecompressionScatter = Scatter{Between: 0.35, Within: 0.25,
	Note: "assumed; the slope depends on the stress range, the unloading and the disturbance"}

// recompression holds rules for the slope of unloading and reloading, per
// log10 cycle of stress.
var recompression = []Correlation{
	{
		ID: "kulhawy-mayne-1990-cs", Name: "Kulhawy & Mayne (1990), swelling", Quantity: RecompressionIndex,
		Formula: "Cs = PI/370",
		Inputs:  []Input{input("PI").within(5, 100, usualRange)},
		Soil:    "insensitive clay; modified Cam clay relation", Family: familyCriticalState, Rank: 1,
		Scatter: assumedRecompressionScatter,
		Source:  "Kulhawy & Mayne 1990, EPRI EL-6800", Verified: Consistent,
		Cautions: []string{"is Cc = PI/74 divided by 5 (plastic strain ratio 0.80 assumed): not independent of it"},
		eval:     func(v Values) float64 { return v["PI"] / 370 },
	},
	{
		ID: "nagaraj-murthy-1985-cs", Name: "Nagaraj & Srinivasa Murthy (1985), swelling", Quantity: RecompressionIndex,
		Formula: "Cs = 0.0463·eL, eL = Gs·LL/100",
		Inputs:  []Input{input("eL").within(0.6, 4.5, usualRange)},
		Soil:    "non-sensitive, saturated clay", Family: familyNagaraj, Rank: 1,
		Scatter: assumedRecompressionScatter,
		Source:  "Nagaraj & Srinivasa Murthy 1985, Geotech. Test. J. 8(4), 199–202", Verified: Consistent,
		Cautions: []string{"implies Cs/Cc = 0.198 for every soil"},
		eval:     func(v Values) float64 { return nagarajSwelling * v["eL"] },
	},
	{
		ID: "nakase-1988-cs", Name: "Nakase et al. (1988), swelling", Quantity: RecompressionIndex,
		Formula: "Cs = 0.00194·(PI − 4.6)",
		Inputs:  []Input{input("PI").within(10, 55, publishedRange).above(4.6)},
		Soil:    "reconstituted Japanese clay", Ground: Reconstituted, Family: familyNakase, Rank: 1,
		Scatter: assumedRecompressionScatter,
		Source:  "Nakase, Kamei & Kusakabe 1988, J. Geotech. Eng. ASCE 114(7), 844–858", Verified: Consistent,
		Cautions: []string{"often credited to Balasubramaniam & Brenner (1981); equals κ = 0.00084·(PI − 4.6), itself from memory, times 2.303"},
		eval:     func(v Values) float64 { return 0.00194 * (v["PI"] - 4.6) },
	},
	{
		ID: "recompression-from-cc", Name: "a fifth to a tenth of Cc", Quantity: RecompressionIndex,
		Formula: "Cr = Cc/5 to Cc/10; the value is Cc/√50",
		Inputs:  []Input{input("Cc")},
		Soil:    "clay", Family: "general practice, share of Cc", Rank: 1,
		Scatter: Scatter{Between: 0.19, Within: 0.10, Note: "assumed; the span of a fifth to a tenth taken as 5 to 95 %"},
		Source:  "general practice; Terzaghi, Peck & Mesri 1996 and others", Verified: FromMemory,
		Cautions: []string{"use an unload–reload loop where there is one: the first loading of a disturbed specimen is too steep"},
		eval:     func(v Values) float64 { return v["Cc"] / math.Sqrt(50) },
	},
}
