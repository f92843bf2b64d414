package design

import (
	"encoding/json"
	"errors"
	"fmt"
	"math"
	"slices"
	"strings"
	"testing"

	"pastload/profile"
)

// clay returns the profile of two boreholes in one clay, with one test left out,
// one that only bounds, and one assumed specific gravity. Invented for these tests.
func clay() *profile.Profile {
	k := profile.Known
	site := &profile.Site{Settings: profile.DefaultSettings()}
	site.Settings.CodeEdition = "EN 1997-1:2004"
	p := &profile.Profile{Site: site}
	for i, name := range []string{"BH1", "BH2"} {
		b := profile.Borehole{Name: name, Strata: []profile.Stratum{
			{Name: "Fill", Top: 0, Base: 1}, {Name: "Soft clay", Top: 1, Base: 12},
		}}
		for j := range 6 {
			z := 2 + 1.5*float64(j)
			s := float64(j*7%5) - 2 + float64(i)
			b.Results = append(b.Results, profile.Result{
				Depth: k(z), Specimen: fmt.Sprintf("%s-%d", name, j+1),
				UnitWeight: k(16.2 + 0.1*s), WaterContent: k(55 + 2*s), LiquidLimit: k(62 + 3*s), PlasticLimit: k(27 + s),
				SpecificGravity: k(2.7 + 0.005*s), VoidRatio: k(1.5 + 0.05*s), CompressionIndex: k(0.55 + 0.03*s),
				RecompressionIndex: k(0.06 + 0.004*s), UndrainedStrength: k(18 + 1.6*z + s),
			})
		}
		b.Results[0].SpecificGravity.Assumed = i == 0
		site.Boreholes = append(site.Boreholes, b)
		p.Boreholes = append(p.Boreholes, profile.BoreholeProfile{Borehole: name})
	}
	for i := range p.Boreholes {
		b, bp := &site.Boreholes[i], &p.Boreholes[i]
		for j := range b.Results {
			r := &b.Results[j]
			z := r.Depth.Value
			effective := 10 + 6.5*z
			best := effective*1.4 + float64(j*5%4)*3
			t := profile.Test{Specimen: r.Specimen, Depth: z, Stratum: "Soft clay", Effective: k(effective),
				Preconsolidation: profile.Single(best), OCR: k(best / effective), POP: k(best - effective), Grade: "B", Used: true, Result: r}
			if i == 0 && j == 3 {
				t.Used, t.LeftOut, t.Why = false, true, "left out: disturbed"
			}
			if i == 1 && j == 5 {
				t.Bound, t.Grade = profile.AtLeast, "bound only"
			}
			bp.Tests = append(bp.Tests, t)
			bp.Results = append(bp.Results, profile.DerivedResult{Depth: z, Specimen: r.Specimen, Stratum: "Soft clay", Result: r})
			bp.Points = append(bp.Points, profile.Point{Depth: z, Stratum: "Soft clay", Effective: k(effective),
				Preconsolidation: profile.Around(best*0.8, best, best*1.2)})
		}
	}
	return p
}

func values4(t testing.TB, o Options, p *profile.Profile) []Stratum {
	t.Helper()
	strata, err := o.Values(p)
	if err != nil {
		t.Fatal(err)
	}
	return strata
}

func find(t testing.TB, strata []Stratum, stratum, borehole, parameter string) *Parameter {
	t.Helper()
	for i := range strata {
		if strata[i].Stratum == stratum && strata[i].Borehole == borehole {
			if p := strata[i].parameter(parameter); p != nil {
				return p
			}
		}
	}
	t.Fatalf("no %s in %q, borehole %q", parameter, stratum, borehole)
	return nil
}

func warned(p *Parameter, words string) bool {
	return slices.ContainsFunc(p.Warnings, func(w string) bool { return strings.Contains(w, words) })
}

