package cycle

import "math"

// film sets the film conductances of a step from the flows expected in its middle, straight on from the last two
// starts of a step, with the matrix temperature of the stage eliminated:
//
//	Tw = Tw* + a (-Q)/C,  Q = UA (Tw - T)   gives   Q = UAe (Tw* - T),  UAe = UA C/(C + a UA).
func (s *Solver) film(a float64) {
	last := s.n - 1
	for i := range s.n {
		c := &s.path.Cells[i]
		var flow float64
		switch i {
		case 0:
			flow = 1.5*s.flow[0] - 0.5*s.flowOld[0]
		case last:
			flow = 1.5*s.flow[last-1] - 0.5*s.flowOld[last-1]
		default:
			flow = 0.75*(s.flow[i-1]+s.flow[i]) - 0.25*(s.flowOld[i-1]+s.flowOld[i])
		}
		if flow < 0 {
			flow = -flow
		}
		ua := c.FixedFilm
		switch s.kind[i] {
		case Tube:
			if ua == 0 {
				ua = s.filmScale[i] * s.fast.TubeNusselt(&s.tubeFilm[i], flow*s.reScale[i])
			}
		case Matrix:
			if ua == 0 {
				ua = s.filmScale[i] * s.fast.MatrixNusselt(&s.path.Porous, flow*s.reScale[i], s.prandtl[i])
			}
			s.ua[i] = ua
			if !s.path.FixedRun {
				ua *= c.Capacity / (c.Capacity + a*ua)
			}
			s.uae[i] = ua
			s.wall0[i] = s.metal0[i]
			continue
		}
		s.ua[i] = ua
		s.uae[i] = ua
		s.wall0[i] = s.wall[i]
	}
}

// run takes the state through one cycle and fills s.sums and s.Trace. It reports false when the
// solution left the physical range.
func (s *Solver) run() bool {
	move := s.move
	dt := s.path.Period / float64(move.Steps)
	a := Gamma * dt
	b := (1 - Gamma) * dt
	s.sums = sums{}
	s.wallStart = s.wall
	for i := range s.n {
		s.sums.wallMax[i], s.sums.wallMin[i] = s.wall[i], s.wall[i]
	}
	since := 0
	last := s.p // pressure at the start of the step before
	for n := range move.Steps {
		k := 2 * n
		s.conduction(dt)
		// First stage, at (n + gamma) dt.
		for i := range s.n {
			s.mass0[i], s.energy0[i] = s.mass[i], s.energy[i]
			if s.kind[i] == Matrix {
				s.metal0[i] = s.wall[i] + a*s.metalDrift[i]
			}
		}
		s.film(a)
		copy(s.flowOld[:s.n], s.flow[:s.n])
		// The pressure expected at each stage lies straight on: half of the error of one Newton step goes with it.
		start := s.p
		s.p += Gamma * (start - last)
		last = start
		if !s.newtonSteps(a, k) {
			return false
		}
		s.rates(a, b, k)
		s.films(dt)
		s.p += (1 - Gamma) / Gamma * (s.p - start)
		// Second stage, at (n + 1) dt; it starts from the first stage's rates.
		for i := range s.n {
			s.mass0[i] = s.mass[i] + b*s.massRate[i]
			s.energy0[i] = s.energy[i] + b*s.energyRate[i]
			if s.kind[i] == Matrix {
				s.metal0[i] = s.wall[i] + b*s.metalRate[i] + a*s.metalDrift[i]
				s.wall0[i] = s.metal0[i]
			}
		}
		if !s.newtonSteps(a, k+1) {
			return false
		}
		if n == move.Steps-1 && !s.settle(a, k+1) {
			return false
		}
		s.rates(a, a, k+1)
		for i := range s.n {
			s.mass[i] = s.Trace.Mass[k+1][i]
			s.energy[i] = s.energy0[i] + a*s.energyRate[i]
			if s.kind[i] == Matrix {
				w := s.metal0[i] + a*(s.metalRate[i]-s.metalDrift[i])
				s.wall[i] = w
				s.sums.metal[i] += dt * w
				s.sums.wallMax[i] = max(s.sums.wallMax[i], w)
				s.sums.wallMin[i] = min(s.sums.wallMin[i], w)
			}
		}
		if s.tangent.follow {
			if since++; since == s.tangent.stride || n == move.Steps-1 {
				s.tangent.step(s, float64(since)*dt, move.DVe[k+1], move.DVc[k+1])
				since = 0
			}
		}
	}
	for i := s.firstMatrix; i <= s.lastMatrix; i++ {
		s.gain[i] = (s.wall[i] - s.wallStart[i]) * s.path.Cells[i].Capacity
	}
	return true
}

