package profile

// A Site is a ground investigation as its tables tell it.
type Site struct {
	Name      string
	Settings  Settings
	Boreholes []Borehole // in the order in which the tables first name them
	Curves    []Curve    // oedometer tests, in the order of their table
	Soundings []Sounding // cone soundings, one per borehole that has readings
	Past      []PastEvent
	Decisions []Decision
	Files     []SourceFile
	Notes     []Note // what the reading of the tables has to say that is no error
}

// Borehole returns the borehole of that name, or nil.
func (s *Site) Borehole(name string) *Borehole {
	for i := range s.Boreholes {
		if s.Boreholes[i].Name == name {
			return &s.Boreholes[i]
		}
	}
	return nil
}

// A Borehole is one vertical through the ground. Depths are below ground level.
type Borehole struct {
	Name            string
	GroundLevel     Number // m above the site's datum
	WaterTableDepth Number // m; negative where water stands above ground
	CapillaryRise   Number // m of saturated ground above the water table
	Surcharge       Number // kPa, wide and permanent, at ground level
	Easting         Number // m
	Northing        Number // m
	Drilled         string
	Remark          string
	Strata          []Stratum      // by top, without gaps or overlaps between them
	Water           []PorePressure // by depth
	Results         []Result       // by depth, then in table order
	Source          *Cell          // the borehole's own row, if it has one
}

// A Stratum is a layer in a borehole. A borehole without strata is one unnamed
// stratum.
type Stratum struct {
	Name                string // as the tables call it, e.g. "Soft clay"
	Soil                string // the main soil type, for the drawn pattern
	Description         string
	Top, Base           float64 // m
	UnitWeight          Number  // kN/m³, as it lies above the water table
	SaturatedUnitWeight Number  // kN/m³, below the water table
	Source              *Cell
}

// PorePressure is one observation of pore water pressure.
type PorePressure struct {
	Depth    Number // m
	Pressure Number // kPa; computed at intake from HeadLevel where that was given
	Head     Number // m above the site's datum, where given
	Date     string
	Kind     string
	Remark   string
}

// A Result is what was measured at one depth of a borehole: a row of the
// results table.
type Result struct {
	Depth     Number
	DepthBase Number // where a depth range was given
	Specimen  string
	Stratum   string

	UnitWeight      Number // kN/m³
	WaterContent    Number // %
	LiquidLimit     Number // %
	PlasticLimit    Number // %
	NonPlastic      bool   // the plastic limit was recorded as NP
	PlasticityIndex Number // %
	LiquidityIndex  Number
	SpecificGravity Number
	VoidRatio       Number
	ClayFraction    Number // %
	OrganicContent  Number // %

	EffectiveStress       Number // kPa, given and not computed
	Preconsolidation      Number // kPa
	PreconsolidationLow   Number // kPa
	PreconsolidationHigh  Number // kPa
	Method                string // how the laboratory read it
	Test                  string // what test it comes from
	CompressionIndex      Number // Cc
	RecompressionIndex    Number // Cr
	SwellingIndex         Number // Cs
	SecondaryCompression  Number // Cα
	UndrainedStrength     Number // kPa
	StrengthTest          string
	Sensitivity           Number
	N60                   Number
	HorizontalStressIndex Number // KD
	MaterialIndex         Number // ID
	ShearWaveVelocity     Number // m/s
	NetConeResistance     Number // kPa, qt − σv0
	ExcessConePressure    Number // kPa, u2 − u0
	EffectiveCone         Number // kPa, qt − u2

	Laboratory string
	Sampler    string
	Remark     string
	Extra      []Extra // columns that no quantity is known for, kept as typed
	Source     *Cell   // the row, with the column of its depth
}

// Extra is a cell of an unknown column, kept as typed.
type Extra struct {
	Header, Text string
}

// A Curve is one oedometer test as recorded.
type Curve struct {
	Specimen         string
	Borehole         string
	Depth            Number
	TestKind         string // "incremental 24 h", "end of primary", "constant rate of strain", or "" where not given
	InitialHeight    Number // mm
	InitialVoidRatio Number
	SpecificGravity  Number
	WaterContent     Number // %
	Remark           string // water table, inundation, disturbance
	Stages           []Stage
	Source           *Cell // its first row
}

// A Stage is one row of the oedometer table.
type Stage struct {
	Kind            string // load, unload, reload; "" where not given
	EffectiveStress Number // kPa
	VoidRatio       Number
	Strain          Number // %
	Height          Number // mm
	T50, T90        Number // minutes
	Consolidation   Number // cv, m²/year
	Secondary       Number // Cα of the stage, void ratio per log10 cycle of time
	Source          *Cell
}

// A Sounding is a cone penetration test beside or in a borehole.
type Sounding struct {
	Borehole  string
	AreaRatio Number
	Readings  []ConeReading
}

// A ConeReading is one row of the cone table.
type ConeReading struct {
	Depth               float64 // m
	ConeResistance      Number  // qc, MPa, not corrected for pore pressure
	CorrectedResistance Number  // qt, MPa
	SleeveFriction      Number  // fs, kPa
	PorePressure        Number  // u2, kPa
	Line                int     // of its table
}

// A PastEvent is something known of the past: ground removed, a former water
// level, a former load.
type PastEvent struct {
	Borehole string // "" where it holds for a stratum or the whole site
	Stratum  string
	Kind     string // "removed ground" [m], "former water level" [m depth], "former load" [kPa]
	Size     Number
	Reported string // who says so
	Source   *Cell
}

// A Decision is what the engineer decided about a value. It is keyed by
// borehole, depth, specimen and quantity, never by row.
type Decision struct {
	Borehole string `json:"borehole"`
	Depth    Number `json:"depth_m"`
	Specimen string `json:"specimen"`
	Quantity string `json:"quantity"`
	Decision string `json:"decision"`   // "leave out", "keep", "adopt value"
	Value    Number `json:"value"`      // what is adopted, in the quantity's own unit
	Seen     Number `json:"value_seen"` // the value when it was decided
	Reason   string `json:"reason"`
	By       string `json:"by"`
	Date     string `json:"date"`
	Source   *Cell  `json:"-"`
}

// A SourceFile is a table that was read.
type SourceFile struct {
	Name     string
	Table    string
	Size     int64
	SHA256   string
	Rows     int
	Encoding string // "UTF-8", "UTF-8 with byte-order mark", "UTF-16", "Windows-1252"
	Notes    []string
}

// A Note is a remark on the data or the computation that is not an error.
// Where names the place: file:line:column, or borehole and depth.
type Note struct {
	Where   string
	Message string
}
