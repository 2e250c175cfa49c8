package heat

import "math"

// Combustion is a fuel burned completely with a given excess of air, per kilogram of fuel: amounts and cached
// polynomials, so that an evaluation of enthalpy or temperature takes no more than some tens of nanoseconds.
// It is filled by Set and then only read.
type Combustion struct {
	ExcessAir          float64 // air over stoichiometric air, lambda [-]
	StoichiometricMass float64 // stoichiometric air per fuel [kg/kg]
	AirMass            float64 // air per fuel [kg/kg]
	GasMass            float64 // flue gas per fuel [kg/kg]
	LowerHeating       float64 // [J/kg]

	products     [speciesCount]float64 // per mass of fuel [mol/kg]
	total        float64               // moles of flue gas [mol/kg]
	gas          mixture
	air          mixture
	fuel         mixture // not set for a liquid or solid
	heatCapacity float64 // of a liquid or solid fuel
	transport    transport
}

// Dry air by mole; the share of carbon dioxide, 0.0004, is left out.
const (
	airN2 = 0.78084
	airO2 = 0.20946
	airAr = 0.00970
)

// excessHigh is far above any flame that burns.
const excessHigh = 100

// Set works out the complete combustion of f with excess-air ratio lambda, 1 to 100. Carbon becomes CO2, hydrogen
// H2O as vapour, nitrogen N2; air is dry.
//
//	O2 needed per kg = C/M(C) + H/(4 M(H)) - O/(2 M(O))     C, H, O shares by mass
//	air = lambda O2 / 0.20946                                 by mole
//
// Derivation: balance of the elements.
func (c *Combustion) Set(f *Fuel, lambda float64) Fault {
	*c = Combustion{}
	if fault := f.Check(); fault != OK {
		return fault
	}
	if !(lambda >= 1) {
		return TooLittleAir
	}
	if !(lambda <= excessHigh) {
		return BadNumber
	}

	// Amounts of the elements [mol/kg]; water and inert parts of the fuel go through.
	var nC, nH, nO, nN, nA, water float64
	var fuel [speciesCount]float64
	if f.isGas() {
		fuel = f.Gas.moles()
		var mass float64
		for s := range speciesCount {
			mass += fuel[s] * s.MolarMass()
		}
		for s := range speciesCount {
			fuel[s] /= mass
			C, H, O, N, A := s.atoms()
			nC, nH, nO, nN, nA = nC+C*fuel[s], nH+H*fuel[s], nO+O*fuel[s], nN+N*fuel[s], nA+A*fuel[s]
		}
		c.fuel.set(&fuel)
	} else {
		nC, nH, nO, nN = f.Carbon/weightC, f.Hydrogen/weightH, f.Oxygen/weightO, f.Nitrogen/weightN
		water = f.Water / H2O.MolarMass()
		c.heatCapacity = f.HeatCapacity
	}
	oxygen := nC + nH/4 - nO/2
	if !(oxygen > 0) {
		return NoBurning
	}

	air := lambda * oxygen / airO2
	airAmounts := [speciesCount]float64{N2: airN2 * air, O2: airO2 * air, Ar: airAr * air}
	c.air.set(&airAmounts)
	c.products = airAmounts
	c.products[CO2] += nC
	c.products[H2O] += nH/2 + water
	c.products[N2] += nN / 2
	c.products[Ar] += nA
	c.products[O2] = (lambda - 1) * oxygen
	c.gas.set(&c.products)

	c.ExcessAir = lambda
	for s := range speciesCount {
		c.AirMass += airAmounts[s] * s.MolarMass()
		c.GasMass += c.products[s] * s.MolarMass()
		c.total += c.products[s]
	}
	c.StoichiometricMass = c.AirMass / lambda
	if fault := c.transport.set(&c.products); fault != OK {
		return fault
	}

	c.LowerHeating = f.LowerHeating
	if c.LowerHeating > 0 {
		return OK
	}
	if !f.isGas() {
		var fault Fault
		c.LowerHeating, fault = EstimateLowerHeating(f)
		if fault == OK && !(c.LowerHeating > 0) {
			return NoHeatingValue
		}
		return fault
	}
	// Enthalpy of fuel and air less that of the products, at 298.15 K.
	for s := range speciesCount {
		h, _ := s.Enthalpy(reference)
		c.LowerHeating += (fuel[s] + airAmounts[s] - c.products[s]) * h
	}
	if !(c.LowerHeating > 0) {
		return NoBurning
	}
	return OK
}

