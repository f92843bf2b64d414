package profile

// Limits are the overconsolidation ratios at which one zone gives way to the
// next. They are the project's definition: sources differ.
type Limits struct {
	NormallyConsolidated    float64 // from here on normally consolidated
	LightlyOverconsolidated float64
	HeavilyOverconsolidated float64
}

// Settings are the values that the settings table can change.
type Settings struct {
	WaterUnitWeight       float64 // kN/m³
	Limits                Limits
	UnitWeightUncertainty float64 // standard deviation over mean, shared by the column
	WaterLevelUncertainty float64 // standard deviation, m
	CodeEdition           string
	Correlations          []string // identifiers in use; empty means the default set
	Title                 TitleBlock
	Given                 []Setting // every row of the table
}

// A Setting is a row of the settings table.
type Setting struct {
	Name, Value, Unit, Note string
	Source                  *Cell
}

// TitleBlock is what a drawing and a report carry in their title block.
type TitleBlock struct {
	Project, Location, Client, Number string
	Title, Revision, Status, Date     string
	PreparedBy, CheckedBy, ApprovedBy string
	Organisation, Datum, Coordinates  string
}

// DefaultSettings returns the settings of a site that gives none.
func DefaultSettings() Settings {
	return Settings{
		WaterUnitWeight:       9.81,
		Limits:                Limits{NormallyConsolidated: 0.85, LightlyOverconsolidated: 1.2, HeavilyOverconsolidated: 4},
		UnitWeightUncertainty: 0.03,
		WaterLevelUncertainty: 0.3,
	}
}
