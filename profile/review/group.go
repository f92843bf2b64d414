package review

import (
	"math"
	"slices"
	"sort"
)

// A property is what a stratum is known by: a measured value or a ratio of
// values, whose scatter about the stratum's median is steadier than either.
type property struct {
	name  string
	vars  []variable
	mask  uint64
	prior float64 // scatter that a stratum usually has; of the logarithm where log is set
	log   bool
	of    func(*row) (float64, bool)
}

// A group is a stratum in all boreholes that name it: the ground that results
// can be compared within.
type group struct {
	key     string
	organic bool
	rows    []*row
	values  [][]float64 // by property, sorted
	scatter []float64   // by property, robust
}

// smallest is how many other values a comparison needs.
const smallest = 2

// priorCount is the weight, in values, of the usual scatter against the
// scatter found.
const priorCount = 6

// summarize sorts the values of a group.
func (g *group) summarize() {
	for _, r := range g.rows {
		r.property = make([]float64, len(properties))
	}
	g.values = make([][]float64, len(properties))
	g.scatter = make([]float64, len(properties))
	for p := range properties {
		var v []float64
		for _, r := range g.rows {
			if x, ok := properties[p].at(r); ok {
				v = append(v, x)
				r.property[p], r.properties = x, r.properties|1<<p
			}
		}
		sort.Float64s(v)
		g.values[p] = v
		g.scatter[p] = spread(v)
	}
}

// at returns a property of a row on the scale on which it is compared.
func (p *property) at(r *row) (float64, bool) {
	if r.has&p.mask != p.mask {
		return 0, false
	}
	x, ok := p.of(r)
	if !ok || math.IsNaN(x) || math.IsInf(x, 0) {
		return 0, false
	}
	if p.log {
		if x <= 0 {
			return 0, false
		}
		x = math.Log(x)
	}
	return x, true
}

// spread returns the normalized median absolute deviation of sorted values.
func spread(v []float64) float64 {
	if len(v) < 3 {
		return 0
	}
	m := middle(v)
	d := make([]float64, len(v))
	for i, x := range v {
		d[i] = math.Abs(x - m)
	}
	sort.Float64s(d)
	return 1.4826 * middle(d)
}

// middle returns the median of sorted values.
func middle(v []float64) float64 {
	n := len(v)
	if n%2 == 1 {
		return v[n/2]
	}
	return (v[n/2-1] + v[n/2]) / 2
}

// usual returns what the group, without some of its values, has of a property,
// with the standard deviation of one more value and how many values say so.
// The first n of without are values to leave out.
func (g *group) usual(p int, without [2]float64, n int) (centre, sd float64, count int) {
	v := g.values[p]
	var skip [2]int
	skipped := 0
	for _, w := range without[:n] {
		i, ok := slices.BinarySearch(v, w)
		if !ok {
			continue
		}
		if skipped == 1 && skip[0] == i {
			i++ // two equal values: the next one
		}
		if i < len(v) {
			skip[skipped] = i
			skipped++
		}
	}
	if skipped == 2 && skip[0] > skip[1] {
		skip[0], skip[1] = skip[1], skip[0]
	}
	count = len(v) - skipped
	if count <= 0 {
		return 0, 0, 0
	}
	at := func(k int) float64 {
		for _, s := range skip[:skipped] {
			if k >= s {
				k++
			}
		}
		return v[k]
	}
	centre = at(count / 2)
	if count%2 == 0 {
		centre = (at(count/2-1) + at(count/2)) / 2
	}
	return centre, g.deviation(p, count), count
}

// deviation weighs the scatter found with the usual one, and adds the doubt in
// the median of n values (π/2 is the price of a median against a mean).
func (g *group) deviation(p, n int) float64 {
	prior := properties[p].prior
	if g.organic {
		prior *= 2 // peat varies about twice as much (our reading of published ranges)
	}
	found := g.scatter[p]
	variance := (priorCount*prior*prior + float64(n)*found*found) / float64(priorCount+n)
	if len(g.values[p]) < 3 {
		variance = prior * prior
	}
	return math.Sqrt(variance * (1 + math.Pi/2/float64(n)))
}
