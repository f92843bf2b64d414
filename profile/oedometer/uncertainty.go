package oedometer

import "math"

// How the parts of the uncertainty are weighed. Set on generated curves, on the
// cautious side: the 5–95 % range holds the truth of clean ones in 95 to 100 %,
// as real curves are rougher, and of structured ones in 80 to 90 %.
const (
	modelScatter   = 0.025 // of the combined value itself, natural log
	shapeScatter   = 0.4   // of the correction for flattening, per unit of it
	bracketShare   = 0.06  // of the log width of the load step around σ′p
	readingNoise   = 0.002 // in e, of a single reading
	denseAveraging = 3     // each point of a dense record is a mean of many readings
	noiseRuns      = 16    // rows of the sign design
	leaveOutBlocks = 10    // a dense record is left out in this many parts
)

// An Uncertainty is the standard deviation of ln σ′p with its parts, each a
// standard deviation of its own.
type Uncertainty struct {
	Model        float64 // what the combined value is known to scatter on good curves
	Shape        float64 // of the correction for a curve that flattens again
	LoadStep     float64 // of the load step around the value
	LeaveOneOut  float64 // jackknife: each point left out in turn
	ReadingNoise float64 // every void ratio changed by ±0.002, in a fixed design of signs
	VirginRule   float64 // virgin line of segments from 0.8 or 0.95 of the steepest
	Disagreement float64 // half of what the constructions differ by beyond their known biases
	Total        float64
}

// uncertainty returns the parts and their total. Leaving out points, noise and
// the virgin rule all see the scatter of the readings: the largest counts.
func (in *input) uncertainty(around surroundings, mean, disagreement float64) Uncertainty {
	around.detail = false
	u := Uncertainty{
		Model:        modelScatter,
		Shape:        shapeScatter * in.virgin.flattening,
		LeaveOneOut:  in.leaveOneOut(around, mean),
		ReadingNoise: in.noise(around, mean),
		VirginRule:   in.virginRule(around, mean),
		Disagreement: disagreement / 2,
	}
	if low, high, ok := in.bracket(math.Exp(mean)); ok {
		u.LoadStep = bracketShare * math.Log(high/low)
	}
	moved := max(u.LeaveOneOut, u.ReadingNoise, u.VirginRule)
	for _, part := range []float64{u.Model, u.Shape, u.LoadStep, moved, u.Disagreement} {
		u.Total += part * part
	}
	u.Total = math.Sqrt(u.Total)
	return u
}

// combined returns ln σ′p of a changed loading.
func combined(l *loading, around surroundings, share float64) (float64, bool) {
	in, ok := newInput(l, around, share)
	if !ok {
		return 0, false
	}
	mean, _, ok := combine(in.values(), in.virgin.flattening)
	return mean, ok
}

// virginRule returns the larger change of ln σ′p under two other thresholds of
// the virgin line, halved as both are at the edge of what is reasonable.
func (in *input) virginRule(around surroundings, mean float64) float64 {
	largest := 0.0
	for _, share := range []float64{0.8, 0.95} {
		if y, ok := combined(in.loading, around, share); ok {
			largest = math.Max(largest, math.Abs(y-mean))
		}
	}
	return largest / 2
}

// leaveOneOut returns the root mean square change of ln σ′p when each point, or
// each block of a dense record, is left out in turn. A point at the knee would
// rule it: each change is held to 0.3.
func (in *input) leaveOneOut(around surroundings, mean float64) float64 {
	n := len(in.s) - in.first
	if n <= MinimumPoints {
		return 0
	}
	block := 1
	if n > 3*leaveOutBlocks {
		block = (n + leaveOutBlocks - 1) / leaveOutBlocks
	}
	var squares, count float64
	for i := in.first; i < len(in.s); i += block {
		y, ok := combined(in.without(i, min(i+block, len(in.s))-1), around, virginShare)
		if !ok {
			continue
		}
		d := math.Max(-0.3, math.Min(0.3, y-mean))
		squares += d * d
		count++
	}
	if count < 2 {
		return 0
	}
	return math.Sqrt(squares / count)
}

// noise returns the root mean square change of ln σ′p over a fixed design of
// signs of ±readingNoise on every void ratio.
func (in *input) noise(around surroundings, mean float64) float64 {
	amplitude := readingNoise
	if in.dense {
		amplitude /= denseAveraging
	}
	var squares, count float64
	for run := range noiseRuns {
		l := in.disturbed(amplitude, func(i int) float64 { return sign(run, i) })
		y, ok := combined(l, around, virginShare)
		if !ok {
			continue
		}
		d := math.Max(-0.5, math.Min(0.5, y-mean))
		squares += d * d
		count++
	}
	if count == 0 {
		return 0
	}
	return math.Sqrt(squares / count)
}

// sign returns an entry of the Hadamard matrix of order 16: rows are balanced and
// any two columns out of fifteen are uncorrelated.
func sign(row, column int) float64 {
	bits := row & (column%(noiseRuns-1) + 1)
	odd := false
	for ; bits != 0; bits &= bits - 1 {
		odd = !odd
	}
	if odd {
		return -1
	}
	return 1
}
