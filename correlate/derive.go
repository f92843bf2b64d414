package correlate

import (
	"fmt"
	"math"
	"slices"
)

// A derivation says how one variable follows from others.
type derivation struct {
	symbol string
	from   []string
	words  string
	value  func(Values) float64
}

// derivations are tried in order: definitions first, then what takes the soil
// to be saturated.
var derivations = []derivation{
	{"PI", []string{"LL", "PL"}, "LL − PL", func(v Values) float64 { return v["LL"] - v["PL"] }},
	{"PL", []string{"LL", "PI"}, "LL − PI", func(v Values) float64 { return v["LL"] - v["PI"] }},
	{"LL", []string{"PL", "PI"}, "PL + PI", func(v Values) float64 { return v["PL"] + v["PI"] }},
	{"LI", []string{"w", "PL", "PI"}, "(w − PL)/PI", func(v Values) float64 { return (v["w"] - v["PL"]) / v["PI"] }},
	{"w", []string{"LI", "PL", "PI"}, "PL + LI·PI", func(v Values) float64 { return v["PL"] + v["LI"]*v["PI"] }},
	{"n0", []string{"e0"}, "100·e0/(1 + e0)", func(v Values) float64 { return 100 * v["e0"] / (1 + v["e0"]) }},
	{"e0", []string{"n0"}, "n0/(100 − n0)", func(v Values) float64 { return v["n0"] / (100 - v["n0"]) }},
	{"eL", []string{"LL", "Gs"}, "Gs·LL/100", func(v Values) float64 { return v["Gs"] * v["LL"] / 100 }},
	{"eP", []string{"PL", "Gs"}, "Gs·PL/100", func(v Values) float64 { return v["Gs"] * v["PL"] / 100 }},
	{"e0eL", []string{"e0", "eL"}, "e0/eL", func(v Values) float64 { return v["e0"] / v["eL"] }},
	{"e0eL", []string{"w", "LL"}, "w/LL, taken as saturated", func(v Values) float64 { return v["w"] / v["LL"] }},
	{"OCR", []string{"preconsolidation", "effective"}, "σ′p/σ′v0", func(v Values) float64 { return v["preconsolidation"] / v["effective"] }},
	{"preconsolidation", []string{"OCR", "effective"}, "OCR·σ′v0", func(v Values) float64 { return v["OCR"] * v["effective"] }},
	{"Q", []string{"qnet", "effective"}, "(qt − σv0)/σ′v0", func(v Values) float64 { return v["qnet"] / v["effective"] }},
	{"qnet", []string{"Q", "effective"}, "Q·σ′v0", func(v Values) float64 { return v["Q"] * v["effective"] }},
	{"qeff", []string{"qnet", "du2", "effective"}, "(qt − σv0) − (u2 − u0) + σ′v0", func(v Values) float64 { return v["qnet"] - v["du2"] + v["effective"] }},
	{"KD", []string{"p0net", "effective"}, "(p0 − u0)/σ′v0", func(v Values) float64 { return v["p0net"] / v["effective"] }},
	{"p0net", []string{"KD", "effective"}, "KD·σ′v0", func(v Values) float64 { return v["KD"] * v["effective"] }},
	{"e0", []string{"w", "Gs"}, "w·Gs/100, taken as saturated", func(v Values) float64 { return v["w"] * v["Gs"] / 100 }},
}

// Resolve returns the value of a symbol: as given, or as it follows from other
// given values, with the formula in derived. ok is false where it does neither.
func (v Values) Resolve(symbol string) (value float64, derived string, ok bool) {
	return resolve(symbol, v)
}

// resolve takes busy as the symbols being resolved further up, so that
// PI = LL − PL and PL = LL − PI do not chase each other.
func resolve(symbol string, given Values, busy ...string) (value float64, derived string, ok bool) {
	if x, found := given[symbol]; found {
		return x, "", true
	}
	busy = append(slices.Clip(busy), symbol)
	for _, d := range derivations {
		if d.symbol != symbol {
			continue
		}
		// Most derivations fail at once: a map is made only where none does.
		var found [4]float64
		all := true
		for i, s := range d.from {
			x, _, known := 0.0, "", false
			if !slices.Contains(busy, s) {
				x, _, known = resolve(s, given, busy...)
			}
			if all = all && known; !all {
				break
			}
			found[i] = x
		}
		if !all {
			continue
		}
		args := make(Values, len(d.from))
		for i, s := range d.from {
			args[s] = found[i]
		}
		if x := d.value(args); !math.IsNaN(x) && !math.IsInf(x, 0) {
			return x, d.words, true
		}
	}
	return 0, "", false
}

// An identity is a derivation that given values are held against.
type identity struct {
	symbol   string
	absolute float64 // allowed difference: rounding of the laboratory's figures
	relative float64
	meaning  string // what a difference points to
}

var identities = []identity{
	{"PI", 1.5, 0, "one of the limits is not of this specimen, or is mistyped"},
	{"LI", 0.1, 0, "one of w, PL, PI and LI is not of this specimen, or is mistyped"},
	{"n0", 0.5, 0, "porosity and void ratio disagree"},
	{"eL", 0.02, 0.02, "LL, Gs and the void ratio at the liquid limit disagree"},
	{"eP", 0.02, 0.02, "PL, Gs and the void ratio at the plastic limit disagree"},
	{"OCR", 0.02, 0.03, "the stresses and the ratio disagree"},
	{"Q", 0.05, 0.05, "the cone values are not of the same reading, or the stresses differ"},
	{"qeff", 5, 0.05, "the cone values are not of the same reading, or the stresses differ"},
	{"KD", 0.05, 0.05, "the dilatometer values are not of the same reading, or the stresses differ"},
	{"e0", 0.03, 0.07, "the specimen was not saturated, or w, Gs or e0 is wrong"},
}

// Contradictions returns, in plain words and a fixed order, where given values
// that define one another do not agree.
func (v Values) Contradictions() []string { return contradictions(v, nil) }

// contradictions looks only at identities that touch one of the arguments, or
// at all where there are none.
func contradictions(given, args Values) []string {
	var out []string
	for _, id := range identities {
		x, found := given[id.symbol]
		if !found {
			continue
		}
		// Void ratio has two derivations; each is held against it in turn.
		for _, d := range derivations {
			if d.symbol != id.symbol || !d.allGiven(given) || !d.touches(args) {
				continue
			}
			y := d.value(given)
			if diff := math.Abs(x - y); diff > math.Max(id.absolute, id.relative*math.Abs(y)) {
				w := variable(id.symbol)
				out = append(out, fmt.Sprintf("%s given as %s, but %s is %s: %s",
					w.Written, amount(x, w.Unit), d.words, amount(y, w.Unit), id.meaning))
			}
		}
	}
	return out
}

func (d derivation) allGiven(v Values) bool {
	for _, s := range d.from {
		x, ok := v[s]
		if !ok || math.IsNaN(x) || math.IsInf(x, 0) {
			return false
		}
	}
	return true
}

func (d derivation) touches(args Values) bool {
	if args == nil {
		return true
	}
	if _, ok := args[d.symbol]; ok {
		return true
	}
	return slices.ContainsFunc(d.from, func(s string) bool { _, ok := args[s]; return ok })
}
