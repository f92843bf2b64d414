package review

import (
	"fmt"
	"math"
	"math/rand"
	"strings"

	"pastload/profile"
)

// A planted fault says where something was made wrong, and which quantities are
// the right answer.
type planted struct {
	places     []Place
	quantities []string
}

// A faultKind plants one fault; ok is false where a site has no place for it.
type faultKind struct {
	name  string
	plant func(rng *rand.Rand, s *profile.Site) (planted, bool)
}

// pick chooses a result that satisfies a condition.
func pick(rng *rand.Rand, s *profile.Site, want func(*profile.Borehole, *profile.Result) bool) (*profile.Borehole, *profile.Result, bool) {
	type at struct {
		b *profile.Borehole
		r *profile.Result
	}
	var all []at
	for i := range s.Boreholes {
		for j := range s.Boreholes[i].Results {
			b := &s.Boreholes[i]
			if want(b, &b.Results[j]) {
				all = append(all, at{b, &b.Results[j]})
			}
		}
	}
	if len(all) == 0 {
		return nil, nil, false
	}
	x := all[rng.Intn(len(all))]
	return x.b, x.r, true
}

func placeOf(b *profile.Borehole, r *profile.Result) []Place {
	return []Place{{b.Name, r.Depth, r.Specimen}}
}

// retype changes a number as if it had been typed so.
func retype(n *profile.Number, v float64, decimals int) {
	line := 0
	if n.Source != nil {
		line = n.Source.Line
	}
	*n = typed(v, decimals, "results.csv", line)
}

func inClay(b *profile.Borehole, r *profile.Result) bool {
	s := b.StratumAt(r.Depth.Value, "")
	return s != nil && strings.Contains(s.Name, "clay") && r.WaterContent.Known
}

func withTest(b *profile.Borehole, r *profile.Result) bool {
	return inClay(b, r) && r.Preconsolidation.Known
}

// one makes a fault of a single number by a change of it.
func one(name, quantity string, want func(*profile.Borehole, *profile.Result) bool, change func(*rand.Rand, *profile.Result, *profile.Number) bool, more ...string) faultKind {
	v, _ := variableOf(quantity)
	return faultKind{name, func(rng *rand.Rand, s *profile.Site) (planted, bool) {
		for range 30 {
			b, r, ok := pick(rng, s, want)
			if !ok {
				return planted{}, false
			}
			n := traits[v].of(r)
			was := *r
			if n.Known && change(rng, r, n) {
				return planted{placeOf(b, r), append([]string{quantity}, more...)}, true
			}
			*r = was
		}
		return planted{}, false
	}}
}

func times(factor float64, decimals int) func(*rand.Rand, *profile.Result, *profile.Number) bool {
	return func(_ *rand.Rand, _ *profile.Result, n *profile.Number) bool {
		retype(n, n.Value*factor, decimals)
		return true
	}
}

// gross is the least change of a digit slip that counts as gross.
const gross = 0.18

func digitsSwapped(least float64) func(*rand.Rand, *profile.Result, *profile.Number) bool {
	return func(rng *rand.Rand, _ *profile.Result, n *profile.Number) bool {
		all := swaps(n.Source.Text)
		if len(all) == 0 {
			return false
		}
		v := all[rng.Intn(len(all))]
		if math.Abs(math.Log(v/n.Value)) < least {
			return false
		}
		n.Value, n.Source = v, &profile.Cell{File: n.Source.File, Line: n.Source.Line, Column: 1, Text: fmt.Sprintf("%.*f", len(n.Source.Text)-1-strings.Index(n.Source.Text+".", "."), v)}
		return true
	}
}

