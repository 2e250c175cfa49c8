package loss

import "math"

// BufferPressure sets dst to the pressure in the closed buffer space behind a piston over a cycle [Pa]: an
// adiabatic swing
//
//	p (V + x)^gamma = constant
//
// with the constant such that the time mean is the given one, as leakage past the piston makes it in the
// long run.
//
// mean time-mean pressure [Pa], V mean volume of the space [m3] (0 = so large that the pressure is
// constant), gamma ratio of heat capacities [-], x increase of the buffer volume over its mean at instants
// spaced evenly in time [m3]. It reports false, and sets nothing, where the volume does not stay above
// zero. dst and x may be the same slice.
func BufferPressure(dst []float64, mean, V, gamma float64, x []float64) bool {
	if V == 0 {
		for i := range x {
			dst[i] = mean
		}
		return true
	}
	for _, d := range x {
		if !(V+d > 0) {
			return false
		}
	}
	sum := 0.0
	for i, d := range x {
		dst[i] = math.Pow(V/(V+d), gamma)
		sum += dst[i]
	}
	scale := mean * float64(len(x)) / sum
	for i := range x {
		dst[i] *= scale
	}
	return true
}