func TestValuesCount(t *testing.T) {
	strata := values4(t, Options{PerBorehole: true}, clay())
	for _, c := range []struct {
		parameter, borehole        string
		n, leftOut, bound, assumed int
	}{
		{"water content", "", 12, 0, 0, 0},
		{"specific gravity", "", 11, 0, 0, 1},
		{"preconsolidation stress", "", 10, 1, 1, 0},
		{"OCR", "", 10, 1, 1, 0},
		{"POP", "BH1", 5, 1, 0, 0},
		{"preconsolidation stress", "BH2", 5, 0, 1, 0},
		{"strength ratio", "", 10, 1, 0, 0}, // the bound gives no ratio
		{"compression ratio", "BH2", 6, 0, 0, 0},
	} {
		p := find(t, strata, "Soft clay", c.borehole, c.parameter)
		if p.N != c.n || p.LeftOut != c.leftOut || p.Bounds != c.bound || p.Assumed != c.assumed {
			t.Errorf("%s %s: n %d, left out %d, bounds %d, assumed %d; want %d, %d, %d, %d", c.parameter, c.borehole,
				p.N, p.LeftOut, p.Bounds, p.Assumed, c.n, c.leftOut, c.bound, c.assumed)
		}
		if len(p.Observations) != c.n {
			t.Errorf("%s %s: %d observations are listed; want %d", c.parameter, c.borehole, len(p.Observations), c.n)
		}
	}
	if p := find(t, strata, "Soft clay", "", "OCR"); p.Origin != Derived || p.WithLeftOut == nil || p.WithLeftOut.N != 11 {
		t.Errorf("OCR is %q with %+v left in; want derived, and eleven values with what was left out", p.Origin, p.WithLeftOut)
	}
	names := []string{}
	for _, s := range strata {
		names = append(names, s.Stratum+" "+s.Borehole)
	}
	if got, want := strings.Join(names, "|"), "Fill |Soft clay |Soft clay BH1|Soft clay BH2"; got != want {
		t.Errorf("strata %s; want %s", got, want)
	}
}

func TestValuesWithoutProfile(t *testing.T) {
	for _, p := range []*profile.Profile{nil, {}} {
		if _, err := Values(p); !errors.Is(err, ErrNoProfile) {
			t.Errorf("Values(%v): %v; want ErrNoProfile", p, err)
		}
	}
	p := clay()
	p.Site.Boreholes[0].Results[2].WaterContent = profile.Known(math.Inf(1))
	if _, err := Values(p); !errors.Is(err, ErrOutOfRange) || !strings.Contains(err.Error(), "water content") {
		t.Errorf("an infinite water content: %v; want ErrOutOfRange that names it", err)
	}
}

// TestSmallSamples holds what is given and what is not for few values.
func TestSmallSamples(t *testing.T) {
	q := &quantities[slices.IndexFunc(quantities, func(q quantity) bool { return q.name == "undrained strength" })]
	for _, c := range []struct {
		name    string
		values  []float64
		way     string
		words   string
		low, sd bool
	}{
		{"none", nil, "", "No value is left", false, false},
		{"one", []float64{20}, "", "One value is too few", false, false},
		{"two", []float64{20, 24}, "", "2 values are too few", false, true},
		{"three", []float64{20, 24, 22}, "", "3 values are too few", false, true},
		{"four with usual scatter", []float64{20, 24, 19, 22}, WayMeanKnown, "a COV of 0.25 is assumed", true, true},
		{"four with much scatter", []float64{20, 60, 15, 33}, WayMeanUnknown, "its own scatter is used", true, true},
		{"ten", []float64{20, 24, 19, 22, 25, 21, 20, 23, 18, 22}, WayMeanUnknown, "10 values are enough", true, true},
	} {
		t.Run(c.name, func(t *testing.T) {
			var rs []reading
			for _, o := range vertical(c.values...) {
				rs = append(rs, reading{Observation: o})
			}
			p, err := Options{}.parameter(q, EditionOf(""), []string{"BH1"}, rs)
			if err != nil {
				t.Fatal(err)
			}
			if p.Way != c.way || !strings.Contains(sentence(p.MethodReason), c.words) {
				t.Errorf("way %q because %q; want %q and %q", p.Way, p.MethodReason, c.way, c.words)
			}
			if p.Low.Known != c.low || p.High.Known != c.low || p.SD.Known != c.sd {
				t.Errorf("low %v, high %v, SD %v; want known: %v, %v", p.Low, p.High, p.SD, c.low, c.sd)
			}
			if !c.low && len(p.Alternatives) > 0 {
				t.Errorf("%d formulas are applied to %d values", len(p.Alternatives), len(c.values))
			}
			if p.Min.Known != (len(c.values) > 0) || p.Median.Known != (len(c.values) > 0) {
				t.Errorf("range %v, median %v of %d values", p.Min, p.Median, len(c.values))
			}
			notFinite(t, p)
		})
	}
}

