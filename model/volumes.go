package model

import (
	"math"

	"hotfront/model/cycle"
	"hotfront/model/drive"
)

// setMotion works out the motion of the bodies and fills the volumes of both spaces at the stage
// times of the solver.
func (w *Workspace) setMotion(e *Engine) Cause {
	g := &w.geometry
	m := &w.motion
	m.mechanism = drive.Mechanism{
		Kind: e.Drive.Kind, Phase: e.Drive.PhaseAngle, Rod: e.Drive.RodLength, Radius: e.Drive.CrankRadius,
		Eccentricity: e.Drive.Eccentricity, YokeArm: e.Drive.YokeArm, YokeHalfWidth: e.Drive.YokeHalfWidth, LinkLength: e.Drive.LinkLength,
		Stroke1: g.hot.Stroke, Stroke2: g.cold.Stroke,
	}
	if e.Layout == DoubleActing {
		// The second body is the neighbour in whose cylinder this circuit's cold space is. It runs ahead, so that the
		// hot space leads the cold one by half a turn less this angle.
		m.mechanism.Phase = -2 * math.Pi / float64(e.Cylinders)
		if e.Drive.Kind != drive.Sinusoidal && e.Drive.Kind != drive.SliderCrank {
			return BadInput
		}
	}
	if e.Drive.Kind == drive.RossYoke && e.Layout != Alpha && e.Layout != Gamma {
		return BadInput
	}
	switch m.mechanism.Check() {
	case drive.None:
	case drive.RodTooShort:
		return RodTooShort
	case drive.CranksCollide:
		return CranksCollide
	case drive.YokeJams:
		return YokeJams
	default:
		return BadInput
	}
	m.extremes = m.mechanism.Extremes()
	g.hotStroke, g.coldStroke = m.extremes.Stroke1(), m.extremes.Stroke2()
	g.sweptExpansion = g.hotArea * g.hotStroke
	g.sweptPiston = g.coldArea * g.coldStroke
	if e.Layout == Alpha {
		g.sweptPiston += g.sweptExpansion
	}

	w.Path.Period = 1 / e.Speed
	w.fillMotion(&w.Path.Coarse, e, w.Grid.CoarseSteps)
	w.fillMotion(&w.Path.Fine, e, w.steps(e))
	return None
}

// steps is the number of time steps a cycle: the grid's, or in a double-acting machine the next multiple of the
// number of cylinders, so that a neighbour's pressure is at hand at every sample.
func (w *Workspace) steps(e *Engine) int {
	if e.Layout != DoubleActing {
		return w.Grid.Steps
	}
	return (w.Grid.Steps + e.Cylinders - 1) / e.Cylinders * e.Cylinders
}

// fillMotion fills the volumes over a cycle of the given number of steps; the samples of the loads are those of the
// last call.
func (w *Workspace) fillMotion(m *cycle.Motion, e *Engine, steps int) {
	m.Steps = steps
	if steps == 0 {
		return
	}
	omega := 2 * math.Pi * e.Speed
	dth := 2 * math.Pi / float64(steps)
	var at drive.Motion
	for k := range 2 * steps {
		c := float64(k>>1) + 1
		if k&1 == 0 {
			c += cycle.Gamma - 1
		}
		w.motion.mechanism.At(&at, c*dth)
		var dve, dvc float64
		m.Ve[k], dve, m.Vc[k], dvc = w.volumes(e, &at)
		m.DVe[k], m.DVc[k] = dve*omega, dvc*omega
		w.loads.sample(k, steps, c*dth, &at)
	}
	w.motion.mechanism.At(&at, 0)
	m.Ve0, _, m.Vc0, _ = w.volumes(e, &at)
}

// volumes gives both spaces and their rates by the crank angle.
func (w *Workspace) volumes(e *Engine, at *drive.Motion) (ve, dve, vc, dvc float64) {
	g, x := &w.geometry, &w.motion.extremes
	ve = e.ExpansionClearance + g.hotArea*(x.Top1-at.Y1)
	dve = -g.hotArea * at.V1
	under := g.hotArea - g.hotRodArea // cold side of a displacer
	switch e.Layout {
	case Alpha:
		vc, dvc = g.coldArea*(x.Top2-at.Y2), -g.coldArea*at.V2
	case DoubleActing:
		vc, dvc = under*(at.Y2-x.Bottom2), under*at.V2
	case Beta:
		vc, dvc = under*(at.Y1-at.Y2-x.MinGap), under*(at.V1-at.V2)
	default:
		vc = under*(at.Y1-x.Bottom1) + g.coldArea*(x.Top2-at.Y2)
		dvc = under*at.V1 - g.coldArea*at.V2
	}
	return ve, dve, vc + e.CompressionClearance, dvc
}
