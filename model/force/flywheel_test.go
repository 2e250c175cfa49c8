package force

import (
	"math"
	"testing"
)

// T = T0 + T1 sin(n theta + lag): dE = 2 T1/n, fastest where the torque falls through its mean. Another even
// grid, and one whose spacing changes at random between one and three, besides the march's.
func TestFluctuationOfOneWave(t *testing.T) {
	random := turn{}
	seed, at := uint64(7), 0.0
	for range 400 {
		seed = seed*6364136223846793005 + 1442695040888963407
		random.theta = append(random.theta, at)
		at += 1 + 2*float64(seed>>11)/(1<<53)
	}
	for k := range random.theta {
		random.theta[k] *= 2 * math.Pi / at
	}
	even := turn{}
	for k := range 200 {
		even.theta = append(even.theta, 2*math.Pi*float64(k)/200)
	}
	for _, c := range []struct {
		what string
		s    turn
		tol  float64 // of dE, for n = 1 and growing with n^4: the error of a cubic
	}{{"march of 120", sample(nil, 120), 1e-7}, {"even", even, 1e-7}, {"random", random, 2e-7}} {
		for _, n := range []float64{1, 2, 3, 8} {
			for _, lag := range []float64{0, 0.4, 2} {
				s := Fluctuation(c.s.theta, c.s.of(func(th float64) float64 { return 30 + 70*math.Sin(n*th+lag) }))
				near(t, c.what+" dE", s.Energy/(2*70/n), 1, c.tol*n*n*n*n)
				near(t, c.what+" mean", s.Mean, 30, 30*c.tol*n*n*n*n)
				near(t, c.what+" fastest", math.Cos(n*s.HighAt+lag), -1, 1e-6*n*n)
				near(t, c.what+" slowest", math.Cos(n*s.LowAt+lag), 1, 1e-6*n*n)
			}
		}
	}
}

// A torque that is its mean exactly at samples, and one that is constant.
func TestFluctuationAtSamples(t *testing.T) {
	even := []float64{0, math.Pi / 4, math.Pi / 2, 3 * math.Pi / 4, math.Pi, 5 * math.Pi / 4, 3 * math.Pi / 2, 7 * math.Pi / 4}
	T := []float64{0, 1, 2, 1, 0, -1, -2, -1}
	w := Fluctuation(even, T)
	near(t, "fastest", w.HighAt, math.Pi, 1e-8)
	near(t, "slowest", math.Mod(w.LowAt, 2*math.Pi), 0, 1e-8)
	// By hand: a cubic through four even samples has the integral (-a + 13 b + 13 c - d)/24 between b and c; from 0 to pi
	// that is 1/2 + 38/24 + 38/24 + 1/2.
	near(t, "dE", w.Energy, math.Pi/4*25/6, 1e-14)
	for k := range T {
		T[k] = 7
	}
	w = Fluctuation(even, T)
	near(t, "constant torque", w.Energy, 0, 1e-13)
	near(t, "constant torque", w.Mean, 7, 1e-14)
}

// Half the spacing: 2^4 times less error. A torque of two waves, for which the exact dE comes from its primitive.
func TestFluctuationOrder(t *testing.T) {
	T := func(th float64) float64 { return 100*math.Sin(2*th) - 40*math.Cos(5*th) }
	E := func(th float64) float64 { return -50*math.Cos(2*th) - 8*math.Sin(5*th) }
	high, low := math.Inf(-1), math.Inf(1)
	for k := range 1000000 {
		e := E(2 * math.Pi * float64(k) / 1e6)
		high, low = max(high, e), min(low, e)
	}
	miss := func(steps int) float64 {
		s := sample(nil, steps)
		return math.Abs(Fluctuation(s.theta, s.of(T)).Energy/(high-low) - 1)
	}
	for _, steps := range []int{30, 60} {
		if order := math.Log2(miss(steps) / miss(2*steps)); !(order > 3.5) {
			t.Errorf("order %.2f from %d steps, errors %g and %g", order, steps, miss(steps), miss(2*steps))
		}
	}
	near(t, "20 samples to the shortest wave", miss(50), 0, 3e-5)
}

// The engine whose torque is |sin|, as a shaft driven from one side has it, has kinks at zero. Closed form: mean 2/pi,
// dE twice the integral of 2/pi - sin from 0 to arcsin(2/pi) = 2 ((2/pi) a - 1 + cos a).
func TestFluctuationWithKinks(t *testing.T) {
	s := sample(nil, 150)
	got := Fluctuation(s.theta, s.of(func(th float64) float64 { return math.Abs(math.Sin(th)) }))
	a := math.Asin(2 / math.Pi)
	want := 2 * (2/math.Pi*a - 1 + math.Cos(a))
	near(t, "mean", got.Mean, 2/math.Pi, 1e-4)
	near(t, "dE", got.Energy, want, 5e-4*want)
}

