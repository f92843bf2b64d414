package correlate

import "math"

const (
	familyFriction   = "friction angle, first loading"
	familyPlasticity = "plasticity index, first loading"
	familyUnloading  = "friction angle with unloading"
)

var (
	assumedAtRestScatter = Scatter{Between: 0.12, Within: 0.08, Note: "assumed"}

	friction = input("phi").within(15, 45, usualRange)
	// firstLoading refuses rules for first loading where the ground is known to
	// be unloaded.
	firstLoading = input("OCR").within(0.8, 1.2, "first loading").below(2).ifKnown()
)

func sine(degrees float64) float64 { return math.Sin(degrees * math.Pi / 180) }

// atRest holds the coefficient of earth pressure at rest, K0.
var atRest = []Correlation{
	{
		ID: "mayne-kulhawy-1982", Name: "Mayne & Kulhawy (1982)", Quantity: EarthPressureCoefficient,
		Formula: "K0 = (1 − sin φ′)·OCR^(sin φ′), at most Kp",
		Inputs:  []Input{friction, input("OCR").within(1, 30, usualRange).above(0.5)},
		Soil:    "clay and sand that was unloaded, over 170 soils", Family: familyUnloading, Rank: 1, Scatter: Scatter{Between: 0.15, Within: 0.10, Note: "assumed"},
		Source: "Mayne & Kulhawy 1982, J. Geotech. Eng. Div. ASCE 108(6), 851–872", Verified: FromMemory,
		Cautions: []string{"unloading only: reloading needs their second expression; not for cemented or aged clay", "the exponent is sin φ′: √OCR is the code form"},
		eval: func(v Values) float64 {
			s := sine(v["phi"])
			return (1 - s) * math.Pow(math.Max(v["OCR"], 1), s)
		},
		guard: unloading,
	},
	{
		ID: "en1997-k0", Name: "EN 1997-1 (2004), 9.5.2", Quantity: EarthPressureCoefficient,
		Formula: "K0 = (1 − sin φ′)·√OCR·(1 + sin β), at most Kp",
		Inputs:  []Input{friction, input("OCR").within(1, 30, usualRange).above(0.5), input("beta").ifKnown()},
		Soil:    "ground at the slope β, level where it is not given", Family: familyUnloading, Rank: 2, Scatter: Scatter{Between: 0.15, Within: 0.10, Note: "assumed"},
		Source: "EN 1997-1 (2004), 9.5.2", Verified: FormulaRead,
		Cautions: []string{"a code form: equals Mayne & Kulhawy only at φ′ 30°"},
		eval: func(v Values) float64 {
			return (1 - sine(v["phi"])) * math.Sqrt(math.Max(v["OCR"], 1)) * (1 + sine(v["beta"]))
		},
		guard: unloading,
	},
	{
		ID: "jaky-1948", Name: "Jaky (1948)", Quantity: EarthPressureCoefficient,
		Formula: "K0 = 1 − sin φ′",
		Inputs:  []Input{friction, firstLoading},
		Soil:    "normally consolidated soil", Family: familyFriction, Rank: 1, Scatter: assumedAtRestScatter,
		Source: "Jaky 1948, the short form", Verified: FormulaRead,
		Cautions: []string{"φ′ of the normally consolidated soil, not the peak of overconsolidated soil"},
		eval:     func(v Values) float64 { return 1 - sine(v["phi"]) },
	},
	{
		ID: "jaky-1944", Name: "Jaky (1944)", Quantity: EarthPressureCoefficient,
		Formula: "K0 = (1 − sin φ′)·(1 + ⅔·sin φ′)/(1 + sin φ′)",
		Inputs:  []Input{friction, firstLoading},
		Soil:    "normally consolidated soil", Family: familyFriction, Rank: 3, Scatter: assumedAtRestScatter,
		Source: "Jaky 1944, the long form", Verified: FromMemory,
		Cautions: []string{"the short form reads 9 to 14 % higher for φ′ 20° to 35°"},
		eval: func(v Values) float64 {
			s := sine(v["phi"])
			return (1 - s) * (1 + 2*s/3) / (1 + s)
		},
	},
	{
		ID: "brooker-ireland-1965", Name: "Brooker & Ireland (1965)", Quantity: EarthPressureCoefficient,
		Formula: "K0 = 0.95 − sin φ′",
		Inputs:  []Input{friction, firstLoading},
		Soil:    "normally consolidated clay", Family: familyFriction, Rank: 2, Scatter: assumedAtRestScatter,
		Source: "Brooker & Ireland 1965, Can. Geotech. J. 2(1)", Verified: FormulaRead,
		eval: func(v Values) float64 { return 0.95 - sine(v["phi"]) },
	},
	{
		ID: "brooker-ireland-1965-pi", Name: "Brooker & Ireland (1965), plasticity index", Quantity: EarthPressureCoefficient,
		Formula: "K0 = 0.40 + 0.007·PI to PI 40; 0.64 + 0.001·PI to PI 80",
		Inputs:  []Input{input("PI").within(1, 80, publishedRange), firstLoading},
		Soil:    "normally consolidated remoulded clay", Ground: Reconstituted, Family: familyPlasticity, Rank: 3, Scatter: assumedAtRestScatter,
		Source: "Brooker & Ireland 1965, Can. Geotech. J. 2(1), line fits", Verified: FromMemory,
		eval: func(v Values) float64 { return math.Min(0.40+0.007*v["PI"], 0.64+0.001*v["PI"]) },
	},
	{
		ID: "alpan-1967", Name: "Alpan (1967)", Quantity: EarthPressureCoefficient,
		Formula: "K0 = 0.19 + 0.233·log PI",
		Inputs:  []Input{input("PI").within(5, 100, usualRange), firstLoading},
		Soil:    "normally consolidated clay", Family: familyPlasticity, Rank: 1, Scatter: assumedAtRestScatter,
		Source: "Alpan 1967, Soils and Foundations 7(1), 31–40", Verified: AbstractOnly, Cautions: []string{"base 10, PI in percent"},
		eval: func(v Values) float64 { return 0.19 + 0.233*math.Log10(v["PI"]) },
	},
	{
		ID: "massarsch-1979", Name: "Massarsch (1979)", Quantity: EarthPressureCoefficient,
		Formula: "K0 = 0.44 + 0.0042·PI",
		Inputs:  []Input{input("PI").within(5, 80, usualRange), firstLoading},
		Soil:    "normally consolidated clay, field", Family: familyPlasticity, Rank: 2, Scatter: assumedAtRestScatter,
		Source: "Massarsch 1979, 7th Eur. Conf. Soil Mech. Found. Eng.", Verified: FromMemory,
		Cautions: []string{"exceeds Alpan by 23 % at PI 80"},
		eval:     func(v Values) float64 { return 0.44 + 0.0042*v["PI"] },
	},
	{
		ID: "larsson-1977", Name: "Larsson (1977)", Quantity: EarthPressureCoefficient,
		Formula: "K0 = 0.31 + 0.71·(LL/100 − 0.2)",
		Inputs:  []Input{input("LL").within(30, 120, usualRange), firstLoading},
		Soil:    "Scandinavian clay", Ground: Regional, Family: familyPlasticity, Rank: 4, Scatter: assumedAtRestScatter,
		Source: "Larsson 1977", Verified: FromMemory, Cautions: []string{"regional; LL as a decimal in the original"},
		eval: func(v Values) float64 { return 0.31 + 0.71*(v["LL"]/100-0.2) },
	},
}

// unloading caps K0 and says so where OCR is below one.
func unloading(v Values, value float64) judged {
	j := judged{value: value}
	if v["OCR"] < 1 {
		j.warnings = append(j.warnings, "OCR "+number(v["OCR"])+" is below 1 and was taken as 1")
	}
	return cappedAtPassive(v, j)
}

// cappedAtPassive limits K0 to the passive coefficient (1 + sin φ′)/(1 − sin φ′),
// which the ground cannot exceed, where φ′ is known.
func cappedAtPassive(v Values, j judged) judged {
	phi, known := v["phi"]
	if !known {
		return j
	}
	s := sine(phi)
	j.most = (1 + s) / (1 - s)
	if j.value > j.most {
		j.warnings = append(j.warnings, "K0 "+number(j.value)+" is above the passive coefficient and was capped at "+number(j.most))
		j.value = j.most
	}
	return j
}
