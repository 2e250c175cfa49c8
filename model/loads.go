package model

import (
	"math"

	"hotfront/model/cycle"
	"hotfront/model/drive"
	"hotfront/model/force"
	"hotfront/model/loss"
)

// loads are the forces of the gas on both bodies over a cycle, at the stage times of the solver: sample 2n at the
// time (n + Gamma) dt, 2n+1 at (n + 1) dt. Sums over samples with weight are integrals over a turn, the same by which
// the solver adds up its work; both kinds of samples are evenly spaced in themselves.
type loads struct {
	count  int                              // samples a cycle
	angle  [2 * cycle.MaxSteps]float64      // crank angle [rad]
	weight [2 * cycle.MaxSteps]float64      // their sum is 2 pi [rad]
	motion [2 * cycle.MaxSteps]drive.Motion // of both bodies

	hot, cold         [2 * cycle.MaxSteps]float64 // axial force on each body at uniform pressure, upwards [N]
	hotDrop, coldDrop [2 * cycle.MaxSteps]float64 // what the pressure drops by flow friction add to that [N]
	forced            [2 * cycle.MaxSteps]float64 // torque by which the drive must push the bodies that give power [N m]
	torque            [2 * cycle.MaxSteps]float64 // at the shaft, of the whole machine [N m]

	spring          float64 // work lost in the buffer spaces [J]
	buffer, scratch [2 * cycle.MaxSteps]float64
	shaking         [2 * cycle.MaxSteps]force.Vector
}

// crankcase is the pressure behind the rods of a double-acting machine, whose crankcase is taken as open [Pa].
const crankcase = atmosphere

// sample lays out sample k of a cycle of the given steps and the motion at it.
func (l *loads) sample(k, steps int, angle float64, m *drive.Motion) {
	share := cycle.Gamma
	if k&1 == 0 {
		share = 1 - cycle.Gamma
	}
	l.count = 2 * steps
	l.angle[k], l.weight[k], l.motion[k] = angle, share*2*math.Pi/float64(steps), *m
}

// setForces works out the axial gas forces. Pressure above a body pushes it down, below it up; the buffer space holds
// the mean pressure, and a closed one of finite volume swings about it. Half of the pressure drop is put on either
// side of the uniform pressure. Reports false where a buffer space does not stay above zero.
//
// The lower side of a double-acting piston belongs to the circuit that is behind by a turn over the number of cylinders.
func (w *Workspace) setForces(e *Engine, flowFriction float64) bool {
	g, l := &w.geometry, &w.loads
	n := l.count
	l.spring = 0
	p, drop := w.Trace().Pressure[:n], w.friction.drop[:n]
	switch e.Layout {
	case DoubleActing:
		under := g.hotArea - g.hotRodArea
		behind := l.scratch[:n]
		shift(behind, p, 1, e.Cylinders)
		for k := range n {
			l.hot[k] = behind[k]*under + crankcase*g.hotRodArea - p[k]*g.hotArea
		}
		shift(behind, drop, 1, e.Cylinders)
		for k := range n {
			l.hotDrop[k] = -0.5 * flowFriction * (drop[k]*g.hotArea + behind[k]*under)
			l.cold[k], l.coldDrop[k] = 0, 0
		}
		return true
	case Alpha:
		for k := range n {
			l.scratch[k] = g.hotArea * l.motion[k].Y1
		}
		if !w.setBuffer(e) {
			return false
		}
		l.spring += w.springLoss(e, g.hot.Bore)
		for k := range n {
			l.hot[k] = (l.buffer[k] - p[k]) * g.hotArea
			l.hotDrop[k] = -0.5 * flowFriction * drop[k] * g.hotArea
		}
	}
	area := g.coldArea
	if e.Layout == Beta {
		area -= g.hotRodArea // the displacer's rod passes through the piston
	}
	for k := range n {
		l.scratch[k] = area * l.motion[k].Y2
		if e.Layout != Alpha { // the rod of the displacer ends in the buffer space
			l.scratch[k] += g.hotRodArea * l.motion[k].Y1
		}
	}
	if !w.setBuffer(e) {
		return false
	}
	l.spring += w.springLoss(e, g.cold.Bore)
	for k := range n {
		l.cold[k] = (l.buffer[k] - p[k]) * area
		l.coldDrop[k] = 0.5 * flowFriction * drop[k] * area
		if e.Layout != Alpha {
			l.hot[k] = (l.buffer[k] - p[k]) * g.hotRodArea
			l.hotDrop[k] = -flowFriction * drop[k] * (g.hotArea - 0.5*g.hotRodArea)
		}
	}
	return true
}

