package main

import (
	"fmt"
	"strings"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"
)

// suggestFlag adds the nearest flag to the error for an unknown one.
func suggestFlag(cmd *cobra.Command, err error) error {
	const unknown = "unknown flag: --"
	name, found := strings.CutPrefix(err.Error(), unknown)
	if !found {
		return err
	}
	best, distance := "", 3
	cmd.Flags().VisitAll(func(f *pflag.Flag) {
		if d := editDistance(name, f.Name); d < distance && !f.Hidden {
			best, distance = f.Name, d
		}
	})
	if best == "" {
		return err
	}
	return fmt.Errorf("%w; did you mean --%s?", err, best)
}

// editDistance returns the number of letters to insert, delete or replace that
// turn one word into the other.
func editDistance(a, b string) int {
	row := make([]int, len(b)+1)
	for j := range row {
		row[j] = j
	}
	for i := 1; i <= len(a); i++ {
		diagonal := row[0]
		row[0] = i
		for j := 1; j <= len(b); j++ {
			cost := 1
			if a[i-1] == b[j-1] {
				cost = 0
			}
			diagonal, row[j] = row[j], min(row[j]+1, row[j-1]+1, diagonal+cost)
		}
	}
	return row[len(b)]
}