var faultKinds = []faultKind{
	one("w, digits swapped", "water content", inClay, digitsSwapped(gross)),
	one("w, decimal slip", "water content", inClay, func(rng *rand.Rand, _ *profile.Result, n *profile.Number) bool {
		retype(n, n.Value*[]float64{10, 0.1}[rng.Intn(2)], 1)
		return true
	}),
	one("w, specimen dried (−30 to −45 %)", "water content", inClay, func(rng *rand.Rand, _ *profile.Result, n *profile.Number) bool {
		retype(n, n.Value*(0.55+0.15*rng.Float64()), 1)
		return true
	}),
	one("γ in Mg/m³", "unit weight", inClay, times(1/9.80665, 2)),
	one("γ in lb/ft³", "unit weight", inClay, times(1/0.157087, 0)),
	one("γ dry for bulk", "unit weight", inClay, func(_ *rand.Rand, r *profile.Result, n *profile.Number) bool {
		retype(n, n.Value/(1+r.WaterContent.Value/100), 1)
		return true
	}),
	one("Gs wrong by 0.25 to 0.6", "specific gravity", inClay, func(rng *rand.Rand, _ *profile.Result, n *profile.Number) bool {
		retype(n, n.Value-(0.25+0.35*rng.Float64())*float64(1-2*rng.Intn(2)), 2)
		return true
	}),
	one("e0, digits swapped", "void ratio", inClay, digitsSwapped(gross)),
	one("e0, porosity entered", "void ratio", inClay, func(_ *rand.Rand, _ *profile.Result, n *profile.Number) bool {
		retype(n, n.Value/(1+n.Value), 3)
		return true
	}),
	one("LL and PL exchanged", "liquid limit", inClay, func(_ *rand.Rand, r *profile.Result, n *profile.Number) bool {
		r.LiquidLimit, r.PlasticLimit = r.PlasticLimit, r.LiquidLimit
		return true
	}, "plastic limit"),
	one("PI, slip of ±10 in subtraction", "plasticity index", inClay, func(rng *rand.Rand, _ *profile.Result, n *profile.Number) bool {
		retype(n, n.Value+float64(20*rng.Intn(2)-10), 0)
		return true
	}),
	one("w and LL columns exchanged", "water content", func(b *profile.Borehole, r *profile.Result) bool {
		return inClay(b, r) && math.Abs(math.Log(r.WaterContent.Value/r.LiquidLimit.Value)) > gross
	}, func(_ *rand.Rand, r *profile.Result, n *profile.Number) bool {
		r.WaterContent, r.LiquidLimit = r.LiquidLimit, r.WaterContent
		return true
	}, "liquid limit"),
	one("σ′p in lb/ft²", "preconsolidation stress", withTest, yieldTimes(1/0.0478803)),
	one("σ′p in kgf/cm²", "preconsolidation stress", withTest, func(_ *rand.Rand, r *profile.Result, n *profile.Number) bool {
		for _, x := range []*profile.Number{&r.Preconsolidation, &r.PreconsolidationLow, &r.PreconsolidationHigh} {
			retype(x, x.Value/98.0665, 2)
		}
		return true
	}),
	one("σ′p, decimal slip", "preconsolidation stress", withTest, func(rng *rand.Rand, _ *profile.Result, n *profile.Number) bool {
		retype(n, n.Value*[]float64{10, 0.1}[rng.Intn(2)], 1)
		return true
	}),
	one("Cc and Cr per natural logarithm", "compression index", withTest, func(_ *rand.Rand, r *profile.Result, n *profile.Number) bool {
		retype(n, n.Value/math.Ln10, 3)
		retype(&r.RecompressionIndex, r.RecompressionIndex.Value/math.Ln10, 3)
		return true
	}),
	one("Cr from first loading", "recompression index", withTest, func(rng *rand.Rand, r *profile.Result, n *profile.Number) bool {
		retype(n, r.CompressionIndex.Value*(0.42+0.15*rng.Float64()), 3)
		return true
	}),
	{"disturbed specimen (σ′p −45 to −55 %)", plantDisturbed},
	{"short test (to 2 σ′p)", plantShort},
	{"specimens exchanged between strata", plantExchange},
	{"depth wrong, another stratum", plantDepth},
	{"water table wrong by 3 m or more", plantWater},
	{"unit weight of a stratum in Mg/m³", plantStratumWeight},
	one("su in lb/ft²", "undrained strength", func(_ *profile.Borehole, r *profile.Result) bool { return r.StrengthTest == "field vane" }, times(1/0.0478803, 0)),
}

func yieldTimes(f float64) func(*rand.Rand, *profile.Result, *profile.Number) bool {
	return func(_ *rand.Rand, r *profile.Result, n *profile.Number) bool {
		for _, x := range []*profile.Number{&r.Preconsolidation, &r.PreconsolidationLow, &r.PreconsolidationHigh} {
			retype(x, x.Value*f, 0)
		}
		return true
	}
}

func curveOf(s *profile.Site, specimen string) *profile.Curve {
	for i := range s.Curves {
		if s.Curves[i].Specimen == specimen {
			return &s.Curves[i]
		}
	}
	return nil
}

// plantDisturbed lowers σ′p and rounds the curve, where there is one.
func plantDisturbed(rng *rand.Rand, s *profile.Site) (planted, bool) {
	b, r, ok := pick(rng, s, withTest)
	if !ok {
		return planted{}, false
	}
	f := 0.45 + 0.1*rng.Float64()
	m := &maker{Rand: rng, noise: 1}
	retype(&r.Preconsolidation, r.Preconsolidation.Value*f, 0)
	retype(&r.PreconsolidationLow, r.PreconsolidationLow.Value*f, 0)
	retype(&r.PreconsolidationHigh, r.PreconsolidationHigh.Value*f, 0)
	retype(&r.CompressionIndex, r.CompressionIndex.Value*0.8, 3)
	if c := curveOf(s, r.Specimen); c != nil {
		*c = m.curve(b.Name, r, r.CompressionIndex.Value, 2*r.RecompressionIndex.Value, r.Preconsolidation.Value)
	}
	return planted{placeOf(b, r), []string{"preconsolidation stress"}}, true
}

