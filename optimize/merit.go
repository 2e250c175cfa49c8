package optimize

import "math"

// A simplex compares merits and does no arithmetic with them, so only their order matters.
const (
	failedMerit = math.MaxFloat64       // of a failed design, below all others
	brokenMerit = math.MaxFloat64 / 1e3 // of a design beyond a wall; its violation adds at most as much again
	mostMerit   = math.MaxFloat64 / 1e6 // bound of the merit of any other
)

// penalty is the exact penalty merit of a design with the value f and the given sum of exceeded limits:
//
//	m = f + weight * violation
//
// Its minimum meets the limits once the weight exceeds the largest multiplier; who uses it raises the weight
// until it does. In contrast to a wall it lets a simplex lean on a limit from both sides.
//
// Source: J. Nocedal, S. J. Wright, Numerical Optimization, 2nd ed., Springer 2006, section 17.2.
func penalty(f, violation, weight float64) float64 {
	if math.IsInf(violation, 1) {
		return failedMerit
	}
	return max(-mostMerit, min(f+weight*violation, mostMerit))
}

// wall is the feasible-first merit: designs beyond a limit rank below all that meet them, by violation.
func wall(f, violation float64) float64 {
	switch {
	case math.IsInf(violation, 1):
		return failedMerit
	case violation > 0:
		return brokenMerit * (1 + violation/(1+violation))
	}
	return max(-mostMerit, min(f, mostMerit))
}
