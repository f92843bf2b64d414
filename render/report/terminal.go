package report

import "pastload/profile"

// Terminal returns what a reader at a terminal wants to see of boreholes: for
// each its zones, its profile and its tests in as few columns as tell the story.
// CSV has all columns.
func Terminal(bs []profile.BoreholeProfile) []*Table {
	var out []*Table
	for _, b := range bs {
		zones := Zones(b).Without("borehole").Named(b.Borehole + ": zones of stress history")
		points := Points(b).Only("depth", "stratum", "total_stress", "pore_pressure", "effective_stress",
			"preconsolidation_stress_low", "preconsolidation_stress", "preconsolidation_stress_high", "ocr", "pop", "zone", "zone_probability").
			Named(b.Borehole + ": stresses and stress history with depth")
		points.Note = "low and high are the 5 and 95 % points. At a boundary the first row ends the upper stratum and the second begins the lower."
		tests := Tests(b).Only("depth", "specimen", "stratum", "effective_stress", "bound", "preconsolidation_stress", "laboratory", "ocr",
			"grade", "expected", "z", "verdict", "used").Named(b.Borehole + ": preconsolidation tests beside what the rest of the ground expects")
		notes := &Table{Name: "notes", Columns: []Column{{"", "note", Words, 0}}}
		for _, n := range b.Notes {
			notes.Add(T("note: " + n))
		}
		for _, a := range b.Assumptions {
			notes.Add(T("assumed, " + depth(a.Top) + " to " + depth(a.Base) + " m: " + a.Message))
		}
		for _, t := range []*Table{points, zones, tests, notes} {
			if len(t.Rows) > 0 {
				out = append(out, t)
			}
		}
	}
	return out
}
