package main

import (
	"fmt"
	"runtime/debug"
	"strings"

	"github.com/spf13/cobra"

	"pastload/render/report"
)

// common are the flags that every command on a site takes.
type common struct {
	format  string
	output  string
	units   string
	decimal string
	quiet   bool
	noColor bool
}

// register adds the flags to a command.
func (c *common) register(cmd *cobra.Command) {
	f := cmd.Flags()
	f.StringVar(&c.format, "format", "table", "how to print the results: table, csv or json")
	f.StringVarP(&c.output, "output", "o", "", "write to this file (folder for draw and report) instead of standard output")
	f.StringVar(&c.units, "units", "si", "units of tables and CSV: si or us; JSON is always SI")
	f.StringVar(&c.decimal, "decimal", "", "the decimal mark of the tables, . or , where a file does not tell it by itself")
	f.BoolVar(&c.quiet, "quiet", false, "print no remarks, only results and errors")
	f.BoolVar(&c.noColor, "no-color", false, "print no colour (the output has none today; accepted for scripts)")
	choices(cmd, "format", "table", "csv", "json")
	choices(cmd, "units", "si", "us")
}

// choices completes a flag with its values.
func choices(cmd *cobra.Command, flag string, values ...string) {
	if err := cmd.RegisterFlagCompletionFunc(flag, cobra.FixedCompletions(values, cobra.ShellCompDirectiveNoFileComp)); err != nil {
		panic(err) // a flag that does not exist: our own mistake
	}
}

// check reports a flag value that is none of its choices.
func (c *common) check() error {
	switch c.format {
	case "table", "csv", "json":
	default:
		return usagef("--format %q: want table, csv or json", c.format)
	}
	switch c.decimal {
	case "", ".", ",":
	default:
		return usagef("--decimal %q: want . or ,", c.decimal)
	}
	switch c.units {
	case "si", "us":
	default:
		return usagef("--units %q: want si or us", c.units)
	}
	return nil
}

func (c *common) unitSystem() report.Units {
	if c.units == "us" {
		return report.US
	}
	return report.SI
}

// newRootCommand builds the whole command tree afresh.
func newRootCommand() *cobra.Command {
	root := &cobra.Command{
		Use:   "pastload",
		Short: "Stress history of the ground from borehole and laboratory tables",
		Long: `pastload reads the tables of a ground investigation and works out, for every
layer, how hard the ground was pressed in the past compared with today.

A site is a folder of CSV tables, one .xlsx workbook with sheets of the same
names, or a single CSV of results with depth. Start with:

  pastload init mysite --demo
  pastload report mysite -o out`,
		Args:          cobra.NoArgs,
		SilenceUsage:  true,
		SilenceErrors: true,
		Version:       version(),
		RunE:          func(cmd *cobra.Command, _ []string) error { return cmd.Help() },
	}
	cobra.MousetrapHelpText = "" // started by a double click it shows its help like any program
	root.SetFlagErrorFunc(func(cmd *cobra.Command, err error) error { return usageError{suggestFlag(cmd, err)} })
	root.CompletionOptions.HiddenDefaultCmd = true
	root.AddCommand(
		newInitCommand(),
		newProfileCommand(),
		newDrawCommand(),
		newReportCommand(),
		newCorrelateCommand(),
		newYieldCommand(),
		newDesignCommand(),
		newReviewCommand(),
		newDecideCommand(),
		newExplainCommand(),
		newVerifyCommand(),
		newCompareCommand(),
	)
	for _, c := range append(root.Commands(), root) {
		c.Args = usageArgs(c.Args)
	}
	return root
}

// usageArgs makes an argument error a usage error.
func usageArgs(check cobra.PositionalArgs) cobra.PositionalArgs {
	return func(cmd *cobra.Command, args []string) error {
		if check == nil {
			return nil
		}
		if err := check(cmd, args); err != nil {
			if cmd.HasParent() {
				return usagef("%w; usage: %s", err, cmd.UseLine())
			}
			return usageError{err}
		}
		return nil
	}
}

// sites accepts one or more sites.
func sites(cmd *cobra.Command, args []string) error {
	if len(args) == 0 {
		return fmt.Errorf("no SITE given: name a folder of tables, a .csv or an .xlsx")
	}
	return nil
}

// version returns the module version and revision that the program was built from.
func version() string {
	info, ok := debug.ReadBuildInfo()
	if !ok {
		return "unknown"
	}
	v := info.Main.Version
	for _, s := range info.Settings {
		if s.Key == "vcs.revision" && !strings.Contains(v, s.Value[:min(12, len(s.Value))]) {
			v += " " + s.Value[:min(12, len(s.Value))]
		}
	}
	return v + " " + info.GoVersion
}
