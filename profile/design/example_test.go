package design_test

import (
	"fmt"

	"pastload/profile"
	"pastload/profile/design"
)

// Five strengths, their mean on the safe side, and the strength that only one
// twentieth of the ground falls short of.
func ExampleWay_Of() {
	var s design.Sample
	for i, v := range []float64{60, 70, 80, 90, 100} {
		s = append(s, design.Observation{Borehole: "BH1", Depth: float64(2 * i), Value: v})
	}
	for _, id := range []string{design.WayMeanUnknown, design.WayMeanKnown, design.WayFractileUnknown} {
		w := design.WayByID(id)
		i, err := w.Of(s, design.Assumptions{COV: 0.2})
		if err != nil {
			fmt.Println(err)
			return
		}
		fmt.Printf("%s: %.1f to %.1f kPa (%s)\n", w.Name, i.Low, i.High, w.Mark)
	}
	// Output:
	// 95 % mean, variance from the sample: 64.9 to 95.1 kPa (read in a source)
	// 95 % mean, assumed COV: 68.2 to 91.8 kPa (read in a source)
	// 5 % fractile, variance from the sample: 43.1 to 116.9 kPa (read in a source)
}

func ExampleFitLine() {
	s := design.Sample{
		{Depth: 2, Value: 41}, {Depth: 4, Value: 52}, {Depth: 6, Value: 58}, {Depth: 8, Value: 72}, {Depth: 10, Value: 77},
	}
	l, err := design.FitLine(s, design.Normal)
	if err != nil {
		fmt.Println(err)
		return
	}
	low, err := l.Band(5, design.Mean)
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("%.2f kPa/m, real: %v\n", l.Slope, l.Real())
	fmt.Printf("at 5 m %.1f, cautious mean %.1f to %.1f kPa\n", l.At(5), low.Low, low.High)
	// Output:
	// 4.60 kPa/m, real: true
	// at 5 m 55.4, cautious mean 52.9 to 57.9 kPa
}

func ExampleEffectiveCount() {
	s := design.Sample{{Borehole: "BH1", Depth: 3.0}, {Borehole: "BH1", Depth: 3.2}, {Borehole: "BH2", Depth: 3.0}}
	n, err := design.EffectiveCount(s, 2.5)
	fmt.Printf("%.2f %v\n", n, err)
	// Output: 1.91 <nil>
}

func ExampleValues() {
	known := profile.Known
	site := &profile.Site{Settings: profile.DefaultSettings(), Boreholes: []profile.Borehole{{
		Name: "BH1", Strata: []profile.Stratum{{Name: "Soft clay", Top: 0, Base: 10}},
	}}}
	b := &site.Boreholes[0]
	for i, cc := range []float64{0.52, 0.61, 0.48, 0.57, 0.55} {
		b.Results = append(b.Results, profile.Result{Depth: known(2 + 1.5*float64(i)), CompressionIndex: known(cc)})
	}
	strata, err := design.Values(&profile.Profile{Site: site})
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, p := range strata[0].Parameters {
		fmt.Printf("%s: n %d, mean %.3f, COV %.2f\n", p.Parameter, p.N, p.Mean.Value, p.COV.Value)
		fmt.Printf("%s: %.3f to %.3f; for settlement the %s one\n", p.Method, p.Low.Value, p.High.Value, p.Side)
	}
	// Output:
	// compression index: n 5, mean 0.546, COV 0.09
	// 95 % mean, assumed COV: 0.454 to 0.652; for settlement the high one
}

func ExampleLine() {
	b := profile.BoreholeProfile{Borehole: "BH1", Points: []profile.Point{
		{Depth: 3, Stratum: "Soft clay", Effective: profile.Known(28), Preconsolidation: profile.Around(44, 50, 57)},
		{Depth: 4, Stratum: "Soft clay", Effective: profile.Known(34), Preconsolidation: profile.Around(47, 54, 62)},
	}}
	for _, l := range design.Line(b, nil) {
		fmt.Printf("%.1f m: now %.0f, past %.0f (%.0f to %.0f) kPa\n", l.Depth, l.Effective.Value,
			l.PreconsolidationBest.Value, l.PreconsolidationLow.Value, l.PreconsolidationHigh.Value)
	}
	// Output:
	// 3.0 m: now 28, past 50 (44 to 57) kPa
	// 4.0 m: now 34, past 54 (47 to 62) kPa
}
