package profile

import (
	"fmt"
	"strings"

	"pastload/profile/oedometer"
)

// A Specimen is one oedometer curve interpreted.
type Specimen struct {
	Name             string        `json:"specimen"`
	Borehole         string        `json:"borehole"`
	Depth            Number        `json:"depth_m"`
	TestKind         string        `json:"test_kind"`
	Effective        Number        `json:"effective_stress_kPa"`
	Methods          []MethodValue `json:"methods"`
	Preconsolidation Range         `json:"preconsolidation_stress_kPa"`
	Bound            Bound         `json:"bound"`
	CompressionIndex Number        `json:"compression_index"`
	LastPointsCc     Number        `json:"compression_index_last_points"`
	FieldCc          Number        `json:"compression_index_field"`
	Recompression    Number        `json:"recompression_index"`
	RecompressionHow string        `json:"recompression_index_from,omitempty"`
	Swelling         Number        `json:"swelling_index"`
	InitialVoidRatio Number        `json:"initial_void_ratio"`
	VoidRatioHow     string        `json:"initial_void_ratio_from,omitempty"`
	Quality          *Quality      `json:"quality"`
	Qualities        []Quality     `json:"qualities,omitempty"`
	LoopRatio        Number        `json:"recovered_over_past_maximum"` // of the reload branch; 1 is a perfect reading
	Grade            string        `json:"grade"`
	Reasons          []string      `json:"reasons"`
	Notes            []string      `json:"notes"`

	Stages []StageValue `json:"stages"`

	Curve          *Curve                   `json:"-"`
	Prepared       oedometer.Curve          `json:"-"`
	Interpretation oedometer.Interpretation `json:"-"`
	Interpreted    bool                     `json:"-"` // Interpretation holds
}

// MethodValue is what one construction gives.
type MethodValue struct {
	Method string `json:"method"`
	Stress Number `json:"kPa"`
	Used   bool   `json:"used"`
	Note   string `json:"note"`
	Mark   string `json:"verified"`
}

// StageValue is what one load stage says about stiffness and flow.
type StageValue struct {
	From            float64 `json:"from_kPa"`
	To              float64 `json:"to_kPa"`
	Branch          string  `json:"branch"`
	Compressibility Number  `json:"mv_m2_MN"`
	Modulus         Number  `json:"constrained_modulus_kPa"`
	Consolidation   Number  `json:"cv_m2_year"`
	ConsolidationBy string  `json:"cv_from,omitempty"` // as given, or from t50 or t90
	Permeability    Number  `json:"k_m_s"`
	Secondary       Number  `json:"secondary_compression_index"`
	Source          *Cell   `json:"-"`
}

// Quality is the sample rated by one scheme.
type Quality struct {
	Scheme string `json:"scheme"`
	Class  string `json:"class"`
	Value  Number `json:"value"`
	Unit   string `json:"unit,omitempty"`
	Reason string `json:"reason,omitempty"`
}

// specimens interprets every curve of a site, each with the effective stress of
// its place where its borehole is known. Records that cannot be right come back
// as problems, unless a decision leaves the specimen out.
func specimens(site *Site, grounds []*ground) ([]Specimen, Problems) {
	out := make([]Specimen, 0, len(site.Curves))
	var problems Problems
	for i := range site.Curves {
		c := &site.Curves[i]
		sp := Specimen{Name: c.Specimen, Borehole: c.Borehole, Depth: c.Depth, TestKind: c.TestKind, Grade: gradeNone, Curve: c, Methods: []MethodValue{}, Stages: []StageValue{}, Reasons: []string{}, Notes: []string{}}
		situation := situationOf(grounds, c)
		if situation.EffectiveStress.Known {
			sp.Effective = Known(situation.EffectiveStress.Value)
		}
		prepared, err := oedometer.Prepare(recordOf(c))
		if err != nil {
			if site.leavesOut(c) {
				sp.Notes = append(sp.Notes, "left out; its record cannot be right: "+strings.ReplaceAll(err.Error(), "\n", "; "))
			} else {
				problems = append(problems, curveProblems(c, err)...)
			}
			out = append(out, sp)
			continue
		}
		sp.Prepared = prepared
		sp.interpret(prepared, situation)
		out = append(out, sp)
	}
	return out, problems
}

// leavesOut tells whether a decision leaves out a curve's preconsolidation
// stress.
func (s *Site) leavesOut(c *Curve) bool {
	for i := range s.Decisions {
		d := &s.Decisions[i]
		if d.Decision == LeaveOut && d.Specimen != "" && strings.EqualFold(d.Specimen, c.Specimen) && d.Quantity == "preconsolidation stress" {
			return true
		}
	}
	return false
}

// curveProblems gives the problems of a record their place in the table.
func curveProblems(c *Curve, err error) Problems {
	ps, ok := err.(oedometer.Problems)
	if !ok {
		return Problems{{Source: c.Source, Place: "specimen " + c.Specimen, Quantity: "oedometer test", Found: err.Error()}}
	}
	out := make(Problems, len(ps))
	for i, p := range ps {
		out[i] = Problem{Source: c.Source, Place: "specimen " + c.Specimen, Quantity: p.Quantity, Found: fmt.Sprintf("%s (specimen %s)", p.Found, c.Specimen), Wanted: p.Wanted}
		if p.Stage >= 0 && p.Stage < len(c.Stages) {
			out[i].Source = c.Stages[p.Stage].Source
		}
	}
	return out
}

