package report

import (
	"fmt"
	"strings"

	"pastload/profile"
)

// number makes a cell of a Number.
func number(n profile.Number) Cell {
	if !n.Known {
		return Cell{}
	}
	return N(n.Value)
}

// three makes the low, best and high cells of a Range.
func three(r profile.Range) []Cell {
	if !r.Known {
		return make([]Cell, 3)
	}
	return []Cell{N(r.Low), N(r.Best), N(r.High)}
}

// ends makes the low, best and high cells of a Range that may be a bound: the
// bound stands in the middle and the ends are empty, as nothing is known of them.
func ends(r profile.Range) []Cell {
	cells := three(r)
	if r.Bound != profile.Exact {
		cells[0], cells[2] = Cell{}, Cell{}
	}
	return cells
}

// Points returns the profile of boreholes with depth.
func Points(bs ...profile.BoreholeProfile) *Table {
	t := &Table{
		Name: "profile", Title: "Stresses and stress history with depth",
		Columns: []Column{
			{"borehole", "borehole", Words, 0},
			{"depth", "depth", Length, 2},
			{"stratum", "stratum", Words, 0},
			{"γ", "unit_weight", WeightDensity, 2},
			{"σv0", "total_stress", Stress, 1},
			{"u0", "pore_pressure", Stress, 1},
			{"σ′v0", "effective_stress", Stress, 1},
			{"σ′p low", "preconsolidation_stress_low", Stress, 0},
			{"σ′p", "preconsolidation_stress", Stress, 0},
			{"σ′p high", "preconsolidation_stress_high", Stress, 0},
			{"OCR low", "ocr_low", Pure, 2},
			{"OCR", "ocr", Pure, 2},
			{"OCR high", "ocr_high", Pure, 2},
			{"POP", "pop", Stress, 0},
			{"Cc", "compression_index", Pure, 2},
			{"zone", "zone", Words, 0},
			{"P(zone)", "zone_probability", Pure, 2},
			{"su corr. low", "correlated_undrained_strength_low", Stress, 0},
			{"su corr.", "correlated_undrained_strength", Stress, 0},
			{"su corr. high", "correlated_undrained_strength_high", Stress, 0},
			{"K0 corr. low", "correlated_k0_low", Pure, 2},
			{"K0 corr.", "correlated_k0", Pure, 2},
			{"K0 corr. high", "correlated_k0_high", Pure, 2},
		},
		Note: "su and K0 are correlations with the stress history (" + profile.StrengthByHistory + ", " + profile.K0ByHistory + " with φ′ by " + profile.FrictionByIndex + "), not measurements. low and high are the 5 and 95 % points. At a boundary the first row ends the upper stratum and the second begins the lower.",
	}
	for _, b := range bs {
		for _, p := range b.Points {
			row := []Cell{T(b.Borehole), N(p.Depth), T(p.Stratum), number(p.UnitWeight), number(p.Total), number(p.Pore), number(p.Effective)}
			row = append(row, three(p.Preconsolidation)...)
			row = append(row, three(p.OCR)...)
			row = append(row, three(p.POP)[1], three(p.CompressionIndex)[1], T(string(p.Zone)), probability(p))
			row = append(row, three(p.UndrainedStrength)...)
			row = append(row, three(p.K0)...)
			t.Add(row...)
		}
	}
	return t
}

func probability(p profile.Point) Cell {
	if p.Zone == "" {
		return Cell{}
	}
	return N(p.ZoneProbability[p.Zone])
}

