package profile

import (
	"fmt"
	"math"
	"strings"

	"pastload/profile/oedometer"
)

// curve adds how an oedometer curve was read: every construction with its value,
// what they combine to, why it is a value or a bound, and the indices.
func (x *explainer) curve(sp *Specimen) {
	c := sp.Curve
	row := c.Source.String()
	x.say("test kind", sp.TestKind, row)
	x.say("remark", c.Remark, row)
	if !sp.Interpreted {
		x.say("interpretation", "none: "+strings.Join(sp.Notes, "; "), row)
		return
	}
	in := &sp.Interpretation
	x.say("loading as read", stages(in.Loading), row)
	x.add(Step{Key: "initial_void_ratio", Name: "initial void ratio e0", Formula: sp.VoidRatioHow, Value: sp.InitialVoidRatio, Decimals: ratioDecimals, Source: row})
	x.constructions(in)
	x.combined(sp, in)
	x.indices(sp, in)
	for i := range in.Quality {
		q := &in.Quality[i]
		s := Step{Name: "sample quality, " + q.Scheme, Words: q.Class, Unit: q.Unit, Mark: q.Mark, Decimals: ratioDecimals}
		if q.Applies {
			s.Value = Known(q.Value)
		} else {
			s.Words = "not rated: " + q.Reason
		}
		x.add(s)
	}
	for _, l := range in.Loops {
		if l.Ratio > 0 {
			x.add(Step{Name: "check on the reload branch", Formula: "σ′p so read / stress unloaded from", Numbers: plain(l.Recovered.Best, stressDecimals) + " / " + plain(l.PastMaximum, stressDecimals), Value: Known(l.Ratio), Decimals: ratioDecimals})
		} else {
			x.say("check on the reload branch", l.Reason, "")
		}
	}
	x.say("grade", sp.Grade, "")
	for _, r := range sp.Reasons {
		x.say("reason for the grade", r, "")
	}
	for _, n := range sp.Notes {
		x.say("note", n, "")
	}
}

// stages lists the first loading as pairs of stress and void ratio.
func stages(points []oedometer.LoadingPoint) string {
	const most = 24 // a record at a constant rate has hundreds
	var pairs []string
	for i, p := range points {
		if i == most {
			pairs = append(pairs, fmt.Sprintf("and %d more", len(points)-most))
			break
		}
		pairs = append(pairs, significant(p.EffectiveStress, 5)+": "+digits(p.VoidRatio, 4))
	}
	return "σ′v (kPa): e = " + strings.Join(pairs, ", ")
}

func (x *explainer) constructions(in *oedometer.Interpretation) {
	for i := range in.Methods {
		m := &in.Methods[i]
		s := Step{Name: m.Name, Words: m.Note, Unit: "kPa", Decimals: 1, Mark: m.Mark}
		if m.Known {
			s.Value, s.Formula = Known(m.Stress), "construction on the curve"
		} else {
			s.Words, s.Unit = "no value: "+m.Note, ""
		}
		if m.Known && !m.Used {
			s.Words = strings.Trim("not used; "+m.Note, "; ")
		}
		x.add(s)
		if m.Used {
			x.add(Step{Name: m.Name + ", without its known bias", Formula: "σ′p × factor measured on curves of known σ′p", Numbers: plain(m.Stress, 4) + " × " + plain(m.Corrected/m.Stress, 6), Value: Known(m.Corrected), Decimals: 2, Unit: "kPa", Words: "weight " + plain(m.Weight, 4)})
		}
	}
}

