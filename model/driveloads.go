package model

import (
	"math"

	"hotfront/model/drive"
	"hotfront/model/force"
	"hotfront/model/loss"
)

// DriveResult is what the drive must carry and even out. Forces and torque hold the inertia of the bodies whose mass is
// given, and no weight; connecting rods and cranks count as without mass, but for what the masses of the bodies include.
type DriveResult struct {
	TorqueMax         float64 // largest torque at the shaft over a turn, with inertia [N m]
	TorqueMin         float64 // smallest [N m]
	FluctuationEnergy float64 // largest less smallest running integral of torque less its mean [J]
	Flywheel          float64 // moment of inertia that holds the speed within its fluctuation, all that turns included [kg m2]
	PistonForce       float64 // largest axial force that a body hands on to its rod [N]
	RodForce          float64 // largest force along a connecting rod [N]; 0 without one
	SideThrust        float64 // largest force of a body on its cylinder [N]
	PinLoad           float64 // largest load of a crank pin's bearing [N]
	ShakingForce      float64 // largest inertia force on the frame without counterweights [N]
	ShakingCouple     float64 // largest couple of the inertia forces on the frame without counterweights [N m]
	Counterweight     float64 // best single counterweight on the shaft, on each of two cranks in a rhombic drive, mass x radius [kg m]
	ResidualForce     float64 // largest inertia force on the frame with it [N]
}

// setDriveLoads works out the loads of the drive from the forces of the last cycle.
func (w *Workspace) setDriveLoads(dst *DriveResult, e *Engine) {
	l := &w.loads
	n := l.count
	omega := 2 * pi * e.Speed
	theta, weight, motion := l.angle[:n], l.weight[:n], l.motion[:n]

	swing := force.Fluctuation(theta, l.torque[:n])
	dst.FluctuationEnergy = swing.Energy
	if e.Drive.SpeedFluctuation > 0 {
		dst.Flywheel = force.FlywheelInertia(swing.Energy, e.Drive.SpeedFluctuation, omega)
	}
	dst.TorqueMax, dst.TorqueMin = math.Inf(-1), math.Inf(1)
	for _, t := range l.torque[:n] {
		dst.TorqueMax, dst.TorqueMin = max(dst.TorqueMax, t), min(dst.TorqueMin, t)
	}

	m1, m2 := w.masses(e)
	p1, p2 := l.buffer[:n], l.scratch[:n]
	for k := range n {
		p1[k] = force.Transmitted(l.hot[k]+l.hotDrop[k], m1, omega, motion[k].A1)
		p2[k] = force.Transmitted(l.cold[k]+l.coldDrop[k], m2, omega, motion[k].A2)
	}
	var peaks force.Loads
	masses := force.Masses{Common: w.commonPin(e)}
	force.Peaks(&peaks, &w.motion.mechanism, &masses, theta, p1, p2, omega)
	dst.PistonForce = max(peaks.Up1.Load, peaks.Down1.Load, peaks.Up2.Load, peaks.Down2.Load)
	dst.SideThrust = max(peaks.Side1.Load, peaks.Side2.Load)
	dst.PinLoad = max(peaks.Pin1.Load, peaks.Pin2.Load)
	if e.Drive.Kind != drive.Sinusoidal {
		dst.RodForce = max(peaks.Rod1.Load, peaks.Rod2.Load)
	}

	switch {
	case m1 == 0 && m2 == 0:
	case e.Drive.Kind == drive.Rhombic:
		m := force.RhombicMasses{Displacer: m1, Piston: m2}
		dst.ShakingForce = force.RhombicResidual(nil, motion, theta, &m, omega).Load
		m.Counterweight = force.RhombicCounterweight(&m, e.Drive.CrankRadius)
		dst.Counterweight = m.Counterweight
		dst.ResidualForce = force.RhombicResidual(nil, motion, theta, &m, omega).Load
		clean(&dst.ResidualForce, dst.ShakingForce)
	case e.Layout == DoubleActing:
		for _, at := range theta {
			f, couple := force.RingShaking(&w.motion.mechanism, at, m1, 0.5*e.Drive.CylinderCircle, e.Cylinders, omega)
			dst.ShakingForce = max(dst.ShakingForce, math.Abs(f))
			dst.ShakingCouple = max(dst.ShakingCouple, couple.Size())
		}
		dst.ResidualForce = dst.ShakingForce // a plate's counterweights act on the couple alone
		clean(&dst.ResidualForce, float64(e.Cylinders)*dst.PistonForce)
		clean(&dst.ShakingForce, float64(e.Cylinders)*dst.PistonForce)
	default:
		bodies := [2]force.Body{{Mass: m1}, {Mass: m2, Axis: w.included(e), Offset: e.Drive.CylinderDistance}}
		free, couple := force.Residual(l.shaking[:n], nil, motion, theta, &bodies, nil, omega)
		dst.ShakingForce, dst.ShakingCouple = free.Load, couple.Load
		forward, _ := force.Harmonic(l.shaking[:n], theta, weight, 1)
		rotor := [1]force.Rotor{force.Counterweight(forward, omega)}
		dst.Counterweight = rotor[0].Unbalance
		left, _ := force.Residual(nil, nil, motion, theta, &bodies, rotor[:], omega)
		dst.ResidualForce = left.Load
		clean(&dst.ResidualForce, dst.ShakingForce)
	}
}

