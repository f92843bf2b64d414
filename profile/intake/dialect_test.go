package intake

import (
	"strings"
	"testing"

	"pastload/profile"
)

// plain is a small site in the plainest dialect; the others must tell the same.
var plain = files{
	"boreholes.csv": "borehole,ground level (m),water table depth (m)\nBH1,12.5,1.5\n",
	"strata.csv": "borehole,top (m),base (m),stratum,unit weight (kN/m3)\n" +
		"BH1,0,3,Crust,18.5\nBH1,3,9.144,Soft clay,16.25\n",
	"results.csv": "borehole,depth (m),specimen,water content (%),preconsolidation stress (kPa),undrained strength (kPa),remark\n" +
		"BH1,2.5,U1,45.5,120.5,>40,stiff\nBH1,4.25,U2,62,85,-,\"firm, grey\"\n",
}

func TestDialects(t *testing.T) {
	want := mustRead(t, plain)
	comma := func(s string) string {
		// Every comma of the plain site parts fields, save the one in quotes.
		s = strings.ReplaceAll(s, ", grey", "\x00")
		s = strings.NewReplacer(",", ";", ".", ",").Replace(s)
		return strings.ReplaceAll(s, "\x00", ", grey")
	}
	each := func(change func(string) string) files {
		f := files{}
		for name, data := range plain {
			f[name] = change(data)
		}
		return f
	}
	for _, c := range []struct {
		name     string
		files    files
		encoding string
	}{
		{"byte-order mark", each(func(s string) string { return "\ufeff" + s }), "UTF-8 with byte-order mark"},
		{"carriage returns", each(func(s string) string { return strings.ReplaceAll(s, "\n", "\r\n") }), "UTF-8"},
		{"carriage returns alone", each(func(s string) string { return strings.ReplaceAll(s, "\n", "\r") }), "UTF-8"},
		{"semicolons and decimal comma", each(comma), "UTF-8"},
		{"sep line", each(func(s string) string { return "sep=;\r\n" + comma(s) }), "UTF-8"},
		{"UTF-16 little end first", each(func(s string) string { return utf16(s, false) }), "UTF-16"},
		{"UTF-16 big end first", each(func(s string) string { return utf16(comma(s), true) }), "UTF-16"},
		{"blank lines and empty fields at the end", each(func(s string) string { return "\n" + strings.ReplaceAll(s, "\n", ",,\n,,,,,\n") }), "UTF-8"},
		{"tabs, other endings and capitals", files{
			"Boreholes.TSV": strings.ReplaceAll(plain["boreholes.csv"], ",", "\t"),
			"STRATA.txt":    strings.ReplaceAll(plain["strata.csv"], ",", "\t"),
			"results.csv":   plain["results.csv"],
		}, "UTF-8"},
		{"units of another country", imperial, "UTF-8"},
	} {
		t.Run(c.name, func(t *testing.T) {
			got := mustRead(t, c.files)
			if d := differ(got, want); d != "" {
				t.Errorf("%s", d)
			}
			if e := got.Files[0].Encoding; e != c.encoding {
				t.Errorf("encoding %q, want %q", e, c.encoding)
			}
		})
	}
}

// imperial is the plain site in feet, pounds, densities and fractions, to more
// digits than a float64 holds. 1 ft = 0.3048 m and 1 lbf = 0.45359237 kg ×
// 9.80665 m/s² are exact by definition; the quotients are worked out by hand
// from these, not by the program.
var imperial = files{
	"boreholes.csv": "Hole ID,Ground Elevation [ft],GWT depth (ft)\n" +
		"BH1,41.0104986876640419947506561680,4.92125984251968503937007874016\n",
	"strata.csv": "borehole,from_ft,to_ft,layer,bulk density (Mg/m3)\n" +
		"BH1,0,9.84251968503937007874015748031,Crust,1.88647499400916724875467157490\n" +
		"BH1,9.84251968503937007874015748031,30,Soft clay,1.65703884608913339417640070768\n",
	"results.csv": "bh,\"depth, ft\",sample no,w (decimal),Pc′ [psf],\"Su, ksf\",remarks\n" +
		"BH1,8.20209973753280839895013123360,U1,0.455,2516.69482509459030135639031701,>0.835417369326005079288428320999,stiff\n" +
		"BH1,13.9435695538057742782152230971,U2,.62,1775.26190981776079348791018212,n/a,\"firm, grey\"\n",
}

func TestWindows1252(t *testing.T) {
	site := mustRead(t, files{"results.csv": "borehole,depth (m),clay (%),remark\nBH1,2,40,caf\xe9 \x96 near\n"})
	if got := site.Boreholes[0].Results[0].Remark; got != "café – near" {
		t.Errorf("remark %q", got)
	}
	if e := site.Files[0].Encoding; e != "Windows-1252" {
		t.Errorf("encoding %q", e)
	}
	if len(site.Notes) != 1 || !strings.Contains(site.Notes[0].Message, "Windows-1252") {
		t.Errorf("notes %v", site.Notes)
	}
}

