package oedometer

import (
	"math"
	"math/rand"
)

// A soil is a generated clay whose yield stress is known: the stress at which
// the two asymptotes of its curve meet in e–log σ′.
type soil struct {
	yield, cc, cr, e0 float64
	width             float64 // of the knee, log cycles
	collapse          float64 // extra virgin slope just past yield, as a share of cc
	hyperbolic        bool    // a knee of another shape, never used for calibration
	decay             float64 // log cycles over which the extra slope decays
}

// start is the stress at which e = e0.
const generatedStart = 5.0

// voidRatio returns e at a stress on first loading.
func (s soil) voidRatio(stress float64) float64 {
	x, xp, x0 := math.Log10(stress), math.Log10(s.yield), math.Log10(generatedStart)
	return s.e0 - s.fall(x, xp) + s.fall(x0, xp)
}

func (s soil) fall(x, xp float64) float64 {
	u := x - xp
	e := s.cr*u + (s.cc-s.cr)*s.knee(u)
	if s.collapse > 0 {
		// A virgin slope that decays from cc(1+collapse) to cc.
		e += s.cc * s.collapse * s.decay * (1 - math.Exp(-s.knee(u)/s.decay))
	}
	return e
}

// knee is a ramp with a rounded corner: 0 well below, u well above.
func (s soil) knee(u float64) float64 {
	w := s.width
	if s.hyperbolic {
		return 0.5 * (u + math.Sqrt(u*u+1.4*w*1.4*w))
	}
	if u/w > 40 {
		return u
	}
	return w * math.Log1p(math.Exp(u/w))
}

// A plan is how the test on it was run.
type plan struct {
	first, ratio, last float64 // first stress, stress ratio of steps, stress not to exceed
	noise              float64 // standard deviation in e
	readings           int     // of a constant-rate test; 0 for increments
	loopAt             float64 // unload from the first stress above this, 0 for no loop
	loopTo             float64
}

// stages runs the test.
func (p plan) stages(s soil, r *rand.Rand) []Stage {
	var out []Stage
	add := func(stress, e float64) {
		if p.noise > 0 {
			e += p.noise * r.NormFloat64()
		}
		out = append(out, Stage{EffectiveStress: stress, VoidRatio: Known(e)})
	}
	if p.readings > 0 {
		for i := range p.readings {
			x := math.Log10(p.first) + float64(i)/float64(p.readings-1)*math.Log10(p.last/p.first)
			add(math.Pow(10, x), s.voidRatio(math.Pow(10, x)))
		}
		return out
	}
	looped := p.loopAt == 0
	for stress := p.first; stress <= p.last*1.0001; stress *= p.ratio {
		add(stress, s.voidRatio(stress))
		if !looped && stress >= p.loopAt {
			looped = true
			e := s.voidRatio(stress)
			var down []float64
			for t := stress / 2; t >= p.loopTo*0.999; t /= 2 {
				e += s.cr * math.Log10(2)
				add(t, e)
				down = append(down, t)
			}
			for i := len(down) - 2; i >= 0; i-- {
				e -= s.cr * math.Log10(2) * 1.05
				add(down[i], e)
			}
			e -= s.cr * math.Log10(2) * 1.3
			add(stress, e) // slightly below first loading
		}
	}
	return out
}

// record prepares the test.
func (p plan) record(s soil, r *rand.Rand) Record {
	kind := Incremental24h
	if p.readings > 0 {
		kind = ConstantRate
	}
	return Record{Kind: kind, InitialVoidRatio: Known(s.e0), Stages: p.stages(s, r)}
}

// A family is a kind of curve with the way to draw one.
type family struct {
	name       string
	kind       familyKind
	calibrates bool // its other draws set the calibration
	n          int
	draw       func(r *rand.Rand) (soil, plan)
}

// A familyKind says what is asked of a family.
type familyKind int

const (
	ordinary   familyKind = iota // without collapse, to 8 σ′p or more
	structured                   // collapsing, to 8 σ′p or more
	middling                     // ends between 2 and 8 σ′p
	short                        // ends below 2.2 σ′p
)

func between(r *rand.Rand, a, b float64) float64 { return a + (b-a)*r.Float64() }

// soft draws an ordinary soft clay; the yield stress lies anywhere between two
// loads.
func soft(r *rand.Rand, width, ratio float64) soil {
	cc := between(r, 0.3, 0.8)
	return soil{yield: math.Pow(10, between(r, math.Log10(70), math.Log10(220))), cc: cc, cr: ratio * cc, e0: 0.6 + 1.6*cc, width: width}
}

// ends returns a plan of doubling (or other) loads that ends between low and
// high times the yield stress.
func ends(s soil, ratio, low, high, noise float64) plan {
	p := plan{first: 12.5, ratio: ratio, noise: noise}
	for p.last = p.first; p.last*ratio <= high*s.yield*1.0001; p.last *= ratio {
	}
	return p
}

