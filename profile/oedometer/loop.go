package oedometer

import (
	"fmt"
	"math"
)

// A loop is one unload–reload excursion, as indices of Curve.Points.
type loop struct {
	peak         int // where unloading began
	bottom       int // lowest stress
	reload       int // last reloading point, bottom where there is none
	beyond       bool
	beyondReload int // first point past the former maximum
}

// smallestLoop is the width in log cycles from which a loop has a slope.
const smallestLoop = 0.25

// loops returns the unloadings of the curve in order, with their reloading.
func (c Curve) loops() []loop {
	var out []loop
	n := len(c.Points)
	for i := 1; i < n; i++ {
		if c.Points[i].Branch != Unloading || c.Points[i-1].Branch == Unloading {
			continue
		}
		lp := loop{peak: i - 1, bottom: i}
		j := i
		for ; j < n && c.Points[j].Branch == Unloading; j++ {
			if c.Points[j].EffectiveStress <= c.Points[lp.bottom].EffectiveStress {
				lp.bottom = j
			}
		}
		lp.reload = lp.bottom
		for ; j < n && c.Points[j].Branch == Reloading; j++ {
			lp.reload = j
		}
		if j < n && c.Points[j].Branch == FurtherLoading && lp.reload > lp.bottom {
			lp.beyond, lp.beyondReload = true, j
		}
		out = append(out, lp)
	}
	return out
}

// chord returns the slope −Δe/Δlog10 σ′ between two points of the curve.
func (c Curve) chord(i, j int) (slope float64, ok bool) {
	a, b := c.Points[i], c.Points[j]
	d := math.Log10(b.EffectiveStress / a.EffectiveStress)
	if math.Abs(d) < smallestLoop {
		return 0, false
	}
	return (a.VoidRatio - b.VoidRatio) / d, true
}

// loopSlope returns Cr as the mean of the unloading and reloading slopes of the
// first loop that is wide enough, and the work per unit volume and stress of its
// reload limb.
func (c Curve) loopSlope(e0 float64) (cr, beta float64, how string, ok bool) {
	for _, lp := range c.loops() {
		if lp.reload == lp.bottom {
			continue
		}
		down, ok1 := c.chord(lp.bottom, lp.peak)
		up, ok2 := c.chord(lp.bottom, lp.reload)
		if !ok1 || !ok2 || down <= 0 || up <= 0 {
			continue
		}
		work := 0.0
		for i := lp.bottom + 1; i <= lp.reload; i++ {
			a, b := c.Points[i-1], c.Points[i]
			work += 0.5 * (a.EffectiveStress + b.EffectiveStress) * (a.VoidRatio - b.VoidRatio) / (1 + e0)
		}
		beta = work / (c.Points[lp.reload].EffectiveStress - c.Points[lp.bottom].EffectiveStress)
		how = fmt.Sprintf("mean slope of the loop from %.4g to %.4g kPa", c.Points[lp.peak].EffectiveStress, c.Points[lp.bottom].EffectiveStress)
		return (down + up) / 2, math.Max(0, beta), how, true
	}
	return 0, 0, "", false
}

// swellingIndex returns Cs, the least-squares slope of the widest unloading.
func (c Curve) swellingIndex() Index {
	best := Index{}
	width := 0.0
	for _, lp := range c.loops() {
		var x, e []float64
		for i := lp.peak; i <= lp.bottom; i++ {
			x, e = append(x, math.Log10(c.Points[i].EffectiveStress)), append(e, c.Points[i].VoidRatio)
		}
		wide := x[0] - x[len(x)-1]
		line, ok := fit(x, e, 0, len(x)-1)
		if !ok || wide < smallestLoop || wide <= width || line.slope >= 0 {
			continue
		}
		width = wide
		best = Index{-line.slope, true, fmt.Sprintf("unloading from %.4g to %.4g kPa, %d points", c.Points[lp.peak].EffectiveStress, c.Points[lp.bottom].EffectiveStress, len(x))}
	}
	return best
}

// checkLoop runs the constructions on the reloading and further loading of a
// loop, as if it were the first loading of a new specimen, and compares what
// they recover with the stress from which it was unloaded.
func (c Curve) checkLoop(lp loop, around surroundings) LoopCheck {
	check := LoopCheck{PastMaximum: c.Points[lp.peak].EffectiveStress}
	if !lp.beyond {
		check.Reason = "the specimen was not loaded past its former maximum again"
		return check
	}
	var points []int
	highest := 0.0
	for i := lp.bottom; i < len(c.Points); i++ {
		p := c.Points[i]
		if i > lp.bottom && p.Branch == Unloading {
			break
		}
		if p.EffectiveStress > highest {
			points, highest = append(points, i), p.EffectiveStress
		}
	}
	if len(points) < MinimumPoints {
		check.Reason = "too few points on reloading and beyond"
		return check
	}
	bottom := c.Points[lp.bottom]
	l := newLoading(c.Points, points, bottom.VoidRatio)
	around.inSitu = Known(math.Sqrt(bottom.EffectiveStress * check.PastMaximum))
	around.swelled = false
	read := readLoading(l, around)
	check.Methods = read.methods
	if read.bound != Exact {
		check.Reason = read.why
		return check
	}
	check.Recovered = read.yield
	check.Ratio = read.yield.Best / check.PastMaximum
	return check
}
