package heat

import "math"

// Range of the transport properties [K].
const (
	transportLow  = 300.0
	transportHigh = 5000.0
	transportFit  = 8 // coefficients of the polynomial of a mixture
)

// transportSpecies are those that complete combustion leaves: N2, O2, Ar, CO2 and H2O, the first constants.
const transportSpecies = H2O + 1

// viscosityFit gives A, B, C, D below and above the temperature common, of
//
//	ln(mu/0.1 uPa s) = A ln T + B/T + C/T^2 + D        T in K
//
// and conductivityFit those of ln(k/(1e-4 W/(m K))). Range 300 to 5000 K (water from 373 K, taken down to 300 K
// here, where its share is low).
//
// Source: [McBride1993] and later sets of its authors, coefficients from memory. Both halves meet within 1e-6 at the common
// temperature (conductivity of CO2: 0.3 %), and the tests compare with other tables
func (s Species) viscosityFit() (low, high [4]float64, common float64) {
	switch s {
	case N2:
		return [4]float64{0.62526577, -31.779652, -1640.7983, 1.7454992}, [4]float64{0.87395209, 561.52222, -173948.09, -0.39335958}, 1000
	case O2:
		return [4]float64{0.60916180, -52.244847, -599.74009, 2.0410801}, [4]float64{0.72216486, 175.50839, -57974.816, 1.0901044}, 1000
	case Ar:
		return [4]float64{0.61205763, -67.714354, 190.40660, 2.1588272}, [4]float64{0.69357334, 70.953943, -28386.007, 1.4856447}, 1000
	case CO2:
		return [4]float64{0.51137258, -229.51321, 13710.678, 2.7075538}, [4]float64{0.63978285, -42.637076, -15522.605, 1.6628843}, 1000
	case H2O:
		return [4]float64{0.50019557, -697.12796, 88163.892, 3.0836508}, [4]float64{0.58988538, -537.69814, 54263.513, 2.3386375}, 1073.2
	}
	panic("heat: no transport properties of this species")
}

func (s Species) conductivityFit() (low, high [4]float64, common float64) {
	switch s {
	case N2:
		return [4]float64{0.85372829, 105.18665, -12299.753, 0.48299104}, [4]float64{0.88506520, 134.69656, -11386.420, 0.23610008}, 1000
	case O2:
		return [4]float64{0.77238828, 6.9293259, -5900.8518, 1.2202965}, [4]float64{0.90875998, 289.86028, -79180.433, 0.068622859}, 1000
	case Ar:
		return [4]float64{0.60968928, -70.892249, 584.20624, 1.9337152}, [4]float64{0.69075463, 62.676058, -25667.413, 1.2664189}, 1000
	case CO2:
		return [4]float64{0.53726173, -499.28331, 37397.504, 3.2903619}, [4]float64{0.66068182, -127.41845, -81580.328, 2.1817907}, 1000
	case H2O:
		return [4]float64{1.0966389, -555.13429, 106234.08, -0.24664550}, [4]float64{0.39367933, -2252.4226, 612174.58, 5.8011317}, 1073.2
	}
	panic("heat: no transport properties of this species")
}

// viscosity gives the viscosity of a species [Pa s], conductivity its conductivity [W/(m K)]; T in 300..5000 K.
func (s Species) viscosity(T float64) float64 {
	low, high, common := s.viscosityFit()
	return 1e-7 * transportForm(&low, &high, common, T)
}

func (s Species) conductivity(T float64) float64 {
	low, high, common := s.conductivityFit()
	return 1e-4 * transportForm(&low, &high, common, T)
}

func transportForm(low, high *[4]float64, common, T float64) float64 {
	a := low
	if T > common {
		a = high
	}
	return math.Exp(a[0]*math.Log(T) + (a[1]+a[2]/T)/T + a[3])
}

// mixtureTransport gives viscosity [Pa s] and conductivity [W/(m K)] of a mixture of amounts n:
//
//	mu    = sum_i x_i mu_i / sum_j x_j phi_ij,     k likewise with k_i
//	phi_ij = (1 + (mu_i/mu_j)^1/2 (M_j/M_i)^1/4)^2 / (8 (1 + M_i/M_j))^1/2
//
// Accuracy some 2 % (viscosity) and 5 % (conductivity).
//
// Source: [Wilke1950] for the viscosity, [MasonSaxena1958] for the conductivity, from memory
func mixtureTransport(n *[speciesCount]float64, T float64) (mu, k float64) {
	var m [transportSpecies]float64
	for i := range transportSpecies {
		m[i] = i.viscosity(T)
	}
	for i := range transportSpecies {
		if n[i] == 0 {
			continue
		}
		var sum float64
		for j := range transportSpecies {
			ratio := i.MolarMass() / j.MolarMass()
			a := 1 + math.Sqrt(m[i]/m[j]/math.Sqrt(ratio))
			sum += n[j] * a * a / math.Sqrt(8*(1+ratio))
		}
		mu += n[i] * m[i] / sum
		k += n[i] * i.conductivity(T) / sum
	}
	return mu, k
}

// transport holds the logarithms of viscosity and conductivity of one mixture as polynomials in ln T (Newton's form
// on Chebyshev nodes), within 0.3 % of mixtureTransport.
type transport struct {
	node  [transportFit]float64
	mu, k [transportFit]float64
}

func (t *transport) set(n *[speciesCount]float64) Fault {
	lo, hi := math.Log(transportLow), math.Log(transportHigh)
	for i := range t.node {
		t.node[i] = (lo+hi)/2 + (hi-lo)/2*math.Cos(math.Pi*(float64(i)+0.5)/transportFit)
		mu, k := mixtureTransport(n, math.Exp(t.node[i]))
		t.mu[i], t.k[i] = math.Log(mu), math.Log(k)
		if !finite(t.mu[i]) || !finite(t.k[i]) {
			return BadNumber
		}
	}
	for d := 1; d < transportFit; d++ {
		for i := transportFit - 1; i >= d; i-- {
			dx := t.node[i] - t.node[i-d]
			t.mu[i] = (t.mu[i] - t.mu[i-1]) / dx
			t.k[i] = (t.k[i] - t.k[i-1]) / dx
		}
	}

	return OK
}

// at gives viscosity [Pa s] and conductivity [W/(m K)].
func (t *transport) at(T float64) (mu, k float64) {
	x := math.Log(T)
	a, b := t.mu[transportFit-1], t.k[transportFit-1]
	for i := transportFit - 2; i >= 0; i-- {
		d := x - t.node[i]
		a = a*d + t.mu[i]
		b = b*d + t.k[i]
	}
	return math.Exp(a), math.Exp(b)
}

// GasTransport gives viscosity [Pa s], conductivity [W/(m K)] and Prandtl number [-] of the flue gas at
// T in 300..5000 K, else TemperatureRange. Accuracy of a mixture some 2 % (viscosity) and 5 % (conductivity).
//
// Source: [McBride1993], [Wilke1950], [MasonSaxena1958], from memory
func (c *Combustion) GasTransport(T float64) (mu, k, Pr float64, fault Fault) {
	if !(T >= transportLow && T <= transportHigh) {
		return 0, 0, 0, TemperatureRange
	}
	mu, k = c.transport.at(T)
	return mu, k, mu * c.gas.cp(T) / (c.GasMass * k), OK
}

// prandtl gives the Prandtl number of the flue gas without a check of the range.
func (c *Combustion) prandtl(T float64) float64 {
	mu, k := c.transport.at(T)
	return mu * c.gas.cp(T) / (c.GasMass * k)
}