var families = []family{
	{"soft, LIR 1, 8-16", ordinary, true, 300, func(r *rand.Rand) (soil, plan) {
		s := soft(r, between(r, 0.04, 0.12), between(r, 0.08, 0.16))
		return s, ends(s, 2, 8, 16, between(r, 0.001, 0.003))
	}},
	{"soft, LIR 0.5, 8-12", ordinary, true, 300, func(r *rand.Rand) (soil, plan) {
		s := soft(r, between(r, 0.04, 0.12), between(r, 0.08, 0.16))
		return s, ends(s, 1.5, 8, 12, between(r, 0.001, 0.003))
	}},
	{"soft with loop, LIR 1, 8-16", ordinary, true, 300, func(r *rand.Rand) (soil, plan) {
		s := soft(r, between(r, 0.04, 0.12), between(r, 0.08, 0.16))
		p := ends(s, 2, 8, 16, between(r, 0.001, 0.003))
		p.loopAt, p.loopTo = 2*s.yield, s.yield/3
		return s, p
	}},
	{"rounded w .12-.2, LIR 1, 8-16", ordinary, true, 300, func(r *rand.Rand) (soil, plan) {
		s := soft(r, between(r, 0.12, 0.2), between(r, 0.08, 0.16))
		return s, ends(s, 2, 8, 16, between(r, 0.001, 0.003))
	}},
	{"other knee, LIR 1, 8-16", ordinary, false, 300, func(r *rand.Rand) (soil, plan) {
		s := soft(r, between(r, 0.04, 0.12), between(r, 0.08, 0.16))
		s.hyperbolic = true
		return s, ends(s, 2, 8, 16, between(r, 0.001, 0.003))
	}},
	{"stiff Cr/Cc .25, LIR 1, 8-16", ordinary, false, 300, func(r *rand.Rand) (soil, plan) {
		s := soft(r, between(r, 0.04, 0.12), 0.25)
		s.cc *= 0.6
		s.cr *= 0.6
		return s, ends(s, 2, 8, 16, between(r, 0.001, 0.003))
	}},
	{"structured, LIR 0.5, 8-12", structured, true, 300, func(r *rand.Rand) (soil, plan) {
		s := soft(r, between(r, 0.04, 0.1), between(r, 0.05, 0.1))
		s.collapse, s.decay = between(r, 0.5, 1.2), between(r, 0.2, 0.6)
		s.e0 += 0.5
		return s, ends(s, 1.5, 8, 12, between(r, 0.001, 0.003))
	}},
	{"structured, LIR 1, 8-16", structured, true, 300, func(r *rand.Rand) (soil, plan) {
		s := soft(r, between(r, 0.04, 0.1), between(r, 0.05, 0.1))
		s.collapse, s.decay = between(r, 0.5, 1.2), between(r, 0.2, 0.6)
		s.e0 += 0.5
		return s, ends(s, 2, 8, 16, between(r, 0.001, 0.003))
	}},
	{"CRS 2000 readings, 8-16", ordinary, false, 60, func(r *rand.Rand) (soil, plan) {
		s := soft(r, between(r, 0.04, 0.12), between(r, 0.08, 0.16))
		return s, plan{first: 8, last: between(r, 8, 16) * s.yield, readings: 2000, noise: 0.001}
	}},
	{"soft, LIR 1, 4-8", middling, false, 300, func(r *rand.Rand) (soil, plan) {
		s := soft(r, between(r, 0.04, 0.12), between(r, 0.08, 0.16))
		return s, ends(s, 2, 4, 8, between(r, 0.001, 0.003))
	}},
	{"soft, LIR 1, 2-4", middling, false, 300, func(r *rand.Rand) (soil, plan) {
		s := soft(r, between(r, 0.04, 0.12), between(r, 0.08, 0.16))
		return s, ends(s, 2, 2, 4, between(r, 0.001, 0.003))
	}},
	{"short, LIR 1, 1.1-2.2", short, false, 300, func(r *rand.Rand) (soil, plan) {
		s := soft(r, between(r, 0.04, 0.2), between(r, 0.08, 0.25))
		return s, ends(s, 2, 1.1, 2.2, between(r, 0.001, 0.003))
	}},
	{"short, LIR 0.5, 1.1-2.2", short, false, 300, func(r *rand.Rand) (soil, plan) {
		s := soft(r, between(r, 0.04, 0.2), between(r, 0.08, 0.25))
		return s, ends(s, 1.5, between(r, 1.1, 2.2), between(r, 1.2, 2.2), between(r, 0.001, 0.003))
	}},
	{"short CRS, 1.1-2.2", short, false, 60, func(r *rand.Rand) (soil, plan) {
		s := soft(r, between(r, 0.04, 0.2), between(r, 0.08, 0.25))
		return s, plan{first: 8, last: between(r, 1.1, 2.2) * s.yield, readings: 2000, noise: 0.001}
	}},
}
