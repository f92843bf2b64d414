package history

import "testing"

func at(z float64) Band { return Band{z, z, z} }

// TestThinStretchesGoToTheThickerNeighbour: no stretch under 0.3 m is left beside
// another, none is lost, and what it parted is one again.
func TestThinStretchesGoToTheThickerNeighbour(t *testing.T) {
	cases := []struct {
		name string
		in   []piece
		want []piece
	}{
		{"foot of a crust", []piece{{3, 0, 4, at(0.5), at(2.32)}, {2, 4, 5, at(2.32), at(2.4)}}, []piece{{3, 0, 5, at(0.5), at(2.4)}}},
		{"head of a layer", []piece{{3, 0, 1, at(2), at(2.1)}, {2, 1, 6, at(2.1), at(5)}}, []piece{{2, 0, 6, at(2), at(5)}}},
		{"between two of one zone", []piece{{2, 0, 3, at(0), at(2)}, {1, 3, 4, at(2), at(2.2)}, {2, 4, 9, at(2.2), at(6)}}, []piece{{2, 0, 9, at(0), at(6)}}},
		{"thick ones stay", []piece{{2, 0, 3, at(0), at(2)}, {1, 3, 9, at(2), at(6)}}, []piece{{2, 0, 3, at(0), at(2)}, {1, 3, 9, at(2), at(6)}}},
		{"one is left", []piece{{2, 0, 1, at(0), at(0.1)}}, []piece{{2, 0, 1, at(0), at(0.1)}}},
		{"all thin", []piece{{2, 0, 1, at(0), at(0.1)}, {1, 1, 2, at(0.1), at(0.25)}}, []piece{{1, 0, 2, at(0), at(0.25)}}},
	}
	for _, c := range cases {
		t.Run(c.name, func(t *testing.T) {
			got := joined(append([]piece(nil), c.in...))
			if len(got) != len(c.want) {
				t.Fatalf("%+v, want %+v", got, c.want)
			}
			for i := range got {
				if got[i] != c.want[i] {
					t.Errorf("%d: %+v, want %+v", i, got[i], c.want[i])
				}
			}
		})
	}
}

func TestTwoFigures(t *testing.T) {
	for v, want := range map[float64]string{0: "0", 181.8: "180", 111.7: "110", 15.34: "15", 2.349: "2.3", 0.0456: "0.046", 1.0: "1.0", 99.6: "100", -2.26: "-2.3"} {
		if got := twoFigures(v); got != want {
			t.Errorf("%g is %q, want %q", v, got, want)
		}
	}
}
