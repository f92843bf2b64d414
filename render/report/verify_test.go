package report

import (
	"errors"
	"math"
	"strings"
	"testing"
)

func TestVerifyReproducesWhatWasPublished(t *testing.T) {
	all := Verify()
	counts := map[string]int{}
	for _, e := range all {
		counts[e.Subject]++
		if e.Outcome == differs {
			t.Errorf("%s, %s, %s: expected %v, obtained %v ± %g: %s", e.Subject, e.Name, e.Quantity, e.Expected, e.Obtained, e.Tolerance, e.Note)
		}
		if e.Source == "" || e.Mark == "" || e.Quantity == "" {
			t.Errorf("%s, %s: source %q, mark %q, quantity %q", e.Subject, e.Name, e.Source, e.Mark, e.Quantity)
		}
		if e.Outcome == shown && e.Note == "" {
			t.Errorf("%s, %s is not judged and does not say why", e.Name, e.Quantity)
		}
	}
	for _, subject := range []string{"vertical stress", "oedometer curves", "correlations", "statistics"} {
		if counts[subject] < 5 {
			t.Errorf("%d examples of %s", counts[subject], subject)
		}
	}
}

func TestCompareJudges(t *testing.T) {
	for _, c := range []struct {
		name                 string
		want, got, tolerance float64
		outcome              string
	}{
		{"equal", 5, 5, 0, agrees},
		{"within", 5, 5.05, 0.06, agrees},
		{"outside", 5, 5.07, 0.06, differs},
		{"nothing obtained", 5, math.NaN(), 1, differs},
		{"infinite", 5, math.Inf(1), math.Inf(1), differs},
	} {
		if got := (Example{}).compare(c.want, c.got, c.tolerance); got.Outcome != c.outcome {
			t.Errorf("%s: %s, want %s", c.name, got.Outcome, c.outcome)
		}
	}
	e := Example{Note: "a"}.failed(errors.New("b"))
	if e.Outcome != differs || e.Note != "a; b" || Differing([]Example{e}) != 1 {
		t.Errorf("a failure became %+v", e)
	}
}

func TestVerificationTablesHoldEveryExample(t *testing.T) {
	all := Verify()
	rows := 0
	for _, table := range Verification(all) {
		rows += len(table.Rows)
		for _, r := range table.Rows {
			if len(r) != len(table.Columns) {
				t.Fatalf("%s: %d cells for %d columns", table.Title, len(r), len(table.Columns))
			}
		}
	}
	if rows != len(all) || len(VerificationTable(all).Rows) != len(all) {
		t.Errorf("%d rows by subject, %d in one table, %d examples", rows, len(VerificationTable(all).Rows), len(all))
	}
	if s := VerificationSummary(all); !strings.Contains(s, "0 differ") {
		t.Errorf("summary %q", s)
	}
}
