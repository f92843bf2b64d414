package report

import (
	"bytes"
	"encoding/csv"
	"math"
	"strconv"
	"strings"
	"testing"

	"github.com/xuri/excelize/v2"
	"gonum.org/v1/gonum/floats/scalar"
	"pgregory.net/rapid"
)

// sample is a table with every kind of cell.
func sample() *Table {
	t := &Table{
		Name: "sample", Title: "A sample", Note: "A note.",
		Columns: []Column{
			{"borehole", "borehole", Words, 0}, {"depth", "depth", Length, 2}, {"σ′p", "preconsolidation_stress", Stress, 1},
			{"γ", "unit_weight", WeightDensity, 2}, {"w", "water_content", Percent, 1}, {"OCR", "ocr", Pure, 2}, {"value", "value", Pure, 3}, {"unit", "unit", Words, 0},
		},
	}
	t.Add(T("BH1"), N(3.048), N(47.88025898), N(15.708746), N(58), N(1.234), Q(95.76, Stress, 0), U(Stress))
	t.Add(T("=1+1"), Cell{}, N(-0.0001), N(18), Cell{}, N(math.NaN()), N(-5), U(Pure))
	return t
}

func TestText(t *testing.T) {
	var b bytes.Buffer
	if err := sample().WriteText(&b, SI); err != nil {
		t.Fatal(err)
	}
	want := `A sample
borehole  depth (m)  σ′p (kPa)  γ (kN/m³)  w (%)   OCR   value  unit
--------------------------------------------------------------------
BH1            3.05       47.9      15.71   58.0  1.23      96  kPa
=1+1                       0.0      18.00               -5.000
A note.
`
	if got := b.String(); got != want {
		t.Errorf("got\n%s\nwant\n%s", got, want)
	}
}

// TestUSUnits converts by the definitions: 1 ft = 0.3048 m, 1 psf = 0.04788026 kPa,
// 1 pcf = 0.1570875 kN/m³ (exact foot, pound and standard gravity; common practice).
func TestUSUnits(t *testing.T) {
	var b bytes.Buffer
	if err := sample().WriteCSV(&b, US); err != nil {
		t.Fatal(err)
	}
	rows, err := csv.NewReader(&b).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	for i, want := range []string{"borehole", "depth_ft", "preconsolidation_stress_psf", "unit_weight_pcf", "water_content_pct", "ocr", "value", "unit"} {
		if rows[0][i] != want {
			t.Errorf("heading %d is %q, want %q", i, rows[0][i], want)
		}
	}
	for i, want := range []string{"BH1", "10.00", "1000", "100.00", "58.0", "1.23", "2000", "psf"} {
		if rows[1][i] != want {
			t.Errorf("cell %d is %q, want %q", i, rows[1][i], want)
		}
	}
}

// TestFormulasStayText writes text that a spreadsheet would run, and numbers that
// only look like it.
func TestFormulasStayText(t *testing.T) {
	for _, text := range []string{"=1+1", "+1", "-1", "@SUM(A1)", "\tx", "\rx", "=HYPERLINK(\"x\")"} {
		tab := &Table{Name: "t", Columns: []Column{{"remark", "remark", Words, 0}, {"value", "value", Pure, 1}}}
		tab.Add(T(text), N(-5))
		var b bytes.Buffer
		if err := tab.WriteCSV(&b, SI); err != nil {
			t.Fatal(err)
		}
		rows, err := csv.NewReader(bytes.NewReader(b.Bytes())).ReadAll()
		if err != nil {
			t.Fatal(err)
		}
		if !strings.HasPrefix(rows[1][0], "'") {
			t.Errorf("%q is written as %q: a spreadsheet would run it", text, rows[1][0])
		}
		if rows[1][1] != "-5.0" {
			t.Errorf("the number −5 is written as %q", rows[1][1])
		}
	}
}

// TestWorkbook reads a workbook back: numbers as numbers, text as text, the same
// bytes twice.
func TestWorkbook(t *testing.T) {
	var a, b bytes.Buffer
	long := &Table{Name: "a name that is far too long for a sheet of a workbook", Columns: []Column{{"text", "text", Words, 0}}}
	long.Add(T(strings.Repeat("x", 40000)))
	slash := &Table{Name: "a/b", Columns: []Column{{"text", "text", Words, 0}}}
	for _, w := range []*bytes.Buffer{&a, &b} {
		if err := WriteXLSX(w, SI, sample(), sample(), long, slash); err != nil {
			t.Fatal(err)
		}
	}
	if !bytes.Equal(a.Bytes(), b.Bytes()) {
		t.Error("two workbooks of the same tables differ")
	}
	f, err := excelize.OpenReader(&a)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	if got := f.GetSheetList(); len(got) != 4 || got[0] != "sample" || got[1] != "sample 2" || got[3] != "a-b" {
		t.Errorf("sheets %q", got)
	}
	for _, c := range []struct {
		cell, want string
		kind       excelize.CellType
	}{
		{"C1", "σ′p (kPa)", excelize.CellTypeSharedString},
		{"C2", "47.88025898", excelize.CellTypeUnset},
		{"A3", "=1+1", excelize.CellTypeSharedString},
		{"G3", "-5", excelize.CellTypeUnset},
		{"B3", "", excelize.CellTypeUnset},
	} {
		got, err := f.GetCellValue("sample", c.cell, excelize.Options{RawCellValue: true})
		if err != nil || got != c.want {
			t.Errorf("%s is %q (%v), want %q", c.cell, got, err, c.want)
		}
		if kind, _ := f.GetCellType("sample", c.cell); kind != c.kind {
			t.Errorf("%s has cell type %v, want %v", c.cell, kind, c.kind)
		}
		if formula, _ := f.GetCellFormula("sample", c.cell); formula != "" {
			t.Errorf("%s holds the formula %q", c.cell, formula)
		}
	}
}

// TestCSVReadsBack: a number written is the number read, to half the last decimal
// printed and the rounding of the number itself.
func TestCSVReadsBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		v := rapid.Float64Range(-1e6, 1e6).Draw(t, "v")
		decimals := rapid.IntRange(0, 6).Draw(t, "decimals")
		c := Column{"x", "x", Pure, decimals}
		got, err := strconv.ParseFloat(c.Format(N(v), SI), 64)
		if err != nil || !scalar.EqualWithinAbs(got, v, 0.5*math.Pow(10, -float64(decimals))+1e-12*math.Abs(v)) {
			t.Fatalf("%g is written as %q", v, c.Format(N(v), SI))
		}
	})
}

func TestOnlyKeepsRowsTogether(t *testing.T) {
	got := sample().Only("ocr", "borehole")
	if len(got.Columns) != 2 || got.Rows[0][1].Text != "BH1" || got.Rows[0][0].Value != 1.234 {
		t.Errorf("%+v", got)
	}
	if n := len(sample().Without("borehole").Columns); n != 7 {
		t.Errorf("%d columns without one of eight", n)
	}
}

func TestTerminalObeysNobody(t *testing.T) {
	tab := &Table{Name: "t", Columns: []Column{{"remark", "remark", Words, 0}}}
	tab.Add(T("a\x1b[31mred\u202eabc\nnext"))
	var b bytes.Buffer
	if err := tab.WriteText(&b, SI); err != nil {
		t.Fatal(err)
	}
	if strings.ContainsAny(b.String(), "\x1b\u202e") || strings.Count(b.String(), "\n") != 3 {
		t.Errorf("%q", b.String())
	}
}
