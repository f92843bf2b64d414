package axis_test

import (
	"fmt"

	"pastload/render/axis"
)

func ExampleStep() {
	s := axis.NewLinear(0, 6, 20, 80) // 0 to 6 m between 20 and 80 mm
	for _, t := range (axis.Step{Size: 2, Parts: 2}).Ticks(0, 6) {
		fmt.Printf("%q at %.0f mm\n", t.Label, s.At(t.Value))
	}
	// Output:
	// "0" at 20 mm
	// "" at 30 mm
	// "2" at 40 mm
	// "" at 50 mm
	// "4" at 60 mm
	// "" at 70 mm
	// "6" at 80 mm
}

func ExampleDrawingScale() {
	fmt.Printf("19.5 m in 200 mm: 1:%.0f\n", axis.DrawingScale(19.5, 200))
	// Output: 19.5 m in 200 mm: 1:100
}
