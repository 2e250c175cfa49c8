package studies

import (
	"slices"

	"hotfront/model"
)

// Output is one result of the model: one float64 field of model.Performance or model.Losses.
type Output struct {
	Name     string
	Text     string
	Quantity Quantity
	Unit     string // in which tables show it

	at func(p *model.Performance) *float64
}

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
		{"brake_power", "power at the shaft", Power, "kW", func(p *p) *float64 { return &p.BrakePower }},
		{"indicated_power", "p-V power after flow friction, cycle-work factor and leakage", Power, "kW", func(p *p) *float64 { return &p.IndicatedPower }},
		{"pv_power", "p-V power of both spaces at uniform pressure, before flow friction", Power, "kW", func(p *p) *float64 { return &p.PVPower }},
		{"flow_loss", "power lost to flow friction", Power, "kW", func(p *p) *float64 { return &p.FlowLoss }},
		{"heat_in", "heat into the engine at the hot end", Power, "kW", func(p *p) *float64 { return &p.HeatIn }},
		{"coolant_heat", "heat given to the coolant", Power, "kW", func(p *p) *float64 { return &p.CoolantHeat }},
		{"brake_efficiency", "brake power over heat in", Number, "%", func(p *p) *float64 { return &p.BrakeEfficiency }},
		{"indicated_efficiency", "indicated power over heat in", Number, "%", func(p *p) *float64 { return &p.IndicatedEfficiency }},
		{"carnot_efficiency", "between mean hot metal and coolant inlet temperature", Number, "%", func(p *p) *float64 { return &p.CarnotEfficiency }},
		{"pressure_mean", "time mean of the working pressure", Pressure, "bar", func(p *p) *float64 { return &p.PressureMean }},
		{"pressure_max", "largest working pressure", Pressure, "bar", func(p *p) *float64 { return &p.PressureMax }},
		{"pressure_min", "smallest working pressure", Pressure, "bar", func(p *p) *float64 { return &p.PressureMin }},
		{"pressure_ratio", "largest over smallest working pressure", Number, "-", func(p *p) *float64 { return &p.PressureRatio }},
		{"torque", "mean shaft torque", Torque, "N m", func(p *p) *float64 { return &p.Torque }},
		{"forced_work", "work a cycle that the drive must put into the pistons", Energy, "J", func(p *p) *float64 { return &p.ForcedWork }},
		{"expansion_temperature", "time-mean gas temperature in the expansion space", Temperature, "degC", func(p *p) *float64 { return &p.ExpansionTemperature }},
		{"compression_temperature", "time-mean gas temperature in the compression space", Temperature, "degC", func(p *p) *float64 { return &p.CompressionTemperature }},
		{"energy_residual", "heat in less shaft work, coolant heat and losses to the surroundings, over heat in", Number, "-", func(p *p) *float64 { return &p.EnergyResidual }},

		{"swept_volume", "largest less smallest volume of the working space", Volume, "cm3", func(p *p) *float64 { return &p.SweptVolume }},
		{"dead_volume", "gas path outside the swept volumes of both spaces", Volume, "cm3", func(p *p) *float64 { return &p.DeadVolume }},
		{"dead_volume_ratio", "dead volume over swept volume of the expansion space", Number, "-", func(p *p) *float64 { return &p.DeadVolumeRatio }},
		{"gas_mass", "working gas in the engine", Mass, "g", func(p *p) *float64 { return &p.GasMass }},
		{"beale_number", "brake power / (mean pressure x swept volume of the piston x speed)", Number, "-", func(p *p) *float64 { return &p.BealeNumber }},
		{"west_number", "Beale number x (Th + Tc)/(Th - Tc)", Number, "-", func(p *p) *float64 { return &p.WestNumber }},
		{"piston_speed", "largest of the mean piston and displacer speeds", Speed, "m/s", func(p *p) *float64 { return &p.PistonSpeed }},
		{"mach", "largest Mach number in tubes, matrix and ducts", Number, "-", func(p *p) *float64 { return &p.Mach }},
		{"hot_metal_mass", "heater tubes, regenerator matrix and canisters, hot cylinder", Mass, "kg", func(p *p) *float64 { return &p.HotMetalMass }},

		{"heater.metal_temperature", "hottest outer tube wall: at the flux peak, where the gas is coldest", Temperature, "degC", func(p *p) *float64 { return &p.HeaterMetalTemperature }},
		{"heater.outer_temperature", "mean outer tube wall", Temperature, "degC", func(p *p) *float64 { return &p.HeaterOuterTemperature }},
		{"heater.inner_temperature", "mean inner tube wall", Temperature, "degC", func(p *p) *float64 { return &p.HeaterInnerTemperature }},
		{"heater.gas_temperature", "time-mean gas in the heated tubes", Temperature, "degC", func(p *p) *float64 { return &p.HeaterGasTemperature }},
		{"heater.heat_flux", "mean heat flux on the outer surface of the heated tubes", HeatFlux, "W/cm2", func(p *p) *float64 { return &p.HeaterHeatFlux }},
		{"heater.hoop_stress", "at the bore at the largest pressure, thick wall", Pressure, "MPa", func(p *p) *float64 { return &p.HeaterHoopStress }},
		{"heater.allowable_stress", "creep rupture stress at metal temperature and design life over the stress factor", Pressure, "MPa", func(p *p) *float64 { return &p.HeaterAllowableStress }},
		{"heater.stress_utilisation", "hoop stress over allowable stress", Number, "-", func(p *p) *float64 { return &p.HeaterStressUtilisation }},
		{"heater.thermal_stress", "at the bore, by the temperature drop across the wall at the flux peak; not in the utilisation", Pressure, "MPa", func(p *p) *float64 { return &p.HeaterThermalStress }},
		{"heater.life", "creep rupture life at hoop stress x stress factor and metal temperature, true to a factor of three at best; 1e9 h stands for more", Duration, "h", func(p *p) *float64 { return &p.HeaterLife }},
		{"heater.wall_needed", "wall thickness at which the hoop stress is the allowable stress; 1 m stands for none", Length, "mm", func(p *p) *float64 { return &p.HeaterWallNeeded }},
		{"cylinder.stress_utilisation", "hoop stress over allowable stress at the hot end of the cylinder wall", Number, "-", func(p *p) *float64 { return &p.CylinderStressUtilisation }},
		{"cylinder.wall_needed", "wall thickness of the cylinder at which the hoop stress is the allowable stress; 1 m stands for none", Length, "mm", func(p *p) *float64 { return &p.CylinderWallNeeded }},
		{"regenerator.shell_stress_utilisation", "hoop stress over allowable stress at the hot end of a canister", Number, "-", func(p *p) *float64 { return &p.RegeneratorShellStressUtilisation }},
		{"regenerator.shell_wall_needed", "wall thickness of a canister at which the hoop stress is the allowable stress; 1 m stands for none", Length, "mm", func(p *p) *float64 { return &p.RegeneratorShellWallNeeded }},
		{"heater.pitch_ratio", "pitch of the tubes on their ring over outer diameter, 0 when no ring is given", Number, "-", func(p *p) *float64 { return &p.HeaterPitchRatio }},
		{"heater.reynolds", "cycle-mean Reynolds number in the heater tubes", Number, "-", func(p *p) *float64 { return &p.HeaterReynolds }},
		{"heater.flow_loss", "power lost to flow friction in the heater", Power, "W", func(p *p) *float64 { return &p.HeaterFlowLoss }},

		{"regenerator.effectiveness", "heat returned over heat stored and returned; counts the lag of the film, not the swing of a light matrix", Number, "-", func(p *p) *float64 { return &p.RegeneratorEffectiveness }},
		{"regenerator.heat", "heat put into the matrix by the hot blow", Power, "kW", func(p *p) *float64 { return &p.RegeneratorHeat }},
		{"regenerator.pressure_heat", "net enthalpy flow through the matrix that goes with pressure, not with the lag of the film; either sign", Power, "W", func(p *p) *float64 { return &p.RegeneratorPressureHeat }},
		{"regenerator.ntu", "number of transfer units of one blow, cycle-mean film", Number, "-", func(p *p) *float64 { return &p.RegeneratorNTU }},
		{"regenerator.reynolds", "cycle-mean Reynolds number in the matrix", Number, "-", func(p *p) *float64 { return &p.RegeneratorReynolds }},
		{"regenerator.matrix_swing", "largest swing of the matrix temperature over a cycle", TemperatureDifference, "K", func(p *p) *float64 { return &p.RegeneratorMatrixSwing }},
		{"regenerator.flow_loss", "power lost to flow friction in the regenerator", Power, "W", func(p *p) *float64 { return &p.RegeneratorFlowLoss }},

		{"cooler.gas_temperature", "time-mean gas in the cooled tubes", Temperature, "degC", func(p *p) *float64 { return &p.CoolerGasTemperature }},
		{"cooler.wall_temperature", "mean inner tube wall of the cooler", Temperature, "degC", func(p *p) *float64 { return &p.CoolerWallTemperature }},
		{"cooler.bundle_diameter", "smallest circle that holds the cooler tubes at a pitch of 1.3 outer diameters", Length, "mm", func(p *p) *float64 { return &p.CoolerBundleDiameter }},
		{"cooler.reynolds", "cycle-mean Reynolds number in the cooler tubes", Number, "-", func(p *p) *float64 { return &p.CoolerReynolds }},
		{"cooler.flow_loss", "power lost to flow friction in the cooler", Power, "W", func(p *p) *float64 { return &p.CoolerFlowLoss }},
		{"coolant.outlet", "coolant temperature at its exit", Temperature, "degC", func(p *p) *float64 { return &p.CoolantOutlet }},
	}, lossOutputs())
}

