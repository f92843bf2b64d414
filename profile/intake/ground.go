package intake

import (
	"fmt"
	"slices"
	"strings"

	"pastload/profile"
)

// boreholeNames are what the trade calls the column that names a borehole.
const boreholeNames = "bh; borehole id; borehole no; borehole number; hole; hole id; location; location id; loca id; exploratory hole; boring; boring no"

const depthNames = "z; depth below ground level; depth below ground; depth bgl; sample depth; test depth; mid depth; top depth; depth top; sample top"

var boreholeColumns = []column[profile.Borehole]{
	must(textOf("borehole", boreholeNames, "its name, unique in the site", func(b *profile.Borehole) *string { return &b.Name })),
	numberOf("ground level", level, "m", within(-1000, 9000), "gl; elevation; ground elevation; surface level; surface elevation; reduced level; level", "above the site's datum", func(b *profile.Borehole) *profile.Number { return &b.GroundLevel }),
	numberOf("water table depth", length, "m", within(-100, 1000), waterTableNames, "below ground level; negative where water stands above ground", func(b *profile.Borehole) *profile.Number { return &b.WaterTableDepth }),
	numberOf("capillary rise", length, "m", within(0, 50), "capillary zone", "height of saturated ground above the water table", func(b *profile.Borehole) *profile.Number { return &b.CapillaryRise }),
	numberOf("surcharge", stress, "kPa", within(0, 10_000), "surface load; fill load", "wide and permanent load at ground level", func(b *profile.Borehole) *profile.Number { return &b.Surcharge }),
	numberOf("easting", length, "m", within(-1e8, 1e8), "east; x", "", func(b *profile.Borehole) *profile.Number { return &b.Easting }),
	numberOf("northing", length, "m", within(-1e8, 1e8), "north; y", "", func(b *profile.Borehole) *profile.Number { return &b.Northing }),
	dated(textOf("drilled", "date; date drilled; drilling date", "when it was drilled, kept as typed", func(b *profile.Borehole) *string { return &b.Drilled })),
	textOf("remark", remarkNames, "", func(b *profile.Borehole) *string { return &b.Remark }),
}

const (
	waterTableNames = "water table; groundwater depth; groundwater level depth; depth to water; depth to groundwater; gwt depth; gwt; wt depth"
	remarkNames     = "remarks; comment; comments; note; notes"
	stratumNames    = "layer; formation; geology; geological unit; soil unit; stratum name; strata"
)

// A layerRow is a row of the strata table.
type layerRow struct {
	Borehole  string
	Top, Base profile.Number
	Stratum   profile.Stratum
}

// unitWeightLimit holds for peat that floats and for rock; 1.9 and 120 do not.
var unitWeightLimit = within(4, 30)

// depthLimit catches millimetres and centimetres under a header in metres.
var depthLimit = within(0, 1000)

var stratumColumns = []column[layerRow]{
	must(textOf("borehole", boreholeNames, "", func(r *layerRow) *string { return &r.Borehole })),
	must(numberOf("top", length, "m", depthLimit, "from; top depth; depth top; depth from; layer top", "depth of its top below ground level", func(r *layerRow) *profile.Number { return &r.Top })),
	must(numberOf("base", length, "m", depthLimit, "to; bottom; base depth; depth base; depth to; bottom depth; layer base", "depth of its base", func(r *layerRow) *profile.Number { return &r.Base })),
	must(textOf("stratum", stratumNames, "what the tables call it", func(r *layerRow) *string { return &r.Stratum.Name })),
	textOf("soil", "soil type; main soil; lithology; material; legend", "the main soil type, for the drawn pattern", func(r *layerRow) *string { return &r.Stratum.Soil }),
	textOf("description", "soil description; geology description", "", func(r *layerRow) *string { return &r.Stratum.Description }),
	numberOf("unit weight", unitWeight, "kN/m3", unitWeightLimit, unitWeightNames, "as it lies above the water table", func(r *layerRow) *profile.Number { return &r.Stratum.UnitWeight }),
	numberOf("saturated unit weight", unitWeight, "kN/m3", unitWeightLimit, "γsat; gamma sat; saturated density", "below the water table", func(r *layerRow) *profile.Number { return &r.Stratum.SaturatedUnitWeight }),
}

// boreholes reads the boreholes table into the register.
func (s *site) boreholes(g *grid) {
	t := load(s.rd, g, boreholeColumns)
	if t == nil {
		return
	}
	first := map[string]row[profile.Borehole]{}
	for _, r := range t.rows {
		b := r.Value
		if b.Name == "" {
			continue
		}
		if earlier, ok := first[strings.ToLower(b.Name)]; ok {
			t.problem(r, "borehole", fmt.Sprintf("%q is a borehole already, line %d calls it %q", b.Name, earlier.at.line, earlier.Value.Name), "one row for each borehole")
			continue
		}
		first[strings.ToLower(b.Name)] = r
		b.Source = t.cell(r, "borehole")
		s.register(b)
	}
	// A table that lost its first column cannot say which names exist.
	s.declared = t.sound && len(t.rows) > 0
}

