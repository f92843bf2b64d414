package history

import "math"

// A test conflicts when it is further from what the others say than this many
// of the standard deviations that judge it, and all the evidence together makes
// it this many times as probable to be wild as any test is: the good neighbour
// of a wrong test does not suffer for it. It is doubtful beyond the second
// limit. The limits were set where one untouched test in a hundred conflicts on
// natural clays.
const (
	conflictAt   = 2.95
	conflictWild = 4.0
	doubtAt      = 2.0
)

// judgingSD is the standard deviation that a difference is judged by. The one
// of the prediction rests on the scatter of a few tests and is itself
// uncertain; it is shrunk by two thirds, in logarithms, to what tests of the
// grade have elsewhere. So a 5 % difference among tests that agree to 1 % is
// no conflict, and a wrong test in poor company still is.
func judgingSD(predicted, grade float64) float64 {
	return math.Cbrt(predicted * grade * grade)
}

// verdict returns the verdict on a normal score, a judged difference, and how
// many times as probable as before it is that the test is wild.
func verdict(z, judged, wild float64) string {
	switch {
	case judged > conflictAt && wild > conflictWild:
		return Conflicts
	case judged > doubtAt && math.Abs(z) > 1.645:
		return Doubtful
	}
	return Agrees
}

// certain keeps probabilities that a normal score is taken of inside its reach.
const certain = 1e-15

// tellTest confronts row i of the layer with what the other rows say.
func (l *layer) tellTest(i int, t *Test, out *TestResult) {
	value, sd := t.observation()
	m := &l.post.expected[i]
	b := m.band()
	out.Used = true
	out.Expected = exponential(b)
	out.Z = quantile(math.Min(math.Max(m.below(value), certain), 1-certain))
	out.Judged = math.Abs(value-b.Best) / judgingSD((b.High-b.Low)/(2*1.645), sd)
	out.Wild = l.post.wild[i]
	out.Verdict = verdict(out.Z, out.Judged, out.Wild/l.model.Wild)
	here := l.lines[len(l.stations)+i]
	out.Influence = math.Abs(here.at(0.5) - b.Best)
}

// exponential takes a band of logarithms to stresses.
func exponential(b Band) Band { return Band{math.Exp(b.Low), math.Exp(b.Best), math.Exp(b.High)} }
