package drive

import (
	"fmt"
	"math"
	"math/rand/v2"
	"testing"
)

// TestRossYokeForces: the torque of the pin's force is that of virtual work, and the whole drive is in balance: the
// axial forces, the cylinders' and the pivot's and the main bearings' reactions, along x and y and about the crank's axis.
func TestRossYokeForces(t *testing.T) {
	rng := rand.New(rand.NewPCG(7, 8))
	set := rossYokes()
	for range 100 {
		set = append(set, turnable(rng, 0.9))
	}
	var p rossPose
	var mo Motion
	var l RossYokeLoad
	for i, m := range set {
		for k := range 180 {
			th := 2 * math.Pi * float64(k) / 180
			F1, F2 := 2000*(rng.Float64()-0.5), 2000*(rng.Float64()-0.5)
			m.At(&mo, th)
			p.set(&m, th)
			m.RossYokeForces(&l, th, F1, F2)
			at := fmt.Sprintf("%s theta %.3f ", name(i, &m), th)
			force := math.Abs(l.Link) + math.Abs(l.Rod1) + math.Abs(l.Rod2)
			arm := m.YokeArm + m.YokeHalfWidth + m.Rod
			near(t, at+"torque", l.Moment, F1*mo.V1+F2*mo.V2, 1e-14*force*arm)
			near(t, at+"rod 1", l.Rod1*l.Rod1, F1*F1+l.Side1*l.Side1, 1e-14*l.Rod1*l.Rod1)
			near(t, at+"rod 2", l.Rod2*l.Rod2, F2*F2+l.Side2*l.Side2, 1e-14*l.Rod2*l.Rod2)
			gx, gy := l.Link*p.nx, l.Link*p.ny // the pivot on the link
			near(t, at+"along x", gx-l.Side1-l.Side2-l.PinX, 0, 1e-14*force)
			near(t, at+"along y", gy+F1+F2-l.PinY, 0, 1e-14*force)
			about := m.LinkLength*gy + m.YokeArm*gx + m.YokeHalfWidth*(F2-F1) +
				l.Side1*(mo.Y1+m.Rod) + l.Side2*(mo.Y2+m.Rod) - l.Moment
			near(t, at+"about the crank's axis", about, 0, 1e-14*force*(arm+m.LinkLength))
		}
	}
	// Both in balance by symmetry: with equal forces and a yoke that stands upright nothing turns it.
	m := Mechanism{Kind: RossYoke, Radius: 0.008, Rod: 1e9, YokeArm: 0.03, YokeHalfWidth: 0.03, LinkLength: 1e9}
	m.RossYokeForces(&l, math.Pi/2, -500, -500)
	near(t, "link", l.Link, 0, 1e-9)
	near(t, "pin", l.PinY, -1000, 1e-9)
	near(t, "torque at the top", l.Moment, 0, 1e-9)
	// And one force alone on an upright yoke: F b2 = link b1, the link pulls for an upward first force.
	m.RossYokeForces(&l, math.Pi/2, 300, 0)
	near(t, "link", l.Link, 300, 1e-6)
	near(t, "pin along x", l.PinX, 300, 1e-6)
	near(t, "torque", l.Moment, -300*0.008, 1e-9)
}

// TestRossYokeInertia: masses at the ends of the crossbar, against the loss of their kinetic energy by central difference
// of the energy itself, and in the limit of a long link against the turning of a rigid bar about its middle: the
// link then lies along x and sin(phi) = -r cos(theta)/b1.
func TestRossYokeInertia(t *testing.T) {
	const omega, m1, m2 = 120.0, 0.3, 0.2
	rng := rand.New(rand.NewPCG(9, 10))
	set := rossYokes()
	for range 100 {
		set = append(set, turnable(rng, 0.9))
	}
	var p rossPose
	var l RossYokeLoad
	for i, m := range set {
		energy := func(theta float64) float64 {
			p.set(&m, theta)
			v1, v2 := math.Hypot(p.one.vx, p.one.vy), math.Hypot(p.two.vx, p.two.vy)
			return 0.5 * omega * omega * (m1*v1*v1 + m2*v2*v2)
		}
		most := 0.0
		for k := range 180 {
			most = max(most, energy(2*math.Pi*float64(k)/180))
		}
		for k := range 180 {
			th := 2 * math.Pi * float64(k) / 180
			m.RossYokeInertia(&l, th, m1, m2, omega)
			// Fourth order: the largest miss is 1.8e-9 of the energy for h = 2e-3, and so 16 times less here; rounding,
			// 1e-16/h of it, is less still.
			const h = 1e-3
			slope := (8*(energy(th+h)-energy(th-h)) - energy(th+2*h) + energy(th-2*h)) / (12 * h)
			near(t, fmt.Sprintf("%s theta %.3f torque", name(i, &m), th), l.Moment, -slope, 3e-10*most)
		}
	}
	for i, m := range rossYokes() {
		m.LinkLength = 1e100
		r, b1, b2 := m.Radius, m.YokeArm, m.YokeHalfWidth
		const mass = 0.25
		for k := range 90 {
			s, c := math.Sincos(2 * math.Pi * float64(k) / 90)
			m.RossYokeInertia(&l, 2*math.Pi*float64(k)/90, mass, mass, omega)
			sin := -r * c / b1
			cos := math.Sqrt(1 - sin*sin)
			turn := r * s / b1 / cos
			bend := (r*c/b1 + sin*turn*turn) / cos
			link := 2 * mass * b2 * b2 * bend * omega * omega / (b1 * cos)
			both := 2 * mass * r * omega * omega
			at := fmt.Sprintf("%s step %d ", name(i, &m), k)
			tol := 2e-14 * both * (1 + b2*b2/(b1*b1))
			near(t, at+"link", l.Link, link, tol)
			near(t, at+"pin along x", l.PinX, both*c+link, tol)
			near(t, at+"pin along y", l.PinY, both*s, tol)
			if l.Rod1 != 0 || l.Rod2 != 0 || l.Side1 != 0 || l.Side2 != 0 {
				t.Errorf("%s: %+v", at, l)
			}
		}
	}
}

// The forces allocate nothing and another kind is refused.
func TestRossYokeForcesMisuse(t *testing.T) {
	m := rossYokes()[0]
	var l RossYokeLoad
	if n := testing.AllocsPerRun(10, func() { m.RossYokeForces(&l, 1.1, 100, -50) }); n != 0 {
		t.Errorf("%v allocations", n)
	}
	if n := testing.AllocsPerRun(10, func() { m.RossYokeInertia(&l, 1.1, 0.1, 0.2, 100) }); n != 0 {
		t.Errorf("inertia: %v allocations", n)
	}
	if n := testing.AllocsPerRun(10, func() { m.Check() }); n != 0 {
		t.Errorf("check: %v allocations", n)
	}
	other := Mechanism{Kind: Rhombic, Rod: 0.06, Radius: 0.01, Eccentricity: 0.045}
	for what, f := range map[string]func(){
		"forces":  func() { other.RossYokeForces(&l, 0, 1, 1) },
		"inertia": func() { other.RossYokeInertia(&l, 0, 1, 1, 1) },
	} {
		func() {
			defer func() {
				if recover() == nil {
					t.Errorf("%s of a yoke in a rhombic drive", what)
				}
			}()
			f()
		}()
	}
}
