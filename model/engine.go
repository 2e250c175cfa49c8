package model

import (
	"hotfront/model/drive"
	"hotfront/model/gas"
	"hotfront/model/heat"
	"hotfront/model/metal"
)

// Layout is the arrangement of pistons and cylinders.
type Layout uint8

const (
	Alpha        Layout = iota // two pistons in two cylinders
	Beta                       // displacer and piston in one cylinder
	Gamma                      // displacer and piston in cylinders of their own
	DoubleActing               // a ring of cylinders with one piston each: hot space above it, cold space of the neighbour's circuit below
)

// MatrixKind is the kind of porous matrix in the regenerator.
type MatrixKind uint8

const (
	WovenScreen MatrixKind = iota
	RandomFibre
)

// HeatKind says how the hot end is given.
type HeatKind uint8

const (
	HeatTubeWall HeatKind = iota // mean outer tube-wall temperature
	HeatTubeGas                  // mean gas temperature in the heated tubes
	HeatBurner                   // burner; the tube wall is given and the fuel follows, or the fuel and the wall follows
	HeatReceiver                 // receiver of concentrated radiation; the tube wall follows
)

// Engine is one design: the input of the model. Everything is SI. Zero values are not defaults;
// defaults live in the table of fields of package studies.
type Engine struct {
	Layout         Layout
	Cylinders      int // of a double-acting machine, 3 to 12; as many circuits, and all parts below are those of one
	Gas            gas.Kind
	ChargePressure float64 // time mean of the working pressure over a cycle [Pa]
	Speed          float64 // revolutions per second [Hz]

	Drive Drive

	Displacer         Reciprocator // beta, gamma
	Piston            Reciprocator // beta, gamma, double-acting; in a beta its bore is the displacer's cylinder bore
	ExpansionPiston   Reciprocator // alpha
	CompressionPiston Reciprocator // alpha

	Cylinder Cylinder

	ExpansionClearance   float64 // volume of the expansion space at its smallest [m3]
	CompressionClearance float64 // volume of the compression space at its smallest [m3]
	BufferVolume         float64 // mean volume of the buffer space behind the piston [m3]; 0 = large, pressure constant

	Heater      Heater
	Regenerator Regenerator
	Cooler      Cooler

	ExpansionDuct   Duct // expansion space to heater
	HotDuct         Duct // heater to regenerator
	ColdDuct        Duct // regenerator to cooler
	CompressionDuct Duct // cooler to compression space

	Heat    Heat
	Coolant Coolant
}

// circuits is the number of equal gas circuits of the machine.
func (e *Engine) circuits() float64 {
	if e.Layout == DoubleActing {
		return float64(e.Cylinders)
	}
	return 1
}

// HasDisplacer tells whether a displacer, not a piston, stands between hot and cold end.
func (l Layout) HasDisplacer() bool { return l == Beta || l == Gamma }

// Drive is the mechanism that moves the pistons.
type Drive struct {
	Kind         drive.Kind
	PhaseAngle   float64 // expansion volume (displacer) leads the compression volume (piston) by this [rad]; sinusoidal, slider-crank; not read in a double-acting machine
	RodLength    float64 // connecting rod [m]; slider-crank, rhombic, Ross yoke
	CrankRadius  float64 // [m]; rhombic, Ross yoke
	Eccentricity float64 // distance of the crank axis from the cylinder axis [m]; rhombic

	YokeArm       float64 // from crank pin to tail pin [m]; Ross yoke
	YokeHalfWidth float64 // from crank pin to each rod's pin, and half the distance of the cylinders [m]; Ross yoke
	LinkLength    float64 // that guides the tail pin [m]; Ross yoke

	SpeedFluctuation float64 // largest less smallest speed over the mean that the flywheel is to allow [-]; 0 = no flywheel worked out
	CylinderAngle    float64 // from the axis of the first body to that of the second, in the sense of rotation [rad]; alpha, gamma
	CylinderDistance float64 // of both axes along the shaft [m]; alpha, gamma
	CylinderCircle   float64 // diameter of the circle on which the cylinders stand [m]; double-acting, 0 = not given
}

// Reciprocator is a displacer or a piston.
type Reciprocator struct {
	Bore       float64 // of its cylinder [m]
	Stroke     float64 // [m]; with a rhombic drive or a Ross yoke it follows from the drive and is not given
	Rod        float64 // rod through the compression space [m]; displacer and double-acting piston only, 0 = none
	Length     float64 // of the hot body (displacer, dome of an expansion or double-acting piston) from hot face to seal [m]
	Gap        float64 // radial gap between hot body and cylinder wall [m]
	Wall       float64 // wall thickness of the hollow hot body [m]
	Mass       float64 // that moves, with its rod and the connecting rod's share [kg]; 0 = not given, inertia not counted
	SealGap    float64 // radial gap of the seal that stands for its leakage [m]; 0 = tight
	SealLength float64 // length of that seal [m]
}

// Cylinder is the wall round the hot body, from hot end to cold end.
type Cylinder struct {
	Wall  float64 // thickness [m]
	Alloy metal.Alloy
}

