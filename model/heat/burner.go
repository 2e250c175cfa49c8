package heat

import "math"

// Burner is a burner that heats the tubes of an engine: fuel and preheated air burn completely in a chamber, the
// gas radiates to the tubes, flows through their bank and then through a counterflow preheater to the chimney.
//
// The chamber is stirred: what radiates has the temperature at which the gas enters the bank. The tubes have one outer
// temperature. Fuel and air come in at ambient temperature.
//
// Fill the exported fields, then Prepare; a Burner changed after that must be prepared again.
type Burner struct {
	Fuel      Fuel
	ExcessAir float64 // air over stoichiometric air [-], >= 1

	// One of the two says how good the air preheater is; both 0 = none.
	PreheaterEffectiveness float64 // heat over the most that could be transferred [-], 0..1
	PreheaterConductance   float64 // UA [W/K], >= 0

	Ambient           float64 // temperature of air, fuel and surroundings [K], 200..400
	CasingShare       float64 // heat through the casing of the chamber over fuel power [-], 0..1
	CasingConductance float64 // further heat through that casing, per difference of gas to ambient temperature [W/K], >= 0

	Bank            Bank
	FlameEmissivity float64 // of the gas in the chamber [-], 0..1; 0 = no radiation
	WallEmissivity  float64 // of the tubes [-], 0..1
	RadiantArea     float64 // of the tubes that the chamber sees [m2]; 0 = front of the bank, tubes and gaps

	combustion Combustion
	bank       bankGeometry
	emissivity float64
	radiant    float64 // [m2]
}

// Balance says where the heat of the fuel went. It closes: FuelPower = Heat + Casing + Chimney.
type Balance struct {
	FuelPower  float64 // lower heating value times fuel flow [W]
	Heat       float64 // to the tubes [W], Convection + Radiation
	Convection float64 // [W]
	Radiation  float64 // [W]
	Casing     float64 // [W]
	Chimney    float64 // enthalpy of the flue gas above that of fuel and air as they came in [W]
	Preheat    float64 // heat given back to the air [W], within the burner
	Efficiency float64 // fuel efficiency, Heat over FuelPower [-]

	FuelFlow float64 // [kg/s]
	AirFlow  float64 // [kg/s]
	GasFlow  float64 // [kg/s]

	AirTemperature   float64 // behind the preheater [K]
	FlameTemperature float64 // adiabatic, with that air [K]
	GasTemperature   float64 // at the entry of the bank, behind radiation and casing loss [K]
	BankExit         float64 // of the gas behind the bank [K]
	FlueTemperature  float64 // behind the preheater [K]

	Film          float64 // film coefficient in the bank, without radiation [W/(m2 K)]
	Conductance   float64 // of the bank with fins, without radiation [W/K]
	FinEfficiency float64 // [-]; 1 without fins
	Reynolds      float64 // in the bank, on the tube diameter [-]
	TransferUnits float64 // of the bank [-]
	PreheaterNTU  float64 // number of transfer units of the preheater [-]; 0 if its effectiveness is given as 1 (infinite)

	Dissociating bool // adiabatic flame above 2200 K: a real flame is colder, the heat to the tubes overstated
	Condensing   bool // flue gas below its dew point: more heat would be had than is counted, and wet flue
}

// dissociation is where complete combustion is taken to overstate the temperature [K]: there it is some 1 to 2 % too high, and
// the error grows fast (from memory).
const dissociation = 2200

// Prepare checks the burner and works out what does not depend on fuel flow and wall temperature.
func (b *Burner) Prepare() Fault {
	b.bank = bankGeometry{}
	for _, x := range [...]float64{b.PreheaterConductance, b.CasingConductance, b.RadiantArea} {
		if !(x >= 0 && finite(x)) {
			return BadNumber
		}
	}
	if !share(b.PreheaterEffectiveness) || !share(b.CasingShare) || b.PreheaterEffectiveness > 0 && b.PreheaterConductance > 0 {
		return BadShare
	}
	if !(b.Ambient >= nasaLow && b.Ambient <= 400) {
		return TemperatureRange
	}
	var fault Fault
	if b.emissivity, fault = EffectiveEmissivity(b.FlameEmissivity, b.WallEmissivity); fault != OK {
		return fault
	}
	if fault = b.combustion.Set(&b.Fuel, b.ExcessAir); fault != OK {
		return fault
	}
	g, fault := b.Bank.geometry()
	if fault != OK {
		return fault
	}
	b.radiant = b.RadiantArea
	if b.radiant == 0 {
		b.radiant = g.frontal
	}
	b.bank = g
	return OK
}

