package gas

// nitrogen is fitted to values of the published correlations at 250 to 1300 K and up to 200 bar.
// Worst errors against them: density 0.11 %, cp 0.18 %, viscosity 0.25 %, conductivity 0.40 %.
// The correlations are themselves extrapolated above 1000 K.
//
// Source: [Span2000] equation of state, [LemmonTransport2004] viscosity and conductivity
func nitrogen() Gas {
	return Gas{
		Range: Range{TemperatureLow: 250, TemperatureHigh: 1300, PressureHigh: 200e5},
		R:     296.803896,
		B0:    0.0012838818, B1: -0.21445153, B2: -78.773054, B3: 3682.5883,
		C1: 2.7338855e-09, C3: 0.00058706558, C5: -20.207125,
		D3: -1.2732514e-11, D5: 9.5673224e-07,
		K2: -1527018.6, A0: 1189.8797, A1: -0.88412375, A2: 0.0018042593, A3: -1.2383492e-06, A4: 2.9811256e-10,
		Viscosity: Transport{
			M0: 1.3329409e-06, M1: -0.00012180311, M2: 0.0070196592, M3: 9.3145216e-11,
			E1: 1.1078238e-08, E2: 6.5013592e-11,
		},
		Conductivity: Transport{
			M0: 0.001977511, M1: -0.21565551, M2: 13.34842, M3: 2.8860359e-07,
			E1: 3.7823769e-05, E2: 7.9808736e-08,
		},
	}
}
