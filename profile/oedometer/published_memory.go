package oedometer

// memoryCases are curves that were remembered and not seen in print.
func memoryCases() []Case {
	das := []float64{50, 100, 200, 400, 800, 1600, 3200}
	return []Case{
		{
			ID: "HK-UNDIST-A", Grade: SourceM, Mark: markMemory, Soil: "undisturbed clay",
			Source: "Holtz & Kovacs, earlier edition",
			Record: Record{Stages: append(
				voidRatios("load", []float64{20, 40, 80, 160, 320, 640, 1280}, []float64{0.953, 0.948, 0.938, 0.920, 0.878, 0.789, 0.691}),
				voidRatios("unload", []float64{320, 80, 20, 0}, []float64{0.719, 0.754, 0.791, 0.890})...)},
			Expect: "rounded: constructions between 227 and 352 kPa",
		},
		{
			ID: "DAS-128G", Grade: SourceM, Mark: markMemory, Soil: "textbook example",
			Source: "B. M. Das, Principles of Geotechnical Engineering; it rounds Hs to 1.52 cm",
			Record: Record{
				InitialHeight: Known(25.4), SpecificGravity: Known(2.75), DryMass: Known(128), Area: Known(30.68),
				Stages: heights("load", das, []float64{2.488, 2.465, 2.431, 2.389, 2.324, 2.225, 2.115}, 10),
			},
			Published: voidRatiosAt(das, []float64{0.637, 0.622, 0.599, 0.572, 0.529, 0.464, 0.390}),
			Expect:    "never quite straight: simple constructions between 490 and 890 kPa",
		},
		{
			ID: "DAS-PFE", Grade: SourceM, Mark: markMemory, Soil: "textbook example",
			Source: "B. M. Das, Principles of Foundation Engineering",
			Record: Record{Stages: append(
				voidRatios("load", []float64{25, 50, 100, 200, 400, 800, 1600}, []float64{0.93, 0.92, 0.88, 0.81, 0.69, 0.61, 0.52}),
				voidRatios("unload", []float64{800, 400, 200}, []float64{0.535, 0.555, 0.57})...)},
			Published: []PublishedValue{
				{Quantity: publishedCc, Value: 0.33, Note: "of a smoothed curve; single segments scatter from 0.23 to 0.40"},
				{Quantity: publishedCs, Value: 0.033, Note: "the unloading points of the table give twice that"},
			},
			Expect: "irregular points: wide range",
		},
		{
			ID: "CRAIG-P73", Grade: SourceM, Mark: markMemory, Soil: "saturated clay",
			Source: "Craig, Soil Mechanics, problem of chapter 7",
			Record: Record{Stages: append(
				voidRatios("load", []float64{27, 54, 107, 214, 429}, []float64{1.243, 1.217, 1.144, 1.068, 0.994}),
				voidRatios("unload", []float64{214, 107, 54}, []float64{1.001, 1.012, 1.024})...)},
			Expect: "break near 50 kPa; only one load before it",
		},
	}
}

// contradictingCases are printed numbers that cannot all be right.
func contradictingCases() []Case {
	murthy := []float64{6.7, 11.3, 26.6, 53.3, 106, 213, 426, 852}
	dial := []float64{0.175, 0.275, 0.540, 0.965, 1.880, 3.340, 5.000, 6.600}
	argile := []float64{5, 15, 30, 45, 60, 80, 150, 300, 500}
	marine := Record{
		InitialHeight: Known(37.5), SpecificGravity: Known(2.72), WetMass: Known(650), DryMass: Known(480),
		Stages: settlements("load", 37.5, murthy, dial),
	}
	asPrinted, radius := marine, marine
	asPrinted.Area, radius.Area = Known(23.758), Known(95.033)
	french := Record{InitialVoidRatio: Known(1.5), InitialHeight: Known(20)}
	first, second := french, french
	first.Stages = settlements("load", 20, argile, []float64{0.08, 0.32, 0.52, 0.68, 0.92, 0.36, 2.52, 3.68, 4.16})
	second.Stages = settlements("load", 20, argile, []float64{0.1, 0.3, 0.5, 0.7, 0.1, 1.4, 2.5, 3.7, 4.2})
	const marineSource = "problem text at askfilo.com/user-question-answers-smart-solutions/…3336303436393433"
	return []Case{
		{
			ID: "N-MURTHY-MARINE", Grade: SourceN, Mark: markRead, Soil: "marine clay", Source: marineSource, Record: asPrinted, Refused: true,
			Expect: "bulk density of 7.3 Mg/m³: impossible; perhaps the diameter is a radius",
		},
		{
			ID: "N-MURTHY-RADIUS", Grade: SourceN, Mark: markRead, Soil: "marine clay", Source: marineSource + ", taking 5.5 cm as the radius", Record: radius,
			Expect: "void ratio 1.019 by volume and 0.963 from w and Gs: not saturated, or a mass is wrong",
		},
		{
			ID: "N-FR-TYPO-1", Grade: SourceN, Mark: markRead, Soil: "soft saturated clay, 5 m", Refused: true,
			Source: "as FR-ARGILE-5M, settlement 0.36 mm at 80 kPa as printed", Record: first,
			Expect: "the height rises under load at 80 kPa",
		},
		{
			ID: "N-FR-TYPO-2", Grade: SourceN, Mark: markRead, Soil: "soft saturated clay, 5 m", Refused: true,
			Source: "the statement of the same exercise, fr.scribd.com/document/700180526", Record: second,
			Expect: "the height rises under load at 60 kPa",
		},
	}
}
