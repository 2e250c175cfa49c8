package cycle

// tangent carries small changes of the state at the start of a cycle along with one cycle, and makes of what becomes of them
// Newton's step towards the state that repeats (newton.go). Changes are followed of what lasts beyond a cycle or feeds it:
//
//	each matrix cell (metal and gas together), the mean pressure, the gas of both spaces,
//	the walls of the heater and of the cooler (each moved as a whole), and the lift of the hot end.
//
// The gas of tubes and ducts is renewed within a cycle and is left to the plain map. The changes run in backward Euler steps
// of some time steps each, with the coefficients that the solver has at hand at their ends; films keep their conductance, and
// the gas that leaves a tube cell has the temperature of its middle. So the slopes are good to some per cent, which is enough:
// what is left shrinks by that factor a cycle, and Anderson's method takes care of the rest.
//
// Rows hold one number a column, row by row without gaps: the columns of a cell lie side by side.
type tangent struct {
	ready   bool // slopes are there
	follow  bool // changes run along with the cycle
	columns int
	stride  int // time steps of the solver in a step of the changes
	kinds   [maxColumns]columnKind
	cells   [maxColumns]int // the cell of a column of one cell

	m, u  [MaxCells * maxColumns]float64 // change of mass [kg] and energy [J] of each cell
	t     [MaxCells * maxColumns]float64 // of the gas temperature [K]
	w, w0 [MaxCells * maxColumns]float64 // of the wall or matrix temperature, and what a step starts from [K]
	heat  [MaxCells * maxColumns]float64 // of the heat from tube walls over the cycle so far [J]
	a, a1 [MaxCells * maxColumns]float64 // of the elimination: flow into the next cell [kg/s], temperature [K]
	p     [maxColumns]float64            // of the pressure [Pa]
	sum   [maxColumns]float64            // its integral over the cycle so far [Pa s]
	hot   [maxColumns]float64            // integral of heater volume times change of temperature [m3 K s]

	b1, s1 [MaxCells]float64 // of the elimination, the same for all columns

	slopes [maxColumns][maxStates]float64  // change of the state after the cycle, as packed, by each column's change
	system [maxColumns][maxColumns]float64 // identity less the slopes of the columns' measures, taken apart by factor
	pivot  [maxColumns]int                 // the row that took the place of each
}

// maxColumns is the largest number of changes followed: of the cells all but two spaces and two tubes may be matrix, and there
// are at most six columns beside those of the matrix.
const maxColumns = MaxCells + 2

// tangentSteps is how many steps the changes take through a cycle at least; twice as many save 2 % of the time steps.
const tangentSteps = 10

// columnKind is what a column changes.
type columnKind uint8

const (
	columnMatrix   columnKind = iota // a matrix cell, metal and gas [K]
	columnPressure                   // in mean pressures
	columnSpace                      // the gas of a space [K]
	columnHeater                     // all walls of the heater [K]
	columnCooler                     // all walls of other tubes [K]
	columnLift                       // of the temperature behind the heater's walls [K]
)

// drop forgets all, also a cycle that changes were being followed through.
func (g *tangent) drop() { g.ready, g.follow = false, false }

// begin sets the changes at the start of a cycle, where s holds the properties of the gas.
func (g *tangent) begin(s *Solver) {
	g.follow, g.ready = true, false
	g.stride = max(1, s.move.Steps/tangentSteps)
	g.choose(s)
	k := g.columns
	for _, rows := range []*[MaxCells * maxColumns]float64{&g.m, &g.u, &g.t, &g.w, &g.heat} {
		clear(rows[:s.n*k])
	}
	clear(g.sum[:k])
	clear(g.hot[:k])
	for c := range k {
		switch cell := g.cells[c]; g.kinds[c] {
		case columnMatrix:
			g.w[cell*k+c] = 1
			g.warm(s, c, cell)
		case columnSpace:
			g.warm(s, c, cell)
		case columnPressure:
			for i := range s.n {
				g.m[i*k+c] = s.mp[i] * s.path.Mean
				g.u[i*k+c] = (s.h[i]*s.mp[i] + s.m[i]*s.hp[i] - s.volume[i]) * s.path.Mean
			}
		case columnHeater, columnCooler:
			for i := range s.n {
				if s.tubeOf(i) == g.kinds[c] {
					g.w[i*k+c] = 1
				}
			}
		}
	}
}

// choose lists the columns of a path.
func (g *tangent) choose(s *Solver) {
	g.columns = 0
	add := func(kind columnKind, cell int) {
		g.kinds[g.columns], g.cells[g.columns] = kind, cell
		g.columns++
	}
	heater, cooler := false, false
	for i := range s.n {
		if s.kind[i] == Matrix && !s.path.FixedRun {
			add(columnMatrix, i)
		}
		if s.path.Cells[i].Resistance > 0 {
			heater = heater || s.tubeOf(i) == columnHeater
			cooler = cooler || s.tubeOf(i) == columnCooler
		}
	}
	add(columnPressure, 0)
	add(columnSpace, 0)
	add(columnSpace, s.n-1)
	if heater || s.path.Target > 0 {
		add(columnHeater, 0)
	}
	if cooler {
		add(columnCooler, 0)
	}
	if s.path.Target > 0 {
		add(columnLift, 0)
	}
}

