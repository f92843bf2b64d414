package review

import (
	"fmt"
	"math"

	"pastload/profile"
)

var stressRules = []Rule{
	{
		ID: "stress-history", Name: "preconsolidation stress against the rest of the ground", Formula: "ln(σ′p/σ′p expected)/s, expected from everything else in the borehole and its neighbours",
		Tolerance: "2.4 standard deviations are doubted, 2.9 a conflict, or 2.4 where OCR is below 0.9 besides; s is at least 0.13 (factors of about 1.37 and 1.46)",
		Source:    "leave-one-out prediction of the stress history; scatter of good tests 0.10 to 0.15", Mark: practice, Severity: Error,
		Causes: []string{"disturbed specimen, or a test that stopped short (low)", "another unit or a decimal slip", "specimen of another depth or borehole", "a boundary or crust that the log does not show (high)"},
		Action: "Look at the curve and at the sample record before using it; do not correct it by calculation.",
		relation: relate(relation{
			vars: []variable{preconsolidation}, doubt: 2.4, conflict: 2.9, fault: 14,
			when: func(r *row) bool { return r.line.known },
			compare: func(r *row) (comparison, bool) {
				return withinLog(r.v[preconsolidation], r.line.best, r.line.sd)
			},
			say: func(r *row, c comparison) string {
				return fmt.Sprintf("σ′p = %s where the rest of the ground says about %s (%s to %s)", r.shown(preconsolidation), preconsolidation.text(c.want), preconsolidation.plain(c.low), preconsolidation.plain(c.high))
			},
			wanted: func(_ *row, c comparison) string {
				return fmt.Sprintf("about %s (%s to %s)", preconsolidation.text(c.want), preconsolidation.plain(c.low), preconsolidation.plain(c.high))
			},
		}),
	},
	{
		ID: "ocr-below-one", Name: "overconsolidation ratio below one", Formula: "OCR = σ′p/σ′v0 ≥ 1", Tolerance: "0.95 is noted, below 0.82 doubted, below 0.66 a conflict; wider where σ′v0 is uncertain",
		Source: "definition; scatter of σ′p and σ′v0", Mark: practice, Severity: Conflict,
		Causes: []string{"disturbed specimen", "water level or pore pressure wrong", "recent fill, or ground still consolidating", "test stopped before the virgin line"},
		Action: "Check the sample and the curve first; call the ground underconsolidated only where a piezometer shows excess pressure.",
		relation: relate(relation{
			vars: []variable{preconsolidation}, note: 0.5, doubt: 1.65, conflict: 3.5,
			when: func(r *row) bool { return r.effective.Known && r.effective.Value > 5 },
			compare: func(r *row) (comparison, bool) {
				sd := 0.12
				if e, ok := r.stressDoubt(); ok {
					sd = square(sd, math.Min(e, 0.5))
				}
				return betweenLog(r.v[preconsolidation]/r.effective.Value, 1, math.Inf(1), sd)
			},
			say: func(r *row, c comparison) string {
				return fmt.Sprintf("OCR = σ′p/σ′v0 = %s/%s = %s", r.typed(preconsolidation), fixed(r.effective.Value, 0), fixed(c.found, 2))
			},
			wanted: func(r *row, _ comparison) string { return "at least σ′v0 = " + fixed(r.effective.Value, 0) + " kPa" },
		}),
	},
	{
		ID: "range-order", Name: "preconsolidation stress within its own range", Formula: "low ≤ σ′p ≤ high", Tolerance: "none",
		Source: "definition", Mark: definition, Severity: Error,
		Causes: []string{"columns exchanged", "digits exchanged", "one of the three in another unit"},
		Action: "Check the three values against the laboratory sheet.",
		relation: relate(relation{
			vars: []variable{preconsolidation}, also: []variable{preconsolidationLow, preconsolidationHigh}, fault: 0.3,
			when: func(r *row) bool { return r.known(preconsolidationLow) || r.known(preconsolidationHigh) },
			compare: func(r *row) (comparison, bool) {
				low, high := 0.0, math.Inf(1)
				if r.known(preconsolidationLow) {
					low = r.v[preconsolidationLow]
				}
				if r.known(preconsolidationHigh) {
					high = r.v[preconsolidationHigh]
				}
				if low > high {
					return comparison{found: r.v[preconsolidation], want: r.v[preconsolidation], low: low, high: high, z: 3}, true
				}
				return betweenLog(r.v[preconsolidation], math.Max(low, 1e-9), high, 0.05)
			},
			say: func(r *row, c comparison) string {
				return fmt.Sprintf("σ′p = %s lies outside its own range of %s to %s kPa", r.shown(preconsolidation), r.typed(preconsolidationLow), r.typed(preconsolidationHigh))
			},
			wanted: func(r *row, _ comparison) string {
				return fmt.Sprintf("%s to %s kPa", r.typed(preconsolidationLow), r.typed(preconsolidationHigh))
			},
		}),
	},
	{
		ID: "yield-of-curve", Name: "preconsolidation stress against its curve", Formula: "σ′p of the laboratory against σ′p read from the curve", Tolerance: "a factor of 1.45; 1.9 is a conflict",
		Source: "spread of constructions on one curve", Mark: project, Severity: Error,
		Causes: []string{"another unit or digits exchanged", "value and curve of different specimens", "read by eye from a rounded curve"},
		Action: "Read the curve again; take the reading whose construction you can show.",
		relation: relate(relation{
			vars: []variable{preconsolidation, curveYield}, doubt: 2.5, conflict: 4.3, fault: 14, when: positive(curveYield),
			compare: func(r *row) (comparison, bool) { return withinLog(r.v[preconsolidation], r.v[curveYield], 0.15) },
			say: func(r *row, c comparison) string {
				return fmt.Sprintf("the laboratory gives σ′p = %s, the curve %s", r.shown(preconsolidation), preconsolidation.text(c.want))
			},
			wanted: func(_ *row, c comparison) string { return "about " + preconsolidation.text(c.want) },
		}),
	},
	{
		ID: "given-effective-stress", Name: "given against computed effective stress", Formula: "σ′v0 given against ∫γ dz − u0", Tolerance: "3 standard deviations of the computed one, at least 12 %; double that is a conflict",
		Source: "integration of unit weights and pore pressure", Mark: measured, Severity: Conflict,
		Causes: []string{"another water level or unit weight was used", "total in place of effective stress", "another unit"},
		Action: "Ask on which water level and unit weights the given stress rests.",
		relation: relate(relation{
			vars: []variable{givenStress}, doubt: 3, conflict: 6,
			when: func(r *row) bool { return r.effective.Known && r.effective.Value > 5 },
			compare: func(r *row) (comparison, bool) {
				sd := 0.04
				if e, ok := r.stressDoubt(); ok {
					sd = math.Max(sd, e)
				}
				return withinLog(r.v[givenStress], r.effective.Value, sd)
			},
			say: func(r *row, c comparison) string {
				return fmt.Sprintf("σ′v0 is given as %s; weights and pore pressure make %s", r.shown(givenStress), givenStress.text(c.want))
			},
			wanted: func(_ *row, c comparison) string { return "about " + givenStress.text(c.want) },
		}),
	},
	{
		ID: "liquidity-history", Name: "liquidity index against overconsolidation", Formula: "LI > 0.9 with OCR > 4, or LI < 0.2 with OCR < 1.5 at σ′v0 < 300 kPa", Tolerance: "as given; sensitive clay is exempt",
		Source: "after σ′p/pa ≈ 10^(1.11 − 1.62 LI) (Kulhawy & Mayne 1990)", Mark: memory, Severity: Note,
		Causes: []string{"cementation or sensitivity (high LI)", "desiccation, or a disturbed specimen (low LI)", "limits of another specimen"},
		Action: "Treat as a cue only: the liquidity index is a weak measure of stress history.",
		relation: relate(relation{
			vars: []variable{preconsolidation}, also: []variable{waterContent, liquidLimit, plasticLimit, plasticityIndex}, note: 0.9,
			when: func(r *row) bool {
				return hasLiquidity(r) && r.effective.Known && r.effective.Value > 5 && !r.organic && !(r.known(sensitivity) && r.v[sensitivity] > 8)
			},
			compare: func(r *row) (comparison, bool) {
				li, _, _ := liquidity(r)
				ocr := r.v[preconsolidation] / r.effective.Value
				c := comparison{found: ocr, want: ocr, low: li}
				if li > 0.9 && ocr > 4 || li < 0.2 && ocr < 1.5 && r.effective.Value < 300 {
					c.z = 1
				}
				return c, true
			},
			say: func(r *row, c comparison) string {
				return fmt.Sprintf("LI = %s does not go with OCR = %s", fixed(c.low, 2), fixed(c.found, 1))
			},
			wanted: func(*row, comparison) string { return "a liquidity index that goes with the stress history" },
		}),
	},
}

// stressDoubt returns the standard deviation of ln σ′v0 at the row.
func (r *row) stressDoubt() (float64, bool) {
	if r.ground == nil || !r.depth.Known {
		return 0, false
	}
	p := nearest(r.ground.Points, r.depth.Value)
	if p == nil || !p.EffectiveUncertainty.Known || !p.Effective.Known || p.Effective.Value <= 0 {
		return 0, false
	}
	return p.EffectiveUncertainty.Value / p.Effective.Value, true
}

// nearest returns the point of a profile nearest to a depth, nil for none.
func nearest(points []profile.Point, depth float64) *profile.Point {
	low, high := 0, len(points)
	for low < high {
		if mid := (low + high) / 2; points[mid].Depth < depth {
			low = mid + 1
		} else {
			high = mid
		}
	}
	switch {
	case len(points) == 0:
		return nil
	case low == len(points):
		return &points[low-1]
	case low > 0 && depth-points[low-1].Depth < points[low].Depth-depth:
		return &points[low-1]
	}
	return &points[low]
}
