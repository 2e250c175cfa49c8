package cycle

import (
	"math"

	"hotfront/model/correlation"
	"hotfront/model/gas"
)

// machine is an alpha-like machine with sinusoidal volumes and all five parts side by side, walls of
// given temperature: as little as the gas path needs, described without a grid. The machines of the
// tests are invented.
type machine struct {
	name                     string
	gas                      gas.Gas
	mean, freq               float64 // [Pa], [Hz]
	sweptE, sweptC           float64 // [m3]
	clearE, clearC           float64 // [m3]
	phase                    float64 // [rad]
	tubesH, boreH, lengthH   float64 // -, [m], [m]
	tubesK, boreK, lengthK   float64
	hot, cold                float64 // wall temperatures [K]
	area, length, wire, poro float64 // of the matrix [m2], [m], [m], [-]
	rhoC, conduct            float64 // of its metal [J/(m3 K)], effective axial conductivity [W/(m K)]
}

func (m *machine) law() law {
	return func(th float64) (ve, dve, vc, dvc float64) {
		return m.clearE + 0.5*m.sweptE*(1+math.Cos(th+m.phase)), -0.5 * m.sweptE * math.Sin(th+m.phase),
			m.clearC + 0.5*m.sweptC*(1+math.Cos(th)), -0.5 * m.sweptC * math.Sin(th)
	}
}

// grid is the number of cells and steps the solver under test is given.
type grid struct{ heater, matrix, cooler, steps, coarse int }

func production() grid { return grid{6, 12, 6, 48, 20} }

func tubeCell(part Part, tubes, bore, length, share, wall float64) Cell {
	area := tubes * math.Pi / 4 * bore * bore
	return Cell{Kind: Tube, Part: part, Volume: area * length * share, Area: area, Dh: bore, Film: tubes * math.Pi * bore * length * share,
		Slim: bore / length, Wall: wall, Outer: wall}
}

// path describes the machine to the solver under test.
func (m *machine) path(g grid) *Path {
	p := &Path{Gas: m.gas, Mean: m.mean, Porous: correlation.NewPorous(correlation.WovenScreen, m.poro)}
	add := func(c Cell) {
		p.Cells[p.N] = c
		p.N++
	}
	add(Cell{Kind: Space, Part: PartExpansion, Wall: m.hot})
	for range g.heater {
		add(tubeCell(PartHeater, m.tubesH, m.boreH, m.lengthH, 1/float64(g.heater), m.hot))
	}
	n := float64(g.matrix)
	for i := range g.matrix {
		add(Cell{
			Kind: Matrix, Part: PartRegenerator, Volume: m.area * m.poro * m.length / n, Area: m.area * m.poro,
			Dh: correlation.HydraulicDiameter(m.wire, m.poro), Film: 4 * m.area * (1 - m.poro) * m.length / n / m.wire,
			Wall: m.hot + (m.cold-m.hot)*(float64(i)+0.5)/n, Capacity: m.area * (1 - m.poro) * m.length / n * m.rhoC,
			Conduct: m.conduct * m.area * (1 - m.poro) * n / m.length, GasCross: m.area * m.poro * n / m.length,
		})
	}
	for range g.cooler {
		add(tubeCell(PartCooler, m.tubesK, m.boreK, m.lengthK, 1/float64(g.cooler), m.cold))
	}
	add(Cell{Kind: Space, Part: PartCompression, Wall: m.cold})
	volumes(&p.Fine, g.steps, m.freq, m.law())
	if g.coarse > 0 {
		volumes(&p.Coarse, g.coarse, m.freq, m.law())
	}
	p.Period = 1 / m.freq
	return p
}

// machines are the five of the comparison with the dynamic solver: helium and hydrogen, 2 to 15 MPa.
func machines() []machine {
	const mm, cm3, steel, axial = 1e-3, 1e-6, 3.9e6, 2.0
	he, h2 := gas.New(gas.Helium), gas.New(gas.Hydrogen)
	quarter := math.Pi / 2
	return []machine{
		{"helium 4 MPa", he, 4e6, 41.7, 120 * cm3, 114 * cm3, 25 * cm3, 25 * cm3, 1.9, 40, 3 * mm, 245 * mm, 300, 1.1 * mm, 46 * mm,
			950, 320, 3.2e-3, 22.6 * mm, 0.040 * mm, 0.70, steel, axial},
		{"hydrogen 15 MPa", h2, 15e6, 50, 100 * cm3, 100 * cm3, 12 * cm3, 10 * cm3, quarter, 36, 3 * mm, 260 * mm, 400, 1 * mm, 70 * mm,
			1000, 330, 3.6e-3, 32 * mm, 0.045 * mm, 0.66, steel, axial},
		{"helium 2 MPa", he, 2e6, 16.7, 320 * cm3, 320 * cm3, 40 * cm3, 30 * cm3, quarter, 30, 5 * mm, 300 * mm, 200, 2 * mm, 80 * mm,
			900, 310, 6e-3, 50 * mm, 0.08 * mm, 0.75, steel, axial},
		{"helium 12 MPa", he, 12e6, 25, 200 * cm3, 200 * cm3, 20 * cm3, 20 * cm3, quarter, 48, 3.5 * mm, 280 * mm, 350, 1.4 * mm, 80 * mm,
			950, 320, 5.5e-3, 40 * mm, 0.05 * mm, 0.68, steel, axial},
		{"hydrogen 5 MPa", h2, 5e6, 50, 150 * cm3, 150 * cm3, 18 * cm3, 18 * cm3, 1.8, 40, 3 * mm, 240 * mm, 320, 1.2 * mm, 60 * mm,
			1000, 330, 4.5e-3, 30 * mm, 0.05 * mm, 0.70, steel, axial},
	}
}
