package force

import (
	"math"
	"math/cmplx"
	"testing"

	"hotfront/model/drive"
)

// secondary is the second harmonic of the acceleration of a slider-crank over r, the series in q = r/L of the machine-theory
// textbooks ([KhurmiGupta2005] stops after the first term), from memory: q + q^3/4 + 15 q^5/128, next term 35 q^7/512.
func secondary(q float64) float64 { return q + q*q*q/4 + 15*math.Pow(q, 5)/128 }

func crank(kind drive.Kind, phase, r, L float64) drive.Mechanism {
	return drive.Mechanism{Kind: kind, Phase: phase, Rod: L, Stroke1: 2 * r, Stroke2: 2 * r}
}

// vee is a V of 90 degrees with equal masses on one pin, the second cylinder ahead.
func vee(mass float64) [2]Body {
	return [2]Body{{Mass: mass, Axis: -math.Pi / 4}, {Mass: mass, Axis: math.Pi / 4}}
}

// Harmonic motion in a V of 90 degrees: a constant force m r omega^2 in the direction of the pin; m r opposite to the
// pin leaves nothing.
func TestVeeOfHarmonicMotion(t *testing.T) {
	const mass, r, omega = 2.0, 0.04, 150.0
	m := crank(drive.Sinusoidal, math.Pi/2, r, 0)
	b := vee(mass)
	near(t, "one pin", PinAngle(&b[0], m.Phase), PinAngle(&b[1], 0), 1e-15)
	s := sample(&m, 60)
	f := make([]Vector, len(s.theta))
	Residual(f, nil, s.motion, s.theta, &b, nil, omega)
	for k, at := range s.theta {
		phi := PinAngle(&b[1], 0) + at
		near(t, "x", f[k].X, -mass*r*omega*omega*math.Sin(phi), 1e-11)
		near(t, "y", f[k].Y, mass*r*omega*omega*math.Cos(phi), 1e-11)
	}
	forward, backward := Harmonic(f, s.theta, s.weight, 1)
	w := Counterweight(forward, omega)
	near(t, "unbalance", w.Unbalance, mass*r, 1e-15)
	near(t, "opposite to the pin", math.Cos(w.Angle-PinAngle(&b[1], 0)), -1, 1e-14)
	near(t, "backward part", cmplx.Abs(backward), 0, 1e-11)
	left, _ := Residual(nil, nil, s.motion, s.theta, &b, []Rotor{w}, omega)
	near(t, "left over", left.Load/(mass*r*omega*omega), 0, 1e-14)
}

// The same with rods: the counterweight m r still cancels the primary force exactly, and sqrt(2) m r omega^2 times the
// secondary stays, across the V's middle.
func TestVeeOfSliderCranks(t *testing.T) {
	const mass, r, omega = 2.0, 0.04, 150.0
	const size = mass * r * omega * omega
	b := vee(mass)
	for _, L := range []float64{0.1, 0.16, 0.4, 4, 4000} {
		q := r / L
		m := crank(drive.SliderCrank, math.Pi/2, r, L)
		s := sample(&m, 120)
		f := make([]Vector, len(s.theta))
		w := Rotor{Unbalance: mass * r, Angle: PinAngle(&b[1], 0) + math.Pi}
		left, _ := Residual(f, nil, s.motion, s.theta, &b, []Rotor{w}, omega)
		forward, backward := Harmonic(f, s.theta, s.weight, 1)
		near(t, "primary left", Largest(forward, backward)/size, 0, 1e-14)
		forward, backward = Harmonic(f, s.theta, s.weight, 2)
		next := 35 * math.Pow(q, 7) / 512
		near(t, "secondary", Largest(forward, backward)/size, math.Sqrt2*secondary(q), 1.5*math.Sqrt2*next+1e-13)
		near(t, "secondary is a line", (cmplx.Abs(forward)-cmplx.Abs(backward))/size, 0, 1e-13)
		for k := range f { // upwards the terms of order 2, 6, 10 cancel, those of order 4, 8 add up
			near(t, "upwards", f[k].Y/size, 0, math.Sqrt2*q*q*q/3+1e-14)
		}
		// The largest of all: secondary and the sixth order, 9 q^5/128, which stands across too, and the fourth.
		near(t, "largest", left.Load/size, math.Sqrt2*q, 0.4*q*q*q+2e-3*q+1e-13)
	}
}

