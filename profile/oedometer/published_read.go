package oedometer

// readCases are the curves of which something of the interpretation was read.
func readCases() []Case {
	argile := []float64{5, 15, 30, 45, 60, 80, 150, 300, 500}
	das := times(poundPerSquare, 500, 1000, 2000, 4000, 8000, 16000)
	return []Case{
		{
			ID: "DAS-PSF16K", Grade: SourceA, Mark: markRead, Soil: "clay, textbook problem",
			Source: "problem of B. M. Das's textbooks; solution sheet of Kathmandu University, CIEG 303, 22 March 2020",
			Record: Record{Stages: voidRatios("load",
				[]float64{23.94, 47.88, 95.76, 191.52, 383.04, 766.08},
				[]float64{1.112, 1.105, 1.080, 0.985, 0.850, 0.731})},
			Published: []PublishedValue{
				{Quantity: publishedYield, Value: 115, Unit: "kPa", Note: "one reader's graph"},
				{Quantity: publishedCc, Value: 0.451, Note: "between 300 and 500 kPa; a second sheet has 0.45"},
			},
			Expect: "a value; simple constructions spread over 108–124 kPa, and the curve flattens again at its end",
		},
		{
			ID: "FR-ARGILE-5M", Grade: SourceA, Mark: markRead, Soil: "soft saturated clay, 5 m",
			Source: "worked exercise \"Exercice 3\", fr.scribd.com/document/475126015; settlement at 80 kPa corrected from its own Δe",
			Record: Record{
				InitialVoidRatio: Known(1.5), InitialHeight: Known(20),
				Stages: settlements("load", 20, argile, []float64{0.08, 0.32, 0.52, 0.68, 0.92, 1.36, 2.52, 3.68, 4.16}),
			},
			Situation: Situation{EffectiveStress: Known(30)},
			Published: append([]PublishedValue{
				{Quantity: publishedYield, Value: 80, Unit: "kPa", Note: "a loose student solution: where the straight part begins, 27–40 % above every construction"},
				{Quantity: publishedCc, Value: 0.5},
				{Quantity: publishedCs, Value: 0.0625, Note: "there is no unloading branch in the table"},
			}, voidRatiosAt(argile, []float64{1.490, 1.460, 1.435, 1.415, 1.385, 1.330, 1.185, 1.040, 0.980})...),
			Expect: "a value near 57–63 kPa by every construction, an example of how readers differ; flattens strongly at the end",
		},
		{
			ID: "DAS-0748", Grade: SourceB, Mark: markRead, Soil: "clay, textbook problem",
			Source: "problem of B. M. Das's textbooks; solved sheet SHW12 (autumn 2012), www.scribd.com/doc/300564454",
			Record: Record{
				InitialHeight: Known(0.748 * inch), SpecificGravity: Known(2.68), DryMass: Known(95.2), Area: Known(4.91 * inch * inch / 100),
				Stages: heights("load", das, []float64{0.6947, 0.6850, 0.6705, 0.6520, 0.6358, 0.6252}, inch),
			},
			Published: append([]PublishedValue{
				{Quantity: publishedInitial, Value: 0.694},
				{Quantity: publishedCc, Value: 0.131},
			}, voidRatiosAt(das, []float64{0.573, 0.551, 0.518, 0.477, 0.440, 0.416})...),
			Expect: "poorly defined: no straight virgin line, and the first load alone takes 0.12 of void ratio",
		},
		{
			ID: "CN-NC5M", Grade: SourceB, Mark: markRead, Soil: "soft clay, normally consolidated",
			Source: "exam tutorial, m.zige365.com/yantushi/fxzd_yantu/1132813563792197.html",
			Record: Record{Stages: voidRatios("load",
				[]float64{0, 50, 100, 200, 300, 400},
				[]float64{1.406, 1.250, 1.120, 0.990, 0.910, 0.850})},
			Situation: Situation{EffectiveStress: Known(100)},
			Published: []PublishedValue{{Quantity: publishedVoid, At: 200, Value: 0.990}},
			Expect:    "no break in the curve: σ′p below the first load, or a disturbed specimen",
		},
	}
}

