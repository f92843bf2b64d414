package cone

import (
	"fmt"
	"math"
	"slices"

	"pastload/correlate"
)

// A Layer is a window of depth within a stratum, condensed to one value of each
// kind: medians, which a shell or a stone does not move.
type Layer struct {
	Stratum   string
	Top, Base float64 // m, the window
	Depth     float64 // m, mean of the depths used
	Used      int     // depths of clay in it
	LeftOut   int     // depths of sand or silt, or next to a boundary
	State             // mean stress over the depths used

	Net           Measure // qt − σv0, kPa
	Excess        Measure // u2 − u0, kPa
	EffectiveCone Measure // qt − u2, kPa

	// LnSD is the standard deviation of ln(qt − σv0) within the window, from the
	// median absolute deviation.
	LnSD float64

	BehaviourIndex Measure

	// Yield is σ′p by each relation that applies, net resistance first. They come
	// from the same readings: their errors are not independent.
	Yield []Yield
}

// Yield is σ′p from a relation at a layer, by the published factor. Its standard
// deviations are of ln σ′p.
type Yield struct {
	Correlation string  // identifier in the package correlate
	Source      Source  // the cone value it is taken from
	Cone        float64 // that value, kPa
	Value       float64 // σ′p, kPa
	Own         float64 // error of this layer alone, with that of its median
	Shared      float64 // error shared by every layer of the site
}

// A Source is the cone value that σ′p is taken from.
type Source int

const (
	NetResistance       Source = iota // qt − σv0
	ExcessPressure                    // u2 − u0
	EffectiveResistance               // qt − u2
)

// String returns the source in words.
func (s Source) String() string {
	return [...]string{"net cone resistance", "excess cone pore pressure", "effective cone resistance"}[s]
}

// sources are the relations that are used, in the order of Source.
var sources = [...]relation{
	find("mayne-1995-qnet", correlate.NetConeFactor),
	find("chen-mayne-1996-du2", correlate.ExcessPressureFactor),
	find("mayne-2005-qeff", correlate.EffectiveConeFactor),
}

type relation struct {
	id      string
	factor  float64
	scatter correlate.Scatter
}

func find(id string, factor float64) relation {
	c, ok := correlate.ByID(id)
	if !ok {
		panic("cone: no correlation " + id)
	}
	return relation{id, factor, c.Scatter}
}

const (
	leastDepths = 3      // in a window, for a median to mean something
	edge        = 0.1    // m next to a boundary that a cone reads through
	fluctuation = 0.3    // m, vertical scale of fluctuation of qt in clay; from memory, unverified
	medianError = 1.2533 // standard error of a median over that of a mean
)

// condense makes the layers and says what was left out of them.
func (e *evaluation) condense(points []Point) []Layer {
	w := window{evaluation: e}
	var layers []Layer
	unjudged, sand, thin, outside := 0, 0, 0, 0
	for i := 0; i < len(points); {
		stratum, n := e.bounds(points[i])
		j := i
		for j < len(points) && points[j].Stratum == points[i].Stratum && e.index(points[j], stratum.Top) == n {
			unjudged += oneIf(!points[j].BehaviourIndex.Known)
			sand += oneIf(!points[j].Clay)
			j++
		}
		if points[i].Stratum < 0 && len(e.Strata) > 0 {
			outside += j - i
		}
		if !stratum.LeaveOut {
			top := stratum.Top + float64(n)*e.Window
			if l, ok := w.layer(points[i:j], stratum, top, math.Min(top+e.Window, stratum.Base)); ok {
				layers = append(layers, l)
			} else {
				thin++
			}
		}
		i = j
	}
	if unjudged > 0 {
		e.say("no sleeve friction at %d of %d depths: sand and silt cannot be told from clay there but by the strata", unjudged, len(points))
	}
	if sand > 0 {
		e.say("%d of %d depths behave as sand or silt (Ic below %g): left out of σ′p", sand, len(points), e.ClayFrom)
	}
	if outside > 0 {
		e.say("%d of %d depths lie in no stratum: no σ′p from them", outside, len(points))
	}
	if thin > 0 {
		e.say("%d windows of %g m give no σ′p: too few readings in clay", thin, e.Window)
	}
	return layers
}

// bounds returns the stratum of a point, and which of its windows holds it.
func (e *evaluation) bounds(p Point) (Stratum, int) {
	s := Stratum{Base: math.Inf(1)}
	if p.Stratum >= 0 {
		s = e.Strata[p.Stratum]
	} else if len(e.Strata) > 0 {
		// Below or between the strata of a borehole nothing is known of the soil.
		s.LeaveOut = true
	}
	return s, e.index(p, s.Top)
}

