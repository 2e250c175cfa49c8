package heat

import "math"

// FuelKind names a fuel.
type FuelKind uint8

const (
	Methane FuelKind = iota
	Propane
	Diesel
	WoodGas
	WoodPellets
	Hydrogen
	GivenFuel // composition and heating value given by the user
	fuelCount
)

// FuelKinds returns every kind, in the order of the constants.
func FuelKinds() []FuelKind {
	all := make([]FuelKind, fuelCount)
	for i := range all {
		all[i] = FuelKind(i)
	}
	return all
}

// String returns the name that study files use.
func (k FuelKind) String() string {
	switch k {
	case Methane:
		return "methane"
	case Propane:
		return "propane"
	case Diesel:
		return "diesel"
	case WoodGas:
		return "wood-gas"
	case WoodPellets:
		return "wood-pellets"
	case Hydrogen:
		return "hydrogen"
	case GivenFuel:
		return "given"
	}
	return "unknown fuel"
}

// Gas holds shares by mole of a gaseous fuel.
type Gas struct {
	Nitrogen       float64 // [-]
	Oxygen         float64 // [-]
	CarbonDioxide  float64 // [-]
	Water          float64 // vapour [-]
	CarbonMonoxide float64 // [-]
	Hydrogen       float64 // [-]
	Methane        float64 // [-]
	Propane        float64 // [-]
}

// Fuel is a fuel as fired: either a gas mixture, or the shares by mass of a liquid or solid with its heating
// value. The hydrogen and oxygen of its water are counted as water alone. Sulphur is left out.
type Fuel struct {
	Gas Gas // shares by mole; all zero for a liquid or solid

	Carbon   float64 // share by mass [-]; the shares by mass are read only if Gas is zero
	Hydrogen float64 // [-]
	Oxygen   float64 // [-]
	Nitrogen float64 // [-]
	Water    float64 // [-]
	Ash      float64 // [-]; leaves cold

	// LowerHeating is the lower heating value as fired, at constant pressure and 298.15 K [J/kg]. 0 = worked out:
	// of a gas from the polynomials, else by EstimateLowerHeating. Else 1e5 to 2e8.
	LowerHeating float64

	HeatCapacity float64 // of a liquid or solid fuel [J/(kg K)], >= 0; a gas has its polynomials
}

// NewFuel gives a fuel by name. GivenFuel gives an empty one to be filled in. Compositions:
//
//	methane, propane, hydrogen  pure
//	diesel        by mass C 0.865, H 0.135; 42.8 MJ/kg, an ordinary value for road diesel (42.5 to 43.2)
//	wood gas      by mole CO 0.20, H2 0.17, CO2 0.12, CH4 0.02, rest N2: an ordinary dry gas of an
//	              air-blown downdraught gasifier (CO 0.17-0.22, H2 0.12-0.20, CO2 0.09-0.15, CH4 0.02-0.03)
//	wood pellets  by mass C 0.462, H 0.057, O 0.395, N 0.001, water 0.080, ash 0.005: dry softwood with 8 % water;
//	              heating value estimated, 17.3 MJ/kg, where suppliers state 16.5 to 18
//
// Source: [FAO1986] for the wood gas; compositions, heating values and heat capacities are typical ones from memory
func NewFuel(kind FuelKind) Fuel {
	switch kind {
	case Methane:
		return Fuel{Gas: Gas{Methane: 1}}
	case Propane:
		return Fuel{Gas: Gas{Propane: 1}}
	case Hydrogen:
		return Fuel{Gas: Gas{Hydrogen: 1}}
	case WoodGas:
		return Fuel{Gas: Gas{CarbonMonoxide: 0.20, Hydrogen: 0.17, CarbonDioxide: 0.12, Methane: 0.02, Nitrogen: 0.49}}
	case Diesel:
		return Fuel{Carbon: 0.865, Hydrogen: 0.135, LowerHeating: 42.8e6, HeatCapacity: 2000}
	case WoodPellets:
		return Fuel{Carbon: 0.462, Hydrogen: 0.057, Oxygen: 0.395, Nitrogen: 0.001, Water: 0.080, Ash: 0.005, HeatCapacity: 1500}
	case GivenFuel:
		return Fuel{}
	}
	panic("heat: unknown fuel")
}

