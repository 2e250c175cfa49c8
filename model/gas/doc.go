// Package gas gives the properties of the working gases: volume, enthalpy and their derivatives
// as functions of temperature and pressure, and the transport properties.
//
// Equation of state, explicit in volume, per kilogram:
//
//	v  = R T/p + B(T) + C(T) p + D(T) p^2
//	B  = b0 + b1/T + b2/T^2 + b3/T^3
//	C  = c1/T + c3/T^3 + c5/T^5
//	D  = d3/T^3 + d5/T^5
//	h  = h0(T) + p (B - T B') + p^2/2 (C - T C') + p^3/3 (D - T D')
//	cp = cp0(T) - T (p B" + p^2/2 C" + p^3/3 D")
//	cp0 = k2/T^2 + a0 + a1 T + a2 T^2 + a3 T^3 + a4 T^4
//
// h0 is the integral of cp0 and zero at 298.15 K. All of it comes from one Gibbs function, so the
// Maxwell relations hold to rounding: dh/dp = v - T dv/dT, cp = dh/dT. C and D vanish as the
// temperature rises, so the form runs into the ideal law and not away from it. At a given pressure the
// series is cut after p^2, and that is what limits it: it is not meant for states near the
// saturation line, which a Stirling engine never sees.
//
// Transport, a dilute part in T and an excess in density:
//
//	mu = sqrt(T) (m0 + m1/T + m2/T^2 + m3 T) + rho (e1 + e2 rho)
//
// and the same form for the conductivity k.
//
// The coefficients of each gas are in a file of its own, with the published correlations to whose
// values they are fitted and the worst errors. Nothing is clamped: At and Transport compute at any
// positive T and p, and Range tells where the result has been checked. Beyond it the forms stay
// physical (v falls with p, rises with T, positive cp) from 225 to 1600 K and up to 300 bar; farther out, such
// as nitrogen at 200 K and 260 bar, they do not, so callers must not let a state wander there.
package gas
