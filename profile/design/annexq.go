package design

import (
	"fmt"
)

// annexQ compares the number of oedometer tests with EN 1997-2:2007, Annex Q,
// Table Q.1 (read in a source). The table goes by the spread of Eoed, which a
// table of results does not hold: the spread of the parameter itself stands in.
func annexQ(p *Parameter, experience string) string {
	column, words := 0, "no comparable experience"
	switch experience {
	case "medium":
		column, words = 1, "medium comparable experience"
	case "extensive":
		column, words = 2, "extensive comparable experience"
	}
	table := []struct {
		spread float64
		text   string
		tests  [3]int
	}{{0.2, "less than 20 %", [3]int{2, 2, 1}}, {0.5, "20 to 50 %", [3]int{3, 2, 2}}}
	row := struct {
		spread float64
		text   string
		tests  [3]int
	}{0, "more than 50 %", [3]int{4, 3, 2}}
	if p.N == 1 {
		row.text = "an unknown amount"
	}
	if p.N > 1 && p.Mean.Value > 0 {
		spread := (p.Max.Value - p.Min.Value) / p.Mean.Value
		for i := len(table) - 1; i >= 0; i-- {
			if spread <= table[i].spread {
				row = table[i]
			}
		}
	}
	if p.N >= row.tests[column] {
		return ""
	}
	tests := "one oedometer test"
	if p.N > 1 {
		tests = fmt.Sprintf("%d oedometer tests", p.N)
	}
	return fmt.Sprintf("%s: EN 1997-2, Table Q.1, asks for %d per stratum where values spread by %s and there is %s (judged from the spread of %s, not of Eoed).",
		sentence(tests), row.tests[column], row.text, words, p.Symbol)
}
