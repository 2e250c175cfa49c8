package correlation

import "math"

// KaysLondonFriction gives the Darcy friction factor of stacked screens in steady flow, a second opinion
// on ScreenFriction [-]; fitted as a Fanning factor, of which it is four times.
//
//	f = 4 (54 + 1.43 Re^0.78)/Re
//
// Re Reynolds number on hydraulic diameter and pore velocity [-], about 5 < Re < 1000.
//
// Source: data of [Kays1984], fit of [Urieli1984], from memory.
func KaysLondonFriction(Re float64) float64 { return 4 * (54 + 1.43*math.Pow(Re, 0.78)) / Re }

// KaysLondonNusselt gives the Nusselt number of stacked screens in steady flow of air [-].
//
//	Nu = St Re Pr = 0.46 Re^0.6,   St = 0.46 Re^-0.4/Pr
//
// Re as for KaysLondonFriction.
//
// Source: data of [Kays1984], fit of [Urieli1984], from memory.
func KaysLondonNusselt(Re float64) float64 { return 0.46 * math.Pow(Re, 0.6) }
