package force

import "math"

// Slider is what the axial force of one body does in its crank drive.
type Slider struct {
	Rod  float64 // pull along the connecting rod, negative for push [N]
	Side float64 // thrust of the body on its cylinder, towards the side on which the pin passes upwards (x) [N]
	Pin  Pin     // force of the rod on the crank pin
}

// SliderCrank gives the forces in an in-line crank drive with a massless connecting rod.
//
//	sin phi = (r/L) sin alpha
//	rod = P/cos phi,   side thrust = P tan phi
//	tangential =  P (sin alpha - tan phi cos alpha)
//	radial     = -P (cos alpha + tan phi sin alpha)
//
// P axial force, upwards [N], r crank radius, L rod [m], L > r, alpha crank angle of the body, 0 at its lowest
// position [rad]. tangential times r is P V, as virtual work has it. The share of the rod's mass that turns with
// the pin adds Turning to the pin, its other share belongs to the body; what the two masses leave out, the rod's
// moment of inertia being less than theirs by some percent, is left out.
//
// Source: derived here, balance of body and rod; [KhurmiGupta2005], chapter on inertia forces, from memory.
func SliderCrank(P, r, L, alpha float64) Slider {
	s, c := math.Sincos(alpha)
	rs := r * s
	q := math.Sqrt(L*L - rs*rs) // L cos phi
	t := rs / q
	return Slider{Rod: P * L / q, Side: P * t, Pin: Pin{Radial: -P * (c + t*s), Tangential: P * (s - t*c)}}
}
