package correlate

import "slices"

// A Check is an input and output that an entry must reproduce.
type Check struct {
	ID        string
	Given     Values
	Want      float64
	Tolerance float64 // absolute
	Kind      CheckKind
	Source    string
}

// CheckKind says what a check proves.
type CheckKind int

const (
	PublishedPair  CheckKind = iota // input and output printed in a source: the coefficients
	FixedPoint                      // what the authors built into the formula, or an identity with another: the form
	HandArithmetic                  // computed by hand from the formula as listed: the code alone
)

// String returns what the check rests on, in words.
func (k CheckKind) String() string {
	return [...]string{"published pair", "fixed point of the formula", "hand arithmetic"}[k]
}

// Checks returns every check, at least one for each entry: what is published
// first, hand arithmetic last.
func Checks() []Check { return slices.Concat(published, handArithmetic()) }

// Published returns the checks that a source or the authors' own construction
// stands behind.
func Published() []Check { return slices.Clone(published) }

// Run evaluates the entry and returns what it gave.
func (c Check) Run() (got float64, err error) {
	entry, ok := ByID(c.ID)
	if !ok {
		panic("correlate: check of an unknown correlation " + c.ID)
	}
	e, err := entry.Evaluate(c.Given)
	return e.Value, err
}

// published pairs carry half the last printed digit as tolerance; fixed points
// are exact but for rounding, or to the printed digits of the coefficients.
var published = []Check{
	{"terzaghi-peck-1967", Values{"LL": 55}, 0.405, 0.0005, PublishedPair, "worked question, LL 55 gives Cc 0.405 (secondary page)"},
	{"terzaghi-peck-1967", Values{"LL": 45}, 0.315, 0.0005, PublishedPair, "course solution sheet SHW12 F2012, LL 45 gives Cc 0.315"},
	{"jaky-1948", Values{"phi": 30}, 0.5, 0.005, PublishedPair, "secondary page: φ′ 30° gives K0 0.50"},
	{"jaky-1948", Values{"phi": 25}, 0.577, 0.0005, PublishedPair, "secondary page: φ′ 25° gives K0 0.577"},
	{"wroth-1979", Values{"LI": 0}, 170, 0.5, PublishedPair, "Wroth & Wood 1978 as read in ERDC TN-DOER-D1 (2004): 170 kPa at the plastic limit"},
	{"rendon-herrero-1983", Values{"Gs": 2.67, "e0": 1e-09}, 0.0357, 5e-05, FixedPoint, "Rendon-Herrero 1983, closure: anchor Gs 2.67 and e0 0"},
	{"wroth-1979", Values{"LI": 1}, 1.71, 0.005, FixedPoint, "170·exp(−4.6), a hundredth of 170 kPa, by the authors’ assumption"},
	{"burland-1990-icl", Values{"effective": 100}, 0, 1e-09, FixedPoint, "Burland 1990: Iv is 0 at 100 kPa by definition"},
	{"burland-1990-icl", Values{"effective": 1000}, -1, 1e-09, FixedPoint, "Burland 1990: Iv is −1 at 1000 kPa by definition"},
	{"marchetti-1980-ocr", Values{"KD": 2, "ID": 0.5}, 1, 1e-12, FixedPoint, "Marchetti 1980: KD 2 is OCR 1"},
	{"marchetti-1980-k0", Values{"KD": 1.5, "ID": 0.5}, 0.4, 1e-12, FixedPoint, "Marchetti 1980: KD 1.5 gives 1 − 0.6"},
	{"brooker-ireland-1965-pi", Values{"PI": 40}, 0.68, 1e-12, FixedPoint, "both lines meet at PI 40"},
	{"mayne-kulhawy-1982", Values{"phi": 30, "OCR": 4}, 1, 1e-12, FixedPoint, "equals the code form at φ′ 30°: 0.5·√4"},
	{"en1997-k0", Values{"phi": 30, "OCR": 4}, 1, 1e-12, FixedPoint, "equals Mayne & Kulhawy at φ′ 30°: 0.5·√4"},
	{"wroth-wood-1978", Values{"Gs": 2.7, "PI": 37}, 37.0 / 74, 0.0005, FixedPoint, "equals PI/74 at Gs 2.70 (Kulhawy & Mayne 1990)"},
	{"kulhawy-mayne-1990-cc", Values{"PI": 74}, 1, 1e-12, FixedPoint, "PI/74"},
	{"kulhawy-mayne-1990-cs", Values{"PI": 74}, 0.2, 1e-12, FixedPoint, "Cc = PI/74 is 5 times Cs = PI/370"},
	{"park-koumoto-2004", Values{"n0": 50}, 0.3165, 5e-05, FixedPoint, "50/(371.747 − 213.75)"},
	{"larsson-1980-yield", Values{"suFV": 30, "PI": 40}, 100, 1e-09, FixedPoint, "0.08 + 0.0055·40 = 0.30"},
	{"skempton-1957", Values{"PI": 40}, 0.258, 0.0005, FixedPoint, "PI 40 gives 0.258, as quoted with the percent"},
	{"hansbo-1957", Values{"suFV": 27, "LL": 60}, 100, 1e-09, FixedPoint, "0.45·0.60 = 0.27, as quoted with the decimal"},
}
