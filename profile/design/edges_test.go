package design

import (
	"encoding/json"
	"errors"
	"math"
	"testing"

	"pastload/profile"
)

// TestDegenerateSamples: whatever a table holds, the core answers with numbers or
// with an error, and never with a NaN.
func TestDegenerateSamples(t *testing.T) {
	inf, nan := math.Inf(1), math.NaN()
	for _, c := range []struct {
		name   string
		values []float64
		bad    bool // ErrOutOfRange is wanted from everything
	}{
		{"none", nil, false},
		{"one", []float64{5}, false},
		{"two", []float64{5, 7}, false},
		{"all equal", []float64{0.1, 0.1, 0.1, 0.1, 0.1, 0.1, 0.1}, false},
		{"all zero", []float64{0, 0, 0, 0, 0}, false},
		{"negative", []float64{-5, -7, -6, -9}, false},
		{"mean of zero", []float64{-1, 1, -2, 2}, false},
		{"too large", []float64{1e300, 2e300, 1e299, 1.5e300}, true},
		{"enormous", []float64{1e90, 2e90, 1e89, 1.5e90}, false},
		{"far apart", []float64{1e-90, 2e90, 1e-89, 1.5e90}, false},
		{"tiny", []float64{1e-300, 2e-300, 1e-299, 3e-300}, false},
		{"NaN", []float64{1, nan, 3, 4}, true},
		{"infinite", []float64{1, 2, inf, 4}, true},
	} {
		t.Run(c.name, func(t *testing.T) {
			s := vertical(c.values...)
			sum, err := Summarize(s)
			if errors.Is(err, ErrOutOfRange) != c.bad {
				t.Errorf("Summarize: %v", err)
			}
			if err == nil {
				notFinite(t, sum)
			}
			for _, d := range []Distribution{Normal, LogNormal} {
				for _, w := range Ways {
					i, err := w.Of(s, Assumptions{Distribution: d, COV: 0.2, IndicatedCOV: 0.3})
					if err == nil && (math.IsNaN(i.Low) || math.IsNaN(i.High)) {
						t.Errorf("%s, %s: %v", w.ID, d, i)
					}
					if c.bad && !errors.Is(err, ErrOutOfRange) {
						t.Errorf("%s: %v; want ErrOutOfRange", w.ID, err)
					}
				}
				if l, err := FitTrend(s, d); err == nil {
					for _, v := range []float64{l.Slope, l.Mean, l.SD, l.P} {
						if math.IsNaN(v) {
							t.Errorf("line %+v", l)
						}
					}
				} else if c.bad && !errors.Is(err, ErrOutOfRange) {
					t.Errorf("line: %v; want ErrOutOfRange", err)
				}
			}
			for _, l := range Looks(s) {
				notFinite(t, l)
			}
		})
	}
}

// TestEqualValues: no scatter gives no margin, no trend, nothing to look at, and a
// warning that says so.
func TestEqualValues(t *testing.T) {
	s := vertical(0.1, 0.1, 0.1, 0.1, 0.1, 0.1, 0.1, 0.1, 0.1, 0.1)
	if m := moments(s); m.SD != 0 || m.Mean != 0.1 {
		t.Errorf("mean %v, SD %v; want 0.1 and 0", m.Mean, m.SD)
	}
	if l, err := FitLine(s, Normal); err != nil || l.Real() || l.P != 1 {
		t.Errorf("%+v, %v; want a line that is not real", l, err)
	}
	if looks := Looks(s); len(looks) > 0 {
		t.Errorf("looks %v", looks)
	}
	if w, ok := weakZone(s, s, Both, 1.1); ok {
		t.Errorf("a weak zone %+v", w)
	}
	p := clay()
	for i := range p.Site.Boreholes {
		for j := range p.Site.Boreholes[i].Results {
			p.Site.Boreholes[i].Results[j].WaterContent = profile.Known(44)
		}
	}
	if w := find(t, values4(t, Options{}, p), "Soft clay", "", "water content"); !warned(w, "All 12 values are equal") || w.Low.Value != 44 {
		t.Errorf("low %v, warnings %q", w.Low, w.Warnings)
	}
}

// TestOneDepth: results at one depth have no trend, and are worth one of them.
func TestOneDepth(t *testing.T) {
	s := vertical(3, 4, 5, 4)
	for i := range s {
		s[i].Depth = 7
	}
	if _, err := FitLine(s, Normal); !errors.Is(err, ErrTooFew) {
		t.Errorf("line: %v; want ErrTooFew", err)
	}
	if _, _, err := TheilSen(s); !errors.Is(err, ErrTooFew) {
		t.Errorf("Theil–Sen: %v; want ErrTooFew", err)
	}
	if n, err := EffectiveCount(s, 2); err != nil || n != 1 {
		t.Errorf("worth %g, %v; want 1", n, err)
	}
	if _, err := AverageOver(s, Normal, 5, 2); !errors.Is(err, ErrTooFew) {
		t.Errorf("average: %v; want ErrTooFew", err)
	}
}

// TestValuesOfHostileSites: unusual but possible tables give JSON and no panic.
func TestValuesOfHostileSites(t *testing.T) {
	k := profile.Known
	for name, change := range map[string]func(*profile.Profile){
		"no boreholes":      func(p *profile.Profile) { p.Site.Boreholes, p.Boreholes = nil, nil },
		"no profile":        func(p *profile.Profile) { p.Boreholes = nil },
		"no strata":         func(p *profile.Profile) { p.Site.Boreholes[0].Strata = nil },
		"deep beyond sense": func(p *profile.Profile) { p.Site.Boreholes[0].Results[5].Depth = k(1e9) },
		"negative results": func(p *profile.Profile) {
			for i := range p.Site.Boreholes[0].Results {
				r := &p.Site.Boreholes[0].Results[i]
				r.CompressionIndex, r.VoidRatio, r.UnitWeight = k(-0.5), k(-1), k(-3)
			}
		},
		"no depth":     func(p *profile.Profile) { p.Site.Boreholes[0].Results[0].Depth = profile.Number{} },
		"no σ′p":       func(p *profile.Profile) { p.Boreholes[0].Tests[0].Preconsolidation = profile.Range{} },
		"σ′p of zero":  func(p *profile.Profile) { p.Boreholes[0].Tests[0].Preconsolidation = profile.Single(0) },
		"same stratum": func(p *profile.Profile) { p.Site.Boreholes[1].Strata[0].Name = "Soft clay" },
	} {
		t.Run(name, func(t *testing.T) {
			p := clay()
			change(p)
			for _, o := range []Options{{}, {PerBorehole: true, Estimate: Fractile, EffectiveCount: true, AverageOver: 4, WeightByGrade: true, ScaleOfFluctuation: 1}} {
				strata, err := o.Values(p)
				if err != nil {
					t.Fatal(err)
				}
				if _, err := json.Marshal(strata); err != nil {
					t.Error(err)
				}
				for i := range p.Boreholes {
					notFinite(t, Line(p.Boreholes[i], strata))
				}
				for _, s := range strata {
					for _, q := range s.Parameters {
						if len(q.Trend.points()) > 200 {
							t.Errorf("%s: a line of %d points", q.Parameter, len(q.Trend.Points))
						}
					}
				}
			}
		})
	}
}

func (t *Trend) points() []TrendPoint {
	if t == nil {
		return nil
	}
	return t.Points
}
