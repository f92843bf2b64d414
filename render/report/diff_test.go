package report

import (
	"errors"
	"fmt"
	"strings"
	"testing"
	"testing/fstest"

	"pgregory.net/rapid"

	"pastload/profile"
	"pastload/profile/intake"
)

// issue makes the printed tables of a small report.
func issue(t testing.TB, files map[string]string) []Printed {
	t.Helper()
	dir := fstest.MapFS{}
	for name, text := range files {
		dir[name+".csv"] = &fstest.MapFile{Data: []byte(text)}
	}
	p, err := ReadPrinted(dir)
	if err != nil {
		t.Fatal(err)
	}
	return p
}

func TestDifferences(t *testing.T) {
	const head = "borehole,depth_m,specimen,water_content_pct,remark,source\n"
	const zones = "borehole,top_m,base_m,zone,or_zone,probability\n"
	cases := []struct {
		name, table, old, updated string
		want                      []string // kind, place and values of each change
	}{
		{"nothing", "results", head + "BH1,3.60,P3,59.8,,r.csv:2:2\n", head + "BH1,3.60,P3,59.8,,r.csv:7:2\n", nil},
		{"the same number with more digits", "results", head + "BH1,3.60,P3,59.8,,\n", head + "BH1,3.60,P3,59.80,,\n", nil},
		{"a value", "results", head + "BH1,3.60,P3,59.8,,\n", head + "BH1,3.60,P3,58.9,,\n", []string{"changed BH1 3.60 P3 water content (%): 59.8 → 58.9"}},
		{"a value now missing", "results", head + "BH1,3.60,P3,59.8,,\n", head + "BH1,3.60,P3,,,\n", []string{"changed BH1 3.60 P3 water content (%): 59.8 → "}},
		{"order of rows", "results", head + "BH1,3.60,P3,59.8,,\nBH1,4.60,P4,58,,\n", head + "BH1,4.60,P4,58,,\nBH1,3.60,P3,59.8,,\n", nil},
		{"a row more", "results", head + "BH1,3.60,P3,59.8,,\n", head + "BH1,3.60,P3,59.8,,\nBH2,2.00,,41,moist,\n", []string{"added BH2 2.00  :  → water content (%) 41; remark moist"}},
		{"a row less", "results", head + "BH1,3.60,P3,59.8,,\n", head, []string{"removed BH1 3.60 P3 : water content (%) 59.8 → "}},
		{"two rows of one place", "results", head + "BH1,3.00,,50,,\nBH1,3.00,,51,,\n", head + "BH1,3.00,,50,,\nBH1,3.00,,52,,\n", []string{"changed BH1 3.00  water content (%): 51 → 52"}},
		{"a column more", "results", "borehole,depth_m,specimen\nBH1,3.00,\n", "borehole,depth_m,specimen,liquid_limit_pct\nBH1,3.00,,67\n", []string{"changed BH1 3.00  liquid limit (%):  → 67"}},
		{"a setting", "settings", "setting,value,unit,note\nx,4,,\n", "setting,value,unit,note\nx,3.5,,\n", []string{"changed    value: 4 → 3.5"}},
		{"a verdict", "tests", "borehole,depth_m,specimen,verdict,z\nBH1,3.60,P3,agrees,1\n", "borehole,depth_m,specimen,verdict,z\nBH1,3.60,P3,doubtful,2\n", []string{"changed BH1 3.60 P3 verdict: agrees → doubtful"}},
		{"a zone", "zones", zones + "BH1,0,2,heavy,,0.9\nBH1,2,8,light,,0.9\n", zones + "BH1,0,2,heavy,,0.8\nBH1,2,6,light,,0.9\nBH1,6,8,light,normal,0.6\n", []string{"changed BH1   zone: light → light or normal"}},
		{"a limit moved by a hair", "zones", zones + "BH1,0,2,heavy,,0.9\nBH1,2,8,light,,0.9\n", zones + "BH1,0,2.05,heavy,,0.9\nBH1,2.05,8,light,,0.9\n", nil},
		{"a zone more", "zones", zones + "BH1,0,2,heavy,,0.9\n", zones + "BH1,0,2,heavy,,0.9\nBH1,2,8,light,,0.9\n", []string{"added BH1   zone:  → light"}},
		{"a file", "sources", "file,rows,sha256\nr.csv,2," + strings.Repeat("a", 64) + "\n", "file,rows,sha256\nr.csv,2," + strings.Repeat("b", 64) + "\n", []string{"changed    sha256: aaaaaaaaaaaa… → bbbbbbbbbbbb…"}},
	}
	for _, c := range cases {
		t.Run(c.name, func(t *testing.T) {
			changes, _, err := Differences(issue(t, map[string]string{c.table: c.old}), issue(t, map[string]string{c.table: c.updated}))
			if err != nil {
				t.Fatal(err)
			}
			var got []string
			for _, x := range changes {
				got = append(got, fmt.Sprintf("%s %s %s %s %s: %s → %s", x.Kind, x.Borehole, x.Depth, x.Specimen, x.Quantity, x.Old, x.New))
			}
			if fmt.Sprint(got) != fmt.Sprint(c.want) {
				t.Errorf("got  %q\nwant %q", got, c.want)
			}
		})
	}
}

