package intake

import (
	"fmt"
	"maps"
	"math/rand"
	"slices"
	"strconv"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"pastload/profile"
)

// A drawn site is a set of rows by table; the first row of each is its header.
type drawn map[string][][]string

// drawSite draws a sound site of one to three boreholes. Values have few digits
// so that the drawn text is the value.
func drawSite(t *rapid.T) drawn {
	d := drawn{
		"boreholes": {{"borehole", "ground level (m)", "water table depth (m)"}},
		"strata":    {{"borehole", "top (m)", "base (m)", "stratum", "unit weight (kN/m3)"}},
		"water":     {{"borehole", "depth (m)", "head level (m)"}},
		"results":   {{"borehole", "depth (m)", "water content (%)", "preconsolidation stress (kPa)", "shear wave velocity (m/s)"}},
	}
	tenths := func(lo, hi int, name string) string {
		return strconv.FormatFloat(float64(rapid.IntRange(lo, hi).Draw(t, name))/10, 'f', -1, 64)
	}
	for b := range rapid.IntRange(1, 3).Draw(t, "boreholes") {
		name := fmt.Sprintf("BH%d", b+1)
		d["boreholes"] = append(d["boreholes"], []string{name, tenths(100, 300, "ground level"), tenths(-10, 80, "water table")})
		top := 0
		for k := range rapid.IntRange(1, 5).Draw(t, "layers") {
			base := top + rapid.IntRange(1, 60).Draw(t, "thickness")
			d["strata"] = append(d["strata"], []string{name, number10(top), number10(base), fmt.Sprintf("layer %d", k), tenths(90, 220, "unit weight")})
			top = base
		}
		for _, z := range rapid.SliceOfNDistinct(rapid.IntRange(0, top), 0, 6, rapid.ID).Draw(t, "depths") {
			d["results"] = append(d["results"], []string{name, number10(z), tenths(100, 900, "w"), tenths(1, 5000, "yield stress"), tenths(500, 3000, "Vs")})
		}
		for _, z := range rapid.SliceOfNDistinct(rapid.IntRange(0, 50), 0, 3, rapid.ID).Draw(t, "tips") {
			d["water"] = append(d["water"], []string{name, number10(z), tenths(300, 400, "head")})
		}
	}
	return d
}

func number10(tenth int) string { return strconv.FormatFloat(float64(tenth)/10, 'f', -1, 64) }

// tables returns the names of the tables in order, so that a drawn case can be
// drawn again.
func (d drawn) tables() []string { return slices.Sorted(maps.Keys(d)) }

// files writes the drawn site as CSV.
func (d drawn) files() files {
	f := files{}
	for table, rows := range d {
		var b strings.Builder
		for _, r := range rows {
			b.WriteString(strings.Join(r, ",") + "\n")
		}
		f[table+".csv"] = b.String()
	}
	return f
}

// shuffled returns the site with the rows of some tables in another order.
func (d drawn) shuffled(seed int64, tables ...string) drawn {
	out := drawn{}
	for _, table := range d.tables() {
		rows := slices.Clone(d[table])
		if slices.Contains(tables, table) {
			body := rows[1:]
			rand.New(rand.NewSource(seed)).Shuffle(len(body), func(i, j int) { body[i], body[j] = body[j], body[i] })
		}
		out[table] = rows
	}
	return out
}

// rapidRead reads drawn files.
func rapidRead(t *rapid.T, f files) *profile.Site {
	site, err := ReadFS(f.fs(), "site", Options{})
	if err != nil {
		t.Fatal(err)
	}
	return site
}

// TestRowOrder: the order of the rows of strata, water and results changes
// nothing. That of the boreholes table is the order of the boreholes.
func TestRowOrder(t *testing.T) {
	rapid.Check(t, func(r *rapid.T) {
		d := drawSite(r)
		other := d.shuffled(rapid.Int64().Draw(r, "seed"), "strata", "water", "results")
		if diff := differ(rapidRead(r, d.files()), rapidRead(r, other.files())); diff != "" {
			r.Fatal(diff)
		}
	})
}

