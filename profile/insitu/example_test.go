package insitu_test

import (
	"errors"
	"fmt"

	"pastload/profile/insitu"
)

// sandOverClay is an invented profile in round numbers.
func sandOverClay() insitu.Column {
	return insitu.Column{
		Layers: []insitu.Layer{
			{Top: 0, Base: 4, UnitWeight: 17, SaturatedUnitWeight: 20},
			{Top: 4, Base: 10, UnitWeight: 16, SaturatedUnitWeight: 16},
		},
		HasWater: true, WaterTable: 2, WaterUnitWeight: 10,
	}
}

func ExampleNew() {
	s, err := insitu.New(sandOverClay())
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, depth := range s.Breaks() {
		at, _ := s.At(depth)
		fmt.Printf("%4.1f m: σv0 %5.1f, u0 %4.1f, σ′v0 %5.1f kPa\n", depth, at.Total, at.Pore, at.Effective)
	}
	// Output:
	//  0.0 m: σv0   0.0, u0  0.0, σ′v0   0.0 kPa
	//  2.0 m: σv0  34.0, u0  0.0, σ′v0  34.0 kPa
	//  4.0 m: σv0  74.0, u0 20.0, σ′v0  54.0 kPa
	// 10.0 m: σv0 170.0, u0 80.0, σ′v0  90.0 kPa
}

// A piezometer below the clay reads a head 3 m above the water table.
func ExampleNew_artesian() {
	c := sandOverClay()
	c.Measured = []insitu.PorePressure{{Depth: 4, Pressure: 20}, {Depth: 10, Pressure: 110}}
	s, err := insitu.New(c)
	if err != nil {
		fmt.Println(err)
		return
	}
	at, _ := s.At(7)
	fmt.Printf("u0 %.0f, σ′v0 %.0f kPa, hydrostatic: %v\n", at.Pore, at.Effective, s.Hydrostatic())
	// Output: u0 65, σ′v0 57 kPa, hydrostatic: false
}

func ExampleNew_problems() {
	c := sandOverClay()
	c.Layers[0].UnitWeight = -17
	c.Layers[1].Top = 4.5
	_, err := insitu.New(c)
	fmt.Println(err)
	fmt.Println(errors.Is(err, insitu.ErrGap))
	// Output:
	// layer 1: unit weight -17 kN/m³: unit weight not above zero
	// layer 2: 4.5 m lies below the base of layer 1 at 4 m: gap between layers; want layers that meet
	// true
}

func ExampleStress_Buoyant() {
	s, err := insitu.New(sandOverClay())
	if err != nil {
		fmt.Println(err)
		return
	}
	at, _ := s.At(10)
	buoyant, _ := s.Buoyant(10)
	fmt.Printf("σ − u: %.1f kPa; buoyant weights: %.1f kPa\n", at.Effective, buoyant)
	// Output: σ − u: 90.0 kPa; buoyant weights: 90.0 kPa
}

func ExampleStress_Uncertainty() {
	s, err := insitu.New(sandOverClay())
	if err != nil {
		fmt.Println(err)
		return
	}
	// Unit weights to 3 %, water table to 0.5 m.
	sd, _ := s.Uncertainty(10, 0.03, 0.5)
	at, _ := s.At(10)
	fmt.Printf("σ′v0 %.0f ± %.1f kPa\n", at.Effective, sd)
	// Output: σ′v0 90 ± 6.2 kPa
}

func ExamplePublished() {
	c := insitu.Published()[1]
	got, err := c.Obtained()
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("%s (%s, %s): σ′v0 %.2f, obtained %.2f %s\n",
		c.Name, c.Source, c.Mark, c.Want.Effective.Value, got.Effective, c.Unit)
	// Output: One soil, water at ground level, z = 4 m (Canadian college course ENF1170, solution sheet, problem 8-1, read): σ′v0 38.76, obtained 38.76 kPa
}
