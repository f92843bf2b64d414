package intake

import (
	"strings"

	"golang.org/x/text/unicode/norm"
)

// A unit is one way to write a quantity of a dimension.
type unit struct {
	name    string  // as we print it
	words   string  // as a message wants it
	example string  // a usual value
	factor  float64 // of the dimension's first unit; exact by definition of the units
	aliases string  // other spellings, separated by blanks
	note    string  // what a reader should know about the conversion
}

// A dimension is a list of units that convert into each other.
type dimension struct {
	name  string
	units []unit
}

// Definitions that the factors rest on: the international foot, the avoirdupois
// pound and standard gravity are exact by definition (1959; CGPM 1901).
const (
	foot       = 0.3048     // m
	inch       = 0.0254     // m
	pound      = 0.45359237 // kg
	gravity    = 9.80665    // m/s²
	poundForce = pound * gravity
	year       = 365.25 * 86400 // s, Julian
)

const gravityNote = "mass density × 9.80665 m/s²"

var (
	length = &dimension{"length", []unit{
		{"m", "metres", "4.20", 1, "metre metres meter meters mbgl mbgs", ""},
		{"ft", "feet", "13.8", foot, "foot feet '", "international foot"},
		{"mm", "millimetres", "20.0", 1e-3, "millimetre millimetres", ""},
		{"cm", "centimetres", "2.00", 1e-2, "centimetre centimetres", ""},
		{"in", "inches", "0.79", inch, "inch inches", ""},
	}}
	// A level is a length above a datum: "mOD" tells it from a depth.
	level = &dimension{"level", []unit{
		{"m", "metres above the datum", "12.50", 1, "metre metres meter meters mOD mAOD mASL mRL mMSL", ""},
		{"ft", "feet above the datum", "41.0", foot, "foot feet ' ftOD ftASL ftMSL", "international foot"},
		{"mm", "millimetres above the datum", "12500", 1e-3, "", ""},
		{"cm", "centimetres above the datum", "1250", 1e-2, "", ""},
		{"in", "inches above the datum", "492", inch, "", ""},
	}}
	stress = &dimension{"stress", []unit{
		{"kPa", "kilopascals", "125.0", 1, "kN/m2 kNm-2 kilopascal kilopascals", ""},
		{"MPa", "megapascals", "0.125", 1e3, "MN/m2 N/mm2 megapascal megapascals", ""},
		{"Pa", "pascals", "125000", 1e-3, "N/m2 pascal pascals", ""},
		{"psf", "pounds per square foot", "2611", poundForce / (foot * foot) / 1e3, "lb/ft2 lbf/ft2 lb/sqft lbs/ft2", ""},
		{"ksf", "kips per square foot", "2.61", poundForce / (foot * foot), "kip/ft2 kips/ft2", ""},
		{"psi", "pounds per square inch", "18.1", poundForce / (inch * inch) / 1e3, "lb/in2 lbf/in2", ""},
		{"tsf", "US tons per square foot", "1.31", 2 * poundForce / (foot * foot), "ton/ft2 tons/ft2 t/ft2 ton/sqft", "US short ton, 2000 lb"},
		{"kgf/cm2", "kilograms-force per square centimetre", "1.27", gravity * 10, "kg/cm2 kp/cm2 ksc", ""},
		{"bar", "bars", "1.25", 100, "bars", ""},
		{"t/m2", "tonnes-force per square metre", "12.7", gravity, "tf/m2 tonne/m2 Mp/m2", ""},
		{"atm", "standard atmospheres", "1.23", 101.325, "", ""},
	}}
	unitWeight = &dimension{"weight per volume", []unit{
		{"kN/m3", "kilonewtons per cubic metre", "18.5", 1, "kNm-3", ""},
		{"pcf", "pounds per cubic foot", "118", poundForce / (foot * foot * foot) / 1e3, "lb/ft3 lbf/ft3 lbs/ft3 lb/cuft", ""},
		{"Mg/m3", "megagrams per cubic metre", "1.89", gravity, "Mgm-3", gravityNote},
		{"t/m3", "tonnes per cubic metre", "1.89", gravity, "tonne/m3 tf/m3", gravityNote},
		{"g/cm3", "grams per cubic centimetre", "1.89", gravity, "g/cc g/ml gcm-3", gravityNote},
		{"kg/m3", "kilograms per cubic metre", "1890", gravity / 1e3, "kgm-3", gravityNote},
	}}
	percent = &dimension{"percentage", []unit{
		{"%", "percent", "45.0", 1, "pct percent per/cent", ""},
		{"decimal", "a decimal fraction", "0.45", 100, "- fraction ratio 1", "decimal fraction × 100"},
	}}
	ratio = &dimension{"pure number", []unit{
		{"-", "a number", "0.85", 1, "none ratio decimal 1", ""},
	}}
	gravityRatio = &dimension{"specific gravity", []unit{
		{"-", "a number", "2.70", 1, "none ratio 1", ""},
		{"Mg/m3", "megagrams per cubic metre", "2.70", 1, "t/m3 g/cm3 g/cc Mgm-3", "particle density over 1 Mg/m³"},
		{"kg/m3", "kilograms per cubic metre", "2700", 1e-3, "kgm-3", "particle density over 1 Mg/m³"},
	}}
	velocity = &dimension{"velocity", []unit{
		{"m/s", "metres per second", "150", 1, "ms-1 m/sec", ""},
		{"ft/s", "feet per second", "490", foot, "fps ft/sec", ""},
	}}
	consolidation = &dimension{"area per time", []unit{
		{"m2/year", "square metres per year", "1.5", 1, "m2/yr m2/a m2/y", ""},
		{"m2/s", "square metres per second", "4.8e-8", year, "m2/sec", "year of 365.25 days"},
		{"cm2/s", "square centimetres per second", "4.8e-4", year * 1e-4, "cm2/sec", "year of 365.25 days"},
		{"mm2/s", "square millimetres per second", "0.048", year * 1e-6, "mm2/sec", "year of 365.25 days"},
		{"ft2/day", "square feet per day", "0.044", foot * foot * 365.25, "ft2/d", "year of 365.25 days"},
		{"ft2/year", "square feet per year", "16", foot * foot, "ft2/yr", ""},
	}}
	duration = &dimension{"time", []unit{
		{"min", "minutes", "12.5", 1, "mins minute minutes", ""},
		{"s", "seconds", "750", 1.0 / 60, "sec second seconds", ""},
		{"h", "hours", "0.21", 60, "hr hour hours", ""},
	}}
)

