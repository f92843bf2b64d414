package cone

import "math"

// A Measure is a value that may not have been measured. The zero Measure is not
// known.
type Measure struct {
	Value float64
	Known bool
}

// Of returns a known Measure.
func Of(v float64) Measure { return Measure{v, true} }

// A Reading is one line of a sounding.
type Reading struct {
	Depth               float64 // m
	ConeResistance      Measure // qc, MPa, not corrected
	CorrectedResistance Measure // qt, MPa; preferred where both are known
	SleeveFriction      Measure // fs, kPa
	PorePressure        Measure // u2, kPa
}

// State is the vertical stress in the ground at a depth, kPa.
type State struct {
	Total, Pore, Effective float64 // σv0, u0, σ′v0
}

// Stress returns the vertical stress at a depth in m, and whether it is known
// there.
type Stress func(depth float64) (State, bool)

// A Stratum is a stretch of the ground that readings are condensed within.
type Stratum struct {
	Name      string
	Top, Base float64 // m
	LeaveOut  bool    // known not to be clay: no evidence is made from it
}

// Options are what an evaluation may be told. The zero Options are the defaults.
type Options struct {
	AreaRatio Measure   // a of the cone, 0 to 1; qt cannot be corrected without it
	Strata    []Stratum // empty: one without a name
	Window    float64   // m of depth that one Layer condenses; 0.5 where zero
	ClayFrom  float64   // Ic from which a reading is clay; 2.6 where zero
	MaxDepth  float64   // m beyond which a reading is not believed; 200 where zero

	// PoreShift is added to every u2, kPa: an engineer's correction of a zero
	// offset.
	PoreShift float64
}

const (
	defaultWindow   = 0.5
	defaultClayFrom = 2.6 // common practice; from memory, unverified
	defaultMaxDepth = 200
	deepest         = 2000 // m, whatever is asked for: it bounds the memory
)

func (o Options) withDefaults() Options {
	o.Window = orDefault(o.Window, 0.05, 10, defaultWindow)
	o.ClayFrom = orDefault(o.ClayFrom, 0.5, 5, defaultClayFrom)
	o.MaxDepth = orDefault(o.MaxDepth, 0.1, deepest, defaultMaxDepth)
	if math.IsNaN(o.PoreShift) || math.Abs(o.PoreShift) > largest {
		o.PoreShift = 0
	}
	return o
}

// orDefault keeps x inside its limits and replaces zero or NaN.
func orDefault(x, low, high, otherwise float64) float64 {
	if x == 0 || math.IsNaN(x) {
		return otherwise
	}
	return math.Min(math.Max(x, low), high)
}
