package sheet_test

import (
	"bytes"
	"fmt"
	"regexp"

	"pastload/profile"
	"pastload/render/sheet"
)

// One stratum, one test: the sheet of a borehole that has little.
func ExampleDepth() {
	in := sheet.DepthInput{
		Borehole: profile.Borehole{
			Name:   "BH1",
			Strata: []profile.Stratum{{Name: "Soft clay", Soil: "clay", Top: 0, Base: 9.6}},
		},
		Settings: profile.DefaultSettings(),
		Page:     sheet.A4,
	}
	in.Profile.Tests = []profile.Test{{
		Specimen: "S1", Depth: 4, Effective: profile.Known(30),
		Preconsolidation: profile.Around(36, 42, 50), Grade: "B", Used: true,
	}}
	var out bytes.Buffer
	if err := sheet.Depth(&out, in); err != nil {
		fmt.Println(err)
		return
	}
	fmt.Println(regexp.MustCompile(`depth scale [^<]*`).FindString(out.String()))
	fmt.Println(regexp.MustCompile(`<title[^\n]*`).FindString(out.String()))
	// Output:
	// depth scale 1:50 at A4
	// <title id="depth-BH1-title">Stress history with depth, borehole BH1</title>
}
