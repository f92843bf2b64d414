package history

import "math"

// calibrate lets the tests of each layer tell the others how a source errs at
// this site. A relation errs mostly as a whole for a site, so a layer without
// tests is better served by a source that tests elsewhere in the borehole have
// measured. A layer's own tests never come back to it this way.
func calibrate(layers []*layer, k *constants) {
	if len(layers) < 2 {
		return
	}
	type message struct {
		layer          int
		mean, variance float64 // of the source's offset, ln σ′p
	}
	heard := map[string][]message{}
	for i, l := range layers {
		if len(l.tests) == 0 {
			continue
		}
		if len(l.sources) == 0 {
			continue
		}
		line := l.fromTests(k)
		if line == nil {
			continue
		}
		for _, s := range l.sources {
			mean, variance := s.against(l.readings, line)
			heard[s.name] = append(heard[s.name], message{i, mean, variance + k.LayerSD*k.LayerSD})
		}
	}
	for i, l := range layers {
		for j := range l.sources {
			s := &l.sources[j]
			precision, weighted := 1/(s.between*s.between), 0.0
			for _, m := range heard[s.name] {
				if m.layer != i {
					precision += 1 / m.variance
					weighted += m.mean / m.variance
				}
			}
			s.offset = weighted / precision
			// Layers differ, however well the others know the source.
			s.between = math.Max(math.Sqrt(1/precision), math.Min(s.between, k.LayerSD))
		}
	}
}

// fromTests returns ln σ′p at the depths of the readings from the tests alone.
func (l *layer) fromTests(k *constants) []mixture {
	r := l.buildRows(k, false)
	depth := append(append([]float64(nil), r.depth...), l.readings...)
	effective := append([]float64(nil), r.effective...)
	for _, z := range l.readings {
		effective = append(effective, l.stress[z])
	}
	p := newModel(k, l.in.mechanismsFor(l), &l.ground, depth, effective).infer(r)
	if p == nil {
		return nil
	}
	return p.predict(l.readings)
}

// against returns the offset of a source from lines of ln σ′p at the depths,
// and its variance: errors of the lines as if they were one, those of the
// readings as independent.
func (s *source) against(depths []float64, line []mixture) (mean, variance float64) {
	n := float64(len(s.depth))
	for a, z := range s.depth {
		for j, d := range depths {
			if d == z {
				m, sd := line[j].moments()
				mean += (s.value[a] - m) / n
				variance += sd*sd/n + s.within[a]*s.within[a]/(n*n)
			}
		}
	}
	return mean, variance
}
