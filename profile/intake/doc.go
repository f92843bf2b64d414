// Package intake reads tables of any kind into a profile.Site: a folder of CSV
// files, one CSV file, or a workbook with sheets of the same names.
//
//	site, err := intake.Read("site/", intake.Options{})
//
// Every error in what a user gives is made here. Read collects all problems of
// all files in one run and returns them as Problems, each printed as
//
//	file:line:column: quantity: what was found; want what is wanted
//
// The line is the physical line of the file, or the row of a workbook's sheet;
// the column is counted in fields, the first being 1.
//
// A header names a quantity and a unit in any of the usual ways ("depth (m)",
// "Depth [ft]", "depth_m", "yield stress, kPa", or a row of units beneath the
// names). Names are matched exactly after folding case, spaces and
// punctuation, never by likeness: a likeness is only ever suggested. Units are
// converted once, here, to those of package profile: m, kPa, kN/m³, percent
// (mm and minutes in the oedometer table, MPa for cone resistances). Depth grows
// downwards from ground level. A mass density becomes a unit weight with
// standard gravity, 9.80665 m/s².
//
// A blank cell, "-" or "n/a" is not measured; 0 is 0; "<0.01" and ">400" are
// bounds; "#2.65" is assumed. Tables lists every table and column.
package intake
