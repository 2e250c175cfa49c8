package model

import (
	"math"
	"testing"
)

// TestHeaterProfile: the cells' heat adds up to the heater's, their mean is the mean printed, and each wall
// stands where its flux and resistance put it.
func TestHeaterProfile(t *testing.T) {
	w := NewWorkspace()
	c := NoCorrections()
	e := gammaSet()
	var p Performance
	Evaluate(&p, &e, &c, w)
	cells := HeaterProfile(nil, &e, w)
	if len(cells) != w.Grid.Heater {
		t.Fatalf("%d cells", len(cells))
	}
	flux, inner, gas, hottest := 0.0, 0.0, 0.0, 0.0
	for i, cell := range cells {
		hottest = max(hottest, cell.Hottest)
		flux += cell.Flux / float64(len(cells))
		inner += cell.Inner / float64(len(cells))
		gas += cell.Gas / float64(len(cells))
		if !(cell.Hottest >= cell.Outer && cell.Outer > cell.Inner && cell.Inner > cell.Gas) {
			t.Errorf("cell %d: hottest %.1f, outer %.1f, inner %.1f, gas %.1f K", i, cell.Hottest, cell.Outer, cell.Inner, cell.Gas)
		}
	}
	for name, q := range map[string][3]float64{
		"hottest":     {hottest, p.HeaterMetalTemperature, 1e-12},
		"flux":        {flux, p.HeaterHeatFlux, 1e-9},
		"inner wall":  {inner, p.HeaterInnerTemperature, 1e-4},
		"gas":         {gas, p.HeaterGasTemperature, 1e-9},
		"first place": {cells[0].Position, e.Heater.HeatedLength / 12, 1e-9},
	} {
		if math.Abs(q[0]/q[1]-1) > q[2] {
			t.Errorf("%s: %g, want %g", name, q[0], q[1])
		}
	}
}
