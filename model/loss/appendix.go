package loss

import "math"

// AppendixGap is the annular gap round a hot body, open to the hot space at its hot end and closed by a
// seal at its cold end, in which the pressure swing moves gas to and fro.
type AppendixGap struct {
	Diameter        float64 // mean diameter of the annulus [m]
	Width           float64 // radial gap [m]
	Length          float64 // from hot face to seal [m]
	PressureMean    float64 // time mean of the pressure [Pa]
	PressureRate    float64 // time mean of (dp/dt)^2 [Pa2/s2]; (2 pi f p1)^2/2 for a harmonic of amplitude p1
	Frequency       float64 // cycles per second [Hz]
	HotTemperature  float64 // at the open end [K]
	ColdTemperature float64 // at the seal [K], not above the hot one
	HeatCapacity    float64 // cp of the gas [J/(kg K)]
	Conductivity    float64 // of the gas at its mean temperature [W/(m K)]
	GasConstant     float64 // R of the gas [J/(kg K)]
}

// Loss gives the mean enthalpy flow into the gap, averaged over its length [W].
//
// The walls have a linear profile T(z) from Th at the open end to Tc at the seal. The gas keeps close to
// it, so the pressure swing drives, through each section, the mass flow (positive towards the seal)
//
//	m = (A/R) dp/dt  integral of dz/T from the section to the seal = (A L/(R dT)) dp/dt ln(T/Tc),
//
// A = pi D g, dT = Th - Tc. In a thin gap conduction across it balances both what the flow carries along
// the gradient and the heat of compression, so that with a parabolic velocity profile the mean
// temperature of the flowing gas exceeds the wall's by
//
//	dTm = (17/140) g^2/(k A) cp m dT/L + (1/10) (g^2/k) dp/dt,
//
// (17/140 is the film of Nu = 8.235 on the hydraulic diameter 2 g at both walls; 1/10 the same integral
// for a source spread evenly over the gap). Both parts are in step with m, and cp <m dTm>, averaged over
// the length with s = T/Tc, t = Th/Tc, is
//
//	Q = (g^2 A L <(dp/dt)^2>/k) [ (17/140)(cp/R)^2 <ln^2 s>/dT + (1/10)(cp/R) <ln s>/dT ]
//	<ln s> = (t ln t - t + 1)/(t - 1),   <ln^2 s> = (t (ln^2 t - 2 ln t + 2) - 2)/(t - 1).
//
// The second part stays at dT = 0: it is the work that the gas of the gap turns into heat. In wider gaps
// the gas lags behind; with the lag time of the film, t0 = (17/140) rho cp g^2/k, the part in step with m
// falls by 1 + (2 pi f t0)^2, by which Q is divided.
//
// The motion of the body adds to the enthalpy flow of the gas a part in <y dp/dt>, of first order in g;
// the heat that the sliding wall takes from and returns to the gas carries the opposite amount, so that
// only work, no heat, is left of it. It is left out here; the wall's own share is Shuttle. Left out too are
// parts of the motion of the same order in g as Q: the drag of the sliding wall (with v/U, body velocity
// over mean gas velocity, some 0.1 v/U of the second part) and the gas mass that follows the shift of the
// wall's profile (v dT/(2 L T) over (dp/dt)/p, times the correlation of dy/dt with dp/dt). By estimate they
// move Q by up to a fifth.
//
// Range: g << D and g << L, Lag below 0.5, small swing of pressure, Mach number and friction in the gap
// small.
//
// Accuracy: against an integration across the gap in the tests, for a body at rest, 0.3 % at a Lag of 0.07,
// 1 % at 0.16, 5 % at 0.35 and 10 % at 0.54 (too little); against the published formula of Leo in
// [Martini1983], a factor of 2.5.
//
// Source: derived here.
func (g *AppendixGap) Loss() float64 {
	if g.Width == 0 || g.PressureRate == 0 {
		return 0
	}
	area := math.Pi * g.Diameter * g.Width
	ratio := g.HeatCapacity / g.GasConstant
	// <ln s>/(t-1) and <ln^2 s>/(t-1)^2; both are finite as t goes to 1.
	r1, r2 := logMeans(g.HotTemperature / g.ColdTemperature)
	dT := g.HotTemperature - g.ColdTemperature
	carried := 17.0 / 140 * ratio * ratio * r2 * dT / (g.ColdTemperature * g.ColdTemperature)
	compressed := 0.1 * ratio * r1 / g.ColdTemperature
	lag := g.Lag()
	return g.Width * g.Width * area * g.Length * g.PressureRate / g.Conductivity *
		(carried + compressed) / (1 + lag*lag)
}

// Lag gives the angular frequency times the time that the gas in the gap takes to follow the walls [-].
//
//	2 pi f (17/140) rho cp g^2/k,   rho = p/(R T) at the mean of both end temperatures
func (g *AppendixGap) Lag() float64 {
	rho := g.PressureMean / (g.GasConstant * 0.5 * (g.HotTemperature + g.ColdTemperature))
	return 2 * math.Pi * g.Frequency * 17.0 / 140 * rho * g.HeatCapacity * g.Width * g.Width / g.Conductivity
}

// logMeans gives the means of ln(s)/(t-1) and ln^2(s)/(t-1)^2 for s spread evenly over 1..t [-]; near
// t = 1 from their series, where the closed forms lose their digits.
func logMeans(t float64) (r1, r2 float64) {
	d := t - 1
	if math.Abs(d) < 1e-3 {
		return 0.5 - d/6 + d*d/12, 1.0/3 - d/4 + 11*d*d/60
	}
	a := math.Log(t)
	return (t*a - d) / (d * d), (t*(a*a-2*a+2) - 2) / (d * d * d)
}
