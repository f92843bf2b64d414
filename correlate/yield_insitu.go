package correlate

import "math"

const (
	familyDilatometer = "flat dilatometer"
	familySPT         = "standard penetration test"
	familyShearWave   = "shear wave velocity"
	dilatometerSoil   = "uncemented clay that was only unloaded"
)

var (
	assumedDilatometerScatter = Scatter{Between: 0.35, Within: 0.25, Note: "assumed"}
	assumedSPTScatter         = Scatter{Between: 0.45, Within: 0.40, Note: "assumed, from the wide scatter of N"}

	// clayByDilatometer refuses ground that the dilatometer does not find clay.
	clayByDilatometer = input("ID").below(1.2).ifKnown()
)

// marchettiGuard says that the material index was not looked at.
func marchettiGuard(v Values, value float64) judged {
	j := judged{value: value}
	if _, known := v["ID"]; !known {
		j.warnings = append(j.warnings, "ID is not given: the relation is for ID below 1.2")
	}
	return j
}

// yieldFromDilatometer holds σ′p, OCR, K0 and su from the flat dilatometer.
var yieldFromDilatometer = []Correlation{
	{
		ID: "marchetti-1980-ocr", Name: "Marchetti (1980), OCR", Quantity: OverconsolidationRatio,
		Formula: "OCR = (0.5·KD)^1.56, ID < 1.2",
		Inputs:  []Input{input("KD").within(1.5, 15, usualRange), clayByDilatometer},
		Soil:    dilatometerSoil, Family: familyDilatometer, Rank: 1, Scatter: assumedDilatometerScatter,
		Source: "Marchetti 1980, J. Geotech. Eng. Div. ASCE 106(GT3), 299–321", Verified: FormulaRead,
		Cautions: []string{"cemented and aged clay reads high; old stiff clay differs", "KD uses the effective stress σ′v0"},
		eval:     func(v Values) float64 { return math.Pow(0.5*v["KD"], 1.56) }, guard: marchettiGuard,
	},
	{
		ID: "lacasse-lunne-1988-plastic", Name: "Lacasse & Lunne (1988), plastic clay", Quantity: OverconsolidationRatio,
		Formula: "OCR = 0.225·KD^1.35",
		Inputs:  []Input{input("KD").within(1.5, 15, usualRange), clayByDilatometer},
		Soil:    "Norwegian-type plastic clay", Ground: Regional, Family: familyDilatometer, Rank: 3, Scatter: assumedDilatometerScatter,
		Source: "Lacasse & Lunne 1988", Verified: FromMemory, Cautions: []string{"regional; exponent 1.35 for plastic to 1.67 for lean clay"},
		eval: func(v Values) float64 { return 0.225 * math.Pow(v["KD"], 1.35) }, guard: marchettiGuard,
	},
	{
		ID: "lacasse-lunne-1988-lean", Name: "Lacasse & Lunne (1988), lean clay", Quantity: OverconsolidationRatio,
		Formula: "OCR = 0.225·KD^1.67",
		Inputs:  []Input{input("KD").within(1.5, 15, usualRange), clayByDilatometer},
		Soil:    "Norwegian-type lean clay", Ground: Regional, Family: familyDilatometer, Rank: 4, Scatter: assumedDilatometerScatter,
		Source: "Lacasse & Lunne 1988", Verified: FromMemory, Cautions: []string{"regional; exponent 1.35 for plastic to 1.67 for lean clay"},
		eval: func(v Values) float64 { return 0.225 * math.Pow(v["KD"], 1.67) }, guard: marchettiGuard,
	},
	{
		ID: "powell-uglow-1988", Name: "Powell & Uglow (1988)", Quantity: OverconsolidationRatio,
		Formula: "OCR = 0.24·KD^1.32",
		Inputs:  []Input{input("KD").within(1.5, 15, usualRange), clayByDilatometer},
		Soil:    "young clay of the United Kingdom", Ground: Regional, Family: familyDilatometer, Rank: 2, Scatter: assumedDilatometerScatter,
		Source: "Powell & Uglow 1988", Verified: FromMemory, Cautions: []string{"regional; no single line for old clay"},
		eval: func(v Values) float64 { return 0.24 * math.Pow(v["KD"], 1.32) }, guard: marchettiGuard,
	},
	{
		ID: "mayne-1995-p0", Name: "Mayne (1995), dilatometer", Quantity: PreconsolidationStress,
		Formula: "σ′p = 0.51·(p0 − u0)",
		Inputs:  []Input{input("p0net").within(30, 3000, usualRange), clayByDilatometer},
		Soil:    "intact clay", Family: familyDilatometer, Rank: 1, Scatter: assumedDilatometerScatter,
		Source: "Mayne 1995, 2001", Verified: FromMemory, Cautions: []string{"fissured clay differs"},
		eval: func(v Values) float64 { return 0.51 * v["p0net"] }, guard: marchettiGuard,
	},
	{
		ID: "marchetti-1980-k0", Name: "Marchetti (1980), K0", Quantity: EarthPressureCoefficient,
		Formula: "K0 = (KD/1.5)^0.47 − 0.6, ID < 1.2",
		Inputs:  []Input{input("KD").within(1.5, 15, usualRange), clayByDilatometer},
		Soil:    dilatometerSoil, Family: familyDilatometer, Rank: 1, Scatter: Scatter{Between: 0.20, Within: 0.15, Note: "assumed"},
		Source: "Marchetti 1980, J. Geotech. Eng. Div. ASCE 106(GT3), 299–321", Verified: FormulaRead,
		Cautions: []string{"cemented and aged clay reads high"},
		eval:     func(v Values) float64 { return math.Pow(v["KD"]/1.5, 0.47) - 0.6 },
		guard: func(v Values, value float64) judged {
			return cappedAtPassive(v, marchettiGuard(v, value))
		},
	},
	{
		ID: "marchetti-1980-su", Name: "Marchetti (1980), strength", Quantity: UndrainedStrength,
		Formula: "su = 0.22·σ′v0·(0.5·KD)^1.25, ID < 1.2",
		Inputs:  []Input{input("effective").within(5, 2000, usualRange), input("KD").within(1.5, 15, usualRange), clayByDilatometer},
		Soil:    dilatometerSoil, Family: familyDilatometer, Rank: 1, Scatter: Scatter{Between: 0.25, Within: 0.20, Note: "assumed"},
		Source: "Marchetti 1980, J. Geotech. Eng. Div. ASCE 106(GT3), 299–321", Verified: FormulaRead,
		eval: func(v Values) float64 { return 0.22 * v["effective"] * math.Pow(0.5*v["KD"], 1.25) }, guard: marchettiGuard,
	},
}

