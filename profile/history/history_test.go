package history

import (
	"fmt"
	"math"
	"strings"
	"testing"
)

// Eight tests in a clay that lost 60 kPa of overburden; the one at 8 m was
// written down as half of what it was.
func ExampleInfer() {
	in := Input{Layers: []Layer{{Name: "Soft clay", Top: 1, Base: 12}}, WaterTable: 1, HasWater: true}
	for i, factor := range []float64{1.03, 0.96, 1.00, 1.05, 0.97, 0.5, 1.02, 0.98} {
		z := 1.5 + 1.3*float64(i)
		effective := 17 + 8*(z-1)
		in.Tests = append(in.Tests, Test{ID: i, Depth: z, EffectiveStress: effective, Preconsolidation: (effective + 60) * factor, LnSD: LnSDForGrade("A")})
	}
	in.Stations = []Station{{Depth: 2, EffectiveStress: 25}, {Depth: 6, EffectiveStress: 57}, {Depth: 11, EffectiveStress: 97}}
	result, err := Infer(in)
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, p := range result.Points {
		fmt.Printf("%4.1f m: σ′p %3.0f kPa (%.0f to %.0f), OCR %.1f\n", p.Depth, p.Preconsolidation.Best, p.Preconsolidation.Low, p.Preconsolidation.High, p.OCR.Best)
	}
	for _, t := range result.Tests {
		if t.Verdict == Conflicts {
			fmt.Printf("test %d conflicts: %.0f kPa, where the others expect %.0f kPa\n", t.ID, in.Tests[t.ID].Preconsolidation, t.Expected.Best)
		}
	}
	fmt.Println(result.Layers[0].Mechanisms[0].Name)
	// Output:
	//  2.0 m: σ′p  85 kPa (80 to 90), OCR 3.4
	//  6.0 m: σ′p 118 kPa (112 to 123), OCR 2.1
	// 11.0 m: σ′p 156 kPa (147 to 167), OCR 1.6
	// test 5 conflicts: 66 kPa, where the others expect 133 kPa
	// removed overburden
}

// clay is a layer with a line of POP at depths, and small errors that repeat.
func clay(layer int, top, base, pop float64, n int) []Test {
	var out []Test
	for i := range n {
		z := top + (base-top)*(float64(i)+0.5)/float64(n)
		s := 8 * z
		out = append(out, Test{ID: i, Depth: z, EffectiveStress: s, Preconsolidation: (s + pop) * math.Exp(0.08*math.Sin(2.3*float64(i)+0.4)), LnSD: 0.12, Layer: layer})
	}
	return out
}

func stationsOf(layer int, top, base float64, n int) []Station {
	var out []Station
	for i := range n {
		z := top + (base-top)*float64(i)/float64(n-1)
		out = append(out, Station{Depth: z, EffectiveStress: 8 * z, Layer: layer})
	}
	return out
}

func mustInfer(t *testing.T, in Input) *Result {
	t.Helper()
	res, err := Infer(in)
	if err != nil {
		t.Fatal(err)
	}
	sound(t, res)
	return res
}

// One wild test neither drags the line nor hides another, and two do not hide
// each other.
func TestWildTests(t *testing.T) {
	in := Input{Layers: []Layer{{Name: "clay", Top: 2, Base: 18}}, Tests: clay(0, 2, 18, 60, 12), Stations: stationsOf(0, 2, 18, 9)}
	clean := mustInfer(t, in)
	for _, wrong := range [][]int{{5}, {0}, {4, 7}, {5, 6}} {
		t.Run(fmt.Sprint(wrong), func(t *testing.T) {
			spoilt := in
			spoilt.Tests = append([]Test(nil), in.Tests...)
			for _, i := range wrong {
				spoilt.Tests[i].Preconsolidation /= 2.2
			}
			res := mustInfer(t, spoilt)
			conflicts := map[int]bool{}
			for i, r := range res.Tests {
				if r.Verdict == Conflicts {
					conflicts[i] = true
				}
			}
			if len(conflicts) != len(wrong) || !conflicts[wrong[0]] || !conflicts[wrong[len(wrong)-1]] {
				t.Errorf("conflicts %v, want %v", conflicts, wrong)
			}
			for i, p := range res.Points {
				if d := math.Abs(math.Log(p.Preconsolidation.Best / clean.Points[i].Preconsolidation.Best)); d > 0.10 {
					t.Errorf("the line at %.1f m moves by %.3f", p.Depth, d)
				}
			}
			if got := res.MostInfluential; got != wrong[0] && got != wrong[len(wrong)-1] && res.Tests[got].Influence > 0.2 {
				t.Errorf("test %d moves the line most, by %.2f", got, res.Tests[got].Influence)
			}
		})
	}
}

