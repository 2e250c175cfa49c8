package model

import (
	"math"

	"hotfront/model/cycle"
	"hotfront/model/loss"
	"hotfront/model/metal"
)

// displacerAlloy is what hollow displacers and domes are taken to be made of.
const displacerAlloy = metal.S30400

// hotShare is the share of the matrix's flow loss that turns into heat on its hot side and spares
// heat from outside (common practice, no source).
const hotShare = 0.5

// setPerformance draws up the ledger of power and heat.
//
//	heat in      = cycle heat + heat that goes round the cycle - friction heat made on the hot side
//	coolant heat = cycle heat + heat that goes round the cycle + friction heat made on the cold side
//	               + p-V work lost to what one dimension leaves out + leakage + gas spring
//	brake power  = p-V power x cycle-work factor - flow loss - leakage - gas spring - drive - seals
func (w *Workspace) setPerformance(dst *Performance, e *Engine, c *Corrections) {
	g, r, fr := &w.geometry, &w.Cycle, &w.friction
	f := e.Speed
	w.setTemperatures(dst, e)
	w.setPressures(dst)
	w.setHeatLosses(dst, e, c)
	l := &dst.Losses

	dst.PVPower = (r.WorkExpansion + r.WorkCompression) * f
	l.FlowFriction = c.FlowFriction * fr.sum()
	hotFriction := w.hotFriction(l)
	coldFriction := l.FlowFriction - hotFriction
	dst.FlowLoss = l.FlowFriction
	dst.HeaterFlowLoss = c.FlowFriction * fr.heater
	dst.RegeneratorFlowLoss = c.FlowFriction * fr.regenerator
	dst.CoolerFlowLoss = c.FlowFriction * fr.cooler
	l.CycleWork = (1 - c.CycleWork) * math.Abs(dst.PVPower)
	l.Leakage = w.pistonLeakage(e)
	l.GasSpring = w.loads.spring * f
	dst.IndicatedPower = dst.PVPower - l.CycleWork - l.FlowFriction - l.Leakage - l.GasSpring
	forced := w.setDrive(dst, e, c)

	round := l.CanisterConduction + l.CylinderConduction + l.DisplacerConduction + l.Shuttle + l.AppendixGap + l.DisplacerLeakage
	dst.HeatIn = w.heat(cycle.PartHeater)*f + round - hotFriction
	dst.CoolantHeat = -w.heat(cycle.PartCooler)*f + round + coldFriction + l.CycleWork + l.Leakage + l.GasSpring
	dst.BrakeEfficiency = dst.BrakePower / dst.HeatIn
	dst.IndicatedEfficiency = dst.IndicatedPower / dst.HeatIn
	dst.CarnotEfficiency = 1 - e.Coolant.Inlet/dst.HeaterOuterTemperature
	dst.EnergyResidual = (dst.HeatIn - dst.BrakePower - dst.CoolantHeat - l.Drive - l.SealFriction) / dst.HeatIn
	dst.CoolantOutlet = e.Coolant.Inlet + e.circuits()*dst.CoolantHeat/(e.Coolant.Flow*waterHeat)
	dst.Torque = dst.BrakePower / (2 * math.Pi * f)

	dst.SweptVolume, dst.DeadVolume = w.sweptAndDead()
	dst.DeadVolumeRatio = dst.DeadVolume / g.sweptExpansion
	dst.GasMass = r.Mass
	swept := g.coldArea * g.coldStroke
	if e.Layout == Alpha {
		swept = g.sweptExpansion
	}
	dst.BealeNumber = dst.BrakePower / (e.ChargePressure * swept * f)
	th, tc := dst.ExpansionTemperature, dst.CompressionTemperature
	dst.WestNumber = dst.BealeNumber * (th + tc) / (th - tc)
	dst.PistonSpeed = 2 * f * max(g.hotStroke, g.coldStroke)
	dst.Mach = fr.mach
	dst.HeaterReynolds, dst.RegeneratorReynolds, dst.CoolerReynolds =
		fr.reMean[cycle.PartHeater], fr.reMean[cycle.PartRegenerator], fr.reMean[cycle.PartCooler]
	dst.wholeMachine(e.circuits())
	w.setTorque(dst, e, c, forced)
}

