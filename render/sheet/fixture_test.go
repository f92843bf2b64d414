package sheet

import (
	"fmt"
	"math"

	"pastload/profile"
)

// The boreholes of these tests are invented.

// ground is a simple ground to make profiles of: hydrostatic below the water
// table, with a σ′p line and a band about it.
type ground struct {
	name     string
	strata   []profile.Stratum
	water    float64
	level    float64
	ratio    func(depth float64) float64 // OCR
	spread   float64                     // high/best of the band
	artesian float64                     // kPa added to the pore pressure per m
}

func stratum(name, soil string, top, base, weight float64) profile.Stratum {
	return profile.Stratum{Name: name, Soil: soil, Top: top, Base: base, UnitWeight: profile.Known(weight)}
}

func (g ground) at(depth float64) (total, pore, effective float64, s profile.Stratum) {
	for _, s = range g.strata {
		total += s.UnitWeight.Value * math.Max(0, math.Min(depth, s.Base)-s.Top)
		if depth <= s.Base {
			break
		}
	}
	pore = math.Max(0, depth-g.water)*9.81 + g.artesian*depth
	if g.water < 0 {
		total += -g.water * 9.81
	}
	return total, pore, total - pore, s
}

func (g ground) borehole() profile.Borehole {
	return profile.Borehole{
		Name: g.name, GroundLevel: profile.Known(g.level), WaterTableDepth: profile.Known(g.water),
		Strata: g.strata, Drilled: "2026-03-02",
		Easting: profile.Known(512345.2), Northing: profile.Known(187654.8),
	}
}

func (g ground) profile() profile.BoreholeProfile {
	const inside = 1e-6 // keeps a boundary on its own side
	p := profile.BoreholeProfile{Borehole: g.name, GroundLevel: profile.Known(g.level), WaterTable: profile.Known(g.water)}
	for _, s := range g.strata {
		n := int(math.Ceil((s.Base - s.Top) / 0.5))
		for i := 0; i <= n; i++ {
			depth := s.Top + (s.Base-s.Top)*float64(i)/float64(n)
			total, pore, effective, _ := g.at(depth)
			q := profile.Point{
				Depth: depth, Stratum: s.Name, UnitWeight: s.UnitWeight,
				Total: profile.Known(total), Pore: profile.Known(pore), Effective: profile.Known(effective),
			}
			if effective > 0 {
				ocr := g.ratio(math.Min(math.Max(depth, s.Top+inside), s.Base-inside))
				q.OCR = profile.Around(ocr/g.spread, ocr, ocr*g.spread)
				q.Preconsolidation = q.OCR.Scale(effective)
			}
			p.Points = append(p.Points, q)
		}
	}
	return p
}

// test returns a test at a depth whose σ′p is a factor times what the ground has.
func (g ground) test(specimen string, depth, factor float64, grade string) profile.Test {
	_, _, effective, s := g.at(depth)
	v := effective * g.ratio(depth) * factor
	z := math.Log(factor) / 0.13
	t := profile.Test{
		Specimen: specimen, Depth: depth, Stratum: s.Name, Effective: profile.Known(effective),
		Preconsolidation: profile.Around(0.9*v, v, 1.12*v), OCR: profile.Known(v / effective), POP: profile.Known(v - effective),
		Grade: grade, Used: true, Expected: profile.Around(0.85*v/factor, v/factor, 1.15*v/factor), Z: profile.Known(z), Verdict: profile.Agrees,
	}
	if math.Abs(z) > 3 {
		t.Verdict = profile.Conflicts
	}
	return t
}

func result(depth, w, plastic, liquid, weight, cc float64) profile.Result {
	return profile.Result{
		Depth: profile.Known(depth), WaterContent: profile.Known(w), PlasticLimit: profile.Known(plastic), LiquidLimit: profile.Known(liquid),
		UnitWeight: profile.Known(weight), CompressionIndex: profile.Known(cc),
	}
}

func settings() profile.Settings {
	s := profile.DefaultSettings()
	s.Title = profile.TitleBlock{
		Project: "Flood bank, Saltern Reach", Location: "North shore, chainage 1+200 to 2+400", Client: "Harbour Conservancy", Number: "24-117",
		Revision: "P01", Status: "For review", Date: "2026-05-04", PreparedBy: "A. Marsh", Organisation: "Reach Ground Engineering", Datum: "OD",
	}
	return s
}

