package cycle

import (
	"hotfront/model/correlation"
	"hotfront/model/gas"
)

// Solver holds the state of one solution and all its scratch memory, so that solving allocates
// nothing. It is used by one goroutine at a time.
type Solver struct {
	fast *correlation.Fast
	gas  gas.Gas
	path *Path
	move *Motion // the grid in use

	n                       int
	firstMatrix, lastMatrix int // cells; first > last: none
	kind                    [MaxCells]Kind
	part                    [MaxCells]Part
	faceKind                [MaxCells]faceKind

	// State and prediction.
	p       float64
	t       [MaxCells]float64     // gas temperature [K]
	dT      [MaxCells + 1]float64 // its change in the last Newton step [K]
	flow    [MaxCells]float64     // mass flow over face i|i+1, positive towards the compression space [kg/s]
	flowOld [MaxCells]float64     // flow at the start of the last step [kg/s]
	wall    [MaxCells]float64     // wall or matrix temperature [K]
	lift    float64               // of the temperature behind the heater walls, to meet Path.Target [K]

	// Conserved quantities at the start of the step, and what the running stage starts from.
	mass, energy          [MaxCells]float64 // [kg], [J]
	mass0, energy0        [MaxCells]float64
	metal0                [MaxCells]float64 // matrix temperature the stage starts from [K]
	wall0                 [MaxCells]float64 // wall temperature the film sees, matrix eliminated [K]
	uae                   [MaxCells]float64 // film conductance, matrix eliminated [W/K]
	ua                    [MaxCells]float64 // film conductance [W/K]
	massRate, energyRate  [MaxCells]float64 // of the first stage
	metalRate, metalDrift [MaxCells]float64 // of the matrix temperature, and the part of it by axial conduction [K/s]
	warmth                [MaxCells]float64 // heat from the wall into the gas at the stage [W]
	perCapacity           [MaxCells]float64 // 1/Capacity of a matrix cell, 0 where the matrix is held [K/J]
	volume                [MaxCells]float64
	m, h, cp, hp, mT, mp  [MaxCells]float64
	hFace, cpFace         [MaxCells]float64
	wLeft, wRight         [MaxCells]float64
	balance               [MaxCells]balance
	flux                  [MaxCells]flux
	reduced               [MaxCells]reduced
	state                 gas.State
	isobar                gas.Isobar

	// Film factors, set once a cycle at the mean temperature of each cell.
	filmScale [MaxCells]float64 // k Film / Dh [W/K]
	reScale   [MaxCells]float64 // Re over mass flow [s/kg]
	prandtl   [MaxCells]float64
	tubeFilm  [MaxCells]correlation.TubeFilm
	viscosity [MaxCells]float64

	conduct   [MaxCells]float64 // axial conductance between matrix cells i and i+1, solid, gas and dispersion [W/K]
	wallStart [MaxCells]float64 // matrix temperature at the start of the cycle [K]
	tStart    [MaxCells]float64 // gas temperature at the start of the cycle [K]
	gain      [MaxCells]float64 // energy that a matrix cell gained over the cycle [J]
	shift     [MaxCells]float64 // last move of the mean matrix profile [K]

	sums    sums
	mixing  mixing
	tangent tangent
	newton  int

	before     [MaxCells]float64 // temperatures before a Newton step [K]
	pBefore    float64           // pressure before the last one [Pa]
	coarseWork float64           // of the last cycle on the coarse grid, NaN before one [J]

	Trace Trace
}

// sums are integrals over one cycle.
type sums struct {
	pressure         float64           // integral p dt
	work             [2]float64        // of expansion and compression space [J]
	heat             [MaxCells]float64 // from the wall into the gas [J]
	temperature      [MaxCells]float64 // integral T dt
	film             [MaxCells]float64 // integral UA dt [J/K]
	flowAbs          [MaxCells]float64 // integral |M| dt over the face [kg]
	blow             [MaxCells]float64 // integral (cp M)^2/UA dt over the matrix face [J/K]
	enthalpy         [MaxCells]float64 // integral of the enthalpy flow over the face [J]
	axial            [MaxCells]float64 // axial conduction between matrix cells i and i+1 [J]
	metal            [MaxCells]float64 // integral of the matrix temperature dt
	wallMax, wallMin [MaxCells]float64 // of the matrix temperature [K]
	heatIn           [MaxCells]float64 // from gas into the matrix while it warms it [J]
}

// Trace is what happened over the last cycle, at both stages of each step (index as in Path).
type Trace struct {
	Pressure [2 * MaxSteps]float64           // [Pa]
	Flow     [2 * MaxSteps][MaxCells]float64 // [kg/s]
	Temp     [2 * MaxSteps][MaxCells]float64 // gas [K]
	Mass     [2 * MaxSteps][MaxCells]float64 // gas in a cell [kg]
}

// NewSolver makes a solver that reads the laws from fast.
func NewSolver(fast *correlation.Fast) *Solver {
	return &Solver{fast: fast}
}
