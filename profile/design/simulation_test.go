package design

import (
	"fmt"
	"math"
	"math/rand"
	"os"
	"testing"
)

// trials is how many samples each simulation draws; PASTLOAD_FULL draws many more.
func trials(usual int) int {
	if os.Getenv("PASTLOAD_FULL") != "" {
		return 50 * usual
	}
	return usual
}

// within allows four standard errors of a rate found by so many trials.
func within(t *testing.T, what string, hits, n int, want float64) {
	t.Helper()
	got := float64(hits) / float64(n)
	if allowed := 4 * math.Sqrt(want*(1-want)/float64(n)); math.Abs(got-want) > allowed {
		t.Errorf("%s: %.4f of %d; want %.4f ± %.4f", what, got, n, want, allowed)
	}
}

func draw(r *rand.Rand, n int, mean, sd float64) Sample {
	s := make(Sample, n)
	for i := range s {
		s[i] = Observation{Borehole: fmt.Sprintf("BH%d", i%2+1), Depth: float64(i + 1), Value: mean + sd*r.NormFloat64()}
	}
	return s
}

// above returns the chance of a standard normal value above z.
func above(z float64) float64 { return math.Erfc(z/math.Sqrt2) / 2 }

// TestPromisedChance: the low mean is above the true one in 5 % of samples, and
// the next result below the low fractile in 5 %, as the formulas promise.
func TestPromisedChance(t *testing.T) {
	n := trials(8000)
	for _, size := range []int{4, 7, 15} {
		r := rand.New(rand.NewSource(int64(size)))
		wrong := map[string]int{}
		for range n {
			s := draw(r, size, 100, 20)
			next := 100 + 20*r.NormFloat64()
			for _, id := range []string{WayMeanUnknown, WayMeanKnown, WayFractileUnknown, WayFractileKnown} {
				i, err := WayByID(id).Of(s, Assumptions{COV: 0.2})
				if err != nil {
					t.Fatal(err)
				}
				truth := 100.0
				if WayByID(id).Estimate == Fractile {
					truth = next
				}
				if i.Low > truth {
					wrong[id]++
				}
			}
		}
		within(t, fmt.Sprintf("mean, variance unknown, n = %d", size), wrong[WayMeanUnknown], n, 0.05)
		within(t, fmt.Sprintf("fractile, variance unknown, n = %d", size), wrong[WayFractileUnknown], n, 0.05)
		// With an assumed COV the margin grows with the sample's mean, low = c·mean, so
		// that a high mean is not believed in full: 2 to 4 % and not 5 are wrong.
		m := float64(size)
		c := 1 - Normal95*0.2/math.Sqrt(m)
		within(t, fmt.Sprintf("mean, assumed COV, n = %d", size), wrong[WayMeanKnown], n, above((1/c-1)*math.Sqrt(m)/0.2))
		c = 1 - Normal95*0.2*math.Sqrt(1+1/m)
		within(t, fmt.Sprintf("fractile, assumed COV, n = %d", size), wrong[WayFractileKnown], n, above((1-c)/(0.2*math.Sqrt(1+c*c/m))))
	}
}

// TestLineBands: the confidence band holds the true line on its low side in 95 %.
func TestLineBands(t *testing.T) {
	n := trials(4000)
	r := rand.New(rand.NewSource(11))
	band, local, sloped := 0, 0, 0
	for range n {
		s := draw(r, 8, 0, 10)
		flat, err := FitLine(s, Normal)
		if err != nil {
			t.Fatal(err)
		}
		if flat.P < RealSlope {
			sloped++
		}
		for i := range s {
			s[i].Value += 40 + 5*s[i].Depth
		}
		l, err := FitLine(s, Normal)
		if err != nil {
			t.Fatal(err)
		}
		const z = 7.25
		m, _ := l.Band(z, Mean)
		p, _ := l.Band(z, Fractile)
		if m.Low > 40+5*z {
			band++
		}
		if p.Low > 40+5*z+10*r.NormFloat64() {
			local++
		}
	}
	within(t, "confidence band", band, n, 0.05)
	within(t, "prediction band", local, n, 0.05)
	within(t, "slope taken as real where there is none", sloped, n, RealSlope)
}

