package report

import (
	"fmt"
	"math"
	"strings"

	"pastload/profile"
)

// Summary states the stress history of a borehole, a sentence or two for each
// stratum: its zone with its probability, how OCR runs with depth, what may have
// made it so, and which tests are not in it. Nothing is said of a stratum that
// no evidence reaches.
func Summary(b *profile.BoreholeProfile) []string {
	var out []string
	for i := range b.Strata {
		if s := stratumSentence(b, &b.Strata[i]); s != "" {
			out = append(out, s)
		}
	}
	return out
}

func stratumSentence(b *profile.BoreholeProfile, s *profile.StratumProfile) string {
	points := within(b, s)
	head := fmt.Sprintf("%s, %s to %s m: ", orUnnamed(s.Stratum), depth(s.Top), depth(s.Base))
	if len(points) == 0 {
		return ""
	}
	text := head + zoneWords(b, s) + ocrWords(points) + "."
	if s.Sentence != "" {
		text += " " + strings.TrimSuffix(s.Sentence, ".") + "."
	}
	return text + testWords(b, s)
}

// within returns the points of a stratum that have an OCR.
func within(b *profile.BoreholeProfile, s *profile.StratumProfile) []profile.Point {
	var out []profile.Point
	for _, p := range b.Points {
		if p.Depth >= s.Top && p.Depth <= s.Base && p.Stratum == s.Stratum && p.OCR.Known {
			out = append(out, p)
		}
	}
	return out
}

// zoneWords names the zones that a stratum crosses, from the top.
func zoneWords(b *profile.BoreholeProfile, s *profile.StratumProfile) string {
	var parts []string
	for _, z := range b.Zones {
		top, base := math.Max(z.Top, s.Top), math.Min(z.Base, s.Base)
		if base-top <= 0.01 {
			continue
		}
		name := string(z.Zone)
		if z.OrZone != "" {
			name += " or " + string(z.OrZone)
		}
		if z.Probability.Known {
			name += fmt.Sprintf(" (%s)", Percentage(z.Probability.Value))
		}
		if top > s.Top+0.01 || base < s.Base-0.01 {
			name += fmt.Sprintf(" from %s to %s m", depth(top), depth(base))
		}
		parts = append(parts, name)
	}
	if len(parts) == 0 {
		return "no zone is given"
	}
	return strings.Join(parts, "; ")
}

// Percentage writes a probability without false certainty or precision.
func Percentage(p float64) string {
	switch {
	case p > 0.99:
		return "over 99 %"
	case p < 0.01:
		return "under 1 %"
	}
	return fmt.Sprintf("%.0f %%", 100*p)
}

// ocrWords tells how OCR runs through a stratum. A band as wide as a factor of
// two or more is said, as its best values mean little.
func ocrWords(points []profile.Point) string {
	first, last := points[0].OCR, points[len(points)-1].OCR
	a, z := ocr(first.Best), ocr(last.Best)
	var text string
	switch {
	case a == z:
		text = ", OCR about " + a
	case last.Best < first.Best:
		text = fmt.Sprintf(", OCR falling from %s to %s", a, z)
	default:
		text = fmt.Sprintf(", OCR rising from %s to %s", a, z)
	}
	widest := 0.0
	for _, p := range points {
		widest = math.Max(widest, p.OCR.High/p.OCR.Low)
	}
	if widest > 4 {
		text += fmt.Sprintf(" but poorly known (the 5 and 95 %% points are up to a factor of %.0f apart)", widest)
	}
	return text
}

// testWords counts the tests of a stratum that are not used and says why.
func testWords(b *profile.BoreholeProfile, s *profile.StratumProfile) string {
	total, bounds := 0, 0
	var out, conflicts []string
	for _, t := range b.Tests {
		if t.Stratum != s.Stratum || t.Depth < s.Top || t.Depth > s.Base {
			continue
		}
		total++
		if t.Used && t.Bound != profile.Exact {
			bounds++
		}
		if !t.Used {
			out = append(out, fmt.Sprintf("%s at %s m (%s)", orUnnamedTest(t.Specimen), depth(t.Depth), t.Why))
		} else if t.Verdict == profile.Conflicts {
			conflicts = append(conflicts, fmt.Sprintf("%s at %s m", orUnnamedTest(t.Specimen), depth(t.Depth)))
		}
	}
	used := total - len(out)
	text := ""
	switch {
	case total == 0 && strings.HasPrefix(s.Sentence, "No test"):
		return "" // the sentence says so already
	case total == 0:
		return " No preconsolidation stress was measured in it."
	case used > 0 && bounds == used:
		text = fmt.Sprintf(" Of its own it has %s, which only bounds σ′p.", counted(used, "test"))
		if used > 1 {
			text = fmt.Sprintf(" Of its own it has %s, which only bound σ′p.", counted(used, "test"))
		}
	case bounds > 0:
		text = fmt.Sprintf(" It rests on %s, %d of them only a bound.", counted(used, "test"), bounds)
	default:
		text = fmt.Sprintf(" It rests on %s.", counted(used, "test"))
	}
	if len(out) > 0 {
		text += fmt.Sprintf(" Not used: %s.", strings.Join(out, "; "))
	}
	if len(conflicts) > 0 {
		text += fmt.Sprintf(" In conflict with the rest: %s.", strings.Join(conflicts, "; "))
	}
	return text
}

func orUnnamed(name string) string {
	if name == "" {
		return "Unnamed stratum"
	}
	return name
}

func orUnnamedTest(specimen string) string {
	if specimen == "" {
		return "the test"
	}
	return specimen
}

func counted(n int, noun string) string {
	if n == 1 {
		return "1 " + noun
	}
	return fmt.Sprintf("%d %ss", n, noun)
}

// depth writes a depth to the centimetre, without trailing zeros beyond one decimal.
func depth(v float64) string {
	s := fixed(v, 2)
	return strings.TrimSuffix(s, "0")
}

// ocr writes an overconsolidation ratio with two significant figures.
func ocr(v float64) string {
	if v >= 10 {
		return fixed(v, 0)
	}
	return fixed(v, 1)
}