// Combustion gives the combustion of a prepared burner.
func (b *Burner) Combustion() *Combustion { return &b.combustion }

// Solve fills dst with the balance of a prepared burner for the fuel power [W] (lower heating value times fuel flow)
// and the outer tube temperature Tw [K], 300..2000.
//
// The unknown is the gas temperature Tg at the entry of the bank; the residual
//
//	h_in + preheat(Tg) - h_gas(Tg) - casing(Tg) - radiation(Tg) = 0
//
// falls with Tg everywhere, because the preheater gives back no more than the flue gas loses. It is solved by Newton's
// method and the secant, kept in a bracket, to rounding. With tubes hotter than the gas, heat flows from them and Heat is
// negative. Fuel power that drives the bank out of its law is ReynoldsRange, annular fins out of theirs FinRange; a gas below 300 K before the bank is
// TooCold, one above 5000 K TemperatureRange.
//
// Derivation: energy balance of the parts; the stirred chamber [SiegelHowell1992], from memory.
func Solve(dst *Balance, b *Burner, fuelPower, Tw float64) Fault {
	if !b.bank.prepared {
		panic("heat: burner not prepared")
	}
	*dst = Balance{}
	if !(fuelPower > 0 && finite(fuelPower)) {
		return BadNumber
	}
	if !(Tw >= transportLow && Tw <= 2000) {
		return TemperatureRange
	}
	c := &b.combustion
	dst.FuelPower = fuelPower
	dst.FuelFlow = fuelPower / c.LowerHeating
	dst.AirFlow = dst.FuelFlow * c.AirMass
	dst.GasFlow = dst.FuelFlow * c.GasMass

	low, high := transportLow, transportHigh
	fresh := c.FuelEnthalpy(b.Ambient) + c.AirEnthalpy(b.Ambient)
	Tg := 0.0
	if T, fault := c.GasTemperature(c.LowerHeating*(1-b.CasingShare) + fresh); fault == OK {
		Tg = T // of the flame without preheater
	}
	if !(Tg > low && Tg < high) {
		Tg = 1500
	}
	Prw := c.prandtl(Tw)
	behind := passage{exit: (Tg + Tw) / 2}
	var before, residual float64
	settled := false
	for i := range 100 {
		if fault := b.pass(&behind, dst.FuelFlow, Tg, Tw, Prw); fault != OK {
			return fault
		}
		// Residual and slope per kilogram of fuel.
		perFlow := 1 / dst.FuelFlow
		radiation := b.emissivity * b.radiant * stefanBoltzmann * perFlow
		r := c.LowerHeating*(1-b.CasingShare) + fresh + behind.preheat - c.GasEnthalpy(Tg) -
			b.CasingConductance*(Tg-b.Ambient)*perFlow - radiation*(Tg*Tg*Tg*Tg-Tw*Tw*Tw*Tw)
		if r > 0 {
			low = Tg
		} else {
			high = Tg
		}
		slope := behind.preheatSlope - c.GasCp(Tg) - b.CasingConductance*perFlow - 4*radiation*Tg*Tg*Tg
		// The slope leaves out how the film varies; the secant of the last two residuals has it.
		if secant := (r - residual) / (Tg - before); i > 0 && secant < 0.5*slope && secant > 2*slope {
			slope = secant
		}
		before, residual = Tg, r
		next := Tg - r/slope
		if math.Abs(next-Tg) <= 1e-12*Tg {
			settled = true
			break
		}
		if !(next > low && next < high) {
			if high-low <= 4e-16*high {
				break
			}
			next = (low + high) / 2
		}
		Tg = next
	}
	if !settled {
		switch {
		case high <= transportLow*(1+1e-9):
			return TooCold
		case low >= transportHigh*(1-1e-9):
			return TemperatureRange
		}
		return NoConvergence
	}
	// Only now, since a guess may leave the law where the solution does not.
	dst.Reynolds = behind.reynolds
	if !(behind.reynolds >= bankLow && behind.reynolds <= bankHigh) {
		return ReynoldsRange
	}
	if b.Bank.Fins.Kind == AnnularFins && !(behind.fin >= finEfficiencyLow) {
		return FinRange
	}

	flow := dst.FuelFlow
	dst.GasTemperature = Tg
	dst.BankExit = behind.exit
	dst.Convection = flow * (c.GasEnthalpy(Tg) - c.GasEnthalpy(behind.exit))
	dst.Radiation = b.radiant * Radiation(b.emissivity, Tg, Tw)
	dst.Heat = dst.Convection + dst.Radiation
	dst.Casing = b.CasingShare*fuelPower + b.CasingConductance*(Tg-b.Ambient)
	dst.Preheat = flow * behind.preheat
	dst.Efficiency = dst.Heat / fuelPower
	dst.Film, dst.Conductance, dst.FinEfficiency = behind.film, behind.conductance, behind.fin
	dst.TransferUnits = behind.units
	dst.PreheaterNTU = behind.preheaterNTU

	var fault Fault
	if dst.AirTemperature, fault = c.AirTemperature(c.AirEnthalpy(b.Ambient) + behind.preheat); fault != OK {
		return fault
	}
	if dst.FlameTemperature, fault = c.GasTemperature(c.LowerHeating + fresh + behind.preheat); fault != OK {
		return fault
	}
	if dst.FlueTemperature, fault = c.GasTemperature(c.GasEnthalpy(behind.exit) - behind.preheat); fault != OK {
		return fault
	}
	// From the temperature and not from the enthalpy just used, so that the ledger tests the inversion as well.
	dst.Chimney = flow * (c.GasEnthalpy(dst.FlueTemperature) - fresh)
	dst.Dissociating = dst.FlameTemperature > dissociation
	dst.Condensing = dst.FlueTemperature < c.DewPoint()
	return OK
}

