package cycle

// Entropy fills dst with the entropy that each part of the gas path made over the last cycle [J/K]:
// what flows out of its faces less what flows in, less what its walls gave at their temperatures,
//
//	S = sum over the faces of integral M s dt (out less in) - sum over the tube cells of Q/Tw.
//
// It counts mixing, the lag of the films and, in the regenerator, whose metal lies inside the balance,
// its swing and axial conduction. It is worked out from the history of the cycle, so Solve must have
// come before.
func (s *Solver) Entropy(dst *[Parts]float64) {
	*dst = [Parts]float64{}
	path := s.path
	steps := path.Fine.Steps
	dt := path.Period / float64(steps)
	weights := [2]float64{(1 - Gamma) * dt, Gamma * dt}
	for k := range 2 * steps {
		w := weights[k&1]
		copy(s.t[:s.n], s.Trace.Temp[k][:s.n])
		p := s.Trace.Pressure[k]
		for i := range s.n - 1 {
			m := s.Trace.Flow[k][i]
			flow := w * m * s.gas.Entropy(s.faceTemperature(i, m), p)
			dst[s.part[i]] += flow
			dst[s.part[i+1]] -= flow
		}
	}
	for i := range s.n {
		if s.kind[i] == Tube {
			dst[s.part[i]] -= s.sums.heat[i] / s.wall0[i]
		}
	}
}

// faceTemperature is that of the gas over face i|i+1 with flow m.
func (s *Solver) faceTemperature(i int, m float64) float64 {
	switch {
	case s.faceKind[i] == faceMatrix:
		return 0.5 * (s.t[i] + s.t[i+1])
	case m >= 0:
		return s.t[i] + s.leaving(i, -1)
	}
	return s.t[i+1] + s.leaving(i+1, +1)
}
