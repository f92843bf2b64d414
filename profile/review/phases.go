package review

import (
	"fmt"
	"math"

	"pastload/profile"
)

// How well each number of the phase relations is usually measured, as a standard
// deviation: w 2.5 % of itself, γ 1 %, Gs 0.03 (0.06 where assumed), and e0 what
// 1 % of the volume makes. The tolerances follow from these by error propagation
// and so grow as the void ratio falls.
const (
	waterSD   = 0.025
	densitySD = 0.01
	gravitySD = 0.03
	volumeSD  = 0.01
)

// phaseDoubt, phaseConflict and phaseFault are the deviations, in standard
// deviations, from which a broken phase relation is doubted, is a conflict, and
// cannot be.
const phaseDoubt, phaseConflict, phaseFault = 2.7, 4, 6

func gravityError(r *row) float64 {
	sd := gravitySD
	if r.assumed&(1<<specificGravity) != 0 {
		sd *= 2
	}
	if r.organic {
		sd *= 3
	}
	return sd
}

func waterError(r *row) float64 {
	if r.organic {
		return 2.5 * waterSD // fibrous and gassy
	}
	return waterSD
}

func positive(vs ...variable) func(*row) bool {
	return func(r *row) bool {
		for _, v := range vs {
			if r.known(v) && r.v[v] <= 0 {
				return false
			}
		}
		return true
	}
}

