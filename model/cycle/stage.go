package cycle

import "math"

// stage advances the unknowns of one implicit stage by one Newton step about the prediction held in
// s.t, s.p and s.flow, and leaves the new temperatures, pressure and flows there.
//
//	a      gamma dt [s]
//	ve, vc volumes of the spaces at the stage [m3]; dve, dvc their rates [m3/s]
//
// The right-hand sides s.mass0, s.energy0 and s.metal0 hold what the stage starts from. Elimination
// runs from the expansion space to the compression space: with the cells before it eliminated, the
// flow into a cell and the temperature before it are linear in the cell's own temperature and in the
// pressure,
//
//	dM- = A + B dp + S dT,   dT(i-1) = A' + B' dp + S' dT,
//
// and the closed end at the compression space gives dp. Reports false when the result is not physical.
func (s *Solver) stage(a, ve, dve, vc, dvc float64) bool {
	n := s.n
	p := s.p
	s.volume[0], s.volume[n-1] = ve, vc
	s.properties(p)
	s.faces()

	var (
		A, B, S    float64 // flow into the cell
		A1, B1, S1 float64 // temperature of the cell before
		flowIn     float64
		hIn, cIn   float64 // enthalpy at the face before; flow x cp there
		wLIn, wRIn float64
		inva       = 1 / a
	)
	for i := range n {
		dv := 0.0
		if i == 0 {
			dv = dve
		} else if i == n-1 {
			dv = dvc
		}
		m, h, cp := s.m[i], s.h[i], s.cp[i]
		ua, tw := s.uae[i], s.wall0[i]
		vol := s.volume[i]
		var flowOut, hOut, cOut, wL, wR float64
		if i < n-1 {
			flowOut, hOut, wL, wR = s.flow[i], s.hFace[i], s.wLeft[i], s.wRight[i]
			cOut = flowOut * s.cpFace[i]
		}
		Rm := s.mass0[i] - m - a*(flowOut-flowIn)
		Ru := s.energy0[i] - (m*h - p*vol) - a*(flowOut*hOut-flowIn*hIn-ua*(tw-s.t[i])+p*dv)

		dhOut, dhIn := hOut-h, hIn-h
		if i == n-1 {
			dhOut = 0
		}
		if i == 0 {
			dhIn = 0
		}
		D := s.mT[i]*inva - S
		e0 := Rm*inva + A
		e1 := B - s.mp[i]*inva
		X := m*cp + a*(ua-dhOut*D-dhIn*S+cOut*wL-cIn*(wRIn+wLIn*S1))
		Y := a * cOut * wR
		Z := Ru - h*Rm + a*(dhIn*A-dhOut*e0+cIn*wLIn*A1)
		P := vol - m*s.hp[i] - a*dv + a*(dhIn*B-dhOut*e1+cIn*wLIn*B1)
		invX := 1 / X
		A1, B1, S1 = Z*invX, P*invX, -Y*invX
		A, B, S = e0-D*A1, e1-D*B1, -D*S1
		s.elA1[i], s.elB1[i], s.elS1[i] = A1, B1, S1
		s.elA[i], s.elB[i], s.elS[i] = A, B, S
		flowIn, hIn, cIn, wLIn, wRIn = flowOut, hOut, cOut, wL, wR
	}
	dp := -A / B
	if !(math.Abs(dp) < 0.9*p) {
		return false
	}
	dT := 0.0
	for i := n - 1; i >= 0; i-- {
		if i < n-1 {
			s.flow[i] += s.elA[i] + s.elB[i]*dp + s.elS[i]*dT
		}
		dT = s.elA1[i] + s.elB1[i]*dp + s.elS1[i]*dT
		t := s.t[i] + dT
		if !(t > minTemperature && t < maxTemperature) {
			return false
		}
		s.t[i], s.dT[i] = t, dT
	}
	s.p = p + dp
	return true
}

// The range outside which a state is taken for a failure of the solution, not of the engine [K].
const (
	minTemperature = 200
	maxTemperature = 3000
)

// properties fills mass and its derivatives, enthalpy, heat capacity and film of every cell at the
// predicted state.
func (s *Solver) properties(p float64) {
	for i := range s.n {
		s.gas.At(&s.state, s.t[i], p)
		v := 1 / s.state.V
		m := s.volume[i] * v
		s.m[i] = m
		s.mT[i] = -m * s.state.VT * v
		s.mp[i] = -m * s.state.VP * v
		s.h[i], s.cp[i], s.hp[i] = s.state.H, s.state.Cp, s.state.HP
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