// TestRobustSDUnbiased: the small-sample factors make the robust scatter right on
// the average for normal samples.
func TestRobustSDUnbiased(t *testing.T) {
	const allowed = 0.02 // the factors have two decimals, and the trials an error of about one percent
	n := trials(6000)
	for _, size := range []int{3, 4, 5, 6, 7, 8, 9, 10, 12, 15, 25} {
		r := rand.New(rand.NewSource(int64(100 + size)))
		var sum float64
		for range n {
			sd, err := RobustSD(draw(r, size, 50, 1))
			if err != nil {
				t.Fatal(err)
			}
			sum += sd
		}
		near(t, fmt.Sprintf("mean robust SD of %d", size), sum/float64(n), 1, allowed)
	}
}

// TestWeakZoneRates: a weak zone is announced in clean ground in no more than 5 %,
// and one of a quarter of the values at two thirds of the strength is mostly found.
func TestWeakZoneRates(t *testing.T) {
	n := trials(2000)
	for _, size := range []int{6, 8, 12, 24} {
		r := rand.New(rand.NewSource(int64(200 + size)))
		alarms, found := 0, 0
		for range n {
			s := draw(r, size, 100, 15)
			if _, ok := weakZone(s, s, Low, surelyWorse); ok {
				alarms++
			}
			for i := size / 2; i < size/2+max(2, size/4); i++ {
				s[i].Value -= 40
			}
			if _, ok := weakZone(s, s, Low, surelyWorse); ok {
				found++
			}
		}
		rate, power := float64(alarms)/float64(n), float64(found)/float64(n)
		t.Logf("n = %d: false alarm %.3f, found %.2f", size, rate, power)
		if rate > surelyWorse {
			t.Errorf("n = %d: announced in %.3f of clean samples", size, rate)
		}
		if size >= 12 && power < 0.5 {
			t.Errorf("n = %d: found in %.2f only", size, power)
		}
	}
}

// TestAdvisedLow measures what matters to who uses the advised value: how often it
// is on the unsafe side of the true median when the ground scatters less than,
// as much as, and more than is assumed.
func TestAdvisedLow(t *testing.T) {
	n := trials(2000)
	for _, c := range []struct {
		size int
		cov  float64
		most float64
	}{
		{5, 0.15, 0.05}, {5, 0.25, 0.08}, {5, 0.40, 0.10},
		{8, 0.15, 0.05}, {8, 0.25, 0.08}, {8, 0.40, 0.08},
		{15, 0.25, 0.065},
	} {
		r := rand.New(rand.NewSource(int64(1000*c.size) + int64(100*c.cov)))
		unsafe, lines := 0, 0
		sigma := LogNormal.spread(0, c.cov)
		for range n {
			s := draw(r, c.size, math.Log(2), sigma)
			for i := range s {
				s[i].Value = math.Exp(s[i].Value)
			}
			var readings []reading
			for _, o := range s {
				readings = append(readings, reading{Observation: o})
			}
			p, err := Options{}.parameter(&ocrQuantity, Edition{}, nil, readings)
			if err != nil {
				t.Fatal(err)
			}
			if p.Low.Value > 2 {
				unsafe++
			}
			if p.Trend.Used {
				lines++
			}
		}
		rate := float64(unsafe) / float64(n)
		t.Logf("OCR, n = %d, true COV %.2f: advised low above the true median in %.3f; a line followed in %.3f", c.size, c.cov, rate, float64(lines)/float64(n))
		if rate > c.most {
			t.Errorf("n = %d, COV %.2f: unsafe in %.3f; want at most %.3f", c.size, c.cov, rate, c.most)
		}
	}
}

// ocrQuantity is the OCR of the list.
var ocrQuantity = func() quantity {
	for _, q := range quantities {
		if q.name == "OCR" {
			return q
		}
	}
	panic("no OCR in the list")
}()
