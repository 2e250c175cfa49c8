package cycle

import "math"

// Tolerances of the periodic state. Each is a share, so that they mean the same for every engine.
const (
	tolBalance  = 2e-4 // heat from walls less work, over heat into the gas at the heater or four times the work, if less
	tolProfile  = 5e-4 // largest difference of mean enthalpy flow between two sections of the matrix, over that heat
	tolWork     = 2e-4 // change of work between cycles, over that heat or four times the work, if less
	tolCoarse   = 1e-2 // balance and profile at which the coarse grid has done its part
	tolPressure = 2e-4 // mean pressure over the one asked for, less one
	tolWall     = 0.1  // change of a wall temperature between cycles [K]

	leastWork  = 0.02 // share of the heat that the error of the work is held against when there is less work
	slopeCycle = 2    // the cycle from rest that small changes are followed through; the one before is too far off

	farMove = 30.0 // of the hot end, from which on a solution goes on over the coarse grid [K]
)

// Result is the periodic state, in joules a cycle and kelvin.
type Result struct {
	Cycles     int // all cycles run
	FineCycles int // of these, on the fine grid
	Steps      int // time steps of all cycles together
	FineSteps  int // time steps of a cycle on the fine grid
	Converged  bool
	Diverged   bool

	PressureMean, PressureMax, PressureMin float64           // [Pa]
	Mass                                   float64           // gas in the path [kg]
	WorkExpansion, WorkCompression         float64           // integral p dV [J]
	Heat                                   [MaxCells]float64 // from wall into gas [J]
	Temperature                            [MaxCells]float64 // time-mean gas temperature [K]
	Wall                                   [MaxCells]float64 // wall or time-mean matrix temperature [K]
	Swing                                  float64           // largest swing of a matrix cell over the cycle [K]
	FilmMean                               [MaxCells]float64 // time-mean UA [W/K]
	FlowMean                               [MaxCells]float64 // time-mean |M| over face i|i+1 [kg/s]
	Enthalpy                               [MaxCells]float64 // net enthalpy over face i|i+1 [J]
	Lag                                    [MaxCells]float64 // integral (cp M)^2/UA dt of a matrix cell [J/K]
	Conduction                             [MaxCells]float64 // axial conduction between matrix cells i and i+1 [J]
	HeatIntoMatrix                         float64           // heat stored by the matrix over a cycle [J]
	Outer                                  float64           // temperature behind the heater walls [K]
	Balance                                float64           // (heat from tube walls - work) / heater heat [-]
	StepError                              float64           // estimated error of the work by the time step, over the work or a fiftieth of the heat [-]; NaN: no estimate
	Profile                                float64           // spread of the mean energy flow through the matrix / heater heat [-]
}

// Settings of the iteration.
type Settings struct {
	MaxCycles int  // give up after this many
	Newton    int  // Newton steps a stage
	Depth     int  // of Anderson's method, 0 = plain repetition
	Slopes    bool // follow small changes through a cycle for Newton's step on the state at its start
	FineOnly  bool // leave out the coarse grid
}

// DefaultSettings are those of production runs.
func DefaultSettings() Settings { return Settings{MaxCycles: 60, Newton: 1, Depth: 8, Slopes: true} }

// Solve finds the periodic state of the path and fills dst. dst.Converged says whether it was
// reached; the rest of dst holds the last cycle all the same.
//
// A solution that leaves the physical range on the coarse grid is tried again from the start on the fine grid with one more
// Newton step. One that does not settle is tried a last time with more Newton steps and cycles, without slopes and with less
// acceleration.
func (s *Solver) Solve(dst *Result, path *Path, set Settings) {
	s.path = path
	s.attempt(dst, path, set)
	if dst.Diverged && !set.FineOnly {
		bolder := set
		bolder.Newton, bolder.FineOnly = set.Newton+1, true
		s.again(dst, path, bolder)
	}
	if !dst.Converged {
		set.Newton, set.Depth, set.Slopes, set.FineOnly, set.MaxCycles = set.Newton+2, min(set.Depth, 4), false, true, 2*set.MaxCycles
		s.again(dst, path, set)
	}
}

// Refine goes on from the last solution on a finer grid: path.Fine has since been filled with more steps. All else must be
// the same. The work on both grids gives the error of the finer one.
func (s *Solver) Refine(dst *Result, path *Path, set Settings) {
	before := *dst
	s.path = path
	s.move = &path.Fine
	s.mixing.restart()
	s.cycles(dst, path, set, false)
	dst.add(&before)
	if !dst.Converged {
		s.again(dst, path, set)
	}
	dst.StepError = s.stepError(dst, before.WorkExpansion+before.WorkCompression, before.FineSteps)
}

