package review

import (
	"errors"
	"strings"
	"testing"

	"pastload/profile"
	"pgregory.net/rapid"
)

func someDecision() profile.Decision {
	return profile.Decision{Borehole: "BH3", Depth: profile.Known(7.2), Specimen: "BH3-U5", Quantity: "preconsolidation stress", Decision: profile.LeaveOut,
		Seen: profile.Known(48), Reason: "Open-drive tube; curve rounded, \"no knee\"", By: "E.V.", Date: "2021-12-02"}
}

func TestRecord(t *testing.T) {
	adopt := someDecision()
	adopt.Decision, adopt.Value, adopt.Depth = profile.AdoptValue, profile.Known(82.5), profile.Known(9.25)
	for _, tt := range []struct {
		name, table string
		d           profile.Decision
		want        string
	}{
		{"empty table", "", someDecision(),
			"borehole,depth (m),specimen,quantity,decision,value,value seen,reason,by,date\nBH3,7.2,BH3-U5,preconsolidation stress,leave out,,48,\"Open-drive tube; curve rounded, \"\"no knee\"\"\",E.V.,2021-12-02\n"},
		{"byte-order mark alone", "\ufeff", someDecision(),
			"\ufeffborehole,depth (m),specimen,quantity,decision,value,value seen,reason,by,date\nBH3,7.2,BH3-U5,preconsolidation stress,leave out,,48,\"Open-drive tube; curve rounded, \"\"no knee\"\"\",E.V.,2021-12-02\n"},
		{"own order, a foreign column, no last line end", "date,by,reason,checked,decision,quantity,specimen,depth (m),borehole,value seen\n2021-01-01,X,because,yes,keep,water content,S1,1,BH1,40", someDecision(),
			"date,by,reason,checked,decision,quantity,specimen,depth (m),borehole,value seen\n2021-01-01,X,because,yes,keep,water content,S1,1,BH1,40\n2021-12-02,E.V.,\"Open-drive tube; curve rounded, \"\"no knee\"\"\",,leave out,preconsolidation stress,BH3-U5,7.2,BH3,48\n"},
		{"semicolons, decimal commas, Windows line ends", "borehole;depth (m);specimen;quantity;decision;value;value seen;reason;by;date\r\nBH1;3,60;S1;water content;keep;;40,5;because;X;2021-01-01\r\n", adopt,
			"borehole;depth (m);specimen;quantity;decision;value;value seen;reason;by;date\r\nBH1;3,60;S1;water content;keep;;40,5;because;X;2021-01-01\r\nBH3;9,25;BH3-U5;preconsolidation stress;adopt value;82,5;48;\"Open-drive tube; curve rounded, \"\"no knee\"\"\";E.V.;2021-12-02\r\n"},
	} {
		t.Run(tt.name, func(t *testing.T) {
			got, err := Record([]byte(tt.table), tt.d)
			if err != nil {
				t.Fatal(err)
			}
			if string(got) != tt.want {
				t.Errorf("got\n%q\nwant\n%q", got, tt.want)
			}
		})
	}
}

func TestRecordRefuses(t *testing.T) {
	once, err := Record(nil, someDecision())
	if err != nil {
		t.Fatal(err)
	}
	if _, err := Record(once, someDecision()); !errors.Is(err, ErrDecided) || !strings.Contains(err.Error(), "decisions:2") {
		t.Errorf("the same decision twice: %v; want ErrDecided with line 2", err)
	}
	d := someDecision()
	d.Reason = " "
	if _, err := Record(nil, d); !errors.Is(err, ErrIncomplete) {
		t.Errorf("without a reason: %v; want ErrIncomplete", err)
	}
	d = someDecision()
	d.Decision = profile.AdoptValue
	if _, err := Record(nil, d); !errors.Is(err, ErrIncomplete) {
		t.Errorf("adopting nothing: %v; want ErrIncomplete", err)
	}
	d.Decision = "forget"
	if _, err := Record(nil, d); !errors.Is(err, ErrIncomplete) {
		t.Errorf("no such decision: %v; want ErrIncomplete", err)
	}
	if _, err := Record([]byte("borehole,quantity,decision,reason,by,date\n"), someDecision()); err == nil || !strings.Contains(err.Error(), "depth") {
		t.Errorf("a table without a depth: %v; want the column named", err)
	}
	if _, err := Record([]byte("borehole,\"quantity\n"), someDecision()); err == nil {
		t.Error("a torn table was taken")
	}
}

// What stands in the table stays, and what was written reads back.
func TestRecordKeepsAndReadsBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		word := rapid.StringOfN(rapid.RuneFrom([]rune("abcXYZ ,;\"'éσ′12.")), 1, 12, -1)
		table := []byte(nil)
		var reasons []string
		for i := range rapid.IntRange(1, 5).Draw(t, "rows") {
			d := someDecision()
			d.Depth = profile.Known(float64(i) + 0.5)
			d.Reason = "r" + word.Draw(t, "reason")
			next, err := Record(table, d)
			if err != nil {
				t.Fatal(err)
			}
			if !strings.HasPrefix(string(next), string(table)) {
				t.Fatalf("%q does not begin with %q", next, table)
			}
			table = next
			reasons = append(reasons, strings.Join(strings.Fields(d.Reason), " "))
		}
		rows, err := styleOf(table).parse(table)
		if err != nil || len(rows) != len(reasons)+1 {
			t.Fatalf("%d rows, %v", len(rows), err)
		}
		for i, want := range reasons {
			if got := rows[i+1].fields[7]; got != want {
				t.Fatalf("reason %q, want %q", got, want)
			}
		}
	})
}

func FuzzRecord(f *testing.F) {
	f.Add("borehole;depth (m);quantity;decision;reason;by;date;specimen;value seen\r\nBH1;1,5;water content;keep;x;y;z;;\r\n")
	f.Add("a,b\n\"")
	f.Fuzz(func(t *testing.T, table string) {
		out, err := Record([]byte(table), someDecision())
		if err != nil {
			return
		}
		if strings.TrimSpace(strings.TrimPrefix(table, "\ufeff")) != "" && !strings.HasPrefix(string(out), table) {
			t.Errorf("%q does not begin with %q", out, table)
		}
		if _, err := Record(out, someDecision()); err == nil {
			t.Errorf("recorded twice in %q", out)
		}
	})
}
