package testproblem

import "math"

// The DTLZ problems have fronts on simple surfaces for any number of aims; here three (and C2-DTLZ2 two).
//
// Source: K. Deb, L. Thiele, M. Laumanns, E. Zitzler, Scalable multi-objective optimization test problems,
// IEEE CEC 2002, 825-830; the limit of C2-DTLZ2 is H. Jain, K. Deb, IEEE Transactions on Evolutionary
// Computation 18 (2014) 602-622, eq. 8.

const dtlzSource = "Deb, Thiele, Laumanns, Zitzler 2002"

// DTLZ2 has an eighth of a sphere as front, 12 variables.
func DTLZ2() *Problem {
	return &Problem{
		Name: "DTLZ2", About: "three aims, front on a sphere; " + dtlzSource,
		Ideal: 1.331 - math.Pi/6, IdealFrom: "closed form",
		Vars: box(12, 0, 1), AimCount: 3, Ref: []float64{1.1, 1.1, 1.1},
		Function: func(f, _, x []float64) { sphere(f, x) },
	}
}

func sphere(f, x []float64) {
	aims := len(f)
	r := 1.0
	for _, v := range x[aims-1:] {
		r += (v - 0.5) * (v - 0.5)
	}
	for i := range f {
		f[i] = r
		for k := range aims - 1 - i {
			f[i] *= math.Cos(x[k] * math.Pi / 2)
		}
		if i > 0 {
			f[i] *= math.Sin(x[aims-1-i] * math.Pi / 2)
		}
	}
}

// DTLZ1 has a flat front, f1 + f2 + f3 = 1/2, behind 11^5 - 1 local ones, 7 variables.
func DTLZ1() *Problem {
	return &Problem{
		Name: "DTLZ1", About: "three aims, flat front, many local ones; " + dtlzSource,
		Ideal: 0.6*0.6*0.6 - 0.125/6, IdealFrom: "closed form",
		Vars: box(7, 0, 1), AimCount: 3, Ref: []float64{0.6, 0.6, 0.6},
		Function: func(f, _, x []float64) {
			g := 0.0
			for _, v := range x[2:] {
				g += (v-0.5)*(v-0.5) - math.Cos(20*math.Pi*(v-0.5)) + 1
			}
			r := 0.5 * (1 + 100*g)
			f[0], f[1], f[2] = r*x[0]*x[1], r*x[0]*(1-x[1]), r*(1-x[0])
		},
	}
}

// C2DTLZ2 leaves two ends and the middle of a quarter circle, 10 variables, two aims.
func C2DTLZ2() *Problem {
	const radius = 0.2
	limit := func(f []float64) float64 {
		whole := 0.0
		for _, v := range f {
			whole += (v - math.Sqrt(0.5)) * (v - math.Sqrt(0.5))
		}
		ends := math.Inf(1)
		for i := range f {
			d := (f[i] - 1) * (f[i] - 1)
			for j, v := range f {
				if j != i {
					d += v * v
				}
			}
			ends = min(ends, d)
		}
		return (min(whole, ends) - radius*radius) / (radius * radius)
	}
	ref := []float64{1.1, 1.1}
	ideal := curve(ref, func(t float64) []float64 {
		s, c := math.Sincos(t * math.Pi / 2)
		f := []float64{c, s}
		if limit(f) > 0 {
			return ref
		}
		return f
	})
	return &Problem{
		Name: "C2-DTLZ2", About: "front in three pieces cut by a limit; Jain, Deb 2014",
		Ideal: ideal, IdealFrom: "sampled front",
		Vars: box(10, 0, 1), AimCount: 2, LimitCount: 1, Ref: ref,
		Function: func(f, g, x []float64) {
			sphere(f, x)
			g[0] = limit(f)
		},
	}
}
