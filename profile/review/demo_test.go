package review

import (
	"fmt"
	"os"
	"testing"

	"pastload/profile"
	"pastload/profile/intake"
)

// demo reads the worked scenario.
func demo(t testing.TB) *profile.Profile {
	t.Helper()
	site, err := intake.Read("../../testdata/demo", intake.Options{})
	if err != nil {
		t.Fatal(err)
	}
	p, err := profile.Build(site, profile.Options{})
	if err != nil {
		t.Fatal(err)
	}
	return p
}

func TestDump(t *testing.T) {
	if os.Getenv("DUMP") == "" {
		return
	}
	dump(mustReview(t, demo(t)))
}

func mustReview(t testing.TB, p *profile.Profile) Findings {
	t.Helper()
	found, err := Review(p)
	if err != nil {
		t.Fatal(err)
	}
	return found
}

func dump(found Findings) {
	for _, f := range found {
		fmt.Printf("%-8s %.3f %s\n   found %q wanted %q\n   %s\n", f.Severity, f.Impact, f.ID, f.Found, f.Wanted, f.Message)
		for _, e := range f.Evidence {
			fmt.Println("     +", e)
		}
		fmt.Println("    ", f.Causes, "->", f.Action, f.Cells, f.Answered != nil)
	}
}
