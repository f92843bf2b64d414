package history

import (
	"encoding/json"
	"fmt"
	"math"
	"os"
	"testing"
)

// independentTolerance is that of ln σ′p, probabilities and normal scores
// against dense linear algebra: what nodes of a weight at the limit of being
// kept can change.
const independentTolerance = 1e-6

// independentCase is a case of testdata/independent.py with its answers.
type independentCase struct {
	Site struct {
		Name              string
		Top, Base, Water  float64
		Removed           []float64
		Tests, Neighbours [][4]float64 // depth, σ′v0, σ′p, sd
		Sources           [][4]json.RawMessage
		Stations          [][2]float64
	}
	Mechanisms map[string]float64
	Lines      [][3]float64
	Sizes      map[string][3]float64
	Expected   []struct {
		Band [3]float64
		Z    float64
	}
}

func (c *independentCase) input(t *testing.T) Input {
	t.Helper()
	s := &c.Site
	in := Input{Layers: []Layer{{Name: "clay", Top: s.Top, Base: s.Base}}, WaterTable: s.Water, HasWater: true}
	for i, x := range s.Tests {
		in.Tests = append(in.Tests, Test{ID: i, Depth: x[0], EffectiveStress: x[1], Preconsolidation: x[2], LnSD: x[3]})
	}
	for _, x := range s.Neighbours {
		in.Neighbours = append(in.Neighbours, Test{Depth: x[0], EffectiveStress: x[1], Preconsolidation: x[2], LnSD: x[3]})
	}
	for _, x := range s.Stations {
		in.Stations = append(in.Stations, Station{Depth: x[0], EffectiveStress: x[1]})
	}
	if len(s.Removed) == 2 {
		in.Known = []Known{{Kind: RemovedGround, Size: s.Removed[0], SD: s.Removed[1], Layer: -1}}
	}
	for _, x := range s.Sources {
		var name string
		var between, within float64
		var readings [][3]float64
		for i, to := range []any{&name, &between, &within, &readings} {
			if err := json.Unmarshal(x[i], to); err != nil {
				t.Fatal(err)
			}
		}
		for _, r := range readings {
			in.Readings = append(in.Readings, Reading{Source: name, Depth: r[0], EffectiveStress: r[1], Preconsolidation: r[2], BetweenSD: between, WithinSD: within})
		}
	}
	return in
}

// The same model by dense linear algebra, written apart in another language,
// gives the same numbers.
func TestIndependentImplementation(t *testing.T) {
	data, err := os.ReadFile("testdata/independent.json")
	if err != nil {
		t.Fatal(err)
	}
	var cases []independentCase
	if err := json.Unmarshal(data, &cases); err != nil {
		t.Fatal(err)
	}
	if len(cases) != 3 {
		t.Fatalf("%d cases, want 3", len(cases))
	}
	for _, c := range cases {
		t.Run(c.Site.Name, func(t *testing.T) {
			in := c.input(t)
			res, err := Infer(in)
			if err != nil {
				t.Fatal(err)
			}
			worst := 0.0
			check := func(what string, got, want float64) {
				worst = math.Max(worst, math.Abs(got-want))
				if !(math.Abs(got-want) <= independentTolerance) {
					t.Errorf("%s: %.9f, want %.9f", what, got, want)
				}
			}
			band := func(what string, got Band, want [3]float64) {
				check(what+" low", math.Log(got.Low), want[0])
				check(what+" best", math.Log(got.Best), want[1])
				check(what+" high", math.Log(got.High), want[2])
			}
			for i, p := range res.Points {
				band(fmt.Sprintf("line at %g m", p.Depth), p.Preconsolidation, c.Lines[i])
			}
			for i, r := range res.Tests {
				band(fmt.Sprintf("expected of test %d", i), r.Expected, c.Expected[i].Band)
				check(fmt.Sprintf("z of test %d", i), r.Z, c.Expected[i].Z)
			}
			for _, m := range res.Layers[0].Mechanisms {
				check(m.Name, m.Probability, c.Mechanisms[m.Name])
			}
			in.defaults()
			l := in.gather(0)
			if err := l.infer(&standard); err != nil {
				t.Fatal(err)
			}
			sizes := 0
			for k, m := range l.model.mechanisms {
				for p := range m.parameters {
					name := fmt.Sprintf("%s %d", m.name, p)
					if want, ok := c.Sizes[name]; ok {
						sizes++
						got := l.post.size[k][p].band()
						for j, v := range []float64{got.Low, got.Best, got.High} {
							check(name, v, want[j])
						}
					}
				}
			}
			if sizes != len(c.Sizes) {
				t.Errorf("%d sizes compared, want %d", sizes, len(c.Sizes))
			}
			t.Logf("largest difference %.1e", worst)
		})
	}
}
