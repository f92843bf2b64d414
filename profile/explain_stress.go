package profile

import (
	"fmt"
	"slices"
)

// stresses adds the vertical stress at the depth. Where it steps there, at the
// top of a capillary fringe, both sides are shown.
func (x *explainer) stresses(points []*Point) {
	for i, p := range points {
		if i > 0 && sameStress(points[i-1], p) {
			x.unitWeightHere(p)
			continue
		}
		s := &x.borehole.Strata[p.stratum]
		x.vertical(x.depth, x.depth == s.Base && x.depth > s.Top, "")
		x.unitWeightHere(p)
	}
}

func sameStress(a, b *Point) bool { return a.Total == b.Total && a.Pore == b.Pore }

func (x *explainer) unitWeightHere(p *Point) {
	if p.UnitWeight.Known {
		x.add(Step{Key: "unit_weight_kN_m3", Name: "unit weight in " + stratumName(p.Stratum), Value: p.UnitWeight, Decimals: 2, Unit: "kN/m³"})
	}
}

// vertical adds total stress, pore pressure and effective stress at a depth. of
// says what the depth is where it is not the one asked for.
func (x *explainer) vertical(depth float64, above bool, of string) {
	if x.ground.stress == nil {
		x.group = "Effective stress, as given" + of
		x.givenStress(depth)
		return
	}
	s := x.ground.at(depth, above)
	if !s.total.Known {
		return
	}
	x.group = "Total vertical stress" + of
	x.total(depth, s.total.Value)
	x.group = "Pore pressure" + of
	x.pore(depth, above, s.pore.Value)
	x.group = "Effective stress" + of
	x.add(Step{
		Key: "effective_stress_kPa", Name: "effective vertical stress σ′v0", Formula: "σv0 − u0",
		Numbers: sum(term(s.total.Value, stressDecimals), minus(s.pore.Value, stressDecimals)),
		Value:   s.effective, Decimals: stressDecimals, Unit: "kPa", Mark: markDefinition,
	})
	x.spread(depth, s)
}

// total adds every stretch of constant unit weight and their sum.
func (x *explainer) total(depth, want float64) {
	b := x.borehole
	var terms, formula []string
	if q := b.Surcharge; q.Known && q.Value != 0 {
		x.add(Step{Name: "surcharge q at ground level", Numbers: converted(q), Value: q, Decimals: stressDecimals, Unit: "kPa", Source: cited(q), Mark: assumedMark(q)})
		terms, formula = append(terms, term(q.Value, stressDecimals)), append(formula, "q")
	}
	if w := b.WaterTableDepth; w.Known && w.Value < 0 {
		gamma := x.site.Settings.WaterUnitWeight
		x.add(Step{Name: "weight of the water above ground", Formula: "γw·hw", Numbers: significant(gamma, 7) + " × " + plain(-w.Value, depthDecimals),
			Value: Known(-gamma * w.Value), Decimals: stressDecimals, Unit: "kPa", Source: cited(w)})
		terms, formula = append(terms, term(-gamma*w.Value, stressDecimals)), append(formula, "γw·hw")
	}
	explained := map[int]bool{}
	for _, t := range x.stretches(depth) {
		s := &b.Strata[t.stratum]
		source, mark := x.weightSource(s, t, explained)
		weight := t.weight * (t.base - t.top)
		x.add(Step{
			Name: fmt.Sprintf("weight of %s, %s to %s m", stratumName(s.Name), digits(t.top, 2), digits(t.base, 2)), Formula: t.formula(),
			Numbers: significant(t.weight, 7) + " × " + plain(t.base-t.top, depthDecimals), Value: Known(weight), Decimals: stressDecimals, Unit: "kPa", Source: source, Mark: mark,
		})
		terms = append(terms, term(weight, stressDecimals))
	}
	formula = append(formula, "Σ γ·Δz")
	if len(terms) == 0 {
		terms = []string{"0"}
	}
	x.add(Step{Key: "total_stress_kPa", Name: "total vertical stress σv0", Formula: sum(formula...), Numbers: sum(terms...),
		Value: Known(want), Decimals: stressDecimals, Unit: "kPa", Mark: markDefinition})
}

// A stretch is ground of one weight within one stratum.
type stretch struct {
	top, base float64
	stratum   int
	weight    float64
	wet       bool // weighs as saturated ground
}

func (t stretch) formula() string {
	if t.wet {
		return "γsat·Δz"
	}
	return "γ·Δz"
}

// stretches cuts the ground above a depth wherever its weight or stratum
// changes.
func (x *explainer) stretches(depth float64) []stretch {
	stress := x.ground.stress
	breaks := stress.Breaks()
	table, hasTable := stress.WaterTable()
	fringe := table - x.borehole.CapillaryRise.Or(0)
	var out []stretch
	for i := 0; i+1 < len(breaks) && breaks[i] < depth; i++ {
		top, base := breaks[i], min(breaks[i+1], depth)
		middle := (top + base) / 2
		state, err := stress.At(middle)
		if err != nil {
			continue // outside the ground: nothing lies there to weigh
		}
		t := stretch{top: top, base: base, stratum: x.ground.layerOf(middle, ""), weight: state.UnitWeight}
		t.wet = state.Pore > 0 || hasTable && middle > fringe && middle < table
		if n := len(out); n > 0 && out[n-1].stratum == t.stratum && out[n-1].weight == t.weight && out[n-1].wet == t.wet {
			out[n-1].base = t.base
			continue
		}
		out = append(out, t)
	}
	return out
}

