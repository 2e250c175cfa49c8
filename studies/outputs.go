package studies

import (
	"slices"

	"hotfront/model"
	"hotfront/model/drive"
)

// Output is one result of the model: one float64 field of model.Performance or model.Losses.
type Output struct {
	Name     string
	Text     string
	Quantity Quantity
	Unit     string    // in which tables show it
	When     Condition // when it means something; else it is 0

	at func(p *model.Performance) *float64
}

// Applies says whether the result means something with this machine.
func (o *Output) Applies(e *model.Engine) bool { return o.When.ok == nil || o.When.ok(e) }

// Get reads the result, SI.
func (o *Output) Get(p *model.Performance) float64 { return *o.at(p) }

// Format writes a value as tables show it, without its unit.
func (o *Output) Format(v float64) string { return FormatSI(v, o.Quantity, o.Unit, 3) }

// OutputNamed gives the output with this name.
func OutputNamed(outputs []Output, name string) (*Output, bool) {
	for i := range outputs {
		if outputs[i].Name == name {
			return &outputs[i], true
		}
	}
	return nil, false
}

func outputNames(outputs []Output) []string {
	names := make([]string, len(outputs))
	for i := range outputs {
		names[i] = outputs[i].Name
	}
	return names
}

// Outputs is the table of all results, in the order of model.Performance.
func Outputs() []Output {
	type p = model.Performance
	return slices.Concat([]Output{
		outcome("brake_power", "power at the shaft", Power, "kW", func(p *p) *float64 { return &p.BrakePower }),
		outcome("indicated_power", "p-V power after flow friction, cycle-work factor, leakage and gas spring", Power, "kW", func(p *p) *float64 { return &p.IndicatedPower }),
		outcome("pv_power", "p-V power of both spaces at uniform pressure, before flow friction", Power, "kW", func(p *p) *float64 { return &p.PVPower }),
		outcome("flow_loss", "power lost to flow friction", Power, "kW", func(p *p) *float64 { return &p.FlowLoss }),
		outcome("heat_in", "heat into the engine at the hot end", Power, "kW", func(p *p) *float64 { return &p.HeatIn }),
		outcome("coolant_heat", "heat given to the coolant", Power, "kW", func(p *p) *float64 { return &p.CoolantHeat }),
		outcome("brake_efficiency", "brake power over heat in", Number, "%", func(p *p) *float64 { return &p.BrakeEfficiency }),
		outcome("indicated_efficiency", "indicated power over heat in", Number, "%", func(p *p) *float64 { return &p.IndicatedEfficiency }),
		outcome("carnot_efficiency", "between mean hot metal and coolant inlet temperature", Number, "%", func(p *p) *float64 { return &p.CarnotEfficiency }),
		outcome("pressure_mean", "time mean of the working pressure", Pressure, "bar", func(p *p) *float64 { return &p.PressureMean }),
		outcome("pressure_max", "largest working pressure", Pressure, "bar", func(p *p) *float64 { return &p.PressureMax }),
		outcome("pressure_min", "smallest working pressure", Pressure, "bar", func(p *p) *float64 { return &p.PressureMin }),
		outcome("pressure_ratio", "largest over smallest working pressure", Number, "-", func(p *p) *float64 { return &p.PressureRatio }),
		outcome("torque", "mean shaft torque", Torque, "N m", func(p *p) *float64 { return &p.Torque }),
		outcome("forced_work", "work a cycle that the drive must put into the pistons", Energy, "J", func(p *p) *float64 { return &p.ForcedWork }),
		outcome("expansion_temperature", "time-mean gas temperature in the expansion space", Temperature, "degC", func(p *p) *float64 { return &p.ExpansionTemperature }),
		outcome("compression_temperature", "time-mean gas temperature in the compression space", Temperature, "degC", func(p *p) *float64 { return &p.CompressionTemperature }),
		outcome("energy_residual", "heat in less shaft work, coolant heat and losses to the surroundings, over heat in", Number, "-", func(p *p) *float64 { return &p.EnergyResidual }),
		outcome("step_error", "estimated error of the power by the time step of the cycle, over the power", Number, "-", func(p *p) *float64 { return &p.StepError }),

		outcome("swept_volume", "largest less smallest volume of the working space", Volume, "cm3", func(p *p) *float64 { return &p.SweptVolume }),
		outcome("dead_volume", "gas path outside the swept volumes of both spaces", Volume, "cm3", func(p *p) *float64 { return &p.DeadVolume }),
		outcome("dead_volume_ratio", "dead volume over swept volume of the expansion space", Number, "-", func(p *p) *float64 { return &p.DeadVolumeRatio }),
		outcome("gas_mass", "working gas in the engine", Mass, "g", func(p *p) *float64 { return &p.GasMass }),
		outcome("beale_number", "brake power / (mean pressure x swept volume of the piston x speed)", Number, "-", func(p *p) *float64 { return &p.BealeNumber }),
		outcome("west_number", "Beale number x (Th + Tc)/(Th - Tc)", Number, "-", func(p *p) *float64 { return &p.WestNumber }),
		outcome("piston_speed", "largest of the mean piston and displacer speeds", Speed, "m/s", func(p *p) *float64 { return &p.PistonSpeed }),
		outcome("mach", "largest Mach number in tubes, matrix and ducts", Number, "-", func(p *p) *float64 { return &p.Mach }),
		outcome("hot_metal_mass", "heater tubes, regenerator matrix and canisters, hot cylinder", Mass, "kg", func(p *p) *float64 { return &p.HotMetalMass }),

		outcome("heater.metal_temperature", "hottest outer tube wall: at the flux peak, where the gas is coldest", Temperature, "degC", func(p *p) *float64 { return &p.HeaterMetalTemperature }),
		outcome("heater.outer_temperature", "mean outer tube wall", Temperature, "degC", func(p *p) *float64 { return &p.HeaterOuterTemperature }),
		outcome("heater.inner_temperature", "mean inner tube wall", Temperature, "degC", func(p *p) *float64 { return &p.HeaterInnerTemperature }),
		outcome("heater.gas_temperature", "time-mean gas in the heated tubes", Temperature, "degC", func(p *p) *float64 { return &p.HeaterGasTemperature }),
		outcome("heater.heat_flux", "mean heat flux on the outer surface of the heated tubes", HeatFlux, "W/cm2", func(p *p) *float64 { return &p.HeaterHeatFlux }),
		outcome("heater.hoop_stress", "at the bore at the largest pressure, thick wall", Pressure, "MPa", func(p *p) *float64 { return &p.HeaterHoopStress }),
		outcome("heater.allowable_stress", "creep rupture stress at metal temperature and design life over the stress factor", Pressure, "MPa", func(p *p) *float64 { return &p.HeaterAllowableStress }),
		outcome("heater.stress_utilisation", "hoop stress over allowable stress", Number, "-", func(p *p) *float64 { return &p.HeaterStressUtilisation }),
		outcome("heater.thermal_stress", "at the bore, by the temperature drop across the wall at the flux peak; not in the utilisation", Pressure, "MPa", func(p *p) *float64 { return &p.HeaterThermalStress }),
		outcome("heater.life", "creep rupture life at hoop stress x stress factor and metal temperature; 1e9 h stands for more", Duration, "h", func(p *p) *float64 { return &p.HeaterLife }),
		outcome("heater.life_low", "lower end of that life by the scatter of creep data: about one heat in six breaks earlier", Duration, "h", func(p *p) *float64 { return &p.HeaterLifeLow }),
		outcome("heater.life_high", "upper end: about one heat in six lasts longer", Duration, "h", func(p *p) *float64 { return &p.HeaterLifeHigh }),
		outcome("heater.wall_needed", "wall thickness at which the hoop stress is the allowable stress; 1 m stands for none", Length, "mm", func(p *p) *float64 { return &p.HeaterWallNeeded }),
		outcome("cylinder.stress_utilisation", "hoop stress over allowable stress at the hot end of the cylinder wall", Number, "-", func(p *p) *float64 { return &p.CylinderStressUtilisation }),
		outcome("cylinder.wall_needed", "wall thickness of the cylinder at which the hoop stress is the allowable stress; 1 m stands for none", Length, "mm", func(p *p) *float64 { return &p.CylinderWallNeeded }),
		outcome("regenerator.shell_stress_utilisation", "hoop stress over allowable stress at the hot end of a canister", Number, "-", func(p *p) *float64 { return &p.RegeneratorShellStressUtilisation }),
		outcome("regenerator.shell_wall_needed", "wall thickness of a canister at which the hoop stress is the allowable stress; 1 m stands for none", Length, "mm", func(p *p) *float64 { return &p.RegeneratorShellWallNeeded }),
		outcome("heater.pitch_ratio", "pitch of the tubes on their ring over outer diameter, 0 when no ring is given", Number, "-", func(p *p) *float64 { return &p.HeaterPitchRatio }),
		outcome("heater.reynolds", "cycle-mean Reynolds number in the heater tubes", Number, "-", func(p *p) *float64 { return &p.HeaterReynolds }),
		outcome("heater.flow_loss", "power lost to flow friction in the heater", Power, "W", func(p *p) *float64 { return &p.HeaterFlowLoss }),

		outcome("regenerator.effectiveness", "heat returned over heat stored and returned; counts the lag of the film, not the swing of a light matrix", Number, "-", func(p *p) *float64 { return &p.RegeneratorEffectiveness }),
		outcome("regenerator.heat", "heat put into the matrix by the hot blow", Power, "kW", func(p *p) *float64 { return &p.RegeneratorHeat }),
		outcome("regenerator.pressure_heat", "net enthalpy flow through the matrix that goes with pressure, not with the lag of the film; either sign", Power, "W", func(p *p) *float64 { return &p.RegeneratorPressureHeat }),
		outcome("regenerator.ntu", "number of transfer units of one blow, cycle-mean film", Number, "-", func(p *p) *float64 { return &p.RegeneratorNTU }),
		outcome("regenerator.reynolds", "cycle-mean Reynolds number in the matrix", Number, "-", func(p *p) *float64 { return &p.RegeneratorReynolds }),
		outcome("regenerator.matrix_swing", "largest swing of the matrix temperature over a cycle", TemperatureDifference, "K", func(p *p) *float64 { return &p.RegeneratorMatrixSwing }),
		outcome("regenerator.flow_loss", "power lost to flow friction in the regenerator", Power, "W", func(p *p) *float64 { return &p.RegeneratorFlowLoss }),

		outcome("cooler.gas_temperature", "time-mean gas in the cooled tubes", Temperature, "degC", func(p *p) *float64 { return &p.CoolerGasTemperature }),
		outcome("cooler.wall_temperature", "mean inner tube wall of the cooler", Temperature, "degC", func(p *p) *float64 { return &p.CoolerWallTemperature }),
		outcome("cooler.bundle_diameter", "smallest circle that holds the cooler tubes at a pitch of 1.3 outer diameters", Length, "mm", func(p *p) *float64 { return &p.CoolerBundleDiameter }),
		outcome("cooler.reynolds", "cycle-mean Reynolds number in the cooler tubes", Number, "-", func(p *p) *float64 { return &p.CoolerReynolds }),
		outcome("cooler.flow_loss", "power lost to flow friction in the cooler", Power, "W", func(p *p) *float64 { return &p.CoolerFlowLoss }),
		outcome("coolant.outlet", "coolant temperature at its exit", Temperature, "degC", func(p *p) *float64 { return &p.CoolantOutlet }),
	}, driveOutputs(), sourceOutputs(), lossOutputs())
}

