package main

import (
	"github.com/spf13/cobra"

	"pastload/profile"
	"pastload/profile/design"
	"pastload/render/report"
)

func newDesignCommand() *cobra.Command {
	var c common
	var perBorehole, ways, line, effective bool
	var estimate, experience string
	var average float64
	cmd := &cobra.Command{
		Use:   "design SITE...",
		Short: "Values per stratum: statistics, cautious values, and what was adopted",
		Example: `  pastload design mysite
  pastload design mysite --per-borehole --ways
  pastload design mysite --line --format csv -o line.csv`,
		Args: sites,
		RunE: func(cmd *cobra.Command, paths []string) error {
			if err := c.check(); err != nil {
				return err
			}
			opt := design.Options{PerBorehole: perBorehole, EffectiveCount: effective, AverageOver: average, Experience: experience}
			switch estimate {
			case "mean":
			case "fractile":
				opt.Estimate = design.Fractile
			default:
				return usagef("--estimate %q: want mean or fractile", estimate)
			}
			profiles, err := c.loadAll(cmd, paths, profile.Options{})
			if err != nil {
				return err
			}
			var strata []design.Stratum
			var points []design.LinePoint
			for _, p := range profiles {
				s, err := opt.Values(p)
				if err != nil {
					return err
				}
				site := ""
				if len(profiles) > 1 { // strata and boreholes of one name at two sites are two
					site = p.Site.Name + "/"
				}
				for i := range p.Boreholes {
					for _, l := range design.Line(p.Boreholes[i], s) {
						l.Borehole = site + l.Borehole
						points = append(points, l)
					}
				}
				for i := range s {
					s[i].Stratum = site + s[i].Stratum
				}
				strata = append(strata, s...)
			}
			value := struct {
				Strata []design.Stratum   `json:"strata"`
				Line   []design.LinePoint `json:"line,omitempty"`
			}{Strata: strata}
			tables := []*report.Table{report.Design(strata), report.DesignWarnings(strata)}
			if line {
				value.Line = points
				tables = []*report.Table{report.Line(points)}
			} else if ways {
				tables = append([]*report.Table{report.Ways(strata)}, tables...)
			} else if c.format == "table" {
				tables[0] = tables[0].Only("stratum", "borehole", "parameter", "unit", "n", "left_out", "min", "max", "mean", "sd", "cov", "trend", "low", "high", "side", "adopted")
			}
			return c.show(cmd, value, tables...)
		},
	}
	c.register(cmd)
	f := cmd.Flags()
	f.BoolVar(&perBorehole, "per-borehole", false, "also each stratum in each borehole")
	f.BoolVar(&ways, "ways", false, "what each published way gives")
	f.BoolVar(&line, "line", false, "the design line of σ′p with depth, ready for a settlement calculation")
	f.StringVar(&estimate, "estimate", "mean", "what low and high estimate: the mean, or a fractile where failure may be local")
	f.BoolVar(&effective, "effective-count", false, "count results that are close in depth as fewer")
	f.Float64Var(&average, "average-over", 0, "also the average over so many metres of ground")
	f.StringVar(&experience, "experience", "none", "comparable experience: none, medium or extensive")
	choices(cmd, "estimate", "mean", "fractile")
	choices(cmd, "experience", "none", "medium", "extensive")
	return cmd
}
