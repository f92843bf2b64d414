package review

import (
	"fmt"
	"math"
	"slices"

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
