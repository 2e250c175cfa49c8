package loss

// FrictionPower gives the power lost to seals and bearings, stated as a friction mean effective pressure
// [W].
//
//	P = fmep V f
//
// fmep [Pa], V swept volume of the piston [m3], f cycles per second [Hz].
//
// Source: definition.
func FrictionPower(fmep, V, f float64) float64 { return fmep * V * f }