// notFinite fails where JSON of a result cannot be written, as it cannot where a
// NaN or an infinity has got in.
func notFinite(t *testing.T, v any) {
	t.Helper()
	if _, err := json.Marshal(v); err != nil {
		t.Error(err)
	}
}

func TestTermsFollowTheEdition(t *testing.T) {
	for _, c := range []struct{ setting, name, term, clause, way string }{
		{"", "", "cautious estimate", "", WayMeanUnknown},
		{"EN 1997-1:2004", "EN 1997-1:2004", "characteristic value", "2.4.5.2", WayMeanUnknown},
		{"Eurocode 7", "EN 1997-1:2004", "characteristic value", "2.4.5.2", WayMeanUnknown},
		{"EN 1997-1:2024", "EN 1997-1:2024", "representative value (characteristic)", "", WayMeanUnknown},
		{"AASHTO LRFD", "AASHTO-style", "mean value", "", WayMeanLessSD},
		{"local handbook", "", "cautious estimate", "", WayMeanUnknown},
	} {
		p := clay()
		p.Site.Settings.CodeEdition = c.setting
		strata := values4(t, Options{}, p)
		w := find(t, strata, "Soft clay", "", "water content")
		s := strata[len(strata)-1]
		if s.Edition.Name != c.name || w.Term != c.term || s.Edition.Clause != c.clause || w.Way != c.way {
			t.Errorf("%q: %q, %q, clause %q, way %s; want %q, %q, %q, %s", c.setting, s.Edition.Name, w.Term, s.Edition.Clause, w.Way, c.name, c.term, c.clause, c.way)
		}
	}
}

func TestTrendIsFollowed(t *testing.T) {
	strata := values4(t, Options{}, clay())
	su := find(t, strata, "Soft clay", "", "undrained strength")
	if su.Trend == nil || !su.Trend.Real || su.Way != "line-mean" || !warned(su, "one value for the stratum hides it") {
		t.Fatalf("su grows by 1.6 kPa/m but: %+v, way %s, warnings %q", su.Trend, su.Way, su.Warnings)
	}
	const slope = 0.15 // kPa/m: the invented scatter tilts the line a little
	near(t, "slope", su.Trend.Slope, 1.6, slope)
	points := su.Trend.Points
	if first, last := points[0], points[len(points)-1]; first.Depth != 2 || last.Depth != 9.5 {
		t.Errorf("the line runs from %g to %g m; want the tested 2 to 9.5", first.Depth, last.Depth)
	}
	for i, q := range points {
		if !(q.FractileLow.Value < q.MeanLow.Value && q.MeanLow.Value < q.Value.Value && q.Value.Value < q.MeanHigh.Value && q.MeanHigh.Value < q.FractileHigh.Value) {
			t.Errorf("the lines at %g m are not in order: %+v", q.Depth, q)
		}
		if i > 0 && q.Depth <= points[i-1].Depth {
			t.Errorf("depth %g after %g", q.Depth, points[i-1].Depth)
		}
	}
	if w := find(t, strata, "Soft clay", "", "water content"); w.Trend == nil || w.Trend.Real || len(w.Trend.Points) > 0 {
		t.Errorf("w has no trend, but %+v", w.Trend)
	}
	if p := find(t, strata, "Soft clay", "", "preconsolidation stress"); !warned(p, "OCR shows no trend") {
		t.Errorf("σ′p = 1.4 σ′v0, yet nothing says that OCR is constant: %q", p.Warnings)
	}
}

func TestUnsafeSide(t *testing.T) {
	strata := values4(t, Options{}, clay())
	for name, words := range map[string]string{
		"OCR":                "For K0, wall pressure and swelling a low value is on the unsafe side: use the high",
		"undrained strength": "For downdrag and drivability a low value",
	} {
		if p := find(t, strata, "Soft clay", "", name); !warned(p, words) {
			t.Errorf("%s: %q; want %q", name, p.Warnings, words)
		}
	}
	if p := find(t, strata, "Soft clay", "", "compression index"); p.Side != High || warned(p, "unsafe") {
		t.Errorf("Cc: side %s, %q; want the high side and no such warning", p.Side, p.Warnings)
	}
}