// Tests returns the preconsolidation stresses of boreholes, each beside what the
// rest of the ground expects there.
func Tests(bs ...profile.BoreholeProfile) *Table {
	t := &Table{
		Name: "tests", Title: "Preconsolidation stress: tests beside what the rest of the ground expects",
		Columns: []Column{
			{"borehole", "borehole", Words, 0},
			{"depth", "depth", Length, 2},
			{"specimen", "specimen", Words, 0},
			{"stratum", "stratum", Words, 0},
			{"σ′v0", "effective_stress", Stress, 1},
			{"bound", "bound", Words, 0},
			{"σ′p", "preconsolidation_stress", Stress, 0},
			{"low", "preconsolidation_stress_low", Stress, 0},
			{"high", "preconsolidation_stress_high", Stress, 0},
			{"lab σ′p", "laboratory", Stress, 0},
			{"OCR", "ocr", Pure, 2},
			{"POP", "pop", Stress, 0},
			{"grade", "grade", Words, 0},
			{"expected", "expected", Stress, 0},
			{"exp. low", "expected_low", Stress, 0},
			{"exp. high", "expected_high", Stress, 0},
			{"z", "z", Pure, 1},
			{"verdict", "verdict", Words, 0},
			{"used", "used", Words, 0},
			{"why", "why", Words, 0},
		},
		Note: "expected: what all other evidence says a good test at this depth would give (5, 50 and 95 % points), leaving this test out. z: how many standard deviations the test is from it.",
	}
	for _, b := range bs {
		for _, s := range b.Tests {
			p, e := ends(s.Preconsolidation), three(s.Expected)
			t.Add(T(b.Borehole), N(s.Depth), T(s.Specimen), T(s.Stratum), number(s.Effective), T(s.Bound.String()),
				p[1], p[0], p[2], three(s.Laboratory)[1], number(s.OCR), number(s.POP), T(s.Grade),
				e[1], e[0], e[2], number(s.Z), T(s.Verdict), T(yes(s.Used)), T(s.Why))
		}
	}
	return t
}

func yes(b bool) string {
	if b {
		return "yes"
	}
	return "no"
}

// Zones returns the zones of boreholes with their meaning for design.
func Zones(bs ...profile.BoreholeProfile) *Table {
	t := &Table{
		Name: "zones", Title: "Zones of stress history",
		Columns: []Column{
			{"borehole", "borehole", Words, 0},
			{"from", "top", Length, 2},
			{"to", "base", Length, 2},
			{"zone", "zone", Words, 0},
			{"or", "or_zone", Words, 0},
			{"P(zone)", "probability", Pure, 2},
			{"OCR low", "ocr_low", Pure, 2},
			{"OCR", "ocr", Pure, 2},
			{"OCR high", "ocr_high", Pure, 2},
			{"what it means for design", "meaning", Words, 0},
		},
	}
	for _, b := range bs {
		for _, z := range b.Zones {
			row := []Cell{T(b.Borehole), N(z.Top), N(z.Base), T(string(z.Zone)), T(string(z.OrZone)), number(z.Probability)}
			row = append(row, three(z.OCR)...)
			t.Add(append(row, T(z.Meaning))...)
		}
	}
	return t
}

// Strata returns the strata of boreholes with the mechanisms that explain them.
func Strata(bs ...profile.BoreholeProfile) *Table {
	t := &Table{
		Name: "mechanisms", Title: "What may have made the stress history",
		Columns: []Column{
			{"borehole", "borehole", Words, 0},
			{"stratum", "stratum", Words, 0},
			{"from", "top", Length, 2},
			{"to", "base", Length, 2},
			{"mechanism", "mechanism", Words, 0},
			{"probability", "probability", Pure, 2},
			{"size", "parameter", Words, 0},
			{"low", "parameter_low", Pure, 2},
			{"best", "parameter_best", Pure, 2},
			{"high", "parameter_high", Pure, 2},
			{"unit", "parameter_unit", Words, 0},
		},
		Note: "A mechanism is an explanation that fits, not a fact of geology: confirm it from the site's past.",
	}
	for _, b := range bs {
		for _, s := range b.Strata {
			for _, m := range s.Mechanisms {
				t.Add(T(b.Borehole), T(s.Stratum), N(s.Top), N(s.Base), T(m.Name), N(m.Probability),
					T(m.Parameter.Name), N(m.Parameter.Low), N(m.Parameter.Best), N(m.Parameter.High), T(m.Parameter.Unit))
			}
		}
	}
	return t
}