func outcome(name, text string, q Quantity, unitName string, at func(*model.Performance) *float64) Output {
	return Output{Name: name, Text: text, Quantity: q, Unit: unitName, at: at}
}

// driveOutputs are the loads of the drive.
func driveOutputs() []Output {
	type p = model.Performance
	rows := []Output{
		outcome("drive.torque_max", "largest torque at the shaft over a turn, with the inertia of the masses given", Torque, "N m", func(p *p) *float64 { return &p.Drive.TorqueMax }),
		outcome("drive.torque_min", "smallest torque at the shaft over a turn", Torque, "N m", func(p *p) *float64 { return &p.Drive.TorqueMin }),
		outcome("drive.fluctuation_energy", "that the flywheel takes up and gives back in a turn", Energy, "J", func(p *p) *float64 { return &p.Drive.FluctuationEnergy }),
		outcome("drive.flywheel", "moment of inertia, all that turns together, that holds drive.speed_fluctuation", Inertia, "kg m2", func(p *p) *float64 { return &p.Drive.Flywheel }),
		outcome("drive.piston_force", "largest axial force that a piston or displacer hands on, with inertia", Force, "kN", func(p *p) *float64 { return &p.Drive.PistonForce }),
		outcome("drive.rod_force", "largest force along a connecting rod", Force, "kN", func(p *p) *float64 { return &p.Drive.RodForce }),
		outcome("drive.side_thrust", "largest force of a piston on its cylinder", Force, "kN", func(p *p) *float64 { return &p.Drive.SideThrust }),
		outcome("drive.pin_load", "largest load of the bearing of a crank pin", Force, "kN", func(p *p) *float64 { return &p.Drive.PinLoad }),
		outcome("drive.shaking_force", "largest inertia force on the frame without counterweights", Force, "kN", func(p *p) *float64 { return &p.Drive.ShakingForce }),
		outcome("drive.shaking_couple", "largest couple of the inertia forces on the frame without counterweights", Torque, "N m", func(p *p) *float64 { return &p.Drive.ShakingCouple }),
		outcome("drive.counterweight", "best single counterweight on the shaft, on each crank of a rhombic drive: mass times radius", Unbalance, "kg m", func(p *p) *float64 { return &p.Drive.Counterweight }),
		outcome("drive.residual_force", "largest inertia force on the frame with it", Force, "kN", func(p *p) *float64 { return &p.Drive.ResidualForce }),
	}
	for i := range rows {
		switch rows[i].Name {
		case "drive.side_thrust":
			rows[i].When = Condition{"to slider-crank drives and the Ross yoke", func(e *model.Engine) bool {
				return e.Drive.Kind == drive.SliderCrank || e.Drive.Kind == drive.RossYoke
			}}
		case "drive.rod_force":
			rows[i].When = Condition{"to drives with connecting rods", func(e *model.Engine) bool { return e.Drive.Kind != drive.Sinusoidal }}
		case "drive.shaking_force":
			rows[i].When = Condition{"to machines whose moving masses are all given", massesGiven}
		case "drive.shaking_couple":
			rows[i].When = Condition{"to alpha, gamma and double-acting machines without a Ross yoke whose moving masses are all given",
				func(e *model.Engine) bool {
					return e.Layout != model.Beta && e.Drive.Kind != drive.RossYoke && massesGiven(e)
				}}
		case "drive.counterweight", "drive.residual_force":
			rows[i].When = Condition{"to alpha, beta and gamma machines whose moving masses are all given",
				func(e *model.Engine) bool { return e.Layout != model.DoubleActing && massesGiven(e) }}
		}
	}
	return rows
}

