package heat

import "math"

// Species is a gas of the combustion.
type Species uint8

const (
	N2 Species = iota
	O2
	Ar
	CO2
	H2O
	CO
	H2
	CH4
	C3H8
	speciesCount
)

const (
	gasConstant = 8.314462618 // molar gas constant [J/(mol K)], exact by the definition of 2019
	reference   = 298.15      // temperature at which enthalpies and heating values are counted [K]

	nasaLow    = 200.0  // range of the polynomials [K]
	nasaCommon = 1000.0 // where the two sets of coefficients meet [K]
	nasaHigh   = 6000.0

	// Atomic weights [kg/mol], as in [McBride1993].
	weightC  = 12.011e-3
	weightH  = 1.00794e-3
	weightO  = 15.9994e-3
	weightN  = 14.00674e-3
	weightAr = 39.948e-3
)

// String gives the chemical formula.
func (s Species) String() string {
	switch s {
	case N2:
		return "N2"
	case O2:
		return "O2"
	case Ar:
		return "Ar"
	case CO2:
		return "CO2"
	case H2O:
		return "H2O"
	case CO:
		return "CO"
	case H2:
		return "H2"
	case CH4:
		return "CH4"
	case C3H8:
		return "C3H8"
	}
	return "unknown"
}

// atoms gives the atoms of carbon, hydrogen, oxygen, nitrogen and argon in a molecule.
func (s Species) atoms() (C, H, O, N, A float64) {
	switch s {
	case N2:
		N = 2
	case O2:
		O = 2
	case Ar:
		A = 1
	case CO2:
		C, O = 1, 2
	case H2O:
		H, O = 2, 1
	case CO:
		C, O = 1, 1
	case H2:
		H = 2
	case CH4:
		C, H = 1, 4
	case C3H8:
		C, H = 3, 8
	}
	return C, H, O, N, A
}

// MolarMass gives the molar mass [kg/mol].
func (s Species) MolarMass() float64 {
	C, H, O, N, A := s.atoms()
	return C*weightC + H*weightH + O*weightO + N*weightN + A*weightAr
}

// Cp gives the molar heat capacity at constant pressure [J/(mol K)] of the ideal gas:
//
//	cp/R = a1 + a2 T + a3 T^2 + a4 T^3 + a5 T^4
//
// T temperature [K], 200 to 6000 (two sets of coefficients, below and above 1000 K), else TemperatureRange.
//
// Source: [McBride1993]
func (s Species) Cp(T float64) (float64, Fault) {
	if !(T >= nasaLow && T <= nasaHigh) {
		return 0, TemperatureRange
	}
	a := s.set(T)
	return gasConstant * nasaCp(&a, T), OK
}

// Enthalpy gives the molar enthalpy [J/mol] with the heat of formation from the elements at 298.15 K:
//
//	h/(R T) = a1 + a2 T/2 + a3 T^2/3 + a4 T^3/4 + a5 T^4/5 + a6/T
//
// T temperature [K], 200 to 6000, else TemperatureRange.
//
// Source: [McBride1993]
func (s Species) Enthalpy(T float64) (float64, Fault) {
	if !(T >= nasaLow && T <= nasaHigh) {
		return 0, TemperatureRange
	}
	a := s.set(T)
	return gasConstant * nasaEnthalpy(&a, T), OK
}

// Entropy gives the molar entropy [J/(mol K)] at 1 bar:
//
//	s/R = a1 ln T + a2 T + a3 T^2/2 + a4 T^3/3 + a5 T^4/4 + a7
//
// T temperature [K], 200 to 6000, else TemperatureRange.
//
// Source: [McBride1993]
func (s Species) Entropy(T float64) (float64, Fault) {
	if !(T >= nasaLow && T <= nasaHigh) {
		return 0, TemperatureRange
	}
	a := s.set(T)
	return gasConstant * (a[0]*math.Log(T) + T*(a[1]+T*(a[2]/2+T*(a[3]/3+T*a[4]/4))) + a[6]), OK
}

