package correlate

import (
	"math"
	"slices"
)

// A Correlation is one published relation with what must be known to use it.
type Correlation struct {
	ID       string // how it is called for, "terzaghi-peck-1967"
	Name     string // as the trade cites it, "Terzaghi & Peck (1967)"
	Quantity Quantity
	Formula  string  // as printed text, with the symbols of the trade
	Inputs   []Input // in the order of the formula
	Soil     string  // the soil it was made on, in words
	Ground   Ground

	// Family names what the entry rests on: a data base, a theory, a predictor.
	// Entries of one family are not independent opinions and count once.
	Family string
	// Rank orders the entries of a family: the lowest whose inputs are known
	// speaks for it.
	Rank int

	// Plausibility says that the entry is an order-of-magnitude check, never a
	// design value: a band takes it only when asked for by its identifier.
	Plausibility bool

	Scatter  Scatter
	Source   string // author, year, where
	Verified Verification
	Cautions []string

	eval func(Values) float64
	// guard judges what no single input shows. It may lower or raise the value
	// with a warning, or refuse it with a reason.
	guard func(v Values, value float64) judged
}

// judged is the verdict of a guard.
type judged struct {
	value    float64
	most     float64 // what the quantity cannot exceed; 0 where it is not limited
	warnings []string
	refused  string // why the entry does not apply; "" where it does
}

// An Input is a variable as one correlation takes it.
type Input struct {
	Variable

	// Range is the range of the data behind the correlation, or of its use:
	// outside it the number is given with a warning. It is not stated for many.
	Range Interval
	Basis string // where the range comes from

	// Meaningful is the open interval outside which the correlation says
	// nothing at all.
	Meaningful Interval

	// Optional says that the value is looked at where it is known, to warn or to
	// refuse, or has a neutral value where it is not.
	Optional bool
}

// Ground says what a correlation was made for, to keep a rule for peat from
// speaking about clay.
type Ground int

const (
	NaturalClay   Ground = iota // natural inorganic clay of any region
	Regional                    // one region or one kind of clay: for use there
	Reconstituted               // remoulded or reconstituted: a lower bound of Cc for natural structured clay
	Organic                     // organic soil and peat
)

// String returns the kind of ground in words.
func (g Ground) String() string {
	return [...]string{"natural clay", "regional", "reconstituted or remoulded", "organic soil and peat"}[g]
}

// Scatter is the error of a correlation, as standard deviations of the natural
// logarithm of measured over predicted.
type Scatter struct {
	Between float64 // shared by all readings of a site
	Within  float64 // from depth to depth of one site
	Known   bool    // from data; otherwise assumed
	Note    string  // where the figures come from
}

// Verification says how far the coefficients of an entry were checked.
type Verification int

const (
	FormulaRead  Verification = iota // read in a source
	Consistent                       // reproduces another listed formula exactly
	AbstractOnly                     // the abstract confirms soil or data base, not the coefficients
	FromMemory                       // nothing was read
)

// String returns the mark in plain words.
func (v Verification) String() string {
	return [...]string{
		"formula read in a source",
		"consistent with another listed formula; original not read",
		"abstract read; coefficients from memory, unverified",
		"from memory, unverified",
	}[v]
}

// All returns the whole catalogue in its fixed order: by quantity, then as
// listed.
func All() []Correlation { return slices.Clone(catalogue) }

// ByID returns the correlation of that identifier.
func ByID(id string) (Correlation, bool) {
	for i := range catalogue {
		if catalogue[i].ID == id {
			return catalogue[i], true
		}
	}
	return Correlation{}, false
}

// For returns the correlations for a quantity, in the order of the catalogue.
func For(q Quantity) []Correlation {
	var out []Correlation
	for i := range catalogue {
		if catalogue[i].Quantity == q {
			out = append(out, catalogue[i])
		}
	}
	return out
}

// input makes an input that means something wherever the variable is possible.
func input(symbol string) Input {
	v := variable(symbol)
	return Input{Variable: v, Meaningful: v.Possible}
}

// within states the range of use and where it comes from.
func (in Input) within(low, high float64, basis string) Input {
	in.Range, in.Basis = between(low, high), basis
	return in
}

// above and below set where the correlation begins or ceases to mean anything.
func (in Input) above(low float64) Input {
	in.Meaningful.Low = low
	return in
}

func (in Input) below(high float64) Input {
	in.Meaningful.High = high
	return in
}

// from and upTo are above and below with the limit itself let in.
func (in Input) from(low float64) Input { return in.above(math.Nextafter(low, math.Inf(-1))) }

func (in Input) upTo(high float64) Input { return in.below(math.Nextafter(high, math.Inf(1))) }

// ifKnown makes the input one that is looked at only where it is known.
func (in Input) ifKnown() Input {
	in.Optional = true
	return in
}

// Where a range of use comes from.
const (
	publishedRange = "published range, from memory, unverified"
	usualRange     = "usual range of use, assumed"
	comparedRange  = "where the entry was compared with others"
)
