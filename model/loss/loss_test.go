package loss

import (
	"math"
	"testing"
)

func near(t *testing.T, what string, got, want, rel float64) {
	t.Helper()
	if !(math.Abs(got-want) <= rel*math.Abs(want)) {
		t.Errorf("%s: got %.10g, want %.10g, relative error %.2g, allowed %.2g", what, got, want, (got-want)/want, rel)
	}
}

// wave samples a + b cos(theta - lag) at n instants.
func wave(n int, a, b, lag float64) []float64 {
	out := make([]float64, n)
	for i := range out {
		out[i] = a + b*math.Cos(2*math.Pi*float64(i)/float64(n)-lag)
	}
	return out
}

// TestShuttleAgainstTransport follows the heat instead of using <x^2>: a part of the body takes up
// pi D (k/J) x dT/L from the wall that it faces, and the body carries the heat stored per length past a
// fixed plane at its own velocity. Time steps of a 2000th of a cycle, trapezoidal rule.
func TestShuttleAgainstTransport(t *testing.T) {
	const D, J, L, k, dT, f = 0.0696, 0.15e-3, 0.1, 0.3, 650, 40.0
	for _, c := range []struct {
		what string
		x    func(th float64) float64
		want float64
	}{
		{"sinusoidal", func(th float64) float64 { return 0.5 * 0.0312 * math.Cos(th) }, Shuttle(D, J, L, 0.0312, k, dT)},
		{"with a second harmonic", func(th float64) float64 { return 0.015*math.Cos(th) + 0.002*math.Cos(2*th+0.3) },
			ShuttleMotion(D, J, L, 0.5*(0.015*0.015+0.002*0.002), k, dT)},
	} {
		const n = 2000
		dt := 1 / (f * n)
		stored, carried := 0.0, 0.0
		x0 := c.x(0)
		for i := 1; i <= n; i++ {
			x1 := c.x(2 * math.Pi * float64(i) / n)
			next := stored + math.Pi*D*k/J*0.5*(x0+x1)*dT/L*dt
			carried -= 0.5 * (stored + next) * (x1 - x0) // towards the cold end, against x
			stored, x0 = next, x1
		}
		near(t, c.what, carried*f, c.want, 1e-5) // the rule's error, (2 pi/2000)^2
	}
}

func TestConduction(t *testing.T) {
	// A conductivity that rises linearly: the mean temperature gives the exact heat. March the section
	// from the hot end with the heat found; it must reach the cold end.
	k := func(T float64) float64 { return 10 + 0.015*T }
	Q := WallConduction(k(650), 2e-4, 0.08, 600)
	T := 950.0
	const n = 20000
	for range n {
		mid := T - 0.5*Q/(k(T)*2e-4)*0.08/n
		T -= Q / (k(mid) * 2e-4) * 0.08 / n
	}
	near(t, "cold end", T, 350, 1e-6)
	near(t, "tube section", TubeSection(0.01, 0.002), math.Pi/4*(0.014*0.014-0.01*0.01), 1e-14)
	near(t, "shell section", ShellSection(0.014, 0.002), math.Pi/4*(0.014*0.014-0.01*0.01), 1e-14)
	near(t, "annulus", AnnulusSection(0.01, 0.014), math.Pi/4*(0.014*0.014-0.01*0.01), 1e-14)
}

func TestSealFlowAlongTheSeal(t *testing.T) {
	// March dp/dz = -12 mu u/g^2 with u = m R T/(p pi D g) from the high to the low side.
	const D, g, L, mu, RT = 0.07, 15e-6, 0.02, 2e-5, 2077.0 * 320
	for _, c := range [][2]float64{{6e6, 4e6}, {1e5, 0.9e5}, {8e6, 1e6}} {
		m := SealFlow(D, g, L, c[0], c[1], mu, RT)
		near(t, "reversed", SealFlow(D, g, L, c[1], c[0], mu, RT), -m, 1e-15)
		slope := func(p float64) float64 { return -12 * mu * m * RT / (p * math.Pi * D * g * g * g) }
		p := c[0]
		const n = 20000
		for range n {
			p += slope(p+0.5*slope(p)*L/n) * L / n
		}
		near(t, "low side", p, c[1], 1e-6)
	}
}

