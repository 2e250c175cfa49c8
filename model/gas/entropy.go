package gas

import "math"

// Entropy gives the specific entropy [J/(kg K)] at T [K] and p [Pa], up to a constant:
//
//	s = integral of cp0 dT/T - R ln p - integral from 0 to p of (dv/dT - R/p) dp
//
// It belongs to the equation of state exactly: ds/dT = cp/T and ds/dp = -dv/dT, as the tests show.
func (g *Gas) Entropy(T, p float64) float64 {
	x := 1 / T
	x2 := x * x
	s := -g.K2*x2*(1.0/2) + g.A0*math.Log(T) + T*(g.A1+T*(g.A2*(1.0/2)+T*(g.A3*(1.0/3)+T*g.A4*(1.0/4)))) - g.R*math.Log(p)
	// A term K T^-n p^m of v gives n K T^(-n-1) p^(m+1)/(m+1).
	s += p * x2 * (g.B1 + x*(2*g.B2+x*3*g.B3))
	s += p * p * x2 * (g.C1 + x2*(3*g.C3+x2*5*g.C5)) * (1.0 / 2)
	s += p * p * p * x2 * x2 * (3*g.D3 + x2*5*g.D5) * (1.0 / 3)
	return s
}
