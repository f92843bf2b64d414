package intake_test

import (
	"fmt"
	"testing/fstest"

	"pastload/profile/intake"
)

// Tables as engineers have them: synonyms, other units, a bound.
func ExampleReadFS() {
	tables := fstest.MapFS{
		"boreholes.csv": {Data: []byte("borehole,GWT depth (ft)\nBH1,5\n")},
		"results.csv":   {Data: []byte("bh,depth [ft],Pc' (psf),Su (psf)\nBH1,10,2000,>800\n")},
	}
	site, err := intake.ReadFS(tables, "site", intake.Options{})
	if err != nil {
		fmt.Println(err)
		return
	}
	b := site.Boreholes[0]
	r := b.Results[0]
	fmt.Printf("water at %.3f m\n", b.WaterTableDepth.Value)
	fmt.Printf("at %.3f m: σ′p %.1f kPa (%s: %q %s), su %s %.1f kPa\n", r.Depth.Value,
		r.Preconsolidation.Value, r.Preconsolidation.Source, r.Preconsolidation.Source.Text, r.Preconsolidation.Source.Unit,
		r.UndrainedStrength.Bound, r.UndrainedStrength.Value)
	for _, n := range site.Files[1].Notes {
		fmt.Println(n)
	}
	// Output:
	// water at 1.524 m
	// at 3.048 m: σ′p 95.8 kPa (results.csv:2:3: "2000" psf), su at least 38.3 kPa
	// depth: ft × 0.3048 = m (international foot)
	// preconsolidation stress: psf × 0.04788025898 = kPa
	// undrained strength: psf × 0.04788025898 = kPa
}

// All problems of all files come in one run.
func ExampleReadFS_problems() {
	tables := fstest.MapFS{
		"strata.csv": {Data: []byte("borehole,top (m),base (m),stratum,unit weight (kN/m3)\n" +
			"BH1,0,3.00,Crust,1.85\nBH1,3.00,4.50,Clay,16\nBH1,4.20,9.00,Clay,16\n")},
		"results.csv": {Data: []byte("borehole,depth,σ'p (kPa)\nBH1,2.5,abc\n")},
	}
	_, err := intake.ReadFS(tables, "site", intake.Options{})
	fmt.Println(err)
	// Output:
	// results.csv:1:2: depth: no unit in the header; want "depth (m)" or another unit of length: m, ft, mm, cm, in
	// results.csv:2:3: preconsolidation stress: "abc" is not a number; want kilopascals, e.g. 125.0
	// strata.csv:2:5: unit weight: "1.85" lies outside 4 to 30 kN/m3; want kilonewtons per cubic metre, or the unit that fits: 1.85 Mg/m3 is 18.14 kN/m3
	// strata.csv:4:2: top: 4.20 lies inside the layer of line 3 (3.00 to 4.50 m); want layers that meet
}

func ExampleTemplate() {
	fmt.Print(intake.Template("strata"))
	// Output:
	// borehole,top (m),base (m),stratum,soil,description,unit weight (kN/m3),saturated unit weight (kN/m3)
}
