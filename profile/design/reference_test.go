package design

import (
	"encoding/json"
	"fmt"
	"math"
	"os"
	"testing"
)

// agreement is the relative difference allowed between two independent programs:
// nine digits, as both work in double precision and the quantiles are iterated.
const agreement = 1e-9

// reference is testdata/reference.json, written by testdata/reference.py with
// NumPy and SciPy.
type reference struct {
	Student     [][2]float64               `json:"student"`
	StudentTail [][3]float64               `json:"student_tail"`
	Grubbs      [][2]float64               `json:"grubbs"`
	Reduction   [][3]float64               `json:"variance_reduction"`
	Samples     map[string]referenceSample `json:"samples"`
}

type referenceSample struct {
	Rows                  [][2]float64
	Mean, Median, SD, COV float64
	MAD                   float64
	TheilSen              float64               `json:"theil_sen"`
	Normal                map[string][2]float64 `json:"normal"`
	Log                   map[string][2]float64 `json:"log"`
	Line                  referenceLine
	LogLine               referenceLine `json:"log_line"`
	DifferenceP           float64       `json:"difference_p"`
	Weighted              struct {
		Mean, SD, Count, Intercept, Slope float64
		LineSD                            float64 `json:"line_sd"`
	}
	EffectiveCount float64 `json:"effective_count"`
}

type referenceLine struct {
	Slope, Intercept, P, SD, At, Value float64
	Mean, Fractile                     [2]float64
	ShiftedMean                        [2]float64 `json:"shifted_mean"`
	ShiftedFractile                    [2]float64 `json:"shifted_fractile"`
}

func readReference(t *testing.T) reference {
	t.Helper()
	data, err := os.ReadFile("testdata/reference.json")
	if err != nil {
		t.Fatal(err)
	}
	var r reference
	if err := json.Unmarshal(data, &r); err != nil {
		t.Fatal(err)
	}
	if len(r.Samples) < 6 || len(r.Student) < 15 {
		t.Fatalf("reference.json holds %d samples and %d quantiles; it is not whole", len(r.Samples), len(r.Student))
	}
	return r
}

// same reports a difference beyond agreement, relative to the larger of both.
func same(t *testing.T, what string, got, want float64) {
	t.Helper()
	if !(math.Abs(got-want) <= agreement*math.Max(math.Abs(got), math.Abs(want))) {
		t.Errorf("%s: got %.15g, SciPy has %.15g (relative difference %.1g)", what, got, want, math.Abs(got-want)/math.Abs(want))
	}
}

func TestQuantilesAgainstSciPy(t *testing.T) {
	r := readReference(t)
	for _, row := range r.Student {
		same(t, fmt.Sprintf("t95(%g)", row[0]), Student95(row[0]), row[1])
	}
	for _, row := range r.StudentTail {
		same(t, fmt.Sprintf("P(T(%g) > %g)", row[1], row[0]), studentTail(row[0], row[1]), row[2])
	}
	for _, row := range r.Grubbs {
		g, err := GrubbsCritical(int(row[0]))
		if err != nil {
			t.Error(err)
		}
		same(t, fmt.Sprintf("Grubbs n = %g", row[0]), g, row[1])
	}
	for _, row := range r.Reduction {
		g, err := VarianceReduction(row[0], row[1])
		if err != nil {
			t.Error(err)
		}
		same(t, fmt.Sprintf("variance reduction over %g m, scale %g m", row[0], row[1]), g, row[2])
	}
}