// stepError estimates the error of the work from that on a grid of fewer steps: it goes with the square of the step.
func (s *Solver) stepError(r *Result, work float64, steps int) float64 {
	n := float64(r.FineSteps) / float64(steps)
	w := r.WorkExpansion + r.WorkCompression
	return math.Abs(w-work) / (n*n - 1) / max(math.Abs(w), leastWork*math.Abs(s.heatOf(PartHeater)))
}

// add counts in what was done before.
func (r *Result) add(before *Result) {
	r.Cycles += before.Cycles
	r.FineCycles += before.FineCycles
	r.Steps += before.Steps
}

// again is attempt with the cycles and steps of those before counted in.
func (s *Solver) again(dst *Result, path *Path, set Settings) {
	before := *dst
	s.attempt(dst, path, set)
	dst.add(&before)
}

// Resume is Solve for the path of the last solution with the heater at another temperature behind its
// walls: it starts from that solution, which is near, and its slopes. Geometry, gas, motion and cold end must be the same.
func (s *Solver) Resume(dst *Result, path *Path, set Settings) {
	if !dst.Converged || path.Target > 0 {
		s.Solve(dst, path, set)
		return
	}
	old, known := dst.Outer, dst.StepError
	s.path = path
	s.move = &path.Fine
	if moved := s.warm(old); moved > farMove && path.Coarse.Steps > 0 {
		s.move = &path.Coarse
	}
	s.mixing.reset(set.Depth)
	s.cycles(dst, path, set, false)
	if !dst.Converged {
		resumed := *dst
		s.Solve(dst, path, set)
		dst.add(&resumed)
		return
	}
	dst.StepError = known
}

// warm moves gas and metal with the hot end, each by its place between the temperature of the coldest wall
// and that behind the heater walls, which was old [K], and returns by how much that has moved [K].
func (s *Solver) warm(old float64) (moved float64) {
	cold, outer := math.Inf(1), old
	for i := range s.n {
		if s.kind[i] != Tube {
			continue
		}
		cold = min(cold, s.wall[i])
		if s.part[i] == PartHeater {
			outer = s.path.Cells[i].Outer
		}
	}
	stretch := (outer - cold) / (old - cold)
	moved = math.Abs(outer - old)
	if !(stretch > 0) {
		return moved
	}
	for i := range s.n {
		s.t[i] = cold + (s.t[i]-cold)*stretch
		if s.kind[i] == Tube || s.kind[i] == Matrix {
			s.wall[i] = cold + (s.wall[i]-cold)*stretch
		}
	}
	return moved
}

func (s *Solver) attempt(dst *Result, path *Path, set Settings) {
	s.move = &path.Fine
	if path.Coarse.Steps > 0 && !set.FineOnly {
		s.move = &path.Coarse
	}
	s.begin(set)
	s.tangent.drop()
	s.coarseWork = math.NaN()
	s.cycles(dst, path, set, true)
}

// cycles runs cycle after cycle until the state repeats and balances, from rest or from a solution nearby.
func (s *Solver) cycles(dst *Result, path *Path, set Settings, fromRest bool) {
	*dst = Result{}
	lastWork := math.Inf(1)
	for cycle := 1; cycle <= set.MaxCycles; cycle++ {
		s.transport(fromRest && cycle == 1)
		s.conserved()
		s.mixing.push(s)
		if set.Slopes && fromRest && cycle == slopeCycle {
			s.tangent.begin(s)
			s.mixing.forget()
		}
		s.newton = set.Newton
		if fromRest && cycle == 1 { // the first prediction is poor
			s.newton += 2
		}
		if !s.run() {
			dst.Cycles, dst.Diverged = cycle, true
			return
		}
		dst.Steps += s.move.Steps
		if s.move == &path.Fine {
			dst.FineCycles++
		}
		work := s.sums.work[0] + s.sums.work[1]
		hot := s.heatOf(PartHeater)
		scale := math.Abs(hot) + 1e-9*path.Mean*path.Fine.Ve0
		balance := (s.wallHeat() - work) / scale
		profile := s.profileSpread() / scale
		mean := s.sums.pressure / path.Period

		if s.tangent.follow {
			s.tangent.end(s)
		}
		moved := s.moveWalls()
		if !s.tangent.ready {
			s.moveMatrix()
		}
		s.p *= path.Mean / mean
		if s.tangent.ready {
			s.tangent.move(s, &s.mixing.x)
		}
		if s.move == &path.Coarse {
			// Go over to the fine grid once its own error outweighs what is left.
			if (math.Abs(balance) < tolCoarse && profile < tolCoarse && moved < 10*tolWall) || cycle >= set.MaxCycles/3 {
				s.move = &path.Fine
				s.mixing.restart()
			} else {
				s.mixing.mix(s)
			}
			lastWork = work
			s.coarseWork = work
			continue
		}
		// A machine of low efficiency needs the work to a smaller share of the heat.
		strict := min(1, 4*math.Abs(work)/scale+tolWork)
		done := math.Abs(balance) < tolBalance*strict && profile < tolProfile &&
			math.Abs(work-lastWork) < tolWork*scale*strict &&
			math.Abs(mean/path.Mean-1) < tolPressure && moved < tolWall
		lastWork = work
		if done || cycle == set.MaxCycles {
			dst.Cycles, dst.Converged, dst.Balance, dst.Profile = cycle, done, balance, profile
			s.collect(dst)
			dst.StepError = s.stepError(dst, s.coarseWork, path.Coarse.Steps)
			return
		}
		s.mixing.mix(s)
	}
}

