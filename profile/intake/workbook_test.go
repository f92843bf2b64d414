package intake

import (
	"path/filepath"
	"strings"
	"testing"

	"github.com/xuri/excelize/v2"

	"pastload/profile"
)

// book makes a workbook named site.xlsx with the sheets given, and returns its
// path. A string beginning with "=" is a formula that was never calculated.
func book(t testing.TB, sheets map[string][][]any, change func(*excelize.File)) string {
	t.Helper()
	f := excelize.NewFile()
	for name, rows := range sheets {
		if _, err := f.NewSheet(name); err != nil {
			t.Fatal(err)
		}
		for i, row := range rows {
			for j, v := range row {
				cell, err := excelize.CoordinatesToCellName(j+1, i+1)
				if err != nil {
					t.Fatal(err)
				}
				if s, ok := v.(string); ok && strings.HasPrefix(s, "=") {
					err = f.SetCellFormula(name, cell, s[1:])
				} else if v != nil {
					err = f.SetCellValue(name, cell, v)
				}
				if err != nil {
					t.Fatal(err)
				}
			}
		}
	}
	if change != nil {
		change(f)
	}
	path := filepath.Join(t.TempDir(), "site.xlsx")
	if err := f.SaveAs(path); err != nil {
		t.Fatal(err)
	}
	return path
}

func plainBook() map[string][][]any {
	return map[string][][]any{
		"Boreholes": {{"borehole", "ground level (m)", "water table depth (m)"}, {"BH1", 12.5, 1.5}},
		"strata":    {{"borehole", "top (m)", "base (m)", "stratum", "unit weight (kN/m3)"}, {"BH1", 0, 3, "Crust", 18.5}, {}, {"BH1", 3, 9.144, "Soft clay", 16.25}},
		"results": {{"borehole", "depth (m)", "specimen", "water content (%)", "preconsolidation stress (kPa)", "undrained strength (kPa)", "remark"},
			{"BH1", 2.5, "U1", 45.5, 120.5, ">40", "stiff"}, {"BH1", 4.25, "U2", 62, 85, nil, "firm, grey"}},
	}
}

// TestWorkbook: a workbook tells the same site as the CSV files, and its values
// are those stored, not those displayed.
func TestWorkbook(t *testing.T) {
	path := book(t, plainBook(), func(f *excelize.File) {
		style, err := f.NewStyle(&excelize.Style{NumFmt: 1}) // no decimals displayed
		if err != nil {
			t.Fatal(err)
		}
		if err := f.SetCellStyle("results", "B2", "E3", style); err != nil {
			t.Fatal(err)
		}
	})
	site, err := Read(path, Options{})
	if err != nil {
		t.Fatal(err)
	}
	want := mustRead(t, plain)
	if d := differ(site, want); d != "" {
		t.Error(d)
	}
	src := site.Boreholes[0].Strata[1].Source
	if src.String() != "site.xlsx:strata:4:2" {
		t.Errorf("source %s", src)
	}
	found := false
	for _, n := range site.Notes {
		found = found || n.Where == "site.xlsx:Sheet1" && strings.Contains(n.Message, "not one of the tables")
	}
	if !found {
		t.Errorf("the other sheet is not noted: %v", site.Notes)
	}
}

func TestBrokenWorkbooks(t *testing.T) {
	edit := func(sheet string, row, column int, v any) map[string][][]any {
		b := plainBook()
		b[sheet][row-1][column-1] = v
		return b
	}
	for _, c := range []struct {
		name   string
		sheets map[string][][]any
		want   string
	}{
		{"word", edit("results", 2, 5, "abc"), `site.xlsx:results:2:5: preconsolidation stress: "abc" is not a number; want kilopascals, e.g. 125.0`},
		{"formula", edit("results", 3, 5, "=D3*2"), "site.xlsx:results:3:5: preconsolidation stress (kPa): cell E3 holds a formula that was never calculated; want the workbook opened in a spreadsheet program and saved"},
		{"text with a comma", edit("results", 2, 5, "1,205"), `site.xlsx:results:2:5: preconsolidation stress: "1,205" can be 1205 or 1.205; want numbers without a mark between thousands, or the decimal mark stated with --decimal "." or --decimal ","`},
		{"no unit", edit("strata", 1, 5, "unit weight"), `site.xlsx:strata:1:5: unit weight: no unit in the header; want "unit weight (kN/m3)" or another unit of weight per volume: kN/m3, pcf, Mg/m3, t/m3, g/cm3, kg/m3`},
		{"gap", edit("strata", 4, 2, 4), "site.xlsx:strata:4:2: top: 4 leaves a gap below the layer of line 2 (0 to 3 m); want layers that meet"},
		{"empty sheet", map[string][][]any{"results": nil}, "site.xlsx:results: results: the sheet is empty; want a header row with the columns borehole, depth (m)"},
		{"no table", map[string][][]any{"data": {{1}}}, "site.xlsx: no sheet is named like a table; want sheets named boreholes, strata, water, results, oedometer, cone, history, decisions or settings"},
	} {
		t.Run(c.name, func(t *testing.T) {
			_, err := Read(book(t, c.sheets, nil), Options{})
			if err == nil || err.Error() != c.want {
				t.Errorf("got\n%v\nwant\n%s", err, c.want)
			}
		})
	}
}

