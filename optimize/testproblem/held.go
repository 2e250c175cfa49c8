package testproblem

import (
	"math"

	"hotfront/optimize"
)

// Problems that the drivers' numbers were not set on, but for a look that they do no harm.

// Valley has its best designs on a curved line through all variables at once: no variable can be set on its
// own. 8 variables.
//
//	f = 1 - exp(-sum (x_i -+ 1/sqrt(n))^2)
//
// Source: C. M. Fonseca, P. J. Fleming, An overview of evolutionary algorithms in multiobjective optimization,
// Evolutionary Computation 3 (1995) 1-16. Its front is x_i = t for all i, t from -1/sqrt(n) to 1/sqrt(n).
func Valley() *Problem {
	const n = 8
	aims := func(f, x []float64) {
		a, b := 0.0, 0.0
		for _, v := range x {
			a += (v - 1/math.Sqrt(n)) * (v - 1/math.Sqrt(n))
			b += (v + 1/math.Sqrt(n)) * (v + 1/math.Sqrt(n))
		}
		f[0], f[1] = 1-math.Exp(-a), 1-math.Exp(-b)
	}
	ref := []float64{1.1, 1.1}
	ideal := curve(ref, func(t float64) []float64 {
		x, f := make([]float64, n), make([]float64, 2)
		for i := range x {
			x[i] = (2*t - 1) / math.Sqrt(n)
		}
		aims(f, x)
		return f
	})
	return &Problem{
		Name: "Valley", About: "front along a diagonal; Fonseca, Fleming 1995", Ideal: ideal, IdealFrom: "sampled front",
		Vars: box(n, -4, 4), AimCount: 2, Ref: ref,
		Function: func(f, _, x []float64) { aims(f, x) },
	}
}

// Turned is a convex front behind a long narrow valley that is turned against all axes, with its floor inside
// the box. 10 variables.
//
//	y = H (x - 0.3),  H = 1 - 2 v v' / v'v,  v = (1, 2, ..., 10)
//	g = 1 + sum_{i >= 2} 10^(2 (i-2)/8) y_i^2,  s = |x_1|,  f = (s, g (1 - sqrt(s / g)))
//
// The first variable of x is free of the turn, the reflection H acts on the other nine.
func Turned() *Problem {
	return &Problem{
		Name: "Turned", About: "turned narrow valley; own", Ideal: 1.21 - 1.0/3, IdealFrom: "closed form",
		Vars: box(10, 0, 1), AimCount: 2, Ref: []float64{1.1, 1.1},
		Function: func(f, _, x []float64) {
			dot, norm := 0.0, 0.0
			for i, v := range x[1:] {
				w := float64(i + 1)
				dot += w * (v - 0.3)
				norm += w * w
			}
			g := 1.0
			for i, v := range x[1:] {
				y := v - 0.3 - 2*float64(i+1)*dot/norm
				g += math.Pow(100, float64(i)/8) * y * y
			}
			f[0], f[1] = x[0], g*(1-math.Sqrt(x[0]/g))
		},
	}
}

// Needle has a feasible space of less than 0.01 % of the box, a bent tube around the front. 6 variables.
//
//	r = |x_2 - (0.3 + 0.4 s^2)| + sum_{i >= 3} (x_i - 0.5)^2,  s = x_1,  limit r <= 0.02
//	f = (s, 1 - s^2 + 5 r)
func Needle() *Problem {
	return &Problem{
		Name: "Needle", About: "hardly any feasible space; own", Ideal: 1.21 - 2.0/3, IdealFrom: "closed form",
		Vars: box(6, 0, 1), AimCount: 2, LimitCount: 1, Ref: []float64{1.1, 1.1},
		Function: func(f, g, x []float64) {
			s := x[0]
			r := math.Abs(x[1] - (0.3 + 0.4*s*s))
			for _, v := range x[2:] {
				r += (v - 0.5) * (v - 0.5)
			}
			f[0], f[1] = s, 1-s*s+5*r
			g[0] = r - 0.02
		},
	}
}

// Mixed is a convex front whose distance depends on whole numbers, a list and a choice together with real
// numbers: each of the three alloys has its own best numbers, and only one of them reaches g = 1.
func Mixed() *Problem {
	vars := append(box(5, 0, 1),
		optimize.Variable{Name: "count", Kind: optimize.Integer, Low: 1, High: 60},
		optimize.Variable{Name: "size", Kind: optimize.Ordered, Low: 0, High: 19},
		optimize.Variable{Name: "gas", Kind: optimize.Choice, Low: 0, High: 2},
	)
	return &Problem{
		Name: "Mixed", About: "real and whole numbers, a list and a choice; own", Ideal: 1.21 - 1.0/3, IdealFrom: "closed form",
		Vars: vars, AimCount: 2, Ref: []float64{1.1, 1.1},
		Function: func(f, _, x []float64) {
			gas := x[7]
			best, size, base := 17+11*gas, 4+5*gas, math.Abs(gas-2)*0.2
			g := 1 + base + math.Abs(x[5]-best)/20 + math.Abs(x[6]-size)/10
			for _, v := range x[1:5] {
				g += (v - 0.2 - 0.2*gas) * (v - 0.2 - 0.2*gas) * 4
			}
			f[0], f[1] = x[0], g*(1-math.Sqrt(x[0]/g))
		},
	}
}
