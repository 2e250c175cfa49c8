package model

import (
	"hotfront/model/loss"
)

// pistonLeakage is the power lost past the seals of the bodies that give power [W], of one circuit. Behind a
// double-acting piston is the circuit that is behind, behind others the mean pressure.
func (w *Workspace) pistonLeakage(e *Engine) float64 {
	g, p, l := &w.geometry, &w.Path, &w.loads
	t := w.Cycle.Temperature[p.N-1]
	w.gas.At(&w.state, t, p.Mean)
	mu, _ := w.gas.Transport(t, 1/w.state.V)
	above, behind := w.Trace().Pressure[:l.count], l.scratch[:l.count]
	if e.Layout == DoubleActing {
		shift(behind, above, 1, e.Cylinders)
	} else {
		for k := range behind {
			behind[k] = p.Mean
		}
	}
	past := func(body *Reciprocator) float64 {
		if body.SealGap == 0 || body.SealLength == 0 {
			return 0
		}
		return loss.SealPower(body.Bore, body.SealGap, body.SealLength, mu, above, behind)
	}
	switch e.Layout {
	case Alpha:
		return past(g.hot) + past(g.cold)
	case DoubleActing:
		return past(g.hot)
	}
	return past(g.cold)
}

// setDrive takes the indicated power through the drive, and returns the forced work it counts [J], all of one circuit.
func (w *Workspace) setDrive(dst *Performance, e *Engine, c *Corrections) float64 {
	f := e.Speed
	l := &dst.Losses
	work := dst.IndicatedPower / f
	dst.ForcedWork = w.setForced(e)
	// Forced work is taken at uniform pressure, work after friction: where friction eats more than the
	// bodies give, as much must be forced at least.
	forced := max(dst.ForcedWork, -work)
	l.Drive = loss.DriveLoss(c.Effectiveness, work, forced) * f
	l.SealFriction = loss.FrictionPower(c.SealFriction, w.geometry.sweptPiston, f)
	dst.BrakePower = loss.ShaftWork(c.Effectiveness, work, forced)*f - l.SealFriction
	return forced
}
