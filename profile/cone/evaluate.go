package cone

import (
	"fmt"
	"math"
)

// A Point is one depth of a sounding, evaluated.
type Point struct {
	Depth    float64 // m
	Readings int     // averaged into it
	Stratum  int     // index into Options.Strata, or −1
	State
	Corrected float64 // qt, kPa
	Net       float64 // qt − σv0, kPa, greater than zero
	Q         float64 // (qt − σv0)/σ′v0

	Excess            Measure // u2 − u0, kPa
	EffectiveCone     Measure // qt − u2, kPa
	PorePressureRatio Measure // Bq
	FrictionRatio     Measure // F, percent
	BehaviourIndex    Measure // Ic
	Clay              bool    // used for σ′p
}

// A Sounding is what a cone penetration test says.
type Sounding struct {
	Points []Point // by depth
	Layers []Layer // by depth: the evidence for σ′p
	Notes  []string
}

// Evaluate evaluates a sounding. It is NewReducer, Add and Result in one.
func Evaluate(readings []Reading, stress Stress, o Options) (Sounding, error) {
	r := NewReducer(o)
	for _, x := range readings {
		r.Add(x)
	}
	return r.Result(stress)
}

// Result evaluates what was added, for the stresses in the ground. The Reducer
// is unchanged, and can take more readings.
//
// The notes say, in plain words, what was left out, averaged, assumed or looks
// wrong. The error wraps ErrNoReadings where nothing can be used, or ErrUnit
// where the size of the readings fits no unit of resistance or several; the notes
// are returned with it.
func (r *Reducer) Result(stress Stress) (Sounding, error) {
	e := evaluation{Options: r.options, stress: stress, notes: r.count.notes(r.options)}
	e.raw = make([]raw, 0, r.filled)
	for _, p := range r.pages {
		if p != nil {
			e.gather(p)
		}
	}
	e.sayGathered()
	if len(e.raw) == 0 {
		return Sounding{Notes: e.notes}, fmt.Errorf("%w: none of %d has a depth, a resistance and a known stress", ErrNoReadings, r.count.read)
	}
	if err := e.units(); err != nil {
		return Sounding{Notes: e.notes}, err
	}
	e.areaRatio()
	e.poreOffset()
	points := e.evaluate()
	if len(points) == 0 {
		return Sounding{Notes: e.notes}, fmt.Errorf("%w: the net resistance is nowhere greater than zero", ErrNoReadings)
	}
	e.mixedSigns(points)
	layers := e.condense(points)
	return Sounding{Points: points, Layers: layers, Notes: e.notes}, nil
}

// evaluate computes the points, and says where the cone met nothing.
func (e *evaluation) evaluate() []Point {
	points := make([]Point, 0, len(e.raw))
	empty, leading, trailing := 0, 0, 0
	bottom := 0.0
	for i := range e.raw {
		x := &e.raw[i]
		p, ok := e.point(x)
		if !ok {
			if len(points) == 0 {
				leading++
			} else {
				trailing++
			}
			continue
		}
		empty += trailing
		trailing, bottom = 0, x.depth
		points = append(points, p)
	}
	if leading > 0 && len(points) > 0 {
		e.say("no resistance beyond the weight of the ground down to %.2f m (%d depths left out): air, water or a predrilled hole", points[0].Depth, leading)
	}
	if empty > 0 {
		e.say("%d depths left out: resistance below the weight of the ground", empty)
	}
	if trailing > 0 {
		e.say("no resistance beyond the weight of the ground below %.2f m (%d depths left out): the sounding stops in air or was being withdrawn", bottom, trailing)
	}
	return points
}

// mixedSigns says where the resistance is that of sand and the pore pressure that
// of clay: sand drains while the cone passes, so a factor of 10 in qc is likelier.
func (e *evaluation) mixedSigns(points []Point) {
	mixed, judged := 0, 0
	for i := range points {
		p := &points[i]
		if !p.Excess.Known || !p.BehaviourIndex.Known {
			continue
		}
		judged++
		mixed += oneIf(p.BehaviourIndex.Value < e.ClayFrom && p.Excess.Value > p.State.Effective)
	}
	if 2*mixed > judged {
		e.say("the resistance is that of sand and the pore pressure that of clay at %d of %d depths: qc may be in bar or kgf/cm², ten times too large; used as given", mixed, judged)
	}
}

// point evaluates one depth; ok is false where there is no net resistance.
func (e *evaluation) point(x *raw) (p Point, ok bool) {
	qt := 1000 * x.resistance()
	if !x.qt.Known && x.u2.Known && e.area.Known {
		qt += (1 - e.area.Value) * x.u2.Value
	}
	net := qt - x.state.Total
	if x.resistance() <= nothing || !(net > 0) {
		return Point{}, false
	}
	p = Point{Depth: x.depth, Readings: x.n, Stratum: e.stratum(x.depth), State: x.state,
		Corrected: qt, Net: net, Q: net / x.state.Effective}
	if x.u2.Known {
		p.Excess = Of(x.u2.Value - x.state.Pore)
		p.EffectiveCone = Of(qt - x.u2.Value)
		p.PorePressureRatio = Of(p.Excess.Value / net)
	}
	if x.fs.Known {
		p.FrictionRatio = Of(100 * math.Max(x.fs.Value, 0) / net)
		p.BehaviourIndex = BehaviourIndex(net, x.state.Effective, p.FrictionRatio.Value)
	}
	p.Clay = !p.BehaviourIndex.Known || p.BehaviourIndex.Value >= e.ClayFrom
	return p, true
}

// stratum returns the index of the stratum that holds a depth, −1 for none. A
// boundary belongs to the stratum below it.
func (e *evaluation) stratum(depth float64) int {
	for i, s := range e.Strata {
		if depth >= s.Top && depth < s.Base {
			return i
		}
	}
	return -1
}
