package intake

import (
	"math"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"

	"pastload/profile"
	"pastload/testdata"
)

// TestSingleTable: one results file is a whole site.
func TestSingleTable(t *testing.T) {
	dir := files{"marsh.csv": "depth (m),stratum,unit weight (kN/m3),water table depth (m),σ'p (kPa)\n" +
		"6,Soft clay,15.9,,70\n2,Crust,18,1.2,150\n4,Soft clay,16.1,1.2,60\n8.5,,16,,90\n"}.write(t)
	site, err := Read(filepath.Join(dir, "marsh.csv"), Options{})
	if err != nil {
		t.Fatal(err)
	}
	if len(site.Boreholes) != 1 || site.Name != "marsh" {
		t.Fatalf("%d boreholes in %q", len(site.Boreholes), site.Name)
	}
	b := site.Boreholes[0]
	if b.Name != "marsh" || b.WaterTableDepth.Value != 1.2 || len(b.Results) != 4 {
		t.Errorf("%q, water %v, %d results", b.Name, b.WaterTableDepth, len(b.Results))
	}
	type layer struct {
		name      string
		top, base float64
	}
	var got []layer
	for _, s := range b.Strata {
		got = append(got, layer{s.Name, s.Top, s.Base})
	}
	if want := []layer{{"Crust", 0, 3}, {"Soft clay", 3, 8.5}}; !slices.Equal(got, want) {
		t.Errorf("layers %v, want %v", got, want)
	}
	for _, want := range []string{"called \"marsh\" after the file", "half-way between their depths"} {
		if !slices.ContainsFunc(site.Notes, func(n profile.Note) bool { return strings.Contains(n.Message, want) }) {
			t.Errorf("no note says %q: %v", want, site.Notes)
		}
	}
}

// TestSingleOtherTable: a file that is named like a table is that table.
func TestSingleOtherTable(t *testing.T) {
	dir := files{"Oedometer.csv": "specimen,effective stress (kPa),void ratio\nU1,25,1.2\nU1,50,1.1\n"}.write(t)
	site, err := Read(filepath.Join(dir, "Oedometer.csv"), Options{Need: []Table{Oedometer}})
	if err != nil {
		t.Fatal(err)
	}
	if len(site.Curves) != 1 || len(site.Curves[0].Stages) != 2 || len(site.Boreholes) != 0 {
		t.Errorf("%d curves, %d boreholes", len(site.Curves), len(site.Boreholes))
	}
}

// TestOneStratum: a borehole without strata is one unnamed stratum down to the
// deepest thing that is known of it.
func TestOneStratum(t *testing.T) {
	site := mustRead(t, files{
		"results.csv":   "borehole,depth (m)\nBH1,2.0–2.5\n",
		"water.csv":     "borehole,depth (m),pore pressure (kPa)\nBH1,7,50\n",
		"oedometer.csv": "specimen,borehole,depth (m),effective stress (kPa),void ratio\nU1,BH2,3.5,25,1.2\n",
		"cone.csv":      "borehole,depth (m),qc (MPa)\nBH3,1,0.5\nBH3,12,0.6\n",
	})
	for name, base := range map[string]float64{"BH1": 7, "BH2": 3.5, "BH3": 12} {
		b := site.Borehole(name)
		if b == nil || len(b.Strata) != 1 || b.Strata[0].Name != "" || b.Strata[0].Base != base {
			t.Errorf("%s: %+v", name, b)
		}
	}
	if got := []string{site.Boreholes[0].Name, site.Boreholes[1].Name, site.Boreholes[2].Name}; !slices.Equal(got, []string{"BH1", "BH2", "BH3"}) {
		t.Errorf("order %v", got)
	}
}

// TestHead: u = γw·(head − (ground level − depth)).
func TestHead(t *testing.T) {
	site := mustRead(t, files{
		"settings.csv":  "setting,value,unit\nunit weight of water,10,kN/m3\n",
		"boreholes.csv": "borehole,ground level (m)\nBH1,2.8\n",
		"water.csv":     "borehole,depth (m),head level (m),pore pressure (kPa)\nBH1,12.6,3.7,\nBH1,5,,38\nBH1,9,2.0,70\n",
	})
	w := site.Boreholes[0].Water
	for i, want := range []float64{38, 70, 135} {
		// 10 × (3.7 − (2.8 − 12.6)) = 135: no more than rounding may be lost.
		if math.Abs(w[i].Pressure.Value-want) > 1e-12*want {
			t.Errorf("u at %v m is %v kPa, want %v", w[i].Depth.Value, w[i].Pressure.Value, want)
		}
	}
	// 10 × (2.0 − (2.8 − 9)) = 82 kPa contradicts 70 kPa, and that is said.
	if !slices.ContainsFunc(site.Notes, func(n profile.Note) bool {
		return n.Where == "water.csv:4:4" && n.Message == "70 kPa is used; the head level gives 82.0 kPa"
	}) {
		t.Errorf("notes %v", site.Notes)
	}
}

