package pareto

import (
	"fmt"
	"math"
)

// NaNError says which number of which point cannot be compared.
type NaNError struct {
	Point int // index of the point, 0 for a point on its own
	Aim   int // index of the aim, -1 for the violation
}

func (e *NaNError) Error() string {
	if e.Aim < 0 {
		return fmt.Sprintf("pareto: point %d: violation is NaN", e.Point)
	}
	return fmt.Sprintf("pareto: point %d: aim %d is NaN", e.Point, e.Aim)
}

// check refuses NaN.
func check(point int, f []float64) error {
	for i, v := range f {
		if math.IsNaN(v) {
			return &NaNError{Point: point, Aim: i}
		}
	}
	return nil
}

// Dominates reports whether a is nowhere worse than b and somewhere better. A point that holds a NaN
// dominates nothing and nothing dominates it.
func Dominates(a, b []float64) bool {
	better := false
	for i, av := range a {
		bv := b[i]
		if !(av <= bv) {
			return false
		}
		if av < bv {
			better = true
		}
	}
	return better
}

// Violation is the sum of what the limits are exceeded by; a limit is met when its number is not
// positive.
//
//	v = sum_i max(0, g_i)
func Violation(g []float64) float64 {
	v := 0.0
	for _, gi := range g {
		if !(gi <= 0) { // a NaN counts as NaN
			v += gi
		}
	}
	return v
}

// Beats orders designs that have limits: one that meets them beats one that does not, of two that do not
// the one with the smaller violation wins, and of two that do, the one that dominates.
//
// Source: K. Deb, An efficient constraint handling method for genetic algorithms, Computer Methods in
// Applied Mechanics and Engineering 186 (2000) 311-338, section 3.
func Beats(fa []float64, va float64, fb []float64, vb float64) bool {
	switch {
	case va <= 0 && vb <= 0:
		return Dominates(fa, fb)
	case va <= 0:
		return vb > 0
	default:
		return va < vb
	}
}
