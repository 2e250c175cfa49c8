package heat

import "math"

// Effectiveness gives the effectiveness [-] of a counterflow heat exchanger, heat over the most that could be
// transferred:
//
//	e = (1 - exp(-N (1 - C))) / (1 - C exp(-N (1 - C))),   C = 1: N/(1 + N),   C = 0: 1 - exp(-N)
//
// N number of transfer units, UA over the smaller capacity rate [-], >= 0; C smaller over larger capacity rate [-],
// 0..1. Capacity rates and UA constant over the exchanger, no conduction along it.
//
// Source: [Kays1984], chapter 2; derivation in any textbook
func Effectiveness(N, C float64) (float64, Fault) {
	if !(N >= 0) || !share(C) {
		return 0, BadNumber
	}
	if math.IsInf(N, 1) {
		return 1, OK
	}
	if C == 1 {
		return N / (1 + N), OK
	}
	e := -math.Expm1(-N * (1 - C))
	return e / (1 - C + C*e), OK
}

// TransferUnits is the inverse of Effectiveness: the number of transfer units [-] that an effectiveness e, 0 <= e < 1,
// takes:
//
//	N = ln((1 - e C)/(1 - e)) / (1 - C),   C = 1: e/(1 - e)
//
// An effectiveness of 1 or more is TransferImpossible.
//
// Source: as Effectiveness
func TransferUnits(e, C float64) (float64, Fault) {
	if !(e >= 0) || !share(C) {
		return 0, BadNumber
	}
	if e >= 1 {
		return 0, TransferImpossible
	}
	if C == 1 {
		return e / (1 - e), OK
	}
	return math.Log1p(e*(1-C)/(1-e)) / (1 - C), OK
}
