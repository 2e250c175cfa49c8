package loss

import "math"

// GasSpringLoss gives the work lost in a cycle by a gas that is compressed and expanded between walls of constant
// temperature: a buffer space or a gas spring [J]. The work becomes heat to the walls.
//
//	W = pi ((gamma - 1)/gamma) (p1^2/p0) V f(y),   f = (sinh 2y - sin 2y)/(2y (cosh 2y + cos 2y))
//	y = (V/A) sqrt(omega/(2 alpha))
//
// p0 mean pressure and p1 amplitude of its first harmonic [Pa], V mean volume [m3], A area of its walls [m2], omega
// angular frequency [rad/s], alpha = k/(rho cp) thermal diffusivity of the gas at the mean state [m2/s], gamma ratio of
// heat capacities [-]; all > 0, gamma > 1.
//
// Derivation: gas at rest between two walls at the distance 2 V/A. With a small swing of pressure, the same
// everywhere, T' follows rho cp dT'/dt = k d2T'/dx2 + dp/dt with T' = 0 at the walls: the amplitude of its mean is
// p1/(rho cp) (1 - tanh(z)/z), z = (1 + i) y. The volume follows from the mass, V'/V = T'/T - p'/p, and the integral of
// -p' dV' over a cycle is W, with rho cp T = p0 gamma/(gamma - 1) for an ideal gas; f is the imaginary part of
// -tanh(z)/z. f tends to 2 y^2/3 for y << 1 (isothermal) and to 1/(2y) for y >> 1, where only a layer at
// the wall exchanges heat and the space is adiabatic (W = pi/2 (gamma - 1)/gamma p1^2/p0 A sqrt(2 alpha/omega)). It
// is largest, 0.42, at y = 1.13. Each harmonic of the pressure adds a W of its own.
//
// Range: gas that does not flow turbulently, walls of large heat capacity. What streams into the space stirs it and
// raises the loss.
//
// Accuracy: against an integration in the tests, of a gas between walls that the swing itself draws together, with y >= 1
// 0.4 % too little at p1/p0 = 0.1 and 3 % at 0.3; with y = 0.3, where the width of the moment counts, 1.5 % and 13 %. For a
// space that is no slab V/A gives the limit of large y exactly; that of small y is of the right order only.
//
// Source: [Lee1983]; [Kornhauser1993], from memory; derived here.
func GasSpringLoss(p0, p1, V, A, omega, alpha, gamma float64) float64 {
	y := V / A * math.Sqrt(0.5*omega/alpha)
	return math.Pi * (gamma - 1) / gamma * p1 * p1 / p0 * V * layer(y)
}

// layer is f of GasSpringLoss.
func layer(y float64) float64 {
	u := 2 * y
	switch {
	case u > 40: // the circular functions are below rounding, the hyperbolic ones may overflow
		return 1 / u
	case u < 0.2: // the difference of the sines would lose its digits
		v := u * u * u * u
		return u * u / 3 * (1 + v/840*(1+v/7920)) / (math.Cosh(u) + math.Cos(u))
	}
	return (math.Sinh(u) - math.Sin(u)) / (u * (math.Cosh(u) + math.Cos(u)))
}
