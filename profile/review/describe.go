package review

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"pastload/profile"
)

// enoughGain is how much a change must gain, as minus a logarithm of odds, to be
// named as the cause.
const enoughGain = 1.0

// strongGain is the gain at which several doubts with one cause are a conflict;
// namedGain is enough where the cause is a slip with a name.
const strongGain, namedGain = 8.0, 5.0

// belowOne is how far, in standard deviations, OCR must be below one to make a
// conflict of a σ′p that the rest of the ground already doubts.
const belowOne = 0.8

// rowFindings finds the causes of what does not agree on a row: one change at a
// time, the likeliest first, until nothing is left or no change helps.
func (c *context) rowFindings(r *row) []Finding {
	var out []Finding
	now := r
	rd := c.read(now)
	var changed uint64
	for range 4 {
		broken := c.broken(&rd)
		if len(broken) == 0 {
			break
		}
		hs := c.hypotheses(now, &rd, broken)
		if len(hs) == 0 || hs[0].gain < enoughGain {
			break
		}
		next := hs[0].apply(now)
		rd2 := c.read(next)
		restored := c.restored(&rd, &rd2, broken)
		if len(restored) == 1 && usual(hs, c.relations[restored[0]].vars[0]) {
			next = hs[0].apply(now)
			rd2 = c.read(next)
			restored = c.restored(&rd, &rd2, broken)
		}
		if len(restored) == 0 || changed&hs[0].mask() != 0 {
			break
		}
		out = append(out, c.describe(now, &rd, hs, restored))
		changed |= hs[0].mask()
		now, rd = next, rd2
	}
	return append(out, c.leftOver(now, &rd, changed)...)
}

// usual puts the change of the variable that a check speaks of first. One broken
// check is mended by many changes: a slip elsewhere that happens to fit is no
// evidence.
func usual(hs []change, v variable) bool {
	for i := range hs {
		if (hs[i].v == v || hs[i].pair && hs[i].other == v) && hs[i].gain > hs[0].gain-3.5 {
			h := hs[i]
			copy(hs[1:i+1], hs[:i])
			hs[0] = h
			return i > 0
		}
	}
	return false
}

// restored returns the broken relations that agree after a change.
func (c *context) restored(before, after *reading, broken []int) []int {
	var out []int
	for _, i := range broken {
		if after.ok[i] && c.relations[i].severity(after.c[i].z).Rank() < Doubt.Rank() {
			out = append(out, i)
		}
	}
	return out
}

// describe makes the finding of a change.
func (c *context) describe(r *row, rd *reading, hs []change, restored []int) Finding {
	h := &hs[0]
	slices.SortStableFunc(restored, func(a, b int) int { return c.weightier(rd, h.v, a, b) })
	main := restored[0]
	rule := c.ruleOf[main]
	f := r.finding(rule, h.v)
	f.Severity = c.relations[main].severity(rd.c[main].z)
	strong := len(restored) > 1 && (h.gain >= strongGain || h.gain >= namedGain && h.slip.how != "")
	if f.Severity == Doubt && (strong || h.v == preconsolidation && c.belowOne(rd)) {
		f.Severity = Conflict
	}
	f.Found = r.shown(h.v)
	f.Wanted = c.relations[main].wanted(r, rd.c[main])
	f.Message = capital(c.relations[main].say(r, rd.c[main])) + "."
	f.Impact = r.impact(h.v, h.slip.value)
	for _, i := range restored[1:] {
		f.Evidence = append(f.Evidence, capital(c.relations[i].say(r, rd.c[i]))+".")
	}
	f.with = append(f.with, h.vars...)
	if h.slip.how != "" {
		f.fix, f.gain = c.correctValues(r, h), h.gain
	}
	if h.slip.how != "" || isEntered(h.v) {
		c.suggest(&f, r, h, len(restored))
	}
	if h.v == preconsolidation {
		c.explainYield(&f, r)
	}
	if other := rival(hs); other != nil {
		f.with = append(f.with, other.vars...)
		f.Message += " " + capital(other.inWords(r)) + " would do nearly as well."
	}
	return f
}

// belowOne tells whether OCR is below one on a row whose σ′p the history doubts.
func (c *context) belowOne(rd *reading) bool {
	doubted, below := false, false
	for i, rule := range c.ruleOf {
		if !rd.ok[i] {
			continue
		}
		switch rule.ID {
		case "stress-history":
			doubted = c.relations[i].severity(rd.c[i].z).Rank() >= Doubt.Rank() && rd.c[i].z < 0
		case "ocr-below-one":
			below = rd.c[i].z < -belowOne
		}
	}
	return doubted && below
}

// suggest adds the change that would restore agreement.
func (c *context) suggest(f *Finding, r *row, h *change, makes int) {
	if h.pair {
		f.Message += fmt.Sprintf(" %s and %s exchanged would make %s agree.", traits[h.v].symbol, traits[h.other].symbol, checks(makes))
		f.Suggested = &Suggestion{Quantity: traits[h.v].quantity, Value: known(h.v, h.slip.value), How: h.slip.how, Makes: makes}
		f.Wanted = h.v.text(h.slip.value)
		f.Causes = putFirst(f.Causes, h.slip.how)
		return
	}
	how := ""
	if h.slip.how != "" {
		how = " (" + strings.Join(append([]string{h.slip.how}, h.like...), ", or ") + ")"
		f.Causes = putFirst(f.Causes, h.slip.how)
		f.Wanted = h.v.text(h.slip.value)
	} else {
		f.Wanted = "about " + h.v.text(h.slip.value)
	}
	f.Message += fmt.Sprintf(" %s%s would make %s agree.", h.slip.inWords(r, h.v), how, checks(makes))
	f.Suggested = &Suggestion{Quantity: traits[h.v].quantity, Value: known(h.v, h.slip.value), How: h.slip.how, Unit: h.slip.unit, Makes: makes}
}

