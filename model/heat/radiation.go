package heat

// stefanBoltzmann is the Stefan-Boltzmann constant [W/(m2 K4)].
const stefanBoltzmann = 5.670374419e-8

// EffectiveEmissivity gives the emissivity [-] of the exchange between a flame or gas of emissivity flame and a grey wall of
// emissivity wall that closes round it or faces it as a plane:
//
//	1/e = 1/flame + 1/wall - 1
//
// Both 0..1, else BadShare; 0 if either is 0. A grey gas is assumed, so the flame's emissivity holds for what it
// absorbs as well; flames of gas have 0.1 to 0.3 at this size, sooty ones more (from memory).
//
// Source: [Incropera2007], two-surface enclosures
func EffectiveEmissivity(flame, wall float64) (float64, Fault) {
	if !share(flame) || !share(wall) {
		return 0, BadShare
	}
	if flame == 0 || wall == 0 {
		return 0, OK
	}
	return 1 / (1/flame + 1/wall - 1), OK
}

// Radiation gives the heat flux [W/m2] from gas to wall,
//
//	q = e sigma (Tg^4 - Tw^4)
//
// e effective emissivity [-], Tg, Tw temperatures of gas and wall [K].
//
// Source: [Incropera2007]
func Radiation(e, Tg, Tw float64) float64 { return RadiationConductance(e, Tg, Tw) * (Tg - Tw) }

// RadiationConductance gives the same as a film coefficient on Tg - Tw [W/(m2 K)],
//
//	h = e sigma (Tg^2 + Tw^2) (Tg + Tw)
//
// which is exact and tends to 4 e sigma T^3 for equal temperatures.
func RadiationConductance(e, Tg, Tw float64) float64 {
	return e * stefanBoltzmann * (Tg*Tg + Tw*Tw) * (Tg + Tw)
}
