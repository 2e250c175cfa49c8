package loss

import "math"

// BalancedEffectiveness gives the effectiveness of a periodic-flow regenerator with equal blows and a
// matrix of large capacity [-].
//
//	eff = NTU/(NTU + 2),   NTU = h A/(m cp) of one blow
//
// Derivation: with large capacity the matrix keeps a linear profile; gas and matrix differ by a constant
// dT1 in each blow, and h A dT1 = m cp (Th - Tc - 2 dT1). The counterflow exchanger with NTU/2 of
// [Kays1984], where both sides count.
func BalancedEffectiveness(NTU float64) float64 { return NTU / (NTU + 2) }

// CapacityFactor gives the factor on the effectiveness of a balanced regenerator for a matrix of finite
// capacity [-].
//
//	factor = 1 - 1/(9 C^1.93)
//
// C heat capacity of the matrix over that of the gas of one blow [-]. A fit to numerical solutions, within
// 1 % for C > 1.25, NTU of one blow 4 to 28 (2 to 14 as the source counts it) and eff up to 0.9; below NTU
// of 4 it gives too little, 2 % at NTU 2 and C 1.5.
//
// Source: [Kays1984], eq. for rotary regenerators (Lambertson, Coppage and London), from memory.
func CapacityFactor(C float64) float64 { return 1 - 1/(9*math.Pow(C, 1.93)) }
