package studies

import (
	"slices"

	"hotfront/model"
	"hotfront/model/heat"
)

// The heat sources. Of the fields of fireGroup one must be given: with the tube wall the fuel follows, with the
// fuel the tube wall. Defaults and usual ranges: see machineFields.
const (
	fireGroup    = "fire"
	preheatGroup = "preheat"
)

func whenBurner() Condition {
	return Condition{"to engines with a burner", func(e *model.Engine) bool { return e.Heat.Kind == model.HeatBurner }}
}

func whenReceiver() Condition {
	return Condition{"to engines with a receiver", func(e *model.Engine) bool { return e.Heat.Kind == model.HeatReceiver }}
}

func whenGivenFuel() Condition {
	return Condition{"to burners with the fuel given", func(e *model.Engine) bool {
		return e.Heat.Kind == model.HeatBurner && e.Heat.Burner.FuelKind == heat.GivenFuel
	}}
}

func whenFins(words string, kinds ...heat.FinKind) Condition {
	return Condition{words, func(e *model.Engine) bool {
		return e.Heat.Kind == model.HeatBurner && slices.Contains(kinds, e.Heat.Burner.Fins.Kind)
	}}
}

func fuelNames() []string {
	var names []string
	for _, k := range heat.FuelKinds() {
		names = append(names, k.String())
	}
	return names
}

func arrangementNames() []string { return []string{"in-line", "staggered"} }

func finNames() []string { return []string{"none", "annular", "longitudinal"} }