var dimensions = []*dimension{length, level, stress, unitWeight, percent, ratio, gravityRatio, velocity, consolidation, duration}

// unitKey folds the spellings of a unit: superscripts, dots, blanks, minus signs.
func unitKey(s string) string {
	s = norm.NFKC.String(strings.TrimSpace(s))
	return strings.Map(func(r rune) rune {
		switch r {
		case ' ', '\t', '^', '·', '*', '.', '⋅':
			return -1
		case '−', '–', '‐', '‑':
			return '-'
		case '’', '′', '`':
			return '\''
		}
		return r
	}, s)
}

// find returns the unit of the dimension that the text names.
// Case is folded except where it changes the size: mg and mPa are not Mg and MPa.
func (d *dimension) find(text string) (unit, bool) {
	key := unitKey(text)
	if key == "" || key == "mPa" || strings.HasPrefix(key, "mg") || strings.HasPrefix(key, "mN/") {
		return unit{}, false
	}
	for _, u := range d.units {
		if strings.EqualFold(key, unitKey(u.name)) {
			return u, true
		}
		for alias := range strings.FieldsSeq(u.aliases) {
			if strings.EqualFold(key, alias) {
				return u, true
			}
		}
	}
	return unit{}, false
}

// named returns the unit of that exact name; the names are ours.
func (d *dimension) named(name string) unit {
	for _, u := range d.units {
		if u.name == name {
			return u
		}
	}
	panic("intake: " + d.name + " has no unit " + name)
}

// needsUnit tells whether a column of the dimension must name its unit.
func (d *dimension) needsUnit() bool { return d != ratio && d != gravityRatio }

// list returns the names of the units, for a message.
func (d *dimension) list() string {
	names := make([]string, len(d.units))
	for i, u := range d.units {
		names[i] = u.name
	}
	return strings.Join(names, ", ")
}

// unitElsewhere returns the name of the dimension in which the text is a unit.
func unitElsewhere(text string) (string, bool) {
	for _, d := range dimensions {
		if _, ok := d.find(text); ok {
			return d.name, true
		}
	}
	return "", false
}

// convert turns a value in one unit into another of the same dimension. A value
// already in that unit is returned as it was typed, to the last bit.
func convert(v float64, from, to unit) float64 {
	if from.factor == to.factor {
		return v
	}
	return v * (from.factor / to.factor)
}
