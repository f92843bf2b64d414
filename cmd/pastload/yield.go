package main

import (
	"github.com/spf13/cobra"

	"pastload/profile"
	"pastload/profile/intake"
	"pastload/render/report"
)

func newYieldCommand() *cobra.Command {
	var c common
	var stages bool
	cmd := &cobra.Command{
		Use:   "yield SITE...",
		Short: "Yield stress, compressibility and grade of every oedometer curve",
		Long: `yield reads every oedometer curve by several published constructions and tells
how far they agree, whether the specimen was good enough and whether the test
went far enough to know. It needs the oedometer table alone; with boreholes,
strata and water it also rates the specimens at their present stress.`,
		Example: `  pastload yield mysite
  pastload yield mysite --stages
  pastload yield oedometer.csv --format json`,
		Args: sites,
		RunE: func(cmd *cobra.Command, paths []string) error {
			if err := c.check(); err != nil {
				return err
			}
			profiles, err := c.loadAll(cmd, paths, profile.Options{CurvesOnly: true}, intake.Oedometer)
			if err != nil {
				return err
			}
			all := together(profiles)
			value := struct {
				Specimens []profile.Specimen `json:"specimens"`
			}{all.Specimens}
			if stages {
				return c.show(cmd, value, report.Stages(all.Specimens))
			}
			return c.show(cmd, value, report.Specimens(all.Specimens), report.Methods(all.Specimens), report.Grades(all.Specimens))
		},
	}
	c.register(cmd)
	cmd.Flags().BoolVar(&stages, "stages", false, "mv, modulus, cv, k and Cα of every load stage instead")
	return cmd
}
