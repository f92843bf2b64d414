package review

import "math"

// The ranges are those outside which a number cannot be right as entered. They
// are ours, set from published typical values (Terzaghi, Peck & Mesri 1996,
// table 6.3, from memory; Huat et al., table 3.5; Venkatramaiah, table 3.1, both
// read), wide enough for peat where the ground is organic.
var rangeRules = []Rule{
	rangeRule("unit-weight-range", unitWeight, "11 to 24.5 kN/m³ below the water table, from 9 above it; organic ground 8 to 18", func(r *row) (float64, float64) {
		switch {
		case r.organic:
			return 8, 18
		case r.below:
			return 11, 24.5
		}
		return 9, 24.5
	}, []string{"density in Mg/m³ or lb/ft³ in a column of kN/m³", "decimal slip", "dry in place of bulk density"}),
	rangeRule("specific-gravity-range", specificGravity, "2.2 to 3.3; organic ground 1.2 to 2.75", func(r *row) (float64, float64) {
		if r.organic {
			return 1.2, 2.75
		}
		return 2.2, 3.3
	}, []string{"digits exchanged", "organic matter that the description leaves out", "column exchanged with the void ratio"}),
	rangeRule("water-content-range", waterContent, "3 to 250 %; organic ground 20 to 2000 %", func(r *row) (float64, float64) {
		if r.organic {
			return 20, 2000
		}
		return 3, 250
	}, []string{"decimal slip", "given as a fraction", "organic ground"}),
	rangeRule("liquid-limit-range", liquidLimit, "12 to 250 %; organic ground to 1500 %", func(r *row) (float64, float64) {
		if r.organic {
			return 20, 1500
		}
		return 12, 250
	}, []string{"decimal slip", "given as a fraction", "column exchanged"}),
	rangeRule("void-ratio-range", voidRatio, "0.15 to 7; organic ground 0.5 to 30", func(r *row) (float64, float64) {
		if r.organic {
			return 0.5, 30
		}
		return 0.15, 7
	}, []string{"decimal slip", "porosity in place of void ratio", "given in percent"}),
	rangeRule("compression-index-range", compressionIndex, "0.01 to 4; organic ground to 20", func(r *row) (float64, float64) {
		if r.organic {
			return 0.1, 20
		}
		return 0.01, 4
	}, []string{"decimal slip", "given in percent strain", "slope by natural logarithm"}),
	rangeRule("preconsolidation-range", preconsolidation, "2 to 50,000 kPa", func(*row) (float64, float64) { return 2, 50000 },
		[]string{"given in MPa or bar", "given in lb/ft²", "decimal slip"}),
	rangeRule("strength-range", undrainedStrength, "0.5 to 5,000 kPa", func(*row) (float64, float64) { return 0.5, 5000 },
		[]string{"given in MPa", "given in lb/ft²", "decimal slip"}),
}

// rangeRule makes the check that a variable lies in a range. The end of the
// range is soft by a tenth, so that a value just outside weighs little.
func rangeRule(id string, v variable, tolerance string, limits func(*row) (low, high float64), causes []string) Rule {
	return Rule{
		ID: id, Name: traits[v].quantity + " within what is possible", Formula: traits[v].symbol + " against its range", Tolerance: tolerance,
		Source: "typical values of textbooks", Mark: project, Severity: Error,
		Causes: causes, Action: "Check the entry and its unit against the laboratory sheet.",
		relation: relate(relation{
			vars: []variable{v}, fault: 0.3,
			compare: func(r *row) (comparison, bool) {
				low, high := limits(r)
				return betweenLog(r.v[v], low, high, 0.1)
			},
			say: func(r *row, c comparison) string {
				if c.found < c.want {
					return traits[v].symbol + " = " + r.shown(v) + " is below the " + v.text(c.low) + " that is possible in this ground"
				}
				return traits[v].symbol + " = " + r.shown(v) + " is above the " + v.text(c.high) + " that is possible in this ground"
			},
			wanted: func(_ *row, c comparison) string { return v.plain(c.low) + " to " + v.text(c.high) },
		}),
	}
}

// relate completes a relation.
func relate(x relation) *relation {
	x.needs = maskOf(x.vars)
	x.mask = x.needs | maskOf(x.also)
	return &x
}

// square adds standard deviations of independent parts.
func square(parts ...float64) float64 {
	sum := 0.0
	for _, p := range parts {
		sum += p * p
	}
	return math.Sqrt(sum)
}
