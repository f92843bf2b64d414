package review

import (
	"fmt"
	"math"
)

// The lines of the plasticity chart.
const (
	// aLineSlope and aLineFoot give PI = 0.73 (LL − 20) (Casagrande 1948, as in ASTM D2487, read).
	aLineSlope, aLineFoot = 0.73, 20.0
	// uLineSlope and uLineFoot give PI = 0.9 (LL − 8), the upper limit of natural soil (ASTM D2487, read).
	uLineSlope, uLineFoot = 0.9, 8.0
)

var limitRules = []Rule{
	{
		ID: "limits-order", Name: "plastic limit not above the liquid limit", Formula: "PL ≤ LL", Tolerance: "none",
		Source: "definition of the limits", Mark: definition, Severity: Error,
		Causes: []string{"the two limits are exchanged", "a non-plastic soil entered as numbers", "digits exchanged"},
		Action: "Check both limits against the laboratory sheet.",
		relation: relate(relation{
			vars: []variable{plasticLimit, liquidLimit}, fault: 0.5,
			compare: func(r *row) (comparison, bool) {
				c := comparison{found: r.v[plasticLimit], want: math.Min(r.v[plasticLimit], r.v[liquidLimit]), high: r.v[liquidLimit]}
				c.z = (c.found - c.want) / 1
				return c, true
			},
			say: func(r *row, _ comparison) string {
				return fmt.Sprintf("PL %s lies above LL %s", r.shown(plasticLimit), r.shown(liquidLimit))
			},
			wanted: func(r *row, _ comparison) string { return "at most LL = " + r.shown(liquidLimit) },
		}),
	},
	{
		ID: "plasticity-arithmetic", Name: "plasticity index is the difference of the limits", Formula: "PI = LL − PL",
		Tolerance: "1.5 for three rounded numbers; 1 is noted", Source: "definition of the plasticity index", Mark: definition, Severity: Error,
		Causes: []string{"a slip in the subtraction", "one of the limits mistyped", "the index taken from another specimen"},
		Action: "Recompute it from the limits on the laboratory sheet.",
		relation: relate(relation{
			vars: []variable{plasticityIndex, liquidLimit, plasticLimit}, note: 1.9, fault: 3.1,
			compare: func(r *row) (comparison, bool) {
				return within(r.v[plasticityIndex], r.v[liquidLimit]-r.v[plasticLimit], 0.5)
			},
			say: func(r *row, c comparison) string {
				return fmt.Sprintf("PI = LL − PL = %s − %s = %s %%, not %s", r.typed(liquidLimit), r.typed(plasticLimit), plasticityIndex.plain(c.want), r.typed(plasticityIndex))
			},
			wanted: func(_ *row, c comparison) string { return plasticityIndex.text(c.want) },
		}),
	},
	{
		ID: "liquidity-arithmetic", Name: "liquidity index agrees with w and the limits", Formula: "LI = (w − PL)/PI",
		Tolerance: "0.05 and the rounding of the limits", Source: "definition of the liquidity index", Mark: definition, Severity: Conflict,
		Causes: []string{"computed with another water content", "a slip in the arithmetic", "consistency index in place of liquidity index"},
		Action: "Recompute it from w and the limits.",
		relation: relate(relation{
			vars: []variable{liquidityIndex, waterContent}, also: []variable{liquidLimit, plasticLimit, plasticityIndex}, doubt: 2.5, conflict: 4,
			when: hasLiquidity,
			compare: func(r *row) (comparison, bool) {
				li, pi, ok := liquidity(r)
				if !ok {
					return comparison{}, false
				}
				return within(r.v[liquidityIndex], li, square(0.02, 0.5/pi, 0.5*li/pi))
			},
			say: func(r *row, c comparison) string {
				return fmt.Sprintf("LI = (w − PL)/PI = %s, not %s", fixed(c.want, 2), r.typed(liquidityIndex))
			},
			wanted: func(_ *row, c comparison) string { return fixed(c.want, 2) },
		}),
	},
	{
		ID: "u-line", Name: "plasticity below the upper limit of natural soil", Formula: "PI ≤ 0.9 (LL − 8)", Tolerance: "3",
		Source: "ASTM D2487, the U-line", Mark: "read", Severity: Error,
		Causes: []string{"limits exchanged or mistyped", "PI entered as PL or the other way round", "liquid limit by another method than the rest"},
		Action: "Check both limits against the laboratory sheet; repeat them if they stand.",
		relation: relate(relation{
			vars: []variable{liquidLimit}, also: []variable{plasticLimit, plasticityIndex}, doubt: 0.5, fault: 2,
			when: func(r *row) bool { _, ok := r.plasticity(); return ok },
			compare: func(r *row) (comparison, bool) {
				pi, _ := r.plasticity()
				limit := math.Max(7, uLineSlope*(r.v[liquidLimit]-uLineFoot))
				c, ok := between(pi, math.Inf(-1), limit, 1.5)
				c.low = 0
				return c, ok
			},
			say: func(r *row, c comparison) string {
				return fmt.Sprintf("PI = %s %% at LL %s lies above the U-line, which is at %s %%", fixed(c.found, 0), r.shown(liquidLimit), fixed(c.high, 0))
			},
			wanted: func(_ *row, c comparison) string { return "PI at most " + fixed(c.high, 0) + " %" },
		}),
	},
	{
		ID: "liquidity-range", Name: "water content against the limits", Formula: "−0.3 ≤ LI = (w − PL)/PI ≤ 1.4", Tolerance: "0.15; wider in soil of low plasticity",
		Source: "usual range of liquidity index; LI above 1.6 occurs in quick clay", Mark: practice, Severity: Conflict,
		Causes: []string{"the specimen dried, or w belongs to another one", "limits exchanged or mistyped", "sensitive clay (high) or desiccated crust (low)"},
		Action: "Compare with the water content of the tube's other specimens, and weigh again if material is left.",
		relation: relate(relation{
			vars: []variable{waterContent}, also: []variable{liquidLimit, plasticLimit, plasticityIndex}, doubt: 1.5, conflict: 3.5,
			when: hasLiquidity,
			compare: func(r *row) (comparison, bool) {
				li, pi, ok := liquidity(r)
				if !ok {
					return comparison{}, false
				}
				high := 1.4
				if r.known(sensitivity) && r.v[sensitivity] > 8 {
					high = 3
				}
				return between(li, -0.3, high, square(0.15, 3/pi))
			},
			say: func(r *row, c comparison) string {
				return fmt.Sprintf("LI = (w − PL)/PI = %s, outside %s to %s", fixed(c.found, 2), fixed(c.low, 1), fixed(c.high, 1))
			},
			wanted: func(_ *row, c comparison) string { return "LI from " + fixed(c.low, 1) + " to " + fixed(c.high, 1) },
		}),
	},
	{
		ID: "activity", Name: "plasticity against the clay fraction", Formula: "0.3 ≤ PI/clay ≤ 1.5", Tolerance: "as given",
		Source: "activity of common clay minerals (Skempton 1953)", Mark: memory, Severity: Note,
		Causes: []string{"swelling or inactive mineral", "sieve or hydrometer of another specimen", "limits on the fine part alone"},
		Action: "Compare with the grading of neighbouring specimens.",
		relation: relate(relation{
			vars: []variable{clayFraction}, also: []variable{liquidLimit, plasticLimit, plasticityIndex}, note: 1,
			when: func(r *row) bool {
				pi, ok := r.plasticity()
				return ok && pi > 0 && r.v[clayFraction] > 5 && !r.organic
			},
			compare: func(r *row) (comparison, bool) {
				pi, _ := r.plasticity()
				return betweenLog(pi/r.v[clayFraction], 0.3, 1.5, 0.25)
			},
			say: func(_ *row, c comparison) string {
				return "PI/clay fraction = " + fixed(c.found, 2) + ", outside 0.3 to 1.5"
			},
			wanted: func(*row, comparison) string { return "activity from 0.3 to 1.5" },
		}),
	},
}

func hasLiquidity(r *row) bool { _, _, ok := liquidity(r); return ok }

// liquidity returns LI and PI.
func liquidity(r *row) (li, pi float64, ok bool) {
	pi, ok = r.plasticity()
	if !ok || !r.known(waterContent) {
		return 0, 0, false
	}
	pl := r.v[plasticLimit]
	if !r.known(plasticLimit) {
		if !r.known(liquidLimit) {
			return 0, 0, false
		}
		pl = r.v[liquidLimit] - pi
	}
	if pi < 2 {
		return 0, 0, false // the difference of two rounded limits: no scale to measure by
	}
	return (r.v[waterContent] - pl) / pi, pi, true
}

// overALine returns how far a point lies above the A-line.
func overALine(ll, pi float64) float64 { return pi - aLineSlope*(ll-aLineFoot) }
