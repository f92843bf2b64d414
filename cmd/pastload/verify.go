package main

import (
	"bytes"
	"fmt"

	"github.com/spf13/cobra"

	"pastload/render/report"
)

func newVerifyCommand() *cobra.Command {
	var c common
	cmd := &cobra.Command{
		Use:   "verify",
		Short: "Published examples computed afresh: expected beside obtained",
		Long: `verify runs the published examples that are built into the program and prints
what was published beside what is obtained now, with the source, how far it was
verified and the tolerance. It is a record to keep with a calculation. The exit
status is 1 if any example is not reproduced.`,
		Example: `  pastload verify
  pastload verify --format csv -o verification.csv`,
		Args: cobra.NoArgs,
		RunE: func(cmd *cobra.Command, _ []string) error {
			if err := c.check(); err != nil {
				return err
			}
			if c.units == "us" {
				return usagef("verify prints every example in the units of its source: leave --units out")
			}
			all := report.Verify()
			if err := c.showExamples(cmd, all); err != nil {
				return err
			}
			if n := report.Differing(all); n > 0 {
				return fmt.Errorf("%s not reproduced", plural(n, "example"))
			}
			return nil
		},
	}
	c.register(cmd)
	return cmd
}

// showExamples prints the record: the program's version first and the count last
// in the table, one table of all subjects in CSV.
func (c *common) showExamples(cmd *cobra.Command, all []report.Example) error {
	if c.format != "table" {
		value := struct {
			Version  string           `json:"version"`
			Examples []report.Example `json:"examples"`
		}{version(), all}
		return c.show(cmd, value, report.VerificationTable(all))
	}
	var b bytes.Buffer
	fmt.Fprintf(&b, "pastload %s\n\n", version())
	for _, t := range report.Verification(all) {
		if err := t.WriteText(&b, report.SI); err != nil {
			return err
		}
		b.WriteByte('\n')
	}
	fmt.Fprintln(&b, report.VerificationSummary(all))
	return c.deliver(cmd, b.Bytes())
}
