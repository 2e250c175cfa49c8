package correlation

import "math"

// Fast holds the laws of this package as tables, for the inner loop of the solver: the same values as
// the exact functions to 1e-5. It is only read after NewFast, so any number of goroutines may share one.
type Fast struct {
	screenFriction Table // Re^0.897
	fibreFriction  Table // Re^0.933
	londonFriction Table // Re^0.78
	filmPower      Table // x^0.66
	tanakaPower    Table // x^0.67
	londonPower    Table // x^0.6
	dispersion     Table // x^0.62
	twoThirds      Table // x^(2/3)
	petukhov       Table // Petukhov's f(Re)

	frictionLow, frictionHigh float64 // f at both ends of the blend [-]
}

// NewFast builds the tables. It takes about half a millisecond, so once per workspace or process.
func NewFast() *Fast {
	power := func(p float64) func(float64) float64 {
		return func(x float64) float64 { return math.Pow(x, p) }
	}
	f := &Fast{
		frictionLow:  LaminarFriction(LaminarLimit),
		frictionHigh: PetukhovFriction(TurbulentLimit),
	}
	f.screenFriction.Build(power(1 - 0.103))
	f.fibreFriction.Build(power(1 - 0.067))
	f.londonFriction.Build(power(0.78))
	f.filmPower.Build(power(0.66))
	f.tanakaPower.Build(power(0.67))
	f.londonPower.Build(power(0.6))
	f.dispersion.Build(power(0.62))
	f.twoThirds.Build(power(2.0 / 3))
	// The law is singular at Re = 8 and read from 3000 on only; it is held at its value at 2048, an end
	// of a piece, below that.
	f.petukhov.Build(func(x float64) float64 { return PetukhovFriction(max(x, 2048)) })
	return f
}

// TubeFriction is the fast form of TubeFriction.
func (f *Fast) TubeFriction(Re float64) float64 {
	switch {
	case Re <= LaminarLimit:
		return 64 / Re
	case Re >= TurbulentLimit:
		return f.petukhov.At(Re)
	}
	return f.frictionLow + blend(Re)*(f.frictionHigh-f.frictionLow)
}

// TubeFrictionRe is the fast form of TubeFrictionRe: f Re, finite at rest [-].
func (f *Fast) TubeFrictionRe(Re float64) float64 {
	if Re <= LaminarLimit {
		return 64
	}
	return Re * f.TubeFriction(Re)
}

// TubeNusselt is the fast form of TubeNusselt.
func (f *Fast) TubeNusselt(Re, Pr, DoverL float64) float64 {
	switch {
	case Re <= LaminarLimit:
		return f.laminar(Re, Pr, DoverL)
	case Re >= TurbulentLimit:
		return f.turbulent(f.petukhov.At(Re), Re, Pr, DoverL)
	}
	low := f.laminar(LaminarLimit, Pr, DoverL)
	high := f.turbulent(f.frictionHigh, TurbulentLimit, Pr, DoverL)
	return low + blend(Re)*(high-low)
}

func (f *Fast) laminar(Re, Pr, DoverL float64) float64 {
	Gz := Re * Pr * DoverL
	return hausen(Gz, f.twoThirds.At(Gz))
}

func (f *Fast) turbulent(friction, Re, Pr, DoverL float64) float64 {
	return gnielinski(friction, Re, Pr, f.twoThirds.At(Pr), f.twoThirds.At(DoverL))
}

// MatrixFriction is the fast form of MatrixFriction.
func (f *Fast) MatrixFriction(p *Porous, Re float64) float64 { return f.MatrixFrictionRe(p, Re) / Re }

// MatrixFrictionRe is MatrixFriction times Re [-], finite at rest.
func (f *Fast) MatrixFrictionRe(p *Porous, Re float64) float64 {
	switch p.Law {
	case WovenScreen:
		return 129 + 2.91*f.screenFriction.At(Re)
	case RandomFibre:
		return 192 + 4.53*f.fibreFriction.At(Re)
	case Tanaka:
		return 175 + 1.6*Re
	}
	return 216 + 5.72*f.londonFriction.At(Re)
}

// MatrixNusselt is the fast form of MatrixNusselt.
func (f *Fast) MatrixNusselt(p *Porous, Re, Pr float64) float64 {
	switch p.Law {
	case WovenScreen:
		return (1 + 0.99*f.filmPower.At(Re*Pr)) * p.Nusselt
	case RandomFibre:
		return (1 + 1.16*f.filmPower.At(Re*Pr)) * p.Nusselt
	case Tanaka:
		return 0.33 * f.tanakaPower.At(Re)
	}
	return 0.46 * f.londonPower.At(Re)
}

// MatrixDispersion is the fast form of MatrixDispersion.
func (f *Fast) MatrixDispersion(p *Porous, Re, Pr float64) float64 {
	return 0.73 + 0.50*f.dispersion.At(Re*Pr)*p.Dispersion
}
