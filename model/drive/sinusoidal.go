package drive

import "math"

// sinusoidal is harmonic motion:
//
//	Y1 = -(S1/2) cos(theta + phase)    Y2 = -(S2/2) cos(theta)
//
// so that the expansion volume is Vcle + (Vs1/2)(1 + cos(theta + phase)) and the volume above the
// piston Vclc + (Vs2/2)(1 + cos theta), the form of the classical isothermal analysis.
//
// Source: [Urieli1984], chapter 4 (form of the volumes), from memory.
func sinusoidal(dst *Motion, m *Mechanism, theta float64) {
	r1, r2 := 0.5*m.Stroke1, 0.5*m.Stroke2
	s1, c1 := math.Sincos(theta + m.Phase)
	s2, c2 := math.Sincos(theta)
	dst.Y1, dst.V1, dst.A1 = -r1*c1, r1*s1, r1*c1
	dst.Y2, dst.V2, dst.A2 = -r2*c2, r2*s2, r2*c2
}

func checkSinusoidal(m *Mechanism) Fault {
	if !finite(m.Phase, m.Stroke1, m.Stroke2) {
		return NotFinite
	}
	if m.Stroke1 <= 0 || m.Stroke2 <= 0 {
		return NotPositive
	}
	return None
}

// extremesSinusoidal: the gap is one cosine again,
//
//	Y1 - Y2 = -Re[(r1 e^(i phase) - r2) e^(i theta)],
//
// of amplitude sqrt(r1^2 + r2^2 - 2 r1 r2 cos phase), smallest where the bracket's angle is -theta.
func extremesSinusoidal(m *Mechanism) Extremes {
	r1, r2 := 0.5*m.Stroke1, 0.5*m.Stroke2
	s, c := math.Sincos(m.Phase)
	x, y := r1*c-r2, r1*s
	amplitude := math.Hypot(x, y)
	at := turn(-math.Atan2(y, x))
	return Extremes{
		Top1: r1, Top1At: turn(math.Pi - m.Phase),
		Bottom1: -r1, Bottom1At: turn(-m.Phase),
		Top2: r2, Top2At: math.Pi,
		Bottom2: -r2, Bottom2At: 0,
		MinGap: -amplitude, MinGapAt: at,
		MaxGap: amplitude, MaxGapAt: turn(at + math.Pi),
	}
}
