package cone_test

import (
	"fmt"

	"pastload/profile/cone"
)

// stress is a clay of 17 kN/m³ with the water table at 1 m.
func stress(depth float64) (cone.State, bool) {
	total, pore := 17*depth, 9.81*(depth-1)
	return cone.State{Total: total, Pore: pore, Effective: total - pore}, depth > 0
}

func ExampleEvaluate() {
	var readings []cone.Reading
	for i := range 100 {
		z := 4 + float64(i)*0.01
		readings = append(readings, cone.Reading{Depth: z, ConeResistance: cone.Of(0.30 + 0.02*z),
			SleeveFriction: cone.Of(9), PorePressure: cone.Of(40 + 40*z)})
	}
	s, err := cone.Evaluate(readings, stress, cone.Options{AreaRatio: cone.Of(0.80)})
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, l := range s.Layers {
		fmt.Printf("%.2f m: net resistance %.0f kPa, Ic %.1f", l.Depth, l.Net.Value, l.BehaviourIndex.Value)
		for _, y := range l.Yield {
			fmt.Printf("; σ′p %.0f kPa by %s", y.Value, y.Source)
		}
		fmt.Println()
	}
	// Output:
	// 4.25 m: net resistance 355 kPa, Ic 3.0; σ′p 117 kPa by net cone resistance; σ′p 94 kPa by excess cone pore pressure; σ′p 130 kPa by effective cone resistance
	// 4.75 m: net resistance 360 kPa, Ic 3.0; σ′p 119 kPa by net cone resistance; σ′p 102 kPa by excess cone pore pressure; σ′p 127 kPa by effective cone resistance
}

func ExampleReducer() {
	r := cone.NewReducer(cone.Options{AreaRatio: cone.Of(0.80)})
	for i := 99; i >= 0; i-- { // from the bottom up
		r.Add(cone.Reading{Depth: 4 + float64(i)*0.01, ConeResistance: cone.Of(0.4), PorePressure: cone.Of(200)})
	}
	s, err := r.Result(stress)
	fmt.Println(len(s.Layers), err)
	for _, note := range s.Notes {
		fmt.Println(note)
	}
	// Output:
	// 2 <nil>
	// 99 of 100 readings lie above the one before: sorted by depth
	// no sleeve friction at 100 of 100 depths: sand and silt cannot be told from clay there but by the strata
}

func ExampleCalibrate() {
	pairs := []cone.Pair{
		{Depth: 4.2, Cone: 420, Preconsolidation: 165},
		{Depth: 7.5, Cone: 560, Preconsolidation: 215},
		{Depth: 11.0, Cone: 700, Preconsolidation: 290},
	}
	f, err := cone.Calibrate(pairs, cone.PriorFor(cone.NetResistance))
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("published %.2f, the site's own %.3f, used %.3f (%.2f to %.2f)\n", f.Published, f.Own, f.Best, f.Low, f.High)
	// Output:
	// published 0.33, the site's own 0.397, used 0.387 (0.32 to 0.46)
}
