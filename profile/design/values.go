package design

import (
	"cmp"
	"errors"
	"fmt"
	"slices"

	"pastload/profile"
)

// ErrNoProfile says that there is no profile, or a profile without its site.
var ErrNoProfile = errors.New("no profile to take values from")

// Options change what values are given and how. The zero Options are the
// defaults.
type Options struct {
	PerBorehole        bool     // also a Stratum for each borehole that has results in it
	Estimate           Estimate // what the advised value is an estimate of: the mean, or a fractile where failure may be local
	EffectiveCount     bool     // count correlated values as fewer in every formula
	ScaleOfFluctuation float64  // vertical, m; 0 takes a published mean for each parameter, marked assumed
	AverageOver        float64  // m; also give the average over so much ground; 0 does not
	WeightByGrade      bool     // weigh σ′p, OCR and POP by the grade of their test: A and not graded 1, B 0.6, C 0.3
	Experience         string   // comparable experience for EN 1997-2 Annex Q: "none" or "", "medium", "extensive"
}

// A Stratum is the values of one stratum, across boreholes or in one of them.
type Stratum struct {
	Stratum    string      `json:"stratum"`
	Borehole   string      `json:"borehole,omitempty"` // "" across boreholes
	Boreholes  []string    `json:"boreholes"`          // in which it has results
	Edition    Edition     `json:"edition"`
	Parameters []Parameter `json:"parameters"`
	Notes      []string    `json:"notes,omitempty"`
}

// A Parameter is what is known of one quantity in a stratum. Low and High are
// what the advised way gives; where a trend is followed they are those of its line
// at the middle of the tested depths, and Trend.Points has the rest.
type Parameter struct {
	Parameter string `json:"parameter"`
	Symbol    string `json:"symbol"`
	Unit      string `json:"unit"`
	Key       string `json:"key"`
	Origin    string `json:"origin"` // "measured" or "derived"
	Summary
	LeftOut      int            `json:"left_out"`
	Bounds       int            `json:"bounds"`  // recorded as "at least" or "at most": not counted
	Assumed      int            `json:"assumed"` // recorded as assumed: not counted
	Low          profile.Number `json:"low"`
	High         profile.Number `json:"high"`
	Side         string         `json:"side"` // the unfavourable one: "low", "high" or "both"
	Governs      []Governs      `json:"governs,omitempty"`
	Way          string         `json:"way"`    // identifier of the advised way
	Method       string         `json:"method"` // the advised way in words
	MethodReason string         `json:"method_reason"`
	Term         string         `json:"term"`    // what the code edition calls a value so found
	Adopted      profile.Number `json:"adopted"` // by the engineer
	Reason       string         `json:"reason"`  // of the adopted value; where none is adopted, of the method
	Adoptions    []Adoption     `json:"adoptions,omitempty"`
	Distribution string         `json:"distribution"`
	AssumedCOV   profile.Number `json:"assumed_cov"`
	COVSource    string         `json:"assumed_cov_source,omitempty"`
	EffectiveN   profile.Number `json:"effective_n"`
	Scale        profile.Number `json:"scale_of_fluctuation_m"`
	ScaleAssumed bool           `json:"scale_of_fluctuation_assumed"`
	RobustSD     profile.Number `json:"robust_sd"`
	Trend        *Trend         `json:"trend"`
	Alternatives []Alternative  `json:"alternatives"`
	WithLeftOut  *Summary       `json:"with_left_out,omitempty"` // as if nothing had been left out
	Looks        []Look         `json:"looks,omitempty"`
	Observations []Observation  `json:"observations"`
	Warnings     []string       `json:"warnings"`
	facts        []string       // the warnings that are of what was measured
}

// Values returns the values of every stratum across boreholes, in the order in
// which the boreholes meet the strata, with the default Options.
//
// Results that were left out are counted but not used; bounds and assumed
// values are neither. The error wraps ErrNoProfile, or ErrOutOfRange where a
// value is not a finite number.
func Values(p *profile.Profile) ([]Stratum, error) { return Options{}.Values(p) }

