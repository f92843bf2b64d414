// Package history infers the stress history of a borehole: one line of the
// preconsolidation stress σ′p with depth, with its uncertainty, from tests of
// mixed quality and from what correlations make of in-situ readings.
//
// Units are m, kPa and kN/m³; depth grows downwards. Standard deviations of
// stresses are of their natural logarithm.
package history
