package model

import (
	"hotfront/model/correlation"
	"hotfront/model/cycle"
	"hotfront/model/drive"
	"hotfront/model/gas"
)

// Version names the state of the physics: it changes whenever a result may change.
const Version = "10"

// Grid is the resolution of the cycle solver.
type Grid struct {
	Heater, Regenerator, Cooler int // cells
	Steps                       int // time steps a cycle
	CoarseSteps                 int // time steps of the first cycles, which only approach the periodic state; 0 = none
	Doublings                   int // how often the time steps may be doubled where the estimated error of the power is above stepError
}

// stepError is the estimated error of the power by the time step above which the steps are doubled [-].
const stepError = 0.005

// ProductionGrid is the grid every command uses; its error against finer grids is tested.
func ProductionGrid() Grid {
	return Grid{Heater: 6, Regenerator: 12, Cooler: 6, Steps: 48, CoarseSteps: 20, Doublings: 2}
}

// Workspace is all the memory an evaluation needs. It belongs to one goroutine at a time.
type Workspace struct {
	Grid     Grid
	Settings cycle.Settings

	Path   cycle.Path
	Cycle  cycle.Result
	solver *cycle.Solver
	fast   *correlation.Fast

	gas          gas.Gas
	state        gas.State
	geometry     geometry
	motion       motion
	friction     friction
	sections     [cycle.MaxCells + 4]section // sectionCount in use
	sectionCount int
	source       source

	loads loads
}

// NewWorkspace makes a workspace on the production grid.
func NewWorkspace() *Workspace { return NewWorkspaceGrid(ProductionGrid()) }

// NewWorkspaceGrid makes a workspace on a grid of the caller's.
func NewWorkspaceGrid(g Grid) *Workspace {
	if g.Heater < 1 || g.Regenerator < 2 || g.Cooler < 1 || g.Steps < 8 || g.Steps > cycle.MaxSteps-mostCylinders || g.CoarseSteps > cycle.MaxSteps ||
		g.Heater+g.Regenerator+g.Cooler+6 > cycle.MaxCells {
		panic("model: grid out of range")
	}
	fast := correlation.NewFast()
	return &Workspace{Grid: g, Settings: cycle.DefaultSettings(), solver: cycle.NewSolver(fast), fast: fast}
}

// Trace is what happened over the last evaluated cycle.
func (w *Workspace) Trace() *cycle.Trace { return &w.solver.Trace }

// motion is what the drive does, at the stage times of the solver.
type motion struct {
	mechanism drive.Mechanism
	extremes  drive.Extremes
}
