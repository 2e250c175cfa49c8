package cycle

import (
	"math"

	"hotfront/model/gas"
)

// stage advances the unknowns of one implicit stage by one Newton step about the prediction held in
// s.t, s.p and s.flow, and leaves the new temperatures, pressure and flows there.
//
//	a      gamma dt [s]
//	ve, vc volumes of the spaces at the stage [m3]; dve, dvc their rates [m3/s]
//
// The right-hand sides s.mass0, s.energy0 and s.metal0 hold what the stage starts from. Elimination
// runs from both closed ends to a cell in the middle, two chains that the processor works on side by
// side. With the cells of a chain eliminated, the flow into the next cell and the temperature change before it
// are linear in that cell's change of temperature and in that of the pressure,
//
//	M = A + B dp + S dT,   dT(before) = A1 + B1 dp + S1 dT,
//
// and the two balances of the middle cell give its temperature and the pressure. Reports false when
// the result is not physical.
func (s *Solver) stage(a, ve, dve, vc, dvc float64) bool {
	n := s.n
	p := s.p
	s.volume[0], s.volume[n-1] = ve, vc
	s.properties(p)
	s.faces()
	s.balances(a, dve, dvc)

	mid := n / 2
	dT, dp := s.middle(mid)
	if !(math.Abs(dp) < 0.9*p) {
		return false
	}
	s.t[mid] += dT
	s.dT[mid] = dT
	low, high := s.t[mid], s.t[mid]
	d := dT
	for i := mid - 1; i >= 0; i-- {
		r := &s.reduced[i]
		s.flow[i] = r.A + r.B*dp + r.S*d
		d = r.A1 + r.B1*dp + r.S1*d
		s.dT[i] = d
		t := s.t[i] + d
		s.t[i] = t
		low, high = min(low, t), max(high, t)
	}
	d = dT
	for i := mid + 1; i < n; i++ {
		r := &s.reduced[i]
		s.flow[i-1] = -(r.A + r.B*dp + r.S*d)
		d = r.A1 + r.B1*dp + r.S1*d
		s.dT[i] = d
		t := s.t[i] + d
		s.t[i] = t
		low, high = min(low, t), max(high, t)
	}
	s.pBefore, s.p = p, p+dp
	return low > minTemperature && high < maxTemperature
}

// balance is what the balances of a cell hold without their neighbours, over the time a. With M the flows in and out,
// hIn and hOut their enthalpies,
//
//	t dT + p dp = u + M(in) - M(out)
//	x dT - v dp = z + (hIn - h) M(in) - (hOut - h) M(out) + changes of the faces' enthalpies
type balance struct {
	h       float64 // enthalpy of the gas [J/kg]
	u, t, p float64 // of mass [kg/s, kg/(s K), kg/(s Pa)]
	z, x, v float64 // of energy less h times mass [W, W/K, W/Pa]
}

// flux is a face as the elimination needs it.
type flux struct {
	h           float64 // enthalpy of its gas [J/kg]
	left, right float64 // flow times cp times the weight of the cell before and after it [W/K]
}

// reduced is an eliminated cell.
type reduced struct {
	A, B, S    float64 // flow out of it towards the middle
	A1, B1, S1 float64 // its change of temperature
}

// balances fills s.balance and s.flux.
func (s *Solver) balances(a, dve, dvc float64) {
	n := s.n
	inva := 1 / a
	p := s.p
	m, mT, mp, h, cp, hp := s.m[:n], s.mT[:n], s.mp[:n], s.h[:n], s.cp[:n], s.hp[:n]
	mass0, energy0, volume, uae, wall0, t := s.mass0[:n], s.energy0[:n], s.volume[:n], s.uae[:n], s.wall0[:n], s.t[:n]
	out := s.balance[:n]
	for i := range out {
		mass, cold := m[i]*inva, uae[i]
		b := &out[i] // field by field: a literal would be copied
		b.h = h[i]
		b.u, b.t, b.p = mass0[i]*inva-mass, mT[i]*inva, mp[i]*inva
		b.z = (energy0[i]-h[i]*mass0[i]+p*volume[i])*inva + cold*(wall0[i]-t[i])
		b.x = mass*cp[i] + cold
		b.v = volume[i]*inva - mass*hp[i]
	}
	first, last := &out[0], &out[n-1]
	first.z -= p * dve
	first.v -= dve
	last.z -= p * dvc
	last.v -= dvc
	faces := s.flux[:n]
	flow, hFace, cpFace, wLeft, wRight := s.flow[:n], s.hFace[:n], s.cpFace[:n], s.wLeft[:n], s.wRight[:n]
	for i := range faces {
		c := flow[i] * cpFace[i]
		f := &faces[i]
		f.h, f.left, f.right = hFace[i], c*wLeft[i], c*wRight[i]
	}
	faces[n-1] = flux{}
}