// passage is the way of the gas through bank and preheater.
type passage struct {
	exit         float64 // temperature behind the bank [K]
	film         float64 // [W/(m2 K)]
	conductance  float64 // [W/K]
	fin          float64 // efficiency of the fins
	reynolds     float64
	units        float64
	preheat      float64 // per mass of fuel [J/kg]
	preheatSlope float64 // with the temperature before the bank, properties of the film held [J/(kg K)]
	preheaterNTU float64
}

// pass follows the gas from the temperature Tg before the bank, against tubes at Tw.
//
//	exit = Tw + (Tg - Tw) exp(-UA/(mdot cp)),  properties at Tm = (Tg + exit)/2
//
// is solved for the exit by repeated substitution and, from the second step on, the secant: the film varies so
// weakly with Tm that some four steps do. p.exit is the first guess. Prw is the Prandtl number at Tw.
//
// Source: [Incropera2007], sections 7.6 and 11.4
func (b *Burner) pass(p *passage, flow, Tg, Tw, Prw float64) Fault {
	c, g := &b.combustion, &b.bank
	speed := flow * c.GasMass / g.area // mass flux [kg/(m2 s)]
	exit := min(max(p.exit, min(Tg, Tw)), max(Tg, Tw))
	var decay, before, miss float64
	for i := 0; ; i++ {
		Tm := (Tg + exit) / 2
		mu, k := c.transport.at(Tm)
		cp := c.gas.cp(Tm)
		p.reynolds = speed * b.Bank.Diameter / mu
		p.film = g.rows * g.law.nusselt(p.reynolds, mu*cp/(c.GasMass*k), Prw) * k / b.Bank.Diameter
		p.conductance, p.fin = b.Bank.conductance(g, p.film)
		p.units = p.conductance / (flow * cp)
		decay = math.Exp(-p.units)
		step := Tw + (Tg-Tw)*decay - exit
		if math.Abs(step) <= 1e-13*exit {
			break
		}
		if i == 100 {
			return NoConvergence
		}
		next := exit + step
		if slope := (step - miss) / (exit - before); i > 0 && slope > -2 && slope < -0.5 {
			next = exit - step/slope
		}
		// A secant may point out of where the exit must lie; the substitution cannot.
		if !(next >= min(Tg, Tw) && next <= max(Tg, Tw)) {
			next = exit + step
		}
		before, miss, exit = exit, step, next
	}
	p.exit = exit
	return b.preheat(p, flow, decay)
}

// preheat gives the heat that the flue gas, at p.exit, gives back to the air.
//
// With the effectiveness given, the most that could be transferred is by the enthalpies, so that a heat capacity
// that varies breaks no second law. With a conductance, capacity rates are means between exit and ambient temperature.
func (b *Burner) preheat(p *passage, flow, decay float64) Fault {
	c := &b.combustion
	p.preheat, p.preheatSlope, p.preheaterNTU = 0, 0, 0
	if b.PreheaterEffectiveness == 0 && b.PreheaterConductance == 0 {
		return OK
	}
	span := p.exit - b.Ambient
	air := c.AirEnthalpy(p.exit) - c.AirEnthalpy(b.Ambient)
	gas := c.GasEnthalpy(p.exit) - c.GasEnthalpy(b.Ambient)
	most, rate := air, c.AirCp(p.exit)
	if math.Abs(gas) < math.Abs(air) {
		most, rate = gas, c.GasCp(p.exit)
	}
	if math.Abs(span) < 1e-9*b.Ambient {
		return OK // equal temperatures exchange nothing
	}
	C := min(air, gas) / max(air, gas)
	if span < 0 {
		C = 1 / C
	}
	e := b.PreheaterEffectiveness
	if b.PreheaterConductance > 0 {
		p.preheaterNTU = b.PreheaterConductance * span / (flow * most)
		var fault Fault
		if e, fault = Effectiveness(p.preheaterNTU, C); fault != OK {
			return fault
		}
	} else if e < 1 {
		var fault Fault
		if p.preheaterNTU, fault = TransferUnits(e, C); fault != OK {
			return fault
		}
	}
	p.preheat = e * most
	p.preheatSlope = e * rate * decay
	return OK
}

