package force

import (
	"math"
	"testing"

	"hotfront/model/drive"
)

// Worked example of [KhurmiGupta2005], chapter on inertia forces in reciprocating parts, from memory: crank radius
// 0.3 m, rod 1.2 m, 250 kg, bore 0.5 m, 0.35 N/mm2, 250 rpm, 60 degrees from the inner dead centre (head end, our
// alpha = pi). The book rounds omega to 26.2 rad/s and takes the acceleration from two terms of its series.
func TestSliderCrankTextbook(t *testing.T) {
	const r, L, m, omega = 0.3, 1.2, 250.0, 26.2
	alpha := math.Pi + math.Pi/3
	gas := -0.35e6 * math.Pi / 4 * 0.5 * 0.5
	near(t, "gas force", -gas, 68730, 10)
	mech := drive.Mechanism{Kind: drive.SliderCrank, Rod: L, Stroke1: 2 * r, Stroke2: 2 * r}
	var at drive.Motion
	mech.At(&at, alpha)
	P := Transmitted(gas, m, omega, at.A1)
	near(t, "inertia", P-gas, 19306, 0.01*19306) // the series leaves out terms of (r/L)^3
	near(t, "axial force", -P, 49424, 0.004*49424)
	l := SliderCrank(-49424, r, L, alpha)
	near(t, "side thrust", math.Abs(l.Side), 10960, 10)
	near(t, "rod", -l.Rod, 50620, 10)
	near(t, "tangential", l.Pin.Tangential, 48280, 20)
	near(t, "turning moment", l.Pin.Moment(r), 14484, 5)
}

// By the parts themselves: places of pin and body give the direction of the rod; the pull must balance the body; the
// moment of the pin's force about the shaft is force times arm.
func TestSliderCrankBalance(t *testing.T) {
	for i, m := range mechanisms() {
		if m.Kind != drive.SliderCrank {
			continue
		}
		s := sample(&m, 40)
		for k, at := range s.theta {
			P, r, alpha := 1000*math.Cos(3*at+1), 0.5*m.Stroke1, at+m.Phase
			l := SliderCrank(P, r, m.Rod, alpha)
			px, py := r*math.Sin(alpha), -r*math.Cos(alpha)
			by := s.motion[k].Y1 + m.Rod // the datum of package drive
			near(t, name(i, &m)+" length of rod", math.Hypot(px, by-py), m.Rod, 1e-15)
			ux, uy := -px/m.Rod, (by-py)/m.Rod // from pin to body
			near(t, name(i, &m)+" body upwards", P-l.Rod*uy, 0, 1e-11)
			near(t, name(i, &m)+" body sideways", -l.Rod*ux, l.Side, 1e-11)
			fx, fy := l.Rod*ux, l.Rod*uy
			near(t, name(i, &m)+" moment", l.Pin.Moment(r), px*fy-py*fx, 1e-12)
			near(t, name(i, &m)+" radial", l.Pin.Radial, (px*fx+py*fy)/r, 1e-11)
			near(t, name(i, &m)+" size", l.Pin.Size(), math.Abs(l.Rod), 1e-11)
			near(t, name(i, &m)+" virtual work", l.Pin.Moment(r), P*s.motion[k].V1, 1e-12)
		}
	}
}

func TestSinusoidalIsTheLimit(t *testing.T) {
	for _, L := range []float64{1, 1e3, 1e6} {
		for k := range 20 {
			alpha := float64(k)
			a, b := SliderCrank(700, 0.02, L, alpha), Sinusoidal(700, alpha)
			near(t, "radial", a.Pin.Radial, b.Radial, 700*0.0201/L+1e-12)
			near(t, "tangential", a.Pin.Tangential, b.Tangential, 700*0.0201/L+1e-12)
			near(t, "side", a.Side, 0, 700*0.021/L)
		}
	}
	near(t, "size", Sinusoidal(-700, 2).Size(), 700, 1e-12)
}

