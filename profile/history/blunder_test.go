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

// everyOne falsifies each test in turn, up and down, and returns the shares
// that conflict with every site counting the same: what drawing one test of
// each site gives on average.
func everyOne(tb testing.TB, sites []claySite, factor float64) (found, alarms float64) {
	tb.Helper()
	others := 0.0
	for _, s := range sites {
		n := float64(len(s.in.Tests))
		others += n - 1
		for j := range s.in.Tests {
			for _, f := range []float64{factor, 1 / factor} {
				in := s.in
				in.Tests = append([]Test(nil), in.Tests...)
				in.Tests[j].Preconsolidation *= f
				res, err := Infer(in)
				if err != nil {
					tb.Fatal(err)
				}
				for i, t := range res.Tests {
					over := indicator(t.Verdict == Conflicts) / (2 * n)
					if i == j {
						found += over / float64(len(sites))
					} else {
						alarms += over
					}
				}
			}
		}
	}
	return found, alarms / others
}

// Wrong tests are found among natural ones. With PASTLOAD_FULL=1 each test in
// turn is falsified, and 20 draws of one or two tests give the trade-off.
func TestClaySitesBlunders(t *testing.T) {
	sites := alone(claySites(t))
	published := falsify(t, sites, 1, 0, 1)
	_, alarms := shares(published, conflictAt)
	t.Logf("%.4f of the tests as published conflict", alarms)
	if alarms > 0.02 {
		t.Errorf("%.4f of the tests as published conflict, want at most 0.02", alarms)
	}
	if os.Getenv("PASTLOAD_FULL") == "" {
		// 30 draws have a standard error of 0.06, and one alarm is 0.003.
		if found, alarms := shares(falsify(t, sites, 1.8, 1, 2), conflictAt); found < 0.70 || alarms > 0.02 {
			t.Errorf("one of 1.8: found %.3f, want 0.70; false alarms %.4f, want at most 0.02", found, alarms)
		}
		return
	}
	with := claySites(t)
	for _, c := range []struct {
		name   string
		sites  []claySite
		factor float64
		assert bool
	}{
		{"1.8", sites, 1.8, true}, {"1.8, with cone and strength", with, 1.8, true},
		{"1.5", sites, 1.5, false}, {"2.5", sites, 2.5, false},
	} {
		found, alarms := everyOne(t, c.sites, c.factor)
		t.Logf("each test in turn by %s: found %.3f, false alarms %.4f", c.name, found, alarms)
		if c.assert && (found < 0.88 || alarms > 0.01) {
			t.Errorf("each test in turn by %s: found %.3f, want 0.88; false alarms %.4f, want at most 0.01", c.name, found, alarms)
		}
	}
	for _, c := range []struct {
		name   string
		factor float64
		wrong  int
		least  float64
	}{{"one of 1.8", 1.8, 1, 0}, {"two of 1.8", 1.8, 2, 0.80}, {"one of 1.5", 1.5, 1, 0}, {"one of 2.5", 2.5, 1, 0}} {
		tests := falsify(t, sites, c.factor, c.wrong, 20)
		if found, _ := shares(tests, conflictAt); found < c.least {
			t.Errorf("%s: found %.3f, want %.2f", c.name, found, c.least)
		}
		for _, limit := range []float64{1.5, 2, 2.5, 2.75, conflictAt, 3.25, 3.5, 4, 5} {
			found, alarms := shares(tests, limit)
			t.Logf("%s, limit %.2f: found %.3f, false alarms %.4f", c.name, limit, found, alarms)
		}
	}
}
