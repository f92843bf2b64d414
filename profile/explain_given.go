package profile

import (
	"fmt"
	"math"
)

// spread adds the standard deviation of the effective stress.
func (x *explainer) spread(depth float64, s state) {
	if !s.sd.Known {
		return
	}
	set := &x.site.Settings
	level := set.WaterLevelUncertainty
	higher, err := x.ground.stress.Raised(level)
	if err != nil {
		return
	}
	lower, err := x.ground.stress.Raised(-level)
	if err != nil {
		return
	}
	up, err := higher.At(depth)
	if err != nil {
		return
	}
	down, err := lower.At(depth)
	if err != nil {
		return
	}
	top, err := x.ground.stress.At(0)
	if err != nil {
		return
	}
	source := set.settingSource("water level uncertainty")
	x.add(Step{Name: fmt.Sprintf("σ′v0 with the water %s m higher", plain(level, depthDecimals)), Formula: "the same sums", Value: Known(up.Effective), Decimals: stressDecimals, Unit: "kPa", Source: source})
	x.add(Step{Name: fmt.Sprintf("σ′v0 with the water %s m lower", plain(level, depthDecimals)), Formula: "the same sums", Value: Known(down.Effective), Decimals: stressDecimals, Unit: "kPa", Source: source})
	soil := s.total.Value - top.Total
	x.add(Step{
		Key: "effective_stress_sd_kPa", Name: "standard deviation of σ′v0", Formula: "√[(V·weight of the ground)² + ((higher − lower)/2)²]",
		Numbers: fmt.Sprintf("√((%s × %s)^2 + ((%s − %s) / 2)^2)", plain(set.UnitWeightUncertainty, 5), plain(soil, stressDecimals), term(up.Effective, stressDecimals), term(down.Effective, stressDecimals)),
		Value:   s.sd, Decimals: 2, Unit: "kPa", Source: "V: " + set.settingSource("unit weight uncertainty"), Mark: "first order",
	})
}

// givenStress adds the effective stress between two depths that give one.
func (x *explainer) givenStress(depth float64) {
	e := x.ground.interpolate(depth)
	if !e.Known {
		return
	}
	given := x.ground.given
	b := 0
	for b < len(given)-1 && given[b].depth < depth {
		b++
	}
	a := b
	if given[b].depth > depth && b > 0 {
		a = b - 1
	}
	for k := a; k <= b; k++ {
		n := x.givenNumber(given[k].depth)
		x.add(Step{Name: fmt.Sprintf("effective stress given at %s m", digits(given[k].depth, 2)), Numbers: converted(n), Value: Known(given[k].effective), Decimals: stressDecimals, Unit: "kPa", Source: cited(n), Mark: assumedMark(n)})
	}
	s := Step{Key: "effective_stress_kPa", Name: "effective vertical stress σ′v0", Formula: "as given", Value: e, Decimals: stressDecimals, Unit: "kPa", Mark: "used as given, not computed"}
	if a != b {
		s.Formula = "straight line between the two"
		s.Numbers = line(given[a].depth, given[a].effective, given[b].depth, given[b].effective, depth)
	}
	x.add(s)
	v := x.site.Settings.UnitWeightUncertainty
	x.add(Step{Key: "effective_stress_sd_kPa", Name: "standard deviation of σ′v0", Formula: "V·σ′v0", Numbers: plain(v, 5) + " × " + term(math.Abs(e.Value), stressDecimals),
		Value: Known(x.ground.givenCOV * math.Abs(e.Value)), Decimals: 2, Unit: "kPa", Source: "V: " + x.site.Settings.settingSource("unit weight uncertainty")})
}

// givenNumber returns the given effective stress that stands at a depth.
func (x *explainer) givenNumber(depth float64) Number {
	for i := range x.borehole.Results {
		if r := &x.borehole.Results[i]; r.EffectiveStress.Known && r.Depth.Value == depth {
			return r.EffectiveStress
		}
	}
	return Number{}
}

// line writes a value between two depths as arithmetic.
func line(za, a, zb, b, z float64) string {
	return fmt.Sprintf("%s + (%s) × (%s) / (%s)", term(a, stressDecimals), sum(term(b, stressDecimals), minus(a, stressDecimals)),
		sum(term(z, depthDecimals), minus(za, depthDecimals)), sum(term(zb, depthDecimals), minus(za, depthDecimals)))
}
