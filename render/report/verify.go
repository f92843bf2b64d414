package report

import (
	"fmt"
	"math"
	"strconv"
	"strings"

	"pastload/correlate"
	"pastload/profile/design"
	"pastload/profile/insitu"
	"pastload/profile/oedometer"
)

// What became of an example.
const (
	agrees  = "agrees"
	differs = "DIFFERS"
	shown   = "shown, not judged"
)

// An Example is a published number beside what this program makes of the same
// data.
type Example struct {
	Subject   string   `json:"subject"` // what is verified: "vertical stress"
	Name      string   `json:"example"`
	Quantity  string   `json:"quantity"`
	Expected  *float64 `json:"expected"` // null where words say what is expected
	Obtained  *float64 `json:"obtained"` // null where there is no number
	Unit      string   `json:"unit"`
	Tolerance float64  `json:"tolerance"`
	Outcome   string   `json:"outcome"`
	Source    string   `json:"source"`
	Mark      string   `json:"mark"` // how far the published side was verified
	Note      string   `json:"note"`
}

// examples lists what is verified. A package adds its cases with one line.
var examples = []struct {
	subject string
	run     func() []Example
}{
	{"vertical stress", stressExamples},
	{"oedometer curves", curveExamples},
	{"correlations", correlationExamples},
	{"statistics", statisticsExamples},
}

// Verify computes every example that is built in, in a fixed order.
func Verify() []Example {
	var out []Example
	for _, e := range examples {
		for _, x := range e.run() {
			x.Subject = e.subject
			out = append(out, x)
		}
	}
	return out
}

// Differing returns how many examples are not reproduced.
func Differing(all []Example) int { return outcomes(all, differs) }

func outcomes(all []Example, outcome string) int {
	n := 0
	for _, e := range all {
		if e.Outcome == outcome {
			n++
		}
	}
	return n
}

// compare judges a number against the published one.
func (e Example) compare(want, got, tolerance float64) Example {
	e.Expected, e.Tolerance, e.Outcome = &want, tolerance, differs
	if !math.IsNaN(got) && !math.IsInf(got, 0) {
		e.Obtained = &got
		if math.Abs(got-want) <= tolerance {
			e.Outcome = agrees
		}
	}
	return e
}

// failed says that nothing was obtained.
func (e Example) failed(err error) Example {
	e.Outcome, e.Note = differs, join("; ", e.Note, err.Error())
	return e
}

func stressExamples() []Example {
	var out []Example
	for _, c := range insitu.Published() {
		state, err := c.Obtained()
		for _, v := range []struct {
			name string
			want insitu.Value
			got  float64
		}{{"σv0", c.Want.Total, state.Total}, {"u0", c.Want.Pore, state.Pore}, {"σ′v0", c.Want.Effective, state.Effective}} {
			if !v.want.Known {
				continue
			}
			e := Example{Name: c.Name, Quantity: v.name, Unit: c.Unit, Source: c.Source, Mark: c.Mark, Note: c.Note}
			if c.Printed.Any() {
				e.Note = join("; ", e.Note, "the source prints another, wrong answer")
			}
			if err != nil {
				out = append(out, e.failed(err))
				continue
			}
			out = append(out, e.compare(v.want.Value, v.got, c.Tolerance))
		}
	}
	return out
}

func correlationExamples() []Example {
	var out []Example
	for _, c := range correlate.Checks() {
		entry, ok := correlate.ByID(c.ID)
		if !ok {
			panic("report: check of an unknown correlation " + c.ID)
		}
		// The kind says what the check proves: arithmetic done by hand proves the
		// code, never the coefficients.
		e := Example{Name: c.ID, Quantity: entry.Quantity.Symbol(), Unit: entry.Quantity.Unit(), Source: c.Source,
			Mark: c.Kind.String() + "; coefficients: " + entry.Verified.String(), Note: "with " + given(c.Given)}
		got, err := c.Run()
		if err != nil {
			out = append(out, e.failed(err))
			continue
		}
		out = append(out, e.compare(c.Want, got, c.Tolerance))
	}
	return out
}

// given lists the values that a correlation is checked with, in a fixed order.
func given(v correlate.Values) string {
	var terms []string
	for _, x := range correlate.Variables() {
		if value, ok := v[x.Symbol]; ok {
			terms = append(terms, strings.TrimSpace(fmt.Sprintf("%s = %g %s", x.Written, value, x.Unit)))
		}
	}
	return strings.Join(terms, ", ")
}

