package design

import (
	"fmt"
	"math"
	"strings"

	"pastload/profile"
)

// nearTest is how far in m a strength may lie from an oedometer specimen and
// still be divided by its σ′p. Choice of this program: about a sample tube.
const nearTest = 0.5

// A record is what is known of one specimen or depth.
type record struct {
	site     *profile.Site
	borehole string
	stratum  string
	specimen string
	depth    float64
	result   *profile.Result // never nil; empty where the results table has no row
	test     *profile.Test
	curve    *profile.Curve
	read     *profile.Specimen // the curve as it was read
	near     *profile.Test     // nearest used test within nearTest, for a strength ratio
}

// A reading is a value of a quantity and what became of it.
type reading struct {
	Observation
	bound   profile.Bound
	leftOut bool
	assumed bool
}

// records gathers the specimens of a profile, borehole by borehole in the order
// of the site.
func records(p *profile.Profile) []*record {
	var all []*record
	for i := range p.Site.Boreholes {
		b := &p.Site.Boreholes[i]
		var bp *profile.BoreholeProfile
		for j := range p.Boreholes {
			if p.Boreholes[j].Borehole == b.Name {
				bp = &p.Boreholes[j]
			}
		}
		all = append(all, recordsOf(p.Site, b, bp)...)
	}
	specimens := map[*profile.Curve]*profile.Specimen{}
	for i := range p.Specimens {
		specimens[p.Specimens[i].Curve] = &p.Specimens[i]
	}
	for _, r := range all {
		if r.curve != nil {
			r.read = specimens[r.curve]
		}
	}
	return all
}

// recordsOf gathers the specimens of a borehole: the rows of its results, then
// tests and curves that have no row. bp may be nil.
func recordsOf(site *profile.Site, b *profile.Borehole, bp *profile.BoreholeProfile) []*record {
	var rs []*record
	byResult := map[*profile.Result]*record{}
	for i := range b.Results {
		r := &b.Results[i]
		if !r.Depth.Known {
			continue
		}
		rec := &record{site: site, borehole: b.Name, specimen: r.Specimen, depth: r.Depth.Value, result: r}
		rec.stratum = stratumAt(b, r.Depth.Value, r.Stratum)
		byResult[r] = rec
		rs = append(rs, rec)
	}
	if bp != nil {
		for i := range bp.Results {
			if rec := byResult[bp.Results[i].Result]; rec != nil {
				rec.stratum = bp.Results[i].Stratum
			}
		}
		for i := range bp.Tests {
			t := &bp.Tests[i]
			rec := byResult[t.Result]
			if rec == nil || rec.test != nil {
				rec = &record{site: site, borehole: b.Name, specimen: t.Specimen, depth: t.Depth, result: &profile.Result{}}
				rs = append(rs, rec)
			}
			rec.test, rec.stratum = t, t.Stratum
			rec.curve = t.Curve
		}
	}
	rs = attachCurves(site, b, rs)
	for _, rec := range rs {
		rec.near = nearest(bp, rec)
	}
	return rs
}

// attachCurves gives each curve of the borehole to the specimen it belongs to, or
// a record of its own.
func attachCurves(site *profile.Site, b *profile.Borehole, rs []*record) []*record {
	taken := map[*profile.Curve]bool{}
	for _, rec := range rs {
		if rec.curve != nil {
			taken[rec.curve] = true
		}
	}
	for i := range site.Curves {
		c := &site.Curves[i]
		if c.Borehole != b.Name || taken[c] || !c.Depth.Known {
			continue
		}
		var home *record
		for _, rec := range rs {
			if home == nil && rec.curve == nil && c.Specimen != "" && strings.EqualFold(rec.specimen, c.Specimen) {
				home = rec
			}
		}
		if home == nil {
			home = &record{site: site, borehole: b.Name, specimen: c.Specimen, depth: c.Depth.Value, result: &profile.Result{}}
			home.stratum = stratumAt(b, home.depth, "")
			rs = append(rs, home)
		}
		home.curve = c
	}
	return rs
}

// stratumAt names the stratum at a depth: as the row says, else the one that
// holds the depth, a boundary belonging to the lower.
func stratumAt(b *profile.Borehole, depth float64, said string) string {
	if said != "" {
		return said
	}
	name := ""
	for _, s := range b.Strata {
		if depth >= s.Top && depth <= s.Base {
			name = s.Name
		}
	}
	return name
}

// nearest returns the used test of the record's borehole and stratum that lies
// nearest to it, within nearTest; of two as near, the shallower.
func nearest(bp *profile.BoreholeProfile, rec *record) *profile.Test {
	if bp == nil {
		return nil
	}
	var best *profile.Test
	gap := nearTest
	for i := range bp.Tests {
		t := &bp.Tests[i]
		if !t.Used || t.Bound != profile.Exact || t.Stratum != rec.stratum {
			continue
		}
		if d := math.Abs(t.Depth - rec.depth); d < gap || d == gap && best == nil {
			best, gap = t, d
		}
	}
	return best
}

// orCurve returns what the row says, else what the curve of the specimen says.
func (r *record) orCurve(n profile.Number, of func(*profile.Curve) profile.Number) profile.Number {
	if !n.Known && r.curve != nil {
		return of(r.curve)
	}
	return n
}

// orSpecimen returns n, else what was read from the curve of the specimen.
func (r *record) orSpecimen(n profile.Number, of func(*profile.Specimen) profile.Number) profile.Number {
	if !n.Known && r.read != nil && r.read.Interpreted {
		return of(r.read)
	}
	return n
}

// label names the record for a reader.
func (r *record) label() string {
	if r.specimen != "" {
		return r.specimen
	}
	return fmt.Sprintf("%s at %.2f m", r.borehole, r.depth)
}

// reading returns the reading of a quantity; ok is false where there is none.
func (r *record) reading(q *quantity) (reading, bool) {
	n := r.decided(q.name, q.of(r))
	if !n.Known {
		return reading{}, false
	}
	v := reading{bound: n.Bound, assumed: n.Assumed}
	v.Observation = Observation{Borehole: r.borehole, Depth: r.depth, Value: n.Value, Label: r.label()}
	v.leftOut = r.leftOut(q.name)
	for _, parent := range q.parents {
		v.leftOut = v.leftOut || r.leftOut(parent)
	}
	return v, true
}