// weightSource says where the unit weight of a stretch comes from. Where it was
// substituted the steps to it come first, once for a stratum.
func (x *explainer) weightSource(s *Stratum, t stretch, explained map[int]bool) (source, mark string) {
	n := s.UnitWeight
	if t.wet && s.SaturatedUnitWeight.Known || !n.Known {
		n = s.SaturatedUnitWeight
	}
	if n.Known {
		if c := converted(n); c != "" && !explained[t.stratum] {
			x.add(Step{Name: "unit weight of " + stratumName(s.Name), Numbers: c, Value: n, Decimals: ratioDecimals, Unit: "kN/m³", Source: cited(n), Mark: assumedMark(n)})
			explained[t.stratum] = true
		}
		return cited(n), assumedMark(n)
	}
	if !explained[t.stratum] {
		x.substituted(s, t.weight)
		explained[t.stratum] = true
	}
	return "see the unit weight above", markAssumed
}

// substituted adds the steps to a unit weight that the strata table does not
// give: a mean of measured ones, else from w and Gs.
func (x *explainer) substituted(s *Stratum, weight float64) {
	here := resultsIn(x.borehole, s)
	sets := [][]*Result{here}
	if s.Name != "" {
		var all []*Result
		for i := range x.site.Boreholes {
			b := &x.site.Boreholes[i]
			for j := range b.Strata {
				if b.Strata[j].Name == s.Name {
					all = append(all, resultsIn(b, &b.Strata[j])...)
				}
			}
		}
		sets = append(sets, all)
	}
	name := "unit weight of " + stratumName(s.Name)
	for _, of := range []func(*Result) Number{func(r *Result) Number { return r.UnitWeight }, func(r *Result) Number { return r.WaterContent }} {
		for _, set := range sets {
			v := known(set, of)
			if len(v) == 0 {
				continue
			}
			if m := mean(v); m == weight {
				x.add(Step{Name: name, Formula: "mean of the measured unit weights", Numbers: meanOf(v), Value: Known(m), Decimals: ratioDecimals, Unit: "kN/m³", Source: cells(set, of), Mark: markAssumed})
				return
			}
			if x.fromWater(name, v, sets[len(sets)-1], cells(set, of), weight) {
				return
			}
		}
	}
}

// fromWater adds the steps from water contents to a unit weight, where they give it.
func (x *explainer) fromWater(name string, water []float64, gravity []*Result, source string, weight float64) bool {
	gs, how, mark := assumedSpecificGravity, "", markAssumed
	gravityOf := func(r *Result) Number { return r.SpecificGravity }
	v := known(gravity, gravityOf)
	if len(v) > 0 {
		gs, how, mark = mean(v), meanOf(v), ""
	}
	w := mean(water)
	e := VoidRatioFromWater(w, gs)
	gammaW := x.site.Settings.WaterUnitWeight
	if SaturatedUnitWeight(gs, e, gammaW) != weight {
		return false
	}
	x.add(Step{Name: "water content for it", Formula: "mean of the measured", Numbers: meanOf(water), Value: Known(w), Decimals: 2, Unit: "%", Source: source})
	x.add(Step{Name: "specific gravity for it", Numbers: how, Value: Known(gs), Decimals: ratioDecimals, Source: cells(gravity, gravityOf), Mark: mark})
	x.add(Step{Name: "void ratio for it", Formula: "w·Gs/100, as for saturated ground", Numbers: plain(w, 2) + " × " + plain(gs, ratioDecimals) + " / 100", Value: Known(e), Decimals: ratioDecimals})
	x.add(Step{Name: name, Formula: "(Gs + e)·γw/(1 + e)", Numbers: fmt.Sprintf("(%s + %s) × %s / (1 + %s)", plain(gs, ratioDecimals), plain(e, ratioDecimals), significant(gammaW, 7), plain(e, ratioDecimals)),
		Value: Known(weight), Decimals: 3, Unit: "kN/m³", Mark: markAssumed})
	return true
}

// meanOf writes a mean as arithmetic.
func meanOf(v []float64) string {
	terms := make([]string, len(v))
	for i := range v {
		terms[i] = significant(v[i], 7)
	}
	return fmt.Sprintf("(%s) / %d", sum(terms...), len(v))
}

// cells lists where the known values of a quantity were read.
func cells(rs []*Result, of func(*Result) Number) string {
	var out []string
	for _, r := range rs {
		if n := of(r); n.Known && n.Source != nil {
			out = append(out, n.Source.String())
		}
	}
	return listed(slices.Compact(out))
}