func TestSealPowerAgainstLostWork(t *testing.T) {
	// The work lost by throttling an ideal gas at constant temperature is m R T ln(p1/p2) exactly.
	const D, g, L, mu, RT = 0.07, 15e-6, 0.02, 2e-5, 2077.0 * 320
	p, b := wave(360, 5e6, 0.8e6, 0.4), wave(360, 5e6, 0.2e6, 2)
	sum := 0.0
	for i := range p {
		sum += SealFlow(D, g, L, p[i], b[i], mu, RT) * RT * math.Log(p[i]/b[i]) / 360
	}
	near(t, "lost work", SealPower(D, g, L, mu, p, b), sum, 0.005) // ratio up to 1.2: (ln ratio)^2/12 is 0.3 %
	// Closed form for a harmonic of amplitude a: <(p1-p2)^2> = a^2/2.
	near(t, "harmonic", SealPower(D, g, L, mu, wave(90, 5e6, 1e6, 0), wave(90, 5e6, 0, 0)),
		math.Pi*D*g*g*g*0.5e12/(12*mu*L), 1e-12)
	// Heat past a displacer, square wave of dp small against p: m p/(...) one way half of the time.
	const cp, dT = 5193.0, 600.0
	one := math.Pi * D * g * g * g * 5e6 * 1e4 / (12 * mu * L * RT)
	near(t, "displacer seal", SealHeat(D, g, L, mu, RT, cp, dT, []float64{5e6 + 5e3, 5e6 - 5e3}, []float64{1e4, -1e4}), one/2*cp*dT, 1e-12)
}

// TestShaftWork adds up the steps that Senft's theorem sums: work into the mechanism arrives times E, work
// out of it is taken from the shaft over E.
func TestShaftWork(t *testing.T) {
	const n = 360
	p, b := wave(n, 5e6, 1.2e6, 2.9), wave(n, 5e6, 0.3e6, 0.1)
	dV := wave(n, 0, 1e-4*2*math.Pi/n, math.Pi/2)
	for _, E := range []float64{0.6, 0.8, 1} {
		W, forced := ForcedWork(p, b, dV)
		if !(W > 0 && forced > 0) {
			t.Fatalf("W %g, forced %g: the case shows nothing", W, forced)
		}
		shaft, sum := 0.0, 0.0
		for i := range p {
			w := (p[i] - b[i]) * dV[i]
			sum += w
			if w > 0 {
				shaft += E * w
			} else {
				shaft += w / E
			}
		}
		near(t, "work", W, sum, 1e-12)
		near(t, "shaft work", ShaftWork(E, W, forced), shaft, 1e-12)
		near(t, "loss", DriveLoss(E, W, forced)+1, W-shaft+1, 1e-12)
	}
	// Pressure in phase with the rise of volume and against a constant buffer does no forced work:
	// W = pi a V for (p - pb) = a sin, dV = V sin.
	W, forced := ForcedWork(wave(n, 5e6, 1e6, math.Pi/2), wave(n, 5e6, 0, 0), dV)
	near(t, "in phase", W, math.Pi*1e6*1e-4, 1e-12)
	if forced > 1e-12*W {
		t.Errorf("forced work in phase: %g", forced)
	}
	// A quarter turn out of phase is all forced on the way and given back: W = 0, W- = a V.
	W, forced = ForcedWork(wave(n, 5e6, 1e6, 0), wave(n, 5e6, 0, 0), dV)
	near(t, "out of phase, forced", forced, 1e6*1e-4, 2e-4) // kinks at the reversals: (2 pi/360)^2
	if math.Abs(W) > 1e-10*forced {
		t.Errorf("out of phase: W %g", W)
	}
}

func TestBufferPressure(t *testing.T) {
	const n, mean, V, gamma = 180, 5e6, 5e-4, 1.41
	x := wave(n, 0, 1e-4, 0.3)
	p := make([]float64, n)
	if !BufferPressure(p, mean, V, gamma, x) {
		t.Fatal("refused")
	}
	sum, c := 0.0, p[0]*math.Pow(V+x[0], gamma)
	for i := range p {
		sum += p[i] / n
		near(t, "p V^gamma", p[i]*math.Pow(V+x[i], gamma), c, 1e-13)
	}
	near(t, "mean", sum, mean, 1e-13)
	if !BufferPressure(p, mean, 0, gamma, x) || p[0] != mean || p[77] != mean {
		t.Error("an endless buffer has a constant pressure")
	}
	p[0] = 7
	if BufferPressure(p, mean, 0.9e-4, gamma, x) || p[0] != 7 {
		t.Error("a buffer smaller than the stroke is accepted")
	}
	small := []float64{0, 0}
	BufferPressure(small, mean, V, gamma, []float64{1e-9, -1e-9})
	near(t, "stiffness gamma p/V", (small[1]-small[0])/2e-9, gamma*mean/V, 1e-6)
}

