// Package correlate is a catalogue of published correlations for the stress
// history and the compressibility of clay.
package correlate