// Leaving a test out by algebra is what inferring without it gives.
func TestLeaveOneOutIsRefitting(t *testing.T) {
	in := Input{Layers: []Layer{{Top: 2, Base: 18}}, Tests: clay(0, 2, 18, 60, 7)}
	in = withReadings(in, 5)
	full := mustInfer(t, in)
	for i, x := range in.Tests {
		less := in
		less.Tests = append(append([]Test(nil), in.Tests[:i]...), in.Tests[i+1:]...)
		// The span of the layer is given by what is in it: keep it.
		less.Stations = []Station{{Depth: x.Depth, EffectiveStress: x.EffectiveStress}}
		res := mustInfer(t, less)
		// The line and a good test differ by the scatter alone; and with the test
		// left out two others may be wild, not one.
		const tolerance = 0.02
		if d := math.Log(full.Tests[i].Expected.Best / res.Points[0].Preconsolidation.Best); math.Abs(d) > tolerance {
			t.Errorf("test %d: expected %.1f kPa, inferred without it %.1f kPa", i, full.Tests[i].Expected.Best, res.Points[0].Preconsolidation.Best)
		}
	}
}

func TestBounds(t *testing.T) {
	in := Input{Layers: []Layer{{Top: 2, Base: 18}}, Tests: clay(0, 2, 18, 60, 3), Stations: stationsOf(0, 2, 18, 9)}
	plain := mustInfer(t, in)
	middle := plain.Points[4].Preconsolidation
	with := func(kind Kind, value float64) *Result {
		x := in
		x.Tests = append(append([]Test(nil), in.Tests...), Test{ID: 9, Depth: in.Stations[4].Depth, EffectiveStress: in.Stations[4].EffectiveStress, Preconsolidation: value, LnSD: 0.1, Kind: kind})
		return mustInfer(t, x)
	}
	for _, c := range []struct {
		name    string
		kind    Kind
		value   float64
		up      float64 // sign of what happens to the line
		verdict string
	}{
		{"at least a value far below", AtLeast, middle.Best / 3, 0, Agrees},
		{"at most a value far above", AtMost, middle.Best * 3, 0, Agrees},
		{"at least a little more", AtLeast, middle.Best * 1.1, 1, Agrees},
		{"at most a little less", AtMost, middle.Best / 1.1, -1, Agrees},
		{"at least far more", AtLeast, middle.Best * 5, 0, Conflicts},
	} {
		t.Run(c.name, func(t *testing.T) {
			res := with(c.kind, c.value)
			d := math.Log(res.Points[4].Preconsolidation.Best / middle.Best)
			if c.up == 0 && math.Abs(d) > 0.01 || c.up != 0 && c.up*d < 0.01 {
				t.Errorf("the line moves by %.4f", d)
			}
			r := res.Tests[3]
			if r.Verdict != c.verdict || r.Used || r.ID != 9 || r.Why == "" {
				t.Errorf("bound: %+v, want %s", r, c.verdict)
			}
		})
	}
}

