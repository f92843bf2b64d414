package cone

import (
	"encoding/csv"
	"errors"
	"math"
	"os"
	"strconv"
	"testing"

	"pgregory.net/rapid"
)

const closedForm = 1e-12

var prior = Prior{Factor: 0.33, Between: 0.30, Within: 0.20}

// TestCalibrateByHand: three pairs with a ratio of 0.40. 1/var = 1/0.09 + 3/0.04
// = 86.11, weight of the site 75/86.11 = 0.8710, ln k = ln 0.33 + 0.8710·ln(0.40/0.33).
func TestCalibrateByHand(t *testing.T) {
	f, err := Calibrate([]Pair{{Cone: 500, Preconsolidation: 200}, {Cone: 600, Preconsolidation: 240}, {Cone: 700, Preconsolidation: 280}}, prior)
	if err != nil {
		t.Fatal(err)
	}
	precision := 1/0.09 + 75.0
	for _, c := range []struct {
		name      string
		got, want float64
	}{
		{"weight", f.Weight, 75 / precision}, {"sd", f.LnSD, 1 / math.Sqrt(precision)}, {"own", f.Own, 0.40},
		{"best", f.Best, 0.33 * math.Pow(0.40/0.33, 75/precision)},
		{"predictive sd", f.Predict(), math.Sqrt(1/precision + 0.04)},
	} {
		if math.Abs(c.got/c.want-1) > closedForm {
			t.Errorf("%s = %v, want %v", c.name, c.got, c.want)
		}
	}
	if len(f.Notes) != 0 {
		t.Errorf("notes %q", f.Notes)
	}
}

func TestCalibrateLimits(t *testing.T) {
	f, err := Calibrate(nil, prior)
	if err != nil || math.Abs(f.Best/0.33-1) > closedForm || math.Abs(f.LnSD-0.30) > closedForm || f.Weight != 0 {
		t.Errorf("no pairs: %+v, %v", f, err)
	}
	many := make([]Pair, 10000)
	for i := range many {
		many[i] = Pair{Cone: 100, Preconsolidation: 50}
	}
	if f, err = Calibrate(many, prior); err != nil || math.Abs(f.Best-0.5) > 1e-3 {
		t.Errorf("many pairs: %+v, %v", f, err)
	}
	doubtful, _ := Calibrate([]Pair{{Cone: 100, Preconsolidation: 50, LnSD: 1}}, prior)
	good, _ := Calibrate([]Pair{{Cone: 100, Preconsolidation: 50}}, prior)
	if !(doubtful.Best < good.Best && doubtful.LnSD > good.LnSD) {
		t.Error("a doubtful test weighs as much as a good one")
	}
}

func TestCalibrateSays(t *testing.T) {
	far, _ := Calibrate([]Pair{{Cone: 100, Preconsolidation: 90}, {Cone: 100, Preconsolidation: 92}, {Cone: 100, Preconsolidation: 88}}, prior)
	wantNote(t, far.Notes, "standard deviations from the published 0.33")
	odd, _ := Calibrate([]Pair{{Cone: 100, Preconsolidation: 33}, {Cone: 100, Preconsolidation: 34}, {Cone: 100, Preconsolidation: 33}, {Depth: 7.5, Cone: 100, Preconsolidation: 85}}, prior)
	wantNote(t, odd.Notes, "σ′p 85 kPa at 7.50 m")
	wild, _ := Calibrate([]Pair{{Cone: 100, Preconsolidation: 15}, {Cone: 100, Preconsolidation: 60}, {Cone: 100, Preconsolidation: 33}}, prior)
	wantNote(t, wild.Notes, "may differ by layer")
	for _, p := range []Pair{{Cone: 0, Preconsolidation: 10}, {Cone: 10, Preconsolidation: math.NaN()}, {Cone: math.Inf(1), Preconsolidation: 10}, {Cone: 10, Preconsolidation: 10, LnSD: -1}} {
		if _, err := Calibrate([]Pair{p}, prior); !errors.Is(err, ErrCalibration) {
			t.Errorf("%+v: %v", p, err)
		}
	}
	if _, err := Calibrate(nil, Prior{}); !errors.Is(err, ErrCalibration) {
		t.Error("an empty prior is taken")
	}
}

