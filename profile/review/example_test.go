package review_test

import (
	"fmt"

	"pastload/profile"
	"pastload/profile/review"
)

// A water content with two digits exchanged breaks every phase relation, and is
// one finding.
func ExampleReview() {
	k := profile.Known
	site := &profile.Site{
		Settings: profile.DefaultSettings(),
		Boreholes: []profile.Borehole{{
			Name: "BH1", WaterTableDepth: k(1.2),
			Strata: []profile.Stratum{{Name: "Soft clay", Soil: "clay", Top: 0, Base: 8, SaturatedUnitWeight: k(16.3)}},
			Results: []profile.Result{{
				Depth: k(5.6), Specimen: "P5",
				WaterContent: k(75.1), SpecificGravity: k(2.68), VoidRatio: k(1.545), UnitWeight: k(16.2),
			}},
		}},
	}
	p, err := profile.Build(site, profile.Options{})
	if err != nil {
		fmt.Println(err)
		return
	}
	findings, err := review.Review(p)
	if err != nil {
		fmt.Println(err)
	}
	for _, f := range findings.Open() {
		fmt.Println(f.Severity, f.ID)
		fmt.Println(f.Message)
		fmt.Println("cause:", f.Causes[0])
		fmt.Println("next: ", f.Action)
	}
	// Output:
	// error saturation/bh1/5.60/p5/water-content
	// Sr = w·Gs/e0 = 75.1·2.68/(100·1.545) = 130 %, not 94 to 107. w = 57.1 % in place of 75.1 (two digits exchanged) would make all 3 checks agree.
	// cause: two digits exchanged
	// next:  Recompute from the masses and the ring volume; take the final w and e of the test as a check.
}
