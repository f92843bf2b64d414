package axis

import (
	"math"
	"strconv"
)

// A Tick is a marked value of an axis. One without a label is a minor tick.
type Tick struct {
	Value float64
	Label string
}

// A Ticker chooses the ticks between two values.
type Ticker interface {
	Ticks(low, high float64) []Tick
}

// mostTicks bounds what any ticker returns, whatever the range.
const mostTicks = 2000

// Step is a Ticker of equal steps, with so many minor parts in each.
type Step struct {
	Size  float64
	Parts int // 0 and 1: no minor ticks
}

// Ticks implements Ticker. Values are whole multiples of the step, so that no
// rounding builds up along the axis.
func (s Step) Ticks(low, high float64) []Tick {
	if !(s.Size > 0) || !isFinite(s.Size) || !isFinite(low) || !isFinite(high) || high < low {
		return nil
	}
	parts := max(s.Parts, 1)
	small := s.Size / float64(parts)
	const slack = 1e-9 // of a step, for ends that are multiples but for rounding
	first, last := math.Ceil(low/small-slack), math.Floor(high/small+slack)
	// Beyond 2^53 whole numbers are no longer told apart.
	if !(last-first <= mostTicks) || math.Abs(first) > 1<<53 || math.Abs(last) > 1<<53 {
		return nil
	}
	ticks := make([]Tick, 0, int(last-first)+1)
	for k := first; k <= last; k++ {
		t := Tick{Value: cleanZero(k * small)}
		if math.Mod(k, float64(parts)) == 0 {
			t.Value = cleanZero(k / float64(parts) * s.Size)
			t.Label = Label(t.Value, s.Size)
		}
		ticks = append(ticks, t)
	}
	return ticks
}

// Label writes a value with as many decimals as its step needs, and the minus
// sign that belongs to figures.
func Label(v, step float64) string {
	decimals := 0
	if step > 0 && step < 1 {
		decimals = int(math.Ceil(-math.Log10(step) - 1e-9))
		if scaled := step * math.Pow10(decimals); math.Abs(scaled-math.Round(scaled)) > 1e-6 {
			decimals++
		}
	}
	s := strconv.FormatFloat(cleanZero(v), 'f', min(decimals, 12), 64)
	if s[0] == '-' {
		return "−" + s[1:]
	}
	return s
}

// NiceStep returns the step of 1, 2 or 5 times a power of ten that parts a span
// into at most so many steps; 1 for a span that is not greater than zero.
func NiceStep(span float64, most int) float64 {
	if !isFinite(span) || span <= 0 || most < 1 {
		return 1
	}
	raw := span / float64(most)
	power := math.Pow10(int(math.Floor(math.Log10(raw))))
	if power == 0 || math.IsInf(power, 0) {
		return 1
	}
	for _, f := range [...]float64{1, 2, 5, 10} {
		if f*power >= raw*(1-1e-9) {
			return f * power
		}
	}
	return 10 * power
}

// Round widens two values to whole steps of NiceStep, and returns the step.
func Round(low, high float64, most int) (l, h, step float64) {
	if !isFinite(low) || !isFinite(high) || high < low {
		low, high = 0, 1
	}
	if high == low {
		high = low + math.Max(1, math.Abs(low)*1e-3)
	}
	step = NiceStep(high-low, most)
	// Widening can take one step more than was asked for, never two.
	l, h = cleanZero(math.Floor(low/step+1e-9)*step), cleanZero(math.Ceil(high/step-1e-9)*step)
	if h <= l {
		h = l + step
	}
	return l, h, step
}

// Decades is a Ticker for logarithmic scales: the named multiples of each power
// of ten carry a label, the other whole multiples are minor ticks.
type Decades struct {
	Named []int // of 1 to 9, ascending
}

// Ticks implements Ticker.
func (d Decades) Ticks(low, high float64) []Tick {
	if !(low > 0) || !isFinite(high) || high < low || high/low > 1e15 {
		return nil
	}
	var ticks []Tick
	for power := math.Floor(math.Log10(low)); power <= math.Ceil(math.Log10(high)); power++ {
		for m := 1; m <= 9; m++ {
			v := float64(m) * math.Pow10(int(power))
			if v < low*(1-1e-9) || v > high*(1+1e-9) {
				continue
			}
			t := Tick{Value: v}
			for _, n := range d.Named {
				if n == m {
					t.Label = strconv.FormatFloat(v, 'f', -1, 64)
				}
			}
			ticks = append(ticks, t)
		}
	}
	return ticks
}

// RoundLog widens two values greater than zero to the nearest 1, 2 or 5 times a
// power of ten outside them.
func RoundLog(low, high float64) (float64, float64) {
	if !(low > 0) || !isFinite(low) {
		low = 0.1
	}
	if !(high > low) || !isFinite(high) {
		high = low * 10
	}
	return roundDown(low), roundUp(high)
}

func roundDown(v float64) float64 {
	power := math.Pow10(int(math.Floor(math.Log10(v) + 1e-12)))
	for _, f := range [...]float64{5, 2, 1} {
		if f*power <= v*(1+1e-9) {
			return f * power
		}
	}
	return power
}

func roundUp(v float64) float64 {
	power := math.Pow10(int(math.Floor(math.Log10(v) + 1e-12)))
	for _, f := range [...]float64{1, 2, 5, 10} {
		if f*power >= v*(1-1e-9) {
			return f * power
		}
	}
	return 10 * power
}

// cleanZero turns a negative zero into zero.
func cleanZero(v float64) float64 {
	if v == 0 {
		return 0
	}
	return v
}
