package oedometer

import "math"

// A Plane says which axes a drawn line belongs to.
type Plane int

// The planes of the constructions.
const (
	SemiLogPlane Plane = iota // log10 σ′ (kPa), e
	LogLogPlane               // log10 σ′ (kPa), log10(1+e)
	WorkPlane                 // σ′ (kPa), work per unit volume (kJ/m³)
	StrainPlane               // σ′ (kPa), strain (percent)
	ModulusPlane              // σ′ (kPa), tangent modulus (kPa)
)

// A DrawnLine is one straight line of a construction, from end to end.
type DrawnLine struct {
	Name           string
	Plane          Plane
	X1, Y1, X2, Y2 float64
}

// An input is what a construction sees: one loading, its virgin line, and what
// the rest of the test and the ground have to offer.
type input struct {
	*loading
	virgin   virgin
	start    float64 // best split in two lines, kPa
	estimate float64 // two-line σ′p, the yardstick of windows and gates, kPa
	cr       float64 // recompression index, 0 where none could be read
	fromLoop bool    // cr comes from an unload–reload loop
	initial  float64 // slope of first loading before σ′p, 0 where none could be read
	beta     float64 // dW/dσ′ of the reload limb, 0 without a loop
	inSitu   Number  // σ′v0, kPa
	rate     bool    // constant rate of strain, or increments small enough for moduli
	swelled  bool    // swelling above swellingLimit before loading
	detail   bool    // lines and points are wanted
}

// An outcome is what one construction makes of an input.
type outcome struct {
	stress float64 // kPa, where ok
	ok     bool
	weak   bool   // too few points for its lines
	note   string // why not, where not ok; else what there is to say
	lines  []DrawnLine
	points []int // indices in the loading
}

// refused returns the outcome of a construction whose gate is shut.
func refused(why string) outcome { return outcome{note: why} }

// A construction is one published way to read σ′p from a curve. A new one is
// added by a file with its function and a line in this list.
type construction struct {
	id, name, mark string
	run            func(*input) outcome
}

// Verification marks.
const (
	markMemory   = "from memory, unverified"
	markAbstract = "abstract read; steps from memory, unverified"
	markRead     = "read in the source"
)

// constructions lists all of them in the order in which they are reported.
var constructions = []construction{
	{"two-line", "two straight lines, e–log σ′", markMemory, semiLog},
	{"casagrande", "Casagrande (1936), fixed box 0.7", markMemory, casagrande},
	{"slope", "slope from the in-situ point (Boone 2010)", markAbstract, boone},
	{"work", "work per unit volume (Becker et al. 1987)", "formula read in the abstract", work},
	{"bilogarithmic", "log(1+e)–log σ′ (Oikawa 1987)", markMemory, bilogarithmic},
	{"pacheco-silva", "Pacheco Silva (1970)", markMemory, pacheco},
	{"dissipated-energy", "dissipated strain energy (Wang & Frost 2004)", markAbstract, dissipated},
	{"sallfors", "Sällfors (1975), constant rate", markMemory, sallfors},
	{"modulus", "middle of the modulus drop (Janbu 1969)", markMemory, modulus},
}

// newInput prepares what all constructions share; ok is false for a curve on
// which no two lines can be told apart.
func newInput(l *loading, around surroundings, share float64) (*input, bool) {
	in := &input{loading: l, inSitu: around.inSitu, beta: around.beta, rate: around.rate, swelled: around.swelled, detail: around.detail}
	in.virgin = l.virginLine(share)
	var ok bool
	if in.start, ok = l.bestSplit(); !ok || !in.virgin.ok {
		return in, false
	}
	in.estimate = in.start
	p := l.twoLines(l.x, l.e, in.start, in.virgin, powerOfTen)
	if p.ok {
		in.estimate, in.initial = p.stress, math.Max(0, -p.one.slope)
	}
	switch {
	case around.cr > 0:
		in.cr, in.fromLoop = around.cr, true
	default:
		in.cr = in.initial
	}
	return in, true
}

// surroundings is what a construction may know beyond its own points.
type surroundings struct {
	cr, beta              float64 // of an unload–reload loop, 0 without one
	inSitu                Number
	rate, swelled, detail bool
}

// slopeRatio returns Cr/Cc, 1 where there is no virgin line.
func (in *input) slopeRatio() float64 {
	if !in.virgin.ok {
		return 1
	}
	return in.cr / -in.virgin.line.slope
}

// fromPair turns a pair of lines into an outcome.
func (in *input) fromPair(p pair, plane Plane) outcome {
	if !p.ok {
		return refused("no two lines can be told apart")
	}
	out := outcome{stress: p.stress, ok: true, weak: p.weak}
	if !in.detail {
		return out
	}
	if p.weak {
		out.note = "weak: fewer than two points clear of the transition on one line"
	}
	at := p.stress
	u := in.x
	if plane == WorkPlane {
		u = in.s
	} else {
		at = math.Log10(at)
	}
	low, high := math.Min(u[p.oneFirst], at), math.Max(u[p.twoLast], at)
	out.lines = []DrawnLine{
		{"recompression line", plane, low, p.one.at(low), at, p.one.at(at)},
		{"virgin line", plane, at, p.two.at(at), high, p.two.at(high)},
	}
	for i := p.oneFirst; i <= p.oneLast; i++ {
		out.points = append(out.points, i)
	}
	for i := p.twoFirst; i <= p.twoLast; i++ {
		out.points = append(out.points, i)
	}
	return out
}

// virginPoints returns the indices of the points of the virgin line.
func (in *input) virginPoints() []int {
	var points []int
	for i := in.virgin.first; i <= in.virgin.last; i++ {
		points = append(points, i)
	}
	return points
}

// virginDrawn returns the virgin line from x to its last point.
func (in *input) virginDrawn(x float64) DrawnLine {
	end := in.x[in.virgin.last]
	v := in.virgin.line
	return DrawnLine{"virgin line", SemiLogPlane, x, v.at(x), end, v.at(end)}
}
