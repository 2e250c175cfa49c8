package force

import (
	"math"
	"testing"

	"hotfront/model/drive"
)

// TestRossYokeMoment: the pin's tangential force times the crank radius is the virtual work of both bodies; and the peaks over
// a turn are the largest of these loads.
func TestRossYokeMoment(t *testing.T) {
	m := drive.Mechanism{Kind: drive.RossYoke, Radius: 0.012, Rod: 0.12, YokeArm: 0.055, YokeHalfWidth: 0.05, LinkLength: 0.09}
	if f := m.Check(); f != drive.None {
		t.Fatal(f)
	}
	const n, omega = 90, 150.0
	theta, p1, p2 := make([]float64, n), make([]float64, n), make([]float64, n)
	var at drive.Motion
	var load drive.RossYokeLoad
	var most, mostMain, side float64
	w := Masses{Rod1: 0.1, Rod2: 0.15, Crank: 0.004, Counterweight: 0.003}
	for k := range n {
		theta[k] = 2 * math.Pi * float64(k) / n
		p1[k], p2[k] = 4000*math.Sin(theta[k]+0.3)-900, 2500*math.Cos(2*theta[k])
		m.At(&at, theta[k])
		m.RossYokeForces(&load, theta[k], p1[k], p2[k])
		pin := RossYoke(&load, theta[k])
		if want := p1[k]*at.V1 + p2[k]*at.V2; math.Abs(pin.Moment(m.Radius)-want) > 1e-11*4000*0.1 {
			t.Errorf("%.0f deg: moment %g N m, virtual work %g", 180/math.Pi*theta[k], pin.Moment(m.Radius), want)
		}
		if math.Abs(pin.Size()-math.Hypot(load.PinX, load.PinY)) > 1e-9 {
			t.Errorf("pin %g N, was %g", pin.Size(), math.Hypot(load.PinX, load.PinY))
		}
		all := pin.Add(Turning(0.25*m.Radius, omega))
		most, mostMain = max(most, all.Size()), max(mostMain, all.Add(Turning(0.001, omega)).Size())
		side = max(side, math.Abs(load.Side1))
	}
	var l Loads
	Peaks(&l, &m, &w, theta, p1, p2, omega)
	if l.Pin1.Load != most || l.Pin2 != l.Pin1 || l.Main.Load != mostMain || l.Side1.Load != side || l.Rod1.Load < 4000 {
		t.Errorf("peaks %+v, want pin %g, main %g, side %g", l, most, mostMain, side)
	}
}
