package main

import (
	"bytes"
	"errors"
	"os"
	"path/filepath"
	"sync"

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
	var since string
	cmd := &cobra.Command{
		Use:   "report SITE... -o DIR",
		Short: "Everything: report.html, report.docx, drawings, and the tables as CSV and workbook",
		Example: `  pastload report mysite -o out
  pastload report mysite -o issue-b --since issue-a
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
				files, err := c.reportFiles(profiles[i], !withoutDesign, since)
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
	cmd.Flags().StringVar(&since, "since", "", "folder of an earlier report: adds a section on what has changed since")
	return cmd
}

// reportFiles makes every file of a report in memory. What does not wait for
// one another is made side by side.
func (c *common) reportFiles(p *profile.Profile, withDesign bool, since string) ([]file, error) {
	u := c.unitSystem()
	content := report.Content{Profile: p, Design: withDesign}
	err := sideBySide(
		func() (err error) {
			if content.Found, err = review.Review(p); err != nil {
				return err
			}
			content.Figures, err = drawAll(p, content.Found, sheet.A3)
			return err
		},
		func() (err error) {
			content.Values, err = design.Values(p)
			if err == nil && !withDesign {
				content.Values = design.WithoutDesign(content.Values)
			}
			if err == nil {
				content.Effects, err = design.Effects(p)
			}
			return err
		},
	)
	if err != nil {
		return nil, err
	}
	tables := report.Tables(content)
	if since != "" {
		if content.Changes, err = changesSince(since, tables, u); err != nil {
			return nil, err
		}
		content.Since = filepath.Base(since)
	}
	document := report.Compose(content)
	var page, word, book bytes.Buffer
	var sheets []file
	err = sideBySide(
		func() error { return document.WriteHTML(&page, u) },
		func() error { return document.WriteDOCX(&word, u, nil) },
		func() error { return report.WriteXLSX(&book, u, tables...) },
		func() error {
			for _, t := range tables {
				var b bytes.Buffer
				if err := t.WriteCSV(&b, u); err != nil {
					return err
				}
				sheets = append(sheets, file{"tables/" + t.Name + ".csv", b.Bytes()})
			}
			return nil
		},
	)
	if err != nil {
		return nil, err
	}
	files := []file{{"report.html", page.Bytes()}, {"report.docx", word.Bytes()}, {"tables.xlsx", book.Bytes()}}
	return append(append(files, figureFiles("drawings/", content.Figures)...), sheets...), nil
}

// changesSince compares the tables of a report with those of an earlier one.
func changesSince(folder string, tables []*report.Table, u report.Units) ([]report.Change, error) {
	dir, ok := reportTables(folder)
	if !ok {
		return nil, usagef("--since %s: want the folder of an earlier report, with its tables", folder)
	}
	old, err := report.ReadPrinted(os.DirFS(dir))
	if err != nil {
		return nil, err
	}
	now, err := report.Print(tables, u)
	if err != nil {
		return nil, err
	}
	changes, _, err := report.Differences(old, now)
	if errors.Is(err, report.ErrOtherUnits) {
		return nil, usagef("--since: %w: give --units as the earlier report was printed", err)
	}
	return changes, err
}

// sideBySide runs jobs at the same time and joins their errors in order.
func sideBySide(jobs ...func() error) error {
	errs := make([]error, len(jobs))
	var wait sync.WaitGroup
	for i, job := range jobs {
		wait.Go(func() { errs[i] = job() })
	}
	wait.Wait()
	return errors.Join(errs...)
}