// setBuffer works out the pressure of a buffer space whose volume, up to a constant, is in scratch.
func (w *Workspace) setBuffer(e *Engine) bool {
	l, p := &w.loads, &w.Path
	n := l.count
	mean := 0.0
	for k := range n {
		mean += l.scratch[k]
	}
	mean /= float64(n)
	for k := range n {
		l.scratch[k] -= mean
	}
	w.gas.At(&w.state, e.Coolant.Inlet, p.Mean)
	gamma := w.state.Cp / (w.state.Cp - w.gas.R)
	return loss.BufferPressure(l.buffer[:n], p.Mean, e.BufferVolume, gamma, l.scratch[:n])
}

// setForced marks where the drive must push the bodies that give power, and returns the forced work of a turn
// [J], of one circuit. Each body hands its work through its own bearings, so each counts by itself; a displacer does not
// count.
func (w *Workspace) setForced(e *Engine) float64 {
	l := &w.loads
	sum := 0.0
	for k := range l.count {
		t := 0.0
		if e.Layout == Alpha || e.Layout == DoubleActing {
			t += max(0, -l.hot[k]*l.motion[k].V1)
		}
		t += max(0, -l.cold[k]*l.motion[k].V2)
		l.forced[k] = t
		sum += l.weight[k] * t
	}
	return sum
}

// setTorque works out the torque at the shaft over a turn: that of the gas forces at uniform pressure, less flow
// friction where it is made, through the drive by Senft's theorem instant by instant,
//
//	T = E t - (1/E - E) t-,
//
// t what the bodies give and t- what they must be given. Losses without a crank angle of their own (cycle work, leakage,
// gas spring, seals) are spread evenly. Inertia passes without loss and gives no work over a turn. Its mean times a turn is the shaft work of a cycle. forced is the forced work that
// the drive's loss was taken from [J], of one circuit.
//
// Derivation: the balance of instants; the mean is [Senft1987].
func (w *Workspace) setTorque(dst *Performance, e *Engine, c *Corrections, forced float64) {
	l := &w.loads
	n := l.count
	units := e.circuits()
	omega := 2 * pi * e.Speed
	even := (dst.Losses.CycleWork + dst.Losses.Leakage + dst.Losses.GasSpring) / units / omega
	m1, m2 := w.masses(e)
	seals := dst.Losses.SealFriction / units / omega
	E := c.Effectiveness
	found := 0.0
	for k := range n {
		found += l.weight[k] * l.forced[k]
	}
	more := (forced - found) / (2 * pi)
	one := l.scratch[:n]
	for k := range n {
		m := &l.motion[k]
		t := l.hot[k]*m.V1 + l.cold[k]*m.V2 - c.FlowFriction*w.friction.power[k]/omega - even
		one[k] = E*t - (1/E-E)*(l.forced[k]+more) - seals + force.InertiaTorque(m, m1, m2, omega)
	}
	copy(l.torque[:n], one)
	for i := 1; i < int(units); i++ {
		shift(l.buffer[:n], one, i, e.Cylinders)
		for k := range n {
			l.torque[k] += l.buffer[k]
		}
	}
}

// shift sets dst to what src was by/of of a turn earlier; the steps of a turn must be a multiple of of.
func shift(dst, src []float64, by, of int) {
	n := len(src)
	k := n - by*(n/2)/of*2
	copy(dst[copy(dst, src[k:]):], src[:k])
}
