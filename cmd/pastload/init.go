package main

import (
	"errors"
	"fmt"
	"io/fs"
	"os"
	"strings"

	"github.com/spf13/cobra"

	"pastload/profile/intake"
	"pastload/testdata"
)

func newInitCommand() *cobra.Command {
	var demo bool
	cmd := &cobra.Command{
		Use:   "init DIR [--demo]",
		Short: "Start a site: empty tables, or the worked scenario",
		Example: `  pastload init mysite
  pastload init demo --demo`,
		Args: cobra.ExactArgs(1),
		RunE: func(cmd *cobra.Command, args []string) error {
			dir := args[0]
			if err := mustBeFree(dir); err != nil {
				return err
			}
			files, err := emptyTables(), error(nil)
			if demo {
				files, err = demoTables()
			}
			if err != nil {
				return err
			}
			if err := writeFiles(dir, files); err != nil {
				return err
			}
			fmt.Fprintf(cmd.ErrOrStderr(), "%s in %s\n", plural(len(files), "table"), dir)
			if demo {
				fmt.Fprintf(cmd.ErrOrStderr(), "Next: pastload report %s -o out\n", dir)
			} else {
				fmt.Fprintf(cmd.ErrOrStderr(), "Fill in what you have and delete the rest; then: pastload report %s -o out\n", dir)
			}
			return nil
		},
	}
	cmd.Flags().BoolVar(&demo, "demo", false, "fill the tables with an invented site of three boreholes")
	return cmd
}

// mustBeFree refuses a folder that holds anything: a site is never overwritten.
func mustBeFree(dir string) error {
	entries, err := os.ReadDir(dir)
	switch {
	case errors.Is(err, fs.ErrNotExist):
		return nil
	case err != nil:
		return err
	case len(entries) > 0:
		return fmt.Errorf("%s is not empty; nothing was written; name a new folder", dir)
	}
	return nil
}

// emptyTables returns every table with its heading and no rows. The settings
// table comes with the rows that are worth looking at.
func emptyTables() []file {
	var files []file
	for _, t := range intake.Tables() {
		files = append(files, file{string(t.Table) + ".csv", []byte(intake.Template(string(t.Table)))})
	}
	return files
}

func demoTables() ([]file, error) {
	var files []file
	demo := testdata.Demo()
	err := fs.WalkDir(demo, ".", func(path string, d fs.DirEntry, err error) error {
		if err != nil || d.IsDir() || !strings.HasSuffix(path, ".csv") {
			return err
		}
		data, err := fs.ReadFile(demo, path)
		files = append(files, file{path, data})
		return err
	})
	return files, err
}
