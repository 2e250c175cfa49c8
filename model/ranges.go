package model

import (
	"hotfront/model/correlation"
	"hotfront/model/cycle"
)

// matrixInRange judges by the largest Reynolds number: near the turns of the flow every law is left
// at its low end, where film and friction hardly matter.
func matrixInRange(p *cycle.Path, re, porosity float64) bool {
	return correlation.MatrixRange(p.Porous.Law, re, porosity)
}

func tubeInRange(re, slimness float64) bool {
	return correlation.TubeRange(re, 0.7, slimness)
}
