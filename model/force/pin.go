package force

import (
	"math"

	"hotfront/model/drive"
)

// Pin is the force on a crank pin, in directions that turn with the crank.
type Pin struct {
	Radial     float64 // outwards, from the crank's axis to the pin [N]
	Tangential float64 // in the sense of rotation [N]
}

// Size is the load of the pin's bearing [N].
func (p Pin) Size() float64 { return math.Hypot(p.Radial, p.Tangential) }

// Moment is the torque on the shaft [N m], r crank radius [m].
func (p Pin) Moment(r float64) float64 { return p.Tangential * r }

// Add gives the sum of two forces on one pin, or on the bearings of its shaft.
func (p Pin) Add(q Pin) Pin { return Pin{p.Radial + q.Radial, p.Tangential + q.Tangential} }

// Turning gives the force of a mass that turns with the crank [N], outwards; negative for a mass opposite to the pin.
//
//	F = U omega^2
//
// U mass times radius [kg m], omega [rad/s].
func Turning(U, omega float64) Pin { return Pin{Radial: U * omega * omega} }

// Peak is the largest load over a turn and its place.
type Peak struct {
	Load  float64 // [N]; of a couple [N m]
	Angle float64 // crank angle [rad]
}

// take keeps the larger one; the first of equal ones. NaN is kept: a peak never hides it.
func (p *Peak) take(load, angle float64) {
	if load > p.Load || math.IsNaN(load) {
		p.Load, p.Angle = load, angle
	}
}

// Loads are the largest loads inside a drive over a turn. Those that a mechanism does not have are zero.
type Loads struct {
	Up1   Peak // largest axial force of the first body upwards
	Down1 Peak // and downwards, positive
	Up2   Peak // of the second body
	Down2 Peak
	Rod1  Peak // force along a connecting rod of the first body, pull or push; of each of its two rods in a rhombic drive
	Rod2  Peak // of the second body
	Side1 Peak // side thrust of the first body on its cylinder
	Side2 Peak // of the second body
	Pin1  Peak // crank pin of the first body; both bodies share it in a rhombic drive, a Ross yoke and on a common pin
	Pin2  Peak // of the second body, the same as Pin1 where they share it
	Main  Peak // main bearings of one crank together: rhombic drive, Ross yoke, and common pin
}

// Masses are what turns with a crank. The zero value is a drive whose rods have no mass and whose cranks balance
// themselves. The rods of a Ross yoke do not reach the crank: their shares go with the ends of its crossbar.
type Masses struct {
	Common        bool    // slider-crank, sinusoidal: one pin for both bodies (strokes equal, phase the included angle)
	Rod1          float64 // share of the first body's rod that goes with its crank pin [kg]; of each of its rods in a rhombic drive
	Rod2          float64 // of the second body
	Crank         float64 // rest of the unbalance of one crank, pin and web, mass times radius [kg m]
	Counterweight float64 // opposite to the pin on one crank, mass times radius [kg m]
}

// Peaks sets dst to the largest loads of a drive.
//
// theta crank angles [rad], P1 and P2 axial forces of both bodies there (Transmitted) [N], omega [rad/s].
func Peaks(dst *Loads, m *drive.Mechanism, w *Masses, theta, P1, P2 []float64, omega float64) {
	*dst = Loads{}
	for k, at := range theta {
		dst.Up1.take(P1[k], at)
		dst.Down1.take(-P1[k], at)
		dst.Up2.take(P2[k], at)
		dst.Down2.take(-P2[k], at)
		if m.Kind == drive.Rhombic {
			l := Rhombic(P1[k], P2[k], m.Radius, m.Rod, m.Eccentricity, at)
			pin := l.Pin.Add(Turning((w.Rod1+w.Rod2)*m.Radius, omega))
			dst.Rod1.take(math.Abs(l.Rod1), at)
			dst.Rod2.take(math.Abs(l.Rod2), at)
			dst.Pin1.take(pin.Size(), at)
			dst.Main.take(pin.Add(Turning(w.Crank-w.Counterweight, omega)).Size(), at)
			continue
		}
		if m.Kind == drive.RossYoke {
			var l, ends drive.RossYokeLoad
			m.RossYokeForces(&l, at, P1[k], P2[k])
			m.RossYokeInertia(&ends, at, w.Rod1, w.Rod2, omega)
			pin := RossYoke(&l, at).Add(RossYoke(&ends, at))
			dst.Rod1.take(math.Abs(l.Rod1), at)
			dst.Rod2.take(math.Abs(l.Rod2), at)
			dst.Side1.take(math.Abs(l.Side1), at)
			dst.Side2.take(math.Abs(l.Side2), at)
			dst.Pin1.take(pin.Size(), at)
			dst.Main.take(pin.Add(Turning(w.Crank-w.Counterweight, omega)).Size(), at)
			continue
		}
		var one, two Slider
		r1, r2 := 0.5*m.Stroke1, 0.5*m.Stroke2
		switch m.Kind {
		case drive.SliderCrank:
			one, two = SliderCrank(P1[k], r1, m.Rod, at+m.Phase), SliderCrank(P2[k], r2, m.Rod, at)
		case drive.Sinusoidal:
			one.Pin, two.Pin = Sinusoidal(P1[k], at+m.Phase), Sinusoidal(P2[k], at)
		default:
			panic("force: loads of an unknown kind of mechanism")
		}
		dst.Rod1.take(math.Abs(one.Rod), at)
		dst.Rod2.take(math.Abs(two.Rod), at)
		dst.Side1.take(math.Abs(one.Side), at)
		dst.Side2.take(math.Abs(two.Side), at)
		pin1, pin2 := one.Pin.Add(Turning(w.Rod1*r1, omega)), two.Pin.Add(Turning(w.Rod2*r2, omega))
		if w.Common {
			pin1 = pin1.Add(pin2)
			dst.Main.take(pin1.Add(Turning(w.Crank-w.Counterweight, omega)).Size(), at)
		} else {
			dst.Pin2.take(pin2.Size(), at)
		}
		dst.Pin1.take(pin1.Size(), at)
	}
	if w.Common || m.Kind == drive.Rhombic || m.Kind == drive.RossYoke {
		dst.Pin2 = dst.Pin1
	}
}
