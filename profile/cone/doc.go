// Package cone evaluates a cone penetration test in clay: readings and the
// stresses in the ground in, preconsolidation stress by layer out.
//
//	s, err := cone.Evaluate(readings, stress, cone.Options{AreaRatio: cone.Of(0.80)})
//	for _, l := range s.Layers {
//		// l.Depth, l.Net.Value, l.Yield …
//	}
//
// A Reducer does the same for readings that come one by one, in any order, in
// memory bounded by the depth of the sounding and not by its readings.
//
// Calibrate turns the oedometer tests next to a sounding into the site's own
// factor, with what is left uncertain of it.
//
// # Units and signs
//
// Depths are in m below ground level and grow downwards. Cone resistance is read
// in MPa, as soundings are written; sleeve friction and pore pressure in kPa.
// Everything that comes out is in kPa, friction ratio in percent, other ratios
// pure numbers. Compression is positive.
//
// # Formulas
//
//	qt = qc + (1 − a)·u2            a: area ratio of the cone
//	net resistance  qt − σv0        excess pressure  u2 − u0
//	Bq = (u2 − u0)/(qt − σv0)       Q = (qt − σv0)/σ′v0      F = fs/(qt − σv0)
//	Ic = √[(3.47 − log Qn)² + (1.22 + log F)²]
//
// Ic and its stress exponent n in Qn = [(qt − σv0)/pa]·(pa/σ′v0)^n follow
// Robertson & Wride (1998): coefficients from memory, unverified. Readings with
// Ic below 2.6 are taken as sand or silt and left out (common practice).
//
// # References
//
// Robertson, P. K. & Wride, C. E. (1998), Evaluating cyclic liquefaction potential
// using the cone penetration test, Can. Geotech. J. 35(3), 442–459.
//
// Phoon, K.-K. & Kulhawy, F. H. (1999), Characterization of geotechnical
// variability, Can. Geotech. J. 36, 612–624: vertical scale of fluctuation of qt in
// clay 0.2 to 0.5 m (from memory, unverified).
//
// The relations for σ′p and their sources are in the package correlate.
package cone
