package report

import (
	"strings"

	"pastload/profile"
	"pastload/profile/design"
)

// dimensionOf returns the dimension of a unit as package profile names it.
func dimensionOf(unit string) Dimension {
	switch unit {
	case "kPa":
		return Stress
	case "kN/m3", "kN/m³":
		return WeightDensity
	case "%":
		return Percent
	case "m":
		return Length
	case "m/s":
		return Speed
	}
	return Pure
}

// decimalsOf returns how many decimals a value of a dimension is worth, given
// the size of the largest.
func decimalsOf(d Dimension, largest float64) int {
	switch {
	case d == Stress && largest >= 100:
		return 0
	case d == Stress, d == Percent:
		return 1
	case d == WeightDensity:
		return 2
	}
	return 3
}

// Design returns the values of every stratum and parameter, a row each.
func Design(strata []design.Stratum) *Table {
	t := &Table{
		Name: "design", Title: "Values per stratum",
		Columns: []Column{
			{"stratum", "stratum", Words, 0}, {"borehole", "borehole", Words, 0}, {"parameter", "parameter", Words, 0}, {"unit", "unit", Words, 0},
			{"n", "n", Count, 0}, {"left out", "left_out", Count, 0},
			{"min", "min", Pure, 3}, {"max", "max", Pure, 3}, {"mean", "mean", Pure, 3}, {"median", "median", Pure, 3}, {"SD", "sd", Pure, 3}, {"COV", "cov", Pure, 2},
			{"trend per m", "trend_per_m", Pure, 3}, {"trend", "trend", Words, 0},
			{"low", "low", Pure, 3}, {"high", "high", Pure, 3}, {"mind the", "side", Words, 0}, {"term", "term", Words, 0}, {"method", "method", Words, 0},
			{"adopted", "adopted", Pure, 3}, {"reason", "reason", Words, 0},
		},
		Note: "n counts what is used; left out are results that the engineer set aside. Low and high are what the method named gives; mind the side that is unfavourable. " +
			"Adopted is the engineer's value: where it is empty nothing has been adopted.",
	}
	for _, s := range strata {
		for i := range s.Parameters {
			p := &s.Parameters[i]
			d := dimensionOf(p.Unit)
			q := quantities(d, p)
			slope, trend := Cell{}, "none to be told"
			if p.Trend != nil {
				slope = q(profile.Known(p.Trend.Slope))
				switch {
				case p.Trend.Used:
					trend = "followed"
				case p.Trend.Real:
					trend = "real, too small to follow"
				default:
					trend = "not real"
				}
			}
			t.Add(T(orUnnamed(s.Stratum)), T(orElse(s.Borehole, "all")), T(p.Parameter), U(d),
				N(float64(p.N)), N(float64(p.LeftOut)), q(p.Min), q(p.Max), q(p.Mean), q(p.Median), q(p.SD), number(p.COV),
				slope, T(trend), q(p.Low), q(p.High), T(p.Side), T(p.Term), T(p.Method), q(p.Adopted), T(p.Reason))
		}
	}
	return t
}

// quantities returns how numbers of a parameter become cells.
func quantities(d Dimension, p *design.Parameter) func(profile.Number) Cell {
	decimals := decimalsOf(d, max(p.Max.Value, p.High.Value))
	return func(n profile.Number) Cell {
		if !n.Known {
			return Cell{}
		}
		return Q(n.Value, d, decimals)
	}
}

// Ways returns what each published way gives for every parameter.
func Ways(strata []design.Stratum) *Table {
	t := &Table{
		Name: "ways", Title: "Cautious values by each published way",
		Columns: []Column{
			{"stratum", "stratum", Words, 0}, {"borehole", "borehole", Words, 0}, {"parameter", "parameter", Words, 0}, {"unit", "unit", Words, 0},
			{"way", "way", Words, 0}, {"estimate of", "estimate", Words, 0}, {"low", "low", Pure, 3}, {"high", "high", Pure, 3},
			{"source", "source", Words, 0}, {"mark", "mark", Words, 0}, {"note", "note", Words, 0},
		},
	}
	for _, s := range strata {
		for i := range s.Parameters {
			p := &s.Parameters[i]
			d := dimensionOf(p.Unit)
			q := quantities(d, p)
			for _, a := range p.Alternatives {
				t.Add(T(orUnnamed(s.Stratum)), T(orElse(s.Borehole, "all")), T(p.Parameter), U(d), T(a.Method), T(a.Estimate), q(a.Low), q(a.High), T(a.Source), T(a.Mark), T(a.Note))
			}
		}
	}
	return t
}

