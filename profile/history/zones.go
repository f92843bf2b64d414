package history

import (
	"math"
	"sort"
)

// zones cuts a layer into stretches of one zone of OCR, by its median. A
// boundary lies where the median crosses a limit; its range is where the 5–95 %
// band holds the limit. A stretch thinner than thinZone goes to a neighbour.
func (l *layer) zones(points []Point) []ZoneInterval {
	var at []int
	for _, i := range l.stations {
		if points[i].HasOCR {
			at = append(at, i)
		}
	}
	sort.SliceStable(at, func(a, b int) bool { return points[at[a]].Depth < points[at[b]].Depth })
	if len(at) == 0 {
		return nil
	}
	first, final := points[at[0]].Depth, points[at[len(at)-1]].Depth
	pieces := []piece{{zone: points[at[0]].Zone, top: Band{first, first, first}}}
	for k := 1; k < len(at); k++ {
		if zone := points[at[k]].Zone; zone != points[at[k-1]].Zone {
			b := l.boundary(points, at, k)
			last := &pieces[len(pieces)-1]
			last.to, last.base = k, b
			pieces = append(pieces, piece{zone: zone, from: k, top: b})
		}
	}
	last := &pieces[len(pieces)-1]
	last.to, last.base = len(at), Band{final, final, final}
	var out []ZoneInterval
	for _, p := range joined(pieces) {
		out = append(out, l.interval(points, at[p.from:p.to], p))
	}
	return out
}

// A piece is a stretch of one zone: the stations from, up to but not including
// to, between two boundaries.
type piece struct {
	zone      Zone
	from, to  int
	top, base Band
}

// thinZone is the thickness in m below which a stretch of another zone is not
// worth a name of its own (project definition): the boundaries are not known so
// well, and nobody designs for it.
const thinZone = 0.3

// joined adds thin stretches to the thicker of their neighbours, the thinnest
// first. One stretch is left, however thin.
func joined(pieces []piece) []piece {
	thickness := func(i int) float64 { return pieces[i].base.Best - pieces[i].top.Best }
	for len(pieces) > 1 {
		thin := 0
		for i := range pieces {
			if thickness(i) < thickness(thin) {
				thin = i
			}
		}
		if thickness(thin) >= thinZone {
			return pieces
		}
		into := thin - 1
		if thin == 0 || thin+1 < len(pieces) && thickness(thin+1) > thickness(into) {
			into = thin + 1
		}
		a, b := min(thin, into), max(thin, into)
		pieces[a] = piece{zone: pieces[into].zone, from: pieces[a].from, to: pieces[b].to, top: pieces[a].top, base: pieces[b].base}
		pieces = append(pieces[:b], pieces[b+1:]...)
		// What the thin stretch parted may be one zone now.
		for i := 1; i < len(pieces); i++ {
			if pieces[i].zone == pieces[i-1].zone {
				pieces[i-1].to, pieces[i-1].base = pieces[i].to, pieces[i].base
				pieces = append(pieces[:i], pieces[i+1:]...)
				i--
			}
		}
	}
	return pieces
}

// boundary returns the depth of the boundary before station k, with its range.
func (l *layer) boundary(points []Point, at []int, k int) Band {
	a, b := points[at[k-1]], points[at[k]]
	// Where several limits lie between the stations the one nearest the upper
	// zone is quoted.
	limit := l.in.Limits[a.Zone-min(1, a.Zone)]
	if b.Zone > a.Zone {
		limit = l.in.Limits[a.Zone]
	}
	best := crossing(a.Depth, b.Depth, a.OCR.Best, b.OCR.Best, limit)
	out := Band{best, best, best}
	for i := k - 1; i >= 0; i-- {
		z, outside := edge(points[at[i]], points[at[i+1]], limit)
		out.Low = math.Min(out.Low, z)
		if outside {
			break
		}
	}
	for i := k; i < len(at); i++ {
		z, outside := edge(points[at[i]], points[at[i-1]], limit)
		out.High = math.Max(out.High, z)
		if outside {
			break
		}
	}
	return out
}

// edge returns how far towards a station the band holds a limit that it holds
// somewhere before the next one: to the station, or to where a side of the band
// crosses the limit, and then the station is outside.
func edge(p, next Point, limit float64) (depth float64, outside bool) {
	switch {
	case p.OCR.Low >= limit && next.OCR.Low < limit:
		return crossing(p.Depth, next.Depth, p.OCR.Low, next.OCR.Low, limit), true
	case p.OCR.High <= limit && next.OCR.High > limit:
		return crossing(p.Depth, next.Depth, p.OCR.High, next.OCR.High, limit), true
	case p.OCR.Low < limit && limit < p.OCR.High:
		return p.Depth, false
	}
	return next.Depth, true
}

// crossing returns where ln OCR, straight between two depths, meets a limit.
func crossing(z1, z2, r1, r2, limit float64) float64 {
	a, b := math.Log(r1), math.Log(r2)
	if a == b {
		return 0.5 * (z1 + z2)
	}
	t := (math.Log(limit) - a) / (b - a)
	return z1 + math.Max(0, math.Min(1, t))*(z2-z1)
}

// otherZone is the probability from which a second zone is named.
const otherZone = 0.2

// interval describes the stations of one stretch.
func (l *layer) interval(points []Point, at []int, p piece) ZoneInterval {
	z := ZoneInterval{Layer: l.index, Zone: p.zone, Top: p.top, Base: p.base}
	z.OCR = Band{math.Inf(1), 0, 0}
	var mean [4]float64
	for _, i := range at {
		p := &points[i]
		for k, q := range p.ZoneProbability {
			mean[k] += q / float64(len(at))
		}
		z.OCR.Low = math.Min(z.OCR.Low, p.OCR.Low)
		z.OCR.High = math.Max(z.OCR.High, p.OCR.High)
		z.OCR.Best += math.Log(p.OCR.Best) / float64(len(at))
	}
	z.OCR.Best = math.Exp(z.OCR.Best)
	z.Probability = mean[z.Zone]
	z.Other = z.Zone
	best := otherZone
	for k, q := range mean {
		if Zone(k) != z.Zone && q >= best {
			z.Other, best = Zone(k), q
		}
	}
	return z
}
