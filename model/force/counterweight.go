package force

import "math"

// Counterweight gives the best single counterweight that turns with the shaft: the one that cancels the forward part of
// the primary force.
//
//	U omega^2 u(angle + theta) = -forward e^(i theta)
//
// forward of Harmonic with n = 1 [N], of the machine with what turns already in it; omega [rad/s], > 0; the offset is
// left 0.
//
// Derivation: a rotor changes no part of the force but this one, and the mean square of the force over a turn is the sum
// of the squares of all parts, so the mean square is smallest where this part is zero. The largest force of the
// primary alone, |forward + U| + |backward|, is smallest there too. With higher orders the largest force of all is not
// in general, but is above the least that any single counterweight can reach by no more than twice the sum of the sizes
// of those orders.
//
// For one cylinder it is the rule to balance half of the mass that goes up and down, for a V of 90 degrees with equal
// masses on one pin the whole of one of them.
//
// Source: derived here; [KhurmiGupta2005], chapter on the balancing of reciprocating masses, from memory.
func Counterweight(forward complex128, omega float64) Rotor { return against(forward, omega) }

// ReverseCounterweight gives the counterweight on a shaft that turns the other way: it cancels the backward part of the
// primary force. With Counterweight no primary force is left at all; in both, force and couple are those of one plane.
func ReverseCounterweight(backward complex128, omega float64) Rotor {
	r := against(backward, omega)
	r.Reverse = true
	return r
}

// against gives the rotor of the force -z at theta = 0. u(phi) = i e^(i phi), hence the quarter turn.
func against(z complex128, omega float64) Rotor {
	return Rotor{
		Unbalance: math.Hypot(real(z), imag(z)) / (omega * omega),
		Angle:     math.Atan2(real(z), -imag(z)), // the argument of i z, for -z/i = i z
	}
}

// TwoPlanes gives two counterweights, in planes at the offsets za and zb along the shaft, that cancel the forward
// parts of primary force and couple together.
//
//	a + b = -force,   za a + zb b = -couple
//
// force [N] and couple [N m] are forward parts of Harmonic with n = 1, za and zb differ [m], omega [rad/s], > 0. With
// backward parts they stand on a shaft that turns the other way: set Reverse.
//
// Source: derived here; by the argument of Counterweight they make the mean squares of both smallest.
func TwoPlanes(force, couple complex128, za, zb, omega float64) (a, b Rotor) {
	d := complex(zb-za, 0)
	a = against((complex(zb, 0)*force-couple)/d, omega)
	b = against((couple-complex(za, 0)*force)/d, omega)
	a.Offset, b.Offset = za, zb
	return a, b
}
