package sheet

import (
	"math"

	"pastload/profile"
	"pastload/profile/oedometer"
)

// curveOf interprets a record as the profile does. Which stresses and void ratios
// they hold is invented.
func curveOf(name string, record oedometer.Record, effective float64) CurveInput {
	sp := profile.Specimen{Name: name, Borehole: "BH2", Depth: profile.Known(6.5), TestKind: record.Kind.String()}
	situation := oedometer.Situation{}
	if effective > 0 {
		sp.Effective = profile.Known(effective)
		situation.EffectiveStress = oedometer.Known(effective)
	}
	var err error
	if sp.Prepared, err = oedometer.Prepare(record); err != nil {
		panic(err)
	}
	if sp.Interpretation, err = oedometer.Interpret(sp.Prepared, situation); err != nil {
		sp.Notes = append(sp.Notes, err.Error())
	} else {
		sp.Interpreted = true
	}
	return CurveInput{Specimen: sp, Settings: settings(), Page: A4, Figure: "4.1", Sheet: 1, Of: 1, Sources: "oedometer.csv"}
}

// bilinear is a curve that bends about a yield stress, with recompression index
// cr, compression index cc and the void ratio e0 at 1 kPa.
func bilinear(e0, cr, cc, yield, stress float64) float64 {
	x := math.Log10(stress)
	bend := math.Log10(1+math.Pow(stress/yield, 6)) / 6 // smooth over a factor of about 1.5
	return e0 - cr*x - (cc-cr)*bend
}

func stages(kind string, e func(float64) float64, stresses ...float64) []oedometer.Stage {
	var out []oedometer.Stage
	for _, s := range stresses {
		out = append(out, oedometer.Stage{Kind: kind, EffectiveStress: s, VoidRatio: oedometer.Known(math.Round(1e4*e(s)) / 1e4)})
	}
	return out
}

// looped is an incremental test with an unload–reload loop and a final unloading.
func looped() CurveInput {
	load := func(s float64) float64 { return bilinear(1.62, 0.035, 0.62, 78, s) }
	down := func(s float64) float64 { return load(200) + 0.06*math.Log10(200/s) }
	up := func(s float64) float64 { return load(200) - 0.004 + 0.055*math.Log10(200/s) }
	end := func(s float64) float64 { return load(1600) + 0.07*math.Log10(1600/s) }
	r := oedometer.Record{Kind: oedometer.Incremental24h, InitialVoidRatio: oedometer.Known(1.61)}
	r.Stages = append(r.Stages, stages("load", load, 6, 12.5, 25, 50, 75, 100, 150, 200)...)
	r.Stages = append(r.Stages, stages("unload", down, 100, 50, 25)...)
	r.Stages = append(r.Stages, stages("reload", up, 50, 100, 200)...)
	r.Stages = append(r.Stages, stages("load", load, 400, 800, 1600)...)
	r.Stages = append(r.Stages, stages("unload", end, 400, 100, 25)...)
	return curveOf("S5", r, 52)
}

// stopped is a test that ended before its curve was straight.
func stopped() CurveInput {
	load := func(s float64) float64 { return bilinear(0.74, 0.02, 0.2, 520, s) }
	r := oedometer.Record{Kind: oedometer.Incremental24h, InitialVoidRatio: oedometer.Known(0.72)}
	r.Stages = stages("load", load, 12.5, 25, 50, 100, 200, 400, 600)
	return curveOf("S11", r, 110)
}

// dense is a constant-rate test of many points, drawn on the larger page.
func dense() CurveInput {
	load := func(s float64) float64 { return bilinear(1.9, 0.04, 0.95, 110, s) }
	r := oedometer.Record{Kind: oedometer.ConstantRate, InitialVoidRatio: oedometer.Known(1.88)}
	var stresses []float64
	for i := range 1200 {
		stresses = append(stresses, 5*math.Pow(260, float64(i)/1199))
	}
	r.Stages = stages("load", load, stresses...)
	in := curveOf("CRS-3", r, 80)
	in.Page = A3
	return in
}

// few has too few points to be read.
func few() CurveInput {
	load := func(s float64) float64 { return bilinear(1.1, 0.03, 0.4, 100, s) }
	r := oedometer.Record{InitialVoidRatio: oedometer.Known(1.1)}
	r.Stages = stages("load", load, 25, 50, 100)
	return curveOf("S12", r, 0)
}