// DesignWarnings returns what to mind about the values.
func DesignWarnings(strata []design.Stratum) *Table {
	t := &Table{Name: "design-warnings", Title: "What to mind about the values", Columns: []Column{
		{"stratum", "stratum", Words, 0}, {"borehole", "borehole", Words, 0}, {"parameter", "parameter", Words, 0}, {"warning", "warning", Words, 0},
	}}
	for _, s := range strata {
		for _, n := range s.Notes {
			t.Add(T(orUnnamed(s.Stratum)), T(orElse(s.Borehole, "all")), T(""), T(n))
		}
		for _, p := range s.Parameters {
			for _, w := range p.Warnings {
				t.Add(T(orUnnamed(s.Stratum)), T(orElse(s.Borehole, "all")), T(p.Parameter), T(w))
			}
		}
	}
	return t
}

// Lines returns the design line of every borehole of a profile.
func Lines(p *profile.Profile, strata []design.Stratum) *Table {
	var points []design.LinePoint
	for i := range p.Boreholes {
		points = append(points, design.Line(p.Boreholes[i], strata)...)
	}
	return Line(points)
}

// Line returns a design line as a table: what a settlement calculation needs at
// every depth.
func Line(points []design.LinePoint) *Table {
	t := &Table{
		Name: "design-line", Title: "Design line of the preconsolidation stress with depth",
		Columns: []Column{
			{"borehole", "borehole", Words, 0}, {"depth", "depth", Length, 2}, {"stratum", "stratum", Words, 0},
			{"γ", "unit_weight", WeightDensity, 2}, {"u0", "pore_pressure", Stress, 1}, {"σ′v0", "effective_stress", Stress, 1},
			{"σ′p low", "preconsolidation_stress_low", Stress, 0}, {"σ′p", "preconsolidation_stress", Stress, 0}, {"σ′p high", "preconsolidation_stress_high", Stress, 0},
			{"σ′p adopted", "preconsolidation_stress_adopted", Stress, 0}, {"adopted from", "adopted_basis", Words, 0}, {"between tests", "tested", Words, 0},
			{"e0", "void_ratio", Pure, 3}, {"Cc mean", "compression_index_mean", Pure, 3}, {"Cc cautious", "compression_index_cautious", Pure, 3}, {"Cc adopted", "compression_index_adopted", Pure, 3},
			{"Cr mean", "recompression_index_mean", Pure, 3}, {"Cr cautious", "recompression_index_cautious", Pure, 3}, {"Cr adopted", "recompression_index_adopted", Pure, 3},
		},
		Note: "between tests: the depth lies between tests of its stratum in this borehole; elsewhere the line is an extrapolation.",
	}
	for _, l := range points {
		t.Add(T(l.Borehole), N(l.Depth), T(l.Stratum), number(l.UnitWeight), number(l.Pore), number(l.Effective),
			number(l.PreconsolidationLow), number(l.PreconsolidationBest), number(l.PreconsolidationHigh), number(l.Adopted), T(l.AdoptedBasis), T(yes(l.Tested)),
			number(l.VoidRatio.Mean), number(l.CompressionIndex.Mean), number(l.CompressionIndex.Cautious), number(l.CompressionIndex.Adopted),
			number(l.RecompressionIndex.Mean), number(l.RecompressionIndex.Cautious), number(l.RecompressionIndex.Adopted))
	}
	return t
}

// valueBlocks are the report's section on values: a short table for each stratum
// and what to mind.
func valueBlocks(strata []design.Stratum, withDesign bool) []Block {
	all := Design(strata)
	keys := []string{"parameter", "unit", "n", "left_out", "min", "max", "mean", "sd", "cov", "trend_per_m", "trend"}
	if withDesign {
		keys = append(keys, "low", "high", "side", "adopted")
	}
	var out []Block
	if edition := editionWords(strata); edition != "" && withDesign {
		out = append(out, Paragraph(edition))
	}
	for _, name := range stratumNames(strata) {
		part := *all
		part.Rows = nil
		for _, r := range all.Rows {
			if r[0].Text == name {
				part.Rows = append(part.Rows, r)
			}
		}
		part.Note = ""
		out = append(out, part.Only(keys...).Named("Values: "+name))
	}
	if withDesign {
		out = append(out, all.Only("stratum", "parameter", "term", "method", "reason").Named("How low and high were found, and why"))
	}
	return append(out, DesignWarnings(strata))
}

func stratumNames(strata []design.Stratum) []string {
	var names []string
	for _, s := range strata {
		if n := orUnnamed(s.Stratum); len(names) == 0 || names[len(names)-1] != n {
			names = append(names, n)
		}
	}
	return names
}

// editionWords says in whose terms the cautious values are named.
func editionWords(strata []design.Stratum) string {
	if len(strata) == 0 || strata[0].Edition.Term == "" {
		return ""
	}
	e := strata[0].Edition
	text := "A value below is called a " + e.Term + ": " + e.Basis
	if e.Name != "" {
		text += " (" + strings.Join(nonEmpty(e.Name, e.Clause, e.Mark), ", ") + ")"
	}
	return text + ". It is an aid to the engineer's choice and never the choice itself."
}
