package cone

import (
	"math"
	"testing"
)

// ground is a soft clay under 1 m of crust with the water table at 1 m.
func ground(depth float64) (State, bool) {
	if depth <= 0 {
		return State{}, false
	}
	total := 17 * depth
	pore := 9.81 * (depth - 1)
	return State{Total: total, Pore: pore, Effective: total - pore}, true
}

// clay makes readings of a clay whose net resistance is k times σ′v0 plus 60
// kPa, with a wave to give medians something to do.
func clay(n int, spacing float64) []Reading {
	out := make([]Reading, n)
	for i := range out {
		z := float64(i+1) * spacing
		s, _ := ground(z)
		net := (4*s.Effective + 60) * (1 + 0.03*math.Sin(7*z))
		u2 := s.Pore + 0.5*net
		out[i] = Reading{Depth: z,
			ConeResistance: Of((net + s.Total - 0.2*u2) / 1000),
			SleeveFriction: Of(0.03 * net), PorePressure: Of(u2)}
	}
	return out
}

func evaluate(t *testing.T, readings []Reading, o Options) Sounding {
	t.Helper()
	s, err := Evaluate(readings, ground, o)
	if err != nil {
		t.Fatal(err)
	}
	return s
}

var known = Options{AreaRatio: Of(0.8)}

func TestLayerFindsTheNetResistance(t *testing.T) {
	const tolerance = 0.02 // the wave of 3 % within a window
	s := evaluate(t, clay(1000, 0.02), known)
	if len(s.Layers) != 40 {
		t.Fatalf("%d layers", len(s.Layers))
	}
	for _, l := range s.Layers[1:] {
		want := 4*l.Effective + 60
		if math.Abs(l.Net.Value/want-1) > 0.035 || math.Abs(l.Yield[0].Value/(0.33*want)-1) > 0.035 {
			t.Errorf("%.2f m: net %.1f, want %.1f", l.Depth, l.Net.Value, want)
		}
		if math.Abs(l.Excess.Value/(0.5*l.Net.Value)-1) > tolerance || l.BehaviourIndex.Value < 2.6 {
			t.Errorf("%.2f m: excess %.1f of net %.1f, Ic %.2f", l.Depth, l.Excess.Value, l.Net.Value, l.BehaviourIndex.Value)
		}
	}
}

// TestFormulas holds the point to hand arithmetic: at 10 m, qc 0.8 MPa, a 0.8,
// u2 300 kPa, fs 12 kPa give qt = 800 + 0.2·300 = 860, net = 860 − 170 = 690,
// u2 − u0 = 300 − 88.29 = 211.71, σ′v0 = 81.71.
func TestFormulas(t *testing.T) {
	const exact = 1e-9
	s := evaluate(t, []Reading{{Depth: 10, ConeResistance: Of(0.8), SleeveFriction: Of(12), PorePressure: Of(300)}}, known)
	p := s.Points[0]
	for _, c := range []struct {
		name      string
		got, want float64
	}{
		{"qt", p.Corrected, 860}, {"qt − σv0", p.Net, 690}, {"u2 − u0", p.Excess.Value, 211.71},
		{"qt − u2", p.EffectiveCone.Value, 560}, {"Bq", p.PorePressureRatio.Value, 211.71 / 690},
		{"Q", p.Q, 690 / 81.71}, {"F", p.FrictionRatio.Value, 1200.0 / 690},
	} {
		if math.Abs(c.got-c.want) > exact*c.want {
			t.Errorf("%s = %v, want %v", c.name, c.got, c.want)
		}
	}
}

