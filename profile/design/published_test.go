package design

import (
	"errors"
	"fmt"
	"math"
	"testing"
)

// Tolerances of printed tables: half a unit of their last digit, and a hair for
// the binary form of the digit itself.
const (
	twoDecimals   = 0.005 + 1e-9
	threeDecimals = 0.0005 + 1e-9
	oneDecimal    = 0.05 + 1e-9
	closedForm    = 1e-12 // relative; closed forms in double precision
)

func near(t *testing.T, what string, got, want, tolerance float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tolerance) {
		t.Errorf("%s: got %.6g, want %g ± %.2g", what, got, want, tolerance)
	}
}

// vertical returns a sample with values at depths one metre apart.
func vertical(values ...float64) Sample {
	var s Sample
	for i, v := range values {
		s = append(s, Observation{Borehole: "BH1", Depth: float64(i + 1), Value: v, Label: fmt.Sprintf("S%d", i+1)})
	}
	return s
}

// TestStudentClosedForms holds the quantile against the three cases that can be
// written down exactly.
func TestStudentClosedForms(t *testing.T) {
	const p = 0.95
	alpha := 4 * p * (1 - p)
	q := math.Cos(math.Acos(math.Sqrt(alpha))/3) / math.Sqrt(alpha)
	for _, c := range []struct {
		df   float64
		want float64
	}{
		{1, math.Tan(math.Pi * (p - 0.5))},
		{2, 2 * (p - 0.5) * math.Sqrt(2/alpha)},
		{4, 2 * math.Sqrt(q-1)},
	} {
		near(t, fmt.Sprintf("t95(%g)", c.df), Student95(c.df), c.want, closedForm*c.want)
	}
}

// TestStudentPrinted holds it against the table in every textbook on statistics
// (one-sided 95 %, from memory).
func TestStudentPrinted(t *testing.T) {
	for df, want := range map[float64]float64{1: 6.314, 2: 2.920, 3: 2.353, 4: 2.132, 5: 2.015, 9: 1.833, 14: 1.761, 19: 1.729, 29: 1.699} {
		near(t, fmt.Sprintf("t95(%g)", df), Student95(df), want, threeDecimals)
	}
	near(t, "t95 of many", Student95(1e6), Normal95, 1e-5)
}

// TestFactorTable holds k_n against a table computed independently from the same
// formulas and rounded to two decimals; no printed table of the code was read.
func TestFactorTable(t *testing.T) {
	for _, row := range []struct {
		n                                                      float64
		meanUnknown, meanKnown, fractileUnknown, fractileKnown float64
	}{
		{3, 1.69, 0.95, 3.37, 1.90}, {4, 1.18, 0.82, 2.63, 1.84}, {5, 0.95, 0.74, 2.34, 1.80},
		{6, 0.82, 0.67, 2.18, 1.78}, {8, 0.67, 0.58, 2.01, 1.74}, {10, 0.58, 0.52, 1.92, 1.73},
		{12, 0.52, 0.47, 1.87, 1.71}, {15, 0.45, 0.42, 1.82, 1.70}, {20, 0.39, 0.37, 1.77, 1.69}, {30, 0.31, 0.30, 1.73, 1.67},
	} {
		for _, c := range []struct {
			e     Estimate
			known bool
			want  float64
		}{{Mean, false, row.meanUnknown}, {Mean, true, row.meanKnown}, {Fractile, false, row.fractileUnknown}, {Fractile, true, row.fractileKnown}} {
			k, err := Factor(row.n, c.e, c.known)
			if err != nil {
				t.Fatal(err)
			}
			near(t, fmt.Sprintf("k_n of %g, %s, known %v", row.n, c.e, c.known), k, c.want, twoDecimals)
		}
	}
	for _, c := range []struct {
		n     float64
		known bool
	}{{1, false}, {0.5, true}, {0, false}, {math.NaN(), false}, {math.NaN(), true}} {
		if k, err := Factor(c.n, Mean, c.known); !errors.Is(err, ErrTooFew) {
			t.Errorf("Factor(%g, known %v) = %g, %v; want ErrTooFew", c.n, c.known, k, err)
		}
	}
}

// TestSixtyToAHundred is a worked case computed by hand from the formulas.
func TestSixtyToAHundred(t *testing.T) {
	s := vertical(60, 70, 80, 90, 100)
	sum, err := Summarize(s)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "mean", sum.Mean.Value, 80, 0)
	near(t, "SD", sum.SD.Value, 15.81, twoDecimals)
	for id, want := range map[string]float64{
		WayMeanUnknown: 64.9, WayFractileUnknown: 43.1, "schneider": 72.1,
		WayMeanKnown: 68.2, WayFractileKnown: 51.2, WayMeanLessSD: 64.2,
	} {
		i, err := WayByID(id).Of(s, Assumptions{COV: 0.2})
		if err != nil {
			t.Fatal(err)
		}
		near(t, id+", low", i.Low, want, oneDecimal)
		near(t, id+", high", i.High, 160-want, oneDecimal)
	}
}

