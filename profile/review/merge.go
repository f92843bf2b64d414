package review

import (
	"slices"
	"strings"
)

// merge keeps one finding for each place and quantity: the one that explains
// most, with the others as evidence. Notes stay as they are, save those that
// explain a heavier one.
func (c *context) merge(found Findings) Findings {
	type key struct {
		place    string
		quantity string
	}
	slices.SortStableFunc(found, func(a, b Finding) int {
		if x := explains(&a) - explains(&b); x != 0 {
			return -x
		}
		return b.Severity.Rank() - a.Severity.Rank()
	})
	moved := map[string]int{} // by place: the finding that a specimen belongs elsewhere
	at := map[key]int{}
	var out Findings
	for i := range found {
		f := &found[i]
		if j, ok := f.ofMoved(moved); ok && f.Severity != Note {
			out[j].absorb(f)
			continue
		}
		if f.Rule == "specimen-exchange" || f.Rule == "specimen-place" {
			for _, p := range f.places() {
				moved[placeName(p)] = len(out)
			}
		}
		if f.Depth.Known || f.Specimen != "" {
			k := key{placeName(Place{f.Borehole, f.Depth, f.Specimen}), f.Quantity}
			j, seen := at[k]
			if !seen && low(f) {
				// A slope that is too flat on a test that stopped short has that cause.
				j, seen = at[key{k.place, traits[preconsolidation].quantity}]
				seen = seen && out[j].Rule == "carried-far-enough" && out[j].Severity != Note
			}
			switch {
			case seen && (f.Severity != Note || f.Rule == "disturbance") && out[j].Severity != Note:
				out[j].absorb(f)
				continue
			case !seen && f.Severity != Note:
				at[k] = len(out)
			}
		}
		out = append(out, *f)
	}
	return c.foldIntoWater(out)
}

// places returns every place that a finding is about.
func (f *Finding) places() []Place {
	return append([]Place{{f.Borehole, f.Depth, f.Specimen}}, f.Also...)
}

// ofMoved tells whether a finding is about a specimen that belongs elsewhere.
func (f *Finding) ofMoved(moved map[string]int) (int, bool) {
	for _, p := range f.places() {
		if j, ok := moved[placeName(p)]; ok {
			return j, true
		}
	}
	return 0, false
}

// explains ranks rules that say why over those that say that.
func explains(f *Finding) int {
	switch {
	case f.Severity == Note:
		return -1
	case f.Rule == "specimen-exchange", f.Rule == "specimen-place":
		return 4
	case f.Rule == "carried-far-enough":
		return 3
	case f.Suggested != nil:
		return 2
	}
	return 1
}

// low tells whether a finding is about a compression index that reads low and has
// no slip to its name.
func low(f *Finding) bool {
	return f.Quantity == traits[compressionIndex].quantity && f.Severity != Note && (f.Suggested == nil || f.Suggested.How == "")
}

// absorb makes another finding evidence of this one.
func (f *Finding) absorb(o *Finding) {
	f.Evidence = append(append(f.Evidence, o.Message), o.Evidence...)
	if o.Severity.Rank() > f.Severity.Rank() {
		f.Severity = o.Severity
	}
	if o.Rule == "disturbance" && f.Rule == "stress-history" && f.Severity == Doubt && !strings.Contains(o.Found, " or ") {
		f.Severity = Conflict // two independent signs of one cause
	}
	f.Impact = max(f.Impact, o.Impact)
	for _, cell := range o.Cells {
		if !slices.Contains(f.Cells, cell) {
			f.Cells = append(f.Cells, cell)
		}
	}
}

// foldIntoWater makes overconsolidation ratios below one evidence where the water
// level of their borehole is in conflict: one wrong level breaks them all.
func (c *context) foldIntoWater(found Findings) Findings {
	level := map[string]int{}
	for i := range found {
		if found[i].Quantity == "water table depth" && found[i].Severity.Rank() >= Conflict.Rank() {
			level[found[i].Borehole] = i
		}
	}
	if len(level) == 0 {
		return found
	}
	gone := map[int]bool{}
	for i := range found {
		f := &found[i]
		j, ok := level[f.Borehole]
		if ok && f.Suggested == nil && (f.Rule == "ocr-below-one" || f.Rule == "given-effective-stress" || f.Rule == "stress-history" && strings.Contains(strings.Join(f.Evidence, " "), "OCR")) {
			found[j].absorb(f)
			gone[i] = true
		}
	}
	var out Findings
	for i := range found {
		if !gone[i] {
			out = append(out, found[i])
		}
	}
	return out
}