// burnerFields are the burner, and the rows of tubes that its gas flows through.
func burnerFields() []Field {
	burner := func(e *model.Engine) *model.Burner { return &e.Heat.Burner }
	number := func(path, text string, q Quantity, unitName, hard, usual, value string, at func(*model.Burner) *float64) Field {
		f := measured("heat.burner."+path, text, q, unitName, hard, usual, func(e *model.Engine) *float64 { return at(burner(e)) }, when(whenBurner()))
		f.Default = value
		return f
	}
	finned := whenFins("to burners with finned tubes", heat.AnnularFins, heat.LongitudinalFins)
	rows := []Field{
		choice("heat.burner.fuel", "fuel; given: by the shares of its elements or gases", fuelNames(),
			func(e *model.Engine) *heat.FuelKind { return &burner(e).FuelKind }, when(whenBurner()), fixed),
		{
			Path: "heat.burner.tube_wall", Text: "mean outer temperature of the heater tubes, to which the fuel is set; in place of fuel_power",
			Quantity: Temperature, Unit: "degC", Group: fireGroup, Freeable: true, When: whenBurner(),
			Hard: parseRange("-50 degC to 1500 degC", Temperature), Usual: parseRange("100 degC to 900 degC", Temperature),
			get: func(e *model.Engine) float64 { return e.Heat.Temperature },
			set: func(e *model.Engine, v float64) { e.Heat.Temperature = v },
		},
		number("fuel_power", "lower heating value times fuel flow, from which the tube wall follows; in place of tube_wall", Power, "kW",
			"1 W to 100000 kW", "", "", func(b *model.Burner) *float64 { return &b.FuelPower }),
		number("excess_air", "air over stoichiometric air", Number, "-", "1 to 20", "1.02 to 3", "1.3",
			func(b *model.Burner) *float64 { return &b.ExcessAir }),
		number("preheater_effectiveness", "effectiveness of the counterflow air preheater; none when neither it nor preheater_conductance is given", Number, "-",
			"0 to 0.99", "0.3 to 0.95", "", func(b *model.Burner) *float64 { return &b.PreheaterEffectiveness }),
		number("preheater_conductance", "UA of the air preheater; in place of its effectiveness", Conductance, "W/K",
			"0 W/K to 1e6 W/K", "", "", func(b *model.Burner) *float64 { return &b.PreheaterConductance }),
		number("ambient", "temperature of air, fuel and surroundings", Temperature, "degC", "-70 degC to 100 degC", "-40 degC to 50 degC", "20 degC",
			func(b *model.Burner) *float64 { return &b.Ambient }),
		number("casing_share", "heat lost through the casing over fuel power", Number, "%", "0 to 0.9", "0 to 0.15", "3 %",
			func(b *model.Burner) *float64 { return &b.CasingShare }),
		number("casing_conductance", "further heat lost through the casing, by the difference of gas to ambient temperature", Conductance, "W/K",
			"0 W/K to 1e5 W/K", "", "0 W/K", func(b *model.Burner) *float64 { return &b.CasingConductance }),
		choice("heat.burner.arrangement", "how the rows of heater tubes stand in the gas", arrangementNames(),
			func(e *model.Engine) *heat.Arrangement { return &burner(e).Arrangement }, when(whenBurner()), defaults("staggered")),
		number("row_pitch", "distance from row to row over the outer diameter of the heater tubes; of no effect with one row", Number, "-", "0.3 to 50", "1 to 4", "1.5",
			func(b *model.Burner) *float64 { return &b.RowPitch }),
		choice("heat.burner.fins.kind", "fins on the outside of the heater tubes, of their alloy", finNames(),
			func(e *model.Engine) *heat.FinKind { return &burner(e).Fins.Kind }, when(whenBurner()), fixed, defaults("none")),
		number("fins.height", "from the tube to the tip of a fin", Length, "mm", "0.1 mm to 500 mm", "1 mm to 20 mm", "", func(b *model.Burner) *float64 { return &b.Fins.Height }).with([]option{when(finned)}),
		number("fins.thickness", "thickness of a fin", Length, "mm", "0.02 mm to 50 mm", "0.2 mm to 3 mm", "", func(b *model.Burner) *float64 { return &b.Fins.Thickness }).with([]option{when(finned)}),
		number("fins.pitch", "from fin to fin along the tube", Length, "mm", "0.05 mm to 500 mm", "1 mm to 20 mm", "", func(b *model.Burner) *float64 { return &b.Fins.Pitch }).
			with([]option{when(whenFins("to burners with annular fins", heat.AnnularFins))}),
		whole("heat.burner.fins.count", "fins round a tube", "1 to 200", "2 to 24", func(e *model.Engine) *int { return &burner(e).Fins.Count },
			when(whenFins("to burners with longitudinal fins", heat.LongitudinalFins))),
		number("flame_emissivity", "emissivity of the gas in the chamber, 0 for no radiation", Number, "-", "0 to 1", "0.05 to 0.6", "0.2",
			func(b *model.Burner) *float64 { return &b.FlameEmissivity }),
		number("wall_emissivity", "emissivity of the heater tubes", Number, "-", "0.01 to 1", "0.3 to 0.95", "0.85",
			func(b *model.Burner) *float64 { return &b.WallEmissivity }),
		number("radiant_area", "of the tubes that the chamber sees; 0 for the front of the first row, tubes and gaps", Area, "cm2", "0 m2 to 100 m2", "", "0 cm2",
			func(b *model.Burner) *float64 { return &b.RadiantArea }),
	}
	for i := range rows {
		switch rows[i].Path {
		case "heat.burner.fuel_power":
			rows[i].Group = fireGroup
		case "heat.burner.preheater_effectiveness", "heat.burner.preheater_conductance":
			rows[i].Group = preheatGroup
		}
	}
	return append(rows, givenFuelFields()...)
}

