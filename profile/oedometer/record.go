package oedometer

// A Number is a quantity that may not have been measured. The zero Number is not
// known; it is never zero.
type Number struct {
	Value float64
	Known bool
}

// Known returns a known Number.
func Known(v float64) Number { return Number{Value: v, Known: true} }

// Or returns the value, or other where it is not known.
func (n Number) Or(other float64) float64 {
	if n.Known {
		return n.Value
	}
	return other
}

// A TestKind says how the specimen was loaded, which shifts σ′p by itself: end of
// primary is commonly 1.1–1.2 times the 24 h value and constant rate of strain
// 1.1–1.3 times (from memory, unverified). The kinds are never mixed in one curve.
type TestKind int

// The kinds of test.
const (
	UnknownKind TestKind = iota
	Incremental24h
	EndOfPrimary
	ConstantRate
)

// String returns the kind in words, "" where it is not known.
func (k TestKind) String() string {
	return [...]string{"", "incremental 24 h", "end of primary", "constant rate of strain"}[k]
}

// A Branch says which part of the record a point belongs to.
type Branch int

// The branches. A point is on first loading only if its stress exceeds every
// earlier one; after a loop it is then on further loading.
const (
	FirstLoading Branch = iota
	Unloading
	Reloading
	FurtherLoading
)

// String returns the branch in words.
func (b Branch) String() string {
	return [...]string{"first loading", "unloading", "reloading", "further loading"}[b]
}

// A Record is one test as the laboratory wrote it down.
type Record struct {
	Stages []Stage // in the order in which they were applied
	Kind   TestKind

	InitialVoidRatio Number
	InitialHeight    Number // mm
	SpecificGravity  Number // Gs
	WaterContent     Number // initial, percent
	DryMass          Number // g
	WetMass          Number // initial, g
	Area             Number // cm²
}

// A Stage is one loading stage, or one reading of a constant-rate test. One of
// VoidRatio, Strain and Height says where the specimen stood at its end; where
// several are given they must agree. A stage without any of them is a missing
// step. A stage at zero stress is the start (or the end) of the test.
type Stage struct {
	EffectiveStress float64 // kPa
	VoidRatio       Number  // e
	Strain          Number  // percent of the initial height
	Height          Number  // mm
	Kind            string  // "load", "unload", "reload", or "" where not given
	Inundated       bool    // water was added at this stage
	T50, T90        Number  // time to 50 and 90 % consolidation, minutes
	Consolidation   Number  // cv, m²/year
	Secondary       Number  // Cα, void ratio per log10 cycle of time
	Line            int     // the caller's reference, carried through
}

// A Point is one state of the specimen on the curve.
type Point struct {
	EffectiveStress float64 // kPa, greater than zero
	VoidRatio       float64
	Branch          Branch
	Seating         bool // below SeatingStress: plotted, not used in fits
	Stage           int  // index in Record.Stages
	Line            int  // the caller's reference of that stage
}

// SeatingStress is the stress in kPa below which points are taken as seating and
// left out of fits (common practice).
const SeatingStress = 5.0

// A Curve is a prepared record.
type Curve struct {
	Points              []Point
	Kind                TestKind
	InitialVoidRatio    float64
	InitialVoidRatioHow string  // "given", "from dimensions and solids", …
	InitialHeight       Number  // mm
	Swelling            float64 // strain in percent by which the specimen swelled above its initial height; 0 if it did not
	Findings            []Finding

	stages []Stage
}

// A Finding is something that does not agree within a record but does not stop
// its interpretation.
type Finding struct {
	Stage   int // index in Record.Stages, -1 for the whole record
	Rule    string
	Message string
}
