package model

import (
	"math"

	"hotfront/model/heat"
	"hotfront/model/metal"
)

// source is the heat source of a design, made ready.
type source struct {
	burner   heat.Burner
	balance  heat.Balance
	receiver heat.Receiver
	caught   heat.ReceiverBalance
}

const (
	leastRise      = 50.0   // of the hot end above the coolant, at which a source counts as too weak [K]
	hottestWall    = 1800.0 // at which the search for the wall temperature ends: above the melting point of every alloy [K]
	firstWall      = 950.0  // first guess [K]
	sourceStep     = 300.0  // largest step of the wall temperature [K]
	sourcePasses   = 20
	sourceHalvings = 5 // of steps to a wall temperature at which the cycle does not settle
	// heatRise is the relative change of the engine's heat over that of T - Tcoolant: well below 1, because the work of the
	// expansion space goes with the pressure and little with temperature. Measured on the machines of the tests; only a first
	// slope, which the secant replaces.
	heatRise = 0.4
	// tolSource is the difference of what the source gives and what the engine takes, over the latter, at which
	// the wall temperature is found; the cycle itself balances to 2e-4.
	tolSource = 3e-4
)

// prepare checks the heat source and works out what does not depend on the wall temperature.
func (s *source) prepare(e *Engine, g *geometry) Cause {
	switch e.Heat.Kind {
	case HeatBurner:
		return s.prepareBurner(e, g)
	case HeatReceiver:
		r := &e.Heat.Receiver
		if r.WallArea < circle(r.ApertureDiameter) {
			return ApertureTooWide
		}
		s.receiver = heat.Receiver{
			Power: r.Power, ApertureArea: circle(r.ApertureDiameter), WallArea: r.WallArea,
			Absorptance: r.Absorptance, Emittance: r.Emittance,
			WindowTransmittance: r.WindowTransmittance, WindowThermal: r.WindowThermal,
			Film: r.Film, CasingConductance: r.CasingConductance, Ambient: r.Ambient,
		}
		return causeOf(s.receiver.Solve(&s.caught, firstWall))
	}
	return None
}

// prepareBurner makes the heater the tube bank of the burner: its rings are rows, the pitch across the flow is that
// on the ring, and fins are of the tubes' alloy.
func (s *source) prepareBurner(e *Engine, g *geometry) Cause {
	in, h := &e.Heat.Burner, &e.Heater
	if h.RingDiameter <= 0 || h.Rows < 1 {
		return BadInput
	}
	fuel := in.Given
	if in.FuelKind != heat.GivenFuel {
		fuel = heat.NewFuel(in.FuelKind)
	}
	fins := in.Fins
	alloy := metal.Of(h.Alloy)
	hot := firstWall // the little that the conductivity varies matters little
	if e.Heat.Held() {
		hot = e.Heat.Temperature
	}
	fins.Conductivity = alloy.Conductivity(hot)
	s.burner = heat.Burner{
		Fuel: fuel, ExcessAir: in.ExcessAir,
		PreheaterEffectiveness: in.PreheaterEffectiveness, PreheaterConductance: in.PreheaterConductance,
		Ambient: in.Ambient, CasingShare: in.CasingShare, CasingConductance: in.CasingConductance,
		Bank: heat.Bank{
			Arrangement: in.Arrangement, Rows: h.Rows, TubesPerRow: e.tubesPerRow(), Diameter: g.heaterOuter,
			TransversePitch: g.pitchRatio(e) * g.heaterOuter, LongitudinalPitch: in.RowPitch * g.heaterOuter,
			Length: h.HeatedLength, Fins: fins,
		},
		FlameEmissivity: in.FlameEmissivity, WallEmissivity: in.WallEmissivity, RadiantArea: in.RadiantArea,
	}
	return causeOf(s.burner.Prepare())
}

// give fills the balance of the source at a fixed fuel power or radiation and the wall temperature [K] and returns the
// heat to the tubes [W].
func (s *source) give(e *Engine, wall float64) (float64, Cause) {
	if e.Heat.Kind == HeatReceiver {
		cause := causeOf(s.receiver.Solve(&s.caught, wall))
		return s.caught.Heat, cause
	}
	fault := heat.Solve(&s.balance, &s.burner, e.Heat.Burner.FuelPower, wall)
	if fault == heat.TooCold { // the gas of so little fuel does not reach the tubes
		return 0, None
	}
	return s.balance.Heat, causeOf(fault)
}

