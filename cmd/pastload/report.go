package main

import (
	"bytes"

	"github.com/spf13/cobra"

	"pastload/profile"
	"pastload/profile/design"
	"pastload/profile/review"
	"pastload/render/report"
	"pastload/render/sheet"
)

func newReportCommand() *cobra.Command {
	var c common
	var withoutDesign bool
	cmd := &cobra.Command{
		Use:   "report SITE... -o DIR",
		Short: "Everything: report.html, drawings, and the tables as CSV and workbook",
		Example: `  pastload report mysite -o out
  pastload report site1 site2 -o out     a subfolder for each site`,
		Args: sites,
		RunE: func(cmd *cobra.Command, paths []string) error {
			if err := c.check(); err != nil {
				return err
			}
			if c.output == "" {
				return usagef("report needs a folder: -o DIR")
			}
			profiles, err := c.loadAll(cmd, paths, profile.Options{})
			if err != nil {
				return err
			}
			for i, dir := range siteFolders(c.output, paths) {
				files, err := reportFiles(profiles[i], c.unitSystem(), !withoutDesign)
				if err != nil {
					return err
				}
				if err := writeFiles(dir, files); err != nil {
					return err
				}
				c.remark(cmd, "%s in %s; open %s/report.html", plural(len(files), "file"), dir, dir)
			}
			return nil
		},
	}
	c.register(cmd)
	cmd.Flags().BoolVar(&withoutDesign, "without-design", false, "keep to what was measured and derived: no cautious or adopted values, as for an investigation report")
	return cmd
}

// reportFiles makes every file of a report in memory.
func reportFiles(p *profile.Profile, u report.Units, withDesign bool) ([]file, error) {
	found, err := review.Review(p)
	if err != nil {
		return nil, err
	}
	figures, err := drawAll(p, found, sheet.A3)
	if err != nil {
		return nil, err
	}
	values, err := design.Values(p)
	if err != nil {
		return nil, err
	}
	if !withDesign {
		values = design.WithoutDesign(values)
	}
	effects, err := design.Effects(p)
	if err != nil {
		return nil, err
	}
	content := report.Content{Profile: p, Figures: figures, Values: values, Found: found, Effects: effects, Design: withDesign}
	var page, book bytes.Buffer
	if err := report.Compose(content).WriteHTML(&page, u); err != nil {
		return nil, err
	}
	tables := report.Tables(content)
	if err := report.WriteXLSX(&book, u, tables...); err != nil {
		return nil, err
	}
	files := []file{{"report.html", page.Bytes()}, {"tables.xlsx", book.Bytes()}}
	files = append(files, figureFiles("drawings/", figures)...)
	for _, t := range tables {
		var b bytes.Buffer
		if err := t.WriteCSV(&b, u); err != nil {
			return nil, err
		}
		files = append(files, file{"tables/" + t.Name + ".csv", b.Bytes()})
	}
	return files, nil
}
