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