// Compression returns measured and correlated compression indices side by side.
func Compression(bs ...profile.BoreholeProfile) *Table {
	t := &Table{
		Name: "compression", Title: "Compressibility: measured beside correlated",
		Columns: []Column{
			{"borehole", "borehole", Words, 0},
			{"depth", "depth", Length, 2},
			{"specimen", "specimen", Words, 0},
			{"stratum", "stratum", Words, 0},
			{"Cc measured", "measured_compression_index", Pure, 3},
			{"Cc correlated low", "correlated_low", Pure, 2},
			{"best", "correlated", Pure, 2},
			{"high", "correlated_high", Pure, 2},
			{"CR measured", "measured_compression_ratio", Pure, 3},
			{"CR correlated low", "correlated_ratio_low", Pure, 2},
			{"best", "correlated_ratio", Pure, 2},
			{"high", "correlated_ratio_high", Pure, 2},
			{"Cr measured", "measured_recompression_index", Pure, 3},
			{"Cr correlated low", "correlated_recompression_low", Pure, 3},
			{"best", "correlated_recompression", Pure, 3},
			{"high", "correlated_recompression_high", Pure, 3},
			{"correlations for Cc", "correlations", Words, 0},
		},
		Note: "Correlated values rest on the relations named, one for each family that rests on data or assumptions of its own; see the catalogue for their soil, range and how far their coefficients were verified.",
	}
	for _, b := range bs {
		for _, d := range b.Results {
			if !d.MeasuredCc.Known && !d.CorrelatedCc.Known {
				continue
			}
			row := append([]Cell{T(b.Borehole), N(d.Depth), T(d.Specimen), T(d.Stratum), number(d.MeasuredCc)}, three(d.CorrelatedCc)...)
			row = append(append(row, number(d.MeasuredCR)), three(d.CorrelatedCR)...)
			row = append(append(row, number(d.MeasuredCr)), three(d.CorrelatedCr)...)
			t.Add(append(row, T(correlationIDs(d)))...)
		}
	}
	return t
}

func correlationIDs(d profile.DerivedResult) string {
	var ids []string
	for _, c := range d.Correlations {
		if c.Quantity == "compression index" && c.Counts {
			ids = append(ids, c.ID)
		}
	}
	return strings.Join(ids, " ")
}

// Cone returns the cone soundings condensed by layer.
func Cone(bs ...profile.BoreholeProfile) *Table {
	t := &Table{
		Name: "cone", Title: "Cone soundings by layer",
		Columns: []Column{
			{"borehole", "borehole", Words, 0}, {"from", "top", Length, 2}, {"to", "base", Length, 2}, {"stratum", "stratum", Words, 0}, {"depths used", "readings", Count, 0},
			{"qt − σv0", "net_cone_resistance", Stress, 0}, {"u2 − u0", "excess_cone_pore_pressure", Stress, 0}, {"qt − u2", "effective_cone_resistance", Stress, 0},
			{"Ic", "soil_behaviour_index", Pure, 2},
			{"σ′p from qt − σv0", "preconsolidation_from_net", Stress, 0}, {"from u2 − u0", "preconsolidation_from_excess", Stress, 0}, {"from qt − u2", "preconsolidation_from_effective", Stress, 0},
		},
		Note: "σ′p by the published factors, before the tests beside the sounding are heard.",
	}
	for _, b := range bs {
		if b.Cone == nil {
			continue
		}
		for _, l := range b.Cone.Layers {
			t.Add(T(b.Borehole), N(l.Top), N(l.Base), T(l.Stratum), N(float64(l.Readings)), number(l.Net), number(l.Excess), number(l.EffectiveCone),
				number(l.BehaviourIndex), number(l.FromNet), number(l.FromExcess), number(l.FromEffective))
		}
	}
	return t
}

