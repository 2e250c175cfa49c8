package force

import (
	"math"
	"testing"

	"hotfront/model/drive"
)

// By the parts themselves: pin, yokes and rods on the right side, each yoke in balance with its mirror image.
func TestRhombicBalanceOfParts(t *testing.T) {
	for i, m := range mechanisms() {
		if m.Kind != drive.Rhombic {
			continue
		}
		r, e := m.Radius, m.Eccentricity
		s := sample(&m, 40)
		for k, at := range s.theta {
			P1, P2 := 800*math.Cos(at+1), 1500*math.Sin(2*at)-200
			l := Rhombic(P1, P2, r, m.Rod, e, at)
			px, py := e-r*math.Cos(at), -r*math.Sin(at) // pin, from the cylinder axis and the cranks' height
			fx, fy := 0.0, 0.0
			for j, yoke := range []float64{s.motion[k].Y1, s.motion[k].Y2} {
				pull, P := l.Rod1, P1
				if j == 1 {
					pull, P = l.Rod2, P2
				}
				near(t, name(i, &m)+" length of rod", math.Hypot(px, yoke-py), m.Rod, 1e-15)
				ux, uy := -px/m.Rod, (yoke-py)/m.Rod // from pin to yoke
				near(t, name(i, &m)+" yoke", P-2*pull*uy, 0, 1e-11)
				fx, fy = fx+pull*ux, fy+pull*uy
			}
			ax, ay := (px-e)/r, py/r // outwards; counterclockwise, the pin moves along (-ay, ax)
			near(t, name(i, &m)+" radial", l.Pin.Radial, fx*ax+fy*ay, 1e-11)
			near(t, name(i, &m)+" tangential", l.Pin.Tangential, fx*-ay+fy*ax, 1e-11)
			near(t, name(i, &m)+" size", l.Pin.Size(), math.Hypot(fx, fy), 1e-11)
			near(t, name(i, &m)+" virtual work", 2*l.Pin.Moment(r), P1*s.motion[k].V1+P2*s.motion[k].V2, 1e-11)
		}
	}
}

// Equal masses with m r on each crank: nothing is left, at any angle.
func TestRhombicEqualMassesBalance(t *testing.T) {
	const omega, mass = 300.0, 1.7
	for i, m := range mechanisms() {
		if m.Kind != drive.Rhombic {
			continue
		}
		s := sample(&m, 100)
		w := RhombicMasses{Displacer: mass, Piston: mass, Crank: 0.002}
		bare := RhombicResidual(nil, s.motion, s.theta, &w, omega)
		near(t, name(i, &m)+" without", bare.Load/(2*(mass*m.Radius+0.002)*omega*omega), 1, 5e-4)
		w.Counterweight = RhombicCounterweight(&w, m.Radius)
		near(t, name(i, &m)+" counterweight", w.Counterweight, mass*m.Radius+0.002, 1e-17)
		left := RhombicResidual(nil, s.motion, s.theta, &w, omega)
		near(t, name(i, &m)+" left", left.Load/bare.Load, 0, 1e-14) // rounding: a few units of the largest term
	}
}

// The frame feels what its bearings carry. Forces of rods, turning masses and counterweights on both cranks, each from
// the places of its own pin and yokes, must be the shaking force (with no gas force: P is inertia alone) upwards, and
// nothing sideways.
func TestRhombicBearingsCarryTheShaking(t *testing.T) {
	const omega = 200.0
	w := RhombicMasses{Displacer: 0.9, Piston: 1.6, Crank: 0.003, Counterweight: 0.011, Ahead: 0.2}
	for i, m := range mechanisms() {
		if m.Kind != drive.Rhombic {
			continue
		}
		s := sample(&m, 60)
		for k, at := range s.theta {
			mo := &s.motion[k]
			P1, P2 := Transmitted(0, w.Displacer, omega, mo.A1), Transmitted(0, w.Piston, omega, mo.A2)
			l := Rhombic(P1, P2, m.Radius, m.Rod, m.Eccentricity, at)
			sumX, sumY, moment := 0.0, 0.0, 0.0
			for _, c := range []struct{ centre, angle, sense float64 }{
				// The right crank turns counterclockwise, its pin next to the axis at theta = 0; the left one is its mirror image.
				{m.Eccentricity, math.Pi + at, 1}, {-m.Eccentricity, -at, -1},
			} {
				ax, ay := math.Cos(c.angle), math.Sin(c.angle) // outwards to the pin
				px, py := c.centre+m.Radius*ax, m.Radius*ay
				u := w.Counterweight * omega * omega
				away := c.angle + math.Pi + c.sense*w.Ahead
				fx, fy := w.Crank*omega*omega*ax+u*math.Cos(away), w.Crank*omega*omega*ay+u*math.Sin(away)
				for _, rod := range [][2]float64{{mo.Y1, l.Rod1}, {mo.Y2, l.Rod2}} {
					fx += rod[1] * -px / m.Rod
					fy += rod[1] * (rod[0] - py) / m.Rod
				}
				sumX, sumY, moment = sumX+fx, sumY+fy, moment+c.centre*fy
			}
			near(t, name(i, &m)+" upwards", sumY, RhombicShaking(mo, at, &w, omega), 1e-10)
			near(t, name(i, &m)+" sideways", sumX, 0, 1e-11)
			near(t, name(i, &m)+" moment", moment, 0, 1e-12)
		}
	}
}

