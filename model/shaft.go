package model

import (
	"hotfront/model/drive"
	"hotfront/model/loss"
)

// powerBodies counts the bodies that give power to the drive: the piston, or both pistons of an alpha machine.
func (w *Workspace) powerBodies(e *Engine) int {
	if e.Layout == Alpha {
		return 2
	}
	return 1
}

// bodyVolumes fills w.upper with the increase of the buffer space over its mean, and w.lower with
// the change of the working volume above power body b in one step, at full steps [m3].
func (w *Workspace) bodyVolumes(e *Engine, b int) {
	g, m, p := &w.geometry, &w.motion, &w.Path
	area := g.coldArea
	switch {
	case b == 1:
		area = g.hotArea
	case e.Layout == Beta:
		area -= g.hotRodArea // the displacer's rod passes through the piston
	}
	dth := 2 * pi / float64(p.Fine.Steps)
	var at drive.Motion
	mean := 0.0
	for n := range p.Fine.Steps {
		m.mechanism.At(&at, float64(n+1)*dth)
		y, v := at.Y2, at.V2
		if b == 1 {
			y, v = at.Y1, at.V1
		}
		w.upper[n] = area * y
		w.lower[n] = -area * v * dth
		mean += area * y
	}
	mean /= float64(p.Fine.Steps)
	for n := range p.Fine.Steps {
		w.upper[n] -= mean
	}
}

// forcedWork is the work of a cycle that the drive must put into the bodies [J]: where the
// difference of working and buffer pressure acts against the motion. Each body of an alpha machine
// hands its work through its own bearings, so each counts by itself. The buffer space holds the mean
// pressure; a closed one of finite volume swings about it.
func (w *Workspace) forcedWork(e *Engine) float64 {
	p := &w.Path
	tr := w.Trace()
	n := p.Fine.Steps
	sum := 0.0
	for b := range w.powerBodies(e) {
		w.bodyVolumes(e, b)
		w.gas.At(&w.state, e.Coolant.Inlet, p.Mean)
		gamma := w.state.Cp / (w.state.Cp - w.gas.R)
		if !loss.BufferPressure(w.buffer[:n], p.Mean, e.BufferVolume, gamma, w.upper[:n]) {
			return -1
		}
		for i := range n {
			w.upper[i] = tr.Pressure[2*i+1]
		}
		_, forced := loss.ForcedWork(w.upper[:n], w.buffer[:n], w.lower[:n])
		sum += forced
	}
	return sum
}

// pistonLeakage is the power lost past the seals of the power bodies [W].
func (w *Workspace) pistonLeakage(e *Engine) float64 {
	g, p := &w.geometry, &w.Path
	tr := w.Trace()
	n := p.Fine.Steps
	sum := 0.0
	for b := range w.powerBodies(e) {
		body := g.cold
		if b == 1 {
			body = g.hot
		}
		if body.SealGap == 0 || body.SealLength == 0 {
			continue
		}
		t := w.Cycle.Temperature[p.N-1]
		w.gas.At(&w.state, t, p.Mean)
		mu, _ := w.gas.Transport(t, 1/w.state.V)
		for i := range n {
			w.upper[i] = tr.Pressure[2*i+1]
			w.lower[i] = p.Mean
		}
		sum += loss.SealPower(body.Bore, body.SealGap, body.SealLength, mu, w.upper[:n], w.lower[:n])
	}
	return sum
}

// setDrive takes the indicated power through the drive.
func (w *Workspace) setDrive(dst *Performance, e *Engine, c *Corrections, forced float64) {
	f := e.Speed
	l := &dst.Losses
	work := dst.IndicatedPower / f
	dst.ForcedWork = forced
	// Forced work is taken at uniform pressure, work after friction: where friction eats more than the
	// bodies give, as much must be forced at least.
	forced = max(forced, -work)
	l.Drive = loss.DriveLoss(c.Effectiveness, work, forced) * f
	l.SealFriction = loss.FrictionPower(c.SealFriction, w.geometry.sweptPiston, f)
	dst.BrakePower = loss.ShaftWork(c.Effectiveness, work, forced)*f - l.SealFriction
}
