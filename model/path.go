package model

import (
	"math"

	"hotfront/model/correlation"
	"hotfront/model/cycle"
	"hotfront/model/metal"
)

const (
	// solidConduction is the share of the conductivity of solid metal that a stack of wires keeps along
	// the flow, where heat crosses from wire to wire through points of contact. About 0.1 was measured
	// on stacked stainless-steel screens [Lewis1999], from memory; taken for felts too.
	solidConduction = 0.1
	// waterHeat is the heat capacity of water at 20 to 60 degC [J/(kg K)], handbook value from memory.
	waterHeat = 4180
)

// setPath describes the gas path to the cycle solver, the hot end at a temperature [K].
func (w *Workspace) setPath(e *Engine, hot float64) {
	p, g := &w.Path, &w.geometry
	h, r, c := &e.Heater, &e.Regenerator, &e.Cooler
	p.Gas = w.gas
	p.Mean = e.ChargePressure
	p.FixedRun = false
	p.Target = 0
	cold := e.Coolant.Inlet
	if e.Heat.Kind == HeatTubeGas {
		p.Target = hot
	}
	law := correlation.WovenScreen
	if r.Kind == RandomFibre {
		law = correlation.RandomFibre
	}
	p.Porous = correlation.NewPorous(law, r.Porosity)

	p.N = 0
	add := func(cell cycle.Cell) {
		p.Cells[p.N] = cell
		p.N++
	}
	passive := func(volume float64) {
		if volume > 0 {
			add(cycle.Cell{Kind: cycle.Passive, Part: cycle.PartDuct, Volume: volume})
		}
	}
	add(cycle.Cell{Kind: cycle.Space, Part: cycle.PartExpansion})
	passive(e.ExpansionDuct.Volume + 0.5*g.heaterEnds)

	alloy := metal.Of(h.Alloy)
	n := w.Grid.Heater
	length := h.HeatedLength / float64(n)
	tubes := float64(h.TubeCount)
	tube := cycle.Cell{
		Kind: cycle.Tube, Part: cycle.PartHeater,
		Area: tubes * circle(h.TubeBore), Dh: h.TubeBore, Film: tubes * math.Pi * h.TubeBore * length,
		Slim: h.TubeBore / h.TubeLength, Wall: hot, Outer: hot,
		Resistance: wallResistance(h.TubeBore, g.heaterOuter, length, tubes, alloy.Conductivity(hot)),
	}
	tube.Volume = tube.Area * length
	for range n {
		add(tube)
	}
	passive(e.HotDuct.Volume + 0.5*g.heaterEnds)

	n = w.Grid.Regenerator
	length = r.Length / float64(n)
	wire := metal.Of(r.Alloy)
	solid := g.matrixArea * (1 - r.Porosity) * length
	matrix := cycle.Cell{
		Kind: cycle.Matrix, Part: cycle.PartRegenerator,
		Volume: g.matrixArea * r.Porosity * length,
		Area:   g.matrixArea * r.Porosity,
		Dh:     correlation.HydraulicDiameter(r.WireDiameter, r.Porosity),
		Film:   4 * solid / r.WireDiameter,
	}
	matrix.GasCross = matrix.Area / length
	for i := range n {
		t := hot + (cold-hot)*(float64(i)+0.5)/float64(n)
		matrix.Wall = t
		matrix.Capacity = solid * wire.Density * wire.SpecificHeat(t)
		matrix.Conduct = solidConduction * wire.Conductivity(t) * g.matrixArea * (1 - r.Porosity) / length
		add(matrix)
	}
	passive(e.ColdDuct.Volume + 0.5*g.coolerEnds)

	alloy = metal.Of(c.Alloy)
	n = w.Grid.Cooler
	length = c.CooledLength / float64(n)
	tubes = float64(c.TubeCount)
	tube = cycle.Cell{
		Kind: cycle.Tube, Part: cycle.PartCooler,
		Area: tubes * circle(c.TubeBore), Dh: c.TubeBore, Film: tubes * math.Pi * c.TubeBore * length,
		Slim: c.TubeBore / c.TubeLength, Wall: cold, Outer: cold,
		// The coolant crosses the tubes: each cell meets it at the mean of inlet and outlet, and the rise
		// of that mean with the heat given off acts as one more resistance.
		Resistance: wallResistance(c.TubeBore, g.coolerOuter, length, tubes, alloy.Conductivity(cold)) +
			1/(e.Coolant.Film*tubes*math.Pi*g.coolerOuter*length) +
			float64(n)*e.circuits()/(2*e.Coolant.Flow*waterHeat),
	}
	tube.Volume = tube.Area * length
	for range n {
		add(tube)
	}
	passive(e.CompressionDuct.Volume + 0.5*g.coolerEnds)
	add(cycle.Cell{Kind: cycle.Space, Part: cycle.PartCompression})
}

// wallResistance is that of n tube walls in parallel to heat across them [K/W]:
//
//	R = ln(do/di)/(2 pi k L n)
//
// Source: [Incropera2007], eq. 3.28.
func wallResistance(di, do, length, n, k float64) float64 {
	return math.Log(do/di) / (2 * math.Pi * k * length * n)
}
