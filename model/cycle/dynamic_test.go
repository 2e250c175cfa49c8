package cycle

import (
	"math"
	"testing"

	"hotfront/model/correlation"
	"hotfront/model/gas"
)

// dynamic is a second solution of the same gas path, as plain as it can be: every gas and matrix cell
// is a state of its own, integrated explicitly by the classical Runge-Kutta method of fourth order with
// thousands of steps a cycle; no slip assumption, no implicit step, no linearised stage, no acceleration
// of the cycle map. Its unknowns are temperatures and one pressure, not masses and energies; its faces take
// a limited upstream slope everywhere, in the matrix too; film and transport properties come at each instant
// from the exact laws; its cells are half the size of the production grid's. It shares with the solver under
// test the properties of the gas, the correlations and the assumption of one pressure.
//
// From m dh - V dp = sum of M (hf - h) + Q and m = V/v(T, p), with dT eliminated, the flow out of a cell
// is linear in the flow into it and in dp/dt; the closed end gives dp/dt.
type dynamic struct {
	m      *machine
	law    law
	cells  []dynamicCell
	states []gas.State
	t, tw  []float64 // gas and matrix temperature
	p      float64
	flow   []float64 // over face i|i+1, of the last evaluation [kg/s]
	dt     []float64
	dtw    []float64
	a, b   []float64 // flow over face i|i+1 = a + b dp/dt
	u, w   []float64 // dT/dt = u + w dp/dt
	hf     []float64 // enthalpy at face i|i+1
	heat   []float64 // wall to gas [W]
	ua     []float64
	axial  []float64 // conductance from matrix cell to the next [W/K]
}

type dynamicCell struct {
	kind                 Kind
	volume               float64
	area, dh, film, slim float64
	wall, capacity       float64
}

func newDynamic(m *machine, heater, matrix, cooler int) *dynamic {
	d := &dynamic{m: m, law: m.law()}
	tubes := func(n int, count, bore, length, wall float64) {
		area := count * math.Pi / 4 * bore * bore
		for range n {
			d.cells = append(d.cells, dynamicCell{kind: Tube, volume: area * length / float64(n), area: area, dh: bore,
				film: count * math.Pi * bore * length / float64(n), slim: bore / length, wall: wall})
		}
	}
	d.cells = append(d.cells, dynamicCell{kind: Space})
	tubes(heater, m.tubesH, m.boreH, m.lengthH, m.hot)
	solid := m.area * (1 - m.poro) * m.length / float64(matrix)
	for range matrix {
		d.cells = append(d.cells, dynamicCell{kind: Matrix, volume: m.area * m.poro * m.length / float64(matrix), area: m.area * m.poro,
			dh: m.wire * m.poro / (1 - m.poro), film: 4 * solid / m.wire, capacity: solid * m.rhoC})
	}
	tubes(cooler, m.tubesK, m.boreK, m.lengthK, m.cold)
	d.cells = append(d.cells, dynamicCell{kind: Space})
	n := len(d.cells)
	for _, s := range []*[]float64{&d.t, &d.tw, &d.flow, &d.dt, &d.dtw, &d.a, &d.b, &d.u, &d.w, &d.hf, &d.heat, &d.ua, &d.axial} {
		*s = make([]float64, n)
	}
	d.states = make([]gas.State, n)
	return d
}

// rates evaluates the right-hand side at crank angle th and returns dp/dt.
func (d *dynamic) rates(th float64, t, tw []float64, p float64) float64 {
	g, n := &d.m.gas, len(d.cells)
	omega := 2 * math.Pi * d.m.freq
	ve, dve, vc, dvc := d.law(th)
	d.cells[0].volume, d.cells[n-1].volume = ve, vc
	for i := range d.cells {
		c := &d.cells[i]
		g.At(&d.states[i], t[i], p)
		if c.kind == Space {
			continue
		}
		mu, k := g.Transport(t[i], 1/d.states[i].V)
		re := math.Abs(0.5*(d.flow[i-1]+d.flow[i])) * c.dh / (c.area * mu)
		pr := d.states[i].Cp * mu / k
		wall, nu := c.wall, 0.0
		if c.kind == Matrix {
			wall, nu = tw[i], correlation.ScreenNusselt(re*pr, d.m.poro)
		} else {
			nu = correlation.TubeNusselt(re, pr, c.slim)
		}
		d.ua[i] = nu * k / c.dh * c.film
		d.heat[i] = d.ua[i] * (wall - t[i])
	}
	var dp float64
	for range 3 { // until the faces agree with the directions of flow
		for i := range n - 1 {
			d.hf[i] = d.face(t, i)
		}
		dp = d.march(dve*omega, dvc*omega)
		turned := false
		for i := range n - 1 {
			f := d.a[i] + d.b[i]*dp
			turned = turned || (f >= 0) != (d.flow[i] >= 0)
			d.flow[i] = f
		}
		if !turned {
			break
		}
	}
	in := 0.0
	for i := range n {
		d.dt[i] = d.u[i] + d.w[i]*dp
		if d.cells[i].kind == Matrix {
			out := 0.0
			if d.cells[i+1].kind == Matrix {
				out = d.axial[i] * (tw[i] - tw[i+1])
			}
			d.dtw[i] = (in - out - d.heat[i]) / d.cells[i].capacity
			in = out
		}
	}
	return dp
}