// ConeFactors returns the site's own cone factors beside the published ones.
func ConeFactors(bs ...profile.BoreholeProfile) *Table {
	t := &Table{
		Name: "cone-factors", Title: "Cone factors: published, and the site's own",
		Columns: []Column{
			{"borehole", "borehole", Words, 0}, {"cone value", "cone_value", Words, 0}, {"published", "published_factor", Pure, 2},
			{"low", "factor_low", Pure, 2}, {"best", "factor", Pure, 2}, {"high", "factor_high", Pure, 2}, {"tests beside it", "tests", Count, 0}, {"remarks", "notes", Words, 0},
		},
		Note: "σ′p = factor times cone value. The published factors are from memory, unverified; the site's own weighs them against the oedometer tests beside the sounding.",
	}
	for _, b := range bs {
		if b.Cone == nil {
			continue
		}
		for _, f := range b.Cone.Factors {
			c := three(f.Factor)
			t.Add(T(b.Borehole), T(f.ConeValue), N(f.Published), c[0], c[1], c[2], N(float64(f.Tests)), T(strings.Join(f.Notes, "; ")))
		}
	}
	return t
}

// ConeNotes returns what there is to say of the soundings.
func ConeNotes(bs ...profile.BoreholeProfile) *Table {
	t := &Table{Name: "cone-notes", Title: "Remarks on the cone soundings", Columns: []Column{{"borehole", "borehole", Words, 0}, {"remark", "remark", Words, 0}}}
	for _, b := range bs {
		if b.Cone == nil {
			continue
		}
		for _, n := range b.Cone.Notes {
			t.Add(T(b.Borehole), T(n))
		}
	}
	return t
}

// Results returns everything that was measured, as read and converted, with its
// place in the tables.
func Results(s *profile.Site) *Table {
	t := &Table{Name: "results", Title: "Results as read", Columns: []Column{
		{"borehole", "borehole", Words, 0}, {"depth", "depth", Length, 2}, {"specimen", "specimen", Words, 0}, {"stratum", "stratum", Words, 0},
	}}
	var used []profile.Quantity
	for _, q := range profile.Quantities {
		if measured(s, q) {
			used = append(used, q)
			t.Columns = append(t.Columns, columnOf(q))
		}
	}
	t.Columns = append(t.Columns, Column{"strength test", "strength_test", Words, 0}, Column{"laboratory", "laboratory", Words, 0}, Column{"remark", "remark", Words, 0}, Column{"source", "source", Words, 0})
	for i := range s.Boreholes {
		b := &s.Boreholes[i]
		for j := range b.Results {
			r := &b.Results[j]
			row := []Cell{T(b.Name), N(r.Depth.Value), T(r.Specimen), T(r.Stratum)}
			for _, q := range used {
				row = append(row, number(*q.Of(r)))
			}
			t.Add(append(row, T(r.StrengthTest), T(r.Laboratory), T(r.Remark), T(r.Source.String()))...)
		}
	}
	return t
}

// measured tells whether any result of a site has a quantity.
func measured(s *profile.Site, q profile.Quantity) bool {
	for i := range s.Boreholes {
		for j := range s.Boreholes[i].Results {
			if q.Of(&s.Boreholes[i].Results[j]).Known {
				return true
			}
		}
	}
	return false
}

// columnOf makes a column of a quantity. Keys of quantities end in their unit,
// which the column adds itself.
func columnOf(q profile.Quantity) Column {
	c := Column{Name: q.Symbol, Key: q.Key, Dimension: Pure, Decimals: 3}
	switch q.Unit {
	case "kPa":
		c.Dimension, c.Decimals = Stress, 1
	case "kN/m3":
		c.Dimension, c.Decimals = WeightDensity, 2
	case "%":
		c.Dimension, c.Decimals = Percent, 1
	case "m/s":
		c.Dimension, c.Decimals = Speed, 0
	}
	c.Key = strings.TrimSuffix(c.Key, "_"+SI.of(c.Dimension).suffix)
	return c
}

// Assumptions returns what had to be supposed, with its place.
func Assumptions(bs ...profile.BoreholeProfile) *Table {
	t := &Table{
		Name: "assumptions", Title: "Assumptions",
		Columns: []Column{
			{"borehole", "borehole", Words, 0}, {"from", "top", Length, 2}, {"to", "base", Length, 2}, {"assumption", "assumption", Words, 0},
		},
	}
	for _, b := range bs {
		for _, a := range b.Assumptions {
			t.Add(T(b.Borehole), N(a.Top), N(a.Base), T(a.Message))
		}
	}
	return t
}

