package sheet

import (
	"bytes"
	"encoding/xml"
	"io"
	"math"
	"os"
	"path/filepath"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"pastload/profile"
)

// depthCases are the sheets that every test looks at.
var depthCases = []struct {
	name string
	make func() DepthInput
}{
	{"estuary", estuary}, {"flagged", flagged}, {"crowded", crowded}, {"shallow", shallow}, {"deep", deep}, {"uplifted", uplifted}, {"bare", bare}, {"layered", layered},
}

// bare is a borehole of which nothing is known.
func bare() DepthInput { return DepthInput{Settings: profile.DefaultSettings()} }

func drawDepth(t testing.TB, in DepthInput) []byte {
	t.Helper()
	var b bytes.Buffer
	if err := Depth(&b, in); err != nil {
		t.Fatal(err)
	}
	return b.Bytes()
}

// golden compares a drawing with the one that was looked at and kept.
func golden(t *testing.T, name string, got []byte) {
	t.Helper()
	path := filepath.Join("testdata", name+".svg")
	if os.Getenv("UPDATE_GOLDEN") != "" {
		if err := os.WriteFile(path, got, 0o644); err != nil {
			t.Fatal(err)
		}
	}
	want, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	if !bytes.Equal(got, want) {
		t.Errorf("%s is not the drawing that was kept; look at it, and rewrite it with UPDATE_GOLDEN=1 if it is right", path)
	}
}

func TestDepthGolden(t *testing.T) {
	for _, name := range []string{"estuary", "crowded", "deep", "uplifted"} {
		for _, c := range depthCases {
			if c.name == name {
				golden(t, "depth-"+name, drawDepth(t, c.make()))
			}
		}
	}
}

func TestCurveGolden(t *testing.T) {
	golden(t, "curve", drawCurve(t, byHand()))
}

func TestDepthTwiceTheSame(t *testing.T) {
	for _, c := range depthCases {
		if !bytes.Equal(drawDepth(t, c.make()), drawDepth(t, c.make())) {
			t.Errorf("%s: two drawings of the same borehole differ", c.name)
		}
	}
}

func TestDepthConforms(t *testing.T) {
	for _, c := range depthCases {
		for _, page := range []Page{A4, A3} {
			in := c.make()
			in.Page = page
			conforms(t, c.name+" "+page.Name, drawDepth(t, in), page)
		}
	}
}

// allowed is the profile of package draw: elements with their attributes.
var allowed = map[string]string{
	"svg":    "width height viewBox role aria-labelledby font-family stroke-linecap stroke-linejoin xmlns xlink",
	"title":  "id",
	"desc":   "id",
	"line":   "x1 y1 x2 y2 stroke stroke-width stroke-dasharray",
	"rect":   "x y width height fill fill-opacity stroke stroke-width stroke-dasharray",
	"circle": "cx cy r fill fill-opacity stroke stroke-width stroke-dasharray",
	"path":   "d fill fill-opacity stroke stroke-width stroke-dasharray",
	"text":   "x y font-size font-weight fill text-anchor",
}

var (
	colourValue = regexp.MustCompile(`^(none|#[0-9A-F]{6})$`)
	numberValue = regexp.MustCompile(`^-?[0-9]+(\.[0-9]{0,1}[1-9])?$`)
	pathValue   = regexp.MustCompile(`^([MLZ]|-?[0-9]+(\.[0-9]{0,1}[1-9])?| )+$`)
)

// conforms reads a drawing as XML and holds each element against the profile:
// known attributes only, plain numbers, nothing off the page, no small text, no
// thin line.
func conforms(t *testing.T, name string, drawing []byte, page Page) {
	t.Helper()
	const smallest, thinnest = 2.46, 0.13 // 7 points in mm; the finest line of a drawing, mm
	dec := xml.NewDecoder(bytes.NewReader(drawing))
	for {
		token, err := dec.Token()
		if err == io.EOF {
			return
		}
		if err != nil {
			t.Fatalf("%s: %v", name, err)
		}
		e, ok := token.(xml.StartElement)
		if !ok {
			continue
		}
		names, ok := allowed[e.Name.Local]
		if !ok {
			t.Fatalf("%s: element %s is not in the profile", name, e.Name.Local)
		}
		for _, a := range e.Attr {
			if !strings.Contains(" "+names+" ", " "+a.Name.Local+" ") {
				t.Errorf("%s: %s has attribute %s, which is not in the profile", name, e.Name.Local, a.Name.Local)
			}
			switch a.Name.Local {
			case "fill", "stroke":
				if !colourValue.MatchString(a.Value) {
					t.Errorf("%s: colour %q", name, a.Value)
				}
			case "d":
				if !pathValue.MatchString(a.Value) {
					t.Errorf("%s: path %.80q", name, a.Value)
				}
			case "x", "y", "x1", "x2", "y1", "y2", "cx", "cy", "r", "font-size", "stroke-width", "fill-opacity":
				v, err := strconv.ParseFloat(a.Value, 64)
				if err != nil || !numberValue.MatchString(a.Value) {
					t.Errorf("%s: %s %s=%q is not a number of two decimals", name, e.Name.Local, a.Name.Local, a.Value)
				}
				if v < 0 || v > math.Max(page.Width, page.Height) {
					t.Errorf("%s: %s %s=%q is off the page", name, e.Name.Local, a.Name.Local, a.Value)
				}
				if a.Name.Local == "font-size" && v < smallest {
					t.Errorf("%s: text of %s mm is smaller than 7 points", name, a.Value)
				}
				if a.Name.Local == "stroke-width" && v < thinnest {
					t.Errorf("%s: line of %s mm", name, a.Value)
				}
			}
		}
	}
}