// yieldFromOther holds σ′p and OCR from blow counts and from shear waves.
var yieldFromOther = []Correlation{
	{
		ID: "mayne-kemper-1988-yield", Name: "Mayne & Kemper (1988), σ′p", Quantity: PreconsolidationStress,
		Formula: "σ′p = 0.47·N·pa",
		Inputs:  []Input{input("N60").within(2, 60, usualRange)},
		Soil:    "stiff clay, 50 sites", Family: familySPT, Rank: 1, Scatter: assumedSPTScatter,
		Source: "Mayne & Kemper 1988, Geotech. Test. J. 11(2), 139–147; Kulhawy & Mayne 1990", Verified: AbstractOnly,
		Cautions: []string{"the authors prefer the cone to blow counts and ask for calibration on the site"},
		eval:     func(v Values) float64 { return 0.47 * v["N60"] * Atmospheric },
	},
	{
		ID: "mayne-kemper-1988-ocr", Name: "Mayne & Kemper (1988), OCR", Quantity: OverconsolidationRatio,
		Formula: "OCR = 0.193·(N/σ′v0)^0.689, σ′v0 in MPa",
		Inputs:  []Input{input("N60").within(2, 60, usualRange), input("effective").within(10, 2000, usualRange).above(5)},
		Soil:    "stiff clay, 50 sites", Family: familySPT, Rank: 1, Scatter: assumedSPTScatter,
		Source: "Mayne & Kemper 1988, Geotech. Test. J. 11(2), 139–147; σ′v0 in MPa confirmed in a teaching page", Verified: AbstractOnly,
		Cautions: []string{"the authors prefer the cone to blow counts and ask for calibration on the site"},
		// The original takes MPa; the values here are in kPa.
		eval: func(v Values) float64 { return 0.193 * math.Pow(v["N60"]/(v["effective"]/1000), 0.689) },
	},
	{
		ID: "mayne-1998-vs", Name: "Mayne, Robertson & Lunne (1998)", Quantity: PreconsolidationStress,
		Formula: "σ′p = 0.107·Vs^1.47, kPa and m/s",
		Inputs:  []Input{input("Vs").within(40, 500, usualRange)},
		Soil:    "intact clay, 26 sites", Family: familyShearWave, Rank: 1,
		Scatter: Scatter{Between: 0.35, Within: 0.25, Note: "assumed; 15 to 20 % between methods of measuring Vs is 23 to 31 % of σ′p"},
		Source:  "Mayne, Robertson & Lunne 1998, 1st Int. Conf. Site Characterization", Verified: FromMemory,
		Cautions: []string{"not for fissured or cemented clay"},
		eval:     func(v Values) float64 { return 0.107 * math.Pow(v["Vs"], 1.47) },
	},
}