func TestOedometerTable(t *testing.T) {
	site := mustRead(t, files{"oedometer.csv": "sample,hole,depth (ft),stage,Load [kN/m²],height (mm),h0 (mm),Gs,w (%),test type,cv (m2/s),t90 (s),remark\n" +
		"U1,BH1,10,1,0,20,,,,,,,flooded at seating\nU2,BH1,20,,12.5,19.9,20,,,CRS,,,\nU1,BH1,10,2,25,19.8,20.0,#2.7,45,IL,1e-7,600,\nU1,BH1,10,rebound,12.5,19.9,,,,,,,swell\n"})
	if len(site.Curves) != 2 {
		t.Fatalf("%d curves", len(site.Curves))
	}
	c := site.Curves[0]
	if c.Specimen != "U1" || c.Borehole != "BH1" || c.Depth.Value != 3.048 || c.TestKind != "incremental 24 h" || c.Remark != "flooded at seating; swell" {
		t.Errorf("%+v", c)
	}
	if c.InitialHeight.Value != 20 || c.WaterContent.Value != 45 || c.SpecificGravity.Value != 2.7 || !c.SpecificGravity.Assumed {
		t.Errorf("%+v", c)
	}
	if len(c.Stages) != 2 || c.Stages[0].Kind != "" || c.Stages[1].Kind != "unload" || c.Stages[0].T90.Value != 10 {
		t.Errorf("stages %+v", c.Stages)
	}
	// 1e-7 m²/s over a year of 365.25 × 86 400 s.
	if cv := c.Stages[0].Consolidation.Value; math.Abs(cv-3.15576) > 1e-12 {
		t.Errorf("cv %v m²/year, want 3.15576", cv)
	}
	long := mustRead(t, files{"oedometer.csv": "specimen,depth (m),σ' (kPa),strain (decimal)\nU3,4.00–4.50,25,0.012\n"}).Curves[0]
	if long.Depth.Value != 4.25 || long.Stages[0].Strain.Value != 1.2 {
		t.Errorf("depth %v, strain %v", long.Depth.Value, long.Stages[0].Strain.Value)
	}
	if k := site.Curves[1].TestKind; k != "constant rate of strain" {
		t.Errorf("test kind %q", k)
	}
}

func TestHistoryAndDecisions(t *testing.T) {
	site := mustRead(t, files{
		"boreholes.csv": "borehole\nBH1\n",
		"strata.csv":    "borehole,top (m),base (m),stratum\nBH1,0,9,Soft clay\n",
		"history.csv":   "borehole,stratum,kind,size,unit,source\nBH1,,erosion,10,ft,survey\n,soft clay,former load,2,ksf,archive\n",
		"decisions.csv": "borehole,depth (m),specimen,quantity,decision,value (psf),seen,reason,by,date\n" +
			"BH1,2,U1,Pc',adopt,2000,>90,re-read,E.V.,2021-12-02\nSoft clay,,,POP,adopt value,500,,agreed,E.V.,2021-12-02\n",
	})
	if p := site.Past; len(p) != 2 || p[0].Kind != "removed ground" || p[0].Size.Value != 3.048 || p[1].Stratum != "soft clay" || math.Abs(p[1].Size.Value-95.76052) > 5e-6 {
		t.Errorf("%+v", p)
	}
	d := site.Decisions
	if len(d) != 2 || d[0].Quantity != "preconsolidation stress" || d[0].Decision != "adopt value" || math.Abs(d[0].Value.Value-95.76052) > 5e-6 {
		t.Fatalf("%+v", d)
	}
	if d[0].Seen.Bound != profile.AtLeast || d[0].Seen.Value != 90 || d[1].Quantity != "POP" {
		t.Errorf("%+v", d)
	}
}

func TestUnknownColumns(t *testing.T) {
	site := mustRead(t, files{
		"results.csv": "borehole,depth (m),undraned strength (kPa),colour\nBH1,2,40,grey\nBH1,3,,\n",
		"picture.png": "", "notes.txt": "later",
	})
	r := site.Boreholes[0].Results
	if want := []profile.Extra{{Header: "undraned strength (kPa)", Text: "40"}, {Header: "colour", Text: "grey"}}; !slices.Equal(r[0].Extra, want) || r[1].Extra != nil {
		t.Errorf("extra %v", r[0].Extra)
	}
	want := []profile.Note{
		{Where: "notes.txt", Message: "is not one of the tables and was not read"},
		{Where: "picture.png", Message: "is not one of the tables and was not read"},
		{Where: "results.csv:1:3", Message: `column "undraned strength (kPa)" is not known: its cells are kept as typed and not used; near it: "undrained strength"`},
		{Where: "results.csv:1:4", Message: `column "colour" is not known: its cells are kept as typed and not used`},
	}
	if !slices.Equal(site.Notes, want) {
		t.Errorf("notes %q", site.Notes)
	}
}

