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

// TubeFilm is what TubeNusselt takes from Prandtl number and shape alone, worked out once.
type TubeFilm struct {
	graetz  float64 // Graetz number over Re [-]
	prandtl float64
	slope   float64 // 12.7 (Pr^(2/3) - 1)
	entry   float64 // 1 + (D/L)^(2/3)
	low     float64 // Nu at the laminar end of the blend
	rise    float64 // from there to the turbulent end
}

// NewTubeFilm sets up TubeNusselt for a Prandtl number and a diameter over a length.
func (f *Fast) NewTubeFilm(Pr, DoverL float64) TubeFilm {
	t := TubeFilm{graetz: Pr * DoverL, prandtl: Pr, slope: 12.7 * (f.twoThirds.At(Pr) - 1), entry: 1 + f.twoThirds.At(DoverL)}
	t.low = f.laminar(&t, LaminarLimit)
	t.rise = t.turbulent(f.frictionHigh, TurbulentLimit) - t.low
	return t
}

// TubeNusselt is the fast form of TubeNusselt.
func (f *Fast) TubeNusselt(t *TubeFilm, Re float64) float64 {
	switch {
	case Re <= LaminarLimit:
		return f.laminar(t, Re)
	case Re >= TurbulentLimit:
		return t.turbulent(f.petukhov.At(Re), Re)
	}
	return t.low + blend(Re)*t.rise
}

func (f *Fast) laminar(t *TubeFilm, Re float64) float64 {
	Gz := Re * t.graetz
	return hausen(Gz, f.twoThirds.At(Gz))
}

func (t *TubeFilm) turbulent(friction, Re float64) float64 {
	f8 := 0.125 * friction
	return f8 * (Re - 1000) * t.prandtl * t.entry / (1 + t.slope*math.Sqrt(f8))
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
