package history

// A Kind says what a test tells of σ′p.
type Kind int

// The kinds of tests.
const (
	Exact   Kind = iota // the value itself
	AtLeast             // σ′p is not less, e.g. the test stopped before yield
	AtMost              // σ′p is not more
)

// String returns "exact", "at least" or "at most".
func (k Kind) String() string {
	switch k {
	case AtLeast:
		return "at least"
	case AtMost:
		return "at most"
	}
	return "exact"
}

// A Test is one preconsolidation stress from the laboratory.
type Test struct {
	ID               int     // the caller's; returned with the result
	Depth            float64 // m
	EffectiveStress  float64 // σ′v0 there, kPa; zero or less where there is none
	Preconsolidation float64 // σ′p, kPa, greater than zero
	LnSD             float64 // sd of ln σ′p of a good test; 0 takes LnSDForGrade("")
	Kind             Kind
	Disturbance      float64 // sd of the part of ln σ′p that disturbance may have taken away; ≥ 0
	Layer            int     // index in Input.Layers
}

// A Reading is what a correlation makes of an in-situ measurement. The error
// of a source has one part that all its readings share and one of its own for
// each reading, both in ln σ′p.
type Reading struct {
	Source           string  // "cone (qt − σv0)", "vane"
	Depth            float64 // m
	EffectiveStress  float64 // σ′v0 there, kPa
	Preconsolidation float64 // what the relation predicts, kPa
	BetweenSD        float64 // shared by the readings of the source; 0 takes 0.35
	WithinSD         float64 // of each reading; 0 takes 0.25
	Layer            int     // index in Input.Layers
}

// A Layer is a stratum. The history may jump at its boundaries.
type Layer struct {
	Name      string
	Top, Base float64 // m
}

// The kinds of known facts.
const (
	RemovedGround    = "removed ground"     // Size is the stress taken away, kPa
	FormerWaterLevel = "former water level" // Size is its depth below ground level, m
)

// A Known is something known of the past that sharpens a mechanism.
type Known struct {
	Kind     string  // RemovedGround or FormerWaterLevel
	Size, SD float64 // kPa or m; SD 0 takes a fifth of Size
	Layer    int     // index in Input.Layers; -1 for all
}

// A Station is a depth where the profile is wanted.
type Station struct {
	Depth           float64 // m
	EffectiveStress float64 // σ′v0, kPa; below 0.01 gives σ′p but no OCR
	LnSD            float64 // sd of ln σ′v0
	Layer           int     // index in Input.Layers
}

// Input is the evidence of one borehole.
type Input struct {
	Tests      []Test
	Neighbours []Test // of the same strata in other boreholes; Layer is the stratum here
	Readings   []Reading
	Layers     []Layer // at least one; from top to base
	Known      []Known
	Stations   []Station

	Limits             [3]float64 // OCR where zones begin; zero takes 0.85, 1.2, 4
	WaterTable         float64    // depth of the present water table, m
	HasWater           bool       // WaterTable is known
	WaterUnitWeight    float64    // kN/m³; 0 takes 9.81
	BuoyantUnitWeight  float64    // kN/m³, of removed ground below water; 0 takes 8
	NeighbourBetweenSD float64    // how far boreholes differ as a whole, ln σ′p; 0 takes 0.2
}

// LnSDForGrade returns the standard deviation of ln σ′p that a test of a grade
// is taken to have before the tests of the site are compared: 0.10 for A, 0.15
// for B, 0.25 for C and for a bound, and 0.15 where it is not graded (project
// definition; the coefficient of variation of σ′p of 0.15 for the best samples
// and 0.25 otherwise is common practice). The site's own scatter scales it.
func LnSDForGrade(grade string) float64 {
	switch grade {
	case "A":
		return 0.10
	case "C", "bound only":
		return 0.25
	}
	return 0.15
}
