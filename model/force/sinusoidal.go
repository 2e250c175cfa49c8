package force

import "math"

// Sinusoidal gives the force on the crank pin of harmonic motion: an ideal crosshead without a rod hands the axial
// force on to the pin as it is, and gives no side thrust.
//
//	tangential = P sin alpha,   radial = -P cos alpha
//
// P axial force, upwards [N], alpha crank angle of the body, 0 at its lowest position [rad]. The limit of
// SliderCrank for long rods.
//
// Source: derived here.
func Sinusoidal(P, alpha float64) Pin {
	s, c := math.Sincos(alpha)
	return Pin{Radial: -P * c, Tangential: P * s}
}
