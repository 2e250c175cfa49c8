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
		copy(s.mass0[:s.n], s.mass[:s.n])
		copy(s.energy0[:s.n], s.energy[:s.n])
		for i := s.firstMatrix; i <= s.lastMatrix; i++ {
			s.metal0[i] = s.wall[i] + a*s.metalDrift[i]
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
		s.rates(b, k)
		s.films(dt)
		s.p += (1 - Gamma) / Gamma * (s.p - start)
		// Second stage, at (n + 1) dt; it starts from the first stage's rates.
		s.ahead(b)
		for i := s.firstMatrix; i <= s.lastMatrix; i++ {
			s.metal0[i] = s.wall[i] + b*s.metalRate[i] + a*s.metalDrift[i]
			s.wall0[i] = s.metal0[i]
		}
		if !s.newtonSteps(a, k+1) {
			return false
		}
		if n == move.Steps-1 && !s.settle(a, k+1) {
			return false
		}
		s.rates(a, k+1)
		for i := range s.n {
			s.mass[i] = s.mass0[i] + a*s.massRate[i]
			s.energy[i] = s.energy0[i] + a*s.energyRate[i]
		}
		for i := s.firstMatrix; i <= s.lastMatrix; i++ {
			w := s.metal0[i] + a*(s.metalRate[i]-s.metalDrift[i])
			s.wall[i] = w
			s.sums.metal[i] += dt * w
			s.sums.wallMax[i] = max(s.sums.wallMax[i], w)
			s.sums.wallMin[i] = min(s.sums.wallMin[i], w)
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

// ahead sets what the second stage starts from, b [s] along the rates of the first.
func (s *Solver) ahead(b float64) {
	n := s.n
	mass0, mass, massRate := s.mass0[:n], s.mass[:n], s.massRate[:n]
	energy0, energy, energyRate := s.energy0[:n], s.energy[:n], s.energyRate[:n]
	for i := range mass0 {
		mass0[i] = mass[i] + b*massRate[i]
		energy0[i] = energy[i] + b*energyRate[i]
	}
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
	n := s.n
	flow, ua, flowAbs, film := s.flow[:n], s.ua[:n], s.sums.flowAbs[:n], s.sums.film[:n]
	for i := range flow {
		flowAbs[i] += dt * math.Abs(flow[i])
		film[i] += dt * ua[i]
	}
	for i := s.firstMatrix; i <= s.lastMatrix; i++ {
		c := s.cp[i] * 0.5 * (s.flow[i-1] + s.flow[i])
		s.sums.blow[i] += dt * c * c / s.ua[i]
	}
}

// rates works out the rates of mass, energy and matrix temperature at the stage just solved, adds
// them with the weight w [s] to the integrals of the cycle and keeps the trace.
func (s *Solver) rates(w float64, k int) {
	n := s.n
	p, rise := s.p, s.p/s.pBefore
	tr := &s.Trace
	flow, hFace, cpFace, wLeft, wRight := s.flow[:n], s.hFace[:n], s.cpFace[:n], s.wLeft[:n], s.wRight[:n]
	t, dT, uae, wall0, m := s.t[:n], s.dT[:n+1], s.uae[:n], s.wall0[:n], s.m[:n]
	massRate, energyRate, warmth := s.massRate[:n], s.energyRate[:n], s.warmth[:n]
	heat, temperature, enthalpy := s.sums.heat[:n], s.sums.temperature[:n], s.sums.enthalpy[:n]
	mass, flows, temps := tr.Mass[k][:n], tr.Flow[k][:n], tr.Temp[k][:n]
	var flowIn, energyIn float64
	for i := range flow { // the face behind the last cell has no flow
		flowOut := flow[i]
		energyOut := flowOut * (hFace[i] + cpFace[i]*(wLeft[i]*dT[i]+wRight[i]*dT[i+1]))
		q := uae[i] * (wall0[i] - t[i])
		rate := flowIn - flowOut
		massRate[i] = rate
		mass[i] = m[i] * rise * ((t[i] - dT[i]) / t[i]) // as an ideal gas from the state its properties are of: above zero, whatever the step
		energyRate[i] = energyIn - energyOut + q
		warmth[i] = q
		enthalpy[i] += w * energyOut
		heat[i] += w * q
		temperature[i] += w * t[i]
		flows[i], temps[i] = flowOut, t[i]
		flowIn, energyIn = flowOut, energyOut
	}
	for i := s.firstMatrix; i <= s.lastMatrix; i++ {
		q := s.warmth[i]
		s.metalRate[i] = s.metalDrift[i] - q*s.perCapacity[i]
		if q < 0 {
			s.sums.heatIn[i] -= w * q
		}
	}
	last := n - 1
	we, wc := p*s.move.DVe[k], p*s.move.DVc[k]
	s.energyRate[0] -= we
	s.energyRate[last] -= wc
	s.sums.work[0] += w * we
	s.sums.work[1] += w * wc
	s.sums.pressure += w * p
	tr.Pressure[k] = p
}