func TestWorkbookThatIsNone(t *testing.T) {
	dir := files{"site.xlsx": "PK\x03\x04 and nothing else"}.write(t)
	_, err := Read(filepath.Join(dir, "site.xlsx"), Options{})
	want := "site.xlsx: is not a workbook that can be read; want a workbook without a password, saved as .xlsx"
	if err == nil || err.Error() != want {
		t.Errorf("got %v, want %s", err, want)
	}
}

// TestWorkbookDates: a day that a workbook stores as a number becomes an ISO
// date; 44451 is 2021-09-12 counted from 1900 and 2025-09-13 from 1904.
func TestWorkbookDates(t *testing.T) {
	sheets := map[string][][]any{"boreholes": {{"borehole", "drilled"}, {"BH1", 44451}, {"BH2", "2021-09-16"}}}
	for _, c := range []struct {
		from1904 bool
		want     string
	}{{false, "2021-09-12"}, {true, "2025-09-13"}} {
		path := book(t, sheets, func(f *excelize.File) {
			if err := f.SetWorkbookProps(&excelize.WorkbookPropsOptions{Date1904: &c.from1904}); err != nil {
				t.Fatal(err)
			}
		})
		site, err := Read(path, Options{})
		if err != nil {
			t.Fatal(err)
		}
		if got := site.Boreholes[0].Drilled; got != c.want {
			t.Errorf("from 1904 %v: %s, want %s", c.from1904, got, c.want)
		}
		if got := site.Boreholes[1].Drilled; got != "2021-09-16" {
			t.Errorf("text date: %s", got)
		}
	}
}

// TestWorkbookPercent: a cell displayed as 45.5 % is 45.5 % and not 0.455 %,
// whether its header asks for percent or for a fraction.
func TestWorkbookPercent(t *testing.T) {
	sheets := map[string][][]any{"results": {{"borehole", "depth (m)", "w (%)", "LL (decimal)", "PL (decimal)"}, {"BH1", 2, 0.455, 0.55, 0.25}, {"BH1", 3, 46, "57%", 0.26}}}
	path := book(t, sheets, func(f *excelize.File) {
		style, err := f.NewStyle(&excelize.Style{NumFmt: 10}) // 0.00%
		if err != nil {
			t.Fatal(err)
		}
		if err := f.SetCellStyle("results", "C2", "D2", style); err != nil {
			t.Fatal(err)
		}
	})
	site, err := Read(path, Options{})
	if err != nil {
		t.Fatal(err)
	}
	for i, want := range [][3]float64{{45.5, 55, 25}, {46, 57, 26}} {
		r := site.Boreholes[0].Results[i]
		if got := [3]float64{r.WaterContent.Value, r.LiquidLimit.Value, r.PlasticLimit.Value}; got != want {
			t.Errorf("row %d: %v, want %v", i+2, got, want)
		}
	}
}

func TestWorkbookRemarks(t *testing.T) {
	path := book(t, plainBook(), func(f *excelize.File) {
		for _, err := range []error{f.SetRowVisible("results", 3, false), f.SetSheetVisible("strata", false), f.MergeCell("results", "G2", "G3")} {
			if err != nil {
				t.Fatal(err)
			}
		}
	})
	site, err := Read(path, Options{})
	if err != nil {
		t.Fatal(err)
	}
	notes := map[string][]string{}
	for _, f := range site.Files {
		notes[f.Table] = f.Notes
	}
	for table, want := range map[string]string{
		"strata":  "the sheet is hidden; it was read all the same",
		"results": "1 hidden rows were read all the same|1 merged cells: each counts as its first cell, the others are blank",
	} {
		if got := strings.Join(notes[table], "|"); got != want {
			t.Errorf("%s: %q, want %q", table, got, want)
		}
	}
	if r := site.Boreholes[0].Results[1]; r.Preconsolidation != (profile.Number{Value: 85, Known: true, Source: r.Preconsolidation.Source}) {
		t.Errorf("hidden row: %+v", r.Preconsolidation)
	}
}