// combined adds the weighted mean of the constructions and its range, and
// whether the test can tell.
func (x *explainer) combined(sp *Specimen, in *oedometer.Interpretation) {
	var terms []string
	for _, m := range in.Methods {
		if m.Used {
			terms = append(terms, plain(m.Weight, 6)+" × ln("+plain(m.Corrected, 4)+")")
		}
	}
	if len(terms) == 0 || in.Apparent.Best <= 0 {
		x.say("combined", "no construction gives a value", "")
		x.bound(sp)
		return
	}
	x.add(Step{Name: "combined σ′p", Formula: "exp Σ weight·ln σ′p", Numbers: "exp(" + sum(terms...) + ")", Value: Known(in.Apparent.Best), Decimals: 2, Unit: "kPa"})
	u := &in.Uncertainty
	moved := math.Max(u.LeaveOneOut, math.Max(u.ReadingNoise, u.VirginRule))
	x.add(Step{Name: "standard deviation of ln σ′p", Formula: "√(model² + shape² + load step² + readings² + disagreement²)",
		Numbers: fmt.Sprintf("√(%s^2 + %s^2 + %s^2 + %s^2 + %s^2)", plain(u.Model, 5), plain(u.Shape, 5), plain(u.LoadStep, 5), plain(moved, 5), plain(u.Disagreement, 5)), Value: Known(u.Total), Decimals: ratioDecimals,
		Words: fmt.Sprintf("readings: the largest of a point left out %s, noise %s, virgin line %s", plain(u.LeaveOneOut, 4), plain(u.ReadingNoise, 4), plain(u.VirginRule, 4))})
	if sp.Bound != Exact || !sp.Preconsolidation.Known {
		x.bound(sp)
		return
	}
	low := plain(in.Apparent.Best, 4) + " × exp(−1.645 × " + plain(u.Total, 6) + ")"
	x.add(Step{Key: "preconsolidation_stress_low_kPa", Name: "σ′p low, 5 % point", Numbers: low, Value: Known(sp.Preconsolidation.Low), Decimals: 2, Unit: "kPa"})
	x.add(Step{Key: "preconsolidation_stress_high_kPa", Name: "σ′p high, 95 % point", Numbers: strings.Replace(low, "−1.645", "1.645", 1), Value: Known(sp.Preconsolidation.High), Decimals: 2, Unit: "kPa"})
	if in.MaxStressRatio > 0 {
		x.add(Step{Name: "highest stress of the test over σ′p", Formula: "decides whether the test went far enough", Numbers: plain(in.MaxStress, 3) + " / " + plain(in.Apparent.Best, 4), Value: Known(in.MaxStressRatio), Decimals: 3})
	}
}

func (x *explainer) bound(sp *Specimen) {
	if !sp.Preconsolidation.Known {
		x.say("what the test tells", "nothing about σ′p: "+strings.Join(sp.Reasons, "; "), "")
		return
	}
	n := Number{Value: sp.Preconsolidation.Best, Known: true, Bound: sp.Bound}
	x.add(Step{Key: "preconsolidation_stress_kPa", Name: "what the test tells of σ′p", Value: n, Decimals: 2, Unit: "kPa", Words: strings.Join(sp.Reasons, "; ")})
}

// indices adds Cc, Cr and Cs with where they come from.
func (x *explainer) indices(sp *Specimen, in *oedometer.Interpretation) {
	for _, l := range []struct {
		line oedometer.VirginLine
		key  string
		name string
	}{{in.VirginSteepest, "compression_index", "compression index Cc"}, {in.VirginLast, "compression_index_last_points", "compression index of the last points"}} {
		v := l.line
		if !v.Known {
			continue
		}
		x.add(Step{Key: l.key, Name: l.name, Formula: "slope of e against log σ′, " + v.Rule, Value: Known(v.Slope), Decimals: ratioDecimals,
			Words: fmt.Sprintf("e = %s − %s·log σ′ from %s to %s kPa", plain(v.Intercept, 4), plain(v.Slope, 4), significant(v.From, 5), significant(v.To, 5))})
	}
	if in.Field.Known {
		x.add(Step{Key: "compression_index_field", Name: "compression index of the field curve", Formula: "construction of Schmertmann (1955)", Value: Known(in.Field.CompressionIndex), Decimals: ratioDecimals, Mark: "from memory, unverified"})
	}
	for _, i := range []struct {
		index     oedometer.Index
		key, name string
	}{{in.RecompressionIndex, "recompression_index", "recompression index Cr"}, {in.SwellingIndex, "swelling_index", "swelling index Cs"}} {
		if i.index.Known {
			x.add(Step{Key: i.key, Name: i.name, Formula: "slope of e against log σ′", Value: Known(i.index.Value), Decimals: ratioDecimals, Words: i.index.How})
		}
	}
}
