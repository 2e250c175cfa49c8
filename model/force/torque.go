package force

import "hotfront/model/drive"

// Transmitted gives the axial force that a body hands on to the drive [N].
//
//	P = F - m omega^2 A
//
// F force of the gas on the body, upwards [N], m mass that goes up and down (with a connecting rod, its share at
// the body's end) [kg], omega [rad/s], A second derivative of the position by crank angle [m/rad2].
//
// Source: derived here, Newton's second law for the body.
func Transmitted(F, m, omega, A float64) float64 { return F - m*omega*omega*A }

// InertiaTorque gives the torque of the inertia of both bodies on the shaft at one instant [N m].
//
//	T = -omega^2 (m1 A1 V1 + m2 A2 V2)
//
// at motion of the bodies, m1 and m2 their masses [kg], omega [rad/s]. It is the derivative of -omega^2 (m1 V1^2 +
// m2 V2^2)/2 by the crank angle, and so does no work over a turn; it adds to the torque of the gas that a
// flywheel is to even out.
//
// Source: derived here, virtual work.
func InertiaTorque(at *drive.Motion, m1, m2, omega float64) float64 {
	return -omega * omega * (m1*at.A1*at.V1 + m2*at.A2*at.V2)
}

// Torque sets dst to the torque of both bodies on the shaft [N m].
//
//	T = P1 V1 + P2 V2,   P = F - m omega^2 A
//
// motion of the bodies, F1 and F2 gas forces on them, upwards [N], m1 and m2 their masses [kg], omega [rad/s]. The
// integral of T over a turn is the work that the gas gives to the bodies; the part of inertia
// (InertiaTorque) adds nothing to it. dst may be F1 or F2.
//
// Source: derived here, virtual work: what the axial force does on a path V dtheta the torque does on dtheta.
func Torque(dst []float64, motion []drive.Motion, F1, F2 []float64, m1, m2, omega float64) {
	for k := range motion {
		m := &motion[k]
		dst[k] = F1[k]*m.V1 + F2[k]*m.V2 + InertiaTorque(m, m1, m2, omega)
	}
}

// Work gives the work of a torque over one turn [J], the sum of weight [rad] times torque [N m].
func Work(weight, torque []float64) float64 {
	sum := 0.0
	for k, t := range torque {
		sum += weight[k] * t
	}
	return sum
}
