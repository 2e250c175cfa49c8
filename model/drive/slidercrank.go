package drive

import "math"

// sliderCrank is an in-line crank and connecting rod for each body, crank radius r half its stroke, rod
// length L. With alpha = theta + phase for the first and theta for the second body
//
//	Y = -r cos(alpha) - (L - q),   q = sqrt(L^2 - r^2 sin^2 alpha)
//
// The crankshaft lies below the bodies: the top is at alpha = pi, as with harmonic motion, to which the
// mechanism tends as L grows. L - q is written r^2 sin^2(alpha)/(L + q), which loses no digits for long
// rods.
//
//	dY/dalpha   = r sin(alpha) - r^2 sin(alpha) cos(alpha)/q
//	d2Y/dalpha2 = r cos(alpha) - r^2 cos(2 alpha)/q - r^4 sin^2(alpha) cos^2(alpha)/q^3
//
// Source: derived here from the triangle of crank and rod.
func sliderCrank(dst *Motion, m *Mechanism, theta float64) {
	dst.Y1, dst.V1, dst.A1 = slider(0.5*m.Stroke1, m.Rod, theta+m.Phase)
	dst.Y2, dst.V2, dst.A2 = slider(0.5*m.Stroke2, m.Rod, theta)
}

// slider gives position and both derivatives of one body.
func slider(r, L, alpha float64) (y, v, a float64) {
	s, c := math.Sincos(alpha)
	rs, rc := r*s, r*c
	q := math.Sqrt(L*L - rs*rs)
	b := rs * rc / q
	y = -rc - rs*rs/(L+q)
	v = rs - b
	a = rc - (rc*rc-rs*rs)/q - b*b/q
	return y, v, a
}

func checkSliderCrank(m *Mechanism) Fault {
	if !finite(m.Phase, m.Rod, m.Stroke1, m.Stroke2) {
		return NotFinite
	}
	if m.Stroke1 <= 0 || m.Stroke2 <= 0 {
		return NotPositive
	}
	if m.Rod <= 0.5*max(m.Stroke1, m.Stroke2) {
		return RodTooShort
	}
	return None
}

func extremesSliderCrank(m *Mechanism) Extremes {
	r1, r2 := 0.5*m.Stroke1, 0.5*m.Stroke2
	e := Extremes{
		Top1: r1, Top1At: turn(math.Pi - m.Phase),
		Bottom1: -r1, Bottom1At: turn(-m.Phase),
		Top2: r2, Top2At: math.Pi,
		Bottom2: -r2, Bottom2At: 0,
	}
	// The gap holds few harmonics, so every low point shows on a grid of 5 degrees.
	const n = 72
	var grid [n]float64
	var mo Motion
	for i := range grid {
		sliderCrank(&mo, m, float64(i)*(2*math.Pi/n))
		grid[i] = mo.Y1 - mo.Y2
	}
	gap := func(theta float64) (y, v, a float64) {
		var mo Motion
		sliderCrank(&mo, m, theta)
		return mo.Y1 - mo.Y2, mo.V1 - mo.V2, mo.A1 - mo.A2
	}
	e.MinGap, e.MinGapAt = lowest(grid[:], 1, gap)
	e.MaxGap, e.MaxGapAt = lowest(grid[:], -1, gap)
	e.MaxGap = -e.MaxGap
	return e
}
