package main

import (
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"strings"
	"time"

	"github.com/spf13/cobra"

	"pastload/profile"
	"pastload/profile/intake"
	"pastload/profile/review"
)

// decideFlags are what a decision is made of on the command line.
type decideFlags struct {
	borehole, specimen, quantity string
	depth                        float64
	leaveOut, keep               bool
	adopt                        float64
	reason, by, date             string
}

func newDecideCommand() *cobra.Command {
	var c common
	var d decideFlags
	cmd := &cobra.Command{
		Use:   "decide SITE [FINDING]",
		Short: "Record what the engineer decided about a result",
		Long: `decide adds a row to the decisions table of a site: leave out, keep, or adopt a
value, with reason, initials and date. It names the result by the identifier of
a finding, as review prints it, or by borehole, depth or specimen, and quantity.
The value that stands in the tables today is recorded with it, so that a later
change is noticed. The table is replaced whole or not at all; two runs at once
wait for each other.`,
		Example: `  pastload decide mysite stress-history/bh3/7.20/bh3-u5/preconsolidation-stress --leave-out --reason "disturbed tube" --by E.V. --date 2021-12-02
  pastload decide mysite --borehole BH1 --depth 7.4 --quantity "recompression index" --adopt 0.058 --reason "slope of the loop" --by E.V. --date 2021-12-02`,
		Args: cobra.RangeArgs(1, 2),
		RunE: func(cmd *cobra.Command, args []string) error {
			decision, err := d.decision(cmd)
			if err != nil {
				return err
			}
			path, err := decisionsFile(args[0])
			if err != nil {
				return err
			}
			unlock, err := lock(path)
			if err != nil {
				return err
			}
			defer unlock()
			profiles, err := c.loadAll(cmd, args[:1], profile.Options{})
			if err != nil {
				return err
			}
			p := profiles[0]
			if len(args) == 2 {
				if err := fromFinding(&decision, p, args[1]); err != nil {
					return err
				}
			}
			if err := complete(&decision, p); err != nil {
				return err
			}
			if err := undecided(decision, p.Site); err != nil {
				return err
			}
			if err := record(args[0], path, decision); err != nil {
				return err
			}
			c.remark(cmd, "recorded in %s: %s %s", path, decision.Decision, decision.Quantity)
			return nil
		},
	}
	f := cmd.Flags()
	f.StringVar(&d.borehole, "borehole", "", "borehole of the result")
	f.Float64Var(&d.depth, "depth", 0, "depth of the result in m")
	f.StringVar(&d.specimen, "specimen", "", "specimen of the result")
	f.StringVar(&d.quantity, "quantity", "", "what was measured, as the results table names it")
	f.BoolVar(&d.leaveOut, "leave-out", false, "leave the value out; it stays on drawings and in tables")
	f.BoolVar(&d.keep, "keep", false, "keep the value in spite of a finding")
	f.Float64Var(&d.adopt, "adopt", 0, "adopt this value instead, in the quantity's own unit")
	f.StringVar(&d.reason, "reason", "", "why (required)")
	f.StringVar(&d.by, "by", "", "initials of who decides (required)")
	f.StringVar(&d.date, "date", "", "ISO date, e.g. 2021-12-02 (required)")
	f.BoolVar(&c.quiet, "quiet", false, "print no remarks, only errors")
	return cmd
}

// decision checks the flags. Every one that is missing is named.
func (d *decideFlags) decision(cmd *cobra.Command) (profile.Decision, error) {
	out := profile.Decision{Borehole: d.borehole, Specimen: d.specimen, Quantity: d.quantity, Reason: d.reason, By: d.by, Date: d.date}
	if cmd.Flags().Changed("depth") {
		out.Depth = profile.Known(d.depth)
	}
	kinds := 0
	if d.leaveOut {
		out.Decision, kinds = profile.LeaveOut, kinds+1
	}
	if d.keep {
		out.Decision, kinds = profile.Keep, kinds+1
	}
	if cmd.Flags().Changed("adopt") {
		out.Decision, out.Value, kinds = profile.AdoptValue, profile.Known(d.adopt), kinds+1
	}
	var missing []string
	if kinds != 1 {
		missing = append(missing, "one of --leave-out, --keep and --adopt")
	}
	for _, f := range []struct{ name, value string }{{"--reason", d.reason}, {"--by", d.by}, {"--date", d.date}} {
		if strings.TrimSpace(f.value) == "" {
			missing = append(missing, f.name)
		}
	}
	if len(missing) > 0 {
		return out, usagef("a decision needs %s", strings.Join(missing, ", "))
	}
	if _, err := time.Parse(time.DateOnly, d.date); err != nil {
		return out, usagef("--date %q: want an ISO date, like 2021-12-02", d.date)
	}
	return out, nil
}

