package intake

import (
	"fmt"
	"slices"
	"strings"

	"pastload/profile"
)

// A settingRow is a row of the settings table.
type settingRow struct {
	Name, Value, Unit, Note string
}

var settingColumns = []column[settingRow]{
	must(textOf("setting", "name; parameter", "one of the settings below", func(r *settingRow) *string { return &r.Name })),
	must(open(textOf("value", "", "", func(r *settingRow) *string { return &r.Value }))),
	textOf("unit", "units", "may be left out: the setting's own unit is then meant", func(r *settingRow) *string { return &r.Unit }),
	textOf("note", "notes; remark; comment", "why", func(r *settingRow) *string { return &r.Note }),
}

// A SettingDoc describes a setting for a manual.
type SettingDoc struct {
	Name    string
	Unit    string // "" for text and pure numbers
	Default string // as it would be typed, "" for none
	Meaning string
}

// A setting is a name and where its value goes: one of number and text.
type setting struct {
	name, synonyms string
	meaning        string
	dim            *dimension
	unit           string
	limit          limit
	scale          float64 // of the value inside, 1 or 1/100
	number         func(*profile.Settings) *float64
	text           func(*profile.Settings) *string
	list           func(*profile.Settings) *[]string
}

var knownSettings = []setting{
	{name: "unit weight of water", synonyms: "water unit weight; γw", dim: unitWeight, unit: "kN/m3", limit: within(9.5, 10.5), scale: 1, meaning: "γw, for pore pressures and buoyancy", number: func(s *profile.Settings) *float64 { return &s.WaterUnitWeight }},
	{name: "normally consolidated from", dim: ratio, unit: "-", limit: above(0, 100), scale: 1, meaning: "overconsolidation ratio from which ground is called normally consolidated", number: func(s *profile.Settings) *float64 { return &s.Limits.NormallyConsolidated }},
	{name: "lightly overconsolidated from", dim: ratio, unit: "-", limit: above(0, 100), scale: 1, meaning: "overconsolidation ratio from which ground is called lightly overconsolidated", number: func(s *profile.Settings) *float64 { return &s.Limits.LightlyOverconsolidated }},
	{name: "heavily overconsolidated from", dim: ratio, unit: "-", limit: above(0, 100), scale: 1, meaning: "overconsolidation ratio from which ground is called heavily overconsolidated", number: func(s *profile.Settings) *float64 { return &s.Limits.HeavilyOverconsolidated }},
	{name: "unit weight uncertainty", dim: percent, unit: "%", limit: within(0, 50), scale: 0.01, meaning: "standard deviation over mean, shared by the whole column of ground", number: func(s *profile.Settings) *float64 { return &s.UnitWeightUncertainty }},
	{name: "water level uncertainty", dim: length, unit: "m", limit: within(0, 50), scale: 1, meaning: "standard deviation of the water level", number: func(s *profile.Settings) *float64 { return &s.WaterLevelUncertainty }},
	{name: "correlations", synonyms: "correlations in use", meaning: "identifiers, separated by blanks, commas or semicolons; all defaults where absent", list: func(s *profile.Settings) *[]string { return &s.Correlations }},
	{name: "code edition", synonyms: "code", meaning: "which edition of the code the words follow", text: func(s *profile.Settings) *string { return &s.CodeEdition }},
	{name: "note", synonyms: "remark", meaning: "free text, kept", text: nil},
	{name: "project", synonyms: "project name; project title", meaning: "title block", text: func(s *profile.Settings) *string { return &s.Title.Project }},
	{name: "location", synonyms: "site location; site", meaning: "title block", text: func(s *profile.Settings) *string { return &s.Title.Location }},
	{name: "client", meaning: "title block", text: func(s *profile.Settings) *string { return &s.Title.Client }},
	{name: "number", synonyms: "project number; drawing number; document number; job number", meaning: "title block: of the document", text: func(s *profile.Settings) *string { return &s.Title.Number }},
	{name: "title", synonyms: "drawing title", meaning: "title block: of the drawing", text: func(s *profile.Settings) *string { return &s.Title.Title }},
	{name: "revision", meaning: "title block", text: func(s *profile.Settings) *string { return &s.Title.Revision }},
	{name: "status", meaning: "title block, e.g. preliminary", text: func(s *profile.Settings) *string { return &s.Title.Status }},
	{name: "date", meaning: "title block: date of issue", text: func(s *profile.Settings) *string { return &s.Title.Date }},
	{name: "prepared by", synonyms: "drawn by; made by", meaning: "title block", text: func(s *profile.Settings) *string { return &s.Title.PreparedBy }},
	{name: "checked by", meaning: "title block", text: func(s *profile.Settings) *string { return &s.Title.CheckedBy }},
	{name: "approved by", meaning: "title block", text: func(s *profile.Settings) *string { return &s.Title.ApprovedBy }},
	{name: "organisation", synonyms: "organization; company", meaning: "title block", text: func(s *profile.Settings) *string { return &s.Title.Organisation }},
	{name: "datum", synonyms: "level datum", meaning: "title block: what levels refer to", text: func(s *profile.Settings) *string { return &s.Title.Datum }},
	{name: "coordinates", synonyms: "coordinate system; grid", meaning: "title block: what eastings and northings refer to", text: func(s *profile.Settings) *string { return &s.Title.Coordinates }},
}

