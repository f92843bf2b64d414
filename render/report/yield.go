package report

import (
	"strconv"
	"strings"

	"pastload/profile"
)

// Specimens returns every oedometer test as interpreted, a row each.
func Specimens(ss []profile.Specimen) *Table {
	t := &Table{
		Name: "yield", Title: "Oedometer tests: yield stress and compressibility",
		Columns: []Column{
			{"borehole", "borehole", Words, 0}, {"depth", "depth", Length, 2}, {"specimen", "specimen", Words, 0},
			{"σ′v0", "effective_stress", Stress, 1}, {"bound", "bound", Words, 0},
			{"σ′p low", "preconsolidation_stress_low", Stress, 0}, {"σ′p", "preconsolidation_stress", Stress, 0}, {"σ′p high", "preconsolidation_stress_high", Stress, 0},
			{"grade", "grade", Words, 0},
			{"e0", "initial_void_ratio", Pure, 3}, {"Cc", "compression_index", Pure, 3}, {"Cc last points", "compression_index_last_points", Pure, 3},
			{"Cc field", "compression_index_field", Pure, 3}, {"Cr", "recompression_index", Pure, 3}, {"Cs", "swelling_index", Pure, 3},
			{"Δe/e0 or εv0", "quality", Pure, 3}, {"sample class", "quality_class", Words, 0}, {"loop check", "recovered_over_past_maximum", Pure, 2},
		},
		Note: "σ′p is the combined reading of all constructions that apply, with its 5 and 95 % points; bound: the test tells only that σ′p is at least (or at most) the value. " +
			"loop check: the same reading on the reload branch, over the stress from which it was unloaded; 1 is perfect.",
	}
	for _, s := range ss {
		p := ends(s.Preconsolidation)
		quality, class := Cell{}, ""
		if s.Quality != nil {
			quality, class = number(s.Quality.Value), s.Quality.Class
		}
		t.Add(T(s.Borehole), number(s.Depth), T(s.Name), number(s.Effective), T(s.Bound.String()), p[0], p[1], p[2], T(s.Grade),
			number(s.InitialVoidRatio), number(s.CompressionIndex), number(s.LastPointsCc), number(s.FieldCc), number(s.Recompression), number(s.Swelling),
			quality, T(class), number(s.LoopRatio))
	}
	return t
}

// Methods returns what each construction gives for every test.
func Methods(ss []profile.Specimen) *Table {
	t := &Table{
		Name: "methods", Title: "Yield stress by each construction",
		Columns: []Column{
			{"borehole", "borehole", Words, 0}, {"specimen", "specimen", Words, 0}, {"construction", "method", Words, 0},
			{"σ′p", "preconsolidation_stress", Stress, 0}, {"used", "used", Words, 0}, {"note", "note", Words, 0}, {"steps", "verified", Words, 0},
		},
	}
	for _, s := range ss {
		for _, m := range s.Methods {
			t.Add(T(s.Borehole), T(s.Name), T(m.Method), number(m.Stress), T(yes(m.Used)), T(m.Note), T(m.Mark))
		}
	}
	return t
}

// Stages returns stiffness and flow of every load stage of every test.
func Stages(ss []profile.Specimen) *Table {
	t := &Table{
		Name: "stages", Title: "Oedometer tests: stiffness and flow by stage",
		Columns: []Column{
			{"borehole", "borehole", Words, 0}, {"specimen", "specimen", Words, 0}, {"branch", "branch", Words, 0},
			{"from", "from", Stress, 1}, {"to", "to", Stress, 1}, {"mv (m²/MN)", "mv_m2_MN", Pure, 3}, {"M", "constrained_modulus", Stress, 0},
			{"cv (m²/year)", "cv_m2_year", Pure, 2}, {"cv from", "cv_from", Words, 0}, {"k (m/s)", "k_m_s", Words, 0}, {"Cα", "secondary_compression_index", Pure, 4},
			{"source", "source", Words, 0},
		},
		Note: "mv = Δε/Δσ′ of the height at the start of the stage; M = 1/mv; k = cv·mv·γw. cv and k only where the table carries times or cv.",
	}
	for _, s := range ss {
		for _, g := range s.Stages {
			k := Cell{}
			if g.Permeability.Known {
				k = T(strconv.FormatFloat(g.Permeability.Value, 'e', 1, 64))
			}
			t.Add(T(s.Borehole), T(s.Name), T(g.Branch), N(g.From), N(g.To), number(g.Compressibility), number(g.Modulus),
				number(g.Consolidation), T(g.ConsolidationBy), k, number(g.Secondary), T(g.Source.String()))
		}
	}
	return t
}

// Grades returns why each test has its grade, and what else there is to say.
func Grades(ss []profile.Specimen) *Table {
	t := &Table{
		Name: "grades", Title: "Grades and remarks",
		Columns: []Column{
			{"borehole", "borehole", Words, 0}, {"specimen", "specimen", Words, 0}, {"grade", "grade", Words, 0}, {"because", "reasons", Words, 0}, {"remarks", "notes", Words, 0},
		},
	}
	for _, s := range ss {
		t.Add(T(s.Borehole), T(s.Name), T(s.Grade), T(strings.Join(s.Reasons, "; ")), T(strings.Join(s.Notes, "; ")))
	}
	return t
}
