package intake

import (
	"fmt"
	"math"
	"slices"
	"strconv"
	"strings"

	"pastload/profile"
)

// A stageRow is a row of the oedometer table: one load stage, with what is told
// once per specimen on any of its rows.
type stageRow struct {
	Specimen, Borehole string
	Depth, DepthBase   profile.Number
	TestKind, Remark   string
	Height, VoidRatio  profile.Number // initial
	SpecificGravity    profile.Number
	WaterContent       profile.Number
	Stage              profile.Stage
}

var stageColumns = makeStageColumns()

func makeStageColumns() []column[stageRow] {
	depth := numberOf("depth", length, "m", depthLimit, depthNames, "of the specimen; of a range 4.00–4.45 the middle is taken", func(r *stageRow) *profile.Number { return &r.Depth })
	depth.ranges, depth.base = true, func(r *stageRow) *profile.Number { return &r.DepthBase }
	return []column[stageRow]{
		must(textOf("specimen", specimenNames, "its name: the rows of a test carry the same one", func(r *stageRow) *string { return &r.Specimen })),
		textOf("borehole", boreholeNames, "", func(r *stageRow) *string { return &r.Borehole }),
		depth,
		textOf("stage", "load or unload; direction; branch; loading stage", "load, unload or reload; found from the stresses where absent", func(r *stageRow) *string { return &r.Stage.Kind }),
		must(numberOf("effective stress", stress, "kPa", within(0, 200_000), "σ'v; σ'; σv'; σ'a; stress; vertical stress; effective vertical stress; vertical effective stress; pressure; applied pressure; applied stress; consolidation pressure; load; p; p'", "at the end of the stage; 0 in the first row states the beginning of the test", func(r *stageRow) *profile.Number { return &r.Stage.EffectiveStress })),
		numberOf("void ratio", ratio, "-", above(0, 40), "e; final void ratio; void ratio at end of stage", "at the end of the stage; this, a strain or a height", func(r *stageRow) *profile.Number { return &r.Stage.VoidRatio }),
		numberOf("strain", percent, "%", within(-50, 95), "ε; εv; ε1; εa; axial strain; vertical strain", "of the initial height, compression positive", func(r *stageRow) *profile.Number { return &r.Stage.Strain }),
		numberOf("height", length, "mm", above(0, 1000), "specimen height; h; thickness; final height", "at the end of the stage", func(r *stageRow) *profile.Number { return &r.Stage.Height }),
		numberOf("initial height", length, "mm", within(2, 1000), "h0; ho; initial specimen height; initial thickness", "once per specimen", func(r *stageRow) *profile.Number { return &r.Height }),
		numberOf("initial void ratio", ratio, "-", above(0, 40), "e0; eo; ei", "once per specimen", func(r *stageRow) *profile.Number { return &r.VoidRatio }),
		numberOf("specific gravity", gravityRatio, "-", within(1.05, 5.5), trade["specific gravity"].synonyms, "once per specimen", func(r *stageRow) *profile.Number { return &r.SpecificGravity }),
		numberOf("water content", percent, "%", within(0, 2500), trade["water content"].synonyms+"; initial water content; initial moisture content", "initial, once per specimen", func(r *stageRow) *profile.Number { return &r.WaterContent }),
		textOf("test kind", "test type; type of test; kind; test; kind of test; procedure", "incremental 24 h, end of primary, or constant rate of strain; once per specimen", func(r *stageRow) *string { return &r.TestKind }),
		numberOf("t50", duration, "min", above(0, 1e7), "", "time to half of primary consolidation", func(r *stageRow) *profile.Number { return &r.Stage.T50 }),
		numberOf("t90", duration, "min", above(0, 1e7), "", "time to 90 % of primary consolidation", func(r *stageRow) *profile.Number { return &r.Stage.T90 }),
		numberOf("coefficient of consolidation", consolidation, "m2/year", above(0, 1e7), "cv", "of the stage", func(r *stageRow) *profile.Number { return &r.Stage.Consolidation }),
		numberOf("secondary compression index", ratio, "-", within(0, 5), trade["secondary compression index"].synonyms, "of the stage, void ratio per log10 cycle of time", func(r *stageRow) *profile.Number { return &r.Stage.Secondary }),
		textOf("remark", remarkNames+"; water table; inundation", "water table, inundation, disturbance", func(r *stageRow) *string { return &r.Remark }),
	}
}

// stageKinds and testKinds are the words that the trade uses for them.
var stageKinds = map[string]string{
	"load": "load", "loading": "load", "unload": "unload", "unloading": "unload", "swelling": "unload", "rebound": "unload",
	"reload": "reload", "reloading": "reload",
}

var testKinds = map[string]string{
	"incremental 24 h": "incremental 24 h", "incremental": "incremental 24 h", "incremental loading": "incremental 24 h", "il": "incremental 24 h", "24 h": "incremental 24 h", "24h": "incremental 24 h", "incremental 24h": "incremental 24 h",
	"end of primary": "end of primary", "eop": "end of primary",
	"constant rate of strain": "constant rate of strain", "crs": "constant rate of strain",
}

