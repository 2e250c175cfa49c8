package model

import (
	"math"
	"testing"

	"hotfront/model/drive"
	"hotfront/model/loss"
)

// TestShakingOfWholeMachines: the balance that machine theory promises comes out of whole machines: rhombic with equal
// masses, a V of 90 degrees with equal masses on one pin, a ring of cylinders. The mechanics are tested in package force.
func TestShakingOfWholeMachines(t *testing.T) {
	w := NewWorkspace()
	rhombic := groundPowerUnit(0, 2500)
	rhombic.Displacer.Mass, rhombic.Piston.Mass = 1.2, 1.2
	r := evaluated(t, w, &rhombic)
	within(t, "counterweight of the rhombic drive", r.Drive.Counterweight, 1.2*rhombic.Drive.CrankRadius, 1e-12)
	if !(r.Drive.ShakingForce > 1000) || r.Drive.ResidualForce > 1e-12*r.Drive.ShakingForce {
		t.Errorf("rhombic, equal masses: %g N without, %g N with counterweights", r.Drive.ShakingForce, r.Drive.ResidualForce)
	}
	rhombic.Displacer.Mass = 0.9
	if u := evaluated(t, w, &rhombic); !(u.Drive.ResidualForce > 0.01*u.Drive.ShakingForce) {
		t.Errorf("rhombic, unequal masses: %g N left", u.Drive.ResidualForce)
	}

	vee := gammaSet()
	vee.Layout = Alpha
	vee.ExpansionPiston, vee.CompressionPiston = vee.Displacer, vee.Displacer
	vee.ExpansionPiston.Rod, vee.CompressionPiston.Rod = 0, 0
	vee.ExpansionPiston.Mass, vee.CompressionPiston.Mass = 2, 2
	vee.Drive = Drive{Kind: drive.Sinusoidal, PhaseAngle: math.Pi / 2, CylinderAngle: math.Pi / 2}
	v := evaluated(t, w, &vee)
	omega := 2 * math.Pi * vee.Speed
	within(t, "primary force of the V", v.Drive.ShakingForce, 2*0.025*omega*omega, 1e-9)
	within(t, "counterweight of the V", v.Drive.Counterweight, 2*0.025, 1e-9)
	if v.Drive.ResidualForce > 1e-9*v.Drive.ShakingForce {
		t.Errorf("V of harmonic motion: %g N left", v.Drive.ResidualForce)
	}
	vee.Drive.Kind, vee.Drive.RodLength = drive.SliderCrank, 0.15
	s := evaluated(t, w, &vee)
	q := 0.025 / 0.15 // the secondary force of textbooks, sqrt(2) m r omega^2 q, and 1 + q^2/4 of the next order of the series
	within(t, "secondary force of the V", s.Drive.ResidualForce, math.Sqrt2*2*0.025*omega*omega*q*(1+q*q/4), 2e-3)

	ring := ringOfFour()
	ring.Piston.Mass, ring.Drive.CylinderCircle = 1.5, 0.3
	g := evaluated(t, w, &ring)
	omega = 2 * math.Pi * ring.Speed
	within(t, "couple of the ring", g.Drive.ShakingCouple, 0.5*4*1.5*0.02*omega*omega*0.15, 1e-9)
	if g.Drive.ShakingForce > 1e-9*g.Drive.PistonForce {
		t.Errorf("ring: %g N along the shaft", g.Drive.ShakingForce)
	}
}

// TestFlywheelOfAMachine: the fluctuation by the running sum of the samples themselves; and what more cylinders even out.
func TestFlywheelOfAMachine(t *testing.T) {
	w := NewWorkspaceGrid(Grid{Heater: 6, Regenerator: 12, Cooler: 6, Steps: 240, CoarseSteps: 20})
	e := gammaSet()
	e.Drive.SpeedFluctuation = 0.02
	p := evaluated(t, w, &e)
	l := &w.loads
	sum, high, low, turn := 0.0, 0.0, 0.0, 0.0
	for k := range l.count {
		sum += l.weight[k] * l.torque[k]
		turn += l.weight[k]
	}
	mean := sum / turn
	sum = 0
	for k := range l.count {
		sum += l.weight[k] * (l.torque[k] - mean)
		high, low = max(high, sum), min(low, sum)
	}
	within(t, "fluctuation", p.Drive.FluctuationEnergy, high-low, 0.01)
	omega := 2 * math.Pi * e.Speed
	within(t, "flywheel", p.Drive.Flywheel*0.02*omega*omega, p.Drive.FluctuationEnergy, 1e-12)
	within(t, "mean torque", p.Torque, mean, 1e-9)

	w = NewWorkspace()
	share := func(n int) float64 {
		ring := ringOfFour()
		ring.Cylinders = n
		ring.Drive.SpeedFluctuation = 0.02
		p := evaluated(t, w, &ring)
		return p.Drive.FluctuationEnergy / (p.BrakePower / ring.Speed)
	}
	one := p.Drive.FluctuationEnergy / (p.BrakePower / e.Speed)
	if four := share(4); !(four < 0.1*one) {
		t.Errorf("fluctuation over work: four cylinders %g, a gamma %g", four, one)
	}
}

// TestBufferSpace: the loss of the buffer as a gas spring against the law for the harmonic swing that its volume makes, in the
// limit of a large volume; and the forces and torque that a closed buffer changes but not the work.
func TestBufferSpace(t *testing.T) {
	w := NewWorkspace()
	e := gammaSet()
	e.Displacer.Rod = 0
	open := evaluated(t, w, &e)
	if open.Losses.GasSpring != 0 {
		t.Errorf("open buffer loses %g W", open.Losses.GasSpring)
	}
	e.Drive.Kind = drive.Sinusoidal
	e.BufferVolume = 0.05
	p := evaluated(t, w, &e)
	w.gas.At(&w.state, e.Coolant.Inlet, e.ChargePressure)
	_, k := w.gas.Transport(e.Coolant.Inlet, 1/w.state.V)
	gamma := w.state.Cp / (w.state.Cp - w.gas.R)
	swing := e.ChargePressure * gamma * circle(0.08) * 0.025 / 0.05
	area := 4*0.05/0.08 + 0.5*math.Pi*0.08*0.08
	want := e.Speed * loss.GasSpringLoss(e.ChargePressure, swing, 0.05, area, 2*math.Pi*e.Speed, k*w.state.V/w.state.Cp, gamma)
	within(t, "loss", p.Losses.GasSpring, want, 1e-3)
	if !(p.Losses.GasSpring > 0.1) {
		t.Errorf("loss %g W", p.Losses.GasSpring)
	}
}
