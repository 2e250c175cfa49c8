package testproblem

import (
	"math"

	"hotfront/optimize"
)

// Problems of one aim; Ideal is the lowest value.

// Rosenbrock is the curved valley in n variables, lowest at (1, ..., 1).
//
// Source: H. H. Rosenbrock, Computer Journal 3 (1960) 175-184; the chained form for n variables is common.
func Rosenbrock(n int) *Problem {
	return &Problem{
		Name: "Rosenbrock", About: "curved valley; Rosenbrock 1960", Ideal: 0, IdealFrom: "closed form",
		Vars: box(n, -2, 2), AimCount: 1, Ref: []float64{1000},
		Function: func(f, _, x []float64) {
			f[0] = 0
			for i := range len(x) - 1 {
				a, b := x[i+1]-x[i]*x[i], 1-x[i]
				f[0] += 100*a*a + b*b
			}
		},
	}
}

// Corner is a linear aim on a ball cut by a plane, lowest where both limits meet.
//
//	least x + 2 y,  x^2 + y^2 <= 1,  x >= -0.28  ->  (-0.28, -0.96), -2.2
func Corner() *Problem {
	return &Problem{
		Name: "Corner", About: "two limits meet at the best design; own", Ideal: -2.2, IdealFrom: "closed form",
		Vars: box(2, -2, 2), AimCount: 1, LimitCount: 2, Ref: []float64{10},
		Function: func(f, g, x []float64) {
			f[0] = x[0] + 2*x[1]
			g[0] = x[0]*x[0] + x[1]*x[1] - 1
			g[1] = -0.28 - x[0]
		},
	}
}

// Crescent has a thin crescent as feasible space, 0.007 % of the box, lowest at its tip (14.095, 0.84296).
//
// Source: problem G6 of Z. Michalewicz, M. Schoenauer, Evolutionary Computation 4 (1996) 1-32; the tip follows
// from both limits holding: x = 14.095, y = 5 - sqrt(100 - 9.095^2).
func Crescent() *Problem {
	return &Problem{
		Name: "Crescent", About: "thin feasible space; Michalewicz, Schoenauer 1996",
		Ideal: math.Pow(4.095, 3) + math.Pow(5-math.Sqrt(100-9.095*9.095)-20, 3), IdealFrom: "closed form",
		Vars:     []optimize.Variable{number("x", 13, 100), number("y", 0, 100)},
		AimCount: 1, LimitCount: 2, Ref: []float64{1e6},
		Function: func(f, g, x []float64) {
			f[0] = math.Pow(x[0]-10, 3) + math.Pow(x[1]-20, 3)
			g[0] = (100 - (x[0]-5)*(x[0]-5) - (x[1]-5)*(x[1]-5)) / 100
			g[1] = ((x[0]-6)*(x[0]-6) + (x[1]-5)*(x[1]-5) - 82.81) / 82.81
		},
	}
}

// Stock is a cantilever of round stock: the diameter is from a list of sizes, the number of rods is whole and
// the alloy is a choice. It is small enough to enumerate.
//
//	mass = rho n d^2 L,  deflection * E n d^4 / L^3 <= 1 (scaled)
func Stock() *Problem {
	sizes := [12]float64{3, 4, 5, 6, 8, 10, 12, 14, 16, 18, 20, 25}
	density := [4]float64{7.8, 2.7, 4.4, 1.8}
	modulus := [4]float64{210, 70, 114, 45}
	price := [4]float64{1, 4, 30, 9}
	p := &Problem{
		Name: "Stock", About: "sizes from a list, whole numbers and a choice; own", IdealFrom: "enumeration",
		Vars: []optimize.Variable{
			{Name: "size", Kind: optimize.Ordered, Low: 0, High: 11},
			{Name: "rods", Kind: optimize.Integer, Low: 1, High: 12},
			{Name: "alloy", Kind: optimize.Choice, Low: 0, High: 3},
		},
		AimCount: 2, LimitCount: 1, Ref: []float64{20000, 20000},
		Function: func(f, g, x []float64) {
			d, n, alloy := sizes[int(x[0])], x[1], int(x[2])
			f[0] = density[alloy] * n * d * d
			f[1] = price[alloy]*density[alloy]*n*d*d/10 + 50*n
			g[0] = 40000/(modulus[alloy]*n*d*d*d*d/1000) - 1
		},
	}
	return p
}
