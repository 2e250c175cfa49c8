package model

// Performance is the output of the model, SI throughout. Names in results are those of the table
// in package studies; the comment of each field is the text shown to users.
type Performance struct {
	BrakePower             float64 // power at the shaft [W]
	IndicatedPower         float64 // p-V power after flow friction, cycle-work factor, leakage and gas spring [W]
	PVPower                float64 // p-V power of both spaces at uniform pressure, before flow friction [W]
	FlowLoss               float64 // power lost to flow friction, corrected [W]
	HeatIn                 float64 // heat into the engine at the hot end [W]
	CoolantHeat            float64 // heat given to the coolant [W]
	BrakeEfficiency        float64 // brake power over heat in [-]
	IndicatedEfficiency    float64 // indicated power over heat in [-]
	CarnotEfficiency       float64 // between mean hot metal and coolant inlet temperature [-]
	PressureMean           float64 // time mean of the working pressure [Pa]
	PressureMax            float64 // largest working pressure [Pa]
	PressureMin            float64 // smallest working pressure [Pa]
	PressureRatio          float64 // largest over smallest working pressure [-]
	ForcedWork             float64 // work a cycle that the drive must put into the pistons [J]
	Torque                 float64 // mean shaft torque [N m]
	ExpansionTemperature   float64 // time-mean gas temperature in the expansion space [K]
	CompressionTemperature float64 // time-mean gas temperature in the compression space [K]
	EnergyResidual         float64 // heat in less shaft work, coolant heat and losses to the surroundings, over heat in [-]

	SweptVolume     float64 // largest less smallest volume of the working space [m3]
	DeadVolume      float64 // volume of the gas path outside the swept volumes of both spaces [m3]
	DeadVolumeRatio float64 // dead volume over swept volume of the expansion space [-]
	GasMass         float64 // working gas in the engine [kg]
	BealeNumber     float64 // brake power / (mean pressure x swept volume of the piston x speed) [-]
	WestNumber      float64 // Beale number x (Th + Tc)/(Th - Tc) [-]
	PistonSpeed     float64 // largest of the mean piston and displacer speeds [m/s]
	Mach            float64 // largest Mach number in tubes, matrix and ducts [-]
	HotMetalMass    float64 // heater tubes, regenerator matrix and canisters, hot cylinder [kg]

	HeaterMetalTemperature            float64 // hottest outer tube wall: at the flux peak, where the gas is coldest [K]
	HeaterOuterTemperature            float64 // mean outer tube wall [K]
	HeaterInnerTemperature            float64 // mean inner tube wall [K]
	HeaterGasTemperature              float64 // time-mean gas in the heated tubes [K]
	HeaterHeatFlux                    float64 // mean heat flux on the outer surface of the heated tubes [W/m2]
	HeaterHoopStress                  float64 // at the bore at the largest pressure, thick wall [Pa]
	HeaterAllowableStress             float64 // creep rupture stress at metal temperature and design life over the stress factor [Pa]
	HeaterStressUtilisation           float64 // hoop stress over allowable stress [-]
	HeaterThermalStress               float64 // at the bore, by the mean temperature drop across the wall at the flux peak; not in the utilisation [Pa]
	HeaterLife                        float64 // creep rupture life at hoop stress x stress factor and metal temperature; 1e9 h stands for more [s]
	HeaterLifeLow                     float64 // and its lower end by the scatter of creep data, from heat to heat and about the fit, one standard deviation [s]
	HeaterLifeHigh                    float64 // upper end [s]
	HeaterWallNeeded                  float64 // wall thickness at which the hoop stress is the allowable stress; 1 m stands for none [m]
	CylinderStressUtilisation         float64 // hoop stress over allowable stress at the hot end of the cylinder wall [-]
	CylinderWallNeeded                float64 // as for the heater [m]
	RegeneratorShellStressUtilisation float64 // hoop stress over allowable stress at the hot end of a regenerator canister [-]
	RegeneratorShellWallNeeded        float64 // as for the heater [m]
	HeaterPitchRatio                  float64 // pitch of the tubes on their ring over outer diameter [-]; 0 when no ring is given
	HeaterReynolds                    float64 // cycle-mean Reynolds number [-]
	HeaterFlowLoss                    float64 // [W]

	RegeneratorEffectiveness float64 // heat returned over heat stored and returned; counts the lag of the film, not the swing of a light matrix [-]
	RegeneratorHeat          float64 // heat put into the matrix by the hot blow [W]
	RegeneratorPressureHeat  float64 // net enthalpy flow through the matrix that goes with pressure, not with the film's lag; either sign [W]
	RegeneratorNTU           float64 // of one blow, cycle-mean film [-]
	RegeneratorReynolds      float64 // cycle-mean [-]
	RegeneratorMatrixSwing   float64 // largest swing of the matrix temperature over a cycle [K]
	RegeneratorFlowLoss      float64 // [W]

	CoolerGasTemperature  float64 // time-mean gas in the cooled tubes [K]
	CoolerWallTemperature float64 // mean inner tube wall [K]
	CoolerBundleDiameter  float64 // smallest circle that holds the tubes at a pitch of 1.3 outer diameters [m]
	CoolerReynolds        float64 // cycle-mean [-]
	CoolerFlowLoss        float64 // [W]
	CoolantOutlet         float64 // [K]

	Drive DriveResult

	FuelPower       float64 // lower heating value times fuel flow [W]
	FuelEfficiency  float64 // brake power over fuel power [-]
	Burner          BurnerResult
	SolarEfficiency float64 // brake power over radiation into the aperture [-]
	Receiver        ReceiverResult

	Losses   Losses
	Warnings Warnings

	Cause  Cause // why there is no result; None for a valid one
	Cycles int   // cycles to the periodic state
	Steps  int   // time steps a cycle
	// StepError is the estimated error of the power by the time step, over the power [-]; 1 also without an estimate.
	StepError float64
}

