package cone

import (
	"errors"
	"math"
	"math/rand"
	"slices"
	"strings"
	"testing"
)

func wantNote(t *testing.T, notes []string, part string) {
	t.Helper()
	if !slices.ContainsFunc(notes, func(s string) bool { return strings.Contains(s, part) }) {
		t.Errorf("no note with %q in %q", part, notes)
	}
}

// same reports where two soundings differ by more than rounding: sums of
// readings are taken in the order they come.
func same(t *testing.T, got, want Sounding) {
	t.Helper()
	const rounding = 1e-9
	if len(got.Layers) != len(want.Layers) || len(got.Points) != len(want.Points) {
		t.Fatalf("%d layers and %d points, want %d and %d", len(got.Layers), len(got.Points), len(want.Layers), len(want.Points))
	}
	for i, l := range got.Layers {
		w := want.Layers[i]
		if l.Used != w.Used || math.Abs(l.Net.Value/w.Net.Value-1) > rounding || len(l.Yield) != len(w.Yield) {
			t.Errorf("layer %d: %+v, want %+v", i, l, w)
		}
	}
}

func change(readings []Reading, f func(i int, r *Reading)) []Reading {
	out := slices.Clone(readings)
	for i := range out {
		f(i, &out[i])
	}
	return out
}

func TestBadInput(t *testing.T) {
	good := clay(1000, 0.02)
	plain := evaluate(t, good, known)
	if len(plain.Notes) != 1 {
		// The single reading at 20.00 m begins a window of its own.
		t.Errorf("notes on good readings: %q", plain.Notes)
	}
	cases := []struct {
		name     string
		readings []Reading
		options  Options
		note     string
		same     bool // as the good sounding
	}{
		{"qc in kPa", change(good, func(_ int, r *Reading) { r.ConeResistance.Value *= 1000 }), known, "taken as kPa", true},
		{"qc 1000 times too small", change(good, func(_ int, r *Reading) { r.ConeResistance.Value /= 1000 }), known, "1000 times larger", true},
		{"qc in bar is said by the pore pressure", change(good, func(_ int, r *Reading) { r.ConeResistance.Value *= 10 }), known, "qc may be in bar", false},
		{"qc in bar is said by the friction", change(good, func(_ int, r *Reading) {
			r.ConeResistance.Value *= 10
			r.SleeveFriction.Value /= 3
			r.PorePressure = Measure{}
		}), known, "it may be in bar", false},
		{"fs in MPa is said", change(good, func(_ int, r *Reading) { r.SleeveFriction.Value /= 1000 }), known, "may be in MPa, not kPa", false},
		{"u2 in MPa", change(good, func(_ int, r *Reading) { r.PorePressure.Value /= 1000 }), known, "taken as MPa", true},
		{"area ratio in percent", good, Options{AreaRatio: Of(80)}, "taken as percent", true},
		{"area ratio of nothing", good, Options{AreaRatio: Of(-1)}, "is not between 0 and 1", false},
		{"no area ratio", good, Options{}, "no area ratio: qt is taken as qc", false},
		{"no u2", change(good, func(_ int, r *Reading) { r.PorePressure = Measure{} }), known, "have no u2", false},
		{"no sleeve friction", change(good, func(_ int, r *Reading) { r.SleeveFriction = Measure{} }), known, "sand and silt cannot be told from clay", true},
		{"u2 offset", change(good, func(_ int, r *Reading) { r.PorePressure.Value = 9.81*(r.Depth-1) - 30 }), known, "zero offset", false},
		{"u2 below a vacuum", change(good, func(i int, r *Reading) {
			if i == 500 {
				r.PorePressure.Value = -300
			}
		}), known, "below a full vacuum", false},
		{"upside down", func() []Reading { x := slices.Clone(good); slices.Reverse(x); return x }(), known, "sorted by depth", true},
		{"shuffled", func() []Reading {
			x := slices.Clone(good)
			rand.New(rand.NewSource(1)).Shuffle(len(x), func(i, j int) { x[i], x[j] = x[j], x[i] })
			return x
		}(), known, "sorted by depth", true},
		{"every reading twice", append(slices.Clone(good), good...), known, "1000 of 2000 readings repeat a depth", true},
		{"two soundings under one name", append(slices.Clone(good), change(good, func(_ int, r *Reading) { r.ConeResistance.Value *= 2 })...), known, "two soundings under one name", false},
		{"starts above ground", append([]Reading{{Depth: -0.5, ConeResistance: Of(1)}, {Depth: -0.1, ConeResistance: Of(1)}}, good...), known, "above the ground", true},
		{"stops in air", append(slices.Clone(good), Reading{Depth: 20.5, ConeResistance: Of(0)}, Reading{Depth: 21, ConeResistance: Of(0.001)}), known, "stops in air", true},
		{"a gap", append(slices.Clone(good[:300]), good[500:]...), known, "gaps without readings: 1, the widest from 6.00 to 10.02 m", false},
		{"not numbers", append(slices.Clone(good), Reading{Depth: math.NaN(), ConeResistance: Of(1)}, Reading{Depth: 3.005, ConeResistance: Of(math.Inf(1))}, Reading{Depth: 3}), known, "3 of 1003 readings left out", true},
		{"deeper than any", append(slices.Clone(good), Reading{Depth: 1e9, ConeResistance: Of(1)}), known, "deeper than 200 m", true},
	}
	for _, c := range cases {
		t.Run(c.name, func(t *testing.T) {
			s := evaluate(t, c.readings, c.options)
			wantNote(t, s.Notes, c.note)
			if c.same {
				same(t, s, plain)
			}
		})
	}
}