// Product gives the share by mole [-] of a species in the flue gas.
func (c *Combustion) Product(s Species) float64 { return c.products[s] / c.total }

// GasEnthalpy gives the enthalpy of the flue gas above 298.15 K, per mass of fuel [J/kg]. T in 200..6000 K, as in
// the functions below, or the result means nothing; the functions that solve a balance check it.
//
// Source: [McBride1993]
func (c *Combustion) GasEnthalpy(T float64) float64 { return c.gas.enthalpy(T) }

// GasCp gives the heat capacity of the flue gas per mass of fuel [J/(kg K)].
func (c *Combustion) GasCp(T float64) float64 { return c.gas.cp(T) }

// AirEnthalpy gives the enthalpy of the air above 298.15 K, per mass of fuel [J/kg].
func (c *Combustion) AirEnthalpy(T float64) float64 { return c.air.enthalpy(T) }

// AirCp gives the heat capacity of the air per mass of fuel [J/(kg K)].
func (c *Combustion) AirCp(T float64) float64 { return c.air.cp(T) }

// FuelEnthalpy gives the enthalpy of the unburned fuel above 298.15 K [J/kg], for a liquid or solid with a
// constant heat capacity.
func (c *Combustion) FuelEnthalpy(T float64) float64 {
	if c.fuel.ready {
		return c.fuel.enthalpy(T)
	}
	return c.heatCapacity * (T - reference)
}

// GasTemperature gives the temperature [K] of flue gas with an enthalpy h above 298.15 K, per mass of fuel [J/kg].
// Outside 200..6000 K TemperatureRange.
func (c *Combustion) GasTemperature(h float64) (float64, Fault) {
	return c.gas.temperature(h, reference+h/c.gas.cp(nasaCommon))
}

// AirTemperature is GasTemperature for the air.
func (c *Combustion) AirTemperature(h float64) (float64, Fault) {
	return c.air.temperature(h, reference+h/c.air.cp(nasaCommon))
}

// FlameTemperature gives the adiabatic temperature of complete combustion [K], constant pressure:
//
//	h_gas(T) = lower heating value + h_fuel(fuel) + h_air(air)
//
// fuel, air temperatures [K], 200..6000, else TemperatureRange. Above some 2200 K dissociation makes a real flame
// colder: a stoichiometric methane flame by some 100 K.
//
// Derivation: energy balance.
func (c *Combustion) FlameTemperature(fuel, air float64) (float64, Fault) {
	if !(fuel >= nasaLow && fuel <= nasaHigh && air >= nasaLow && air <= nasaHigh) {
		return 0, TemperatureRange
	}
	return c.GasTemperature(c.LowerHeating + c.FuelEnthalpy(fuel) + c.AirEnthalpy(air))
}

// Pressure of the combustion [Pa] for the dew point.
const atmosphere = 101325

// DewPoint gives the temperature [K] below which water condenses from the flue gas at 101325 Pa:
//
//	p = 610.94 Pa exp(17.625 t/(t + 243.04)),  t in degC, p partial pressure of the water
//
// The form is good to 0.4 % on p from -40 to 50 degC, and 2.7 % or 0.8 K off at 100 degC. Acids of
// sulphur, which raise the dew point, are left out. Flue gas without water has a dew point of 0 K.
//
// Source: [Alduchov1996], from memory
func (c *Combustion) DewPoint() float64 { return dewPoint(c.Product(H2O) * atmosphere) }

// dewPoint inverts the vapour pressure p [Pa].
func dewPoint(p float64) float64 {
	if p <= 0 {
		return 0
	}
	x := math.Log(p / 610.94)
	return 273.15 + 243.04*x/(17.625-x)
}