// settle repeats the Newton step at the end of a cycle until temperatures and pressure agree with the
// masses and energies carried there: the next cycle starts from the former alone.
func (s *Solver) settle(a float64, k int) bool {
	for range 2 {
		if !s.stage(a, s.move.Ve[k], s.move.DVe[k], s.move.Vc[k], s.move.DVc[k]) {
			return false
		}
	}
	return true
}

// newtonSteps takes a stage through the Newton steps asked for. A step that leaves the physical range is taken again from the
// temperatures and the pressure before it, but with the flows it found: in a small cell next to a flow that turns, the gas was
// expected from the wrong side.
func (s *Solver) newtonSteps(a float64, k int) bool {
	done := 0
	for range s.newton + stageRetries {
		p := s.p
		copy(s.before[:s.n], s.t[:s.n])
		if s.stage(a, s.move.Ve[k], s.move.DVe[k], s.move.Vc[k], s.move.DVc[k]) {
			if done++; done == s.newton {
				return true
			}
			continue
		}
		s.p = p
		copy(s.t[:s.n], s.before[:s.n])
	}
	return false
}

const stageRetries = 3

// films adds to the integrals of the cycle that only describe it and steer the iteration, once a step.
func (s *Solver) films(dt float64) {
	flowIn := 0.0
	for i := range s.n {
		flowOut := 0.0
		if i < s.n-1 {
			flowOut = s.flow[i]
			s.sums.flowAbs[i] += dt * math.Abs(flowOut)
		}
		s.sums.film[i] += dt * s.ua[i]
		if s.kind[i] == Matrix {
			c := s.cp[i] * 0.5 * (flowIn + flowOut)
			s.sums.blow[i] += dt * c * c / s.ua[i]
		}
		flowIn = flowOut
	}
}

// rates works out the rates of mass, energy and matrix temperature at the stage just solved, which took the time a [s] from
// what it starts from, adds them with the weight w [s] to the integrals of the cycle and keeps the trace.
func (s *Solver) rates(a, w float64, k int) {
	path := s.path
	last := s.n - 1
	p := s.p
	mass := &s.Trace.Mass[k]
	var flowIn, energyIn float64
	for i := range s.n {
		var flowOut, energyOut float64
		if i < last {
			flowOut = s.flow[i]
			rise := s.wLeft[i]*s.dT[i] + s.wRight[i]*s.dT[i+1]
			energyOut = flowOut * (s.hFace[i] + s.cpFace[i]*rise)
			s.sums.enthalpy[i] += w * energyOut
		}
		q := s.uae[i] * (s.wall0[i] - s.t[i])
		s.massRate[i] = flowIn - flowOut
		mass[i] = s.mass0[i] + a*s.massRate[i]
		s.energyRate[i] = energyIn - energyOut + q
		s.sums.heat[i] += w * q
		s.sums.temperature[i] += w * s.t[i]
		if s.kind[i] == Matrix {
			s.metalRate[i] = s.metalDrift[i]
			if !path.FixedRun {
				s.metalRate[i] -= q / path.Cells[i].Capacity
			}
			if q < 0 {
				s.sums.heatIn[i] -= w * q
			}
		}
		flowIn, energyIn = flowOut, energyOut
	}
	we, wc := p*s.move.DVe[k], p*s.move.DVc[k]
	s.energyRate[0] -= we
	s.energyRate[last] -= wc
	s.sums.work[0] += w * we
	s.sums.work[1] += w * wc
	s.sums.pressure += w * p
	s.Trace.Pressure[k] = p
	copy(s.Trace.Flow[k][:s.n], s.flow[:s.n])
	copy(s.Trace.Temp[k][:s.n], s.t[:s.n])
}
