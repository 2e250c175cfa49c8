package force

import (
	"math"

	"hotfront/model/drive"
)

// RhombicMasses are the moving masses of a rhombic drive.
type RhombicMasses struct {
	Displacer     float64 // with its yoke, rod and the share of the connecting rods that goes with them [kg]
	Piston        float64 // likewise [kg]
	Crank         float64 // unbalance of one crank without counterweight, with the rods' share that turns [kg m]
	Counterweight float64 // on one crank, opposite to the pin [kg m]
	Ahead         float64 // by which it is ahead of that place in the sense of its crank's rotation [rad]
}

// RhombicShaking gives the force by which a rhombic drive shakes its frame, along the cylinder axis, upwards [N].
//
//	F = -omega^2 (m1 A1 + m2 A2) - 2 omega^2 (Uc sin theta - U sin(theta + ahead))
//	m1 A1 + m2 A2 = (m1 + m2) r sin theta + (m2 - m1) d2b/dtheta2
//
// at motion of both bodies at the crank angle theta [rad], m1, m2 masses of displacer and piston, Uc and U unbalance of
// crank and counterweight, b as in package drive, omega [rad/s]. Sideways the two halves are mirror images and cancel;
// so do their moments, for what they exert upwards is alike on both sides. The bodies run on one axis: no couple.
//
// Source: derived here.
func RhombicShaking(at *drive.Motion, theta float64, m *RhombicMasses, omega float64) float64 {
	turning := m.Crank*math.Sin(theta) - m.Counterweight*math.Sin(theta+m.Ahead)
	return -omega * omega * (m.Displacer*at.A1 + m.Piston*at.A2 + 2*turning)
}

// RhombicResidual sets dst, if not nil, to RhombicShaking over a turn and gives the largest size of it.
func RhombicResidual(dst []float64, motion []drive.Motion, theta []float64, m *RhombicMasses, omega float64) Peak {
	var p Peak
	for k, at := range theta {
		f := RhombicShaking(&motion[k], at, m, omega)
		if dst != nil {
			dst[k] = f
		}
		p.take(math.Abs(f), at)
	}
	return p
}

// RhombicCounterweight gives the best counterweight on each crank exactly opposite to its pin, as mass times radius [kg m].
//
//	U = r (m1 + m2)/2 + Uc
//
// r crank radius [m]. With equal masses, U = m r + Uc, it leaves nothing: the balance is exact in all orders.
//
// Derivation: what is left is -omega^2 ((m2 - m1) d2b/dtheta2 + 2 a sin theta), a the unbalance by which U is off. b is the
// same at theta and -theta while the sine changes its sign, so the larger of the two forces has the size of both terms
// together: a = 0 makes the largest force smallest, whatever the harmonics of b, and the mean square too.
//
// Source: derived here.
func RhombicCounterweight(m *RhombicMasses, r float64) float64 {
	return 0.5*r*(m.Displacer+m.Piston) + m.Crank
}

// RhombicTurned gives the counterweights that may stand ahead of the place opposite to the pin, mirrored on the other
// crank, and cancel the primary force of unequal masses: mass times radius [kg m] and the angle ahead [rad].
//
//	2 U omega^2 sin(theta + ahead) = -(a cos theta + b sin theta),   a, b first harmonic of the rest
//
// force shaking force over a turn without counterweights (RhombicShaking) [N], theta, weight as in the package comment,
// omega [rad/s], > 0. It makes the mean square of the force smallest; the higher orders of d2b/dtheta2 stay.
//
// Source: derived here.
func RhombicTurned(force, theta, weight []float64, omega float64) (U, ahead float64) {
	a, b := 0.0, 0.0
	for k, f := range force {
		s, c := math.Sincos(theta[k])
		a += weight[k] * f * c / math.Pi
		b += weight[k] * f * s / math.Pi
	}
	return math.Hypot(a, b) / (2 * omega * omega), math.Atan2(-a, -b)
}
