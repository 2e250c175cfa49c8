package gas

// hydrogen (normal, 75 % ortho) is fitted to values of the published correlations at 250 to 1300 K
// and up to 200 bar. Worst errors against them: density 0.09 %, cp 0.09 %, viscosity 0.4 %,
// conductivity 0.7 % (the last two at 250 K). The correlations are themselves extrapolated above 1000 K.
//
// Source: [Leachman2009] equation of state, [Muzny2013] viscosity, [Assael2011] conductivity
func hydrogen() Gas {
	return Gas{
		Range: Range{TemperatureLow: 250, TemperatureHigh: 1300, PressureHigh: 200e5},
		R:     4124.48757,
		B0:    0.0072936799, B1: 1.3110844, B2: -563.59107, B3: 45018.255,
		C1: -3.5342488e-09, C3: 0.0020550117, C5: -48.40917,
		D3: -4.1670783e-11, D5: 1.3632339e-06,
		K2: -82558709, A0: 16633.353, A1: -6.835738, A2: 0.0080693446, A3: -3.3549536e-06, A4: 5.6751497e-10,
		Viscosity: Transport{
			M0: 6.024742e-07, M1: -4.9470618e-05, M2: 0.0044650072, M3: 9.6398312e-11,
			E1: 2.1792091e-09, E2: 1.4921092e-09,
		},
		Conductivity: Transport{
			M0: 0.008877677, M1: 0.60394086, M2: -152.20968, M3: 5.2938898e-06,
			E1: 0.0013672223, E2: -1.9919191e-05,
		},
	}
}