// TestFourTriaxialTests rebuilds what is known of four triaxial tests in Frank
// et al. (2004), Designers' Guide to EN 1997-1, appendix: φ′k is 27.5° with the
// variance from the sample and 29.5° by Schneider (read); the four results were
// not. Two equations give mean and standard deviation,
//
//	m − 1.177 s = 27.5,  m − 0.5 s = 29.5   ⇒   s = 2.95°, m = 30.98°
//
// and any four values of that mean and scatter must come back to both. The third
// printed value, 29.0° with the variance known, then stands for an assumed COV
// of 0.078, inside the 5 to 15 % usual for tan φ′.
func TestFourTriaxialTests(t *testing.T) {
	const unknownVariance, schneider, knownVariance = 27.5, 29.5, 29.0
	k, err := Factor(4, Mean, false)
	if err != nil {
		t.Fatal(err)
	}
	sd := (schneider - unknownVariance) / (k - 0.5)
	mean := schneider + 0.5*sd
	// Four values at mean ± a, mean ± b with the wanted scatter.
	a, b := 0.6*sd, math.Sqrt(1.5*sd*sd-0.36*sd*sd)
	s := vertical(mean-a, mean+b, mean+a, mean-b)
	kKnown, err := Factor(4, Mean, true)
	if err != nil {
		t.Fatal(err)
	}
	cov := (mean - knownVariance) / (kKnown * mean)
	if cov < 0.05 || cov > 0.15 {
		t.Errorf("the known variance would be a COV of %.3f; want 0.05 to 0.15", cov)
	}
	for id, want := range map[string]float64{WayMeanUnknown: unknownVariance, "schneider": schneider, WayMeanKnown: knownVariance} {
		i, err := WayByID(id).Of(s, Assumptions{COV: cov})
		if err != nil {
			t.Fatal(err)
		}
		near(t, id, i.Low, want, oneDecimal)
	}
}

// TestSchneiderMeetsTheMean: half a standard deviation is the 95 % mean at about
// 13 results with the variance from the sample and 11 with it known (derived).
func TestSchneiderMeetsTheMean(t *testing.T) {
	for _, c := range []struct {
		known bool
		n     float64
	}{{false, 13}, {true, 11}} {
		before, _ := Factor(c.n-1, Mean, c.known)
		after, _ := Factor(c.n, Mean, c.known)
		if !(before > 0.5 && after < 0.5+0.01) {
			t.Errorf("known %v: k_n is %.3f at %g and %.3f at %g; want it to pass 0.5", c.known, before, c.n-1, after, c.n)
		}
	}
}

// TestGrubbsPrinted holds the critical values against the two-sided 5 % table of
// Grubbs (1969), as found by simulation.
func TestGrubbsPrinted(t *testing.T) {
	for n, want := range map[int]float64{3: 1.154, 4: 1.481, 5: 1.715, 6: 1.887, 7: 2.020, 8: 2.127, 10: 2.290, 12: 2.412, 15: 2.548} {
		g, err := GrubbsCritical(n)
		if err != nil {
			t.Fatal(err)
		}
		near(t, fmt.Sprintf("Grubbs n = %d", n), g, want, threeDecimals)
		if most := float64(n-1) / math.Sqrt(float64(n)); g >= most {
			t.Errorf("n = %d: critical %.4f is not below the largest possible %.4f", n, g, most)
		}
	}
	if _, err := GrubbsCritical(2); !errors.Is(err, ErrTooFew) {
		t.Errorf("two values: %v; want ErrTooFew", err)
	}
}

// TestVarianceReduction holds the limits and the simple form of Vanmarcke (1977).
func TestVarianceReduction(t *testing.T) {
	const far = 1e-3 // relative: δ/L is the limit for L ≫ δ
	point, _ := VarianceReduction(0, 2)
	near(t, "a point", point, 1, 0)
	long, _ := VarianceReduction(2000, 2)
	near(t, "a long line", long, 2.0/2000, far*2.0/2000)
	simple, _ := SimpleVarianceReduction(8, 2)
	near(t, "simple form", simple, 0.25, 0)
	short, _ := SimpleVarianceReduction(1, 2)
	near(t, "simple form of a short line", short, 1, 0)
	// The series for short lengths must meet the closed form where it takes over.
	below, _ := VarianceReduction(0.000999, 2)
	above, _ := VarianceReduction(0.001001, 2)
	near(t, "seam of series and closed form", below, above, 1e-6)
	for _, c := range [][2]float64{{-1, 2}, {1, 0}, {1, -1}, {math.NaN(), 1}, {1, math.NaN()}, {math.Inf(1), 1}} {
		if _, err := VarianceReduction(c[0], c[1]); !errors.Is(err, ErrOutOfRange) {
			t.Errorf("VarianceReduction(%g, %g): %v; want ErrOutOfRange", c[0], c[1], err)
		}
	}
}

func TestCombinedCOV(t *testing.T) {
	// 0.3²·0.25 + 0.2²/4 + 0.1² = 0.0425, by hand.
	v, err := CombinedCOV(0.3, 0.25, 0.2, 4, 0.1)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "COV", v, math.Sqrt(0.0425), 1e-15)
	for _, n := range []float64{0, -1, math.NaN()} {
		if _, err := CombinedCOV(0.3, 1, 0.2, n, 0); !errors.Is(err, ErrOutOfRange) {
			t.Errorf("n = %g: %v; want ErrOutOfRange", n, err)
		}
	}
	if _, err := CombinedCOV(-0.1, 1, 0, 1, 0); !errors.Is(err, ErrOutOfRange) {
		t.Errorf("negative COV: %v; want ErrOutOfRange", err)
	}
}