// Values returns the values of every stratum: see the function Values. With
// PerBorehole each stratum is followed by itself in each borehole.
func (o Options) Values(p *profile.Profile) ([]Stratum, error) {
	if p == nil || p.Site == nil {
		return nil, ErrNoProfile
	}
	rs := records(p)
	book := newAdoptions(p.Site, rs)
	var out []Stratum
	for _, name := range strataOf(p.Site, rs) {
		var here []*record
		var boreholes []string
		for _, r := range rs {
			if r.stratum != name {
				continue
			}
			here = append(here, r)
			if len(boreholes) == 0 || boreholes[len(boreholes)-1] != r.borehole {
				boreholes = append(boreholes, r.borehole)
			}
		}
		scopes := []string{""}
		if o.PerBorehole {
			scopes = append(scopes, boreholes...)
		}
		for _, scope := range scopes {
			s, err := o.stratum(p.Site, name, scope, boreholes, here, book)
			if err != nil {
				return nil, err
			}
			out = append(out, s)
		}
	}
	return out, nil
}

// strataOf returns the names of the strata from top to bottom as the boreholes
// meet them: a name that is new in a borehole goes below the one above it there.
// Names that only results use come last.
func strataOf(site *profile.Site, rs []*record) []string {
	var names []string
	for _, b := range site.Boreholes {
		at := 0
		for _, s := range b.Strata {
			if i := slices.Index(names, s.Name); i >= 0 {
				at = max(at, i+1)
				continue
			}
			names = slices.Insert(names, at, s.Name)
			at++
		}
	}
	for _, r := range rs {
		if !slices.Contains(names, r.stratum) {
			names = append(names, r.stratum)
		}
	}
	return names
}

// stratum gives the values of one stratum, in one borehole where scope names it.
func (o Options) stratum(site *profile.Site, name, scope string, boreholes []string, rs []*record, book *adoptions) (Stratum, error) {
	s := Stratum{Stratum: name, Borehole: scope, Boreholes: boreholes, Edition: EditionOf(site.Settings.CodeEdition), Parameters: []Parameter{}}
	if scope != "" {
		s.Boreholes = []string{scope}
	}
	if s.Boreholes == nil {
		s.Boreholes = []string{}
	}
	for i := range quantities {
		q := &quantities[i]
		var readings []reading
		for _, r := range rs {
			if scope != "" && r.borehole != scope {
				continue
			}
			if v, ok := r.reading(q); ok {
				if o.WeightByGrade && q.graded {
					v.Weight = gradeWeight(r.test.Grade)
				}
				readings = append(readings, v)
			}
		}
		adopted := book.of(q, name, scope, s.Boreholes)
		if len(readings) == 0 && len(adopted) == 0 {
			continue
		}
		p, err := o.parameter(q, s.Edition, s.Boreholes, readings)
		if err != nil {
			return s, fmt.Errorf("%s, %s: %w", name, q.name, err)
		}
		p.adopt(adopted, scope, s.Boreholes)
		s.Parameters = append(s.Parameters, p)
	}
	s.relateHistory()
	if scope == "" {
		s.Notes = book.loose
	}
	return s, nil
}

// relateHistory says of a σ′p that changes with depth whether a constant OCR or
// POP, which follow the ground and not a ruler, would describe it with one value.
func (s *Stratum) relateHistory() {
	stress := s.parameter("preconsolidation stress")
	if stress == nil || stress.Trend == nil || !stress.Trend.Used {
		return
	}
	var steady []string
	for _, name := range []string{"OCR", "POP"} {
		if p := s.parameter(name); p != nil && p.Trend != nil && !p.Trend.Used {
			steady = append(steady, name)
		}
	}
	switch len(steady) {
	case 1:
		stress.fact("%s shows no trend with depth here: it describes the stratum with one value, and follows σ′v0.", steady[0])
	case 2:
		stress.fact("Neither OCR nor POP shows a trend with depth here: the results do not tell which of them is constant.")
	}
}

// parameter returns the parameter of that name, or nil.
func (s *Stratum) parameter(name string) *Parameter {
	for i := range s.Parameters {
		if s.Parameters[i].Parameter == name {
			return &s.Parameters[i]
		}
	}
	return nil
}

// gradeWeight is the weight of a test by its grade. Choice of this program.
func gradeWeight(grade string) float64 {
	switch grade {
	case "B":
		return 0.6
	case "C":
		return 0.3
	}
	return 1
}

// byBorehole returns observations in the order of the boreholes given, by depth
// within each.
func byBorehole(s Sample, boreholes []string) Sample {
	c := s.ordered()
	slices.SortStableFunc(c, func(a, b Observation) int {
		return cmp.Compare(slices.Index(boreholes, a.Borehole), slices.Index(boreholes, b.Borehole))
	})
	return c
}