// fromFinding takes place and quantity from a finding.
func fromFinding(d *profile.Decision, p *profile.Profile, id string) error {
	found, err := review.Review(p)
	if err != nil {
		return err
	}
	for i := range found {
		if f := &found[i]; f.ID == id {
			d.Borehole, d.Depth, d.Specimen, d.Quantity = f.Borehole, f.Depth, f.Specimen, f.Quantity
			return nil
		}
	}
	return usagef("no finding %q; 'pastload review' prints the identifiers", id)
}

// complete notes the value that stands in the tables today.
func complete(d *profile.Decision, p *profile.Profile) error {
	if d.Quantity == "" || d.Specimen == "" && !d.Depth.Known && d.Borehole == "" {
		return usagef("name a finding, or the place with --borehole, --depth or --specimen and the --quantity")
	}
	for i := range p.Site.Boreholes {
		b := &p.Site.Boreholes[i]
		for j := range b.Results {
			r := &b.Results[j]
			if !d.Concerns(b.Name, r.Depth.Value, r.Specimen) {
				continue
			}
			for _, q := range profile.Quantities {
				if n := q.Of(r); strings.EqualFold(q.Name, d.Quantity) && n.Known {
					d.Seen = *n
					return nil
				}
			}
		}
	}
	for i := range p.Boreholes {
		for _, t := range p.Boreholes[i].Tests {
			if d.Quantity == "preconsolidation stress" && d.Concerns(p.Boreholes[i].Borehole, t.Depth, t.Specimen) && t.Preconsolidation.Known {
				d.Seen = profile.Known(t.Preconsolidation.Best)
			}
		}
	}
	return nil
}

// undecided refuses a second decision on the same value: the first is changed in
// its row, or both would stand in the table.
func undecided(d profile.Decision, site *profile.Site) error {
	for i := range site.Decisions {
		old := &site.Decisions[i]
		if strings.EqualFold(old.Quantity, d.Quantity) && strings.EqualFold(old.Borehole, d.Borehole) &&
			strings.EqualFold(old.Specimen, d.Specimen) && old.Depth.Known == d.Depth.Known && old.Depth.Value == d.Depth.Value {
			return usagef("%s is decided on already at %s: change it there", d.Quantity, old.Source)
		}
	}
	return nil
}

// decisionsFile returns the path of a site's decisions table.
func decisionsFile(site string) (string, error) {
	info, err := os.Stat(site)
	if err != nil {
		return "", err
	}
	if !info.IsDir() {
		return "", usagef("%s is one file: decisions are kept in a table of their own; put the file in a folder as results.csv", site)
	}
	entries, err := os.ReadDir(site)
	if err != nil {
		return "", err
	}
	for _, e := range entries {
		if strings.EqualFold(e.Name(), "decisions.csv") {
			return filepath.Join(site, e.Name()), nil
		}
	}
	return filepath.Join(site, "decisions.csv"), nil
}

// record adds a decision to the table. The site is read again with it; where it
// does not read, or the decision is not what comes back, the old table is put in
// its place again.
func record(site, path string, d profile.Decision) error {
	old, err := os.ReadFile(path)
	missing := errors.Is(err, fs.ErrNotExist)
	if missing {
		old = []byte(intake.Template(string(intake.Decisions)))
	} else if err != nil {
		return err
	}
	data, err := intake.AppendDecision(old, d)
	if err != nil {
		return err
	}
	if err := writeWhole(path, data); err != nil {
		return err
	}
	err = holds(site, d)
	if err == nil {
		return nil
	}
	if missing {
		return errors.Join(err, os.Remove(path))
	}
	return errors.Join(err, writeWhole(path, old))
}

// holds tells whether a site reads, and its last decision is the one recorded
// and is about something that is there.
func holds(site string, d profile.Decision) error {
	p, err := load(site, profile.Options{}, intake.Options{})
	if err != nil {
		return err
	}
	if _, err := review.Review(p); err != nil {
		return err
	}
	n := len(p.Site.Decisions)
	if n == 0 || p.Site.Decisions[n-1].Reason != d.Reason || p.Site.Decisions[n-1].Value.Value != d.Value.Value {
		return fmt.Errorf("the decision did not come back from the table as it was recorded")
	}
	return nil
}

// patience is how long a run waits for another that holds the lock.
const patience = 10 * time.Second

// lock keeps other runs from writing a table until it is unlocked.
func lock(path string) (unlock func(), err error) {
	name := path + ".lock"
	for waited := time.Duration(0); ; waited += 20 * time.Millisecond {
		f, err := os.OpenFile(name, os.O_CREATE|os.O_EXCL|os.O_WRONLY, 0o644)
		if err == nil {
			f.Close()
			return func() { os.Remove(name) }, nil
		}
		if !errors.Is(err, fs.ErrExist) {
			return nil, err
		}
		if waited >= patience {
			return nil, fmt.Errorf("another run holds %s; if none is running, delete that file", name)
		}
		time.Sleep(20 * time.Millisecond)
	}
}