// curves reads the oedometer table: rows of one specimen make one curve, in the
// order of the table.
func (s *site) curves(g *grid) {
	t := load(s.rd, g, stageColumns)
	if t == nil {
		return
	}
	if !t.has("void ratio") && !t.has("strain") && !t.has("height") {
		s.rd.add(Problem{File: g.file, Line: g.header.line, Name: "void ratio", Message: "no such column, and no strain or height", Wanted: `a column "void ratio", "strain (%)" or "height (mm)"`})
		return
	}
	var order []string
	rows := map[string][]row[stageRow]{}
	for _, r := range t.rows {
		name := r.Value.Specimen
		if name == "" {
			continue
		}
		k := strings.ToLower(name)
		if _, ok := rows[k]; !ok {
			order = append(order, k)
		} else if first := rows[k][0]; first.Value.Specimen != name {
			t.problem(r, "specimen", fmt.Sprintf("%q is written %q in line %d", name, first.Value.Specimen, first.at.line), "one spelling")
			continue
		}
		rows[k] = append(rows[k], r)
	}
	for _, k := range order {
		s.curve(t, rows[k])
	}
}

// curve makes one curve of the rows of a specimen.
func (s *site) curve(t *table[stageRow], rows []row[stageRow]) {
	c := profile.Curve{Specimen: rows[0].Value.Specimen, Source: t.cell(rows[0], "specimen")}
	var remarks []string
	for k, r := range rows {
		v := r.Value
		v.Depth = s.middle(t, r)
		sameText(t, rows[:k], r, "borehole", v.Borehole, &c.Borehole, func(v stageRow) string { return v.Borehole })
		once(t, r, "depth", v.Depth, &c.Depth)
		once(t, r, "initial height", v.Height, &c.InitialHeight)
		once(t, r, "initial void ratio", v.VoidRatio, &c.InitialVoidRatio)
		once(t, r, "specific gravity", v.SpecificGravity, &c.SpecificGravity)
		once(t, r, "water content", v.WaterContent, &c.WaterContent)
		if v.TestKind != "" {
			kind, ok := testKinds[strings.ToLower(v.TestKind)]
			if !ok {
				t.problem(r, "test kind", fmt.Sprintf("%q is not a kind of test", v.TestKind), "incremental 24 h, end of primary or constant rate of strain")
			} else {
				sameText(t, rows[:k], r, "test kind", kind, &c.TestKind, func(v stageRow) string { return v.TestKind })
			}
		}
		if v.Remark != "" && !slices.Contains(remarks, v.Remark) {
			remarks = append(remarks, v.Remark)
		}
		s.stage(t, r, k == 0, &c)
	}
	c.Remark = strings.Join(remarks, "; ")
	if c.Borehole != "" {
		borehole(s, t, rows[0], c.Borehole)
	}
	s.out.Curves = append(s.out.Curves, c)
}

// middle returns the depth of a specimen: of a range its middle.
func (s *site) middle(t *table[stageRow], r row[stageRow]) profile.Number {
	d := r.Value.Depth
	if r.Value.DepthBase.Known {
		d.Value = (d.Value + r.Value.DepthBase.Value) / 2
	}
	return d
}

// once takes a value that is told once per specimen; rows that tell it again
// must agree.
func once(t *table[stageRow], r row[stageRow], name string, n profile.Number, to *profile.Number) {
	switch {
	case !n.Known:
	case !to.Known:
		*to = n
	case math.Abs(n.Value-to.Value) > touching*math.Max(1, math.Abs(n.Value)):
		t.problem(r, name, fmt.Sprintf("%q, but line %d of the same specimen says %q", clean(n.Source.Text), to.Source.Line, clean(to.Source.Text)), "one value for each specimen")
	}
}

// sameText does the same for words.
func sameText(t *table[stageRow], earlier []row[stageRow], r row[stageRow], name, text string, to *string, of func(stageRow) string) {
	switch {
	case text == "":
	case *to == "":
		*to = text
	case *to != text:
		line := 0
		for _, e := range earlier {
			if of(e.Value) != "" {
				line = e.at.line
				break
			}
		}
		t.problem(r, name, fmt.Sprintf("%q, but line %d of the same specimen says %q", text, line, *to), "one "+name+" for each specimen")
	}
}

// stage adds one load stage to the curve. A first row at zero stress is no load
// stage: it tells the state at the beginning.
func (s *site) stage(t *table[stageRow], r row[stageRow], first bool, c *profile.Curve) {
	st := r.Value.Stage
	st.Source = t.cell(r, "effective stress")
	if st.Kind != "" {
		kind, ok := stageKinds[strings.ToLower(st.Kind)]
		_, err := strconv.Atoi(st.Kind)
		switch {
		case ok:
			st.Kind = kind
		case err == nil:
			st.Kind = "" // a running number says nothing of the direction
		default:
			t.problem(r, "stage", fmt.Sprintf("%q is not a stage", st.Kind), "load, unload or reload, or blank")
			return
		}
	}
	if !st.EffectiveStress.Known {
		return // reported where the cell was read
	}
	if !st.VoidRatio.Known && !st.Strain.Known && !st.Height.Known {
		t.problem(r, firstOf(t, "void ratio", "strain", "height"), "blank", "a void ratio, a strain or a height in every row")
		return
	}
	if st.EffectiveStress.Value > 0 {
		c.Stages = append(c.Stages, st)
		return
	}
	if !first {
		t.problem(r, "effective stress", "0 after the first row of the specimen", "a stress greater than 0")
		return
	}
	if st.VoidRatio.Known {
		once(t, r, "void ratio", st.VoidRatio, &c.InitialVoidRatio)
	}
	if st.Height.Known {
		once(t, r, "height", st.Height, &c.InitialHeight)
	}
	t.note(r, "effective stress", "specimen "+c.Specimen+": the row at zero stress is taken as the state at the beginning of the test")
}

// firstOf returns the first of the columns that the table has.
func firstOf[T any](t *table[T], names ...string) string {
	for _, n := range names {
		if t.has(n) {
			return n
		}
	}
	return names[0]
}
