package cycle

import "math"

// profileSpread is the largest difference of the mean energy flow between the hot end of the matrix
// and any section of it [J]: what the matrix cells before that section gained over the cycle.
func (s *Solver) profileSpread() float64 {
	if s.path.FixedRun {
		return 0
	}
	sum, largest := 0.0, 0.0
	for i := range s.n {
		if s.kind[i] != Matrix {
			continue
		}
		sum += s.gain[i]
		largest = max(largest, math.Abs(sum))
	}
	return largest
}

// moveMatrix shifts the mean matrix profile so that no cell gains energy over a cycle, and sets the
// axial conduction for the next cycle.
//
// The net enthalpy flow over a face inside the matrix answers a change of profile like a
// conductance: with the gas behind or ahead of the metal by cp M (dT a cell)/UA,
//
//	dH = -K (dT(i+1) - dT(i)),     K = integral (cp M)^2/UA dt + axial conduction.
//
// At the two ends the gas that leaves carries the end cell's temperature away; the share that
// comes back unchanged is not known, and 0.3 is taken. Anderson's method corrects both guesses.
func (s *Solver) moveMatrix() {
	path := s.path
	if path.FixedRun {
		return
	}
	first, last := s.firstMatrix, s.lastMatrix
	if first > last {
		return
	}
	var part, ratio [MaxCells]float64
	// Thomas algorithm on  -L d(i-1) + D d(i) - R d(i+1) = G.
	left := returning * s.cp[first] * 0.5 * s.sums.flowAbs[first-1]
	for i := first; i <= last; i++ {
		var right float64
		if i < last {
			right = 0.5*(s.sums.blow[i]+s.sums.blow[i+1]) + s.conduct[i]*path.Period
		} else {
			right = returning * s.cp[last] * 0.5 * s.sums.flowAbs[last]
		}
		d := left + right
		g := s.gain[i]
		if i > first {
			d -= left * ratio[i-1]
			g += left * part[i-1]
		}
		inv := 1 / d
		part[i] = g * inv
		if i < last {
			ratio[i] = right * inv
		}
		left = right
	}
	for i := last; i >= first; i-- {
		s.shift[i] = part[i]
		if i < last {
			s.shift[i] += ratio[i] * s.shift[i+1]
		}
	}
	largest := 0.0
	for i := first; i <= last; i++ {
		largest = max(largest, math.Abs(s.shift[i]))
	}
	if largest > maxShift {
		for i := first; i <= last; i++ {
			s.shift[i] *= maxShift / largest
		}
	}
	for i := first; i <= last; i++ {
		mean := s.sums.metal[i] / path.Period
		swing := 0.5*(s.wallStart[i]+s.wall[i]) - mean
		next := mean + s.shift[i] + swing*s.steeper(max(i-1, first), min(i+1, last))
		s.t[i] += next - s.wall[i]
		s.wall[i] = next
	}
}

// steeper is the slope of the moved mean profile between cells i and j over that of the old one: the
// swing of the matrix about its mean goes with the slope.
func (s *Solver) steeper(i, j int) float64 {
	old := (s.sums.metal[j] - s.sums.metal[i]) / s.path.Period
	r := 1 + (s.shift[j]-s.shift[i])/old
	if r > 0 && r < 3 {
		return r
	}
	return 1
}

// returning is the share of a change of the end cell's temperature that does not come back with
// the returning gas.
// maxShift is the largest move of the mean matrix profile in one cycle [K]: the linear model of the
// enthalpy flow holds no further.
const maxShift = 60

const returning = 0.7

// conduction works out the axial conduction between matrix cells over a step from their temperatures at its start.
func (s *Solver) conduction(dt float64) {
	if s.path.FixedRun {
		return
	}
	in := 0.0
	for i := s.firstMatrix; i <= s.lastMatrix; i++ {
		out := 0.0
		if i < s.lastMatrix {
			out = s.conduct[i] * (s.wall[i] - s.wall[i+1])
		}
		s.sums.axial[i] += dt * out
		s.metalDrift[i] = (in - out) / s.path.Cells[i].Capacity
		in = out
	}
}