// estuary is the ordinary case: crust, soft clay, peat, silt, till; twelve tests,
// one in conflict, one left out, one bound.
func estuary() DepthInput {
	g := ground{
		name: "BH2", water: 1.2, level: 3.42, spread: 1.25,
		strata: []profile.Stratum{
			stratum("Made ground", "made ground: gravelly clay", 0, 0.6, 18.5),
			stratum("Dried crust", "silty clay", 0.6, 2.4, 17.8),
			stratum("Soft estuarine clay", "silty clay", 2.4, 9.1, 15.9),
			stratum("Peat", "peat", 9.1, 10.2, 11.5),
			stratum("Lower clayey silt with shell fragments", "clayey silt", 10.2, 14.6, 17.1),
			stratum("Stiff till", "till", 14.6, 19.5, 21.2),
		},
		ratio: func(z float64) float64 {
			switch {
			case z > 14.6:
				return 5.5 - 0.2*(z-14.6)
			case z > 9.1:
				return 1.35
			}
			return 1.1 + 6*math.Exp(-z/1.6)
		},
	}
	in := DepthInput{Borehole: g.borehole(), Profile: g.profile(), Settings: settings(), Page: A4, Figure: "3.2", Sheet: 2, Of: 5, Sources: "boreholes.csv, strata.csv, results.csv, oedometer.csv"}
	for _, t := range []struct {
		depth, factor float64
		grade         string
	}{
		{1.5, 1.05, "B"}, {2.1, 0.97, "A"}, {3.5, 1.02, "A"}, {4.6, 0.95, "B"}, {5.5, 1.04, "C"}, {6.5, 0.55, "C"},
		{7.4, 1.01, "A"}, {8.6, 0.93, "not graded"}, {11.2, 1.06, "B"}, {12.8, 0.62, "B"}, {15.5, 1, "B"}, {17.6, 0.94, "A"},
	} {
		in.Profile.Tests = append(in.Profile.Tests, g.test(fmt.Sprintf("S%d", len(in.Profile.Tests)+1), t.depth, t.factor, t.grade))
	}
	in.Profile.Tests[5].Used = false
	in.Profile.Tests[7].Verdict = profile.Doubtful
	last := &in.Profile.Tests[10]
	last.Bound, last.Grade, last.Preconsolidation = profile.AtLeast, "bound only", profile.Single(500)
	for _, r := range [][6]float64{
		{1, 28, 24, 52, 18.1, 0.25}, {2, 34, 25, 55, 17.6, 0.31}, {3.5, 58, 27, 64, 16.1, 0.62}, {4.6, 63, 28, 66, 15.7, 0.71}, {5.5, 60, 27, 62, 15.9, 0.66},
		{6.5, 57, 26, 60, 16, 0.6}, {7.4, 55, 26, 61, 16, 0.61}, {8.6, 52, 26, 58, 16.2, 0.55}, {11.2, 41, 24, 44, 17.2, 0.38}, {12.8, 38, 23, 41, 17, 0.33}, {15.5, 17, 14, 31, 21.1, 0.12}, {17.6, 16, 14, 30, 21.4, 0.11},
	} {
		in.Borehole.Results = append(in.Borehole.Results, result(r[0], r[1], r[2], r[3], r[4], r[5]))
		in.Profile.Results = append(in.Profile.Results, profile.DerivedResult{
			Depth: r[0], MeasuredCc: profile.Known(r[5]), CorrelatedCc: profile.Around(0.009*(r[3]-10)*0.7, 0.009*(r[3]-10), 0.009*(r[3]-10)*1.3),
		})
	}
	in.Borehole.Results[1].PlasticLimit = profile.Number{}
	in.Borehole.Results = append(in.Borehole.Results, profile.Result{Depth: profile.Known(9.6), WaterContent: profile.Known(180)})
	in.Borehole.Water = []profile.PorePressure{{Depth: profile.Known(6), Pressure: profile.Known(47)}, {Depth: profile.Known(13), Pressure: profile.Known(121)}}
	in.Profile.Strata = []profile.StratumProfile{{Stratum: "Soft estuarine clay", Top: 2.4, Base: 9.1, Sentence: "dried crust over a lightly aged clay (74 %); about 0.9 m (0.3 to 1.6 m) of former drawdown would explain it."}}
	in.Profile.Assumptions = []profile.Assumption{{Top: 0, Base: 0.6, Message: "unit weight taken as 18.5 kN/m³, from the densities measured in the stratum"}}
	in.Profile.Zones = []profile.ZoneInterval{
		{Top: 0, Base: 1.25, Zone: profile.HeavilyOverconsolidated, Probability: profile.Known(0.86), OCR: profile.Around(3.1, 4.9, 7)},
		{Top: 1.25, Base: 6.6, Zone: profile.LightlyOverconsolidated, Probability: profile.Known(0.9), OCR: profile.Around(1.1, 1.6, 3.8)},
		{Top: 6.6, Base: 9.1, Zone: profile.NormallyConsolidated, OrZone: profile.LightlyOverconsolidated, Probability: profile.Known(0.55), OCR: profile.Around(1.0, 1.15, 1.4)},
		{Top: 9.1, Base: 14.6, Zone: profile.LightlyOverconsolidated, Probability: profile.Known(0.78), OCR: profile.Around(1.1, 1.35, 1.7)},
		{Top: 14.6, Base: 19.5, Zone: profile.HeavilyOverconsolidated, Probability: profile.Known(0.996), OCR: profile.Around(3.9, 5, 6.8)},
	}
	return in
}