// texts returns the texts of a drawing.
func texts(t testing.TB, drawing []byte) []string {
	t.Helper()
	var doc struct {
		Texts []string `xml:"text"`
	}
	if err := xml.Unmarshal(drawing, &doc); err != nil {
		t.Fatal(err)
	}
	return doc.Texts
}

func TestDepthSays(t *testing.T) {
	cases := []struct {
		name   string
		in     DepthInput
		reason string
		want   []string
	}{
		{"estuary", estuary(), "zones in words with their probability, water, names, the round scale, the doubtful test",
			[]string{"overconsolidated", "P = 86 %", "P > 99 %", "water 1.20\u00a0m", "Soft estuarine", "Peat", "depth scale 1:100 at A4", "S6", "S8?", "2 of 5", "3.2", "≥ 500", "180"}},
		{"deep", deep(), "water above ground, values beyond the axis", []string{"water 2.50\u00a0m above ground", "13440", "underconsolidated (suspected)"}},
		{"shallow", shallow(), "no test", []string{" is known", "no "}},
		{"flagged", flagged(), "flags, assumptions where there is room", []string{"F1", "F4", "adopted"}},
	}
	for _, c := range cases {
		all := texts(t, drawDepth(t, c.in))
		for _, want := range c.want {
			found := false
			for _, s := range all {
				found = found || strings.Contains(s, strings.TrimSpace(want))
			}
			if !found {
				t.Errorf("%s: %q is not on the sheet (%s)", c.name, want, c.reason)
			}
		}
	}
}

func TestDepthHostileNames(t *testing.T) {
	for name, hostile := range map[string]string{
		"markup":     `</text><script>alert(1)</script><text x="0">`,
		"attributes": `" onload="x" a='b' & ]]> <!-- -->`,
		"style":      `fill:red;a=b`,
		"controls":   "a\x00b\x1b[31mc\u202eevil\u2066\ufffe\r\n\tz",
		"not utf-8":  "caf\xe9 \xff\xfe",
		"rtl":        "حفر ١ תל",
		"long":       strings.Repeat("very long name ", 700),
		"one word":   strings.Repeat("W", 10000),
	} {
		in := estuary()
		in.ID, in.Sources, in.Figure = hostile, hostile, hostile
		in.Borehole.Name, in.Borehole.Remark, in.Borehole.Drilled = hostile, hostile, hostile
		b := in.Borehole.Strata
		in.Borehole.Strata = append([]profile.Stratum(nil), b...)
		for i := range in.Borehole.Strata {
			in.Borehole.Strata[i].Name, in.Borehole.Strata[i].Soil = hostile, hostile
		}
		for i := range in.Profile.Tests {
			in.Profile.Tests[i].Specimen, in.Profile.Tests[i].Grade = hostile, hostile
		}
		in.Settings.Title = profile.TitleBlock{Project: hostile, Location: hostile, Client: hostile, Number: hostile, Title: hostile, Revision: hostile, Status: hostile, Date: hostile, PreparedBy: hostile, CheckedBy: hostile, ApprovedBy: hostile, Organisation: hostile, Datum: hostile, Coordinates: hostile}
		in.Flags = []Flag{{3, hostile}}
		out := drawDepth(t, in)
		conforms(t, name, out, A4)
		const most = 400_000 // bytes: a long name must not be written out again and again
		if len(out) > most {
			t.Errorf("%s: the sheet has %d bytes", name, len(out))
		}
	}
}