// A boundary lets the history jump, and neighbours inform without dictating.
func TestLayersAndNeighbours(t *testing.T) {
	in := Input{Layers: []Layer{{Name: "upper", Top: 2, Base: 10}, {Name: "lower", Top: 10, Base: 18}}}
	in.Tests = append(clay(0, 2, 10, 20, 5), clay(1, 10, 18, 250, 5)...)
	in.Stations = append(stationsOf(0, 2, 10, 5), stationsOf(1, 10, 18, 5)...)
	res := mustInfer(t, in)
	above, below := res.Points[4].POP.Best, res.Points[5].POP.Best
	if math.Abs(above-20) > 15 || math.Abs(below-250) > 60 {
		t.Errorf("POP at the boundary %.0f and %.0f kPa, want about 20 and 250", above, below)
	}

	one := Input{Layers: in.Layers[:1], Tests: clay(0, 2, 10, 20, 5)[2:3], Stations: stationsOf(0, 2, 10, 5)}
	lonely := mustInfer(t, one)
	one.Neighbours = clay(0, 2, 10, 60, 6)
	informed := mustInfer(t, one)
	if width(informed.Points[0].Preconsolidation) >= width(lonely.Points[0].Preconsolidation) {
		t.Errorf("neighbours do not narrow the band: %.2f, without %.2f", width(informed.Points[0].Preconsolidation), width(lonely.Points[0].Preconsolidation))
	}
	own := mustInfer(t, Input{Layers: in.Layers[:1], Tests: clay(0, 2, 10, 20, 5), Neighbours: one.Neighbours, Stations: one.Stations})
	if got := own.Points[2].POP.Best; math.Abs(got-20) > 12 {
		t.Errorf("neighbours with a POP of 60 take a well tested layer with 20 to %.0f kPa", got)
	}
}

// Tests in one layer tell a layer without tests how far a source is off.
func TestSourcesAreCalibratedByOtherLayers(t *testing.T) {
	in := Input{Layers: []Layer{{Name: "upper", Top: 2, Base: 10}, {Name: "lower", Top: 10, Base: 18}}, Stations: stationsOf(1, 10, 18, 5)}
	for i := range 12 {
		z := 2.5 + 15*float64(i)/11
		layer := 0
		if z > 10 {
			layer = 1
		}
		in.Readings = append(in.Readings, Reading{Source: "cone", Depth: z, EffectiveStress: 8 * z, Preconsolidation: (8*z + 60) / 1.6, Layer: layer})
	}
	raw := mustInfer(t, in)
	in.Tests = clay(0, 2, 10, 60, 6)
	res := mustInfer(t, in)
	truth := 8*14.0 + 60
	if before, after := math.Abs(math.Log(raw.Points[2].Preconsolidation.Best/truth)), math.Abs(math.Log(res.Points[2].Preconsolidation.Best/truth)); after > 0.7*before {
		t.Errorf("the error at 14 m goes from %.2f to %.2f", before, after)
	}
	ratio := res.Layers[0].Sources[0].Ratio
	if ratio.Low > 1.6 || ratio.High < 1.6 || ratio.Best < 1.4 {
		t.Errorf("σ′p over prediction %+v, want about 1.6", ratio)
	}
}

func TestKnownPastSharpens(t *testing.T) {
	in := Input{Layers: []Layer{{Top: 2, Base: 18}}, Tests: clay(0, 2, 18, 60, 4), WaterTable: 1, HasWater: true}
	probability := func(r *Result, name string) float64 {
		for _, m := range r.Layers[0].Mechanisms {
			if m.Name == name {
				return m.Probability
			}
		}
		return 0
	}
	plain := mustInfer(t, in)
	in.Known = []Known{{Kind: RemovedGround, Size: 60, Layer: -1}}
	removed := mustInfer(t, in)
	if a, b := probability(plain, RemovedOverburden), probability(removed, RemovedOverburden); b < 1.3*a {
		t.Errorf("removed overburden goes from %.2f to %.2f", a, b)
	}
	in.Known = []Known{{Kind: FormerWaterLevel, Size: 7, Layer: 0}}
	water := mustInfer(t, in)
	if a, b := probability(plain, FormerLowerWater), probability(water, FormerLowerWater); b < 1.3*a {
		t.Errorf("former lower water level goes from %.2f to %.2f", a, b)
	}
	if s := plain.Layers[0].Sentence; !strings.Contains(s, "cannot be told apart") || !strings.Contains(s, "4 of the 5 tests") {
		t.Errorf("four tests: %s", s)
	}
}

