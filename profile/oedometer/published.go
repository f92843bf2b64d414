package oedometer

// A Case is a compression curve printed elsewhere, with what was printed of its
// interpretation.
type Case struct {
	ID        string
	Soil      string
	Source    string
	Grade     string // of the source: A curve and interpretation read, B in part, C curve only, M from memory, N contradicts itself
	Mark      string // "read in the source" or "from memory, unverified"
	Record    Record
	Situation Situation
	Published []PublishedValue
	Expect    string // what a careful reading should say
}

// A PublishedValue is one printed number.
type PublishedValue struct {
	Quantity string // "preconsolidation stress", "compression index", …
	Value    float64
	Unit     string
	Note     string
}

// Published returns the curves in a fixed order.
func Published() []Case { return publishedCases() }
