package review

import (
	"fmt"
	"slices"
	"strings"

	"pastload/profile"
)

// plasticityWords are the classes by liquid limit.
var plasticityWords = []struct {
	word      string
	low, high float64
}{{"low plasticity", 0, 35}, {"intermediate plasticity", 35, 50}, {"medium plasticity", 35, 50}, {"extremely high plasticity", 90, 1e9}, {"very high plasticity", 70, 90}, {"high plasticity", 50, 1e9}}

// descriptions compares the words of the log with the results of a stratum.
func descriptions(c *context) []Finding {
	var out []Finding
	rule := c.running
	for i := range c.profile.Boreholes {
		b := c.site.Borehole(c.profile.Boreholes[i].Borehole)
		if b == nil {
			continue
		}
		for j := range b.Strata {
			s := &b.Strata[j]
			ll, li := valuesIn(c, b, s)
			text := strings.ToLower(s.Description)
			var message, found, wanted string
			for _, p := range plasticityWords {
				if len(ll) < smallest || !strings.Contains(text, p.word) {
					continue
				}
				if m := middle(ll); m < p.low-8 || m > p.high+8 {
					message = fmt.Sprintf("%s: %s is described as of %s, but its liquid limit is %s %% (median of %d).", b.Name, orWord(s.Name, "the ground"), p.word, fixed(m, 0), len(ll))
					found, wanted = "LL "+fixed(m, 0)+" %", p.word
				}
				break
			}
			if message == "" && len(li) >= smallest && strings.Contains(text, "stiff") && !strings.Contains(text, "soft") && middle(li) > 0.9 {
				message = fmt.Sprintf("%s: %s is described as stiff, but its liquidity index is %s (median of %d).", b.Name, orWord(s.Name, "the ground"), fixed(middle(li), 2), len(li))
				found, wanted = "LI "+fixed(middle(li), 2), "stiff"
			}
			if message == "" {
				continue
			}
			f := Finding{
				Rule: rule.ID, Severity: Doubt, Borehole: b.Name, Depth: profile.Known(s.Top), Quantity: "description", Found: found, Wanted: wanted, Message: message,
				Causes: slices.Clone(rule.Causes), Action: rule.Action, Source: rule.Reference(),
			}
			if s.Source != nil {
				f.Cells = []string{s.Source.String()}
			}
			out = append(out, f)
		}
	}
	return out
}

// valuesIn returns the sorted liquid limits and liquidity indices of a stratum in
// one borehole.
func valuesIn(c *context, b *profile.Borehole, s *profile.Stratum) (ll, li []float64) {
	for _, r := range c.rows {
		if r.borehole != b || r.stratum != s {
			continue
		}
		if r.known(liquidLimit) {
			ll = append(ll, r.v[liquidLimit])
		}
		if x, _, ok := liquidity(r); ok {
			li = append(li, x)
		}
	}
	slices.Sort(ll)
	slices.Sort(li)
	return ll, li
}