// Heater is a bundle of equal tubes in parallel.
type Heater struct {
	TubeCount    int
	TubeBore     float64 // inner diameter [m]
	TubeWall     float64 // wall thickness [m]
	TubeLength   float64 // from header to header [m]
	HeatedLength float64 // part of the length that takes up heat [m]
	EndLoss      float64 // sum of the loss coefficients of entry, exit and bends, on the dynamic pressure in the tube [-]
	Alloy        metal.Alloy
	Rows         int     // circles on which the tubes stand, one behind the other in the way of a burner's gas, equally filled
	RingDiameter float64 // mean diameter of these circles [m]; 0 = not given, fit not checked
	FluxPeaking  float64 // largest local heat flux over the mean [-], >= 1
	DesignLife   float64 // [s]
	StressFactor float64 // creep rupture stress at the design life over allowable stress [-], >= 1
}

// Regenerator is one or several equal canisters in parallel.
type Regenerator struct {
	Kind          MatrixKind
	Count         int
	Diameter      float64     // outer diameter of the matrix in one canister [m]
	InnerDiameter float64     // 0 for a full cylinder, else an annulus [m]
	Length        float64     // [m]
	WireDiameter  float64     // [m]
	Porosity      float64     // [-]
	Alloy         metal.Alloy // of the matrix
	CanisterWall  float64     // wall thickness of the canister [m]
	CanisterAlloy metal.Alloy
}

// Cooler is a bundle of equal tubes in parallel, coolant outside.
type Cooler struct {
	TubeCount     int
	TubeBore      float64 // [m]
	TubeWall      float64 // [m]
	TubeLength    float64 // [m]
	CooledLength  float64 // part of the length that gives off heat [m]
	EndLoss       float64 // as in Heater [-]
	Alloy         metal.Alloy
	ShellDiameter float64 // inner diameter of the shell round the bundle, all shells of the machine as one [m]; 0 = not given, fit not checked
}

// Duct is the gas path between two parts. A volume of 0 means none.
type Duct struct {
	Volume float64 // [m3]
	Area   float64 // flow area [m2]; 0 with Loss 0 = no flow loss
	Loss   float64 // loss coefficient on the dynamic pressure in Area [-]
}

// Heat says how the hot end is given.
type Heat struct {
	Kind        HeatKind
	Temperature float64 // mean outer tube wall, or mean gas in the tubes [K]; not read where the wall follows from the source
	Burner      Burner
	Receiver    Receiver
}

// Burner heats the tubes with the gas of a flame; its bank of tubes is the heater. See package heat.
type Burner struct {
	FuelKind  heat.FuelKind
	Given     heat.Fuel // of a GivenFuel
	FuelPower float64   // lower heating value times fuel flow [W]; 0 = as much as keeps the tube wall at Heat.Temperature
	ExcessAir float64   // air over stoichiometric air [-], >= 1

	PreheaterEffectiveness float64 // [-], 0..1; this or the next, both 0 = no preheater
	PreheaterConductance   float64 // [W/K]

	Ambient           float64 // temperature of air, fuel and surroundings [K]
	CasingShare       float64 // heat through the casing over fuel power [-], 0..1
	CasingConductance float64 // further heat through it, per difference of gas to ambient temperature [W/K]

	Arrangement     heat.Arrangement
	RowPitch        float64 // from row to row over the outer diameter of the tubes [-]; not read with one row
	Fins            heat.Fins
	FlameEmissivity float64 // of the gas in the chamber [-], 0..1; 0 = no radiation
	WallEmissivity  float64 // of the tubes [-], 0..1
	RadiantArea     float64 // of the tubes that the chamber sees [m2]; 0 = the front of the bank
}

// Receiver takes up concentrated radiation; its wall is the outside of the tubes. See package heat.
type Receiver struct {
	Power               float64 // radiation into the aperture [W]
	ApertureDiameter    float64 // [m]
	WallArea            float64 // inner wall of the cavity without the aperture [m2]
	Absorptance         float64 // of the wall for sunlight [-], 0..1
	Emittance           float64 // of the wall for its own radiation [-], 0..1
	WindowTransmittance float64 // for sunlight [-], 0..1; 1 = no window
	WindowThermal       float64 // share of the wall's own radiation that the window lets out [-], 0..1; 1 = no window
	Film                float64 // convection on the aperture area [W/(m2 K)]
	CasingConductance   float64 // heat loss through the insulation [W/K]
	Ambient             float64 // temperature of air, surroundings and sky [K]
}

// Held tells whether the temperature of the hot end is given, and does not follow from the heat source.
func (h *Heat) Held() bool {
	return h.Kind <= HeatTubeGas || h.Kind == HeatBurner && h.Burner.FuelPower == 0
}

// Coolant cools the outside of the cooler tubes (water).
type Coolant struct {
	Inlet float64 // temperature [K]
	Flow  float64 // [kg/s], of the whole machine
	Film  float64 // outer film coefficient [W/(m2 K)]
}

// Corrections are the factors by which the model is fitted to measured engines.
type Corrections struct {
	FlowFriction  float64 // multiplies every pressure difference by friction [-], >= 0
	CycleWork     float64 // share of the p-V work that survives what one dimension leaves out [-], 0..1; the rest goes to the coolant
	Effectiveness float64 // of the drive, E of Senft's theorem [-], 0..1
	SealFriction  float64 // friction mean effective pressure of seals and bearings on the swept volume of the piston [Pa]
}

// NoCorrections is the model as it stands: factors 1, no drive friction.
func NoCorrections() Corrections {
	return Corrections{FlowFriction: 1, CycleWork: 1, Effectiveness: 1, SealFriction: 0}
}