// flagged adds review flags and an adopted line to the ordinary case, on A3.
func flagged() DepthInput {
	in := estuary()
	in.Page = A3
	in.Flags = []Flag{{6.5, "F1"}, {12.8, "F2"}, {12.9, "F3"}, {2.1, "F4"}}
	in.Design = []DesignLine{{Label: "adopted", Depths: []float64{2.4, 9.1}, Stresses: []float64{50, 75}}, {Label: "adopted", Depths: []float64{10.2, 14.6}, Stresses: []float64{85, 120}}}
	return in
}

// crowded has many thin strata with long names and many tests.
func crowded() DepthInput {
	g := ground{name: "BH-104A (replacement for BH-104)", water: 0.4, level: -1.15, spread: 1.4, ratio: func(z float64) float64 { return 0.6 + 25*math.Exp(-z/1.1) }}
	depth := 0.0
	for i, t := range []float64{0.3, 0.15, 0.2, 0.1, 0.25, 2, 0.12, 0.12, 3.1, 0.1, 0.1, 0.1, 4.4, 0.5, 2.2, 0.15, 3} {
		name := fmt.Sprintf("%d Very soft to soft dark grey organic silty clay with laminae", i+1)
		soil := "silty clay"
		if i%3 == 1 {
			name, soil = fmt.Sprintf("%d Fine sand", i+1), "sand"
		}
		g.strata = append(g.strata, stratum(name, soil, depth, depth+t, 16))
		depth += t
	}
	in := DepthInput{Borehole: g.borehole(), Profile: g.profile(), Settings: settings(), Page: A4, Figure: "4", Sheet: 1, Of: 1}
	in.Borehole.Surcharge = profile.Known(12.5)
	names := []string{"A", "B", "C", "not graded"}
	for i := range 36 {
		z := 0.3 + 0.44*float64(i)
		f := 1 + 0.25*math.Sin(float64(7*i))
		if i%9 == 4 {
			f = 1.9
		}
		t := g.test(fmt.Sprintf("P%d-%d", i/4, i), z, f, names[i%4])
		t.Used = i%7 != 3
		in.Profile.Tests = append(in.Profile.Tests, t)
		in.Borehole.Results = append(in.Borehole.Results, result(z, 50+10*math.Sin(z), 25, 62, 16+0.5*math.Cos(3*z), 0.6))
		in.Profile.Results = append(in.Profile.Results, profile.DerivedResult{Depth: z, MeasuredCc: profile.Known(0.6 + 0.1*math.Cos(z)), CorrelatedCc: profile.Around(0.4, 0.55, 0.8)})
	}
	for i, z := range []profile.Zone{profile.HeavilyOverconsolidated, profile.LightlyOverconsolidated, profile.NormallyConsolidated, profile.LightlyOverconsolidated, profile.NormallyConsolidated, profile.Underconsolidated} {
		tops := []float64{0, 2.1, 2.9, 3.2, 3.5, 5.2, 16.89}
		in.Profile.Zones = append(in.Profile.Zones, profile.ZoneInterval{Top: tops[i], Base: tops[i+1], Zone: z, Probability: profile.Known(0.4 + 0.1*float64(i)), OCR: profile.Around(1, 2, 3)})
	}
	return in
}

