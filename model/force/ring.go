package force

import (
	"math"

	"hotfront/model/drive"
)

// RingShaking gives the force along the shaft and the couple across it of a ring of equal bodies, whose axes stand
// parallel to the shaft on a circle round it, driven by a plate: the double-acting machine.
//
//	force = -m omega^2 sum of A(theta - psi),   couple = -m omega^2 R sum of A(theta - psi) (cos psi, sin psi)
//	psi = 2 pi i/n,   i = 0..n-1
//
// m mass of one body [kg], the motion of which is that of the mechanism's first body; n bodies, n >= 1, R radius of the
// circle [m], theta crank angle [rad], omega [rad/s]. Body i stands at the angle psi in the sense of rotation and lags by
// as much. The couple is the sum of force times place across the shaft, so the moment's axis is a quarter turn from it.
//
// Derivation: of A = sum of c_k e^(i k theta) the force keeps the orders k that n divides, the couple those that are 1
// more or less than a multiple of n. With harmonic motion the force is zero for n >= 2.
//
// Source: derived here.
func RingShaking(m *drive.Mechanism, theta, mass, R float64, n int, omega float64) (force float64, couple Vector) {
	var at drive.Motion
	for i := range n {
		psi := 2 * math.Pi * float64(i) / float64(n)
		m.At(&at, theta-psi)
		f := -mass * omega * omega * at.A1
		s, c := math.Sincos(psi)
		force += f
		couple.X += f * R * c
		couple.Y += f * R * s
	}
	return force, couple
}

// RingCouple gives the size of that couple for harmonic motion and n >= 3 [N m]. It is constant and turns with the
// shaft; with n = 2 it does not turn, but swings with twice this size.
//
//	M = n/2 m r omega^2 R
//
// m mass of one body [kg], r half its stroke [m], R radius of the circle [m], omega [rad/s].
//
// Derivation: (cos psi, sin psi) cos(theta - psi) is half of (cos theta, sin theta) and half of a vector at 2 psi - theta,
// which adds up to nothing over the ring unless n = 2 (or 1).
//
// Source: derived here.
func RingCouple(m, r, R float64, n int, omega float64) float64 {
	return 0.5 * float64(n) * m * r * omega * omega * R
}

// RingCounterweights gives what two equal counterweights on the shaft, opposite to each other in two planes, must have to
// cancel the couple of RingCouple: mass times radius times distance of the planes [kg m2]. The upper one, nearer to the
// heads, stands in the direction of the couple of RingShaking. A plate that stands askew, and turns with the shaft, has
// such a product of inertia of its own.
//
//	U d = n/2 m r R
//
// Source: derived here; nothing of the couple is left, n >= 3.
func RingCounterweights(m, r, R float64, n int) float64 { return 0.5 * float64(n) * m * r * R }