// TestCalibrateProperties: the factor lies between the published and the site's
// own; a pair more never widens it; order and units of stress do not matter.
func TestCalibrateProperties(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := rapid.IntRange(1, 8).Draw(t, "n")
		pairs := make([]Pair, n)
		turned, scaled := make([]Pair, n), make([]Pair, n)
		for i := range pairs {
			pairs[i] = Pair{Cone: rapid.Float64Range(50, 5000).Draw(t, "cone"), Preconsolidation: rapid.Float64Range(10, 2000).Draw(t, "σ′p"), LnSD: rapid.Float64Range(0, 0.5).Draw(t, "sd")}
			turned[n-1-i] = pairs[i]
			scaled[i] = Pair{Cone: 20.885 * pairs[i].Cone, Preconsolidation: 20.885 * pairs[i].Preconsolidation, LnSD: pairs[i].LnSD}
		}
		f, err := Calibrate(pairs, prior)
		fewer, err2 := Calibrate(pairs[:n-1], prior)
		if err != nil || err2 != nil {
			t.Fatal(err, err2)
		}
		low, high := math.Min(f.Own, prior.Factor), math.Max(f.Own, prior.Factor)
		if f.Best < low*(1-closedForm) || f.Best > high*(1+closedForm) || f.LnSD > fewer.LnSD || f.Low > f.Best || f.Best > f.High {
			t.Fatalf("%+v after %+v", f, fewer)
		}
		for _, other := range [][]Pair{turned, scaled} {
			if g, _ := Calibrate(other, prior); math.Abs(g.Best/f.Best-1) > 1e-9 {
				t.Fatalf("%v and %v", g.Best, f.Best)
			}
		}
	})
}

// TestAdopt carries the site's factor and its uncertainty to the layers, and
// leaves the layers it was given alone.
func TestAdopt(t *testing.T) {
	s := evaluate(t, clay(1000, 0.02), known)
	var tests []Test
	for _, z := range []float64{3, 8, 14, 40} {
		st, _ := ground(z)
		tests = append(tests, Test{Depth: z, Preconsolidation: 0.25 * (4*st.Effective + 60)})
	}
	pairs := s.Pairs(tests, NetResistance)
	if len(pairs) != 3 {
		t.Fatalf("%d pairs; the test at 40 m has no readings beside it", len(pairs))
	}
	f, err := Calibrate(pairs, PriorFor(NetResistance))
	if err != nil {
		t.Fatal(err)
	}
	before := s.Layers[10].Yield[0]
	after := Adopt(s.Layers, NetResistance, f)[10].Yield
	if s.Layers[10].Yield[0] != before {
		t.Error("the layers were changed in place")
	}
	if math.Abs(after[0].Value-f.Best*before.Cone) > closedForm*before.Value || after[0].Shared != f.LnSD || math.Abs(after[0].Own-before.Own) > closedForm {
		t.Errorf("%+v after %+v", after[0], before)
	}
	if after[1] != s.Layers[10].Yield[1] {
		t.Error("another source was calibrated too")
	}
}

// site is the cone value and the σ′p of a site of the open data, by depth.
type site struct {
	name  string
	pairs []Pair
}

func readSites(t *testing.T) []site {
	t.Helper()
	const path = "../../../shared/data/clay-sites.csv"
	f, err := os.Open(path)
	if errors.Is(err, os.ErrNotExist) {
		t.Skip("the open data of clay sites is not beside the project: " + path)
	}
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	records, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	const depth, yield, net = 1, 6, 9
	var sites []site
	for _, r := range records[1:] {
		if r[yield] == "" || r[net] == "" {
			continue
		}
		if len(sites) == 0 || sites[len(sites)-1].name != r[0] {
			sites = append(sites, site{name: r[0]})
		}
		number := func(i int) float64 {
			x, err := strconv.ParseFloat(r[i], 64)
			if err != nil {
				t.Fatal(err)
			}
			return x
		}
		s := &sites[len(sites)-1]
		s.pairs = append(s.pairs, Pair{Depth: number(depth), Cone: number(net), Preconsolidation: number(yield)})
	}
	return sites
}