func massesGiven(e *model.Engine) bool {
	switch e.Layout {
	case model.Alpha:
		return e.ExpansionPiston.Mass > 0 && e.CompressionPiston.Mass > 0
	case model.DoubleActing:
		return e.Piston.Mass > 0
	}
	return e.Displacer.Mass > 0 && e.Piston.Mass > 0
}

// sourceOutputs are the results of burner and receiver.
func sourceOutputs() []Output {
	type p = model.Performance
	burner := []Output{
		outcome("fuel_power", "lower heating value times fuel flow", Power, "kW", func(p *p) *float64 { return &p.FuelPower }),
		outcome("fuel_efficiency", "brake power over fuel power", Number, "%", func(p *p) *float64 { return &p.FuelEfficiency }),
		outcome("burner.efficiency", "heat to the tubes over fuel power", Number, "%", func(p *p) *float64 { return &p.Burner.Efficiency }),
		outcome("burner.casing", "heat lost through the casing", Power, "kW", func(p *p) *float64 { return &p.Burner.Casing }),
		outcome("burner.chimney", "heat lost with the flue gas", Power, "kW", func(p *p) *float64 { return &p.Burner.Chimney }),
		outcome("burner.preheat", "heat given back to the air, within the burner", Power, "kW", func(p *p) *float64 { return &p.Burner.Preheat }),
		outcome("burner.radiation", "heat to the tubes by radiation", Power, "kW", func(p *p) *float64 { return &p.Burner.Radiation }),
		outcome("burner.fuel_flow", "flow of the fuel", MassFlow, "g/s", func(p *p) *float64 { return &p.Burner.FuelFlow }),
		outcome("burner.air_flow", "flow of the air", MassFlow, "g/s", func(p *p) *float64 { return &p.Burner.AirFlow }),
		outcome("burner.air_temperature", "air behind the preheater", Temperature, "degC", func(p *p) *float64 { return &p.Burner.AirTemperature }),
		outcome("burner.flame_temperature", "adiabatic flame with that air, complete combustion", Temperature, "degC", func(p *p) *float64 { return &p.Burner.FlameTemperature }),
		outcome("burner.gas_temperature", "gas before the heater tubes, behind radiation and casing loss", Temperature, "degC", func(p *p) *float64 { return &p.Burner.GasTemperature }),
		outcome("burner.bank_exit", "gas behind the heater tubes", Temperature, "degC", func(p *p) *float64 { return &p.Burner.BankExit }),
		outcome("burner.flue_temperature", "gas behind the preheater, to the chimney", Temperature, "degC", func(p *p) *float64 { return &p.Burner.FlueTemperature }),
		outcome("burner.film", "film coefficient outside the heater tubes, without radiation", FilmCoefficient, "W/(m2 K)", func(p *p) *float64 { return &p.Burner.Film }),
		outcome("burner.fin_efficiency", "efficiency of the fins, 1 without", Number, "-", func(p *p) *float64 { return &p.Burner.FinEfficiency }),
		outcome("burner.reynolds", "Reynolds number of the gas between the tubes, on their diameter", Number, "-", func(p *p) *float64 { return &p.Burner.Reynolds }),
	}
	receiver := []Output{
		outcome("solar_efficiency", "brake power over radiation into the aperture", Number, "%", func(p *p) *float64 { return &p.SolarEfficiency }),
		outcome("receiver.efficiency", "heat to the tubes over radiation into the aperture", Number, "%", func(p *p) *float64 { return &p.Receiver.Efficiency }),
		outcome("receiver.window_loss", "reflected or absorbed by the window", Power, "kW", func(p *p) *float64 { return &p.Receiver.WindowLoss }),
		outcome("receiver.reflection", "reflected by the wall and out of the aperture", Power, "kW", func(p *p) *float64 { return &p.Receiver.Reflection }),
		outcome("receiver.reradiation", "the wall's own radiation out of the aperture", Power, "kW", func(p *p) *float64 { return &p.Receiver.Reradiation }),
		outcome("receiver.convection", "convection out of the aperture", Power, "kW", func(p *p) *float64 { return &p.Receiver.Convection }),
		outcome("receiver.casing", "lost through the insulation", Power, "kW", func(p *p) *float64 { return &p.Receiver.Casing }),
		outcome("receiver.stagnation", "temperature of the wall without an engine; 4727 degC stands for more", Temperature, "degC", func(p *p) *float64 { return &p.Receiver.Stagnation }),
	}
	for i := range burner {
		burner[i].When = whenBurner()
	}
	for i := range receiver {
		receiver[i].When = whenReceiver()
	}
	return slices.Concat(burner, receiver)
}

