package report

import (
	"fmt"
	"strings"

	"pastload/profile"
	"pastload/profile/design"
	"pastload/profile/review"
)

// A Figures set is the drawings of a report.
type Figures struct {
	Depth  []Figure // one for each borehole, in order
	Curves []Figure // one for each oedometer test
	Other  []Figure
}

// A Content is what a report is made of.
type Content struct {
	Profile *profile.Profile
	Figures Figures
	Values  []design.Stratum
	Found   review.Findings
	Effects []design.Effect
	Since   string   // the earlier report that Changes are counted from, "" for none
	Changes []Change // since then
	Design  bool     // cautious and adopted values go in; without it the report keeps to what was measured and derived
}

// Compose arranges a report on a site in the order in which its reader asks:
// what is the finding, what does it rest on, where is the ground and its water,
// how loaded today, how loaded in the past, which tests to doubt, what was
// supposed, and who answers for it.
func Compose(c Content) *Document {
	p, figures := c.Profile, c.Figures
	s := p.Site
	t := s.Settings.Title
	d := &Document{Title: orElse(t.Title, "Stress history of the ground"), Subtitle: subtitle(s), Running: running(t), Fields: fields(t)}
	d.add("summary", "In short", summaryBlocks(c)...)
	if c.Since != "" {
		d.add("changes", "Changes since the earlier issue", Paragraph("Compared with "+c.Since+". "+ChangesSummary(c.Changes)), ChangesTable(Brief(c.Changes)))
	}
	d.add("basis", "Basis and definitions", basis(s)...)
	d.add("ground", "Ground and water", Layers(s), Water(s))
	for i := range figures.Depth {
		d.add(figures.Depth[i].ID+"-drawing", figures.Depth[i].Caption, figures.Depth[i])
	}
	for i := range figures.Other {
		d.add(figures.Other[i].ID+"-drawing", figures.Other[i].Caption, figures.Other[i])
	}
	for i := range p.Boreholes {
		b := &p.Boreholes[i]
		d.add(fmt.Sprintf("profile-%d", i+1), "Stress history with depth: "+b.Borehole, profileBlocks(b)...)
	}
	d.add("tests", "Preconsolidation tests", testBlocks(p)...)
	d.add("curves", "Compression curves", blocks(figures.Curves)...)
	d.add("cone", "Cone soundings", ConeFactors(p.Boreholes...), ConeNotes(p.Boreholes...), Cone(p.Boreholes...))
	d.add("compression", "Compressibility and the correlations used", Compression(p.Boreholes...), Relations(p))
	d.add("findings", "Findings and decisions", findingBlocks(c)...)
	d.add("values", "Values per stratum", valueBlocks(c.Values, c.Design)...)
	d.add("results", "Results as read", Results(s))
	d.add("hand-check", "One depth worked by hand", handCheck(p)...)
	d.add("assumptions", "Assumptions and limitations", limitations(p)...)
	d.add("sources", "Tables read", sourceBlocks(s)...)
	d.add("cautions", "Cautions", List(cautions))
	d.add("sign-off", "Sign-off", signOff(t))
	return d
}

// add appends a section, leaving out tables without rows; a section without
// blocks is left out whole.
func (d *Document) add(id, title string, bs ...Block) {
	var kept []Block
	for _, b := range bs {
		switch b := b.(type) {
		case *Table:
			if len(b.Rows) == 0 {
				continue
			}
		case List:
			if len(b) == 0 {
				continue
			}
		}
		kept = append(kept, b)
	}
	if len(kept) > 0 {
		d.Sections = append(d.Sections, Section{id, title, kept})
	}
}

func blocks(fs []Figure) []Block {
	var out []Block
	for _, f := range fs {
		out = append(out, f)
	}
	return out
}

func orElse(s, other string) string {
	if s == "" {
		return other
	}
	return s
}

func subtitle(s *profile.Site) string {
	t := s.Settings.Title
	return strings.Join(nonEmpty(t.Project, t.Location), ", ")
}

