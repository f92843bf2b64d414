package history

// A Band is a value with its 5, 50 and 95 % points.
type Band struct{ Low, Best, High float64 }

// A Zone is the index of a zone of OCR: 0 below the first limit of
// Input.Limits, 3 above the last.
type Zone int

// A Point is the history at a station.
type Point struct {
	Depth            float64
	Layer            int
	Preconsolidation Band // kPa
	HasOCR           bool // false where σ′v0 is below 0.01 kPa
	OCR              Band
	POP              Band // kPa
	Zone             Zone // of OCR.Best
	ZoneProbability  [4]float64
	LnSD             float64 // standard deviation of ln σ′p
}

// A ZoneInterval is a stretch of one zone. Its limits in depth have ranges of
// their own: Top.Low is the shallowest depth the boundary may have.
type ZoneInterval struct {
	Layer       int
	Zone        Zone
	Other       Zone // the next most probable; equal to Zone where none has 0.2
	Top, Base   Band // m
	Probability float64
	OCR         Band
}

// The verdicts on a test.
const (
	Agrees    = "agrees"
	Doubtful  = "doubtful"
	Conflicts = "conflicts"
)

// A TestResult confronts a test with what all the other evidence says.
type TestResult struct {
	ID        int
	Expected  Band    // of another good test at its depth, kPa, leaving this one out
	Z         float64 // normal score of the value in that distribution
	Judged    float64 // distance from Expected.Best in the standard deviations that the verdict rests on
	Wild      float64 // probability that the test is not a good one
	Verdict   string  // "" for a test that was not used
	Influence float64 // largest shift of the line that this test causes, in ln σ′p
	Used      bool
	Why       string // why it was not used
}

// A Parameter is the size of a mechanism.
type Parameter struct {
	Name            string
	Low, Best, High float64
	Unit            string
}

// A Mechanism is one explanation of a layer.
type Mechanism struct {
	Name        string
	Probability float64
	Parameter   Parameter // the first of Parameters
	Parameters  []Parameter
}

// A LayerResult is how a layer got its stress history.
type LayerResult struct {
	Layer           int
	Tests           int         // used in this layer
	Mechanisms      []Mechanism // most probable first
	Distinguishable bool
	Sentence        string
	Sources         []SourceResult
}

// A SourceResult is how an in-situ source fared in a layer.
type SourceResult struct {
	Source string
	Ratio  Band // σ′p over what its relation predicts, in this layer
}

// A NextTest is where one more good oedometer narrows the band most.
type NextTest struct {
	Depth     float64
	Layer     int
	Narrowing float64 // share by which the mean width of the band of ln σ′p falls, 0 to 1
	Known     bool    // false where there is no station
}

// Result is the stress history of one borehole.
type Result struct {
	Points          []Point // in the order of Input.Stations
	Zones           []ZoneInterval
	Tests           []TestResult // in the order of Input.Tests
	Layers          []LayerResult
	MostInfluential int // index in Tests, -1 where there is none
	NextTest        NextTest
	Notes           []string
}
