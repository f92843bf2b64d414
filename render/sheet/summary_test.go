package sheet

import (
	"bytes"
	"errors"
	"io"
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"pastload/profile"
)

func drawSummary(t testing.TB, in SummaryInput) []byte {
	t.Helper()
	var b bytes.Buffer
	if err := Summary(&b, in); err != nil {
		t.Fatal(err)
	}
	return b.Bytes()
}

func TestSummaryGolden(t *testing.T) {
	golden(t, "summary-three", drawSummary(t, site(3)))
}

func TestSummaryConforms(t *testing.T) {
	for _, n := range []int{1, 3, 6, 9, 25} {
		for _, page := range []Page{A4, A3} {
			in := site(n)
			in.Page = page
			out := drawSummary(t, in)
			conforms(t, page.Name, out, page)
			if !bytes.Equal(out, drawSummary(t, in)) {
				t.Errorf("%d boreholes: two drawings differ", n)
			}
		}
	}
}

func TestSummarySays(t *testing.T) {
	in := site(9)
	all := strings.Join(texts(t, drawSummary(t, in)), "\n")
	for _, want := range []string{"Soft estuarine", "BH1", "BH9", "3 further boreholes", "left out", "median", "Zones by OCR (project definition)"} {
		if !strings.Contains(all, want) {
			t.Errorf("%q is not on the sheet", want)
		}
	}
	if strings.Contains(strings.Join(texts(t, drawSummary(t, site(7))), "\n"), "further") {
		t.Error("the seventh borehole has the last mark to itself")
	}
}

// TestSummaryOrder: the order of boreholes does not change the order of strata,
// and the names of strata are one whatever their case.
func TestSummaryOrder(t *testing.T) {
	in := site(2)
	for i := range in.Profiles[1].Tests {
		in.Profiles[1].Tests[i].Stratum = " " + strings.ToUpper(in.Profiles[1].Tests[i].Stratum)
	}
	s := summarySheet{in: in}
	s.gather()
	want := []string{"Dried crust", "Soft estuarine clay", "Lower clayey silt with shell fragments", "Stiff till"}
	if len(s.strata) != len(want) {
		t.Fatalf("%d strata, want %d", len(s.strata), len(want))
	}
	for i, w := range want {
		if s.strata[i].name != w {
			t.Errorf("stratum %d is %q, want %q", i, s.strata[i].name, w)
		}
	}
}

func TestRatioWords(t *testing.T) {
	test := func(stress float64, used bool, b profile.Bound) profile.Test {
		return profile.Test{Effective: profile.Known(50), Preconsolidation: profile.Single(stress), Used: used, Bound: b}
	}
	for _, c := range []struct {
		name  string
		tests []profile.Test
		want  string
	}{
		{"none", nil, ""},
		{"one", []profile.Test{test(75, true, profile.Exact)}, "OCR 1.5"},
		{"left out and bounds do not count", []profile.Test{test(75, true, profile.Exact), test(500, false, profile.Exact), test(600, true, profile.AtLeast)}, "OCR 1.5"},
		{"even", []profile.Test{test(50, true, profile.Exact), test(150, true, profile.Exact)}, "OCR 1.0 to 3.0, median 2.0"},
		{"odd", []profile.Test{test(50, true, profile.Exact), test(150, true, profile.Exact), test(60, true, profile.Exact)}, "OCR 1.0 to 3.0, median 1.2"},
	} {
		st := summaryStratum{lines: []summaryLine{{tests: c.tests}}}
		if got := st.ratioWords(); got != c.want {
			t.Errorf("%s: %q, want %q", c.name, got, c.want)
		}
	}
}

func TestSummaryOfNothing(t *testing.T) {
	var b bytes.Buffer
	err := Summary(&b, SummaryInput{Settings: settings(), Profiles: []profile.BoreholeProfile{{Borehole: "BH1"}}})
	if !errors.Is(err, ErrNoStrata) || b.Len() > 0 {
		t.Errorf("got %v and %d bytes, want ErrNoStrata and nothing written", err, b.Len())
	}
}

func TestSummaryAnyNumbers(t *testing.T) {
	rapid.Check(t, func(r *rapid.T) {
		strange := rapid.OneOf(rapid.Float64(), rapid.Float64Range(0, 500), rapid.SampledFrom([]float64{0, math.NaN(), math.Inf(1), math.MaxFloat64, -1, 1e-300}))
		v := func() float64 { return strange.Draw(r, "v") }
		n := func() profile.Number { return profile.Number{Value: v(), Known: rapid.Bool().Draw(r, "known")} }
		in := SummaryInput{Settings: profile.DefaultSettings()}
		for range rapid.IntRange(0, 3).Draw(r, "boreholes") {
			p := profile.BoreholeProfile{Borehole: rapid.String().Draw(r, "name")}
			for range rapid.IntRange(0, 4).Draw(r, "tests") {
				p.Tests = append(p.Tests, profile.Test{Stratum: rapid.String().Draw(r, "stratum"), Depth: v(), Effective: n(), Preconsolidation: profile.Range{Low: v(), Best: v(), High: v(), Known: true}})
				p.Results = append(p.Results, profile.DerivedResult{Stratum: "a", Depth: v(), MeasuredCc: n(), CorrelatedCc: profile.Range{Low: v(), Best: v(), High: v(), Known: true}, Result: &profile.Result{WaterContent: n(), LiquidLimit: n(), PlasticLimit: n()}})
			}
			in.Profiles = append(in.Profiles, p)
		}
		var b bytes.Buffer
		if err := Summary(&b, in); err != nil && !errors.Is(err, ErrNoStrata) {
			r.Fatal(err)
		}
		if s := b.String(); strings.Contains(s, "NaN") || strings.Contains(s, "Inf") {
			r.Fatal("not a number on the sheet")
		}
	})
}

func BenchmarkSummary(b *testing.B) {
	in := site(6)
	for b.Loop() {
		if err := Summary(io.Discard, in); err != nil {
			b.Fatal(err)
		}
	}
}