// BurnerResult is the state of the burner; FuelPower = heat in + Casing + Chimney. All zero without one.
type BurnerResult struct {
	Efficiency       float64 // heat to the tubes over fuel power [-]
	Casing           float64 // heat through the casing [W]
	Chimney          float64 // heat in the flue gas [W]
	Preheat          float64 // heat given back to the air, within the burner [W]
	Radiation        float64 // heat to the tubes by radiation [W]
	FuelFlow         float64 // [kg/s]
	AirFlow          float64 // [kg/s]
	AirTemperature   float64 // behind the preheater [K]
	FlameTemperature float64 // adiabatic, with that air [K]
	GasTemperature   float64 // before the bank of tubes [K]
	BankExit         float64 // of the gas behind the bank [K]
	FlueTemperature  float64 // behind the preheater [K]
	Film             float64 // film coefficient in the bank, without radiation [W/(m2 K)]
	FinEfficiency    float64 // [-]; 1 without fins
	Reynolds         float64 // in the bank, on the tube diameter [-]
}

// ReceiverResult is the state of the receiver; its radiation = heat in + WindowLoss + Reflection + Reradiation +
// Convection + Casing. All zero without one.
type ReceiverResult struct {
	Efficiency  float64 // heat to the tubes over radiation into the aperture [-]
	WindowLoss  float64 // reflected or absorbed by the window [W]
	Reflection  float64 // reflected by the wall and out of the aperture [W]
	Reradiation float64 // [W]
	Convection  float64 // [W]
	Casing      float64 // [W]
	Stagnation  float64 // wall temperature without an engine; 5000 K stands for more [K]
}

// Losses is the ledger, in watts; all are >= 0. Where each ends up is said by its comment.
type Losses struct {
	FlowFriction        float64 // all parts; heat to the gas where it is made [W]
	CycleWork           float64 // p-V work lost to what one dimension leaves out; to the coolant [W]
	Leakage             float64 // past the piston seal; to the coolant [W]
	GasSpring           float64 // in a closed buffer space, by heat to its walls; to the coolant [W]
	Drive               float64 // in the drive, by Senft's theorem; to the surroundings [W]
	SealFriction        float64 // seals and bearings; to the surroundings [W]
	Reheat              float64 // enthalpy carried through the regenerator by gas that lags behind its metal; to the coolant, inside the cycle [W]
	MatrixConduction    float64 // through wires and gas, with dispersion; to the coolant, inside the cycle [W]
	CanisterConduction  float64 // to the coolant [W]
	CylinderConduction  float64 // to the coolant [W]
	DisplacerConduction float64 // to the coolant [W]
	Shuttle             float64 // to the coolant [W]
	AppendixGap         float64 // to the coolant [W]
	DisplacerLeakage    float64 // past the displacer seal; to the coolant [W]
}

// Warnings is a set of places where the model was used at or beyond its stated range.
type Warnings uint32

const (
	WarnScreenRange  Warnings = 1 << iota // Reynolds number or porosity outside the range of the matrix correlation
	WarnMach                              // Mach number above 0.2
	WarnGasRange                          // gas temperature or pressure outside the property fits
	WarnCreepRange                        // metal temperature or life outside the creep data; extrapolated
	WarnTubeRange                         // Reynolds number outside the range of the tube correlation
	WarnFitUnchecked                      // no ring or shell diameter given: fit of the tubes not checked
	WarnPistonSpeed                       // mean piston speed above 6 m/s (common practice)
	WarnFlame                             // adiabatic flame above 2200 K: dissociation left out, heat overstated
	WarnDewPoint                          // flue gas below its dew point
)

// Cause says why a design has no result. It is an error that costs no allocation.
type Cause uint8

const (
	None              Cause = iota
	BadInput                // a quantity is not finite or has the wrong sign
	HeatedTooLong           // heated (cooled) length above tube length
	BoresDiffer             // displacer and piston of a beta machine have different bores
	TubesOverlap            // tubes do not fit on their ring
	BundleTooWide           // cooler tubes do not fit in their shell
	RodTooShort             // the connecting rod cannot turn
	CranksCollide           // crank pins of a rhombic drive meet
	YokeJams                // yoke and link of a Ross yoke do not close at every crank angle
	BufferTooSmall          // buffer space smaller than the piston's displacement
	NoHeat                  // the design takes up no heat
	GapTooWide              // gap, wall or rod larger than the body
	AnnulusInverted         // inner diameter of the matrix above its outer diameter
	MatrixImpossible        // porosity and wire that cannot be made
	ColderThanCoolant       // hot end not above the coolant
	SourceTooWeak           // the heat source does not keep the hot end 50 K above the coolant, or gives the heat at no fuel power
	SourceTooHot            // the heat source drives the tube wall above 1800 K
	ApertureTooWide         // aperture of the receiver larger than its wall
	BankImpossible          // tubes, pitches or fins that the burner's gas cannot flow through
	BankRange               // flow or pitches of the burner's tube bank, or its fins, outside their laws
	NoConvergence           // periodic state not reached
	Diverged                // solution left the physical range
)