func running(t profile.TitleBlock) string {
	rev := ""
	if t.Revision != "" {
		rev = "revision " + t.Revision
	}
	return strings.Join(nonEmpty(t.Number, rev, t.Status, t.Date), "  ")
}

func nonEmpty(ss ...string) []string {
	var out []string
	for _, s := range ss {
		if s != "" {
			out = append(out, s)
		}
	}
	return out
}

func fields(t profile.TitleBlock) []Field {
	return []Field{
		{"Project", t.Project}, {"Location", t.Location}, {"Client", t.Client}, {"Organisation", t.Organisation},
		{"Document number", t.Number}, {"Revision", t.Revision}, {"Status", t.Status}, {"Date", t.Date},
		{"Prepared by", t.PreparedBy}, {"Checked by", t.CheckedBy}, {"Approved by", t.ApprovedBy},
		{"Datum", t.Datum}, {"Coordinates", t.Coordinates},
	}
}

// summaryBlocks say what was looked at, what the findings are, and the stress
// history of each stratum.
func summaryBlocks(c Content) []Block {
	out := []Block{Paragraph(scopeWords(c.Profile)), Paragraph(findingWords(c.Found))}
	for i := range c.Profile.Boreholes {
		b := &c.Profile.Boreholes[i]
		sentences := Summary(b)
		if len(sentences) == 0 {
			out = append(out, Paragraph(b.Borehole+": no stress history; see the notes."))
			continue
		}
		out = append(out, Paragraph(b.Borehole+":"), List(sentences))
	}
	return out
}

// scopeWords count what a report rests on.
func scopeWords(p *profile.Profile) string {
	results, tests, soundings := 0, 0, 0
	for i := range p.Boreholes {
		results += len(p.Boreholes[i].Results)
		tests += len(p.Boreholes[i].Tests)
		if p.Boreholes[i].Cone != nil {
			soundings++
		}
	}
	parts := []string{counted(len(p.Boreholes), "borehole"), counted(results, "row") + " of results", counted(tests, "preconsolidation test"), counted(len(p.Specimens), "oedometer curve")}
	if soundings > 0 {
		parts = append(parts, counted(soundings, "cone sounding"))
	}
	return "This report rests on " + strings.Join(parts[:len(parts)-1], ", ") + " and " + parts[len(parts)-1] + "."
}

// findingWords count the findings by severity and name the open ones that matter
// most.
func findingWords(fs review.Findings) string {
	open := fs.Open()
	if len(open) == 0 {
		return "No finding is open."
	}
	var parts []string
	for i := len(review.Severities) - 1; i >= 0; i-- {
		n := 0
		for j := range open {
			if open[j].Severity == review.Severities[i] {
				n++
			}
		}
		if n > 0 {
			parts = append(parts, counted(n, string(review.Severities[i])))
		}
	}
	text := fmt.Sprintf("%s open: %s.", counted(len(open), "finding"), strings.Join(parts, ", "))
	if heavy := open.AtLeast(review.Conflict); len(heavy) > 0 {
		var places []string
		for i := range heavy {
			places = append(places, place(&heavy[i]))
		}
		text += " To be settled before the values are used: " + strings.Join(places, "; ") + "."
	}
	return text
}

func basis(s *profile.Site) []Block {
	l := s.Settings.Limits
	out := []Block{
		Paragraph("σv0 is the total vertical stress, u0 the pore water pressure and σ′v0 = σv0 − u0 the effective vertical stress of today. σ′p is the preconsolidation (yield) stress, OCR = σ′p/σ′v0 the overconsolidation ratio and POP = σ′p − σ′v0 the pre-overburden pressure. Cc, Cr and Cs are slopes of void ratio per tenfold of effective stress."),
		Paragraph(fmt.Sprintf("Zones by OCR, as this project defines them (sources differ): underconsolidated (suspected) below %s; normally consolidated from %s; lightly overconsolidated from %s; heavily overconsolidated from %s. A zone is given with its probability; where the band straddles a limit both names are given.",
			trim(l.NormallyConsolidated), trim(l.NormallyConsolidated), trim(l.LightlyOverconsolidated), trim(l.HeavilyOverconsolidated))),
		Paragraph(fmt.Sprintf("The unit weight of water is %.2f kN/m³. Low, best and high are the 5, 50 and 95 %% points. The effective stress is taken as uncertain by %.0f %% of the weight of the ground and by %.2f m of water level (one standard deviation), which is carried into OCR.",
			s.Settings.WaterUnitWeight, 100*s.Settings.UnitWeightUncertainty, s.Settings.WaterLevelUncertainty)),
	}
	return append(out, SettingsTable(s))
}

