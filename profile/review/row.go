package review

import (
	"math"
	"strings"

	"pastload/profile"
)

// A row is one specimen or depth with everything that was measured on it: a row
// of the results table with the oedometer test of the same specimen, or a test
// that has no row. The checks weigh its numbers against each other and against
// its place; the diagnosis tries changes on a copy.
type row struct {
	index    int // in context.rows
	borehole *profile.Borehole
	ground   *profile.BoreholeProfile
	result   *profile.Result // nil where there is a curve alone
	curve    *profile.Curve  // nil where there is none
	spec     *profile.Specimen
	test     *profile.Test

	depth    profile.Number
	specimen string
	stratum  *profile.Stratum // nil below the deepest
	group    *group
	organic  bool
	below    bool // below the water table
	water    float64

	v         [nVariables]float64
	has       uint64
	assumed   uint64         // recorded as assumed, not measured
	effective profile.Number // computed σ′v0
	line      expectation    // what the rest of the ground says of σ′p here
	strength  string         // type of strength test, folded
	blamed    bool           // something speaks against it

	property   []float64 // by property, on the scale of its comparison
	properties uint64    // those that are known

	origin  *row // of a changed copy: the row as it was read
	partner *row // of a copy that takes another row's place: that row
}

// own returns the values of a group that must not speak about this row: its own
// and that of the row it changes places with.
func (r *row) own(g *group, p int) (values [2]float64, n int) {
	for _, o := range [2]*row{r.origin, r.partner} {
		if o != nil && o.group == g && o.properties&(1<<p) != 0 {
			values[n] = o.property[p]
			n++
		}
	}
	return values, n
}

// An expectation is a positive quantity expected with a standard deviation of
// its logarithm.
type expectation struct {
	best, sd float64
	known    bool
}

func (r *row) known(vs ...variable) bool {
	for _, v := range vs {
		if r.has&(1<<v) == 0 {
			return false
		}
	}
	return true
}

func (r *row) set(v variable, x float64) {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return
	}
	r.v[v] = x
	r.has |= 1 << v
}

// put takes over a number that is an exact value.
func (r *row) put(v variable, n profile.Number) {
	if !n.Known || n.Bound != profile.Exact {
		return
	}
	r.set(v, n.Value)
	if n.Assumed {
		r.assumed |= 1 << v
	}
}

// plasticity returns PI from LL and PL, else as given.
func (r *row) plasticity() (float64, bool) {
	switch {
	case r.known(liquidLimit, plasticLimit):
		return r.v[liquidLimit] - r.v[plasticLimit], true
	case r.known(plasticityIndex):
		return r.v[plasticityIndex], true
	}
	return 0, false
}

// void returns the void ratio: as given, else that of the curve, else from w and
// Gs below the water table.
func (r *row) void() (float64, bool) {
	switch {
	case r.known(voidRatio):
		return r.v[voidRatio], true
	case r.known(curveVoidRatio):
		return r.v[curveVoidRatio], true
	case r.known(waterContent, specificGravity):
		return r.v[waterContent] * r.v[specificGravity] / 100, true
	case r.known(waterContent) && !r.organic:
		return r.v[waterContent] * 2.7 / 100, true
	}
	return 0, false
}

// number returns the number of the tables behind a variable, nil where it was
// computed.
func (r *row) number(v variable) *profile.Number {
	switch {
	case v <= sensitivity && r.result != nil:
		return traits[v].of(r.result)
	case r.curve == nil:
		return nil
	case v == curveVoidRatio, v == voidRatio:
		return &r.curve.InitialVoidRatio
	case v == curveWater, v == waterContent:
		return &r.curve.WaterContent
	case v == curveGravity, v == specificGravity:
		return &r.curve.SpecificGravity
	}
	return nil
}

// typed returns a value as it stands in the table where that is the same
// number, else as we would print it.
func (r *row) typed(v variable) string {
	if n := r.number(v); n != nil && n.Source != nil {
		text := strings.TrimSpace(n.Source.Text)
		if x, ok := plainNumber(text); ok && x == n.Value {
			return text
		}
	}
	return v.plain(r.v[v])
}

// shown returns a value as typed, with its unit.
func (r *row) shown(v variable) string { return r.typed(v) + traits[v].unit }

// cell returns where a variable was read, "" where it was not.
func (r *row) cell(v variable) string {
	if n := r.number(v); n != nil && n.Source != nil {
		return n.Source.String()
	}
	switch {
	case v >= curveVoidRatio && r.curve != nil:
		return r.curve.Source.String()
	case r.result != nil:
		return r.result.Source.String()
	}
	return ""
}

// name says which specimen it is: "BH1, 5.60 m, BH1-P5".
func (r *row) name() string { return placeName(r.place()) }

func (r *row) place() Place { return Place{r.borehole.Name, r.depth, r.specimen} }

func placeName(p Place) string {
	parts := []string{}
	if p.Borehole != "" {
		parts = append(parts, p.Borehole)
	}
	if p.Depth.Known {
		parts = append(parts, fixed(p.Depth.Value, 2)+" m")
	}
	if p.Specimen != "" {
		parts = append(parts, p.Specimen)
	}
	return strings.Join(parts, ", ")
}
