package correlation

import "math"

// TanakaFriction gives the Darcy friction factor of stacked screens in oscillating flow, a second
// opinion on ScreenFriction [-].
//
//	f = 175/Re + 1.6
//
// Re Reynolds number on hydraulic diameter and (in the source, the largest) pore velocity [-],
// 10 < Re < 2000.
//
// Source: [Tanaka1990], from memory.
func TanakaFriction(Re float64) float64 { return 175/Re + 1.6 }

// TanakaNusselt gives the Nusselt number of stacked screens in oscillating flow of air [-].
//
//	Nu = 0.33 Re^0.67
//
// Re as for TanakaFriction (in the source the mean over a cycle), 10 < Re < 2000.
//
// Source: [Tanaka1990], from memory.
func TanakaNusselt(Re float64) float64 { return 0.33 * math.Pow(Re, 0.67) }