// Worked example of [KhurmiGupta2005], chapter on balancing of V engines, from memory: 11.5 kg per cylinder, crank 75 mm,
// rod 0.3 m, 90 degrees, 500 rpm: balanced for primary forces by a revolving mass, largest secondary force 836 N
// (first term of the series).
func TestVeeTextbook(t *testing.T) {
	const mass, r, L, omega = 11.5, 0.075, 0.3, 500 * 2 * math.Pi / 60
	m := crank(drive.SliderCrank, math.Pi/2, r, L)
	b := vee(mass)
	s := sample(&m, 120)
	f := make([]Vector, len(s.theta))
	Residual(f, nil, s.motion, s.theta, &b, nil, omega)
	forward, backward := Harmonic(f, s.theta, s.weight, 1)
	near(t, "revolving mass", Counterweight(forward, omega).Unbalance, mass*r, 1e-13)
	near(t, "no other primary", cmplx.Abs(backward), 0, 1e-10)
	forward, backward = Harmonic(f, s.theta, s.weight, 2)
	near(t, "secondary", Largest(forward, backward)*(r/L)/secondary(r/L), 836, 0.5)
}

// One cylinder: primary m r omega^2, secondary r/L of it; the best counterweight is half of m r opposite to the pin and
// halves the primary; one on a shaft that turns the other way takes the rest.
func TestSingleCylinder(t *testing.T) {
	const mass, r, omega = 1.5, 0.03, 200.0
	const size = mass * r * omega * omega
	b := [2]Body{{}, {Mass: mass, Axis: 0.6}}
	for _, L := range []float64{0.09, 0.15, 300} {
		m := crank(drive.SliderCrank, 1, r, L)
		s := sample(&m, 120)
		f := make([]Vector, len(s.theta))
		bare, _ := Residual(f, nil, s.motion, s.theta, &b, nil, omega)
		near(t, "largest, at the top", bare.Load/size, 1+r/L, 3e-3)
		near(t, "at the top", bare.Angle, math.Pi, 0.04)
		forward, backward := Harmonic(f, s.theta, s.weight, 1)
		near(t, "primary", Largest(forward, backward)/size, 1, 1e-14)
		w, v := Counterweight(forward, omega), ReverseCounterweight(backward, omega)
		near(t, "half the mass", w.Unbalance, 0.5*mass*r, 1e-15)
		near(t, "opposite to the pin", math.Cos(w.Angle-PinAngle(&b[1], 0)), -1, 1e-14)
		near(t, "the other", v.Unbalance, 0.5*mass*r, 1e-15)
		forward, backward = Harmonic(f, s.theta, s.weight, 2)
		near(t, "secondary", Largest(forward, backward)/size, secondary(r/L), 0.1*math.Pow(r/L, 7)+1e-13)

		both, _ := Residual(f, nil, s.motion, s.theta, &b, []Rotor{w, v}, omega)
		if !v.Reverse || both.Load > size*r/L*1.1+1e-9 {
			t.Errorf("rod %g m: with both counterweights %g N are left", L, both.Load)
		}
		least, _ := Residual(f, nil, s.motion, s.theta, &b, []Rotor{w}, omega)
		// Never further above what the best of many counterweights reaches than the higher orders allow.
		best := least.Load
		for _, share := range []float64{0.6, 0.8, 0.9, 1.1, 1.2, 1.4} {
			for _, turned := range []float64{-0.3, -0.1, 0, 0.1, 0.3} {
				u := Rotor{Unbalance: share * w.Unbalance, Angle: w.Angle + turned}
				p, _ := Residual(nil, nil, s.motion, s.theta, &b, []Rotor{u}, omega)
				best = min(best, p.Load)
			}
		}
		if least.Load-best > 2*size*r/L*1.1+1e-4*size {
			t.Errorf("rod %g m: %g N left, %g N could be", L, least.Load, best)
		}
	}
}