func TestUnitRow(t *testing.T) {
	site := mustRead(t, files{"results.csv": "HOLE,DEPTH,Yield stress,LL,Cc\nUNIT,ft,psf,%,-\nBH1,10,2000,55,0.4\n"})
	r := site.Boreholes[0].Results[0]
	if got, want := r.Depth.Value, 3.048; got != want {
		t.Errorf("depth %v, want %v", got, want)
	}
	if r.Depth.Source.Line != 3 || r.Depth.Source.Column != 2 || r.Depth.Source.Unit != "ft" || r.Depth.Source.Text != "10" {
		t.Errorf("source %+v", r.Depth.Source)
	}
	if r.LiquidLimit.Value != 55 || r.CompressionIndex.Value != 0.4 {
		t.Errorf("LL %v, Cc %v", r.LiquidLimit.Value, r.CompressionIndex.Value)
	}
}

func TestCells(t *testing.T) {
	read := func(cell string) profile.Number {
		site := mustRead(t, files{"results.csv": "borehole\tdepth (m)\tundrained strength (kPa)\tsensitivity\nBH1\t2.5\t" + cell + "\t1.5\n"})
		n := site.Boreholes[0].Results[0].UndrainedStrength
		n.Source = nil
		return n
	}
	for _, c := range []struct {
		cell string
		want profile.Number
	}{
		{"", profile.Number{}},
		{"-", profile.Number{}},
		{"–", profile.Number{}},
		{"N/A", profile.Number{}},
		{"n.m.", profile.Number{}},
		{"0", profile.Known(0)},
		{"-0", profile.Known(0)},
		{" 45.5\u00a0", profile.Known(45.5)},
		{"\u200b45.5", profile.Known(45.5)},
		{"+45", profile.Known(45)},
		{"4.55e1", profile.Known(45.5)},
		{"4.55E+01", profile.Known(45.5)},
		{"45.", profile.Known(45)},
		{".5", profile.Known(0.5)},
		{"010", profile.Known(10)},
		{"1 234.5", profile.Known(1234.5)},
		{"1\u202f234.5", profile.Known(1234.5)},
		{"1'234.5", profile.Known(1234.5)},
		{"1,234.5", profile.Known(1234.5)},
		{"1,234", profile.Known(1234)}, // the depth's point decides the file
		{"<0.5", profile.Number{Value: 0.5, Known: true, Bound: profile.AtMost}},
		{"> 50", profile.Number{Value: 50, Known: true, Bound: profile.AtLeast}},
		{"≥50", profile.Number{Value: 50, Known: true, Bound: profile.AtLeast}},
		{"#2.65", profile.Number{Value: 2.65, Known: true, Assumed: true}},
		{"#>50", profile.Number{Value: 50, Known: true, Bound: profile.AtLeast, Assumed: true}},
	} {
		t.Run(c.cell, func(t *testing.T) {
			if got := read(c.cell); got != c.want {
				t.Errorf("got %+v, want %+v", got, c.want)
			}
		})
	}
}

func TestNonPlastic(t *testing.T) {
	site := mustRead(t, files{"results.csv": "borehole,depth (m),LL (%),PL (%),PI (%)\nBH1,2,22,NP,np\n"})
	r := site.Boreholes[0].Results[0]
	if !r.NonPlastic || r.PlasticLimit.Known || r.PlasticityIndex.Known || r.LiquidLimit.Value != 22 {
		t.Errorf("%+v", r)
	}
}

func TestDepthRange(t *testing.T) {
	for _, cell := range []string{"4.00–4.45", "4.00-4.45", "4.00 to 4.45", "4.00 — 4.45"} {
		site := mustRead(t, files{"results.csv": "borehole,depth (m)\nBH1," + cell + "\n"})
		r := site.Boreholes[0].Results[0]
		if r.Depth.Value != 4 || r.DepthBase.Value != 4.45 || !r.DepthBase.Known {
			t.Errorf("%s: %v to %v", cell, r.Depth.Value, r.DepthBase.Value)
		}
	}
	site := mustRead(t, files{"results.csv": "borehole;depth (m)\nBH1;4,00–4,45\n"})
	if r := site.Boreholes[0].Results[0]; r.Depth.Value != 4 || r.DepthBase.Value != 4.45 {
		t.Errorf("decimal comma: %v to %v", r.Depth.Value, r.DepthBase.Value)
	}
}

func TestDecimalOption(t *testing.T) {
	f := files{"results.csv": "borehole;depth (m);σ'p (kPa)\nBH1;2;1,234\n"}
	for _, c := range []struct {
		decimal string
		want    float64
	}{{".", 1234}, {",", 1.234}} {
		site, err := Read(f.write(t), Options{Decimal: c.decimal})
		if err != nil {
			t.Fatal(err)
		}
		if got := site.Boreholes[0].Results[0].Preconsolidation.Value; got != c.want {
			t.Errorf("decimal %q: %v, want %v", c.decimal, got, c.want)
		}
	}
	if got := problemsOf(t, f, Options{Decimal: "x"}); got != `site: decimal: "x" is not a decimal mark; want "." or ","` {
		t.Error(got)
	}
}
