package history

import (
	"math"
	"math/rand"
	"os"
	"testing"
)

// A marked is a test with what was made of it.
type marked struct {
	result TestResult
	wrong  bool // it was falsified
}

// falsify multiplies or divides tests of every site by a factor, so many at a
// time, and collects what is made of all tests. Sites with fewer than 10 tests
// are left out where two are wrong.
func falsify(tb testing.TB, sites []claySite, factor float64, wrong, repetitions int) []marked {
	tb.Helper()
	rng := rand.New(rand.NewSource(7490))
	var out []marked
	for _, s := range sites {
		n := len(s.in.Tests)
		if wrong == 2 && n < 10 {
			continue
		}
		for range repetitions {
			in := s.in
			in.Tests = append([]Test(nil), in.Tests...)
			chosen := map[int]bool{}
			for _, i := range rng.Perm(n)[:wrong] {
				chosen[i] = true
				if rng.Intn(2) == 0 {
					in.Tests[i].Preconsolidation *= factor
				} else {
					in.Tests[i].Preconsolidation /= factor
				}
			}
			res, err := Infer(in)
			if err != nil {
				tb.Fatal(err)
			}
			for i, t := range res.Tests {
				out = append(out, marked{t, chosen[i]})
			}
		}
	}
	return out
}

// shares returns the part of the falsified and of the other tests that are
// further than a limit from what the others say.
func shares(tests []marked, limit float64) (found, alarms float64) {
	var wrong, others float64
	for _, m := range tests {
		over := indicator(m.result.Judged > limit && m.result.Wild > conflictWild*standard.Wild)
		if m.wrong {
			wrong++
			found += over
		} else {
			others++
			alarms += over
		}
	}
	return found / math.Max(1, wrong), alarms / math.Max(1, others)
}

// Wrong tests are found among natural ones. 20 repetitions with
// PASTLOAD_FULL=1, which also prints the trade-off.
func TestClaySitesBlunders(t *testing.T) {
	sites := claySites(t)
	repetitions := 2
	full := os.Getenv("PASTLOAD_FULL") != ""
	if full {
		repetitions = 20
	}
	published := falsify(t, alone(sites), 1, 0, 1)
	if _, alarms := shares(published, conflictAt); alarms > 0.02 {
		t.Errorf("%.3f of the tests as published conflict, want at most 0.02", alarms)
	} else {
		t.Logf("%.4f of the tests as published conflict", alarms)
	}
	for _, c := range []struct {
		name    string
		sites   []claySite
		factor  float64
		wrong   int
		atLeast float64 // share found; 0 where it is reported and no more
	}{
		{"one of 1.8", alone(sites), 1.8, 1, 0.88},
		{"one of 1.8, with cone and strength", sites, 1.8, 1, 0},
		{"two of 1.8", alone(sites), 1.8, 2, 0.80},
		{"one of 1.5", alone(sites), 1.5, 1, 0},
		{"one of 2.5", alone(sites), 2.5, 1, 0},
	} {
		tests := falsify(t, c.sites, c.factor, c.wrong, repetitions)
		found, alarms := shares(tests, conflictAt)
		t.Logf("%s: found %.3f, false alarms %.4f", c.name, found, alarms)
		slack, most := 0.10, 0.02 // two standard errors of 30 tests; two alarms of 392
		if full {
			slack, most = 0, 0.01
		}
		if c.atLeast > 0 && (found < c.atLeast-slack || alarms > most) {
			t.Errorf("%s: found %.3f, want %.2f; false alarms %.4f, want at most %.2f", c.name, found, c.atLeast, alarms, most)
		}
		if full {
			tradeOff(t, tests)
		}
	}
}

// tradeOff prints the share found against the share of false alarms.
func tradeOff(t *testing.T, tests []marked) {
	t.Helper()
	for _, limit := range []float64{1.5, 2, 2.5, 2.75, conflictAt, 3.25, 3.5, 4, 5} {
		found, alarms := shares(tests, limit)
		t.Logf("    limit %.2f: found %.3f, false alarms %.4f", limit, found, alarms)
	}
}
