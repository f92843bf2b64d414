package oedometer

import (
	"fmt"
	"math"
)

// The limits of what a record may hold.
const (
	readingTolerance = 0.005 // in e, between two readings of one stage, and the largest rise under load taken as reading noise
	smallestStress   = 0.01  // kPa; less is a unit mistaken
	largestStress    = 1e6   // kPa; so is more
	largestVoidRatio = 30.0  // fibrous peat reaches 25
	swellingStress   = 100.0 // kPa; a specimen that rises above its start under more did not swell
)

// Prepare returns the record as a curve of void ratios with its branches found.
//
// Void ratios are taken as given, or computed from strain or height:
//
//	e = e0 − ε(1+e0)    e = H/Hs − 1    Hs = Md/(Gs·ρw·A), or H0/(1+e0)
//
// The initial void ratio is the one given; else from dimensions and solids; else
// w·Gs, taking the specimen as saturated; else the void ratio at zero stress, or
// of the first stage, where the stages carry void ratios.
//
// The error is a Problems that lists everything that cannot be right at once: a
// number that is none, heights and void ratios at or below zero, no way to a void
// ratio, a height that rises under load, masses that make no soil. What is odd
// but possible becomes a Finding of the curve.
func Prepare(r Record) (Curve, error) {
	var problems Problems
	checkRecord(r, &problems)
	checkStages(r, &problems)
	if len(problems) > 0 {
		return Curve{}, problems
	}
	curve := Curve{Kind: r.Kind, InitialHeight: r.InitialHeight, stages: r.Stages}
	solids := initialState(r, &curve, &problems)
	if len(problems) > 0 {
		return Curve{}, problems
	}
	for i, s := range r.Stages {
		e, known := voidRatio(i, s, r, curve.InitialVoidRatio, solids, &problems)
		switch {
		case !known && i > 0 && !r.Stages[i-1].read():
			// Said once for a run of steps.
		case !known:
			curve.add(i, "missing step", fmt.Sprintf("no void ratio, strain or height at %.4g kPa; the step is left out", s.EffectiveStress))
		case s.EffectiveStress == 0:
			if i > 0 && i < len(r.Stages)-1 {
				curve.add(i, "zero stress", "a stage at zero stress inside the test has no place on a logarithmic scale; it is left out")
			}
		default:
			curve.Points = append(curve.Points, Point{EffectiveStress: s.EffectiveStress, VoidRatio: e, Stage: i, Line: s.Line})
		}
	}
	if len(curve.Points) == 0 {
		problems = append(problems, Problem{Stage: -1, Quantity: "stages", Found: "none has both a stress and a reading", Wanted: "at least one"})
	}
	if len(problems) > 0 {
		return Curve{}, problems
	}
	findBranches(curve.Points)
	checkMonotony(&curve, &problems)
	checkKinds(r, &curve)
	if len(problems) > 0 {
		return Curve{}, problems
	}
	return curve, nil
}

// read reports whether the stage has any reading.
func (s Stage) read() bool { return s.VoidRatio.Known || s.Strain.Known || s.Height.Known }

// add appends a finding.
func (c *Curve) add(stage int, rule, message string) {
	c.Findings = append(c.Findings, Finding{stage, rule, message})
}

// voidRatio returns the void ratio of a stage from whichever reading it has, and
// reports readings that contradict each other or cannot be.
func voidRatio(i int, s Stage, r Record, e0, solids float64, problems *Problems) (float64, bool) {
	type reading struct {
		name string
		e    float64
	}
	var readings []reading
	if s.VoidRatio.Known {
		readings = append(readings, reading{"void ratio", s.VoidRatio.Value})
	}
	if s.Strain.Known {
		readings = append(readings, reading{"strain", e0 - s.Strain.Value/100*(1+e0)})
	}
	if s.Height.Known && solids > 0 {
		readings = append(readings, reading{"height", s.Height.Value/solids - 1})
	}
	if len(readings) == 0 {
		return 0, false
	}
	first := readings[0]
	for _, other := range readings[1:] {
		if math.Abs(other.e-first.e) > readingTolerance {
			*problems = append(*problems, Problem{i, s.Line, other.name,
				fmt.Sprintf("gives void ratio %.3f where %s gives %.3f", other.e, first.name, first.e),
				fmt.Sprintf("readings of one stage that agree within %.3f", readingTolerance)})
		}
	}
	if first.e <= 0 || first.e > largestVoidRatio {
		*problems = append(*problems, Problem{i, s.Line, first.name,
			fmt.Sprintf("gives void ratio %.3f", first.e),
			fmt.Sprintf("a void ratio above 0 and up to %.0f", largestVoidRatio)})
		return 0, false
	}
	return first.e, true
}