// TestRegeneratorAgainstBlows alternates two equal blows through a matrix of cells, gas without storage,
// each cell solved exactly for a uniform matrix temperature, until the state repeats. The scheme is of
// first order in cells and steps, so two grids give the value of an endless one.
func TestRegeneratorAgainstBlows(t *testing.T) {
	grid := func(NTU, C float64, cells, steps int) float64 {
		T := make([]float64, cells)
		for i := range T {
			T[i] = 1 - (float64(i)+0.5)/float64(cells) // hot end first
		}
		give := -math.Expm1(-NTU / float64(cells)) // share of its excess that gas leaves in a cell
		rate := give * float64(cells) / (C * float64(steps))
		eff, last := 0.0, -1.0
		for cycle := 0; cycle < 2000 && math.Abs(eff-last) > 1e-7; cycle++ {
			out := 0.0
			for range steps { // hot blow, from the hot end
				gas := 1.0
				for i := range T {
					d := gas - T[i]
					gas -= give * d
					T[i] += rate * d
				}
				out += gas / float64(steps)
			}
			for range steps { // cold blow, from the cold end
				gas := 0.0
				for i := cells - 1; i >= 0; i-- {
					d := gas - T[i]
					gas -= give * d
					T[i] += rate * d
				}
			}
			last, eff = eff, 1-out
		}
		return eff
	}
	blow := func(NTU, C float64) float64 { return 2*grid(NTU, C, 80, 100) - grid(NTU, C, 40, 50) }
	for _, NTU := range []float64{2, 8, 15} {
		// With C = 40 the factor is 0.99991.
		near(t, "large capacity", BalancedEffectiveness(NTU), blow(NTU, 40), 0.002)
	}
	// The fit: 1 % in its stated range.
	for _, c := range [][2]float64{{4, 1.25}, {4, 2}, {8, 1.25}, {8, 1.5}, {8, 2}, {15, 2}, {15, 4}, {18, 1.5}} {
		near(t, "finite capacity", BalancedEffectiveness(c[0])*CapacityFactor(c[1]), blow(c[0], c[1]), 0.01)
	}
}

func TestZeroAtZeroCause(t *testing.T) {
	p, b := wave(36, 5e6, 1e6, 0), wave(36, 5e6, 0, 0)
	gap := AppendixGap{
		Diameter: 0.07, Width: 3e-4, Length: 0.1, PressureMean: 5e6, PressureRate: 1e16, Frequency: 40,
		HotTemperature: 900, ColdTemperature: 300, HeatCapacity: 5193, Conductivity: 0.3, GasConstant: 2077,
	}
	tight, still := gap, gap
	tight.Width, still.PressureRate = 0, 0
	W, forced := ForcedWork(b, b, p)
	for what, v := range map[string]float64{
		"no stroke":               Shuttle(0.07, 1e-4, 0.1, 0, 0.3, 600),
		"no difference":           Shuttle(0.07, 1e-4, 0.1, 0.03, 0.3, 0),
		"no gap, no stroke":       Shuttle(0.07, 0, 0.1, 0, 0.3, 600),
		"tight appendix gap":      tight.Loss(),
		"still pressure":          still.Loss(),
		"no wall":                 WallConduction(20, 0, 0.1, 600),
		"wall at one temperature": WallConduction(20, 1e-4, 0.1, 0),
		"tight seal":              SealFlow(0.07, 0, 0.02, 6e6, 5e6, 2e-5, 6e5),
		"no pressure difference":  SealPower(0.07, 1e-5, 0.02, 2e-5, p, p),
		"tight seal, power":       SealPower(0.07, 0, 0, 2e-5, p, b),
		"tight seal, heat":        SealHeat(0.07, 0, 0, 2e-5, 6e5, 5193, 600, p, b),
		"one temperature, heat":   SealHeat(0.07, 1e-5, 0.02, 2e-5, 6e5, 5193, 0, p, b),
		"balanced piston":         W + forced,
		"perfect drive":           DriveLoss(1, 100, 20),
		"no friction":             FrictionPower(0, 1e-4, 40),
		"no contact":              BalancedEffectiveness(0),
	} {
		if v != 0 {
			t.Errorf("%s: %g, want 0", what, v)
		}
	}
	near(t, "friction", FrictionPower(0.5e5, 1.2e-4, 25), 150, 1e-14)
}

// TestGapReturn marches the gas along the gap in small steps: an independent solution of the same balance.
func TestGapReturn(t *testing.T) {
	const D, g, L, k = 0.07, 4e-4, 0.1, 0.28
	for _, C := range []float64{0.01, 1, 10, 300, 1e5} {
		n := 7.54 * k / (2 * g) * 2 * math.Pi * D * L / C
		const steps = 200000
		gas := 1.0 // hot end 1, cold end 0
		for i := range steps {
			wall := 1 - (float64(i)+0.5)/steps
			// Midpoint rule in the gas as well.
			gas = (gas*(1-0.5*n/steps) + n/steps*wall) / (1 + 0.5*n/steps)
		}
		if got := GapReturn(C, D, g, L, k); math.Abs(got-gas) > 1e-6*(1+got) {
			t.Errorf("C = %g W/K: share %.8f, marched %.8f", C, got, gas)
		}
	}
	if GapReturn(0, D, g, L, k) != 1 || GapReturn(3, D, 0, L, k) != 1 {
		t.Error("no leak or no gap returns heat")
	}
}
