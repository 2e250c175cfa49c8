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
// side. With the cells of a chain eliminated, the flow into the next cell and the temperature before it
// are linear in that cell's temperature and in the pressure,
//
//	dM = A + B dp + S dT,   dT(before) = A1 + B1 dp + S1 dT,
//
// and the two balances of the middle cell give its temperature and the pressure. Reports false when
// the result is not physical.
func (s *Solver) stage(a, ve, dve, vc, dvc float64) bool {
	n := s.n
	p := s.p
	s.volume[0], s.volume[n-1] = ve, vc
	s.properties(p)
	s.faces()

	mid := n / 2
	left, right := chain{sign: 1}, chain{sign: -1}
	dv := dve
	for i := range mid {
		s.eliminate(&left, i, i, a, dv)
		if k := n - 1 - i; k > mid {
			if i == 0 {
				dv = dvc
			}
			s.eliminate(&right, k, k-1, a, dv)
		}
		dv = 0
	}
	if mid == n-1 {
		dv = dvc
	}
	dT, dp := s.middle(&left, &right, mid, a, dv)
	if !(math.Abs(dp) < 0.9*p) {
		return false
	}
	s.t[mid] += dT
	s.dT[mid] = dT
	ok := s.t[mid] > minTemperature && s.t[mid] < maxTemperature
	d := dT
	for i := mid - 1; i >= 0; i-- {
		s.flow[i] += s.elA[i] + s.elB[i]*dp + s.elS[i]*d
		d = s.elA1[i] + s.elB1[i]*dp + s.elS1[i]*d
		s.dT[i] = d
		s.t[i] += d
		ok = ok && s.t[i] > minTemperature && s.t[i] < maxTemperature
	}
	d = dT
	for i := mid + 1; i < n; i++ {
		s.flow[i-1] -= s.elA[i] + s.elB[i]*dp + s.elS[i]*d
		d = s.elA1[i] + s.elB1[i]*dp + s.elS1[i]*d
		s.dT[i] = d
		s.t[i] += d
		ok = ok && s.t[i] > minTemperature && s.t[i] < maxTemperature
	}
	s.p = p + dp
	return ok
}

// chain is where an elimination stands. Its flows count positive towards the middle.
type chain struct {
	sign       float64 // of its flows against those of s.flow
	A, B, S    float64 // flow into the next cell
	A1, B1, S1 float64 // temperature of the last cell
	flow, h, c float64 // flow into the next cell, its enthalpy, and the flow times cp
	wLast      float64 // weight of the last cell in the face's temperature
	wNext      float64 // weight of the next
}

// eliminate takes cell i, whose face towards the middle has the given index, into the chain. dv is the
// rate of its volume [m3/s].
func (s *Solver) eliminate(x *chain, i, face int, a, dv float64) {
	m, h, vol := s.m[i], s.h[i], s.volume[i]
	ua := s.uae[i]
	flow, hOut := x.sign*s.flow[face], s.hFace[face]
	c := flow * s.cpFace[face]
	wThis, wNext := s.wLeft[face], s.wRight[face]
	if x.sign < 0 {
		wThis, wNext = wNext, wThis
	}
	inva := 1 / a
	Rm := s.mass0[i] - m - a*(flow-x.flow)
	Ru := s.energy0[i] - (m*h - s.p*vol) - a*(flow*hOut-x.flow*x.h-ua*(s.wall0[i]-s.t[i])+s.p*dv)
	dhOut, dhIn := hOut-h, x.h-h
	D := s.mT[i]*inva - x.S
	e0 := Rm*inva + x.A
	e1 := x.B - s.mp[i]*inva
	cLast := x.c * x.wLast
	X := m*s.cp[i] + a*(ua-dhOut*D-dhIn*x.S+c*wThis-x.c*x.wNext-cLast*x.S1)
	Z := Ru - h*Rm + a*(dhIn*x.A-dhOut*e0+cLast*x.A1)
	P := vol - m*s.hp[i] - a*dv + a*(dhIn*x.B-dhOut*e1+cLast*x.B1)
	inv := 1 / X
	x.A1, x.B1, x.S1 = Z*inv, P*inv, -a*c*wNext*inv
	x.A, x.B, x.S = e0-D*x.A1, e1-D*x.B1, -D*x.S1
	x.flow, x.h, x.c, x.wLast, x.wNext = flow, hOut, c, wThis, wNext
	s.elA1[i], s.elB1[i], s.elS1[i] = x.A1, x.B1, x.S1
	s.elA[i], s.elB[i], s.elS[i] = x.A, x.B, x.S
}

// middle solves the two balances of cell i, into which both chains flow, for its change of temperature
// and the change of pressure.
func (s *Solver) middle(l, r *chain, i int, a, dv float64) (dT, dp float64) {
	m, h, vol := s.m[i], s.h[i], s.volume[i]
	ua := s.uae[i]
	inva := 1 / a
	Rm := s.mass0[i] - m + a*(l.flow+r.flow)
	Ru := s.energy0[i] - (m*h - s.p*vol) + a*(l.flow*l.h+r.flow*r.h+ua*(s.wall0[i]-s.t[i])-s.p*dv)
	dl, dr := l.h-h, r.h-h
	cl, cr := l.c*l.wLast, r.c*r.wLast
	X := m*s.cp[i] + a*(ua-dl*l.S-dr*r.S-l.c*l.wNext-r.c*r.wNext-cl*l.S1-cr*r.S1)
	Z := Ru - h*Rm + a*(dl*l.A+dr*r.A+cl*l.A1+cr*r.A1)
	P := vol - m*s.hp[i] - a*dv + a*(dl*l.B+dr*r.B+cl*l.B1+cr*r.B1)
	D := s.mT[i]*inva - l.S - r.S
	dp = (Rm*inva + l.A + r.A - D*Z/X) / (s.mp[i]*inva - l.B - r.B + D*P/X)
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
