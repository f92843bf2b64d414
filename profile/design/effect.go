package design

import (
	"fmt"
	"math"

	"pastload/profile"
)

// An Effect is what one decision of the engineer does: a value with the
// decision, and as it would be without.
type Effect struct {
	Decision *profile.Decision `json:"-"`
	Label    string            `json:"decision"` // "leave out preconsolidation stress, BH3 7.20 m BH3-U5"
	Stratum  string            `json:"stratum"`
	What     string            `json:"what"` // "mean of σ′p", "σ′p line of BH3 at 7.20 m"
	Unit     string            `json:"unit"`
	With     profile.Number    `json:"with"`
	Without  profile.Number    `json:"without"`
}

// smallest is the relative change below which an effect is not worth a line.
const smallest = 0.001

// Effects takes each decision away in turn, builds the profile again and returns
// what changes: the mean and the cautious values of the quantity that was decided
// about, and for a preconsolidation stress the depth at which the line of its
// borehole moves most. A decision that keeps a value changes nothing and is left
// out. p must come from profile.Build; its site is not changed.
func Effects(p *profile.Profile) ([]Effect, error) {
	if p == nil || p.Site == nil {
		return nil, ErrNoProfile
	}
	with, err := Values(p)
	if err != nil {
		return nil, err
	}
	var out []Effect
	for i := range p.Site.Decisions {
		d := &p.Site.Decisions[i]
		if d.Decision == profile.Keep {
			continue
		}
		site := *p.Site
		site.Decisions = append(append([]profile.Decision(nil), p.Site.Decisions[:i]...), p.Site.Decisions[i+1:]...)
		other, err := profile.Build(&site, profile.Options{})
		if err != nil {
			return nil, fmt.Errorf("without the decision of %s: %w", d.Source, err)
		}
		without, err := Values(other)
		if err != nil {
			return nil, err
		}
		out = append(out, valueEffects(d, with, without)...)
		out = append(out, lineEffects(d, p, other)...)
	}
	return out, nil
}

// label names a decision.
func label(d *profile.Decision) string {
	s := d.Decision + " " + d.Quantity
	if d.Borehole != "" {
		s += ", " + d.Borehole
	}
	if d.Depth.Known {
		s += fmt.Sprintf(" %.2f m", d.Depth.Value)
	}
	if d.Specimen != "" {
		s += " " + d.Specimen
	}
	return s
}

// concerned are the parameters that a decision about a quantity moves.
func concerned(quantity string) map[string]bool {
	moved := map[string]bool{quantity: true}
	switch quantity {
	case "preconsolidation stress":
		moved["OCR"], moved["POP"], moved["strength ratio"] = true, true, true
	case "compression index":
		moved["compression ratio"] = true
	case "recompression index":
		moved["recompression ratio"] = true
	case "undrained strength":
		moved["strength ratio"] = true
	}
	return moved
}

// valueEffects compares the values of all strata.
func valueEffects(d *profile.Decision, with, without []Stratum) []Effect {
	moved := concerned(d.Quantity)
	var out []Effect
	for i := range with {
		a := &with[i]
		for j := range a.Parameters {
			x := &a.Parameters[j]
			y := parameterOf(without, a.Stratum, a.Borehole, x.Parameter)
			if y == nil || !moved[x.Parameter] {
				continue
			}
			for _, v := range []struct {
				name          string
				with, without profile.Number
			}{{"mean", x.Mean, y.Mean}, {"low", x.Low, y.Low}, {"high", x.High, y.High}} {
				if differs(v.with, v.without) {
					out = append(out, Effect{d, label(d), a.Stratum, v.name + " of " + x.Parameter, x.Unit, v.with, v.without})
				}
			}
		}
	}
	return out
}

func parameterOf(strata []Stratum, stratum, borehole, parameter string) *Parameter {
	for i := range strata {
		if strata[i].Stratum != stratum || strata[i].Borehole != borehole {
			continue
		}
		for j := range strata[i].Parameters {
			if strata[i].Parameters[j].Parameter == parameter {
				return &strata[i].Parameters[j]
			}
		}
	}
	return nil
}

// differs tells whether two values are apart by more than is worth a line, or
// only one of them is known.
func differs(a, b profile.Number) bool {
	if a.Known != b.Known {
		return true
	}
	return a.Known && math.Abs(a.Value-b.Value) > smallest*math.Max(math.Abs(a.Value), math.Abs(b.Value))
}

// lineEffects finds the depth at which the line of each borehole moves most.
func lineEffects(d *profile.Decision, with, without *profile.Profile) []Effect {
	var out []Effect
	for i := range with.Boreholes {
		a := &with.Boreholes[i]
		if i >= len(without.Boreholes) || len(a.Points) != len(without.Boreholes[i].Points) {
			continue
		}
		b := &without.Boreholes[i]
		best, at := smallest, -1
		for j := range a.Points {
			x, y := a.Points[j].Preconsolidation, b.Points[j].Preconsolidation
			if !x.Known || !y.Known || x.Best <= 0 || y.Best <= 0 {
				continue
			}
			if m := math.Abs(math.Log(x.Best / y.Best)); m > best {
				best, at = m, j
			}
		}
		if at < 0 {
			continue
		}
		pt := &a.Points[at]
		out = append(out, Effect{
			Decision: d, Label: label(d), Stratum: pt.Stratum, Unit: "kPa",
			What:    fmt.Sprintf("σ′p line of %s at %.2f m, where it moves most", a.Borehole, pt.Depth),
			With:    profile.Known(pt.Preconsolidation.Best),
			Without: profile.Known(b.Points[at].Preconsolidation.Best),
		})
	}
	return out
}
