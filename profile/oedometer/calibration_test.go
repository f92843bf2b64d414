package oedometer

import (
	"math"
	"math/rand"
	"testing"
)

// TestCalibration measures, on other curves than TestKnownTruth, how the
// constructions err, and holds the constants to it.
func TestCalibration(t *testing.T) {
	const (
		biasWithin    = 0.03 // less than half of any construction's own scatter
		slopeWithin   = 0.35 // times a flattening of 0.2 it is 7 %
		scatterWithin = 0.03
	)
	type sample struct{ err, flattening float64 }
	straight, all := map[string][]sample{}, map[string][]sample{}
	for i, f := range families {
		if f.kind != ordinary && f.kind != structured || !f.calibrates {
			continue
		}
		r := rand.New(rand.NewSource(int64(1000 + i)))
		for range 300 {
			clay, p := f.draw(r)
			if p.readings == 0 && r.Intn(2) == 0 {
				p.loopAt, p.loopTo = 2*clay.yield, clay.yield/3
			}
			c, err := Prepare(p.record(clay, r))
			if err != nil {
				continue
			}
			around := surroundings{inSitu: Known(clay.yield / between(r, 1.3, 3))}
			around.cr, around.beta, _, _ = c.loopSlope(c.InitialVoidRatio)
			in, ok := newInput(firstLoading(c), around, virginShare)
			if !ok {
				continue
			}
			for k, o := range in.values() {
				if !o.ok {
					continue
				}
				id := constructions[k].id
				s := sample{math.Log(o.stress / clay.yield), in.virgin.flattening}
				all[id] = append(all[id], s)
				if f.kind == ordinary {
					straight[id] = append(straight[id], s)
				}
			}
		}
	}
	for _, c := range constructions {
		want, ok := calibrations[c.id]
		if !ok {
			continue
		}
		// The bias from curves without structure, the slope from all with the
		// bias held.
		bias := 0.0
		for _, s := range straight[c.id] {
			bias += s.err / float64(len(straight[c.id]))
		}
		var ff, fe, squares float64
		for _, s := range all[c.id] {
			ff += s.flattening * s.flattening
			fe += s.flattening * (s.err - bias)
		}
		slope := fe / ff
		for _, s := range straight[c.id] {
			d := s.err - bias
			squares += d * d
		}
		scatter := math.Sqrt(squares / float64(len(straight[c.id])))
		t.Logf("%-18s n %4d  bias %+.3f  slope %+.2f  scatter %.3f  (set %+.3f %+.2f %.3f)", c.id, len(all[c.id]), bias, slope, scatter, want.bias, want.slope, want.scatter)
		if math.Abs(bias-want.bias) > biasWithin {
			t.Errorf("%s: bias %+.3f is set, %+.3f measured", c.id, want.bias, bias)
		}
		if math.Abs(slope-want.slope) > slopeWithin {
			t.Errorf("%s: slope with flattening %+.2f is set, %+.2f measured", c.id, want.slope, slope)
		}
		if math.Abs(scatter-want.scatter) > scatterWithin {
			t.Errorf("%s: scatter %.3f is set, %.3f measured", c.id, want.scatter, scatter)
		}
	}
}