func (e *evaluation) index(p Point, top float64) int {
	return int((p.Depth - top) / e.Window)
}

func oneIf(b bool) int {
	if b {
		return 1
	}
	return 0
}

// window condenses one window after another in the same memory.
type window struct {
	*evaluation
	net, logs, excess, effective, index []float64
}

// layer condenses points that lie in one window; ok is false where too few are
// clay, or fewer than half.
func (w *window) layer(points []Point, s Stratum, top, base float64) (l Layer, ok bool) {
	w.net, w.logs, w.excess, w.effective, w.index = w.net[:0], w.logs[:0], w.excess[:0], w.effective[:0], w.index[:0]
	l = Layer{Stratum: s.Name, Top: top, Base: base}
	first, last, sand := 0.0, 0.0, 0
	for i := range points {
		p := &points[i]
		if !p.Clay {
			sand++
		}
		if !p.Clay || w.atEdge(p.Depth, s) {
			l.LeftOut++
			continue
		}
		if l.Used == 0 {
			first = p.Depth
		}
		last = p.Depth
		l.Used++
		l.Depth += p.Depth
		l.Total, l.Pore, l.Effective = l.Total+p.Total, l.Pore+p.Pore, l.Effective+p.Effective
		w.take(p)
	}
	if l.Used < leastDepths || 2*sand > len(points) {
		return Layer{}, false
	}
	n := float64(l.Used)
	l.Depth /= n
	l.Total, l.Pore, l.Effective = l.Total/n, l.Pore/n, l.Effective/n
	w.finish(&l, last-first)
	return l, true
}

// atEdge reports whether a depth is so near a boundary between strata that the
// cone feels both. The ground surface is none.
func (w *window) atEdge(depth float64, s Stratum) bool {
	if s.Base-s.Top < 4*edge {
		return false
	}
	return s.Top > 0 && depth-s.Top < edge || s.Base-depth < edge
}

func (w *window) take(p *Point) {
	w.net = append(w.net, p.Net)
	w.logs = append(w.logs, math.Log(p.Net))
	if p.Excess.Known {
		w.excess = append(w.excess, p.Excess.Value)
		w.effective = append(w.effective, p.EffectiveCone.Value)
	}
	if p.BehaviourIndex.Known {
		w.index = append(w.index, p.BehaviourIndex.Value)
	}
}

// finish takes the medians and what follows from them.
func (w *window) finish(l *Layer, length float64) {
	l.Net = Of(median(w.net))
	l.LnSD = robustSD(w.logs)
	if len(w.excess) >= leastDepths {
		l.Excess, l.EffectiveCone = Of(median(w.excess)), Of(median(w.effective))
	}
	if len(w.index) > 0 {
		l.BehaviourIndex = Of(median(w.index))
	}
	// Neighbouring readings repeat each other: what counts is the length in
	// scales of fluctuation.
	independent := math.Max(1, math.Min(float64(l.Used), length/fluctuation))
	own := medianError * l.LnSD / math.Sqrt(independent)
	l.Yield = make([]Yield, 0, len(sources))
	for i, value := range [...]Measure{l.Net, l.Excess, l.EffectiveCone} {
		if r := sources[i]; value.Known && value.Value > 0 {
			l.Yield = append(l.Yield, Yield{Correlation: r.id, Source: Source(i), Cone: value.Value, Value: r.factor * value.Value,
				Own: math.Hypot(r.scatter.Within, own), Shared: r.scatter.Between})
		}
	}
}

// At returns the median of a cone value over the clay within half of depth, and
// how many depths it rests on. It is not known where there are fewer than three.
func (s Sounding) At(depth, half float64, source Source) (Measure, int) {
	from, _ := slices.BinarySearchFunc(s.Points, depth-half, func(p Point, d float64) int {
		if p.Depth < d {
			return -1
		}
		return 1
	})
	var values []float64
	for _, p := range s.Points[from:] {
		if p.Depth > depth+half {
			break
		}
		if v := p.value(source); p.Clay && v.Known {
			values = append(values, v.Value)
		}
	}
	if len(values) < leastDepths {
		return Measure{}, len(values)
	}
	return Of(median(values)), len(values)
}

func (p Point) value(s Source) Measure {
	switch s {
	case NetResistance:
		return Of(p.Net)
	case ExcessPressure:
		return p.Excess
	case EffectiveResistance:
		return p.EffectiveCone
	}
	panic(fmt.Sprintf("cone: source %d", s))
}