// plantShort cuts a curve off at about twice σ′p.
func plantShort(rng *rand.Rand, s *profile.Site) (planted, bool) {
	b, r, ok := pick(rng, s, func(b *profile.Borehole, r *profile.Result) bool {
		return withTest(b, r) && curveOf(s, r.Specimen) != nil
	})
	if !ok {
		return planted{}, false
	}
	c := curveOf(s, r.Specimen)
	limit := 2.1 * r.Preconsolidation.Value
	var kept []profile.Stage
	for _, st := range c.Stages {
		if st.EffectiveStress.Value > limit || st.Kind != "load" {
			break
		}
		kept = append(kept, st)
	}
	if len(kept) < 4 {
		return planted{}, false
	}
	c.Stages = kept
	// The laboratory read a value all the same, low as such readings are.
	for _, x := range []*profile.Number{&r.Preconsolidation, &r.PreconsolidationLow, &r.PreconsolidationHigh} {
		retype(x, x.Value*0.85, 0)
	}
	last, before := kept[len(kept)-1], kept[len(kept)-2]
	retype(&r.CompressionIndex, math.Max(0.05, (before.VoidRatio.Value-last.VoidRatio.Value)/math.Log10(last.EffectiveStress.Value/before.EffectiveStress.Value)), 3)
	return planted{placeOf(b, r), []string{"preconsolidation stress"}}, true
}

// plantExchange swaps what was measured on two specimens of different strata.
func plantExchange(rng *rand.Rand, s *profile.Site) (planted, bool) {
	a, r, ok := pick(rng, s, func(b *profile.Borehole, r *profile.Result) bool {
		return inClay(b, r) && b.StratumAt(r.Depth.Value, "").Name == "Upper clay"
	})
	b, q, ok2 := pick(rng, s, func(b *profile.Borehole, r *profile.Result) bool {
		return inClay(b, r) && b.StratumAt(r.Depth.Value, "").Name == "Lower clay"
	})
	if !ok || !ok2 {
		return planted{}, false
	}
	x, y := *r, *q
	*r, *q = y, x
	r.Depth, r.Specimen, r.Source, q.Depth, q.Specimen, q.Source = x.Depth, x.Specimen, x.Source, y.Depth, y.Specimen, y.Source
	if c, d := curveOf(s, x.Specimen), curveOf(s, y.Specimen); c != nil || d != nil {
		if c != nil {
			c.Specimen, c.Borehole, c.Depth = y.Specimen, b.Name, y.Depth
		}
		if d != nil {
			d.Specimen, d.Borehole, d.Depth = x.Specimen, a.Name, x.Depth
		}
	}
	return planted{append(placeOf(a, r), placeOf(b, q)...), []string{"specimen"}}, true
}

// plantDepth gives a specimen of the till a depth without its first digit, or one
// of the soft clay a depth in the till.
func plantDepth(rng *rand.Rand, s *profile.Site) (planted, bool) {
	b, r, ok := pick(rng, s, func(b *profile.Borehole, r *profile.Result) bool {
		if !r.WaterContent.Known || r.Depth.Value < 10 {
			return false
		}
		was, is := b.StratumAt(r.Depth.Value, ""), b.StratumAt(math.Mod(r.Depth.Value, 10), "")
		return was != nil && is != nil && was.Name == "Till" && strings.Contains(is.Name, "clay")
	})
	if !ok {
		return planted{}, false
	}
	d := typed(round(math.Mod(r.Depth.Value, 10), 2), 2, "results.csv", r.Source.Line)
	if c := curveOf(s, r.Specimen); c != nil {
		c.Depth = d
	}
	r.Depth = d
	return planted{placeOf(b, r), []string{"depth"}}, true
}

// plantWater moves a water table by a slip or by three to five metres.
func plantWater(rng *rand.Rand, s *profile.Site) (planted, bool) {
	b := &s.Boreholes[rng.Intn(len(s.Boreholes))]
	now := b.WaterTableDepth.Value
	to := now + 3 + 2*rng.Float64()
	if rng.Intn(2) == 0 && now*10 < 15 && now*9 > 3 {
		to = now * 10
	}
	if len(b.Water) > 0 && b.Water[0].Depth.Value < to+0.5 {
		b.Water = nil // a pressure above the table is refused before it can be reviewed
	}
	b.WaterTableDepth = typed(to, 2, "boreholes.csv", b.WaterTableDepth.Source.Line)
	return planted{[]Place{{Borehole: b.Name}}, []string{"water table depth"}}, true
}

func plantStratumWeight(rng *rand.Rand, s *profile.Site) (planted, bool) {
	b := &s.Boreholes[rng.Intn(len(s.Boreholes))]
	st := &b.Strata[1]
	st.SaturatedUnitWeight = typed(st.SaturatedUnitWeight.Value/9.80665, 2, "strata.csv", 2)
	return planted{[]Place{{Borehole: b.Name, Depth: profile.Known(st.Top)}}, []string{"unit weight of the stratum"}}, true
}
