// Package axis turns quantities into places on paper: linear and logarithmic
// scales, and the ticks that belong to them.
//
// A Scale is where a value goes; a Ticker is which values are named. They are
// apart, so that one scale can be ticked in several ways. Values are in any
// unit, places in mm; a scale may run either way, so that a depth axis and a
// level axis are the same thing turned over. All results are finite: a value
// outside the ends goes to the end it is beyond when clamped, and a scale whose
// ends meet is widened and not divided by.
//
//	s := axis.NewLinear(0, 400, 60, 100)   // 0 to 400 kPa between x = 60 and 100 mm
//	x := s.At(125)
//	for _, t := range axis.Steps(s, 5) { … t.Value, t.Label … }
//
// The ends and steps are 1, 2 or 5 times a power of ten, as on drawing scales.
package axis