// recordOf hands a curve's numbers to the leaf.
func recordOf(c *Curve) oedometer.Record {
	r := oedometer.Record{
		Kind: testKind(c.TestKind), InitialVoidRatio: leafNumber(c.InitialVoidRatio), InitialHeight: leafNumber(c.InitialHeight),
		SpecificGravity: leafNumber(c.SpecificGravity), WaterContent: leafNumber(c.WaterContent),
	}
	for _, s := range c.Stages {
		st := oedometer.Stage{
			EffectiveStress: s.EffectiveStress.Value, VoidRatio: leafNumber(s.VoidRatio), Strain: leafNumber(s.Strain), Height: leafNumber(s.Height),
			Kind: s.Kind, T50: leafNumber(s.T50), T90: leafNumber(s.T90),
			Consolidation: leafNumber(s.Consolidation), Secondary: leafNumber(s.Secondary),
		}
		if s.Source != nil {
			st.Line = s.Source.Line
		}
		r.Stages = append(r.Stages, st)
	}
	return r
}

func leafNumber(n Number) oedometer.Number { return oedometer.Number{Value: n.Value, Known: n.Known} }

func siteNumber(n oedometer.Number) Number { return Number{Value: n.Value, Known: n.Known} }

// testKind reads the words of the table.
func testKind(words string) oedometer.TestKind {
	w := strings.ToLower(words)
	switch {
	case strings.Contains(w, "constant rate"), strings.Contains(w, "crs"):
		return oedometer.ConstantRate
	case strings.Contains(w, "primary"):
		return oedometer.EndOfPrimary
	case strings.Contains(w, "24"), strings.Contains(w, "incremental"):
		return oedometer.Incremental24h
	}
	return oedometer.UnknownKind
}

// situationOf gathers what is known of the ground where a specimen was taken.
func situationOf(grounds []*ground, c *Curve) oedometer.Situation {
	var s oedometer.Situation
	for _, g := range grounds {
		if g.borehole.Name != c.Borehole || !c.Depth.Known {
			continue
		}
		if e := g.at(c.Depth.Value, false).effective; e.Known && e.Value > 0 {
			s.EffectiveStress = leafNumber(e)
		}
		if st := g.borehole.StratumAt(c.Depth.Value, ""); st != nil {
			s.Organic = isOrganic(st)
		}
		if r := g.resultOf(c); r != nil {
			s.PlasticityIndex = leafNumber(r.PlasticityIndexOf())
			s.Organic = s.Organic || r.OrganicContent.Value > peatOrganic
		}
	}
	return s
}

// interpret reads a prepared curve and keeps what the tables and drawings show.
func (sp *Specimen) interpret(prepared oedometer.Curve, situation oedometer.Situation) {
	for _, f := range prepared.Findings {
		sp.Notes = append(sp.Notes, f.Message)
	}
	in, err := oedometer.Interpret(prepared, situation)
	if err != nil {
		sp.Notes = append(sp.Notes, err.Error())
		return
	}
	sp.Interpretation, sp.Interpreted = in, true
	for _, m := range in.Methods {
		v := MethodValue{Method: m.Name, Used: m.Used, Note: m.Note, Mark: m.Mark}
		if m.Known {
			v.Stress = Known(m.Stress)
		}
		sp.Methods = append(sp.Methods, v)
	}
	for _, st := range in.Stages {
		v := StageValue{
			From: st.From, To: st.To, Branch: st.Branch.String(), Compressibility: Known(st.Compressibility), Modulus: siteNumber(st.Modulus),
			Consolidation: siteNumber(st.Consolidation), ConsolidationBy: st.ConsolidationHow, Permeability: siteNumber(st.Permeability), Secondary: siteNumber(st.Secondary),
		}
		for i := range sp.Curve.Stages {
			if c := sp.Curve.Stages[i].Source; c != nil && c.Line == st.Line {
				v.Source = c
			}
		}
		sp.Stages = append(sp.Stages, v)
	}
	sp.yield(in.Preconsolidation)
	sp.CompressionIndex = siteNumber(in.CompressionIndex)
	if in.VirginLast.Known {
		sp.LastPointsCc = Known(in.VirginLast.Slope)
	}
	if in.Field.Known {
		sp.FieldCc = Known(in.Field.CompressionIndex)
	}
	sp.Recompression = Number{Value: in.RecompressionIndex.Value, Known: in.RecompressionIndex.Known}
	sp.RecompressionHow = in.RecompressionIndex.How
	sp.Swelling = Number{Value: in.SwellingIndex.Value, Known: in.SwellingIndex.Known}
	sp.InitialVoidRatio, sp.VoidRatioHow = Known(in.InitialVoidRatio), in.InitialVoidRatioHow
	for _, q := range in.Quality {
		out := Quality{Scheme: q.Scheme, Class: q.Class, Unit: q.Unit, Reason: q.Reason}
		if q.Applies {
			out.Value = Known(q.Value)
		} else {
			out.Class = "not rated"
		}
		sp.Qualities = append(sp.Qualities, out)
		if sp.Quality == nil && q.Applies {
			sp.Quality = &sp.Qualities[len(sp.Qualities)-1]
		}
	}
	for _, l := range in.Loops {
		if l.Ratio > 0 {
			sp.LoopRatio = Known(l.Ratio)
		}
	}
	sp.Grade = in.Grade
	sp.Reasons = append(sp.Reasons, in.Reasons...)
	sp.Notes = append(sp.Notes, in.Notes...)
}

// yield takes over the preconsolidation stress as a value or as a bound.
func (sp *Specimen) yield(y oedometer.Yield) {
	switch y.Bound {
	case oedometer.Exact:
		sp.Preconsolidation = Around(y.Low, y.Best, y.High)
	case oedometer.AtLeast:
		sp.Bound = AtLeast
		sp.Preconsolidation = BoundAt(y.Best, AtLeast)
	case oedometer.AtMost:
		sp.Bound = AtMost
		sp.Preconsolidation = BoundAt(y.Best, AtMost)
	}
}