// Peaks of known cases.
func TestPeaks(t *testing.T) {
	const omega, mass = 100.0, 2.0
	// Harmonic motion, inertia alone: the pins carry m r omega^2 at both dead centres.
	m := drive.Mechanism{Kind: drive.Sinusoidal, Phase: math.Pi / 2, Stroke1: 0.06, Stroke2: 0.06}
	s := sample(&m, 100)
	n := len(s.theta)
	P1, P2 := make([]float64, n), make([]float64, n)
	forces := func() {
		for k := range n {
			P1[k], P2[k] = Transmitted(0, mass, omega, s.motion[k].A1), Transmitted(0, mass, omega, s.motion[k].A2)
		}
	}
	forces()
	const size = mass * 0.03 * omega * omega
	var l Loads
	Peaks(&l, &m, &Masses{}, s.theta, P1, P2, omega)
	for _, p := range []Peak{l.Up1, l.Down1, l.Up2, l.Down2, l.Pin1, l.Pin2} {
		near(t, "inertia alone", p.Load/size, 1, 5e-4) // the spacing squared over 8
	}
	if l.Side1 != (Peak{}) || l.Rod2 != (Peak{}) || l.Main != (Peak{}) {
		t.Errorf("harmonic motion has no rods and guides: %+v", l)
	}
	// On a common pin at right angles the two forces P (along their axes) draw a circle.
	Peaks(&l, &m, &Masses{Common: true, Counterweight: mass * 0.03}, s.theta, P1, P2, omega)
	near(t, "common pin", l.Pin1.Load/size, 1, 1e-12)
	near(t, "counterweight takes all off the main bearings", l.Main.Load/size, 0, 1e-12)
	if l.Pin2 != l.Pin1 {
		t.Errorf("one pin, two loads: %+v", l)
	}
	// A rod's share that turns adds its centrifugal force to that of the body at the dead centres.
	Peaks(&l, &m, &Masses{Rod1: 0.5}, s.theta, P1, P2, omega)
	near(t, "turning share", l.Pin1.Load/(size*2.5/2), 1, 5e-4)

	// Slider-crank: largest inertia m r omega^2 (1 + r/L) at the top.
	m.Kind, m.Rod = drive.SliderCrank, 0.12
	s = sample(&m, 100)
	forces()
	Peaks(&l, &m, &Masses{}, s.theta, P1, P2, omega)
	near(t, "pin at the top", l.Pin2.Load/(size*1.25), 1, 1e-3)
	near(t, "there", l.Pin2.Angle, math.Pi, 0.05)
	near(t, "first body ahead by its phase", l.Pin1.Angle, math.Pi/2, 0.05)
	near(t, "rod", l.Rod2.Load, l.Pin2.Load, 1e-9)
	near(t, "upwards at the top", l.Up2.Load/(size*1.25), 1, 1e-3)
	near(t, "downwards at the bottom", l.Down2.Load/size, 0.75, 1e-3) // 1 - r/L
	side := 0.0
	for k, at := range s.theta {
		side = max(side, math.Abs(P2[k]*math.Tan(math.Asin(0.03/0.12*math.Sin(at)))))
	}
	near(t, "side", l.Side2.Load, side, 1e-9)

	// Unequal bodies at an odd phase, with rods: each pin by the places of its own parts.
	m = drive.Mechanism{Kind: drive.SliderCrank, Phase: 1.2, Rod: 0.05, Stroke1: 0.07, Stroke2: 0.05}
	s = sample(&m, 100)
	forces()
	P1[17] += 9000
	Peaks(&l, &m, &Masses{Rod1: 0.2, Rod2: 0.4}, s.theta, P1, P2, omega)
	pin1, pin2, side1 := 0.0, 0.0, 0.0
	for k, at := range s.theta {
		load := func(P, r, alpha, rod float64) (pin, side float64) {
			x, y := r*math.Sin(alpha), -r*math.Cos(alpha)
			side = P * x / math.Sqrt(m.Rod*m.Rod-x*x)
			return math.Hypot(-side+rod*x*omega*omega, P+rod*y*omega*omega), math.Abs(side)
		}
		p, c := load(P1[k], 0.035, at+1.2, 0.2)
		pin1, side1 = max(pin1, p), max(side1, c)
		p, _ = load(P2[k], 0.025, at, 0.4)
		pin2 = max(pin2, p)
	}
	near(t, "pin of the first", l.Pin1.Load, pin1, 1e-9)
	near(t, "pin of the second", l.Pin2.Load, pin2, 1e-9)
	near(t, "side of the first", l.Side1.Load, side1, 1e-9)
}