// TestLostLetter: Windows-1252 has no σ; what is left of the name is not guessed.
func TestLostLetter(t *testing.T) {
	site := mustRead(t, files{"results.csv": "borehole,depth (m),?'p (kPa)\nBH1,2,80\n"})
	if want := []profile.Note{{Where: "results.csv:1:3", Message: `column "?'p (kPa)" is not known: its cells are kept as typed and not used; a letter was lost when the file was saved: write the name in words`}}; !slices.Equal(site.Notes, want) {
		t.Errorf("notes %q", site.Notes)
	}
}

// TestDrawingNumber: a word that looks like a number decides no decimal mark.
func TestDrawingNumber(t *testing.T) {
	site := mustRead(t, files{"settings.csv": "setting,value\nnumber,\"1,200\"\nrevision,\"2,5\"\nwater level uncertainty,0.25\n"})
	if s := site.Settings; s.Title.Number != "1,200" || s.Title.Revision != "2,5" || s.WaterLevelUncertainty != 0.25 {
		t.Errorf("%+v", s)
	}
}

func TestStratumDisagrees(t *testing.T) {
	site := mustRead(t, files{
		"strata.csv":  "borehole,top (m),base (m),stratum\nBH1,0,3,Crust\nBH1,3,9,Clay\n",
		"results.csv": "borehole,depth (m),stratum\nBH1,2,clay\nBH1,3,Crust\nBH1,4,Clay\n",
	})
	if len(site.Notes) != 1 || site.Notes[0] != (profile.Note{Where: "results.csv:2:2", Message: `the results place 2 m of BH1 in "clay", the strata table in "Crust"`}) {
		t.Errorf("notes %q", site.Notes)
	}
}

// TestSpecimenElsewhere: a specimen that two tables place apart is noted, one
// cut from within its sample is not.
func TestSpecimenElsewhere(t *testing.T) {
	site := mustRead(t, files{
		"results.csv":   "borehole,depth (m),specimen\nBH1,4.00–4.45,U1\nBH1,6.0,U2\nBH2,6.0,U3\n",
		"oedometer.csv": "specimen,borehole,depth (m),effective stress (kPa),void ratio\nU1,BH1,4.3,25,1.2\nu2,BH1,5.0,25,1.2\nU3,BH1,,25,1.2\nU4,BH1,3,25,1.2\n",
	})
	want := []profile.Note{
		{Where: "oedometer.csv:3:1", Message: "specimen u2 is placed at 5.0 m in BH1, the results (results.csv:3:2) place it at 6.0 m in BH1"},
		{Where: "oedometer.csv:4:1", Message: "specimen U3 is placed in BH1, the results (results.csv:4:2) place it at 6.0 m in BH2"},
	}
	if !slices.Equal(site.Notes, want) {
		t.Errorf("notes %q", site.Notes)
	}
}

// TestBoreholeWithoutLayers: a strata table that forgets a borehole is noted.
func TestBoreholeWithoutLayers(t *testing.T) {
	site := mustRead(t, files{
		"strata.csv":  "borehole,top (m),base (m),stratum\nBH1,0,9,Clay\n",
		"results.csv": "borehole,depth (m)\nBH1,2\nBH2,2\n",
	})
	if want := []profile.Note{{Where: "strata.csv", Message: "BH2 has no layer in the strata table"}}; !slices.Equal(site.Notes, want) {
		t.Errorf("notes %q", site.Notes)
	}
	if s := site.Boreholes[1].Strata; len(s) != 1 || s[0].Name != "" || s[0].Base != 2 {
		t.Errorf("%+v", s)
	}
}

func TestConversionNotes(t *testing.T) {
	site := mustRead(t, files{"strata.csv": "borehole,top (ft),base (ft),stratum,bulk density (kg/m3)\nBH1,0,10,Clay,1800\n"})
	want := []string{"top: ft × 0.3048 = m (international foot)", "base: ft × 0.3048 = m (international foot)", "unit weight: kg/m3 × 0.00980665 = kN/m3 (mass density × 9.80665 m/s²)"}
	if !slices.Equal(site.Files[0].Notes, want) {
		t.Errorf("%q", site.Files[0].Notes)
	}
}

