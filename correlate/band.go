package correlate

import (
	"errors"
	"fmt"
	"math"
	"slices"
)

// A Band is what the catalogue says of a quantity at one place, from the
// independent families whose inputs are known.
type Band struct {
	Quantity        Quantity
	Low, Best, High float64 // 5, 50 and 95 % points
	LnSD            float64 // standard deviation of the natural logarithm
	Members         []Member
	Warnings        []string // contradictions among the values; what stands on one family alone
}

// A Member is one correlation in or beside a band.
type Member struct {
	Correlation Correlation
	Estimate    Estimate
	Speaks      bool   // counted, for its family
	Why         string // why it does not count, or why it was preferred
}

// BandOf returns the low, best and high value of a quantity.
//
// Entries of one family rest on the same data or assumption, so each family has
// one voice: of its entries whose inputs are known, one inside its published
// range is preferred, then the lowest Rank. Their voices are mixed with equal
// weight as lognormal distributions:
//
//	best = exp(mean of ln value),  sd² = mean of scatter² + variance of ln value
//
// Agreement of families does not narrow the band below the scatter of one: they
// share their inputs and much of their data. Disagreement widens it.
//
// use lists the identifiers to choose from; where it is empty, the entries for
// natural clay that are more than a plausibility check are taken, or those for organic soil where the organic content is
// known and above 20 % (high-organic by EN ISO 14688-2; from memory, unverified).
//
// The error wraps ErrMissingInput where no entry has its inputs, and
// ErrNotApplicable where those that have do not apply. An identifier that is not
// in the catalogue, or is for another quantity, is an error too.
func BandOf(q Quantity, v Values, use []string) (Band, error) {
	candidates, err := chosen(q, v, use)
	if err != nil {
		return Band{}, err
	}
	band := Band{Quantity: q, Warnings: v.Contradictions()}
	band.Members = make([]Member, 0, len(candidates))
	var refused []error
	for _, c := range candidates {
		e, err := c.Evaluate(v)
		switch {
		case errors.Is(err, ErrMissingInput):
			continue
		case err != nil:
			refused = append(refused, err)
			continue
		}
		band.Members = append(band.Members, Member{Correlation: *c, Estimate: e})
	}
	if len(band.Members) == 0 {
		if refused != nil {
			return Band{}, errors.Join(refused...)
		}
		return Band{}, fmt.Errorf("%w: no correlation for %s has its inputs here", ErrMissingInput, q)
	}
	band.elect()
	band.mix()
	return band, nil
}

// chosen returns the entries a band is made from, in catalogue order.
func chosen(q Quantity, v Values, use []string) ([]*Correlation, error) {
	for _, id := range use {
		c, ok := ByID(id)
		if !ok {
			return nil, fmt.Errorf("no correlation %q in the catalogue", id)
		}
		if c.Quantity != q {
			return nil, fmt.Errorf("correlation %q is for %s, not for %s", id, c.Quantity, q)
		}
	}
	ground := NaturalClay
	if v["organic"] > organicFrom {
		ground = Organic
	}
	var out []*Correlation
	for i := range catalogue {
		c := &catalogue[i]
		if c.Quantity == q && (slices.Contains(use, c.ID) || len(use) == 0 && c.Ground == ground && !c.Plausibility) {
			out = append(out, c)
		}
	}
	return out, nil
}

// organicFrom is the organic content, in percent of dry mass, above which a
// soil is taken as organic.
const organicFrom = 20

// elect lets one member speak for each family.
func (b *Band) elect() {
	voice := map[string]int{}
	for i, m := range b.Members {
		family := m.Correlation.Family
		j, taken := voice[family]
		if !taken || b.Members[i].before(b.Members[j]) {
			voice[family] = i
		}
	}
	for i := range b.Members {
		m := &b.Members[i]
		speaker := voice[m.Correlation.Family]
		if m.Speaks = speaker == i; !m.Speaks {
			m.Why = "same family as " + b.Members[speaker].Correlation.ID + ": counted once"
		}
	}
	if len(voice) == 1 {
		b.Warnings = append(b.Warnings, "rests on one family of correlations alone")
	}
}

// before reports whether m speaks for the family rather than n.
func (m Member) before(n Member) bool {
	if in, other := len(m.Estimate.Warnings) == 0, len(n.Estimate.Warnings) == 0; in != other {
		return in
	}
	return m.Correlation.Rank < n.Correlation.Rank
}

// mix combines the voices.
func (b *Band) mix() {
	var n, sum, scatter float64
	for _, m := range b.Members {
		if m.Speaks {
			n++
			sum += math.Log(m.Estimate.Value)
			scatter += m.Correlation.Scatter.Total() * m.Correlation.Scatter.Total()
		}
	}
	mean, spread := sum/n, 0.0
	for _, m := range b.Members {
		if m.Speaks {
			d := math.Log(m.Estimate.Value) - mean
			spread += d * d
		}
	}
	b.LnSD = math.Sqrt(scatter/n + spread/n)
	b.Best = math.Exp(mean)
	b.Low, b.High = math.Exp(mean-z95*b.LnSD), math.Exp(mean+z95*b.LnSD)
}
