package report

import (
	"bytes"
	"math"
	"strings"
	"testing"

	"pastload/profile"
	"pastload/profile/intake"
)

// demo builds the worked scenario.
func demo(t testing.TB) *profile.Profile {
	t.Helper()
	site, err := intake.Read("../../testdata/demo", intake.Options{})
	if err != nil {
		t.Fatal(err)
	}
	p, err := profile.Build(site, profile.Options{})
	if err != nil {
		t.Fatal(err)
	}
	return p
}

// stepKeys says under which key, in a group of that beginning, the step of a
// column stands.
type stepKeys struct{ group, key string }

// printedAlike tells whether some step of the group gives the cell to its
// printed digits.
func printedAlike(e profile.Explanation, at stepKeys, c Column, cell Cell) bool {
	tolerance := 0.5*math.Pow(10, -float64(c.Decimals)) + 1e-9
	for _, s := range e.Steps {
		if !strings.HasPrefix(s.Group, at.group) || s.Key != at.key {
			continue
		}
		if cell.Known && s.Value.Known && math.Abs(s.Value.Value-cell.Value) <= tolerance {
			return true
		}
		if !cell.Known && s.Words == cell.Text {
			return true
		}
	}
	return false
}

// TestEveryNumberIsExplained finds every number of the profile table, of the
// tests table and of that of compressibility of one borehole again in the explanation of its depth.
func TestEveryNumberIsExplained(t *testing.T) {
	p := demo(t)
	b := p.Boreholes[0]
	columns := map[string]map[string]stepKeys{
		"profile": {
			"depth":                        {"Place", "depth_m"},
			"unit_weight":                  {"Effective stress", "unit_weight_kN_m3"},
			"total_stress":                 {"Total vertical stress", "total_stress_kPa"},
			"pore_pressure":                {"Pore pressure", "pore_pressure_kPa"},
			"effective_stress":             {"Effective stress", "effective_stress_kPa"},
			"preconsolidation_stress":      {"Stress history", "preconsolidation_stress_kPa"},
			"preconsolidation_stress_low":  {"Stress history", "preconsolidation_stress_low_kPa"},
			"preconsolidation_stress_high": {"Stress history", "preconsolidation_stress_high_kPa"},
			"ocr_low":                      {"Stress history", "ocr_low"}, "ocr": {"Stress history", "ocr"}, "ocr_high": {"Stress history", "ocr_high"},
			"pop":               {"Stress history", "pop_kPa"},
			"compression_index": {"Stress history", "compression_index_here"},
			"zone":              {"Zone", "zone"},
			"zone_probability":  {"Zone", "zone_probability"},

			"correlated_undrained_strength":      {"Strength and horizontal", "correlated_undrained_strength_kPa"},
			"correlated_undrained_strength_low":  {"Strength and horizontal", "correlated_undrained_strength_low_kPa"},
			"correlated_undrained_strength_high": {"Strength and horizontal", "correlated_undrained_strength_high_kPa"},
			"correlated_k0":                      {"Strength and horizontal", "correlated_k0"},
			"correlated_k0_low":                  {"Strength and horizontal", "correlated_k0_low"},
			"correlated_k0_high":                 {"Strength and horizontal", "correlated_k0_high"},
		},
		"compression": {
			"measured_compression_index": {"Measured", "compression_index"}, "correlated_low": {"Correlations", "correlated_compression_index_low"}, "correlated": {"Correlations", "correlated_compression_index"}, "correlated_high": {"Correlations", "correlated_compression_index_high"},
			"measured_compression_ratio": {"Index", "measured_compression_ratio"}, "correlated_ratio_low": {"Correlations", "correlated_compression_ratio_low"}, "correlated_ratio": {"Correlations", "correlated_compression_ratio"}, "correlated_ratio_high": {"Correlations", "correlated_compression_ratio_high"},
			"measured_recompression_index": {"Measured", "recompression_index"}, "correlated_recompression_low": {"Correlations", "correlated_recompression_index_low"}, "correlated_recompression": {"Correlations", "correlated_recompression_index"}, "correlated_recompression_high": {"Correlations", "correlated_recompression_index_high"},
		},
		"tests": {
			"effective_stress":             {"Preconsolidation test", "effective_stress_kPa"},
			"preconsolidation_stress":      {"Preconsolidation test", "preconsolidation_stress_kPa"},
			"preconsolidation_stress_low":  {"Preconsolidation test", "preconsolidation_stress_low_kPa"},
			"preconsolidation_stress_high": {"Preconsolidation test", "preconsolidation_stress_high_kPa"},
			"laboratory":                   {"Preconsolidation test", "laboratory_kPa"},
			"ocr":                          {"Preconsolidation test", "ocr"},
			"pop":                          {"Preconsolidation test", "pop_kPa"},
			"expected":                     {"The test beside", "expected_kPa"},
			"expected_low":                 {"The test beside", "expected_low_kPa"},
			"expected_high":                {"The test beside", "expected_high_kPa"},
			"z":                            {"The test beside", "z"},
		},
	}
	seen := 0
	for _, table := range []*Table{Points(b), Tests(b), Compression(b)} {
		keys := columns[table.Name]
		for _, row := range table.Rows {
			e, err := profile.Explain(p, b.Borehole, row[1].Value)
			if err != nil {
				t.Fatal(err)
			}
			for i, c := range table.Columns {
				at, mapped := keys[c.Key]
				if !mapped {
					if c.numeric() && c.Key != "depth" {
						t.Errorf("%s: the column %s has no step", table.Name, c.Key)
					}
					continue
				}
				if !row[i].Known && row[i].Text == "" {
					continue
				}
				seen++
				if !printedAlike(e, at, c, row[i]) {
					t.Errorf("%s at %g m: %s %s is in no step %s of %s", table.Name, row[1].Value, c.Key, c.Format(row[i], SI), at.key, at.group)
				}
			}
		}
	}
	if seen < 500 {
		t.Errorf("only %d numbers were looked for: the tables are not what the test takes them for", seen)
	}
}

