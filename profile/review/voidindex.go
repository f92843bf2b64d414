package review

import (
	"fmt"
	"math"
)

// farAbove is how far above the intrinsic line natural clay is seldom found, in
// void index: sedimentation compression lines lie 0.7 to 0.9 above it.
const farAbove = 1.6

var voidIndexRules = []Rule{{
	ID: "void-index", Name: "void index against the intrinsic line", Formula: "Iv = (e0 − e*100)/C*c against 2.45 − 1.285 x + 0.015 x³, x = log10 σ′v0",
	Tolerance: "more than 1.6 above is noted, and more than 0.5 below with OCR under 1.3; eL from 0.6 to 4.5, above the A-line", Source: "Burland 1990", Mark: memory, Severity: Note,
	Causes: []string{"structured or sensitive clay (above)", "water content, liquid limit or void ratio of another specimen", "overconsolidated, whatever σ′p says (below)"},
	Action: "Compare with the sensitivity and with σ′p of the same specimen.",
	relation: relate(relation{
		vars: []variable{voidRatio, liquidLimit}, also: []variable{specificGravity, preconsolidation, plasticLimit, plasticityIndex}, note: 0.9,
		when: func(r *row) bool {
			pi, ok := r.plasticity()
			return ok && overALine(r.v[liquidLimit], pi) >= 0 && !r.organic && r.effective.Known && r.effective.Value > 10 && r.effective.Value < 1e4
		},
		compare: func(r *row) (comparison, bool) {
			gs := 2.7
			if r.known(specificGravity) {
				gs = r.v[specificGravity]
			}
			eL := gs * r.v[liquidLimit] / 100
			if eL < 0.6 || eL > 4.5 {
				return comparison{}, false
			}
			e100 := 0.109 + 0.679*eL - 0.089*eL*eL + 0.016*eL*eL*eL
			x := math.Log10(r.effective.Value)
			line := 2.45 - 1.285*x + 0.015*x*x*x
			c := comparison{found: (r.v[voidRatio] - e100) / (0.256*eL - 0.04), want: line}
			switch {
			case c.found > line+farAbove:
				c.z = 1
			case c.found < line-0.5 && r.known(preconsolidation) && r.v[preconsolidation] < 1.3*r.effective.Value:
				c.z = -1
			}
			return c, true
		},
		say: func(r *row, c comparison) string {
			if c.z > 0 {
				return fmt.Sprintf("void index %s lies %s above the intrinsic line, further than sediments do", fixed(c.found, 2), fixed(c.found-c.want, 1))
			}
			return fmt.Sprintf("void index %s lies %s below the intrinsic line, which goes with overconsolidated clay, but OCR is %s", fixed(c.found, 2), fixed(c.want-c.found, 1), fixed(r.v[preconsolidation]/r.effective.Value, 1))
		},
		wanted: func(_ *row, c comparison) string {
			return fmt.Sprintf("void index from %s to %s", fixed(c.want, 1), fixed(c.want+1, 1))
		},
	}),
}}