// Layers returns the strata of a site as the stresses were computed from them.
func Layers(s *profile.Site) *Table {
	t := &Table{
		Name: "strata", Title: "Ground",
		Columns: []Column{
			{"borehole", "borehole", Words, 0}, {"from", "top", Length, 2}, {"to", "base", Length, 2}, {"level of top", "top_level", Length, 2},
			{"stratum", "stratum", Words, 0}, {"soil", "soil", Words, 0}, {"description", "description", Words, 0},
			{"γ", "unit_weight", WeightDensity, 2}, {"γ saturated", "saturated_unit_weight", WeightDensity, 2},
		},
	}
	for i := range s.Boreholes {
		b := &s.Boreholes[i]
		for _, l := range b.Strata {
			level := Cell{}
			if b.GroundLevel.Known {
				level = N(b.GroundLevel.Value - l.Top)
			}
			t.Add(T(b.Name), N(l.Top), N(l.Base), level, T(l.Name), T(l.Soil), T(l.Description), number(l.UnitWeight), number(l.SaturatedUnitWeight))
		}
	}
	return t
}

// Water returns the water levels and pore pressures of a site.
func Water(s *profile.Site) *Table {
	t := &Table{
		Name: "water", Title: "Water",
		Columns: []Column{
			{"borehole", "borehole", Words, 0}, {"depth", "depth", Length, 2}, {"pore pressure", "pore_pressure", Stress, 1},
			{"kind", "kind", Words, 0}, {"date", "date", Words, 0}, {"remark", "remark", Words, 0},
		},
	}
	for i := range s.Boreholes {
		b := &s.Boreholes[i]
		if b.WaterTableDepth.Known {
			kind := "water table"
			if b.WaterTableDepth.Value < 0 {
				kind = fmt.Sprintf("water stands %.2f m above ground", -b.WaterTableDepth.Value)
			}
			t.Add(T(b.Name), N(b.WaterTableDepth.Value), N(0), T(kind), T(""), T(""))
		}
		for _, w := range b.Water {
			t.Add(T(b.Name), number(w.Depth), number(w.Pressure), T(w.Kind), T(w.Date), T(w.Remark))
		}
	}
	return t
}

// Sources returns the files of a site.
func Sources(s *profile.Site) *Table {
	t := &Table{
		Name: "sources", Title: "Tables read",
		Columns: []Column{
			{"file", "file", Words, 0}, {"table", "table", Words, 0}, {"rows", "rows", Count, 0}, {"bytes", "bytes", Count, 0},
			{"SHA-256", "sha256", Words, 0}, {"encoding", "encoding", Words, 0}, {"remarks", "remarks", Words, 0},
		},
	}
	for _, f := range s.Files {
		t.Add(T(f.Name), T(f.Table), N(float64(f.Rows)), N(float64(f.Size)), T(f.SHA256), T(f.Encoding), T(strings.Join(f.Notes, "; ")))
	}
	return t
}

// Tables returns every table of a report that has rows.
func Tables(c Content) []*Table {
	p := c.Profile
	var out []*Table
	all := []*Table{
		SettingsTable(p.Site), Points(p.Boreholes...), Tests(p.Boreholes...), Zones(p.Boreholes...), Strata(p.Boreholes...),
		Specimens(p.Specimens), Methods(p.Specimens), Grades(p.Specimens), Stages(p.Specimens),
		Cone(p.Boreholes...), ConeFactors(p.Boreholes...), ConeNotes(p.Boreholes...), Compression(p.Boreholes...), Relations(p), Layers(p.Site), Water(p.Site), Results(p.Site), Assumptions(p.Boreholes...), furtherTests(p), Sources(p.Site), Findings(c.Found), Decisions(p.Site), Effects(c.Effects), Design(c.Values), DesignWarnings(c.Values),
	}
	if c.Design {
		all = append(all, Ways(c.Values), Lines(p, c.Values))
	}
	for _, t := range all {
		if len(t.Rows) > 0 {
			out = append(out, t)
		}
	}
	return out
}
