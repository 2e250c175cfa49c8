package correlation

import "math"

// GnielinskiNusselt gives the mean Nusselt number of turbulent flow in a smooth round tube [-].
//
//	Nu = (f/8)(Re - 1000) Pr / (1 + 12.7 sqrt(f/8) (Pr^(2/3) - 1)) x (1 + (D/L)^(2/3))
//
// f Darcy friction factor (Petukhov's), Re Reynolds number on the bore, Pr Prandtl number, DoverL bore
// over length (0 = long tube) [-]. 3000 < Re < 5e6, 0.5 < Pr < 2000, DoverL <= 1. Accuracy about 10 %.
//
// Source: [Gnielinski1976] (with the entry term of Hausen); as eq. 8.62 of [Incropera2007] without the
// entry term, from memory.
func GnielinskiNusselt(f, Re, Pr, DoverL float64) float64 {
	return gnielinski(f, Re, Pr, math.Pow(Pr, 2.0/3), math.Pow(DoverL, 2.0/3))
}

func gnielinski(f, Re, Pr, PrPow, entry float64) float64 {
	f8 := 0.125 * f
	return f8 * (Re - 1000) * Pr / (1 + 12.7*math.Sqrt(f8)*(PrPow-1)) * (1 + entry)
}
