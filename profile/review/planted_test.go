package review

import (
	"cmp"
	"fmt"
	"math/rand"
	"os"
	"slices"
	"strings"
	"testing"

	"pastload/profile"
)

// siteCount returns how many sites the benchmark of planted faults makes for each
// kind, all of them different: one by default, 50 (1,200 sites) with
// PASTLOAD_FULL=1.
func siteCount() int {
	if os.Getenv("PASTLOAD_FULL") != "" {
		return 50
	}
	return 1
}

// What the review must reach (issue of this project's aim, measured in full).
const (
	leastFound      = 0.95 // of gross faults, right place and quantity
	mostSoundAlarm  = 0.01 // of sound results at conflict or error
	mostSoundDoubt  = 0.05 // of sound results at doubt
	leastFoundQuick = 0.90 // of the few of a quick run
)

func build(t testing.TB, s *profile.Site) *profile.Profile {
	t.Helper()
	p, err := profile.Build(s, profile.Options{})
	if err != nil {
		t.Fatal(s.Name, err)
	}
	return p
}

func sortResults(s *profile.Site) {
	for i := range s.Boreholes {
		slices.SortStableFunc(s.Boreholes[i].Results, func(a, b profile.Result) int { return cmp.Compare(a.Depth.Value, b.Depth.Value) })
	}
}

// hit tells whether a finding names the planted fault.
func (p *planted) hit(f *Finding) (place, quantity bool) {
	for _, at := range f.places() {
		for _, want := range p.places {
			if at.Borehole == want.Borehole && at.Specimen == want.Specimen && (!want.Depth.Known || at.Depth.Value == want.Depth.Value) {
				place = true
			}
		}
	}
	return place, slices.Contains(p.quantities, f.Quantity)
}

func TestPlantedFaults(t *testing.T) {
	n := siteCount()
	found, total := 0, 0
	var table strings.Builder
	fmt.Fprintf(&table, "%-40s %5s %6s %6s %6s %6s\n", "kind", "n", "found", "placed", "first", "extra")
	for k, kind := range faultKinds {
		hits, placed, first, extra, tried := 0, 0, 0, 0, 0
		for seed := int64(1); tried < n && seed < int64(3*n+10); seed++ {
			s := makeSite(int64(k)*10000 + seed)
			p, ok := kind.plant(rand.New(rand.NewSource(seed*1000+int64(k))), s)
			if !ok {
				continue
			}
			tried++
			sortResults(s)
			all := mustReview(t, build(t, s)).AtLeast(Conflict)
			right, there, top := false, false, false
			for i := range all {
				place, quantity := p.hit(&all[i])
				right = right || place && quantity
				there = there || place
				top = top || place && quantity && i == 0
			}
			for ok, count := range map[*int]bool{&hits: right, &placed: there, &first: top} {
				if count {
					*ok++
				}
			}
			if right {
				extra += len(all) - 1
			}
			if !right {
				t.Logf("%s, site %d: missed at %v; found %v", kind.name, seed, placeName(p.places[0]), ids(all))
			}
		}
		found, total = found+hits, total+tried
		fmt.Fprintf(&table, "%-40s %5d %5.0f%% %5.0f%% %5.0f%% %6.2f\n", kind.name, tried, share(hits, tried), share(placed, tried), share(first, tried), float64(extra)/float64(max(hits, 1)))
	}
	t.Logf("\n%soverall %d of %d: %.1f %%", table.String(), found, total, share(found, total))
	least := leastFoundQuick
	if n >= 50 {
		least = leastFound
	}
	if got := float64(found) / float64(total); got < least {
		t.Errorf("found %.3f of the planted faults, want %.2f", got, least)
	}
}

func share(n, of int) float64 { return 100 * float64(n) / float64(max(of, 1)) }

func ids(found Findings) []string {
	var out []string
	for _, f := range found {
		out = append(out, f.ID)
	}
	return out
}

// alarms returns how many results sound sites have, and how many of the findings
// on them are at conflict or error and at doubt.
func alarms(t *testing.T, sites int, noise float64) (results, alarms, doubts int) {
	t.Helper()
	rules := map[string]int{}
	for seed := int64(1); seed <= int64(sites); seed++ {
		s := makeNoisySite(seed+5000, noise)
		sortResults(s)
		p := build(t, s)
		for i := range s.Boreholes {
			results += len(s.Boreholes[i].Results)
		}
		for _, f := range mustReview(t, p).AtLeast(Doubt) {
			rules[string(f.Severity)+" "+f.Rule]++
			if f.Severity == Doubt {
				doubts++
			} else {
				alarms++
			}
		}
	}
	var names []string
	for name := range rules {
		names = append(names, name)
	}
	slices.Sort(names)
	for _, name := range names {
		t.Logf("%4d %s", rules[name], name)
	}
	t.Logf("laboratory errors times %.1f: %d sound results: %.2f %% at conflict or error, %.2f %% at doubt", noise, results, share(alarms, results), share(doubts, results))
	return results, alarms, doubts
}

func TestSoundSites(t *testing.T) {
	results, wrong, doubts := alarms(t, 4*siteCount()+4, 1)
	if got := float64(wrong) / float64(results); got > mostSoundAlarm {
		t.Errorf("%.4f of sound results at conflict or error, want at most %.2f", got, mostSoundAlarm)
	}
	if got := float64(doubts) / float64(results); got > mostSoundDoubt {
		t.Errorf("%.4f of sound results at doubt, want at most %.2f", got, mostSoundDoubt)
	}
}

// A laboratory that errs half as much again may be doubted more often, but must
// not be found in conflict with itself.
func TestSoundSitesOfAPoorerLaboratory(t *testing.T) {
	results, wrong, _ := alarms(t, 2*siteCount(), 1.5)
	if got := float64(wrong) / float64(results); got > 2*mostSoundAlarm {
		t.Errorf("%.4f of sound results at conflict or error, want at most %.2f", got, 2*mostSoundAlarm)
	}
}