// middle eliminates all cells but the given one, into which both chains flow, and solves its balances for its change of
// temperature and the change of pressure.
func (s *Solver) middle(mid int) (dT, dp float64) {
	n := s.n
	var lA, lB, lS, lA1, lB1, lS1 float64 // single numbers: the compiler keeps no structure of six in registers
	var rA, rB, rS, rA1, rB1, rS1 float64
	var lh, ll, lr float64 // the last face of the left chain
	var rh, rl, rr float64 // and of the right one
	// What does not wait for the cell before comes first in each line: the way from one division to the next is what takes time.
	for i, k := 0, n-1; i < mid; i, k = i+1, k-1 {
		c, f := &s.balance[i], &s.flux[i]
		out, gain := f.h-c.h, lh-f.h
		D := c.t - lS
		inv := 1 / ((c.x + f.left - lr - out*c.t) - gain*lS - ll*lS1)
		z, v := (c.z-out*c.u)+(ll*lA1+gain*lA), (c.v+out*c.p)+(ll*lB1+gain*lB)
		lA, lB, lS = (c.u+lA)-(D*z)*inv, (lB-c.p)-(D*v)*inv, (D*f.right)*inv
		lA1, lB1, lS1 = z*inv, v*inv, -f.right*inv
		lh, ll, lr = f.h, f.left, f.right
		o := &s.reduced[i]
		o.A, o.B, o.S, o.A1, o.B1, o.S1 = lA, lB, lS, lA1, lB1, lS1
		if k == mid { // an even number of cells leaves one more on the left
			break
		}

		// The same from the other end, where flows count against their sign.
		c, f = &s.balance[k], &s.flux[k-1]
		out, gain = f.h-c.h, rh-f.h
		D = c.t - rS
		inv = 1 / ((c.x - f.right + rl - out*c.t) - gain*rS + rr*rS1)
		z, v = (c.z-out*c.u)-(rr*rA1-gain*rA), (c.v+out*c.p)-(rr*rB1-gain*rB)
		rA, rB, rS = (c.u+rA)-(D*z)*inv, (rB-c.p)-(D*v)*inv, -(D*f.left)*inv
		rA1, rB1, rS1 = z*inv, v*inv, f.left*inv
		rh, rl, rr = f.h, f.left, f.right
		o = &s.reduced[k]
		o.A, o.B, o.S, o.A1, o.B1, o.S1 = rA, rB, rS, rA1, rB1, rS1
	}
	c := &s.balance[mid]
	il, ir := lh-c.h, rh-c.h
	X := (c.x - lr + rl) - (il*lS + ir*rS) - (ll*lS1 - rr*rS1)
	Z := c.z + (il*lA + ir*rA) + (ll*lA1 - rr*rA1)
	P := c.v + (il*lB + ir*rB) + (ll*lB1 - rr*rB1)
	D := c.t - lS - rS
	dp = (c.u + lA + rA - D*Z/X) / (c.p - lB - rB + D*P/X)
	return (Z + P*dp) / X, dp
}

// The range outside which a state is taken for a failure of the solution, not of the engine [K].
const (
	minTemperature = 200
	maxTemperature = 3000
)

// properties fills mass and its derivatives, enthalpy, heat capacity and film of every cell at the
// predicted state.
func (s *Solver) properties(p float64) {
	n := s.n
	m, mT, mp, volume := s.m[:n], s.mT[:n], s.mp[:n], s.volume[:n]
	s.isobar.Set(&s.gas, p)
	s.isobar.At(&gas.Columns{V: m, VT: mT, VP: mp, H: s.h[:n], Cp: s.cp[:n], HP: s.hp[:n]}, s.t[:n])
	for i := range n {
		v := 1 / m[i]
		mass := volume[i] * v
		m[i] = mass
		mT[i] *= -mass * v
		mp[i] *= -mass * v
	}
}

// faces sets flow directions, face enthalpies and films from the predicted flows and temperatures.
func (s *Solver) faces() {
	n := s.n
	for i := range n - 1 {
		switch s.faceKind[i] {
		case faceMatrix:
			s.hFace[i] = 0.5 * (s.h[i] + s.h[i+1])
			s.cpFace[i] = 0.5 * (s.cp[i] + s.cp[i+1])
		default:
			if s.flow[i] >= 0 {
				s.wLeft[i], s.wRight[i] = 1, 0
				s.cpFace[i] = s.cp[i]
				s.hFace[i] = s.h[i] + s.cp[i]*s.leaving(i, -1)
			} else {
				s.wLeft[i], s.wRight[i] = 0, 1
				s.cpFace[i] = s.cp[i+1]
				s.hFace[i] = s.h[i+1] + s.cp[i+1]*s.leaving(i+1, +1)
			}
		}
	}
}

// leaving gives the temperature of the gas that leaves cell i less that of its centre; the upstream
// cell lies at i+up. Spaces and passive cells are well mixed. At the end of the matrix the profile goes
// on along its last slope.
//
// Tubes: half the slope of the cell, taken as the harmonic mean of the differences to both neighbours
// (van Leer's limiter), so that no new extreme appears. A neighbour of another kind meets the cell at
// its face, half a cell away, so its difference counts twice. In the last tube cell before another kind
// the upstream slope goes on, but not past the wall's temperature.
//
// Source: [vanLeer1979].
func (s *Solver) leaving(i, up int) float64 {
	switch s.kind[i] {
	case Tube:
	case Matrix:
		return 0.5 * (s.t[i] - s.t[i+up])
	default:
		return 0
	}
	j, d := i+up, i-up
	b := s.t[i] - s.t[j]
	if s.kind[j] != Tube {
		b *= 2
	}
	if s.kind[d] == Tube {
		f := s.t[d] - s.t[i]
		if b*f <= 0 {
			return 0
		}
		return b * f / (b + f)
	}
	r := s.wall0[i] - s.t[i]
	if b*r <= 0 {
		return 0
	}
	if h := 0.5 * b; math.Abs(h) < math.Abs(r) {
		return h
	}
	return r
}

type faceKind uint8

const (
	faceUpwind faceKind = iota
	faceMatrix
)
