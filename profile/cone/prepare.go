package cone

import (
	"fmt"
	"math"
)

// evaluation is one pass from cells to points.
type evaluation struct {
	Options
	stress Stress
	notes  []string
	raw    []raw
	area   Measure

	noStress int // readings where no stress is known
}

// raw is a cell as it was read, beside the stress there.
type raw struct {
	depth          float64
	n              int
	qc, qt, fs, u2 Measure // MPa, MPa, kPa, kPa
	state          State
}

func (e *evaluation) say(format string, args ...any) {
	e.notes = append(e.notes, fmt.Sprintf(format, args...))
}

// gather lists the cells of a metre that have readings and a stress, by depth.
func (e *evaluation) gather(p *page) {
	for i := range p {
		c := &p[i]
		if c.n == 0 {
			continue
		}
		depth := c.depth / float64(c.n)
		state, ok := e.stress(depth)
		if !ok || !finite(state.Total) || !finite(state.Pore) || !finite(state.Effective) || state.Effective <= 0 {
			e.noStress += int(c.n)
			continue
		}
		e.raw = append(e.raw, raw{depth: depth, n: int(c.n), state: state,
			qc: mean(c.qc, c.qcN), qt: mean(c.qt, c.qtN), fs: mean(c.fs, c.fsN), u2: mean(c.u2, c.u2N)})
	}
}

func (e *evaluation) sayGathered() {
	gaps, widest := 0, 0
	for i := 1; i < len(e.raw); i++ {
		if e.raw[i].depth-e.raw[i-1].depth > wideGap {
			gaps++
			if widest == 0 || e.raw[i].depth-e.raw[i-1].depth > e.raw[widest].depth-e.raw[widest-1].depth {
				widest = i
			}
		}
	}
	if gaps > 0 {
		e.say("gaps without readings: %d, the widest from %.2f to %.2f m", gaps, e.raw[widest-1].depth, e.raw[widest].depth)
	}
	if e.noStress > 0 {
		e.say("%d readings left out: no effective stress greater than zero is known there", e.noStress)
	}
	if e.PoreShift != 0 {
		e.say("%g kPa was added to every u2, as asked", e.PoreShift)
	}
}

// wideGap is a stretch without readings that is worth saying, m.
const wideGap = 1

// resistance is the corrected one where it was given.
func (x *raw) resistance() float64 {
	if x.qt.Known {
		return x.qt.Value
	}
	return x.qc.Value
}

// units finds readings in another unit than they are said to be, and converts
// them where only one unit makes sense.
func (e *evaluation) units() error {
	u2, u0 := make([]float64, 0, len(e.raw)), make([]float64, 0, len(e.raw))
	for i := range e.raw {
		if x := &e.raw[i]; x.u2.Known {
			u2, u0 = append(u2, x.u2.Value), append(u0, x.state.Pore)
		}
	}
	wet, note := poreUnit(u2, u0)
	if note != "" {
		e.say("%s", note)
	}
	// Air and predrilled holes at the ends say nothing of the unit.
	from, to := e.inGround()
	s := newSizes(to - from)
	for i := range e.raw {
		x := &e.raw[i]
		x.u2.Value = x.u2.Value*wet + e.PoreShift
		if i < from || i >= to {
			continue
		}
		q := x.resistance()
		s.resistance, s.total = append(s.resistance, q), append(s.total, x.state.Total)
		if x.fs.Known && x.fs.Value > 0 && q > 0 {
			s.friction = append(s.friction, x.fs.Value/q)
		}
		if x.u2.Known {
			s.pore, s.poreOver = append(s.pore, x.u2.Value), append(s.poreOver, q)
		}
	}
	factor, note, err := s.resistanceUnit()
	if err != nil {
		return err
	}
	if note != "" {
		e.say("%s", note)
	}
	for i := range e.raw {
		e.raw[i].qc.Value *= factor
		e.raw[i].qt.Value *= factor
	}
	return nil
}

// nothing is a resistance that is none, in MPa or any smaller unit.
const nothing = 1e-6

// inGround returns the stretch between the first and the last reading that
// meets any resistance.
func (e *evaluation) inGround() (from, to int) {
	to = len(e.raw)
	for from < to && e.raw[from].resistance() <= nothing {
		from++
	}
	for to > from && e.raw[to-1].resistance() <= nothing {
		to--
	}
	return from, to
}

// areaRatio settles the area ratio and says what its absence costs.
func (e *evaluation) areaRatio() {
	a := e.AreaRatio
	switch {
	case a.Known && a.Value > 1 && a.Value <= 100:
		e.say("area ratio %g taken as percent: %g", a.Value, a.Value/100)
		a.Value /= 100
	case a.Known && !(a.Value > 0 && a.Value <= 1):
		e.say("area ratio %g is not between 0 and 1: not used", a.Value)
		a = Measure{}
	}
	e.area = a
	share, apart := make([]float64, 0, len(e.raw)), make([]float64, 0, len(e.raw))
	uncorrected, dry := 0, 0
	for i := range e.raw {
		x := &e.raw[i]
		switch {
		case x.qt.Known:
			if x.qc.Known && x.u2.Known && a.Known && x.qt.Value > 0 {
				apart = append(apart, math.Abs(x.qc.Value+(1-a.Value)*x.u2.Value/1000-x.qt.Value)/x.qt.Value)
			}
		case !x.u2.Known:
			dry++
		case !a.Known:
			uncorrected++
			if net := 1000*x.qc.Value - x.state.Total; net > 0 {
				share = append(share, (1-usualAreaRatio)*x.u2.Value/net)
			}
		}
	}
	if m := median(apart); m > 0.05 {
		e.say("qt as given differs by %.0f %% from qc + (1 − %g)·u2: another area ratio was used; qt is taken as given", 100*m, a.Value)
	}
	if uncorrected > 0 {
		e.say("no area ratio: qt is taken as qc, not corrected for u2; with a ratio of %g the net resistance would be about %.0f %% higher",
			usualAreaRatio, 100*median(share))
	}
	if dry > 0 {
		e.say("%d of %d depths have no u2: qt is taken as qc there, and σ′p comes from the net resistance alone", dry, len(e.raw))
	}
}

// usualAreaRatio is a common value, to say what the correction is worth.
const usualAreaRatio = 0.8

// poreOffset drops u2 that cannot be and says where it begins below zero.
func (e *evaluation) poreOffset() {
	impossible, negative, known := 0, 0, 0
	var dry []float64
	for i := range e.raw {
		x := &e.raw[i]
		if !x.u2.Known {
			continue
		}
		known++
		if x.state.Pore <= 0 && len(dry) < 50 {
			dry = append(dry, x.u2.Value)
		}
		switch {
		case x.u2.Value < vacuum:
			impossible++
			x.u2 = Measure{}
		case x.u2.Value < 0:
			negative++
		}
	}
	if impossible > 0 {
		e.say("u2 below a full vacuum (%g kPa) at %d of %d depths: not used there; the sensor's zero is off", vacuum, impossible, known)
	}
	if start := median(dry); len(dry) >= 3 && start < -5 {
		e.say("u2 is about %.0f kPa above the water table, where it should be near zero: a zero offset of the sensor? Not corrected", start)
	} else if negative > 0 {
		e.say("u2 is negative at %d of %d depths: a zero offset, a filter not saturated, or dilative clay; the excess pressure gives no σ′p there", negative, known)
	}
}

// vacuum is the lowest gauge pressure that water can have, kPa.
const vacuum = -101.3
