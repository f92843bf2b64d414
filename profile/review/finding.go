package review

import (
	"cmp"
	"math"
	"slices"
	"strings"

	"pastload/profile"
)

// A Severity says how far a finding goes. The zero Severity is none.
type Severity string

// The severities, from the lightest to the heaviest.
const (
	Note     Severity = "note"     // worth knowing; nothing is wrong
	Doubt    Severity = "doubt"    // unlikely as it stands; look again
	Conflict Severity = "conflict" // two things that cannot both be right
	Error    Severity = "error"    // cannot be right as it stands
)

// Severities lists the severities from the lightest to the heaviest.
var Severities = []Severity{Note, Doubt, Conflict, Error}

// Rank returns 1 for a note to 4 for an error, 0 for none.
func (s Severity) Rank() int { return slices.Index(Severities, s) + 1 }

// A Finding is one cause for concern: what, where, by how much, what it usually
// means and what to do next.
type Finding struct {
	ID       string         `json:"id"`   // rule, place and quantity; the same in every run
	Rule     string         `json:"rule"` // identifier of the rule that speaks
	Severity Severity       `json:"severity"`
	Borehole string         `json:"borehole"`
	Depth    profile.Number `json:"depth_m"`
	Specimen string         `json:"specimen"`
	Stratum  string         `json:"stratum,omitempty"` // of a finding about a whole stratum
	Quantity string         `json:"quantity"`
	Found    string         `json:"found"`
	Wanted   string         `json:"wanted"`
	Message  string         `json:"message"`
	Causes   []string       `json:"causes"` // the most likely first
	Action   string         `json:"action"`
	Source   string         `json:"source"` // of the rule, with how far it was verified

	Evidence  []string          `json:"evidence,omitempty"` // what else the same cause breaks
	Suggested *Suggestion       `json:"suggested,omitempty"`
	Impact    float64           `json:"impact"`         // see Findings
	Also      []Place           `json:"also,omitempty"` // further places of the same cause
	Answered  *profile.Decision `json:"answered,omitempty"`
	Stale     bool              `json:"stale,omitempty"` // the value has changed since it was answered
	Cells     []string          `json:"cells,omitempty"` // file:line:column

	with []variable // the quantities that the cause may lie in
	gain float64    // of the cause, as minus a logarithm of odds
	fix  correction // of a cause that bears on the stress history
}

// A Suggestion is the one change that would restore agreement.
type Suggestion struct {
	Quantity string         `json:"quantity"`
	Value    profile.Number `json:"value"`          // in the unit of the quantity
	How      string         `json:"how"`            // the slip in words: "two digits exchanged"
	Unit     string         `json:"unit,omitempty"` // the unit that would make it fit
	Makes    int            `json:"makes"`          // how many checks would agree that do not now
}

// A Place is where something was sampled.
type Place struct {
	Borehole string         `json:"borehole"`
	Depth    profile.Number `json:"depth_m"`
	Specimen string         `json:"specimen"`
}

// Findings are ordered by severity, heaviest first, and then by Impact: the share
// by which the change in question moves the mean of its quantity in the stratum,
// as a natural logarithm, times the weight of that quantity in settlement
// (project definition).
type Findings []Finding

// Worst returns the heaviest severity among the open findings, "" for none.
func (f Findings) Worst() Severity {
	var worst Severity
	for i := range f {
		if f[i].IsOpen() && f[i].Severity.Rank() > worst.Rank() {
			worst = f[i].Severity
		}
	}
	return worst
}

// IsOpen tells whether no decision answers the finding, or one that is stale.
func (f *Finding) IsOpen() bool { return f.Answered == nil || f.Stale }

// Open returns the findings that nobody has answered, and those whose answer is
// stale.
func (f Findings) Open() Findings {
	return f.only(func(x *Finding) bool { return x.IsOpen() })
}

// Answered returns the findings that a decision answers.
func (f Findings) Answered() Findings {
	return f.only(func(x *Finding) bool { return !x.IsOpen() })
}

// AtLeast returns the findings of a severity or a heavier one.
func (f Findings) AtLeast(s Severity) Findings {
	return f.only(func(x *Finding) bool { return x.Severity.Rank() >= s.Rank() })
}

func (f Findings) only(keep func(*Finding) bool) Findings {
	var out Findings
	for i := range f {
		if keep(&f[i]) {
			out = append(out, f[i])
		}
	}
	return out
}

// sort puts the findings in order. boreholes gives the order of the site.
func (f Findings) sort(boreholes map[string]int) {
	slices.SortStableFunc(f, func(a, b Finding) int {
		return cmp.Or(
			cmp.Compare(b.Severity.Rank(), a.Severity.Rank()),
			cmp.Compare(b.Impact, a.Impact),
			cmp.Compare(boreholes[a.Borehole], boreholes[b.Borehole]),
			cmp.Compare(a.Depth.Value, b.Depth.Value),
			strings.Compare(a.ID, b.ID),
		)
	})
}

// identify gives every finding its identifier; a second finding of one rule,
// place and quantity is counted.
func (f Findings) identify() {
	seen := map[string]int{}
	for i := range f {
		x := &f[i]
		x.Depth = sane(x.Depth)
		if x.Suggested != nil {
			x.Suggested.Value = sane(x.Suggested.Value)
		}
		for j := range x.Also {
			x.Also[j].Depth = sane(x.Also[j].Depth)
		}
		parts := []string{x.Rule}
		for _, p := range []string{x.Borehole, depthText(x.Depth), x.Specimen, x.Stratum, x.Quantity} {
			if p != "" {
				parts = append(parts, slug(p))
			}
		}
		id := strings.Join(parts, "/")
		seen[id]++
		if n := seen[id]; n > 1 {
			id += "/" + whole(n)
		}
		x.ID = id
	}
}

// sane returns a number, not known where it is none: what is printed must be one.
func sane(n profile.Number) profile.Number {
	if math.IsNaN(n.Value) || math.IsInf(n.Value, 0) {
		return profile.Number{}
	}
	return n
}

// slug writes text for an identifier: lower case, other than letters, digits and
// points as dashes.
func slug(s string) string {
	return strings.Map(func(r rune) rune {
		switch {
		case r >= 'a' && r <= 'z', r >= '0' && r <= '9', r == '.', r > 127:
			return r
		case r >= 'A' && r <= 'Z':
			return r + 'a' - 'A'
		}
		return '-'
	}, s)
}
