package metal

// nickel holds the nickel and iron-nickel alloys. Physical properties and short-time strengths:
// [AlloySheets], from memory.
func nickel(a Alloy) Properties {
	switch a {
	case N06230:
		return Properties{
			Alloy: N06230, PlainName: "nickel alloy 230", Sources: "NickelSheet, AlloySheets",
			Density: 8970, Conductivity0: 2.94, Conductivity1: 0.02, SpecificHeat0: 333, SpecificHeat1: 0.226,
			Expansion0: 11.3e-6, Expansion1: 0.0048e-6, Young0: 212e9, Young1: -0.062e9,
			Rupture: Rupture{C: [4]float64{7.94194, -0.1209566, -0.002533811, -0.001208043}, Low: 20.287, High: 29.746, Rows: 22, Scatter: 0.0563},
			Yield:   Strength{310e6, 230e6, 210e6, 205e6, 195e6, 110e6},
			Tensile: Strength{760e6, 660e6, 610e6, 530e6, 350e6, 180e6},
		}
	case N06625:
		return Properties{
			Alloy: N06625, PlainName: "nickel alloy 625, solution annealed", Sources: "NickelSheet, AlloySheets",
			Density: 8440, Conductivity0: 5.32, Conductivity1: 0.0153, SpecificHeat0: 338, SpecificHeat1: 0.245,
			Expansion0: 12.3e-6, Expansion1: 0.0041e-6, Young0: 208e9, Young1: -0.065e9,
			Rupture: Rupture{C: [4]float64{8.027683, -0.2033537}, Low: 25.083, High: 29.346, Rows: 3, Scatter: 0.0086},
			Yield:   Strength{276e6, 215e6, 200e6, 195e6, 185e6, 100e6},
			Tensile: Strength{690e6, 620e6, 590e6, 540e6, 330e6, 150e6},
		}
	case N06002:
		return Properties{
			Alloy: N06002, PlainName: "nickel alloy X", Sources: "NickelSheet, AlloySheets",
			Density: 8220, Conductivity0: 3.15, Conductivity1: 0.0203, SpecificHeat0: 441, SpecificHeat1: 0.15,
			Expansion0: 13.5e-6, Expansion1: 0.0031e-6, Young0: 206e9, Young1: -0.066e9,
			Rupture: Rupture{C: [4]float64{7.816845, -0.1559472}, Low: 23.715, High: 29.273, Rows: 3, Scatter: 0.0174},
			Yield:   Strength{240e6, 190e6, 165e6, 160e6, 150e6, 80e6},
			Tensile: Strength{655e6, 580e6, 540e6, 450e6, 300e6, 150e6},
		}
	case N06600:
		return Properties{
			Alloy: N06600, PlainName: "nickel alloy 600", Sources: "NickelSheet, AlloySheets",
			Density: 8470, Conductivity0: 9.85, Conductivity1: 0.0163, SpecificHeat0: 383, SpecificHeat1: 0.215,
			Expansion0: 12.9e-6, Expansion1: 0.004e-6, Young0: 215e9, Young1: -0.058e9,
			Rupture: Rupture{C: [4]float64{7.59419, -0.1294864}, Low: 21.878, High: 28.572, Rows: 3, Scatter: 0.0574},
			Yield:   Strength{240e6, 200e6, 185e6, 165e6, 95e6, 40e6},
			Tensile: Strength{550e6, 520e6, 500e6, 380e6, 160e6, 75e6},
		}
	case N06601:
		return Properties{
			Alloy: N06601, PlainName: "nickel alloy 601", Sources: "NickelSheet, AlloySheets",
			Density: 8110, Conductivity0: 6.26, Conductivity1: 0.017, SpecificHeat0: 387, SpecificHeat1: 0.21,
			Expansion0: 13.3e-6, Expansion1: 0.0045e-6, Young0: 207e9, Young1: -0.068e9,
			Rupture: Rupture{C: [4]float64{7.673112, -0.1343702}, Low: 22.418, High: 28.869, Rows: 3, Scatter: 0.0286},
			Yield:   Strength{205e6, 165e6, 150e6, 145e6, 110e6, 55e6},
			Tensile: Strength{550e6, 510e6, 490e6, 380e6, 180e6, 85e6},
		}
	case N08810:
		return Properties{
			Alloy: N08810, PlainName: "iron-nickel alloy 800H", Sources: "NickelSheet, AlloySheets",
			Density: 7940, Conductivity0: 6.69, Conductivity1: 0.0165, SpecificHeat0: 415, SpecificHeat1: 0.15,
			Expansion0: 14.2e-6, Expansion1: 0.005e-6, Young0: 198e9, Young1: -0.073e9,
			Rupture: Rupture{C: [4]float64{7.697935, -0.1450322}, Low: 22.846, High: 28.824, Rows: 3, Scatter: 0.0106},
			Yield:   Strength{170e6, 115e6, 100e6, 95e6, 85e6, 50e6},
			Tensile: Strength{450e6, 400e6, 380e6, 300e6, 165e6, 85e6},
		}
	case N08330:
		return Properties{
			Alloy: N08330, PlainName: "iron-nickel alloy 330", Sources: "NickelSheet, AlloySheets",
			Density: 8080, Conductivity0: 7.87, Conductivity1: 0.0155, SpecificHeat0: 415, SpecificHeat1: 0.16,
			Expansion0: 14.4e-6, Expansion1: 0.0042e-6, Young0: 198e9, Young1: -0.069e9,
			Rupture: Rupture{C: [4]float64{7.578847, -0.1556806}, Low: 22.189, High: 27.757, Rows: 3, Scatter: 0.0144},
			Yield:   Strength{207e6, 155e6, 135e6, 125e6, 100e6, 55e6},
			Tensile: Strength{483e6, 430e6, 400e6, 300e6, 175e6, 90e6},
		}
	}
	panic("metal: unknown alloy")
}