// Worked examples of [KhurmiGupta2005], chapter on turning-moment diagrams and flywheel, from memory; the answers
// are printed to the digits given here.
func TestFlywheelTextbook(t *testing.T) {
	rpm := 2 * math.Pi / 60
	// 36 kg at 150 mm, 1800 rpm, areas in mm2 with 1 mm = 5 N m and 1 mm = 1 degree: 985 mm2 = 86 J, 0.3 %.
	mm2 := AreaSwing([]float64{295, -685, 40, -340, 960, -270})
	near(t, "petrol engine, areas", mm2, 985, 1e-12)
	dE := mm2 * 5 * math.Pi / 180
	near(t, "petrol engine, energy", dE, 86, 0.5)
	near(t, "petrol engine, fluctuation", SpeedFluctuation(dE, 36*0.15*0.15, 1800*rpm), 0.003, 0.00005)

	// Several cylinders, 600 rpm, +-1.5 %, radius 0.5 m, 1 mm = 600 N m and 3 degrees: 172 mm2 = 5404 J, 183 kg
	// (the book divides by 29.6, rounded from 29.61).
	mm2 = AreaSwing([]float64{52, -124, 92, -140, 85, -72, 107})
	near(t, "several cylinders, areas", mm2, 172, 1e-12)
	dE = mm2 * 600 * 3 * math.Pi / 180
	near(t, "several cylinders, energy", dE, 5404, 1)
	near(t, "several cylinders, mass", FlywheelInertia(dE, 0.03, 600*rpm)/(0.5*0.5), 5404/29.6, 0.1)

	// 6.5 t at 1.8 m, 56 kN m, 120 rpm: between 119 and 121 rpm.
	delta := SpeedFluctuation(56e3, 6500*1.8*1.8, 120*rpm)
	near(t, "fastest", 120*(1+delta/2), 121, 0.05)
	near(t, "slowest", 120*(1-delta/2), 119, 0.05)

	// T = 1000 + 300 sin 2 theta - 500 cos 2 theta, 250 rpm, 400 kg at 0.4 m: 26.18 kW, 583.1 J, 1.33 %.
	s := sample(nil, 120)
	w := Fluctuation(s.theta, s.of(func(th float64) float64 { return 1000 + 300*math.Sin(2*th) - 500*math.Cos(2*th) }))
	near(t, "power", w.Mean*250*rpm, 26180, 5)
	near(t, "energy", w.Energy, 583.1, 0.05)
	near(t, "fluctuation", SpeedFluctuation(w.Energy, 400*0.4*0.4, 250*rpm), 0.0133, 0.00005)
}

// A flywheel of the inertia found, marched in time under the torque with a load of the mean torque: the speed must swing
// by delta. The march is Runge-Kutta's of d(omega)/dt = (T - mean)/J, which knows nothing of energies.
func TestFlywheelMarched(t *testing.T) {
	T := func(th float64) float64 { return 60 + 90*math.Sin(th+0.3) + 30*math.Cos(3*th) }
	s := sample(nil, 200)
	w := Fluctuation(s.theta, s.of(T))
	const delta, omega = 0.1, 80.0
	J := FlywheelInertia(w.Energy, delta, omega)
	// Begin where the speed is largest.
	th, v, dt := w.HighAt, omega*(1+delta/2), 1e-6
	fast, slow := v, v
	f := func(th float64) float64 { return (T(th) - w.Mean) / J }
	for th < w.HighAt+2*math.Pi {
		tm, vm := th+0.5*dt*v, v+0.5*dt*f(th)
		th, v = th+dt*vm, v+dt*f(tm)
		fast, slow = max(fast, v), min(slow, v)
	}
	near(t, "fluctuation marched", (fast-slow)/omega, delta, 1e-6)
	near(t, "mean of the extremes", 0.5*(fast+slow)/omega, 1, 1e-6)
}

// The disc's inertia and mass by rings; its stress from the balance d(r sr)/dr = st - rho omega^2 r^2 and Hooke's law,
// marched outwards from the middle, where the stress must have the value that leaves none at the rim.
func TestDisc(t *testing.T) {
	const J, R, rho = 0.3, 0.2, 7850.0
	b := DiscWidth(J, R, rho)
	inertia, mass := 0.0, 0.0
	const n = 2000
	for i := range n {
		r := (float64(i) + 0.5) / n * R
		dm := rho * b * 2 * math.Pi * r * R / n
		inertia, mass = inertia+r*r*dm, mass+dm
	}
	near(t, "inertia", inertia/J, 1, 1e-6) // midpoint rule
	near(t, "mass", mass/(2*J/(R*R)), 1, 1e-6)

	const omega, nu = 300.0, 0.3
	middle := DiscStress(rho, omega, R, nu)
	// Radial stress sr and E times the strain e = u/r, in even steps of ln r.
	rate := func(r, sr, e float64) (dsr, de float64) {
		st := e + nu*sr
		return st - sr - rho*omega*omega*r*r, sr - nu*st - e
	}
	const from, steps = 1e-4, 20000
	r, sr, e := from*R, middle, (1-nu)*middle
	h := math.Log(1/from) / steps
	for range steps {
		k1, l1 := rate(r, sr, e)
		k2, l2 := rate(r*math.Exp(h/2), sr+h/2*k1, e+h/2*l1)
		sr, e, r = sr+h*k2, e+h*l2, r*math.Exp(h)
	}
	near(t, "stress at the rim over that in the middle", sr/middle, 0, 1e-6)
}