// register adds a borehole.
func (s *site) register(b profile.Borehole) *profile.Borehole {
	s.index[strings.ToLower(b.Name)] = len(s.out.Boreholes)
	s.out.Boreholes = append(s.out.Boreholes, b)
	return &s.out.Boreholes[len(s.out.Boreholes)-1]
}

// borehole returns the place of a borehole that a row names. Without a
// boreholes table the first mention makes it; with one, a name that is not
// there is a problem.
func borehole[T any](s *site, t *table[T], r row[T], name string) (int, bool) {
	if name == "" {
		return 0, false // reported where the cell was read
	}
	i, ok := s.index[strings.ToLower(name)]
	if ok && s.out.Boreholes[i].Name == name {
		return i, true
	}
	names := make([]string, len(s.out.Boreholes))
	for j, b := range s.out.Boreholes {
		names[j] = b.Name
	}
	switch {
	case ok && s.declared:
		t.problem(r, "borehole", fmt.Sprintf("%q is written %q in the boreholes table", name, s.out.Boreholes[i].Name), "one spelling")
	case ok:
		t.problem(r, "borehole", fmt.Sprintf("%q is written %q elsewhere", name, s.out.Boreholes[i].Name), "one spelling")
	case s.declared:
		wanted := "one of its boreholes: " + shorten(names, 8)
		if likely := near(name, names); len(likely) > 0 {
			wanted = quoted(likely) + ", or a row for it there"
		}
		t.problem(r, "borehole", fmt.Sprintf("%q is not in the boreholes table", name), wanted)
	default:
		s.register(profile.Borehole{Name: name})
		return len(s.out.Boreholes) - 1, true
	}
	return 0, false
}

// shorten joins names, at most n of them.
func shorten(names []string, n int) string {
	if len(names) > n {
		return strings.Join(names[:n], ", ") + " …"
	}
	return strings.Join(names, ", ")
}

// touching is how far apart, in m, two depths may lie and still be one: less
// than a tape can measure, more than a conversion of feet can lose.
const touching = 1e-6

// strata reads the strata table into the boreholes.
func (s *site) strata(g *grid) {
	t := load(s.rd, g, stratumColumns)
	if t == nil {
		return
	}
	s.strataTable = g.file
	of := map[int][]row[layerRow]{}
	for _, r := range t.rows {
		i, ok := borehole(s, t, r, r.Value.Borehole)
		if !ok {
			continue
		}
		s.layered[i] = true
		if !r.Value.Top.Known || !r.Value.Base.Known {
			s.torn[i] = true
			continue
		}
		if r.Value.Base.Value <= r.Value.Top.Value {
			t.problem(r, "base", fmt.Sprintf("%s does not lie below the top, %s", metres(r.Value.Base), metres(r.Value.Top)), "the base of the layer, deeper than its top")
			s.torn[i] = true
			continue
		}
		of[i] = append(of[i], r)
	}
	for i := range s.out.Boreholes {
		s.stack(t, i, of[i])
	}
}

// stack puts the layers of one borehole in order and checks that they meet.
func (s *site) stack(t *table[layerRow], borehole int, rows []row[layerRow]) {
	if len(rows) == 0 {
		return
	}
	slices.SortStableFunc(rows, func(a, b row[layerRow]) int {
		switch {
		case a.Value.Top.Value != b.Value.Top.Value:
			return compare(a.Value.Top.Value, b.Value.Top.Value)
		default:
			return compare(a.Value.Base.Value, b.Value.Base.Value)
		}
	})
	b := &s.out.Boreholes[borehole]
	// A layer whose own row is broken would leave a gap that is not there.
	whole := !s.torn[borehole]
	if first := rows[0]; first.Value.Top.Value > touching && whole {
		t.problem(first, "top", fmt.Sprintf("the first layer of %s begins at %s m", b.Name, metres(first.Value.Top)), "layers from ground level, 0.00 m, down")
	}
	for k, r := range rows {
		st := r.Value.Stratum
		st.Top, st.Base, st.Source = r.Value.Top.Value, r.Value.Base.Value, t.cell(r, "top")
		if k > 0 {
			up := rows[k-1]
			gap := st.Top - up.Value.Base.Value
			layer := fmt.Sprintf("the layer of line %d (%s to %s m)", up.at.line, metres(up.Value.Top), metres(up.Value.Base))
			switch {
			case gap < -touching:
				t.problem(r, "top", fmt.Sprintf("%s lies inside %s", metres(r.Value.Top), layer), "layers that meet")
			case gap > touching && whole:
				t.problem(r, "top", fmt.Sprintf("%s leaves a gap below %s", metres(r.Value.Top), layer), "layers that meet")
			default:
				st.Top = up.Value.Base.Value
			}
		}
		b.Strata = append(b.Strata, st)
	}
}

func compare(a, b float64) int {
	switch {
	case a < b:
		return -1
	case a > b:
		return 1
	}
	return 0
}
