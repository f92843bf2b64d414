package main

import (
	"bytes"
	"errors"
	"fmt"
	"math"
	"strconv"
	"strings"

	"github.com/spf13/cobra"

	"pastload/profile"
	"pastload/render/report"
)

func newExplainCommand() *cobra.Command {
	var c common
	cmd := &cobra.Command{
		Use:   "explain SITE BOREHOLE DEPTH",
		Short: "The arithmetic of one depth, step by step, with its sources",
		Long: `explain prints every step to the numbers at one depth, and of the results and
tests there or at the nearest depth within 5 cm: formula, numbers, the cell of
the table that each was read from, and who published the method, so that it can
be redone by hand. The depth is in m below ground level, or in feet as 12ft.
The steps are in SI units whatever the units of the tables.`,
		Example: `  pastload explain mysite BH1 3.6
  pastload explain mysite BH1 3.6 --format csv -o check.csv`,
		Args: cobra.ExactArgs(3),
		RunE: func(cmd *cobra.Command, args []string) error {
			if err := c.check(); err != nil {
				return err
			}
			if c.units == "us" {
				return usagef("explain prints the arithmetic as it is done, in SI units: leave --units out")
			}
			depth, err := oneDepth(args[2])
			if err != nil {
				return err
			}
			profiles, err := c.loadAll(cmd, args[:1], profile.Options{At: []float64{depth}})
			if err != nil {
				return err
			}
			e, err := profile.Explain(profiles[0], args[1], depth)
			switch {
			case errors.Is(err, profile.ErrNoBorehole):
				return usagef("no borehole %q in %s%s", args[1], args[0], nearestBorehole(profiles[0], args[1]))
			case errors.Is(err, profile.ErrDepth):
				return usageError{err}
			case err != nil:
				return err
			}
			if c.format != "table" {
				return c.show(cmd, e, report.Explanation(e))
			}
			var b bytes.Buffer
			if err := report.WriteExplanation(&b, e); err != nil {
				return err
			}
			return c.deliver(cmd, b.Bytes())
		},
	}
	c.register(cmd)
	return cmd
}

// oneDepth reads a depth in m, or in feet where it says so.
func oneDepth(text string) (float64, error) {
	number, factor := strings.TrimSpace(text), 1.0
	if s, ok := strings.CutSuffix(number, "ft"); ok {
		number, factor = strings.TrimSpace(s), 0.3048
	} else if s, ok := strings.CutSuffix(number, "m"); ok {
		number = strings.TrimSpace(s)
	}
	v, err := strconv.ParseFloat(number, 64)
	if err != nil || math.IsNaN(v) || v < 0 || v*factor > 1e4 {
		return 0, usagef("%q: want a depth in m below ground level, like 3.6, or in feet, like 12ft", text)
	}
	return v * factor, nil
}

// nearestBorehole suggests the borehole that was probably meant, or lists them
// where several are as near.
func nearestBorehole(p *profile.Profile, name string) string {
	best, distance, ties := "", 3, 0
	var all []string
	for i := range p.Boreholes {
		b := p.Boreholes[i].Borehole
		all = append(all, b)
		switch d := editDistance(strings.ToLower(name), strings.ToLower(b)); {
		case d < distance:
			best, distance, ties = b, d, 1
		case d == distance:
			ties++
		}
	}
	const most = 12
	switch {
	case best != "" && ties == 1:
		return fmt.Sprintf("; did you mean %s?", best)
	case len(all) == 0:
		return ""
	case len(all) > most:
		all = append(all[:most], "…")
	}
	return "; it has " + strings.Join(all, ", ")
}