// wallHeat is the heat from all walls that neither store nor release heat over a cycle. A matrix
// held at given temperatures is such a wall.
func (s *Solver) wallHeat() float64 {
	sum := 0.0
	for i := range s.n {
		if s.kind[i] != Matrix || s.path.FixedRun {
			sum += s.sums.heat[i]
		}
	}
	return sum
}

func (s *Solver) heatOf(part Part) float64 {
	sum := 0.0
	for i := range s.n {
		if s.part[i] == part && s.kind[i] != Matrix {
			sum += s.sums.heat[i]
		}
	}
	return sum
}

// begin sets up the arrays and a first state: isothermal at the walls.
func (s *Solver) begin(set Settings) {
	path := s.path
	s.gas = path.Gas
	s.n = path.N
	s.lift = 0
	n := s.n
	hot, cold := 0.0, 0.0
	s.firstMatrix, s.lastMatrix = n, -1
	for i := range n {
		c := &path.Cells[i]
		if c.Kind == Matrix {
			s.firstMatrix, s.lastMatrix = min(i, s.firstMatrix), i
			s.perCapacity[i] = 1 / c.Capacity
			if path.FixedRun {
				s.perCapacity[i] = 0
			}
		}
		s.kind[i], s.part[i] = c.Kind, c.Part
		s.volume[i] = c.Volume
		s.wall[i] = c.Wall
		s.t[i] = c.Wall
		s.flow[i], s.flowOld[i] = 0, 0
		s.dT[i] = 0
		s.metalDrift[i] = 0
		s.conduct[i] = 0
		if c.Kind == Tube {
			if hot == 0 {
				hot = c.Wall
			}
			cold = c.Wall
		}
		s.faceKind[i] = faceUpwind
		if c.Kind == Matrix && i+1 < n && path.Cells[i+1].Kind == Matrix {
			s.faceKind[i] = faceMatrix
			s.wLeft[i], s.wRight[i] = 0.5, 0.5
		}
	}
	s.dT[n] = 0 // there is no face behind the last cell: its flow is zero, and what it is multiplied by must be a number
	s.hFace[n-1], s.cpFace[n-1], s.wLeft[n-1], s.wRight[n-1] = 0, 0, 0, 0
	if path.Cells[0].FixedFilm == 0 {
		s.t[0] = hot
		s.t[n-1] = cold
	}
	for i := 1; i < n-1; i++ { // passive cells take the temperature of the part they end
		if s.kind[i] != Passive {
			continue
		}
		switch {
		case s.kind[i+1] == Tube:
			s.t[i] = path.Cells[i+1].Wall
		default:
			s.t[i] = s.t[i-1]
		}
	}
	fixed := 0.0
	for i := 1; i < n-1; i++ {
		fixed += s.volume[i] / s.t[i]
	}
	mean := 0.0
	for k := range s.move.Steps {
		mean += 1 / (s.move.Ve[2*k+1]/s.t[0] + s.move.Vc[2*k+1]/s.t[n-1] + fixed)
	}
	mean /= float64(s.move.Steps)
	s.p = path.Mean / mean / (path.Fine.Ve0/s.t[0] + path.Fine.Vc0/s.t[n-1] + fixed)
	s.mixing.reset(set.Depth)
}

// conserved sets masses and energies from temperatures and pressure.
func (s *Solver) conserved() {
	s.volume[0], s.volume[s.n-1] = s.path.Fine.Ve0, s.path.Fine.Vc0
	s.properties(s.p)
	for i := range s.n {
		s.mass[i] = s.m[i]
		s.energy[i] = s.m[i]*s.h[i] - s.p*s.volume[i]
	}
}

