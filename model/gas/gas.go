package gas

import "math"

// Kind names a working gas.
type Kind uint8

const (
	Hydrogen Kind = iota
	Helium
	Nitrogen
	Air

	perfect Kind = 0xff // of Perfect; New does not know it
)

// Kinds returns every gas, in the order of their constants.
func Kinds() []Kind { return []Kind{Hydrogen, Helium, Nitrogen, Air} }

// String returns the name that study files use.
func (k Kind) String() string {
	switch k {
	case Hydrogen:
		return "hydrogen"
	case Helium:
		return "helium"
	case Nitrogen:
		return "nitrogen"
	case Air:
		return "air"
	case perfect:
		return "perfect gas"
	}
	return "unknown gas"
}

// Range is where the properties have been checked against their sources.
type Range struct {
	TemperatureLow  float64 // [K]
	TemperatureHigh float64 // [K]
	PressureHigh    float64 // [Pa]; from the dilute limit up to this
}

// Contains tells whether a state lies in the range.
func (r Range) Contains(T, p float64) bool {
	return T >= r.TemperatureLow && T <= r.TemperatureHigh && p > 0 && p <= r.PressureHigh
}

// Gas holds the coefficients of one gas. The forms are in the package comment.
type Gas struct {
	Kind  Kind
	R     float64 // gas constant [J/(kg K)]
	Range Range

	B0 float64 // second virial coefficient, constant part [m3/kg]
	B1 float64 // [m3 K/kg]
	B2 float64 // [m3 K2/kg]
	B3 float64 // [m3 K3/kg]
	C1 float64 // [m3 K/(kg Pa)]
	C3 float64 // [m3 K3/(kg Pa)]
	C5 float64 // [m3 K5/(kg Pa)]
	D3 float64 // [m3 K3/(kg Pa2)]
	D5 float64 // [m3 K5/(kg Pa2)]

	K2 float64 // cp0, part in 1/T^2 [J K/kg]
	A0 float64 // cp0 [J/(kg K)]
	A1 float64 // cp0 [J/(kg K2)]
	A2 float64 // cp0 [J/(kg K3)]
	A3 float64 // cp0 [J/(kg K4)]
	A4 float64 // cp0 [J/(kg K5)]
	H0 float64 // added to the integral of cp0 so that h0(298.15 K) = 0 [J/kg]

	Viscosity    Transport // gives Pa s
	Conductivity Transport // gives W/(m K)
}

// Transport holds the coefficients of a transport property y:
//
//	y = Y0 + sqrt(T) (M0 + M1/T + M2/T^2 + M3 T) + rho (E1 + E2 rho)
type Transport struct {
	M0 float64 // [unit of y / K^0.5]
	M1 float64 // [unit of y * K^0.5]
	M2 float64 // [unit of y * K^1.5]
	M3 float64 // [unit of y / K^1.5]
	E1 float64 // [unit of y * m3/kg]
	E2 float64 // [unit of y * m6/kg2]
	Y0 float64 // constant part, zero for the real gases [unit of y]
}

// State is what At computes.
type State struct {
	V  float64 // specific volume [m3/kg]
	VT float64 // dv/dT at constant p [m3/(kg K)]
	VP float64 // dv/dp at constant T [m3/(kg Pa)], < 0
	H  float64 // specific enthalpy, 0 at 298.15 K and p -> 0 [J/kg]
	Cp float64 // dh/dT at constant p [J/(kg K)]
	HP float64 // dh/dp at constant T = v - T dv/dT [m3/kg]
}

// referenceTemperature is where the enthalpy of the dilute gas is zero [K].
const referenceTemperature = 298.15

// New returns the properties of a gas. It panics on a kind that is none of Kinds.
func New(k Kind) Gas {
	var g Gas
	switch k {
	case Hydrogen:
		g = hydrogen()
	case Helium:
		g = helium()
	case Nitrogen:
		g = nitrogen()
	case Air:
		g = air()
	default:
		panic("gas: unknown kind")
	}
	g.Kind = k
	g.H0 = -g.enthalpyIntegral(referenceTemperature)
	return g
}

// Perfect returns a gas with constant specific heat, ideal density and constant transport
// properties, for comparison with closed-form results.
//
// R gas constant [J/(kg K)], gamma ratio of the specific heats [-], mu viscosity [Pa s],
// k conductivity [W/(m K)]. Its Kind is none of Kinds.
func Perfect(R, gamma, mu, k float64) Gas {
	g := Gas{Kind: perfect, R: R, A0: R * gamma / (gamma - 1)}
	g.Range = Range{TemperatureLow: 0, TemperatureHigh: math.Inf(1), PressureHigh: math.Inf(1)}
	g.H0 = -g.enthalpyIntegral(referenceTemperature)
	g.Viscosity.Y0 = mu
	g.Conductivity.Y0 = k
	return g
}

// enthalpyIntegral is the integral of cp0 without its constant [J/kg].
func (g *Gas) enthalpyIntegral(T float64) float64 {
	return -g.K2/T + T*(g.A0+T*(g.A1*(1.0/2)+T*(g.A2*(1.0/3)+T*(g.A3*(1.0/4)+T*g.A4*(1.0/5)))))
}
