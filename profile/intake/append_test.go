package intake

import (
	"bytes"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"pastload/profile"
)

func newDecision() profile.Decision {
	return profile.Decision{
		Borehole: "BH1", Depth: profile.Known(7.25), Specimen: "U3", Quantity: "preconsolidation stress", Decision: profile.LeaveOut,
		Seen: profile.Known(48.5), Reason: `tube dented, "soft" core; see note`, By: "E.V.", Date: "2021-12-02",
	}
}

// TestAppendDecision adds a row to tables of several dialects and reads it back
// through the reader of sites.
func TestAppendDecision(t *testing.T) {
	cases := []struct{ name, table string }{
		{"a header alone", Template("decisions")},
		{"no line end", strings.TrimSuffix(Template("decisions"), "\n")},
		{"CRLF and a byte-order mark", "\ufeff" + strings.ReplaceAll(Template("decisions"), "\n", "\r\n")},
		{"semicolons, decimal comma, own column and order", "by;date;reason;decision;quantity;specimen;borehole;depth (m);value;value seen;filed under\nA.B.;2021-01-02;dry;leave out;water content;;BH1;3,5;;40,5;17\n"},
		{"tabs", "borehole\tdepth [m]\tspecimen\tquantity\tdecision\tvalue\tvalue seen\treason\tby\tdate\n"},
	}
	for _, c := range cases {
		t.Run(c.name, func(t *testing.T) {
			got, err := AppendDecision([]byte(c.table), newDecision())
			if err != nil {
				t.Fatal(err)
			}
			if !bytes.HasPrefix(got, []byte(c.table)) {
				t.Errorf("what stood in the table was changed:\n%s", got)
			}
			dir := t.TempDir()
			results := "borehole,depth (m),specimen,effective stress (kPa),preconsolidation stress (kPa),water content (%)\nBH1,3.5,,20,60,40.5\nBH1,7.25,U3,50,48.5,50\n"
			for name, data := range map[string][]byte{"decisions.csv": got, "results.csv": []byte(results)} {
				if err := os.WriteFile(filepath.Join(dir, name), data, 0o644); err != nil {
					t.Fatal(err)
				}
			}
			site, err := Read(dir, Options{})
			if err != nil {
				t.Fatal(err)
			}
			last := site.Decisions[len(site.Decisions)-1]
			w := newDecision()
			if last.Borehole != w.Borehole || last.Depth.Value != w.Depth.Value || last.Specimen != w.Specimen || last.Quantity != w.Quantity ||
				last.Decision != w.Decision || last.Seen.Value != w.Seen.Value || last.Value.Known || last.Reason != w.Reason || last.By != w.By || last.Date != w.Date {
				t.Errorf("read back as %+v", last)
			}
		})
	}
}

func TestAppendDecisionRefuses(t *testing.T) {
	for _, c := range []struct{ name, table, want string }{
		{"no column", "borehole,quantity,decision,reason,by,date\n", "no column for depth, specimen, value seen"},
		{"another code page", "borehole,depth (m),specimen,quantity,decision,value,value seen,reason,by,date\nBH1,1,,LL,keep,,,caf\xe9,A,2021-01-01\n", "save it as UTF-8"},
	} {
		if _, err := AppendDecision([]byte(c.table), newDecision()); err == nil || !strings.Contains(err.Error(), c.want) {
			t.Errorf("%s: %v, want %q", c.name, err, c.want)
		}
	}
}
