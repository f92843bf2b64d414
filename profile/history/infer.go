package history

import (
	"fmt"
	"math"
)

// Infer returns the stress history that the evidence supports. Equal input
// gives equal bytes. The error wraps ErrInput where a number is not finite, a
// preconsolidation stress is not above zero or a layer is not in the list.
// Where there is little evidence the answer is wide and Notes say why; no
// number in it is NaN or infinite.
func Infer(in Input) (*Result, error) { return infer(in, &standard) }

func infer(in Input, k *constants) (*Result, error) {
	in.defaults()
	if err := in.check(); err != nil {
		return nil, err
	}
	out := &Result{
		Points:          make([]Point, len(in.Stations)),
		Tests:           make([]TestResult, len(in.Tests)),
		MostInfluential: -1,
	}
	layers := make([]*layer, len(in.Layers))
	for i := range in.Layers {
		layers[i] = in.gather(i)
	}
	calibrate(layers, k)
	for _, l := range layers {
		if err := l.infer(k); err != nil {
			return nil, err
		}
		l.tell(out)
	}
	for i, t := range out.Tests {
		if t.Used && (out.MostInfluential < 0 || t.Influence > out.Tests[out.MostInfluential].Influence) {
			out.MostInfluential = i
		}
	}
	out.NextTest = nextTest(layers)
	return out, nil
}

// layer is the work on one stratum.
type layer struct {
	in       *Input
	index    int
	ground   ground
	tests    []int // exact tests, index in Input.Tests
	bounds   []int // the others
	near     []int // exact tests of neighbours, index in Input.Neighbours
	stations []int // index in Input.Stations
	sources  []source
	readings []float64 // different depths of the readings
	stress   map[float64]float64
	mended   []mendedStress
	// What the plausible effective stresses are, by depth.
	goodDepth, goodStress []float64
	sites                 []site // one for each bound
	rows                  *rows
	model                 *model
	post                  *posterior
	lines                 []mixture // ln σ′p at the outputs: stations, tests, bounds, readings
}

// gather sorts the evidence of a layer.
func (in *Input) gather(index int) *layer {
	l := &layer{in: in, index: index, sources: in.sourcesOf(index)}
	for i, t := range in.Tests {
		switch {
		case t.Layer != index:
		case t.Kind == Exact:
			l.tests = append(l.tests, i)
		default:
			l.bounds = append(l.bounds, i)
		}
	}
	for i, t := range in.Neighbours {
		if t.Layer == index && t.Kind == Exact {
			l.near = append(l.near, i)
		}
	}
	for i, s := range in.Stations {
		if s.Layer == index {
			l.stations = append(l.stations, i)
		}
	}
	l.readings = readingDepths(l.sources)
	l.sites = make([]site, len(l.bounds))
	l.mend()
	l.ground = ground{top: in.Layers[index].Top, base: in.Layers[index].Base, gamma: in.WaterUnitWeight, buoyant: in.BuoyantUnitWeight}
	for _, z := range l.outputs() {
		l.ground.base = math.Max(l.ground.base, z)
		l.ground.top = math.Min(l.ground.top, z)
	}
	l.ground.base = math.Max(l.ground.base, l.ground.top+0.1)
	if in.HasWater {
		l.ground.water, l.ground.waterKnown = in.WaterTable, true
	}
	return l
}

// outputs returns the depths at which ln σ′p is computed.
func (l *layer) outputs() []float64 {
	var z []float64
	for _, i := range l.stations {
		z = append(z, l.in.Stations[i].Depth)
	}
	for _, i := range append(append([]int(nil), l.tests...), l.bounds...) {
		z = append(z, l.in.Tests[i].Depth)
	}
	return append(z, l.readings...)
}

// infer computes the posterior of the layer. Bounds need three rounds: without
// them, then with what each one adds to the others.
func (l *layer) infer(k *constants) error {
	rounds := 1
	if len(l.bounds) > 0 {
		rounds = 3
	}
	for round := range rounds {
		l.rows = l.buildRows(k, true)
		depth := append([]float64(nil), l.rows.depth...)
		effective := append([]float64(nil), l.rows.effective...)
		depth = append(depth, l.outputs()...)
		for _, i := range l.stations {
			effective = append(effective, l.mendedAt(l.in.Stations[i].Depth, l.in.Stations[i].EffectiveStress))
		}
		for len(effective) < len(depth) {
			effective = append(effective, l.stress[depth[len(effective)]])
		}
		l.model = newModel(k, l.in.mechanismsFor(l), &l.ground, depth, effective)
		l.post = l.model.infer(l.rows)
		if l.post == nil {
			return fmt.Errorf("%w: %s: the evidence is too singular to be averaged", ErrInput, l.name())
		}
		l.lines = l.post.predict(l.outputs())
		if round < rounds-1 {
			l.updateBounds(k)
		}
	}
	return nil
}

// buildRows writes the rows of the layer, with or without indirect evidence.
func (l *layer) buildRows(k *constants, indirect bool) *rows {
	r := &rows{tests: len(l.tests)}
	for _, i := range l.tests {
		t := l.in.Tests[i]
		value, sd := t.observation()
		r.add(t.Depth, l.stress[t.Depth], value, sd, 0, 0)
	}
	for _, i := range l.near {
		t := l.in.Neighbours[i]
		value, sd := t.observation()
		r.add(t.Depth, t.EffectiveStress, value, sd, 0, l.in.NeighbourBetweenSD)
	}
	for b, s := range l.sites {
		if s.variance > 0 {
			z := l.in.Tests[l.bounds[b]].Depth
			r.add(z, l.stress[z], s.mean, 0, s.variance, 0)
		}
	}
	if !indirect || len(l.sources) == 0 {
		return r
	}
	for _, t := range k.Trusts {
		if ind, ok := k.combineSources(l.sources, l.readings, t); ok {
			r.indirect = append(r.indirect, ind)
		}
	}
	if len(r.indirect) < len(k.Trusts) {
		r.indirect = nil
		return r
	}
	for _, z := range l.readings {
		r.add(z, l.stress[z], 0, 0, 0, 0)
	}
	return r
}

// observation returns ln σ′p as the test tells it and its sd. What disturbance
// may have taken away is half-normal: it enters by its mean and variance.
func (t *Test) observation() (value, sd float64) {
	sd = t.LnSD
	if sd == 0 {
		sd = LnSDForGrade("")
	}
	sd = math.Max(sd, leastSD)
	mean := math.Sqrt(2 / math.Pi)
	return math.Log(t.Preconsolidation) + mean*t.Disturbance, math.Hypot(sd, math.Sqrt(1-mean*mean)*t.Disturbance)
}

// leastSD is the smallest sd of ln σ′p that anything is believed to have.
const leastSD = 0.01
