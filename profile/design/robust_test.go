package design

import (
	"errors"
	"math"
	"sort"
	"testing"

	"pgregory.net/rapid"
)

// TestMiddle: selection and sorting find the same median.
func TestMiddle(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		v := rapid.SliceOfN(rapid.Float64Range(-5, 5), 1, 60).Draw(t, "values")
		if rapid.Bool().Draw(t, "ties") {
			for i := range v {
				v[i] = math.Round(v[i])
			}
		}
		sorted := append([]float64(nil), v...)
		sort.Float64s(sorted)
		if got, want := middleOf(v), median(sorted); got != want {
			t.Errorf("selection gives %v, sorting %v", got, want)
		}
	})
}

// TestTheilSenIgnoresOneWildValue: the least-squares slope turns round, this one
// stays (breakdown 29 %).
func TestTheilSenIgnoresOneWildValue(t *testing.T) {
	s := vertical(10, 12, 14, 16, 18, 20, 22, 24)
	s[7].Value = -100
	slope, _, err := TheilSen(s)
	l, _ := FitLine(s, Normal)
	if err != nil || slope != 2 || l.Slope > 0 {
		t.Errorf("Theil–Sen %g, %v; least squares %g; want 2 and a slope below zero", slope, err, l.Slope)
	}
}

// TestRobustSDIgnoresOneWildValue: one result a thousand times too large does not
// change the scatter by more than the scatter.
func TestRobustSDIgnoresOneWildValue(t *testing.T) {
	clean := vertical(20, 21, 22, 23, 24, 25, 26)
	wild := vertical(20, 21, 22, 23, 24, 25, 26000)
	a, errA := RobustSD(clean)
	b, errB := RobustSD(wild)
	if errA != nil || errB != nil || b > 2*a {
		t.Errorf("%g, %v becomes %g, %v", a, errA, b, errB)
	}
	if _, err := RobustSD(vertical(1, 2)); !errors.Is(err, ErrTooFew) {
		t.Errorf("two values: %v; want ErrTooFew", err)
	}
}

// TestMADFactor: the table, what lies between its rows, and what follows it.
func TestMADFactor(t *testing.T) {
	const hair = 1e-12
	near(t, "row 5", madFactor(5), 1.21, hair)
	near(t, "between 10 and 12", madFactor(11), 1.085, hair)
	near(t, "the end joins", madFactor(15), 1+0.9/15, hair)
	near(t, "many", madFactor(1e9), 1, 1e-6)
}
