package review

import (
	"fmt"
	"math"
)

var indexRules = []Rule{
	{
		ID: "recompression-ratio", Name: "recompression against compression index", Formula: "0.04 ≤ Cr/Cc ≤ 0.22 usual, below 1 always",
		Tolerance: "doubt outside 0.02 to 0.30, conflict above 0.37", Source: "Cr ≈ Cc/5 to Cc/10 (Terzaghi, Peck & Mesri 1996)", Mark: memory, Severity: Error,
		Causes: []string{"read from the first loading, not from an unload–reload loop", "disturbed specimen without a loop", "structured (low) or fissured and swelling (high) clay", "the two indices exchanged"},
		Action: "Read it from the loop; ask for a loop that starts beyond 1.5 σ′p if there is none.",
		relation: relate(relation{
			vars: []variable{recompressionIndex, compressionIndex}, doubt: 2.1, conflict: 3.5, fault: 10,
			when: positive(compressionIndex),
			compare: func(r *row) (comparison, bool) {
				c, ok := betweenLog(r.v[recompressionIndex]/r.v[compressionIndex], 0.04, 0.22, 0.15)
				if c.found < c.low && c.found > 0 {
					c.z *= 0.15 / 0.33 // the low side is wide: structured clays
				}
				return c, ok
			},
			say: func(r *row, c comparison) string {
				return fmt.Sprintf("Cr/Cc = %s/%s = %s, outside %s to %s", r.typed(recompressionIndex), r.typed(compressionIndex), fixed(c.found, 2), fixed(c.low, 2), fixed(c.high, 2))
			},
			wanted: func(r *row, c comparison) string {
				cc := r.v[compressionIndex]
				return fmt.Sprintf("Cr from %s to %s for Cc = %s", recompressionIndex.plain(c.low*cc), recompressionIndex.plain(c.high*cc), r.typed(compressionIndex))
			},
		}),
	},
	{
		ID: "swelling-ratio", Name: "swelling against compression index", Formula: "0.03 ≤ Cs/Cc ≤ 0.30 usual, below 1 always",
		Tolerance: "doubt outside 0.02 to 0.4", Source: "Cs ≈ Cc/5 to Cc/10 (Terzaghi, Peck & Mesri 1996)", Mark: memory, Severity: Error,
		Causes: []string{"index by natural logarithm in one of the two", "swelling clay (high)", "the two indices exchanged"},
		Action: "Recompute both slopes per log10 cycle.",
		relation: relate(relation{
			vars: []variable{swellingIndex, compressionIndex}, doubt: 2, conflict: 4, fault: 8, when: positive(compressionIndex),
			compare: func(r *row) (comparison, bool) {
				return betweenLog(r.v[swellingIndex]/r.v[compressionIndex], 0.03, 0.3, 0.15)
			},
			say: func(r *row, c comparison) string {
				return fmt.Sprintf("Cs/Cc = %s/%s = %s, outside %s to %s", r.typed(swellingIndex), r.typed(compressionIndex), fixed(c.found, 2), fixed(c.low, 2), fixed(c.high, 2))
			},
			wanted: func(_ *row, c comparison) string { return "Cs/Cc from " + fixed(c.low, 2) + " to " + fixed(c.high, 2) },
		}),
	},
	{
		ID: "secondary-ratio", Name: "secondary against virgin compression", Formula: "0.01 ≤ Cα/Cc ≤ 0.08", Tolerance: "0.3 of the logarithm beyond",
		Source: "Mesri & Godlewski 1977: 0.04 ± 0.01 in inorganic clay, 0.06 ± 0.01 in peat", Mark: memory, Severity: Doubt,
		Causes: []string{"Cα as a strain rate, or per natural logarithm", "Cα from a stage below the yield stress (low)", "another definition of Cα"},
		Action: "Ask which definition the laboratory used and at which stress it was read.",
		relation: relate(relation{
			vars: []variable{secondaryIndex, compressionIndex}, doubt: 2.5, when: positive(compressionIndex),
			compare: func(r *row) (comparison, bool) {
				return betweenLog(r.v[secondaryIndex]/r.v[compressionIndex], 0.01, 0.08, 0.3)
			},
			say: func(r *row, c comparison) string {
				return fmt.Sprintf("Cα/Cc = %s/%s = %s, outside 0.01 to 0.08", r.typed(secondaryIndex), r.typed(compressionIndex), fixed(c.found, 3))
			},
			wanted: func(*row, comparison) string { return "Cα/Cc from 0.01 to 0.08" },
		}),
	},
	{
		ID: "compression-correlation", Name: "compression index against index properties", Formula: "Cc against 0.40 (e0 − 0.25) and 0.009 (LL − 10); peat 0.01 w",
		Tolerance: "a factor of 1.8 is doubted, one of 2.5 a conflict (standard deviation of the logarithm 0.30)",
		Source:    "Azzouz et al. 1976; Terzaghi & Peck 1967; Mesri & Ajlouni 2007", Mark: memory, Severity: Conflict,
		Causes: []string{"slope per natural in place of log10 cycle (factor 2.303)", "compression ratio in place of index, or a disturbed specimen or a short test (low)", "sensitive or organic clay (high)", "e0 or LL of another specimen"},
		Action: "Recompute the slope from the curve, per log10 cycle, over its steepest part.",
		relation: relate(relation{
			vars: []variable{compressionIndex}, also: []variable{voidRatio, liquidLimit, waterContent, curveVoidRatio, specificGravity}, doubt: 2, conflict: 3.1,
			when: func(r *row) bool { _, ok := correlatedCompression(r); return ok },
			compare: func(r *row) (comparison, bool) {
				cc, _ := correlatedCompression(r)
				sd := 0.30
				if r.organic {
					sd = 0.45
				} else if cc < 0.15 {
					sd = 0.40 // near the foot of the rules a small difference is a large ratio
				}
				return withinLog(r.v[compressionIndex], cc, sd)
			},
			say: func(r *row, c comparison) string {
				return fmt.Sprintf("Cc = %s where the index properties give about %s: a factor of %s", r.typed(compressionIndex), fixed(c.want, 2), factorText(c.found/c.want))
			},
			wanted: func(_ *row, c comparison) string {
				return fmt.Sprintf("about %s (%s to %s)", fixed(c.want, 2), fixed(c.low, 2), fixed(c.high, 2))
			},
		}),
	},
	{
		ID: "compression-ratio", Name: "compression ratio", Formula: "0.05 ≤ CR = Cc/(1 + e0) ≤ 0.45", Tolerance: "0.2 of the logarithm beyond",
		Source: "usual range of natural clay", Mark: practice, Severity: Doubt,
		Causes: []string{"slope per natural in place of log10 cycle", "Cc and CR exchanged", "peat or sensitive clay (high)"},
		Action: "Recompute it from the curve.",
		relation: relate(relation{
			vars: []variable{compressionIndex}, also: []variable{voidRatio, curveVoidRatio, waterContent, specificGravity}, doubt: 2,
			when: func(r *row) bool { e, ok := r.void(); return ok && e > 0 },
			compare: func(r *row) (comparison, bool) {
				e, _ := r.void()
				low, high := 0.05, 0.45
				if e < 0.6 {
					low = 0.02 // dense, lean ground
				}
				if r.organic {
					high = 0.7
				}
				return betweenLog(r.v[compressionIndex]/(1+e), low, high, 0.2)
			},
			say: func(r *row, c comparison) string {
				return fmt.Sprintf("CR = Cc/(1 + e0) = %s, outside %s to %s", fixed(c.found, 3), fixed(c.low, 2), fixed(c.high, 2))
			},
			wanted: func(_ *row, c comparison) string { return "CR from " + fixed(c.low, 2) + " to " + fixed(c.high, 2) },
		}),
	},
	{
		ID: "compression-of-curve", Name: "compression index against its curve", Formula: "Cc against the steepest part of the curve", Tolerance: "25 %; a factor of 1.55 is a conflict",
		Source: "two readings of one curve", Mark: project, Severity: Conflict,
		Causes: []string{"slope per natural in place of log10 cycle (factor 2.303)", "read over the wrong part of the curve", "index and curve of different specimens"},
		Action: "Read the slope from the curve again, per log10 cycle.",
		relation: relate(relation{
			vars: []variable{compressionIndex, curveCompression}, doubt: 2.5, conflict: 5, when: positive(curveCompression),
			compare: func(r *row) (comparison, bool) {
				return withinLog(r.v[compressionIndex], r.v[curveCompression], 0.09)
			},
			say: func(r *row, c comparison) string {
				return fmt.Sprintf("Cc = %s where the curve has %s: a factor of %s", r.typed(compressionIndex), compressionIndex.plain(c.want), factorText(c.found/c.want))
			},
			wanted: func(_ *row, c comparison) string { return "about " + compressionIndex.plain(c.want) },
		}),
	},
	{
		ID: "recompression-of-curve", Name: "recompression index against its loop", Formula: "Cr against the slope of the unload–reload loop", Tolerance: "a factor of 1.8; 2.7 is a conflict",
		Source: "two readings of one curve", Mark: project, Severity: Conflict,
		Causes: []string{"read from the first loading, not from the loop", "slope per natural in place of log10 cycle", "index and curve of different specimens"},
		Action: "Take the slope of the loop.",
		relation: relate(relation{
			vars: []variable{recompressionIndex, curveRecompression}, doubt: 2.4, conflict: 4, when: positive(curveRecompression),
			compare: func(r *row) (comparison, bool) {
				return withinLog(r.v[recompressionIndex], r.v[curveRecompression], 0.25)
			},
			say: func(r *row, c comparison) string {
				return fmt.Sprintf("Cr = %s where the loop has %s", r.typed(recompressionIndex), recompressionIndex.plain(c.want))
			},
			wanted: func(_ *row, c comparison) string { return "about " + recompressionIndex.plain(c.want) },
		}),
	},
}

// correlatedCompression returns the Cc that index properties suggest: the mean
// of ln over a rule on e0 and one on LL. It is recomputed for every change that
// the diagnosis tries, so it stays at two rules; the bands of the profile weigh
// all families.
func correlatedCompression(r *row) (float64, bool) {
	if r.organic {
		if !r.known(waterContent) || r.v[waterContent] <= 0 {
			return 0, false
		}
		return 0.01 * r.v[waterContent], true
	}
	sum, n := 0.0, 0.0
	if e, ok := r.void(); ok && e > 0.28 {
		sum, n = sum+math.Log(0.40*(e-0.25)), n+1
	}
	if r.known(liquidLimit) && r.v[liquidLimit] > 15 {
		sum, n = sum+math.Log(0.009*(r.v[liquidLimit]-10)), n+1
	}
	if n == 0 {
		return 0, false
	}
	return math.Exp(sum / n), true
}

// factorText writes a ratio as the larger over the smaller.
func factorText(ratio float64) string {
	if !(ratio > 0) {
		return "no size"
	}
	if ratio < 1 {
		ratio = 1 / ratio
	}
	if ratio >= 20 {
		return fixed(ratio, 0)
	}
	return fixed(ratio, 1)
}