// KnownSettings lists every setting.
func KnownSettings() []SettingDoc {
	defaults := profile.DefaultSettings()
	var out []SettingDoc
	for _, k := range knownSettings {
		d := SettingDoc{Name: k.name, Meaning: k.meaning}
		if k.number != nil {
			d.Default = number(*k.number(&defaults) / k.scale)
			if k.unit != "-" {
				d.Unit = k.unit
			}
		}
		out = append(out, d)
	}
	return out
}

// names returns the names of a setting.
func (k setting) names() []string { return spec{name: k.name, synonyms: k.synonyms}.names() }

// settings reads the settings table.
func (s *site) settings(g *grid) {
	s.out.Settings = profile.DefaultSettings()
	t := load(s.rd, g, settingColumns)
	if t == nil {
		return
	}
	find, all := map[string]int{}, []string{}
	for i, k := range knownSettings {
		for _, n := range k.names() {
			find[key(n)] = i
		}
		all = append(all, k.name)
	}
	seen := map[int]row[settingRow]{}
	for _, r := range t.rows {
		v := r.Value
		if v.Name == "" || v.Value == "" {
			continue
		}
		i, ok := find[key(v.Name)]
		if !ok {
			wanted := "one of the known settings: " + strings.Join(all, ", ")
			if likely := near(v.Name, all); len(likely) > 0 {
				wanted = quoted(likely)
			}
			t.problem(r, "setting", fmt.Sprintf("%q is not a setting", v.Name), wanted)
			continue
		}
		k := knownSettings[i]
		if earlier, ok := seen[i]; ok && k.name != "note" {
			t.problem(r, "setting", fmt.Sprintf("%q is set already in line %d", k.name, earlier.at.line), "each setting once")
			continue
		}
		seen[i] = r
		if s.apply(t, r, k) {
			s.out.Settings.Given = append(s.out.Settings.Given, profile.Setting{Name: k.name, Value: v.Value, Unit: v.Unit, Note: v.Note, Source: t.cell(r, "setting")})
		}
	}
	s.checkLimits(t, seen)
}

// apply puts one setting in its place.
func (s *site) apply(t *table[settingRow], r row[settingRow], k setting) bool {
	v := r.Value
	switch {
	case k.list != nil:
		*k.list(&s.out.Settings) = strings.FieldsFunc(v.Value, func(c rune) bool { return strings.ContainsRune(" ,;", c) })
		return true
	case k.number == nil:
		if k.text != nil {
			*k.text(&s.out.Settings) = v.Value
		}
		return true
	}
	n, ok := openNumber(t, r, "value", k.spec(), v.Unit, true)
	if ok {
		*k.number(&s.out.Settings) = n.Value * k.scale
	}
	return ok
}

// numericSetting tells whether a row of the settings table sets a number.
func numericSetting(specs []spec, fields []field, r gridRow) bool {
	for i, f := range fields {
		if f.spec < 0 || specs[f.spec].name != "setting" {
			continue
		}
		name := key(r.field(i))
		for _, k := range knownSettings {
			if k.number != nil && slices.ContainsFunc(k.names(), func(n string) bool { return key(n) == name }) {
				return true
			}
		}
	}
	return false
}

// spec describes the value of a numeric setting as if it were a column.
func (k setting) spec() spec {
	return spec{name: k.name, kind: numberColumn, dim: k.dim, unit: k.dim.named(k.unit), limit: k.limit}
}

// checkLimits sees to it that the zones follow each other.
func (s *site) checkLimits(t *table[settingRow], seen map[int]row[settingRow]) {
	l := s.out.Settings.Limits
	if l.NormallyConsolidated < l.LightlyOverconsolidated && l.LightlyOverconsolidated < l.HeavilyOverconsolidated {
		return
	}
	for i := len(knownSettings) - 1; i >= 0; i-- {
		r, ok := seen[i]
		if !ok || !strings.HasSuffix(knownSettings[i].name, "consolidated from") {
			continue
		}
		t.problem(r, "value", fmt.Sprintf("the limits of the zones are %s, %s and %s", number(l.NormallyConsolidated), number(l.LightlyOverconsolidated), number(l.HeavilyOverconsolidated)),
			"each greater than the one before: normally, lightly, heavily overconsolidated")
		return
	}
}
