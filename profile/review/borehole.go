package review

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"pastload/profile"
)

var boreholeRules = []Rule{
	{
		ID: "water-level", Name: "water table against piezometers, neighbours and stress history", Formula: "water table depth against z − u/γw, the level in other boreholes, and OCR ≥ 1",
		Tolerance: "the other level must gain 3 (as minus ln of odds) for doubt and 5.5 for a conflict; levels of neighbours within about 1 m", Source: "hydrostatic pressure; levels of one site", Mark: project, Severity: Conflict,
		Causes: []string{"the water table depth is mistyped or in feet", "a level in place of a depth", "water struck, not the level it came to rest at", "perched or artesian water"},
		Action: "Compare with the monitoring record; the stress history of the whole borehole hangs on it.",
		check:  waterLevels,
	},
	{
		ID: "layer-unit-weight", Name: "unit weight of the stratum against measured densities", Formula: "γ of the strata table against the median γ of its results, else against w and Gs",
		Tolerance: "3 standard deviations (about 9 %), a conflict from 16 %", Source: "the same ground weighed twice", Mark: project, Severity: Error,
		Causes: []string{"density in Mg/m³ or lb/ft³", "submerged or dry unit weight in place of bulk", "a default value left in the table"},
		Action: "Correct the strata table: every effective stress below rests on it.",
		check:  stratumWeights,
	},
	{
		ID: "effective-stress", Name: "sense of the effective stress", Formula: "σ′v0 = σv0 − u0 > 0", Tolerance: "0.5 kPa",
		Source: "definition of effective stress", Mark: definition, Severity: Error,
		Causes: []string{"pore pressure or head of a wrong datum", "unit weight in another unit", "artesian pressure near heave"},
		Action: "Check the gauge level, the head and the unit weights above it.",
		check:  effectiveStress,
	},
	{
		ID: "pore-pressure", Name: "pore pressure against the water table", Formula: "u against γw (z − z water)", Tolerance: "1.5 m of head is noted, 10 m a conflict",
		Source: "hydrostatic pressure", Mark: definition, Severity: Conflict,
		Causes: []string{"artesian or drained ground below", "head and pressure confused, or another unit", "wrong tip depth"},
		Action: "Confirm with a second reading; an artesian head or under-drainage changes every stress below it.",
		check:  porePressures,
	},
	{
		ID: "stratum-description", Name: "description against the tests", Formula: "low, intermediate, high plasticity against LL; stiff against LI", Tolerance: "8 % in LL beyond the limits 35, 50, 70, 90; stiff with LI above 0.9",
		Source: "BS 5930 plasticity by liquid limit", Mark: memory, Severity: Doubt,
		Causes: []string{"a boundary misplaced", "described by hand before the tests were done", "limits of another stratum"},
		Action: "Look at the samples again before the logs are final.",
		check:  descriptions,
	},
}

// A waterClue is one opinion on the depth of the water table.
type waterClue struct {
	z   func(depth float64) float64 // deviation of a supposed depth, in standard deviations
	say string
	at  float64 // the depth that it favours; NaN where it only bounds it
}

// waterLevels looks for boreholes whose water table depth another value would
// suit better.
func waterLevels(c *context) []Finding {
	var out []Finding
	for i := range c.profile.Boreholes {
		b := c.site.Borehole(c.profile.Boreholes[i].Borehole)
		if b == nil || !b.WaterTableDepth.Known {
			continue
		}
		clues := c.waterClues(b, &c.profile.Boreholes[i])
		if f, ok := c.judgeWater(b, clues); ok {
			out = append(out, f)
		}
	}
	return out
}

func (c *context) waterClues(b *profile.Borehole, p *profile.BoreholeProfile) []waterClue {
	var clues []waterClue
	now := b.WaterTableDepth.Value
	gamma := c.site.Settings.WaterUnitWeight
	if !(gamma > 0) {
		gamma = 9.81
	}
	if want, sd, n := c.neighbourWater(b); n > 0 {
		clues = append(clues, waterClue{at: want, z: func(d float64) float64 { return (d - want) / sd },
			say: fmt.Sprintf("the other %s stand where %s m would be expected here", plural(n, "borehole"), fixed(want, 1))})
	}
	if want, sd, say := piezometerWater(b, gamma); sd > 0 {
		clues = append(clues, waterClue{at: want, z: func(d float64) float64 { return (d - want) / sd }, say: say})
	}
	if len(b.Water) == 0 {
		if clue, ok := c.historyWater(p, now, gamma); ok {
			clues = append(clues, clue)
		}
	}
	return clues
}

