package oedometer

// A Situation is what is known of the ground where the specimen was taken.
type Situation struct {
	EffectiveStress Number // σ′v0, kPa
	PlasticityIndex Number // percent
	Organic         bool   // organic soil or peat
	Reconstituted   bool   // prepared in the laboratory: sample quality has no meaning
}

// A Bound says how a stress limits the true one.
type Bound int

// The bounds.
const (
	Exact        Bound = iota // the value itself, with its range
	AtLeast                   // the true value is this or more
	AtMost                    // the true value is this or less
	Undetermined              // neither: the curve does not tell
)

// String returns "", "at least", "at most" or "not determined".
func (b Bound) String() string {
	return [...]string{"", "at least", "at most", "not determined"}[b]
}

// The grades of a result.
const (
	GradeA    = "A"
	GradeB    = "B"
	GradeC    = "C"
	BoundOnly = "bound only"
)

// A Yield is the preconsolidation (yield) stress in kPa. Low, Best and High are
// the 5, 50 and 95 % points where Bound is Exact; for AtLeast and AtMost all
// three are the bound; they are zero where it is Undetermined.
type Yield struct {
	Low, Best, High float64
	Bound           Bound
}

// An Interpretation is everything read from one curve.
type Interpretation struct {
	Methods          []Method // every construction, refused ones with their reason
	Preconsolidation Yield
	Apparent         Yield // what the constructions combined to before the gates; not to be used as σ′p where they are shut

	VirginSteepest      VirginLine
	VirginLast          VirginLine
	CompressionIndex    Number // Cc, of the steepest part
	RecompressionIndex  Index  // Cr
	SwellingIndex       Index  // Cs
	CompressionRatio    Number // CR = Cc/(1+e0)
	RecompressionRatio  Number // RR = Cr/(1+e0)
	InitialVoidRatio    float64
	InitialVoidRatioHow string

	Loading     []LoadingPoint // first loading as the constructions saw it: averaged where the record is dense
	Uncertainty Uncertainty    // of the apparent value, natural log

	Stages  []StageResult
	Quality []Quality
	Field   Field
	Loops   []LoopCheck

	Grade   string
	Reasons []string // why that grade, in words
	Notes   []string

	BracketLow, BracketHigh float64 // applied stresses on either side of the yield stress, kPa; 0 where outside
	FirstLoadStrain         float64 // percent
	MaxStress               float64 // highest applied stress, kPa
	MaxStressRatio          float64 // MaxStress over the apparent σ′p; 0 where there is none
	StillSteepening         Number  // q: slope of the last doubling over that of the doubling before
	Spread                  float64 // largest over smallest of the methods used; 0 with fewer than two
	CasagrandeScale         []ScaleValue
	Kind                    TestKind
}

// A Method is one construction on the curve.
type Method struct {
	ID, Name  string
	Known     bool    // it gave a value
	Stress    float64 // as constructed, kPa
	Low, High float64 // 5 and 95 % points after its known bias and scatter, kPa
	Used      bool    // it enters the combined value
	Corrected float64 // after its known bias, kPa; 0 where it is not used
	Weight    float64 // its share of the combined value
	Note      string  // why not, or what there is to say
	Lines     []DrawnLine
	Points    []int  // indices in Curve.Points of the points that made its lines
	Mark      string // how far its steps were verified
}

// A LoadingPoint is one point of first loading with its work.
type LoadingPoint struct {
	EffectiveStress float64 // kPa
	VoidRatio       float64
	Strain          float64 // percent of the initial height
	Work            float64 // cumulative, per unit volume, kJ/m³
}

// A VirginLine is e = Intercept − Slope·log10 σ′.
type VirginLine struct {
	Rule      string
	Slope     float64 // Cc
	Intercept float64 // e at 1 kPa
	Points    []int   // indices in Curve.Points
	From, To  float64 // stresses that it was fitted over, kPa
	Known     bool
}

// An Index is a slope with where it comes from.
type Index struct {
	Value float64
	Known bool
	How   string
}

// A ScaleValue is Casagrande's construction in a box of another height.
type ScaleValue struct {
	Box    float64 // height over width
	Stress float64 // kPa
}

// A StageResult is what one stage says about stiffness and flow.
type StageResult struct {
	From, To         float64 // effective stress, kPa
	Branch           Branch
	Line             int     // the caller's reference of the stage at To
	Compressibility  float64 // mv, m²/MN, of the height at the start of the stage
	Modulus          Number  // constrained modulus 1/mv, kPa; not known where mv is zero
	Consolidation    Number  // cv, m²/year: as given, else from t50 or t90
	ConsolidationHow string
	Permeability     Number // k, m/s, from cv and mv
	Secondary        Number // Cα as given, void ratio per log cycle
}

// A Quality is a sample rated by one scheme.
type Quality struct {
	Scheme  string
	Applies bool
	Value   float64 // Δe/e0, or εv0 in percent; 0 where it does not apply
	Unit    string  // "" or "%"
	Class   string  // "1 (very good to excellent)"; both classes near a limit
	Rank    int     // 1 best; 0 where it does not apply
	Reason  string  // where it does not apply, or what it rests on
	Mark    string
}

// A Field is the compression curve in the ground (Schmertmann 1955).
type Field struct {
	Known            bool
	Reason           string // why not
	Stress           []float64
	VoidRatio        []float64 // of the points: in situ, at yield, and at 0.42 e0
	CompressionIndex float64   // Cc of the field curve
	Ratio            float64   // field over laboratory Cc
}

// A LoopCheck is the construction tried on a reload branch, whose past maximum
// is known: the stress from which it was unloaded.
type LoopCheck struct {
	PastMaximum float64 // kPa
	Recovered   Yield
	Ratio       float64 // recovered best over past maximum; 0 where it cannot be told
	Methods     []Method
	Reason      string // why it cannot be told, "" where it can
}
