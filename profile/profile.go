package profile

import "encoding/json"

// Schema is the version of the JSON that the commands print.
const Schema = 1

// A Range is a value with its 5 and 95 % points. The zero Range is not known
// and is null in JSON. A Range that is a bound has its three values at the bound
// and says on which side the truth lies: JSON then gives that side alone, so that
// no reader takes the bound for a value.
type Range struct {
	Low, Best, High float64
	Known           bool
	Bound           Bound
}

// Around returns a known range.
func Around(low, best, high float64) Range {
	return Range{Low: low, Best: best, High: high, Known: true}
}

// Single returns a known range without width.
func Single(v float64) Range { return Around(v, v, v) }

// BoundAt returns a bound.
func BoundAt(v float64, side Bound) Range {
	return Range{Low: v, Best: v, High: v, Known: true, Bound: side}
}

// Scale returns the range times a factor greater than zero.
func (r Range) Scale(f float64) Range {
	r.Low, r.Best, r.High = r.Low*f, r.Best*f, r.High*f
	return r
}

// MarshalJSON writes {"low":…,"best":…,"high":…}, or null where not known. Of a
// bound it writes the low (at least) or the high (at most) alone.
func (r Range) MarshalJSON() ([]byte, error) {
	if !r.Known {
		return []byte("null"), nil
	}
	low, best, high := &r.Low, &r.Best, &r.High
	switch r.Bound {
	case AtLeast:
		best, high = nil, nil
	case AtMost:
		low, best = nil, nil
	}
	return json.Marshal(struct {
		Low  *float64 `json:"low"`
		Best *float64 `json:"best"`
		High *float64 `json:"high"`
	}{low, best, high})
}

// MarshalJSON writes the value, or null where it is not known.
func (n Number) MarshalJSON() ([]byte, error) {
	if !n.Known {
		return []byte("null"), nil
	}
	return json.Marshal(n.Value)
}

// A Profile is what Build makes of a Site.
type Profile struct {
	Site      *Site             `json:"-"`
	Specimens []Specimen        `json:"-"` // every curve interpreted
	Boreholes []BoreholeProfile `json:"boreholes"`
}

// A BoreholeProfile is the stress history of one borehole with depth.
type BoreholeProfile struct {
	Borehole    string           `json:"borehole"`
	GroundLevel Number           `json:"ground_level_m"`
	WaterTable  Number           `json:"water_table_depth_m"`
	Points      []Point          `json:"points"`
	Tests       []Test           `json:"tests"`
	Zones       []ZoneInterval   `json:"zones"`
	Strata      []StratumProfile `json:"strata"`
	Results     []DerivedResult  `json:"results"`
	Cone        *ConeProfile     `json:"cone,omitempty"`
	NextTest    *NextTest        `json:"next_test,omitempty"`
	Influence   string           `json:"most_influential_specimen,omitempty"` // the test that moves the line most
	Assumptions []Assumption     `json:"assumptions"`
	Notes       []string         `json:"notes"`
}

// A Point is the profile at one depth. At a stratum boundary there are two
// points: one that ends the upper stratum and one that begins the lower.
type Point struct {
	Depth                float64          `json:"depth_m"`
	Stratum              string           `json:"stratum"`
	UnitWeight           Number           `json:"unit_weight_kN_m3"`
	Total                Number           `json:"total_stress_kPa"`
	Pore                 Number           `json:"pore_pressure_kPa"`
	Effective            Number           `json:"effective_stress_kPa"`
	EffectiveUncertainty Number           `json:"effective_stress_sd_kPa"`
	Preconsolidation     Range            `json:"preconsolidation_stress_kPa"`
	OCR                  Range            `json:"ocr"`
	POP                  Range            `json:"pop_kPa"`
	Zone                 Zone             `json:"zone"` // "" where none is given
	ZoneProbability      map[Zone]float64 `json:"zone_probability"`
	CompressionIndex     Range            `json:"compression_index"`
	UndrainedStrength    Range            `json:"correlated_undrained_strength_kPa"` // by stress history
	K0                   Range            `json:"correlated_k0"`                     // by stress history

	stratum int // index into the borehole's strata
}

// The verdicts on a test, from what the rest of the ground expects there.
const (
	Agrees    = "agrees"
	Doubtful  = "doubtful"
	Conflicts = "conflicts"
)