func TestPredrilledHole(t *testing.T) {
	readings := change(clay(1000, 0.02), func(_ int, r *Reading) {
		if r.Depth < 2 {
			r.ConeResistance, r.SleeveFriction, r.PorePressure = Of(0), Of(0), Of(0)
		}
	})
	s := evaluate(t, readings, known)
	wantNote(t, s.Notes, "predrilled hole")
	if s.Points[0].Depth < 2 {
		t.Errorf("a point at %v m", s.Points[0].Depth)
	}
}

func TestNothingToEvaluate(t *testing.T) {
	for name, readings := range map[string][]Reading{
		"none":        nil,
		"above only":  {{Depth: -1, ConeResistance: Of(1)}},
		"air only":    {{Depth: 1, ConeResistance: Of(0)}, {Depth: 2, ConeResistance: Of(0)}},
		"no stresses": {{Depth: 0, ConeResistance: Of(1)}},
	} {
		if _, err := Evaluate(readings, ground, known); !errors.Is(err, ErrNoReadings) {
			t.Errorf("%s: %v", name, err)
		}
	}
}

// TestSandInBar: 150 bar of sand named MPa is beyond any cone, and as kPa its
// friction would be that of no soil.
func TestSandInBar(t *testing.T) {
	readings := change(clay(1000, 0.02), func(_ int, r *Reading) {
		*r = Reading{Depth: r.Depth, ConeResistance: Of(150), SleeveFriction: Of(80)}
	})
	s := evaluate(t, readings, known)
	wantNote(t, s.Notes, "taken as bar or kgf/cm²")
	if q := s.Points[500].Corrected; math.Abs(q-15000) > 1e-6 {
		t.Errorf("qt %v kPa", q)
	}
	if len(s.Layers) != 0 {
		t.Errorf("%d layers of clay in sand", len(s.Layers))
	}
}

// TestUnitNotClear gives 150 to 600 without friction or pore pressure: kPa of a
// soft clay, or bar of a dense sand.
func TestUnitNotClear(t *testing.T) {
	readings := change(clay(500, 0.02), func(_ int, r *Reading) {
		*r = Reading{Depth: r.Depth, ConeResistance: Of(r.ConeResistance.Value * 1000)}
	})
	s, err := Evaluate(readings, ground, known)
	if !errors.Is(err, ErrUnit) {
		t.Errorf("err = %v, notes %q", err, s.Notes)
	}
}

func FuzzEvaluate(f *testing.F) {
	f.Add(1.0, 0.5, 10.0, 100.0, 0.8, int64(1))
	f.Add(-1.0, 1e300, -5.0, -300.0, 80.0, int64(2))
	f.Fuzz(func(t *testing.T, depth, qc, fs, u2, a float64, seed int64) {
		rng := rand.New(rand.NewSource(seed))
		var readings []Reading
		for range 40 {
			readings = append(readings, Reading{Depth: depth * rng.Float64(), ConeResistance: Measure{qc * rng.NormFloat64(), rng.Intn(9) > 0},
				CorrectedResistance: Measure{qc * rng.Float64(), rng.Intn(3) == 0},
				SleeveFriction:      Measure{fs * rng.NormFloat64(), rng.Intn(3) > 0}, PorePressure: Measure{u2 * rng.NormFloat64(), rng.Intn(3) > 0}})
		}
		s, err := Evaluate(readings, ground, Options{AreaRatio: Of(a), Window: u2, ClayFrom: fs, MaxDepth: depth, PoreShift: qc})
		if err != nil && !errors.Is(err, ErrUnit) && !errors.Is(err, ErrNoReadings) {
			t.Fatal(err)
		}
		checkFinite(t, s)
	})
}

// checkFinite fails for anything that is not a number, or a layer that claims
// more than it has.
func checkFinite(t *testing.T, s Sounding) {
	t.Helper()
	ok := func(x ...float64) {
		for _, v := range x {
			if math.IsNaN(v) || math.IsInf(v, 0) {
				t.Fatalf("not a number: %v", x)
			}
		}
	}
	for _, p := range s.Points {
		ok(p.Depth, p.Corrected, p.Net, p.Q, p.Excess.Value, p.EffectiveCone.Value, p.PorePressureRatio.Value, p.FrictionRatio.Value, p.BehaviourIndex.Value)
	}
	for _, l := range s.Layers {
		ok(l.Depth, l.Total, l.Pore, l.Effective, l.Net.Value, l.Excess.Value, l.EffectiveCone.Value, l.LnSD, l.BehaviourIndex.Value)
		for _, y := range l.Yield {
			ok(y.Value, y.Own, y.Shared)
			if y.Value <= 0 || y.Own <= 0 || l.Used < leastDepths {
				t.Fatalf("layer %+v", l)
			}
		}
	}
}
