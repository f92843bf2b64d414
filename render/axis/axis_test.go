package axis

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

// tolerance of closed forms of a few operations, relative to the sizes here.
const tolerance = 1e-12

func TestLinear(t *testing.T) {
	s := NewLinear(0, 400, 60, 100)
	for _, c := range []struct{ v, want float64 }{{0, 60}, {400, 100}, {100, 70}, {-100, 50}, {math.NaN(), 60}, {math.Inf(1), 60}} {
		if got := s.At(c.v); math.Abs(got-c.want) > tolerance*100 {
			t.Errorf("At(%v) = %v, want %v", c.v, got, c.want)
		}
	}
	for _, c := range []struct {
		v, want float64
		way     int
	}{{-1, 60, -1}, {401, 100, 1}, {200, 80, 0}, {math.NaN(), 60, -1}, {math.Inf(1), 100, 1}} {
		if got, way := s.Clamp(c.v); math.Abs(got-c.want) > tolerance*100 || way != c.way {
			t.Errorf("Clamp(%v) = %v, %d, want %v, %d", c.v, got, way, c.want, c.way)
		}
	}
	// A level axis runs upwards.
	if up := NewLinear(-10, 0, 200, 100); up.At(-5) != 150 {
		t.Errorf("an axis that runs upwards has −5 at %v", up.At(-5))
	}
}

func TestLog(t *testing.T) {
	s := NewLog(0.1, 100, 0, 30)
	for _, c := range []struct{ v, want float64 }{{0.1, 0}, {1, 10}, {10, 20}, {100, 30}, {0, 0}, {-5, 0}, {math.NaN(), 0}} {
		if got := s.At(c.v); math.Abs(got-c.want) > tolerance*30 {
			t.Errorf("At(%v) = %v, want %v", c.v, got, c.want)
		}
	}
}

func TestNeverNaN(t *testing.T) {
	strange := rapid.OneOf(rapid.Float64(), rapid.SampledFrom([]float64{math.NaN(), math.Inf(1), math.Inf(-1), 0, 1e308, -1e308, 5e-324}))
	rapid.Check(t, func(r *rapid.T) {
		v := func() float64 { return strange.Draw(r, "v") }
		for _, s := range []Scale{NewLinear(v(), v(), 10, 100), NewLog(v(), v(), 10, 100)} {
			if got, _ := s.Clamp(v()); !(got >= 10-1e-6 && got <= 100+1e-6) {
				low, high := s.Ends()
				r.Fatalf("Clamp gives %v on a scale from %v to %v", got, low, high)
			}
		}
		low, high, step := Round(v(), v(), 5)
		l, h := RoundLog(v(), v())
		for _, x := range []float64{low, high, step, l, h, NiceStep(v(), 4), DrawingScale(v(), v())} {
			if math.IsNaN(x) {
				r.Fatal("not a number")
			}
		}
		for _, ticker := range []Ticker{Step{Size: v(), Parts: 5}, Decades{Named: []int{1, 2, 5}}} {
			a, b := v(), v()
			for _, tick := range ticker.Ticks(a, b) {
				if !isFinite(tick.Value) {
					r.Fatalf("tick at %v between %v and %v", tick.Value, a, b)
				}
			}
		}
	})
}

func labels(ticks []Tick) []string {
	var out []string
	for _, t := range ticks {
		if t.Label != "" {
			out = append(out, t.Label)
		}
	}
	return out
}

func TestTicks(t *testing.T) {
	for _, c := range []struct {
		name      string
		ticker    Ticker
		low, high float64
		labels    []string
		all       int
	}{
		{"depths", Step{Size: 2, Parts: 4}, 0, 6, []string{"0", "2", "4", "6"}, 13},
		{"tenths", Step{Size: 0.1}, 0, 0.3, []string{"0.0", "0.1", "0.2", "0.3"}, 4},
		{"quarters", Step{Size: 0.25}, 0, 0.5, []string{"0.00", "0.25", "0.50"}, 3},
		{"levels", Step{Size: 5}, -12, 6, []string{"−10", "−5", "0", "5"}, 4},
		{"OCR", Decades{Named: []int{1, 2, 5}}, 0.5, 20, []string{"0.5", "1", "2", "5", "10", "20"}, 16},
		{"turned", Step{Size: 1}, 5, 1, nil, 0},
		{"no step", Step{}, 0, 1, nil, 0},
		{"too many", Step{Size: 1e-6}, 0, 1, nil, 0},
		{"log of zero", Decades{Named: []int{1}}, 0, 10, nil, 0},
	} {
		got := c.ticker.Ticks(c.low, c.high)
		if len(got) != c.all {
			t.Errorf("%s: %d ticks, want %d", c.name, len(got), c.all)
		}
		l := labels(got)
		if len(l) != len(c.labels) {
			t.Errorf("%s: labels %q, want %q", c.name, l, c.labels)
			continue
		}
		for i := range l {
			if l[i] != c.labels[i] {
				t.Errorf("%s: labels %q, want %q", c.name, l, c.labels)
				break
			}
		}
	}
}

func TestNice(t *testing.T) {
	for _, c := range []struct {
		span float64
		most int
		want float64
	}{{10, 5, 2}, {10, 10, 1}, {11, 10, 2}, {0.3, 3, 0.1}, {470, 5, 100}, {1, 3, 0.5}, {0, 5, 1}, {math.NaN(), 5, 1}, {-3, 5, 1}} {
		if got := NiceStep(c.span, c.most); math.Abs(got-c.want) > tolerance*c.want {
			t.Errorf("NiceStep(%v, %d) = %v, want %v", c.span, c.most, got, c.want)
		}
	}
	low, high, step := Round(-3, 97, 5)
	if low != -20 || high != 100 || step != 20 {
		t.Errorf("Round(−3, 97) = %v, %v, %v; want −20, 100, 20", low, high, step)
	}
	if low, high := RoundLog(0.3, 47); low != 0.2 || high != 50 {
		t.Errorf("RoundLog(0.3, 47) = %v, %v; want 0.2, 50", low, high)
	}
	if low, high := RoundLog(0.5, 10); low != 0.5 || high != 10 {
		t.Errorf("RoundLog(0.5, 10) = %v, %v; want the same", low, high)
	}
}

// TestRoundHolds: rounded ends hold the values, on whole steps.
func TestRoundHolds(t *testing.T) {
	rapid.Check(t, func(r *rapid.T) {
		a := rapid.Float64Range(-1e4, 1e4).Draw(r, "a")
		b := a + rapid.Float64Range(1e-3, 1e4).Draw(r, "span")
		low, high, step := Round(a, b, 6)
		slack := 1e-8 * step
		if low > a+slack || high < b-slack || high-low > 8*step+slack {
			r.Fatalf("Round(%v, %v) = %v, %v, %v", a, b, low, high, step)
		}
	})
}

func TestDrawingScale(t *testing.T) {
	for _, c := range []struct{ metres, mm, want float64 }{
		{20, 200, 100}, {20.1, 200, 125}, {2, 200, 10}, {10, 200, 50}, {80, 200, 400}, {80, 195, 500}, {200, 200, 1000}, {240, 200, 1250}, {0, 200, 100}, {5, 0, 100},
	} {
		if got := DrawingScale(c.metres, c.mm); got != c.want {
			t.Errorf("%v m in %v mm: 1:%v, want 1:%v", c.metres, c.mm, got, c.want)
		}
	}
}
