package heat

import "math"

// Arrangement is how the tubes of a bank stand.
type Arrangement uint8

const (
	InLine Arrangement = iota
	Staggered
)

// Bank is a bank of equal round tubes in cross-flow, for example the heater tubes on their ring with the flue gas
// flowing through between them.
type Bank struct {
	Arrangement       Arrangement
	Rows              int     // one behind the other in the direction of flow
	TubesPerRow       float64 // beside one another, the mean of the rows
	Diameter          float64 // outer, of the tubes [m]
	TransversePitch   float64 // from tube to tube across the flow [m], > diameter
	LongitudinalPitch float64 // from row to row [m]; not read with one row
	Length            float64 // of a tube in the gas [m]
	FlowArea          float64 // narrowest area of flow [m2]; 0 = from the pitches and fins
	Fins              Fins
}

// bankGeometry is what follows from the dimensions of a bank alone.
type bankGeometry struct {
	area     float64 // narrowest area of flow [m2]
	plain    float64 // outer surface of the tubes without fins [m2]
	bare     float64 // outer surface between the fins [m2]
	fin      float64 // surface of the fins [m2]
	frontal  float64 // of the first row, tubes and gaps [m2]
	rows     float64 // correction for few rows [-]
	pitches  float64 // transverse over longitudinal pitch [-]
	law      bankLaw
	prepared bool
}

// geometry works out the areas. In a staggered bank with narrow diagonals the flow is fastest in these:
//
//	SD = (SL^2 + (ST/2)^2)^1/2;  the narrow width per tube is min(ST - D, 2 (SD - D))
//
// Source: [Incropera2007], section 7.6; the share blocked by fins by derivation
func (b *Bank) geometry() (g bankGeometry, fault Fault) {
	if b.Rows < 1 || !(b.TubesPerRow >= 1 && finite(b.TubesPerRow)) || b.Arrangement > Staggered || b.Fins.Kind > LongitudinalFins {
		return g, BankImpossible
	}
	for _, x := range [...]float64{b.Diameter, b.TransversePitch, b.Length} {
		if !(x > 0 && finite(x)) {
			return g, BadNumber
		}
	}
	if !(b.FlowArea >= 0 && finite(b.FlowArea)) {
		return g, BadNumber
	}
	// width is the narrowest passage per tube, nearest the distance of the axes of the closest tubes.
	width, nearest := b.TransversePitch-b.Diameter, b.TransversePitch
	if b.Rows > 1 {
		if !(b.LongitudinalPitch > 0 && finite(b.LongitudinalPitch)) {
			return g, BadNumber
		}
		g.pitches = b.TransversePitch / b.LongitudinalPitch
		if b.Arrangement == Staggered {
			SD := math.Hypot(b.LongitudinalPitch, b.TransversePitch/2)
			width = min(width, 2*(SD-b.Diameter))
			nearest = min(nearest, SD)
			if b.Rows > 2 {
				nearest = min(nearest, 2*b.LongitudinalPitch)
			}
		} else {
			nearest = min(nearest, b.LongitudinalPitch)
		}
	}
	if !(nearest > b.Diameter) {
		return g, BankImpossible
	}
	if b.Rows > 1 && b.Arrangement == InLine && g.pitches < 0.7 {
		return g, PitchRange
	}
	n := b.TubesPerRow
	tubes := n * float64(b.Rows)
	g.frontal = n * b.TransversePitch * b.Length
	g.plain = tubes * math.Pi * b.Diameter * b.Length
	g.bare = g.plain
	g.area = n * width * b.Length

	if f := &b.Fins; f.Kind != NoFins {
		for _, x := range [...]float64{f.Height, f.Thickness, f.Conductivity} {
			if !(x > 0 && finite(x)) {
				return g, BadNumber
			}
		}
		t, height, r := f.Thickness, f.Height, b.Diameter/2
		if !(nearest > b.Diameter+2*height) {
			return g, BankImpossible // fins of neighbours meet
		}
		switch f.Kind {
		case AnnularFins:
			if !(f.Pitch > t && finite(f.Pitch)) {
				return g, BankImpossible
			}
			per := b.Length / f.Pitch
			R := r + height + t/2
			if R > finRatioHigh*r {
				return g, FinRange
			}
			g.fin = tubes * per * 2 * math.Pi * (R*R - r*r)
			g.bare = g.plain * (1 - t/f.Pitch)
			g.area -= n * per * t * 2 * height
		case LongitudinalFins:
			if f.Count < 1 || !(float64(f.Count)*t < math.Pi*b.Diameter) {
				return g, BankImpossible
			}
			g.fin = tubes * float64(f.Count) * 2 * (height + t/2) * b.Length
			g.bare = g.plain - tubes*float64(f.Count)*t*b.Length
			// Some fin may stand across the narrowest gap: the worst case.
			g.area -= n * 2 * height * b.Length
		}
		if !(g.area > 0) {
			return g, BankImpossible
		}
	}
	if b.FlowArea > 0 {
		g.area = b.FlowArea
	}
	g.rows = rowCorrection(b.Arrangement, b.Rows)
	g.law = newBankLaw(b.Arrangement, g.pitches)
	g.prepared = true
	return g, OK
}

