package review

import (
	"fmt"
	"math"
)

// repeated finds specimens whose measured numbers are all the same.
func repeated(c *context) []Finding {
	type key struct {
		group *group
		w, ll float64
	}
	first := map[key][]*row{}
	var out []Finding
	for _, r := range c.rows {
		if r.group == nil || !r.known(waterContent) {
			continue
		}
		k := key{nil, r.v[waterContent], r.v[liquidLimit]}
		for _, o := range first[k] {
			n, differ := 0, 0
			for v := unitWeight; v <= sensitivity; v++ {
				if !r.known(v) || !o.known(v) {
					continue
				}
				if r.v[v] == o.v[v] {
					n++
				} else {
					differ++
				}
			}
			// A plasticity index follows from the limits and is no number of its own.
			if r.known(plasticityIndex, liquidLimit, plasticLimit) {
				n--
			}
			if differ == 0 && n >= 4 {
				out = append(out, describeRepeated(c.running, o, r, n))
			}
		}
		first[k] = append(first[k], r)
	}
	return out
}

func describeRepeated(rule *Rule, o, r *row, n int) Finding {
	f := r.finding(rule, waterContent)
	f.Quantity, f.Severity = "specimen", Conflict
	f.Found = fmt.Sprintf("%d numbers as for %s", n, o.name())
	f.Wanted = "numbers of its own"
	f.Message = fmt.Sprintf("%s has the same %d measured numbers as %s, and none that differs.", r.name(), n, o.name())
	f.Also = []Place{o.place()}
	f.Cells = cells(r, o)
	f.Impact = 0.1
	return f
}

// A twin is a quantity that two specimens of one depth should share.
type twin struct {
	v   variable
	sd  float64 // of one difference; of the logarithm
	say string
}

var twins = []twin{{preconsolidation, 0.14, "σ′p"}, {waterContent, 0.04, "w"}, {unitWeight, 0.012, "γ"}, {voidRatio, 0.04, "e0"}}

// duplicates compares specimens of one borehole and stratum within 0.3 m.
func duplicates(c *context) []Finding {
	const near, limit = 0.3, 3
	rule := c.running
	var out []Finding
	for i, r := range c.rows {
		for _, o := range c.rows[i+1:] {
			if o.borehole != r.borehole {
				break
			}
			if o.group == nil || o.group != r.group || !r.depth.Known || !o.depth.Known || math.Abs(o.depth.Value-r.depth.Value) > near {
				continue
			}
			for _, t := range twins {
				if !r.known(t.v) || !o.known(t.v) || r.v[t.v] <= 0 || o.v[t.v] <= 0 {
					continue
				}
				z := math.Abs(math.Log(r.v[t.v]/o.v[t.v])) / t.sd
				if r.organic {
					z /= 3
				}
				if z < limit {
					continue
				}
				f := r.finding(rule, t.v)
				f.Severity, f.Found, f.Wanted = Doubt, r.shown(t.v), "about "+o.shown(t.v)+" as in "+o.name()
				f.Message = fmt.Sprintf("%s = %s here and %s in %s, %s m away in the same stratum.", t.say, r.shown(t.v), o.shown(t.v), o.name(), fixed(math.Abs(o.depth.Value-r.depth.Value), 2))
				f.Also = []Place{o.place()}
				f.Impact = r.impact(t.v, o.v[t.v]) / 2
				out = append(out, f)
			}
		}
	}
	return out
}
