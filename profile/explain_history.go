package profile

import (
	"cmp"
	"fmt"
	"slices"
	"strings"

	"pastload/correlate"
)

// history adds the line of the stress history at the depth, the zone and what
// may have made it.
func (x *explainer) history(points []*Point) {
	for _, p := range points {
		where := ""
		if len(points) > 1 {
			where = ", " + stratumName(p.Stratum)
		}
		x.group = "Stress history with depth" + where
		if !p.Preconsolidation.Known {
			x.say("σ′p", "none is given here: no evidence speaks of this stratum", "")
			x.compressionHere(p)
			continue
		}
		x.evidence(p)
		x.line(p)
		x.compressionHere(p)
		x.group = "Zone" + where
		x.zone(p)
		x.group = "What may have made it" + where
		x.mechanisms(p)
	}
}

// evidence lists what the line rests on in the stratum.
func (x *explainer) evidence(p *Point) {
	for i := range x.result.Tests {
		t := &x.result.Tests[i]
		e, ok := asEvidence(t, i)
		if !ok || x.ground.layerOf(t.Depth, t.Stratum) != p.stratum {
			continue
		}
		words := fmt.Sprintf("grade %s; standard deviation of ln σ′p %s", t.Grade, plain(e.LnSD, 3))
		x.add(Step{Name: "test at " + at(t.Depth, t.Specimen), Value: Number{Value: t.Preconsolidation.Best, Known: true, Bound: t.Bound}, Decimals: 1, Unit: "kPa", Words: words})
	}
	for i := range x.site.Past {
		e := &x.site.Past[i]
		if e.Size.Known && (e.Borehole == "" || e.Borehole == x.borehole.Name) && (e.Stratum == "" || e.Stratum == p.Stratum) {
			x.add(Step{Name: "known of the past: " + e.Kind, Value: e.Size, Decimals: decimalsOf(e.Size), Unit: pastUnit(e.Kind), Words: e.Reported, Source: cited(e.Size)})
		}
	}
	n := 0
	for _, t := range x.ground.neighbours(x.profile) {
		if t.Layer == p.stratum {
			n++
		}
	}
	if n > 0 {
		x.say("other boreholes", count(n, "test")+" of the same stratum, counted for less", "")
	}
	for i := range x.result.Results {
		d := &x.result.Results[i]
		if x.ground.layerOf(d.Depth, d.Stratum) != p.stratum {
			continue
		}
		for _, c := range d.Correlations {
			if c.Quantity == "preconsolidation stress" {
				x.add(Step{Name: "reading at " + at(d.Depth, d.Specimen), Formula: c.ID, Value: Known(c.Value), Decimals: 1, Unit: c.Unit, Mark: c.Verified})
			}
		}
	}
	if c := x.result.Cone; c != nil {
		n := 0
		for i := range c.Layers {
			if l := &c.Layers[i]; l.effective > 0 && len(l.coneEvidence) > 0 && x.ground.layerOf(l.depth, l.Stratum) == p.stratum {
				n++
			}
		}
		if n > 0 {
			x.say("cone sounding", count(n, "layer")+" of this stratum", "")
		}
	}
}

// pastUnit is the unit of the size of something past.
func pastUnit(kind string) string {
	if kind == "former load" {
		return "kPa"
	}
	return "m"
}

// cone adds the layer of the cone sounding at the depth and what it gives.
func (x *explainer) cone() {
	if x.result.Cone == nil {
		return
	}
	for i := range x.result.Cone.Layers {
		l := &x.result.Cone.Layers[i]
		if x.depth < l.Top || x.depth >= l.Base {
			continue
		}
		x.group = fmt.Sprintf("Cone sounding, %s to %s m", digits(l.Top, 2), digits(l.Base, 2))
		for _, y := range l.coneEvidence {
			x.add(Step{Name: y.Source.String(), Formula: "median of the layer", Value: Known(y.Cone), Decimals: stressDecimals, Unit: "kPa", Words: count(l.Readings, "reading")})
			c, ok := correlate.ByID(y.Correlation)
			if !ok {
				continue
			}
			args := correlate.Values{c.Inputs[0].Symbol: y.Cone}
			x.add(Step{Name: "σ′p by " + c.Name, Formula: c.Formula, Numbers: filled(c.Formula, args, y.Value), Value: Known(y.Value), Decimals: 1, Unit: "kPa", Source: c.Source, Mark: c.Verified.String()})
		}
	}
}