// Unequal masses: no counterweight opposite to the pin leaves less than the closed form, neither at most (where the
// largest force is at a dead centre of the pin, small changes leave as much) nor in the mean square; turned ones take the primary force away.
func TestRhombicUnequalMasses(t *testing.T) {
	const omega = 250.0
	for i, m := range mechanisms() {
		if m.Kind != drive.Rhombic {
			continue
		}
		s := sample(&m, 180)
		n := len(s.theta)
		w := RhombicMasses{Displacer: 0.8, Piston: 1.5, Crank: 0.001}
		f := make([]float64, n)
		RhombicResidual(f, s.motion, s.theta, &w, omega)
		U, ahead := RhombicTurned(f, s.theta, s.weight, omega)
		square := func() float64 {
			sum := 0.0
			for k, v := range f {
				sum += s.weight[k] * v * v
			}
			return sum
		}
		best := RhombicCounterweight(&w, m.Radius)
		w.Counterweight = best
		least, leastSquare := RhombicResidual(f, s.motion, s.theta, &w, omega).Load, 0.0
		leastSquare = square()
		for _, share := range []float64{0.5, 0.9, 0.99, 1.01, 1.1, 2} {
			w.Counterweight = share * best
			if got := RhombicResidual(f, s.motion, s.theta, &w, omega).Load; !(got >= least*(1-1e-12)) || !(square() > leastSquare) {
				t.Errorf("%s: %g of the best counterweight leaves %g N, less than %g N", name(i, &m), share, got, least)
			}
		}
		w.Counterweight, w.Ahead = U, ahead
		RhombicResidual(f, s.motion, s.theta, &w, omega)
		if !(square() < leastSquare) {
			t.Errorf("%s: turned counterweights leave more", name(i, &m))
		}
		again, _ := RhombicTurned(f, s.theta, s.weight, omega)
		near(t, name(i, &m)+" primary left", again/U, 0, 1e-13)
		turned := square()
		for _, d := range [][2]float64{{1.01, 0}, {0.99, 0}, {1, 0.01}, {1, -0.01}} {
			w.Counterweight, w.Ahead = U*d[0], ahead+d[1]
			RhombicResidual(f, s.motion, s.theta, &w, omega)
			if !(square() > turned) {
				t.Errorf("%s: moved by %v it leaves less", name(i, &m), d)
			}
		}
	}
}

// Main bearings of a balanced drive without gas forces carry the sideways part of the rods alone.
func TestRhombicPeaks(t *testing.T) {
	const omega, mass = 200.0, 1.2
	for i, m := range mechanisms() {
		if m.Kind != drive.Rhombic {
			continue
		}
		s := sample(&m, 90)
		n := len(s.theta)
		P1, P2 := make([]float64, n), make([]float64, n)
		want := 0.0
		for k, at := range s.theta {
			P1[k], P2[k] = Transmitted(0, mass, omega, s.motion[k].A1), Transmitted(0, mass, omega, s.motion[k].A2)
			x := m.Eccentricity - m.Radius*math.Cos(at)
			side := 0.5*(P1[k]-P2[k])*x/math.Sqrt(m.Rod*m.Rod-x*x) + mass*m.Radius*omega*omega*math.Cos(at)
			want = max(want, math.Abs(side))
		}
		var l Loads
		Peaks(&l, &m, &Masses{Counterweight: mass * m.Radius}, s.theta, P1, P2, omega)
		near(t, name(i, &m)+" main", l.Main.Load, want, 1e-9)
		// Rods that turn with the pin count on the pin and on the bearings, the crank on the bearings alone: more
		// counterweight by as much leaves the bearings as they were.
		var heavy Loads
		w := Masses{Rod1: 0.2, Rod2: 0.3, Crank: 0.004, Counterweight: (mass+0.5)*m.Radius + 0.004}
		Peaks(&heavy, &m, &w, s.theta, P1, P2, omega)
		near(t, name(i, &m)+" main with rods", heavy.Main.Load, l.Main.Load, 1e-9)
		pin := 0.0
		for k, at := range s.theta {
			p := Rhombic(P1[k], P2[k], m.Radius, m.Rod, m.Eccentricity, at).Pin
			pin = max(pin, math.Hypot(p.Radial+0.5*m.Radius*omega*omega, p.Tangential))
		}
		near(t, name(i, &m)+" pin with rods", heavy.Pin1.Load, pin, 1e-9)
		if l.Pin1 != l.Pin2 || !(l.Pin1.Load > 0) || l.Side1 != (Peak{}) || !(l.Rod1.Load > l.Up1.Load/2) {
			t.Errorf("%s: %+v", name(i, &m), l)
		}
	}
}
