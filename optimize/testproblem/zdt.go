package testproblem

import (
	"math"

	"hotfront/optimize"
)

// The ZDT problems: f1 alone sets the place along the front, the other variables the distance from it.
// Their fronts are reached at g = 1.
//
// Source: E. Zitzler, K. Deb, L. Thiele, Comparison of multiobjective evolutionary algorithms: empirical
// results, Evolutionary Computation 8 (2000) 173-195, eqs 7 to 12.

const zdtSource = "Zitzler, Deb, Thiele 2000"

func zdt(name, about string, vars []optimize.Variable, ideal float64, from string, function func(f, g, x []float64)) *Problem {
	return &Problem{
		Name: name, About: about + "; " + zdtSource, Ideal: ideal, IdealFrom: from,
		Vars: vars, AimCount: 2, Ref: []float64{1.1, 1.1}, Function: function,
	}
}

// zdtG is 1 + 9 times the mean of the variables after the first.
func zdtG(x []float64) float64 {
	sum := 0.0
	for _, v := range x[1:] {
		sum += v
	}
	return 1 + 9*sum/float64(len(x)-1)
}

// ZDT1 has a convex front, f2 = 1 - sqrt(f1), 30 variables.
func ZDT1() *Problem {
	return zdt("ZDT1", "convex front", box(30, 0, 1), 1.21-1.0/3, "closed form", func(f, _, x []float64) {
		g := zdtG(x)
		f[0], f[1] = x[0], g*(1-math.Sqrt(x[0]/g))
	})
}

// ZDT2 has a concave front, f2 = 1 - f1^2, 30 variables.
func ZDT2() *Problem {
	return zdt("ZDT2", "concave front", box(30, 0, 1), 1.21-2.0/3, "closed form", func(f, _, x []float64) {
		g := zdtG(x)
		f[0], f[1] = x[0], g*(1-(x[0]/g)*(x[0]/g))
	})
}

// ZDT3 has a front in five pieces, 30 variables.
func ZDT3() *Problem {
	front := func(x, g float64) float64 {
		return g * (1 - math.Sqrt(x/g) - x/g*math.Sin(10*math.Pi*x))
	}
	ideal := curve([]float64{1.1, 1.1}, func(t float64) []float64 { return []float64{t, front(t, 1)} })
	return zdt("ZDT3", "front in pieces", box(30, 0, 1), ideal, "sampled front", func(f, _, x []float64) {
		f[0], f[1] = x[0], front(x[0], zdtG(x))
	})
}

// ZDT4 has 21^9 local fronts, 10 variables.
func ZDT4() *Problem {
	vars := append(box(1, 0, 1), box(9, -5, 5)...)
	return zdt("ZDT4", "many local fronts", vars, 1.21-1.0/3, "closed form", func(f, _, x []float64) {
		g := 1 + 10*float64(len(x)-1)
		for _, v := range x[1:] {
			g += v*v - 10*math.Cos(4*math.Pi*v)
		}
		f[0], f[1] = x[0], g*(1-math.Sqrt(x[0]/g))
	})
}

// ZDT6 has a thin and unevenly crowded front, f2 = 1 - f1^2 from f1 = 0.2808, 10 variables.
func ZDT6() *Problem {
	const left = 0.2807753191 // least f1, from minimising 1 - exp(-4x) sin(6 pi x)^6
	ideal := 1.1*(1.1-left) - ((1 - left) - (1-left*left*left)/3)
	return zdt("ZDT6", "uneven density", box(10, 0, 1), ideal, "closed form", func(f, _, x []float64) {
		s := math.Sin(6 * math.Pi * x[0])
		f[0] = 1 - math.Exp(-4*x[0])*s*s*s*s*s*s
		g := 1 + 9*math.Pow((zdtG(x)-1)/9, 0.25)
		f[1] = g * (1 - (f[0]/g)*(f[0]/g))
	})
}
