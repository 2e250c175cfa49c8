package loss

import "math"

// Shuttle gives the heat that a reciprocating hot body carries from hot to cold end [W].
//
//	Q = (pi/8) D k S^2 dT/(J L)
//
// D diameter [m], J radial gap [m], L length of the body over which its temperature falls [m], S stroke
// [m], k conductivity of the gas in the gap at its mean temperature [W/(m K)], dT temperature difference
// over L [K].
//
// Derivation: body and cylinder wall have the same linear profile of slope dT/L. With the body moved
// towards the hot end by x, each part of it faces a wall hotter by x dT/L and takes up, per length, the
// heat q = pi D (k/J) x dT/L; it gives this heat back when it is below its middle position. What is taken
// up at x and given back elsewhere is carried towards the cold end at the mean rate <q x>, and for
// sinusoidal motion <x^2> = S^2/8.
//
// Range: thin gap (J << D); gas in the gap follows the walls within a cycle; walls thick or conductive
// enough that their surface keeps its temperature, that is (k/J)^2 << pi f (k rho c) of the wall. Outside
// it the formula gives too much. See ShuttleMotion for other motions.
//
// Source: [Zimmerman1970] for the form, from memory; derived here.
func Shuttle(D, J, L, S, k, dT float64) float64 { return ShuttleMotion(D, J, L, 0.125*S*S, k, dT) }

// ShuttleMotion is Shuttle for any motion [W].
//
//	Q = pi D k <(x - <x>)^2> dT/(J L)
//
// variance is the time mean of the squared distance of the body from its mean position [m2].
func ShuttleMotion(D, J, L, variance, k, dT float64) float64 {
	if variance == 0 || dT == 0 {
		return 0
	}
	return math.Pi * D * k * variance * dT / (J * L)
}