// tubeOf says which column of walls a cell belongs to; columnMatrix stands for none.
func (s *Solver) tubeOf(i int) columnKind {
	switch {
	case s.kind[i] != Tube:
		return columnMatrix
	case s.part[i] == PartHeater:
		return columnHeater
	}
	return columnCooler
}

// warm makes the gas of cell i one kelvin warmer in column c.
func (g *tangent) warm(s *Solver, c, i int) {
	at := i*g.columns + c
	g.t[at] = 1
	g.m[at] = s.mT[i]
	g.u[at] = s.h[i]*s.mT[i] + s.m[i]*s.cp[i]
}

// chain is where an elimination of changes from the first cell on stands.
type chain struct {
	B, S   float64 // flow into the next cell
	B1, S1 float64 // temperature of the last cell
	h, c   float64 // enthalpy of the flow into the next cell, and the flow times cp
	wLast  float64 // weight of the last cell in the face's temperature
	wNext  float64 // weight of the next
}

// step takes the changes over the time a [s], at whose end is the stage just solved; dve and dvc are the rates of the spaces
// there [m3/s]. It is the elimination of stage.go from one end, for many right-hand sides: with A, A1 the parts of a column,
//
//	Z = U - h M + a (UA W + (hIn - h) A - (hOut - h) (M/a + A) + cLast A1),   A1' = Z/X,   A' = M/a + A - D A1'.
func (g *tangent) step(s *Solver, a, dve, dvc float64) {
	n, k := s.n, g.columns
	inva := 1 / a
	g.conduct(s, a)
	g.extend(s, a)
	var x chain
	dv := dve
	for i := range n - 1 {
		h := s.h[i]
		ua := g.film(s, i, a)
		f := s.faceAt(i)
		dhOut, dhIn := f.h-h, x.h-h
		D := s.mT[i]*inva - x.S
		e1 := x.B - s.mp[i]*inva
		cLast := x.c * x.wLast
		inv := 1 / (s.m[i]*s.cp[i] + a*(ua-dhOut*D-dhIn*x.S+f.c*f.wThis-x.c*x.wNext-cLast*x.S1))
		P := s.volume[i] - s.m[i]*s.hp[i] - a*dv + a*(dhIn*x.B-dhOut*e1+cLast*x.B1)
		x.B1, x.S1 = P*inv, -a*f.c*f.wNext*inv
		x.B, x.S = e1-D*x.B1, -D*x.S1
		g.b1[i], g.s1[i] = x.B1, x.S1

		row := i * k
		m := g.m[row : row+k]
		u, w, A, A1 := g.u[row:row+len(m)], g.w0[row:row+len(m)], g.a[row:row+len(m)], g.a1[row:row+len(m)]
		fromM, fromW := -(h+dhOut)*inv, a*ua*inv
		if i == 0 {
			for c, dm := range m {
				z := inv*u[c] + fromM*dm + fromW*w[c]
				A1[c] = z
				A[c] = inva*dm - D*z
			}
		} else {
			fromA, fromA1 := a*(dhIn-dhOut)*inv, a*cLast*inv
			last, last1 := g.a[row-k:row-k+len(m)], g.a1[row-k:row-k+len(m)]
			for c, dm := range m {
				z := (inv*u[c] + fromM*dm) + (fromW*w[c] + fromA*last[c]) + fromA1*last1[c]
				A1[c] = z
				A[c] = inva*dm + last[c] - D*z
			}
		}
		x.h, x.c, x.wLast, x.wNext = f.h, f.c, f.wThis, f.wNext
		dv = 0
	}
	g.close(s, &x, a, dvc)
	for i := n - 2; i >= 0; i-- {
		row := i * k
		A1 := g.a1[row : row+k]
		t, next, dp := g.t[row:row+len(A1)], g.t[row+k:row+k+len(A1)], g.p[:len(A1)]
		b1, s1 := g.b1[i], g.s1[i]
		for c, z := range A1 {
			t[c] = z + b1*dp[c] + s1*next[c]
		}
		g.update(s, i, a)
	}
	for c := range k {
		g.sum[c] += a * g.p[c]
	}
}

// face is a face as a changed state sees it.
type face struct {
	h, c         float64 // enthalpy [J/kg]; flow times cp [W/K]
	wThis, wNext float64 // weights of the cells before and after it in its temperature
}