// face gives the enthalpy of the gas that crosses face i|i+1: the upstream cell's with half of its
// slope. In tubes that is the smaller of the slopes on its two sides; in the matrix, where the metal keeps
// the profile smooth, their mean. Only neighbours of the same part count.
func (d *dynamic) face(t []float64, i int) float64 {
	from, back, next := i, i-1, i+1
	if d.flow[i] < 0 {
		from, back, next = i+1, i+2, i
	}
	s := &d.states[from]
	k := d.cells[from].kind
	if k == Space {
		return s.H
	}
	var slope float64
	switch behind, before := d.cells[back].kind == k, d.cells[next].kind == k; {
	case behind && before:
		up, ahead := t[from]-t[back], t[next]-t[from]
		switch {
		case k == Matrix:
			slope = 0.5 * (up + ahead)
		case up*ahead > 0:
			slope = math.Copysign(min(math.Abs(up), math.Abs(ahead)), up)
		}
	case behind:
		slope = t[from] - t[back]
	case before:
		slope = t[next] - t[from]
	}
	return s.H + 0.5*s.Cp*slope
}

func (d *dynamic) march(dve, dvc float64) float64 {
	n := len(d.cells)
	var a, b, hin float64
	for i := range n {
		s, dv := &d.states[i], 0.0
		if i == 0 {
			dv = dve
		} else if i == n-1 {
			dv = dvc
		}
		vol := d.cells[i].volume
		mass := vol / s.V
		e := d.hf[i] - s.H // of what leaves, over the cell's own
		if i == n-1 {
			e = 0
		}
		k := 1 / (mass*s.Cp + e*mass*s.VT/s.V)
		gain := hin - s.H - e
		if i == 0 {
			gain = -e
		}
		d.u[i] = (a*gain + e*dv/s.V + d.heat[i]) * k
		d.w[i] = (b*gain - (mass*s.HP - vol + e*mass*s.VP/s.V)) * k
		a += -dv/s.V + mass/s.V*s.VT*d.u[i]
		b += mass / s.V * (s.VT*d.w[i] + s.VP)
		d.a[i], d.b[i], hin = a, b, d.hf[i]
	}
	return -a / b
}

// dynamicResult is one cycle of the dynamic solver.
type dynamicResult struct {
	we, wc, heater, cooler float64   // [J]
	mean, massDrift        float64   // [Pa]; change of gas mass over its mass
	gain                   []float64 // of each matrix cell [J]
	flow, temp             []float64 // mean |M|, mean T
	lag                    []float64 // integral (cp M)^2/UA dt [J/K]
}

func (d *dynamic) mass() float64 {
	ve, _, vc, _ := d.law(0)
	n := len(d.cells)
	d.cells[0].volume, d.cells[n-1].volume = ve, vc
	var s gas.State
	sum := 0.0
	for i := range n {
		d.m.gas.At(&s, d.t[i], d.p)
		sum += d.cells[i].volume / s.V
	}
	return sum
}

