package review

import (
	"fmt"
	"strings"
)

var strengthRules = []Rule{
	{
		ID: "strength-ratio", Name: "undrained strength against preconsolidation stress", Formula: "su/σ′p by type of test: vane 0.13 to 0.40, triaxial 0.15 to 0.45, simple shear 0.16 to 0.30",
		Tolerance: "0.25 of the logarithm for doubt, 0.65 for a conflict", Source: "su = 0.22 σ′p mobilized (Mesri 1975), vane ratios after Bjerrum 1973, simple shear 0.23 ± 0.04 (Jamiolkowski et al. 1985)", Mark: memory, Severity: Error,
		Causes: []string{"σ′p low, or strength low, from disturbance", "fissures", "another unit, or sensitivity and strength exchanged", "strength and σ′p of different depths"},
		Action: "Compare with the strengths and stresses of the neighbouring depths.",
		relation: relate(relation{
			vars: []variable{undrainedStrength}, also: []variable{preconsolidation}, doubt: 1, conflict: 2.6, fault: 10,
			when: func(r *row) bool { return r.yieldForStrength() > 0 },
			compare: func(r *row) (comparison, bool) {
				low, high := strengthLimits(r.strength)
				return betweenLog(r.v[undrainedStrength]/r.yieldForStrength(), low, high, 0.25)
			},
			say: func(r *row, c comparison) string {
				return fmt.Sprintf("su/σ′p = %s/%s = %s, outside %s to %s%s", r.typed(undrainedStrength), fixed(r.yieldForStrength(), 0), fixed(c.found, 2), fixed(c.low, 2), fixed(c.high, 2), forTest(r.strength))
			},
			wanted: func(r *row, c comparison) string {
				p := r.yieldForStrength()
				return fmt.Sprintf("su from %s to %s", undrainedStrength.plain(c.low*p), undrainedStrength.text(c.high*p))
			},
		}),
	},
}

// yieldForStrength returns the σ′p that a strength is compared with: that of its
// own specimen, else the line.
func (r *row) yieldForStrength() float64 {
	switch {
	case r.known(preconsolidation):
		return r.v[preconsolidation]
	case r.line.known:
		return r.line.best
	}
	return 0
}

// strengthLimits returns the usual su/σ′p of a type of test. The vane is not
// corrected; a type that is not told has the widest range.
func strengthLimits(test string) (low, high float64) {
	switch {
	case strings.Contains(test, "vane"):
		return 0.13, 0.40
	case strings.Contains(test, "simple shear"), strings.Contains(test, "dss"):
		return 0.16, 0.30
	case strings.Contains(test, "triaxial"), strings.Contains(test, "uu"), strings.Contains(test, "ciu"), strings.Contains(test, "cau"):
		return 0.15, 0.45
	}
	return 0.12, 0.45
}

func forTest(test string) string {
	if test == "" {
		return ""
	}
	return " for " + test
}
