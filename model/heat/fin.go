package heat

import "math"

// FinKind is the kind of fin on the outside of the tubes.
type FinKind uint8

const (
	NoFins FinKind = iota
	AnnularFins
	LongitudinalFins
)

// Fins are fins of constant thickness on a round tube.
type Fins struct {
	Kind         FinKind
	Height       float64 // from the tube to the tip [m], > 0
	Thickness    float64 // [m], > 0
	Pitch        float64 // annular: from fin to fin along the tube [m], > thickness
	Count        int     // longitudinal: fins round a tube
	Conductivity float64 // of the metal [W/(m K)], > 0
}

// StraightFin gives the efficiency [-] of a straight fin of constant thickness, mean over base temperature
// difference:
//
//	eta = tanh(m L)/(m L),   m = (2 h/(k t))^1/2,   L = height + t/2
//
// h film [W/(m2 K)], k conductivity [W/(m K)], t thickness [m]. The t/2 stands for the tip; good to 8 % while h t/(2 k) < 0.06.
// Uniform film, conduction across the thickness neglected.
//
// Source: [Incropera2007], section 3.6
func StraightFin(h, k, t, height float64) float64 {
	return tanhRatio(math.Sqrt(2*h/(k*t)) * (height + t/2))
}

// Range of AnnularFin.
const (
	finEfficiencyLow = 0.5
	finRatioHigh     = 6.0
)

// AnnularFin gives the efficiency [-] of an annular fin of constant thickness on a tube of outer radius r [m]:
//
//	eta = tanh(m r phi)/(m r phi),   phi = (R/r - 1)(1 + 0.35 ln(R/r)),   R = r + height + t/2
//
// Symbols as for StraightFin. Range eta >= 0.5 and R/r <= 6, where it is within 1.7 % of the exact solution in Bessel
// functions (measured in the tests; at eta = 0.3 it would be 9 % off), else FinRange.
//
// Source: [Schmidt1949], from memory
func AnnularFin(h, k, t, r, height float64) (float64, Fault) {
	eta := annularFin(h, k, t, r, height)
	if !(eta >= finEfficiencyLow && r+height+t/2 <= finRatioHigh*r) {
		return 0, FinRange
	}
	return eta, OK
}

// annularFin is AnnularFin without its range.
func annularFin(h, k, t, r, height float64) float64 {
	ratio := (r + height + t/2) / r
	return tanhRatio(math.Sqrt(2*h/(k*t)) * r * (ratio - 1) * (1 + 0.35*math.Log(ratio)))
}

// tanhRatio gives tanh(x)/x, 1 at 0.
func tanhRatio(x float64) float64 {
	if x < 1e-4 {
		return 1 - x*x/3
	}
	return math.Tanh(x) / x
}
