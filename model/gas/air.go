package gas

// air (dry, undissociated) is fitted to values of the published correlations at 250 to 1300 K and up to
// 200 bar. Worst errors against them: density 0.11 %, cp 0.20 %, viscosity 0.50 %, conductivity 0.45 %.
//
// Source: [LemmonAir2000] equation of state, [LemmonTransport2004] viscosity and conductivity
func air() Gas {
	return Gas{
		Range: Range{TemperatureLow: 250, TemperatureHigh: 1300, PressureHigh: 200e5},
		R:     287.049127,
		B0:    0.0011576717, B1: -0.21171091, B2: -76.156598, B3: 3628.2255,
		C1: 3.1777863e-09, C3: 0.00052450087, C5: -23.155317,
		D3: -1.4285465e-11, D5: 1.1946043e-06,
		K2: -264757.27, A0: 1077.4568, A1: -0.5732383, A2: 0.0014157236, A3: -1.04033e-06, A4: 2.6245152e-10,
		Viscosity: Transport{
			M0: 1.4147154e-06, M1: -0.00013918452, M2: 0.0083170633, M3: 8.5919467e-11,
			E1: 1.2483782e-08, E2: 4.7760128e-11,
		},
		Conductivity: Transport{
			M0: 0.002004412, M1: -0.22421896, M2: 14.429118, M3: 3.4052124e-07,
			E1: 3.0885738e-05, E2: 8.3729934e-08,
		},
	}
}
