package intake

import "strings"

// A Table names one of the tables of a site; files and sheets carry its name.
type Table string

// The tables of a site.
const (
	Boreholes Table = "boreholes"
	Strata    Table = "strata"
	Water     Table = "water"
	Results   Table = "results"
	Oedometer Table = "oedometer"
	Cone      Table = "cone"
	History   Table = "history"
	Decisions Table = "decisions"
	Settings  Table = "settings"
)

// A TableDoc describes a table for a manual.
type TableDoc struct {
	Table   Table
	Row     string // what a row is
	Columns []ColumnDoc
}

// A ColumnDoc describes a column of a table.
type ColumnDoc struct {
	Name     string
	Unit     string // the unit inside, "" for text and pure numbers
	Units    string // every unit that is converted, "" where none is needed
	Required bool
	Synonyms []string // other names, matched exactly after folding
	Meaning  string
}

// Tables lists every table with its columns, in the order of a site's making.
func Tables() []TableDoc {
	return []TableDoc{
		describe(Boreholes, "a borehole", specs(boreholeColumns)),
		describe(Strata, "a layer in a borehole", specs(stratumColumns)),
		describe(Water, "a pore pressure observation", specs(waterColumns)),
		describe(Results, "what was measured at a depth", specs(resultColumns)),
		describe(Oedometer, "one load stage of a test", specs(stageColumns)),
		describe(Cone, "one reading of a sounding", specs(coneColumns)),
		describe(History, "something known of the past", specs(eventColumns)),
		describe(Decisions, "an engineer's decision", specs(decisionColumns)),
		describe(Settings, "a setting", specs(settingColumns)),
	}
}

func describe(t Table, row string, specs []spec) TableDoc {
	doc := TableDoc{Table: t, Row: row}
	for _, s := range specs {
		c := ColumnDoc{Name: s.name, Required: s.required, Synonyms: s.names()[1:], Meaning: s.meaning}
		if s.kind == numberColumn && s.unit.name != "-" {
			c.Unit, c.Units = s.unit.name, s.dim.list()
		}
		doc.Columns = append(doc.Columns, c)
	}
	return doc
}

// Template returns the header line of an empty table: its canonical column
// names with units. It returns "" for a table that does not exist.
func Template(table string) string {
	for _, t := range Tables() {
		if string(t.Table) != strings.ToLower(table) {
			continue
		}
		names := make([]string, len(t.Columns))
		for i, c := range t.Columns {
			names[i] = c.Name
			if c.Unit != "" {
				names[i] += " (" + c.Unit + ")"
			}
		}
		return strings.Join(names, ",") + "\n"
	}
	return ""
}

// tableOf returns the table that a file or sheet name stands for.
func tableOf(name string) (Table, bool) {
	for _, t := range []Table{Boreholes, Strata, Water, Results, Oedometer, Cone, History, Decisions, Settings} {
		if strings.EqualFold(strings.TrimSpace(name), string(t)) {
			return t, true
		}
	}
	return "", false
}
