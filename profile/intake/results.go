package intake

import (
	"fmt"
	"slices"

	"pastload/profile"
)

// A resultRow is a row of the results table. The water table depth is there for
// the single table that is a whole site.
type resultRow struct {
	Borehole        string
	WaterTableDepth profile.Number
	profile.Result
}

var resultColumns = makeResultColumns()

// makeResultColumns joins the columns that say where and how with the measured
// quantities that the profile knows.
func makeResultColumns() []column[resultRow] {
	depth := must(numberOf("depth", length, "m", depthLimit, depthNames, "of the test or of the specimen's top; a range 4.00–4.45 keeps both ends", func(r *resultRow) *profile.Number { return &r.Depth }))
	depth.ranges, depth.base = true, func(r *resultRow) *profile.Number { return &r.DepthBase }
	columns := []column[resultRow]{
		must(textOf("borehole", boreholeNames, "", func(r *resultRow) *string { return &r.Borehole })),
		depth,
		numberOf("depth base", length, "m", depthLimit, "base depth; bottom depth; sample base; depth bottom", "of the specimen, where it is long", func(r *resultRow) *profile.Number { return &r.DepthBase }),
		textOf("specimen", specimenNames, "", func(r *resultRow) *string { return &r.Specimen }),
		textOf("stratum", stratumNames, "", func(r *resultRow) *string { return &r.Stratum }),
		numberOf("water table depth", length, "m", within(-100, 1000), waterTableNames, "of the borehole, where there is no boreholes table", func(r *resultRow) *profile.Number { return &r.WaterTableDepth }),
	}
	for _, q := range profile.Quantities {
		columns = append(columns, quantityColumn(q))
	}
	return append(columns,
		textOf("method", "construction; interpretation", "how the laboratory read the preconsolidation stress", func(r *resultRow) *string { return &r.Method }),
		textOf("test", "test type; type of test", "what test it comes from", func(r *resultRow) *string { return &r.Test }),
		textOf("strength test", "undrained strength test; type of strength test; su test", "what test the undrained strength comes from", func(r *resultRow) *string { return &r.StrengthTest }),
		textOf("laboratory", "lab", "", func(r *resultRow) *string { return &r.Laboratory }),
		textOf("sampler", "sample type; sampling method", "", func(r *resultRow) *string { return &r.Sampler }),
		textOf("remark", remarkNames, "", func(r *resultRow) *string { return &r.Remark }),
	)
}

const specimenNames = "sample; specimen id; sample id; specimen no; sample no; specimen number; sample number; sample ref; specimen ref; test id"

// quantityColumn makes the column of a measured quantity.
func quantityColumn(q profile.Quantity) column[resultRow] {
	d, ok := trade[q.Name]
	if !ok {
		panic("intake: nothing is known of the quantity " + q.Name)
	}
	name := q.Unit
	if name == "" {
		name = "-"
	}
	c := numberOf(q.Name, d.dim, name, d.limit, d.names(), d.meaning, func(r *resultRow) *profile.Number { return q.Of(&r.Result) })
	c.bounds = true
	if q.Name == "plastic limit" || q.Name == "plasticity index" {
		c.plastic, c.flag = true, func(r *resultRow) *bool { return &r.NonPlastic }
	}
	return c
}

// results reads the results table into the boreholes.
func (s *site) results(g *grid) {
	columns := resultColumns
	if s.single {
		columns = slices.Clone(resultColumns)
		columns[0].required = false
	}
	t := load(s.rd, g, columns)
	if t == nil {
		return
	}
	unnamed := s.single && !t.has("borehole")
	if unnamed {
		s.rd.noteFile(g.file, fmt.Sprintf("no borehole column: all rows are of one borehole, called %q after the file", s.out.Name))
	}
	tables := map[int]row[resultRow]{} // the row that first gave a water table
	where := map[int][]*profile.Result{}
	for k, r := range t.rows {
		res := &t.rows[k].Value.Result
		name := r.Value.Borehole
		if unnamed {
			name = s.out.Name
		} else if name == "" && s.single {
			t.problem(r, "borehole", "blank", "a value in every row")
		}
		i, ok := borehole(s, t, r, name)
		if !ok || !res.Depth.Known {
			continue
		}
		if !checkResult(t, r) {
			continue
		}
		res.Source = t.cell(r, "depth")
		res.Extra = extras(t, r)
		b := &s.out.Boreholes[i]
		s.waterTable(t, r, b, tables, i)
		where[i] = append(where[i], res)
	}
	for i := range s.out.Boreholes {
		s.out.Boreholes[i].Results = byDepth(where[i])
	}
}

// byDepth sorts results by depth, those of one depth in table order.
func byDepth(results []*profile.Result) []profile.Result {
	slices.SortStableFunc(results, func(a, b *profile.Result) int { return compare(a.Depth.Value, b.Depth.Value) })
	var out []profile.Result
	for _, r := range results {
		out = append(slices.Grow(out, len(results)-len(out)), *r)
	}
	return out
}

// checkResult checks what one row says of itself.
func checkResult(t *table[resultRow], r row[resultRow]) bool {
	v := r.Value
	ok := true
	if v.DepthBase.Known && v.DepthBase.Value <= v.Depth.Value {
		t.problem(r, "depth base", fmt.Sprintf("%s does not lie below the depth, %s", metres(v.DepthBase), metres(v.Depth)), "the lower end of the specimen")
		ok = false
	}
	order := []struct {
		name string
		n    profile.Number
	}{{"preconsolidation stress low", v.PreconsolidationLow}, {"preconsolidation stress", v.Preconsolidation}, {"preconsolidation stress high", v.PreconsolidationHigh}}
	last := -1
	for k, o := range order {
		if !o.n.Known {
			continue
		}
		if last >= 0 && o.n.Value < order[last].n.Value {
			t.problem(r, o.name, fmt.Sprintf("%s kPa is less than the %s, %s kPa", number(o.n.Value), order[last].name, number(order[last].n.Value)), "low ≤ best ≤ high")
			ok = false
		}
		last = k
	}
	return ok
}

// extras returns the cells of the columns that no quantity is known for.
func extras(t *table[resultRow], r row[resultRow]) []profile.Extra {
	var out []profile.Extra
	for j, f := range t.fields {
		if f.spec < 0 && f.header != "" && clean(r.at.field(j)) != "" {
			out = append(out, profile.Extra{Header: f.header, Text: r.at.field(j)})
		}
	}
	return out
}

// waterTable takes the water table depth of a results row, where the boreholes
// table gives none. All rows of a borehole must agree.
func (s *site) waterTable(t *table[resultRow], r row[resultRow], b *profile.Borehole, first map[int]row[resultRow], i int) {
	n := r.Value.WaterTableDepth
	if !n.Known {
		return
	}
	earlier, seen := first[i]
	switch {
	case !seen && b.WaterTableDepth.Known:
		if b.WaterTableDepth.Value != n.Value {
			t.problem(r, "water table depth", fmt.Sprintf("%s m, but the boreholes table says %s m", metres(n), metres(b.WaterTableDepth)), "one water table for each borehole")
		}
	case !seen:
		first[i] = r
		b.WaterTableDepth = n
	case earlier.Value.WaterTableDepth.Value != n.Value:
		t.problem(r, "water table depth", fmt.Sprintf("%s m, but line %d says %s m", metres(n), earlier.at.line, metres(earlier.Value.WaterTableDepth)), "one water table for each borehole")
	}
}
