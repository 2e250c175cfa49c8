package gas

import "math"

// At fills s with the properties at T [K] and p [Pa], by the equations of the package comment.
// It computes at any T > 0, p > 0; whether the state is in the checked range, Range tells.
func (g *Gas) At(s *State, T, p float64) {
	x := 1 / T
	y := x * x
	q := 1 / p

	// Virial coefficients z, with zT = T z' and zTT = T^2 z".
	b1, b2, b3 := g.B1*x, g.B2*y, g.B3*x*y
	B := g.B0 + b1 + b2 + b3
	BT := -(b1 + 2*b2 + 3*b3)
	BTT := 2*b1 + 6*b2 + 12*b3

	x3 := x * y
	x5 := x3 * y
	c1, c3, c5 := g.C1*x, g.C3*x3, g.C5*x5
	C := c1 + c3 + c5
	CT := -(c1 + 3*c3 + 5*c5)
	CTT := 2*c1 + 12*c3 + 30*c5

	d3, d5 := g.D3*x3, g.D5*x5
	D := d3 + d5
	DT := -(3*d3 + 5*d5)
	DTT := 12*d3 + 30*d5

	RTq := g.R * T * q
	s.V = RTq + B + p*(C+p*D)
	s.VP = -RTq*q + C + 2*p*D
	TVT := RTq + BT + p*(CT+p*DT)
	s.VT = TVT * x
	s.HP = s.V - TVT
	s.H = g.H0 - g.K2*x +
		T*(g.A0+T*(g.A1*(1.0/2)+T*(g.A2*(1.0/3)+T*(g.A3*(1.0/4)+T*g.A4*(1.0/5))))) +
		p*(B-BT+p*((C-CT)*(1.0/2)+p*(D-DT)*(1.0/3)))
	s.Cp = g.K2*y + g.A0 + T*(g.A1+T*(g.A2+T*(g.A3+T*g.A4))) -
		p*x*(BTT+p*(CTT*(1.0/2)+p*DTT*(1.0/3)))
}

// SoundSpeed gives the speed of sound [m/s] at T [K] and p [Pa]:
//
//	a^2 = -v^2 / (dv/dp)_s,  (dv/dp)_s = dv/dp + T (dv/dT)^2 / cp
//
// Source: [Moran] Maxwell relations; exact for the equation of state in use.
func (g *Gas) SoundSpeed(T, p float64) float64 {
	var s State
	g.At(&s, T, p)
	return s.V / math.Sqrt(-s.VP-T*s.VT*s.VT/s.Cp)
}

// Transport gives the viscosity mu [Pa s] and the conductivity k [W/(m K)] at T [K] and
// density rho [kg/m3], by the form of the package comment.
func (g *Gas) Transport(T, rho float64) (mu, k float64) {
	x := 1 / T
	r := math.Sqrt(T)
	m, c := &g.Viscosity, &g.Conductivity
	mu = m.Y0 + r*(m.M0+x*(m.M1+x*m.M2)+m.M3*T) + rho*(m.E1+rho*m.E2)
	k = c.Y0 + r*(c.M0+x*(c.M1+x*c.M2)+c.M3*T) + rho*(c.E1+rho*c.E2)
	return mu, k
}