// byHand replaces the reading of the ordinary test by one that does not change
// with the constructions: rounded from what they gave when this was written.
func byHand() CurveInput {
	in := looped()
	line := func(name string, plane oedometer.Plane, x1, y1, x2, y2 float64) oedometer.DrawnLine {
		return oedometer.DrawnLine{Name: name, Plane: plane, X1: x1, Y1: y1, X2: x2, Y2: y2}
	}
	const semi = oedometer.SemiLogPlane
	in.Specimen.Interpretation = oedometer.Interpretation{
		Methods: []oedometer.Method{
			{ID: "two-line", Name: "two straight lines, e–log σ′", Known: true, Used: true, Stress: 78, Low: 72, High: 85, Points: []int{0, 1, 2, 3, 6, 7, 14},
				Lines: []oedometer.DrawnLine{line("recompression line", semi, 0.78, 1.594, 1.89, 1.551), line("virgin line", semi, 1.89, 1.551, 3.2, 0.742)}},
			{ID: "casagrande", Name: "Casagrande (1936), fixed box 0.7", Known: true, Used: true, Stress: 85, Low: 70, High: 88, Points: []int{5, 6, 7},
				Lines: []oedometer.DrawnLine{line("horizontal", semi, 1.87, 1.535, 3.05, 1.535), line("tangent", semi, 1.26, 1.69, 2.46, 1.38), line("bisector", semi, 1.87, 1.535, 2.46, 1.46)}},
			{ID: "work", Name: "work per unit volume (Becker et al. 1987)", Known: true, Stress: 85, Low: 68, High: 87, Note: "weak: made up for this drawing",
				Lines: []oedometer.DrawnLine{line("recompression line", oedometer.WorkPlane, 6, 0.02, 85, 0.8), line("virgin line", oedometer.WorkPlane, 85, 0.8, 1600, 159)}},
			{ID: "sallfors", Name: "Sällfors (1975), constant rate", Note: "for constant-rate tests"},
		},
		Preconsolidation: oedometer.Yield{Low: 72, Best: 79, High: 87}, Apparent: oedometer.Yield{Low: 72, Best: 79, High: 87},
		VirginSteepest:   oedometer.VirginLine{Rule: "steepest: made up", Slope: 0.615, Intercept: 2.715, Known: true},
		VirginLast:       oedometer.VirginLine{Rule: "last 3 points", Slope: 0.62, Intercept: 2.728, Known: true},
		CompressionIndex: oedometer.Known(0.615), CompressionRatio: oedometer.Known(0.236), RecompressionRatio: oedometer.Known(0.024),
		RecompressionIndex: oedometer.Index{Value: 0.062, Known: true, How: "mean slope of the loop from 200 to 25 kPa"},
		SwellingIndex:      oedometer.Index{Value: 0.07, Known: true},
		InitialVoidRatio:   1.61, InitialVoidRatioHow: "given",
		Field:   oedometer.Field{Known: true, Stress: []float64{52, 79, 2400}, VoidRatio: []float64{1.61, 1.599, 0.676}, CompressionIndex: 0.623, Ratio: 1.01},
		Quality: []oedometer.Quality{{Scheme: "Δe/e0 (Lunne et al. 1997)", Applies: true, Class: "1 (very good to excellent)", Reason: "e falls from 1.610 to 1.555 at σ′v0"}},
		Loops:   []oedometer.LoopCheck{{PastMaximum: 200, Recovered: oedometer.Yield{Best: 198}, Ratio: 0.99}},
		Grade:   "A", Reasons: []string{"virgin line of 5 points to 20 σ′p", "good sample"},
		BracketLow: 75, BracketHigh: 100, MaxStress: 1600, MaxStressRatio: 20.2, Kind: oedometer.Incremental24h,
	}
	work, stress, e := 0.0, 0.0, 1.61
	for _, p := range in.Specimen.Prepared.Points {
		if p.Branch == oedometer.FirstLoading || p.Branch == oedometer.FurtherLoading {
			work += 0.5 * (stress + p.EffectiveStress) * (e - p.VoidRatio) / 2.61
			stress, e = p.EffectiveStress, p.VoidRatio
			in.Specimen.Interpretation.Loading = append(in.Specimen.Interpretation.Loading, oedometer.LoadingPoint{EffectiveStress: stress, VoidRatio: e, Work: work})
		}
	}
	return in
}
