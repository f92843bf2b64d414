package oedometer_test

import (
	"fmt"

	"pastload/profile/oedometer"
)

// Every problem of a record is reported at once, each with its stage.
func ExamplePrepare() {
	_, err := oedometer.Prepare(oedometer.Record{
		InitialVoidRatio: oedometer.Known(1.2),
		InitialHeight:    oedometer.Known(20),
		Stages: []oedometer.Stage{
			{EffectiveStress: 25, Height: oedometer.Known(19.8)},
			{EffectiveStress: 50, Height: oedometer.Known(0)},
			{EffectiveStress: -100, VoidRatio: oedometer.Known(1.1)},
		},
	})
	fmt.Println(err)
	// Output:
	// stage 2: height: 0; want a height in mm above zero
	// stage 3: effective stress: -100; want kPa, zero or 0.01 to 1,000,000
}

// A textbook curve: solution sheet of Kathmandu University, 2020, which reads
// 115 kPa from a graph.
func ExampleInterpret() {
	record := oedometer.Record{Kind: oedometer.Incremental24h}
	stress := []float64{23.94, 47.88, 95.76, 191.52, 383.04, 766.08}
	voidRatio := []float64{1.112, 1.105, 1.080, 0.985, 0.850, 0.731}
	for i := range stress {
		record.Stages = append(record.Stages, oedometer.Stage{
			EffectiveStress: stress[i], VoidRatio: oedometer.Known(voidRatio[i]), Line: i + 2,
		})
	}
	curve, err := oedometer.Prepare(record)
	if err != nil {
		fmt.Println(err)
		return
	}
	result, err := oedometer.Interpret(curve, oedometer.Situation{})
	if err != nil {
		fmt.Println(err)
		return
	}
	y := result.Preconsolidation
	fmt.Printf("yield stress %.0f kPa, %.0f to %.0f\n", y.Best, y.Low, y.High)
	fmt.Printf("Cc %.2f, grade %s\n", result.CompressionIndex.Value, result.Grade)
	// Output:
	// yield stress 115 kPa, 95 to 140
	// Cc 0.45, grade B
}
