package correlation

import "math"

// ScreenFriction gives the Darcy friction factor of stacked woven wire screens [-].
//
//	f = 129/Re + 2.91 Re^-0.103
//
// Re Reynolds number on hydraulic diameter and pore velocity [-], 0.45 < Re < 6100; porosity 0.62-0.78.
//
// Source: [Gedeon1996], from memory.
func ScreenFriction(Re float64) float64 { return 129/Re + 2.91*math.Pow(Re, -0.103) }

// ScreenNusselt gives the Nusselt number of stacked woven wire screens [-].
//
//	Nu = (1 + 0.99 Pe^0.66) eps^1.79
//
// Pe = Re Pr, eps porosity [-]; range as ScreenFriction.
//
// Source: [Gedeon1996], from memory.
func ScreenNusselt(Pe, eps float64) float64 {
	return (1 + 0.99*math.Pow(Pe, 0.66)) * math.Pow(eps, 1.79)
}

// ScreenDispersion gives the axial conductivity of the gas in the pores, with thermal dispersion, over
// the molecular conductivity of the gas [-].
//
//	N = 0.73 + 0.50 Pe^0.62 eps^-2.91
//
// Pe = Re Pr, eps porosity [-]; range as ScreenFriction.
//
// Source: [Gedeon1996], from memory with medium confidence.
func ScreenDispersion(Pe, eps float64) float64 {
	return 0.73 + 0.50*math.Pow(Pe, 0.62)*math.Pow(eps, -2.91)
}

// ScreenRange tells whether Re and porosity are inside the range of the screen laws.
func ScreenRange(Re, eps float64) bool {
	return Re >= 0.45 && Re <= 6100 && eps >= 0.62 && eps <= 0.78
}