// clean makes a sum of terms of the given size 0 where it is nothing but their rounding.
func clean(sum *float64, size float64) {
	if *sum < 1e-12*size {
		*sum = 0
	}
}

// masses are those of the bodies of one circuit [kg]. A double-acting machine has one piston a circuit.
func (w *Workspace) masses(e *Engine) (hot, cold float64) {
	if e.Layout == DoubleActing {
		return w.geometry.hot.Mass, 0
	}
	return w.geometry.hot.Mass, w.geometry.cold.Mass
}

// included is the angle between the axes of both cylinders [rad]; a beta machine has one axis, a Ross yoke parallel ones.
func (w *Workspace) included(e *Engine) float64 {
	if e.Layout == Beta || e.Drive.Kind == drive.RossYoke {
		return 0
	}
	return e.Drive.CylinderAngle
}

// commonPin tells whether both bodies may run on one crank pin, and so are taken to: equal strokes, and cylinders that
// stand at the phase angle.
func (w *Workspace) commonPin(e *Engine) bool {
	m := &w.motion.mechanism
	return (e.Layout == Alpha || e.Layout == Gamma) && (m.Kind == drive.Sinusoidal || m.Kind == drive.SliderCrank) &&
		math.Abs(m.Stroke1-m.Stroke2) <= 1e-9*m.Stroke1 && math.Abs(e.Drive.CylinderAngle-m.Phase) <= 1e-9
}

// springLoss is the work that a closed buffer space loses in a cycle by heat to its walls [J], from its pressure in
// buffer. The space is taken as a cylinder of the piston's bore with two end walls at the temperature of the coolant; the
// first harmonic of the pressure counts.
func (w *Workspace) springLoss(e *Engine, bore float64) float64 {
	l, p := &w.loads, &w.Path
	if e.BufferVolume == 0 {
		return 0
	}
	re, im := 0.0, 0.0
	for k := range l.count {
		s, c := math.Sincos(l.angle[k])
		re += l.weight[k] * l.buffer[k] * c / math.Pi
		im += l.weight[k] * l.buffer[k] * s / math.Pi
	}
	w.gas.At(&w.state, e.Coolant.Inlet, p.Mean)
	_, k := w.gas.Transport(e.Coolant.Inlet, 1/w.state.V)
	gamma := w.state.Cp / (w.state.Cp - w.gas.R)
	area := 4*e.BufferVolume/bore + 0.5*math.Pi*bore*bore
	return loss.GasSpringLoss(p.Mean, math.Hypot(re, im), e.BufferVolume, area, 2*pi*e.Speed, k*w.state.V/w.state.Cp, gamma)
}