// trim writes a limit without trailing zeros.
func trim(v float64) string { return strings.TrimRight(strings.TrimRight(fixed(v, 3), "0"), ".") }

func profileBlocks(b *profile.BoreholeProfile) []Block {
	points := Points(*b).Only("depth", "stratum", "unit_weight", "total_stress", "pore_pressure", "effective_stress",
		"preconsolidation_stress_low", "preconsolidation_stress", "preconsolidation_stress_high", "ocr_low", "ocr", "ocr_high", "pop", "zone", "zone_probability")
	points.Note = "low and high are the 5 and 95 % points. At a boundary the first row ends the upper stratum and the second begins the lower. The table profile.csv also has Cc, and su and K0 by correlation."
	return []Block{
		Zones(*b).Without("borehole"),
		likely(Strata(*b)).Without("borehole"),
		points.Named("Stresses and stress history with depth, " + b.Borehole),
		List(b.Notes),
	}
}

// likely keeps the mechanisms that are worth a reader's time.
func likely(t *Table) *Table {
	const from = 0.05
	out := *t
	out.Rows = nil
	for _, r := range t.Rows {
		if p := r[5]; p.Known && p.Value >= from {
			out.Rows = append(out.Rows, r)
		}
	}
	out.Note = "Mechanisms with a probability of 5 % or more; the table mechanisms.csv has all of them. " + t.Note
	return &out
}

func testBlocks(p *profile.Profile) []Block {
	tests := Tests(p.Boreholes...)
	out := []Block{
		tests.Only("borehole", "depth", "specimen", "stratum", "effective_stress", "bound", "preconsolidation_stress", "preconsolidation_stress_low",
			"preconsolidation_stress_high", "laboratory", "ocr", "grade", "expected", "expected_low", "expected_high", "z", "verdict"),
		tests.Only("borehole", "depth", "specimen", "used", "why").Named("Which value is used, and why"),
	}
	// What each construction gives stands on the sheet of each curve.
	return append(out, Specimens(p.Specimens), Grades(p.Specimens))
}

// findingBlocks are the report's section on results to doubt. The numbers are
// those of the marks on the depth sheets.
func findingBlocks(c Content) []Block {
	fs, s := c.Found, c.Profile.Site
	if len(fs) == 0 {
		return []Block{Paragraph("No result was found that does not agree with the others, with the laws it must obey or with what is usual."), Decisions(s), Effects(c.Effects)}
	}
	open := len(fs.Open())
	return []Block{
		Paragraph(fmt.Sprintf("%s, of which %d open. What was left out stays on the drawings and in the tables, with the reason.", counted(len(fs), "finding"), open)),
		Findings(fs).Only("number", "severity", "borehole", "depth", "specimen", "quantity", "message", "causes", "action", "source", "answer"),
		Decisions(s),
		Effects(c.Effects),
	}
}

func limitations(p *profile.Profile) []Block {
	var notes List
	for _, n := range p.Site.Notes {
		notes = append(notes, strings.TrimPrefix(n.Where+": "+n.Message, ": "))
	}
	return []Block{
		Assumptions(p.Boreholes...),
		notes,
		furtherTests(p),
	}
}

