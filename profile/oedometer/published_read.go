package oedometer

// publishedCases lists the printed curves.
func publishedCases() []Case {
	return []Case{
		{
			ID: "DAS-PSF16K", Grade: "A", Mark: markRead, Soil: "clay, textbook problem",
			Source: "problem of B. M. Das's textbooks; solution sheet of Kathmandu University, CIEG 303, 2020",
			Record: loads([]float64{23.94, 47.88, 95.76, 191.52, 383.04, 766.08},
				[]float64{1.112, 1.105, 1.080, 0.985, 0.850, 0.731}),
			Published: []PublishedValue{
				{"preconsolidation stress", 115, "kPa", "from a graph"},
				{"compression index", 0.451, "", "from 300 and 500 kPa"},
			},
			Expect: "value near 108–124 kPa, the spread of the constructions",
		},
	}
}

// loads returns a record of loading stages with void ratios.
func loads(stress, e []float64) Record {
	r := Record{}
	for i := range stress {
		r.Stages = append(r.Stages, Stage{EffectiveStress: stress[i], VoidRatio: Known(e[i]), Kind: "load"})
	}
	return r
}