// neighbourWater returns the water table depth that the other boreholes suggest:
// by level where ground levels are known, else by depth.
func (c *context) neighbourWater(b *profile.Borehole) (want, sd float64, n int) {
	var levels []float64
	far := 0.0
	byLevel := b.GroundLevel.Known
	for i := range c.site.Boreholes {
		o := &c.site.Boreholes[i]
		if o == b || !o.WaterTableDepth.Known || byLevel && !o.GroundLevel.Known {
			continue
		}
		if byLevel {
			levels = append(levels, o.GroundLevel.Value-o.WaterTableDepth.Value)
		} else {
			levels = append(levels, o.WaterTableDepth.Value)
		}
		if b.Easting.Known && b.Northing.Known && o.Easting.Known && o.Northing.Known {
			far = math.Max(far, math.Hypot(b.Easting.Value-o.Easting.Value, b.Northing.Value-o.Northing.Value))
		}
	}
	if len(levels) == 0 {
		return 0, 0, 0
	}
	slices.Sort(levels)
	want = middle(levels)
	if byLevel {
		want = b.GroundLevel.Value - want
	}
	// Half a metre of natural fall and season, and one metre in two hundred.
	sd = square(0.6, math.Min(far/200, 3)) * math.Sqrt(1+1.5/float64(len(levels)))
	return want, sd, len(levels)
}

// piezometerWater returns the water table depth that the pore pressures suggest:
// of all where they agree, else of the shallowest.
func piezometerWater(b *profile.Borehole, gamma float64) (want, sd float64, say string) {
	var at []float64
	for _, w := range b.Water {
		if w.Depth.Known && w.Pressure.Known && w.Pressure.Value > 0 {
			at = append(at, w.Depth.Value-w.Pressure.Value/gamma)
		}
	}
	if len(at) == 0 {
		return 0, 0, ""
	}
	want, sd = at[0], 0.8
	if len(at) > 1 {
		low, high := slices.Min(at), slices.Max(at)
		if high-low < 0.8 {
			want, sd = (low+high)/2, 0.4
		}
	}
	return want, sd, fmt.Sprintf("the pore pressures measured here stand for a water table at %s m", fixed(want, 1))
}

// historyWater returns what the preconsolidation stresses say: no deposit is as a
// whole below an overconsolidation ratio of one, and neighbours share their past.
func (c *context) historyWater(p *profile.BoreholeProfile, now, gamma float64) (waterClue, bool) {
	type pair struct{ stress, yield float64 }
	var here []pair
	for i := range p.Tests {
		t := &p.Tests[i]
		if t.Used && t.Effective.Known && t.Preconsolidation.Known && t.Bound == profile.Exact && t.Depth > now+1 {
			here = append(here, pair{t.Effective.Value, t.Preconsolidation.Best})
		}
	}
	if len(here) < 3 {
		return waterClue{}, false
	}
	ocr := func(d float64) float64 {
		v := make([]float64, len(here))
		for i, t := range here {
			v[i] = t.yield / math.Max(1, t.stress+gamma*(d-now))
		}
		slices.Sort(v)
		return middle(v)
	}
	return waterClue{at: math.NaN(), z: func(d float64) float64 { return math.Min(0, math.Log(ocr(d)/0.98)/0.08) },
		say: fmt.Sprintf("with it the median overconsolidation ratio of %d tests is %s", len(here), fixed(ocr(now), 2))}, true
}

