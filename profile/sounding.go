package profile

import (
	"errors"
	"fmt"
	"strings"

	"pastload/profile/cone"
	"pastload/profile/history"
)

// A ConeProfile is what the cone sounding beside a borehole says.
type ConeProfile struct {
	Layers  []ConeLayer  `json:"layers"`
	Factors []ConeFactor `json:"factors"`
	Notes   []string     `json:"notes"`

	Sounding cone.Sounding `json:"-"`
}

// A ConeLayer is a window of depth condensed to one value of each kind.
type ConeLayer struct {
	Top              float64 `json:"top_m"`
	Base             float64 `json:"base_m"`
	Stratum          string  `json:"stratum"`
	Readings         int     `json:"readings"`
	Net              Number  `json:"net_cone_resistance_kPa"`
	Excess           Number  `json:"excess_cone_pore_pressure_kPa"`
	EffectiveCone    Number  `json:"effective_cone_resistance_kPa"`
	BehaviourIndex   Number  `json:"soil_behaviour_index"`
	FromNet          Number  `json:"preconsolidation_from_net_kPa"`
	FromExcess       Number  `json:"preconsolidation_from_excess_kPa"`
	FromEffective    Number  `json:"preconsolidation_from_effective_kPa"`
	coneEvidence     []cone.Yield
	depth, effective float64
}

// A ConeFactor is the site's own factor between a cone value and σ′p, from the
// published one and the oedometer tests beside the sounding.
type ConeFactor struct {
	ConeValue string   `json:"cone_value"`
	Factor    Range    `json:"factor"`
	Published float64  `json:"published_factor"`
	Tests     int      `json:"tests"`
	Notes     []string `json:"notes,omitempty"`
}

// sounding returns the cone sounding of a borehole, or nil.
func (s *Site) sounding(borehole string) *Sounding {
	for i := range s.Soundings {
		if s.Soundings[i].Borehole == borehole {
			return &s.Soundings[i]
		}
	}
	return nil
}

// cone evaluates the sounding beside a borehole. A sounding that says nothing
// becomes a note; one whose readings fit no unit is a problem.
func (g *ground) cone(site *Site, tests []Test) (*ConeProfile, Problems) {
	s := site.sounding(g.borehole.Name)
	if s == nil {
		return nil, nil
	}
	options := cone.Options{AreaRatio: coneMeasure(s.AreaRatio)}
	for i := range g.borehole.Strata {
		l := &g.borehole.Strata[i]
		options.Strata = append(options.Strata, cone.Stratum{Name: l.Name, Top: l.Top, Base: l.Base, LeaveOut: isGranular(l) || isOrganic(l)})
	}
	reducer := cone.NewReducer(options)
	for _, r := range s.Readings {
		reducer.Add(cone.Reading{
			Depth: r.Depth, ConeResistance: coneMeasure(r.ConeResistance), CorrectedResistance: coneMeasure(r.CorrectedResistance),
			SleeveFriction: coneMeasure(r.SleeveFriction), PorePressure: coneMeasure(r.PorePressure),
		})
	}
	result, err := reducer.Result(func(depth float64) (cone.State, bool) {
		here := g.at(depth, false)
		if !here.total.Known || !here.effective.Known {
			return cone.State{}, false
		}
		return cone.State{Total: here.total.Value, Pore: here.pore.Value, Effective: here.effective.Value}, true
	})
	if errors.Is(err, cone.ErrUnit) {
		return nil, Problems{{Place: "cone table, sounding at " + g.borehole.Name, Quantity: "cone resistance", Found: err.Error(), Wanted: "a header with the unit of the readings"}}
	}
	p := &ConeProfile{Sounding: result, Notes: result.Notes, Layers: []ConeLayer{}, Factors: []ConeFactor{}}
	if err != nil {
		p.Notes = append(p.Notes, err.Error())
		return p, nil
	}
	for _, l := range result.Layers {
		p.Layers = append(p.Layers, coneLayer(l))
	}
	p.calibrate(tests)
	return p, nil
}

func coneMeasure(n Number) cone.Measure { return cone.Measure{Value: n.Value, Known: n.Known} }

func fromCone(m cone.Measure) Number { return Number{Value: m.Value, Known: m.Known} }

// isGranular tells whether a stratum's soil is sand or coarser by its words: the
// relations for clay do not speak of it.
func isGranular(s *Stratum) bool {
	soil := strings.ToLower(s.Soil)
	if soil == "" {
		soil = strings.ToLower(s.Name)
	}
	for _, w := range []string{"sand", "gravel", "cobble", "made ground", "fill", "rock"} {
		if strings.Contains(soil, w) && !strings.Contains(soil, "clay") && !strings.Contains(soil, "sandy") {
			return true
		}
	}
	return false
}

func coneLayer(l cone.Layer) ConeLayer {
	out := ConeLayer{
		Top: l.Top, Base: l.Base, Stratum: l.Stratum, Readings: l.Used,
		Net: fromCone(l.Net), Excess: fromCone(l.Excess), EffectiveCone: fromCone(l.EffectiveCone), BehaviourIndex: fromCone(l.BehaviourIndex),
		coneEvidence: l.Yield, depth: l.Depth, effective: l.Effective,
	}
	for _, y := range l.Yield {
		switch y.Source {
		case cone.NetResistance:
			out.FromNet = Known(y.Value)
		case cone.ExcessPressure:
			out.FromExcess = Known(y.Value)
		case cone.EffectiveResistance:
			out.FromEffective = Known(y.Value)
		}
	}
	return out
}

// calibrate finds the site's own factor for each cone value from the used tests.
func (p *ConeProfile) calibrate(tests []Test) {
	var beside []cone.Test
	for i := range tests {
		if t := &tests[i]; t.Used && t.Bound == Exact {
			beside = append(beside, cone.Test{Depth: t.Depth, Preconsolidation: t.Preconsolidation.Best})
		}
	}
	for _, source := range []cone.Source{cone.NetResistance, cone.ExcessPressure, cone.EffectiveResistance} {
		f, err := cone.Calibrate(p.Sounding.Pairs(beside, source), cone.PriorFor(source))
		if err != nil {
			p.Notes = append(p.Notes, fmt.Sprintf("%s: %v", source, err))
			continue
		}
		p.Factors = append(p.Factors, ConeFactor{
			ConeValue: source.String(), Factor: Around(f.Low, f.Best, f.High), Published: f.Published, Tests: f.N, Notes: f.Notes,
		})
	}
}

// readings returns the layers as evidence. The published factors go in, with the
// error that all layers share: the history weighs it against the tests itself,
// and feeding it calibrated factors would count those tests twice.
func (p *ConeProfile) readings(g *ground) []history.Reading {
	if p == nil {
		return nil
	}
	var out []history.Reading
	for _, l := range p.Layers {
		if l.effective <= 0 {
			continue
		}
		for _, y := range l.coneEvidence {
			out = append(out, history.Reading{
				Source: coneSources[y.Source], Depth: l.depth, EffectiveStress: l.effective, Preconsolidation: y.Value,
				BetweenSD: y.Shared, WithinSD: y.Own, Layer: g.layerOf(l.depth, l.Stratum),
			})
		}
	}
	return out
}

// coneSources names the cone values as evidence; results given by depth use the
// same names, so that both are one source.
var coneSources = map[cone.Source]string{
	cone.NetResistance:       "cone, net resistance",
	cone.ExcessPressure:      "cone, excess pore pressure",
	cone.EffectiveResistance: "cone, effective resistance",
}