// shallow is a 2 m hole without a level, a water table or any test.
func shallow() DepthInput {
	g := ground{name: "TP1", water: 99, spread: 1, strata: []profile.Stratum{stratum("", "sandy gravel", 0, 2, 19)}, ratio: func(float64) float64 { return 1 }}
	in := DepthInput{Borehole: g.borehole(), Profile: g.profile(), Settings: profile.DefaultSettings(), Page: A4}
	in.Borehole.GroundLevel, in.Borehole.WaterTableDepth = profile.Number{}, profile.Number{}
	in.Profile.GroundLevel, in.Profile.WaterTable = profile.Number{}, profile.Number{}
	in.Borehole.Drilled = ""
	for i := range in.Profile.Points {
		in.Profile.Points[i].OCR, in.Profile.Points[i].Preconsolidation = profile.Range{}, profile.Range{}
	}
	return in
}

// deep is 80 m with ratios from 0.3 to 60 and water above ground.
func deep() DepthInput {
	g := ground{
		name: "M-7", water: -2.5, level: -4.1, spread: 1.5,
		strata: []profile.Stratum{
			stratum("Seabed mud", "clay", 0, 8, 14.5), stratum("Marine clay", "clay", 8, 42, 16.5),
			stratum("Sand and gravel", "sand and gravel", 42, 47, 20), stratum("Mudstone, weathered", "mudstone", 47, 80, 22),
		},
		ratio: func(z float64) float64 {
			switch {
			case z < 8:
				return 0.3 + z*0.05
			case z < 42:
				return 1.2
			case z < 47:
				return 3
			}
			return 60 - z*0.5
		},
	}
	in := DepthInput{Borehole: g.borehole(), Profile: g.profile(), Settings: settings(), Page: A3, Figure: "9"}
	for _, z := range []float64{2, 5, 11, 18, 25, 33, 40, 55, 70} {
		in.Profile.Tests = append(in.Profile.Tests, g.test(fmt.Sprintf("U%.0f", z), z, 1, "A"))
	}
	in.Profile.Zones = []profile.ZoneInterval{
		{Top: 0, Base: 8, Zone: profile.Underconsolidated, Probability: profile.Known(0.97), OCR: profile.Around(0.2, 0.5, 0.8)},
		{Top: 8, Base: 42, Zone: profile.LightlyOverconsolidated, OrZone: profile.NormallyConsolidated, Probability: profile.Known(0.51), OCR: profile.Around(0.9, 1.2, 1.6)},
		{Top: 42, Base: 47, Zone: profile.LightlyOverconsolidated, OCR: profile.Around(2, 3, 4)},
		{Top: 47, Base: 80, Zone: profile.HeavilyOverconsolidated, Probability: profile.Known(1), OCR: profile.Around(20, 30, 60)},
	}
	return in
}

// uplifted has pore pressures above the total stress over some metres.
func uplifted() DepthInput {
	g := ground{name: "BH9", water: 0, level: 12, spread: 1.3, artesian: 8.5, strata: []profile.Stratum{stratum("Soft clay", "clay", 0, 6, 16), stratum("Firm clay", "clay", 6, 12, 20)}, ratio: func(float64) float64 { return 2 }}
	in := DepthInput{Borehole: g.borehole(), Profile: g.profile(), Settings: settings(), Page: A4}
	in.Profile.Tests = []profile.Test{g.test("T1", 11.5, 1, "B")}
	in.Profile.Tests[0].Effective = profile.Known(-5)
	return in
}

// layered has hundreds of strata, far more than can be named.
func layered() DepthInput {
	g := ground{name: "V1", water: 1, level: 7, spread: 1.2, ratio: func(float64) float64 { return 1.5 }}
	for i := range 300 {
		g.strata = append(g.strata, stratum(fmt.Sprintf("Varve %d", i), "silt", 0.05*float64(i), 0.05*float64(i+1), 18))
	}
	return DepthInput{Borehole: g.borehole(), Profile: g.profile(), Settings: settings(), Page: A4}
}