// givenFuelFields are the composition of a fuel that has no name here.
func givenFuelFields() []Field {
	share := func(path, text string, at func(*heat.Fuel) *float64) Field {
		return measured("heat.burner."+path, text, Number, "%", "0 to 1", "", func(e *model.Engine) *float64 { return at(&e.Heat.Burner.Given) },
			when(whenGivenFuel()), fixed, defaults("0 %"))
	}
	return []Field{
		share("elements.carbon", "share by mass of a liquid or solid fuel as fired", func(f *heat.Fuel) *float64 { return &f.Carbon }),
		share("elements.hydrogen", "share by mass, without that of the water", func(f *heat.Fuel) *float64 { return &f.Hydrogen }),
		share("elements.oxygen", "share by mass, without that of the water", func(f *heat.Fuel) *float64 { return &f.Oxygen }),
		share("elements.nitrogen", "share by mass", func(f *heat.Fuel) *float64 { return &f.Nitrogen }),
		share("elements.water", "share by mass", func(f *heat.Fuel) *float64 { return &f.Water }),
		share("elements.ash", "share by mass", func(f *heat.Fuel) *float64 { return &f.Ash }),
		share("gases.nitrogen", "share by volume of a gaseous fuel", func(f *heat.Fuel) *float64 { return &f.Gas.Nitrogen }),
		share("gases.oxygen", "share by volume", func(f *heat.Fuel) *float64 { return &f.Gas.Oxygen }),
		share("gases.carbon_dioxide", "share by volume", func(f *heat.Fuel) *float64 { return &f.Gas.CarbonDioxide }),
		share("gases.water", "share by volume, vapour", func(f *heat.Fuel) *float64 { return &f.Gas.Water }),
		share("gases.carbon_monoxide", "share by volume", func(f *heat.Fuel) *float64 { return &f.Gas.CarbonMonoxide }),
		share("gases.hydrogen", "share by volume", func(f *heat.Fuel) *float64 { return &f.Gas.Hydrogen }),
		share("gases.methane", "share by volume", func(f *heat.Fuel) *float64 { return &f.Gas.Methane }),
		share("gases.propane", "share by volume", func(f *heat.Fuel) *float64 { return &f.Gas.Propane }),
		measured("heat.burner.lower_heating_value", "as fired; 0 for one worked out from the composition", SpecificEnergy, "MJ/kg", "0 MJ/kg to 150 MJ/kg", "",
			func(e *model.Engine) *float64 { return &e.Heat.Burner.Given.LowerHeating }, when(whenGivenFuel()), fixed, defaults("0 MJ/kg")),
		measured("heat.burner.fuel_heat_capacity", "of a liquid or solid fuel", SpecificHeat, "J/(kg K)", "0 J/(kg K) to 20000 J/(kg K)", "",
			func(e *model.Engine) *float64 { return &e.Heat.Burner.Given.HeatCapacity }, when(whenGivenFuel()), fixed, defaults("1500 J/(kg K)")),
	}
}

// receiverFields are the receiver of concentrated radiation.
func receiverFields() []Field {
	number := func(path, text string, q Quantity, unitName, hard, usual, value string, at func(*model.Receiver) *float64) Field {
		f := measured("heat.receiver."+path, text, q, unitName, hard, usual, func(e *model.Engine) *float64 { return at(&e.Heat.Receiver) }, when(whenReceiver()))
		f.Default = value
		return f
	}
	return []Field{
		number("power", "radiation into the aperture, from which the tube wall follows", Power, "kW", "1 W to 100000 kW", "", "",
			func(r *model.Receiver) *float64 { return &r.Power }),
		number("aperture_diameter", "of the opening through which the radiation enters", Length, "mm", "1 mm to 50 m", "30 mm to 1 m", "",
			func(r *model.Receiver) *float64 { return &r.ApertureDiameter }),
		number("wall_area", "inner wall of the cavity without the aperture", Area, "cm2", "1 cm2 to 1000 m2", "", "",
			func(r *model.Receiver) *float64 { return &r.WallArea }),
		number("absorptance", "of that wall for sunlight", Number, "-", "0.01 to 1", "0.6 to 0.98", "0.9",
			func(r *model.Receiver) *float64 { return &r.Absorptance }),
		number("emittance", "of that wall for its own radiation", Number, "-", "0 to 1", "0.1 to 0.98", "0.85",
			func(r *model.Receiver) *float64 { return &r.Emittance }),
		number("window_transmittance", "of the window for sunlight, 1 for no window", Number, "-", "0.01 to 1", "0.8 to 1", "1",
			func(r *model.Receiver) *float64 { return &r.WindowTransmittance }),
		number("window_thermal", "share of the wall's own radiation that the window lets out, 1 for no window", Number, "-", "0 to 1", "", "1",
			func(r *model.Receiver) *float64 { return &r.WindowThermal }),
		number("film", "convection, on the area of the aperture", FilmCoefficient, "W/(m2 K)", "0 W/(m2 K) to 1000 W/(m2 K)", "2 W/(m2 K) to 60 W/(m2 K)", "15 W/(m2 K)",
			func(r *model.Receiver) *float64 { return &r.Film }),
		number("casing_conductance", "heat lost through the insulation, by the difference of wall to ambient temperature", Conductance, "W/K",
			"0 W/K to 1e5 W/K", "", "", func(r *model.Receiver) *float64 { return &r.CasingConductance }),
		number("ambient", "temperature of air, surroundings and sky", Temperature, "degC", "-150 degC to 100 degC", "-40 degC to 50 degC", "20 degC",
			func(r *model.Receiver) *float64 { return &r.Ambient }),
	}
}
