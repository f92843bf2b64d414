package oedometer

import (
	"math"
	"math/rand"
	"strings"
	"testing"
)

// letters writes the branches as f, u, r and g (further loading).
func letters(points []Point) string {
	var b strings.Builder
	for _, p := range points {
		b.WriteByte("furg"[p.Branch])
	}
	return b.String()
}

func TestBranches(t *testing.T) {
	for _, v := range []struct {
		name   string
		stress []float64
		want   string
	}{
		{"loading only", []float64{10, 20, 40, 80}, "ffff"},
		{"unloading at the end", []float64{10, 20, 40, 20, 10}, "fffuu"},
		{"a loop", []float64{10, 20, 40, 20, 10, 20, 40, 80}, "fffuurrg"},
		{"a loop that skips the former maximum", []float64{10, 20, 40, 20, 80}, "fffug"},
		{"two loops and an end", []float64{10, 40, 10, 40, 80, 20, 80, 160, 40}, "ffurgurgu"},
		{"a loop at once", []float64{10, 5, 10, 20}, "furg"},
		{"a loop within reloading", []float64{10, 80, 20, 40, 20, 80, 160}, "ffururg"},
		{"the same stress twice", []float64{10, 20, 20, 40}, "ffff"},
		{"wandering less than a reversal", []float64{10, 20, 19.8, 40}, "ffff"},
		{"falling from the start", []float64{40, 20, 10}, "fuu"},
		{"one point", []float64{40}, "f"},
		{"reload to a little above the maximum within reading", []float64{10, 40, 10, 40.1, 80}, "ffurg"},
	} {
		t.Run(v.name, func(t *testing.T) {
			var points []Point
			for _, s := range v.stress {
				points = append(points, Point{EffectiveStress: s})
			}
			findBranches(points)
			if got := letters(points); got != v.want {
				t.Errorf("%s, want %s for %v", got, v.want, v.stress)
			}
		})
	}
}

func TestSeating(t *testing.T) {
	points := []Point{{EffectiveStress: 2}, {EffectiveStress: 4.9}, {EffectiveStress: 5}, {EffectiveStress: 10}}
	findBranches(points)
	for i, want := range []bool{true, true, false, false} {
		if points[i].Seating != want {
			t.Errorf("%.1f kPa: seating %v, want %v", points[i].EffectiveStress, points[i].Seating, want)
		}
	}
	clay := soil{yield: 100, cc: 0.4, cr: 0.04, e0: 1.2, width: 0.05}
	p := plan{first: 1, ratio: 2, last: 1500}
	rec := p.record(clay, rand.New(rand.NewSource(1)))
	// A loose seat: 0.05 of void ratio lost under the first two loads.
	for i := range rec.Stages[:2] {
		rec.Stages[i].VoidRatio.Value += 0.05
	}
	rec.InitialVoidRatio.Value += 0.05
	c, err := Prepare(rec)
	if err != nil {
		t.Fatal(err)
	}
	got := interpret(t, c, Situation{})
	for _, id := range []string{"two-line", "bilogarithmic"} {
		for _, i := range got.method(t, id).Points {
			if c.Points[i].Seating {
				t.Errorf("%s: a seating point at %.1f kPa made a line", id, c.Points[i].EffectiveStress)
			}
		}
	}
}

// A constant-rate record wanders in stress, and has loops as well.
func TestDenseBranches(t *testing.T) {
	r := rand.New(rand.NewSource(3))
	var points []Point
	limb := func(from, to float64, n int) {
		for i := range n {
			s := from * math.Pow(to/from, float64(i)/float64(n-1))
			points = append(points, Point{EffectiveStress: s * (1 + 0.003*r.NormFloat64())})
		}
	}
	limb(5, 300, 800)
	limb(298, 60, 300)
	limb(61, 1500, 900)
	findBranches(points)
	got := letters(points)
	for _, v := range []struct {
		at   int
		want byte
	}{{10, 'f'}, {700, 'f'}, {850, 'u'}, {1050, 'u'}, {1150, 'r'}, {1400, 'r'}, {1700, 'g'}, {1999, 'g'}} {
		if got[v.at] != v.want {
			t.Errorf("reading %d at %.0f kPa: %c, want %c", v.at, points[v.at].EffectiveStress, got[v.at], v.want)
		}
	}
	turns := 0
	for i := 1; i < len(got); i++ {
		if (got[i] == 'u') != (got[i-1] == 'u') {
			turns++
		}
	}
	if turns != 2 {
		t.Errorf("%d turning points, want 2", turns)
	}
}