// TestExplainedArithmeticHolds redoes every step of the demo at every depth of its profile.
func TestExplainedArithmeticHolds(t *testing.T) {
	p := demo(t)
	// Terms are rounded as printed: the last digit may be off by two.
	const lastDigits = 2.5
	redone := 0
	type place struct {
		borehole string
		depth    float64
	}
	var places []place
	for i := range p.Boreholes {
		for _, point := range p.Boreholes[i].Points {
			places = append(places, place{p.Boreholes[i].Borehole, point.Depth})
		}
	}
	for _, point := range places {
		e, err := profile.Explain(p, point.borehole, point.depth)
		if err != nil {
			t.Fatal(err)
		}
		for _, s := range e.Steps {
			if s.Numbers == "" {
				continue
			}
			redone++
			got, err := profile.Arithmetic(s.Numbers)
			if err != nil {
				t.Errorf("%s, %g m, %s: %v", point.borehole, point.depth, s.Name, err)
			} else if math.Abs(got-s.Value.Value) > math.Max(lastDigits*math.Pow(10, -float64(s.Decimals)), 1e-5*math.Abs(s.Value.Value)) {
				t.Errorf("%s, %g m, %s: %s gives %g, printed %s", point.borehole, point.depth, s.Name, s.Numbers, got, s.Printed())
			}
		}
	}
	if redone < 1000 {
		t.Errorf("only %d steps were redone", redone)
	}
}

func TestWriteExplanationIsHarmless(t *testing.T) {
	e := profile.Explanation{Borehole: "B\x1b[31m1", Depth: 3, Steps: []profile.Step{
		{Group: "Place\u202e", Name: "remark", Words: "a\x07\nb", Source: "r.csv:1:1 “\u202e”"},
		{Group: "Place\u202e", Name: "weight", Formula: "γ·Δz", Numbers: "18 × 2", Value: profile.Known(36), Decimals: 1, Unit: "kPa"},
	}}
	var b bytes.Buffer
	if err := WriteExplanation(&b, e); err != nil {
		t.Fatal(err)
	}
	if strings.ContainsAny(b.String(), "\x1b\x07\u202e") {
		t.Errorf("control characters reach the terminal: %q", b.String())
	}
	if want := "  weight = 36.0 kPa\n      γ·Δz = 18 × 2\n"; !strings.Contains(b.String(), want) {
		t.Errorf("no %q in %q", want, b.String())
	}
}