// Heat gives the heat to the tubes [W] and its change with the tube temperature [W/K] at a fixed fuel power, for a
// solver that seeks the temperature at which engine and burner agree. The slope is a central difference of the
// balance over 0.2 K, good to some 1e-6 of itself where the range of the temperatures allows it, else one-sided.
func (b *Burner) Heat(fuelPower, Tw float64) (Q, slope float64, fault Fault) {
	var mid, up, down Balance
	if fault = Solve(&mid, b, fuelPower, Tw); fault != OK {
		return 0, 0, fault
	}
	const step = 0.1
	hot, cold := Tw+step, Tw-step
	if Solve(&up, b, fuelPower, hot) != OK {
		up, hot = mid, Tw
	}
	if Solve(&down, b, fuelPower, cold) != OK {
		down, cold = mid, Tw
	}
	if hot == cold {
		return mid.Heat, 0, NoConvergence
	}
	return mid.Heat, (up.Heat - down.Heat) / (hot - cold), OK
}

// FuelFor fills dst with the balance that gives the heat Q [W], > 0, to tubes at Tw [K]; the fuel power is in it.
//
// The heat rises with the fuel, and less than in proportion. Less fuel power than Q can never do, so the search goes up from
// there, by factors of 2 and then by the regula falsi with the Illinois rule. (With a preheater of given conductance
// the heat may stall or fall a little on the way, because the preheater grows worse; then the balance is that of one of the
// fuel powers that give Q.) Where the law of the bank ends first, above or below, ReynoldsRange. If the gas
// does not come above the tubes before that, or the heat is not reached with a hundred thousand times the fuel, TooCold.
func FuelFor(dst *Balance, b *Burner, Q, Tw float64) Fault {
	if !(Q > 0 && finite(Q)) {
		*dst = Balance{}
		return BadNumber
	}
	// rLow is the residual at low, 0 while it is not known: there may be too little fuel for a balance.
	low, rLow := 0.0, 0.0
	high, rHigh := Q, 0.0
	for i := 0; ; i++ {
		fault := Solve(dst, b, high, Tw)
		if fault == OK {
			if rHigh = dst.Heat/Q - 1; rHigh >= 0 {
				break
			}
			rLow = rHigh
		} else if !dst.tooWeak(fault) {
			if fault == ReynoldsRange && rLow <= -1 {
				return TooCold
			}
			return fault
		}
		if i == 17 {
			return TooCold
		}
		low = high
		high *= 2
	}
	side := 0
	for range 200 {
		if math.Abs(dst.Heat/Q-1) <= 1e-12 {
			return OK
		}
		if high-low <= 1e-15*high {
			break
		}
		next := (low + high) / 2
		if rLow < 0 {
			next = min(max((low*rHigh-high*rLow)/(rHigh-rLow), low), high)
		}
		fault := Solve(dst, b, next, Tw)
		switch {
		case dst.tooWeak(fault):
			low, rLow = next, 0
		case fault != OK:
			return fault
		case dst.Heat < Q:
			low, rLow = next, dst.Heat/Q-1
			if side < 0 {
				rHigh /= 2
			}
			side = -1
		default:
			high, rHigh = next, dst.Heat/Q-1
			if side > 0 {
				rLow /= 2
			}
			side = 1
		}
	}
	switch {
	case rLow == 0:
		return ReynoldsRange
	case high-low <= 1e-14*high:
		return OK // as near as rounding allows
	}
	return NoConvergence
}

// tooWeak tells whether the fault is one of too little fuel: a flow below the law of the bank, or a casing
// that takes it all.
func (d *Balance) tooWeak(fault Fault) bool {
	return fault == TooCold || fault == ReynoldsRange && d.Reynolds < bankLow
}
