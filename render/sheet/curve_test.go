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
	"pastload/profile/oedometer"
)

var curveCases = []struct {
	name string
	make func() CurveInput
}{
	{"looped", looped}, {"stopped", stopped}, {"dense", dense}, {"few", few}, {"by hand", byHand},
}

func drawCurve(t testing.TB, in CurveInput) []byte {
	t.Helper()
	var b bytes.Buffer
	if err := Curve(&b, in); err != nil {
		t.Fatal(err)
	}
	return b.Bytes()
}

func TestCurveConforms(t *testing.T) {
	for _, c := range curveCases {
		for _, page := range []Page{A4, A3} {
			in := c.make()
			in.Page = page
			out := drawCurve(t, in)
			conforms(t, c.name+" "+page.Name, out, page)
			if !bytes.Equal(out, drawCurve(t, in)) {
				t.Errorf("%s: two drawings of the same curve differ", c.name)
			}
		}
	}
}

// TestCurvePublished draws every published curve that can be prepared.
func TestCurvePublished(t *testing.T) {
	drawnAny := false
	for _, p := range oedometer.Published() {
		prepared, err := oedometer.Prepare(p.Record)
		if err != nil {
			continue // a record that cannot be right has no curve
		}
		sp := profile.Specimen{Name: p.ID, Prepared: prepared}
		if sp.Interpretation, err = oedometer.Interpret(prepared, p.Situation); err == nil {
			sp.Interpreted = true
		}
		conforms(t, p.ID, drawCurve(t, CurveInput{Specimen: sp, Settings: settings()}), A4)
		drawnAny = true
	}
	if !drawnAny {
		t.Error("no published curve was drawn")
	}
}

// TestCurveSays uses the words of a result made up here, so that it holds however
// the constructions read a curve.
func TestCurveSays(t *testing.T) {
	in := looped()
	r := &in.Specimen.Interpretation
	r.Preconsolidation = oedometer.Yield{Low: 71, Best: 78, High: 86}
	r.Grade, r.Reasons = "B", []string{"the reason for it"}
	all := strings.Join(texts(t, drawCurve(t, in)), "\n")
	for _, want := range []string{"78 kPa (71 to 86)", "OCR 1.5, grade B", "the reason for it", "Specimen S5, borehole BH2, 6.50 m", "52 kPa", "incremental 24 h", "unloading", "void ratio e"} {
		if !strings.Contains(all, want) {
			t.Errorf("%q is not on the sheet", want)
		}
	}
	r.Preconsolidation = oedometer.Yield{Low: 300, Best: 300, High: 300, Bound: oedometer.AtLeast}
	all = strings.Join(texts(t, drawCurve(t, in)), "\n")
	if !strings.Contains(all, "σ′p at least 300 kPa") || strings.Contains(all, ", OCR") {
		t.Error("a bound is to be called one, and to give no OCR")
	}
	if all = strings.Join(texts(t, drawCurve(t, few())), "\n"); !strings.Contains(all, "Not interpreted") || strings.Contains(all, "Grey band") {
		t.Error("a curve that is not interpreted is to be drawn without a result")
	}
}

func TestCurveHostileNames(t *testing.T) {
	for _, hostile := range []string{`</text><script>"'&`, "a\x00\u202eb\xff", strings.Repeat("W", 10000)} {
		in := byHand()
		in.ID, in.Sources, in.Specimen.Name, in.Specimen.Borehole, in.Specimen.TestKind = hostile, hostile, hostile, hostile, hostile
		in.Specimen.Notes, in.Specimen.Interpretation.Notes = []string{hostile}, []string{hostile}
		in.Specimen.Interpretation.Reasons, in.Specimen.Interpretation.Grade = []string{hostile}, hostile
		in.Specimen.Interpretation.Methods[0].Name = hostile
		conforms(t, "hostile", drawCurve(t, in), A4)
		sum := site(2)
		sum.Profiles[0].Borehole, sum.ID, sum.Sources = hostile, hostile, hostile
		for i := range sum.Profiles[0].Tests {
			sum.Profiles[0].Tests[i].Stratum = hostile
		}
		conforms(t, "hostile", drawSummary(t, sum), A4)
	}
}

