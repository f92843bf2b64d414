package history

import "math"

// nextStations is how many depths of a layer are thought of for one more test,
// and how many the band is averaged over.
const nextStations = 20

// enough is the share of the posterior that the choice of the next test rests on.
const enough = 0.98

// nextTest finds the depth at which one more test of grade A would narrow the
// band of ln σ′p most, on average over the borehole. The posterior is taken as
// normal with its own mean and covariance, in which a new observation with
// variance s² at depth i takes C_ij²/(C_ii + s²) from the variance at j.
func nextTest(layers []*layer) NextTest {
	var out NextTest
	all, best := 0.0, 0.0
	for _, l := range layers {
		at := l.thinned()
		if len(at) == 0 {
			continue
		}
		c := l.covariance(at)
		weight := float64(len(l.stations)) / float64(len(at))
		for j := range at {
			all += weight * math.Sqrt(c[j][j])
		}
		noise := LnSDForGrade("A")
		for i, station := range at {
			saved := 0.0
			for j := range at {
				less := c[i][j] * c[i][j] / (c[i][i] + noise*noise)
				saved += weight * (math.Sqrt(c[j][j]) - math.Sqrt(math.Max(0, c[j][j]-less)))
			}
			if saved > best {
				best = saved
				out = NextTest{Depth: l.in.Stations[l.stations[station]].Depth, Layer: l.index, Known: true}
			}
		}
	}
	if out.Known {
		out.Narrowing = best / all
	}
	return out
}

// thinned returns at most nextStations of the layer's stations, by index.
func (l *layer) thinned() []int {
	n := len(l.stations)
	count := min(n, nextStations)
	var at []int
	for i := range count {
		at = append(at, i*n/count)
	}
	return at
}

// covariance returns that of ln σ′p at stations of the layer.
func (l *layer) covariance(at []int) [][]float64 {
	depths := make([]float64, len(at))
	for j, i := range at {
		depths[j] = l.in.Stations[l.stations[i]].Depth
	}
	c := make([][]float64, len(at))
	for i := range c {
		c[i] = make([]float64, len(at))
	}
	mean := make([]float64, len(at))
	least := l.post.leastWeight(enough)
	total := 0.0
	for s := range l.post.settings {
		u := &l.post.settings[s]
		any := false
		for i := range u.nodes {
			any = any || u.nodes[i].weight >= least
		}
		if !any {
			continue
		}
		left := l.post.departure(u, depths)
		gain, _ := l.post.gain(u, depths)
		for i := range u.nodes {
			f := &u.nodes[i]
			if f.weight < least {
				continue
			}
			total += f.weight
			m, rest := l.post.nodeLine(f, gain, at)
			d := len(f.step)
			for a := range at {
				mean[a] += f.weight * m[a]
				for b := range a + 1 {
					v := left[a][b] + m[a]*m[b]
					for x := range d {
						v += rest[a][x] * dot(f.inner[x*d:x*d+d], rest[b])
					}
					c[a][b] += f.weight * v
				}
			}
		}
	}
	for a := range at {
		mean[a] /= total
	}
	for a := range at {
		for b := range a + 1 {
			c[a][b] = c[a][b]/total - mean[a]*mean[b]
			if a == b {
				c[a][a] = math.Max(c[a][a], 1e-10)
			}
			c[b][a] = c[a][b]
		}
	}
	return c
}
