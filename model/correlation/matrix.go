package correlation

import "math"

// Matrix names a law for porous matrices.
type Matrix uint8

const (
	WovenScreen Matrix = iota // Gedeon and Wood, screens
	RandomFibre               // Gedeon and Wood, felts
	Tanaka                    // second opinion on screens, oscillating flow
	KaysLondon                // second opinion on screens, steady flow
)

// MatrixFriction gives the Darcy friction factor of a matrix [-].
func MatrixFriction(m Matrix, Re float64) float64 {
	switch m {
	case WovenScreen:
		return ScreenFriction(Re)
	case RandomFibre:
		return FibreFriction(Re)
	case Tanaka:
		return TanakaFriction(Re)
	case KaysLondon:
		return KaysLondonFriction(Re)
	}
	panic("correlation: friction of an unknown matrix")
}

// MatrixNusselt gives the Nusselt number of a matrix [-].
func MatrixNusselt(m Matrix, Re, Pr, eps float64) float64 {
	switch m {
	case WovenScreen:
		return ScreenNusselt(Re*Pr, eps)
	case RandomFibre:
		return FibreNusselt(Re*Pr, eps)
	case Tanaka:
		return TanakaNusselt(Re)
	case KaysLondon:
		return KaysLondonNusselt(Re)
	}
	panic("correlation: Nusselt number of an unknown matrix")
}

// MatrixDispersion gives the axial conductivity of the gas in a matrix over the molecular one [-]; the
// second opinions have no law of their own and take the screens'.
func MatrixDispersion(m Matrix, Re, Pr, eps float64) float64 {
	if m == RandomFibre {
		return FibreDispersion(Re*Pr, eps)
	}
	return ScreenDispersion(Re*Pr, eps)
}

// MatrixRange tells whether Re and porosity are inside the range of the law.
func MatrixRange(m Matrix, Re, eps float64) bool {
	switch m {
	case RandomFibre:
		return FibreRange(Re, eps)
	case Tanaka:
		return Re >= 10 && Re <= 2000
	case KaysLondon:
		return Re >= 5 && Re <= 1000
	}
	return ScreenRange(Re, eps)
}

// Porous is a matrix law at one porosity, its powers taken once, for the inner loop.
type Porous struct {
	Law        Matrix
	Nusselt    float64 // factor eps^1.79 or eps^2.61 of the Nusselt number [-]
	Dispersion float64 // factor eps^-2.91 of the dispersion [-]
}

// NewPorous takes the powers of the porosity eps [-].
func NewPorous(m Matrix, eps float64) Porous {
	p := Porous{Law: m, Nusselt: 1, Dispersion: math.Pow(eps, -2.91)}
	switch m {
	case WovenScreen:
		p.Nusselt = math.Pow(eps, 1.79)
	case RandomFibre:
		p.Nusselt = math.Pow(eps, 2.61)
	}
	return p
}
