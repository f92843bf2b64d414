package oedometer

import (
	"fmt"
	"math"
)

// checkRecord reports what the once-per-specimen quantities cannot be.
func checkRecord(r Record, problems *Problems) {
	within := func(quantity string, n Number, low, high float64, wanted string) {
		if n.Known && !(n.Value > low && n.Value < high) { // written so that NaN fails
			*problems = append(*problems, Problem{-1, 0, quantity, fmt.Sprintf("%.4g", n.Value), wanted})
		}
	}
	within("initial void ratio", r.InitialVoidRatio, 0, largestVoidRatio, "more than 0 and less than 30")
	within("initial height", r.InitialHeight, 0, 1000, "a height in mm above zero")
	within("specific gravity", r.SpecificGravity, 1.3, 3.3, "1.3 to 3.3")
	within("water content", r.WaterContent, 0, 2000, "percent, above zero")
	within("dry mass", r.DryMass, 0, 1e6, "a mass in g above zero")
	within("wet mass", r.WetMass, 0, 1e6, "a mass in g above zero")
	within("area", r.Area, 0, 1e5, "an area in cm² above zero")
	if r.WetMass.Known && r.DryMass.Known && r.WetMass.Value < r.DryMass.Value {
		*problems = append(*problems, Problem{-1, 0, "wet mass", "less than the dry mass", "masses the right way round"})
	}
	height := initialHeight(r)
	if height > 0 && r.Area.Known && r.Area.Value > 0 && r.WetMass.Known {
		// No soil is denser than 2.6 Mg/m³ wet nor lighter than 0.9.
		if density := r.WetMass.Value / (r.Area.Value * height / 10); !(density > 0.9 && density < 2.6) {
			*problems = append(*problems, Problem{-1, 0, "bulk density", fmt.Sprintf("%.2f Mg/m³ from wet mass, area and height", density),
				"0.9 to 2.6 Mg/m³: check whether a radius was entered as a diameter, and the masses"})
		}
	}
	if len(r.Stages) == 0 {
		*problems = append(*problems, Problem{-1, 0, "stages", "none", "at least one"})
	}
}

// checkStages reports what the readings of single stages cannot be.
func checkStages(r Record, problems *Problems) {
	for i, s := range r.Stages {
		within := func(quantity string, n Number, low, high float64, wanted string) {
			if n.Known && !(n.Value > low && n.Value < high) {
				*problems = append(*problems, Problem{i, s.Line, quantity, fmt.Sprintf("%.4g", n.Value), wanted})
			}
		}
		if p := s.EffectiveStress; p != 0 && !(p >= smallestStress && p < largestStress) {
			*problems = append(*problems, Problem{i, s.Line, "effective stress", fmt.Sprintf("%.4g", p), "kPa, zero or 0.01 to 1,000,000"})
		}
		within("void ratio", s.VoidRatio, 0, largestVoidRatio, "more than 0 and less than 30")
		within("strain", s.Strain, -50, 95, "percent, from -50 to 95")
		within("height", s.Height, 0, 1000, "a height in mm above zero")
		within("t50", s.T50, 0, 1e6, "minutes, above zero")
		within("t90", s.T90, 0, 1e6, "minutes, above zero")
		within("cv", s.Consolidation, 0, 1e6, "m²/year, above zero")
		within("Cα", s.Secondary, -1, 10, "void ratio per log cycle of time")
		if s.Height.Known && !s.VoidRatio.Known && !s.Strain.Known && initialHeight(r) == 0 && !r.DryMass.Known {
			*problems = append(*problems, Problem{i, s.Line, "height", "no initial height to compare it with", "the initial height in mm, or dry mass, Gs and area"})
		}
	}
}

