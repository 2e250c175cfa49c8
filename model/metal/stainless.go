package metal

// stainless holds the austenitic stainless steels. Physical properties and short-time strengths:
// [AlloySheets], from memory; conductivity and specific heat of S31600 and specific heat of S30400:
// [Kim1975], conductivity of S30400: [Incropera2007], both from memory.
func stainless(a Alloy) Properties {
	switch a {
	case S30400:
		return Properties{
			Alloy: S30400, PlainName: "austenitic stainless steel 304", Sources: "NickelSheet, ASM1990, AlloySheets, Kim1975, Incropera2007",
			Density: 7900, Conductivity0: 10.4, Conductivity1: 0.0151, SpecificHeat0: 469.4, SpecificHeat1: 0.1348,
			Expansion0: 16.9e-6, Expansion1: 0.003e-6, Young0: 195e9, Young1: -0.075e9,
			Rupture: Rupture{C: [4]float64{7.481047, -0.1500584}, Low: 21.232, High: 27.435, Rows: 5, Scatter: 0.0970},
			Yield:   Strength{205e6, 127e6, 107e6, 95e6, 70e6, 35e6},
			Tensile: Strength{515e6, 400e6, 370e6, 265e6, 140e6, 65e6},
		}
	case S30815:
		return Properties{
			Alloy: S30815, PlainName: "austenitic stainless steel 21Cr-11Ni-N-Ce", Sources: "NickelSheet, AlloySheets",
			Density: 7800, Conductivity0: 11.3, Conductivity1: 0.0135, SpecificHeat0: 449, SpecificHeat1: 0.17,
			Expansion0: 16.8e-6, Expansion1: 0.0028e-6, Young0: 201e9, Young1: -0.08e9,
			Rupture: Rupture{C: [4]float64{7.688195, -0.1491983}, Low: 22.880, High: 28.690, Rows: 3, Scatter: 0.0334},
			Yield:   Strength{310e6, 185e6, 160e6, 145e6, 110e6, 60e6},
			Tensile: Strength{600e6, 500e6, 460e6, 330e6, 180e6, 90e6},
		}
	case S31000:
		return Properties{
			Alloy: S31000, PlainName: "austenitic stainless steel 310", Sources: "SupplierSheet, ASM1990, AlloySheets",
			Density: 7900, Conductivity0: 10, Conductivity1: 0.01125, SpecificHeat0: 460, SpecificHeat1: 0.12,
			Expansion0: 15.6e-6, Expansion1: 0.003e-6, Young0: 201e9, Young1: -0.075e9,
			Rupture: Rupture{C: [4]float64{7.586343, -0.1464736, -0.0006860754}, Low: 21.232, High: 31.384, Rows: 5, Scatter: 0.1214},
			Yield:   Strength{205e6, 146e6, 128e6, 115e6, 90e6, 50e6},
			Tensile: Strength{515e6, 440e6, 410e6, 310e6, 175e6, 95e6},
		}
	case S31600:
		return Properties{
			Alloy: S31600, PlainName: "austenitic stainless steel 316", Sources: "NickelSheet, ASM1990, AlloySheets, Kim1975",
			Density: 7980, Conductivity0: 9.248, Conductivity1: 0.01571, SpecificHeat0: 459, SpecificHeat1: 0.1328,
			Expansion0: 15.6e-6, Expansion1: 0.004e-6, Young0: 195e9, Young1: -0.075e9,
			Rupture: Rupture{C: [4]float64{7.6455385, -0.18752725, -0.0038872948, 0.001687026}, Low: 21.232, High: 27.757, Rows: 5, Scatter: 0.1472},
			Yield:   Strength{205e6, 132e6, 115e6, 110e6, 95e6, 45e6},
			Tensile: Strength{515e6, 425e6, 410e6, 320e6, 175e6, 85e6},
		}
	}
	panic("metal: unknown alloy")
}
