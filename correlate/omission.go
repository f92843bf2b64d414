package correlate

import "slices"

// An Omission is a published relation that the catalogue leaves out on purpose.
type Omission struct {
	Name, Formula, Reason string
}

// LeftOut returns what the catalogue leaves out, and why.
func LeftOut() []Omission { return slices.Clone(leftOut) }

var leftOut = []Omission{
	{"Azzouz et al. (1976) as recompression index", "Cr = 0.14·(e0 + 0.007); 0.003·(w + 7); 0.002·(LL + 9); 0.126·(e0 + 0.003·LL − 0.06)",
		"the numbers are compression ratios Cc/(1 + e0): 40 to 51 % of Cc, where Cr is 10 to 20 %. They are in the catalogue as that"},
	{"Azzouz et al. (1976), ratio with w and e0 as usually copied", "0.142·(e0 − 0.009·w + 0.006)",
		"disagrees with its siblings by 30 to 40 %: the copy looks corrupt (0.0009 would fit)"},
	{"Azzouz et al. (1976), three-variable ratio as usually copied", "0.135·(e0 + 0.1·LL − 0.002·w − 0.06)",
		"gives 0.6 to 1.5 with LL in percent, which is impossible"},
	{"Nishida (1956)", "Cc = 1.15·(e0 − 0.35), 1.15·(e0 − 0.27) or 0.54·(e0 − 0.35)",
		"three versions are in print, more than a factor of two apart, and the original was not read"},
	{"Rendon-Herrero, textbook form", "Cc = 0.141·Gs^1.2·[(1 + e0)/Gs]^2.38",
		"22 % above the author's revised equation and misses his own anchor (0.0443, not 0.0357)"},
	{"Rendon-Herrero (1980)", "Cc = 0.5·[(1 + e0)/Gs]^2.4",
		"superseded by its author in 1983: the specific gravity had been left out"},
	{"Yoon, Kim & Jeon (2004)", "one rule for each of three Korean coasts", "coefficients not known well enough to print"},
	{"Ozer, Isik & Orhan (2008)", "Cc = 0.1597·w^−0.0187·(1 + e0)^1.592·LL^−0.0638·γd^−0.8276",
		"bound to units that the copies do not state; low confidence in the coefficients"},
	{"σ′p from the liquidity index as a design value", "Stas & Kulhawy, DeGroot et al., Ching & Phoon",
		"their scatter is an order of magnitude: kept as plausibility checks, in no band unless asked for"},
	{"NAVFAC DM 7.01, chart of σ′p by LI and sensitivity", "", "a chart; no equation was read"},
	{"Bjerrum (1967, 1973), ageing by plasticity index", "", "a chart; values known from memory only"},
	{"Simons (1957) and Lambe & Whitman (1969), CR by water content", "", "a chart; no equation was read"},
	{"Ching & Wu (2017)", "", "a distribution of σ′p rather than a formula; not read"},
	{"D'Ignazio et al. (2019), cone", "", "only the abstract was read: coefficients not known"},
	{"L'Heureux & Long (2017), shear wave velocity", "σ′p by a power of about 2 of Vs", "coefficients not read"},
	{"Agaiby & Mayne (2016), shear wave velocity", "", "coefficients not read"},
	{"Finnish clay models of the AIMS data bases (2025)", "", "coefficients not read"},
	{"Hough (1957, 1969) for coarse and organic soil", "Cc = a·(e0 − b) by soil class",
		"for soil whose stress history no oedometer profile is asked of; only the row for inorganic clay is kept"},
	{"Mesri & Castro (1987), K0 by secondary compression", "", "a concept; K0 rises with time but no rate is given here"},
	{"Chandler's correction without the root", "μ = 1.05 − 0.015·PI", "garbled: negative above PI 70"},
	{"√OCR credited to Mayne & Kulhawy", "K0 = (1 − sin φ′)·√OCR", "the form of EN 1997-1, listed as that; theirs has the exponent sin φ′"},
	{"TC211 residual models, Paris (2013)", "ln(su/σ′v) on ln OCR", "signs were lost in the text that was read"},
}
