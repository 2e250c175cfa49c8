package model

import "hotfront/model/cycle"

// HeaterCell is the heater at one place along its tubes, time means over a cycle.
type HeaterCell struct {
	Position float64 // middle of the cell, from the start of the heated length at the expansion space [m]
	Outer    float64 // outer wall, without the flux peak [K]
	Hottest  float64 // outer wall at the flux peak [K]
	Inner    float64 // inner wall, without the flux peak [K]
	Gas      float64 // gas [K]
	Flux     float64 // heat flux on the outer surface, without the peak [W/m2]
}

// HeaterProfile fills dst with the cells of the heater of the design that w evaluated last, from the
// expansion space to the regenerator, and returns them. The gas takes up most where it comes cold from the
// regenerator; the outer wall is given as one temperature, so flux and inner wall say where the source must
// give more.
func HeaterProfile(dst []HeaterCell, e *Engine, w *Workspace) []HeaterCell {
	dst = dst[:0]
	h := &e.Heater
	n := float64(w.Grid.Heater)
	area := float64(h.TubeCount) * pi * w.geometry.heaterOuter * h.HeatedLength / n
	for i := range w.Path.N {
		cell := &w.Path.Cells[i]
		if cell.Kind != cycle.Tube || cell.Part != cycle.PartHeater {
			continue
		}
		heat := w.Cycle.Heat[i] * e.Speed
		gas, outer := w.Cycle.Temperature[i], w.Cycle.Outer
		dst = append(dst, HeaterCell{
			Position: (float64(len(dst)) + 0.5) * h.HeatedLength / n,
			Outer:    outer, Hottest: gas + h.FluxPeaking*(outer-gas),
			Inner: outer - cell.Resistance*heat, Gas: gas, Flux: heat / area,
		})
	}
	return dst
}
