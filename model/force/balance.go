package force

import (
	"math"

	"hotfront/model/drive"
)

// Vector is a force in the plane of motion [N], or the moments of forces about a plane across the shaft [N m].
type Vector struct{ X, Y float64 }

// Size is its length.
func (v Vector) Size() float64 { return math.Hypot(v.X, v.Y) }

// add puts a force f in the direction phi on v.
func (v *Vector) add(f, phi float64) {
	s, c := math.Sincos(phi)
	v.X -= f * s
	v.Y += f * c
}

// Body is what goes up and down in one cylinder.
type Body struct {
	Mass   float64 // with the connecting rod's share [kg]
	Axis   float64 // of its cylinder, from upright in the sense of rotation [rad]: 0 and 0 in line, 0 and pi opposed
	Offset float64 // of that axis along the shaft [m]
}

// Rotor is a mass that turns: a crank pin with its share of the rod, or a counterweight.
type Rotor struct {
	Unbalance float64 // mass times radius [kg m]
	Angle     float64 // where it stands at theta = 0, from upright in the sense of rotation [rad]
	Offset    float64 // along the shaft [m]
	Reverse   bool    // on a shaft that turns the other way at the same speed
}

// PinAngle gives the angle at theta = 0 of the crank pin of a body, as Rotor counts it [rad]; lead is the phase for
// the first body and 0 for the second. A counterweight opposite to the pin stands at PinAngle + pi. Not for a Ross
// yoke, whose pin stands at -pi/2.
func PinAngle(b *Body, lead float64) float64 { return b.Axis + math.Pi + lead }

// Shaking gives the force by which the inertia of bodies and rotors shakes the frame, and its moment.
//
//	force = -omega^2 sum of m A u(axis) + omega^2 sum of U u(angle +- theta),   u(phi) = (-sin phi, cos phi)
//	couple = the same sums with each term times its offset
//
// at motion of both bodies, theta its crank angle [rad], omega [rad/s]. The couple is that about the plane of offset 0;
// where the force is zero it is the same about every plane. The reaction to the torque turns the frame about the
// shaft besides; it is the torque with its sign changed. So it is where the axes of the cylinders meet the shaft: those
// of a Ross yoke pass it on both sides, and the moment of the inertia forces about the shaft adds to it.
//
// Source: derived here.
func Shaking(at *drive.Motion, theta float64, bodies *[2]Body, rotors []Rotor, omega float64) (force, couple Vector) {
	w := omega * omega
	for i, A := range [2]float64{at.A1, at.A2} {
		b := &bodies[i]
		f := -w * b.Mass * A
		force.add(f, b.Axis)
		couple.add(f*b.Offset, b.Axis)
	}
	for i := range rotors {
		r := &rotors[i]
		phi := r.Angle + theta
		if r.Reverse {
			phi = r.Angle - theta
		}
		f := w * r.Unbalance
		force.add(f, phi)
		couple.add(f*r.Offset, phi)
	}
	return force, couple
}

// Residual sets the slices to force and couple over a turn, and gives the largest of both. Slices that are nil are
// not set; symbols as in Shaking.
func Residual(forces, couples []Vector, motion []drive.Motion, theta []float64, bodies *[2]Body, rotors []Rotor, omega float64) (force, couple Peak) {
	for k, at := range theta {
		f, c := Shaking(&motion[k], at, bodies, rotors, omega)
		if forces != nil {
			forces[k] = f
		}
		if couples != nil {
			couples[k] = c
		}
		force.take(f.Size(), at)
		couple.take(c.Size(), at)
	}
	return force, couple
}

// Harmonic gives the part of a force, or couple, that turns n times with the shaft and n times against it.
//
//	X + i Y = sum over n of forward_n e^(i n theta) + backward_n e^(-i n theta)
//	forward_n = sum of weight (X + i Y) e^(-i n theta)/(2 pi), backward_n the same with n < 0
//
// n >= 1; 1 is called primary, 2 secondary. The two parts draw an ellipse: their sizes add up to its larger half axis,
// the largest force of that order, and differ by the smaller one.
//
// Source: derived here, Fourier sums; exact for evenly spaced samples up to half as many waves as samples.
func Harmonic(forces []Vector, theta, weight []float64, n int) (forward, backward complex128) {
	for k, f := range forces {
		s, c := math.Sincos(float64(n) * theta[k])
		w := weight[k] / (2 * math.Pi)
		z := complex(w*f.X, w*f.Y)
		forward += z * complex(c, -s)
		backward += z * complex(c, s)
	}
	return forward, backward
}

// Largest gives the largest force of one order [N], the sum of the sizes of both its parts.
func Largest(forward, backward complex128) float64 {
	return math.Hypot(real(forward), imag(forward)) + math.Hypot(real(backward), imag(backward))
}
