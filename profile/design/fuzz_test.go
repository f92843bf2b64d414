package design

import (
	"encoding/binary"
	"math"
	"testing"
)

// FuzzParameter: whatever numbers a table holds, the result can be written as
// JSON, or there is an error; nothing panics and low is never above high.
func FuzzParameter(f *testing.F) {
	seed := func(v ...float64) {
		var b []byte
		for _, x := range v {
			b = binary.LittleEndian.AppendUint64(b, math.Float64bits(x))
		}
		f.Add(b)
	}
	seed(1, 60, 2, 70, 3, 80, 4, 90, 5, 100)
	seed(1, 0, 1, 0, 1, 0, 1, 0, 1, 0, 1, 0)
	seed(1, -5, 2, 1e99, 3, 1e-99, 4, 7, 5, 8, 6, 9, 7, 1)
	seed(-1e99, 1, 1e99, 2, 0, 3, 0, 4)
	seed(math.NaN(), 1, 2, math.Inf(1))
	seed(1e17, 10, 1e17+16, 20, 1e17+32, 30, 1e17+48, 41, 1e17+64, 50) // half metres are lost at such depths
	f.Fuzz(func(t *testing.T, data []byte) {
		var rs []reading
		for i := 0; i+16 <= len(data) && len(rs) < 40; i += 16 {
			depth := math.Float64frombits(binary.LittleEndian.Uint64(data[i:]))
			value := math.Float64frombits(binary.LittleEndian.Uint64(data[i+8:]))
			rs = append(rs, reading{Observation: Observation{Borehole: []string{"A", "B"}[len(rs)%2], Depth: depth, Value: value}})
		}
		for i := range quantities {
			for _, o := range []Options{{}, {Estimate: Fractile, EffectiveCount: true, AverageOver: 3}} {
				p, err := o.parameter(&quantities[i], EditionOf(""), []string{"A", "B"}, rs)
				if err != nil {
					continue
				}
				notFinite(t, p)
				if p.Low.Known && p.High.Known && p.Low.Value > p.High.Value {
					t.Errorf("%s: low %g is above high %g", p.Parameter, p.Low.Value, p.High.Value)
				}
			}
		}
	})
}
