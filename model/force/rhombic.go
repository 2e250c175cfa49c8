package force

import "math"

// RhombicLoad is what the axial forces of both bodies do in one half of a rhombic drive; the other half is its
// mirror image.
type RhombicLoad struct {
	Rod1 float64 // pull along each rod of the displacer's yoke, negative for push [N]
	Rod2 float64 // pull along each rod of the piston's yoke [N]
	Pin  Pin     // force of both rods on the crank pin they share
}

// Rhombic gives the forces in one half of a rhombic drive with massless rods.
//
// A pin stands at x = e - r cos theta from the cylinder axis, both yokes at the height b = sqrt(L^2 - x^2) below
// and above it (package drive). Each of the two rods of a yoke carries half of its axial force, and both
// rods of one side act on one pin:
//
//	rod of displacer = -P1 L/(2 b),   rod of piston = P2 L/(2 b)
//	force on the pin: sideways away from the axis (P1 - P2) x/(2 b), upwards (P1 + P2)/2
//	tangential =  (P1 - P2) x/(2 b) sin theta - (P1 + P2)/2 cos theta
//	radial     = -(P1 - P2) x/(2 b) cos theta - (P1 + P2)/2 sin theta
//
// P1 axial force of the displacer, P2 of the piston, upwards [N], r crank radius, L rod, e eccentricity [m], theta
// crank angle [rad]. Twice tangential times r is P1 V1 + P2 V2, as virtual work has it. The sideways forces of the two
// rods of a yoke cancel: the bodies do not press on their cylinders. The gears that hold both shafts together
// carry half of the torque where one shaft alone drives the load; their forces are left out.
//
// Source: derived here.
func Rhombic(P1, P2, r, L, e, theta float64) RhombicLoad {
	s, c := math.Sincos(theta)
	x := e - r*c
	b := math.Sqrt(L*L - x*x)
	side, up := 0.5*(P1-P2)*x/b, 0.5*(P1+P2)
	return RhombicLoad{
		Rod1: -0.5 * P1 * L / b,
		Rod2: 0.5 * P2 * L / b,
		Pin:  Pin{Radial: -side*c - up*s, Tangential: side*s - up*c},
	}
}
