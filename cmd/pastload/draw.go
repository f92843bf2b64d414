package main

import (
	"errors"
	"fmt"
	"io"
	"strconv"
	"strings"

	"github.com/spf13/cobra"

	"pastload/profile"
	"pastload/profile/review"
	"pastload/render/report"
	"pastload/render/sheet"
)

func newDrawCommand() *cobra.Command {
	var c common
	var paper string
	cmd := &cobra.Command{
		Use:     "draw SITE... -o DIR",
		Short:   "SVG drawings: the depth profile of each borehole and each compression curve",
		Example: `  pastload draw mysite -o drawings --paper A3`,
		Args:    sites,
		RunE: func(cmd *cobra.Command, paths []string) error {
			if err := c.check(); err != nil {
				return err
			}
			if c.output == "" {
				return usagef("draw needs a folder: -o DIR")
			}
			page, err := paperSize(paper)
			if err != nil {
				return err
			}
			profiles, err := c.loadAll(cmd, paths, profile.Options{})
			if err != nil {
				return err
			}
			for i, dir := range siteFolders(c.output, paths) {
				found, err := review.Review(profiles[i])
				if err != nil {
					return err
				}
				figures, err := drawAll(profiles[i], found, page)
				if err != nil {
					return err
				}
				files := figureFiles("", figures)
				if err := writeFiles(dir, files); err != nil {
					return err
				}
				c.remark(cmd, "%s in %s", plural(len(files), "drawing"), dir)
			}
			return nil
		},
	}
	c.register(cmd)
	cmd.Flags().StringVar(&paper, "paper", "A4", "size of the depth sheets: A4 or A3")
	choices(cmd, "paper", "A4", "A3")
	return cmd
}

func paperSize(name string) (sheet.Page, error) {
	page, err := sheet.PageNamed(strings.ToUpper(name))
	if err != nil {
		return page, usagef("--paper: %w", err)
	}
	return page, nil
}

// drawAll draws every sheet of a site: the depth profile of each borehole, then
// the curve of each oedometer test.
func drawAll(p *profile.Profile, found review.Findings, page sheet.Page) (report.Figures, error) {
	var out report.Figures
	var err error
	names := make([]string, len(p.Boreholes))
	for i := range p.Boreholes {
		names[i] = p.Boreholes[i].Borehole
	}
	for i, name := range uniqueNames(names) {
		id := "depth-" + name
		in := sheet.DepthInput{
			Borehole: *p.Site.Borehole(names[i]), Profile: p.Boreholes[i], Settings: p.Site.Settings,
			Page: page, Figure: strconv.Itoa(i + 1), Sheet: i + 1, Of: len(names), ID: id,
			Flags: flags(found, names[i]),
		}
		svg, err := drawn(func(w io.Writer) error { return sheet.Depth(w, in) })
		if err != nil {
			return out, fmt.Errorf("the depth sheet of %s: %w", names[i], err)
		}
		out.Depth = append(out.Depth, report.Figure{ID: id, Caption: "Depth profile of " + names[i], SVG: svg, Large: page.Name == sheet.A3.Name})
	}
	if out.Curves, err = drawCurves(p); err != nil {
		return out, err
	}
	out.Other, err = drawSummary(p)
	return out, err
}

// drawSummary draws the site by strata, where it has anything to summarise.
func drawSummary(p *profile.Profile) ([]report.Figure, error) {
	in := sheet.SummaryInput{Profiles: p.Boreholes, Settings: p.Site.Settings, Page: sheet.A3, Sheet: 1, Of: 1, ID: "summary"}
	svg, err := drawn(func(w io.Writer) error { return sheet.Summary(w, in) })
	switch {
	case errors.Is(err, sheet.ErrNoStrata):
		return nil, nil
	case err != nil:
		return nil, fmt.Errorf("the stratum summary: %w", err)
	}
	return []report.Figure{{ID: in.ID, Caption: "All boreholes by stratum", SVG: svg, Large: true}}, nil
}

// drawCurves draws every oedometer test that has a curve to show.
func drawCurves(p *profile.Profile) ([]report.Figure, error) {
	names := make([]string, len(p.Specimens))
	for i := range p.Specimens {
		names[i] = p.Specimens[i].Name
	}
	var out []report.Figure
	for i, name := range uniqueNames(names) {
		id := "curve-" + name
		in := sheet.CurveInput{
			Specimen: p.Specimens[i], Settings: p.Site.Settings, Page: sheet.A4,
			Figure: strconv.Itoa(len(p.Boreholes) + i + 1), Sheet: i + 1, Of: len(names), ID: id,
		}
		svg, err := drawn(func(w io.Writer) error { return sheet.Curve(w, in) })
		if errors.Is(err, sheet.ErrNoCurve) {
			continue
		}
		if err != nil {
			return out, fmt.Errorf("the curve of %s: %w", names[i], err)
		}
		out = append(out, report.Figure{ID: id, Caption: "Compression curve of " + names[i], SVG: svg})
	}
	return out, nil
}

// flags marks the findings about a borehole by their numbers.
func flags(found review.Findings, borehole string) []sheet.Flag {
	var out []sheet.Flag
	for i := range found {
		f := &found[i]
		mark := func(name string, depth profile.Number) {
			if name == borehole && depth.Known {
				out = append(out, sheet.Flag{Depth: depth.Value, Label: strconv.Itoa(i + 1)})
			}
		}
		if f.Severity.Rank() < review.Doubt.Rank() {
			continue
		}
		mark(f.Borehole, f.Depth)
		for _, a := range f.Also {
			mark(a.Borehole, a.Depth)
		}
	}
	return out
}

// figureFiles makes files of figures, below a folder.
func figureFiles(folder string, f report.Figures) []file {
	var files []file
	for _, set := range [][]report.Figure{f.Depth, f.Curves, f.Other} {
		for _, g := range set {
			files = append(files, file{folder + g.ID + ".svg", g.SVG})
		}
	}
	return files
}
