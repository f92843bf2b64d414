package history

import (
	"math"
	"sort"
)

// zones cuts a layer into stretches of one zone of OCR, by its median. A
// boundary lies where the median crosses a limit; its range is where the 5–95 %
// band holds the limit.
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
	var out []ZoneInterval
	top := Band{points[at[0]].Depth, points[at[0]].Depth, points[at[0]].Depth}
	from := 0
	for k := 1; k <= len(at); k++ {
		last := points[at[k-1]]
		if k < len(at) && points[at[k]].Zone == last.Zone {
			continue
		}
		base := Band{last.Depth, last.Depth, last.Depth}
		if k < len(at) {
			base = l.boundary(points, at, k)
		}
		out = append(out, l.interval(points, at[from:k], top, base))
		top, from = base, k
	}
	return out
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
func (l *layer) interval(points []Point, at []int, top, base Band) ZoneInterval {
	z := ZoneInterval{Layer: l.index, Zone: points[at[0]].Zone, Top: top, Base: base}
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
