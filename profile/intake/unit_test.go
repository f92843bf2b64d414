package intake

import (
	"math"
	"strings"
	"testing"
)

// TestFactors compares factors with the values that tables of units print, to
// half of their last digit. The definitions behind them (international foot and
// pound of 1959, standard gravity of 1901) are common practice; the rounded
// values are from memory and are checked here against the definitions.
func TestFactors(t *testing.T) {
	for _, c := range []struct {
		dim      *dimension
		from, to string
		want     float64
		half     float64
	}{
		{stress, "psf", "kPa", 0.04788026, 5e-9},
		{stress, "ksf", "kPa", 47.88026, 5e-6},
		{stress, "psi", "kPa", 6.894757, 5e-7},
		{stress, "tsf", "kPa", 95.76052, 5e-6},
		{stress, "kgf/cm2", "kPa", 98.0665, 0},
		{stress, "bar", "kPa", 100, 0},
		{stress, "t/m2", "kPa", 9.80665, 0},
		{stress, "atm", "kPa", 101.325, 0},
		{stress, "MPa", "kPa", 1000, 0},
		{unitWeight, "pcf", "kN/m3", 0.1570875, 5e-8},
		{unitWeight, "Mg/m3", "kN/m3", 9.80665, 0},
		{unitWeight, "kg/m3", "kN/m3", 0.00980665, 1e-17},
		{length, "ft", "m", 0.3048, 0},
		{length, "in", "mm", 25.4, 1e-14},
		{length, "mm", "m", 0.001, 0},
		{velocity, "ft/s", "m/s", 0.3048, 0},
		{consolidation, "m2/s", "m2/year", 31557600, 0},
		{consolidation, "cm2/s", "m2/year", 3155.76, 0},
		{consolidation, "ft2/day", "m2/year", 33.93284, 5e-6},
		{duration, "s", "min", 1.0 / 60, 0},
	} {
		got := convert(1, c.dim.named(c.from), c.dim.named(c.to))
		if math.Abs(got-c.want) > c.half {
			t.Errorf("1 %s = %.10g %s, want %v", c.from, got, c.to, c.want)
		}
	}
}

func TestUnitSpellings(t *testing.T) {
	for _, c := range []struct {
		dim  *dimension
		text string
		want string // "" for not a unit
	}{
		{stress, "kN/m²", "kPa"}, {stress, "KPA", "kPa"}, {stress, "kN m⁻²", "kPa"}, {stress, "kg/cm²", "kgf/cm2"},
		{stress, "MPa", "MPa"}, {stress, "mpa", "MPa"}, {stress, "mPa", ""}, {stress, "MN/m2", "MPa"}, {stress, "mN/m2", ""},
		{stress, "lb/ft²", "psf"}, {stress, "t/m²", "t/m2"}, {stress, "t/ft2", "tsf"}, {stress, "kip/ft²", "ksf"}, {stress, "m", ""}, {stress, "", ""},
		{unitWeight, "kN/m³", "kN/m3"}, {unitWeight, "kN·m⁻³", "kN/m3"}, {unitWeight, "Mg/m3", "Mg/m3"}, {unitWeight, "mg/m3", ""}, {unitWeight, "lb/ft3", "pcf"}, {unitWeight, "g/cc", "g/cm3"},
		{length, "Metres", "m"}, {length, "FT", "ft"}, {length, "mOD", ""}, {level, "mOD", "m"}, {level, "m OD", "m"}, {level, "m bgl", ""}, {length, "m bgl", "m"}, {length, "mm", "mm"}, {length, "feet", "ft"}, {length, "yd", ""},
		{percent, "%", "%"}, {percent, "pct", "%"}, {percent, "-", "decimal"},
		{consolidation, "m²/yr", "m2/year"}, {consolidation, "ft²/day", "ft2/day"}, {duration, "minutes", "min"},
	} {
		u, ok := c.dim.find(c.text)
		if ok != (c.want != "") || u.name != c.want {
			t.Errorf("%s %q: %q, want %q", c.dim.name, c.text, u.name, c.want)
		}
	}
}