func TestCurveWithoutPoints(t *testing.T) {
	var b bytes.Buffer
	if err := Curve(&b, CurveInput{}); !errors.Is(err, ErrNoCurve) || b.Len() > 0 {
		t.Errorf("got %v and %d bytes, want ErrNoCurve and nothing written", err, b.Len())
	}
}

func TestNumbersShort(t *testing.T) {
	for _, c := range []struct {
		in   []int
		want string
	}{{nil, ""}, {[]int{0}, "1"}, {[]int{0, 1, 2, 4}, "1–3, 5"}, {[]int{3, 5, 6}, "4, 6–7"}} {
		if got := numbers(c.in); got != c.want {
			t.Errorf("numbers(%v) = %q, want %q", c.in, got, c.want)
		}
	}
}

// TestCurveAnyNumbers draws curves and interpretations of arbitrary numbers.
func TestCurveAnyNumbers(t *testing.T) {
	rapid.Check(t, func(r *rapid.T) {
		strange := rapid.OneOf(rapid.Float64(), rapid.Float64Range(0, 1000), rapid.SampledFrom([]float64{0, math.NaN(), math.Inf(1), math.Inf(-1), math.MaxFloat64, -1, 1e-300}))
		v := func() float64 { return strange.Draw(r, "v") }
		known := func() bool { return rapid.Bool().Draw(r, "known") }
		sp := profile.Specimen{Name: rapid.String().Draw(r, "name"), Effective: profile.Number{Value: v(), Known: known()}, Depth: profile.Number{Value: v(), Known: known()}, Interpreted: known()}
		sp.Prepared.InitialVoidRatio = v()
		sp.Prepared.Points = append(sp.Prepared.Points, oedometer.Point{EffectiveStress: 10, VoidRatio: 1})
		i := &sp.Interpretation
		for range rapid.IntRange(0, 5).Draw(r, "n") {
			sp.Prepared.Points = append(sp.Prepared.Points, oedometer.Point{EffectiveStress: v(), VoidRatio: v(), Branch: oedometer.Branch(rapid.IntRange(0, 3).Draw(r, "branch"))})
			i.Methods = append(i.Methods, oedometer.Method{ID: rapid.SampledFrom([]string{"two-line", "work", "x"}).Draw(r, "id"), Known: known(), Used: known(), Stress: v(), Low: v(), High: v(),
				Lines: []oedometer.DrawnLine{{Plane: oedometer.SemiLogPlane, X1: v(), Y1: v(), X2: v(), Y2: v()}, {Plane: oedometer.WorkPlane, X1: v(), Y1: v(), X2: v(), Y2: v()}}})
			i.Loading = append(i.Loading, oedometer.LoadingPoint{EffectiveStress: v(), Work: v()})
			i.Field.Stress, i.Field.VoidRatio = append(i.Field.Stress, v()), append(i.Field.VoidRatio, v())
			i.Loops = append(i.Loops, oedometer.LoopCheck{PastMaximum: v(), Ratio: v()})
		}
		i.Preconsolidation = oedometer.Yield{Low: v(), Best: v(), High: v(), Bound: oedometer.Bound(rapid.IntRange(0, 3).Draw(r, "bound"))}
		i.VirginSteepest = oedometer.VirginLine{Known: known(), Slope: v(), Intercept: v()}
		i.VirginLast = oedometer.VirginLine{Known: known(), Slope: v(), Intercept: v()}
		i.CompressionIndex = oedometer.Number{Value: v(), Known: known()}
		i.RecompressionIndex, i.SwellingIndex = oedometer.Index{Value: v(), Known: known()}, oedometer.Index{Value: v(), Known: known()}
		i.Field.Known, i.Field.CompressionIndex, i.Field.Ratio = known(), v(), v()
		i.InitialVoidRatio, i.MaxStressRatio, i.BracketLow, i.BracketHigh = v(), v(), v(), v()
		i.Apparent.Best = v()
		var b bytes.Buffer
		if err := Curve(&b, CurveInput{Specimen: sp, Settings: profile.DefaultSettings()}); err != nil {
			r.Fatal(err)
		}
		if s := b.String(); strings.Contains(s, "NaN") || strings.Contains(s, "Inf") {
			r.Fatal("not a number on the sheet")
		}
	})
}

func BenchmarkCurve(b *testing.B) {
	in := looped()
	for b.Loop() {
		if err := Curve(io.Discard, in); err != nil {
			b.Fatal(err)
		}
	}
}
