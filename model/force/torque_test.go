package force

import (
	"math"
	"testing"
)

// gas is a smooth force that follows the positions like a gas does, with a lag: it gives work.
func gas(y, v, stroke float64) float64 { return 4000/(1+0.6*y/stroke) + 900*v/stroke - 3000 }

func TestTorqueGivesTheWork(t *testing.T) {
	const omega, m1, m2 = 250.0, 1.3, 2.1
	for i, m := range mechanisms() {
		e := m.Extremes()
		s := sample(&m, 150)
		n := len(s.theta)
		F1, F2, T, none := make([]float64, n), make([]float64, n), make([]float64, n), make([]float64, n)
		for k := range n {
			F1[k] = gas(s.motion[k].Y1-e.Bottom1, s.motion[k].V1, e.Stroke1())
			F2[k] = gas(s.motion[k].Y2-e.Bottom2, s.motion[k].V2, e.Stroke2())
		}
		// The work of the gas, sum of F dY over the path, on a grid of its own a hundred times as fine: it uses no V
		// of the samples but the lag's.
		work := 0.0
		const fine = 20000
		lo, hi, mid := s.motion[0], s.motion[0], s.motion[0]
		for k := range fine {
			m.At(&lo, 2*math.Pi*float64(k)/fine)
			m.At(&mid, 2*math.Pi*(float64(k)+0.5)/fine)
			m.At(&hi, 2*math.Pi*float64(k+1)/fine)
			work += gas(mid.Y1-e.Bottom1, mid.V1, e.Stroke1())*(hi.Y1-lo.Y1) + gas(mid.Y2-e.Bottom2, mid.V2, e.Stroke2())*(hi.Y2-lo.Y2)
		}
		if work < 10 {
			t.Fatalf("%s: the trial force gives %g J", name(i, &m), work)
		}
		Torque(T, s.motion, F1, F2, 0, 0, omega)
		near(t, name(i, &m)+" work of the gas torque", Work(s.weight, T)/work, 1, 1e-7) // midpoint rule of the fine grid
		near(t, name(i, &m)+" mean torque", Fluctuation(s.theta, T).Mean*2*math.Pi/work, 1, 1e-6)

		Torque(T, s.motion, none, none, m1, m2, omega)
		size := 0.0
		for k := range n {
			size += s.weight[k] * math.Abs(T[k])
		}
		near(t, name(i, &m)+" work of the inertia torque", Work(s.weight, T)/size, 0, 1e-13)
		for k := range n { // as the axial forces have it
			mo := &s.motion[k]
			P1, P2 := Transmitted(F1[k], m1, omega, mo.A1), Transmitted(F2[k], m2, omega, mo.A2)
			near(t, name(i, &m)+" axial forces", P1*mo.V1+P2*mo.V2, F1[k]*mo.V1+F2[k]*mo.V2+T[k], 1e-12*size)
		}
		// It is the loss of kinetic energy: dE of inertia alone is what the bodies hold at most, less at least.
		high, low := math.Inf(-1), math.Inf(1)
		for k := range fine {
			m.At(&mid, 2*math.Pi*float64(k)/fine)
			held := 0.5 * omega * omega * (m1*mid.V1*mid.V1 + m2*mid.V2*mid.V2)
			high, low = max(high, held), min(low, held)
		}
		near(t, name(i, &m)+" fluctuation by inertia", Fluctuation(s.theta, T).Energy/(high-low), 1, 2e-6)
	}
}

// The torque may take the place of one of the forces.
func TestTorqueInPlace(t *testing.T) {
	m := mechanisms()[3]
	s := sample(&m, 10)
	F1, F2, T := s.of(math.Sin), s.of(math.Cos), make([]float64, 20)
	Torque(T, s.motion, F1, F2, 1, 2, 30)
	Torque(F1, s.motion, F1, F2, 1, 2, 30)
	for k := range T {
		near(t, "in place", F1[k], T[k], 0)
	}
}