// TestTemplates: an empty site is no error, unless its rows are needed.
func TestTemplates(t *testing.T) {
	f := files{}
	for _, doc := range Tables() {
		f[string(doc.Table)+".csv"] = Template(string(doc.Table))
	}
	site := mustRead(t, f)
	if len(site.Files) != 9 || len(site.Boreholes) != 0 || len(site.Notes) != 0 {
		t.Errorf("%d files, %d boreholes, notes %v", len(site.Files), len(site.Boreholes), site.Notes)
	}
	want := "oedometer.csv: oedometer: no rows; want at least one row beneath the header\nresults.csv: results: no rows; want at least one row beneath the header"
	if got := problemsOf(t, f, Options{Need: []Table{Results, Oedometer}}); got != want {
		t.Errorf("got %s", got)
	}
	if Template("colours") != "" {
		t.Error("a template of no table")
	}
}

// TestDemo: the worked scenario reads without a problem and without a remark,
// from the file system in the binary.
func TestDemo(t *testing.T) {
	site, err := ReadFS(testdata.Demo(), "demo", Options{Need: []Table{Boreholes, Strata, Water, Results, Oedometer, Cone}})
	if err != nil {
		t.Fatal(err)
	}
	if len(site.Boreholes) != 3 || len(site.Files) != 9 || len(site.Curves) == 0 || len(site.Soundings) == 0 {
		t.Errorf("%d boreholes, %d files, %d curves, %d soundings", len(site.Boreholes), len(site.Files), len(site.Curves), len(site.Soundings))
	}
	for _, n := range site.Notes {
		t.Errorf("%s: %s", n.Where, n.Message)
	}
}

// TestOpenData reads a table of real clay sites, where it is present.
func TestOpenData(t *testing.T) {
	site, err := Read("../../../shared/data/clay-sites.csv", Options{})
	if err != nil && strings.Contains(err.Error(), "there is no such file") {
		t.Skip("the open data table is not here")
	}
	if err != nil {
		t.Fatal(err)
	}
	n, yield := 0, 0
	for _, b := range site.Boreholes {
		for _, r := range b.Results {
			n++
			if r.Preconsolidation.Known {
				yield++
			}
		}
	}
	// As its own description counts them.
	if len(site.Boreholes) != 15 || n != 232 || yield != 211 {
		t.Errorf("%d sites, %d depths, %d preconsolidation stresses; want 15, 232, 211", len(site.Boreholes), n, yield)
	}
}

// TestManyProblems: no more problems are printed than can be read.
func TestManyProblems(t *testing.T) {
	got := problemsOf(t, files{"results.csv": "borehole,depth (m)\n" + strings.Repeat("BH1,x\n", 250)}, Options{})
	lines := strings.Split(got, "\n")
	if len(lines) != 201 || lines[200] != "… and 50 more" {
		t.Errorf("%d lines, the last %q", len(lines), lines[len(lines)-1])
	}
}

// TestTooMuch: what no site investigation holds is refused in words.
func TestTooMuch(t *testing.T) {
	for _, c := range []struct{ name, data, want string }{
		{"rows", "borehole,depth (m)\n" + strings.Repeat("BH1,1\n", maxRows+1), "results.csv:200002:1: results: more than 200000 rows; want a table of that many rows at most"},
		{"fields", "borehole,depth (m)" + strings.Repeat(",x", maxFields) + "\n", "results.csv:1:1: results: a row of 502 fields; want at most 500"},
		{"no text", "borehole\x00,depth (m)\n", "results.csv: results: holds null characters, it is no text; want a text file, e.g. saved as CSV UTF-8"},
	} {
		t.Run(c.name, func(t *testing.T) {
			if got := problemsOf(t, files{"results.csv": c.data}, Options{}); got != c.want {
				t.Errorf("got %s", got)
			}
		})
	}
}

// TestTooLarge: a file of more than 64 MB is not even opened.
func TestTooLarge(t *testing.T) {
	dir := files{"results.csv": "borehole,depth (m)\n"}.write(t)
	if err := os.Truncate(filepath.Join(dir, "results.csv"), maxFileSize+1); err != nil {
		t.Fatal(err)
	}
	_, err := Read(dir, Options{})
	if want := "results.csv: results: 64.0 MB; want at most 64 MB"; err == nil || err.Error() != want {
		t.Errorf("got %v", err)
	}
}

func TestNoSuchSite(t *testing.T) {
	_, err := Read("no/such/site", Options{})
	want := "no/such/site: there is no such file or folder; want a folder of CSV tables, a CSV file or an .xlsx workbook"
	if err == nil || err.Error() != want {
		t.Errorf("got %v", err)
	}
}
