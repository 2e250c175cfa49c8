package testproblem

import (
	"math"

	"hotfront/optimize"
)

// Problems of two aims with limits, as collected in K. Deb, Multi-Objective Optimization using Evolutionary
// Algorithms, Wiley 2001, section 8.3 (statements from memory). Limits are divided by their own right sides.

// BNH is of Binh and Korn 1997. Its front is x = y up to 3, then y = 3.
func BNH() *Problem {
	aims := func(x, y float64) []float64 {
		return []float64{4*x*x + 4*y*y, (x-5)*(x-5) + (y-5)*(y-5)}
	}
	ref := []float64{150, 60}
	return &Problem{
		Name: "BNH", About: "easy limits; Binh, Korn 1997",
		Ideal:     curve(ref, func(t float64) []float64 { return aims(5*t, min(5*t, 3)) }),
		IdealFrom: "sampled front",
		Vars:      []optimize.Variable{number("x", 0, 5), number("y", 0, 3)}, AimCount: 2, LimitCount: 2, Ref: ref,
		Function: func(f, g, x []float64) {
			copy(f, aims(x[0], x[1]))
			g[0] = ((x[0]-5)*(x[0]-5) + x[1]*x[1] - 25) / 25
			g[1] = (7.7 - (x[0]-8)*(x[0]-8) - (x[1]+3)*(x[1]+3)) / 7.7
		},
	}
}

// SRN is of Srinivas and Deb 1994. The gradients of the aims are opposite on x = -2.5; so the front follows
// the second limit from the least f1 to there, then x = -2.5 up to the circle of the first limit, then the
// circle to the least f2.
func SRN() *Problem {
	aims := func(x, y float64) []float64 {
		return []float64{2 + (x-2)*(x-2) + (y-1)*(y-1), 9*x - (y-1)*(y-1)}
	}
	ref := []float64{250, 50}
	high := math.Sqrt(225 - 2.5*2.5)
	ideal := curve(ref, func(t float64) []float64 {
		switch {
		case t < 0.2: // limit: x = 3 y - 10
			y := 4.0 + t/0.2*(2.5-4.0)
			return aims(3*y-10, y)
		case t < 0.8:
			return aims(-2.5, 2.5+(t-0.2)/0.6*(high-2.5))
		default:
			x := -2.5 - (t-0.8)/0.2*12.5
			return aims(x, math.Sqrt(225-x*x))
		}
	})
	return &Problem{
		Name: "SRN", About: "front inside the feasible space; Srinivas, Deb 1994",
		Ideal: ideal, IdealFrom: "sampled front",
		Vars: []optimize.Variable{number("x", -20, 20), number("y", -20, 20)}, AimCount: 2, LimitCount: 2, Ref: ref,
		Function: func(f, g, x []float64) {
			copy(f, aims(x[0], x[1]))
			g[0] = (x[0]*x[0] + x[1]*x[1] - 225) / 225
			g[1] = (x[0] - 3*x[1] + 10) / 10
		},
	}
}

// TNK is of Tanaka and others 1995: the front lies on a wavy limit, in pieces.
func TNK() *Problem {
	return &Problem{
		Name: "TNK", About: "front on a wavy limit; Tanaka and others 1995",
		Ideal: 0.654683, IdealFrom: "dense sampling of the known front",
		Vars:     []optimize.Variable{number("x", 0, math.Pi), number("y", 0, math.Pi)},
		AimCount: 2, LimitCount: 2, Ref: []float64{1.2, 1.2},
		Function: func(f, g, x []float64) {
			f[0], f[1] = x[0], x[1]
			g[0] = 1 + 0.1*math.Cos(16*math.Atan2(x[0], x[1])) - x[0]*x[0] - x[1]*x[1]
			g[1] = (x[0]-0.5)*(x[0]-0.5) + (x[1]-0.5)*(x[1]-0.5) - 0.5
		},
	}
}

// OSY is of Osyczka and Kundu 1995: six variables, six limits, each piece of the front on other limits.
func OSY() *Problem {
	return &Problem{
		Name: "OSY", About: "front on changing sets of limits; Osyczka, Kundu 1995",
		Ideal: 19532.4, IdealFrom: "dense sampling of the known front",
		Vars: []optimize.Variable{
			number("x1", 0, 10), number("x2", 0, 10), number("x3", 1, 5),
			number("x4", 0, 6), number("x5", 1, 5), number("x6", 0, 10),
		},
		AimCount: 2, LimitCount: 6, Ref: []float64{0, 90},
		Function: func(f, g, x []float64) {
			sq := func(v float64) float64 { return v * v }
			f[0] = -(25*sq(x[0]-2) + sq(x[1]-2) + sq(x[2]-1) + sq(x[3]-4) + sq(x[4]-1))
			f[1] = 0
			for _, v := range x {
				f[1] += v * v
			}
			g[0] = (2 - x[0] - x[1]) / 2
			g[1] = (x[0] + x[1] - 6) / 6
			g[2] = (x[1] - x[0] - 2) / 2
			g[3] = (x[0] - 3*x[1] - 2) / 2
			g[4] = (sq(x[2]-3) + x[3] - 4) / 4
			g[5] = (4 - sq(x[4]-3) - x[5]) / 4
		},
	}
}

// WeldedBeam weighs the cost of a welded beam against its deflection under 6000 lbf, in the inches and
// pounds of the source.
//
// Source: the constants are of K. M. Ragsdell, D. T. Phillips, Journal of Engineering for Industry 98 (1976)
// 1021-1025; the two aims of Deb 2001, section 8.3.
func WeldedBeam() *Problem {
	return &Problem{
		Name: "WBEAM", About: "welded beam, cost against deflection; Ragsdell, Phillips 1976",
		Ideal: 0.700517, IdealFrom: "merged long runs, best known",
		Vars: []optimize.Variable{
			number("weld", 0.125, 5), number("length", 0.1, 10), number("depth", 0.1, 10), number("breadth", 0.125, 5),
		},
		AimCount: 2, LimitCount: 4, Ref: []float64{40, 0.02},
		Function: func(f, g, x []float64) {
			h, l, t, b := x[0], x[1], x[2], x[3]
			f[0] = 1.10471*h*h*l + 0.04811*t*b*(14+l)
			f[1] = 2.1952 / (t * t * t * b)
			arm := math.Sqrt(0.25 * (l*l + (h+t)*(h+t)))
			direct := 6000 / (math.Sqrt2 * h * l)
			twist := 6000 * (14 + 0.5*l) * arm / (2 * 0.707 * h * l * (l*l/12 + 0.25*(h+t)*(h+t)))
			tau := math.Sqrt(direct*direct + twist*twist + l*direct*twist/arm)
			sigma := 504000 / (t * t * b)
			buckling := 64746.022 * (1 - 0.0282346*t) * t * b * b * b
			g[0] = (tau - 13600) / 13600
			g[1] = (sigma - 30000) / 30000
			g[2] = (h - b) / 5
			g[3] = (6000 - buckling) / 6000
		},
	}
}
