package insitu

import (
	"fmt"
	"math"
)

// How far the published side of a Case was verified.
const (
	// Read: data and answer were read in the source.
	Read = "read"
	// DataRead: the data was read, the source's answer was not seen; the answer is ours.
	DataRead = "data read, answer ours"
	// FromMemory: data or answer are remembered and were not checked against the source.
	FromMemory = "from memory, unverified"
)

// Tolerances, in the unit of the case.
const (
	// roundedStress: sources print one or two decimals of a kPa after rounding
	// the parts of the sum once.
	roundedStress = 0.06
	roundedFoot   = 0.5   // psf, printed without decimals
	roundedTonne  = 0.005 // t/m², printed to two decimals
)

// Units of the sources that are not metric, exactly as defined.
const (
	metrePerFoot       = 0.3048
	stressPerPsf       = 0.45359237 * 9.80665 / (metrePerFoot * metrePerFoot) / 1000 // kPa
	weightPerPcf       = stressPerPsf / metrePerFoot                                 // kN/m³
	stressPerTonne     = 9.80665                                                     // kPa in a t/m²; also kN/m³ in a t/m³
	weightOfDensity    = 9.81 / 1000                                                 // kN/m³ in a kg/m³, with the sources' g
	textbookWater      = 9.81
	shorterWater       = 9.8
	roundWater         = 10.0
	waterPcf           = 62.4
	unitKilopascal     = "kPa"
	unitPoundPerSqFoot = "psf"
	unitTonnePerSqM    = "t/m²"
)

// A Value is a stress that a source gives or leaves out.
type Value struct {
	Value float64
	Known bool
}

// Values are the stresses that a source gives, in the unit of its Case.
type Values struct {
	Total, Pore, Effective Value
}

// A Case is a worked example of vertical stress with its source.
type Case struct {
	Name   string
	Source string
	Mark   string // Read, DataRead or FromMemory
	Note   string // what a reader must know to repeat it; may be empty

	Unit   string  // the source's unit of stress
	Factor float64 // kPa in one of it
	Column Column  // in m, kPa and kN/m³, whatever the source's units
	Depth  float64 // m

	Want      Values  // what the source gives, or what its data gives where Mark says so
	Printed   Values  // what the source prints where that is wrong; otherwise empty
	Tolerance float64 // in Unit
}

// Obtained returns what this package computes for the case, in the unit of the
// source (unit weight excepted, which stays in kN/m³).
func (c Case) Obtained() (State, error) {
	s, err := New(c.Column)
	if err != nil {
		return State{}, fmt.Errorf("%s: %w", c.Name, err)
	}
	state, err := s.At(c.Depth)
	if err != nil {
		return State{}, fmt.Errorf("%s: %w", c.Name, err)
	}
	state.Total /= c.Factor
	state.Pore /= c.Factor
	state.Effective /= c.Factor
	return state, nil
}

// Agrees reports whether each known value lies within tolerance of the state.
func (v Values) Agrees(s State, tolerance float64) bool {
	return v.Total.agrees(s.Total, tolerance) && v.Pore.agrees(s.Pore, tolerance) && v.Effective.agrees(s.Effective, tolerance)
}

func (v Value) agrees(obtained, tolerance float64) bool {
	return !v.Known || math.Abs(obtained-v.Value) <= tolerance
}

// Any reports whether any of the values is known.
func (v Values) Any() bool { return v.Total.Known || v.Pore.Known || v.Effective.Known }

// Published returns worked examples of vertical stress from books, courses and
// teaching pages, each with its source and how far that was verified. Two of
// them were published with a wrong answer, which is kept beside the right one.
func Published() []Case {
	var cases []Case
	for _, group := range [][]Case{dryAndHydrostatic(), otherUnits(), capillary(), underWater(), seepage(), loads(), misprinted()} {
		cases = append(cases, group...)
	}
	return cases
}

// all gives the three stresses of a case, only one of them.
func all(total, pore, effective float64) Values {
	return Values{Value{total, true}, Value{pore, true}, Value{effective, true}}
}

func onlyEffective(effective float64) Values {
	return Values{Effective: Value{effective, true}}
}

// at returns the case at another depth of the same column.
func (c Case) at(depth float64, want Values) Case {
	c.Name = fmt.Sprintf("%s, z = %g m", c.Name, math.Round(depth*1000)/1000)
	c.Depth, c.Want = depth, want
	return c
}

// in sets the unit and the rounding of a source.
func (c Case) in(unit string, factor, tolerance float64) Case {
	c.Unit, c.Factor, c.Tolerance = unit, factor, tolerance
	return c
}

// metric is the unit of most sources.
func (c Case) metric() Case { return c.in(unitKilopascal, 1, roundedStress) }

// ground builds a column from thicknesses: each row is thickness, unit weight
// and saturated unit weight.
func ground(water float64, rows ...[3]float64) Column {
	c := Column{WaterUnitWeight: water}
	top := 0.0
	for _, r := range rows {
		c.Layers = append(c.Layers, Layer{Top: top, Base: top + r[0], UnitWeight: r[1], SaturatedUnitWeight: r[2]})
		top += r[0]
	}
	return c
}

func (c Column) table(depth float64) Column {
	c.HasWater, c.WaterTable = true, depth
	return c
}

func (c Column) fringe(rise float64) Column {
	c.CapillaryRise = rise
	return c
}

func (c Column) load(surcharge float64) Column {
	c.Surcharge = surcharge
	return c
}

func (c Column) measured(points ...PorePressure) Column {
	c.Measured = points
	return c
}
