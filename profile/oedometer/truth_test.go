package oedometer

import (
	"fmt"
	"math"
	"math/rand"
	"os"
	"slices"
	"strings"
	"testing"
)

// What curves of known truth must show. An ordinary curve is any without
// collapsing structure whose last load is at least 8 σ′p: rounding 0.04 to 0.2
// log cycles, Cr/Cc up to 0.25, reading noise 0.001 to 0.003 in e.
const (
	medianWithin    = 0.03
	ninetyWithin    = 0.12
	leastHeld       = 0.88
	structuredHeld  = 0.75 // where the steepest part begins is hidden between loads
	structuredTrend = 0.08
	wrong           = 0.15 // a short test this far off must not be graded A or B
	boundAbove      = 1.05 // of the truth; at most one lower bound in twenty beyond
)

// A score gathers what was made of one family of curves.
type score struct {
	name    string
	n       int
	ratios  map[string][]float64 // estimate over truth by construction, and "combined", "value"
	held    int                  // values whose range holds the truth
	values  int
	grades  map[string]int
	misled  int       // grade A or B and wrong
	bounds  []float64 // lower bound over truth
	false   int       // upper bounds below the truth
	refused int
}

// try draws and interprets n curves of a family.
func try(t testing.TB, f family, seed int64, n int) score {
	t.Helper()
	s := score{name: f.name, n: n, ratios: map[string][]float64{}, grades: map[string]int{}}
	r := rand.New(rand.NewSource(seed))
	for i := range n {
		clay, p := f.draw(r)
		inSitu := clay.yield / between(r, 1.3, 3)
		c, err := Prepare(p.record(clay, r))
		if err != nil {
			s.refused++ // noise that lifts a point by more than readings may
			continue
		}
		var situation Situation
		if i%3 > 0 { // one in three without the in-situ stress
			situation.EffectiveStress = Known(inSitu)
		}
		got := interpret(t, c, situation)
		if f.kind != short {
			factsOfTheTrade(t, c, got, p.noise)
		}
		for _, m := range got.Methods {
			if m.Known {
				s.ratios[m.ID] = append(s.ratios[m.ID], m.Stress/clay.yield)
			}
		}
		if got.Apparent.Best > 0 {
			s.ratios["combined"] = append(s.ratios["combined"], got.Apparent.Best/clay.yield)
		}
		s.grades[got.Grade]++
		y := got.Preconsolidation
		switch y.Bound {
		case Exact:
			s.values++
			if y.Low <= clay.yield && clay.yield <= y.High {
				s.held++
			}
			s.ratios["value"] = append(s.ratios["value"], y.Best/clay.yield)
			if math.Abs(y.Best/clay.yield-1) > wrong && got.Grade <= GradeB {
				s.misled++
			}
		case AtLeast:
			s.bounds = append(s.bounds, y.Best/clay.yield)
		case AtMost:
			if y.Best < clay.yield {
				s.false++
			}
		}
	}
	return s
}

func quantile(v []float64, p float64) float64 {
	v = slices.Clone(v)
	slices.Sort(v)
	i := p * float64(len(v)-1)
	k := min(int(i), len(v)-2)
	return v[k] + (i-float64(k))*(v[k+1]-v[k])
}

// String is the table of one family.
func (s score) String() string {
	var b strings.Builder
	fmt.Fprintf(&b, "%s: %d curves, %d refused; %d values, range holds truth %.0f%%; A %d B %d C %d bound only %d; A or B and >15%% wrong: %d\n",
		s.name, s.n, s.refused, s.values, 100*float64(s.held)/math.Max(1, float64(s.values)),
		s.grades[GradeA], s.grades[GradeB], s.grades[GradeC], s.grades[BoundOnly], s.misled)
	var ids []string
	for _, c := range constructions {
		ids = append(ids, c.id)
	}
	for _, id := range append(ids, "combined", "value") {
		if v := s.ratios[id]; len(v) > 1 {
			fmt.Fprintf(&b, "    %-18s n %4d  median %.3f  5–95 %% %.3f–%.3f\n", id, len(v), quantile(v, .5), quantile(v, .05), quantile(v, .95))
		}
	}
	if len(s.bounds) > 1 {
		fmt.Fprintf(&b, "    %-18s n %4d  median %.3f  95 %% %.3f\n", "lower bound", len(s.bounds), quantile(s.bounds, .5), quantile(s.bounds, .95))
	}
	return b.String()
}

// TestKnownTruth reads generated curves whose yield stress is known. -v prints
// the table; PASTLOAD_FULL=1 draws five times as many curves.
func TestKnownTruth(t *testing.T) {
	many := 1
	if os.Getenv("PASTLOAD_FULL") != "" {
		many = 5
	}
	curves := 0
	for i, f := range families {
		s := try(t, f, int64(i+1), many*f.n)
		curves += s.n
		t.Log("\n" + s.String())
		if s.refused > s.n/50 {
			t.Errorf("%s: %d of %d records refused", s.name, s.refused, s.n)
		}
		switch f.kind {
		case ordinary:
			s.check(t, medianWithin, ninetyWithin, leastHeld)
		case structured:
			s.check(t, structuredTrend, 0.20, structuredHeld)
		case short:
			if s.misled > 0 {
				t.Errorf("%s: %d graded A or B though more than 15 %% wrong", s.name, s.misled)
			}
		}
		if s.false > 0 {
			t.Errorf("%s: %d upper bounds lie below the truth", s.name, s.false)
		}
		if len(s.bounds) > 20 && quantile(s.bounds, 0.95) > boundAbove {
			t.Errorf("%s: one lower bound in twenty is above %.2f of the truth", s.name, quantile(s.bounds, 0.95))
		}
	}
	if curves < 200 {
		t.Errorf("only %d curves", curves)
	}
}

func (s score) check(t *testing.T, median, ninety, held float64) {
	t.Helper()
	v := s.ratios["value"]
	if len(v) < s.n*9/10 {
		t.Errorf("%s: only %d of %d curves were given a value", s.name, len(v), s.n)
	}
	if m := quantile(v, 0.5); math.Abs(m-1) > median {
		t.Errorf("%s: median ratio %.3f, want 1 within %.0f %%", s.name, m, 100*median)
	}
	if low, high := quantile(v, 0.05), quantile(v, 0.95); low < 1-ninety || high > 1+ninety {
		t.Errorf("%s: 5–95 %% %.3f–%.3f, want 1 within %.0f %%", s.name, low, high, 100*ninety)
	}
	if share := float64(s.held) / float64(s.values); share < held {
		t.Errorf("%s: stated range holds the truth in %.0f %%, want %.0f %%", s.name, 100*share, 100*held)
	}
}