var phaseRules = []Rule{
	{
		ID: "saturation", Name: "degree of saturation", Formula: "Sr = w·Gs/(100·e0)",
		Tolerance: "100 % below the water table within 2.7 standard deviations of the measurements: about 9 % at e0 = 1.5, 12 % at 0.4; above it only more than 100 % is doubted",
		Source:    "phase relation; w ± 2.5 %, Gs ± 0.03, volume ± 1 %", Mark: measured, Severity: Error,
		Causes: []string{"water content wrong: digits, drying, or another specimen", "void ratio from a wrong ring volume or an assumed Gs", "gas or drainage (low)"},
		Action: "Recompute from the masses and the ring volume; take the final w and e of the test as a check.",
		relation: relate(relation{
			vars: []variable{waterContent, specificGravity, voidRatio}, when: positive(waterContent, specificGravity, voidRatio),
			doubt: phaseDoubt, conflict: phaseConflict, fault: phaseFault,
			compare: func(r *row) (comparison, bool) {
				e := r.v[voidRatio]
				sr := r.v[waterContent] * r.v[specificGravity] / (100 * e)
				sd := square(waterError(r), gravityError(r)/r.v[specificGravity], volumeSD*(1+e)/e)
				if !r.below && sr < 1 {
					return withinLog(sr, math.Min(sr, 1), sd)
				}
				return withinLog(sr, 1, sd)
			},
			say: func(r *row, c comparison) string {
				return fmt.Sprintf("Sr = w·Gs/e0 = %s·%s/(100·%s) = %s %%, not %s to %s", r.typed(waterContent), r.typed(specificGravity), r.typed(voidRatio),
					fixed(100*c.found, 0), fixed(100*c.low, 0), fixed(100*c.high, 0))
			},
			wanted: func(_ *row, c comparison) string {
				return fmt.Sprintf("Sr from %s to %s %%", fixed(100*c.low, 0), fixed(100*c.high, 0))
			},
		}),
	},
	{
		ID: "unit-weight-saturated", Name: "unit weight against w and Gs", Formula: "γ = (Gs + e)·γw/(1 + e), e = w·Gs/100",
		Tolerance: "2.7 standard deviations, about 0.5 kN/m³; above the water table only more is doubted",
		Source:    "phase relation of saturated ground; γ ± 1 %, w ± 2.5 %, Gs ± 0.03", Mark: measured, Severity: Error,
		Causes: []string{"density in another unit, or dry in place of bulk", "volume of the ring or tube wrong", "water content of another specimen"},
		Action: "Weigh and measure again, or recompute from the laboratory sheet.",
		relation: relate(relation{
			vars: []variable{unitWeight, waterContent, specificGravity}, when: positive(unitWeight, waterContent, specificGravity),
			doubt: phaseDoubt, conflict: phaseConflict, fault: phaseFault,
			compare: func(r *row) (comparison, bool) {
				w, gs := r.v[waterContent]/100, r.v[specificGravity]
				gamma := profile.SaturatedUnitWeight(gs, w*gs, r.water)
				// Derivatives of ln γ with respect to w and Gs.
				byWater := w * math.Abs(1/(1+w)-gs/(1+w*gs))
				byGravity := 1/gs - w/(1+w*gs)
				sd := square(densitySD, byWater*waterError(r), byGravity*gravityError(r))
				if !r.below && r.v[unitWeight] < gamma {
					gamma = r.v[unitWeight]
				}
				return withinLog(r.v[unitWeight], gamma, sd)
			},
			say: func(r *row, c comparison) string {
				return fmt.Sprintf("w = %s and Gs = %s give γ = %s when saturated, not %s", r.shown(waterContent), r.typed(specificGravity), unitWeight.text(c.want), r.typed(unitWeight))
			},
			wanted: func(_ *row, c comparison) string {
				return fmt.Sprintf("%s to %s", unitWeight.plain(c.low), unitWeight.text(c.high))
			},
		}),
	},
	{
		ID: "void-ratio-density", Name: "void ratio against unit weight and w", Formula: "e0 = Gs·γw·(1 + w/100)/γ − 1",
		Tolerance: "2.7 standard deviations, about 0.03 (1 + e0)",
		Source:    "phase relation, saturated or not; γ ± 1 %, w ± 2.5 %, Gs ± 0.03, volume ± 1 %", Mark: measured, Severity: Error,
		Causes: []string{"void ratio computed with another Gs or ring volume", "porosity in place of void ratio", "unit weight or w of another specimen"},
		Action: "Recompute the void ratio from the masses and the ring volume.",
		relation: relate(relation{
			vars: []variable{voidRatio, unitWeight, waterContent, specificGravity}, when: positive(voidRatio, unitWeight, waterContent, specificGravity),
			doubt: phaseDoubt, conflict: phaseConflict, fault: phaseFault,
			compare: func(r *row) (comparison, bool) {
				w := r.v[waterContent] / 100
				e := profile.VoidRatioFromUnitWeight(r.v[unitWeight], r.v[waterContent], r.v[specificGravity], r.water)
				if 1+e <= 0 {
					return comparison{}, false
				}
				// 1 + e is a product, so its relative errors add in squares.
				sd := (1 + e) * square(densitySD, volumeSD, gravityError(r)/r.v[specificGravity], w/(1+w)*waterError(r))
				return within(r.v[voidRatio], e, sd)
			},
			say: func(r *row, c comparison) string {
				return fmt.Sprintf("γ = %s, w and Gs give e0 = %s, not %s", r.shown(unitWeight), voidRatio.plain(c.want), r.typed(voidRatio))
			},
			wanted: func(_ *row, c comparison) string {
				return fmt.Sprintf("%s to %s", voidRatio.plain(c.low), voidRatio.plain(c.high))
			},
		}),
	},
	{
		ID: "dry-side", Name: "unit weight is not less than the solids allow", Formula: "γ ≥ Gs·γw/(1 + e0)", Tolerance: "2.7 standard deviations",
		Source: "phase relation; γ ± 1 %, Gs ± 0.03, volume ± 1 %", Mark: measured, Severity: Error,
		Causes: []string{"dry in place of bulk density", "density in another unit", "void ratio wrong"},
		Action: "Check which density the laboratory sheet gives.",
		relation: relate(relation{
			vars: []variable{unitWeight, specificGravity, voidRatio}, when: func(r *row) bool {
				return positive(unitWeight, specificGravity, voidRatio)(r) && !r.known(waterContent)
			},
			doubt: phaseDoubt, conflict: phaseConflict, fault: phaseFault,
			compare: func(r *row) (comparison, bool) {
				gs, e := r.v[specificGravity], r.v[voidRatio]
				dry, wet := gs*r.water/(1+e), (gs+e)*r.water/(1+e)
				if r.below {
					dry = 0.97 * wet
				}
				return betweenLog(r.v[unitWeight], dry, wet, square(densitySD, volumeSD, gravityError(r)/gs))
			},
			say: func(r *row, c comparison) string {
				return fmt.Sprintf("Gs = %s and e0 = %s allow γ from %s to %s, not %s", r.typed(specificGravity), r.typed(voidRatio), unitWeight.plain(c.low), unitWeight.text(c.high), r.typed(unitWeight))
			},
			wanted: func(_ *row, c comparison) string {
				return fmt.Sprintf("%s to %s", unitWeight.plain(c.low), unitWeight.text(c.high))
			},
		}),
	},
	sameTwice("void-ratio-twice", voidRatio, curveVoidRatio, func(r *row) float64 { return 0.01 * (1 + r.v[curveVoidRatio]) }, "0.03 (1 + e0)"),
	sameTwice("water-content-twice", waterContent, curveWater, func(r *row) float64 { return math.Max(0.7, 0.04*math.Abs(r.v[curveWater])) }, "10 % of it or 2 points"),
	sameTwice("specific-gravity-twice", specificGravity, curveGravity, func(r *row) float64 { return 0.02 }, "0.05"),
}

// sameTwice makes the check of a number that both the results and the oedometer
// table give for one specimen.
func sameTwice(id string, v, curve variable, sd func(*row) float64, tolerance string) Rule {
	return Rule{
		ID: id, Name: traits[v].quantity + " in the results and in the oedometer table", Formula: traits[v].symbol + " of one specimen is one number", Tolerance: tolerance,
		Source: "two records of one specimen", Mark: practice, Severity: Conflict,
		Causes: []string{"one of the two mistyped", "trimmings from another part of the tube", "dried before weighing"},
		Action: "Take the one that the phase relations support, and ask the laboratory for the other.",
		relation: relate(relation{
			vars: []variable{v, curve}, doubt: 2.7, conflict: 5,
			compare: func(r *row) (comparison, bool) { return within(r.v[v], r.v[curve], sd(r)) },
			say: func(r *row, c comparison) string {
				return fmt.Sprintf("the results give %s = %s, the oedometer table %s", traits[v].symbol, r.shown(v), r.shown(curve))
			},
			wanted: func(_ *row, c comparison) string { return v.text(c.want) },
		}),
	}
}
