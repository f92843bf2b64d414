// Package correlate is a catalogue of published correlations for the stress
// history and the compressibility of clay: one small value for each, with what
// must be known to use it.
//
//	c, _ := correlate.ByID("terzaghi-peck-1967")
//	e, err := c.Evaluate(correlate.Values{"LL": 45}) // Cc 0.315
//
//	b, err := correlate.BandOf(correlate.CompressionIndex, values, nil)
//	// b.Low, b.Best, b.High from the independent families
//
// A correlation is an estimate beside laboratory results and replaces none.
//
// # Units and signs
//
// Values are in the unit of their Variable: percent for w, LL, PL, PI, SL and n0;
// kPa for stresses; m/s for Vs; degrees for angles; the liquidity index, void
// ratios, indices and ratios are pure numbers. Compression is positive. Rules
// published with decimals, MPa or another unit are converted inside. log is of
// base 10, ln natural. Atmospheric pressure pa is 101.3 kPa.
//
// # How far each entry was checked
//
// Verified says whether the formula was read in a source, reproduces another one
// exactly, or is from memory; most coefficients are from memory, unverified.
// Checks holds an input and output for every entry and says what it proves:
// hand arithmetic proves the code alone. Scatter says whether it comes from data
// or is assumed. LeftOut lists the published rules that are not in the
// catalogue, and why.
//
// # Families
//
// Entries that rest on the same data, theory or predictor are one family and
// have one voice in a band. PI/74 and 0.5·Gs·PI/100 are the same identity, not
// two opinions.
//
// # Adding an entry
//
// Write it into the section of its subject (or a new section, with its line in
// catalogue.go), with a line in checks.go or checks_arithmetic.go. The tests hold
// every entry to a check, sane ranges and finite values at their ends. A new input
// is a line in variable.go.
//
// # References
//
// Each entry names its source. Those the package as a whole rests on:
//
// Ching, J. & Phoon, K.-K. (2014), Transformations and correlations among some clay
// parameters, Can. Geotech. J. 51, 663–685 and 686–704: the open data behind the
// scatter of the cone, strength and liquidity index rules.
//
// Kulhawy, F. H. & Mayne, P. W. (1990), Manual on estimating soil properties for
// foundation design, EPRI EL-6800 (not read; from memory).
//
// Azzouz, A. S., Krizek, R. J. & Corotis, R. B. (1976), Regression analysis of soil
// compressibility, Soils and Foundations 16(2), 19–29 (not read; from memory).
package correlate
