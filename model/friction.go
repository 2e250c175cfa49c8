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

// section is a length of gas path with friction. Its flow is the mean over two faces, its gas that of a cell.
type section struct {
	a, b, cell int        // faces, cell
	part       cycle.Part // where it is booked
	share      float64    // of its part's length [-]

	area   float64 // [m2]
	loss   float64 // loss coefficient on the dynamic pressure [-]
	hot    bool    // of a duct: on the hot side of the matrix
	matrix bool
	wall   bool    // has wall friction
	re     float64 // Reynolds number over mass flow [s/kg]
	viscid float64 // pressure drop over f Re times the velocity: mu L/(2 Dh^2) [Pa s/m]
	volume float64 // of the cell [m3]; 0: a space, whose volume moves

	power, reSum, fast float64 // lost [W times samples], sum of Re, largest speed [m/s]
}

// setFriction works out the pressure drops and the power they take from the flows of the last cycle.
//
// Each cell of a tube or matrix has the drop f (L/Dh) rho u^2/2; tubes add their end losses, ducts
// theirs. The pressure used in the cycle is uniform, so the drop changes work but not the flow.
func (w *Workspace) setFriction(e *Engine) {
	fr, p := &w.friction, &w.Path
	*fr = friction{}
	w.setSections(e)
	sections := w.sections[:w.sectionCount]
	weights := [2]float64{1 - cycle.Gamma, cycle.Gamma}
	for k := range 2 * p.Fine.Steps {
		drop, power := w.drops(sections, k, weights[k&1])
		fr.drop[k], fr.power[k] = drop, power
	}
	for i := range sections {
		cut := &sections[i]
		power := cut.power / float64(p.Fine.Steps)
		switch {
		case cut.part == cycle.PartHeater:
			fr.heater += power
		case cut.part == cycle.PartRegenerator:
			fr.regenerator += power
		case cut.part == cycle.PartCooler:
			fr.cooler += power
		case cut.hot:
			fr.hotDucts += power
		default:
			fr.coldDucts += power
		}
		fr.reMean[cut.part] += cut.reSum * cut.share / float64(p.Fine.Steps)
		fr.mach = max(fr.mach, cut.fast/w.gas.SoundSpeed(w.Cycle.Temperature[cut.cell], p.Mean))
	}
}

// setSections lists the ducts and the cells of tubes and matrix.
func (w *Workspace) setSections(e *Engine) {
	p := &w.Path
	first, last := 0, 0 // matrix cells
	for i := range p.N {
		if p.Cells[i].Kind == cycle.Matrix {
			if first == 0 {
				first = i
			}
			last = i
		}
	}
	w.sectionCount = 0
	duct := func(d *Duct, face, cell int) {
		if d.Area > 0 && d.Loss > 0 {
			w.addSection(section{a: face, b: face, cell: cell, part: cycle.PartDuct, area: d.Area, loss: d.Loss, hot: face < first})
		}
	}
	duct(&e.ExpansionDuct, 0, 0)
	duct(&e.HotDuct, first-1, first-1)
	duct(&e.ColdDuct, last, last+1)
	duct(&e.CompressionDuct, p.N-2, p.N-1)
	wall := func(i int, length, loss, count float64) {
		cell := &p.Cells[i]
		t := w.Cycle.Temperature[i]
		w.gas.At(&w.state, t, p.Mean)
		mu, _ := w.gas.Transport(t, 1/w.state.V)
		w.addSection(section{
			a: i - 1, b: i, cell: i, part: cell.Part, share: 1 / count,
			area: cell.Area, loss: loss / count, matrix: cell.Kind == cycle.Matrix, wall: true,
			re: cell.Dh / (cell.Area * mu), viscid: 0.5 * mu * length / count / (cell.Dh * cell.Dh),
		})
	}
	for i := range p.N {
		switch cell := &p.Cells[i]; {
		case cell.Kind == cycle.Matrix:
			wall(i, e.Regenerator.Length, 0, float64(w.Grid.Regenerator))
		case cell.Kind == cycle.Tube && cell.Part == cycle.PartHeater:
			wall(i, e.Heater.TubeLength, e.Heater.EndLoss, float64(w.Grid.Heater))
		case cell.Kind == cycle.Tube:
			wall(i, e.Cooler.TubeLength, e.Cooler.EndLoss, float64(w.Grid.Cooler))
		}
	}
}

func (w *Workspace) addSection(cut section) {
	if w.Path.Cells[cut.cell].Kind != cycle.Space {
		cut.volume = w.Path.Cells[cut.cell].Volume
	}
	w.sections[w.sectionCount] = cut
	w.sectionCount++
}

// drops gives the pressure drop from the expansion to the compression space at sample k [Pa] and the power it takes [W], and
// adds to the sums of the sections with the given weight.
func (w *Workspace) drops(sections []section, k int, weight float64) (drop, power float64) {
	fr, p, tr := &w.friction, &w.Path, w.Trace()
	flows, masses := &tr.Flow[k], &tr.Mass[k]
	for i := range sections {
		cut := &sections[i]
		volume := cut.volume
		switch {
		case volume > 0:
		case cut.cell == 0:
			volume = p.Fine.Ve[k]
		default:
			volume = p.Fine.Vc[k]
		}
		flow := 0.5 * (flows[cut.a] + flows[cut.b])
		v := volume / masses[cut.cell]
		u := flow * v / cut.area
		speed := math.Abs(u)
		dp := 0.5 * cut.loss * flow / cut.area * speed
		if cut.wall {
			re := math.Abs(flow) * cut.re
			// Darcy's f times Re stays finite at rest: f L/Dh rho u|u|/2 = (f Re) mu L/(2 Dh^2) u.
			fre := 0.0
			if cut.matrix {
				fre = w.fast.MatrixFrictionRe(&p.Porous, re)
			} else {
				fre = w.fast.TubeFrictionRe(re)
			}
			dp += fre * cut.viscid * u
			cut.reSum += weight * re
			fr.reMax[cut.part] = max(fr.reMax[cut.part], re)
		}
		lost := dp * flow * v
		cut.power += weight * lost
		cut.fast = max(cut.fast, speed)
		drop += dp
		power += lost
	}
	return drop, power
}
