package cycle

// Entropy fills dst with the entropy that each part of the gas path made over the last cycle [J/K].
//
// In a well-mixed cell, a space or a duct, only mixing makes any: gas that enters at Tf a cell of
// temperature T, at the same pressure,
//
//	S = integral M (s(T) - s(Tf) + (h(Tf) - h(T))/T) dt >= 0.
//
// For the tubes and the matrix, film and mixing and the swing and axial conduction of the metal come out of the
// balance of the part: what flows out of its faces less what flows in, less what its walls gave,
//
//	S = sum over the faces of integral M s dt (out less in) - sum over the tube cells of Q/Tw.
//
// The two ways differ by the error of the time steps, so the sum over all parts meets the heat of the walls
// over their temperatures only to that error. It is worked out from the history of the cycle: Solve must
// have come before.
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
			t := s.faceTemperature(i, m)
			from, to := i, i+1
			if m < 0 {
				from, to, m = to, from, -m
			}
			flow := w * m * s.gas.Entropy(t, p)
			if !s.mixed(from) {
				dst[s.part[from]] += flow
			}
			if s.mixed(to) {
				dst[s.part[to]] += w * m * s.mixedIn(t, s.t[to], p)
			} else {
				dst[s.part[to]] -= flow
			}
		}
	}
	for i := range s.n {
		if s.kind[i] == Tube {
			dst[s.part[i]] -= s.sums.heat[i] / s.wall0[i]
		}
	}
}

func (s *Solver) mixed(i int) bool { return s.kind[i] == Space || s.kind[i] == Passive }

// mixedIn is the entropy made by a kilogram of gas at tf that mixes into much gas at t [J/(kg K)].
func (s *Solver) mixedIn(tf, t, p float64) float64 {
	s.gas.At(&s.state, tf, p)
	hf := s.state.H
	s.gas.At(&s.state, t, p)
	return s.gas.Entropy(t, p) - s.gas.Entropy(tf, p) + (hf-s.state.H)/t
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
