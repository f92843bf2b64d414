package review

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"pastload/profile"
)

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
	if clue, ok := c.softAbove(b, now); ok {
		clues = append(clues, clue)
	}
	return clues
}

// softAbove returns what soft ground says: above the water table clay dries to a
// crust, so that a liquidity index above 0.5 there is unusual.
func (c *context) softAbove(b *profile.Borehole, now float64) (waterClue, bool) {
	var soft []float64
	for _, r := range c.rows {
		if r.borehole != b || !r.depth.Known || r.organic {
			continue
		}
		if li, _, ok := liquidity(r); ok && li > 0.5 {
			soft = append(soft, r.depth.Value)
		}
	}
	above := func(d float64) int {
		n := 0
		for _, z := range soft {
			if z < d-0.5 {
				n++
			}
		}
		return n
	}
	if above(now) == 0 {
		return waterClue{}, false
	}
	return waterClue{at: math.NaN(), z: func(d float64) float64 { return 1.3 * math.Min(3, float64(above(d))) },
		say: fmt.Sprintf("%s with a liquidity index above 0.5 would lie above it, where clay dries to a crust", plural(above(now), "specimen"))}, true
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
	if gain < 1.5 || len(clues) == 0 {
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
