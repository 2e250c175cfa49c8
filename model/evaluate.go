package model

import (
	"math"

	"hotfront/model/cycle"
	"hotfront/model/gas"
)

// Evaluate works out the performance of a design: the one entry to the model. It fills dst and
// allocates nothing; w holds all its memory and, afterwards, the history of the cycle.
//
// A design that cannot be built, or whose periodic state is not found, has dst.Cause set and every
// number zero. Use beyond the stated range of a law shows in dst.Warnings.
func Evaluate(dst *Performance, e *Engine, c *Corrections, w *Workspace) {
	*dst = Performance{}
	dst.Cause = w.evaluate(dst, e, c)
	if dst.Cause == None && !dst.finite() {
		dst.Cause = Diverged
	}
	if dst.Cause != None {
		cause, cycles := dst.Cause, dst.Cycles
		*dst = Performance{Cause: cause, Cycles: cycles, Steps: w.Path.Fine.Steps}
	}
}

func (w *Workspace) evaluate(dst *Performance, e *Engine, c *Corrections) Cause {
	dst.Steps = w.Grid.Steps
	if cause := w.geometry.set(e); cause != None {
		return cause
	}
	dst.Steps = w.steps(e)
	if e.Heat.Held() && e.Heat.Temperature <= e.Coolant.Inlet+1 {
		return ColderThanCoolant
	}
	if !c.valid() {
		return BadInput
	}
	w.gas = gas.New(e.Gas)
	if cause := w.setMotion(e); cause != None {
		return cause
	}
	if cause := w.source.prepare(e, &w.geometry); cause != None {
		return cause
	}
	var cause Cause
	if e.Heat.Held() {
		cause = w.run(dst, e, c, e.Heat.Temperature, false)
	} else {
		cause = w.runSource(dst, e, c)
	}
	if cause != None {
		return cause
	}
	if cause := w.setSource(dst, e); cause != None {
		return cause
	}
	w.setDriveLoads(&dst.Drive, e)
	w.setMetal(dst, e)
	w.setWarnings(dst, e)
	return None
}

// run solves the cycle with the hot end at a temperature [K] and draws up its ledger. near says that the last
// solution was of the same design at another temperature. Where the step of time costs the power more than stepError the
// steps are doubled.
func (w *Workspace) run(dst *Performance, e *Engine, c *Corrections, hot float64, near bool) Cause {
	w.setPath(e, hot)
	if near {
		w.solver.Resume(&w.Cycle, &w.Path, w.Settings)
	} else {
		w.solver.Solve(&w.Cycle, &w.Path, w.Settings)
	}
	cause := w.book(dst, e, c)
	finest := min(w.steps(e)<<w.Grid.Doublings, cycle.MaxSteps)
	for w.Cycle.Converged && w.tooCoarse(dst) && 2*w.Path.Fine.Steps <= finest {
		w.fillMotion(&w.Path.Fine, e, 2*w.Path.Fine.Steps)
		w.solver.Refine(&w.Cycle, &w.Path, w.Settings)
		cause = w.book(dst, e, c)
	}
	dst.Cycles += w.Cycle.Cycles
	dst.Steps = w.Path.Fine.Steps
	return cause
}

// book draws up the ledger of the cycle just solved.
func (w *Workspace) book(dst *Performance, e *Engine, c *Corrections) Cause {
	dst.StepError = 0
	if w.Cycle.Diverged {
		return Diverged
	}
	if !w.Cycle.Converged {
		return NoConvergence
	}
	w.setFriction(e)
	if !w.setForces(e, c.FlowFriction) {
		return BufferTooSmall
	}
	w.setPerformance(dst, e, c)
	dst.StepError = w.stepError(dst)
	if heater := w.heat(cycle.PartHeater) * e.circuits() * e.Speed; heater <= 0 || dst.HeatIn < leastHeat*heater {
		return NoHeat
	}
	return None
}

// stepError is the estimated error of the power by the step of time [-]: that of the cycle's work, larger as the power is less
// than it. 1 when it is as large as the power, and without an estimate.
func (w *Workspace) stepError(dst *Performance) float64 {
	e := w.Cycle.StepError * max(1, math.Abs(dst.PVPower/dst.BrakePower))
	if e < 1 {
		return e
	}
	return 1
}

// tooCoarse says whether the step of time costs the power more than stepError. A power that is less than a fifth of the
// cycle's work is held to its work: no number of steps makes a small difference of large works exact.
func (w *Workspace) tooCoarse(dst *Performance) bool {
	return dst.StepError > stepError && !(w.Cycle.StepError*mostAmplified <= stepError)
}

const mostAmplified = 5

// leastHeat is the share of the heat given to the gas in the heater that must come from outside. Below it
// flow friction heats the engine, not its heat source, and efficiency has no meaning.
const leastHeat = 0.25

func (c *Corrections) valid() bool {
	return c.FlowFriction >= 0 && !math.IsInf(c.FlowFriction, 1) && c.CycleWork >= 0 && c.CycleWork <= 1 &&
		c.Effectiveness > 0 && c.Effectiveness <= 1 && c.SealFriction >= 0 && !math.IsInf(c.SealFriction, 1)
}

// finite tells whether the numbers that everything else follows from are finite.
func (p *Performance) finite() bool {
	sum := p.BrakePower + p.HeatIn + p.CoolantHeat + p.PressureMax + p.HeaterStressUtilisation +
		p.HeaterMetalTemperature + p.Mach + p.Losses.sum() + p.HotMetalMass + p.Drive.Flywheel + p.Drive.PinLoad + p.Drive.ResidualForce + p.FuelPower + p.Burner.Chimney + p.Receiver.Reradiation
	return !math.IsNaN(sum) && !math.IsInf(sum, 0)
}

func (l *Losses) sum() float64 {
	return l.FlowFriction + l.CycleWork + l.Leakage + l.GasSpring + l.Drive + l.SealFriction + l.Reheat + l.MatrixConduction +
		l.CanisterConduction + l.CylinderConduction + l.DisplacerConduction + l.Shuttle + l.AppendixGap + l.DisplacerLeakage
}