// TestHeaders binds headers as laboratories write them.
func TestHeaders(t *testing.T) {
	specs := specs(resultColumns)
	v := newVocabulary(specs)
	for _, c := range []struct{ header, name, unit string }{
		{"depth (m)", "depth", "m"}, {"Depth [ft]", "depth", "ft"}, {"depth_m", "depth", "m"}, {"DEPTH, m", "depth", "m"}, {"Depth m", "depth", "m"}, {"depth\u00a0(m)", "depth", "m"},
		{"σ'p (kPa)", "preconsolidation stress", "kPa"}, {"σ′p [kN/m²]", "preconsolidation stress", "kN/m²"}, {"σ’p(psf)", "preconsolidation stress", "psf"},
		{"Pc' [kPa]", "preconsolidation stress", "kPa"}, {"yield stress, kPa", "preconsolidation stress", "kPa"}, {"Pre-consolidation pressure (tsf)", "preconsolidation stress", "tsf"},
		{"σ'p low (kPa)", "preconsolidation stress low", "kPa"}, {"low (kPa)", "preconsolidation stress low", "kPa"}, {"Pc' max (kPa)", "preconsolidation stress high", "kPa"},
		{"σ'v0 (kPa)", "effective stress", "kPa"}, {"p0' (kPa)", "effective stress", "kPa"},
		{"σv0 (kPa)", "", ""}, // the total stress is another quantity
		{"w (%)", "water content", "%"}, {"w%", "water content", "%"}, {"w_pct", "water content", "pct"}, {"water_content_pct", "water content", "pct"}, {"Moisture Content %", "water content", "%"},
		{"LL (%)", "liquid limit", "%"}, {"wL", "liquid limit", ""}, {"w_L (%)", "liquid limit", "%"}, {"Ip", "plasticity index", ""}, {"I_L", "liquidity index", ""},
		{"clay (<2 µm)", "clay fraction", ""}, {"clay (<2 µm) (%)", "clay fraction", "%"}, {"% clay", "clay fraction", "%"},
		{"e₀", "void ratio", ""}, {"e0 (-)", "void ratio", "-"}, {"Cα", "secondary compression index", ""}, {"C_alpha", "secondary compression index", ""},
		{"γ (kN/m³)", "unit weight", "kN/m³"}, {"unit_weight_kN_m3", "unit weight", "kN/m3"}, {"Bulk density (Mg/m3)", "unit weight", "Mg/m3"}, {"dry density (Mg/m3)", "", ""},
		{"su (kPa)", "undrained strength", "kPa"}, {"V_s (m/s)", "shear wave velocity", "m/s"}, {"shear_wave_velocity_m_s", "shear wave velocity", "m/s"},
		{"qt − σv0 (kPa)", "net cone resistance", "kPa"}, {"u2-u0 (kPa)", "excess cone pore pressure", "kPa"}, {"qt-u2 (MPa)", "effective cone resistance", "MPa"},
		{"N₆₀", "N60", ""}, {"SPT N", "", ""}, {"remarks", "remark", ""},
	} {
		f := v.bindField(c.header, 1)
		name := ""
		if f.spec >= 0 {
			name = specs[f.spec].name
		}
		if name != c.name || f.unitText != c.unit && c.name != "" {
			t.Errorf("%q: %q in %q, want %q in %q", c.header, name, f.unitText, c.name, c.unit)
		}
	}
}

// TestTables: every column that the manual lists is read under every name that
// the manual gives it, and in every unit.
func TestTables(t *testing.T) {
	byTable := map[Table][]spec{Boreholes: specs(boreholeColumns), Strata: specs(stratumColumns), Water: specs(waterColumns), Results: specs(resultColumns),
		Oedometer: specs(stageColumns), Cone: specs(coneColumns), History: specs(eventColumns), Decisions: specs(decisionColumns), Settings: specs(settingColumns)}
	docs := Tables()
	if len(docs) != len(byTable) {
		t.Fatalf("%d tables, want %d", len(docs), len(byTable))
	}
	for _, doc := range docs {
		v := newVocabulary(byTable[doc.Table])
		for i, c := range doc.Columns {
			for _, name := range append([]string{c.Name}, c.Synonyms...) {
				units := []string{""}
				if c.Units != "" {
					units = strings.Split(c.Units, ", ")
				}
				for _, u := range units {
					header := name
					if u != "" {
						header += " (" + u + ")"
					}
					if f := v.bindField(header, 1); f.spec != i || f.unitText != u {
						t.Errorf("%s: %q is column %d in %q, want %d in %q", doc.Table, header, f.spec, f.unitText, i, u)
					}
				}
			}
		}
	}
}

func TestKnownSettings(t *testing.T) {
	var table strings.Builder
	table.WriteString("setting,value,unit\n")
	for _, d := range KnownSettings() {
		value := d.Default
		if value == "" {
			value = "text"
		}
		table.WriteString(d.Name + "," + value + "," + d.Unit + "\n")
	}
	site := mustRead(t, files{"settings.csv": table.String()})
	if got, want := len(site.Settings.Given), len(KnownSettings()); got != want {
		t.Errorf("%d settings given, want %d", got, want)
	}
	if site.Settings.WaterUnitWeight != 9.81 || site.Settings.UnitWeightUncertainty != 0.03 || site.Settings.Title.Client != "text" {
		t.Errorf("%+v", site.Settings)
	}
}
