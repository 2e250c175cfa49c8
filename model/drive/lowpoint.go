package drive

import "math"

// curve gives a coordinate of a mechanism at a crank angle with its first and second derivative.
type curve func(theta float64) (y, v, a float64)

// lowest finds the smallest value over a turn of sign*y and its angle. grid holds y at evenly spaced angles from zero;
// it must be fine enough to show every low point. Each is refined, since two of them may be nearly equal.
func lowest(grid []float64, sign float64, f curve) (y, at float64) {
	n := len(grid)
	step := 2 * math.Pi / float64(n)
	y = math.Inf(1)
	for i := range grid {
		g := sign * grid[i]
		if g > sign*grid[(i+n-1)%n] || g > sign*grid[(i+1)%n] {
			continue
		}
		if refined, theta := lowPoint(f, sign, float64(i)*step, step); refined < y {
			y, at = refined, theta
		}
	}
	return y, turn(at)
}

// lowPoint takes the slope of sign*y to zero inside theta -+ step by Newton's method, kept inside the bracket by
// bisection.
func lowPoint(f curve, sign, theta, step float64) (y, at float64) {
	low, high := theta-step, theta+step
	for range 60 {
		_, v, a := f(theta)
		slope, bend := sign*v, sign*a
		if slope == 0 {
			break
		}
		if slope < 0 {
			low = theta
		} else {
			high = theta
		}
		next := theta - slope/bend
		if !(next > low && next < high) { // also where the curvature is zero
			next = 0.5 * (low + high)
		}
		if math.Abs(next-theta) < 1e-15*math.Pi {
			break
		}
		theta = next
	}
	y, _, _ = f(theta)
	return sign * y, theta
}