// judgeWater weighs other depths against the one given.
func (c *context) judgeWater(b *profile.Borehole, clues []waterClue) (Finding, bool) {
	cost := func(d float64) float64 {
		sum := 0.0
		for _, x := range clues {
			sum += misfit(x.z(d))
		}
		return sum
	}
	now := b.WaterTableDepth.Value
	before := cost(now)
	best := slip{value: now}
	gain := 0.0
	try := func(s slip) {
		if g := before - cost(s.value) - s.cost; g > gain && math.Abs(s.value-now) > 0.8 {
			gain, best = g, s
		}
	}
	for _, s := range waterSlips(b) {
		try(s)
	}
	for _, x := range clues {
		if !math.IsNaN(x.at) {
			try(slip{value: x.at, cost: 1.5})
			continue
		}
		for d := now - 8; d < now+8; d += 0.25 {
			try(slip{value: d, cost: 2.5})
		}
	}
	if gain < 1.5 {
		return Finding{}, false
	}
	f := Finding{Borehole: b.Name, Quantity: "water table depth", Severity: Doubt, Found: fixed(now, 2) + " m", Wanted: "about " + fixed(best.value, 1) + " m"}
	if gain >= 4 {
		f.Severity = Conflict
	}
	rule := c.running
	f.Rule, f.Causes, f.Action, f.Source = rule.ID, slices.Clone(rule.Causes), rule.Action, rule.Reference()
	var said []string
	for _, x := range clues {
		if math.Abs(x.z(now)) > 1.5 {
			said = append(said, x.say)
		}
	}
	f.Message = fmt.Sprintf("%s: the water table is given at %s m, but %s.", b.Name, fixed(now, 2), strings.Join(said, ", and "))
	if best.how != "" {
		f.Wanted = fixed(best.value, 2) + " m"
		f.Message += fmt.Sprintf(" %s m (%s) would fit.", fixed(best.value, 2), best.how)
		f.Causes = putFirst(f.Causes, best.how)
		f.Suggested = &Suggestion{Quantity: f.Quantity, Value: profile.Known(best.value), How: best.how, Makes: len(said)}
	}
	f.Impact = math.Min(1, math.Abs(best.value-now)/10)
	name, to := b.Name, best.value
	f.gain = 10 + gain // stresses come before what is measured against them
	f.fix = func(s *profile.Site) { s.Borehole(name).WaterTableDepth = profile.Known(to) }
	if s := b.WaterTableDepth.Source; s != nil {
		f.Cells = []string{s.String()}
	}
	return f, true
}

// waterSlips lists depths of the water table that may have been meant.
func waterSlips(b *profile.Borehole) []slip {
	now := b.WaterTableDepth.Value
	text := fixed(now, 2)
	if s := b.WaterTableDepth.Source; s != nil {
		if x, ok := plainNumber(strings.TrimSpace(s.Text)); ok && x == now {
			text = strings.TrimSpace(s.Text)
		}
	}
	out := []slip{
		{value: now / 10, how: "decimal point one place out", cost: 0.5}, {value: now * 10, how: "decimal point one place out", cost: 0.5},
		{value: now * 0.3048, how: "given in feet", cost: 0.5}, {value: -now, how: "sign the wrong way round", cost: 0.5},
	}
	for _, y := range swaps(text) {
		out = append(out, slip{value: y, how: "two digits exchanged", cost: 0.7})
	}
	if b.GroundLevel.Known {
		out = append(out, slip{value: b.GroundLevel.Value - now, how: "a level was entered for a depth", cost: 0.5})
	}
	return out
}

// stratumWeights compares the strata table with the densities measured.
func stratumWeights(c *context) []Finding {
	var out []Finding
	for i := range c.profile.Boreholes {
		b := c.site.Borehole(c.profile.Boreholes[i].Borehole)
		if b == nil {
			continue
		}
		for j := range b.Strata {
			s := &b.Strata[j]
			g := c.groupOf(b, s)
			if g == nil {
				continue
			}
			for _, w := range []struct {
				n    profile.Number
				name string
			}{{s.SaturatedUnitWeight, "saturated unit weight"}, {s.UnitWeight, "unit weight"}} {
				if f, ok := c.stratumWeight(b, s, g, w.n, w.name); ok {
					out = append(out, f)
					break
				}
			}
		}
	}
	return out
}

