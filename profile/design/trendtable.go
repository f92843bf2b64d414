package design

import (
	"math"

	"pastload/profile"
)

// A Trend is how a quantity changes with depth in a stratum.
type Trend struct {
	Slope       float64        `json:"slope_per_m"`        // of the quantity, at the middle of the tested depths
	LogSlope    profile.Number `json:"log_slope_per_m"`    // of its natural logarithm, where the line is in logarithms
	RobustSlope profile.Number `json:"robust_slope_per_m"` // Theil–Sen, of the quantity
	P           float64        `json:"p"`                  // two-sided chance of such a slope where there is none
	Real        bool           `json:"real"`
	Change      profile.Number `json:"change"`      // over the tested depths, as a share of the value at their middle
	Used        bool           `json:"used"`        // real, and a change of a tenth or more: the line is followed
	SD          float64        `json:"residual_sd"` // about the line, of the logarithm where the line is in logarithms
	From        float64        `json:"from_m"`
	To          float64        `json:"to_m"`
	Points      []TrendPoint   `json:"points,omitempty"` // where the line is used
	Line        DepthLine      `json:"-"`
}

// A TrendPoint is the line of a trend and its cautious lines at one depth.
type TrendPoint struct {
	Depth        float64        `json:"depth_m"`
	Value        profile.Number `json:"value"`
	MeanLow      profile.Number `json:"mean_low"` // confidence band
	MeanHigh     profile.Number `json:"mean_high"`
	FractileLow  profile.Number `json:"fractile_low"` // prediction band
	FractileHigh profile.Number `json:"fractile_high"`
	ShiftedLow   profile.Number `json:"shifted_mean_low"` // parallel line
	ShiftedHigh  profile.Number `json:"shifted_mean_high"`
}

// lines gives the ways that follow the depth, at the middle of the tested depths.
func (e *evaluation) lines() []Alternative {
	l := e.line
	depth := l.From + (l.To-l.From)/2
	var out []Alternative
	for _, w := range []struct {
		id, name string
		estimate Estimate
		of       func(float64, Estimate) (Interval, error)
		source   string
		mark     string
	}{
		{"line-mean", "regression line, 95 % confidence band", Mean, l.Band, "Frank et al. 2004", MarkMemory},
		{"line-fractile", "regression line, 95 % prediction band", Fractile, l.Band, "Frank et al. 2004", MarkMemory},
		{"shifted-mean", "regression line shifted by k_n·s, mean", Mean, l.Shifted, "Bond 2011", MarkRead},
		{"shifted-fractile", "regression line shifted by k_n·s, fractile", Fractile, l.Shifted, "Bond 2011", MarkRead},
	} {
		i, err := w.of(depth, w.estimate)
		if err != nil {
			continue
		}
		a := e.alternative(w.id, w.name+", at "+metres(depth), w.estimate, i, w.source, w.mark)
		switch {
		case !l.Real():
			a.Note = "the slope is not real: a constant is used"
		case !e.followed:
			a.Note = "the change with depth is too small to matter: a constant is used"
		}
		out = append(out, a)
	}
	return out
}

// trend describes the line, with a table of it where it is real.
func (e *evaluation) trend() *Trend {
	l := *e.line
	middle := l.From + (l.To-l.From)/2
	t := &Trend{Slope: l.SlopeAt(middle), P: l.P, Real: l.Real(), Used: e.followed, SD: l.SD, From: l.From, To: l.To, Line: l}
	if l.Distribution == LogNormal {
		t.LogSlope = profile.Known(l.Slope)
	}
	if slope, _, err := TheilSen(e.sample); err == nil && finite(slope) {
		t.RobustSlope = profile.Known(slope)
	}
	if c := l.change(); finite(c) {
		t.Change = profile.Known(c)
	}
	if !t.Used {
		return t
	}
	for _, z := range depthsBetween(l.From, l.To) {
		mean, _ := l.Band(z, Mean)
		fractile, _ := l.Band(z, Fractile)
		shifted, _ := l.Shifted(z, Mean)
		t.Points = append(t.Points, TrendPoint{
			Depth: z, Value: e.number(l.At(z)),
			MeanLow: e.number(mean.Low), MeanHigh: e.number(mean.High),
			FractileLow: e.number(fractile.Low), FractileHigh: e.number(fractile.High),
			ShiftedLow: e.number(shifted.Low), ShiftedHigh: e.number(shifted.High),
		})
	}
	return t
}

// depthsBetween returns both ends and the half metres between them, or a hundred
// equal steps where that would be more.
func depthsBetween(from, to float64) []float64 {
	step := math.Max(0.5, (to-from)/100)
	depths := []float64{from}
	first := math.Floor(from / step)
	// Counted with whole numbers: adding one to a float64 beyond 2⁵³ changes nothing.
	for i := range int(math.Ceil((to-from)/step)) + 1 {
		if z := (first + float64(i)) * step; z > from+1e-9 && z < to-1e-9 && z > depths[len(depths)-1] {
			depths = append(depths, z)
		}
	}
	return append(depths, to)
}