// wholeMachine turns the results of one circuit into those of n equal ones.
func (p *Performance) wholeMachine(n float64) {
	if n == 1 {
		return
	}
	l := &p.Losses
	for _, v := range [...]*float64{
		&p.BrakePower, &p.IndicatedPower, &p.PVPower, &p.FlowLoss, &p.HeatIn, &p.CoolantHeat, &p.Torque, &p.ForcedWork,
		&p.SweptVolume, &p.DeadVolume, &p.GasMass, &p.HeaterFlowLoss, &p.RegeneratorFlowLoss, &p.CoolerFlowLoss,
		&p.RegeneratorHeat, &p.RegeneratorPressureHeat,
		&l.FlowFriction, &l.CycleWork, &l.Leakage, &l.GasSpring, &l.Drive, &l.SealFriction, &l.Reheat, &l.MatrixConduction, &l.CanisterConduction,
		&l.CylinderConduction, &l.DisplacerConduction, &l.Shuttle, &l.AppendixGap, &l.DisplacerLeakage,
	} {
		*v *= n
	}
}

// hotFriction is the part of the flow loss that turns into heat on the hot side [W].
func (w *Workspace) hotFriction(l *Losses) float64 {
	fr := &w.friction
	sum := fr.sum()
	if sum == 0 {
		return 0
	}
	return l.FlowFriction * (fr.heater + fr.hotDucts + hotShare*fr.regenerator) / sum
}

func (f *friction) sum() float64 {
	return f.heater + f.regenerator + f.cooler + f.hotDucts + f.coldDucts
}

func (w *Workspace) heat(part cycle.Part) float64 {
	sum := 0.0
	for i := range w.Path.N {
		if w.Path.Cells[i].Part == part {
			sum += w.Cycle.Heat[i]
		}
	}
	return sum
}

// partMean is the mean of v over the cells of a part.
func (w *Workspace) partMean(part cycle.Part, v *[cycle.MaxCells]float64) float64 {
	sum, n := 0.0, 0.0
	for i := range w.Path.N {
		if w.Path.Cells[i].Part == part {
			sum += v[i]
			n++
		}
	}
	return sum / n
}

func (w *Workspace) setTemperatures(dst *Performance, e *Engine) {
	r := &w.Cycle
	dst.ExpansionTemperature = r.Temperature[0]
	dst.CompressionTemperature = r.Temperature[w.Path.N-1]
	dst.HeaterOuterTemperature = r.Outer
	dst.HeaterInnerTemperature = w.partMean(cycle.PartHeater, &r.Wall)
	dst.HeaterGasTemperature = w.partMean(cycle.PartHeater, &r.Temperature)
	dst.CoolerGasTemperature = w.partMean(cycle.PartCooler, &r.Temperature)
	dst.CoolerWallTemperature = w.partMean(cycle.PartCooler, &r.Wall)
}

func (w *Workspace) setPressures(dst *Performance) {
	r := &w.Cycle
	dst.PressureMean, dst.PressureMax, dst.PressureMin = r.PressureMean, r.PressureMax, r.PressureMin
	dst.PressureRatio = r.PressureMax / r.PressureMin
}