func checks(n int) string {
	switch n {
	case 1:
		return "it"
	case 2:
		return "both checks"
	}
	return fmt.Sprintf("all %d checks", n)
}

// known returns a value as it would be entered.
func known(v variable, x float64) profile.Number {
	if y, ok := plainNumber(v.plain(x)); ok {
		x = y
	}
	return profile.Known(x)
}

// isEntered tells whether another value of a variable would be a correction. A
// result of a test that depends on judgement or on the sample is tested again,
// not corrected to fit.
func isEntered(v variable) bool {
	switch v {
	case preconsolidation, preconsolidationLow, preconsolidationHigh, compressionIndex, recompressionIndex, swellingIndex,
		secondaryIndex, undrainedStrength, sensitivity, curveYield, curveCompression, curveRecompression:
		return false
	}
	return true
}

// rival returns the second change where it is nearly as likely as the first and
// about another quantity.
func rival(hs []change) *change {
	if len(hs) > 1 && hs[1].gain > hs[0].gain-1 && hs[1].v != hs[0].v {
		return &hs[1]
	}
	return nil
}

func (h *change) inWords(r *row) string {
	if h.pair {
		return traits[h.v].symbol + " and " + traits[h.other].symbol + " exchanged"
	}
	return h.slip.inWords(r, h.v)
}

// weightier puts the check to be named first: the heavier, then one that speaks
// of the variable, then the one further out.
func (c *context) weightier(rd *reading, v variable, a, b int) int {
	x, y := c.relations[a], c.relations[b]
	sa, sb := x.severity(rd.c[a].z).Rank(), y.severity(rd.c[b].z).Rank()
	if sa != sb {
		return sb - sa
	}
	if p, q := x.property == 0, y.property == 0; p != q {
		if p {
			return -1
		}
		return 1
	}
	if p, q := x.vars[0] == v, y.vars[0] == v; p != q {
		if p {
			return -1
		}
		return 1
	}
	if za, zb := math.Abs(rd.c[a].z), math.Abs(rd.c[b].z); za != zb {
		if za > zb {
			return -1
		}
		return 1
	}
	return a - b
}

// leftOver reports what no change explains: one finding for each variable that a
// broken check speaks of, and notes.
func (c *context) leftOver(r *row, rd *reading, changed uint64) []Finding {
	var out []Finding
	about := map[variable]int{}
	for i, x := range c.relations {
		if !rd.ok[i] {
			continue
		}
		s := x.severity(rd.c[i].z)
		v := x.vars[0]
		if s == "" || s == Note && x.mask&changed != 0 {
			continue
		}
		if at, seen := about[v]; seen && s != Note && out[at].Severity != Note {
			f := &out[at]
			f.Evidence = append(f.Evidence, capital(x.say(r, rd.c[i]))+".")
			if s.Rank() > f.Severity.Rank() {
				f.Severity = s
			}
			continue
		}
		f := r.finding(c.ruleOf[i], v)
		f.Severity = s
		f.Found, f.Wanted = r.shown(v), x.wanted(r, rd.c[i])
		f.Message = capital(x.say(r, rd.c[i])) + "."
		f.with = append(f.with, x.vars...)
		if v == preconsolidation && s != Note {
			c.explainYield(&f, r)
		}
		f.Impact = r.impact(v, rd.c[i].want)
		if s == Note {
			f.Impact = 0
		} else {
			about[v] = len(out)
		}
		out = append(out, f)
	}
	return out
}

// finding starts the finding of a rule about a variable of a row.
func (r *row) finding(rule *Rule, v variable) Finding {
	f := Finding{
		Rule: rule.ID, Borehole: r.borehole.Name, Depth: r.depth, Specimen: r.specimen, Quantity: traits[v].quantity,
		Causes: slices.Clone(rule.Causes), Action: rule.Action, Source: rule.Reference(),
	}
	if v == curveWater || v == curveGravity || v == curveVoidRatio {
		f.Quantity += " (oedometer)"
	}
	if s := r.cell(v); s != "" {
		f.Cells = []string{s}
	}
	return f
}

// impact is the share by which a change moves the mean of its quantity in the
// stratum, times the weight of the quantity.
func (r *row) impact(v variable, to float64) float64 {
	from := r.v[v]
	if !(from > 0) || !(to > 0) || math.IsInf(to, 0) {
		return traits[v].weight
	}
	n := 1
	if r.group != nil {
		n = 0
		for _, o := range r.group.rows {
			if o.known(v) {
				n++
			}
		}
	}
	return traits[v].weight * math.Min(3, math.Abs(math.Log(to/from))) / float64(max(n, 1))
}

// putFirst puts a cause before the others, which it replaces where it says the
// same.
func putFirst(causes []string, first string) []string {
	out := []string{first}
	for _, c := range causes {
		if c != first {
			out = append(out, c)
		}
	}
	return out[:min(len(out), 4)]
}

// capital writes a sentence's first letter large where it is a plain word; a
// symbol keeps its case.
func capital(s string) string {
	word, _, _ := strings.Cut(s, " ")
	if len(word) < 3 || word[0] < 'a' || word[0] > 'z' || strings.ContainsAny(word, "=/·") {
		if word != "a" && word != "at" {
			return s
		}
	}
	return strings.ToUpper(s[:1]) + s[1:]
}