func TestSamplesAgainstSciPy(t *testing.T) {
	for name, want := range readReference(t).Samples {
		t.Run(name, func(t *testing.T) {
			var s Sample
			for _, row := range want.Rows {
				s = append(s, Observation{Borehole: "BH1", Depth: row[0], Value: row[1]})
			}
			sum, err := Summarize(s)
			if err != nil {
				t.Fatal(err)
			}
			same(t, "mean", sum.Mean.Value, want.Mean)
			same(t, "median", sum.Median.Value, want.Median)
			same(t, "SD", sum.SD.Value, want.SD)
			same(t, "COV", sum.COV.Value, want.COV)
			robust, err := RobustSD(s)
			if err != nil {
				t.Fatal(err)
			}
			same(t, "robust SD", robust, 1.4826*want.MAD*madFactor(float64(len(s))))
			slope, _, err := TheilSen(s)
			if err != nil {
				t.Fatal(err)
			}
			same(t, "Theil–Sen slope", slope, want.TheilSen)
			n, err := EffectiveCount(s, 2.5)
			if err != nil {
				t.Fatal(err)
			}
			same(t, "effective count", n, want.EffectiveCount)
			sameWays(t, s, Normal, want.Normal)
			sameWays(t, s, LogNormal, want.Log)
			sameLine(t, s, Normal, want.Line)
			sameLine(t, s, LogNormal, want.LogLine)
			sameDifference(t, s, want.DifferenceP)
			sameWeighted(t, s, want)
		})
	}
}

func sameWays(t *testing.T, s Sample, d Distribution, want map[string][2]float64) {
	t.Helper()
	if len(want) != 5 {
		t.Fatalf("%d ways in the reference; want 5", len(want))
	}
	for id, w := range want {
		i, err := WayByID(id).Of(s, Assumptions{Distribution: d, COV: 0.25})
		if err != nil {
			t.Fatal(err)
		}
		same(t, fmt.Sprintf("%s, %s, low", d, id), i.Low, w[0])
		same(t, fmt.Sprintf("%s, %s, high", d, id), i.High, w[1])
	}
}

func sameLine(t *testing.T, s Sample, d Distribution, want referenceLine) {
	t.Helper()
	l, err := FitLine(s, d)
	if err != nil {
		t.Fatal(err)
	}
	at := func(what string, i Interval, err error, w [2]float64) {
		t.Helper()
		if err != nil {
			t.Fatal(err)
		}
		same(t, fmt.Sprintf("%s line, %s low", d, what), i.Low, d.back(w[0]))
		same(t, fmt.Sprintf("%s line, %s high", d, what), i.High, d.back(w[1]))
	}
	if l.SD > 1e-12*math.Abs(l.Mean) { // a line through every value leaves only rounding
		same(t, d.String()+" line, residual SD", l.SD, want.SD)
		same(t, d.String()+" line, p", l.P, want.P)
	}
	same(t, d.String()+" line, slope", l.Slope, want.Slope)
	same(t, d.String()+" line, value", l.At(want.At), d.back(want.Value))
	i, err := l.Band(want.At, Mean)
	at("confidence band", i, err, want.Mean)
	i, err = l.Band(want.At, Fractile)
	at("prediction band", i, err, want.Fractile)
	i, err = l.Shifted(want.At, Mean)
	at("shifted mean", i, err, want.ShiftedMean)
	i, err = l.Shifted(want.At, Fractile)
	at("shifted fractile", i, err, want.ShiftedFractile)
}

func sameDifference(t *testing.T, s Sample, want float64) {
	t.Helper()
	s = s.ordered() // one borehole: by depth, then value
	var a, b []float64
	for i, o := range s {
		if i < len(s)/2 {
			a = append(a, o.Value)
		} else {
			b = append(b, o.Value)
		}
	}
	p, ok := chanceOfDifference(a, b)
	if !ok {
		t.Fatal("no comparison of two halves")
	}
	same(t, "p of a difference between halves", p, want)
}

func sameWeighted(t *testing.T, s Sample, want referenceSample) {
	t.Helper()
	weights := []float64{1, 0.6, 0.3, 1, 0.6, 1, 0.3, 1, 1, 0.6, 0.3, 1}
	s = append(Sample(nil), s...)
	for i := range s {
		s[i].Weight = weights[i]
	}
	m := moments(s)
	same(t, "weighted mean", m.Mean, want.Weighted.Mean)
	same(t, "weighted SD", m.SD, want.Weighted.SD)
	same(t, "weighted count", m.Count, want.Weighted.Count)
	l, err := FitLine(s, Normal)
	if err != nil {
		t.Fatal(err)
	}
	same(t, "weighted slope", l.Slope, want.Weighted.Slope)
	same(t, "weighted intercept", l.at(0), want.Weighted.Intercept)
	if l.SD > 1e-12*math.Abs(l.Mean) {
		same(t, "weighted residual SD", l.SD, want.Weighted.LineSD)
	}
}