// faceAt gives face i|i+1 upwind of the flow that the stage has found: its direction may have turned within the stage.
func (s *Solver) faceAt(i int) face {
	flow := s.flow[i]
	f := face{s.hFace[i], flow * s.cpFace[i], s.wLeft[i], s.wRight[i]}
	if s.faceKind[i] == faceUpwind && (flow >= 0) != (f.wThis == 1) {
		up := i
		if flow < 0 {
			up++
		}
		f = face{s.h[up], flow * s.cp[up], f.wNext, f.wThis}
	}
	return f
}

// close solves the two balances of the last cell for its temperature and the pressure, column by column.
func (g *tangent) close(s *Solver, x *chain, a, dv float64) {
	i, k := s.n-1, g.columns
	inva := 1 / a
	h, ua := s.h[i], g.film(s, i, a)
	dh, cLast := x.h-h, x.c*x.wLast
	inv := 1 / (s.m[i]*s.cp[i] + a*(ua-dh*x.S-x.c*x.wNext-cLast*x.S1))
	P := s.volume[i] - s.m[i]*s.hp[i] - a*dv + a*(dh*x.B+cLast*x.B1)
	D := s.mT[i]*inva - x.S
	per := 1 / (s.mp[i]*inva - x.B + D*P*inv)
	row := i * k
	for c := range k {
		dm, A, A1 := g.m[row+c], g.a[row-k+c], g.a1[row-k+c]
		z := g.u[row+c] - h*dm + a*(ua*g.w0[row+c]+dh*A+cLast*A1)
		dp := (dm*inva + A - D*z*inv) * per
		g.p[c] = dp
		g.t[row+c] = (z + P*dp) * inv
	}
	g.update(s, i, a)
}

// film is the conductance that the gas of a cell sees over a step, its matrix eliminated [W/K].
func (g *tangent) film(s *Solver, i int, a float64) float64 {
	ua := s.ua[i]
	if s.kind[i] == Matrix && !s.path.FixedRun {
		c := s.path.Cells[i].Capacity
		ua *= c / (c + a*ua)
	}
	return ua
}

// update sets mass, energy and wall of cell i at the end of a step from its temperature and the pressure.
func (g *tangent) update(s *Solver, i int, a float64) {
	k := g.columns
	row := i * k
	t := g.t[row : row+k]
	m, u, dp := g.m[row:row+len(t)], g.u[row:row+len(t)], g.p[:len(t)]
	mT, mp := s.mT[i], s.mp[i]
	uT, up := s.h[i]*mT+s.m[i]*s.cp[i], s.h[i]*mp+s.m[i]*s.hp[i]-s.volume[i]
	for c, dT := range t {
		m[c] = mT*dT + mp*dp[c]
		u[c] = uT*dT + up*dp[c]
	}
	switch {
	case s.kind[i] == Matrix && !s.path.FixedRun:
		q := a * g.film(s, i, a) / s.path.Cells[i].Capacity
		w, w0 := g.w[row:row+len(t)], g.w0[row:row+len(t)]
		for c, dT := range t {
			w[c] = w0[c] - q*(w0[c]-dT)
		}
	case s.kind[i] == Tube:
		q := a * s.ua[i]
		w, heat := g.w[row:row+len(t)], g.heat[row:row+len(t)]
		for c, dT := range t {
			heat[c] += q * (w[c] - dT)
		}
		if s.path.Target > 0 && s.part[i] == PartHeater {
			hot, v := g.hot[:len(t)], a*s.volume[i]
			for c, dT := range t {
				hot[c] += v * dT
			}
		}
	}
}

// conduct sets what the walls start a step from: those of the matrix after axial conduction.
func (g *tangent) conduct(s *Solver, a float64) {
	k := g.columns
	copy(g.w0[:s.n*k], g.w[:s.n*k])
	if s.path.FixedRun {
		return
	}
	for i := s.firstMatrix; i < s.lastMatrix; i++ {
		row := i * k
		left, right := a*s.conduct[i]/s.path.Cells[i].Capacity, a*s.conduct[i]/s.path.Cells[i+1].Capacity
		for c := range k {
			d := g.w[row+c] - g.w[row+k+c]
			g.w0[row+c] -= left * d
			g.w0[row+k+c] += right * d
		}
	}
}

// extend lets the gas that leaves the matrix be warmer or colder than the end cell by half the difference to the cell
// behind, as leaving has it. The difference is that of the start of the step: gas in the matrix keeps to the metal.
func (g *tangent) extend(s *Solver, a float64) {
	if s.firstMatrix >= s.lastMatrix {
		return
	}
	k := g.columns
	carry := func(face, cell, behind int) {
		c := 0.5 * a * s.flow[face] * s.cp[cell]
		for j := range k {
			extra := c * (g.t[cell*k+j] - g.t[behind*k+j])
			g.u[face*k+j] -= extra
			g.u[(face+1)*k+j] += extra
		}
	}
	if i := s.firstMatrix; i > 0 && s.flow[i-1] < 0 {
		carry(i-1, i, i+1)
	}
	if i := s.lastMatrix; i < s.n-1 && s.flow[i] > 0 {
		carry(i, i, i-1)
	}
}
