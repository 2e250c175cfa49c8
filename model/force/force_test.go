package force

import (
	"fmt"
	"math"
	"testing"

	"hotfront/model/drive"
)

// mechanisms are usual and unusual proportions of every kind.
func mechanisms() []drive.Mechanism {
	return []drive.Mechanism{
		{Kind: drive.Sinusoidal, Phase: math.Pi / 2, Stroke1: 0.03, Stroke2: 0.03},
		{Kind: drive.Sinusoidal, Phase: 1.9, Stroke1: 0.05, Stroke2: 0.02},
		{Kind: drive.SliderCrank, Phase: math.Pi / 2, Rod: 0.08, Stroke1: 0.03, Stroke2: 0.03},
		{Kind: drive.SliderCrank, Phase: 1.2, Rod: 0.05, Stroke1: 0.07, Stroke2: 0.05},
		{Kind: drive.Rhombic, Rod: 0.046, Radius: 0.0138, Eccentricity: 0.0208},
		{Kind: drive.Rhombic, Rod: 0.06, Radius: 0.01, Eccentricity: 0.045},
	}
}

// turn samples one turn as a march with two stages a step does: unevenly, with weights that integrate a line
// over the step.
type turn struct {
	theta, weight []float64
	motion        []drive.Motion
}

func sample(m *drive.Mechanism, steps int) turn {
	gamma := 1 - 1/math.Sqrt2
	h := 2 * math.Pi / float64(steps)
	var t turn
	for i := range steps {
		t.theta = append(t.theta, (float64(i)+gamma)*h, float64(i+1)*h)
		t.weight = append(t.weight, (1-gamma)*h, gamma*h)
	}
	t.motion = make([]drive.Motion, len(t.theta))
	if m != nil {
		for k, at := range t.theta {
			m.At(&t.motion[k], at)
		}
	}
	return t
}

// of gives the values of a function at the samples.
func (t *turn) of(f func(theta float64) float64) []float64 {
	v := make([]float64, len(t.theta))
	for k, at := range t.theta {
		v[k] = f(at)
	}
	return v
}

func name(i int, m *drive.Mechanism) string { return fmt.Sprintf("%d %v", i, m.Kind) }

// near compares with an absolute tolerance.
func near(t *testing.T, what string, got, want, tol float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tol) {
		t.Errorf("%s: got %.12g, want %.12g, off by %.2g, allowed %.2g", what, got, want, got-want, tol)
	}
}

func TestNoAllocation(t *testing.T) {
	for i, m := range mechanisms() {
		s := sample(&m, 50)
		n := len(s.theta)
		T, p, f := make([]float64, n), make([]float64, n), make([]Vector, n)
		bodies := [2]Body{{Mass: 1}, {Mass: 2, Axis: 1, Offset: 0.1}}
		rotors := []Rotor{{Unbalance: 0.01}}
		var l Loads
		if a := testing.AllocsPerRun(5, func() {
			Torque(T, s.motion, p, p, 1, 2, 100)
			Fluctuation(s.theta, T)
			Peaks(&l, &m, &Masses{}, s.theta, p, p, 100)
			Residual(f, nil, s.motion, s.theta, &bodies, rotors, 100)
			forward, backward := Harmonic(f, s.theta, s.weight, 1)
			rotors[0] = Counterweight(forward, 100)
			ReverseCounterweight(backward, 100)
			TwoPlanes(forward, backward, 0, 1, 100)
			RhombicResidual(p, s.motion, s.theta, &RhombicMasses{Piston: 1}, 100)
			RhombicTurned(p, s.theta, s.weight, 100)
			RingShaking(&m, 1, 1, 1, 4, 100)
		}); a != 0 {
			t.Errorf("%s: %v allocations", name(i, &m), a)
		}
	}
}

func TestNaNComesOut(t *testing.T) {
	for i, m := range mechanisms() {
		s := sample(&m, 20)
		p := s.of(math.Cos)
		q := s.of(math.Cos)
		q[7] = math.NaN()
		var l Loads
		Peaks(&l, &m, &Masses{}, s.theta, q, p, 100)
		if !math.IsNaN(l.Pin1.Load) || !math.IsNaN(l.Up1.Load) || math.IsNaN(l.Up2.Load) {
			t.Errorf("%s: a force that is no number gives %+v", name(i, &m), l)
		}
		if w := Fluctuation(s.theta, q); !math.IsNaN(w.Mean) || !math.IsNaN(w.Energy) {
			t.Errorf("%s: a torque that is no number gives %+v", name(i, &m), w)
		}
		bodies := [2]Body{{Mass: math.NaN()}, {}}
		if f, _ := Residual(nil, nil, s.motion, s.theta, &bodies, nil, 100); !math.IsNaN(f.Load) {
			t.Errorf("%s: a mass that is no number gives %+v", name(i, &m), f)
		}
	}
}

func BenchmarkPeaks(b *testing.B) {
	for _, i := range []int{0, 2, 4} {
		m := mechanisms()[i]
		s := sample(&m, 120)
		P := s.of(math.Cos)
		b.Run(m.Kind.String(), func(b *testing.B) {
			b.ReportAllocs()
			var l Loads
			for b.Loop() {
				Peaks(&l, &m, &Masses{}, s.theta, P, P, 100)
			}
		})
	}
}

func BenchmarkFluctuation(b *testing.B) {
	b.ReportAllocs()
	s := sample(nil, 120)
	T := s.of(math.Cos)
	for b.Loop() {
		Fluctuation(s.theta, T)
	}
}