// A Test is one preconsolidation stress with what it is compared with.
// A row of the results table and an interpreted curve of the same specimen are
// one Test: Laboratory and Interpreted keep both values.
type Test struct {
	Specimen         string  `json:"specimen"`
	Depth            float64 `json:"depth_m"`
	Stratum          string  `json:"stratum"`
	Effective        Number  `json:"effective_stress_kPa"`
	Preconsolidation Range   `json:"preconsolidation_stress_kPa"`
	Bound            Bound   `json:"bound"` // "" exact, "at least", "at most"
	OCR              Number  `json:"ocr"`
	POP              Number  `json:"pop_kPa"`
	Grade            string  `json:"grade"` // A, B, C, "bound only", or "not graded"
	Used             bool    `json:"used"`
	LeftOut          bool    `json:"left_out"`      // by a decision of the engineer
	Why              string  `json:"why,omitempty"` // which value is used, or why none is
	Laboratory       Range   `json:"laboratory_kPa"`
	Interpreted      Range   `json:"interpreted_kPa"`
	Expected         Range   `json:"expected_kPa"` // leave-one-out
	Z                Number  `json:"z"`
	Verdict          string  `json:"verdict"` // "" where it is not judged
	Result           *Result `json:"-"`       // nil where only a curve gives it
	Curve            *Curve  `json:"-"`       // nil where only the laboratory gives it
	specimen         *Specimen
}

// MarshalJSON writes "", "at least" or "at most".
func (b Bound) MarshalJSON() ([]byte, error) { return json.Marshal(b.String()) }

// String returns "", "at least" or "at most".
func (b Bound) String() string {
	return [...]string{"", "at least", "at most"}[b]
}

// A ZoneInterval is a stretch of one zone with depth.
type ZoneInterval struct {
	Top         float64 `json:"top_m"`
	Base        float64 `json:"base_m"`
	Zone        Zone    `json:"zone"`
	OrZone      Zone    `json:"or_zone,omitempty"` // the other name where the band straddles a limit
	Probability Number  `json:"probability"`
	OCR         Range   `json:"ocr"`
	Meaning     string  `json:"meaning"`
}

// A StratumProfile is a stratum with what made it as it is.
type StratumProfile struct {
	Stratum    string      `json:"stratum"`
	Top        float64     `json:"top_m"`
	Base       float64     `json:"base_m"`
	Mechanisms []Mechanism `json:"mechanisms"`
	Sentence   string      `json:"sentence,omitempty"`
}

// A NextTest is where one more good oedometer test would narrow the band most.
type NextTest struct {
	Depth     float64 `json:"depth_m"`
	Stratum   string  `json:"stratum"`
	Narrowing float64 `json:"narrowing"` // share by which the mean width of the band falls
}

// A Mechanism is an explanation of the stress history of a stratum.
type Mechanism struct {
	Name        string    `json:"name"`
	Probability float64   `json:"probability"`
	Parameter   Parameter `json:"parameter"`
}

// A Parameter is the back-calculated size of a mechanism.
type Parameter struct {
	Name string  `json:"name"`
	Low  float64 `json:"low"`
	Best float64 `json:"best"`
	High float64 `json:"high"`
	Unit string  `json:"unit"`
}

// A DerivedResult sets what was measured at a depth beside what correlations
// and the stresses give there.
type DerivedResult struct {
	Depth            float64      `json:"depth_m"`
	Specimen         string       `json:"specimen"`
	Stratum          string       `json:"stratum"`
	Total            Number       `json:"total_stress_kPa"`
	Pore             Number       `json:"pore_pressure_kPa"`
	Effective        Number       `json:"effective_stress_kPa"`
	MeasuredCc       Number       `json:"measured_compression_index"`
	CorrelatedCc     Range        `json:"correlated_compression_index"`
	MeasuredCR       Number       `json:"measured_compression_ratio"` // Cc/(1+e0)
	CorrelatedCR     Range        `json:"correlated_compression_ratio"`
	MeasuredCr       Number       `json:"measured_recompression_index"`
	CorrelatedCr     Range        `json:"correlated_recompression_index"`
	Correlations     []Correlated `json:"correlations,omitempty"`
	PlasticityIndex  Number       `json:"plasticity_index_pct"`
	LiquidityIndex   Number       `json:"liquidity_index"`
	DegreeSaturation Number       `json:"degree_of_saturation"`
	Result           *Result      `json:"-"`
}

// Correlated is one correlation evaluated at a depth.
type Correlated struct {
	ID       string   `json:"id"`
	Quantity string   `json:"quantity"`
	Family   string   `json:"family"`
	Value    float64  `json:"value"`
	Unit     string   `json:"unit"`
	Verified string   `json:"verified"` // the verification mark in words
	Counts   bool     `json:"counts"`   // it speaks for its family in the band
	Warnings []string `json:"warnings,omitempty"`
}

// An Assumption is what had to be supposed to compute, and where.
type Assumption struct {
	Top     float64 `json:"top_m"`
	Base    float64 `json:"base_m"`
	Message string  `json:"message"`
}
