// Package report turns a profile into words and tables: the terminal's table,
// CSV, the workbook and the printed report all come from the same Table values,
// so that a number reads the same wherever it appears.
//
//	t := report.Points(profile.Boreholes[0])
//	err := t.WriteText(os.Stdout, report.SI)
//
// Tables hold numbers in the units of package profile (m, kPa, kN/m³) and are
// converted to US customary units, if asked, at the last moment. What is not
// known is an empty cell, never a zero.
package report