// stratumWeight compares one unit weight of a stratum.
func (c *context) stratumWeight(b *profile.Borehole, s *profile.Stratum, g *group, given profile.Number, name string) (Finding, bool) {
	if !given.Known {
		return Finding{}, false
	}
	want, n := g.weighed()
	if n < smallest {
		return Finding{}, false
	}
	z := ratioLimit * -1.0
	if given.Value > 0 {
		z = math.Log(given.Value/want) / square(0.025, 0.03/math.Sqrt(float64(n)))
	}
	if name == "unit weight" {
		z *= 0.6 // above the water table it may be drier
	}
	if math.Abs(z) < 3 {
		return Finding{}, false
	}
	rule := c.running
	f := Finding{
		Rule: rule.ID, Severity: Doubt, Borehole: b.Name, Quantity: "unit weight of the stratum", Depth: profile.Known(s.Top),
		Found: unitWeight.text(given.Value), Wanted: "about " + unitWeight.text(want), Causes: slices.Clone(rule.Causes), Action: rule.Action, Source: rule.Reference(),
	}
	if math.Abs(z) > 5 {
		f.Severity = Conflict
	}
	if given.Value < 8 || given.Value > 24.5 {
		f.Severity = Error
	}
	f.Message = fmt.Sprintf("%s: the strata table gives %s a %s of %s; %s there %s %s.", b.Name, orWord(s.Name, "the ground"), name, unitWeight.text(given.Value), plural(n, "measurement"), verb(n, "makes", "make"), unitWeight.text(want))
	for _, u := range unitSlips[density] {
		if math.Abs(math.Log(given.Value*u.factor/want)) < 0.12 {
			f.Message += fmt.Sprintf(" In %s it would be %s.", u.unit, unitWeight.text(given.Value*u.factor))
			f.Causes = putFirst(f.Causes, "the number is in "+u.unit)
			f.Suggested = &Suggestion{Quantity: f.Quantity, Value: profile.Known(given.Value * u.factor), How: "the number is in " + u.unit, Unit: u.unit, Makes: 1}
		}
	}
	f.Impact = math.Min(1, math.Abs(given.Value-want)/want)
	f.fix, f.gain = correctWeight(b, s, want), 20+math.Abs(z)
	if given.Source != nil {
		f.Cells = []string{given.Source.String()}
	}
	return f, true
}

// correctWeight puts measured weights in the place of those of a stratum.
func correctWeight(b *profile.Borehole, s *profile.Stratum, want float64) correction {
	name, index := b.Name, 0
	for i := range b.Strata {
		if &b.Strata[i] == s {
			index = i
		}
	}
	return func(site *profile.Site) {
		t := &site.Borehole(name).Strata[index]
		t.UnitWeight, t.SaturatedUnitWeight = profile.Known(want), profile.Known(want)
	}
}

func verb(n int, one, many string) string {
	if n == 1 {
		return one
	}
	return many
}

// weighed returns the median unit weight measured in a group, else the median
// that w and Gs give, and of how many.
func (g *group) weighed() (float64, int) {
	var measured, phase []float64
	for _, r := range g.rows {
		if r.known(unitWeight) {
			measured = append(measured, r.v[unitWeight])
		}
		if r.below && r.known(waterContent, specificGravity) && r.v[waterContent] > 0 && r.v[specificGravity] > 0 {
			phase = append(phase, profile.SaturatedUnitWeight(r.v[specificGravity], r.v[waterContent]*r.v[specificGravity]/100, r.water))
		}
	}
	if len(measured) < smallest {
		measured = phase
	}
	if len(measured) == 0 {
		return 0, 0
	}
	slices.Sort(measured)
	m := middle(measured)
	if !(m > 0) {
		return 0, 0
	}
	return m, len(measured)
}

// effectiveStress finds stretches that carry no effective stress.
func effectiveStress(c *context) []Finding {
	var out []Finding
	rule := c.running
	for i := range c.profile.Boreholes {
		b := &c.profile.Boreholes[i]
		top, base, least := math.Inf(1), math.Inf(-1), 0.0
		for j := range b.Points {
			p := &b.Points[j]
			if p.Effective.Known && p.Effective.Value < -0.5 && p.Depth > 0.3 {
				top, base, least = math.Min(top, p.Depth), math.Max(base, p.Depth), math.Min(least, p.Effective.Value)
			}
		}
		if math.IsInf(top, 0) {
			continue
		}
		out = append(out, Finding{
			Rule: rule.ID, Severity: Error, Borehole: b.Borehole, Depth: profile.Known(top), Quantity: "pore pressure",
			Found: "σ′v0 down to " + fixed(least, 0) + " kPa", Wanted: "σ′v0 above zero",
			Message: fmt.Sprintf("%s: the pore pressure exceeds the whole weight of the ground from %s to %s m (σ′v0 = %s kPa at worst). Ground like that would heave.", b.Borehole, fixed(top, 2), fixed(base, 2), fixed(least, 0)),
			Causes:  slices.Clone(rule.Causes), Action: rule.Action, Source: rule.Reference(), Impact: 1,
		})
	}
	return out
}

