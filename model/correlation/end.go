package correlation

// EndLoss gives the pressure loss of an entry, exit, bend or duct [Pa].
//
//	dp = K rho u^2/2
//
// K sum of loss coefficients [-], rho density [kg/m3], u velocity in the area that K refers to [m/s].
//
// Source: [Incropera2007]; definition of the loss coefficient.
func EndLoss(K, rho, u float64) float64 { return 0.5 * K * rho * u * u }