// In line with cranks at 180 degrees: no primary force, twice the secondary, the primary couple m r omega^2 times the
// distance. Opposed pistons of a flat twin: no force in any order, a couple as large as one body's force times the distance
// of the cylinders.
func TestTwins(t *testing.T) {
	const mass, r, L, omega, apart = 1.5, 0.03, 0.12, 200.0, 0.11
	const size = mass * r * omega * omega
	m := crank(drive.SliderCrank, math.Pi, r, L)
	b := [2]Body{{Mass: mass, Offset: apart / 2}, {Mass: mass, Offset: -apart / 2}}
	s := sample(&m, 120)
	f, c := make([]Vector, len(s.theta)), make([]Vector, len(s.theta))
	Residual(f, c, s.motion, s.theta, &b, nil, omega)
	forward, backward := Harmonic(f, s.theta, s.weight, 1)
	near(t, "in line, primary", Largest(forward, backward)/size, 0, 1e-14)
	forward, backward = Harmonic(f, s.theta, s.weight, 2)
	near(t, "in line, secondary", Largest(forward, backward)/size, 2*secondary(r/L), 1e-5)
	forward, backward = Harmonic(c, s.theta, s.weight, 1)
	near(t, "in line, primary couple", Largest(forward, backward)/size, apart, 1e-15)
	forward, backward = Harmonic(c, s.theta, s.weight, 2)
	near(t, "in line, secondary couple", Largest(forward, backward)/size, 0, 1e-14)

	m.Phase, b[1].Axis = 0, math.Pi
	near(t, "flat, pins opposite", math.Cos(PinAngle(&b[0], 0)-PinAngle(&b[1], 0)), -1, 1e-15)
	s = sample(&m, 120)
	force, couple := Residual(nil, nil, s.motion, s.theta, &b, nil, omega)
	near(t, "flat, force", force.Load/size, 0, 1e-15)
	near(t, "flat, couple", couple.Load/size, apart*(1+r/L), 1e-3*apart)
}

// In line at right angles, as the displacer and the piston of a machine in one row: primary sqrt(2) m r omega^2, no
// secondary (textbook: two cranks at 90 degrees), and two counterweights in two planes cancel force and couple that turn
// forward; on a second shaft that turns the other way two more take all of the primary.
func TestTwoPlanes(t *testing.T) {
	const mass, r, L, omega = 1.5, 0.03, 0.12, 200.0
	const size = mass * r * omega * omega
	m := crank(drive.SliderCrank, math.Pi/2, r, L)
	b := [2]Body{{Mass: mass, Offset: 0.02}, {Mass: mass, Offset: -0.07}}
	s := sample(&m, 120)
	f, c := make([]Vector, len(s.theta)), make([]Vector, len(s.theta))
	Residual(f, c, s.motion, s.theta, &b, nil, omega)
	forward, backward := Harmonic(f, s.theta, s.weight, 1)
	near(t, "primary", Largest(forward, backward)/size, math.Sqrt2, 1e-13)
	f2, b2 := Harmonic(f, s.theta, s.weight, 2)
	near(t, "secondary", Largest(f2, b2)/size, 0, 1e-13)
	cf, cb := Harmonic(c, s.theta, s.weight, 1)
	w1, w2 := TwoPlanes(forward, cf, 0.1, -0.15, omega)
	v1, v2 := TwoPlanes(backward, cb, 0.1, -0.15, omega)
	v1.Reverse, v2.Reverse = true, true
	Residual(f, c, s.motion, s.theta, &b, []Rotor{w1, w2, v1, v2}, omega)
	for what, v := range map[string][]Vector{"force": f, "couple": c} {
		forward, backward := Harmonic(v, s.theta, s.weight, 1)
		near(t, "primary left, "+what, Largest(forward, backward)/size, 0, 1e-14)
	}
}

// The frame feels what bearings and guides carry: on one pin the force of both rods, turned from the crank's directions into
// the frame's, with the side thrusts, must be the shaking force of the bodies.
func TestBearingsCarryTheShaking(t *testing.T) {
	const omega = 150.0
	m := crank(drive.SliderCrank, math.Pi/2, 0.03, 0.08)
	b := [2]Body{{Mass: 1.1, Axis: -math.Pi / 4}, {Mass: 2.3, Axis: math.Pi / 4}}
	s := sample(&m, 40)
	for k, at := range s.theta {
		mo := &s.motion[k]
		one := SliderCrank(Transmitted(0, b[0].Mass, omega, mo.A1), 0.03, 0.08, at+m.Phase)
		two := SliderCrank(Transmitted(0, b[1].Mass, omega, mo.A2), 0.03, 0.08, at)
		pin := one.Pin.Add(two.Pin)
		phi := PinAngle(&b[1], 0) + at
		var sum Vector
		sum.add(pin.Radial, phi)
		sum.add(pin.Tangential, phi+math.Pi/2)
		for i, side := range []float64{one.Side, two.Side} { // towards x of that cylinder: a quarter turn back
			sum.add(side, b[i].Axis-math.Pi/2)
		}
		f, _ := Shaking(mo, at, &b, nil, omega)
		near(t, "x", sum.X, f.X, 1e-10)
		near(t, "y", sum.Y, f.Y, 1e-10)
	}
}