// cycle runs one cycle of the given number of steps.
func (d *dynamic) cycle(steps int) dynamicResult {
	n := len(d.cells)
	r := dynamicResult{gain: make([]float64, n), flow: make([]float64, n), temp: make([]float64, n), lag: make([]float64, n)}
	h := 1 / (d.m.freq * float64(steps))
	dth := 2 * math.Pi / float64(steps)
	omega := 2 * math.Pi * d.m.freq
	var kt, kw [4][]float64
	for j := range 4 {
		kt[j], kw[j] = make([]float64, n), make([]float64, n)
	}
	t, tw := make([]float64, n), make([]float64, n)
	before := d.mass()
	for step := range steps {
		th := float64(step) * dth
		var kp [4]float64
		copy(t, d.t)
		copy(tw, d.tw)
		p := d.p
		for j, c := range [4]float64{0, 0.5, 0.5, 1} {
			if j > 0 {
				for i := range n {
					t[i] = d.t[i] + c*h*kt[j-1][i]
					tw[i] = d.tw[i] + c*h*kw[j-1][i]
				}
				p = d.p + c*h*kp[j-1]
			}
			kp[j] = d.rates(th+c*dth, t, tw, p)
			copy(kt[j], d.dt)
			copy(kw[j], d.dtw)
			if j == 0 { // equal sums over a periodic function are exact enough
				_, dve, _, dvc := d.law(th)
				r.we += h * p * dve * omega
				r.wc += h * p * dvc * omega
				r.mean += p / float64(steps)
				part := 0
				for i := range n {
					r.temp[i] += t[i] / float64(steps)
					if i < n-1 {
						r.flow[i] += math.Abs(d.flow[i]) / float64(steps)
					}
					switch {
					case d.cells[i].kind == Matrix:
						part = 1
						c := d.states[i].Cp * 0.5 * (d.flow[i-1] + d.flow[i])
						r.lag[i] += h * c * c / d.ua[i]
					case d.cells[i].kind == Tube && part == 0:
						r.heater += h * d.heat[i]
					case d.cells[i].kind == Tube:
						r.cooler += h * d.heat[i]
					}
				}
			}
		}
		for i := range n {
			d.t[i] += h / 6 * (kt[0][i] + 2*kt[1][i] + 2*kt[2][i] + kt[3][i])
			dw := h / 6 * (kw[0][i] + 2*kw[1][i] + 2*kw[2][i] + kw[3][i])
			d.tw[i] += dw
			r.gain[i] += dw * d.cells[i].capacity
		}
		d.p += h / 6 * (kp[0] + 2*kp[1] + 2*kp[2] + kp[3])
	}
	r.massDrift = d.mass()/before - 1
	return r
}

// conduction sets the axial conductances from the last cycle, by the same law as the solver under test.
func (d *dynamic) conduction(r *dynamicResult) {
	cells := 0.0
	for _, c := range d.cells {
		if c.kind == Matrix {
			cells++
		}
	}
	step := d.m.length / cells
	for i, c := range d.cells {
		if c.kind != Matrix {
			continue
		}
		var s gas.State
		d.m.gas.At(&s, r.temp[i], d.m.mean)
		mu, k := d.m.gas.Transport(r.temp[i], 1/s.V)
		pe := r.flow[i] * c.dh / (c.area * mu) * s.Cp * mu / k
		d.axial[i] = (d.m.conduct*d.m.area*(1-d.m.poro) + k*c.area*correlation.ScreenDispersion(pe, d.m.poro)) / step
	}
}

// relax moves the matrix profile by what its cells gained over the last cycle, as if every face inside
// answered like a conductance: a way to the periodic state only. Where it ends is decided by the cycles,
// in which the matrix is free.
func (d *dynamic) relax(r *dynamicResult) {
	first, last := -1, -1
	for i, c := range d.cells {
		if c.kind == Matrix {
			if first < 0 {
				first = i
			}
			last = i
		}
	}
	period := 1 / d.m.freq
	n := last - first + 1
	up, piv, rhs := make([]float64, n), make([]float64, n), make([]float64, n)
	left := 0.5 * d.states[first].Cp * r.flow[first-1] * period
	for j := range n {
		i := first + j
		right := 0.5 * d.states[last].Cp * r.flow[last] * period
		if i < last {
			right = 0.5*(r.lag[i]+r.lag[i+1]) + d.axial[i]*period
		}
		piv[j], rhs[j], up[j] = left+right, r.gain[i], right
		if j > 0 {
			q := left / piv[j-1]
			piv[j] -= q * up[j-1]
			rhs[j] += q * rhs[j-1]
		}
		left = right
	}
	shift := 0.0
	for j := n - 1; j >= 0; j-- {
		shift = (rhs[j] + up[j]*shift) / piv[j]
		move := max(-30, min(30, 0.7*shift))
		d.tw[first+j] += move
		d.t[first+j] += move
	}
}

