package design

import (
	"errors"
	"math"
	"strings"
	"testing"

	"pastload/profile"
)

// TestTrendScale: σ′p that grows straight gets a straight line, one that grows by a
// factor a line through its logarithms, and one that does either is left in
// logarithms.
func TestTrendScale(t *testing.T) {
	for _, c := range []struct {
		name string
		of   func(z float64) float64
		want Distribution
	}{
		{"straight", func(z float64) float64 { return 5 + 8*z }, Normal},
		{"by a factor", func(z float64) float64 { return 20 * math.Exp(0.25*z) }, LogNormal},
		{"flat", func(float64) float64 { return 60 }, LogNormal},
	} {
		s := vertical(make([]float64, 10)...)
		for i := range s {
			s[i].Value = c.of(s[i].Depth) * (1 + 0.03*float64(i*7%5-2))
		}
		if l, err := FitTrend(s, LogNormal); err != nil || l.Distribution != c.want {
			t.Errorf("%s: %s, %v; want %s", c.name, l.Distribution, err, c.want)
		}
	}
}

func TestSlopeInUnits(t *testing.T) {
	s := vertical(make([]float64, 6)...)
	for i := range s {
		s[i].Value = 20 * math.Exp(0.1*s[i].Depth)
	}
	l, err := FitLine(s, LogNormal)
	if err != nil {
		t.Fatal(err)
	}
	// d/dz of 20·e^(z/10) is 2·e^(z/10).
	near(t, "slope at 3 m", l.SlopeAt(3), 2*math.Exp(0.3), 1e-9)
	near(t, "value at 3 m", l.At(3), 20*math.Exp(0.3), 1e-9)
}

// TestTrendOfThree: three values may lie on a line by luck and have none.
func TestTrendOfThree(t *testing.T) {
	l, err := FitLine(vertical(1, 2, 3), Normal)
	if err != nil || l.Real() {
		t.Errorf("%+v, %v; want a line that is not real", l, err)
	}
	if _, err := FitLine(vertical(1, 2), Normal); !errors.Is(err, ErrTooFew) {
		t.Errorf("two values: %v; want ErrTooFew", err)
	}
}

// TestDrawnProfile: values without any scatter about a line were not measured.
func TestDrawnProfile(t *testing.T) {
	p := clay()
	for i := range p.Site.Boreholes {
		for j := range p.Site.Boreholes[i].Results {
			r := &p.Site.Boreholes[i].Results[j]
			r.UndrainedStrength = profile.Known(12 + 2*r.Depth.Value)
		}
	}
	if su := find(t, values4(t, Options{}, p), "Soft clay", "", "undrained strength"); !warned(su, "look drawn and not measured") {
		t.Errorf("warnings %q", su.Warnings)
	}
}

// TestWeakZoneIsTold: a run of low strengths in the middle of a stratum.
func TestWeakZoneIsTold(t *testing.T) {
	p := clay()
	for i := range p.Site.Boreholes {
		for j := range p.Site.Boreholes[i].Results {
			v := 50 + float64((3*i+j*7)%5)
			if j == 2 || j == 3 {
				v -= 18
			}
			p.Site.Boreholes[i].Results[j].UndrainedStrength = profile.Known(v)
		}
	}
	su := find(t, values4(t, Options{}, p), "Soft clay", "", "undrained strength")
	if !warned(su, "The 4 values between 5.00 and 6.50 m lie about 17 kPa below the rest (p < 0.001)") {
		t.Errorf("warnings %q", su.Warnings)
	}
}

// TestWeakBoreholeIsTold: one borehole lower than the other.
func TestWeakBoreholeIsTold(t *testing.T) {
	p := clay()
	for j := range p.Site.Boreholes[1].Results {
		r := &p.Site.Boreholes[1].Results[j]
		r.CompressionIndex = profile.Known(r.CompressionIndex.Value * 1.6)
	}
	cc := find(t, values4(t, Options{}, p), "Soft clay", "", "compression index")
	if !warned(cc, "The values of BH2 lie about 69 % above those of the other boreholes") {
		t.Errorf("warnings %q", cc.Warnings)
	}
}

// TestLooks: a wild value is pointed at and stays in.
func TestLooks(t *testing.T) {
	p := clay()
	p.Site.Boreholes[0].Results[4].WaterContent = profile.Known(140)
	w := find(t, values4(t, Options{}, p), "Soft clay", "", "water content")
	if len(w.Looks) != 1 || w.N != 12 || w.Max.Value != 140 {
		t.Fatalf("looks %+v of %d", w.Looks, w.N)
	}
	for _, l := range w.Looks {
		if l.Label != "BH1-5" || l.Value != 140 || l.Statistic <= l.Critical {
			t.Errorf("look %+v; want the value of BH1-5 itself", l)
		}
	}
	if len(Looks(vertical(1, 2, 3, 2, 1))) > 0 || len(Looks(vertical(1, 1, 1, 1, 9))) > 0 {
		t.Error("five values are too few for any rule")
	}
}

