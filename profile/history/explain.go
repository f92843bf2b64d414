package history

import (
	"fmt"
	"math"
	"sort"
	"strconv"
	"strings"
)

// Mechanisms can be told apart only where there are this many tests over this
// ratio of σ′v0 (common practice: with fewer than 5 tests, or less than 1.5, both shapes are shown),
// and one of them has this probability.
const (
	tellTests = 5
	tellRatio = 1.5
	tellShare = 0.75
)

// named is the probability from which an explanation is worth a word.
const named = 0.1

// explain says how the layer got its history.
func (l *layer) explain() LayerResult {
	out := LayerResult{Layer: l.index, Tests: len(l.tests), Sources: l.sourceResults()}
	for k := range l.model.mechanisms {
		m := &l.model.mechanisms[k]
		me := Mechanism{Name: m.name, Probability: l.post.mechanism[k]}
		for _, r := range m.reports {
			b := l.sizeOf(k, r.parameter)
			me.Parameters = append(me.Parameters, Parameter{r.name, r.size(&l.ground, b.Low), r.size(&l.ground, b.Best), r.size(&l.ground, b.High), r.unit})
		}
		me.Parameter = me.Parameters[0]
		out.Mechanisms = append(out.Mechanisms, me)
	}
	sort.SliceStable(out.Mechanisms, func(i, j int) bool { return out.Mechanisms[i].Probability > out.Mechanisms[j].Probability })
	low, high := l.stressRange()
	out.Distinguishable = len(l.tests) >= tellTests && high >= tellRatio*low && out.Mechanisms[0].Probability >= tellShare
	out.Sentence = l.sentence(&out, low, high)
	return out
}

// sizeOf returns the band of a parameter; of the prior where the mechanism has
// no weight to speak of.
func (l *layer) sizeOf(mechanism, parameter int) Band {
	m := &l.post.size[mechanism][parameter]
	if len(m.weight) == 0 {
		p := l.model.mechanisms[mechanism].parameters[parameter]
		return Band{p.mean - 1.645*p.sd, p.mean, p.mean + 1.645*p.sd}
	}
	return m.band()
}

// stressRange returns the least and greatest σ′v0 of the tests, kPa.
func (l *layer) stressRange() (low, high float64) {
	low = math.Inf(1)
	for _, i := range l.tests {
		if s := l.stress[l.in.Tests[i].Depth]; s > 0 {
			low, high = math.Min(low, s), math.Max(high, s)
		}
	}
	return math.Min(low, math.MaxFloat64), high
}

// sentence puts the explanation in words.
func (l *layer) sentence(r *LayerResult, low, high float64) string {
	if len(l.tests) == 0 {
		return "No test here gives σ′p itself, so nothing is said of how the ground got its history."
	}
	first := &r.Mechanisms[0]
	if r.Distinguishable {
		text := fmt.Sprintf("Most likely %s (%.0f %%): %s.", first.Name, 100*first.Probability, first.sizes(&l.ground))
		if next := r.Mechanisms[1]; next.Probability >= named {
			text += fmt.Sprintf(" Next is %s (%.0f %%).", next.Name, 100*next.Probability)
		}
		return text + " Geology has to confirm it."
	}
	var possible []string
	for _, m := range r.Mechanisms {
		if m.Probability < named && len(possible) >= 2 || len(possible) == 3 {
			break
		}
		possible = append(possible, fmt.Sprintf("%s (%.0f %%; %s)", m.Name, 100*m.Probability, m.sizes(&l.ground)))
	}
	why := "the shapes are too alike for the scatter of the tests"
	switch {
	case len(l.tests) < tellTests:
		why = fmt.Sprintf("%d of the %d tests that it takes", len(l.tests), tellTests)
	case high < tellRatio*low:
		why = fmt.Sprintf("σ′v0 of the tests only goes from %.0f to %.0f kPa", low, high)
	}
	return fmt.Sprintf("The mechanisms cannot be told apart (%s). Possible are %s.", why, strings.Join(possible, ", or "))
}

// sizes puts the size of a mechanism in words, with what it assumes.
func (m *Mechanism) sizes(g *ground) string {
	p := m.Parameter
	switch m.Name {
	case RemovedOverburden, RemovedAndAged:
		dry := g.buoyant / (g.buoyant + g.gamma)
		return fmt.Sprintf("%s of ground if it lay below water, at %.1f kN/m³ buoyant, or %s above it, at %.1f kN/m³",
			between(p.Low, p.High, "m"), g.buoyant, between(p.Low*dry, p.High*dry, "m"), g.buoyant+g.gamma)
	}
	assumed := ""
	if m.Name == FormerLowerWater && !g.waterKnown {
		assumed = " below ground level, where the water is taken to stand today"
	}
	return p.Name + " " + between(p.Low, p.High, p.Unit) + assumed
}

// between writes a range with two significant figures: it is known no better.
func between(low, high float64, unit string) string {
	text := twoFigures(low) + " to " + twoFigures(high)
	if unit != "" {
		text += " " + unit
	}
	return text
}

// twoFigures writes a number with two significant figures and no exponent.
func twoFigures(v float64) string {
	if v == 0 {
		return "0"
	}
	digits := 1 - int(math.Floor(math.Log10(math.Abs(v))))
	scale := math.Pow(10, float64(digits))
	return strconv.FormatFloat(math.Round(v*scale)/scale, 'f', max(0, min(digits, 4)), 64)
}

// sourceResults says what σ′p is over what each source predicts.
func (l *layer) sourceResults() []SourceResult {
	var out []SourceResult
	first := len(l.lines) - len(l.readings)
	for i := range l.sources {
		s := &l.sources[i]
		offset, variance := s.against(l.readings, l.lines[first:])
		half := 1.645 * math.Sqrt(variance)
		out = append(out, SourceResult{s.name, exponential(Band{-offset - half, -offset, -offset + half})})
	}
	return out
}