// start takes the first state from the solver under test, by linear interpolation within each part.
func (d *dynamic) start(p *Path, r *Result) {
	d.p = p.Mean
	parts := make([]Part, len(d.cells))
	var count, done [Parts]float64
	past := false
	for i, c := range d.cells {
		switch {
		case c.kind == Matrix:
			parts[i], past = PartRegenerator, true
		case c.kind == Tube && past:
			parts[i] = PartCooler
		case c.kind == Tube:
			parts[i] = PartHeater
		case past:
			parts[i] = PartCompression
		}
		count[parts[i]]++
	}
	for i, part := range parts {
		x := (done[part] + 0.5) / count[part]
		done[part]++
		d.t[i] = within(p, part, x, &r.Temperature)
		d.tw[i] = within(p, part, x, &r.Wall)
	}
}

// within gives v at the place x, 0 to 1, of a part.
func within(p *Path, part Part, x float64, v *[MaxCells]float64) float64 {
	first, n := -1, 0
	for i := range p.N {
		if p.Cells[i].Part == part {
			if first < 0 {
				first = i
			}
			n++
		}
	}
	if n == 1 {
		return v[first]
	}
	y := x*float64(n) - 0.5
	k := first + int(max(0, min(float64(n-2), y)))
	return v[k] + (y-float64(k-first))*(v[k+1]-v[k])
}

// TestDynamic compares the solver on the production grid with the dynamic solver: work, both parts of it
// and heats within 1 %, for five machines in helium and hydrogen from 2 to 15 MPa.
//
// The dynamic solver starts from the other's state, is led to its own periodic state (relax) and then
// left to itself for four cycles. That it has arrived is shown by its own balances: what any part of the
// matrix gains over a cycle, and heat less work, are below 0.2 % of the heat.
func TestDynamic(t *testing.T) {
	s := NewSolver(correlation.NewFast())
	for _, m := range machines() {
		t.Run(m.name, func(t *testing.T) {
			p := m.path(production())
			var r Result
			s.Solve(&r, p, DefaultSettings())
			if !r.Converged {
				t.Fatalf("not converged after %d cycles", r.Cycles)
			}
			d := newDynamic(&m, 8, 20, 8)
			d.start(p, &r)
			const cycles, steps = 14, 2500
			var q dynamicResult
			for c := range cycles {
				q = d.cycle(steps)
				d.conduction(&q)
				if c >= 2 && c < cycles-4 {
					d.relax(&q)
				}
				d.p *= m.mean / q.mean
			}
			sum, spread := 0.0, 0.0
			for _, g := range q.gain {
				sum += g
				spread = max(spread, math.Abs(sum))
			}
			balance := (q.heater + q.cooler - sum - q.we - q.wc) / q.heater
			if !(spread < 2e-3*q.heater && math.Abs(balance) < 2e-3 && math.Abs(q.massDrift) < 1e-8 && math.Abs(q.mean/m.mean-1) < 1e-3) {
				t.Fatalf("dynamic solver not settled: matrix %.1e, balance %.1e, mass %.1e, mean pressure %.1e",
					spread/q.heater, balance, q.massDrift, q.mean/m.mean-1)
			}
			near(t, "expansion work", r.WorkExpansion, q.we, 0.01)
			near(t, "compression work", r.WorkCompression, q.wc, 0.01)
			near(t, "work", r.WorkExpansion+r.WorkCompression, q.we+q.wc, 0.01)
			near(t, "heater heat", heat(&r, p, PartHeater), q.heater, 0.01)
			near(t, "cooler heat", heat(&r, p, PartCooler), q.cooler, 0.01)
			e := func(a, b float64) float64 { return 100 * (a/b - 1) }
			t.Logf("work %+.2f %% of %.1f J, heater %+.2f %%, cooler %+.2f %%; dynamic solver: matrix %.0e, balance %.0e",
				e(r.WorkExpansion+r.WorkCompression, q.we+q.wc), q.we+q.wc, e(heat(&r, p, PartHeater), q.heater), e(heat(&r, p, PartCooler), q.cooler),
				spread/q.heater, balance)
		})
	}
}