func TestZoneBoundaries(t *testing.T) {
	// A POP of 40 kPa gives an OCR of 4 at 13.3 kPa (1.67 m) and 1.2 at 200 kPa (25 m).
	in := Input{Layers: []Layer{{Top: 0.5, Base: 35}}, Tests: clay(0, 0.5, 35, 40, 14), Stations: stationsOf(0, 0.5, 35, 70)}
	res := mustInfer(t, in)
	var zones []Zone
	for _, z := range res.Zones {
		zones = append(zones, z.Zone)
	}
	if fmt.Sprint(zones) != "[3 2 1]" {
		t.Fatalf("zones %v, want heavily, lightly, normally", zones)
	}
	for i, want := range []float64{1.67, 25} {
		b := res.Zones[i].Base
		if b.Low > want || b.High < want || b != res.Zones[i+1].Top {
			t.Errorf("boundary %d: %+v, want %.1f inside and the next zone to begin there", i, b, want)
		}
	}
	if res.Zones[0].Top.Best != 0.5 || res.Zones[2].Base.Best != 35 {
		t.Errorf("zones do not fill the layer: %+v", res.Zones)
	}
}

// The next test belongs where there is none, and narrows what is there.
func TestNextTest(t *testing.T) {
	in := Input{Layers: []Layer{{Top: 2, Base: 18}}, Tests: clay(0, 2, 9, 60, 5), Stations: stationsOf(0, 2, 18, 33)}
	res := mustInfer(t, in)
	n := res.NextTest
	if !n.Known || n.Depth < 10 || n.Narrowing <= 0.02 || n.Narrowing >= 0.8 {
		t.Fatalf("next test %+v, want one below 10 m", n)
	}
	mean := func(r *Result) float64 {
		sum := 0.0
		for _, p := range r.Points {
			sum += p.LnSD / float64(len(r.Points))
		}
		return sum
	}
	more := in
	line := 0.0
	for _, p := range res.Points {
		if p.Depth == n.Depth {
			line = p.Preconsolidation.Best
		}
	}
	more.Tests = append(append([]Test(nil), in.Tests...), Test{Depth: n.Depth, EffectiveStress: 8 * n.Depth, Preconsolidation: line, LnSD: LnSDForGrade("A")})
	got := 1 - mean(mustInfer(t, more))/mean(res)
	// The announcement takes the scatter as known; a test that falls on the line
	// also tells that the scatter is small.
	if got < n.Narrowing-0.05 || got > n.Narrowing+0.25 {
		t.Errorf("a test at %.1f m narrows by %.2f, announced %.2f", n.Depth, got, n.Narrowing)
	}
}

func TestStressThatCannotBeIsMended(t *testing.T) {
	in := Input{Layers: []Layer{{Name: "clay", Top: 2, Base: 18}}, Tests: clay(0, 2, 18, 60, 8), Stations: stationsOf(0, 2, 18, 9)}
	clean := mustInfer(t, in)
	if len(clean.Notes) != 0 {
		t.Errorf("notes on clean data: %q", clean.Notes)
	}
	in.Tests[3].EffectiveStress = 400
	res := mustInfer(t, in)
	if len(res.Notes) != 1 || !strings.Contains(res.Notes[0], "σ′v0 of 400 kPa") {
		t.Errorf("notes %q", res.Notes)
	}
	for i, p := range res.Points {
		if d := math.Abs(math.Log(p.Preconsolidation.Best / clean.Points[i].Preconsolidation.Best)); d > 0.02 {
			t.Errorf("the line at %.1f m moves by %.3f", p.Depth, d)
		}
	}
}
