package oedometer

import "slices"

// A Case is a compression curve printed elsewhere, with what was printed of its
// interpretation.
type Case struct {
	ID        string
	Soil      string
	Source    string
	Grade     string // of the source, see the Grade constants below
	Mark      string // how far it was verified
	Record    Record
	Situation Situation
	Published []PublishedValue
	Refused   bool   // its numbers contradict themselves so far that Prepare must refuse them
	Expect    string // what a careful reading says, in words
}

// The grades of a source.
const (
	SourceA = "A" // curve and interpretation read
	SourceB = "B" // curve and part of the interpretation read
	SourceC = "C" // curve read, no interpretation seen
	SourceM = "M" // from memory, unverified
	SourceN = "N" // published numbers that contradict themselves
)

// A PublishedValue is one printed number.
type PublishedValue struct {
	Quantity string  // "preconsolidation stress", "compression index", "swelling index", "initial void ratio", "void ratio"
	At       float64 // effective stress in kPa, of a void ratio
	Value    float64
	Unit     string
	Note     string
}

// The quantities of published values.
const (
	publishedYield    = "preconsolidation stress"
	publishedCc       = "compression index"
	publishedCs       = "swelling index"
	publishedInitial  = "initial void ratio"
	publishedVoid     = "void ratio"
	kilogramPerSquare = 98.07    // kPa in 1 kgf/cm²
	inch              = 25.4     // mm
	poundPerSquare    = 0.047880 // kPa in 1 psf
)

// Published returns the curves in a fixed order: read ones, those from memory,
// those that contradict themselves.
func Published() []Case {
	return slices.Concat(readCases(), partCases(), memoryCases(), contradictingCases())
}

// voidRatios returns stages of one kind with void ratios.
func voidRatios(kind string, stress, e []float64) []Stage {
	var out []Stage
	for i := range stress {
		out = append(out, Stage{EffectiveStress: stress[i], VoidRatio: Known(e[i]), Kind: kind})
	}
	return out
}

// heights returns stages of one kind with specimen heights in units of mm.
func heights(kind string, stress, height []float64, unit float64) []Stage {
	var out []Stage
	for i := range stress {
		out = append(out, Stage{EffectiveStress: stress[i], Height: Known(height[i] * unit), Kind: kind})
	}
	return out
}

// settlements returns stages of one kind from settlements of a specimen, mm.
func settlements(kind string, initial float64, stress, settlement []float64) []Stage {
	h := make([]float64, len(settlement))
	for i, d := range settlement {
		h[i] = initial - d
	}
	return heights(kind, stress, h, 1)
}

// times returns the values times a factor.
func times(factor float64, values ...float64) []float64 {
	out := make([]float64, len(values))
	for i, v := range values {
		out[i] = factor * v
	}
	return out
}

// voidRatiosAt returns published void ratios at stresses.
func voidRatiosAt(stress, e []float64) []PublishedValue {
	var out []PublishedValue
	for i := range stress {
		out = append(out, PublishedValue{Quantity: publishedVoid, At: stress[i], Value: e[i]})
	}
	return out
}
