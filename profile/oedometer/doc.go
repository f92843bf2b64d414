// Package oedometer interprets one compression curve: points in, preconsolidation
// (yield) stress with its range, indices, sample quality and a grade out.
//
// Prepare turns the recorded stages of a test into a Curve of void ratios with
// its branches found; Interpret reads the curve by several published
// constructions, combines them, and says how far the result can be trusted. A
// test that stopped too early, is still steepening or shows no break is given a
// bound ("σ′p at least …") and never a value.
//
//	curve, err := oedometer.Prepare(record)
//	result, err := oedometer.Interpret(curve, oedometer.Situation{EffectiveStress: oedometer.Known(80)})
//	fmt.Println(result.Preconsolidation, result.Grade, result.Reasons)
//
// Stresses are effective vertical stresses in kPa, compression is positive,
// strains are percent of the initial height where a name says so and fractions
// in formulas, heights are mm, masses g, areas cm², times minutes, cv m²/year,
// k m/s. Void ratios and indices are pure numbers; every index is a slope against
// log10 σ′ and positive when void ratio falls with rising stress. x stands for
// log10 σ′ throughout.
//
// Nothing here is random: the effect of reading noise comes from a fixed design
// of signs, so that the same curve gives the same answer every time.
//
// # References
//
// Read in part (abstract, first page or worked page): Becker, Crooks, Been &
// Jefferies 1987 (work per unit volume); Boone 2010 (slopes instead of graphics);
// Wang & Frost 2004 (dissipated strain energy). From memory, unverified against
// the printed page: Casagrande 1936; Schmertmann 1955; Pacheco Silva 1970;
// Sällfors 1975; Janbu 1969; Butterfield 1979, Oikawa 1987, Sridharan et al. 1991
// and Onitsuka et al. 1995 (logarithmic compression planes); Lunne, Berre &
// Strandvik 1997 and Terzaghi, Peck & Mesri 1996 (sample quality). Each Method
// and Quality carries its own mark.
//
// The biases and scatters with which the constructions are combined were measured
// on generated curves of known yield stress (see the tests of this package); they
// are not published figures.
package oedometer