// sharesTolerance is how far the shares of a fuel may add up to something else than 1: rounding only.
const sharesTolerance = 1e-9

// isGas tells whether the fuel is a gas mixture.
func (f *Fuel) isGas() bool { return f.Gas != Gas{} }

// moles gives the amounts of a gaseous fuel by species.
func (g *Gas) moles() [speciesCount]float64 {
	return [speciesCount]float64{
		N2: g.Nitrogen, O2: g.Oxygen, CO2: g.CarbonDioxide, H2O: g.Water,
		CO: g.CarbonMonoxide, H2: g.Hydrogen, CH4: g.Methane, C3H8: g.Propane,
	}
}

// Check tells whether the fuel is one: shares in 0..1 that add up to 1, heating value and heat capacity of a possible size.
func (f *Fuel) Check() Fault {
	if f.LowerHeating != 0 && !(f.LowerHeating >= 1e5 && f.LowerHeating <= 2e8) || !(f.HeatCapacity >= 0 && f.HeatCapacity <= 2e4) {
		return BadNumber
	}
	var sum float64
	if f.isGas() {
		for _, x := range f.Gas.moles() {
			if !share(x) {
				return BadShare
			}
			sum += x
		}
	} else {
		for _, x := range [...]float64{f.Carbon, f.Hydrogen, f.Oxygen, f.Nitrogen, f.Water, f.Ash} {
			if !share(x) {
				return BadShare
			}
			sum += x
		}
	}
	if !(math.Abs(sum-1) <= sharesTolerance) {
		return SharesNotOne
	}
	return OK
}

// evaporation is the heat of evaporation of water at 298.15 K [J/kg]: 43.99 kJ/mol, from memory.
const evaporation = 2.442e6

// EstimateLowerHeating estimates the lower heating value [J/kg] as fired of a liquid or solid fuel from its
// composition:
//
//	higher, dry = 34.91 C + 117.83 H - 10.34 O - 1.51 N - 2.11 ash     [MJ/kg]
//	lower, dry  = higher - r (M(H2O)/(2 M(H))) H
//	as fired    = (1 - w) lower, dry - r w
//
// C, H, O, N, ash shares by mass of the dry fuel, w share of water of the fuel as fired, r heat of evaporation.
// Range (dry): C 0 to 0.9225, H 0.0043 to 0.2515, O 0 to 0.50, N 0 to 0.056, ash 0 to 0.714, higher heating
// value 4.745 to 55.345 MJ/kg; outside it NoHeatingValue. Average absolute error 1.45 % as stated by its authors.
//
// Source: [ChanniwalaParikh2002], from memory; the tests compare with measured heating values
func EstimateLowerHeating(f *Fuel) (float64, Fault) {
	if fault := f.Check(); fault != OK {
		return 0, fault
	}
	dry := 1 - f.Water
	if f.isGas() || !(dry > 0) {
		return 0, NoHeatingValue
	}
	C, H, O, N, ash := f.Carbon/dry, f.Hydrogen/dry, f.Oxygen/dry, f.Nitrogen/dry, f.Ash/dry
	higher := 34.91e6*C + 117.83e6*H - 10.34e6*O - 1.51e6*N - 2.11e6*ash
	if !(C <= 0.9225 && H >= 0.0043 && H <= 0.2515 && O <= 0.50 && N <= 0.056 && ash <= 0.714 && higher >= 4.745e6 && higher <= 55.345e6) {
		return 0, NoHeatingValue
	}
	lower := higher - evaporation*H*H2O.MolarMass()/(2*weightH)
	return dry*lower - evaporation*f.Water, OK
}
