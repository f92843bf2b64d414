// Package profile holds the words of the ground: a Site read from tables, and
// the Profile that is computed from it.
//
// A Site is what was observed: boreholes with their strata, water and results,
// oedometer curves, cone soundings, what is known of the past, and what the
// engineer decided. Build turns it into a Profile: vertical stress, stress
// history, zones in plain words, and the assumptions that were made on the way.
//
//	site, problems := intake.Read("site/")
//	p, err := profile.Build(site, profile.Options{})
//	for _, b := range p.Boreholes { … b.Points … }
//
// Units are m, kPa, kN/m³ and percent for w, LL, PL and PI; void ratios, indices
// and the liquidity index are pure numbers. Depth grows downwards from ground
// level, compression is positive. A quantity that was not measured is a Number
// that is not Known; it is never zero.
package profile
