package profile

import (
	"errors"
	"fmt"
	"math"
)

var (
	// ErrNoBorehole says that a site has no borehole of a name.
	ErrNoBorehole = errors.New("no such borehole")
	// ErrDepth says that a depth lies outside a borehole's profile.
	ErrDepth = errors.New("depth out of range")
)

// An Explanation is everything that leads to the numbers at one depth, step by
// step, so that it can be redone by hand.
type Explanation struct {
	Borehole string  `json:"borehole"`
	Depth    float64 `json:"depth_m"`
	Stratum  string  `json:"stratum"`
	Steps    []Step  `json:"steps"`
}

// A Step is one number, or one statement, with how it comes about. Where Numbers
// is set it is plain arithmetic that gives Value to the printed decimals, but for
// a unit or two of the last one: its terms are rounded as they are printed.
type Step struct {
	Group    string `json:"group"`             // what the step belongs to: "Total vertical stress"
	Key      string `json:"key,omitempty"`     // of a number that the tables hold too, as in their JSON
	Name     string `json:"name"`              // "weight of Soft clay, 2.40 to 3.60 m"
	Formula  string `json:"formula,omitempty"` // γ·Δz
	Numbers  string `json:"numbers,omitempty"` // the formula with its numbers: 16.3 × 1.2
	Value    Number `json:"value"`
	Bound    Bound  `json:"bound,omitempty"` // Value is only a bound
	Words    string `json:"words,omitempty"` // what is stated, or remarked on the number
	Unit     string `json:"unit,omitempty"`
	Decimals int    `json:"-"`                // of Value as printed
	Source   string `json:"source,omitempty"` // the cell it was read from, or who published the method
	Mark     string `json:"mark,omitempty"`   // how far the method was verified, or that a value is assumed
}

// Printed returns the value with its decimals and its bound, without the unit;
// "" where the step states words alone.
func (s Step) Printed() string {
	if !s.Value.Known {
		return ""
	}
	text := digits(s.Value.Value, s.Decimals)
	if s.Bound != Exact {
		text = s.Bound.String() + " " + text
	}
	return text
}

// What cannot be redone by hand is marked so.
const (
	markComputed   = "computed from all evidence together; no hand calculation"
	markDefinition = "definition"
	markAssumed    = "assumed"
)

// Decimals as the steps print them: more than the tables, so that the digits of
// the tables can be found again.
const (
	stressDecimals = 3
	ratioDecimals  = 4
	depthDecimals  = 3
)

// Explain returns the steps to every number at a depth of a borehole, and to
// those of the results and tests at that depth or, where there is none, of the
// nearest within 5 cm. depth is in m below ground level.
//
// The profile is that of Build. A depth that it has no point for is computed
// anew from its site.
//
// The error wraps ErrNoBorehole or ErrDepth and says what there is.
func Explain(p *Profile, borehole string, depth float64) (Explanation, error) {
	x := &explainer{profile: p, site: p.Site, depth: depth}
	if err := x.find(borehole); err != nil {
		return Explanation{}, err
	}
	if !(depth >= 0 && depth <= deepestDepth) {
		return Explanation{}, x.outside()
	}
	if len(x.here()) == 0 {
		// A profile that lacks the depth is built with it: only so does the line of
		// the stress history have a value there.
		q, err := Build(p.Site, Options{At: []float64{depth}})
		if err != nil {
			return Explanation{}, err
		}
		x.profile = q
		if err := x.find(borehole); err != nil {
			return Explanation{}, err
		}
	}
	points := x.here()
	if len(points) == 0 {
		return Explanation{}, x.outside()
	}
	x.place(points)
	x.stresses(points)
	x.tests()
	x.results()
	x.cone()
	x.history(points)
	for _, p := range points {
		x.byHistory(p)
	}
	x.assumptions()
	last := points[len(points)-1]
	return Explanation{Borehole: borehole, Depth: depth, Stratum: last.Stratum, Steps: x.steps}, nil
}

// An explainer gathers the steps of one depth.
type explainer struct {
	profile  *Profile
	site     *Site
	borehole *Borehole
	result   *BoreholeProfile
	ground   *ground
	depth    float64
	group    string
	steps    []Step
}

// find looks a borehole up in the site and in the profile.
func (x *explainer) find(name string) error {
	x.borehole, x.result, x.ground = x.site.Borehole(name), nil, nil
	for i := range x.profile.Boreholes {
		if x.profile.Boreholes[i].Borehole == name {
			x.result = &x.profile.Boreholes[i]
		}
	}
	if x.borehole == nil {
		return fmt.Errorf("%w: %q", ErrNoBorehole, name)
	}
	if x.result == nil {
		return fmt.Errorf("%w: %s has no strata and no results", ErrDepth, name)
	}
	g, problems := newGround(x.site, x.borehole)
	if err := problems.asError(); err != nil {
		return err
	}
	x.ground = g
	return nil
}

// here returns the points of the profile at the depth: two on a boundary.
func (x *explainer) here() []*Point {
	var out []*Point
	for i := range x.result.Points {
		if p := &x.result.Points[i]; math.Abs(p.Depth-x.depth) < closeDepth {
			out = append(out, p)
		}
	}
	return out
}

// closeDepth is the difference up to which two depths in m are one number that
// was typed or computed in two ways.
const closeDepth = 1e-9

// deepestDepth is beyond every borehole, in m.
const deepestDepth = 2e4

// outside says between which depths the borehole has a profile.
func (x *explainer) outside() error {
	points := x.result.Points
	if len(points) == 0 {
		return fmt.Errorf("%w: %s has no profile", ErrDepth, x.borehole.Name)
	}
	return fmt.Errorf("%w: %s m in %s; want %s to %s m", ErrDepth, plain(x.depth, depthDecimals), x.borehole.Name,
		digits(points[0].Depth, 2), digits(points[len(points)-1].Depth, 2))
}

// add appends a step to the group at hand.
func (x *explainer) add(s Step) {
	s.Group, s.Bound = x.group, s.Value.Bound
	x.steps = append(x.steps, s)
}

// say appends a statement.
func (x *explainer) say(name, words, source string) {
	if words != "" {
		x.add(Step{Name: name, Words: words, Source: source})
	}
}

// place tells where the depth lies.
func (x *explainer) place(points []*Point) {
	x.group = "Place"
	b := x.borehole
	x.add(Step{Name: "depth below ground level", Value: Known(x.depth), Decimals: 2, Unit: "m", Key: "depth_m"})
	if b.GroundLevel.Known {
		x.add(Step{Name: "level", Formula: "ground level − depth", Numbers: sum(term(b.GroundLevel.Value, depthDecimals), minus(x.depth, depthDecimals)),
			Value: Known(b.GroundLevel.Value - x.depth), Decimals: 2, Unit: "m", Source: cited(b.GroundLevel)})
	}
	for _, p := range points {
		s := &b.Strata[p.stratum]
		x.say("stratum", fmt.Sprintf("%s, %s to %s m", stratumName(p.Stratum), digits(s.Top, 2), digits(s.Base, 2)), s.Source.String())
	}
}

// assumptions lists what was supposed of the ground down to the depth.
func (x *explainer) assumptions() {
	x.group = "Assumptions down to this depth"
	for _, a := range x.result.Assumptions {
		if a.Top <= x.depth {
			x.add(Step{Name: fmt.Sprintf("%s to %s m", digits(a.Top, 2), digits(a.Base, 2)), Words: a.Message, Mark: markAssumed})
		}
	}
}