// TestDependenceIsTold: three clusters of results are not twelve results.
func TestDependenceIsTold(t *testing.T) {
	p := clay()
	for j := range p.Site.Boreholes[0].Results {
		p.Site.Boreholes[0].Results[j].Depth = profile.Known(5 + 0.1*float64(j))
		p.Site.Boreholes[1].Results[j].Depth = profile.Known(7 + 0.1*float64(j))
		for i := range 2 {
			r := &p.Site.Boreholes[i].Results[j]
			r.RecompressionIndex = profile.Known([]float64{0.05, 0.09, 0.06, 0.1, 0.04, 0.08}[(j+i)%6])
		}
	}
	cr := find(t, values4(t, Options{}, p), "Soft clay", "", "recompression index")
	if !warned(cr, "worth about 2.") || !(cr.EffectiveN.Value < 3) || !cr.ScaleAssumed {
		t.Errorf("effective n %v, warnings %q", cr.EffectiveN, cr.Warnings)
	}
	counted := find(t, values4(t, Options{EffectiveCount: true}, p), "Soft clay", "", "recompression index")
	if !(counted.High.Value > cr.High.Value) || warned(counted, "worth about") || !strings.Contains(counted.MethodReason, "independent") {
		t.Errorf("high %v and counted as fewer %v because %q", cr.High, counted.High, counted.MethodReason)
	}
	wide := find(t, values4(t, Options{ScaleOfFluctuation: 0.01}, p), "Soft clay", "", "recompression index")
	if wide.ScaleAssumed || math.Abs(wide.EffectiveN.Value-12) > 1e-6 {
		t.Errorf("a scale of 1 cm makes twelve values worth %v", wide.EffectiveN)
	}
}

// TestAverageLiesBetween: the average over some ground scatters less than a point
// and more than the mean.
func TestAverageLiesBetween(t *testing.T) {
	s := vertical(20, 24, 19, 22, 25, 21, 20, 23)
	const scale = 0.2 // values a metre apart are then independent
	point, err := AverageOver(s, Normal, 0, scale)
	if err != nil {
		t.Fatal(err)
	}
	fractile, _ := WayByID(WayFractileUnknown).Of(s, Assumptions{})
	near(t, "no length is the fractile", point.Low, fractile.Low, 1e-3)
	some, _ := AverageOver(s, Normal, 1, scale)
	all, _ := AverageOver(s, Normal, 1e6, scale)
	mean, _ := WayByID(WayMeanUnknown).Of(s, Assumptions{})
	near(t, "a great length is the mean", all.Low, mean.Low, 1e-3)
	if !(point.Low < some.Low && some.Low < all.Low) {
		t.Errorf("low values %g, %g, %g; want them to rise", point.Low, some.Low, all.Low)
	}
	strata := values4(t, Options{AverageOver: 3}, clay())
	found := false
	for _, a := range find(t, strata, "Soft clay", "", "OCR").Alternatives {
		found = found || a.ID == "spatial-average" && a.Low.Known && a.Mark == MarkDerived
	}
	if !found {
		t.Error("no average among the alternatives")
	}
}

// TestTrendOnOneValue: a slope that one wild value makes is told as such.
func TestTrendOnOneValue(t *testing.T) {
	p := clay()
	for i := range p.Site.Boreholes {
		for j := range p.Site.Boreholes[i].Results {
			p.Site.Boreholes[i].Results[j].RecompressionIndex = profile.Known(0.05 + 0.001*float64(j) + 0.002*float64((3*i+j*7)%4))
		}
	}
	p.Site.Boreholes[1].Results[5].RecompressionIndex = profile.Known(0.1)
	cr := find(t, values4(t, Options{}, p), "Soft clay", "", "recompression index")
	if !cr.Trend.Used || !warned(cr, "The trend rests on one value, 0.100 of BH2-6 at 9.50 m") {
		t.Errorf("used %v (p = %.3f), warnings %q", cr.Trend.Used, cr.Trend.P, cr.Warnings)
	}
	if _, _, ok := carrier(vertical(10, 13, 14, 17, 20, 21), Normal); ok {
		t.Error("a steady slope rests on no single value")
	}
}
