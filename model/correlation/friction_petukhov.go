package correlation

import "math"

// PetukhovFriction gives the Darcy friction factor of turbulent flow in a smooth round tube [-].
//
//	f = (0.790 ln Re - 1.64)^-2
//
// Re Reynolds number on the bore [-], 3000 < Re < 5e6.
//
// Source: [Petukhov1970]; as eq. 8.21 of [Incropera2007], from memory.
func PetukhovFriction(Re float64) float64 {
	x := 0.790*math.Log(Re) - 1.64
	return 1 / (x * x)
}