// LossPrefix begins the names of the entries of the loss ledger.
const LossPrefix = "losses."

func lossOutputs() []Output {
	rows := []Output{
		outcome("flow_friction", "flow friction in all parts; heat to the gas where it is made", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.FlowFriction }),
		outcome("cycle_work", "p-V work lost to what one dimension leaves out; to the coolant", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.CycleWork }),
		outcome("leakage", "past the piston seal; to the coolant", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.Leakage }),
		outcome("gas_spring", "in a closed buffer space, by heat to its walls; to the coolant", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.GasSpring }),
		outcome("drive", "in the drive; to the surroundings", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.Drive }),
		outcome("seal_friction", "seals and bearings; to the surroundings", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.SealFriction }),
		outcome("reheat", "carried through the regenerator by gas that lags behind its metal; to the coolant", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.Reheat }),
		outcome("matrix_conduction", "through wires and gas, with dispersion; to the coolant", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.MatrixConduction }),
		outcome("canister_conduction", "along the canister walls; to the coolant", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.CanisterConduction }),
		outcome("cylinder_conduction", "along the cylinder wall; to the coolant", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.CylinderConduction }),
		outcome("displacer_conduction", "along the hot body; to the coolant", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.DisplacerConduction }),
		outcome("shuttle", "carried by the moving hot body; to the coolant", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.Shuttle }),
		outcome("appendix_gap", "carried by gas in the gap round the hot body; to the coolant", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.AppendixGap }),
		outcome("displacer_leakage", "past the seal of displacer or double-acting piston; to the coolant", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.DisplacerLeakage }),
	}
	for i := range rows {
		rows[i].Name = LossPrefix + rows[i].Name
	}
	return rows
}
