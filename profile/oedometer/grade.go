package oedometer

import "fmt"

// grade sets the grade and its reasons: A needs every one of its conditions, B
// every one of its own, C is otherwise usable. A bound is "bound only" whatever
// else is good. The conditions are a tool's choice, in part common practice.
func (r *Interpretation) grade(read reading, step float64, c Curve) {
	if read.bound != Exact {
		r.Grade = BoundOnly
		r.Reasons = append(r.Reasons, read.why)
		return
	}
	virgin := virginCount(read.in, r.Preconsolidation.Best)
	class := 0
	for _, q := range r.Quality {
		if q.Applies && q.Scheme == lunneScheme {
			class = q.Rank
		}
	}
	notA := func(bad bool, why string) { r.note(bad, GradeB, why) }
	notB := func(bad bool, why string) { r.note(bad, GradeC, why) }
	r.Grade = GradeA

	notB(virgin < 2, fmt.Sprintf("%d points clear of the bend on the virgin line; B wants 2", virgin))
	notA(virgin == 2, "2 points clear of the bend on the virgin line; A wants 3")
	notB(r.MaxStressRatio < 4, fmt.Sprintf("highest stress %.1f σ′p; B wants 4, common practice", r.MaxStressRatio))
	notA(r.MaxStressRatio >= 4 && r.MaxStressRatio < 8, fmt.Sprintf("highest stress %.1f σ′p; A wants 8", r.MaxStressRatio))
	if !read.q.Known {
		notB(true, "too short to see whether the curve still steepens")
	} else {
		q := read.q.Value
		notB(q > 1.2, fmt.Sprintf("still steepening at the end (%.2f); B wants at most 1.2", q))
		notA(q > 1.1 && q <= 1.2, fmt.Sprintf("slightly steepening at the end (%.2f); A wants at most 1.1", q))
	}
	notB(r.Spread > 1.35, fmt.Sprintf("methods differ by a factor of %.2f; B wants at most 1.35", r.Spread))
	notA(r.Spread > 1.2 && r.Spread <= 1.35, fmt.Sprintf("methods differ by a factor of %.2f; A wants at most 1.2", r.Spread))
	notA(step > 1.55 && step <= 2.2, fmt.Sprintf("load step of factor %.2f around σ′p; A wants at most 1.5", step))
	if f := read.in.virgin.flattening; f > 0.05 {
		// Where the steepest part begins is hidden between two loads.
		notB(step > 1.55 && f > 0.1, fmt.Sprintf("the curve flattens by %.0f %% past its steepest part, with a load step of factor %.2f at yield", 100*f, step))
		notA(!(step > 1.55 && f > 0.1), fmt.Sprintf("the curve flattens by %.0f %% past its steepest part", 100*f))
	}
	before := 0
	for _, s := range read.in.s[read.in.first:] {
		if s <= recompressionEnd*r.Preconsolidation.Best {
			before++
		}
	}
	notB(before < 2, fmt.Sprintf("%d load clear of the bend before σ′p; B wants 2", before))
	notB(step > 2.2, fmt.Sprintf("load step of factor %.2f around σ′p; B wants at most doubling", step))
	notB(r.FirstLoadStrain > largeFirstLoad, fmt.Sprintf("the first load alone took %.1f %% of strain", r.FirstLoadStrain))
	notB(class == 4, "sample quality very poor")
	notA(class == 3, "sample quality poor")
	notA(class == 0, "sample quality not rated")
	notB(c.Swelling > 1, fmt.Sprintf("swelled by %.1f %% before loading", c.Swelling))
	if r.Grade == GradeA {
		r.Reasons = append(r.Reasons, fmt.Sprintf("virgin line of %d points to %.0f σ′p, small load steps at yield, good sample, methods within a factor of %.2f", virgin, r.MaxStressRatio, r.Spread))
	}
}

// note lowers the grade to at most the given one and adds the reason.
func (r *Interpretation) note(bad bool, grade, why string) {
	if !bad {
		return
	}
	if grade > r.Grade { // the letters ascend as grades fall
		r.Grade = grade
	}
	r.Reasons = append(r.Reasons, why)
}

// virginCount returns how many points lie past 1.5 σ′p.
func virginCount(in *input, yield float64) int {
	n := 0
	for _, s := range in.s {
		if s >= virginStart*yield {
			n++
		}
	}
	return n
}
