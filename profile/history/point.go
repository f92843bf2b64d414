package history

import (
	"fmt"
	"math"
	"strings"
)

// tell writes the layer's part of the result.
func (l *layer) tell(out *Result) {
	for _, m := range l.mended {
		out.Notes = append(out.Notes, fmt.Sprintf(
			"%s, %.2f m: σ′v0 of %.0f kPa cannot stand beside that of the other depths (%.0f kPa on their line); the history there is inferred with the latter, OCR is of the former",
			l.name(), m.depth, m.given, m.used))
	}
	for i, t := range l.tests {
		out.Tests[t] = TestResult{ID: l.in.Tests[t].ID}
		l.tellTest(i, &l.in.Tests[t], &out.Tests[t])
	}
	for i, t := range l.bounds {
		out.Tests[t] = TestResult{ID: l.in.Tests[t].ID}
		l.tellBound(&l.in.Tests[t], &l.lines[len(l.stations)+len(l.tests)+i], &out.Tests[t])
	}
	sideBySide(len(l.stations), func(j int) {
		i := l.stations[j]
		out.Points[i] = l.in.point(i, &l.lines[j])
	})
	out.Zones = append(out.Zones, l.zones(out.Points)...)
	out.Layers = append(out.Layers, l.explain())
	switch n := len(l.tests); {
	case n == 0 && len(l.bounds)+len(l.near)+len(l.sources) > 0:
		out.Notes = append(out.Notes, l.name()+": no test here gives σ′p itself; the profile rests on "+l.restsOn())
	case n == 0:
		out.Notes = append(out.Notes, l.name()+": no evidence of σ′p; the profile is what is usual in such ground and no more")
	case n == 1:
		out.Notes = append(out.Notes, l.name()+": one test of σ′p; the scatter of tests here is not known")
	}
	conflicting := 0
	for _, t := range l.tests {
		if out.Tests[t].Verdict == Conflicts {
			conflicting++
		}
	}
	if conflicting > 1 && 3*conflicting >= len(l.tests) {
		out.Notes = append(out.Notes, fmt.Sprintf("%s: %d of %d tests conflict with the rest; which of them are right is not certain, and the band may be too narrow",
			l.name(), conflicting, len(l.tests)))
	}
}

// restsOn names the evidence of a layer that has no exact test.
func (l *layer) restsOn() string {
	var parts []string
	if len(l.bounds) > 0 {
		parts = append(parts, "bounds")
	}
	if len(l.near) > 0 {
		parts = append(parts, "tests of neighbouring boreholes")
	}
	if len(l.sources) > 0 {
		parts = append(parts, "correlations")
	}
	text := strings.Join(parts, " and ")
	if len(parts) == 1 {
		text += " alone"
	}
	if len(l.sources) > 0 {
		text += "; correlations err as a whole for a site"
	}
	return text
}

func (l *layer) name() string {
	if n := l.in.Layers[l.index].Name; n != "" {
		return n
	}
	return fmt.Sprintf("layer %d", l.index+1)
}

// noStress is the σ′v0 in kPa below which there is no overconsolidation ratio: a
// millimetre of ground, and less than any pore pressure is known to.
const noStress = 0.01

// point writes the distribution of ln σ′p at station i. The error of σ′v0 is
// taken as independent of it.
func (in *Input) point(i int, m *mixture) Point {
	s := in.Stations[i]
	b := m.band()
	p := Point{Depth: s.Depth, Layer: s.Layer, Preconsolidation: exponential(b)}
	_, p.LnSD = m.moments()
	if s.EffectiveStress < noStress {
		return p
	}
	p.HasOCR = true
	// The two sides of the band and the error of σ′v0 as root sum of squares.
	spread := 1.645 * s.LnSD
	best := b.Best - math.Log(s.EffectiveStress)
	p.OCR = exponential(Band{best - math.Hypot(b.Best-b.Low, spread), best, best + math.Hypot(b.High-b.Best, spread)})
	q := p.Preconsolidation
	p.POP.Best = q.Best - s.EffectiveStress
	p.POP.Low = p.POP.Best - math.Hypot(q.Best-q.Low, spread*s.EffectiveStress)
	p.POP.High = p.POP.Best + math.Hypot(q.High-q.Best, spread*s.EffectiveStress)
	ratio := m.shifted(-math.Log(s.EffectiveStress), s.LnSD)
	last := 0.0
	for z, limit := range in.Limits {
		below := ratio.below(math.Log(limit))
		p.ZoneProbability[z] = math.Max(0, below-last)
		last = below
		if p.OCR.Best >= limit {
			p.Zone = Zone(z + 1)
		}
	}
	p.ZoneProbability[3] = math.Max(0, 1-last)
	return p
}