// setHeatLosses fills the heat that goes round the cycle and what the regenerator lets through.
func (w *Workspace) setHeatLosses(dst *Performance, e *Engine, c *Corrections) {
	g, r, p := &w.geometry, &w.Cycle, &w.Path
	l := &dst.Losses
	f := e.Speed
	first, last := w.matrixCells()
	enthalpy, conduction, lag, n := 0.0, 0.0, 0.0, 0.0
	for i := first; i < last; i++ {
		enthalpy += r.Enthalpy[i]
		conduction += r.Conduction[i]
		lag += 0.5 * (r.Lag[i] + r.Lag[i+1]) * (r.Wall[i] - r.Wall[i+1])
		n++
	}
	// The gas lags behind the metal by cp M (dT a cell)/UA, and carries cp M times that. The rest of the
	// net enthalpy flow goes with pressure: what dh/dp of a real gas carries, and compression heat that
	// a light matrix stores. It moves energy either way and is no loss.
	l.Reheat = lag / n * f
	dst.RegeneratorPressureHeat = enthalpy/n*f - l.Reheat
	l.MatrixConduction = conduction / n * f
	dst.RegeneratorHeat = r.HeatIntoMatrix * f
	dst.RegeneratorEffectiveness = 1 - l.Reheat/(dst.RegeneratorHeat+l.Reheat)
	dst.RegeneratorMatrixSwing = r.Swing
	film, flow := 0.0, 0.0
	for i := first; i <= last; i++ {
		film += r.FilmMean[i]
		flow += 0.5 * (r.FlowMean[i-1] + r.FlowMean[i])
	}
	w.gas.At(&w.state, 0.5*(r.Temperature[first]+r.Temperature[last]), p.Mean)
	dst.RegeneratorNTU = film * float64(last-first+1) / (flow * w.state.Cp)

	hot, cold := dst.HeaterInnerTemperature, dst.CoolerWallTemperature
	drop := hot - cold // below zero in a heat pump, and the heat then flows the other way
	mid := 0.5 * (hot + cold)
	reg := &e.Regenerator
	section := loss.TubeSection(reg.Diameter, reg.CanisterWall)
	if reg.InnerDiameter > 0 {
		section += loss.ShellSection(reg.InnerDiameter, reg.CanisterWall)
	}
	l.CanisterConduction = loss.WallConduction(conductivity(reg.CanisterAlloy, mid), float64(reg.Count)*section, reg.Length, drop)
	l.CylinderConduction = loss.WallConduction(conductivity(e.Cylinder.Alloy, mid), loss.TubeSection(g.hot.Bore, e.Cylinder.Wall), g.hot.Length, drop)

	// The hot body stands between the gas of both spaces.
	te, tc := dst.ExpansionTemperature, dst.CompressionTemperature
	drop = te - tc
	mid = 0.5 * (te + tc)
	w.gas.At(&w.state, mid, p.Mean)
	mu, k := w.gas.Transport(mid, 1/w.state.V)
	l.DisplacerConduction = loss.WallConduction(conductivity(displacerAlloy, mid), loss.ShellSection(g.hot.Bore-2*g.hot.Gap, g.hot.Wall), g.hot.Length, drop)
	if g.hot.Gap == 0 {
		return
	}
	l.Shuttle = loss.Shuttle(g.hot.Bore, g.hot.Gap, g.hot.Length, g.hotStroke, k, drop)
	rate := 0.0
	tr := w.Trace()
	dt := p.Period / float64(p.Fine.Steps)
	before := tr.Pressure[2*p.Fine.Steps-1]
	for n := range p.Fine.Steps {
		now := tr.Pressure[2*n+1]
		d := (now - before) / dt
		rate += d * d
		before = now
	}
	gap := loss.AppendixGap{
		Diameter: g.hot.Bore - g.hot.Gap, Width: g.hot.Gap, Length: g.hot.Length,
		PressureMean: r.PressureMean, PressureRate: rate / float64(p.Fine.Steps), Frequency: f,
		// Where the cold space is the hotter only the part of the loss without a gradient is left.
		HotTemperature: max(te, tc), ColdTemperature: tc,
		HeatCapacity: w.state.Cp, Conductivity: k, GasConstant: w.gas.R,
	}
	l.AppendixGap = gap.Loss()
	if e.Layout != Alpha && g.hot.SealGap > 0 && g.hot.SealLength > 0 {
		above, across := tr.Pressure[:w.loads.count], w.loads.scratch[:w.loads.count]
		if e.Layout == DoubleActing {
			shift(across, above, 1, e.Cylinders)
			for k := range across {
				across[k] = above[k] - across[k]
			}
		} else {
			for k := range across {
				across[k] = c.FlowFriction * w.friction.drop[k]
			}
		}
		l.DisplacerLeakage = loss.SealHeat(g.hot.Bore, g.hot.SealGap, g.hot.SealLength, mu, w.gas.R*tc, w.state.Cp, drop, above, across)
		if e.Layout == DoubleActing {
			l.DisplacerLeakage *= loss.GapReturn(2*l.DisplacerLeakage/drop, g.hot.Bore, g.hot.Gap, g.hot.Length, k)
		}
	}
}

func conductivity(a metal.Alloy, t float64) float64 {
	p := metal.Of(a)
	return p.Conductivity(t)
}

func (w *Workspace) matrixCells() (first, last int) {
	first = -1
	for i := range w.Path.N {
		if w.Path.Cells[i].Kind == cycle.Matrix {
			if first < 0 {
				first = i
			}
			last = i
		}
	}
	return first, last
}

// sweptAndDead gives the swing of the working volume, and the volume outside the swept volumes of
// both spaces [m3].
func (w *Workspace) sweptAndDead() (swept, dead float64) {
	p := &w.Path
	lowE, lowC := math.Inf(1), math.Inf(1)
	low, high := math.Inf(1), math.Inf(-1)
	for k := range 2 * p.Fine.Steps {
		lowE, lowC = min(lowE, p.Fine.Ve[k]), min(lowC, p.Fine.Vc[k])
		sum := p.Fine.Ve[k] + p.Fine.Vc[k]
		low, high = min(low, sum), max(high, sum)
	}
	dead = lowE + lowC
	for i := 1; i < p.N-1; i++ {
		dead += p.Cells[i].Volume
	}
	return high - low, dead
}