// scatterOf returns the median, the standard deviation of the site means and the
// pooled one within sites, of ln(σ′p/cone).
func scatterOf(sites []site) Prior {
	var means []float64
	var squares float64
	n := 0
	for _, s := range sites {
		m := meanRatio(s.pairs)
		for _, p := range s.pairs {
			squares += (p.ratio() - m) * (p.ratio() - m)
		}
		n += len(s.pairs)
		means = append(means, m)
	}
	centre, spread := 0.0, 0.0
	for _, m := range means {
		centre += m / float64(len(means))
	}
	for _, m := range means {
		spread += (m - centre) * (m - centre)
	}
	return Prior{Factor: math.Exp(centre), Between: math.Sqrt(spread / float64(len(means)-1)), Within: math.Sqrt(squares / float64(n-len(sites)))}
}

func meanRatio(pairs []Pair) float64 {
	s := 0.0
	for _, p := range pairs {
		s += p.ratio() / float64(len(pairs))
	}
	return s
}

// TestSiteCalibrationOnOpenData leaves each site out in turn: the prior comes
// from the others, every choice of three of its tests calibrates it, and the rest
// of its depths are predicted. Calibration must cut the error that the depths of a
// site share to less than half, and the error of one depth to near the scatter
// within a site, with bands that hold what they promise.
func TestSiteCalibrationOnOpenData(t *testing.T) {
	sites := readSites(t)
	var before, after errorsOf
	for i, s := range sites {
		if len(s.pairs) < 6 {
			continue
		}
		others := append(append([]site(nil), sites[:i]...), sites[i+1:]...)
		p := scatterOf(others)
		plain, _ := Calibrate(nil, p)
		n := len(s.pairs)
		for a := 0; a < n; a++ {
			for b := a + 1; b < n; b++ {
				for c := b + 1; c < n; c++ {
					f, err := Calibrate([]Pair{s.pairs[a], s.pairs[b], s.pairs[c]}, p)
					if err != nil {
						t.Fatal(err)
					}
					weight := 1 / float64(n*(n-1)*(n-2)/6) // each site counts the same
					rest := remainder(s.pairs, a, b, c)
					before.add(rest, plain, weight)
					after.add(rest, f, weight)
				}
			}
		}
	}
	t.Logf("%.0f sites left out in turn, three tests each, all choices", before.weight)
	t.Logf("shared error of the site's other depths: %.3f before, %.3f after", before.shared(), after.shared())
	t.Logf("error of one depth: %.3f before, %.3f after", before.single(), after.single())
	t.Logf("5 to 95 %% band of one depth holds: %.0f %% before, %.0f %% after", 100*before.held(), 100*after.held())
	if after.shared() > before.shared()/2 || after.single() > 0.75*before.single() {
		t.Error("three tests do not pay")
	}
	if after.held() < 0.80 || after.held() > 0.98 {
		t.Errorf("the band holds %.2f of the depths", after.held())
	}
}

func remainder(pairs []Pair, a, b, c int) []Pair {
	out := make([]Pair, 0, len(pairs)-3)
	for i, p := range pairs {
		if i != a && i != b && i != c {
			out = append(out, p)
		}
	}
	return out
}

// errorsOf gathers ln(measured/predicted) of depths that were not used.
type errorsOf struct {
	weight, sharedSquares, squares, inside float64
}

func (e *errorsOf) add(rest []Pair, f Factor, weight float64) {
	const z95 = 1.6448536269514722
	m := meanRatio(rest) - math.Log(f.Best)
	e.weight += weight
	e.sharedSquares += weight * m * m
	for _, p := range rest {
		d := p.ratio() - math.Log(f.Best)
		e.squares += weight * d * d / float64(len(rest))
		if math.Abs(d) <= z95*f.Predict() {
			e.inside += weight / float64(len(rest))
		}
	}
}

func (e *errorsOf) shared() float64 { return math.Sqrt(e.sharedSquares / e.weight) }
func (e *errorsOf) single() float64 { return math.Sqrt(e.squares / e.weight) }
func (e *errorsOf) held() float64   { return e.inside / e.weight }