// rowCorrection gives the mean film of a bank of few rows over that of many [-]; between the rows of
// the table in a straight line, from 20 rows on 1.
//
// Source: [Zukauskas1972] as in [Incropera2007], table 7.6, from memory; stated for Re > 1000, used below it too
func rowCorrection(a Arrangement, rows int) float64 {
	at := [...]float64{1, 2, 3, 4, 5, 7, 10, 13, 16, 20}
	c := [...]float64{0.70, 0.80, 0.86, 0.90, 0.92, 0.95, 0.97, 0.98, 0.99, 1}
	if a == Staggered {
		c = [...]float64{0.64, 0.76, 0.84, 0.89, 0.92, 0.95, 0.97, 0.98, 0.99, 1}
	}
	n := float64(rows)
	for i := 1; i < len(at); i++ {
		if n <= at[i] {
			return c[i-1] + (c[i]-c[i-1])*(n-at[i-1])/(at[i]-at[i-1])
		}
	}
	return 1
}

// Range of BankNusselt.
const (
	bankLow  = 1.0
	bankHigh = 2e6
)

// BankNusselt gives the mean Nusselt number [-] of a bank of many rows on the tube diameter:
//
//	Nu = c Re^m Pr^0.36 (Pr/Prw)^1/4
//
//	             in line                     staggered
//	Re           c      m     Re             c                  m
//	to 100       0.9    0.4   to 40          1.04               0.4
//	100-1000     0.52   0.5   40-1000        0.71               0.5
//	1000-2e5     0.27   0.63  1000-2e5       0.35 (ST/SL)^0.2   0.6   (ST/SL >= 2: 0.40)
//	2e5-2e6      0.033  0.8   2e5-2e6        0.031 (ST/SL)^0.2  0.8
//
// Re on the speed in the narrowest area; properties at the mean of the gas temperatures before and behind the
// bank, Prw at the wall. pitches is ST/SL [-], 0 for a single row, which is taken as 1. Re 1 to 2e6 and Pr 0.7 to 500, else
// ReynoldsRange (Pr of flue gas is not checked). Accuracy some 15 %. The steps of the table (up to 28 %, in line at 1000)
// are bridged within a factor of 2 about each bound, in ln Nu against ln Re, so that the law is smooth: ours. In-line banks with
// ST/SL < 0.7 are outside the law, as the geometry of a Bank reports (PitchRange).
//
// Source: [Zukauskas1987], from memory; checked against a worked example of a textbook in the tests
func BankNusselt(a Arrangement, Re, Pr, Prw, pitches float64) (float64, Fault) {
	if !(Re >= bankLow && Re <= bankHigh) {
		return 0, ReynoldsRange
	}
	law := newBankLaw(a, pitches)
	return law.nusselt(Re, Pr, Prw), OK
}

// bankLaw holds the table of BankNusselt for one bank, in logarithms.
type bankLaw struct {
	c, m  [4]float64 // ln c and m of each line
	bound [3]float64 // ln Re between the lines
}

func newBankLaw(a Arrangement, pitches float64) bankLaw {
	c, m, bound := [4]float64{0.9, 0.52, 0.27, 0.033}, [4]float64{0.4, 0.5, 0.63, 0.8}, [3]float64{100, 1000, 2e5}
	if a == Staggered {
		if pitches == 0 {
			pitches = 1
		}
		p := math.Pow(pitches, 0.2)
		c, m, bound = [4]float64{1.04, 0.71, 0.35 * p, 0.031 * p}, [4]float64{0.4, 0.5, 0.6, 0.8}, [3]float64{40, 1000, 2e5}
		if pitches >= 2 {
			c[2] = 0.40
		}
	}
	for i := range c {
		c[i] = math.Log(c[i])
	}
	for i := range bound {
		bound[i] = math.Log(bound[i])
	}
	return bankLaw{c: c, m: m, bound: bound}
}

// nusselt is BankNusselt without its range.
func (l *bankLaw) nusselt(Re, Pr, Prw float64) float64 {
	x := math.Log(Re)
	line := l.c[0] + l.m[0]*x
	for i := range l.bound {
		// w goes smoothly from 0 to 1 across the bound.
		z := 0.5 + (x-l.bound[i])/(2*math.Ln2)
		if z <= 0 {
			break
		}
		w := 1.0
		if z < 1 {
			w = z * z * (3 - 2*z)
		}
		line += w * (l.c[i+1] + l.m[i+1]*x - line)
	}
	return math.Exp(line+0.36*math.Log(Pr)) * math.Sqrt(math.Sqrt(Pr/Prw))
}

// conductance gives the film conductance [W/K] between gas and tubes with the fins, from the film coefficient h, and the
// efficiency of the fins (1 without):
//
//	UA = h (A_bare + eta A_fin)
//
// The law of the plain bank gives h for a finned one too, at the speed between the fins: a rough estimate,
// not confirmed by measurements on finned banks.
//
// Source: [Incropera2007], section 3.6
func (b *Bank) conductance(g *bankGeometry, h float64) (UA, eta float64) {
	eta = 1
	switch f := &b.Fins; f.Kind {
	case AnnularFins:
		eta = annularFin(h, f.Conductivity, f.Thickness, b.Diameter/2, f.Height)
	case LongitudinalFins:
		eta = StraightFin(h, f.Conductivity, f.Thickness, f.Height)
	}
	return h * (g.bare + eta*g.fin), eta
}
