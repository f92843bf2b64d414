package main

import (
	"fmt"
	"slices"
	"strconv"
	"strings"

	"github.com/spf13/cobra"

	"pastload/correlate"
	"pastload/render/report"
)

func newCorrelateCommand() *cobra.Command {
	var c common
	var quantity string
	cmd := &cobra.Command{
		Use:   "correlate [NAME [X=VALUE...]]",
		Short: "The catalogue of correlations, one explained, or one evaluated",
		Example: `  pastload correlate
  pastload correlate --quantity "compression index"
  pastload correlate cone
  pastload correlate terzaghi-peck-1967
  pastload correlate terzaghi-peck-1967 LL=45`,
		Args: cobra.ArbitraryArgs,
		RunE: func(cmd *cobra.Command, args []string) error {
			if err := c.check(); err != nil {
				return err
			}
			if len(args) == 0 {
				return c.listCorrelations(cmd, quantity, "")
			}
			found, ok := correlate.ByID(strings.ToLower(args[0]))
			if !ok {
				if len(args) > 1 {
					return usagef("no correlation %q%s", args[0], nearestCorrelation(args[0]))
				}
				return c.listCorrelations(cmd, quantity, args[0])
			}
			if len(args) == 1 {
				return c.show(cmd, report.DescribeCorrelation(found), report.Explain(found))
			}
			values, err := assignments(args[1:])
			if err != nil {
				return err
			}
			e, err := found.Evaluate(values)
			if err != nil {
				return usageError{err}
			}
			return c.show(cmd, report.DescribeEstimate(found, e), report.Estimate(found, e))
		},
		ValidArgsFunction: func(*cobra.Command, []string, string) ([]string, cobra.ShellCompDirective) {
			var ids []string
			for _, x := range correlate.All() {
				ids = append(ids, x.ID)
			}
			return ids, cobra.ShellCompDirectiveNoFileComp
		},
	}
	c.register(cmd)
	cmd.Flags().StringVar(&quantity, "quantity", "", "list only the correlations for this quantity")
	var names []string
	for _, q := range correlate.Quantities() {
		names = append(names, string(q))
	}
	choices(cmd, "quantity", names...)
	return cmd
}

// listCorrelations prints the catalogue, or the part of it for a quantity or
// with a word in it.
func (c *common) listCorrelations(cmd *cobra.Command, quantity, word string) error {
	all := correlate.All()
	if quantity != "" && !slices.ContainsFunc(correlate.Quantities(), func(q correlate.Quantity) bool { return strings.EqualFold(string(q), quantity) }) {
		var names []string
		for _, q := range correlate.Quantities() {
			names = append(names, string(q))
		}
		return usagef("--quantity %q: want one of %s", quantity, strings.Join(names, ", "))
	}
	all = slices.DeleteFunc(all, func(x correlate.Correlation) bool {
		if quantity != "" && !strings.EqualFold(string(x.Quantity), quantity) {
			return true
		}
		return word != "" && !mentions(x, word)
	})
	if len(all) == 0 {
		return usagef("no correlation has %q in its name, quantity, soil or inputs%s", word, nearestCorrelation(word))
	}
	return c.show(cmd, report.DescribeCatalogue(all), report.Catalogue(all))
}

// mentions tells whether a correlation's words hold a word.
func mentions(x correlate.Correlation, word string) bool {
	text := x.ID + " " + x.Name + " " + string(x.Quantity) + " " + x.Soil + " " + x.Family + " " + x.Source
	for _, in := range x.Inputs {
		text += " " + in.Name + " " + in.Symbol
	}
	return strings.Contains(strings.ToLower(text), strings.ToLower(word))
}

// nearestCorrelation suggests the identifier that was probably meant.
func nearestCorrelation(word string) string {
	best, distance := "", 5
	for _, x := range correlate.All() {
		if d := editDistance(strings.ToLower(word), x.ID); d < distance {
			best, distance = x.ID, d
		}
	}
	if best == "" {
		return "; 'pastload correlate' lists them"
	}
	return "; did you mean " + best + "?"
}

// assignments reads LL=45 PI=20.
func assignments(args []string) (correlate.Values, error) {
	values := correlate.Values{}
	for _, a := range args {
		name, text, ok := strings.Cut(a, "=")
		if !ok {
			return nil, usagef("%q: want NAME=VALUE, like LL=45", a)
		}
		v, found := correlate.LookUp(name)
		if !found {
			var symbols []string
			for _, x := range correlate.Variables() {
				symbols = append(symbols, x.Symbol)
			}
			return nil, usagef("no variable %q; want one of %s", name, strings.Join(symbols, ", "))
		}
		number, err := strconv.ParseFloat(text, 64)
		if err != nil {
			return nil, usagef("%s: %q is not a number", name, text)
		}
		if _, twice := values[v.Symbol]; twice {
			return nil, usagef("%s is given twice", v.Symbol)
		}
		values[v.Symbol] = number
	}
	if err := values.Check(); err != nil {
		return nil, usageError{fmt.Errorf("%w", err)}
	}
	return values, nil
}
