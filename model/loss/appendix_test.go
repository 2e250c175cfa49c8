package loss

import (
	"fmt"
	"math"
	"testing"
)

// helium gap of a machine of some kilowatts.
func gapCase(width, frequency float64) AppendixGap {
	const p1 = 1.2e6
	w := 2 * math.Pi * frequency
	return AppendixGap{
		Diameter: 0.07, Width: width, Length: 0.08, PressureMean: 4e6, PressureRate: 0.5 * w * w * p1 * p1,
		Frequency: frequency, HotTemperature: 900, ColdTemperature: 320, HeatCapacity: 5193, Conductivity: 0.29, GasConstant: 2077,
	}
}

// crossGap integrates the temperature across the gap in time, for sections along the gap, with the flow
// that a harmonic pressure drives through them, and gives the mean enthalpy flow averaged over the
// sections [W]. It knows no film: half a gap of n cells, Crank-Nicolson, parabolic velocity, heat of
// compression and convection as sources, density at the wall's temperature.
func crossGap(g AppendixGap) float64 {
	const n, steps, cycles, sections = 30, 240, 6, 12
	w := 2 * math.Pi * g.Frequency
	dt := 1 / (g.Frequency * steps)
	amplitude := math.Sqrt(2 * g.PressureRate) // of dp/dt
	area := math.Pi * g.Diameter * g.Width
	dT := g.HotTemperature - g.ColdTemperature
	dy := 0.5 * g.Width / n
	var u [n]float64 // velocity over mean velocity
	for i := range u {
		a, b := float64(i)/n, float64(i+1)/n // distance from the middle over half the gap
		u[i] = 1.5 * (1 - (a*a+a*b+b*b)/3)   // mean over the cell
	}
	total := 0.0
	for s := range sections {
		x := (float64(s) + 0.5) / sections // from the seal
		T := g.ColdTemperature + x*dT
		rho := g.PressureMean / (g.GasConstant * T)
		// Mass between section and seal over p: numerical integral of A dz/(R T).
		held := 0.0
		for k := range 200 {
			z := (float64(k) + 0.5) / 200 * x
			held += area * g.Length * x / 200 / (g.GasConstant * (g.ColdTemperature + z*dT))
		}
		r := g.Conductivity / (rho * g.HeatCapacity) * dt / (dy * dy)
		var theta, low, diag, high, rhs [n]float64
		flow := 0.0
		for step := range steps * cycles {
			rate := amplitude * math.Cos(w*dt*(float64(step)+0.5))
			m := held * rate
			for i := range theta {
				up, down := 0.0, 2.0*r // wall: half a cell away
				if i > 0 {
					up = r
				}
				if i < n-1 {
					down = r
				}
				source := dt * (rate/(rho*g.HeatCapacity) + u[i]*m/(rho*area)*dT/g.Length)
				rhs[i] = theta[i]*(1-0.5*(up+down)) + source
				if i > 0 {
					rhs[i] += 0.5 * up * theta[i-1]
				}
				if i < n-1 {
					rhs[i] += 0.5 * down * theta[i+1]
				}
				low[i], diag[i], high[i] = -0.5*up, 1+0.5*(up+down), -0.5*down
			}
			for i := 1; i < n; i++ {
				q := low[i] / diag[i-1]
				diag[i] -= q * high[i-1]
				rhs[i] -= q * rhs[i-1]
			}
			old := theta
			for i := n - 1; i >= 0; i-- {
				theta[i] = rhs[i]
				if i < n-1 {
					theta[i] -= high[i] * theta[i+1]
				}
				theta[i] /= diag[i]
			}
			if step >= steps*(cycles-1) {
				mixed := 0.0
				for i := range theta {
					mixed += u[i] * 0.5 * (theta[i] + old[i]) / n
				}
				flow += g.HeatCapacity * m * mixed / steps
			}
		}
		total += flow / sections
	}
	return total
}