// handCheck shows the arithmetic of one depth, so that a checker can redo it: the
// stresses and the ratio of the first used test that has them.
func handCheck(p *profile.Profile) []Block {
	for i := range p.Boreholes {
		for _, t := range p.Boreholes[i].Tests {
			if !t.Used || !t.OCR.Known {
				continue
			}
			e, err := profile.Explain(p, p.Boreholes[i].Borehole, t.Depth)
			if err != nil {
				continue
			}
			var steps []profile.Step
			for _, s := range e.Steps {
				for _, group := range []string{"Place", "Total vertical stress", "Pore pressure", "Effective stress", "Given stress", "Preconsolidation test"} {
					if strings.HasPrefix(s.Group, group) {
						steps = append(steps, s)
					}
				}
			}
			e.Steps = steps
			return []Block{
				Paragraph(fmt.Sprintf("The numbers of any depth can be shown in this way with the command explain, in full; here the stresses and the test of %s at %s m.", e.Borehole, depth(e.Depth))),
				Explanation(e).Only("group", "step", "formula", "numbers", "value", "unit", "words", "source", "mark"),
			}
		}
	}
	return nil
}

// furtherTests proposes what would tell most, each with what it rests on.
func furtherTests(p *profile.Profile) *Table {
	t := &Table{
		Name: "further-tests", Title: "Suggested further tests",
		Columns: []Column{
			{"borehole", "borehole", Words, 0}, {"depth", "depth", Length, 1}, {"stratum", "stratum", Words, 0}, {"test", "test", Words, 0}, {"because", "reason", Words, 0},
		},
	}
	for i := range p.Boreholes {
		b := &p.Boreholes[i]
		if n := b.NextTest; n != nil && n.Narrowing >= worthATest {
			t.Add(T(b.Borehole), N(n.Depth), T(n.Stratum), T("oedometer on a specimen of the best class"),
				T(fmt.Sprintf("there it would narrow the band of σ′p of this borehole most, by about %.0f %% on average", 100*n.Narrowing)))
		}
		for _, x := range b.Tests {
			if x.Bound == profile.AtLeast {
				t.Add(T(b.Borehole), N(x.Depth), T(x.Stratum), T("oedometer carried to at least eight times the expected yield stress"),
					T(orUnnamedTest(x.Specimen)+" stopped before its virgin line and gives a bound only"))
			}
		}
		for _, z := range b.Zones {
			if z.Zone == profile.Underconsolidated {
				t.Add(T(b.Borehole), N((z.Top+z.Base)/2), T(""), T("piezometer"),
					T(fmt.Sprintf("%s to %s m looks underconsolidated: only the pore pressure tells settling ground from disturbed specimens", depth(z.Top), depth(z.Base))))
			}
		}
	}
	return t
}

// worthATest is the narrowing of the band below which one more test is not
// proposed.
const worthATest = 0.03

func sourceBlocks(s *profile.Site) []Block {
	return []Block{
		Sources(s),
		Paragraph("A number in these pages comes from the table, line and column that the results table names; the sums above tell whether a file has changed since."),
	}
}

// cautions are the usual ones of the trade.
var cautions = []string{
	"This is an interpretation of tests on small specimens. It is for use by, and under the responsibility of, an engineer licensed to practise where the work is, and gives way to local codes and to the requirements of the authorities.",
	"Ground between boreholes is not known. Layers, water and stress history can change within metres.",
	"Disturbance of specimens lowers the preconsolidation stress that a test shows, and the method and rate of the test shift it by 10 to 30 % (common practice); values of different kinds of test are not the same quantity.",
	"Correlations give a rough check and no substitute for tests. The table of the correlations used says how far the coefficients of each were checked; those from memory, unverified, must be checked before they are relied on.",
	"A low value is not always the safe one: heave, downdrag, wall pressure and drivability ask for the high one.",
	"An overconsolidation ratio below one is either ground that still settles or a disturbed specimen, a wrong water level or a wrong unit weight. Measure the pore pressure before choosing between them.",
}

func signOff(t profile.TitleBlock) *Table {
	s := &Table{Name: "sign-off", Title: "Prepared, checked, approved", Columns: []Column{
		{"role", "role", Words, 0}, {"name", "name", Words, 0}, {"signature", "signature", Words, 0}, {"date", "date", Words, 0},
	}}
	s.Add(T("prepared"), T(t.PreparedBy), T(""), T(""))
	s.Add(T("checked"), T(t.CheckedBy), T(""), T(""))
	s.Add(T("approved"), T(t.ApprovedBy), T(""), T(""))
	return s
}