// partCases are the curves of which no interpretation was seen.
func partCases() []Case {
	venk := []float64{13, 27, 54, 108, 214, 480, 960, 1500}
	mod := times(kilogramPerSquare, 0.5, 1, 2, 4, 8, 16, 32)
	return []Case{
		{
			ID: "VENK-7.3", Grade: SourceC, Mark: markRead, Soil: "clay, textbook example",
			Source: "C. Venkatramaiah, Geotechnical Engineering, example 7.3 (author from memory; page read), issuhub.com/view/index?id=4772",
			Record: Record{
				InitialVoidRatio: Known(1), InitialHeight: Known(25),
				Stages: heights("load", venk, []float64{2.500, 2.496, 2.484, 2.456, 2.396, 2.282, 2.160, 2.080}, 10),
			},
			Published: voidRatiosAt(venk, []float64{1.000, 0.997, 0.987, 0.965, 0.917, 0.826, 0.728, 0.664}),
			Expect:    "rounded: constructions between 150 and 203 kPa",
		},
		{
			ID: "IT-LIMO-10M", Grade: SourceC, Mark: markRead, Soil: "clayey silt, 10 m",
			Source: "Corso di Elementi di Geotecnica, esercitazione 7, it.scribd.com/document/689120249",
			Record: Record{Stages: append(
				voidRatios("load", []float64{25, 49, 98, 196, 392, 785, 1570, 3139},
					[]float64{0.693, 0.689, 0.681, 0.668, 0.653, 0.631, 0.576, 0.476}),
				voidRatios("unload", []float64{1570, 785, 392, 196, 98, 49, 25},
					[]float64{0.486, 0.494, 0.503, 0.511, 0.518, 0.526, 0.531})...)},
			Situation: Situation{EffectiveStress: Known(175.4)},
			Expect:    "virgin line of one segment only: a bound; heavily overconsolidated",
		},
		{
			ID: "ID-UP", Grade: SourceC, Mark: markRead, Soil: "clay, polytechnic laboratory",
			Source: "Politeknik Negeri Ujung Pandang, id.scribd.com/document/344002357; second load 0.5 kgf/cm² as on its time sheet (the table says 0.6)",
			Record: Record{
				InitialVoidRatio: Known(1.11), InitialHeight: Known(20.02),
				Stages: append(
					settlements("load", 20.02, times(kilogramPerSquare, 0.25, 0.5, 1, 2, 4), []float64{0.44, 0.65, 1.14, 1.85, 2.60}),
					settlements("unload", 20.02, times(kilogramPerSquare, 1, 0.25), []float64{2.28, 2.026})...),
			},
			Published: voidRatiosAt(times(kilogramPerSquare, 0.25, 0.5, 1, 2, 4), []float64{1.064, 1.042, 0.990, 0.915, 0.836}),
			Expect:    "constructions near 70–79 kPa; five loads only",
		},
		{
			ID: "FR-TD3", Grade: SourceC, Mark: markRead + "; dry mass and Gs derived from its dry density and saturation", Soil: "saturated clay",
			Source: "Université Grenoble Alpes, TD 3 Essais œdométriques, table 1, fr.scribd.com/document/678065612",
			Record: Record{
				InitialHeight: Known(20), Area: Known(38.485), WetMass: Known(144.63), DryMass: Known(107.22), SpecificGravity: Known(2.71),
				Stages: append(append(heights("load", []float64{1, 26, 52}, []float64{2.000, 1.944, 1.921}, 10),
					Stage{EffectiveStress: 104, Kind: "load"}),
					append(heights("load", []float64{260, 520, 1040}, []float64{1.811, 1.747, 1.675}, 10),
						heights("unload", []float64{260, 10}, []float64{1.697, 1.778}, 10)...)...),
			},
			Published: voidRatiosAt([]float64{26, 52, 260, 520, 1040}, []float64{0.891, 0.869, 0.762, 0.700, 0.630}),
			Expect:    "the step at 104 kPa is missing, where the yield stress may lie",
		},
		{
			ID: "MOD-140G", Grade: SourceC, Mark: markRead, Soil: "textbook variant",
			Source: "www.transtutors.com question 13407769; stress unit garbled on the page, taken as kgf/cm²",
			Record: Record{
				InitialHeight: Known(26), SpecificGravity: Known(2.65), DryMass: Known(140), Area: Known(30),
				Stages: heights("load", mod, []float64{2.49, 2.47, 2.43, 2.39, 2.32, 2.23, 2.12}, 10),
			},
			Published: voidRatiosAt(mod, []float64{0.414, 0.403, 0.380, 0.357, 0.317, 0.266, 0.204}),
			Expect:    "still steepening at 3.1 MPa: not resolved; the first step loses 4 % of height",
		},
	}
}
