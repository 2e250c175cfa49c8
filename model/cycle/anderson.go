package cycle

const (
	maxDepth  = 8
	maxStates = 2*MaxCells + 2
)

// mixing accelerates the map of the state at the start of a cycle onto the next by Anderson's
// method [Anderson1965]: the next state is the combination of the last maps whose combined change is
// least in the sense of least squares. States are temperatures over a reference of 300 K and
// pressure over its mean.
type mixing struct {
	depth, held int
	n           int
	x, g        [maxStates]float64 // state before the cycle, and after with all corrections
	f           [maxStates]float64 // g - x
	lastG       [maxStates]float64
	lastF       [maxStates]float64
	dF, dG      [maxDepth][maxStates]float64 // differences, newest at next-1
	next        int
	fresh       bool
	cycles      int // maps so far
}

// plainCycles are run before acceleration sets in: the first changes are large and teach it nothing.
const plainCycles = 2

const temperatureScale = 300 // [K]

func (m *mixing) reset(depth int) {
	m.depth = min(depth, maxDepth)
	m.held, m.next = 0, 0
	m.fresh = true
	m.cycles = 0
}

// forget drops what was learnt of the map, and accelerates from the next cycle on.
func (m *mixing) forget() {
	m.reset(m.depth)
	m.cycles = plainCycles
}

// restart keeps what was learnt of the map but takes no difference across a change of it.
func (m *mixing) restart() { m.fresh = true }

// push remembers the state before a cycle.
func (m *mixing) push(s *Solver) { m.n = s.pack(&m.x) }

// mix takes the state after a cycle and replaces it by the accelerated one.
func (m *mixing) mix(s *Solver) {
	m.cycles++
	if m.depth == 0 || m.cycles <= plainCycles {
		return
	}
	n := s.pack(&m.g)
	for i := range n {
		m.f[i] = m.g[i] - m.x[i]
	}
	s.weigh(&m.f)
	if !m.fresh {
		for i := range n {
			m.dF[m.next][i] = m.f[i] - m.lastF[i]
			m.dG[m.next][i] = m.g[i] - m.lastG[i]
		}
		m.next = (m.next + 1) % m.depth
		m.held = min(m.held+1, m.depth)
	}
	m.fresh = false
	m.lastF, m.lastG = m.f, m.g
	if m.held == 0 {
		return
	}
	var gamma [maxDepth]float64
	m.leastSquares(&gamma)
	for j := range m.held {
		for i := range n {
			m.g[i] -= gamma[j] * m.dG[j][i]
		}
	}
	s.unpack(&m.g)
}

// ridge keeps the least squares from reading more out of nearly parallel columns than the curved map of a cycle holds; a tenth
// or ten times as much costs 2 % more steps.
const ridge = 1e-2

// leastSquares solves min |f - sum gamma_j dF_j| by the normal equations with a ridge; the columns are few
// and scaled.
func (m *mixing) leastSquares(gamma *[maxDepth]float64) {
	k := m.held
	var a [maxDepth][maxDepth + 1]float64
	for i := range k {
		for j := range k {
			a[i][j] = dot(&m.dF[i], &m.dF[j], m.n)
		}
		a[i][k] = dot(&m.dF[i], &m.f, m.n)
	}
	for i := range k {
		a[i][i] *= 1 + ridge
	}
	for i := range k { // Gauss elimination, symmetric positive definite: no pivoting needed
		if a[i][i] <= 0 {
			continue
		}
		for r := i + 1; r < k; r++ {
			q := a[r][i] / a[i][i]
			for c := i; c <= k; c++ {
				a[r][c] -= q * a[i][c]
			}
		}
	}
	for i := k - 1; i >= 0; i-- {
		if a[i][i] <= 0 {
			continue
		}
		v := a[i][k]
		for c := i + 1; c < k; c++ {
			v -= a[i][c] * gamma[c]
		}
		gamma[i] = v / a[i][i]
	}
}

func dot(a, b *[maxStates]float64, n int) float64 {
	sum := 0.0
	for i := range n {
		sum += a[i] * b[i]
	}
	return sum
}

// pack writes the state into x and returns its length.
func (s *Solver) pack(x *[maxStates]float64) int {
	n := s.n
	for i := range n {
		x[i] = s.t[i] * (1.0 / temperatureScale)
		x[n+i] = s.wall[i] * (1.0 / temperatureScale)
	}
	x[2*n] = s.p / s.path.Mean
	x[2*n+1] = s.lift * (1.0 / temperatureScale)
	return 2*n + 2
}

// weigh puts the matrix's part of a residual into terms of heat: where the film is excellent the
// profile answers the smallest imbalance with a large move, and its moves say little about how far the
// state is from balance. Each cell counts by the heat it gained over the heat capacity of the gas that
// passes; its gas follows it and does not count. The gas of tubes and ducts is renewed within a cycle and
// follows the rest in the same way, but for the tubes' walls, and counts little.
func (s *Solver) weigh(f *[maxStates]float64) {
	for i := range s.n {
		switch s.kind[i] {
		case Tube:
			f[i] *= tubeWeight
			continue
		case Passive:
			f[i] *= ductWeight
			continue
		case Space:
			continue
		}
		f[i] = 0
		blow := 0.5 * s.cp[i] * s.sums.flowAbs[i]
		f[s.n+i] = heatWeight * s.gain[i] / (blow * temperatureScale)
	}
}

// Weights against the temperatures of spaces and walls: of the matrix's heat, and of the gas in tubes and ducts. Found by trial
// on 900 random machines of three classes; the counts are flat about them.
const (
	heatWeight = 1.5
	tubeWeight = 0.2
	ductWeight = 0.3
)

// unpack takes the state from x, keeping temperatures and pressure physical.
func (s *Solver) unpack(x *[maxStates]float64) {
	n := s.n
	for i := range n {
		if !(x[i]*temperatureScale > minTemperature && x[i]*temperatureScale < maxTemperature) {
			return
		}
	}
	if !(x[2*n] > 0.01) {
		return
	}
	for i := range n {
		s.t[i] = x[i] * temperatureScale
		s.wall[i] = x[n+i] * temperatureScale
	}
	s.p = x[2*n] * s.path.Mean
	s.lift = x[2*n+1] * temperatureScale
}