func TestDifferencesRefuse(t *testing.T) {
	si := issue(t, map[string]string{"tests": "borehole,depth_m,specimen\n"})
	us := issue(t, map[string]string{"tests": "borehole,depth_ft,specimen\n"})
	if _, _, err := Differences(si, us); !errors.Is(err, ErrOtherUnits) {
		t.Errorf("error %v, want other units", err)
	}
	if _, _, err := Differences(si, issue(t, map[string]string{"tests": "borehole,specimen\nBH1,P3\n"})); err == nil || !strings.Contains(err.Error(), "no column depth") {
		t.Errorf("error %v, want a missing column", err)
	}
	bad := issue(t, map[string]string{"zones": "borehole,top_m,base_m,zone,or_zone\nBH1,deep,2,a,\n"})
	if _, _, err := Differences(bad, bad); err == nil {
		t.Error("a zone without a depth is compared")
	}
	for name, text := range map[string]string{"empty": "", "ragged": "a,b\n1\n", "open quote": "a\n\"x\n"} {
		if _, err := ReadPrinted(fstest.MapFS{"tests.csv": &fstest.MapFile{Data: []byte(text)}}); err == nil {
			t.Errorf("%s: no error", name)
		}
	}
	_, remarks, err := Differences(si, issue(t, map[string]string{"settings": "setting,value\n"}))
	if err != nil || len(remarks) != 1 {
		t.Errorf("remarks %q, error %v; want one remark on the settings", remarks, err)
	}
}

// TestDifferencesMirror: what is added one way is removed the other way.
func TestDifferencesMirror(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		table := func(label string) []Printed {
			p := Printed{Name: "results", Header: []string{"borehole", "depth_m", "specimen", "void_ratio"}}
			for range rapid.IntRange(0, 5).Draw(rt, label) {
				p.Rows = append(p.Rows, []string{
					rapid.SampledFrom([]string{"BH1", "BH2"}).Draw(rt, "borehole"), rapid.SampledFrom([]string{"1.00", "2.00"}).Draw(rt, "depth"),
					rapid.SampledFrom([]string{"", "P1"}).Draw(rt, "specimen"), rapid.SampledFrom([]string{"", "0.9", "1.1"}).Draw(rt, "e"),
				})
			}
			return []Printed{p}
		}
		a, b := table("old"), table("new")
		count := func(x, y []Printed) map[string]int {
			changes, _, err := Differences(x, y)
			if err != nil {
				rt.Fatal(err)
			}
			n := map[string]int{}
			for _, c := range changes {
				n[c.Kind]++
			}
			return n
		}
		there, back := count(a, b), count(b, a)
		if there["added"] != back["removed"] || there["removed"] != back["added"] || there["changed"] != back["changed"] {
			rt.Errorf("%v there, %v back", there, back)
		}
		if same := count(a, a); len(same) != 0 {
			rt.Errorf("a table differs from itself: %v", same)
		}
	})
}

// TestDemoDiffersFromItselfInNothing prints the demo's tables and reads them back.
func TestDemoDiffersFromItselfInNothing(t *testing.T) {
	p := demo(t)
	for _, u := range []Units{SI, US} {
		a, err := Print(append(Tables(Content{Profile: p}), SettingsTable(p.Site)), u)
		if err != nil {
			t.Fatal(err)
		}
		changes, remarks, err := Differences(a, a)
		if err != nil || len(changes) > 0 || len(remarks) > 0 {
			t.Errorf("%v %v %v", changes, remarks, err)
		}
		if ChangesSummary(changes) != "Nothing has changed." {
			t.Errorf("summary %q", ChangesSummary(changes))
		}
	}
}

func TestBriefCutsLongTextAlone(t *testing.T) {
	long := strings.Repeat("σ", 100)
	in := []Change{{Old: long, New: "5"}}
	out := Brief(in)
	if r := []rune(out[0].Old); len(r) != 48 || out[0].New != "5" || in[0].Old != long {
		t.Errorf("%d characters, new %q", len(r), out[0].New)
	}
}

func ExampleDifferences() {
	site, err := intake.Read("../../testdata/demo", intake.Options{})
	if err != nil {
		fmt.Println(err)
		return
	}
	print := func() []Printed {
		p, err := profile.Build(site, profile.Options{})
		if err != nil {
			fmt.Println(err)
			return nil
		}
		tables, err := Print([]*Table{Layers(p.Site), Results(p.Site)}, SI)
		if err != nil {
			fmt.Println(err)
		}
		return tables
	}
	old := print()
	site.Boreholes[0].Results[0].WaterContent.Value = 41
	changes, _, err := Differences(old, print())
	if err != nil {
		fmt.Println(err)
	}
	for _, c := range changes {
		fmt.Println(c.Table, c.Kind, c.Borehole, c.Depth, c.Specimen, c.Quantity, c.Old, c.New)
	}
	// Output:
	// results changed BH1 1.20 BH1-P1 water content (%) 38.3 41.0
}
