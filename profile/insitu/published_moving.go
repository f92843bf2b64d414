package insitu

// underWater holds examples with water standing above the ground.
func underWater() []Case {
	// Porosity 0.40 and grains of 2700 kg/m³: 0.6·2700 + 0.4·1000 = 2020 kg/m³.
	const lakeBed = 2020 * weightOfDensity
	bed := ground(textbookWater, [3]float64{20, lakeBed, lakeBed})

	venkatramaiah := Case{Name: "Lake of 6 m, pore pressure", Source: "Venkatramaiah, Geotechnical Engineering, lake example", Mark: Read,
		Note: "only u was read; the weight of the bed does not enter it", Column: bed.table(-6)}.metric()

	lake := Case{Source: "The Groundwater Project, Land Subsidence and Its Mitigation, exercise 1", Mark: DataRead}.metric()
	high, low := lake, lake
	high.Name, high.Column = "Lake of 6 m", bed.table(-6)
	low.Name, low.Column = "Lake fallen to 4 m", bed.table(-4)

	craig := Case{Source: "Craig, Soil Mechanics, problems 3.1 and 3.2", Mark: FromMemory}.metric()
	sand := ground(shorterWater, [3]float64{10, 20, 20})
	river, sea := craig, craig
	river.Name, river.Column = "Bed of a river of 2 m", sand.table(-2)
	sea.Name, sea.Column = "Bed of a sea of 200 m", sand.table(-200)

	return []Case{
		venkatramaiah.at(15, Values{Pore: Value{206.0, true}}),
		high.at(15, all(356.1, 206.0, 150.1)),
		low.at(15, all(356.1-19.6, 206.0-19.6, 150.1)),
		river.at(5, onlyEffective(51)),
		sea.at(5, all(2060, 2009, 51)),
	}
}

// seepage holds examples with water that flows up or down through clay.
func seepage() []Case {
	// Lower sand with a piezometric level 4 m above ground: u = (4 + z)·γw.
	craig := Case{Source: "Craig, Soil Mechanics, problem 3.3", Mark: FromMemory, Note: "data read, answers 51.4 and 33.4 from memory"}.metric()
	artesian, thicker := craig, craig
	artesian.Name = "Artesian sand under clay"
	artesian.Column = ground(shorterWater, [3]float64{4, 16.5, 19}, [3]float64{4, 20, 20}, [3]float64{4, 19, 19}).
		table(2).measured(PorePressure{4, 2 * shorterWater}, PorePressure{8, 12 * shorterWater})
	thicker.Name, thicker.Note = "Artesian sand under 5 m of clay", "variant in circulation"
	thicker.Column = ground(shorterWater, [3]float64{4, 16.5, 19}, [3]float64{5, 20, 20}, [3]float64{4, 19, 19}).
		table(2).measured(PorePressure{4, 2 * shorterWater}, PorePressure{9, 13 * shorterWater})

	rock := Case{Name: "Artesian rock under clay", Source: "METU, CE 363 Soil Mechanics, problem B1", Mark: DataRead,
		Note: "the sheet gives γw = 10 kN/m³",
		Column: ground(roundWater, [3]float64{5, 18, 18}, [3]float64{5, 20, 20}).
			table(0).measured(PorePressure{5, 50}, PorePressure{10, 130})}.metric()

	burst := Case{Name: "Excavation about to burst", Source: "NPTEL course 105103097, Soil Mechanics, chapter 5, example 2", Mark: Read,
		Note: "depth from the floor of the excavation; 3 m of clay are left above the water-bearing sand",
		Column: ground(1*stressPerTonne, [3]float64{3, 2 * stressPerTonne, 2 * stressPerTonne}).
			measured(PorePressure{3, 6 * stressPerTonne})}.in(unitTonnePerSqM, stressPerTonne, roundedTonne)

	aquifer := Case{Source: "confined-aquifer exercise of the Freeze and Cherry type", Mark: DataRead,
		Note: "heads reckoned from the top of the aquifer, our reading; the changes do not depend on it"}.metric()
	clay := ground(textbookWater, [3]float64{50, 2550 * weightOfDensity, 2550 * weightOfDensity})
	before, after := aquifer, aquifer
	before.Name, before.Column = "Aquifer before pumping", clay.measured(PorePressure{50, 75 * textbookWater})
	after.Name, after.Column = "Aquifer pumped down by 10 m", clay.measured(PorePressure{50, 65 * textbookWater})

	return []Case{
		artesian.at(4, all(71, 19.6, 51.4)),
		artesian.at(8, all(151, 117.6, 33.4)),
		thicker.at(9, onlyEffective(43.6)),
		rock.at(5, all(90, 50, 40)),
		rock.at(10, all(190, 130, 60)),
		burst.at(3, all(6, 6, 0)),
		before.at(50, all(1250.8, 735.75, 515.0)),
		after.at(50, all(1250.8, 735.75-98.1, 515.0+98.1)),
	}
}

// loads holds an example of a wide fill, before, just after and long after.
func loads() []Case {
	craig := Case{Source: "Craig, Soil Mechanics, example 3.2", Mark: FromMemory}.metric()
	soil := ground(shorterWater, [3]float64{5, 19, 19}, [3]float64{6, 20, 20}).table(0)
	const fill, middle = 4 * 20.0, 8.0
	before, during, after := craig, craig, craig
	before.Name, before.Column = "Middle of clay before filling", soil
	during.Name = "Middle of clay just after filling"
	during.Note = "the clay has not drained: its pore pressure has risen by the load"
	during.Column = soil.load(fill).measured(PorePressure{5, 5 * shorterWater}, PorePressure{middle, middle*shorterWater + fill})
	after.Name, after.Column = "Middle of clay long after filling", soil.load(fill)
	return []Case{
		before.at(middle, onlyEffective(76.6)),
		during.at(middle, onlyEffective(76.6)),
		after.at(middle, onlyEffective(156.6)),
	}
}

// misprinted holds examples whose published answer is wrong.
func misprinted() []Case {
	sand := Case{Name: "Sand over clay, subtraction misprinted", Source: "exam page, 157 − 68.67", Mark: Read,
		Column: ground(textbookWater, [3]float64{8, 17, 20}).table(1)}.metric()
	sand.Printed = onlyEffective(81.33)

	lake := Case{Name: "Lake taken for soil", Source: "answer site, lake of 6 m", Mark: Read,
		Note:   "the source weighs the water as soil and leaves u out",
		Column: ground(textbookWater, [3]float64{15, 18.8, 18.8}).table(-6)}.metric()
	lake.Printed = Values{Total: Value{338.4, true}, Effective: Value{225.6, true}}

	return []Case{
		sand.at(8, all(157, 68.67, 88.33)),
		lake.at(12, all(284.46, 176.58, 107.88)),
	}
}
