package gas

func helium() Gas {
	return Gas{
		Range: Range{TemperatureLow: 250, TemperatureHigh: 1300, PressureHigh: 200e5},
		R:     2077.26439,
		B0:    0.0019409155, B1: 0.62639333, B2: -131.44786, B3: 10127.151,
		C1: -1.131924e-09, C3: 2.3096478e-05,
		A0:           5193.161,
		Viscosity:    Transport{M0: 1.3159897e-06, M1: -0.00010292865, M2: 0.0093939552, M3: 2.4035363e-10, E1: 2.2712191e-08, E2: -1.2887936e-11},
		Conductivity: Transport{M0: 0.010600206, M1: -0.93540132, M2: 89.533996, M3: 1.6962568e-06, E1: 0.00064432589, E2: -1.0505532e-05},
	}
}
