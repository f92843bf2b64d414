package main

import (
	"errors"
	"path/filepath"
	"strings"
	"sync"

	"github.com/spf13/cobra"

	"pastload/profile"
	"pastload/profile/intake"
)

// loadAll reads and computes several sites side by side. The profiles come back
// in the order of the paths. All problems of all sites are in the error.
func (c *common) loadAll(cmd *cobra.Command, paths []string, opt profile.Options, need ...intake.Table) ([]*profile.Profile, error) {
	profiles := make([]*profile.Profile, len(paths))
	errs := make([]error, len(paths))
	var wait sync.WaitGroup
	for i, path := range paths {
		wait.Go(func() { profiles[i], errs[i] = load(path, opt, intake.Options{Need: need, Decimal: c.decimal}) })
	}
	wait.Wait()
	if err := mergeErrors(errs); err != nil {
		return nil, err
	}
	for _, p := range profiles {
		for _, n := range p.Site.Notes {
			c.remark(cmd, "%s", strings.TrimPrefix(n.Where+": "+n.Message, ": "))
		}
	}
	return profiles, nil
}

func load(path string, opt profile.Options, in intake.Options) (*profile.Profile, error) {
	site, err := intake.Read(path, in)
	if err != nil {
		return nil, err
	}
	return profile.Build(site, opt)
}

// mergeErrors joins the errors of several sites. Input problems of all of them
// are reported together; any other failure comes first.
func mergeErrors(errs []error) error {
	var others []error
	var problems intake.Problems
	var unbuilt profile.Problems
	for _, err := range errs {
		var in intake.Problems
		var un profile.Problems
		switch {
		case err == nil:
		case errors.As(err, &in):
			problems = append(problems, in...)
		case errors.As(err, &un):
			unbuilt = append(unbuilt, un...)
		default:
			others = append(others, err)
		}
	}
	switch {
	case len(others) > 0:
		return errors.Join(others...)
	case len(problems) > 0 && len(unbuilt) > 0:
		return inputErrors{problems, unbuilt}
	case len(problems) > 0:
		return problems
	case len(unbuilt) > 0:
		return unbuilt
	}
	return nil
}

// inputErrors are problems of reading some sites and of building others.
type inputErrors struct {
	read  intake.Problems
	built profile.Problems
}

func (e inputErrors) Error() string   { return e.read.Error() + "\n" + e.built.Error() }
func (e inputErrors) Unwrap() []error { return []error{e.read, e.built} }

// siteFolders names an output folder for each site: the folder itself for one
// site, a subfolder for each of several.
func siteFolders(out string, paths []string) []string {
	if len(paths) == 1 {
		return []string{out}
	}
	names := make([]string, len(paths))
	for i, p := range paths {
		base := filepath.Base(filepath.Clean(p))
		names[i] = strings.TrimSuffix(base, filepath.Ext(base))
	}
	dirs := make([]string, len(paths))
	for i, n := range uniqueNames(names) {
		dirs[i] = filepath.Join(out, n)
	}
	return dirs
}
