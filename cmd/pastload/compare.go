package main

import (
	"bytes"
	"errors"
	"fmt"
	"os"
	"path/filepath"

	"github.com/spf13/cobra"

	"pastload/profile"
	"pastload/profile/design"
	"pastload/profile/review"
	"pastload/render/report"
)

func newCompareCommand() *cobra.Command {
	var c common
	cmd := &cobra.Command{
		Use:   "compare OLD NEW",
		Short: "What changed between two sites, or since an earlier report",
		Long: `compare tells what changed from OLD to NEW: files, settings, strata, water,
results and decisions, and what follows from them in tests, zones, findings and
values. Each of the two is a site, or the folder of an earlier report (or of its
tables). Rows are matched by borehole, depth, specimen and quantity, never by
their place in a table; what is compared is what was printed.`,
		Example: `  pastload compare issue-1/site site
  pastload compare issue-1/report site`,
		Args: cobra.ExactArgs(2),
		RunE: func(cmd *cobra.Command, args []string) error {
			if err := c.check(); err != nil {
				return err
			}
			var sides [2][]report.Printed
			for i, path := range args {
				tables, err := c.printed(cmd, path)
				if err != nil {
					return err
				}
				sides[i] = tables
			}
			changes, remarks, err := report.Differences(sides[0], sides[1])
			if errors.Is(err, report.ErrOtherUnits) {
				return usagef("%w: give --units as the earlier report was printed", err)
			}
			if err != nil {
				return err
			}
			for _, r := range remarks {
				c.remark(cmd, "%s", r)
			}
			return c.showChanges(cmd, args, changes)
		},
	}
	c.register(cmd)
	return cmd
}

// printed returns the tables of an earlier report, or those that a report on a
// site would have.
func (c *common) printed(cmd *cobra.Command, path string) ([]report.Printed, error) {
	if dir, ok := reportTables(path); ok {
		return report.ReadPrinted(os.DirFS(dir))
	}
	profiles, err := c.loadAll(cmd, []string{path}, profile.Options{})
	if err != nil {
		return nil, err
	}
	p := profiles[0]
	found, err := review.Review(p)
	if err != nil {
		return nil, err
	}
	values, err := design.Values(p)
	if err != nil {
		return nil, err
	}
	tables := report.Tables(report.Content{Profile: p, Found: found, Values: values, Design: true})
	return report.Print(tables, c.unitSystem())
}

// reportTables returns the folder of the tables of a report: a site has none
// called profile or sources.
func reportTables(path string) (string, bool) {
	for _, dir := range []string{filepath.Join(path, "tables"), path} {
		for _, name := range []string{"profile.csv", "sources.csv"} {
			if info, err := os.Stat(filepath.Join(dir, name)); err == nil && info.Mode().IsRegular() {
				return dir, true
			}
		}
	}
	return "", false
}

// showChanges prints the changes, under a line that counts them.
func (c *common) showChanges(cmd *cobra.Command, args []string, changes []report.Change) error {
	if c.format != "table" {
		value := struct {
			Old     string          `json:"old"`
			New     string          `json:"new"`
			Changes []report.Change `json:"changes"`
		}{args[0], args[1], append([]report.Change{}, changes...)}
		return c.show(cmd, value, report.ChangesTable(changes))
	}
	var b bytes.Buffer
	fmt.Fprintln(&b, report.ChangesSummary(changes))
	if len(changes) > 0 {
		b.WriteByte('\n')
		if err := report.ChangesTable(report.Brief(changes)).WriteText(&b, c.unitSystem()); err != nil {
			return err
		}
	}
	return c.deliver(cmd, b.Bytes())
}
