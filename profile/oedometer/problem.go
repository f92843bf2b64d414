package oedometer

import (
	"errors"
	"fmt"
	"strings"
)

// ErrTooFewPoints is wrapped by the error of Interpret for a curve whose first
// loading has fewer than MinimumPoints distinct stresses.
var ErrTooFewPoints = errors.New("too few points on first loading")

// A Problem is one thing in a record that cannot be right.
type Problem struct {
	Stage    int // index in Record.Stages, -1 for the record as a whole
	Line     int // that stage's reference
	Quantity string
	Found    string
	Wanted   string
}

// String returns "stage 3: height: 0 mm; want more than zero", counting from 1.
func (p Problem) String() string {
	place := "record"
	if p.Stage >= 0 {
		place = fmt.Sprintf("stage %d", p.Stage+1)
	}
	return fmt.Sprintf("%s: %s: %s; want %s", place, p.Quantity, p.Found, p.Wanted)
}

// Problems is every problem of one record, in stage order. It is the error that
// Prepare returns.
type Problems []Problem

// Error returns one problem per line.
func (p Problems) Error() string {
	lines := make([]string, len(p))
	for i, problem := range p {
		lines[i] = problem.String()
	}
	return strings.Join(lines, "\n")
}
