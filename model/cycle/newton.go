package cycle

import "math"

// end turns the changes at the end of the cycle into slopes of the state that the next cycle starts from, with all that is
// done between cycles: walls that follow their resistance (moveWalls), pressure put back to its mean. It must be called before
// these are done.
func (g *tangent) end(s *Solver) {
	g.follow = false
	path, k, n := s.path, g.columns, s.n
	mean := s.sums.pressure / path.Period
	heater := 0.0
	for i := range n {
		if s.tubeOf(i) == columnHeater {
			heater += path.Cells[i].Volume
		}
	}
	for c := range k {
		out := &g.slopes[c]
		lift := 0.0
		if g.kinds[c] == columnLift {
			lift = 1
		}
		if path.Target > 0 {
			lift -= g.hot[c] / (heater * path.Period)
		}
		for i := range n {
			w := g.w[i*k+c]
			if tube := s.tubeOf(i); tube != columnMatrix {
				outer := 0.0
				if tube == columnHeater {
					outer = lift
				}
				r, ua := path.Cells[i].Resistance, s.sums.film[i]/path.Period
				w = (outer - r*(g.heat[i*k+c]/path.Period-ua*w)) / (1 + r*ua)
			}
			out[i] = g.t[i*k+c] * (1.0 / temperatureScale)
			out[n+i] = w * (1.0 / temperatureScale)
		}
		out[2*n] = (g.p[c] - s.p*g.sum[c]/(path.Period*mean)) / mean
		out[2*n+1] = lift * (1.0 / temperatureScale)
	}
	for c := range k {
		for r := range k {
			g.system[r][c] = -g.measure(s, r, &g.slopes[c])
		}
		g.system[c][c]++
	}
	g.ready = g.factor()
}

// factor takes the system apart into triangles, in place, its rows exchanged as pivot says. Reports false when it has no
// solution.
func (g *tangent) factor() bool {
	k, a := g.columns, &g.system
	for i := range k {
		best := i
		for row := i + 1; row < k; row++ {
			if math.Abs(a[row][i]) > math.Abs(a[best][i]) {
				best = row
			}
		}
		g.pivot[i] = best
		if best != i {
			a[i], a[best] = a[best], a[i]
		}
		if !(math.Abs(a[i][i]) > 0) {
			return false
		}
		inv := 1 / a[i][i]
		for row := i + 1; row < k; row++ {
			q := a[row][i] * inv
			a[row][i] = q
			for c := i + 1; c < k; c++ {
				a[row][c] -= q * a[i][c]
			}
		}
	}
	return true
}

// solve takes a right-hand side of the system to its solution, in place.
func (g *tangent) solve(b *[maxColumns]float64) {
	k, a := g.columns, &g.system
	for i := range k {
		p := g.pivot[i]
		b[i], b[p] = b[p], b[i]
	}
	for i := range k {
		for c := range i {
			b[i] -= a[i][c] * b[c]
		}
	}
	for i := k - 1; i >= 0; i-- {
		for c := i + 1; c < k; c++ {
			b[i] -= a[i][c] * b[c]
		}
		b[i] /= a[i][i]
	}
}

// measure is what a packed state has of column c, in the unit of its change.
func (g *tangent) measure(s *Solver, c int, x *[maxStates]float64) float64 {
	n := s.n
	switch kind, cell := g.kinds[c], g.cells[c]; kind {
	case columnMatrix:
		return x[n+cell] * temperatureScale
	case columnPressure:
		return x[2*n]
	case columnSpace:
		return x[cell] * temperatureScale
	case columnLift:
		return x[2*n+1] * temperatureScale
	}
	sum, count := 0.0, 0.0
	for i := range n {
		if s.tubeOf(i) == g.kinds[c] {
			sum += x[n+i]
			count++
		}
	}
	return sum / count * temperatureScale
}

// move takes the solver from the state g after a cycle that began at x on to
//
//	g + W c,   (1 - C W) c = C (g - x),
//
// W the slopes and C the measures of the columns: Newton's step for x = g(x), with slopes of zero for what has no column.
func (g *tangent) move(s *Solver, x *[maxStates]float64) {
	var y, r [maxStates]float64
	size := s.pack(&y)
	for i := range size {
		r[i] = y[i] - x[i]
	}
	var b [maxColumns]float64
	for c := range g.columns {
		b[c] = g.measure(s, c, &r)
	}
	g.solve(&b)
	for c := range g.columns {
		v, slope := b[c], &g.slopes[c]
		for i := range size {
			y[i] += v * slope[i]
		}
	}
	s.unpack(&y)
}