// runSource finds the temperature of the tube wall at which the engine takes what the source gives:
//
//	source(T) - engine(T) = 0,
//
// which falls with T, by the secant within a bracket.
func (w *Workspace) runSource(dst *Performance, e *Engine, c *Corrections) Cause {
	cold := e.Coolant.Inlet
	low, high := cold+leastRise, hottestWall
	if !(low < high) {
		return ColderThanCoolant
	}
	wall := min(max(firstWall, low), high)
	near, halved := false, 0
	var before, missed float64
	for pass := range sourcePasses {
		given, cause := w.source.give(e, wall)
		if cause != None {
			return cause
		}
		cause = w.run(dst, e, c, wall, near)
		taken := dst.HeatIn
		switch {
		case cause == NoHeat: // so close to the coolant that friction heats the engine
			if given <= 0 {
				return SourceTooWeak
			}
			taken = 0
		case cause == NoConvergence && pass > 0 && halved < sourceHalvings: // a step too far: half of it
			halved++
			wall, near = 0.5*(wall+before), false
			continue
		case cause != None:
			return cause
		}
		near = true
		r := given - taken
		if cause == None && math.Abs(r) <= tolSource*taken {
			return None
		}
		slope := -heatRise * taken / (wall - cold)
		if behind, _ := w.source.give(e, wall+1); behind < given {
			slope += behind - given
		}
		if s := (r - missed) / (wall - before); pass > 0 && s < 0.3*slope && s > 5*slope {
			slope = s
		}
		before, missed = wall, r
		if r > 0 {
			low = wall
		} else {
			high = wall
		}
		if low >= hottestWall*(1-1e-6) {
			return SourceTooHot
		}
		if high <= (cold+leastRise)*(1+1e-6) {
			return SourceTooWeak
		}
		next := wall + min(max(-r/slope, -sourceStep), sourceStep)
		if !(next > low && next < high) {
			// Towards an end nobody has been at: to it; else to the middle.
			switch {
			case next >= high && high == hottestWall, next <= low && low == cold+leastRise:
				next = min(max(next, low), high)
			default:
				next = 0.5 * (low + high)
			}
		}
		wall = next
	}
	return NoConvergence
}

// setSource books the heat source: the fuel that the engine's heat asks for, or the balance found.
func (w *Workspace) setSource(dst *Performance, e *Engine) Cause {
	s := &w.source
	switch e.Heat.Kind {
	case HeatBurner:
		if e.Heat.Held() {
			if cause := causeOf(heat.FuelFor(&s.balance, &s.burner, dst.HeatIn, dst.HeaterOuterTemperature)); cause != None {
				return cause
			}
		}
		b := &s.balance
		dst.FuelPower = b.FuelPower
		dst.FuelEfficiency = dst.BrakePower / b.FuelPower
		dst.Burner = BurnerResult{
			Efficiency: b.Efficiency, Casing: b.Casing, Chimney: b.Chimney, Preheat: b.Preheat, Radiation: b.Radiation,
			FuelFlow: b.FuelFlow, AirFlow: b.AirFlow, AirTemperature: b.AirTemperature, FlameTemperature: b.FlameTemperature,
			GasTemperature: b.GasTemperature, BankExit: b.BankExit, FlueTemperature: b.FlueTemperature,
			Film: b.Film, FinEfficiency: b.FinEfficiency, Reynolds: b.Reynolds,
		}
		if b.Dissociating {
			dst.Warnings |= WarnFlame
		}
		if b.Condensing {
			dst.Warnings |= WarnDewPoint
		}
		dst.EnergyResidual += (b.Heat - dst.HeatIn) / dst.HeatIn
	case HeatReceiver:
		b := &s.caught
		dst.SolarEfficiency = dst.BrakePower / b.Incident
		dst.Receiver = ReceiverResult{
			Efficiency: b.Efficiency, WindowLoss: b.WindowLoss, Reflection: b.Reflection,
			Reradiation: b.Reradiation, Convection: b.Convection, Casing: b.Casing, Stagnation: hottestStagnation,
		}
		if t, fault := s.receiver.Stagnation(); fault == heat.OK {
			dst.Receiver.Stagnation = min(t, hottestStagnation)
		}
		dst.EnergyResidual += (b.Heat - dst.HeatIn) / dst.HeatIn
	}
	return None
}

// hottestStagnation stands for a higher stagnation temperature, or none [K].
const hottestStagnation = 5000

// causeOf turns a fault of the heat source into the cause of a design without result.
func causeOf(f heat.Fault) Cause {
	switch f {
	case heat.OK:
		return None
	case heat.BankImpossible:
		return BankImpossible
	case heat.PitchRange, heat.ReynoldsRange, heat.FinRange:
		return BankRange
	case heat.TooCold, heat.TemperatureRange, heat.TransferImpossible:
		return SourceTooWeak
	case heat.NoConvergence:
		return NoConvergence
	}
	return BadInput
}