// TestColumnOrder: nor does the order of the columns.
func TestColumnOrder(t *testing.T) {
	rapid.Check(t, func(r *rapid.T) {
		d := drawSite(r)
		other := drawn{}
		for _, table := range d.tables() {
			rows := d[table]
			order := rapid.Permutation(indices(len(rows[0]))).Draw(r, "order")
			for _, row := range rows {
				moved := make([]string, len(row))
				for i, j := range order {
					moved[i] = row[j]
				}
				other[table] = append(other[table], moved)
			}
		}
		if diff := differ(rapidRead(r, d.files()), rapidRead(r, other.files())); diff != "" {
			r.Fatal(diff)
		}
	})
}

func indices(n int) []int {
	out := make([]int, n)
	for i := range out {
		out[i] = i
	}
	return out
}

// TestUnitsOfTheSameGround: a site in other units is the same ground.
func TestUnitsOfTheSameGround(t *testing.T) {
	rapid.Check(t, func(r *rapid.T) {
		d := drawSite(r)
		other := drawn{}
		for _, table := range d.tables() {
			rows := d[table]
			header := slices.Clone(rows[0])
			factors := make([]float64, len(header))
			for i, h := range header {
				name, unitText, found := strings.Cut(strings.TrimSuffix(h, ")"), " (")
				if !found {
					continue
				}
				dim := dimensionOf(unitText)
				u := rapid.SampledFrom(dim.units).Draw(r, "unit")
				header[i] = name + " [" + u.name + "]"
				factors[i] = dim.named(unitText).factor / u.factor
			}
			other[table] = [][]string{header}
			for _, row := range rows[1:] {
				moved := slices.Clone(row)
				for i, f := range factors {
					if f != 0 {
						v, err := strconv.ParseFloat(row[i], 64)
						if err != nil {
							r.Fatal(err)
						}
						moved[i] = strconv.FormatFloat(v*f, 'g', 17, 64)
					}
				}
				other[table] = append(other[table], moved)
			}
		}
		// A few millimetres in seventeen digits of feet look like no number of
		// another decimal mark, so nothing is left to decide.
		site, err := ReadFS(other.files().fs(), "site", Options{Decimal: "."})
		if err != nil {
			r.Fatal(err)
		}
		if diff := differ(rapidRead(r, d.files()), site); diff != "" {
			r.Fatal(diff)
		}
	})
}

// dimensionOf returns the dimension of one of our own unit names.
func dimensionOf(unitText string) *dimension {
	for _, d := range dimensions {
		if _, ok := d.find(unitText); ok {
			return d
		}
	}
	panic("no dimension has the unit " + unitText)
}

// TestDecimalMarks: a site with semicolons and decimal commas is the same site,
// unless its numbers leave the mark open, which must be asked.
func TestDecimalMarks(t *testing.T) {
	rapid.Check(t, func(r *rapid.T) {
		d := drawSite(r)
		f := d.files()
		other := files{}
		for name, data := range f {
			other[name] = strings.NewReplacer(",", ";", ".", ",").Replace(data)
		}
		want := rapidRead(r, f)
		got, err := ReadFS(other.fs(), "site", Options{})
		if err != nil {
			r.Fatal(err)
		}
		if diff := differ(want, got); diff != "" {
			r.Fatal(diff)
		}
	})
}

// TestNumbersSurvive: what is written with a decimal mark reads back equal.
func TestNumbersSurvive(t *testing.T) {
	rapid.Check(t, func(r *rapid.T) {
		v := rapid.Float64().Draw(r, "v")
		for _, format := range []byte{'f', 'e', 'g'} {
			s := strconv.FormatFloat(v, format, -1, 64)
			got, ok := scan(s).value('.')
			if !ok || got != v {
				r.Fatalf("%s: %v, %v", s, got, ok)
			}
			s = strings.Replace(s, ".", ",", 1)
			got, ok = scan(s).value(',')
			if !ok || got != v {
				r.Fatalf("%s: %v, %v", s, got, ok)
			}
		}
	})
}
