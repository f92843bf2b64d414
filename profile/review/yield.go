package review

import (
	"fmt"
	"math"
	"strings"
)

// explainYield puts the causes of a σ′p that disagrees into the order that the
// sample record, the curve and the piezometers suggest.
func (c *context) explainYield(f *Finding, r *row) {
	low := r.line.known && r.v[preconsolidation] < r.line.best || r.effective.Known && r.v[preconsolidation] < r.effective.Value
	if f.Suggested != nil {
		return // a slip has a name of its own
	}
	if !low {
		f.Causes = []string{"specimen of another depth or borehole, or of a stiffer layer that the log does not show", "another unit or a decimal slip", "a construction that reads high on few points"}
		return
	}
	if word := roughSampler(r); word != "" {
		f.Causes = putFirst(f.Causes, "disturbed specimen: "+word)
	}
	if r.spec != nil && r.spec.Quality != nil {
		for i := range r.spec.Interpretation.Quality {
			if q := &r.spec.Interpretation.Quality[i]; q.Applies && q.Scheme == r.spec.Quality.Scheme && q.Rank >= 3 {
				f.Causes = putFirst(f.Causes, fmt.Sprintf("disturbed specimen: %s = %s, class %s", q.Scheme, fixed(q.Value, 2), q.Class))
			}
		}
	}
	if r.effective.Known && r.v[preconsolidation] < r.effective.Value {
		f.Message += c.excessPressure(f, r)
	}
}

// excessPressure says whether measured pore pressures bear out ground that is
// still consolidating.
func (c *context) excessPressure(f *Finding, r *row) string {
	b := r.borehole
	if !b.WaterTableDepth.Known {
		return ""
	}
	var quiet []string
	for _, w := range b.Water {
		if !w.Pressure.Known || !w.Depth.Known {
			continue
		}
		excess := w.Pressure.Value - r.water*(w.Depth.Value-b.WaterTableDepth.Value)
		deficit := r.effective.Value - r.v[preconsolidation]
		if excess > 0.5*deficit && math.Abs(w.Depth.Value-r.depth.Value) < 5 {
			f.Causes = putFirst(f.Causes, "ground still consolidating: a piezometer shows excess pressure")
			return fmt.Sprintf(" The piezometer at %s m stands %s kPa above hydrostatic, so the ground may still be consolidating.", fixed(w.Depth.Value, 2), fixed(excess, 0))
		}
		if math.Abs(w.Depth.Value-r.depth.Value) < 5 {
			quiet = append(quiet, fixed(w.Depth.Value, 2)+" m")
		}
	}
	switch len(quiet) {
	case 0:
		return ""
	case 1:
		return " The piezometer at " + quiet[0] + " shows no excess pressure: this is not ground still consolidating."
	}
	return " The piezometers at " + strings.Join(quiet, " and ") + " show no excess pressure: this is not ground still consolidating."
}

// roughSampler returns the sampler where it is one that disturbs clay.
func roughSampler(r *row) string {
	if r.result == nil {
		return ""
	}
	s := strings.ToLower(r.result.Sampler)
	for _, word := range []string{"open", "driven", "split", "u100", "bulk", "auger"} {
		if strings.Contains(s, word) {
			return r.result.Sampler
		}
	}
	return ""
}
