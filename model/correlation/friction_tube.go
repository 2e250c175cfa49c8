package correlation

// TubeFriction gives the Darcy friction factor in a smooth round tube at any Reynolds number [-]:
// laminar to Re = 2300, Petukhov's law from 3000 on, and between the two a smooth rise from the one end
// value to the other. The value is continuous, the blend monotone.
//
// In a real tube the change is a jump whose place depends on the entry and, in oscillating flow, on the
// frequency; the blend is a choice made here, so that a search sees no step.
//
// Source: [Incropera2007] for both ends; blend: own choice.
func TubeFriction(Re float64) float64 {
	switch {
	case Re <= LaminarLimit:
		return LaminarFriction(Re)
	case Re >= TurbulentLimit:
		return PetukhovFriction(Re)
	}
	low, high := LaminarFriction(LaminarLimit), PetukhovFriction(TurbulentLimit)
	return low + blend(Re)*(high-low)
}

// TubeFrictionRe gives TubeFriction times Re [-], which stays finite (64) as the flow comes to rest.
func TubeFrictionRe(Re float64) float64 {
	if Re <= LaminarLimit {
		return 64
	}
	return Re * TubeFriction(Re)
}

// blend rises from 0 at the laminar to 1 at the turbulent limit, with no slope at either end.
func blend(Re float64) float64 {
	s := (Re - LaminarLimit) / (TurbulentLimit - LaminarLimit)
	return s * s * (3 - 2*s)
}
