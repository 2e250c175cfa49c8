package force

import (
	"math"
	"testing"

	"hotfront/model/drive"
)

// TestRossYokeMoment: the pin's tangential force times the crank radius is the virtual work of both bodies to rounding;
// and the peaks over a turn are the largest of these loads.
func TestRossYokeMoment(t *testing.T) {
	m := drive.Mechanism{Kind: drive.RossYoke, Radius: 0.012, Rod: 0.12, YokeArm: 0.055, YokeHalfWidth: 0.05, LinkLength: 0.09}
	if f := m.Check(); f != drive.None {
		t.Fatal(f)
	}
	const n, omega = 360, 150.0
	theta, p1, p2 := make([]float64, n), make([]float64, n), make([]float64, n)
	var at drive.Motion
	var load, ends drive.RossYokeLoad
	var want Loads
	w := Masses{Rod1: 0.1, Rod2: 0.15, Crank: 0.004, Counterweight: 0.003}
	for k := range n {
		theta[k] = 2 * math.Pi * float64(k) / n
		p1[k], p2[k] = 4000*math.Sin(theta[k]+0.3)-900, 2500*math.Cos(2*theta[k])
		m.At(&at, theta[k])
		m.RossYokeForces(&load, theta[k], p1[k], p2[k])
		pin := RossYoke(&load, theta[k])
		if want := p1[k]*at.V1 + p2[k]*at.V2; !(math.Abs(pin.Moment(m.Radius)-want) <= 2e-15*pin.Size()*(m.YokeArm+m.YokeHalfWidth+m.Rod)) {
			t.Errorf("%.0f deg: moment %g N m, virtual work %g", 180/math.Pi*theta[k], pin.Moment(m.Radius), want)
		}
		if !(math.Abs(pin.Size()-math.Hypot(load.PinX, load.PinY)) <= 1e-15*pin.Size()) {
			t.Errorf("pin %g N, was %g", pin.Size(), math.Hypot(load.PinX, load.PinY))
		}
		// What the mass of rods and crank adds, in directions that stand still.
		m.RossYokeInertia(&ends, theta[k], w.Rod1, w.Rod2, omega)
		x, y := load.PinX+ends.PinX, load.PinY+ends.PinY
		crank := (w.Crank - w.Counterweight) * omega * omega
		s, c := math.Sincos(theta[k])
		for _, l := range []struct {
			peak *Peak
			load float64
		}{
			{&want.Up1, p1[k]}, {&want.Down1, -p1[k]}, {&want.Up2, p2[k]}, {&want.Down2, -p2[k]},
			{&want.Rod1, math.Abs(load.Rod1)}, {&want.Rod2, math.Abs(load.Rod2)},
			{&want.Side1, math.Abs(load.Side1)}, {&want.Side2, math.Abs(load.Side2)},
			{&want.Pin1, math.Hypot(x, y)}, {&want.Pin2, math.Hypot(x, y)},
			{&want.Main, math.Hypot(x+crank*c, y+crank*s)},
		} {
			if l.load > l.peak.Load {
				*l.peak = Peak{Load: l.load, Angle: theta[k]}
			}
		}
	}
	var l Loads
	Peaks(&l, &m, &w, theta, p1, p2, omega)
	for _, c := range []struct {
		what      string
		got, want Peak
	}{
		{"up 1", l.Up1, want.Up1}, {"down 1", l.Down1, want.Down1}, {"up 2", l.Up2, want.Up2}, {"down 2", l.Down2, want.Down2},
		{"rod 1", l.Rod1, want.Rod1}, {"rod 2", l.Rod2, want.Rod2},
		{"side 1", l.Side1, want.Side1}, {"side 2", l.Side2, want.Side2},
		{"pin 1", l.Pin1, want.Pin1}, {"pin 2", l.Pin2, want.Pin2}, {"main", l.Main, want.Main},
	} {
		if c.want.Load == 0 || c.got.Angle != c.want.Angle || !(math.Abs(c.got.Load-c.want.Load) <= 1e-14*c.want.Load) {
			t.Errorf("%s: %+v, want %+v", c.what, c.got, c.want)
		}
	}
}
