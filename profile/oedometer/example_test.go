package oedometer_test

import (
	"fmt"

	"pastload/profile/oedometer"
)

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