// LossPrefix begins the names of the entries of the loss ledger.
const LossPrefix = "losses."

func lossOutputs() []Output {
	rows := []Output{
		{"flow_friction", "flow friction in all parts; heat to the gas where it is made", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.FlowFriction }},
		{"cycle_work", "p-V work lost to what one dimension leaves out; to the coolant", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.CycleWork }},
		{"leakage", "past the piston seal; to the coolant", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.Leakage }},
		{"drive", "in the drive; to the surroundings", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.Drive }},
		{"seal_friction", "seals and bearings; to the surroundings", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.SealFriction }},
		{"reheat", "carried through the regenerator by gas that lags behind its metal; to the coolant", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.Reheat }},
		{"matrix_conduction", "through wires and gas, with dispersion; to the coolant", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.MatrixConduction }},
		{"canister_conduction", "along the canister walls; to the coolant", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.CanisterConduction }},
		{"cylinder_conduction", "along the cylinder wall; to the coolant", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.CylinderConduction }},
		{"displacer_conduction", "along the hot body; to the coolant", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.DisplacerConduction }},
		{"shuttle", "carried by the moving hot body; to the coolant", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.Shuttle }},
		{"appendix_gap", "carried by gas in the gap round the hot body; to the coolant", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.AppendixGap }},
		{"displacer_leakage", "past the displacer seal; to the coolant", Power, "W", func(p *model.Performance) *float64 { return &p.Losses.DisplacerLeakage }},
	}
	for i := range rows {
		rows[i].Name = LossPrefix + rows[i].Name
	}
	return rows
}