func TestAppendixGapAgainstCrossGap(t *testing.T) {
	for _, c := range []struct{ width, frequency, tol float64 }{
		{0.05e-3, 20, 0.001},
		{0.10e-3, 40, 0.001},
		{0.20e-3, 40, 0.003}, // lag 0.07
		{0.30e-3, 40, 0.015}, // lag 0.16
		{0.40e-3, 50, 0.05},  // lag 0.35: density differs along the gap, and one film no longer does
		{0.50e-3, 50, 0.11},  // lag 0.54
	} {
		g := gapCase(c.width, c.frequency)
		near(t, fmt.Sprintf("gap %g mm, %g Hz, lag %.3f", c.width*1e3, c.frequency, g.Lag()), g.Loss(), crossGap(g), c.tol)
	}
}

// leo is the published formula of Leo, as given in [Martini1983] (from memory):
//
//	Q = (pi D/k)^0.6 (2 L (Th-Tc)/1.5) [(pmax - pmin) f cp 2/((Th+Tc) R)]^1.6 g^2.6
func leo(g AppendixGap) float64 {
	p1 := math.Sqrt(2*g.PressureRate) / (2 * math.Pi * g.Frequency)
	x := 2 * p1 * g.Frequency * g.HeatCapacity * 2 / ((g.HotTemperature + g.ColdTemperature) * g.GasConstant)
	return math.Pow(math.Pi*g.Diameter/g.Conductivity, 0.6) * 2 * g.Length * (g.HotTemperature - g.ColdTemperature) / 1.5 *
		math.Pow(x, 1.6) * math.Pow(g.Width, 2.6)
}

// Both are estimates: Leo's has exponents of a turbulent film, this one of a laminar one, and this one
// holds the work lost in the gap too. Over the gaps and speeds of machines of some kilowatts they agree
// within a factor of 2.5.
func TestAppendixGapAgainstLeo(t *testing.T) {
	for _, width := range []float64{0.1e-3, 0.15e-3, 0.25e-3, 0.4e-3} {
		for _, f := range []float64{15, 25, 50} {
			g := gapCase(width, f)
			if q := g.Loss() / leo(g); !(q > 1/2.5 && q < 2.5) {
				t.Errorf("gap %g mm %g Hz: %.3g W, Leo %.3g W, ratio %.2f", width*1e3, f, g.Loss(), leo(g), q)
			}
		}
	}
}

func TestAppendixGapLimits(t *testing.T) {
	// The means over the length against a midpoint sum, on both sides of the change to the series.
	for _, ratio := range []float64{1 + 1e-9, 1.0009, 1.0011, 1.5, 3, 5} {
		r1, r2 := logMeans(ratio)
		var s1, s2 float64
		const n = 20000
		for i := range n {
			l := math.Log1p((float64(i)+0.5)/n*(ratio-1)) / (ratio - 1)
			s1 += l / n
			s2 += l * l / n
		}
		near(t, fmt.Sprintf("<ln s> at %g", ratio), r1, s1, 1e-7)
		near(t, fmt.Sprintf("<ln^2 s> at %g", ratio), r2, s2, 1e-6) // the closed form loses six digits near 1
	}
	g := gapCase(1e-4, 40)
	thin, fast := g, g
	thin.Width /= 4
	fast.PressureRate *= 9
	undamped := func(g AppendixGap) float64 { return g.Loss() * (1 + g.Lag()*g.Lag()) }
	near(t, "with the cube of a thin gap", undamped(g)/undamped(thin), 64, 1e-12)
	near(t, "with the square of the swing", fast.Loss()/g.Loss(), 9, 1e-12)
	cold := g
	cold.HotTemperature = cold.ColdTemperature
	if v := cold.Loss(); !(v > 0 && v < g.Loss()) {
		t.Errorf("at one temperature %g W: the gas of the gap still turns work into heat", v)
	}
}
