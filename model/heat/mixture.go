package heat

// mixture holds the polynomials of a gas mixture, summed once over its species, so that an evaluation costs
// no more than one species. Enthalpies are counted from 298.15 K.
type mixture struct {
	low, high [5]float64 // coefficients of cp [J/K, J/K2 ...]
	lowZero   float64    // constant of the enthalpy below 1000 K [J]
	highZero  float64    // above 1000 K [J]
	ready     bool
}

// set sums the polynomials of amounts n [mol]. The constant of the upper range is set so that the enthalpy
// is continuous at 1000 K, where the published sets differ by a few joules per mole: a gap there
// would leave enthalpies without a temperature.
func (m *mixture) set(n *[speciesCount]float64) {
	*m = mixture{ready: true}
	for s := range speciesCount {
		if n[s] == 0 {
			continue
		}
		low, high := s.coefficients()
		for i := range m.low {
			m.low[i] += gasConstant * n[s] * low[i]
			m.high[i] += gasConstant * n[s] * high[i]
		}
	}
	m.lowZero = -integral(&m.low, reference)
	m.highZero = m.lowZero + integral(&m.low, nasaCommon) - integral(&m.high, nasaCommon)
}

func integral(a *[5]float64, T float64) float64 {
	return T * (a[0] + T*(a[1]/2+T*(a[2]/3+T*(a[3]/4+T*a[4]/5))))
}

// cp gives the heat capacity [J/K]; T in 200..6000 K is the caller's care.
func (m *mixture) cp(T float64) float64 {
	a := &m.low
	if T > nasaCommon {
		a = &m.high
	}
	return a[0] + T*(a[1]+T*(a[2]+T*(a[3]+T*a[4])))
}

// enthalpy gives the enthalpy above 298.15 K [J].
func (m *mixture) enthalpy(T float64) float64 {
	if T > nasaCommon {
		return integral(&m.high, T) + m.highZero
	}
	return integral(&m.low, T) + m.lowZero
}

// temperature inverts enthalpy by Newton's method, to rounding; guess is a temperature in range.
func (m *mixture) temperature(h, guess float64) (float64, Fault) {
	if !(h >= m.enthalpy(nasaLow) && h <= m.enthalpy(nasaHigh)) {
		return 0, TemperatureRange
	}
	T := guess
	for range 60 {
		d := (h - m.enthalpy(T)) / m.cp(T)
		T += d
		// The heat capacity is positive and varies by less than a factor of three over the range, so Newton's
		// steps overshoot a little at most; they are kept in the range of the polynomials.
		if T < nasaLow {
			T = nasaLow
		} else if T > nasaHigh {
			T = nasaHigh
		}
		if d < 1e-12*T && d > -1e-12*T {
			return T, OK
		}
	}
	return 0, NoConvergence
}