// TestDepthAnyNumbers draws boreholes of arbitrary numbers: whatever they are, the
// sheet is drawn and holds nothing that is not a number.
func TestDepthAnyNumbers(t *testing.T) {
	rapid.Check(t, func(r *rapid.T) {
		strange := rapid.OneOf(rapid.Float64(), rapid.Float64Range(-50, 500), rapid.SampledFrom([]float64{0, math.NaN(), math.Inf(1), math.Inf(-1), math.MaxFloat64, -1e-300, 1e-9}))
		v := func() float64 { return strange.Draw(r, "v") }
		n := func() profile.Number { return profile.Number{Value: v(), Known: rapid.Bool().Draw(r, "known")} }
		rng := func() profile.Range {
			return profile.Range{Low: v(), Best: v(), High: v(), Known: rapid.Bool().Draw(r, "range")}
		}
		in := DepthInput{Settings: profile.DefaultSettings(), Borehole: profile.Borehole{GroundLevel: n(), WaterTableDepth: n(), Surcharge: n(), CapillaryRise: n(), Easting: n(), Northing: n()}}
		for range rapid.IntRange(0, 4).Draw(r, "n") {
			in.Borehole.Strata = append(in.Borehole.Strata, profile.Stratum{Name: rapid.String().Draw(r, "name"), Soil: "silty clay", Top: v(), Base: v()})
			in.Borehole.Water = append(in.Borehole.Water, profile.PorePressure{Depth: n(), Pressure: n()})
			in.Borehole.Results = append(in.Borehole.Results, profile.Result{Depth: n(), WaterContent: n(), LiquidLimit: n(), PlasticLimit: n(), UnitWeight: n()})
			in.Profile.Points = append(in.Profile.Points, profile.Point{Depth: v(), UnitWeight: n(), Total: n(), Pore: n(), Effective: n(), Preconsolidation: rng(), OCR: rng(), CompressionIndex: rng()})
			in.Profile.Tests = append(in.Profile.Tests, profile.Test{Depth: v(), Effective: n(), Preconsolidation: rng(), Expected: rng(), OCR: n(), Bound: profile.Bound(rapid.IntRange(0, 2).Draw(r, "bound")), Verdict: profile.Conflicts, Specimen: "S"})
			in.Profile.Zones = append(in.Profile.Zones, profile.ZoneInterval{Top: v(), Base: v(), Zone: profile.NormallyConsolidated, Probability: n(), OCR: rng()})
			in.Profile.Results = append(in.Profile.Results, profile.DerivedResult{Depth: v(), MeasuredCc: n(), CorrelatedCc: rng()})
			in.Flags = append(in.Flags, Flag{v(), "F"})
			in.Design = append(in.Design, DesignLine{Depths: []float64{v(), v()}, Stresses: []float64{v(), v()}})
		}
		var b bytes.Buffer
		if err := Depth(&b, in); err != nil {
			r.Fatal(err)
		}
		if s := b.String(); strings.Contains(s, "NaN") || strings.Contains(s, "Inf") {
			r.Fatal("not a number on the sheet")
		}
	})
}

func TestSeriesToldApartWithoutColour(t *testing.T) {
	// Points are told apart by shape and fill, lines by dash and width.
	sheets := map[string][]series{
		"curve": append(append([]series(nil), branches[:]...), series{name: "virgin line", pen: virginPen}, series{name: "last points", pen: lastPen},
			series{name: "field curve", pen: fieldPen}, series{name: "σ′v0", pen: inSituPen}, series{name: "σ′p", pen: yieldPen}),
		"summary":       boreholeMarks,
		"constructions": {{name: "a", pen: constructionPens["two-line"]}, {name: "b", pen: constructionPens["casagrande"]}, {name: "c", pen: constructionPens["slope"]}, {name: "d", pen: constructionPens["pacheco-silva"]}},
		"depth":         append(append([]series(nil), grades...), totalLine, poreLine, effectiveLine, historyLine, designLine),
	}
	for sheet, all := range sheets {
		type look struct {
			point bool
			shape int
			solid bool
			dash  int
		}
		seen := map[look]string{}
		for _, s := range all {
			l := look{s.point, int(s.marker.Shape), s.marker.Solid, int(s.pen.Dash)}
			if other, ok := seen[l]; ok {
				t.Errorf("%s: %s and %s look the same in black and white", sheet, s.name, other)
			}
			seen[l] = s.name
		}
	}
}

func TestDepthRefusesLimitsThatDoNotRise(t *testing.T) {
	for _, l := range []profile.Limits{{}, {NormallyConsolidated: 1, LightlyOverconsolidated: 1, HeavilyOverconsolidated: 4}, {NormallyConsolidated: 1, LightlyOverconsolidated: 2, HeavilyOverconsolidated: math.NaN()}} {
		in := estuary()
		in.Settings.Limits = l
		var b bytes.Buffer
		if err := Depth(&b, in); err == nil || b.Len() > 0 {
			t.Errorf("limits %v: error %v and %d bytes; want an error and nothing written", l, err, b.Len())
		}
	}
}

func TestWriterErrorComesBack(t *testing.T) {
	if err := Depth(refusing{}, estuary()); err != io.ErrClosedPipe {
		t.Errorf("got %v, want the writer's error", err)
	}
}

type refusing struct{}

func (refusing) Write([]byte) (int, error) { return 0, io.ErrClosedPipe }

func BenchmarkDepth(b *testing.B) {
	in := estuary()
	for b.Loop() {
		if err := Depth(io.Discard, in); err != nil {
			b.Fatal(err)
		}
	}
}