// transport sets the film factors at the mean temperature of each cell: that of the last cycle, moved as far as the state at
// the start was moved since. Gas viscosity and conductivity follow the temperature swing of a cell only in the mean.
func (s *Solver) transport(first bool) {
	path := s.path
	for i := range s.n {
		c := &path.Cells[i]
		if s.kind[i] != Tube && s.kind[i] != Matrix {
			continue
		}
		t := s.t[i]
		if !first {
			t = s.sums.temperature[i]/path.Period + (t - s.tStart[i])
		}
		s.tStart[i] = s.t[i]
		s.gas.At(&s.state, t, path.Mean)
		mu, k := s.gas.Transport(t, 1/s.state.V)
		s.viscosity[i] = mu
		if c.FixedFilm > 0 {
			s.conduct[i] = c.Conduct
			continue
		}
		s.filmScale[i] = k * c.Film / c.Dh
		s.reScale[i] = c.Dh / (c.Area * mu)
		s.prandtl[i] = s.state.Cp * mu / k
		if s.kind[i] == Tube {
			s.tubeFilm[i] = s.fast.NewTubeFilm(s.prandtl[i], c.Slim)
		}
		if s.kind[i] == Matrix && i+1 < s.n && s.kind[i+1] == Matrix {
			re := 0.0
			if !first {
				re = s.sums.flowAbs[i] / path.Period * s.reScale[i]
			}
			s.conduct[i] = c.Conduct + k*c.GasCross*s.fast.MatrixDispersion(&path.Porous, re, s.prandtl[i])
		}
	}
}

// moveWalls moves the tube walls to what the mean heat through their resistance asks for, and the
// temperature behind the heater walls towards a mean gas temperature asked for. It returns the
// largest move [K].
//
// With Q the mean heat into the gas, R the resistance and UA the mean film, Newton's step on
// Tw = To - R Q(Tw) with dQ/dTw taken as UA: it is too cautious, never too bold.
func (s *Solver) moveWalls() float64 {
	path := s.path
	shift := 0.0
	if path.Target > 0 {
		sum, weight := 0.0, 0.0
		for i := range s.n {
			if s.kind[i] == Tube && s.part[i] == PartHeater {
				sum += path.Cells[i].Volume * s.sums.temperature[i] / path.Period
				weight += path.Cells[i].Volume
			}
		}
		shift = path.Target - sum/weight
	}
	s.lift += shift
	largest := math.Abs(shift)
	for i := range s.n {
		c := &path.Cells[i]
		if s.kind[i] != Tube {
			continue
		}
		outer := c.Outer
		if s.part[i] == PartHeater {
			outer += s.lift
		}
		q := s.sums.heat[i] / path.Period
		ua := s.sums.film[i] / path.Period
		tw := s.wall[i]
		next := (outer - c.Resistance*(q-ua*tw)) / (1 + c.Resistance*ua)
		largest = max(largest, math.Abs(next-tw))
		s.wall[i] = next
	}
	return largest
}

// collect fills the result from the last cycle.
func (s *Solver) collect(dst *Result) {
	path := s.path
	dst.FineSteps = path.Fine.Steps
	n := s.n
	dst.PressureMean = s.sums.pressure / path.Period
	dst.PressureMax, dst.PressureMin = s.pressureRange()
	dst.WorkExpansion, dst.WorkCompression = s.sums.work[0], s.sums.work[1]
	for i := range n {
		dst.Mass += s.mass[i]
		dst.Heat[i] = s.sums.heat[i]
		dst.Temperature[i] = s.sums.temperature[i] / path.Period
		dst.Wall[i] = s.wall[i]
		if s.kind[i] == Matrix {
			dst.Wall[i] = s.sums.metal[i] / path.Period
		}
		dst.FilmMean[i] = s.sums.film[i] / path.Period
		dst.FlowMean[i] = s.sums.flowAbs[i] / path.Period
		dst.Enthalpy[i] = s.sums.enthalpy[i]
		dst.Lag[i] = s.sums.blow[i]
		if s.kind[i] == Matrix {
			dst.HeatIntoMatrix += s.sums.heatIn[i]
			dst.Swing = max(dst.Swing, s.sums.wallMax[i]-s.sums.wallMin[i])
			if s.faceKind[i] == faceMatrix {
				dst.Conduction[i] = s.sums.axial[i]
			}
		}
		if s.kind[i] == Tube && s.part[i] == PartHeater {
			dst.Outer = path.Cells[i].Outer + s.lift
		}
	}
}

// pressureRange finds the extremes of the pressure by a parabola through the three values round
// the largest and the smallest at full steps.
func (s *Solver) pressureRange() (high, low float64) {
	steps := s.move.Steps
	at := func(n int) float64 { return s.Trace.Pressure[2*((n+steps)%steps)+1] }
	hi, lo := 0, 0
	for n := range steps {
		if at(n) > at(hi) {
			hi = n
		}
		if at(n) < at(lo) {
			lo = n
		}
	}
	top := func(n int) float64 {
		l, m, r := at(n-1), at(n), at(n+1)
		den := l - 2*m + r
		if den == 0 {
			return m
		}
		return m - (r-l)*(r-l)/(8*den)
	}
	return top(hi), top(lo)
}
