package main

import (
	"fmt"
	"strconv"
	"strings"

	"github.com/spf13/cobra"

	"pastload/profile"
	"pastload/render/report"
)

func newProfileCommand() *cobra.Command {
	var c common
	var at string
	cmd := &cobra.Command{
		Use:   "profile SITE...",
		Short: "Stresses, preconsolidation stress, OCR, POP and zones with depth",
		Example: `  pastload profile mysite
  pastload profile mysite --format csv -o profile.csv
  pastload profile results.csv --at 3.2,5 --format json`,
		Args: sites,
		RunE: func(cmd *cobra.Command, paths []string) error {
			if err := c.check(); err != nil {
				return err
			}
			depths, err := depthList(at)
			if err != nil {
				return err
			}
			profiles, err := c.loadAll(cmd, paths, profile.Options{At: depths})
			if err != nil {
				return err
			}
			c.remarkDeep(cmd, profiles, depths)
			all := together(profiles)
			if c.format == "table" {
				return c.show(cmd, all, report.Terminal(all.Boreholes)...)
			}
			return c.show(cmd, all, report.Points(all.Boreholes...))
		},
	}
	c.register(cmd)
	cmd.Flags().StringVar(&at, "at", "", "further depths in m, separated by commas")
	return cmd
}

// remarkDeep says which of the depths asked for lie below a borehole.
func (c *common) remarkDeep(cmd *cobra.Command, profiles []*profile.Profile, depths []float64) {
	for _, p := range profiles {
		for _, b := range p.Boreholes {
			if len(b.Points) == 0 {
				continue
			}
			for _, d := range depths {
				if first, last := b.Points[0].Depth, b.Points[len(b.Points)-1].Depth; d < first || d > last {
					c.remark(cmd, "%s: %g m lies outside its profile, %g to %g m", b.Borehole, d, first, last)
				}
			}
		}
	}
}

// depthList reads a list of depths.
func depthList(text string) ([]float64, error) {
	if text == "" {
		return nil, nil
	}
	var out []float64
	for _, s := range strings.Split(text, ",") {
		v, err := strconv.ParseFloat(strings.TrimSpace(s), 64)
		if err != nil || v != v || v < 0 || v > 1e4 {
			return nil, usagef("--at %q: want depths in m, like 3.2,5", text)
		}
		out = append(out, v)
	}
	return out, nil
}

// together puts the boreholes of several sites under one roof for printing.
// Where there are several sites a borehole's name is led by its site's.
func together(profiles []*profile.Profile) *profile.Profile {
	if len(profiles) == 1 {
		return profiles[0]
	}
	all := &profile.Profile{}
	for _, p := range profiles {
		for _, b := range p.Boreholes {
			b.Borehole = fmt.Sprintf("%s/%s", p.Site.Name, b.Borehole)
			all.Boreholes = append(all.Boreholes, b)
		}
		for _, s := range p.Specimens {
			s.Borehole = fmt.Sprintf("%s/%s", p.Site.Name, s.Borehole)
			all.Specimens = append(all.Specimens, s)
		}
	}
	return all
}