// statisticsExamples holds the quantile behind the cautious values to the table
// that every textbook on statistics prints.
func statisticsExamples() []Example {
	var out []Example
	for _, c := range []struct{ freedom, want float64 }{{1, 6.314}, {2, 2.920}, {3, 2.353}, {4, 2.132}, {5, 2.015}, {9, 1.833}, {14, 1.761}, {19, 1.729}, {29, 1.699}} {
		e := Example{Name: fmt.Sprintf("Student t, %g degrees of freedom", c.freedom), Quantity: "95 %, one-sided", Source: "table of Student's distribution, as in textbooks on statistics", Mark: "from memory, unverified"}
		out = append(out, e.compare(c.want, design.Student95(c.freedom), 0.0005+1e-9))
	}
	return out
}

// Verification returns the examples as tables, one for each subject.
func Verification(all []Example) []*Table {
	var out []*Table
	var t *Table
	for _, e := range all {
		if t == nil || !strings.HasSuffix(t.Title, e.Subject) {
			t = VerificationTable(nil).Without("subject").Named("Published examples: " + e.Subject)
			out = append(out, t)
		}
		t.Add(exampleCells(e)[1:]...)
	}
	return out
}

// VerificationTable returns the examples as one table.
func VerificationTable(all []Example) *Table {
	t := &Table{Name: "verification", Title: "Published examples, expected and obtained", Columns: []Column{
		{"subject", "subject", Words, 0}, {"outcome", "outcome", Words, 0}, {"example", "example", Words, 0}, {"quantity", "quantity", Words, 0},
		{"expected", "expected", Words, 0}, {"obtained", "obtained", Words, 0}, {"±", "tolerance", Words, 0}, {"unit", "unit", Words, 0},
		{"mark", "mark", Words, 0}, {"source", "source", Words, 0}, {"note", "note", Words, 0},
	}}
	for _, e := range all {
		t.Add(exampleCells(e)...)
	}
	return t
}

func exampleCells(e Example) []Cell {
	decimals := 3 // of what is not judged
	if e.Tolerance > 0 {
		decimals = min(6, max(0, 1-int(math.Floor(math.Log10(e.Tolerance)))))
	}
	// A number has the decimals that show its difference, as text: every row has
	// its own.
	text := func(v *float64) string {
		if v == nil {
			return ""
		}
		return fixed(*v, decimals)
	}
	tolerance := ""
	if e.Tolerance > 0 {
		tolerance = strconv.FormatFloat(e.Tolerance, 'g', 2, 64)
	}
	return []Cell{T(e.Subject), T(e.Outcome), T(e.Name), T(e.Quantity), T(text(e.Expected)), T(text(e.Obtained)), T(tolerance), T(e.Unit), T(e.Mark), T(e.Source), T(e.Note)}
}

// VerificationSummary says in one line what came of the examples.
func VerificationSummary(all []Example) string {
	return fmt.Sprintf("%s: %d agree, %d differ, %d shown without judgement", counted(len(all), "example"), outcomes(all, agrees), outcomes(all, differs), outcomes(all, shown))
}

// curveExamples sets what was printed of an interpretation beside ours. Two
// engineers read one curve differently: what a construction by eye gives is
// judged with the scatter of readers, void ratios by their last digit.
func curveExamples() []Example {
	var out []Example
	for _, c := range oedometer.Published() {
		e := Example{Name: c.ID + ", " + c.Soil, Source: c.Source, Mark: c.Mark, Note: c.Expect}
		curve, err := oedometer.Prepare(c.Record)
		if c.Refused {
			e.Quantity, e.Outcome = "record refused", differs
			if err != nil {
				e.Outcome, e.Note = agrees, join("; ", e.Note, strings.ReplaceAll(err.Error(), "\n", "; "))
			}
			out = append(out, e)
			continue
		}
		if err != nil {
			out = append(out, e.failed(err))
			continue
		}
		in, err := oedometer.Interpret(curve, c.Situation)
		if err != nil {
			out = append(out, e.failed(err))
			continue
		}
		for _, p := range c.Published {
			out = append(out, curveExample(e, c.ID, p, curve, in))
		}
	}
	return out
}
