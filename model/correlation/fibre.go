package correlation

import "math"

// FibreFriction gives the Darcy friction factor of random-fibre felt [-].
//
//	f = 192/Re + 4.53 Re^-0.067
//
// Re Reynolds number on hydraulic diameter and pore velocity [-], 0.45 < Re < 6100; porosity 0.69-0.96.
// (The source's range of Re is known here for screens only and is taken as the same for felts.)
//
// Source: [Gedeon1996], from memory.
func FibreFriction(Re float64) float64 { return 192/Re + 4.53*math.Pow(Re, -0.067) }

// FibreNusselt gives the Nusselt number of random-fibre felt [-].
//
//	Nu = (1 + 1.16 Pe^0.66) eps^2.61
//
// Pe = Re Pr, eps porosity [-]; range as FibreFriction.
//
// Source: [Gedeon1996], from memory.
func FibreNusselt(Pe, eps float64) float64 {
	return (1 + 1.16*math.Pow(Pe, 0.66)) * math.Pow(eps, 2.61)
}

// FibreDispersion gives the axial conductivity of the gas in the pores of a felt over the molecular
// conductivity [-]. The law of the screens is used: no law for felts could be confirmed, so this is an
// assumption, not a published value.
func FibreDispersion(Pe, eps float64) float64 { return ScreenDispersion(Pe, eps) }

// FibreRange tells whether Re and porosity are inside the range of the felt laws.
func FibreRange(Re, eps float64) bool {
	return Re >= 0.45 && Re <= 6100 && eps >= 0.69 && eps <= 0.96
}
