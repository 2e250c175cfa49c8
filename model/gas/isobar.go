package gas

// Isobar holds the equations of a gas at one pressure, the terms of each power of temperature added up. It gives what
// At gives to rounding, for many temperatures in a third of the time.
type Isobar struct {
	p, rp float64 // pressure [Pa]; R/p

	v0, v1, v2, v3, v5 float64 // v without the ideal part, coefficients of T^-n [m3 K^n/kg]
	m1, m3, m5         float64 // p dv/dp without the ideal part
	h1, h2, h3, h5     float64 // (h - h0)/p without its constant
	c1, c2, c3, c5     float64 // -(cp - cp0) T/p

	k2, a0, a1, a2, a3, a4, e0 float64 // cp0 and h0

	monatomic bool // cp0 is a0, and nothing goes with T^-5
}

// Set takes the gas at a pressure p [Pa].
func (b *Isobar) Set(g *Gas, p float64) {
	c1, c3, c5 := g.C1*p, g.C3*p, g.C5*p
	d3, d5 := g.D3*p*p, g.D5*p*p
	*b = Isobar{
		p: p, rp: g.R / p,
		v0: g.B0, v1: g.B1 + c1, v2: g.B2, v3: g.B3 + c3 + d3, v5: c5 + d5,
		m1: c1, m3: c3 + 2*d3, m5: c5 + 2*d5,
		h1: 2*g.B1 + c1, h2: 3 * g.B2, h3: 4*g.B3 + 2*c3 + d3*(4.0/3), h5: 3*c5 + 2*d5,
		c1: 2*g.B1 + c1, c2: 6 * g.B2, c3: 12*g.B3 + 6*c3 + 4*d3, c5: 15*c5 + 10*d5,
		k2: g.K2, a0: g.A0, a1: g.A1, a2: g.A2, a3: g.A3, a4: g.A4, e0: g.H0,
		monatomic: g.K2 == 0 && g.A1 == 0 && g.A2 == 0 && g.A3 == 0 && g.A4 == 0 && g.C5 == 0 && g.D5 == 0,
	}
}

// Columns are properties at several temperatures, as in State.
type Columns struct {
	V, VT, VP, H, Cp, HP []float64
}

// At fills the columns with the properties at each T [K]. All must be as long as T.
func (b *Isobar) At(dst *Columns, T []float64) {
	if b.monatomic {
		b.atMonatomic(dst, T)
		return
	}
	n := len(T)
	V, VT, VP, H, Cp, HP := dst.V[:n], dst.VT[:n], dst.VP[:n], dst.H[:n], dst.Cp[:n], dst.HP[:n]
	q := 1 / b.p
	for i, t := range T {
		x := 1 / t
		x2 := x * x
		x3 := x2 * x
		x5 := x3 * x2
		ideal := b.rp * t
		v1, v2, v3, v5 := b.v1*x, b.v2*x2, b.v3*x3, b.v5*x5
		v := (ideal + b.v0) + (v1 + v2) + (v3 + v5)
		tvt := ideal - (v1 + 2*v2) - (3*v3 + 5*v5)
		V[i] = v
		VT[i] = tvt * x
		VP[i] = ((b.m1*x + b.m3*x3) + (b.m5*x5 - ideal)) * q
		HP[i] = v - tvt
		t2 := t * t
		k2, a1, a2, a3, a4 := b.k2*x2, b.a1*t, b.a2*t2, b.a3*(t2*t), b.a4*(t2*t2)
		H[i] = b.e0 + t*((b.a0-k2)+(a1*(1.0/2)+a2*(1.0/3))+(a3*(1.0/4)+a4*(1.0/5))) +
			b.p*((b.v0+b.h1*x)+(b.h2*x2+b.h3*x3)+b.h5*x5)
		Cp[i] = (k2 + b.a0) + (a1 + a2) + (a3 + a4) - b.p*x*((b.c1*x+b.c2*x2)+(b.c3*x3+b.c5*x5))
	}
}

// atMonatomic is At for a gas whose heat capacity and virial coefficients have fewer terms, as helium's.
func (b *Isobar) atMonatomic(dst *Columns, T []float64) {
	n := len(T)
	V, VT, VP, H, Cp, HP := dst.V[:n], dst.VT[:n], dst.VP[:n], dst.H[:n], dst.Cp[:n], dst.HP[:n]
	q := 1 / b.p
	h0 := b.e0 + b.p*b.v0
	for i, t := range T {
		x := 1 / t
		x2 := x * x
		x3 := x2 * x
		ideal := b.rp * t
		v1, v2, v3 := b.v1*x, b.v2*x2, b.v3*x3
		v := (ideal + b.v0) + (v1 + v2) + v3
		tvt := (ideal - v1) - (2*v2 + 3*v3)
		V[i] = v
		VT[i] = tvt * x
		VP[i] = ((b.m1*x + b.m3*x3) - ideal) * q
		HP[i] = v - tvt
		H[i] = h0 + t*b.a0 + b.p*(b.h1*x+(b.h2*x2+b.h3*x3))
		Cp[i] = b.a0 - b.p*x*(b.c1*x+(b.c2*x2+b.c3*x3))
	}
}