// nasaCp gives cp/R [-].
func nasaCp(a *[7]float64, T float64) float64 {
	return a[0] + T*(a[1]+T*(a[2]+T*(a[3]+T*a[4])))
}

// nasaEnthalpy gives h/R [K].
func nasaEnthalpy(a *[7]float64, T float64) float64 {
	return a[5] + T*(a[0]+T*(a[1]/2+T*(a[2]/3+T*(a[3]/4+T*a[4]/5))))
}

// set gives the coefficients that hold at T.
func (s Species) set(T float64) [7]float64 {
	low, high := s.coefficients()
	if T <= nasaCommon {
		return low
	}
	return high
}

// coefficients gives a1 to a7 for 200 to 1000 K and for 1000 to 6000 K, T in K.
//
// Source: [McBride1993], reference elements at 298.15 K
func (s Species) coefficients() (low, high [7]float64) {
	switch s {
	case N2:
		return [7]float64{3.53100528, -0.000123660987, -5.02999437e-07, 2.43530612e-09, -1.40881235e-12, -1046.97628, 2.96747468},
			[7]float64{2.95257626, 0.00139690057, -4.92631691e-07, 7.86010367e-11, -4.60755321e-15, -923.948645, 5.87189252}
	case O2:
		return [7]float64{3.78245636, -0.00299673415, 9.847302e-06, -9.68129508e-09, 3.24372836e-12, -1063.94356, 3.65767573},
			[7]float64{3.66096083, 0.000656365523, -1.41149485e-07, 2.05797658e-11, -1.29913248e-15, -1215.97725, 3.41536184}
	case Ar:
		return [7]float64{2.5, 0.0, 0.0, 0.0, 0.0, -745.375, 4.37967491},
			[7]float64{2.5, 0.0, 0.0, 0.0, 0.0, -745.375, 4.37967491}
	case CO2:
		return [7]float64{2.35677352, 0.00898459677, -7.12356269e-06, 2.45919022e-09, -1.43699548e-13, -48371.9697, 9.90105222},
			[7]float64{4.63659493, 0.00274131991, -9.95828531e-07, 1.60373011e-10, -9.16103468e-15, -49024.9341, -1.93534855}
	case H2O:
		return [7]float64{4.19864056, -0.0020364341, 6.52040211e-06, -5.48797062e-09, 1.77197817e-12, -30293.7267, -0.849032208},
			[7]float64{2.67703787, 0.00297318329, -7.7376969e-07, 9.44336689e-11, -4.26900959e-15, -29885.8938, 6.88255571}
	case CO:
		return [7]float64{3.57953347, -0.00061035368, 1.01681433e-06, 9.07005884e-10, -9.04424499e-13, -14344.086, 3.50840928},
			[7]float64{3.04848583, 0.00135172818, -4.85794075e-07, 7.88536486e-11, -4.69807489e-15, -14266.1171, 6.0170979}
	case H2:
		return [7]float64{2.34433112, 0.00798052075, -1.9478151e-05, 2.01572094e-08, -7.37611761e-12, -917.935173, 0.683010238},
			[7]float64{2.93286579, 0.000826607967, -1.46402335e-07, 1.54100359e-11, -6.88804432e-16, -813.065597, -1.02432887}
	case CH4:
		return [7]float64{5.14987613, -0.0136709788, 4.91800599e-05, -4.84743026e-08, 1.66693956e-11, -10246.6476, -4.64130376},
			[7]float64{1.63552643, 0.0100842795, -3.36916254e-06, 5.34958667e-10, -3.15518833e-14, -10005.6455, 9.99313326}
	case C3H8:
		return [7]float64{4.2110262, 0.00171599803, 7.06183472e-05, -9.19594116e-08, 3.64421372e-11, -14381.2106, 5.60930491},
			[7]float64{6.66789363, 0.0206120214, -7.36553027e-06, 1.18440761e-09, -7.0695321e-14, -16274.8521, -13.1859503}
	}
	panic("heat: unknown species")
}
