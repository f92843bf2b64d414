package insitu

// dryAndHydrostatic holds examples with one water table, or none, in metric units.
func dryAndHydrostatic() []Case {
	college := Case{Source: "Canadian college course ENF1170, solution sheet, problem 8-1", Mark: Read,
		Note: "the same unit weight above and below the water table"}.metric()
	soil := ground(textbookWater, [3]float64{4, 19.5, 19.5})
	dry, full, half := college, college, college
	dry.Name, dry.Column = "One soil, no water", soil
	full.Name, full.Column = "One soil, water at ground level", soil.table(0)
	half.Name, half.Column = "One soil, water at half depth", soil.table(2)

	craig := Case{Name: "Sand over clay", Source: "Craig, Soil Mechanics, example 3.1", Mark: FromMemory,
		Note:   "data read, answers from memory",
		Column: ground(shorterWater, [3]float64{5, 17, 20}, [3]float64{4, 19, 19}).table(3)}.metric()

	das := Case{Name: "Dry sand over clay", Source: "Das, Principles of Geotechnical Engineering, example 9.1", Mark: FromMemory,
		Column: ground(textbookWater, [3]float64{6, 16.5, 16.5}, [3]float64{13, 19.25, 19.25}).table(6)}.metric()

	smith := Case{Name: "Middle of a clay under sand", Source: "Smith, Elements of Soil Mechanics", Mark: FromMemory,
		Note:   "data read; answers 94 and 64.6 from memory, u recomputed",
		Column: ground(textbookWater, [3]float64{3, 18, 18}, [3]float64{4, 20, 20}).table(2)}.metric()

	lowered := Case{Source: "Das, Principles of Foundation Engineering, problem 2.9", Mark: DataRead}.metric()
	sand := ground(textbookWater, [3]float64{10, 17, 20})
	before, after := lowered, lowered
	before.Name, before.Column = "Water table before lowering", sand.table(1)
	after.Name, after.Column = "Water table lowered by 2 m", sand.table(3)

	gravel := Case{Name: "Silty sand over gravel", Source: "question page on effective stress, densities 1750, 2010 and 2160 kg/m³", Mark: DataRead,
		Column: ground(textbookWater,
			[3]float64{4.5, 1750 * weightOfDensity, 2010 * weightOfDensity},
			[3]float64{6, 2160 * weightOfDensity, 2160 * weightOfDensity}).table(2.3)}.metric()

	return []Case{
		dry.at(4, onlyEffective(78)),
		full.at(4, onlyEffective(38.76)),
		half.at(4, onlyEffective(58.38)),
		craig.at(3, all(51, 0, 51)),
		craig.at(5, all(91, 19.6, 71.4)),
		craig.at(9, all(167, 58.8, 108.2)),
		das.at(6, all(99, 0, 99)),
		das.at(19, all(349.25, 127.53, 221.72)),
		smith.at(5, all(94, 29.43, 64.57)),
		before.at(10, onlyEffective(108.71)),
		after.at(10, onlyEffective(122.33)),
		gravel.at(2.3, all(39.49, 0, 39.49)),
		gravel.at(4.5, all(82.87, 21.58, 61.28)),
		gravel.at(10.5, all(210.00, 80.44, 129.56)),
	}
}

// otherUnits holds examples in feet and pounds, and in tonnes, converted to m and
// kN/m³ so that they also test that the ground is the same in any units.
func otherUnits() []Case {
	tonnes := Case{Name: "Two layers in tonnes", Source: "NPTEL course 105103097, Soil Mechanics, chapter 5, example 1", Mark: Read,
		Column: ground(1*stressPerTonne,
			[3]float64{4, 1.92 * stressPerTonne, 1.92 * stressPerTonne},
			[3]float64{7, 2.10 * stressPerTonne, 2.10 * stressPerTonne}).table(0)}.in(unitTonnePerSqM, stressPerTonne, roundedTonne)

	silt := Case{Name: "Silt over two sands in feet", Source: "exam question page, US units", Mark: Read,
		Column: ground(waterPcf*weightPerPcf,
			[3]float64{8 * metrePerFoot, 80 * weightPerPcf, 80 * weightPerPcf},
			[3]float64{10 * metrePerFoot, 120 * weightPerPcf, 120 * weightPerPcf},
			[3]float64{10 * metrePerFoot, 130 * weightPerPcf, 130 * weightPerPcf}).table(8 * metrePerFoot)}.in(unitPoundPerSqFoot, stressPerPsf, roundedFoot)

	highway := Case{Name: "Overburden diagram in feet", Source: "FHWA NHI-06-088, p0 diagram example", Mark: FromMemory,
		Column: ground(waterPcf*weightPerPcf,
			[3]float64{20 * metrePerFoot, 110 * weightPerPcf, 110 * weightPerPcf}).table(10 * metrePerFoot)}.in(unitPoundPerSqFoot, stressPerPsf, roundedFoot)

	return []Case{
		tonnes.at(4, all(7.68, 4, 3.68)),
		tonnes.at(11, all(22.38, 11, 11.38)),
		silt.at(25.5*metrePerFoot, onlyEffective(1723)),
		highway.at(10*metrePerFoot, all(1100, 0, 1100)),
		highway.at(20*metrePerFoot, all(2200, 624, 1576)),
	}
}

// capillary holds examples with saturated ground above the water table.
func capillary() []Case {
	board := Case{Name: "Fine sand with capillary water", Source: "board-exam question page; data as in a Craig problem on capillarity", Mark: Read,
		Column: ground(textbookWater, [3]float64{10, 16, 20}).table(3.5).fringe(1)}.metric()

	// γ = (Gs + S·e)·γw / (1 + e) with Gs = 2.65, e = 0.7.
	const (
		halfSaturated = (2.65 + 0.5*0.7) * textbookWater / 1.7
		saturated     = (2.65 + 0.7) * textbookWater / 1.7
	)
	phase := Case{Source: "Indian exam solution page, Gs = 2.65, e = 0.7, S = 50 % above the water", Mark: Read,
		Note: "the source rounds the unit weights to two decimals"}.metric()
	sand := ground(textbookWater, [3]float64{12, halfSaturated, saturated}).table(4)
	plain, risen := phase, phase
	plain.Name, plain.Column = "Half-saturated sand", sand
	risen.Name, risen.Column = "Half-saturated sand, water risen 1 m", sand.fringe(1)

	craig := Case{Name: "Sand over clay, 1 m of capillary water", Source: "Craig, Soil Mechanics, example 3.1", Mark: FromMemory,
		Note:   "data read, answers from memory",
		Column: ground(shorterWater, [3]float64{5, 17, 20}, [3]float64{4, 19, 19}).table(3).fringe(1)}.metric()

	return []Case{
		board.at(8, all(150, 44.15, 105.86)),
		plain.at(10, onlyEffective(126.36)),
		risen.at(10, onlyEffective(128.38)),
		craig.at(3, all(54, 0, 54)),
		craig.at(5, onlyEffective(74.4)),
		craig.at(9, onlyEffective(111.2)),
	}
}
