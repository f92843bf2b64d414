package design

import (
	"strings"

	"pastload/profile"
)

// leftOut reports whether a quantity of the record is not to be counted: by the
// engineer's last word, and for σ′p by what the profile made of the test.
func (r *record) leftOut(quantity string) bool {
	if quantity == "preconsolidation stress" && r.test != nil && (r.test.LeftOut || !r.test.Used && r.test.Bound == profile.Exact) {
		return true
	}
	d := r.decision(quantity, profile.LeaveOut, profile.Keep)
	return d != nil && d.Decision == profile.LeaveOut
}

// decided returns the value that the engineer adopted for this one specimen,
// else n. σ′p is settled by the profile before it comes here.
func (r *record) decided(quantity string, n profile.Number) profile.Number {
	if quantity == "preconsolidation stress" || !n.Known {
		return n
	}
	if d := r.decision(quantity, profile.AdoptValue); d != nil && d.Value.Known {
		return profile.Number{Value: d.Value.Value, Known: true, Source: d.Source}
	}
	return n
}

// decision returns the last decision of the table on a quantity of this record,
// of one of the kinds given, or nil.
func (r *record) decision(quantity string, kinds ...string) *profile.Decision {
	var last *profile.Decision
	for i := range r.site.Decisions {
		d := &r.site.Decisions[i]
		if !d.Concerns(r.borehole, r.depth, r.specimen) || !about(d, quantity) {
			continue
		}
		for _, k := range kinds {
			if d.Decision == k {
				last = d
			}
		}
	}
	return last
}

// otherNames are what a decision may call the quantities that no column holds.
var otherNames = map[string][]string{
	"OCR":                 {"overconsolidation ratio"},
	"POP":                 {"pre-overburden pressure", "pop_kPa"},
	"compression ratio":   {"CR", "compression_ratio"},
	"recompression ratio": {"RR", "recompression_ratio"},
	"strength ratio":      {"su/σ′p", "su/σ'p", "su ratio", "strength_ratio"},
}

// about reports whether a decision names a quantity, by name, symbol or key.
func about(d *profile.Decision, name string) bool {
	said := strings.TrimSpace(d.Quantity)
	if strings.EqualFold(said, name) {
		return true
	}
	for _, other := range otherNames[name] {
		if strings.EqualFold(said, other) {
			return true
		}
	}
	for i := range profile.Quantities {
		if q := &profile.Quantities[i]; q.Name == name {
			return strings.EqualFold(said, q.Symbol) || strings.EqualFold(said, q.Key)
		}
	}
	return false
}
