// Package sheet draws the sheets of a stress history: the depth profile of a
// borehole, one compression curve, and the summary by stratum.
//
// Every sheet is one SVG drawing of an A4 or A3 page in the profile of package
// draw, with a title block from the site's settings; blanks are left for what is
// not known, to be filled in by hand. Depth grows downwards, in m below ground
// level, at a round drawing scale that is printed, so that a depth can be read
// off the paper with a ruler. Stresses are kPa, unit weights kN/m³, water contents
// percent.
//
//	err := sheet.Depth(w, sheet.DepthInput{
//		Borehole: site.Boreholes[0],
//		Profile:  p.Boreholes[0],
//		Settings: site.Settings,
//		Page:     sheet.A4,
//		Figure:   "3.1",
//	})
//
// Shape, fill and dash carry the meaning and colour repeats it: every sheet can
// be read from a black-and-white copy. What cannot be drawn, a value that is not
// finite, is left out, as it was not measured.
package sheet
