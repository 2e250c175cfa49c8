package metal

import "math"

// ThermalStressBore gives the hoop stress [Pa] at the bore of a tube through whose wall heat flows, tension
// positive:
//
//	s = E a (Ti - To)/(2 (1 - nu) ln(b/a0)) (1 - 2 b^2/(b^2 - a0^2) ln(b/a0))
//
// E Young's modulus [Pa], a mean expansion [1/K], nu Poisson's ratio [-], Ti and To temperatures of the
// inner and outer surface [K], a0 and b inner and outer radius [m]. Steady radial conduction, ends free to
// expand, elastic. With the outside hotter the bore is in tension. For a thin wall it tends to
// E a (To - Ti)/(2 (1 - nu)).
//
// Source: [Timoshenko1956], chapter on thermal stress in cylinders, from memory; the tests check the thin
// wall and that the stress over the wall has no resultant.
func ThermalStressBore(E, expansion, poisson, Ti, To, rInner, rOuter float64) float64 {
	ln := math.Log(rOuter / rInner)
	o2, i2 := rOuter*rOuter, rInner*rInner
	return E * expansion * (Ti - To) / (2 * (1 - poisson) * ln) * (1 - 2*o2/(o2-i2)*ln)
}

// ThermalStressOuter is that at the outer surface [Pa]; symbols as in ThermalStressBore.
//
//	s = E a (Ti - To)/(2 (1 - nu) ln(b/a0)) (1 - 2 a0^2/(b^2 - a0^2) ln(b/a0))
func ThermalStressOuter(E, expansion, poisson, Ti, To, rInner, rOuter float64) float64 {
	ln := math.Log(rOuter / rInner)
	o2, i2 := rOuter*rOuter, rInner*rInner
	return E * expansion * (Ti - To) / (2 * (1 - poisson) * ln) * (1 - 2*i2/(o2-i2)*ln)
}

// WallNeeded gives the wall thickness [m] at which HoopStressBore is the allowable stress [Pa]:
//
//	(ro/ri)^2 = (s + pi)/(s - pi + 2 po)
//
// It is +Inf where no wall is thick enough, s <= pi - 2 po, and 0 where none is needed, pi <= po.
//
// Derivation: HoopStressBore solved for ro.
func WallNeeded(allowable, pInner, pOuter, rInner float64) float64 {
	if pInner <= pOuter {
		return 0
	}
	den := allowable - pInner + 2*pOuter
	if den <= 0 {
		return math.Inf(1)
	}
	return rInner * (math.Sqrt((allowable+pInner)/den) - 1)
}
