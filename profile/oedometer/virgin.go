package oedometer

import "math"

// Rules for the virgin line.
const (
	virginShare     = 0.9   // of the steepest slope: segments this steep count as virgin
	segmentWidth    = 0.25  // log cycles; shorter segments are slopes of noise
	printedStep     = 0.001 // the last digit of a printed void ratio
	sShape          = 0.15  // flattening from which the curve counts as S-shaped
	flatteningNoise = 1.5   // standard deviations of noise that flattening must exceed
	lastCycle       = 0.5   // log cycles of a dense record that its "last points" cover
	lastPoints      = 3
)

// A virgin is the virgin compression line of a loading.
type virgin struct {
	line        straight
	first, last int     // points of the loading that made it
	steepest    float64 // S*, the steepest segment
	flattening  float64 // 1 − slope of the last points over that of the line, 0 to 0.6
	sShaped     bool    // the curve flattens again past its steepest part
	ok          bool
}

// segment ends: for each point the next one at least segmentWidth further, or -1.
func (l *loading) segmentEnd(i int) int {
	for j := i + 1; j < len(l.x); j++ {
		if l.x[j]-l.x[i] >= segmentWidth*0.999 {
			return j
		}
	}
	return -1
}

// virginLine returns the virgin line by rule: the contiguous segments, including
// the steepest, with a slope of at least 0.9 of the steepest, fitted together.
// The share is widened by what reading noise does to a slope, or a straight line
// of noisy points would be cut in pieces.
func (l *loading) virginLine(share float64) virgin {
	v := virgin{}
	best := -1
	slopes := make([]float64, len(l.x))
	ends := make([]int, len(l.x))
	for i := l.first; i < len(l.x); i++ {
		ends[i] = l.segmentEnd(i)
		if ends[i] < 0 {
			slopes[i] = math.Inf(-1)
			continue
		}
		seg, ok := fit(l.x, l.e, i, ends[i])
		if !ok {
			slopes[i] = math.Inf(-1)
			continue
		}
		slopes[i] = -seg.slope
		if best < 0 || slopes[i] > slopes[best] {
			best = i
		}
	}
	if best < 0 || slopes[best] <= 0 {
		return v
	}
	enough := func(i int) bool {
		if ends[i] <= i {
			return false
		}
		noise := printedStep * math.Sqrt(2/float64(ends[i]-i)) / (l.x[ends[i]] - l.x[i])
		return slopes[i] >= share*slopes[best]-math.Min(noise, 0.1*slopes[best])
	}
	v.steepest = slopes[best]
	v.first, v.last = best, ends[best]
	for i := best - 1; i >= l.first && enough(i); i-- {
		v.first = i
	}
	for i := best + 1; i < len(l.x) && enough(i); i++ {
		v.last = ends[i]
	}
	v.line, v.ok = fit(l.x, l.e, v.first, v.last)
	if v.ok = v.ok && v.line.slope < 0; !v.ok {
		return v
	}
	// S-shaped: the end of the curve is clearly flatter than its virgin part.
	// Noise can only make the steepest stand out, so its share is taken off.
	// Last points that reach back before the virgin part say nothing of it.
	if line, first, ok := l.lastLine(); ok && first >= v.first {
		noise := math.Hypot(l.slopeNoise(v.first, v.last), l.slopeNoise(first, len(l.x)-1)) / -v.line.slope
		v.flattening = math.Max(0, math.Min(0.6, 1-line.slope/v.line.slope-flatteningNoise*noise))
	}
	v.sShaped = v.flattening > sShape
	return v
}

// slopeNoise returns the standard deviation of a fitted slope from reading noise.
func (l *loading) slopeNoise(first, last int) float64 {
	var mean, squares float64
	for i := first; i <= last; i++ {
		mean += l.x[i]
	}
	mean /= float64(last - first + 1)
	for i := first; i <= last; i++ {
		squares += (l.x[i] - mean) * (l.x[i] - mean)
	}
	noise := readingNoise
	if l.dense {
		noise /= denseAveraging
	}
	return noise / math.Sqrt(squares)
}

// lastLine returns the line through the last points: three, or the last half
// log cycle of a dense record.
func (l *loading) lastLine() (line straight, first int, ok bool) {
	n := len(l.x)
	first = max(n-lastPoints, l.first)
	for first > l.first && l.x[n-1]-l.x[first-1] <= lastCycle {
		first--
	}
	line, ok = fit(l.x, l.e, first, n-1)
	return line, first, ok && line.slope < 0
}

// steepening returns q, the slope over the last doubling of stress divided by
// that over the doubling before it; ok is false where the record is shorter.
// before is the same ratio one doubling earlier, 0 where the record is shorter.
func (l *loading) steepening() (q, before float64, ok bool) {
	const doubling = 0.30103
	end := l.x[len(l.x)-1]
	var e [4]float64
	known := 0
	for i := range e {
		v, in := interpolate(l.x, l.e, l.roundDown(end-float64(i)*doubling))
		if !in {
			break
		}
		e[i] = v
		known++
	}
	if known < 3 || e[2]-e[1] <= 0 {
		return 0, 0, false
	}
	q = (e[1] - e[0]) / (e[2] - e[1])
	if known == 4 && e[3]-e[2] > 0 {
		before = (e[2] - e[1]) / (e[3] - e[2])
	}
	return q, before, true
}

// roundDown returns the first abscissa where x lies within 1 % of a stress below
// it, so that loads written as 23.9 and 47.9 still are a doubling.
func (l *loading) roundDown(x float64) float64 {
	if first := l.x[0]; x < first && first-x < 0.01 {
		return first
	}
	return x
}