// line adds σ′p, OCR and POP with their 5, 50 and 95 % points.
func (x *explainer) line(p *Point) {
	three := func(r Range, key, name, unit, suffix string, decimals int) {
		if !r.Known {
			return
		}
		for _, v := range []struct {
			key, name string
			value     float64
		}{{key + "_low" + suffix, name + ", 5 % point", r.Low}, {key + suffix, name + ", 50 % point", r.Best}, {key + "_high" + suffix, name + ", 95 % point", r.High}} {
			x.add(Step{Key: v.key, Name: v.name, Formula: "average over the explanations of the stress history and a smooth departure from them", Value: Known(v.value), Decimals: decimals, Unit: unit, Mark: markComputed})
		}
	}
	three(p.Preconsolidation, "preconsolidation_stress", "σ′p", "kPa", "_kPa", stressDecimals)
	three(p.OCR, "ocr", "OCR", "", "", ratioDecimals)
	three(p.POP, "pop", "POP", "kPa", "_kPa", stressDecimals)
	if p.Effective.Known && p.Effective.Value > 0 {
		x.add(Step{Name: "check: best σ′p over best σ′v0", Formula: "σ′p/σ′v0; the OCR above also counts the error of σ′v0", Numbers: plain(p.Preconsolidation.Best, stressDecimals) + " / " + plain(p.Effective.Value, stressDecimals),
			Value: Known(p.Preconsolidation.Best / p.Effective.Value), Decimals: ratioDecimals, Mark: markDefinition})
	}
}

// zone adds the zone with the probabilities and the limits behind it.
func (x *explainer) zone(p *Point) {
	l := x.site.Settings.Limits
	x.say("limits of OCR", fmt.Sprintf("underconsolidated (suspected) below %s, normally consolidated from there, lightly overconsolidated from %s, heavily overconsolidated from %s",
		plain(l.NormallyConsolidated, 4), plain(l.LightlyOverconsolidated, 4), plain(l.HeavilyOverconsolidated, 4)),
		x.site.Settings.settingSource("normally consolidated from"))
	if p.Zone == "" {
		x.say("zone", "none is given", "")
		return
	}
	for _, z := range Zones {
		key := ""
		if z == p.Zone {
			key = "zone_probability"
		}
		x.add(Step{Key: key, Name: "probability that it is " + string(z), Formula: "share of the distribution of OCR between the limits", Value: Known(p.ZoneProbability[z]), Decimals: 3, Mark: markComputed})
	}
	x.add(Step{Key: "zone", Name: "zone, the most probable", Words: string(p.Zone)})
	x.say("what it means for design", p.Zone.Meaning(), "")
}

// mechanisms adds the explanations of the stratum's stress history.
func (x *explainer) mechanisms(p *Point) {
	if p.stratum >= len(x.result.Strata) {
		return
	}
	s := &x.result.Strata[p.stratum]
	for _, m := range s.Mechanisms {
		q := m.Parameter
		x.add(Step{Name: m.Name, Value: Known(m.Probability), Decimals: 3, Mark: markComputed,
			Words: strings.TrimSpace(fmt.Sprintf("probability; %s %s (%s to %s) %s", q.Name, significant(q.Best, 4), significant(q.Low, 4), significant(q.High, 4), q.Unit))})
	}
	x.say("in words", s.Sentence, "")
}

// compressionHere adds the compression index at the depth.
func (x *explainer) compressionHere(p *Point) {
	c := p.CompressionIndex
	if !c.Known {
		return
	}
	type at struct {
		depth, cc float64
		how       string
	}
	var measured, correlated []at
	for i := range x.result.Results {
		d := &x.result.Results[i]
		if x.borehole.StratumAt(d.Depth, d.Result.Stratum) != &x.borehole.Strata[p.stratum] {
			continue
		}
		if n := d.MeasuredCc; n.Known && n.Value > 0 {
			measured = append(measured, at{d.Depth, n.Value, cited(n)})
		} else if d.CorrelatedCc.Known {
			correlated = append(correlated, at{d.Depth, d.CorrelatedCc.Best, "correlations at that depth"})
		}
	}
	known, what := measured, "measured"
	if len(known) == 0 {
		known, what = correlated, "correlated"
	}
	s := Step{Key: "compression_index_here", Name: "compression index Cc at this depth", Formula: "the nearest " + what + " value", Value: Known(c.Best), Decimals: ratioDecimals}
	i, found := slices.BinarySearchFunc(known, p.Depth, func(k at, d float64) int { return cmp.Compare(k.depth, d) })
	switch {
	case len(known) == 0:
		return
	case found || i == 0:
		s.Numbers, s.Source = plain(known[i].cc, 6), known[i].how
	case i == len(known):
		s.Numbers, s.Source = plain(known[i-1].cc, 6), known[i-1].how
	default:
		a, b := known[i-1], known[i]
		s.Formula = "straight line between the " + what + " values above and below"
		s.Numbers = fmt.Sprintf("%s + (%s − %s) × (%s − %s) / (%s − %s)", plain(a.cc, 6), plain(b.cc, 6), plain(a.cc, 6), plain(p.Depth, depthDecimals), plain(a.depth, depthDecimals), plain(b.depth, depthDecimals), plain(a.depth, depthDecimals))
		s.Source = a.how + "; " + b.how
	}
	x.add(s)
}