// porePressures compares each observation with the water table.
func porePressures(c *context) []Finding {
	var out []Finding
	rule := c.running
	gamma := c.site.Settings.WaterUnitWeight
	if !(gamma > 0) {
		gamma = 9.81
	}
	for i := range c.profile.Boreholes {
		b := c.site.Borehole(c.profile.Boreholes[i].Borehole)
		if b == nil || !b.WaterTableDepth.Known {
			continue
		}
		for _, w := range b.Water {
			if !w.Pressure.Known || !w.Depth.Known {
				continue
			}
			want := gamma * math.Max(0, w.Depth.Value-b.WaterTableDepth.Value)
			head := (w.Pressure.Value - want) / gamma
			if math.Abs(head) < 1.5 {
				continue
			}
			f := Finding{
				Rule: rule.ID, Severity: Note, Borehole: b.Name, Depth: w.Depth, Quantity: "pore pressure",
				Found: fixed(w.Pressure.Value, 1) + " kPa", Wanted: fixed(want, 1) + " kPa if hydrostatic",
				Message: fmt.Sprintf("%s: the pore pressure at %s m stands %s m of head %s the water table.", b.Name, fixed(w.Depth.Value, 2), fixed(math.Abs(head), 1), aboveOrBelow(head)),
				Causes:  slices.Clone(rule.Causes), Action: rule.Action, Source: rule.Reference(),
			}
			if math.Abs(head) > 10 || w.Pressure.Value < -5 {
				f.Severity, f.Impact = Conflict, 0.5
			}
			if w.Pressure.Source != nil {
				f.Cells = []string{w.Pressure.Source.String()}
			}
			out = append(out, f)
		}
	}
	return out
}

func aboveOrBelow(x float64) string {
	if x > 0 {
		return "above"
	}
	return "below"
}

// plasticityWords are the classes by liquid limit.
var plasticityWords = []struct {
	word      string
	low, high float64
}{{"low plasticity", 0, 35}, {"intermediate plasticity", 35, 50}, {"medium plasticity", 35, 50}, {"extremely high plasticity", 90, 1e9}, {"very high plasticity", 70, 90}, {"high plasticity", 50, 1e9}}

// descriptions compares the words of the log with the results of a stratum.
func descriptions(c *context) []Finding {
	var out []Finding
	rule := c.running
	for i := range c.profile.Boreholes {
		b := c.site.Borehole(c.profile.Boreholes[i].Borehole)
		if b == nil {
			continue
		}
		for j := range b.Strata {
			s := &b.Strata[j]
			ll, li := valuesIn(c, b, s)
			text := strings.ToLower(s.Description)
			var message, found, wanted string
			for _, p := range plasticityWords {
				if len(ll) < smallest || !strings.Contains(text, p.word) {
					continue
				}
				if m := middle(ll); m < p.low-8 || m > p.high+8 {
					message = fmt.Sprintf("%s: %s is described as of %s, but its liquid limit is %s %% (median of %d).", b.Name, orWord(s.Name, "the ground"), p.word, fixed(m, 0), len(ll))
					found, wanted = "LL "+fixed(m, 0)+" %", p.word
				}
				break
			}
			if message == "" && len(li) >= smallest && strings.Contains(text, "stiff") && !strings.Contains(text, "soft") && middle(li) > 0.9 {
				message = fmt.Sprintf("%s: %s is described as stiff, but its liquidity index is %s (median of %d).", b.Name, orWord(s.Name, "the ground"), fixed(middle(li), 2), len(li))
				found, wanted = "LI "+fixed(middle(li), 2), "stiff"
			}
			if message == "" {
				continue
			}
			f := Finding{
				Rule: rule.ID, Severity: Doubt, Borehole: b.Name, Depth: profile.Known(s.Top), Quantity: "description", Found: found, Wanted: wanted, Message: message,
				Causes: slices.Clone(rule.Causes), Action: rule.Action, Source: rule.Reference(),
			}
			if s.Source != nil {
				f.Cells = []string{s.Source.String()}
			}
			out = append(out, f)
		}
	}
	return out
}

// valuesIn returns the sorted liquid limits and liquidity indices of a stratum in
// one borehole.
func valuesIn(c *context, b *profile.Borehole, s *profile.Stratum) (ll, li []float64) {
	for _, r := range c.rows {
		if r.borehole != b || r.stratum != s {
			continue
		}
		if r.known(liquidLimit) {
			ll = append(ll, r.v[liquidLimit])
		}
		if x, _, ok := liquidity(r); ok {
			li = append(li, x)
		}
	}
	slices.Sort(ll)
	slices.Sort(li)
	return ll, li
}
