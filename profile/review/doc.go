// Package review says what does not agree in a site, and why.
//
// Every check is a Rule with a formula, a tolerance and a source. Most rules
// compare one number of a specimen with what its other numbers, its stratum or
// the stress history say it should be; their tolerances follow from the usual
// errors of measurement by error propagation. Where several are broken the
// diagnosis looks for one cause: it tries single changes (two digits exchanged,
// a decimal point, another unit, two columns exchanged, another value), two
// specimens exchanged, and another depth, and names the one that restores
// agreement at the least cost. What it restores is evidence and not a finding of
// its own.
//
//	findings, err := review.Review(p)
//	for _, f := range findings.Open() { fmt.Println(f.Severity, f.Message) }
//
// A deviation is counted in standard deviations, and a hypothesis is weighed by
// the sum of minus the logarithms of Student distributions of these (four degrees
// of freedom), so that what many checks say outweighs how far one is out. The
// costs of slips are ours.
//
// Units are m, kPa, kN/m³ and percent for w, LL, PL and PI, as in package profile.
//
// # References
//
// Read: ASTM D2487 (A-line, U-line). From memory, unverified: Skempton 1953
// (activity); Terzaghi, Peck & Mesri 1996; Terzaghi & Peck 1967; Azzouz, Krizek &
// Corotis 1976; Mesri & Ajlouni 2007; Mesri & Godlewski 1977; Mesri 1975; Bjerrum
// 1973; Jamiolkowski, Ladd, Germaine & Lancellotta 1985; Kulhawy & Mayne 1990;
// Phoon & Kulhawy 1999; Lunne, Berre & Strandvik 1997; Burland 1990; EN 1997-2,
// Annex Q.
package review
