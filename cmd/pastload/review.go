package main

import (
	"errors"
	"fmt"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"pastload/profile"
	"pastload/profile/review"
	"pastload/render/report"
)

func newReviewCommand() *cobra.Command {
	var c common
	var failOn string
	var open bool
	cmd := &cobra.Command{
		Use:   "review SITE...",
		Short: "The results that cannot be right, and why",
		Long: `review holds every result against the laws it must obey, against its stratum,
against published relations and against the rest of the borehole. Each finding
names the place, the numbers, the likely causes and what to do next. Findings
that a decision answers stay in the list with the answer.`,
		Example: `  pastload review mysite
  pastload review mysite --open --fail-on conflict`,
		Args: sites,
		RunE: func(cmd *cobra.Command, paths []string) error {
			if err := c.check(); err != nil {
				return err
			}
			level, err := severity(failOn)
			if err != nil {
				return err
			}
			profiles, err := c.loadAll(cmd, paths, profile.Options{})
			if err != nil {
				return err
			}
			all := review.Findings{}
			for _, p := range profiles {
				found, err := review.Review(p)
				if err != nil {
					return err
				}
				if len(profiles) > 1 {
					for i := range found {
						ofSite(&found[i], p.Site.Name)
					}
				}
				all = append(all, found...)
			}
			slices.SortStableFunc(all, func(a, b review.Finding) int { return b.Severity.Rank() - a.Severity.Rank() })
			if open {
				all = all.Open()
			}
			if err := c.show(cmd, struct {
				Findings review.Findings `json:"findings"`
			}{orNone(all)}, c.findingTables(all)...); err != nil {
				return err
			}
			return failed(all, level)
		},
	}
	c.register(cmd)
	cmd.Flags().StringVar(&failOn, "fail-on", "", "exit with status 4 if an open finding is at or above: error, conflict, doubt or note")
	cmd.Flags().BoolVar(&open, "open", false, "only findings without an answer")
	choices(cmd, "fail-on", "error", "conflict", "doubt", "note")
	return cmd
}

// ofSite says in a finding which of several sites it is about.
func ofSite(f *review.Finding, site string) {
	f.ID = site + "/" + f.ID
	if f.Borehole != "" {
		f.Borehole = site + "/" + f.Borehole
	} else {
		f.Borehole = site
	}
	also := slices.Clone(f.Also)
	for i := range also {
		also[i].Borehole = site + "/" + also[i].Borehole
	}
	f.Also = also
}

// orNone makes no findings an empty list in JSON, not null.
func orNone(fs review.Findings) review.Findings {
	if fs == nil {
		return review.Findings{}
	}
	return fs
}

// findingTables prints findings as remarks for a terminal and as a table for
// anything else.
func (c *common) findingTables(fs review.Findings) []*report.Table {
	if c.format == "table" {
		return []*report.Table{report.Remarks(fs)}
	}
	return []*report.Table{report.Findings(fs)}
}

// severity reads a level of --fail-on; "" is none.
func severity(word string) (review.Severity, error) {
	if word == "" {
		return "", nil
	}
	for _, s := range review.Severities {
		if string(s) == strings.ToLower(word) {
			return s, nil
		}
	}
	return "", usagef("--fail-on %q: want error, conflict, doubt or note", word)
}

// failed is the error of a run that found something at or above a level.
func failed(fs review.Findings, level review.Severity) error {
	if level == "" {
		return nil
	}
	n := len(fs.Open().AtLeast(level))
	if n == 0 {
		return nil
	}
	return findingsError{fmt.Errorf("%s open at %s or above", plural(n, "finding"), level)}
}

// isDecisionProblem tells whether an error is about the decisions table.
func isDecisionProblem(err error) bool {
	var p review.DecisionProblems
	return errors.As(err, &p)
}
