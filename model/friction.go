package model

import (
	"math"

	"hotfront/model/cycle"
)

// friction holds the flow losses of one cycle, uncorrected.
type friction struct {
	heater, regenerator, cooler float64                     // power lost [W]
	hotDucts, coldDucts         float64                     // power lost [W]
	mach                        float64                     // largest Mach number anywhere
	reMean, reMax               [cycle.Parts]float64        // Reynolds number: cycle mean and largest
	drop                        [2 * cycle.MaxSteps]float64 // expansion less compression space, at the samples of loads [Pa]
	power                       [2 * cycle.MaxSteps]float64 // lost in all parts, at the same [W]
}

// section is a length of gas path with friction.
type section struct {
	area, dh, length float64 // dh = 0: no wall friction
	loss             float64 // loss coefficient on the dynamic pressure [-]
	matrix           bool
}

// setFriction works out the pressure drops and the power they take from the flows of the last cycle.
//
// Each cell of a tube or matrix has the drop f (L/Dh) rho u^2/2; tubes add their end losses, ducts
// theirs. The pressure used in the cycle is uniform, so the drop changes work but not the flow.
func (w *Workspace) setFriction(e *Engine) {
	fr, p := &w.friction, &w.Path
	h, c := &e.Heater, &e.Cooler
	*fr = friction{}
	first, last := 0, 0 // matrix cells
	for i := range p.N {
		cell := &p.Cells[i]
		cut := section{area: cell.Area, dh: cell.Dh}
		switch {
		case cell.Kind == cycle.Matrix:
			if first == 0 {
				first = i
			}
			last = i
			cut.matrix = true
			cut.length = e.Regenerator.Length / float64(w.Grid.Regenerator)
			fr.regenerator += w.drop(&cut, i-1, i, i, cell.Part, float64(w.Grid.Regenerator))
		case cell.Kind == cycle.Tube && cell.Part == cycle.PartHeater:
			n := float64(w.Grid.Heater)
			cut.length, cut.loss = h.TubeLength/n, h.EndLoss/n
			fr.heater += w.drop(&cut, i-1, i, i, cell.Part, n)
		case cell.Kind == cycle.Tube:
			n := float64(w.Grid.Cooler)
			cut.length, cut.loss = c.TubeLength/n, c.EndLoss/n
			fr.cooler += w.drop(&cut, i-1, i, i, cell.Part, n)
		}
	}
	fr.hotDucts = w.ductDrop(&e.ExpansionDuct, 0, 0) + w.ductDrop(&e.HotDuct, first-1, first-1)
	fr.coldDucts = w.ductDrop(&e.ColdDuct, last, last+1) + w.ductDrop(&e.CompressionDuct, p.N-2, p.N-1)
}

// ductDrop is drop for a duct at a face, its gas at the temperature of cell i.
func (w *Workspace) ductDrop(d *Duct, face, i int) float64 {
	if d.Area == 0 || d.Loss == 0 {
		return 0
	}
	return w.drop(&section{area: d.Area, loss: d.Loss}, face, face, i, cycle.PartDuct, 1)
}

// drop adds the pressure drop of a section to the history of the cycle and returns the power it takes
// [W]. The flow is the mean over the faces a and b, the gas that of cell i; the section is one of n
// equal ones of its part.
func (w *Workspace) drop(cut *section, a, b, i int, part cycle.Part, n float64) float64 {
	fr, p, tr := &w.friction, &w.Path, w.Trace()
	t := w.Cycle.Temperature[i]
	w.gas.At(&w.state, t, p.Mean)
	mu, _ := w.gas.Transport(t, 1/w.state.V)
	sound := w.gas.SoundSpeed(t, p.Mean)
	weights := [2]float64{1 - cycle.Gamma, cycle.Gamma}
	power, reSum, fast := 0.0, 0.0, 0.0
	for k := range 2 * p.Fine.Steps {
		flow := 0.5 * (tr.Flow[k][a] + tr.Flow[k][b])
		w.gas.At(&w.state, tr.Temp[k][i], tr.Pressure[k])
		v := w.state.V
		u := flow * v / cut.area
		speed := math.Abs(u)
		dp := 0.5 * cut.loss * u * speed / v
		if cut.dh > 0 {
			re := speed * cut.dh / (v * mu)
			// Darcy's f times Re stays finite at rest: f L/Dh rho u|u|/2 = (f Re) mu L/(2 Dh^2) u.
			fre := 0.0
			if cut.matrix {
				fre = w.fast.MatrixFrictionRe(&p.Porous, re)
			} else {
				fre = w.fast.TubeFrictionRe(re)
			}
			dp += 0.5 * fre * mu * cut.length / (cut.dh * cut.dh) * u
			reSum += weights[k&1] * re
			fr.reMax[part] = max(fr.reMax[part], re)
		}
		power += weights[k&1] * dp * flow * v
		fr.drop[k] += dp
		fr.power[k] += dp * flow * v
		fast = max(fast, speed)
	}
	fr.mach = max(fr.mach, fast/sound)
	fr.reMean[part] += reSum / (float64(p.Fine.Steps) * n)
	return power / float64(p.Fine.Steps)
}
