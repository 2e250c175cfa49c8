package cycle

import (
	"hotfront/model/correlation"
	"hotfront/model/gas"
)

// MaxCells is the largest number of cells of a gas path, both spaces included.
const MaxCells = 64

// MaxSteps is the largest number of time steps a cycle.
const MaxSteps = 512

// Kind is what a cell of the gas path is.
type Kind uint8

const (
	Space   Kind = iota // expansion or compression space, volume moves
	Passive             // duct, header, unheated tube: no heat, no change of volume
	Tube                // tube with a wall whose temperature does not change over a cycle
	Matrix              // porous matrix whose temperature swings
)

// Part is where a cell's heat and friction are booked.
type Part uint8

const (
	PartExpansion Part = iota
	PartHeater
	PartRegenerator
	PartCooler
	PartCompression
	PartDuct
	Parts int = iota
)

// Cell is one cell of the gas path as the caller describes it.
type Cell struct {
	Kind   Kind
	Part   Part
	Volume float64 // gas volume [m3]; a Space takes its volume from Path
	Area   float64 // flow area [m2]; Tube, Matrix
	Dh     float64 // hydraulic diameter [m]; Tube, Matrix
	Film   float64 // wetted area that exchanges heat [m2]; Tube, Matrix
	Slim   float64 // Dh over the length of the whole tube, for entry effects [-]; Tube

	Wall       float64 // first guess of the wall temperature [K]; Tube, Matrix
	Outer      float64 // temperature behind the wall's resistance; the wall's own where that is 0 [K]; Tube
	Resistance float64 // of the wall and the outer film of this cell [K/W]; Tube

	Capacity float64 // heat capacity of the matrix in the cell [J/K]; Matrix
	Conduct  float64 // axial conductance of the solid from this cell's centre to the next matrix cell's [W/K]; Matrix
	GasCross float64 // gas cross-section over the distance to the next matrix cell's centre, for gas conduction with dispersion [m]; Matrix

	FixedFilm float64 // film conductance [W/K] that replaces the correlation when > 0; any kind but Passive
}

// Motion is the volume of both spaces over a cycle of equal time steps. Index 2n is the time
// (n + Gamma) dt, index 2n+1 the time (n + 1) dt: the two stages of step n.
type Motion struct {
	Steps    int                   // time steps a cycle, <= MaxSteps
	Ve, DVe  [2 * MaxSteps]float64 // expansion space [m3] and its rate [m3/s]
	Vc, DVc  [2 * MaxSteps]float64 // compression space [m3] and its rate [m3/s]
	Ve0, Vc0 float64               // at the start [m3]
}

// Path is one machine at one operating point, as the cycle solver needs it.
type Path struct {
	Gas    gas.Gas
	Period float64 // duration of a cycle [s]
	Mean   float64 // time-mean pressure [Pa]

	Porous correlation.Porous // law of the matrix

	N     int // cells in use
	Cells [MaxCells]Cell

	Fine   Motion // motion of the spaces on the grid that results are taken from
	Coarse Motion // the same on fewer steps, on which the first cycles run; Steps = 0: none

	Target   float64 // when > 0: mean gas temperature asked for in the heater's Tube cells; Outer of these cells is moved to meet it [K]
	FixedRun bool    // keep the matrix at its Wall temperatures (closed-form limits)
}

// Gamma is the coefficient of the time stepper: stage times are (n + Gamma) dt and (n + 1) dt.
const Gamma = 0.29289321881345248 // 1 - 1/sqrt(2)