// TestBehaviourIndex holds Ic to hand arithmetic on the formula as listed (from
// memory), on both sides of the change of exponent.
func TestBehaviourIndex(t *testing.T) {
	for _, c := range []struct {
		name              string
		net, effective, f float64
		want, tolerance   float64
		reason            string
	}{
		{"clay", 500, 100, 3, math.Hypot(3.47-math.Log10(5), 1.22+math.Log10(3)), 1e-12, "n = 1: Qn is net over σ′v0"},
		{"sand", 10130, 101.3, 0.5, math.Hypot(3.47-2, 1.22+math.Log10(0.5)), 1e-12, "at σ′v0 = pa the exponent does not matter"},
		{"sand at depth", 10130, 405.2, 0.5, math.Hypot(3.47-math.Log10(50), 1.22+math.Log10(0.5)), 1e-12, "n = 0.5: Qn = 100·√(1/4) = 50"},
		{"no friction", 500, 100, 0, math.Hypot(3.47-math.Log10(5), 0.22), 1e-12, "F is taken as 0.1 %"},
	} {
		if got := BehaviourIndex(c.net, c.effective, c.f); !got.Known || math.Abs(got.Value-c.want) > c.tolerance {
			t.Errorf("%s: %v, want %v: %s", c.name, got, c.want, c.reason)
		}
	}
	for _, bad := range [][3]float64{{0, 100, 1}, {-5, 100, 1}, {100, 0, 1}, {math.NaN(), 100, 1}, {100, math.Inf(1), 1}, {100, 100, math.NaN()}} {
		if got := BehaviourIndex(bad[0], bad[1], bad[2]); got.Known {
			t.Errorf("%v gave %v", bad, got)
		}
	}
}

// TestSandIsLeftOut puts a sand of 0.5 m into the clay: its window gives no σ′p,
// and no other is moved by it.
func TestSandIsLeftOut(t *testing.T) {
	readings := clay(1000, 0.02)
	for i := range readings {
		if z := readings[i].Depth; z >= 8 && z < 8.5 {
			readings[i].ConeResistance, readings[i].SleeveFriction, readings[i].PorePressure = Of(12), Of(60), Of(9.81*(z-1))
		}
	}
	plain, s := evaluate(t, clay(1000, 0.02), known), evaluate(t, readings, known)
	if len(s.Layers) != len(plain.Layers)-1 {
		t.Errorf("%d layers with the sand, %d without", len(s.Layers), len(plain.Layers))
	}
	for _, l := range s.Layers {
		if l.Top == 8 || l.Net.Value > 700 {
			t.Errorf("layer %.2f to %.2f m: net %.0f kPa", l.Top, l.Base, l.Net.Value)
		}
	}
	wantNote(t, s.Notes, "25 of 1000 depths behave as sand or silt")
}

// TestShellDoesNotMoveTheMedian raises two readings of a window tenfold.
func TestShellDoesNotMoveTheMedian(t *testing.T) {
	readings := clay(1000, 0.02)
	readings[410].ConeResistance.Value *= 10
	readings[415].ConeResistance.Value *= 10
	plain, s := evaluate(t, clay(1000, 0.02), known), evaluate(t, readings, known)
	for i := range s.Layers {
		if r := s.Layers[i].Net.Value / plain.Layers[i].Net.Value; math.Abs(r-1) > 0.02 {
			t.Errorf("%.2f m: moved %.3f times", s.Layers[i].Depth, r)
		}
	}
}

func TestStrata(t *testing.T) {
	o := known
	o.Strata = []Stratum{{Name: "Crust", Top: 0, Base: 2, LeaveOut: true}, {Name: "Clay", Top: 2, Base: 9.8}, {Name: "Thin", Top: 9.8, Base: 10}, {Name: "Lower", Top: 10, Base: 15}}
	s := evaluate(t, clay(1000, 0.02), o)
	names := map[string]int{}
	for _, l := range s.Layers {
		names[l.Stratum]++
		for _, x := range o.Strata {
			if x.Name == l.Stratum && (l.Top < x.Top || l.Base > x.Base+1e-9 || l.Depth <= l.Top || l.Depth >= l.Base) {
				t.Errorf("layer %.2f to %.2f m at %.2f leaves %s", l.Top, l.Base, l.Depth, x.Name)
			}
		}
	}
	if names["Crust"] != 0 || names["Clay"] != 16 || names["Thin"] != 1 || names["Lower"] != 10 {
		t.Errorf("layers by stratum: %v", names)
	}
	wantNote(t, s.Notes, "depths lie in no stratum")
}
