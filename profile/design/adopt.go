package design

import (
	"fmt"
	"strings"

	"pastload/profile"
)

// An Adoption is a value that the engineer adopted for a stratum.
type Adoption struct {
	Borehole string         `json:"borehole,omitempty"` // "" for all of the site
	Value    profile.Number `json:"value"`
	Reason   string         `json:"reason"`
	By       string         `json:"by"`
	Date     string         `json:"date"`
	Source   string         `json:"source,omitempty"` // file:line:column
}

// adoptions are the adopted values of a site, each with the stratum it is for.
type adoptions struct {
	list  []adopted
	loose []string // what is wrong with the ones that no stratum could be found for
}

type adopted struct {
	decision *profile.Decision
	stratum  string
	borehole string
}

// newAdoptions finds the stratum of every adopted value that is not for a single
// specimen. The decisions table has no column for a stratum: its name stands in
// the specimen or the borehole column, or a depth without a result points to it.
func newAdoptions(site *profile.Site, rs []*record) *adoptions {
	book := &adoptions{}
	names := strataOf(site, rs)
	for i := range site.Decisions {
		d := &site.Decisions[i]
		if d.Decision != profile.AdoptValue || !d.Value.Known || forSpecimen(d, rs) {
			continue
		}
		stratum, borehole, ok := place(site, d, names)
		if !ok {
			book.loose = append(book.loose, fmt.Sprintf("%s: the value adopted for %s names no stratum: write its name in the specimen column, or give a borehole and a depth", where(d), d.Quantity))
			continue
		}
		book.list = append(book.list, adopted{d, stratum, borehole})
	}
	return book
}

// where names a decision.
func where(d *profile.Decision) string {
	if d.Source != nil {
		return d.Source.String()
	}
	return "decisions"
}

// forSpecimen reports whether the decision is on a value of one specimen.
func forSpecimen(d *profile.Decision, rs []*record) bool {
	for _, r := range rs {
		if !d.Concerns(r.borehole, r.depth, r.specimen) {
			continue
		}
		for i := range quantities {
			if q := &quantities[i]; about(d, q.name) && q.of(r).Known {
				return true
			}
		}
	}
	return false
}

// place finds the stratum that a decision is for, and the borehole if it is for
// one only.
func place(site *profile.Site, d *profile.Decision, names []string) (stratum, borehole string, ok bool) {
	b := site.Borehole(d.Borehole)
	if b != nil {
		borehole = b.Name
	}
	for _, said := range []string{d.Specimen, d.Borehole} {
		for _, n := range names {
			if said != "" && strings.EqualFold(strings.TrimSpace(said), n) {
				return n, borehole, true
			}
		}
	}
	switch {
	case d.Specimen != "" || b == nil && d.Borehole != "":
		return "", "", false
	case b != nil && d.Depth.Known:
		for _, s := range b.Strata {
			if d.Depth.Value >= s.Top && d.Depth.Value < s.Base {
				return s.Name, borehole, true
			}
		}
	case b != nil && len(b.Strata) == 1:
		return b.Strata[0].Name, borehole, true
	case b == nil && !d.Depth.Known && len(names) == 1:
		return names[0], "", true
	}
	return "", "", false
}

// of returns the values adopted for a quantity of a stratum, in table order:
// those for the whole site, and for the boreholes in scope.
func (a *adoptions) of(q *quantity, stratum, scope string, boreholes []string) []Adoption {
	var out []Adoption
	for _, x := range a.list {
		if x.stratum != stratum || !about(x.decision, q.name) {
			continue
		}
		if scope != "" && x.borehole != "" && x.borehole != scope {
			continue
		}
		d := x.decision
		out = append(out, Adoption{Borehole: x.borehole, Value: d.Value, Reason: d.Reason, By: d.By, Date: d.Date, Source: d.Source.String()})
	}
	return out
}

// adopt sets the adopted value of the parameter's scope: the last that was decided
// for it. One for a single borehole holds for a stratum that no other has, and one
// for the site holds in a borehole that has none of its own.
func (p *Parameter) adopt(list []Adoption, scope string, boreholes []string) {
	p.Adoptions = list
	own := scope
	if own == "" && len(boreholes) == 1 {
		own = boreholes[0]
	}
	best := -1
	for i, a := range list {
		if a.Borehole == "" && (best < 0 || list[best].Borehole == "") || a.Borehole != "" && a.Borehole == own {
			best = i
		}
	}
	if best >= 0 {
		p.Adopted, p.Reason = list[best].Value, list[best].Reason
	}
	for _, a := range list {
		if best < 0 && a.Borehole != "" {
			p.caution("%s is adopted for %s only; the stratum as a whole has no adopted value.", quantityText(a.Value.Value, p.Unit), a.Borehole)
		}
	}
	p.compareAdopted()
}

// compareAdopted warns where the adopted value lies beyond what was measured or
// on the unsafe side of the advised one.
func (p *Parameter) compareAdopted() {
	if !p.Adopted.Known || p.N == 0 {
		return
	}
	v := p.Adopted.Value
	if v < p.Min.Value || v > p.Max.Value {
		p.caution("The adopted value of %s lies outside the range of the results, %s to %s.",
			quantityText(v, p.Unit), number(p.Min.Value), quantityText(p.Max.Value, p.Unit))
	}
	switch {
	case p.Side == Low && p.Low.Known && v > p.Low.Value:
		p.caution("The adopted value of %s is higher than the advised low of %s.", quantityText(v, p.Unit), quantityText(p.Low.Value, p.Unit))
	case p.Side == High && p.High.Known && v < p.High.Value:
		p.caution("The adopted value of %s is lower than the advised high of %s.", quantityText(v, p.Unit), quantityText(p.High.Value, p.Unit))
	}
}
