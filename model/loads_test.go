package model

import (
	"math"
	"math/rand/v2"
	"slices"
	"testing"

	"hotfront/model/drive"
)

// ringOfFour is an invented double-acting machine of four cylinders.
func ringOfFour() Engine {
	const mm, cm3 = 1e-3, 1e-6
	e := gammaSet()
	e.Layout, e.Cylinders = DoubleActing, 4
	e.Drive = Drive{Kind: drive.Sinusoidal}
	e.Displacer = Reciprocator{}
	e.Piston = Reciprocator{Bore: 70 * mm, Stroke: 40 * mm, Rod: 16 * mm, Length: 120 * mm, Gap: 0.3 * mm, Wall: 1 * mm, SealGap: 0.005 * mm, SealLength: 15 * mm}
	e.Heater.RingDiameter = 0.5
	e.Coolant.Flow = 0.8
	e.Cylinder.Wall = 8 * mm
	return e
}

// yokeAlpha is an invented small alpha machine with a Ross yoke.
func yokeAlpha() Engine {
	const mm = 1e-3
	e := gammaSet()
	e.Layout = Alpha
	e.ExpansionPiston = e.Displacer
	e.ExpansionPiston.Rod, e.ExpansionPiston.Bore, e.ExpansionPiston.Mass = 0, 70*mm, 0.8
	e.CompressionPiston = e.ExpansionPiston
	e.Drive = Drive{Kind: drive.RossYoke, CrankRadius: 12 * mm, YokeArm: 55 * mm, YokeHalfWidth: 50 * mm, LinkLength: 90 * mm, RodLength: 120 * mm}
	return e
}

// TestDoubleActingIsARingOfAlphas: above its piston, and below that of its neighbour, each circuit has the volumes of an
// alpha machine with harmonic motion and a phase angle of half a turn less a turn over n.
func TestDoubleActingIsARingOfAlphas(t *testing.T) {
	w := NewWorkspace()
	for _, n := range []int{3, 4, 5, 6} {
		ring := ringOfFour()
		ring.Cylinders = n
		ring.Piston.Rod = 0
		alpha := ring
		alpha.Layout = Alpha
		alpha.ExpansionPiston, alpha.CompressionPiston = ring.Piston, ring.Piston
		alpha.Drive.PhaseAngle = math.Pi - 2*math.Pi/float64(n)
		alpha.Coolant.Flow /= float64(n)
		a, b := evaluated(t, w, &ring), evaluated(t, w, &alpha)
		x := float64(n)
		// The ring starts its cycle half a turn later; both settle within the tolerances of the cycle.
		for _, c := range []struct {
			what      string
			got, want float64
		}{
			{"p-V power", a.PVPower, x * b.PVPower}, {"flow loss", a.FlowLoss, x * b.FlowLoss}, {"gas", a.GasMass, x * b.GasMass},
			{"reheat", a.Losses.Reheat, x * b.Losses.Reheat}, {"shuttle", a.Losses.Shuttle, x * b.Losses.Shuttle},
			{"pressure ratio", a.PressureRatio, b.PressureRatio}, {"metal", a.HotMetalMass, x * b.HotMetalMass},
			{"heat flux", a.HeaterHeatFlux, b.HeaterHeatFlux},
		} {
			within(t, c.what, c.got, c.want, 2e-3)
		}
		// The ring has one seal a circuit between pressures further apart, the alpha two against the mean.
		if !(a.Losses.Leakage > 0) || math.Abs(a.EnergyResidual) > 1e-3 {
			t.Errorf("%d cylinders: leakage %g W, residual %g", n, a.Losses.Leakage, a.EnergyResidual)
		}
		if sum := a.BrakePower + a.CoolantHeat + a.Losses.Drive + a.Losses.SealFriction; math.Abs(sum-a.HeatIn) > 1e-3*a.HeatIn {
			t.Errorf("%d cylinders: ledger %g W of %g W", n, sum, a.HeatIn)
		}
	}
}

// TestTorqueGivesShaftWork: the torque over a turn adds up to the shaft work of a cycle, for every layout and drive, and
// its gas part to the p-V work.
func TestTorqueGivesShaftWork(t *testing.T) {
	w := NewWorkspace()
	c := Corrections{FlowFriction: 2.3, CycleWork: 0.83, Effectiveness: 0.88, SealFriction: 0.3e5}
	rng := rand.New(rand.NewPCG(3, 8))
	engines := []Engine{groundPowerUnit(0, 2500), gammaSet(), ringOfFour()}
	for _, n := range []int{3, 5, 6, 12} {
		e := ringOfFour()
		e.Cylinders = n
		engines = append(engines, e)
	}
	for i := range 30 {
		engines = append(engines, drawEngine(rng, &classes()[i%3]))
	}
	engines = append(engines, yokeAlpha())
	closed := gammaSet()
	closed.BufferVolume = 1e-3
	engines = append(engines, closed)
	checked := 0
	for i := range engines {
		e := &engines[i]
		var p Performance
		Evaluate(&p, e, &c, w)
		if p.Cause != None {
			continue
		}
		checked++
		l := &w.loads
		shaft, gas, turn := 0.0, 0.0, 0.0
		for k := range l.count {
			shaft += l.weight[k] * l.torque[k]
			gas += l.weight[k] * (l.hot[k]*l.motion[k].V1 + l.cold[k]*l.motion[k].V2)
			turn += l.weight[k]
		}
		within(t, "turn", turn, 2*math.Pi, 1e-12)
		// The parts of the power are up to some ten times the power itself.
		if scale := math.Abs(p.PVPower) / e.Speed; math.Abs(shaft-p.BrakePower/e.Speed) > 1e-7*scale {
			t.Errorf("engine %d, layout %d: torque gives %.9g J, the shaft %.9g J", i, e.Layout, shaft, p.BrakePower/e.Speed)
		}
		within(t, "gas forces", gas*e.circuits(), p.PVPower/e.Speed, 1e-7)
		// The mean over even steps of a smooth torque is the mean over the turn.
		mean := 0.0
		turns := Turn(nil, w)
		for _, s := range turns {
			mean += s.Torque / float64(len(turns))
		}
		if math.Abs(mean-p.Torque) > 0.02*(math.Abs(p.Torque)+p.Drive.TorqueMax-p.Drive.TorqueMin) {
			t.Errorf("engine %d: mean torque %g N m over the steps, %g", i, mean, p.Torque)
		}
	}
	if checked < 25 {
		t.Errorf("only %d engines had a result", checked)
	}
}

// TestShift: by 2 of 3 of a turn of six steps, the two kinds of samples kept apart.
func TestShift(t *testing.T) {
	src := []float64{0, 100, 1, 101, 2, 102, 3, 103, 4, 104, 5, 105}
	got := make([]float64, len(src))
	shift(got, src, 2, 3)
	if want := []float64{2, 102, 3, 103, 4, 104, 5, 105, 0, 100, 1, 101}; !slices.Equal(got, want) {
		t.Errorf("%v, want %v", got, want)
	}
}