// TestPossibleValuesOnly: a formula that gives what cannot be gives nothing.
func TestPossibleValuesOnly(t *testing.T) {
	p := clay()
	for i := range p.Site.Boreholes {
		for j := range p.Site.Boreholes[i].Results {
			p.Site.Boreholes[i].Results[j].UndrainedStrength = profile.Known([]float64{1, 90, 2, 60, 3, 1}[j])
		}
	}
	su := find(t, values4(t, Options{Estimate: Fractile}, p), "Soft clay", "", "undrained strength")
	if su.Low.Known {
		t.Errorf("low su is %g kPa; a strength of zero or less cannot be", su.Low.Value)
	}
	noted := false
	for _, a := range su.Alternatives {
		noted = noted || !a.Low.Known && a.Note != ""
	}
	if !noted || !warned(su, "well above what is usual") {
		t.Errorf("nothing says why: %q", su.Warnings)
	}
}

func TestLeftOutByDecision(t *testing.T) {
	p := clay()
	out := func(specimen, quantity, decision string) {
		p.Site.Decisions = append(p.Site.Decisions, profile.Decision{Borehole: "BH1", Specimen: specimen, Quantity: quantity, Decision: decision, Reason: "cracked", By: "A", Date: "2024-01-01"})
	}
	out("BH1-1", "compression index", profile.LeaveOut)
	out("BH1-2", "Cc", profile.LeaveOut)
	out("BH1-2", "Cc", profile.Keep) // the last word counts
	out("BH1-3", "void ratio", profile.LeaveOut)
	strata := values4(t, Options{}, p)
	for name, want := range map[string]int{"compression index": 1, "compression ratio": 2, "recompression ratio": 1, "void ratio": 1, "water content": 0} {
		if q := find(t, strata, "Soft clay", "", name); q.LeftOut != want || q.N != 12-want {
			t.Errorf("%s: %d left out of %d; want %d of 12", name, q.LeftOut, q.N+q.LeftOut, want)
		}
	}
}

// TestAdoptedForASpecimen: a value adopted for one specimen replaces its result.
func TestAdoptedForASpecimen(t *testing.T) {
	p := clay()
	p.Site.Decisions = []profile.Decision{{Borehole: "BH1", Specimen: "BH1-1", Quantity: "compression index", Decision: profile.AdoptValue, Value: profile.Known(0.9), Reason: "typing error"}}
	q := find(t, values4(t, Options{}, p), "Soft clay", "", "compression index")
	if q.Max.Value != 0.9 || q.Adopted.Known || q.N != 12 {
		t.Errorf("greatest %v of %d, adopted %v; want 0.9 among the results and no value adopted for the stratum", q.Max, q.N, q.Adopted)
	}
	if r := find(t, values4(t, Options{}, p), "Soft clay", "", "compression ratio"); math.Abs(r.Max.Value-0.9/2.4) > 1e-12 {
		t.Errorf("greatest CR %v; want 0.9/(1 + 1.4)", r.Max)
	}
}

