package oedometer

import "math"

// How the parts of the uncertainty are weighed. Measured on generated curves.
const (
	modelScatter   = 0.05 // of the combined value itself, natural log
	bracketShare   = 0.06 // of the log width of the load step around σ′p
	noiseRuns      = 16   // rows of the sign design
	leaveOutBlocks = 10   // a dense record is left out in this many parts
)

// deviation returns the standard deviation of ln σ′p of the combined value: what
// the constructions are known to scatter, the load step around the value, how far
// it moves when a point is left out or the readings are disturbed by 0.002 in e,
// and how far the constructions differ beyond their known biases.
func (in *input) deviation(around surroundings, mean, disagreement float64, outcomes []outcome) float64 {
	around.detail = false
	leave := in.leaveOneOut(around, mean)
	noise := in.noise(around, mean)
	step := 0.0
	if low, high, ok := in.bracket(math.Exp(mean)); ok {
		step = bracketShare * math.Log(high/low)
	}
	// Leaving out and noise both see the scatter of the readings: the larger.
	moved := math.Max(leave, noise)
	return math.Sqrt(modelScatter*modelScatter + step*step + moved*moved + disagreement*disagreement/4)
}

// combined returns ln σ′p of a changed loading.
func combined(l *loading, around surroundings) (float64, bool) {
	in, ok := newInput(l, around, virginShare)
	if !ok {
		return 0, false
	}
	mean, _, ok := combine(in.values())
	return mean, ok
}

// leaveOneOut returns the jackknife deviation of ln σ′p: each point, or each
// block of a dense record, left out in turn.
//
//	sd² = (n−1)/n Σ(y_i − ȳ)²
//
// Neighbours are not independent of each other on so few points, and a leverage
// point at the knee would rule it: each departure is held to 0.3.
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
		y, ok := combined(in.without(i, min(i+block, len(in.s))-1), around)
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
		amplitude /= 3 // each point is a mean of many readings
	}
	var squares, count float64
	for run := range noiseRuns {
		l := in.disturbed(amplitude, func(i int) float64 { return sign(run, i) })
		y, ok := combined(l, around)
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
