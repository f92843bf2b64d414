package profile

import (
	"fmt"

	"pastload/profile/history"
)

// zoneOf names the zones that history counts.
func zoneOf(z history.Zone) Zone { return Zones[z] }

func rangeOf(b history.Band) Range {
	if !finite(b.Low, b.Best, b.High) {
		return Range{}
	}
	return Around(b.Low, b.Best, b.High)
}

// tellHistory puts all evidence of a borehole together and fills in its
// profile: the line with its band, the zones, the mechanisms, and what the rest
// of the ground says of every test.
func (g *ground) tellHistory(site *Site, p *Profile, b *BoreholeProfile, stations []station) {
	in := g.evidence(site, p, b, stations)
	if len(in.Layers) == 0 {
		b.Notes = append(b.Notes[:0], "No preconsolidation stress was measured here and nothing stands in for one: stresses only.")
		return
	}
	result, err := history.Infer(in.Input)
	if err != nil {
		b.Notes = append(b.Notes, "No stress history is given: "+err.Error())
		return
	}
	for i := range result.Points {
		tellPoint(&b.Points[in.point[i]], &result.Points[i])
	}
	for i, t := range result.Tests {
		if t.Verdict != "" { // bounds are judged too, though they are no points on the line
			tellTest(&b.Tests[in.Tests[i].ID], &t)
		}
	}
	for _, z := range result.Zones {
		b.Zones = append(b.Zones, zoneInterval(z))
	}
	for _, l := range result.Layers {
		s := &b.Strata[in.stratum[l.Layer]]
		s.Sentence = l.Sentence
		for _, m := range l.Mechanisms {
			s.Mechanisms = append(s.Mechanisms, Mechanism{Name: m.Name, Probability: m.Probability, Parameter: Parameter(m.Parameter)})
		}
	}
	if n := result.NextTest; n.Known {
		b.NextTest = &NextTest{Depth: n.Depth, Stratum: g.borehole.Strata[in.stratum[n.Layer]].Name, Narrowing: n.Narrowing}
	}
	if i := result.MostInfluential; i >= 0 {
		t := &b.Tests[in.Tests[i].ID]
		b.Influence = t.Specimen
		if b.Influence == "" {
			b.Influence = fmt.Sprintf("%.2f m", t.Depth)
		}
	}
	b.Notes = append(b.Notes, result.Notes...)
}

func tellPoint(p *Point, h *history.Point) {
	p.Preconsolidation = rangeOf(h.Preconsolidation)
	p.POP = rangeOf(h.POP)
	if !h.HasOCR {
		return
	}
	p.OCR = rangeOf(h.OCR)
	p.Zone = zoneOf(h.Zone)
	p.ZoneProbability = map[Zone]float64{}
	for i, v := range h.ZoneProbability {
		p.ZoneProbability[Zones[i]] = v
	}
}

func tellTest(t *Test, h *history.TestResult) {
	t.Expected = rangeOf(h.Expected)
	if finite(h.Z) {
		t.Z = Known(h.Z)
	}
	t.Verdict = h.Verdict
}

func zoneInterval(h history.ZoneInterval) ZoneInterval {
	z := ZoneInterval{
		Top: h.Top.Best, Base: h.Base.Best, Zone: zoneOf(h.Zone),
		Probability: Known(h.Probability), OCR: rangeOf(h.OCR), Meaning: zoneOf(h.Zone).Meaning(),
	}
	if h.Other != h.Zone {
		z.OrZone = zoneOf(h.Other)
	}
	return z
}