// checkMonotony reports a specimen that rises under load or sinks when load is
// taken off, and recognizes swelling when water was added.
func checkMonotony(c *Curve, problems *Problems) {
	points := spaced(c.Points)
	for i := 1; i < len(points); i++ {
		p, before := points[i], points[i-1]
		rise := p.VoidRatio - before.VoidRatio
		same := math.Abs(p.EffectiveStress/before.EffectiveStress-1) <= reversal
		switch {
		case p.Branch == Unloading && !same:
			if -rise > readingTolerance {
				*problems = append(*problems, Problem{p.Stage, p.Line, "void ratio",
					fmt.Sprintf("falls from %.3f to %.3f while the stress falls from %.4g to %.4g kPa", before.VoidRatio, p.VoidRatio, before.EffectiveStress, p.EffectiveStress),
					"a void ratio that rises or stays on unloading"})
			}
		case rise <= readingTolerance:
		case swells(c, p, same):
			// The strain of swelling is counted from the initial height.
			strain := 100 * rise / (1 + c.InitialVoidRatio)
			c.Swelling = math.Max(c.Swelling, strain)
			c.add(p.Stage, "swelling", fmt.Sprintf("the specimen rose by %.2f %% at %.4g kPa: water was added below the swelling pressure; σ′p may be low and the first slope too high", strain, p.EffectiveStress))
		default:
			*problems = append(*problems, Problem{p.Stage, p.Line, "void ratio",
				fmt.Sprintf("rises from %.3f to %.3f while the stress rises from %.4g to %.4g kPa", before.VoidRatio, p.VoidRatio, before.EffectiveStress, p.EffectiveStress),
				"a void ratio that falls or stays under load"})
		}
	}
	if above := c.Points[0].VoidRatio - c.InitialVoidRatio; above > readingTolerance && c.Swelling == 0 {
		c.Swelling = 100 * above / (1 + c.InitialVoidRatio)
		c.add(c.Points[0].Stage, "swelling", fmt.Sprintf("the first void ratio lies %.3f above the initial one: swelling, or an initial void ratio that does not belong to this specimen", above))
	}
	checkLoops(c)
}

// spaced returns the points of a dense record that lie more than a reversal of
// stress apart: between closer ones a slow rise hides in the noise, and a jump
// looks like swelling at constant stress.
func spaced(points []Point) []Point {
	if len(points) <= denseCount {
		return points
	}
	kept := points[:1:1]
	for _, p := range points[1:] {
		last := kept[len(kept)-1]
		if p.Branch != last.Branch || math.Abs(p.EffectiveStress/last.EffectiveStress-1) > reversal {
			kept = append(kept, p)
		}
	}
	return kept
}

// swells reports whether the rise to point p is the specimen taking up water:
// at a stage said to be inundated, at constant stress, or up to above its initial
// height under a small stress.
func swells(c *Curve, p Point, same bool) bool {
	if c.stages[p.Stage].Inundated || same && p.Branch != Unloading {
		return true
	}
	return p.Branch == FirstLoading && p.EffectiveStress <= swellingStress && p.VoidRatio > c.InitialVoidRatio-0.002
}

// checkLoops finds reloading that does not end below first loading: back at an
// earlier stress the void ratio is at most that of first loading, common practice.
func checkLoops(c *Curve) {
	const tolerance = 0.003
	peak, said := Point{}, false
	for _, p := range c.Points {
		switch p.Branch {
		case FirstLoading, FurtherLoading:
			peak, said = p, false
		case Reloading:
			if !said && math.Abs(p.EffectiveStress/peak.EffectiveStress-1) < reversal && p.VoidRatio > peak.VoidRatio+tolerance {
				said = true // once per loop: a dense record has many readings there
				c.add(p.Stage, "reload above first loading", fmt.Sprintf("back at %.4g kPa the void ratio is %.3f, above the %.3f of first loading: reading error or a reset dial", p.EffectiveStress, p.VoidRatio, peak.VoidRatio))
			}
		}
	}
}

// checkKinds compares the kind of stage that was written down with the branch
// that the stresses show.
func checkKinds(r Record, c *Curve) {
	wrote, shown := "", FirstLoading // of the last disagreement, said once per run of stages
	for _, p := range c.Points {
		written := r.Stages[p.Stage].Kind
		found := p.Branch
		agree := written == "" ||
			written == "load" && found != Unloading ||
			written == "unload" && found == Unloading ||
			written == "reload" && (found == Reloading || found == FurtherLoading)
		if agree {
			wrote = ""
			continue
		}
		if written != wrote || found != shown {
			c.add(p.Stage, "stage kind", fmt.Sprintf("written down as %q, but the stresses show %s", written, found))
		}
		wrote, shown = written, found
	}
}
