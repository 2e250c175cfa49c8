package correlation

import "math"

// HausenNusselt gives the mean Nusselt number of laminar flow in a round tube at constant wall
// temperature, with developed velocity and developing temperature [-].
//
//	Nu = 3.66 + 0.0668 Gz/(1 + 0.04 Gz^(2/3)),   Gz = Re Pr D/L
//
// Re Reynolds number on the bore, Pr Prandtl number, DoverL bore over length [-]. Re < 2300. The limit
// 3.66 for long tubes is exact.
//
// Source: [Hausen1943]; as eq. 8.56 of [Incropera2007], from memory.
func HausenNusselt(Re, Pr, DoverL float64) float64 {
	Gz := Re * Pr * DoverL
	return hausen(Gz, math.Pow(Gz, 2.0/3))
}

func hausen(Gz, GzPow float64) float64 { return 3.66 + 0.0668*Gz/(1+0.04*GzPow) }
