package axis

// DrawingScales are the n of 1:n that scale rules carry, for depths in metres on
// paper in mm; beyond the last they go on by tens.
var DrawingScales = []float64{10, 20, 25, 50, 75, 100, 125, 150, 200, 250, 300, 400, 500, 750}

// DrawingScale returns the largest drawing, as the n of 1:n, in which a span of
// metres fits into a length of paper in mm.
func DrawingScale(metres, mm float64) float64 {
	if !isFinite(metres) || metres <= 0 || !isFinite(mm) || mm <= 0 {
		return 100
	}
	for factor := 1.0; factor < 1e9; factor *= 10 {
		for _, n := range DrawingScales {
			// The small scales come once only.
			if factor > 1 && n < 100 {
				continue
			}
			if metres*1000/(n*factor) <= mm*(1+1e-9) {
				return n * factor
			}
		}
	}
	return 1e12
}
