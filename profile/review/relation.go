package review

import "math"

// A relation is a check of one row that compares a value with what other values
// say it should be.
type relation struct {
	vars    []variable // all must be known; the first is the one it usually speaks of
	also    []variable // those that take part where they are known
	needs   uint64     // of vars
	mask    uint64     // of vars and also
	when    func(*row) bool
	compare func(*row) (comparison, bool)
	say     func(*row, comparison) string // the comparison with its numbers, without a full stop
	wanted  func(*row, comparison) string

	note, doubt, conflict, fault float64 // |z| from which it is said, 0 for never
	property                     int     // index in properties plus one, 0 for none
}

// A comparison is a value with what it should be. z is the deviation in
// standard deviations, zero where it agrees.
type comparison struct {
	found, want float64
	low, high   float64 // between which it would agree
	z           float64
	n           int // how many others say so
}

// within compares a value with a target and a standard deviation.
func within(found, want, sd float64) (comparison, bool) {
	return comparison{found: found, want: want, low: want - 2*sd, high: want + 2*sd, z: (found - want) / sd}, true
}

// withinLog compares positive values by ratio; sd is of the logarithm.
func withinLog(found, want, sd float64) (comparison, bool) {
	if !(found > 0) || !(want > 0) {
		return comparison{found: found, want: want, z: -ratioLimit}, want > 0
	}
	return comparison{found: found, want: want, low: want * math.Exp(-2*sd), high: want * math.Exp(2*sd), z: math.Log(found/want) / sd}, true
}

// ratioLimit stands for a deviation that has no logarithm.
const ratioLimit = 50

// between compares a value with an interval: z counts from its nearer end.
func between(found, low, high, sd float64) (comparison, bool) {
	c := comparison{found: found, low: low, high: high, want: math.Min(math.Max(found, low), high)}
	c.z = (found - c.want) / sd
	return c, true
}

// betweenLog compares a positive value with an interval by ratio.
func betweenLog(found, low, high, sd float64) (comparison, bool) {
	if !(found > 0) {
		return comparison{found: found, low: low, high: high, want: low, z: -ratioLimit}, true
	}
	c := comparison{found: found, low: low, high: high, want: math.Min(math.Max(found, low), high)}
	c.z = math.Log(found/c.want) / sd
	return c, true
}

// on evaluates the relation on a row; ok is false where it has nothing to say.
func (x *relation) on(r *row) (c comparison, ok bool) {
	if r.has&x.needs != x.needs || x.when != nil && !x.when(r) {
		return comparison{}, false
	}
	c, ok = x.compare(r)
	if !ok || math.IsNaN(c.z) || math.IsNaN(c.found) || math.IsInf(c.found, 0) || math.IsNaN(c.want) || math.IsInf(c.want, 0) {
		return comparison{}, false
	}
	c.z = math.Max(-ratioLimit, math.Min(ratioLimit, c.z))
	return c, true
}

// severity returns how far a deviation goes, "" where it agrees.
func (x *relation) severity(z float64) Severity {
	z = math.Abs(z)
	switch {
	case x.fault > 0 && z > x.fault:
		return Error
	case x.conflict > 0 && z > x.conflict:
		return Conflict
	case x.doubt > 0 && z > x.doubt:
		return Doubt
	case x.note > 0 && z > x.note:
		return Note
	}
	return ""
}

// involves tells whether a variable takes part.
func (x *relation) involves(v variable) bool { return x.mask&(1<<v) != 0 }

// misfit is what a deviation costs a hypothesis: minus the logarithm of a
// Student distribution with four degrees of freedom, so that how many checks a
// change restores counts for more than how far one of them was out.
func misfit(z float64) float64 { return 2.5 * math.Log1p(z*z/4) }

func maskOf(vs []variable) (m uint64) {
	for _, v := range vs {
		m |= 1 << v
	}
	return m
}