func TestAdoptedForAStratum(t *testing.T) {
	adopt := func(borehole, specimen, quantity string, depth profile.Number, v float64) profile.Decision {
		return profile.Decision{Borehole: borehole, Specimen: specimen, Depth: depth, Quantity: quantity, Decision: profile.AdoptValue, Value: profile.Known(v), Reason: "my reason", By: "E", Date: "2024-02-03"}
	}
	none := profile.Number{}
	for _, c := range []struct {
		name          string
		d             profile.Decision
		site, b1, b2  float64 // 0: none adopted
		note, warning string
	}{
		{"stratum in the specimen column", adopt("", "soft clay", "compression index", none, 0.6), 0.6, 0.6, 0.6, "", ""},
		{"stratum in the borehole column", adopt("Soft clay", "", "compression index", none, 0.6), 0.6, 0.6, 0.6, "", ""},
		{"stratum of one borehole", adopt("BH2", "Soft clay", "compression index", none, 0.6), 0, 0, 0.6, "", "is adopted for BH2 only"},
		{"depth without a result", adopt("BH2", "", "compression index", profile.Known(4.44), 0.6), 0, 0, 0.6, "", "is adopted for BH2 only"},
		{"no stratum", adopt("BH2", "", "compression index", none, 0.6), 0, 0, 0, "names no stratum", ""},
		{"outside the results", adopt("", "Soft clay", "compression index", none, 0.1), 0.1, 0.1, 0.1, "", "outside the range"},
		{"less than the advised high", adopt("", "Soft clay", "compression index", none, 0.55), 0.55, 0.55, 0.55, "", "lower than the advised high"},
	} {
		t.Run(c.name, func(t *testing.T) {
			p := clay()
			p.Site.Decisions = []profile.Decision{c.d}
			strata := values4(t, Options{PerBorehole: true}, p)
			for borehole, want := range map[string]float64{"": c.site, "BH1": c.b1, "BH2": c.b2} {
				q := find(t, strata, "Soft clay", borehole, "compression index")
				if q.Adopted.Known != (want != 0) || q.Adopted.Value != want {
					t.Errorf("adopted in %q: %v; want %g", borehole, q.Adopted, want)
				}
				if (q.Reason == "my reason") != (want != 0) || q.MethodReason == "" || q.MethodReason == "my reason" {
					t.Errorf("in %q the reason is %q and that of the method %q", borehole, q.Reason, q.MethodReason)
				}
			}
			if q := find(t, strata, "Soft clay", "", "compression index"); c.warning != "" && !warned(q, c.warning) {
				t.Errorf("warnings %q; want %q", q.Warnings, c.warning)
			}
			if notes := strings.Join(strata[0].Notes, " "); c.note != "" && !strings.Contains(notes, c.note) {
				t.Errorf("notes %q; want %q", notes, c.note)
			}
		})
	}
}

func TestAnnexQ(t *testing.T) {
	for _, c := range []struct {
		values     []float64
		experience string
		want       string // "" for enough
	}{
		{[]float64{100}, "", "asks for 4"},
		{[]float64{100}, "extensive", "asks for 2"},
		{[]float64{100, 104}, "", ""},
		{[]float64{100, 130}, "", "2 oedometer tests: EN 1997-2, Table Q.1, asks for 3"},
		{[]float64{100, 130}, "medium", ""},
		{[]float64{100, 220, 180}, "", "asks for 4"},
		{[]float64{100, 220, 180}, "medium", ""},
		{[]float64{100, 220, 180, 90}, "none", ""},
	} {
		p := Parameter{Symbol: "σ′p"}
		p.Summary, _ = Summarize(vertical(c.values...))
		got := annexQ(&p, c.experience)
		if (got == "") != (c.want == "") || !strings.Contains(got, c.want) {
			t.Errorf("%v, experience %q: %q; want %q", c.values, c.experience, got, c.want)
		}
	}
}

// TestWithoutDesign: the switch for an investigation report leaves facts only.
func TestWithoutDesign(t *testing.T) {
	p := clay()
	p.Site.Decisions = []profile.Decision{{Specimen: "Soft clay", Quantity: "OCR", Decision: profile.AdoptValue, Value: profile.Known(1.4), Reason: "r"}}
	full := values4(t, Options{}, p)
	before, _ := json.Marshal(full)
	facts := WithoutDesign(full)
	for _, s := range facts {
		for _, q := range s.Parameters {
			if q.Low.Known || q.High.Known || q.Adopted.Known || q.Method != "" || q.Reason != "" || q.Term != "" || len(q.Alternatives) > 0 || q.Trend != nil && q.Trend.Points != nil {
				t.Errorf("%s still holds a design value: %+v", q.Parameter, q)
			}
			for _, w := range q.Warnings {
				if strings.Contains(w, "use the high") || strings.Contains(w, "adopted") {
					t.Errorf("%s: %q", q.Parameter, w)
				}
			}
			if q.N > 0 && !q.Mean.Known {
				t.Errorf("%s lost its mean", q.Parameter)
			}
		}
	}
	if after, _ := json.Marshal(full); string(before) != string(after) {
		t.Error("the strata given were changed")
	}
}
